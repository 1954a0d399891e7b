package stillstand.study;

import static stillstand.ledger.InputProblem.quote;

import java.math.BigDecimal;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.Set;
import java.util.stream.IntStream;
import stillstand.ledger.InputProblem;
import stillstand.ledger.InputWarning;
import stillstand.ledger.Loaded;
import stillstand.study.ArchivedColumns.Chosen;
import stillstand.study.ImportChoices.AgeUnit;
import stillstand.study.ImportChoices.SpreadKind;

/**
 * A published table of a curve, rewritten as {@link CurveTable} reads one: ages in ka that ascend, levels in metres up, one
 * kind of spread. Numbers keep the digits of their source.
 *
 * @param header of the rewritten table
 * @param rows of it, young to old
 * @param spreadMeaning what its spread is, in words; "" where it has none
 * @param remarks what was understood and done, a sentence each
 */
public record ArchivedCurve(List<String> header, List<List<String>> rows, String spreadMeaning, List<String> remarks) {
    private static final Set<String> MISSING = Set.of("", "nan", "na", "n/a", "null", "-", "--");
    /** No Quaternary sea level was farther from today's, so what is farther is in another unit or marks a missing value. */
    private static final BigDecimal FARTHEST_METRES = BigDecimal.valueOf(300);
    /** The last glacial maximum, when every account has the sea far below today's. */
    private static final double GLACIAL_FROM_KA = 18;

    private static final double GLACIAL_TO_KA = 26;
    private static final double SUSPICIOUSLY_HIGH_METRES = 50;

    public ArchivedCurve {
        header = List.copyOf(header);
        rows = List.copyOf(rows);
        remarks = List.copyOf(remarks);
    }

    /** A row with its place; the spread is a standard deviation, or a lower and an upper bound. */
    private record Row(long line, BigDecimal age, BigDecimal level, List<BigDecimal> spread) {
        Row withAge(BigDecimal other) {
            return new Row(line, other, level, spread);
        }
    }

    /**
     * Reads an archived table.
     *
     * @param table as text; a table without header has blank ones
     * @param choices what the user says of it
     */
    public static Loaded<ArchivedCurve> read(Table table, ImportChoices choices) {
        return new Reader(table, choices).read();
    }

    private static final class Reader {
        private final Table table;
        private final ImportChoices choices;
        private final Findings findings = new Findings();
        private final List<String> remarks = new ArrayList<>();
        private final ArchivedColumns columns;

        Reader(Table table, ImportChoices choices) {
            this.table = table;
            this.choices = choices;
            columns = new ArchivedColumns(table, choices, findings);
        }

        Loaded<ArchivedCurve> read() {
            Optional<ArchivedCurve> curve = columns.choose().flatMap(this::read);
            return findings.problemCount() > 0
                    ? Loaded.failed(findings.problems())
                    : new Loaded<>(curve, List.of(), findings.warnings());
        }

        private Optional<ArchivedCurve> read(Chosen chosen) {
            List<Row> rows = new ArrayList<>();
            int left = 0;
            for (Table.Row row : table.rows()) {
                if (isTooLong(row) || row.cells().size() < table.header().size()) {
                    problem(
                            row.line(),
                            -1,
                            row.cells().size() + (row.cells().size() == 1 ? " cell" : " cells"),
                            table.header().size() + ", as many as there are columns");
                } else if (isMissing(row.cells().get(chosen.level()))) {
                    left++;
                } else {
                    row(row, chosen).ifPresent(rows::add);
                }
            }
            if (findings.problemCount() == 0 && rows.size() < 2) {
                findings.add(InputProblem.ofFile(
                        table.name(),
                        rows.isEmpty() ? "no row with a level" : "1 row with a level",
                        "at least 2, so that there is a line between them"));
            }
            if (findings.problemCount() > 0) {
                return Optional.empty();
            }
            tell(chosen);
            List<Row> dated = inKa(rows, chosen);
            List<Row> ordered = ordered(dated, chosen);
            checkWhichWayIsUp(ordered, chosen);
            if (findings.problemCount() > 0) {
                return Optional.empty();
            }
            if (left > 0) {
                remarks.add(
                        left + (left == 1 ? " row without a level is" : " rows without a level are") + " left out.");
            }
            return Optional.of(new ArchivedCurve(
                    header(chosen.spread()), ordered.stream().map(Reader::cells).toList(), meaning(chosen), remarks));
        }

