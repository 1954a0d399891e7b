package stillstand.files;

import java.util.List;
import org.apache.commons.csv.CSVFormat;
import tools.jackson.core.io.NumberOutput;

/** How tables are written: UTF-8, comma, line feed; no cell that a spreadsheet could run. */
final class CsvCells {
    private static final CSVFormat FORMAT =
            CSVFormat.RFC4180.builder().setRecordSeparator('\n').get();

    private CsvCells() {}

    /** The text of a table. */
    static String table(List<String> header, List<List<String>> rows) {
        StringBuilder out = new StringBuilder(FORMAT.format(header.toArray())).append('\n');
        for (List<String> row : rows) {
            out.append(FORMAT.format(row.stream().map(CsvCells::safe).toArray()))
                    .append('\n');
        }
        return out.toString();
    }

    /** All digits of a number. */
    static String number(double value) {
        return NumberOutput.toString(value, true);
    }

    /**
     * A cell that begins as a formula does gets an apostrophe in front, unless it is a number; words that begin with a negative
     * number get the typographic minus instead.
     */
    static String safe(String cell) {
        if (cell.isEmpty() || "=+-@\t\r".indexOf(cell.charAt(0)) < 0 || isNumber(cell)) {
            return cell;
        }
        return cell.matches("-\\d[\\d.]* [^=+@]*") ? "\u2212" + cell.substring(1) : "'" + cell;
    }

    private static boolean isNumber(String cell) {
        char last = cell.charAt(cell.length() - 1);
        if (!((last >= '0' && last <= '9') || last == '.') || cell.indexOf('x') >= 0 || cell.indexOf('X') >= 0) {
            return false;
        }
        try {
            return Double.isFinite(Double.parseDouble(cell));
        } catch (NumberFormatException e) {
            return false;
        }
    }
}
