package stillstand.uncertainty;

/**
 * What one block of draws says on its own.
 *
 * @param median median of the block
 * @param spread standard deviation of the block, or half the width of its 68 % interval where no standard deviation exists
 * @param interval95 its equal-tailed 95 % interval
 */
public record BlockEstimates(double median, double spread, Interval interval95) {
    /** @throws IllegalArgumentException if {@code median} is not finite or {@code spread} not a finite number, 0 or more */
    public BlockEstimates {
        Uncertain.requireFinite("median", median);
        if (!(spread >= 0 && spread < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("spread must be 0 or more but is " + spread);
        }
    }

    /** Of a block whose distribution has a standard deviation. */
    public static BlockEstimates of(DrawDistribution block) {
        return new BlockEstimates(block.quantile(0.5), block.sd(), block.equalTailed(Interval.PROBABILITY_95));
    }

    /** Of a block whose distribution may have no standard deviation. */
    public static BlockEstimates withoutMoments(DrawDistribution block) {
        return new BlockEstimates(
                block.quantile(0.5),
                block.equalTailed(Interval.PROBABILITY_68).width() / 2,
                block.equalTailed(Interval.PROBABILITY_95));
    }
}
