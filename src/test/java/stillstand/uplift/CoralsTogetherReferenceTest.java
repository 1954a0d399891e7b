package stillstand.uplift;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.List;
import org.junit.jupiter.api.Test;
import stillstand.uplift.CoralsTogether.Coral;

/**
 * Three corals of one level, 10, 12 and 9 m up, against an independent implementation: a curve error taken for independent makes the
 * answer a quarter too narrow. Its quantiles are read off a grid whose step it does not state: they are compared to 1e-4.
 */
class CoralsTogetherReferenceTest {
    private static final RatePrior FLAT = new NormalPrior(0.05, 1000);

    private static List<Coral> corals(double seaSigmaMetres) {
        return List.of(
                coral(10, 4, 2.5, 121, 1.2, 6, seaSigmaMetres),
                coral(12, 5, 3, 124, 1.5, 6, seaSigmaMetres),
                coral(9, 3, 2, 127, 1.3, 5, seaSigmaMetres));
    }

    private static Coral coral(
            double elevation,
            double depth,
            double depthSigma,
            double age,
            double ageSigma,
            double sea,
            double seaSigma) {
        return new Coral(elevation + depth, Math.hypot(0.5, depthSigma), age, ageSigma, sea, 0, seaSigma);
    }

    @Test
    void sharedErrorsStayShared() {
        RatePosterior rate = CoralsTogether.rate(corals(1.5), 2, 0, 3, FLAT);
        assertEquals(0.065766043, rate.mean(), 3e-6);
        assertEquals(0.021571724, rate.standardDeviation(), 3e-6);
        assertEquals(0.023443711, rate.quantile(0.025), 1e-4);
        assertEquals(0.065713138, rate.quantile(0.5), 1e-4);
        assertEquals(0.1080048, rate.quantile(0.975), 1e-4);
    }

    @Test
    void takenForIndependentTheyNarrowTheAnswer() {
        RatePosterior rate = CoralsTogether.rate(corals(2.5), 0, 0, 1e-6, FLAT);
        assertEquals(0.067619499, rate.mean(), 3e-6);
        assertEquals(0.016499251, rate.standardDeviation(), 3e-6);
    }
}
