package stillstand.study;

import static stillstand.ledger.InputProblem.quote;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.regex.Pattern;
import stillstand.ledger.InputProblem;
import stillstand.ledger.InputWarning;
import stillstand.ledger.Loaded;
import stillstand.sealevel.CurveFacts;
import stillstand.sealevel.GuessedSpread;
import stillstand.sealevel.SeaLevelCurve;
import stillstand.sealevel.StageTable;

/** The check of a curve's table: {@code age_ka}, {@code level_m} and at most one kind of spread. */
public final class CurveTable {
    private static final String AGE = "age_ka";
    private static final Column LEVEL = new Column("level", "m", Column.Spread.OPTIONAL, true);
    private static final String LOW95 = "level_low95_m";
    private static final String HIGH95 = "level_high95_m";
    /** A band of unknown confidence: shown, not used. */
    private static final List<String> UNEXPLAINED = List.of("level_low_m", "level_high_m");

    private static final Columns COLUMNS = new Columns(
            List.of(
                    Column.plain(AGE),
                    LEVEL,
                    Column.plain(LOW95),
                    Column.plain(HIGH95),
                    Column.plain(UNEXPLAINED.get(0)),
                    Column.plain(UNEXPLAINED.get(1)),
                    Column.plain("note")),
            List.of(AGE, LEVEL.header()));
    private static final Pattern SPREAD_OF_UNKNOWN_SIGMA =
            Pattern.compile(".*(sigma|error|uncertainty|spread|(^|_)(err|sd|std|stdev|sig)(_|$)).*");
    private static final Pattern OTHER_UNIT = Pattern.compile("(age|level)_(?!1sigma|2sigma|low|high)[a-z0-9]+");

    private CurveTable() {}

    /**
     * Reads a curve.
     *
     * @param id of the curve
     * @param table as text
     * @param facts of the curve, as its package states them
     * @param guess the spread it gets where its table has none it can use; absent = {@link GuessedSpread#DEFAULT}
     * @param stages say which ages are interglacial
     */
    public static Loaded<SeaLevelCurve> read(
            String id, Table table, CurveFacts facts, Optional<GuessedSpread> guess, StageTable stages) {
        Findings findings = new Findings();
        Table readable = withoutAmbiguousHeaders(table, findings);
        Rows rows = new Rows(table.rows().size());
        for (RowReader reader : RowReader.rowsOf(readable, COLUMNS, findings)) {
            rows.add(reader);
        }
        checkBounds(readable, findings);
        if (table.rows().size() < 2) {
            String found = table.rows().isEmpty() ? "no row" : "1 row";
            findings.add(InputProblem.ofFile(table.name(), found, "at least 2, so that there is a line between them"));
        }
        if (findings.problemCount() > 0) {
            return new Loaded<>(Optional.empty(), findings.problems(), findings.warnings());
        }
        SeaLevelCurve curve = rows.curve(id, readable, facts, guess, stages);
        if (curve.facts().spreadIsGuessed() && guess.isEmpty()) {
            findings.add(new InputWarning(
                    table.name(),
                    0,
                    0,
                    "curve \"" + id + "\" has no spread that can be used; "
                            + curve.facts().spreadMeaning()));
        }
        return new Loaded<>(Optional.of(curve), List.of(), findings.warnings());
    }

    /** Headers that say too little become columns of no meaning, each with the question it leaves open. */
    private static Table withoutAmbiguousHeaders(Table table, Findings findings) {
        List<String> header = new ArrayList<>();
        for (int i = 0; i < table.header().size(); i++) {
            String name = table.header().get(i);
            boolean known = Columns.isOwn(name)
                    || COLUMNS.known().stream()
                            .anyMatch(column -> column.headers().contains(name));
            Optional<InputProblem> problem = known ? Optional.empty() : ambiguity(table, i, name);
            problem.ifPresent(findings::add);
            header.add(problem.isPresent() ? "x_" + name : name);
        }
        return new Table(table.name(), table.headerLine(), header, table.rows());
    }

    private static Optional<InputProblem> ambiguity(Table table, int index, String name) {
        if (SPREAD_OF_UNKNOWN_SIGMA.matcher(name).matches()) {
            return Optional.of(new InputProblem(
                    table.name(),
                    table.headerLine(),
                    index + 1,
                    name,
                    "a spread that may be 1 or 2 sigma",
                    "level_1sigma_m, level_2sigma_m, or level_low95_m and level_high95_m"));
        }
        if (OTHER_UNIT.matcher(name).matches()) {
            String wanted = name.startsWith("age") ? AGE : LEVEL.header();
            return Optional.of(new InputProblem(
                    table.name(),
                    table.headerLine(),
                    index + 1,
                    name,
                    "a unit that curves do not have",
                    wanted + " (\"curves import\" converts other units)"));
        }
        return Optional.empty();
    }

