package stillstand.uncertainty;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import org.apache.commons.statistics.distribution.NormalDistribution;
import org.junit.jupiter.api.Test;

/** The quick functions against the accurate ones of Apache Commons Statistics 1.2. */
class StandardNormalReferenceTest {
    private static final NormalDistribution REFERENCE = NormalDistribution.of(0, 1);

    /** Abramowitz and Stegun 1964, table 26.1 (Phi, 15 decimals). */
    @Test
    void agreesWithThePrintedTable() {
        assertEquals(0.841344746068543, StandardNormal.quickCumulativeProbability(1), 1e-15);
        assertEquals(0.977249868051821, StandardNormal.quickCumulativeProbability(2), 1e-15);
    }

    @Test
    void quickCumulativeProbabilityIsGoodToTheStatedErrors() {
        for (double value = -8.3; value < 8.3; value += 0.00037) {
            double expected = REFERENCE.cumulativeProbability(value);
            double actual = StandardNormal.quickCumulativeProbability(value);
            assertEquals(expected, actual, 2e-15);
            assertEquals(1, actual / expected, 1e-10);
        }
        assertEquals(0, StandardNormal.quickCumulativeProbability(Double.NEGATIVE_INFINITY));
        assertEquals(1, StandardNormal.quickCumulativeProbability(Double.POSITIVE_INFINITY));
        assertEquals(Double.NaN, StandardNormal.quickCumulativeProbability(Double.NaN));
    }

    @Test
    void columnIsGoodToTheStatedErrorFromTailToTail() {
        double[] probabilities = new double[400_000];
        for (int i = 0; i < probabilities.length; i++) {
            // even steps in the middle, and down to 1e-15 in either tail
            double t = (i % 100_000 + 0.5) / 100_000;
            double tail = Math.pow(10, -15 * t) / 2;
            probabilities[i] = i < 200_000 ? t : i < 300_000 ? tail : 1 - tail;
        }
        double[] column = probabilities.clone();
        StandardNormal.toQuantiles(column);
        for (int i = 0; i < column.length; i++) {
            assertEquals(REFERENCE.inverseCumulativeProbability(probabilities[i]), column[i], 1e-10);
        }
    }

    @Test
    void probabilitiesThatAreNoneAreRefused() {
        for (double probability : new double[] {0, 1, -0.25, 1.25, Double.NaN}) {
            assertThrows(
                    IllegalArgumentException.class, () -> StandardNormal.toQuantiles(new double[] {0.5, probability}));
        }
        assertThrows(IllegalArgumentException.class, () -> StandardNormal.quantile(-0.1));
    }
}
