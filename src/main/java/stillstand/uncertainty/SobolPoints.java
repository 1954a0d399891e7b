package stillstand.uncertainty;

import org.apache.commons.rng.UniformRandomProvider;

/**
 * One block of randomised Sobol' points, read dimension by dimension. Over blocks the points are independent
 * randomisations, so the spread between blocks measures the error of an average or a quantile.
 *
 * <p>The direction numbers are those of Joe and Kuo 2008 (SIAM J. Sci. Comput. 30:2635). Each dimension is randomised by a
 * linear scramble (Matousek 1998, J. Complexity 14:527: the binary digits are multiplied by a random lower triangular
 * matrix with ones on its diagonal) and a digital shift. Both leave the balance of the points as it is: of 2^k points every
 * one of 2^k equal intervals of a dimension holds exactly one. The scramble is applied to the direction numbers, so a
 * point costs one exclusive or. The first point of the sequence is not dropped (Owen 2022, in MCQMC 2020, Springer).
 *
 * <p>Points serve inverse distribution functions only ({@link Uncertain#toQuantiles}), with every input at a dimension of
 * its own. Put the inputs that matter most first.
 */
public final class SobolPoints {
    /** Most dimensions that points can have. */
    public static final int MAXIMUM_DIMENSIONS = SobolDirections.DIMENSIONS;

    /** Most points in a block. */
    public static final int MAXIMUM_POINTS = 1 << SobolDirections.BITS;

    private static final int DIGITS = 52;
    private static final long ONE_AS_BITS = Double.doubleToRawLongBits(1);
    private static final double ONE_LESS_HALF_A_DIGIT = 1 - 0x1p-53;

    private final DrawStreams streams;
    private final String key;
    private final int dimensions;
    private final int block;

    private SobolPoints(DrawStreams streams, String key, int dimensions, int block) {
        this.streams = streams;
        this.key = key;
        this.dimensions = dimensions;
        this.block = block;
    }

    /**
     * The points of a block.
     *
     * @param key names what the points are for; dimension d is randomised by the stream {@code key + " sobol dimension " + d}
     * @param dimensions how many inputs there are, 1 to {@link #MAXIMUM_DIMENSIONS}
     * @param block number of the block, from 0
     * @throws IllegalArgumentException if {@code dimensions} or {@code block} is out of range
     */
    public static SobolPoints scrambled(DrawStreams streams, String key, int dimensions, int block) {
        if (dimensions < 1 || dimensions > MAXIMUM_DIMENSIONS) {
            throw new IllegalArgumentException(
                    "dimensions must be 1 to " + MAXIMUM_DIMENSIONS + " but are " + dimensions);
        }
        if (block < 0) {
            throw new IllegalArgumentException("block must be 0 or more but is " + block);
        }
        return new SobolPoints(streams, key, dimensions, block);
    }

    /** How many dimensions the points have. */
    public int dimensions() {
        return dimensions;
    }

    /**
     * One coordinate of every point. A shorter column is the start of a longer one.
     *
     * @param dimension from 0
     * @param out receives probabilities strictly between 0 and 1; its length, a power of two, is the number of points
     * @throws IllegalArgumentException if there is no such dimension, or the length of {@code out} is not a power of two up
     *     to {@link #MAXIMUM_POINTS}
     */
    public void column(int dimension, double[] out) {
        if (dimension < 0 || dimension >= dimensions) {
            throw new IllegalArgumentException("dimension must be 0 to " + (dimensions - 1) + " but is " + dimension);
        }
        if (Integer.bitCount(out.length) != 1 || out.length > MAXIMUM_POINTS) {
            throw new IllegalArgumentException(
                    "number of points must be a power of two up to " + MAXIMUM_POINTS + " but is " + out.length);
        }
        UniformRandomProvider random = streams.stream(key + " sobol dimension " + dimension, block);
        long digits = random.nextLong() >>> (Long.SIZE - DIGITS);
        long[] directions = scrambledDirections(dimension, random);
        for (int i = 0; i < out.length; i++) {
            // 1.ddd...d less 1, plus half a digit: exact, and cheaper than the conversion of a long
            out[i] = Double.longBitsToDouble(ONE_AS_BITS | digits) - ONE_LESS_HALF_A_DIGIT;
            digits ^= directions[Integer.numberOfTrailingZeros(i + 1)];
        }
    }

    /** Direction numbers times the random matrix, of which column c has its one at digit c and random digits below it. */
    private static long[] scrambledDirections(int dimension, UniformRandomProvider random) {
        // one more, read at the end of the longest column but never used
        long[] scrambled = new long[SobolDirections.BITS + 1];
        for (int digit = 0; digit < SobolDirections.BITS; digit++) {
            long one = 1L << (DIGITS - 1 - digit);
            long matrixColumn = one | (random.nextLong() & (one - 1));
            for (int j = 0; j < SobolDirections.BITS; j++) {
                if (SobolDirections.hasDigit(dimension, j, digit)) {
                    scrambled[j] ^= matrixColumn;
                }
            }
        }
        return scrambled;
    }
}
