package stillstand.uplift;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;

/**
 * The usual hand fit, for comparison only: slide a constant rate until predicted and measured heights look right. In simulated
 * flights it is wrong by more than a fifth in half the cases, with an R squared of 0.999 whether right or wrong.
 *
 * @param rateMetresPerKyr the rate, m/kyr
 * @param rmsMetres root mean square of measured less predicted heights, m
 * @param rSquared squared correlation of measured and predicted heights; absent where either does not vary
 * @param rows by level, the row it was matched to
 */
public record SlidingFit(double rateMetresPerKyr, double rmsMetres, Optional<Double> rSquared, List<Integer> rows) {
    public SlidingFit {
        rows = List.copyOf(rows);
    }

    /** The fit at one rate: every level with the row whose predicted height is nearest. */
    public static SlidingFit nearest(List<FlightLevel> levels, List<FlightRow> rows, double rateMetresPerKyr) {
        List<Integer> matched = new ArrayList<>();
        for (FlightLevel level : levels) {
            int best = 0;
            for (int j = 1; j < rows.size(); j++) {
                if (miss(level, rows.get(j), rateMetresPerKyr) < miss(level, rows.get(best), rateMetresPerKyr)) {
                    best = j;
                }
            }
            matched.add(best);
        }
        return of(levels, rows, rateMetresPerKyr, matched);
    }

    /**
     * The fit at one rate with levels in strict order, one to one, and no row that a younger one overran; absent where there are
     * fewer such rows than levels.
     */
    public static Optional<SlidingFit> ordered(
            List<FlightLevel> levels, List<FlightRow> rows, double rateMetresPerKyr) {
        List<Integer> standing = new ArrayList<>();
        double highest = Double.NEGATIVE_INFINITY;
        for (int j = 0; j < rows.size(); j++) {
            if (predicted(rows.get(j), rateMetresPerKyr) > highest) {
                highest = predicted(rows.get(j), rateMetresPerKyr);
                standing.add(j);
            }
        }
        int n = levels.size();
        int m = standing.size();
        if (m < n) {
            return Optional.empty();
        }
        double[][] least = new double[n + 1][m + 1];
        for (int i = 1; i <= n; i++) {
            Arrays.fill(least[i], Double.POSITIVE_INFINITY);
            for (int k = i; k <= m; k++) {
                double miss = miss(levels.get(i - 1), rows.get(standing.get(k - 1)), rateMetresPerKyr);
                least[i][k] = Math.min(least[i][k - 1], least[i - 1][k - 1] + miss * miss);
            }
        }
        Integer[] matched = new Integer[n];
        for (int i = n, k = m; i > 0; k--) {
            if (least[i][k] < least[i][k - 1]) {
                matched[--i] = standing.get(k - 1);
            }
        }
        return Optional.of(of(levels, rows, rateMetresPerKyr, List.of(matched)));
    }

    /**
     * The rate of least root mean square among evenly spaced ones, every level with the nearest row.
     *
     * @param steps how many steps from the lowest to the highest rate, 1 or more
     */
    public static SlidingFit leastRms(
            List<FlightLevel> levels, List<FlightRow> rows, double fromRate, double toRate, int steps) {
        SlidingFit best = nearest(levels, rows, fromRate);
        for (int k = 1; k <= steps; k++) {
            SlidingFit fit = nearest(levels, rows, fromRate + (toRate - fromRate) * k / steps);
            best = fit.rmsMetres < best.rmsMetres ? fit : best;
        }
        return best;
    }

    /** The rate of largest R squared among evenly spaced ones, every level with the nearest row; absent where none has one. */
    public static Optional<SlidingFit> largestRSquared(
            List<FlightLevel> levels, List<FlightRow> rows, double fromRate, double toRate, int steps) {
        Optional<SlidingFit> best = Optional.empty();
        for (int k = 0; k <= steps; k++) {
            SlidingFit fit = nearest(levels, rows, fromRate + (toRate - fromRate) * k / steps);
            double before = best.flatMap(SlidingFit::rSquared).orElse(-1.0);
            if (fit.rSquared.orElse(-1.0) > before) {
                best = Optional.of(fit);
            }
        }
        return best;
    }

    private static SlidingFit of(
            List<FlightLevel> levels, List<FlightRow> rows, double rateMetresPerKyr, List<Integer> matched) {
        int n = levels.size();
        double squares = 0;
        double meanX = 0;
        double meanY = 0;
        for (int i = 0; i < n; i++) {
            FlightRow row = rows.get(matched.get(i));
            double miss = miss(levels.get(i), row, rateMetresPerKyr);
            squares += miss * miss;
            meanX += predicted(row, rateMetresPerKyr) / n;
            meanY += levels.get(i).shorelineMetres().mean() / n;
        }
        double xx = 0;
        double yy = 0;
        double xy = 0;
        for (int i = 0; i < n; i++) {
            double x = predicted(rows.get(matched.get(i)), rateMetresPerKyr) - meanX;
            double y = levels.get(i).shorelineMetres().mean() - meanY;
            xx += x * x;
            yy += y * y;
            xy += x * y;
        }
        Optional<Double> rSquared = xx > 0 && yy > 0 ? Optional.of(xy * xy / (xx * yy)) : Optional.empty();
        return new SlidingFit(rateMetresPerKyr, Math.sqrt(squares / n), rSquared, matched);
    }

    private static double predicted(FlightRow row, double rateMetresPerKyr) {
        return row.levelMetres() + rateMetresPerKyr * row.ageKa();
    }

    private static double miss(FlightLevel level, FlightRow row, double rateMetresPerKyr) {
        return Math.abs(level.shorelineMetres().mean() - predicted(row, rateMetresPerKyr));
    }
}
