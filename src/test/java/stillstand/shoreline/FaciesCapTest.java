package stillstand.shoreline;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import java.util.Optional;
import org.junit.jupiter.api.Test;
import stillstand.uncertainty.Exact;
import stillstand.uncertainty.LogNormal;
import stillstand.uncertainty.Uncertain;
import stillstand.uncertainty.Uniform;

class FaciesCapTest {
    private static final Uncertain PALMATA = new DepthLimits(0.4, 1.5, Optional.empty(), 9.4).depthMetres();

    /** What is left keeps its proportions: F(x) / F(cap) at every depth. */
    @Test
    void cutDistributionKeepsItsProportions() {
        assertProportional(PALMATA, 5, 1e-12);
        assertProportional(new DepthLimits(0, 0, Optional.of(0.0), 45).depthMetres(), 6, 1e-12);
        assertProportional(new LogNormal(0, 3, 0.6), 5, 2e-4);
    }

    private static void assertProportional(Uncertain depth, double cap, double tolerance) {
        Uncertain left = FaciesCap.apply(depth, cap).orElseThrow();
        for (double share : new double[] {0, 0.1, 0.3, 0.5, 0.8, 1, 2}) {
            double expected = depth.cumulativeProbability(Math.min(1, share) * cap) / depth.cumulativeProbability(cap);
            assertEquals(expected, left.cumulativeProbability(share * cap), tolerance, depth + " at " + share);
        }
    }

    @Test
    void capBelowAllDepthsChangesNothing() {
        assertEquals(Optional.of(PALMATA), FaciesCap.apply(PALMATA, 100));
        assertEquals(Optional.of(new Uniform(1, 6)), FaciesCap.apply(new Uniform(1, 6), 6));
        assertEquals(Optional.of(new Exact(3)), FaciesCap.apply(new Exact(3), 3));
    }

    @Test
    void zoneIsCut() {
        assertEquals(Optional.of(new Uniform(1, 4)), FaciesCap.apply(new Uniform(1, 6), 4));
    }

    @Test
    void capAboveTheHabitatContradictsIt() {
        assertEquals(Optional.empty(), FaciesCap.apply(new Uniform(6, 15), 6));
        assertEquals(Optional.empty(), FaciesCap.apply(new Exact(3), 2));
        assertEquals(Optional.empty(), FaciesCap.apply(new LogNormal(0, 30, 0.1), 10));
    }

    @Test
    void capMustBeAboveZero() {
        assertThrows(IllegalArgumentException.class, () -> FaciesCap.apply(PALMATA, 0));
        assertThrows(IllegalArgumentException.class, () -> FaciesCap.apply(PALMATA, Double.NaN));
    }
}
