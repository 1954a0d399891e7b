package stillstand.study;

import static stillstand.ledger.InputProblem.quote;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import stillstand.comparison.TerraceTilt;
import stillstand.shoreline.Position;
import stillstand.study.SitesData.TerracePoints;
import stillstand.uncertainty.Uncertain;

/** The rows of {@code points.csv}: many points measured on one terrace. */
final class PointsTable {
    static final String NAME = "points.csv";

    private static final Column ELEVATION = Column.withSpread("elevation", "m");
    static final Columns COLUMNS = new Columns(
            List.of(
                    Column.plain("site"),
                    Column.plain("level"),
                    Column.plain("latitude"),
                    Column.plain("longitude"),
                    Column.plain("distance_km"),
                    ELEVATION,
                    Column.plain("note")),
            List.of("site", "level", "elevation_m"));
    private static final int FEWEST = 3;

    private final Findings findings;

    PointsTable(Findings findings) {
        this.findings = findings;
    }

    /** A point and where it was read; absent where its row has problems. */
    private record Row(RowReader reader, Optional<TerraceTilt.Point> point) {}

    /** Points by terrace; what is wrong is found on the way. */
    List<TerracePoints> read(Table table, Map<String, Set<String>> levels) {
        Map<LevelsTable.Key, List<Row>> rows = new LinkedHashMap<>();
        for (RowReader row : RowReader.rowsOf(table, COLUMNS, findings)) {
            String site = row.requiredText("site", "the name of a site");
            String level = row.requiredText("level", "the name of a level");
            Set<String> ofSite = levels.getOrDefault(site, Set.of());
            if (!site.isEmpty() && ofSite.isEmpty()) {
                row.problem("site", quote(site), "a site that has levels" + RowReader.nearest(site, levels.keySet()));
            } else if (!level.isEmpty() && !site.isEmpty() && !ofSite.contains(level)) {
                row.problem("level", quote(level), "a level of " + quote(site) + RowReader.nearest(level, ofSite));
            }
            rows.computeIfAbsent(new LevelsTable.Key(site, level), key -> new ArrayList<>())
                    .add(new Row(row, point(row, site + " / " + level)));
        }
        List<TerracePoints> terraces = new ArrayList<>();
        rows.forEach((key, ofLevel) -> terrace(key, ofLevel).ifPresent(terraces::add));
        return terraces;
    }

    private static Optional<TerraceTilt.Point> point(RowReader row, String where) {
        Optional<Uncertain> elevation = row.measured(ELEVATION, where);
        Optional<Double> distance = row.number("distance_km");
        Optional<Position> position = SitesTable.position(row);
        if (elevation.isPresent() && elevation.get().isExact()) {
            row.problem(ELEVATION.header(), "a spread of 0", "one above 0, since points are weighed by their spreads");
        }
        if (row.isGood() && distance.isEmpty() && position.isEmpty()) {
            row.problem("distance_km", "nothing", "a distance along the coast, or a latitude and longitude");
        }
        return row.isGood()
                ? elevation.map(
                        height -> new TerraceTilt.Point(height.mean(), height.standardDeviation(), distance, position))
                : Optional.empty();
    }

    private Optional<TerracePoints> terrace(LevelsTable.Key key, List<Row> rows) {
        List<TerraceTilt.Point> points =
                rows.stream().flatMap(row -> row.point().stream()).toList();
        if (points.size() < rows.size()) {
            return Optional.empty();
        }
        RowReader first = rows.get(0).reader();
        if (points.size() < FEWEST) {
            first.problem(
                    "level",
                    points.size() + (points.size() == 1 ? " point of " : " points of ") + quote(key.level()),
                    FEWEST + " or more, since fewer make neither a line nor a plane with an error");
            return Optional.empty();
        }
        boolean half =
                halfFilled(rows, "distance_km", point -> point.distanceKm().isPresent());
        half |= halfFilled(rows, "latitude", point -> point.position().isPresent());
        if (half) {
            return Optional.empty();
        }
        if (TerraceTilt.of(key.site(), key.level(), points, 1, Optional.empty()).isEmpty()) {
            first.warn(
                    "level",
                    "the points of level " + quote(key.level())
                            + " lie at one place or on one line: no tilt can be told from them");
        }
        return Optional.of(new TerracePoints(key.site(), key.level(), points));
    }

    /** Whether a cell is filled at some points of a terrace and blank at others, which becomes a problem. */
    private static boolean halfFilled(
            List<Row> rows, String header, java.util.function.Predicate<TerraceTilt.Point> has) {
        long filled =
                rows.stream().filter(row -> has.test(row.point().orElseThrow())).count();
        if (filled == 0 || filled == rows.size()) {
            return false;
        }
        rows.stream()
                .filter(row -> !has.test(row.point().orElseThrow()))
                .findFirst()
                .ifPresent(row -> row.reader()
                        .problem(
                                header,
                                "nothing",
                                "a value, since other points of "
                                        + quote(row.reader().text("level")) + " have one"));
        return true;
    }
}
