package stillstand.uncertainty;

import java.util.Arrays;

/** A sample small enough to be sorted, weighted or not, and what is read from it without any binning. Immutable. */
public final class SortedDraws {
    private final double[] values;
    /** Sum of the weights up to and with each value. */
    private final double[] weightUpTo;

    private SortedDraws(double[] values, double[] weights) {
        this.values = values;
        weightUpTo = weights;
        for (int i = 1; i < weights.length; i++) {
            weightUpTo[i] += weightUpTo[i - 1];
        }
    }

    /**
     * Draws of equal weight, in any order.
     *
     * @throws IllegalArgumentException if there are none or one is not finite
     */
    public static SortedDraws of(double[] draws) {
        double[] weights = new double[draws.length];
        Arrays.fill(weights, 1);
        return weighted(draws, weights);
    }

    /**
     * Weighted draws, in any order.
     *
     * @param weights one for each draw, 0 or more
     * @throws IllegalArgumentException if there are no draws, lengths differ, a draw or weight is not finite, a weight is
     *     negative or all are 0
     */
    public static SortedDraws weighted(double[] draws, double[] weights) {
        if (draws.length == 0 || draws.length != weights.length) {
            throw new IllegalArgumentException("draws must be one or more, with as many weights, but are "
                    + draws.length + " with " + weights.length);
        }
        for (double draw : draws) {
            Uncertain.requireFinite("draw", draw);
        }
        double total = 0;
        for (double weight : weights) {
            if (!(weight >= 0 && weight < Double.POSITIVE_INFINITY)) {
                throw new IllegalArgumentException("weight must be 0 or more but is " + weight);
            }
            total += weight;
        }
        if (!(total > 0)) {
            throw new IllegalArgumentException("weights must not all be 0");
        }
        double[][] sorted = sort(draws.clone(), weights.clone());
        return new SortedDraws(sorted[0], sorted[1]);
    }

    /**
     * The value below which the given part of the weight lies, each draw having half of its own weight below it, linear
     * between draws (definition 5 of Hyndman and Fan 1996, Am. Stat. 50:361, with weights).
     *
     * @param probability from 0 to 1
     * @throws IllegalArgumentException if {@code probability} is not from 0 to 1
     */
    public double quantile(double probability) {
        if (!(probability >= 0 && probability <= 1)) {
            throw new IllegalArgumentException("probability must lie between 0 and 1 but is " + probability);
        }
        double target = probability * total();
        int above = 0;
        int end = values.length;
        while (above < end) {
            int middle = (above + end) >>> 1;
            if (weightBelow(middle) >= target) {
                end = middle;
            } else {
                above = middle + 1;
            }
        }
        if (above == 0) {
            return values[0];
        }
        if (above == values.length) {
            return values[values.length - 1];
        }
        double from = weightBelow(above - 1);
        double part = (target - from) / (weightBelow(above) - from);
        return values[above - 1] + part * (values[above] - values[above - 1]);
    }

    /** The part of the weight of draws that are at most {@code value}. */
    public double cumulativeProbability(double value) {
        int above = 0;
        int end = values.length;
        while (above < end) {
            int middle = (above + end) >>> 1;
            if (values[middle] > value) {
                end = middle;
            } else {
                above = middle + 1;
            }
        }
        return above == 0 ? 0 : weightUpTo[above - 1] / total();
    }

    /**
     * The shortest interval between two draws that holds a probability: of M draws sorted as y(1) to y(M), with q the integer
     * part of {@code probability M + 1/2}, the least y(r + q) - y(r) (JCGM 101:2008, 7.7.2 and 7.7.4); with weights, q draws
     * become the weight of q average draws. The first of equally short ones.
     *
     * @throws IllegalArgumentException if {@code probability} is not strictly between 0 and 1, or too near 1 for so few draws
     */
    public Interval shortestInterval(double probability) {
        Uncertain.requireProbability(probability);
        double needed = probability * total() - total() / (2 * values.length);
        int bestFrom = -1;
        int bestTo = -1;
        int to = 0;
        for (int from = 0; from < values.length; from++) {
            to = Math.max(to, from);
            while (to < values.length && !(weightUpTo[to] - weightUpTo[from] > needed)) {
                to++;
            }
            if (to == values.length) {
                break;
            }
            if (bestFrom < 0 || values[to] - values[from] < values[bestTo] - values[bestFrom]) {
                bestFrom = from;
                bestTo = to;
            }
        }
        if (bestFrom < 0) {
            throw new IllegalArgumentException(
                    values.length + " draws are too few for an interval of probability " + probability);
        }
        return new Interval(values[bestFrom], values[bestTo]);
    }

    private double total() {
        return weightUpTo[weightUpTo.length - 1];
    }

    private double weightBelow(int draw) {
        double before = draw == 0 ? 0 : weightUpTo[draw - 1];
        return before + (weightUpTo[draw] - before) / 2;
    }

    /** Sorts values and takes their weights along; both arrays may be overwritten. */
    static double[][] sort(double[] values, double[] weights) {
        if (weights.length == 0 || Arrays.stream(weights).allMatch(weight -> weight == weights[0])) {
            Arrays.sort(values);
            return new double[][] {values, weights};
        }
        int[] order = orderOf(values);
        double[] sortedValues = new double[values.length];
        double[] sortedWeights = new double[values.length];
        for (int i = 0; i < order.length; i++) {
            sortedValues[i] = values[order[i]];
            sortedWeights[i] = weights[order[i]];
        }
        return new double[][] {sortedValues, sortedWeights};
    }

    /** Places of the values by rising value; a merge sort from the bottom up, since the library sorts no places of doubles. */
    private static int[] orderOf(double[] values) {
        int[] order = new int[values.length];
        Arrays.setAll(order, i -> i);
        int[] merged = new int[values.length];
        for (int run = 1; run < values.length; run *= 2) {
            for (int low = 0; low < values.length; low += 2 * run) {
                int middle = Math.min(low + run, values.length);
                int high = Math.min(low + 2 * run, values.length);
                int left = low;
                int right = middle;
                for (int i = low; i < high; i++) {
                    boolean fromLeft = left < middle && (right >= high || values[order[left]] <= values[order[right]]);
                    merged[i] = fromLeft ? order[left++] : order[right++];
                }
            }
            int[] swap = order;
            order = merged;
            merged = swap;
        }
        return order;
    }
}
