package stillstand.comparison;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import org.junit.jupiter.api.Test;
import stillstand.uplift.Quantity;

/** Partial pooling of five sites with one shared error, against an independent implementation (quadrature over omega). */
class PooledRatesReferenceTest {
    private static final List<String> NAMES = List.of("a", "b", "c", "d", "e");
    private static final double[] RATES = {0.32, 0.35, 0.41, 0.44, 0.52};
    private static final double[] OWN_SDS = {0.015, 0.012, 0.02, 0.015, 0.018};
    private static final double SHARED_SD = 0.03;

    private static double[][] errors() {
        double[][] errors = new double[5][5];
        for (int i = 0; i < 5; i++) {
            for (int j = 0; j < 5; j++) {
                errors[i][j] = SHARED_SD * SHARED_SD + (i == j ? OWN_SDS[i] * OWN_SDS[i] : 0);
            }
        }
        return errors;
    }

    @Test
    void fiveSites() {
        PooledRates pooled = PooledRates.of(NAMES, RATES, errors(), 0.1);
        assertEquals(0.40747369, pooled.mean().mean().orElseThrow(), 1e-6);
        assertEquals(0.0838, pooled.spread().median(), 1e-4);
        assertEquals(0.090373499, pooled.spread().mean().orElseThrow(), 1e-5);
        double[] means = {0.32320882, 0.35137356, 0.40982765, 0.43879545, 0.51416296};
        double[] sds = {0.03350725, 0.032281225, 0.035773691, 0.0334522, 0.034995358};
        for (int s = 0; s < 5; s++) {
            Quantity rate = pooled.sites().get(s).rate();
            assertEquals(means[s], rate.mean().orElseThrow(), 2e-6);
            assertEquals(sds[s], rate.sd().orElseThrow(), 2e-6);
            assertTrue(rate.interval95().contains(rate.median()));
        }
    }

    @Test
    void sitesThatDifferFarMoreThanThePriorExpectsAreHardlyPulled() {
        double[] rates = {0.2, 3.0};
        double[][] errors = {{4e-4, 0}, {0, 4e-4}};
        PooledRates pooled = PooledRates.of(List.of("slow", "fast"), rates, errors, 0.1);
        assertEquals(0.2, pooled.sites().get(0).rate().median(), 0.01);
        assertEquals(3.0, pooled.sites().get(1).rate().median(), 0.01);
    }

    @Test
    void oneSiteIsNothingToPool() {
        assertThrows(
                IllegalArgumentException.class,
                () -> PooledRates.of(List.of("a"), new double[] {1}, new double[][] {{1}}, 0.1));
    }
}
