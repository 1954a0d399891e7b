package stillstand.study;

import static stillstand.ledger.InputProblem.quote;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.function.Function;
import java.util.stream.Stream;
import stillstand.shoreline.DatedSample;
import stillstand.shoreline.DatedSample.GrowthPosition;
import stillstand.shoreline.DatedSample.Role;
import stillstand.uncertainty.Uncertain;

/** The rows of {@code samples.csv}. */
final class SamplesTable {
    static final String NAME = "samples.csv";

    private static final Column ELEVATION = Column.withSpread("elevation", "m");
    private static final List<Column> RATIOS = Stream.of(
                    Column.measured("th230_u238", ""),
                    Column.measured("d234u", "permil"),
                    Column.measured("th230_th232", ""),
                    Column.measured("calcite", "percent"),
                    Column.measured("u", "ppm"),
                    Column.measured("th232", "ppb"))
            .map(Column::notUsedYet)
            .toList();
    static final Columns COLUMNS = new Columns(
            Stream.of(
                            Stream.of(
                                    Column.plain("site"),
                                    Column.plain("sample"),
                                    Column.plain("level"),
                                    Column.plain("method"),
                                    ELEVATION),
                            SampleAge.COLUMNS.stream(),
                            SampleDepth.COLUMNS.stream(),
                            RATIOS.stream(),
                            Stream.of(
                                    Column.plain("constants").notUsedYet(),
                                    Column.plain("ratio_correlation").notUsedYet(),
                                    Column.plain("spike_calibration").notUsedYet(),
                                    Column.plain("growth_position"),
                                    Column.plain("laboratory"),
                                    Column.plain("reference"),
                                    Column.plain("dates"),
                                    Column.plain("use"),
                                    Column.plain("reason"),
                                    Column.plain("note")))
                    .flatMap(Function.identity())
                    .toList(),
            List.of("site", "sample"));
    private static final Map<String, GrowthPosition> GROWTH = new LinkedHashMap<>();
    private static final Map<String, Role> DATES = new LinkedHashMap<>();
    private static final Map<String, String> CONSTANTS = new LinkedHashMap<>();

    static {
        GROWTH.put("yes", GrowthPosition.YES);
        GROWTH.put("no", GrowthPosition.NO);
        GROWTH.put("unknown", GrowthPosition.UNKNOWN);
        DATES.put("level", Role.LEVEL);
        DATES.put("minimum", Role.MINIMUM);
        DATES.put("maximum", Role.MAXIMUM);
        List.of("cheng-2013", "cheng-2000", "pre-2000").forEach(id -> CONSTANTS.put(id, id));
    }

    private final Library library;
    private final Map<String, Uncertain> ages;
    private final Findings findings;

    /** @param ages calibrated ages by name, from {@code ages/} */
    SamplesTable(Library library, Map<String, Uncertain> ages, Findings findings) {
        this.library = library;
        this.ages = Map.copyOf(ages);
        this.findings = findings;
    }

    /**
     * A sample and where it belongs.
     *
     * @param key site and level; the level is "" where the sample belongs to the site only
     * @param reader of its row, for problems that show later
     * @param sample absent where the row has problems
     */
    record SampleRow(LevelsTable.Key key, RowReader reader, Optional<DatedSample> sample) {}

    /**
     * Reads all rows.
     *
     * @param sites names of the known sites
     * @param levels known levels by site
     */
    List<SampleRow> read(Table table, Set<String> sites, Map<String, Set<String>> levels) {
        List<SampleRow> samples = new ArrayList<>();
        Map<LevelsTable.Key, Long> seen = new HashMap<>();
        for (RowReader row : RowReader.rowsOf(table, COLUMNS, findings)) {
            String site = row.requiredText("site", "the name of a site");
            String name = row.requiredText("sample", "the name of a sample");
            String level = row.text("level");
            checkPlace(row, site, level, sites, levels.getOrDefault(site, Set.of()));
            Long before = name.isEmpty() ? null : seen.putIfAbsent(new LevelsTable.Key(site, name), row.line());
            if (before != null) {
                row.problem(
                        "sample",
                        quote(name) + " a second time at " + quote(site) + " (first in line " + before + ")",
                        "each sample of a site once");
            }
            samples.add(new SampleRow(new LevelsTable.Key(site, level), row, sample(row, site, level, name)));
        }
        return samples;
    }

    private static void checkPlace(RowReader row, String site, String level, Set<String> sites, Set<String> levels) {
        if (site.isEmpty()) {
            return;
        }
        if (!sites.contains(site)) {
            row.problem("site", quote(site), "a site of " + SitesTable.NAME + RowReader.nearest(site, sites));
        } else if (!level.isEmpty() && !levels.contains(level)) {
            row.problem(
                    "level",
                    quote(level),
                    "a level of " + quote(site) + " in " + LevelsTable.NAME + RowReader.nearest(level, levels));
        }
    }

    private Optional<DatedSample> sample(RowReader row, String site, String level, String name) {
        String where = site + " / " + (level.isEmpty() ? "" : level + " / ") + name;
        Optional<String> method = row.known("method", library.methods()::ids, "the id of a dating method");
        Optional<Uncertain> elevation = row.measured(ELEVATION, where);
        Optional<Uncertain> age = SampleAge.read(row, where, ages);
        boolean hasRatios = ratios(row, where);
        if (!SampleAge.isGiven(row) && !hasRatios) {
            row.problem(
                    SampleAge.AGE.header(),
                    "no age",
                    "age_ka with its spread, age_min_ka and age_max_ka, age_table, or isotope ratios");
        }
        GrowthPosition growth = row.word("growth_position", GROWTH, GrowthPosition.YES);
        if (row.text("growth_position").isEmpty()) {
            row.assume("growth_position is blank", "in place", "Stillstand's default", site);
        }
        Optional<Uncertain> depth = SampleDepth.read(row, where, library.habitats());
        Role dates = row.word("dates", DATES, Role.LEVEL);
        boolean used = row.word("use", LevelsTable.ordered("yes", true, "no", false), true);
        String reason = row.text("reason");
        if (!used && reason.isEmpty()) {
            row.problem("reason", "nothing", "why the sample is not used");
        }
        if (!used) {
            row.assume("sample is set aside", reason, "the study", where);
        }
        return name.isEmpty() || !row.isGood()
                ? Optional.empty()
                : Optional.of(new DatedSample(
                        name,
                        row.optionalText("taxon"),
                        method,
                        elevation,
                        age,
                        growth,
                        dates,
                        used,
                        used ? "" : reason,
                        depth,
                        row.text("laboratory"),
                        row.text("reference"),
                        row.text("note"),
                        row.own()));
    }

    /** Checks the isotope ratios; whether the two that make an age are there. */
    private static boolean ratios(RowReader row, String where) {
        for (Column column : RATIOS) {
            row.measured(column, where);
        }
        row.number("ratio_correlation", -1, 1, "a number from -1 to 1");
        row.word("constants", CONSTANTS, "");
        return !row.text("th230_u238").isEmpty() && !row.text("d234u_permil").isEmpty();
    }
}
