package stillstand.study;

import static stillstand.ledger.InputProblem.quote;

import java.util.ArrayList;
import java.util.Collection;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.function.Function;
import stillstand.ledger.InputProblem;
import stillstand.shoreline.DatedSample;
import stillstand.shoreline.FormsAt;
import stillstand.shoreline.IndicativeMeaning;
import stillstand.shoreline.Indicator;
import stillstand.shoreline.Level;
import stillstand.shoreline.StageChoice;
import stillstand.uncertainty.Exact;
import stillstand.uncertainty.Uncertain;
import stillstand.uncertainty.Uniform;

/** The rows of {@code levels.csv}. */
final class LevelsTable {
    static final String NAME = "levels.csv";

    private static final Column ELEVATION = Column.withSpread("elevation", "m");
    private static final Column REFERENCE_WATER_LEVEL = Column.measured("reference_water_level", "m");
    private static final Column COVER = Column.measured("cover", "m");
    private static final Column LOWERING = Column.measured("lowering", "m_per_kyr");
    static final Columns COLUMNS = new Columns(
            List.of(
                    Column.plain("site"),
                    Column.plain("level"),
                    ELEVATION,
                    Column.plain("indicator"),
                    REFERENCE_WATER_LEVEL,
                    Column.plain("indicative_range_m"),
                    Column.plain("forms_at"),
                    COVER,
                    Column.plain("cover_up_to_m"),
                    LOWERING,
                    Column.plain("highstand"),
                    Column.plain("terrace"),
                    Column.plain("certainty"),
                    Column.plain("order"),
                    Column.plain("coseismic_step_m"),
                    Column.plain("note")),
            List.of("site", "level", "elevation_m"));
    private static final Map<String, FormsAt> FORMS_AT = formsAt();
    private static final Map<String, Boolean> CERTAINTY = ordered("sure", false, "doubtful", true);

    private final Library library;
    private final Findings findings;

    LevelsTable(Library library, Findings findings) {
        this.library = library;
        this.findings = findings;
    }

    /** Where a level stands. */
    record Key(String site, String level) {}

    /**
     * A level as far as its own row tells.
     *
     * @param key its site and name
     * @param reader of its row, for problems that show later
     * @param elevationMetres as surveyed; absent where it cannot be read
     * @param formsAt when it formed
     * @param highstand what is said of its highstand
     * @param doubtful whether it may well be no shoreline
     * @param order its place in the flight, if given
     * @param toLevel makes the level of its samples; absent where the row has problems
     */
    record LevelRow(
            Key key,
            RowReader reader,
            Optional<Uncertain> elevationMetres,
            FormsAt formsAt,
            StageChoice highstand,
            boolean doubtful,
            Optional<Integer> order,
            Optional<Function<List<DatedSample>, Level>> toLevel) {}

    /**
     * Reads all rows.
     *
     * @param sites names of the known sites
     * @param stages for each site name, the labels that a pin may name; absent where sea level itself has problems
     */
    List<LevelRow> read(Table table, Collection<String> sites, Function<String, Optional<StageLabels>> stages) {
        List<LevelRow> levels = new ArrayList<>();
        Map<Key, Long> seen = new HashMap<>();
        Map<List<Object>, String> orders = new HashMap<>();
        for (RowReader row : RowReader.rowsOf(table, COLUMNS, findings)) {
            String site = row.requiredText("site", "the name of a site");
            String name = row.requiredText("level", "the name of a level");
            if (!site.isEmpty() && !sites.contains(site)) {
                row.problem("site", quote(site), "a site of " + SitesTable.NAME + RowReader.nearest(site, sites));
            }
            Key key = new Key(site, name);
            Long before = name.isEmpty() ? null : seen.putIfAbsent(key, row.line());
            if (before != null) {
                row.problem(
                        "level",
                        quote(name) + " a second time at " + quote(site) + " (first in line " + before + ")",
                        "each level of a site once");
            }
            levels.add(level(row, key, stages.apply(site), orders));
        }
        if (levels.isEmpty()) {
            findings.add(new InputProblem(
                    table.name(), table.headerLine(), 0, "", "no row below the header", "one row a level"));
        }
        return levels;
    }

