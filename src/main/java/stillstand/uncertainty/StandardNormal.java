package stillstand.uncertainty;

import org.apache.commons.statistics.distribution.NormalDistribution;

/**
 * The normal distribution of mean 0 and standard deviation 1, accurately, and quickly for inner loops. The quick functions
 * read tables that are worked out from the accurate ones when the class is loaded.
 */
public final class StandardNormal {
    private static final NormalDistribution ACCURATE = NormalDistribution.of(0, 1);

    private StandardNormal() {}

    /** Probability that a standard normal number is at most {@code value}, to the last digits of a double. */
    public static double cumulativeProbability(double value) {
        return ACCURATE.cumulativeProbability(value);
    }

    /** Probability density at {@code value}. */
    public static double density(double value) {
        return ACCURATE.density(value);
    }

    /**
     * The value below which a standard normal number lies with the given probability, to the last digits of a double.
     *
     * @param probability from 0 to 1, which give the infinities
     * @throws IllegalArgumentException if {@code probability} is not from 0 to 1
     */
    public static double quantile(double probability) {
        if (!(probability >= 0 && probability <= 1)) {
            throw new IllegalArgumentException("probability must lie between 0 and 1 but is " + probability);
        }
        return ACCURATE.inverseCumulativeProbability(probability);
    }

    /**
     * As {@link #cumulativeProbability} in a third of the time: absolute error below 2e-15, relative error below 1e-10
     * down to -8.
     */
    public static double quickCumulativeProbability(double value) {
        return CumulativeTable.read(value);
    }

    /**
     * Quantiles of a whole column, in place, with an absolute error below 1e-10.
     *
     * @param column probabilities strictly between 0 and 1 on entry, values on return
     * @throws IllegalArgumentException if a probability is not strictly between 0 and 1; the column is then half done
     */
    public static void toQuantiles(double[] column) {
        QuantileTable.toQuantiles(column);
    }

    /**
     * Taylor pieces of degree 5 about multiples of 1/64. The n-th derivative of the density is (-1)^n He_n times the density,
     * with He_n the Hermite polynomials (Abramowitz and Stegun 1964, 26.2.31).
     */
    private static final class CumulativeTable {
        private static final double LIMIT = 8;
        private static final int PER_UNIT = 64;
        private static final int TERMS = 6;
        private static final double[] COEFFICIENTS = new double[TERMS * (2 * (int) LIMIT * PER_UNIT + 1)];

        static {
            for (int node = 0; node < COEFFICIENTS.length / TERMS; node++) {
                double x = (double) node / PER_UNIT - LIMIT;
                int c = TERMS * node;
                double density = density(x);
                COEFFICIENTS[c] = cumulativeProbability(x);
                COEFFICIENTS[c + 1] = density;
                COEFFICIENTS[c + 2] = -density * x / 2;
                COEFFICIENTS[c + 3] = density * (x * x - 1) / 6;
                COEFFICIENTS[c + 4] = -density * x * (x * x - 3) / 24;
                COEFFICIENTS[c + 5] = density * (x * x * (x * x - 6) + 3) / 120;
            }
        }

        static double read(double value) {
            if (!(value > -LIMIT && value < LIMIT)) {
                return cumulativeProbability(value);
            }
            double scaled = (value + LIMIT) * PER_UNIT;
            int node = (int) (scaled + 0.5);
            double d = (scaled - node) * (1. / PER_UNIT);
            int c = TERMS * node;
            double dd = d * d;
            double constant = COEFFICIENTS[c] + d * COEFFICIENTS[c + 1];
            double square = COEFFICIENTS[c + 2] + d * COEFFICIENTS[c + 3];
            double fourth = COEFFICIENTS[c + 4] + d * COEFFICIENTS[c + 5];
            return constant + dd * (square + dd * fourth);
        }
    }

    /**
     * Cubic pieces through the accurate quantile at Chebyshev nodes. The lower half of the distribution is cut into octaves
     * (1/4 to 1/2, 1/8 to 1/4, ...) and each octave into 128 pieces, so that the leading bits of the probability's own
     * floating-point form are the number of its piece. The upper half is the mirror image.
     */
    private static final class QuantileTable {
        private static final int PIECES_PER_OCTAVE_LOG2 = 7;
        private static final int OCTAVES = 14;
        private static final int SHIFT = 52 - PIECES_PER_OCTAVE_LOG2;
        private static final long HALF = Double.doubleToRawLongBits(0.5);
        private static final int LAST = (int) (HALF >>> SHIFT);
        private static final int FIRST = LAST - (OCTAVES << PIECES_PER_OCTAVE_LOG2);
        private static final int LENGTH = LAST - FIRST + 1;
        private static final long BITS_OF_DISTANCE = (1L << SHIFT) - 1;
        private static final long ONE = Double.doubleToRawLongBits(1);
        /**
         * Four coefficients a piece, by rising powers of the distance from its start as a part of the start of its octave. The
         * last piece is 1/2 alone.
         */
        private static final double[] COEFFICIENTS = new double[4 * LENGTH];

        static {
            for (int piece = 0; piece < LENGTH - 1; piece++) {
                double start = Double.longBitsToDouble((long) (FIRST + piece) << SHIFT);
                double end = Double.longBitsToDouble((long) (FIRST + piece + 1) << SHIFT);
                fit(start, end - start, 4 * piece);
            }
        }

        private static void fit(double start, double width, int at) {
            double[] offset = new double[4];
            double[] difference = new double[4];
            for (int i = 0; i < 4; i++) {
                offset[i] = width / 2 * (1 - Math.cos(Math.PI * (2 * i + 1) / 8));
                difference[i] = quantile(start + offset[i]);
            }
            for (int order = 1; order < 4; order++) {
                for (int i = 3; i >= order; i--) {
                    difference[i] = (difference[i] - difference[i - 1]) / (offset[i] - offset[i - order]);
                }
            }
            // from Newton's form to powers of the distance, by Horner's rule
            double[] power = {difference[3], 0, 0, 0};
            for (int i = 2; i >= 0; i--) {
                for (int k = 3; k > 0; k--) {
                    power[k] = power[k - 1] - offset[i] * power[k];
                }
                power[0] = difference[i] - offset[i] * power[0];
            }
            double scale = 1;
            for (int k = 0; k < 4; k++) {
                COEFFICIENTS[at + k] = power[k] * scale;
                scale *= width * (1 << PIECES_PER_OCTAVE_LOG2);
            }
        }

        static void toQuantiles(double[] column) {
            for (int i = 0; i < column.length; i++) {
                double probability = column[i];
                // no branch on the half: it would be mispredicted every other time
                double fromHalf = probability - 0.5;
                long bits = Double.doubleToRawLongBits(0.5 - Math.abs(fromHalf));
                int piece = (int) (bits >>> SHIFT) - FIRST;
                if (piece < 0 || piece >= LENGTH) {
                    column[i] = beyondTable(probability);
                    continue;
                }
                double distance = Double.longBitsToDouble(ONE | (bits & BITS_OF_DISTANCE)) - 1;
                int c = 4 * piece;
                double value = COEFFICIENTS[c]
                        + distance
                                * (COEFFICIENTS[c + 1]
                                        + distance * (COEFFICIENTS[c + 2] + distance * COEFFICIENTS[c + 3]));
                column[i] = Math.copySign(value, fromHalf);
            }
        }

        private static double beyondTable(double probability) {
            Uncertain.requireProbability(probability);
            return quantile(probability);
        }
    }
}