        private boolean isTooLong(Table.Row row) {
            int wanted = table.header().size();
            return row.cells().size() > wanted
                    && !row.cells().subList(wanted, row.cells().size()).stream().allMatch(String::isEmpty);
        }

        private Optional<Row> row(Table.Row row, Chosen chosen) {
            Optional<BigDecimal> age = number(row, chosen.age(), "an age");
            Optional<BigDecimal> level =
                    number(row, chosen.level(), "a level").filter(each -> isPossible(row, chosen, each));
            List<BigDecimal> spread = new ArrayList<>();
            for (int column : chosen.spreads()) {
                number(row, column, "the spread of the level").ifPresent(spread::add);
            }
            if (age.isEmpty()
                    || level.isEmpty()
                    || spread.size() < chosen.spreads().size()) {
                return Optional.empty();
            }
            if (spread.size() == 1 && spread.get(0).signum() < 0) {
                problem(
                        row.line(),
                        chosen.spreads().get(0),
                        shown(row, chosen.spreads().get(0)),
                        "0 or more");
                return Optional.empty();
            }
            if (spread.size() == 2 && !surround(level.get(), spread)) {
                problem(
                        row.line(),
                        chosen.spreads().get(0),
                        shown(row, chosen.spreads().get(0)) + " and "
                                + shown(row, chosen.spreads().get(1)) + " about a level of "
                                + shown(row, chosen.level()),
                        "one bound on each side of it, a height as it is and not a distance from it");
                return Optional.empty();
            }
            return Optional.of(upward(new Row(row.line(), age.get(), level.get(), spread), chosen));
        }

        private boolean isPossible(Table.Row row, Chosen chosen, BigDecimal level) {
            boolean possible = level.abs().compareTo(FARTHEST_METRES) <= 0;
            if (!possible) {
                problem(
                        row.line(),
                        chosen.level(),
                        shown(row, chosen.level()),
                        "a level within 300 m of today's, in metres (NaN or blank where it is missing)");
            }
            return possible;
        }

        private static boolean surround(BigDecimal level, List<BigDecimal> bounds) {
            BigDecimal low = bounds.get(0).min(bounds.get(1));
            return low.compareTo(level) <= 0 && level.compareTo(bounds.get(0).max(bounds.get(1))) <= 0;
        }

        /** Metres up, the lower bound first. */
        private static Row upward(Row row, Chosen chosen) {
            BigDecimal level = chosen.levelIsUp() ? row.level() : row.level().negate();
            if (row.spread().size() < 2) {
                return new Row(row.line(), row.age(), level, row.spread());
            }
            List<BigDecimal> bounds = row.spread().stream()
                    .map(bound -> chosen.levelIsUp() ? bound : bound.negate())
                    .sorted()
                    .toList();
            return new Row(row.line(), row.age(), level, bounds);
        }

        private Optional<BigDecimal> number(Table.Row row, int column, String what) {
            String text = row.cells().get(column);
            if (isMissing(text)) {
                problem(row.line(), column, text.isEmpty() ? "nothing" : quote(text), what);
                return Optional.empty();
            }
            if (NumberForm.parse(text).isEmpty()) {
                problem(row.line(), column, quote(text), NumberForm.expectedInsteadOf(text));
                return Optional.empty();
            }
            return Optional.of(new BigDecimal(text.replace('\u2212', '-')));
        }

        private static boolean isMissing(String cell) {
            return MISSING.contains(cell.toLowerCase(Locale.ROOT));
        }

