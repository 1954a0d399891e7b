package stillstand.files;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.TreeSet;
import java.util.function.Function;

/** A table to be written: columns, each with its header and what it shows of a row. */
final class CsvTable<R> {
    private final List<R> rows;
    private final List<String> headers = new ArrayList<>();
    private final List<Function<R, String>> cells = new ArrayList<>();

    CsvTable(List<R> rows) {
        this.rows = rows;
    }

    CsvTable<R> text(String header, Function<R, String> cell) {
        headers.add(header);
        cells.add(cell);
        return this;
    }

    /** A column of numbers with all their digits, blank where there is none. */
    CsvTable<R> number(String header, Function<R, Optional<Double>> cell) {
        return text(header, row -> cell.apply(row).map(CsvCells::number).orElse(""));
    }

    /** The user's own columns, by name; blank in a row that has none. */
    CsvTable<R> own(String prefix, Function<R, Map<String, String>> ofRow) {
        TreeSet<String> names = new TreeSet<>();
        rows.forEach(row -> names.addAll(ofRow.apply(row).keySet()));
        names.forEach(name -> text(prefix + name, row -> ofRow.apply(row).getOrDefault(name, "")));
        return this;
    }

    /** The whole table as text. */
    String write() {
        return CsvCells.table(
                headers,
                rows.stream()
                        .map(row -> cells.stream().map(cell -> cell.apply(row)).toList())
                        .toList());
    }
}
