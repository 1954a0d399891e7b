package stillstand.uplift;

import java.util.List;
import java.util.stream.Stream;

/** Highstands of round numbers that look like the last million years: for simulated flights only, never science. */
final class RoundHighstands {
    /** Age of the youngest rows is taken from no curve. */
    private static final double CURVE_AGE_SIGMA_KA = 3;

    private record Stand(
            String stage,
            double ageKa,
            double ageSigmaKa,
            double levelMetres,
            double sigmaMetres,
            boolean interstadial) {}

    private static final List<Stand> STANDS = List.of(
            new Stand("1", 6, 0.5, 1, 1, false),
            new Stand("3", 52, 2, -60, 10, true),
            new Stand("5a", 81, 1.5, -22, 6, true),
            new Stand("5c", 100, 1.5, -20, 6, true),
            new Stand("5e", 122, 2, 5, 2.5, false),
            new Stand("7a", 198, 3, -15, 7, false),
            new Stand("7c", 214, 3, -10, 7, false),
            new Stand("7e", 238, 3, -8, 7, false),
            new Stand("8", 285, 4, -35, 10, true),
            new Stand("9a", 310, 4, -20, 9, true),
            new Stand("9e", 330, 4, 2, 6, false),
            new Stand("11", 405, 5, 8, 5, false),
            new Stand("13a", 485, 6, -8, 8, false),
            new Stand("13c", 525, 6, -18, 9, true),
            new Stand("15a", 578, 7, -6, 8, false),
            new Stand("15e", 615, 7, -4, 8, false),
            new Stand("17", 695, 8, -12, 9, false),
            new Stand("19", 785, 8, -8, 9, false),
            new Stand("21", 860, 9, -14, 10, false),
            new Stand("25", 955, 10, -8, 10, false));

    /** How many rows reach to stage 11. */
    static final int UNTIL_STAGE_11 = 12;

    private RoundHighstands() {}

    /** The table taken as it stands. */
    static List<FlightRow> complete() {
        return STANDS.stream()
                .map(s -> FlightRow.plain(s.stage, s.ageKa, s.ageSigmaKa, s.levelMetres, s.sigmaMetres))
                .toList();
    }

    /**
     * The table read from a curve, as the default model takes it: rows share an offset, a factor of the interstadials and half
     * the curve's age variance, and have a local sea level, a duration and, where they are weak, a probability of existence.
     * Stage 1 is no reading of a curve.
     */
    static List<FlightRow> fromCurve() {
        Stream<FlightRow> rows = STANDS.stream().map(RoundHighstands::fromCurve);
        return rows.toList();
    }

    /** What the default model holds of the shared numbers where this many levels are found. */
    static SharedPriors defaults(int levels) {
        return SharedPriors.defaults(CURVE_AGE_SIGMA_KA, levels);
    }

    private static FlightRow fromCurve(Stand s) {
        boolean curve = !s.stage.equals("1");
        boolean weak = s.stage.equals("8") || s.stage.equals("13c");
        FlightRow row = new FlightRow(
                s.stage,
                s.ageKa,
                0,
                s.levelMetres,
                s.sigmaMetres,
                0,
                s.interstadial ? 4 : 8,
                weak ? 0.8 : 1,
                curve,
                curve && s.interstadial,
                curve);
        if (!curve) {
            return row.withSigmas(s.ageSigmaKa, s.sigmaMetres);
        }
        return row.withOwnHalfOfCurveAge(CURVE_AGE_SIGMA_KA).withAddedLevelSigma(s.interstadial ? 5 : 2);
    }
}
