package stillstand.sensitivity;

import java.util.Arrays;
import java.util.Comparator;
import java.util.stream.IntStream;

/**
 * Weighed draws of a rate from independent blocks, and for each the reading (a number for each label) of every level. Draws are
 * kept in the order of their rates.
 */
final class RateDraws {
    private static final double TAIL = 0.025;

    /** Rates, m/kyr, ascending. */
    final double[] rates;

    final double[] weights;
    final int[] blocks;
    final int blockCount;
    /** Place of each draw in the order it was given in. */
    final int[] given;
    /** By level and draw, the reading; no level where readings do not matter. */
    final int[][] readings;

    final int readingCount;

    /**
     * @param rates m/kyr, in any order
     * @param weights 0 or more, not all 0
     * @param blocks number of each draw's block, from 0
     * @param blockCount how many blocks, 3 or more
     * @param readings by level and draw, a number from 0 to below {@code readingCount}
     */
    RateDraws(double[] rates, double[] weights, int[] blocks, int blockCount, int[][] readings, int readingCount) {
        if (!(blockCount >= 3)) {
            throw new IllegalArgumentException("blockCount must be 3 or more but is " + blockCount);
        }
        given = IntStream.range(0, rates.length)
                .boxed()
                .sorted(Comparator.comparingDouble(k -> rates[k]))
                .mapToInt(k -> k)
                .toArray();
        this.rates = Arrays.stream(given).mapToDouble(k -> rates[k]).toArray();
        this.weights = Arrays.stream(given).mapToDouble(k -> weights[k]).toArray();
        this.blocks = Arrays.stream(given).map(k -> blocks[k]).toArray();
        this.blockCount = blockCount;
        this.readings = new int[readings.length][];
        for (int i = 0; i < readings.length; i++) {
            int[] own = readings[i];
            this.readings[i] = Arrays.stream(given).map(k -> own[k]).toArray();
        }
        this.readingCount = readingCount;
        if (!(Arrays.stream(weights).sum() > 0)) {
            throw new IllegalArgumentException("draws of a rate must have some weight");
        }
    }

    int count() {
        return rates.length;
    }

    /** Sum of weights by block. */
    double[] blockTotals(double[] weight) {
        double[] totals = new double[blockCount];
        for (int k = 0; k < weight.length; k++) {
            totals[blocks[k]] += weight[k];
        }
        return totals;
    }

    /** Width of the 95 % interval of equal tails, m/kyr, without two blocks (-1: none); {@code weight} in the order of the rates. */
    double width95(double[] weight, double total, int without, int andWithout) {
        return upper(weight, total, without, andWithout) - lower(weight, total, without, andWithout);
    }

    private double lower(double[] weight, double total, int without, int andWithout) {
        double target = TAIL * total;
        double sum = 0;
        double before = 0;
        double rateBefore = rates[0];
        boolean first = true;
        for (int k = 0; k < rates.length; k++) {
            if (weight[k] > 0 && blocks[k] != without && blocks[k] != andWithout) {
                double middle = sum + weight[k] / 2;
                if (middle >= target) {
                    return first ? rates[k] : between(rateBefore, rates[k], before, middle, target);
                }
                sum += weight[k];
                before = middle;
                rateBefore = rates[k];
                first = false;
            }
        }
        return rateBefore;
    }

    private double upper(double[] weight, double total, int without, int andWithout) {
        double target = TAIL * total;
        double sum = 0;
        double before = 0;
        double rateBefore = rates[rates.length - 1];
        boolean first = true;
        for (int k = rates.length - 1; k >= 0; k--) {
            if (weight[k] > 0 && blocks[k] != without && blocks[k] != andWithout) {
                double middle = sum + weight[k] / 2;
                if (middle >= target) {
                    return first ? rates[k] : between(rateBefore, rates[k], before, middle, target);
                }
                sum += weight[k];
                before = middle;
                rateBefore = rates[k];
                first = false;
            }
        }
        return rateBefore;
    }

    private static double between(double rateBefore, double rate, double before, double middle, double target) {
        return rateBefore + (target - before) / (middle - before) * (rate - rateBefore);
    }
}
