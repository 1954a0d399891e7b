package stillstand.files;

import java.io.IOException;
import java.io.StringReader;
import java.io.UncheckedIOException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import org.apache.commons.csv.CSVFormat;
import org.apache.commons.csv.CSVParser;
import org.apache.commons.csv.CSVRecord;
import stillstand.ledger.InputProblem;
import stillstand.ledger.Loaded;
import stillstand.study.Table;

/**
 * A table on disk: UTF-8, cells between commas, semicolons or tabs (whichever the header holds most of), quoted cells,
 * lines of comment that start with {@code #}, blank lines.
 *
 * @param table what it holds
 * @param separator what stands between its cells
 */
record TableFile(Table table, Separator separator) {
    private static final int MOST_ROWS = 500_000;
    private static final Pattern START_LINE = Pattern.compile("startline (\\d+)");

    /** What may stand between cells. */
    enum Separator {
        COMMA(','),
        SEMICOLON(';'),
        TAB('\t');

        final char character;

        Separator(char character) {
            this.character = character;
        }

        /** As the ledger names it. */
        String plural() {
            return name().toLowerCase(Locale.ROOT) + "s";
        }
    }

    /** Reads a table of a study, or says why it cannot. */
    static Loaded<TableFile> read(Path path, String name) {
        Loaded<TextFile> text = TextFile.read(path, name);
        return text.value().isEmpty()
                ? Loaded.failed(text.problems())
                : parse(text.value().get());
    }

    /** Reads the table that a text holds. */
    static Loaded<TableFile> parse(TextFile file) {
        Optional<String> header = firstLine(file.text());
        if (header.isEmpty()) {
            String found = file.text().isBlank() ? "an empty file" : "nothing but comments";
            return Loaded.failed(List.of(InputProblem.ofFile(file.name(), found, "a line of column names")));
        }
        Separator separator = separatorOf(header.get());
        try (CSVParser parser = CSVParser.parse(new StringReader(file.text()), format(separator))) {
            return rows(file.name(), parser, separator);
        } catch (IOException e) {
            throw new UncheckedIOException("reading from memory", e);
        }
    }

    static CSVFormat format(Separator separator) {
        return CSVFormat.DEFAULT
                .builder()
                .setDelimiter(separator.character)
                .setCommentMarker('#')
                .setIgnoreEmptyLines(true)
                .setIgnoreSurroundingSpaces(separator != Separator.TAB)
                .get();
    }

    private static Loaded<TableFile> rows(String name, CSVParser parser, Separator separator) {
        List<String> header = List.of();
        long headerLine = 0;
        List<Table.Row> rows = new ArrayList<>();
        try {
            for (CSVRecord record : parser) {
                List<String> cells = cells(record);
                if (headerLine == 0) {
                    header = cells;
                    headerLine = parser.getCurrentLineNumber();
                } else if (!cells.stream().allMatch(String::isEmpty)) {
                    rows.add(new Table.Row(parser.getCurrentLineNumber(), cells));
                }
                if (rows.size() > MOST_ROWS) {
                    return Loaded.failed(List.of(
                            InputProblem.ofFile(name, "more than " + MOST_ROWS + " rows", "at most " + MOST_ROWS)));
                }
            }
        } catch (UncheckedIOException e) {
            return Loaded.failed(List.of(brokenQuote(name, parser, String.valueOf(e.getMessage()))));
        }
        return Loaded.of(new TableFile(new Table(name, headerLine, header, rows), separator));
    }

    private static List<String> cells(CSVRecord record) {
        List<String> cells = new ArrayList<>(record.size());
        for (String cell : record) {
            cells.add(cell.strip());
        }
        return cells;
    }

    /** The library's exception in our words: only quotes can be broken in a table. */
    private static InputProblem brokenQuote(String name, CSVParser parser, String message) {
        Matcher start = START_LINE.matcher(message);
        return start.find()
                ? new InputProblem(
                        name,
                        Long.parseLong(start.group(1)),
                        0,
                        "",
                        "a quoted cell that never ends",
                        "a closing double quote")
                : new InputProblem(
                        name,
                        parser.getCurrentLineNumber(),
                        0,
                        "",
                        "text after the closing quote of a cell",
                        "the next cell (a double quote inside a quoted cell is written twice)");
    }

    /** The first line that is neither blank nor a comment. */
    static Optional<String> firstLine(String text) {
        int start = 0;
        while (start < text.length()) {
            int end = start;
            while (end < text.length() && text.charAt(end) != '\n' && text.charAt(end) != '\r') {
                end++;
            }
            if (text.charAt(start) != '#' && !text.substring(start, end).isBlank()) {
                return Optional.of(text.substring(start, end));
            }
            start = end + 1;
        }
        return Optional.empty();
    }

    static Separator separatorOf(String header) {
        Separator most = Separator.COMMA;
        for (Separator each : Separator.values()) {
            most = count(header, each) > count(header, most) ? each : most;
        }
        return most;
    }

    private static int count(String header, Separator separator) {
        int found = 0;
        boolean quoted = false;
        for (int i = 0; i < header.length(); i++) {
            quoted ^= header.charAt(i) == '"';
            found += !quoted && header.charAt(i) == separator.character ? 1 : 0;
        }
        return found;
    }
}
