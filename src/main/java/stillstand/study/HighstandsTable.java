package stillstand.study;

import static stillstand.ledger.InputProblem.quote;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import stillstand.ledger.InputProblem;
import stillstand.ledger.Loaded;
import stillstand.sealevel.Highstand;
import stillstand.sealevel.HighstandClass;
import stillstand.sealevel.HighstandEntry;
import stillstand.uncertainty.SplitNormal;
import stillstand.uncertainty.Uncertain;

/** The check of a table of highstands: a stage, its age and its level a row, each with its spread. */
public final class HighstandsTable {
    private static final String STAGE = "stage";
    private static final Column AGE = Column.withSpread("age", "ka");
    private static final Column LEVEL = Column.measured("level", "m");
    private static final String LOW95 = "level_low95_m";
    private static final String HIGH95 = "level_high95_m";
    private static final String CLASS = "class";
    private static final String DURATION = "duration_ka";
    private static final String EXISTS = "exists_probability";
    private static final String SOURCE = "source";
    private static final Columns COLUMNS = new Columns(
            List.of(
                    Column.plain(STAGE),
                    AGE,
                    LEVEL,
                    Column.plain(LOW95),
                    Column.plain(HIGH95),
                    Column.plain(CLASS),
                    Column.plain(DURATION),
                    Column.plain(EXISTS),
                    Column.plain(SOURCE),
                    Column.plain("reading"),
                    Column.plain("note")),
            List.of(STAGE, AGE.header(), LEVEL.header()));

    private HighstandsTable() {}

    /**
     * Reads a table of highstands.
     *
     * @param id of the table
     * @param complete whether it is taken as it stands
     * @param citation the source of rows that name none
     */
    public static Loaded<HighstandRows> read(String id, boolean complete, Table table, String citation) {
        Findings findings = new Findings();
        List<HighstandEntry> entries = new ArrayList<>();
        Map<String, Long> lines = new HashMap<>();
        for (RowReader reader : RowReader.rowsOf(table, COLUMNS, findings)) {
            entry(reader, lines, citation).ifPresent(entries::add);
        }
        List<String> header = table.header();
        boolean bounds = header.contains(LOW95) && header.contains(HIGH95);
        boolean sigma = header.contains(LEVEL.oneSigmaHeader()) || header.contains(LEVEL.twoSigmaHeader());
        if (header.contains(LEVEL.header()) && bounds == sigma) {
            findings.add(new InputProblem(
                    table.name(),
                    table.headerLine(),
                    header.indexOf(LEVEL.header()) + 1,
                    LEVEL.header(),
                    bounds ? "two kinds of spread beside it" : "no spread beside it",
                    "level_1sigma_m, level_2sigma_m, or level_low95_m and level_high95_m"));
        }
        if (table.rows().isEmpty()) {
            findings.add(InputProblem.ofFile(table.name(), "no row", "at least one highstand"));
        }
        return findings.problemCount() > 0
                ? new Loaded<>(Optional.empty(), findings.problems(), findings.warnings())
                : new Loaded<>(Optional.of(new HighstandRows(id, complete, entries)), List.of(), findings.warnings());
    }

    private static Optional<HighstandEntry> entry(RowReader reader, Map<String, Long> lines, String citation) {
        String stage = reader.requiredText(STAGE, "a label");
        Long first = lines.putIfAbsent(stage, reader.line());
        if (first != null && !stage.isEmpty()) {
            reader.problem(STAGE, quote(stage) + " a second time", "it once (it stands in line " + first + " already)");
        }
        if (stage.equals(Highstand.OLDER)) {
            reader.problem(STAGE, quote(stage), "another label (this one names rows older than a table)");
        }
        reader.requiredText(AGE.header(), "an age");
        reader.requiredText(LEVEL.header(), "a level");
        Optional<Uncertain> age = reader.measured(AGE, stage);
        if (age.filter(each -> !(each.mean() > 0)).isPresent()) {
            reader.problem(AGE.header(), quote(reader.text(AGE.header())), "an age above 0");
        }
        Optional<Uncertain> level = level(reader, stage);
        Optional<Double> duration = reader.length(DURATION);
        Optional<Double> exists = reader.number(EXISTS, Double.MIN_VALUE, 1, "above 0 and at most 1");
        Optional<HighstandClass> highstandClass = highstandClass(reader);
        return reader.isGood() && age.isPresent() && level.isPresent()
                ? Optional.of(new HighstandEntry(
                        stage,
                        age.get().mean(),
                        age.get().standardDeviation(),
                        level.get(),
                        highstandClass,
                        duration,
                        exists,
                        reader.optionalText(SOURCE).orElse(citation)))
                : Optional.empty();
    }

    private static Optional<Uncertain> level(RowReader reader, String stage) {
        if (!reader.hasColumn(LOW95) || !reader.hasColumn(HIGH95)) {
            return reader.measured(LEVEL, stage);
        }
        reader.requiredText(LOW95, "a bound");
        reader.requiredText(HIGH95, "a bound");
        Optional<Double> centre = reader.number(LEVEL.header());
        Optional<Double> low = reader.number(LOW95);
        Optional<Double> high = reader.number(HIGH95);
        if (centre.isEmpty() || low.isEmpty() || high.isEmpty()) {
            return Optional.empty();
        }
        if (!(low.get() < centre.get() && centre.get() < high.get())) {
            reader.problem(
                    LEVEL.header(), quote(reader.text(LEVEL.header())), "a level between " + LOW95 + " and " + HIGH95);
            return Optional.empty();
        }
        return Optional.of(SplitNormal.ofCentral95(centre.get(), low.get(), high.get()));
    }

    private static Optional<HighstandClass> highstandClass(RowReader reader) {
        Map<String, Optional<HighstandClass>> words = new LinkedHashMap<>();
        for (HighstandClass each : HighstandClass.values()) {
            words.put(each.word(), Optional.of(each));
        }
        return reader.word(CLASS, words, Optional.empty());
    }
}
