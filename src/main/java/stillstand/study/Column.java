package stillstand.study;

import java.util.List;

/**
 * A column that a table may have.
 *
 * @param name without its unit, such as {@code elevation}
 * @param unit such as {@code m}; "" where it has none
 * @param spread whether a spread may or must stand beside it
 * @param isUsed false where it is accepted but nothing is made of it yet
 */
record Column(String name, String unit, Spread spread, boolean isUsed) {
    /** Whether a column {@code name_1sigma_unit} or {@code name_2sigma_unit} stands beside it. */
    enum Spread {
        NONE,
        OPTIONAL,
        REQUIRED
    }

    /** Text, or a number without spread. */
    static Column plain(String header) {
        return new Column(header, "", Spread.NONE, true);
    }

    /** A number that is exact where no spread stands beside it. */
    static Column measured(String name, String unit) {
        return new Column(name, unit, Spread.OPTIONAL, true);
    }

    /** A number that is worth nothing without its spread. */
    static Column withSpread(String name, String unit) {
        return new Column(name, unit, Spread.REQUIRED, true);
    }

    /** The same column as one of which nothing is made yet. */
    Column notUsedYet() {
        return new Column(name, unit, spread, false);
    }

    String header() {
        return withUnit(name);
    }

    String oneSigmaHeader() {
        return withUnit(name + "_1sigma");
    }

    String twoSigmaHeader() {
        return withUnit(name + "_2sigma");
    }

    /** All headers it accounts for. */
    List<String> headers() {
        return spread == Spread.NONE ? List.of(header()) : List.of(header(), oneSigmaHeader(), twoSigmaHeader());
    }

    private String withUnit(String stem) {
        return unit.isEmpty() ? stem : stem + "_" + unit;
    }
}
