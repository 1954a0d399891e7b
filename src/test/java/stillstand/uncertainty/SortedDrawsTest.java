package stillstand.uncertainty;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import org.junit.jupiter.api.Test;

class SortedDrawsTest {

    /** By hand from definition 5: draw k of 5 stands at (k - 1/2) / 5. */
    @Test
    void quantileIsLinearBetweenTheMiddlesOfDraws() {
        SortedDraws draws = SortedDraws.of(new double[] {30, 10, 50, 20, 40});
        assertEquals(10, draws.quantile(0));
        assertEquals(10, draws.quantile(0.1));
        assertEquals(20, draws.quantile(0.3), 1e-12);
        assertEquals(30, draws.quantile(0.5), 1e-12);
        assertEquals(35, draws.quantile(0.6), 1e-12);
        assertEquals(50, draws.quantile(0.95));
        assertEquals(0.4, draws.cumulativeProbability(29.9), 1e-12);
        assertEquals(0.6, draws.cumulativeProbability(30), 1e-12);
        assertEquals(0, draws.cumulativeProbability(9));
    }

    @Test
    void drawOfWeightTwoIsLikeTwoDrawsForTheCumulativeProbability() {
        SortedDraws weighted = SortedDraws.weighted(new double[] {3, 1, 2}, new double[] {1, 1, 2});
        SortedDraws repeated = SortedDraws.of(new double[] {1, 2, 2, 3});
        for (double value = 0; value < 4; value += 0.5) {
            assertEquals(repeated.cumulativeProbability(value), weighted.cumulativeProbability(value), 1e-12);
        }
        assertEquals(2, weighted.quantile(0.5), 1e-12);
    }

    /** JCGM 101:2008, 7.7 by hand: 10 draws, p = 0.5, q = 5: differences y(r+5) - y(r) are 40, 31, 23, 24, 36. */
    @Test
    void shortestIntervalIsTheLeastDifference() {
        double[] draws = {0, 10, 20, 25, 31, 40, 41, 43, 49, 67};
        assertEquals(new Interval(20, 43), SortedDraws.of(draws).shortestInterval(0.5));
        assertThrows(IllegalArgumentException.class, () -> SortedDraws.of(draws).shortestInterval(0.99));
    }

    @Test
    void impossibleSamplesAreRefused() {
        assertThrows(IllegalArgumentException.class, () -> SortedDraws.of(new double[0]));
        assertThrows(IllegalArgumentException.class, () -> SortedDraws.of(new double[] {1, Double.NaN}));
        assertThrows(
                IllegalArgumentException.class, () -> SortedDraws.weighted(new double[] {1, 2}, new double[] {0, 0}));
        assertThrows(
                IllegalArgumentException.class, () -> SortedDraws.weighted(new double[] {1, 2}, new double[] {1, -1}));
        assertThrows(IllegalArgumentException.class, () -> new Interval(2, 1));
        assertThrows(IllegalArgumentException.class, () -> new Interval(Double.NaN, 1));
    }
}
