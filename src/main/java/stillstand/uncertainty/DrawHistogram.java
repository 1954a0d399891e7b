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
    static final int CELLS = 1 << 14;

    /** The range leaves out this part of the pilot draws on either side: heavy tails must not widen the cells. */
    private static final double PILOT_TAIL = 0.005;

    private final double origin;
    private final double cellWidth;
    private final double cellsPerUnit;
    private final double[] cells = new double[CELLS];
    private final KeptDraws beyond = new KeptDraws();

    private long count;
    private double weight;
    private double squaredWeight;
    /** Weighted sums of the distance from the middle of the range, and of its square. */
    private double sum;

    private double squaredSum;
    private double least = Double.POSITIVE_INFINITY;
    private double greatest = Double.NEGATIVE_INFINITY;

    private DrawHistogram(double origin, double cellWidth) {
        this.origin = origin;
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
        SortedDraws sorted = SortedDraws.of(pilot);
        double low = sorted.quantile(PILOT_TAIL);
        double high = sorted.quantile(1 - PILOT_TAIL);
        // draws that are all alike still need cells of some width
        double least = 1e-9 * Math.max(Math.max(Math.abs(low), Math.abs(high)), 1e-100);
        double width = Math.max(high - low, least);
        return new DrawHistogram(low + (high - low) / 2 - width / 2, width / CELLS);
    }

    /** An empty histogram with the range of this one. */
    public DrawHistogram emptyCopy() {
        return new DrawHistogram(origin, cellWidth);
    }

    /**
     * Adds draws of equal weight.
     *
     * @throws IllegalArgumentException if a draw is not finite; the histogram is then of no further use
     */
    public void add(double[] draws) {
        double middle = middle();
        double sum0 = 0;
        double sum1 = 0;
        double square0 = 0;
        double square1 = 0;
        // two chains of additions in turn: the processor does not wait for one before it begins the next
        for (int i = 0; i + 1 < draws.length; i += 2) {
            double d0 = draws[i] - middle;
            double d1 = draws[i + 1] - middle;
            sum0 += d0;
            sum1 += d1;
            square0 += d0 * d0;
            square1 += d1 * d1;
        }
        if (draws.length % 2 == 1) {
            double last = draws[draws.length - 1] - middle;
            sum0 += last;
            square0 += last * last;
        }
        requireFinite(sum0 + sum1);
        for (double draw : draws) {
            int cell = (int) Math.floor((draw - origin) * cellsPerUnit);
            if (cell >= 0 && cell < CELLS) {
                cells[cell]++;
            } else {
                beyond.add(draw, 1);
            }
        }
        extend(draws);
        count += draws.length;
        weight += draws.length;
        squaredWeight += draws.length;
        sum += sum0 + sum1;
        squaredSum += square0 + square1;
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
        double middle = middle();
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
            int cell = (int) Math.floor((draw - origin) * cellsPerUnit);
            if (cell >= 0 && cell < CELLS) {
                cells[cell] += w;
            } else {
                beyond.add(draw, w);
            }
            weight += w;
            squaredWeight += w * w;
            sum += w * (draw - middle);
            squaredSum += w * (draw - middle) * (draw - middle);
            least = Math.min(least, draw);
            greatest = Math.max(greatest, draw);
        }
        count += draws.length;
    }

    /**
     * Adds what another histogram has gathered.
     *
     * @throws IllegalArgumentException if the other has another range
     */
    public void merge(DrawHistogram other) {
        if (other.origin != origin || other.cellWidth != cellWidth) {
            throw new IllegalArgumentException("histograms to be merged must have the same range");
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
        least = Math.min(least, other.least);
        greatest = Math.max(greatest, other.greatest);
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
        double offset = sum / weight;
        double variance = Math.max(0, squaredSum / weight - offset * offset);
        double effective = weight * weight / squaredWeight;
        double mean = Math.min(greatest, Math.max(least, middle() + offset));
        double sd = least == greatest ? 0 : Math.sqrt(variance);
        return new DrawDistribution(curve(), mean, sd, count, effective);
    }

    private CumulativeCurve curve() {
        double[][] kept = beyond.sorted();
        CumulativeCurve.Builder curve = new CumulativeCurve.Builder(CELLS + 1 + kept[0].length);
        int next = 0;
        for (; next < kept[0].length && kept[0][next] < origin; next++) {
            curve.draw(kept[0][next], kept[1][next]);
        }
        curve.edge(clamped(origin));
        for (int cell = 0; cell < CELLS; cell++) {
            curve.rise(clamped(origin + (cell + 1) * cellWidth), cells[cell]);
        }
        for (; next < kept[0].length; next++) {
            curve.draw(kept[0][next], kept[1][next]);
        }
        return curve.build();
    }

    private double clamped(double edge) {
        return Math.min(greatest, Math.max(least, edge));
    }

    private double middle() {
        return origin + CELLS / 2 * cellWidth;
    }

    private void extend(double[] draws) {
        double low = least;
        double high = greatest;
        for (double draw : draws) {
            low = Math.min(low, draw);
            high = Math.max(high, draw);
        }
        least = low;
        greatest = high;
    }

    private static void requireFinite(double sumOfDraws) {
        if (!Double.isFinite(sumOfDraws)) {
            throw new IllegalArgumentException("draws must be finite but one is not");
        }
    }

    /** Growing lists of draws and their weights. */
    private static final class KeptDraws {
        private double[] values = new double[64];
        private double[] weights = new double[64];
        private int size;

        void add(double value, double weight) {
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

        /** Values by rising order, and their weights. */
        double[][] sorted() {
            return SortedDraws.sort(Arrays.copyOf(values, size), Arrays.copyOf(weights, size));
        }
    }
}
