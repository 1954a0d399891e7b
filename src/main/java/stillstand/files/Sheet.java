package stillstand.files;

import java.io.IOException;
import java.io.StringReader;
import java.io.UncheckedIOException;
import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.Optional;
import java.util.OptionalInt;
import org.apache.commons.csv.CSVFormat;
import org.apache.commons.csv.CSVParser;
import org.apache.commons.csv.CSVRecord;
import stillstand.files.TableFile.Separator;
import stillstand.study.Table;

/**
 * A table of a study as it is edited: the cells, and everything else of its file. Comments, blank lines, separator, line
 * ends, byte order mark and the spelling of every row that is not touched stay as they are, so that a table nobody edited
 * is written back byte by byte. A row that is touched is written anew: its cells trimmed and quoted only where they must be.
 * The comments above a row that is removed move to the row below. A row of blank cells alone is not written.
 *
 * <p>Immutable; rows count from 0 below the header, columns from 0.
 */
public final class Sheet implements DraftFile {
    private static final String MARK = "\uFEFF";

    private final String name;
    private final String mark;
    private final char separator;
    private final String newLine;
    private final Line header;
    private final List<Line> rows;
    private final String tail;
    private final int columnCount;

    private Sheet(String name, String mark, char separator, String newLine, Line header, List<Line> rows, String tail) {
        this.name = name;
        this.mark = mark;
        this.separator = separator;
        this.newLine = newLine;
        this.header = header;
        this.rows = rows;
        this.tail = tail;
        this.columnCount = Math.max(
                header.cells.size(),
                rows.stream().mapToInt(row -> row.cells.size()).max().orElse(0));
    }

    /**
     * A line of cells.
     *
     * @param above comments and blank lines above it, each with its line end
     * @param cells trimmed
     * @param written how it stands in the file, with its line end but for the last; "" where it does not
     */
    private record Line(String above, List<String> cells, String written) {
        boolean isBlank() {
            return cells.stream().allMatch(String::isEmpty);
        }
    }

    /** An empty table of these columns. */
    public static Sheet of(String name, List<String> header) {
        return new Sheet(name, "", ',', "\n", line(',', "\n", "", header), List.of(), "");
    }

    /**
     * Takes a text apart.
     *
     * @param text of the file, with its byte order mark if it has one
     * @return empty where {@link TableFile} cannot read it
     */
    static Optional<Sheet> parse(String name, String text) {
        String mark = text.startsWith(MARK) ? MARK : "";
        String plain = text.substring(mark.length());
        TextFile file = new TextFile(name, plain, "");
        Optional<TableFile> table = TableFile.parse(file).value();
        if (table.isEmpty()) {
            return Optional.empty();
        }
        Separator separator = table.get().separator();
        List<String> physical = lines(plain);
        List<Line> found = new ArrayList<>();
        StringBuilder above = new StringBuilder();
        int taken = 0;
        try (CSVParser parser = CSVParser.parse(new StringReader(plain), TableFile.format(separator))) {
            for (CSVRecord record : parser) {
                int end = (int) Math.min(parser.getCurrentLineNumber(), physical.size());
                while (taken < end - 1 && isPassedOver(physical.get(taken))) {
                    above.append(physical.get(taken++));
                }
                String written = String.join("", physical.subList(taken, end));
                taken = end;
                List<String> cells = new ArrayList<>();
                record.forEach(cell -> cells.add(cell.strip()));
                Line line = new Line(above.toString(), List.copyOf(cells), written);
                if (!found.isEmpty() && line.isBlank()) {
                    above.append(written);
                } else {
                    found.add(line);
                    above.setLength(0);
                }
            }
        } catch (IOException e) {
            throw new UncheckedIOException("reading from memory", e);
        }
        String tail = above + String.join("", physical.subList(taken, physical.size()));
        List<Line> rows = List.copyOf(found.subList(1, found.size()));
        return Optional.of(new Sheet(name, mark, separator.character, lineEnd(physical), found.get(0), rows, tail));
    }

    private static boolean isPassedOver(String line) {
        return line.startsWith("#") || line.equals("\n") || line.equals("\r") || line.equals("\r\n");
    }

    /** The lines of a text, each with its end. */
    private static List<String> lines(String text) {
        List<String> lines = new ArrayList<>();
        int start = 0;
        for (int i = 0; i < text.length(); i++) {
            char here = text.charAt(i);
            boolean pair = here == '\r' && i + 1 < text.length() && text.charAt(i + 1) == '\n';
            if (here == '\n' || (here == '\r' && !pair)) {
                lines.add(text.substring(start, i + 1));
                start = i + 1;
            }
        }
        if (start < text.length()) {
            lines.add(text.substring(start));
        }
        return lines;
    }

    private static String lineEnd(List<String> lines) {
        String first = lines.get(0);
        return first.endsWith("\r\n") ? "\r\n" : first.endsWith("\r") ? "\r" : "\n";
    }

    @Override
    public String name() {
        return name;
    }

    /** Column names as written; the rows may have more cells. */
    public List<String> header() {
        return header.cells;
    }

    /** Cells of the longest line. */
    public int columnCount() {
        return columnCount;
    }

    public int rowCount() {
        return rows.size();
    }

    /** The text of a cell, "" where there is none. */
    public String cell(int row, int column) {
        List<String> cells = rows.get(row).cells;
        return column < cells.size() ? cells.get(column) : "";
    }

    /** Place of a column; empty where there is none of that name. */
    public OptionalInt column(String named) {
        int place = header.cells.indexOf(named);
        return place < 0 ? OptionalInt.empty() : OptionalInt.of(place);
    }

    @Override
    public String text() {
        StringBuilder out = new StringBuilder(mark);
        places(out);
        return out.append(tail).toString();
    }