    private static void checkBounds(Table table, Findings findings) {
        List<String> header = table.header();
        if (header.contains(LOW95) != header.contains(HIGH95)) {
            String there = header.contains(LOW95) ? LOW95 : HIGH95;
            String other = header.contains(LOW95) ? HIGH95 : LOW95;
            findings.add(problem(table, there, "one bound without the other", "a column \"" + other + "\" beside it"));
        }
        for (String sigma : List.of(LEVEL.oneSigmaHeader(), LEVEL.twoSigmaHeader())) {
            if (header.contains(sigma) && header.contains(LOW95)) {
                findings.add(problem(table, sigma, "this column beside " + LOW95, "one kind of spread, never two"));
            }
        }
    }

    private static InputProblem problem(Table table, String header, String found, String expected) {
        return new InputProblem(
                table.name(), table.headerLine(), table.header().indexOf(header) + 1, header, found, expected);
    }

    /** The numbers of the rows; each row that could not be read has left a problem, so the columns are not used then. */
    private static final class Rows {
        private final double[] agesKa;
        private final double[] levels;
        private final double[] lows;
        private final double[] highs;
        private int count;

        Rows(int size) {
            agesKa = new double[size];
            levels = new double[size];
            lows = new double[size];
            highs = new double[size];
        }

        void add(RowReader reader) {
            double age = required(reader, AGE, "an age").orElse(Double.NaN);
            if (age < 0) {
                reader.problem(AGE, quote(reader.text(AGE)), "0 or more (age counts backwards from 1950)");
            } else if (count > 0 && age <= agesKa[count - 1]) {
                boolean again = age == agesKa[count - 1];
                reader.problem(
                        AGE,
                        quote(reader.text(AGE)) + (again ? " a second time" : ", younger than the row above"),
                        "ages that ascend, each once");
            }
            double level = required(reader, LEVEL.header(), "a level").orElse(Double.NaN);
            agesKa[count] = age;
            levels[count] = level;
            if (reader.hasColumn(LOW95) && reader.hasColumn(HIGH95)) {
                lows[count] = required(reader, LOW95, "a bound").orElse(Double.NaN);
                highs[count] = required(reader, HIGH95, "a bound").orElse(Double.NaN);
                if (lows[count] > level) {
                    reader.problem(LOW95, quote(reader.text(LOW95)), "a bound at or below the level");
                }
                if (highs[count] < level) {
                    reader.problem(HIGH95, quote(reader.text(HIGH95)), "a bound at or above the level");
                }
            } else {
                spreadHeader(reader::hasColumn).ifPresent(header -> {
                    required(reader, header, "the spread of the level (0 where it is exact)");
                    lows[count] = reader.length(header).orElse(Double.NaN) / (isTwoSigma(header) ? 2 : 1);
                });
            }
            count++;
        }

        SeaLevelCurve curve(
                String id, Table table, CurveFacts facts, Optional<GuessedSpread> guess, StageTable stages) {
            if (table.header().contains(LOW95)) {
                return SeaLevelCurve.withBounds95(id, facts, agesKa, levels, lows, highs);
            }
            if (spreadHeader(table.header()::contains).isPresent()) {
                return SeaLevelCurve.withSigmas(id, facts, agesKa, levels, lows);
            }
            GuessedSpread used = guess.orElse(GuessedSpread.DEFAULT);
            String meaning = guess.isPresent()
                    ? facts.spreadMeaning()
                    : used.interglacialSigmaMetres() + " m in interglacials and " + used.elsewhereSigmaMetres()
                            + " m elsewhere are supposed (1 sigma)";
            return SeaLevelCurve.withGuessedSpread(id, facts.withGuessedSpread(meaning), agesKa, levels, used, stages);
        }

        private static Optional<Double> required(RowReader reader, String header, String what) {
            reader.requiredText(header, what);
            return reader.number(header);
        }

        private static Optional<String> spreadHeader(java.util.function.Predicate<String> has) {
            return List.of(LEVEL.oneSigmaHeader(), LEVEL.twoSigmaHeader()).stream()
                    .filter(has)
                    .findFirst();
        }

        private static boolean isTwoSigma(String header) {
            return header.equals(LEVEL.twoSigmaHeader());
        }
    }
}
