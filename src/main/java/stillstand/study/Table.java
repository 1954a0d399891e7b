package stillstand.study;

import java.util.List;

/**
 * A table as text, with the places of its cells: what a file or a grid of the window gives before any check.
 *
 * @param name path of the file relative to the study, {@code levels.csv}
 * @param headerLine physical line of the header, from 1
 * @param header column names as written, trimmed
 * @param rows the rows below it
 */
public record Table(String name, long headerLine, List<String> header, List<Row> rows) {
    public Table {
        header = List.copyOf(header);
        rows = List.copyOf(rows);
    }

    /**
     * One row; as many cells as it has, which may differ from the header's.
     *
     * @param line physical line on which it ends, from 1
     * @param cells trimmed texts, "" where blank
     */
    public record Row(long line, List<String> cells) {
        public Row {
            cells = List.copyOf(cells);
        }
    }
}
