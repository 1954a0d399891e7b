package stillstand.sensitivity;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import stillstand.sealevel.Highstand;
import stillstand.sealevel.HighstandClass;
import stillstand.sealevel.SharedErrors;
import stillstand.shoreline.HeightTerm;
import stillstand.shoreline.HeightTerm.Source;
import stillstand.uncertainty.Exact;
import stillstand.uncertainty.LogNormal;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.Uncertain;
import stillstand.uncertainty.Uniform;
import stillstand.uplift.SeaAtLevel;

/** One-at-a-time ranges against the same arithmetic done by hand: U = (z - e) / t + w. */
class LevelTornadoTest {
    /** Standard normal quantiles of 0.84135 and 0.975. */
    private static final double ONE = 1.0000217;

    private static final double TWO = 1.959964;

    private static final List<HeightTerm> HEIGHT = List.of(
            new HeightTerm(Source.SURVEY, 1, new Normal(61, 2)),
            new HeightTerm(Source.DATUM, -1, new Exact(1)),
            new HeightTerm(Source.REFERENCE_WATER_LEVEL, -1, new Uniform(-1, 1)));

    private static SeaAtLevel stand(String stage, double probability, double ageKa, double levelMetres) {
        Highstand row = new Highstand(
                stage,
                HighstandClass.INTERSTADIAL,
                ageKa,
                0,
                new Normal(levelMetres, 1.5),
                0,
                1,
                true,
                true,
                false,
                5,
                "invented");
        return new SeaAtLevel.AtHighstand(row, new SharedErrors(3, 6, 0), probability, new Normal(ageKa, 4));
    }

    private static LevelTornado tornado(Uncertain lowering, SeaAtLevel... explanations) {
        return LevelTornado.of("site", "T1", HEIGHT, lowering, List.of(explanations))
                .orElseThrow();
    }

    private static LevelTornado.Bar bar(LevelTornado tornado, String input) {
        return tornado.bars().stream()
                .filter(bar -> bar.input().equals(input))
                .findFirst()
                .orElseThrow();
    }

    @Test
    void barsAreTheArithmeticOfEachInputAlone() {
        LevelTornado tornado = tornado(new Exact(0.1), stand("5c", 1, 100, -20));
        assertEquals(Optional.of("5c"), tornado.stage());
        assertEquals((60 + 20) / 100.0 + 0.1, tornado.rate(), 1e-12);
        LevelTornado.Bar survey = bar(tornado, "survey");
        assertEquals((60 - TWO * 2 + 20) / 100 + 0.1, survey.rateAtLow95(), 1e-6);
        assertEquals((60 + ONE * 2 + 20) / 100 + 0.1, survey.rateAtHigh68(), 1e-5);
        assertEquals(61 + TWO * 2, survey.input95().high(), 1e-5);
        LevelTornado.Bar reference = bar(tornado, "reference water level");
        assertEquals((60 - 0.95 + 20) / 100 + 0.1, reference.rateAtHigh95(), 1e-9);
        LevelTornado.Bar age = bar(tornado, "age");
        assertEquals(80 / (100 - TWO * 4) + 0.1, age.rateAtLow95(), 1e-6);
        assertEquals("ka", age.unit());
        assertEquals((80 - TWO * 3) / 100 + 0.1, bar(tornado, "shared offset").rateAtHigh95(), 1e-6);
        assertEquals(
                (80 - TWO * 6) / 100 + 0.1, bar(tornado, "interstadial factor").rateAtHigh95(), 1e-6);
        assertEquals((80 - TWO * 5) / 100 + 0.1, bar(tornado, "local sea level").rateAtHigh95(), 1e-6);
    }

    @Test
    void longestBarComesFirstAndWhatIsExactHasNone() {
        LevelTornado tornado = tornado(new Exact(0), stand("5c", 1, 100, -20));
        assertEquals("interstadial factor", tornado.bars().get(0).input());
        for (int i = 1; i < tornado.bars().size(); i++) {
            assertTrue(
                    tornado.bars().get(i - 1).span95() >= tornado.bars().get(i).span95());
        }
        assertTrue(tornado.bars().stream().noneMatch(bar -> bar.input().equals("datum")));
        assertTrue(tornado.bars().stream().noneMatch(bar -> bar.input().equals("surface lowering")));
    }

    @Test
    void othersStayAtTheirMediansNotTheirMeans() {
        LevelTornado tornado = tornado(new LogNormal(0, 0.02, 1), stand("5c", 1, 100, -20));
        assertEquals(0.8 + new LogNormal(0, 0.02, 1).quantile(0.5), tornado.rate(), 1e-12);
    }

    @Test
    void otherHighstandsStandBesideTheMostProbable() {
        LevelTornado tornado = tornado(new Exact(0), stand("5a", 0.3, 80, -20), stand("5c", 0.7, 100, -20));
        assertEquals(Optional.of("5c"), tornado.stage());
        assertEquals(List.of(new LevelTornado.OtherStage("5a", 0.3, 1)), tornado.otherStages());
    }

    @Test
    void noExplanationIsABadCall() {
        assertThrows(
                IllegalArgumentException.class, () -> LevelTornado.of("site", "T1", HEIGHT, new Exact(0), List.of()));
    }
}
