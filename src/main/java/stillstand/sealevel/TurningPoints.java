package stillstand.sealevel;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;

/**
 * Finds the highstands and lowstands of a curve by a rule that anyone can repeat: in each window of the stage table the
 * highest turning point of the central line whose prominence is {@value #LEAST_PROMINENCE_METRES} m or more, strictly inside;
 * none means that the curve has no such stand. Lowstands likewise between the windows. The curve is taken as published: to
 * pick again from noisy histories would lift every peak.
 */
public final class TurningPoints {
    /** A lower peak is a shoulder or noise. */
    public static final double LEAST_PROMINENCE_METRES = 3;

    private TurningPoints() {}

    /**
     * The peak that a curve shows in a stage's window; of equal ones the youngest.
     *
     * @return empty where it shows none at an age the curve may be used at
     */
    public static Optional<TurningPoint> highstand(SeaLevelCurve curve, Stage stage) {
        return peaks(curve, 1).stream()
                .filter(peak -> stage.holds(peak.ageKa()) && curve.isUsableAt(peak.ageKa()))
                .max(Comparator.comparingDouble(TurningPoint::levelMetres)
                        .thenComparing(
                                Comparator.comparingDouble(TurningPoint::ageKa).reversed()));
    }

    /**
     * The trough that a curve shows between the windows of two stages; of equal ones the youngest.
     *
     * @param younger the stage whose window ends where the search starts
     * @param older the stage whose window starts where it ends
     * @return empty where it shows none at an age the curve may be used at
     */
    public static Optional<TurningPoint> lowstand(SeaLevelCurve curve, Stage younger, Stage older) {
        return peaks(curve, -1).stream()
                .filter(trough -> trough.ageKa() > younger.toKa() && trough.ageKa() < older.fromKa())
                .filter(trough -> curve.isUsableAt(trough.ageKa()))
                .min(Comparator.comparingDouble(TurningPoint::levelMetres).thenComparing(TurningPoint::ageKa));
    }

    /**
     * The lowest trough that a curve shows strictly between two ages, ka; of equal ones the youngest.
     *
     * @return empty where it shows none at an age the curve may be used at
     */
    static Optional<TurningPoint> lowestBetween(SeaLevelCurve curve, double youngerKa, double olderKa) {
        return peaks(curve, -1).stream()
                .filter(trough -> trough.ageKa() > youngerKa && trough.ageKa() < olderKa)
                .filter(trough -> curve.isUsableAt(trough.ageKa()))
                .min(Comparator.comparingDouble(TurningPoint::levelMetres).thenComparing(TurningPoint::ageKa));
    }

    /** All peaks (sign 1) or troughs (sign -1) that stand out enough, young to old. The interpolant turns at rows only. */
    private static List<TurningPoint> peaks(SeaLevelCurve curve, int sign) {
        List<CurveKnot> knots = curve.knots();
        double[] heights =
                knots.stream().mapToDouble(knot -> sign * knot.levelMetres()).toArray();
        List<TurningPoint> found = new ArrayList<>();
        int last = heights.length - 1;
        for (int first = 1; first < last; first++) {
            int end = first;
            while (end < last && heights[end + 1] == heights[first]) {
                end++;
            }
            if (end < last && heights[first - 1] < heights[first] && heights[end + 1] < heights[end]) {
                double prominence = heights[first]
                        - Math.max(lowestUntilHigher(heights, first, -1), lowestUntilHigher(heights, end, 1));
                if (prominence >= LEAST_PROMINENCE_METRES) {
                    double ageKa = (knots.get(first).ageKa() + knots.get(end).ageKa()) / 2;
                    found.add(new TurningPoint(ageKa, sign * heights[first], prominence));
                }
            }
            first = end;
        }
        return found;
    }

    private static double lowestUntilHigher(double[] heights, int from, int step) {
        double lowest = heights[from];
        for (int i = from; i >= 0 && i < heights.length && heights[i] <= heights[from]; i += step) {
            lowest = Math.min(lowest, heights[i]);
        }
        return lowest;
    }
}
