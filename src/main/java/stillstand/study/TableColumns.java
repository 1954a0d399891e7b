package stillstand.study;

import java.util.List;
import java.util.Map;

/** The columns that the tables of a study may have, for whoever offers them. */
public final class TableColumns {
    private static final Map<String, Columns> TABLES = Map.of(
            SitesTable.NAME, SitesTable.COLUMNS,
            LevelsTable.NAME, LevelsTable.COLUMNS,
            SamplesTable.NAME, SamplesTable.COLUMNS,
            PointsTable.NAME, PointsTable.COLUMNS,
            GiaTable.NAME, GiaTable.COLUMNS);

    private TableColumns() {}

    /** All headers that a table may have besides the user's own, in the order of the README; none where it is not known. */
    public static List<String> known(String table) {
        Columns columns = TABLES.get(table);
        return columns == null
                ? List.of()
                : columns.known().stream()
                        .flatMap(column -> column.headers().stream())
                        .toList();
    }

    /** Headers that a table cannot do without. */
    public static List<String> required(String table) {
        Columns columns = TABLES.get(table);
        return columns == null ? List.of() : columns.required();
    }
}
