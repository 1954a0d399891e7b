package stillstand.uncertainty;

import java.util.List;

/**
 * When to stop drawing: the adaptive procedure of JCGM 101:2008, clause 7.9, with blocks as replicates. Blocks go on until
 * twice the standard deviation of the average over blocks of each of the estimate, its standard uncertainty and both ends of
 * the 95 % interval is no more than the numerical {@link #tolerance} of the standard uncertainty.
 *
 * <p>Two departures. The estimate is the median, since a quotient may have no mean. And there are at least
 * {@value #LEAST_BLOCKS} blocks: with the standard's two the rule often stops by luck (compare Wuebbeler et al. 2010,
 * Metrologia 47:317).
 *
 * <p>Ask after each block <em>in the order of their numbers</em>, not as they arrive: then the number of blocks used is the
 * same for any number of threads. Blocks already drawn beyond the one that decided are dropped.
 *
 * @param significantDigits digits of the standard uncertainty that shall be right, 1 or 2
 * @param mostBlocks blocks after which drawing stops in any case
 */
public record AdaptiveStop(int significantDigits, int mostBlocks) {
    /** Fewest blocks that say something of their own spread. */
    public static final int LEAST_BLOCKS = 10;

    /** What to do after a block. */
    public enum Decision {
        /** Draw another block. */
        GO_ON,
        /** The tolerance is reached. */
        CONVERGED,
        /** It is not, but there are as many blocks as may be. */
        CAPPED
    }

    /** @throws IllegalArgumentException if {@code significantDigits} is not 1 or 2, or {@code mostBlocks} is below 1 */
    public AdaptiveStop {
        if (significantDigits < 1 || significantDigits > 2) {
            throw new IllegalArgumentException("significantDigits must be 1 or 2 but is " + significantDigits);
        }
        if (mostBlocks < 1) {
            throw new IllegalArgumentException("mostBlocks must be 1 or more but is " + mostBlocks);
        }
    }

    /**
     * What to do after the last of these blocks.
     *
     * @param blocks all blocks so far, in the order of their numbers
     * @param spread standard uncertainty from the draws of all these blocks together (the same kind of spread as in the
     *     blocks), 0 or more
     */
    public Decision after(List<BlockEstimates> blocks, double spread) {
        if (blocks.size() >= LEAST_BLOCKS && isReached(blocks, spread)) {
            return Decision.CONVERGED;
        }
        return blocks.size() >= mostBlocks ? Decision.CAPPED : Decision.GO_ON;
    }

    private boolean isReached(List<BlockEstimates> blocks, double spread) {
        if (spread == 0) {
            return true;
        }
        double most = tolerance(spread, significantDigits) / 2;
        return MonteCarloError.ofAverage(blocks.stream()
                                .mapToDouble(BlockEstimates::median)
                                .toArray())
                        <= most
                && MonteCarloError.ofAverage(blocks.stream()
                                .mapToDouble(BlockEstimates::spread)
                                .toArray())
                        <= most
                && MonteCarloError.ofAverage(blocks.stream()
                                .mapToDouble(b -> b.interval95().low())
                                .toArray())
                        <= most
                && MonteCarloError.ofAverage(blocks.stream()
                                .mapToDouble(b -> b.interval95().high())
                                .toArray())
                        <= most;
    }

    /**
     * Numerical tolerance of a standard uncertainty (JCGM 101:2008, 7.9.2): write it as c 10^l with c an integer of the given
     * number of digits; the tolerance is 10^l / 2. What rounds up to one digit more (0.0996 to 0.10) has the larger l.
     *
     * @param uncertainty above 0
     * @param digits 1 or more
     * @throws IllegalArgumentException if {@code uncertainty} is not a finite number above 0
     */
    public static double tolerance(double uncertainty, int digits) {
        Uncertain.requirePositive("uncertainty", uncertainty);
        int power = (int) Math.floor(Math.log10(uncertainty)) - digits + 1;
        if (Math.rint(uncertainty / Math.pow(10, power)) >= Math.pow(10, digits)) {
            power++;
        }
        return Math.pow(10, power) / 2;
    }
}
