package stillstand.dating;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.ArrayList;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import stillstand.uncertainty.Normal;

class ReplicatesReferenceTest {
    /**
     * Ages and 2-sigma spreads published by Edwards et al. 1987, Gallup et al. 1994 and Dechnik et al. 2017 (Global and Planetary
     * Change 149, 53), and two invented sets; the statistics were computed from them beforehand by an independent script, to the
     * five decimals given here. The weighted means of the two sets of 2017 are those published, 128.7 and 127.6 ka.
     */
    @ParameterizedTest
    @CsvSource({
        "122.1 122.7 124.5, 1.1 1.3 1.3, 122.98321, 0.35268, 8.21388, 4.10694, 0.01646, 1.08489, 123.07368, 0.72050, 1.08416",
        "130.2 130.3 128.7, 0.7 0.7 0.7, 129.73333, 0.20207, 13.11565, 6.55782, 0.00142, 0.82513, 129.73333, 0.51747, 0.82513",
        "129.9 129.2, 1.1 1.1, 129.55, 0.38891, 0.80992, 0.80992, 0.36814, 0, 129.55, 0.38891, 0",
        "130.8 129.12 127.16, 0.81 0.83 0.62, 128.66488, 0.21172, 52.56134, 26.28067, 0, 1.78624, 129.01381, 1.05426, 1.88183",
        "127.41 129.66 126.16, 0.8 0.51 0.45, 127.64949, 0.15545, 106.3453, 53.17265, 0, 1.75640, 127.74417, 1.02893, 2.03109",
        "124.0 125.0 126.0 125.5 124.5, 1.6 1.6 1.6 1.6 1.6, 125, 0.35777, 3.90625, 0.97656, 0.41884, 0, 125, 0.35777, 0",
        "124.0 124.4 123.8 124.2 129.0, 0.8 0.8 0.8 0.8 0.8, 125.08, 0.17889, 121.3, 30.325, 0, 2.16610, 125.08, 0.98509, 2.16610"
    })
    void statisticsOfReplicates(
            String ages,
            String twoSigmas,
            double mean,
            double sigma,
            double chiSquare,
            double mswd,
            double p,
            double mandelPaule,
            double meanScattered,
            double sigmaScattered,
            double derSimonianLaird) {
        Replicates replicates = replicates(ages, twoSigmas, 2);
        double tolerance = 6e-6;
        assertEquals(mean, replicates.weightedMeanKa().mean(), tolerance);
        assertEquals(sigma, replicates.weightedMeanKa().sigma(), tolerance);
        assertEquals(chiSquare, replicates.chiSquare(), tolerance);
        assertEquals(mswd, replicates.mswd(), tolerance);
        assertEquals(p, replicates.p(), tolerance);
        double scatter = replicates.overdispersionMandelPauleKa();
        assertEquals(mandelPaule, scatter, tolerance);
        assertEquals(meanScattered, replicates.weightedMeanKa(scatter).mean(), tolerance);
        assertEquals(sigmaScattered, replicates.weightedMeanKa(scatter).sigma(), tolerance);
        assertEquals(derSimonianLaird, replicates.overdispersionDerSimonianLairdKa(), tolerance);
    }

    /** Quantiles of chi-square over its degrees of freedom, computed by an independent script to five decimals. */
    @ParameterizedTest
    @CsvSource({
        "1, 0.00098, 5.02389, 3.84146, 6.63490",
        "2, 0.02532, 3.68888, 2.99573, 4.60517",
        "4, 0.12110, 2.78582, 2.37193, 3.31918",
        "9, 0.30004, 2.11364, 1.87989, 2.40733",
        "19, 0.46876, 1.72907, 1.58650, 1.90478",
        "30, 0.55969, 1.56597, 1.45910, 1.69641",
        "100, 0.74222, 1.29561, 1.24342, 1.35807"
    })
    void limitsOfMswdAreExact(int degrees, double p025, double p975, double p95, double p99) {
        assertEquals(p025, Replicates.mswdLimit(degrees, 0.025), 6e-6);
        assertEquals(p975, Replicates.mswdLimit(degrees, 0.975), 6e-6);
        assertEquals(p95, Replicates.mswdLimit(degrees, 0.95), 6e-6);
        assertEquals(p99, Replicates.mswdLimit(degrees, 0.99), 6e-6);
    }

    /** The rule of thumb 1 + 2 sqrt(2 / degrees) of Wendt and Carl 1991 comes near the exact limit, from above. */
    @Test
    void limitsLieNearTheRuleOfThumb() {
        for (int degrees = 2; degrees <= 100; degrees++) {
            double rule = 1 + 2 * Math.sqrt(2.0 / degrees);
            assertEquals(rule, Replicates.mswdLimit(degrees, 0.95), 0.065 * rule, "degrees " + degrees);
        }
    }

    /**
     * Four ages, the scatter half-normal with scale 5 ka: an independent implementation of the same model (numpy). Its grid of
     * the scatter is coarser, hence the tolerances.
     */
    @Test
    void randomEffects() {
        Replicates replicates = replicates("121.3 124.9 119.8 128.4", "1.1 1.4 1.0 1.6", 1);
        assertEquals(122.4403953691294, replicates.weightedMeanKa().mean(), 1e-10);
        assertEquals(0.605529778259186, replicates.weightedMeanKa().sigma(), 1e-10);
        assertEquals(8.335608393622088, replicates.mswd(), 1e-10);
        assertEquals(1.5389845660000784e-05, replicates.p(), 1e-12);
        RandomEffects effects = replicates.randomEffects(RandomEffects.DEFAULT_SCALE_KA);
        assertEquals(123.45294827655972, effects.meanKa(), 2e-3);
        assertEquals(2.446467490397472, effects.sigmaKa(), 2e-3);
        assertEquals(118.54491898095613, effects.quantileKa(0.025), 5e-3);
        assertEquals(121.35225761146523, effects.quantileKa(0.16), 5e-3);
        assertEquals(123.41425763514047, effects.quantileKa(0.5), 5e-3);
        assertEquals(125.57581652399276, effects.quantileKa(0.84), 5e-3);
        assertEquals(128.5197814827813, effects.quantileKa(0.975), 5e-3);
        assertEquals(4.320710560589593, effects.meanScatterKa(), 5e-3);
    }

    static Replicates replicates(String ages, String spreads, double sigmas) {
        String[] values = ages.split(" ", -1);
        String[] errors = spreads.trim().split(" ", -1);
        List<Normal> normal = new ArrayList<>();
        for (int i = 0; i < values.length; i++) {
            normal.add(new Normal(Double.parseDouble(values[i]), Double.parseDouble(errors[i]) / sigmas));
        }
        return new Replicates(normal);
    }
}
