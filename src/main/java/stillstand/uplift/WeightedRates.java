package stillstand.uplift;

import java.util.Arrays;
import java.util.Comparator;
import java.util.Optional;
import java.util.stream.IntStream;
import stillstand.uncertainty.Interval;

/** Weighted draws of a rate in blocks: their quantiles, and a smooth posterior through them. */
final class WeightedRates {
    private static final int BINS = 64;
    private static final int PARTS = 6;
    private static final int TAIL = 17;

    private final double[] rates;
    private final double[] weights;
    private final int[] blocks;
    private final int[] order;

    /** Weights 0 or more, not all 0; {@code blocks} says which block a draw belongs to. */
    WeightedRates(double[] rates, double[] weights, int[] blocks) {
        this.rates = rates;
        this.weights = weights;
        this.blocks = blocks;
        order = IntStream.range(0, rates.length)
                .boxed()
                .sorted(Comparator.comparingDouble(k -> rates[k]))
                .mapToInt(k -> k)
                .toArray();
    }

    /** Sum of weights without one block; -1 leaves out none. */
    double total(int without) {
        double sum = 0;
        for (int k = 0; k < rates.length; k++) {
            sum += blocks[k] == without ? 0 : weights[k];
        }
        return sum;
    }

    double mean(int without) {
        double sum = 0;
        for (int k = 0; k < rates.length; k++) {
            sum += blocks[k] == without ? 0 : weights[k] * rates[k];
        }
        return sum / total(without);
    }

    /** Quantiles at increasing probabilities, without one block (-1: none). */
    double[] quantiles(double[] probabilities, int without) {
        double total = total(without);
        double[] out = new double[probabilities.length];
        double before = 0;
        double beforeRate = rates[order[0]];
        double sum = 0;
        int at = 0;
        for (int k : order) {
            double weight = blocks[k] == without ? 0 : weights[k];
            if (weight == 0) {
                continue;
            }
            double middle = (sum + weight / 2) / total;
            while (at < out.length && probabilities[at] <= middle) {
                double part = middle > before ? (probabilities[at] - before) / (middle - before) : 1;
                out[at++] = before == 0 ? rates[k] : beforeRate + part * (rates[k] - beforeRate);
            }
            sum += weight;
            before = middle;
            beforeRate = rates[k];
        }
        Arrays.fill(out, at, out.length, beforeRate);
        return out;
    }

    /** The draws as a quantity of another unit, such as the age of a change. */
    Quantity quantity(String unit) {
        double low68 = (1 - Interval.PROBABILITY_68) / 2;
        double low95 = (1 - Interval.PROBABILITY_95) / 2;
        double[] at = quantiles(new double[] {low95, low68, 0.5, 1 - low68, 1 - low95}, -1);
        double mean = mean(-1);
        double squares = 0;
        for (int k = 0; k < rates.length; k++) {
            squares += weights[k] * (rates[k] - mean) * (rates[k] - mean);
        }
        return new Quantity(
                at[2],
                Optional.of(mean),
                Optional.of(Math.sqrt(squares / total(-1))),
                new Interval(at[1], at[3]),
                new Interval(at[0], at[4]),
                unit);
    }

    /** Effective number of draws: square of the sum over the sum of squares of the weights. */
    double effectiveDraws() {
        double squares = Arrays.stream(weights).map(weight -> weight * weight).sum();
        return total(-1) * total(-1) / squares;
    }

    /** Indices of {@code count} draws taken by weight, evenly over the rates. */
    int[] chosen(int count) {
        double step = total(-1) / count;
        int[] out = new int[count];
        double sum = 0;
        int at = 0;
        for (int k : order) {
            sum += weights[k];
            while (at < count && (at + 0.5) * step < sum) {
                out[at++] = k;
            }
        }
        return out;
    }

    /**
     * A smooth posterior: the distribution function is exact at quantiles that crowd in the tails, and between them the
     * monotone cubic of Fritsch and Carlson (1980, SIAM J. Numer. Anal. 17:238).
     */
    RatePosterior posterior(double logEvidence) {
        double[] probabilities = edgeProbabilities();
        double[] edges = quantiles(probabilities, -1);
        double[] x = new double[probabilities.length + 2];
        double[] y = new double[probabilities.length + 2];
        int n = 0;
        x[n] = Math.min(rates[order[0]], edges[0] - 1e-9);
        n++;
        for (int i = 0; i < edges.length; i++) {
            if (edges[i] > x[n - 1]) {
                x[n] = edges[i];
                y[n++] = probabilities[i];
            }
        }
        x[n] = Math.max(rates[order[rates.length - 1]], x[n - 1] + 1e-9);
        y[n++] = 1;
        return smooth(Arrays.copyOf(x, n), Arrays.copyOf(y, n), logEvidence);
    }

    /** Even in the angle, whose cosine crowds them in the tails; beyond, two a decade. */
    private static double[] edgeProbabilities() {
        double[] probabilities = new double[BINS - 1 + 2 * TAIL];
        for (int i = 0; i < TAIL; i++) {
            double tail = Math.pow(10, -11.5 + 0.5 * i);
            probabilities[i] = tail;
            probabilities[probabilities.length - 1 - i] = 1 - tail;
        }
        for (int i = 1; i < BINS; i++) {
            probabilities[TAIL + i - 1] = (1 - Math.cos(Math.PI * i / BINS)) / 2;
        }
        return probabilities;
    }

    private static RatePosterior smooth(double[] x, double[] y, double logEvidence) {
        int n = x.length;
        double[] slope = new double[n];
        for (int i = 1; i < n - 1; i++) {
            double h0 = x[i] - x[i - 1];
            double h1 = x[i + 1] - x[i];
            double d0 = (y[i] - y[i - 1]) / h0;
            double d1 = (y[i + 1] - y[i]) / h1;
            slope[i] = 3 * (h0 + h1) / ((2 * h1 + h0) / d0 + (h1 + 2 * h0) / d1);
        }
        double[] nodes = new double[(n - 1) * PARTS + 1];
        double[] density = new double[nodes.length];
        for (int i = 0; i < n - 1; i++) {
            double h = x[i + 1] - x[i];
            double d = (y[i + 1] - y[i]) / h;
            for (int k = 0; k <= PARTS; k++) {
                double t = (double) k / PARTS;
                nodes[i * PARTS + k] = k == PARTS ? x[i + 1] : x[i] + t * h;
                double value = 6 * t * (1 - t) * d + (1 - t) * (1 - 3 * t) * slope[i] + t * (3 * t - 2) * slope[i + 1];
                density[i * PARTS + k] = Math.max(0, value);
            }
        }
        return RatePosterior.ofDensity(nodes, density, logEvidence);
    }
}
