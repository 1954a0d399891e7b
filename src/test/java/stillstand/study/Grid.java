package stillstand.study;

import java.util.ArrayList;
import java.util.List;

/** Tables in memory, for tests: cells between commas, the header in line 1, as a grid of the window would give them. */
final class Grid {
    private Grid() {}

    static Table table(String name, String... lines) {
        List<Table.Row> rows = new ArrayList<>();
        for (int i = 1; i < lines.length; i++) {
            rows.add(new Table.Row(i + 1, cells(lines[i])));
        }
        return new Table(name, 1, cells(lines[0]), rows);
    }

    private static List<String> cells(String line) {
        List<String> cells = new ArrayList<>();
        for (String cell : line.split(",", -1)) {
            cells.add(cell.strip());
        }
        return cells;
    }
}