    private LevelRow level(RowReader row, Key key, Optional<StageLabels> stages, Map<List<Object>, String> orders) {
        String where = key.site() + " / " + key.level();
        Optional<Uncertain> elevation = row.measured(ELEVATION, where);
        if (row.hasColumn(ELEVATION.header()) && row.text(ELEVATION.header()).isEmpty()) {
            row.problem(ELEVATION.header(), "nothing", "a height in metres");
        }
        FormsAt formsAt = row.word("forms_at", FORMS_AT, FormsAt.HIGHSTAND);
        IndicativeMeaning meaning = meaning(row, where, formsAt);
        Uncertain cover = cover(row, where);
        Uncertain lowering = row.measuredLength(LOWERING, where).orElse(new Exact(0));
        StageChoice highstand = stages.map(labels -> StageChoiceText.read(row, "highstand", labels))
                .orElse(StageChoice.ANY);
        boolean doubtful = row.word("certainty", CERTAINTY, false);
        Optional<Integer> order = order(row, key, orders);
        double step = row.length("coseismic_step_m").orElse(0.0);
        Function<List<DatedSample>, Level> toLevel = samples -> new Level(
                key.level(),
                elevation.orElseThrow(),
                meaning,
                formsAt,
                cover,
                lowering,
                highstand,
                row.optionalText("terrace"),
                doubtful,
                order,
                step,
                samples,
                row.text("note"),
                row.own());
        boolean whole = row.isGood() && elevation.isPresent() && !key.level().isEmpty();
        return new LevelRow(
                key,
                row,
                elevation,
                formsAt,
                highstand,
                doubtful,
                order,
                Optional.of(toLevel).filter(make -> whole));
    }

    private IndicativeMeaning meaning(RowReader row, String where, FormsAt formsAt) {
        Optional<Indicator> indicator = row.known("indicator", library.indicators()::ids, "the id of an indicator")
                .flatMap(library.indicators()::find);
        Optional<Uncertain> reference = row.measured(REFERENCE_WATER_LEVEL, where);
        Optional<Double> range = row.length("indicative_range_m");
        Optional<IndicativeMeaning> usual = indicator.flatMap(Indicator::meaning);
        if (row.text("indicator").isEmpty() && reference.isEmpty() && range.isEmpty()) {
            row.assume("no indicator is named", "reference water level 0 m, exact", "Stillstand's default", where);
        }
        boolean stated = reference.isPresent() && range.isPresent();
        if (indicator.isPresent() && usual.isEmpty() && !stated && !isLimiting(formsAt)) {
            row.problem(
                    "indicator",
                    quote(row.text("indicator")) + ", of which no usual values are known",
                    "reference_water_level_m and indicative_range_m beside it");
        }
        if (usual.isPresent() && !stated) {
            row.assume(
                    "usual meaning of indicator " + row.text("indicator"),
                    usual.get().referenceWaterLevelMetres().mean() + " m, range "
                            + usual.get().rangeMetres() + " m",
                    indicator.map(Indicator::source).orElse(""),
                    "all");
        }
        IndicativeMeaning start = usual.orElseGet(() -> new IndicativeMeaning(row.text("indicator"), new Exact(0), 0));
        return new IndicativeMeaning(
                start.indicator(),
                reference.orElse(start.referenceWaterLevelMetres()),
                range.orElse(start.rangeMetres()));
    }

    private static boolean isLimiting(FormsAt formsAt) {
        return formsAt == FormsAt.MARINE_LIMITING || formsAt == FormsAt.TERRESTRIAL_LIMITING;
    }

    private Uncertain cover(RowReader row, String where) {
        Optional<Uncertain> measured = row.measuredLength(COVER, where);
        Optional<Double> upTo = row.length("cover_up_to_m");
        if (!row.text(COVER.header()).isEmpty() && !row.text("cover_up_to_m").isEmpty()) {
            row.problem(
                    "cover_up_to_m",
                    quote(row.text("cover_up_to_m")) + " beside cover_m",
                    "one of the two, never both");
        }
        if (upTo.isPresent() && upTo.get() > 0) {
            return new Uniform(0, upTo.get());
        }
        return measured.orElse(new Exact(0));
    }

    private static Optional<Integer> order(RowReader row, Key key, Map<List<Object>, String> orders) {
        Optional<Integer> order = row.number("order").flatMap(value -> {
            boolean whole = value == Math.rint(value) && value >= 1 && value <= 1_000_000;
            if (!whole) {
                row.problem("order", quote(row.text("order")), "a whole number, 1 or more (1 = lowest)");
            }
            return whole ? Optional.of(value.intValue()) : Optional.empty();
        });
        order.ifPresent(number -> {
            String other = orders.putIfAbsent(List.of(key.site(), number), key.level());
            if (other != null) {
                row.problem(
                        "order",
                        quote(row.text("order")) + ", which level " + quote(other) + " has already",
                        "each place in a flight once");
            }
        });
        return order;
    }

    private static Map<String, FormsAt> formsAt() {
        Map<String, FormsAt> words = new LinkedHashMap<>();
        for (FormsAt each : FormsAt.values()) {
            words.put(each.id(), each);
        }
        return words;
    }

    /** Words in the order in which problems list them. */
    static <T> Map<String, T> ordered(String first, T firstMeans, String second, T secondMeans) {
        Map<String, T> words = new LinkedHashMap<>();
        words.put(first, firstMeans);
        words.put(second, secondMeans);
        return words;
    }
}
