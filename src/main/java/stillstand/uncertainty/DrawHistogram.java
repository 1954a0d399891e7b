package stillstand.uncertainty;

import java.util.Arrays;

/**
 * Gathers draws, weighted or not, in equal cells over the range where nearly all of them fall; the few beyond it are kept
 * one by one. Each block of draws fills a histogram of its own and these are {@link #merge merged} in the order of the
 * blocks, so that the number of threads cannot change a bit of the result. What the draws say is read from a
 * {@link #distribution snapshot}.
 *
 * <p>With {@value #CELLS} cells and linear interpolation inside a cell, a quantile of a smooth distribution is off by about
 * a millionth of its standard deviation, far less than its Monte Carlo error.
 *
 * <p>Not safe for use by several threads at once.
 */
public final class DrawHistogram {
    static final int CELLS = 1 << 12;

    /** The range leaves out this part of the pilot draws on either side: heavy tails must not widen the cells. */
    private static final double PILOT_TAIL = 0.005;

    private static final double HALF = CELLS / 2.0;

    private final double middle;
    private final double cellWidth;
    /** Infinite where the range has no width: then no draw falls in a cell and all are kept. */
    private final double cellsPerUnit;

    private final double[] cells = new double[CELLS];
    private final KeptDraws beyond = new KeptDraws();

    private long count;
    private double weight;
    private double squaredWeight;
    /** Weighted sum of the distances from the middle of the range. */
    private double sum;

    private double squaredSum;

    private DrawHistogram(double middle, double cellWidth) {
        this.middle = middle;
        this.cellWidth = cellWidth;
        this.cellsPerUnit = 1 / cellWidth;
    }

    /**
     * An empty histogram with a range fit for draws like these. The pilot draws themselves are not added.
     *
     * @param pilot some draws, finite; a block is enough
     * @throws IllegalArgumentException if there are no draws or one is not finite
     */
    public static DrawHistogram forDrawsLike(double[] pilot) {
        return forDrawsLike(SortedDraws.of(pilot));
    }

    /** An empty histogram with a range fit for weighted draws like these. */
    public static DrawHistogram forDrawsLike(SortedDraws sorted) {
        double low = sorted.quantile(PILOT_TAIL);
        double high = sorted.quantile(1 - PILOT_TAIL);
        return new DrawHistogram(low + (high - low) / 2, (high - low) / CELLS);
    }

    /** An empty histogram with the range of this one. */
    public DrawHistogram emptyCopy() {
        return new DrawHistogram(middle, cellWidth);
    }

    /** Forgets all draws; the range stays. */
    public void clear() {
        if (count == 0) {
            return;
        }
        Arrays.fill(cells, 0);
        beyond.clear();
        count = 0;
        weight = 0;
        squaredWeight = 0;
        sum = 0;
        squaredSum = 0;
    }

    /**
     * Adds draws of equal weight.
     *
     * @throws IllegalArgumentException if a draw is not finite; the histogram is then of no further use
     */
    public void add(double[] draws) {
        double[] counts = cells;
        double sumOfBlock = 0;
        double squaresOfBlock = 0;
        for (double draw : draws) {
            double distance = draw - middle;
            sumOfBlock += distance;
            squaresOfBlock += distance * distance;
            double cell = distance * cellsPerUnit + HALF;
            if (cell >= 0 && cell < CELLS) {
                counts[(int) cell]++;
            } else {
                beyond.add(draw, 1);
            }
        }
        requireFinite(sumOfBlock);
        count += draws.length;
        weight += draws.length;
        squaredWeight += draws.length;
        sum += sumOfBlock;
        squaredSum += squaresOfBlock;
    }

    /**
     * Adds weighted draws. A draw of weight 0 counts as one but moves nothing.
     *
     * @param weights one for each draw, 0 or more, finite
     * @throws IllegalArgumentException if lengths differ, a draw or weight is not finite, or a weight is negative; the
     *     histogram is then of no further use
     */
    public void add(double[] draws, double[] weights) {
        if (draws.length != weights.length) {
            throw new IllegalArgumentException(
                    "draws and weights must be as many but are " + draws.length + " and " + weights.length);
        }
        double[] masses = cells;
        // sums in local variables: fields would be written to memory at every draw
        double weightOfBlock = 0;
        double squaredWeightOfBlock = 0;
        double sumOfBlock = 0;
        double squaresOfBlock = 0;
        for (int i = 0; i < draws.length; i++) {
            double draw = draws[i];
            double w = weights[i];
            if (!(w >= 0 && w < Double.POSITIVE_INFINITY)) {
                throw new IllegalArgumentException("weight must be 0 or more but is " + w);
            }
            requireFinite(draw);
            if (w == 0) {
                continue;
            }
            double distance = draw - middle;
            double cell = distance * cellsPerUnit + HALF;
            if (cell >= 0 && cell < CELLS) {
                masses[(int) cell] += w;
            } else {
                beyond.add(draw, w);
            }
            double moment = w * distance;
            weightOfBlock += w;
            squaredWeightOfBlock += w * w;
            sumOfBlock += moment;
            squaresOfBlock += moment * distance;
        }
        weight += weightOfBlock;
        squaredWeight += squaredWeightOfBlock;
        sum += sumOfBlock;
        squaredSum += squaresOfBlock;
        count += draws.length;
    }

