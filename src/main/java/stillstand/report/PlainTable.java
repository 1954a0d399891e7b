package stillstand.report;

import java.util.ArrayList;
import java.util.List;

/** A table in plain text: names to the left, numbers to the right, two spaces between columns. */
final class PlainTable {
    private static final String GAP = "  ";

    private final List<String> headers;
    private final int leftColumns;
    private final List<List<String>> rows = new ArrayList<>();

    /**
     * A table without rows.
     *
     * @param headers of its columns; a column whose cells are all blank is left out
     * @param leftColumns how many of the first columns hold names
     */
    PlainTable(List<String> headers, int leftColumns) {
        this.headers = headers;
        this.leftColumns = leftColumns;
    }

    void row(List<String> cells) {
        rows.add(cells);
    }

    /** A sentence under the first cell, across the others. */
    void sentence(String name, String text) {
        rows.add(List.of(name, text));
    }

    /** The lines of the table, header first. */
    List<String> lines() {
        int[] widths = new int[headers.size()];
        for (List<String> row : rows) {
            for (int i = 0; i < row.size() && (i == 0 || row.size() == headers.size()); i++) {
                widths[i] = Math.max(widths[i], width(row.get(i)));
            }
        }
        for (int i = 0; i < widths.length; i++) {
            widths[i] = widths[i] == 0 ? 0 : Math.max(widths[i], width(headers.get(i)));
        }
        List<String> lines = new ArrayList<>();
        lines.add(line(headers, widths));
        for (List<String> row : rows) {
            lines.add(row.size() == headers.size() ? line(row, widths) : pad(row.get(0), widths[0], true) + GAP + row.get(1));
        }
        return lines;
    }

    private String line(List<String> cells, int[] widths) {
        StringBuilder line = new StringBuilder();
        for (int i = 0; i < widths.length; i++) {
            if (widths[i] > 0) {
                line.append(i == 0 ? "" : GAP).append(pad(cells.get(i), widths[i], i < leftColumns));
            }
        }
        return line.toString().stripTrailing();
    }

    private static String pad(String cell, int width, boolean left) {
        String blanks = " ".repeat(Math.max(width - width(cell), 0));
        return left ? cell + blanks : blanks + cell;
    }

    private static int width(String cell) {
        return cell.codePointCount(0, cell.length());
    }
}
