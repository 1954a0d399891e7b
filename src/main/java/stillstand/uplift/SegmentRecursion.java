package stillstand.uplift;

import java.util.Arrays;

/**
 * An approximation of the {@link ShorelineFilter}, for previews only: hundreds of times faster, rates slightly high, intervals
 * somewhat too narrow. Never the answer.
 *
 * <p>It takes the measured heights of the matched levels for the heights that unmatched shorelines between them must keep
 * below, and so neglects that unmatched shorelines overrun each other. A row k passed between levels matched at heights a &lt; b
 * costs {@code P(p <= a) + (1 - q) P(a < p < b)}, before the first match a is the foot of the window, after the last
 * {@code P(p <= a) + (1 - q) P(a < p < top) + P(p >= top)}. With L the probability of level i as the record of row j in units of
 * a stray's:
 *
 * <pre>
 *   alpha(i, j) = q L (start(i, j) + sum over i' &lt; i of B(i', i, j)),  B(i', i, j) = alpha(i', j-1) + cost(j-1; i', i) B(i', i, j-1)
 * </pre>
 *
 * Levels enter by mean and standard deviation of their heights. A workspace in itself: not for two threads at once.
 */
final class SegmentRecursion {
    private final FlightModel model;
    private final int levels;
    private final int rows;
    private final double lowest;
    private final double[] height;
    private final double[] sigma;
    private final double[] strayDensity;
    private final boolean[] allowed;
    private final boolean[] stray;
    private final DateKernel[][] dates;
    private final double logStrayDensities;

    /** P(p at most the height of level i) of row j; then at the foot of the window, and at its top. */
    private final double[] under;

    private final double[] unseenShare;
    private final double[] existence;
    private final double[] match;
    private final double[] alpha;
    private final double[] beta;
    private final double[] one = new double[4];
    private final double[] scratch = new double[4];
    private double total;

    SegmentRecursion(FlightModel model) {
        this.model = model;
        levels = model.levels().size();
        rows = model.rows().size();
        lowest = model.lowestRecordedMetres();
        height = model.levels().stream()
                .mapToDouble(level -> level.shorelineMetres().mean())
                .toArray();
        sigma = model.levels().stream()
                .mapToDouble(level -> level.shorelineMetres().standardDeviation())
                .toArray();
        strayDensity = new double[levels];
        stray = new boolean[levels];
        allowed = new boolean[levels * rows];
        dates = new DateKernel[levels][];
        double logs = 0;
        for (int i = 0; i < levels; i++) {
            FlightLevel level = model.levels().get(i);
            stray[i] = level.mayBeStray();
            strayDensity[i] = level.strayFactor() / (model.surveyedToMetres() - model.surveyedFromMetres());
            logs += Math.log(strayDensity[i]) - level.datesKa().size() * Math.log(model.strayAgeMaximumKa());
            dates[i] = new DateKernel[level.datesKa().isEmpty() ? 0 : rows];
            for (int j = 0; j < rows; j++) {
                allowed[i * rows + j] = level.mayBeRow(j);
                if (dates[i].length > 0) {
                    dates[i][j] = DateKernel.of(
                            level.datesKa(),
                            model.rows().get(j).durationKa(),
                            model.wrongDateProbability(),
                            model.strayAgeMaximumKa());
                }
            }
        }
        logStrayDensities = logs;
        under = new double[(levels + 2) * rows];
        unseenShare = new double[rows];
        existence = new double[rows];
        match = new double[levels * rows];
        alpha = new double[levels * rows];
        beta = new double[levels * rows];
    }

    /** Approximate natural logarithm of the evidence of one history, as {@link ShorelineFilter#logEvidence}. */
    double logEvidence(UpliftHistory history, SharedNumbers shared) {
        for (int j = 0; j < rows; j++) {
            place(j, history, shared);
        }
        forward();
        return Math.log(total)
                + model.logLimiting(history, shared)
                + logStrayDensities
                - shared.expectedStrays()
                + levels * Math.log(shared.expectedStrays());
    }

    /** Approximate probability that level i records row j, at {@code [i * rows + j]}, for the history last evaluated. */
    double[] pairing() {
        backward();
        double[] pairing = new double[levels * rows];
        for (int k = 0; k < pairing.length; k++) {
            pairing[k] = total > 0 ? alpha[k] * beta[k] / total : 0;
        }
        return pairing;
    }

