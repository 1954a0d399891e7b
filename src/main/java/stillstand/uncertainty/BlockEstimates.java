package stillstand.uncertainty;

/**
 * What one block of draws says on its own.
 *
 * @param median median of the block
 * @param spread standard deviation of the block, or half the width of its 68 % interval where no standard deviation exists
 * @param interval95 its equal-tailed 95 % interval
 */
public record BlockEstimates(double median, double spread, Interval interval95) {
    private static final double LOW_95 = (1 - Interval.PROBABILITY_95) / 2;
    private static final double LOW_68 = (1 - Interval.PROBABILITY_68) / 2;
    private static final double HIGH_68 = (1 + Interval.PROBABILITY_68) / 2;
    private static final double HIGH_95 = (1 + Interval.PROBABILITY_95) / 2;

    /** @throws IllegalArgumentException if {@code median} is not finite or {@code spread} not a finite number, 0 or more */
    public BlockEstimates {
        Uncertain.requireFinite("median", median);
        if (!(spread >= 0 && spread < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("spread must be 0 or more but is " + spread);
        }
    }

    /**
     * Of a block whose distribution has a standard deviation.
     *
     * @throws IllegalStateException if it holds no draw of any weight
     */
    public static BlockEstimates of(DrawHistogram block) {
        double[] quantiles = block.quantiles(LOW_95, 0.5, HIGH_95);
        return new BlockEstimates(quantiles[1], block.sd(), new Interval(quantiles[0], quantiles[2]));
    }

    /**
     * Of a block whose distribution may have no standard deviation.
     *
     * @throws IllegalStateException if it holds no draw of any weight
     */
    public static BlockEstimates withoutMoments(DrawHistogram block) {
        double[] quantiles = block.quantiles(LOW_95, LOW_68, 0.5, HIGH_68, HIGH_95);
        return new BlockEstimates(
                quantiles[2], (quantiles[3] - quantiles[1]) / 2, new Interval(quantiles[0], quantiles[4]));
    }
}
