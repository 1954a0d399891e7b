package stillstand.uplift;

import java.util.ArrayList;
import java.util.List;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.Uncertain;

/** Invented flights and an invented table of round numbers, for tests only: no science in them. */
final class ToyFlights {
    private static final String[] NAMES = {
        "H1", "H3", "H5a", "H5c", "H5e", "H7a", "H7c", "H7e", "H8", "H9a", "H9e", "H11", "H13a", "H13c", "H15a", "H15e",
        "H17", "H19", "H21", "H25"
    };
    private static final double[] AGE_KA = {
        6, 52, 81, 100, 122, 198, 214, 238, 285, 310, 330, 405, 485, 525, 578, 615, 695, 785, 860, 955
    };
    private static final double[] AGE_SIGMA_KA = {0.5, 2, 1.5, 1.5, 2, 3, 3, 3, 4, 4, 4, 5, 6, 6, 7, 7, 8, 8, 9, 10};
    private static final double[] LEVEL_METRES = {
        1, -60, -22, -20, 5, -15, -10, -8, -35, -20, 2, 8, -8, -18, -6, -4, -12, -8, -14, -8
    };
    private static final double[] LEVEL_SIGMA_METRES = {1, 10, 6, 6, 2.5, 7, 7, 7, 10, 9, 6, 5, 8, 9, 8, 8, 9, 9, 10, 10
    };
    private static final double[] DURATION_KA = {4, 5, 6, 6, 13, 6, 6, 6, 6, 6, 8, 12, 8, 6, 8, 8, 8, 8, 8, 8};
    private static final double[] EXISTENCE = {1, 0.7, 1, 1, 1, 1, 0.8, 1, 0.6, 0.8, 1, 1, 1, 0.5, 1, 1, 1, 1, 0.7, 1};
    private static final String INTERSTADIAL = "01110000110001000000";
    private static final String TAKES_INTERSTADIAL = "01010000110001000000";
    private static final String TAKES_CURVE_AGE = "01010011111011111111";

    private ToyFlights() {}

    /** Twenty rows taken as they stand. */
    static List<FlightRow> plainRows() {
        return rows(false, false, false, false);
    }

    /** The rows with everything that the default model gives them, without the older ones. */
    static List<FlightRow> defaultRows() {
        return rows(true, true, true, true);
    }

    static List<FlightRow> rows(boolean ownAgeHalf, boolean localSpread, boolean existence, boolean duration) {
        List<FlightRow> rows = new ArrayList<>();
        for (int j = 0; j < NAMES.length; j++) {
            FlightRow row = new FlightRow(
                    NAMES[j],
                    AGE_KA[j],
                    AGE_SIGMA_KA[j],
                    LEVEL_METRES[j],
                    LEVEL_SIGMA_METRES[j],
                    0,
                    duration ? DURATION_KA[j] : 0,
                    existence ? EXISTENCE[j] : 1,
                    j > 0,
                    TAKES_INTERSTADIAL.charAt(j) == '1',
                    TAKES_CURVE_AGE.charAt(j) == '1');
            row = ownAgeHalf ? row.withOwnHalfOfCurveAge(3) : row;
            rows.add(localSpread && j > 0 ? row.withAddedLevelSigma(INTERSTADIAL.charAt(j) == '1' ? 5 : 2) : row);
        }
        return rows;
    }

    /** Levels with a standard deviation of 2 m. */
    static List<FlightLevel> levels(double... heightsMetres) {
        List<FlightLevel> levels = new ArrayList<>();
        for (double heightMetres : heightsMetres) {
            levels.add(FlightLevel.undated("L" + (levels.size() + 1), new Normal(heightMetres, 2)));
        }
        return levels;
    }

    /** Dates the level at {@code index} (from 0): pairs of age and standard deviation, ka. */
    static void date(List<FlightLevel> levels, int index, double... agesAndSigmasKa) {
        List<Uncertain> dates = new ArrayList<>();
        for (int k = 0; k < agesAndSigmasKa.length; k += 2) {
            dates.add(new Normal(agesAndSigmasKa[k], agesAndSigmasKa[k + 1]));
        }
        FlightLevel level = levels.get(index);
        levels.set(index, FlightLevel.dated(level.name(), level.shorelineMetres(), dates));
    }

    /** Seven levels, three of them dated; window 2 to 200 m. */
    static List<FlightLevel> datedFlight() {
        List<FlightLevel> levels = undatedSeven();
        date(levels, 0, 5.6, 0.5);
        date(levels, 1, 80, 1.6);
        date(levels, 5, 231.5, 4.7);
        return levels;
    }

    /** The seven levels without their dates. */
    static List<FlightLevel> undatedSeven() {
        return levels(5.9, 36.2, 38.0, 105.1, 121.8, 137.6, 150.5);
    }

    /** Eight undated levels; window 2 to 160 m. */
    static List<FlightLevel> undatedFlight() {
        return levels(5.8, 10.7, 47.4, 60.6, 96.9, 117.7, 149.4, 152.9);
    }
}
