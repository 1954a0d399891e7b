package stillstand.uplift;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static stillstand.uplift.TestRates.depth;
import static stillstand.uplift.TestRates.highstand;
import static stillstand.uplift.TestRates.linear;
import static stillstand.uplift.TestRates.onCurve;
import static stillstand.uplift.TestRates.survey;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import stillstand.shoreline.HeightTerm;
import stillstand.uncertainty.DrawStreams;
import stillstand.uncertainty.Interval;
import stillstand.uncertainty.LogNormal;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.Tabulated;
import stillstand.uncertainty.Triangular;
import stillstand.uncertainty.TruncatedNormal;
import stillstand.uncertainty.Uniform;

/**
 * Five dated samples against an independent implementation that integrates by quadrature (composite Gauss-Legendre over age,
 * 400 nodes over depth, heights and sea level in closed form). Its figures are exact to the digits given; the tolerance is five
 * Monte Carlo errors plus 1e-5 for the knees of the sampled curve.
 */
class SingleSampleReferenceTest {
    private static final RatePrior PRIOR = new HalfCauchyPrior(1, 0, 20);
    private static final int BLOCKS = 40;

    /** Quantiles at 2.5, 50 and 97.5 %, mean, sd. */
    private record Expected(double low, double median, double high, double mean, double sd) {}

    private static final SeaAtLevel STEEP_LIMB = onCurve(
            linear(new double[] {110, 118, 122, 126, 129, 132, 140}, new double[] {-20, 3, 6, 5, -5, -40, -90}, 2),
            new Normal(125, 3));

    private static final SeaAtLevel LATE_INTERSTADIAL = onCurve(
            linear(new double[] {70, 80, 84, 90, 100}, new double[] {-40, -15, -12, -30, -45}, 5), new Uniform(75, 95));

    private static final List<HeightTerm> CORAL_OF_THE_STEEP_LIMB =
            List.of(survey(new Normal(12, 0.5)), depth(new LogNormal(0, 3, 0.6)));

    private static LevelRates.Outcome draw(List<HeightTerm> height, SeaAtLevel sea) {
        return TestRates.rate(BLOCKS, height, TestRates.NO_LOWERING, List.of(sea), PRIOR);
    }

    private static void assertRate(Expected expected, Rate rate, LevelAnswer.MonteCarlo monteCarlo) {
        LevelAnswer.Errors errors = monteCarlo.errorInterval95().orElseThrow();
        assertEquals(expected.low(), rate.interval95().low(), 5 * errors.low() + 1e-5);
        assertEquals(
                expected.median(), rate.median(), 5 * monteCarlo.errorMedian().orElseThrow() + 1e-5);
        assertEquals(expected.high(), rate.interval95().high(), 5 * errors.high() + 1e-5);
        assertEquals(expected.mean(), rate.mean().orElseThrow(), 5e-3 * expected.sd());
        assertEquals(expected.sd(), rate.sd().orElseThrow(), 5e-3 * expected.sd());
    }

    @Test
    void terraceWithNormalErrors() {
        LevelRates.Outcome drawn =
                draw(List.of(survey(new Normal(45, 1))), highstand(new Normal(122, 1.5), new Normal(5, 2)));
        assertRate(
                new Expected(
                        0.2912665155656955,
                        0.32786885245901637,
                        0.3648522038205203,
                        0.327918438573064,
                        0.018771087048792073),
                drawn.rate(),
                drawn.monteCarlo());
        assertRate(
                new Expected(
                        0.2911140432245286,
                        0.32770998021561454,
                        0.3646867899770053,
                        0.32775953377560074,
                        0.018767657822283134),
                drawn.rateWithPrior().orElseThrow(),
                drawn.monteCarlo());
        Interval shortest = drawn.rate().shortest95();
        assertEquals(0.2912189633669078, shortest.low(), 2e-4);
        assertEquals(0.3648040804475949, shortest.high(), 2e-4);
    }

    @Test
    void coralWithSkewedDepthOnASteepLimb() {
        LevelRates.Outcome drawn = draw(CORAL_OF_THE_STEEP_LIMB, STEEP_LIMB);
        assertRate(
                new Expected(
                        0.04373194778404349,
                        0.09306543350921756,
                        0.327339080355865,
                        0.1107584180430133,
                        0.06772965555519739),
                drawn.rate(),
                drawn.monteCarlo());
        assertRate(
                new Expected(
                        0.043507437182007155,
                        0.0922254837562762,
                        0.3067282452185341,
                        0.10819331828565769,
                        0.06364254913071166),
                drawn.rateWithPrior().orElseThrow(),
                drawn.monteCarlo());
    }

    /** The age may be near zero: quantiles stand, mean and sd do not exist, and the prior decides the answer. */
    @Test
    void youngSampleHasNoMean() {
        LevelRates.Outcome drawn = draw(
                List.of(survey(new Normal(2, 0.5))),
                highstand(new TruncatedNormal(0.5, 0.3, 0.01, Double.POSITIVE_INFINITY), new Normal(0, 1)));
        assertEquals(Optional.empty(), drawn.rate().mean());
        assertEquals(Optional.empty(), drawn.rate().sd());
        assertEquals(3.8027249723995427, drawn.rate().median(), 0.01);
        assertEquals(-0.37529308668830924, drawn.rate().interval95().low(), 0.02);
        assertEquals(31.163690082651947, drawn.rate().interval95().high(), 0.3);
        Rate posterior = drawn.rateWithPrior().orElseThrow();
        assertEquals(1.4713070992745585, posterior.median(), 0.01);
        // weights 1/t are uneven here: one block scatters by 0.012, forty by 0.0019; this is five of that
        assertEquals(0.0775990604466534, posterior.interval95().low(), 0.0095);
        assertEquals(7.683623379854089, posterior.interval95().high(), 0.03);
    }