    /**
     * Adds what another histogram has gathered.
     *
     * @throws IllegalArgumentException if the other has another range
     */
    public void merge(DrawHistogram other) {
        if (other.middle != middle || other.cellWidth != cellWidth) {
            throw new IllegalArgumentException("histograms to be merged must have the same range");
        }
        if (other.count == 0) {
            return;
        }
        for (int cell = 0; cell < CELLS; cell++) {
            cells[cell] += other.cells[cell];
        }
        beyond.addAll(other.beyond);
        count += other.count;
        weight += other.weight;
        squaredWeight += other.squaredWeight;
        sum += other.sum;
        squaredSum += other.squaredSum;
    }

    /** How many draws were added. */
    public long count() {
        return count;
    }

    /** Sum of the weights of the draws that were added; each draw without a weight counts 1. */
    public double totalWeight() {
        return weight;
    }

    /**
     * What the draws so far say; later draws do not change it.
     *
     * @throws IllegalStateException if no draw of any weight was added
     */
    public DrawDistribution distribution() {
        if (!(weight > 0)) {
            throw new IllegalStateException("a distribution needs at least one draw of some weight");
        }
        double effective = weight * weight / squaredWeight;
        return new DrawDistribution(curve(), middle + sum / weight, sd(), count, effective);
    }

    /** Standard deviation of the draws so far; not a number before the first. */
    public double sd() {
        double offset = sum / weight;
        return Math.sqrt(Math.max(0, squaredSum / weight - offset * offset));
    }

    /**
     * Quantiles as those of the {@link #distribution}, without making it where they all lie inside the range: for the many
     * blocks of a run.
     *
     * @param probabilities rising, strictly between 0 and 1
     * @throws IllegalStateException if no draw of any weight was added
     */
    double[] quantiles(double... probabilities) {
        double[] quantiles = new double[probabilities.length];
        double below = beyond.weightBelow(middle);
        int cell = -1;
        double upTo = below;
        for (int q = 0; q < quantiles.length; q++) {
            double target = probabilities[q] * weight;
            while (upTo < target && cell + 1 < CELLS) {
                cell++;
                below = upTo;
                upTo += cells[cell];
            }
            if (cell < 0 || !(upTo >= target)) {
                DrawDistribution all = distribution();
                return Arrays.stream(probabilities).map(all::quantile).toArray();
            }
            quantiles[q] = edge(cell) + (target - below) / (upTo - below) * cellWidth;
        }
        return quantiles;
    }

    private CumulativeCurve curve() {
        double[][] kept = beyond.sorted();
        int first = 0;
        while (first < CELLS && cells[first] == 0) {
            first++;
        }
        int end = CELLS;
        while (end > first && cells[end - 1] == 0) {
            end--;
        }
        CumulativeCurve.Builder curve = new CumulativeCurve.Builder(end - first + 1 + kept[0].length);
        int next = 0;
        for (; next < kept[0].length && kept[0][next] < middle; next++) {
            curve.draw(kept[0][next], kept[1][next]);
        }
        if (first < end) {
            curve.edge(edge(first));
        }
        for (int cell = first; cell < end; cell++) {
            curve.rise(edge(cell + 1), cells[cell]);
        }
        for (; next < kept[0].length; next++) {
            curve.draw(kept[0][next], kept[1][next]);
        }
        return curve.build();
    }

    private double edge(int cell) {
        return middle + (cell - HALF) * cellWidth;
    }

    private static void requireFinite(double sumOfDraws) {
        if (!Double.isFinite(sumOfDraws)) {
            throw new IllegalArgumentException("draws must be finite but one is not");
        }
    }

    /** Growing lists of draws and their weights; draws that are all alike take one place. */
    private static final class KeptDraws {
        private double[] values = new double[64];
        private double[] weights = new double[64];
        private int size;

        void add(double value, double weight) {
            if (size > 0 && values[size - 1] == value) {
                weights[size - 1] += weight;
                return;
            }
            if (size == values.length) {
                values = Arrays.copyOf(values, 2 * size);
                weights = Arrays.copyOf(weights, 2 * size);
            }
            values[size] = value;
            weights[size++] = weight;
        }

        void addAll(KeptDraws other) {
            for (int i = 0; i < other.size; i++) {
                add(other.values[i], other.weights[i]);
            }
        }

        void clear() {
            size = 0;
        }

        double weightBelow(double value) {
            double sum = 0;
            for (int i = 0; i < size; i++) {
                sum += values[i] < value ? weights[i] : 0;
            }
            return sum;
        }

        /** Values by rising order, and their weights. */
        double[][] sorted() {
            return SortedDraws.sort(Arrays.copyOf(values, size), Arrays.copyOf(weights, size));
        }
    }
}
