package stillstand.uncertainty;

import java.util.Arrays;

/** A cumulative distribution that is linear between knots: what draws say, smoothed by no more than their spacing. */
final class CumulativeCurve {
    /** Candidates for the lower end of a shortest interval, equal in probability. */
    private static final int CANDIDATES = 4000;

    private final double[] values;
    /** Probability up to each value, from 0 or a little more to 1 or a little less. */
    private final double[] probabilities;

    private CumulativeCurve(double[] values, double[] probabilities) {
        this.values = values;
        this.probabilities = probabilities;
    }

    double least() {
        return values[0];
    }

    double greatest() {
        return values[values.length - 1];
    }

    /** @param probability from 0 (the least value) to 1 (the greatest) */
    double quantile(double probability) {
        int above = 0;
        int end = values.length;
        while (above < end) {
            int middle = (above + end) >>> 1;
            if (probabilities[middle] >= probability) {
                end = middle;
            } else {
                above = middle + 1;
            }
        }
        return quantileBelowKnot(above, probability);
    }

    /** @param above the first knot whose probability is not below the one asked for */
    private double quantileBelowKnot(int above, double probability) {
        if (above == 0) {
            return least();
        }
        if (above == values.length) {
            return greatest();
        }
        double part = (probability - probabilities[above - 1]) / (probabilities[above] - probabilities[above - 1]);
        return values[above - 1] + part * (values[above] - values[above - 1]);
    }

    double cumulativeProbability(double value) {
        if (value < least()) {
            return 0;
        }
        if (value >= greatest()) {
            return 1;
        }
        int above = Arrays.binarySearch(values, value);
        above = above < 0 ? -above - 1 : above + 1;
        while (values[above] <= value) {
            above++;
        }
        double part = (value - values[above - 1]) / (values[above] - values[above - 1]);
        return probabilities[above - 1] + part * (probabilities[above] - probabilities[above - 1]);
    }

    /**
     * The centre of all intervals of a probability whose width is the least to within its Monte Carlo error. Widths of two
     * intervals whose lower ends differ by probability d differ by chance with variance (d/n)(1/f1^2 + 1/f2^2), n the number
     * of draws and f1, f2 the densities at the ends: that of the draws between the ends.
     */
    Interval shortest(double probability, double draws) {
        double step = (1 - probability) / CANDIDATES;
        double[] low = quantiles(0, step);
        double[] width = quantiles(probability, step);
        int best = 0;
        for (int k = 0; k <= CANDIDATES; k++) {
            width[k] -= low[k];
            best = width[k] < width[best] ? k : best;
        }
        double error = errorPerRootOfDistance(best, low, width, step, draws);
        int[] countAndSum = {1, 0};
        walk(best, 1, width, error, countAndSum);
        walk(best, -1, width, error, countAndSum);
        double centre = best + (double) countAndSum[1] / countAndSum[0];
        double lower = centre * step;
        return new Interval(quantile(lower), quantile(Math.min(1, lower + probability)));
    }

    /** Counts the intervals as good as the best on one side of it, up to where they are clearly worse. */
    private static void walk(int best, int direction, double[] width, double error, int[] countAndSum) {
        for (int k = best + direction; k >= 0 && k <= CANDIDATES; k += direction) {
            double excess = width[k] - width[best];
            double chance = error * Math.sqrt(Math.abs(k - best));
            if (excess > 3 * chance) {
                return;
            }
            if (excess <= chance) {
                countAndSum[0]++;
                countAndSum[1] += k - best;
            }
        }
    }

    private static double errorPerRootOfDistance(int best, double[] low, double[] width, double step, double draws) {
        int from = Math.max(0, best - CANDIDATES / 50);
        int to = Math.min(CANDIDATES, best + CANDIDATES / 50);
        double lowSlope = (low[to] - low[from]) / ((to - from) * step);
        double highSlope = lowSlope + (width[to] - width[from]) / ((to - from) * step);
        return Math.sqrt(step / draws * (lowSlope * lowSlope + highSlope * highSlope));
    }

    /** Quantiles of evenly spaced probabilities, in one walk along the knots. */
    private double[] quantiles(double from, double step) {
        double[] quantiles = new double[CANDIDATES + 1];
        int above = 0;
        for (int k = 0; k <= CANDIDATES; k++) {
            double probability = Math.min(1, from + k * step);
            while (above < values.length && probabilities[above] < probability) {
                above++;
            }
            quantiles[k] = quantileBelowKnot(above, probability);
        }
        return quantiles;
    }

    /** Takes knots and draws by rising value. */
    static final class Builder {
        private final double[] values;
        private final double[] weights;
        private int size;
        private double total;

        Builder(int knots) {
            values = new double[knots];
            weights = new double[knots];
        }

        /** A single draw: half of its weight is below its value. */
        void draw(double value, double weight) {
            knot(value, total + weight / 2);
            total += weight;
        }

        /** A value up to which there is no more weight than that of the draws before. */
        void edge(double value) {
            knot(value, total);
        }

        /** Weight spread evenly from the last value to this one. */
        void rise(double value, double weight) {
            total += weight;
            knot(value, total);
        }

        private void knot(double value, double weightBelow) {
            values[size] = size > 0 && value < values[size - 1] ? values[size - 1] : value;
            weights[size++] = weightBelow;
        }

        CumulativeCurve build() {
            double[] probabilities = new double[size];
            for (int i = 0; i < size; i++) {
                probabilities[i] = weights[i] / total;
            }
            return new CumulativeCurve(Arrays.copyOf(values, size), probabilities);
        }
    }
}
