package stillstand.uplift;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static stillstand.uplift.TestRates.depth;
import static stillstand.uplift.TestRates.highstand;
import static stillstand.uplift.TestRates.survey;

import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import stillstand.uncertainty.Exact;
import stillstand.uncertainty.LogNormal;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.TruncatedNormal;

class LevelRatesTest {
    /** A prior that keeps one draw in thousands must not make a sharp answer of it. */
    @Test
    void aPriorThatLeavesAFewDrawsLeavesNoAnswer() {
        LevelRates.Outcome drawn = TestRates.rate(
                1,
                List.of(survey(new Normal(-46.2, 0.144)), depth(new LogNormal(0, 0.418, 0.823))),
                TestRates.NO_LOWERING,
                List.of(highstand(
                        new TruncatedNormal(0.6, 0.2, 0.01, Double.POSITIVE_INFINITY), new Normal(0, 1))),
                CauchyPrior.DEFAULT);
        assertEquals(Optional.empty(), drawn.rateWithPrior());
        assertEquals(Optional.empty(), drawn.probabilityUplift());
    }

    @Test
    void anExactLevelHasAnExactRate() {
        LevelRates.Outcome drawn = TestRates.rate(
                1,
                List.of(survey(new Exact(105))),
                TestRates.NO_LOWERING,
                List.of(highstand(new Exact(125), new Exact(5))),
                CauchyPrior.DEFAULT);
        // by hand: (105 - 5) / 125
        assertEquals(0.8, drawn.rate().median(), 1e-9);
        assertEquals(0, drawn.rate().interval95().width(), 1e-8);
        assertTrue(drawn.rate().density().isEmpty());
    }

    @Test
    void loweringIsAddedToTheRateAsItIs() {
        List<SeaAtLevel> sea = List.of(highstand(new Normal(125, 3), new Normal(5, 2)));
        LevelRates.Outcome bare =
                TestRates.rate(2, List.of(survey(new Normal(60, 1))), TestRates.NO_LOWERING, sea, CauchyPrior.DEFAULT);
        LevelRates.Outcome lowered =
                TestRates.rate(2, List.of(survey(new Normal(60, 1))), new Exact(0.05), sea, CauchyPrior.DEFAULT);
        assertEquals(bare.rate().median() + 0.05, lowered.rate().median(), 1e-6);
        // 0.05 m/kyr over 125 kyr
        assertEquals(
                bare.relativeSeaLevelMetres().median() + 6.25, lowered.relativeSeaLevelMetres().median(), 0.01);
    }
}