        /** The rows with ages in ka, the past positive. */
        private List<Row> inKa(List<Row> rows, Chosen chosen) {
            boolean toldNegative = chosen.ageUnit() == AgeUnit.NEGATIVE_KA;
            boolean plainlyNegative = choices.ageUnit().isEmpty()
                    && rows.stream().allMatch(row -> row.age().signum() <= 0);
            boolean negative = toldNegative || plainlyNegative;
            if (plainlyNegative) {
                remarks.add("Its ages are negative: the past is read as positive.");
            }
            List<Row> dated = new ArrayList<>();
            for (Row row : rows) {
                BigDecimal age = negative ? row.age().negate() : row.age();
                if (age.signum() < 0) {
                    problem(
                            row.line(),
                            chosen.age(),
                            quote(row.age().toPlainString()),
                            toldNegative
                                    ? "0 or less, as --age-unit negative-ka says"
                                    : "0 or more (age counts backwards from 1950)");
                }
                dated.add(row.withAge(chosen.ageUnit() == AgeUnit.YEARS ? age.movePointLeft(3) : age));
            }
            return dated;
        }

        /** Young to old, one row an age. */
        private List<Row> ordered(List<Row> rows, Chosen chosen) {
            List<Row> sorted =
                    rows.stream().sorted(Comparator.comparing(Row::age)).toList(); // keeps the order of equal ages
            boolean ascends = IntStream.range(1, rows.size())
                    .allMatch(i -> rows.get(i - 1).age().compareTo(rows.get(i).age()) <= 0);
            if (!ascends) {
                remarks.add("Its rows are put in the order of their ages.");
            }
            List<Row> once = new ArrayList<>();
            int again = 0;
            int start = 0;
            while (start < sorted.size()) {
                int end = start + 1;
                while (end < sorted.size()
                        && sorted.get(end).age().compareTo(sorted.get(start).age()) == 0) {
                    end++;
                }
                List<Row> same = sorted.subList(start, end);
                once.add(choices.meansOfRepeatedAges() ? mean(same) : first(same, chosen));
                again += same.size() - 1;
                start = end;
            }
            if (again > 0) {
                remarks.add(
                        choices.meansOfRepeatedAges()
                                ? again + " rows of repeated ages are merged: levels and spreads are means."
                                : again + (again == 1 ? " row that repeats" : " rows that repeat")
                                        + " another is left out.");
            }
            if (once.size() < 2 && findings.problemCount() == 0) {
                findings.add(InputProblem.ofFile(
                        table.name(), "1 age", "at least 2, so that there is a line between" + " them"));
            }
            return once;
        }

        private Row first(List<Row> same, Chosen chosen) {
            Row first = same.get(0);
            for (Row row : same.subList(1, same.size())) {
                if (!cells(first).equals(cells(row))) {
                    problem(
                            row.line(),
                            chosen.age(),
                            row.age().toPlainString() + " ka a second time, with other values than in line "
                                    + first.line(),
                            "one level at one age, or --repeated-ages mean to take their mean");
                }
            }
            return first;
        }

        private static Row mean(List<Row> same) {
            if (same.size() == 1) {
                return same.get(0);
            }
            Row first = same.get(0);
            List<BigDecimal> spread = new ArrayList<>();
            for (int i = 0; i < first.spread().size(); i++) {
                int at = i;
                spread.add(meanOf(same.stream().map(row -> row.spread().get(at)).toList()));
            }
            return new Row(
                    first.line(),
                    first.age(),
                    meanOf(same.stream().map(Row::level).toList()),
                    List.copyOf(spread));
        }

        private static BigDecimal meanOf(List<BigDecimal> values) {
            double sum = values.stream().mapToDouble(BigDecimal::doubleValue).sum();
            return new BigDecimal(String.format(Locale.ROOT, "%.6f", sum / values.size()));
        }