    @Test
    void uniformAgeAndTriangularDepth() {
        LevelRates.Outcome drawn =
                draw(List.of(survey(new Normal(30, 1.5)), depth(new Triangular(0, 5, 20))), LATE_INTERSTADIAL);
        assertRate(
                new Expected(
                        0.5126677685947305,
                        0.71863465510438,
                        0.9277934975051345,
                        0.718063320568571,
                        0.10731857433179372),
                drawn.rate(),
                drawn.monteCarlo());
        assertRate(
                new Expected(
                        0.5040145176627956,
                        0.7063268630102291,
                        0.9189096096839405,
                        0.7068861766734826,
                        0.10749663503137409),
                drawn.rateWithPrior().orElseThrow(),
                drawn.monteCarlo());
    }

    private static final SeaAtLevel TABULATED_AGE = highstand(
            Tabulated.of(List.of(
                    new Tabulated.Point(190, 0),
                    new Tabulated.Point(195, 1),
                    new Tabulated.Point(200, 3),
                    new Tabulated.Point(205, 2),
                    new Tabulated.Point(210, 2.5),
                    new Tabulated.Point(215, 1),
                    new Tabulated.Point(220, 0))),
            new Normal(-12, 7));

    /** Gamma of shape 2 and scale 3 m, as a table: density x exp(-x / 3) at steps of 1 cm to 90 m. */
    private static HeightTerm gammaDepth() {
        List<Tabulated.Point> points = new ArrayList<>();
        for (int i = 0; i <= 9000; i++) {
            double metres = i / 100.0;
            points.add(new Tabulated.Point(metres, metres * Math.exp(-metres / 3)));
        }
        return depth(Tabulated.of(points));
    }

    @Test
    void tabulatedAgeAndGammaDepth() {
        LevelRates.Outcome drawn = draw(List.of(survey(new Normal(110, 3)), gammaDepth()), TABULATED_AGE);
        assertRate(
                new Expected(
                        0.5380431683067535,
                        0.6244003548112272,
                        0.7214669420423907,
                        0.6257834242547955,
                        0.04677266919123977),
                drawn.rate(),
                drawn.monteCarlo());
        assertRate(
                new Expected(
                        0.5369126603576293,
                        0.623068529500661,
                        0.7196322953082475,
                        0.6244128185067048,
                        0.046594581249427246),
                drawn.rateWithPrior().orElseThrow(),
                drawn.monteCarlo());
    }

    /** Curve rule against highstand rule, the same coral: quantiles 2.5, 16, 50, 84, 97.5 % of the same implementation. */
    @Test
    void ageRuleDecidesMoreThanAnyInput() {
        LevelRates.Outcome atHighstand =
                draw(CORAL_OF_THE_STEEP_LIMB, highstand(new Normal(122, 2), new Normal(5, 2.5)));
        assertEquals(0.036804488, atHighstand.rate().interval95().low(), 1e-3);
        assertEquals(0.084133792, atHighstand.rate().median(), 1e-3);
        assertEquals(0.14794173, atHighstand.rate().interval95().high(), 1.5e-3);
        LevelRates.Outcome atAge = draw(CORAL_OF_THE_STEEP_LIMB, STEEP_LIMB);
        assertTrue(atAge.rate().interval95().width()
                > 2 * atHighstand.rate().interval95().width());
    }

    /** First-order shares of elevation, age, sea level and depth (Saltelli 2010), of the same implementation. */
    @Test
    void budgetsOfFourSamples() {
        assertShares(
                List.of(0.19073238, 0.046173437, 0.76293502, 0.0),
                List.of(survey(new Normal(45, 1))),
                highstand(new Normal(122, 1.5), new Normal(5, 2)));
        assertShares(List.of(0.0034917992, 0.86248054, 0.055870462, 0.078074241), CORAL_OF_THE_STEEP_LIMB, STEEP_LIMB);
        assertShares(
                List.of(0.027291331, 0.44790979, 0.30324035, 0.21900421),
                List.of(survey(new Normal(30, 1.5)), depth(new Triangular(0, 5, 20))),
                LATE_INTERSTADIAL);
        assertShares(
                List.of(0.098327913, 0.16887096, 0.53534544, 0.19665606),
                List.of(survey(new Normal(110, 3)), gammaDepth()),
                TABULATED_AGE);
    }

    private static void assertShares(List<Double> expected, List<HeightTerm> height, SeaAtLevel sea) {
        LevelAnswer.Budget budget = new RateBudget(height, TestRates.NO_LOWERING, List.of(sea), InputGroup.AGE)
                .shares(new DrawStreams(7), "test", 8)
                .orElseThrow();
        List<Optional<LevelAnswer.Share>> shares =
                List.of(budget.elevation(), budget.age(), budget.seaLevel(), budget.palaeodepth());
        for (int g = 0; g < expected.size(); g++) {
            double share = shares.get(g).map(LevelAnswer.Share::share).orElse(0.0);
            assertEquals(expected.get(g), share, 2e-3, "group " + g);
        }
    }
}