    private void place(int j, UpliftHistory history, SharedNumbers shared) {
        FlightRow row = model.rows().get(j);
        double ageKa = row.ageKa() + (row.takesCurveAge() ? shared.ageShiftKa() : 0);
        double rate = history.rateMetresPerKyrAt(ageKa);
        double ageVariance = row.ageSigmaKa() * row.ageSigmaKa();
        double covariance = rate * ageVariance + row.levelAgeCovarianceMetresKa();
        double mean = row.levelMetres()
                + (row.takesOffset() ? shared.offsetMetres() : 0)
                + (row.takesInterstadial() ? shared.interstadialMetres() : 0)
                + history.upliftMetresSince(ageKa);
        double variance = row.levelSigmaMetres() * row.levelSigmaMetres()
                + rate * rate * ageVariance
                + 2 * rate * row.levelAgeCovarianceMetresKa();
        double spread = Math.max(Math.sqrt(variance), 1e-9);
        double recording = shared.recordingProbability(row);
        existence[j] = row.existence();
        unseenShare[j] = 1 - recording;
        for (int i = 0; i < levels; i++) {
            under[i * rows + j] = NormalTail.atMost((height[i] - mean) / spread);
            match[i * rows + j] = 0;
            if (!allowed[i * rows + j]) {
                continue;
            }
            double d = height[i] - mean;
            double wide = variance + sigma[i] * sigma[i];
            one[0] = recording
                    * existence[j]
                    / (shared.expectedStrays() * strayDensity[i])
                    * Math.exp(-d * d / (2 * wide))
                    / Math.sqrt(2 * Math.PI * wide);
            if (dates[i].length > 0 && one[0] > 0) {
                double slope = covariance / wide;
                dates[i][j].multiply(one, 0, 0, ageKa + slope * d, 0, ageVariance - slope * covariance, scratch);
            }
            match[i * rows + j] = one[0];
        }
        under[levels * rows + j] = NormalTail.atMost((lowest - mean) / spread);
        under[(levels + 1) * rows + j] = NormalTail.atMost((model.surveyedToMetres() - mean) / spread);
    }

    /** Cost of passing row k between the heights numbered a and b (a level, or the foot at {@code levels}). */
    private double cost(int k, int a, int b) {
        double low = under[a * rows + k];
        double high = Math.max(low, under[b * rows + k]);
        return existence[k] * (low + unseenShare[k] * (high - low)) + 1 - existence[k];
    }

    private double costAfter(int k, int a) {
        double top = under[(levels + 1) * rows + k];
        double low = Math.min(top, under[a * rows + k]);
        return existence[k] * (low + unseenShare[k] * (top - low) + 1 - top) + 1 - existence[k];
    }

    private void forward() {
        total = 0;
        for (int i = 0; i < levels; i++) {
            int at = i * rows;
            double reach = straysBetween(-1, i) ? 1 : 0;
            for (int j = 0; j < rows; j++) {
                alpha[at + j] = reach;
                reach *= cost(j, levels, i);
            }
            for (int before = 0; before < i; before++) {
                if (straysBetween(before, i)) {
                    double carried = 0;
                    for (int j = 1; j < rows; j++) {
                        carried = alpha[before * rows + j - 1] + cost(j - 1, before, i) * carried;
                        alpha[at + j] += carried;
                    }
                }
            }
            double end = straysBetween(i, levels) ? 1 : 0;
            for (int j = 0; j < rows; j++) {
                alpha[at + j] *= match[at + j];
            }
            for (int j = rows - 1; j >= 0; j--) {
                total += alpha[at + j] * end;
                end *= costAfter(j, i);
            }
        }
        double none = model.countsAllStray() && straysBetween(-1, levels) ? 1 : 0;
        for (int j = 0; j < rows; j++) {
            none *= costAfter(j, levels);
        }
        total += none;
    }

    private void backward() {
        Arrays.fill(beta, 0);
        for (int i = levels - 1; i >= 0; i--) {
            int at = i * rows;
            double end = straysBetween(i, levels) ? 1 : 0;
            for (int j = rows - 1; j >= 0; j--) {
                beta[at + j] = end;
                end *= costAfter(j, i);
            }
            for (int next = i + 1; next < levels; next++) {
                if (straysBetween(i, next)) {
                    double carried = 0;
                    for (int j = rows - 2; j >= 0; j--) {
                        double own = match[next * rows + j + 1] * beta[next * rows + j + 1];
                        carried = own + cost(j + 1, i, next) * carried;
                        beta[at + j] += carried;
                    }
                }
            }
        }
    }

    /** Whether every level strictly between two may be a stray. */
    private boolean straysBetween(int before, int after) {
        for (int i = before + 1; i < after; i++) {
            if (!stray[i]) {
                return false;
            }
        }
        return true;
    }
}
