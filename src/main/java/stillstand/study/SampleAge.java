package stillstand.study;

import static stillstand.ledger.InputProblem.quote;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import stillstand.uncertainty.Uncertain;
import stillstand.uncertainty.Uniform;

/** The columns that give a sample's age: value and spread, a range, or a table in {@code ages/}. */
final class SampleAge {
    static final Column AGE = Column.withSpread("age", "ka");
    static final List<Column> COLUMNS = List.of(
            AGE,
            Column.plain("age_min_ka"),
            Column.plain("age_max_ka"),
            Column.plain("age_table"),
            Column.plain("age_zero"));
    /** Year of which ages in ka before present count. */
    private static final int PRESENT_YEAR = 1950;

    private static final Map<String, Integer> ZERO_YEARS = Map.of("bp1950", PRESENT_YEAR, "b2k", 2000);

    private SampleAge() {}

    /**
     * Age before 1950, absent where none is given or it has a problem.
     *
     * @param tables calibrated ages by name
     */
    static Optional<Uncertain> read(RowReader row, String where, Map<String, Uncertain> tables) {
        Optional<Double> shiftKa = shiftKa(row);
        List<String> ways = ways(row);
        for (String other : ways.subList(Math.min(1, ways.size()), ways.size())) {
            row.problem(other, quote(row.text(other)) + " beside " + ways.get(0), "one of the two, never both");
        }
        Optional<Uncertain> value = value(row, where);
        Optional<Uncertain> range = range(row);
        Optional<Uncertain> table =
                row.known("age_table", tables::keySet, "a table in ages/").map(tables::get);
        Optional<Uncertain> age = value.isPresent() ? value : range.isPresent() ? range : table;
        if (age.isPresent() && shiftKa.filter(shift -> shift != 0).isPresent()) {
            row.assume(
                    "age counts from another year than 1950",
                    "moved by " + shiftKa.get() + " ka",
                    "the study (age_zero " + row.text("age_zero") + ")",
                    where);
            return Optional.of(age.get().plus(shiftKa.get()));
        }
        return age;
    }

    /** Whether any cell says how old the sample is. */
    static boolean isGiven(RowReader row) {
        return !ways(row).isEmpty();
    }

    /** The first header of each way in which the row gives an age. */
    private static List<String> ways(RowReader row) {
        List<String> ways = new ArrayList<>();
        if (!row.text(AGE.header()).isEmpty()) {
            ways.add(AGE.header());
        }
        if (!row.text("age_min_ka").isEmpty()) {
            ways.add("age_min_ka");
        } else if (!row.text("age_max_ka").isEmpty()) {
            ways.add("age_max_ka");
        }
        if (!row.text("age_table").isEmpty()) {
            ways.add("age_table");
        }
        return ways;
    }

    private static Optional<Uncertain> value(RowReader row, String where) {
        Optional<Uncertain> age = row.measured(AGE, where);
        boolean positive = age.filter(each -> each.quantile(0.5) > 0).isPresent();
        if (age.isPresent() && !positive) {
            row.problem(AGE.header(), quote(row.text(AGE.header())), "an age above 0");
        }
        return age.filter(each -> positive);
    }

    private static Optional<Uncertain> range(RowReader row) {
        Optional<Double> youngest = row.length("age_min_ka");
        Optional<Double> oldest = row.length("age_max_ka");
        boolean hasYoungest = !row.text("age_min_ka").isEmpty();
        boolean hasOldest = !row.text("age_max_ka").isEmpty();
        if (hasYoungest != hasOldest) {
            String blank = hasYoungest ? "age_max_ka" : "age_min_ka";
            row.problem(blank, "nothing", "the other end of the range");
        }
        if (youngest.isEmpty() || oldest.isEmpty()) {
            return Optional.empty();
        }
        if (!(oldest.get() > youngest.get())) {
            row.problem(
                    "age_max_ka",
                    quote(row.text("age_max_ka")),
                    "an age above age_min_ka (" + row.text("age_min_ka") + ")");
            return Optional.empty();
        }
        return Optional.of(new Uniform(youngest.get(), oldest.get()));
    }

    /** What to add to an age so that it counts from 1950. */
    private static Optional<Double> shiftKa(RowReader row) {
        String text = row.text("age_zero");
        Optional<Integer> year = Optional.ofNullable(ZERO_YEARS.get(text));
        if (year.isEmpty() && text.matches("[0-9]{4}")) {
            year = Optional.of(Integer.valueOf(text));
        }
        if (year.isEmpty() && !text.isEmpty()) {
            row.problem("age_zero", quote(text), "bp1950, b2k or a year such as 2015");
        }
        return year.map(zero -> (PRESENT_YEAR - zero) / 1000.0);
    }
}
