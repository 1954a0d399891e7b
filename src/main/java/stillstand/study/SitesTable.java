package stillstand.study;

import static stillstand.ledger.InputProblem.quote;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.function.BiFunction;
import stillstand.ledger.InputWarning;
import stillstand.shoreline.DatedSample;
import stillstand.shoreline.Level;
import stillstand.shoreline.Position;
import stillstand.shoreline.Site;
import stillstand.uncertainty.Exact;
import stillstand.uncertainty.Interval;
import stillstand.uncertainty.Uncertain;
import stillstand.uplift.RatePrior;

/** The rows of {@code sites.csv}. */
final class SitesTable {
    static final String NAME = "sites.csv";

    private static final Column DATUM_OFFSET = Column.measured("datum_offset", "m");
    static final Columns COLUMNS = new Columns(
            List.of(
                    Column.plain("site"),
                    Column.plain("latitude"),
                    Column.plain("longitude"),
                    Column.plain("coast"),
                    Column.plain("distance_along_coast_km"),
                    Column.plain("area_km2"),
                    DATUM_OFFSET,
                    Column.measured("geoid_height", "m").notUsedYet(),
                    Column.measured("great_diurnal_range", "m").notUsedYet(),
                    Column.measured("mhhw", "m").notUsedYet(),
                    Column.measured("mllw", "m").notUsedYet(),
                    Column.measured("breaking_depth", "m").notUsedYet(),
                    Column.measured("storm_swash", "m").notUsedYet(),
                    Column.measured("berm", "m").notUsedYet(),
                    Column.plain("surveyed_from_m"),
                    Column.plain("surveyed_to_m"),
                    Column.plain("local_curve"),
                    Column.plain("rate_prior"),
                    Column.plain("note")),
            List.of("site"));

    private final Library library;
    private final Findings findings;

    SitesTable(Library library, Findings findings) {
        this.library = library;
        this.findings = findings;
    }

    /**
     * A site as far as its own row tells.
     *
     * @param name of the site
     * @param reader of its row, for problems that show later
     * @param prior of its own
     * @param surveyedMetres heights that were surveyed
     * @param datumOffsetMetres height of mean sea level in its datum
     * @param areaKm2 that it stands for in a mean over areas
     * @param toSite makes the site of its levels and of the samples without a level; absent where the row has problems
     */
    record SiteRow(
            String name,
            RowReader reader,
            Optional<RatePrior> prior,
            Optional<Interval> surveyedMetres,
            Uncertain datumOffsetMetres,
            Optional<Double> areaKm2,
            Optional<BiFunction<List<Level>, List<DatedSample>, Site>> toSite) {}

    List<SiteRow> read(Table table) {
        List<SiteRow> sites = new ArrayList<>();
        Map<String, Long> seen = new HashMap<>();
        boolean anyPosition = false;
        for (RowReader row : RowReader.rowsOf(table, COLUMNS, findings)) {
            String name = row.requiredText("site", "the name of a site");
            Long before = name.isEmpty() ? null : seen.putIfAbsent(name, row.line());
            if (before != null) {
                row.problem("site", quote(name) + " a second time (first in line " + before + ")", "each site once");
            }
            sites.add(site(row, name));
            anyPosition |= !row.text("latitude").isEmpty();
        }
        if (sites.isEmpty()) {
            findings.add(new stillstand.ledger.InputProblem(
                    table.name(), table.headerLine(), 0, "", "no row below the header", "one row a site"));
        } else if (!anyPosition) {
            findings.add(new InputWarning(
                    table.name(), 0, 0, "no site has a latitude and longitude: none can be shown on a map"));
        }
        return sites;
    }

    private SiteRow site(RowReader row, String name) {
        Optional<Position> position = position(row);
        Optional<Double> distance = row.number("distance_along_coast_km");
        Optional<Uncertain> datum = row.measured(DATUM_OFFSET, name);
        for (Column column : COLUMNS.known()) {
            if (!column.isUsed() && column.spread() != Column.Spread.NONE) {
                row.measured(column, name);
            }
        }
        Optional<Interval> surveyed = surveyed(row);
        Optional<String> localCurve = row.known("local_curve", library::curveIds, "the id of a curve");
        Optional<RatePrior> prior = row.optionalText("rate_prior").flatMap(RatePriorText::parse);
        if (prior.isEmpty() && !row.text("rate_prior").isEmpty()) {
            row.problem("rate_prior", quote(row.text("rate_prior")), RatePriorText.EXPECTED);
        }
        Optional<Double> area = row.number("area_km2").filter(km2 -> {
            if (!(km2 > 0)) {
                row.problem("area_km2", quote(row.text("area_km2")), "an area above 0");
            }
            return km2 > 0;
        });
        Uncertain offset = datum.orElse(new Exact(0));
        if (row.text(DATUM_OFFSET.header()).isEmpty()) {
            row.assume("datum_offset_m is blank", "0 m, exact", "Stillstand's default", name);
        }
        BiFunction<List<Level>, List<DatedSample>, Site> toSite = (levels, samples) -> new Site(
                name,
                position,
                row.optionalText("coast"),
                distance,
                offset,
                surveyed,
                localCurve,
                levels,
                samples,
                row.text("note"),
                row.own());
        return new SiteRow(
                name, row, prior, surveyed, offset, area, Optional.of(toSite).filter(make -> row.isGood()));
    }

    static Optional<Position> position(RowReader row) {
        Optional<Double> latitude = row.number("latitude", -90, 90, "degrees from -90 to 90");
        Optional<Double> longitude = row.number("longitude", -180, 360, "degrees from -180 to 360");
        requireBoth(row, "latitude", "longitude");
        return latitude.isPresent() && longitude.isPresent()
                ? Optional.of(new Position(latitude.get(), longitude.get()))
                : Optional.empty();
    }

    private Optional<Interval> surveyed(RowReader row) {
        Optional<Double> from = row.number("surveyed_from_m");
        Optional<Double> to = row.number("surveyed_to_m");
        requireBoth(row, "surveyed_from_m", "surveyed_to_m");
        if (from.isEmpty() || to.isEmpty()) {
            return Optional.empty();
        }
        if (!(to.get() > from.get())) {
            row.problem(
                    "surveyed_to_m",
                    quote(row.text("surveyed_to_m")),
                    "a height above surveyed_from_m (" + row.text("surveyed_from_m") + ")");
            return Optional.empty();
        }
        return Optional.of(new Interval(from.get(), to.get()));
    }

    /** Two cells that mean something only together. */
    private static void requireBoth(RowReader row, String one, String other) {
        boolean hasOne = !row.text(one).isEmpty();
        if (hasOne != !row.text(other).isEmpty()) {
            String blank = hasOne ? other : one;
            row.problem(blank, "nothing", "a value, since " + (hasOne ? one : other) + " has one");
        }
    }
}
