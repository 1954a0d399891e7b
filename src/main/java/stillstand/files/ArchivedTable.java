package stillstand.files;

import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.Optional;
import java.util.function.Predicate;
import java.util.regex.Pattern;
import java.util.stream.IntStream;
import stillstand.ledger.InputProblem;
import stillstand.ledger.Loaded;
import stillstand.study.NumberForm;
import stillstand.study.Table;

/**
 * A table as archives hold them: cells between tabs, semicolons, commas or blanks; lines of comment that start with
 * {@code #} or {@code %}; any text before the numbers; a header in the line above the numbers, in the comment above them, or
 * none.
 *
 * @param table what it holds; without a header, its header is blank
 * @param description how it was read, in a sentence
 */
record ArchivedTable(Table table, String description) {
    private static final int MOST_LINES = 500_000;
    /** What a cell of numbers looks like, well or badly written: so that a bad number is named and not taken for text. */
    private static final Pattern LIKE_A_NUMBER =
            Pattern.compile("[-+\u2212]?[0-9.][0-9.,'\u2019]*([eE][-+\u2212]?[0-9]+)?%?|(?i:nan|na|n/a|null|--?)|");

    private static final Pattern LINE_END = Pattern.compile("\r\n|\n|\r");
    private static final Pattern BLANKS = Pattern.compile("\\s+");

    /** What may stand between cells, the surest sign first. */
    private enum Between {
        TABS("tabs"),
        SEMICOLONS("semicolons"),
        COMMAS("commas"),
        BLANKS("blanks");

        private final String words;

        Between(String words) {
            this.words = words;
        }

        List<String> cells(String line) {
            return switch (this) {
                case TABS -> cut(line, '\t');
                case SEMICOLONS -> cut(line, ';');
                case COMMAS -> cut(line, ',');
                case BLANKS -> List.of(ArchivedTable.BLANKS.split(line.strip(), -1));
            };
        }

        private static List<String> cut(String line, char at) {
            List<String> cells = new ArrayList<>();
            StringBuilder cell = new StringBuilder();
            boolean quoted = false;
            for (int i = 0; i < line.length(); i++) {
                char each = line.charAt(i);
                quoted ^= each == '"';
                if (each == at && !quoted) {
                    cells.add(cell.toString().strip());
                    cell.setLength(0);
                } else if (each != '"') {
                    cell.append(each);
                }
            }
            cells.add(cell.toString().strip());
            return cells;
        }
    }

    private record Line(long number, String text) {
        boolean isComment() {
            return text.stripLeading().startsWith("#") || text.stripLeading().startsWith("%");
        }
    }

    /** Reads the table that a text holds. */
    static Loaded<ArchivedTable> parse(TextFile file) {
        List<Line> lines = new ArrayList<>();
        long number = 0;
        for (String text : LINE_END.split(file.text(), -1)) {
            number++;
            if (!text.isBlank()) {
                lines.add(new Line(number, text));
            }
        }
        List<Line> content = lines.stream().filter(line -> !line.isComment()).toList();
        if (content.size() > MOST_LINES) {
            return Loaded.failed(List.of(
                    InputProblem.ofFile(file.name(), content.size() + " lines of table", "at most " + MOST_LINES)));
        }
        Optional<Parts> parts = find(file.name(), lines, content, 2, ArchivedTable::isAllNumbers)
                .or(() -> find(file.name(), lines, content, 2, ArchivedTable::holdsNumbers))
                .or(() -> find(file.name(), lines, content, 1, ArchivedTable::isAllNumbers));
        if (parts.isPresent()) {
            return Loaded.of(parts.get().table());
        }
        String found = lines.isEmpty() ? "an empty file" : "no line of numbers that could be a row of a table";
        return Loaded.failed(List.of(InputProblem.ofFile(
                file.name(),
                found,
                "a table of numbers with at least 2 rows, cells between commas, semicolons, tabs or blanks")));
    }

    /** The table whose first row is the first of so many rows in succession with equally many cells, at least two. */
    private static Optional<Parts> find(
            String name, List<Line> lines, List<Line> content, int together, Predicate<List<String>> isRow) {
        for (Between between : Between.values()) {
            int lastCount = 0;
            int run = 0;
            for (int i = 0; i < content.size(); i++) {
                List<String> cells = between.cells(content.get(i).text());
                int count = cells.size() > 1 && isRow.test(cells) ? cells.size() : 0;
                run = count == lastCount ? run + 1 : 1;
                if (count > 1 && run == together) {
                    return Optional.of(new Parts(name, between, lines, content, i - together + 1));
                }
                lastCount = count;
            }
        }
        return Optional.empty();
    }

    private static boolean isAllNumbers(List<String> cells) {
        return cells.stream().allMatch(cell -> LIKE_A_NUMBER.matcher(cell).matches())
                && cells.stream().anyMatch(cell -> !cell.isEmpty());
    }

    /** Whether there are numbers beside columns of text. */
    private static boolean holdsNumbers(List<String> cells) {
        return cells.stream().filter(cell -> NumberForm.parse(cell).isPresent()).count() > 1;
    }

    /** The parts of a file whose first row is found. */
    private record Parts(String name, Between between, List<Line> lines, List<Line> content, int start) {
        ArchivedTable table() {
            int width = cells(content.get(start)).size();
            int top = start;
            while (top > 0 && cells(content.get(top - 1)).size() == width) {
                top--;
            }
            boolean headed = top < start && isHeader(content.get(top));
            Optional<Line> header = headed ? Optional.of(content.get(top)) : commentAbove(content.get(top), width);
            List<String> names = header.map(this::namesIn).orElse(Collections.nCopies(width, ""));
            List<Table.Row> rows = new ArrayList<>();
            for (Line line : content.subList(headed ? top + 1 : top, content.size())) {
                rows.add(new Table.Row(line.number(), cells(line)));
            }
            Table table = new Table(name, header.map(Line::number).orElse(0L), names, rows);
            return new ArchivedTable(table, description(table, header, top));
        }

        private String description(Table table, Optional<Line> header, int top) {
            String headed = header.map(
                            line -> "column names in line " + line.number() + (line.isComment() ? ", a comment" : ""))
                    .orElse("no line of column names");
            String passed =
                    top == 0 ? "" : "; " + (top == 1 ? "1 line" : top + " lines") + " of text before it left out";
            return table.rows().size() + " rows, " + between.words + " between cells, " + headed + passed + ".";
        }

        private List<String> cells(Line line) {
            return between.cells(line.text());
        }

        /** Whether most cells hold names: a row with one bad number is no header. */
        private boolean isHeader(Line line) {
            List<String> cells = cells(line);
            long numbers = cells.stream()
                    .filter(cell -> NumberForm.parse(cell).isPresent())
                    .count();
            return 2 * numbers < cells.size();
        }

        private List<String> namesIn(Line header) {
            return between.cells(
                    header.isComment()
                            ? header.text().strip().replaceFirst("^[#%]+", "").strip()
                            : header.text());
        }

        /** The nearest of the comments right above the first row that has a word for each column. */
        private Optional<Line> commentAbove(Line first, int width) {
            int at = lines.indexOf(first);
            return IntStream.iterate(at - 1, i -> i >= 0, i -> i - 1)
                    .mapToObj(lines::get)
                    .takeWhile(Line::isComment)
                    .filter(line -> namesIn(line).size() == width && !isAllNumbers(namesIn(line)))
                    .findFirst();
        }
    }
}
