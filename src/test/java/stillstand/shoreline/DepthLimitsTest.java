package stillstand.shoreline;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import stillstand.uncertainty.Tabulated;

class DepthLimitsTest {
    @Test
    void limitsAreQuantiles() {
        Tabulated depth = limits(0.4, 1.5, 9.4);
        assertEquals(0.025, depth.cumulativeProbability(0.4), 1e-12);
        assertEquals(0.5, depth.cumulativeProbability(1.5), 1e-12);
        assertEquals(0.975, depth.cumulativeProbability(9.4), 1e-12);
        assertEquals(1.5, depth.quantile(0.5), 1e-6);
    }

    /** Each side of the median is half of a log-normal distribution: its quartiles are known in closed form. */
    @Test
    void eachSideIsLogNormal() {
        Tabulated depth = limits(0.4, 1.5, 9.4);
        double quartile = 0.6744897501960817;
        double limit = 1.9599639845400543;
        assertEquals(1.5 * Math.pow(9.4 / 1.5, quartile / limit), depth.quantile(0.75), 2e-3);
        assertEquals(1.5 * Math.pow(0.4 / 1.5, quartile / limit), depth.quantile(0.25), 2e-3);
    }

    @Test
    void skewedStaysSkewed() {
        Tabulated depth = limits(0.4, 1.5, 9.4);
        assertTrue(depth.mean() > 1.5);
        assertEquals(0, depth.cumulativeProbability(-1e-9));
        // a normal distribution of this mean and spread would put a tenth of the corals into the air
        assertTrue(depth.mean() - 1.3 * depth.standardDeviation() < 0);
    }

    @Test
    void medianAtTheSurfaceIsSpikeOfHalf() {
        Tabulated depth = limits(0, 0, 67);
        assertEquals(List.of(new Tabulated.Spike(0, 0.5)), depth.spikes());
        assertEquals(0, depth.quantile(0.49));
        assertEquals(0.975, depth.cumulativeProbability(67), 1e-12);
        // exponential below: P(depth > x) = 0.5 (0.025 / 0.5)^(x / 67)
        assertEquals(1 - 0.5 * Math.sqrt(0.05), depth.cumulativeProbability(33.5), 1e-3);
    }

    @Test
    void deep68AtTheSurfaceIsSpikeOf84Percent() {
        Tabulated depth = new DepthLimits(0, 0, Optional.of(0.0), 45).depthMetres();
        assertEquals(0, depth.quantile(0.839));
        assertTrue(depth.quantile(0.85) > 0);
        assertEquals(45, depth.quantile(0.975), 1e-6);
    }

    @Test
    void shallowLimitAtTheSurfaceIsSmallSpike() {
        Tabulated depth = new DepthLimits(0, 2.4, Optional.of(7.0), 18).depthMetres();
        assertEquals(List.of(new Tabulated.Spike(0, 0.025)), depth.spikes());
        assertEquals(2.4, depth.quantile(0.5), 1e-6);
        assertEquals(7, depth.quantile(0.84), 1e-6);
        assertEquals(18, depth.quantile(0.975), 1e-6);
    }

    @ParameterizedTest
    @CsvSource({"2,1,9", "1,1,9", "-1,1,9", "0,0,0", "1,2,2", "NaN,1,2", "1,2,Infinity"})
    void limitsMustDeepen(double upper, double central, double lower) {
        assertThrows(IllegalArgumentException.class, () -> limits(upper, central, lower));
    }

    private static Tabulated limits(double upper, double central, double lower) {
        return new DepthLimits(upper, central, Optional.empty(), lower).depthMetres();
    }

    @Test
    void messageNamesTheLimits() {
        assertEquals(
                "limits of depth must deepen in order, from 0, but are 2.0, 1.0, -, 9.0",
                assertThrows(IllegalArgumentException.class, () -> limits(2, 1, 9))
                        .getMessage());
    }
}