        /** A curve of the last glacial maximum shows which way it counts; a wrong guess would turn every rate round. */
        private void checkWhichWayIsUp(List<Row> rows, Chosen chosen) {
            Optional<Row> glacial = rows.stream()
                    .filter(row -> row.age().doubleValue() >= GLACIAL_FROM_KA
                            && row.age().doubleValue() <= GLACIAL_TO_KA)
                    .filter(row -> row.level().signum() > 0)
                    .findFirst();
            Row highest = rows.stream().max(Comparator.comparing(Row::level)).orElseThrow();
            boolean noneBelow = rows.stream().allMatch(row -> row.level().signum() >= 0);
            Optional<Row> odd = glacial.or(() -> Optional.of(highest)
                    .filter(row -> noneBelow && row.level().doubleValue() > SUSPICIOUSLY_HIGH_METRES));
            if (odd.isEmpty()) {
                return;
            }
            String found = String.format(
                    Locale.ROOT,
                    "%+.1f m at %s ka",
                    odd.get().level(),
                    plain(odd.get().age()));
            if (choices.levelIsUp().isPresent()) {
                findings.add(new InputWarning(
                        table.name(),
                        odd.get().line(),
                        chosen.level() + 1,
                        "read as --level-positive says, the sea stood at " + found));
            } else {
                problem(
                        odd.get().line(),
                        chosen.level(),
                        "levels that read " + found + " where up is positive",
                        "to be told which way they count: --level-positive down or --level-positive up");
            }
        }

        private void tell(Chosen chosen) {
            remarks.add("Age: " + columns.named(chosen.age()) + ", in "
                    + (chosen.ageUnit() == AgeUnit.YEARS ? "years" : "ka") + ".");
            remarks.add("Level: " + columns.named(chosen.level()) + ", in metres, "
                    + (chosen.levelIsUp() ? "up" : "down; turned to up") + " positive.");
            remarks.add(
                    chosen.spread() == SpreadKind.NONE
                            ? "Spread: none that is used; Stillstand's default is supposed."
                            : "Spread: " + meaning(chosen) + ".");
            List<Integer> unused = IntStream.range(0, table.header().size())
                    .filter(at -> at != chosen.age()
                            && at != chosen.level()
                            && !chosen.spreads().contains(at))
                    .boxed()
                    .toList();
            if (!unused.isEmpty()) {
                remarks.add("Not used: " + columns.named(unused) + ".");
            }
        }

        private String meaning(Chosen chosen) {
            String from = " (" + columns.named(chosen.spreads()) + " of the archived table)";
            return switch (chosen.spread()) {
                case ONE_SIGMA -> "one standard deviation" + from;
                case TWO_SIGMA -> "two standard deviations" + from;
                case BOUNDS -> "bounds of the central 95 %" + from;
                case NONE -> "";
            };
        }

        private static List<String> header(SpreadKind spread) {
            List<String> header = new ArrayList<>(List.of("age_ka", "level_m"));
            header.addAll(
                    switch (spread) {
                        case ONE_SIGMA -> List.of("level_1sigma_m");
                        case TWO_SIGMA -> List.of("level_2sigma_m");
                        case BOUNDS -> List.of("level_low95_m", "level_high95_m");
                        case NONE -> List.of();
                    });
            return header;
        }

        private static List<String> cells(Row row) {
            List<String> cells = new ArrayList<>(List.of(plain(row.age()), plain(row.level())));
            row.spread().forEach(value -> cells.add(plain(value)));
            return cells;
        }

        private static String plain(BigDecimal value) {
            return value.signum() == 0 ? "0" : value.stripTrailingZeros().toPlainString();
        }

        private static String shown(Table.Row row, int column) {
            return quote(row.cells().get(column));
        }

        private void problem(long line, int column, String found, String expected) {
            String header = column < 0 ? "" : table.header().get(column);
            findings.add(new InputProblem(table.name(), line, column + 1, header, found, expected));
        }
    }
}
