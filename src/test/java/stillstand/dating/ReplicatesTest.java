package stillstand.dating;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import stillstand.uncertainty.Exact;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.Uniform;

class ReplicatesTest {
    @Test
    void datesOfAnyKindEnterByMeanAndSpread() {
        Replicates replicates = Replicates.of(List.of(new Normal(120, 2), new Uniform(118, 130), new Exact(124)))
                .orElseThrow();
        assertEquals(List.of(new Normal(120, 2), new Normal(124, 12 / Math.sqrt(12))), replicates.agesKa());
    }

    @Test
    void oneDateSaysNothingOfAgreement() {
        assertEquals(Optional.empty(), Replicates.of(List.of(new Normal(120, 2), new Exact(124))));
        assertThrows(IllegalArgumentException.class, () -> new Replicates(List.of(new Normal(120, 2))));
    }

    /** With dates that agree the scatter is small against its prior, and the answer lies near the weighted mean. */
    @Test
    void randomEffectsWidenTheWeightedMean() {
        Replicates replicates = ReplicatesReferenceTest.replicates("124 125 126 125.5 124.5", "0.8 0.8 0.8 0.8 0.8", 1);
        RandomEffects effects = replicates.randomEffects(5);
        assertEquals(125, effects.meanKa(), 1e-9);
        assertTrue(effects.sigmaKa() > replicates.weightedMeanKa().sigma());
        assertEquals(0.5, effects.cumulativeProbability(125), 1e-9);
        assertEquals(125, effects.quantileKa(0.5), 1e-9);
    }

    /** A prior that allows no scatter gives the weighted mean back. */
    @Test
    void withoutScatterItIsTheWeightedMean() {
        Replicates replicates = ReplicatesReferenceTest.replicates("121.3 124.9", "1.1 1.4", 1);
        RandomEffects effects = replicates.randomEffects(1e-6);
        assertEquals(replicates.weightedMeanKa().mean(), effects.meanKa(), 1e-6);
        assertEquals(replicates.weightedMeanKa().sigma(), effects.sigmaKa(), 1e-6);
    }

    /** Two precise populations 45 ka apart: the grid must reach a scatter that the prior hardly allows. */
    @Test
    void densityIntegratesToOneForPopulationsFarApart() {
        RandomEffects effects = ReplicatesReferenceTest.replicates("80 80.2 125", "0.1 0.1 0.1", 1)
                .randomEffects(5);
        double sum = 0;
        for (double age = 0; age <= 200; age += 0.05) {
            sum += 0.05 * effects.density(age);
        }
        assertEquals(1, sum, 1e-6);
        assertEquals((80 + 80.2 + 125) / 3, effects.meanKa(), 0.01);
    }
}
