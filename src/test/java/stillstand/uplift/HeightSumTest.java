package stillstand.uplift;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.List;
import org.junit.jupiter.api.Test;
import stillstand.shoreline.HeightTerm;
import stillstand.shoreline.HeightTerm.Source;
import stillstand.uncertainty.LogNormal;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.StandardNormal;
import stillstand.uncertainty.Uncertain;
import stillstand.uncertainty.Uniform;

/** Sums of heights against closed forms. */
class HeightSumTest {
    private static HeightTerm term(int sign, Uncertain metres) {
        return new HeightTerm(Source.SURVEY, sign, metres);
    }

    @Test
    void normalTermsStayNormal() {
        assertEquals(new Normal(7, 5), HeightSum.of(List.of(term(1, new Normal(10, 3)), term(-1, new Normal(3, 4)))));
    }

    /** Survey error and a cover of unknown thickness: the mean over u in 0 to 4 of {@code Phi((x - 10 + u) / s)}. */
    @Test
    void coverIsOneSided() {
        for (double sigma : new double[] {1, 0.1, 5}) {
            Uncertain sum = HeightSum.of(List.of(term(1, new Normal(10, sigma)), term(-1, new Uniform(0, 4))));
            assertEquals(8, sum.mean(), 1e-4);
            assertEquals(Math.sqrt(sigma * sigma + 16 / 12.0), sum.standardDeviation(), 2e-4);
            for (double x : new double[] {5.5, 6.2, 8, 9.7, 10.4}) {
                double expected = (primitive((x - 6) / sigma) - primitive((x - 10) / sigma)) * sigma / 4;
                assertEquals(expected, sum.cumulativeProbability(x), 2e-4, "sigma " + sigma + ", height " + x);
            }
        }
    }

    /** Integral of Phi. */
    private static double primitive(double x) {
        return x * StandardNormal.cumulativeProbability(x) + Math.exp(-x * x / 2) / Math.sqrt(2 * Math.PI);
    }

    /** Without a normal part: two uniform terms make a triangle. */
    @Test
    void uniformTermsAlone() {
        Uncertain sum = HeightSum.of(List.of(term(1, new Uniform(0, 2)), term(1, new Uniform(5, 7))));
        assertEquals(7, sum.mean(), 0.01);
        assertEquals(0.125, sum.cumulativeProbability(6), 0.003);
        assertEquals(0.5, sum.cumulativeProbability(7), 0.005);
    }

    /** A skewed depth: moments of the log-normal, exp(m + s^2/2) and its variance. */
    @Test
    void skewedDepthKeepsItsMoments() {
        LogNormal depth = new LogNormal(0, 3, 0.6);
        Uncertain sum = HeightSum.of(List.of(term(1, new Normal(20, 1)), term(1, depth)));
        assertEquals(20 + depth.mean(), sum.mean(), 0.01);
        assertEquals(Math.hypot(1, depth.standardDeviation()), sum.standardDeviation(), 0.01);
    }
}