    /** The table as it will be read from the file again: every row with the line on which it then stands. */
    public Table table() {
        long[] places = places(new StringBuilder());
        List<Table.Row> kept = new ArrayList<>();
        for (int i = 0; i < rows.size(); i++) {
            if (!rows.get(i).isBlank()) {
                kept.add(new Table.Row(places[i + 1], rows.get(i).cells));
            }
        }
        return new Table(name, places[0], header.cells, kept);
    }

    /** Line in the file of the header and then of each row, from 1; a row that is not written has that of the one before it. */
    public long[] linesInFile() {
        return places(new StringBuilder());
    }

    private long[] places(StringBuilder out) {
        long[] places = new long[rows.size() + 1];
        long line = 0;
        for (int i = 0; i <= rows.size(); i++) {
            Line each = i == 0 ? header : rows.get(i - 1);
            out.append(each.above);
            line += lines(each.above).size();
            if (i == 0 || !each.isBlank()) {
                String text = each.written;
                out.append(text);
                line += lines(text).size();
                boolean last = i == rows.size() && tail.isEmpty();
                if (!last && !text.endsWith("\n") && !text.endsWith("\r")) {
                    out.append(newLine);
                }
            }
            places[i] = Math.max(1, line);
        }
        return places;
    }

    /** A line that is spelt anew. */
    private Line line(String above, List<String> cells) {
        return line(separator, newLine, above, cells);
    }

    private static Line line(char separator, String newLine, String above, List<String> cells) {
        String written = CSVFormat.DEFAULT
                .builder()
                .setDelimiter(separator)
                .setCommentMarker('#')
                .get()
                .format(cells.toArray());
        return new Line(above, List.copyOf(cells), written + newLine);
    }

    /** The same table with a block of cells written into it; rows and columns it lacks are made. */
    public Sheet withCells(int row, int column, List<? extends List<String>> block) {
        List<Line> changed = new ArrayList<>(rows);
        for (int i = 0; i < block.size(); i++) {
            Line before = row + i < rows.size() ? rows.get(row + i) : new Line("", List.of(), "");
            List<String> cells = padded(before.cells, column + block.get(i).size());
            for (int j = 0; j < block.get(i).size(); j++) {
                cells.set(column + j, block.get(i).get(j).strip());
            }
            while (changed.size() <= row + i) {
                changed.add(new Line("", padded(List.of(), 0), ""));
            }
            changed.set(row + i, before.cells.equals(cells) ? before : line(before.above, cells));
        }
        return with(header, changed);
    }

    /** Cells enough for the header and for so many; more are dropped where they are blank. */
    private List<String> padded(List<String> cells, int least) {
        List<String> padded = new ArrayList<>(cells);
        int wanted = Math.max(least, header.cells.size());
        while (padded.size() < wanted) {
            padded.add("");
        }
        while (padded.size() > wanted && padded.get(padded.size() - 1).isEmpty()) {
            padded.remove(padded.size() - 1);
        }
        return padded;
    }

    /** The same table with blank rows before a row. */
    public Sheet withBlankRows(int before, int count) {
        List<Line> changed = new ArrayList<>(rows);
        Line blank = new Line("", Collections.nCopies(header.cells.size(), ""), "");
        changed.addAll(before, Collections.nCopies(count, blank));
        return with(header, changed);
    }

    /** The same table without some rows, {@code from} included, {@code to} not. */
    public Sheet withoutRows(int from, int to) {
        List<Line> changed = new ArrayList<>(rows.subList(0, from));
        StringBuilder orphaned = new StringBuilder();
        rows.subList(from, to).forEach(row -> orphaned.append(row.above));
        String moved = orphaned.toString();
        for (int i = to; i < rows.size(); i++) {
            Line row = rows.get(i);
            changed.add(i == to ? new Line(moved + row.above, row.cells, row.written) : row);
        }
        return new Sheet(
                name, mark, separator, newLine, header, List.copyOf(changed), to < rows.size() ? tail : moved + tail);
    }

    /** The same table with one more column at its end. */
    public Sheet withColumn(String named) {
        return withHeader(columnCount, named);
    }

    /** The same table with another name above a column. */
    public Sheet withHeader(int column, String named) {
        List<String> names = new ArrayList<>(header.cells);
        while (names.size() <= column) {
            names.add("");
        }
        names.set(column, named.strip());
        Sheet renamed = with(line(header.above, names), rows);
        return renamed.header.cells.size() == header.cells.size() ? renamed : renamed.allPadded();
    }

    private Sheet allPadded() {
        return with(
                header,
                rows.stream()
                        .map(row ->
                                row.cells.size() >= header.cells.size() ? row : line(row.above, padded(row.cells, 0)))
                        .toList());
    }

    /** The same table without a column. */
    public Sheet withoutColumn(int column) {
        return with(
                without(header, column),
                rows.stream().map(row -> without(row, column)).toList());
    }

    private Line without(Line line, int column) {
        if (column >= line.cells.size()) {
            return line;
        }
        List<String> cells = new ArrayList<>(line.cells);
        cells.remove(column);
        return line(line.above, cells);
    }

    private Sheet with(Line newHeader, List<Line> newRows) {
        return new Sheet(name, mark, separator, newLine, newHeader, List.copyOf(newRows), tail);
    }

    /** Whether the other has the same rows, blank ones counted, and would be written in the same way. */
    @Override
    public boolean equals(Object other) {
        return this == other
                || (other instanceof Sheet sheet
                        && name.equals(sheet.name)
                        && rows.size() == sheet.rows.size()
                        && text().equals(sheet.text()));
    }

    @Override
    public int hashCode() {
        return 31 * name.hashCode() + rows.hashCode();
    }
}
