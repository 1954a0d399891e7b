package stillstand.uncertainty;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.HashSet;
import java.util.Set;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class SobolPointsTest {
    private static final DrawStreams STREAMS = new DrawStreams(11);

    private static double[] column(int dimensions, int dimension, int block, int points) {
        double[] column = new double[points];
        SobolPoints.scrambled(STREAMS, "points", dimensions, block).column(dimension, column);
        return column;
    }

    @ParameterizedTest
    @ValueSource(ints = {1, 2, 64, 1 << 14, 1 << 16})
    void everyEqualCellOfEveryDimensionHoldsOnePoint(int points) {
        for (int dimension = 0; dimension < 40; dimension++) {
            boolean[] taken = new boolean[points];
            for (double probability : column(40, dimension, 2, points)) {
                assertTrue(probability > 0 && probability < 1);
                int cell = (int) (probability * points);
                assertTrue(!taken[cell], "dimension " + dimension);
                taken[cell] = true;
            }
        }
    }

    /** The first two dimensions of Sobol' are a (0, m, 2)-net: each of the 2^m cells of any such grid holds one point. */
    @Test
    void firstTwoDimensionsFillEveryGridOfTheirPlane() {
        int m = 10;
        double[] x = column(2, 0, 5, 1 << m);
        double[] y = column(2, 1, 5, 1 << m);
        for (int across = 0; across <= m; across++) {
            Set<Integer> cells = new HashSet<>();
            for (int i = 0; i < x.length; i++) {
                int column = (int) (x[i] * (1 << across));
                int row = (int) (y[i] * (1 << (m - across)));
                cells.add(column << (m - across) | row);
            }
            assertEquals(1 << m, cells.size(), "2^" + across + " cells across");
        }
    }

    @Test
    void blocksAndDimensionsAreRandomisedEachOnItsOwn() {
        Set<Double> first = new HashSet<>();
        for (int block = 0; block < 20; block++) {
            for (int dimension = 0; dimension < 20; dimension++) {
                first.add(column(20, dimension, block, 1)[0]);
            }
        }
        assertEquals(400, first.size());
        // not a digital shift alone, which would leave exclusive or of any two points of a dimension as it is
        double[] one = column(1, 0, 0, 64);
        double[] two = column(1, 0, 1, 64);
        Set<Long> shifts = new HashSet<>();
        for (int i = 0; i < 64; i++) {
            shifts.add((long) (one[i] * 0x1p52) ^ (long) (two[i] * 0x1p52));
        }
        assertTrue(shifts.size() > 32);
    }

    @Test
    void blockIsTheSameInWhateverOrderBlocksAreAskedFor() {
        double[] before = column(3, 2, 7, 256);
        column(3, 0, 1, 256);
        column(3, 2, 8, 256);
        assertArrayEquals(before, column(3, 2, 7, 256));
        assertArrayEquals(before, column(12, 2, 7, 256)); // nor does the number of dimensions matter
        double[] longer = column(3, 2, 7, 1024);
        for (int i = 0; i < before.length; i++) {
            assertEquals(before[i], longer[i]);
        }
        assertNotEquals(before[0], column(3, 2, 8, 256)[0]);
    }

    /**
     * RMS error over 40 blocks of the 97.5 % quantile of a sum of four uniform numbers (exact value by hand: the upper corner
     * of a four-dimensional cube, 4 - (24 x 0.025)^(1/4)), against independent draws of the same number.
     */
    @Test
    void quantileIsMuchCloserThanWithIndependentDraws() {
        double exact = 4 - Math.pow(24 * 0.025, 0.25);
        double sobol = 0;
        double independent = 0;
        for (int block = 0; block < 40; block++) {
            double[] sum = new double[4096];
            double[] plainSum = new double[4096];
            for (int d = 0; d < 4; d++) {
                double[] points = column(4, d, block, 4096);
                double[] plain = new double[4096];
                STREAMS.probabilities("plain " + d, block, plain);
                for (int i = 0; i < sum.length; i++) {
                    sum[i] += points[i];
                    plainSum[i] += plain[i];
                }
            }
            sobol += Math.pow(SortedDraws.of(sum).quantile(0.975) - exact, 2);
            independent += Math.pow(SortedDraws.of(plainSum).quantile(0.975) - exact, 2);
        }
        assertTrue(
                Math.sqrt(independent / sobol) > 2,
                "error of independent draws over that of Sobol' points: " + Math.sqrt(independent / sobol));
    }

    @Test
    void impossibleRequestsAreRefused() {
        assertThrows(IllegalArgumentException.class, () -> SobolPoints.scrambled(STREAMS, "a", 0, 0));
        assertThrows(
                IllegalArgumentException.class,
                () -> SobolPoints.scrambled(STREAMS, "a", SobolPoints.MAXIMUM_DIMENSIONS + 1, 0));
        assertThrows(IllegalArgumentException.class, () -> SobolPoints.scrambled(STREAMS, "a", 1, -1));
        assertThrows(IllegalArgumentException.class, () -> column(2, 2, 0, 4));
        assertThrows(IllegalArgumentException.class, () -> column(2, 1, 0, 5));
        assertThrows(IllegalArgumentException.class, () -> column(2, 1, 0, 0));
    }
}
