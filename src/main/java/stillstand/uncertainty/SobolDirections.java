package stillstand.uncertainty;

import org.apache.commons.math3.random.SobolSequenceGenerator;

/**
 * Direction numbers of the Sobol' sequence from the table of Joe and Kuo 2008, as read by Commons Math: neighbours of its
 * sequence, which is in Gray code order, differ by one direction number.
 */
final class SobolDirections {
    static final int DIMENSIONS = 128;
    /** Direction numbers per dimension: 2^20 points. */
    static final int BITS = 20;

    private static final int[][] DIRECTIONS = read();

    private SobolDirections() {}

    /** Whether binary digit {@code digit} (0 = one half) of direction number {@code j} of a dimension is one. */
    static boolean hasDigit(int dimension, int j, int digit) {
        return (DIRECTIONS[dimension][j] >>> (BITS - 1 - digit) & 1) != 0;
    }

    private static int[][] read() {
        SobolSequenceGenerator sequence = new SobolSequenceGenerator(DIMENSIONS);
        int[][] directions = new int[DIMENSIONS][BITS];
        for (int j = 0; j < BITS; j++) {
            double[] before = sequence.skipTo((1 << j) - 1);
            double[] after = sequence.skipTo(1 << j);
            for (int dimension = 0; dimension < DIMENSIONS; dimension++) {
                directions[dimension][j] = digits(before[dimension]) ^ digits(after[dimension]);
            }
        }
        return directions;
    }

    private static int digits(double coordinate) {
        return (int) (coordinate * (1 << BITS));
    }
}
