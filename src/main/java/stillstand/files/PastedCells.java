package stillstand.files;

import java.io.IOException;
import java.io.StringReader;
import java.io.UncheckedIOException;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Set;
import org.apache.commons.csv.CSVFormat;
import org.apache.commons.csv.CSVParser;
import org.apache.commons.csv.CSVRecord;
import stillstand.files.TableFile.Separator;

/**
 * Cells as they come from the clipboard: a spreadsheet's, between tabs, or the text of a table that begins with known column
 * names. Texts stay as they are, decimal commas and all; the check says what is wrong with them.
 *
 * @param header column names where the first line holds them; empty where it holds data
 * @param rows of cells, trimmed; they may differ in length
 */
public record PastedCells(List<String> header, List<List<String>> rows) {
    public PastedCells {
        header = List.copyOf(header);
        rows = rows.stream().map(List::copyOf).toList();
    }

    /**
     * Takes a text apart.
     *
     * @param known column names of the table into which it goes
     */
    public static PastedCells of(String text, Set<String> known) {
        String first = TableFile.firstLine(text).orElse("");
        Separator separator = first.contains("\t") ? Separator.TAB : TableFile.separatorOf(first);
        boolean isTable =
                text.contains("\t") || isHeader(cells(first, separator).get(0), known);
        List<List<String>> rows = isTable ? cells(text, text.contains("\t") ? Separator.TAB : separator) : lines(text);
        return isHeader(rows.get(0), known)
                ? new PastedCells(rows.get(0), rows.subList(1, rows.size()))
                : new PastedCells(List.of(), rows);
    }

    /** Two known names at least, and most of them known or the user's own. */
    private static boolean isHeader(List<String> cells, Set<String> known) {
        long named = cells.stream().filter(known::contains).count();
        long filled = cells.stream().filter(cell -> !cell.isEmpty()).count();
        return named >= 2 && 2 * named >= filled;
    }

    private static List<List<String>> cells(String text, Separator separator) {
        CSVFormat format = CSVFormat.DEFAULT
                .builder()
                .setDelimiter(separator.character)
                .setIgnoreEmptyLines(false)
                .get();
        List<List<String>> rows = new ArrayList<>();
        try (CSVParser parser = CSVParser.parse(new StringReader(text), format)) {
            for (CSVRecord record : parser) {
                List<String> row = new ArrayList<>();
                record.forEach(cell -> row.add(cell.strip()));
                rows.add(row);
            }
        } catch (UncheckedIOException e) {
            return text.lines() // a stray double quote: every line by itself
                    .map(line -> Arrays.stream(line.split(String.valueOf(separator.character), -1))
                            .map(String::strip)
                            .toList())
                    .toList();
        } catch (IOException e) {
            throw new UncheckedIOException("reading from memory", e);
        }
        return rows.isEmpty() ? List.of(List.of("")) : rows;
    }

    private static List<List<String>> lines(String text) {
        List<List<String>> rows =
                text.lines().map(line -> List.of(line.strip())).toList();
        return rows.isEmpty() ? List.of(List.of("")) : rows;
    }

    /** Cells as a spreadsheet takes them from the clipboard. */
    public static String text(List<? extends List<String>> rows) {
        CSVFormat format = CSVFormat.TDF
                .builder()
                .setRecordSeparator('\n')
                .setTrim(false)
                .setIgnoreSurroundingSpaces(false)
                .get();
        StringBuilder out = new StringBuilder();
        rows.forEach(row -> out.append(format.format(row.toArray())).append('\n'));
        return out.toString();
    }
}
