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

    /** The lines of the table, header first; none where there are no rows. */
    List<String> lines() {
        if (rows.isEmpty()) {
            return List.of();
        }
        int[] widths = new int[headers.size()];
        for (int i = 0; i < widths.length; i++) {
            int column = i;
            int widest =
                    rows.stream().mapToInt(row -> width(row.get(column))).max().orElse(0);
            widths[i] = widest == 0 ? 0 : Math.max(widest, width(headers.get(i)));
        }
        List<String> lines = new ArrayList<>(List.of(line(headers, widths)));
        rows.forEach(row -> lines.add(line(row, widths)));
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
