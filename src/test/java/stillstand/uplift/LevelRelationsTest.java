package stillstand.uplift;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.Optional;
import java.util.Random;
import java.util.SplittableRandom;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;
import java.util.stream.IntStream;
import java.util.stream.Stream;
import org.apache.commons.statistics.distribution.TDistribution;
import org.junit.jupiter.api.Test;
import stillstand.ledger.RunMonitor;
import stillstand.sealevel.CurveFacts;
import stillstand.sealevel.Highstand;
import stillstand.sealevel.HighstandClass;
import stillstand.sealevel.SeaLevelCurve;
import stillstand.sealevel.SharedErrors;
import stillstand.shoreline.HeightTerm;
import stillstand.shoreline.HeightTerm.Source;
import stillstand.uncertainty.DrawStreams;
import stillstand.uncertainty.Exact;
import stillstand.uncertainty.Interval;
import stillstand.uncertainty.LogNormal;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.SplitNormal;
import stillstand.uncertainty.Tabulated;
import stillstand.uncertainty.Triangular;
import stillstand.uncertainty.TruncatedNormal;
import stillstand.uncertainty.Uncertain;
import stillstand.uncertainty.Uniform;

/** How answers of single levels must stand to one another, whatever the numbers. */
class LevelRelationsTest {
    private static final double ROUNDING = 1e-10;
    private static final NormalPrior PRIOR = new NormalPrior(0.3, 0.4);

    /** Units of length and time, and a height by which land and sea are raised together. */
    private record Scale(double metres, double ka, double raisedMetres) {
        static final Scale PLAIN = new Scale(1, 1, 0);

        LevelRates.Outcome coral() {
            return rate(
                    List.of(
                            survey(33, 0.4),
                            new HeightTerm(Source.DATUM, -1, new Normal(0.3 * metres, 0.2 * metres)),
                            TestRates.depth(new LogNormal(0, 3 * metres, 0.6))),
                    TestRates.NO_LOWERING,
                    new SeaAtLevel.OnCurve(curve(80, 120), new Normal(98 * ka, 1.4 * ka), 1.5 * ka, 3 * metres, 1));
        }

        LevelRates.Outcome terrace() {
            SharedErrors shared = new SharedErrors(3 * metres, 6 * metres, 2 * ka);
            Highstand row = new Highstand(
                    "5c",
                    HighstandClass.INTERSTADIAL,
                    104 * ka,
                    1.5 * ka,
                    new SplitNormal(-21 * metres + raisedMetres, 4 * metres, 6 * metres),
                    6 * ka,
                    1,
                    true,
                    true,
                    true,
                    5 * metres,
                    "test");
            return rate(
                    List.of(
                            survey(14, 0.8),
                            new HeightTerm(Source.COVER, -1, new Uniform(0, 2 * metres)),
                            new HeightTerm(Source.INDICATIVE_RANGE, 1, new Uniform(-metres, metres))),
                    new TruncatedNormal(0.02 * metres / ka, 0.02 * metres / ka, 0, Double.POSITIVE_INFINITY),
                    new SeaAtLevel.AtHighstand(
                            row, shared, 1, new Normal(row.ageKa(), row.marginalAgeSigmaKa(shared))));
        }

        private HeightTerm survey(double elevation, double sigma) {
            return TestRates.survey(new Normal(elevation * metres + raisedMetres, sigma * metres));
        }

        /** A short curve: of a long one the grid on which it is read does not scale with its ages. */
        SeaLevelCurve curve(int fromKa, int toKa) {
            int rows = 2 * (toKa - fromKa) + 1;
            double[] agesKa = new double[rows];
            double[] levels = new double[rows];
            double[] lows = new double[rows];
            double[] highs = new double[rows];
            for (int i = 0; i < rows; i++) {
                double place = fromKa + 0.5 * i;
                agesKa[i] = place * ka;
                levels[i] = (-50 + 45 * Math.cos(0.12 * place)) * metres + raisedMetres;
                lows[i] = levels[i] - 8 * metres;
                highs[i] = levels[i] + (10 + 5 * Math.sin(0.2 * place)) * metres;
            }
            CurveFacts facts = new CurveFacts("test", "today", "test", "95 %", false, 5, 1.5, 0, List.of());
            return SeaLevelCurve.withBounds95("test", facts, agesKa, levels, lows, highs);
        }

        private LevelRates.Outcome rate(List<HeightTerm> height, Uncertain lowering, SeaAtLevel sea) {
            NormalPrior prior = new NormalPrior(PRIOR.mean() * metres / ka, PRIOR.sigmaMetresPerKyr() * metres / ka);
            return TestRates.rate(12, height, lowering, List.of(sea), prior);
        }
    }

    @Test
    void raisingLandAndSeaTogetherChangesNoRate() {
        Scale raised = new Scale(1, 1, 37.3);
        assertTimes(1, Scale.PLAIN.coral(), raised.coral());
        assertTimes(1, Scale.PLAIN.terrace(), raised.terrace());
        assertEquals(
                Scale.PLAIN.coral().relativeSeaLevelMetres().median() + 37.3,
                raised.coral().relativeSeaLevelMetres().median(),
                1e-8);
    }

    @Test
    void doublingAllDistancesDoublesTheRate() {
        Scale doubled = new Scale(2, 1, 0);
        assertTimes(2, Scale.PLAIN.coral(), doubled.coral());
        assertTimes(2, Scale.PLAIN.terrace(), doubled.terrace());
    }

    @Test
    void aYearTwiceAsShortHalvesTheRate() {
        Scale doubled = new Scale(1, 2, 0);
        assertTimes(0.5, Scale.PLAIN.coral(), doubled.coral());
        assertTimes(0.5, Scale.PLAIN.terrace(), doubled.terrace());
    }

    @Test
    void feetInPlaceOfMetresAreButAnotherUnit() {
        Scale feet = new Scale(1 / 0.3048, 1, 0);
        assertTimes(1 / 0.3048, Scale.PLAIN.coral(), feet.coral());
        assertTimes(1 / 0.3048, Scale.PLAIN.terrace(), feet.terrace());
    }

    private static void assertTimes(double factor, LevelRates.Outcome plain, LevelRates.Outcome other) {
        assertTimes(factor, plain.rate(), other.rate());
        assertTimes(
                factor,
                plain.rateWithPrior().orElseThrow(),
                other.rateWithPrior().orElseThrow());
        assertEquals(
                plain.probabilityUplift().orElseThrow(),
                other.probabilityUplift().orElseThrow(),
                1.0 / DrawStreams.BLOCK_DRAWS);
    }

    private static void assertTimes(double factor, Rate plain, Rate other) {
        double tolerance = factor * ROUNDING * plain.interval95().width();
        assertEquals(factor * plain.median(), other.median(), tolerance);
        assertEquals(factor * plain.mean().orElseThrow(), other.mean().orElseThrow(), tolerance);
        assertEquals(factor * plain.sd().orElseThrow(), other.sd().orElseThrow(), tolerance);
        assertTimes(factor, plain.interval68(), other.interval68(), tolerance);
        assertTimes(factor, plain.interval95(), other.interval95(), tolerance);
    }

    private static void assertTimes(double factor, Interval plain, Interval other, double tolerance) {
        assertEquals(factor * plain.low(), other.low(), tolerance);
        assertEquals(factor * plain.high(), other.high(), tolerance);
    }

    /**
     * Terms take the dimensions of Sobol' points in their order, so another order is another set of draws. Differences of
     * medians and 95 % limits lie within what their errors from 20 blocks allow, false by chance with probability 1e-4 for all.
     */
    @Test
    void theOrderOfHeightTermsMattersNoMoreThanOtherDraws() {
        List<HeightTerm> terms = new ArrayList<>(manyTerms());
        SeaAtLevel sea = TestRates.highstand(new Normal(124, 2), new SplitNormal(5, 2, 4));
        LevelRates.Outcome first = TestRates.rate(20, terms, TestRates.NO_LOWERING, List.of(sea), PRIOR);
        double limit = TDistribution.of(19).inverseSurvivalProbability(0.5e-4 / 9);
        Random dice = new Random(3);
        for (int shuffle = 0; shuffle < 3; shuffle++) {
            Collections.shuffle(terms, dice);
            LevelRates.Outcome other = TestRates.rate(20, terms, TestRates.NO_LOWERING, List.of(sea), PRIOR);
            LevelAnswer.MonteCarlo one = first.monteCarlo();
            LevelAnswer.MonteCarlo two = other.monteCarlo();
            assertEquals(
                    first.rate().median(),
                    other.rate().median(),
                    limit
                            * Math.hypot(
                                    one.errorMedian().orElseThrow(),
                                    two.errorMedian().orElseThrow()));
            LevelAnswer.Errors ends = one.errorInterval95().orElseThrow();
            LevelAnswer.Errors otherEnds = two.errorInterval95().orElseThrow();
            assertEquals(
                    first.rate().interval95().low(),
                    other.rate().interval95().low(),
                    limit * Math.hypot(ends.low(), otherEnds.low()));
            assertEquals(
                    first.rate().interval95().high(),
                    other.rate().interval95().high(),
                    limit * Math.hypot(ends.high(), otherEnds.high()));
        }
    }

    private static List<HeightTerm> manyTerms() {
        return List.of(
                TestRates.survey(new Normal(41, 0.7)),
                new HeightTerm(Source.DATUM, -1, new Normal(0.3, 0.2)),
                new HeightTerm(Source.COVER, -1, new Uniform(0, 2)),
                new HeightTerm(Source.REFERENCE_WATER_LEVEL, -1, new Triangular(-1, 0.5, 1)),
                new HeightTerm(Source.INDICATIVE_RANGE, 1, new Uniform(-1, 1)),
                new HeightTerm(Source.COSEISMIC_STEP, 1, new Uniform(0, 3)));
    }

    @Test
    void threadsChangeNoBitOfAFixedNumberOfBlocks() {
        DrawPlan plan = new DrawPlan(1, 2, Optional.of(23 * DrawStreams.BLOCK_DRAWS));
        LevelRates.Outcome one = young(plan, 1);
        assertEquals(23 * DrawStreams.BLOCK_DRAWS, one.monteCarlo().draws());
        assertEquals(one, young(plan, 2));
        assertEquals(one, young(plan, 7));
    }

    @Test
    void threadsChangeNoBitOfAnEarlyStop() {
        DrawPlan plan = new DrawPlan(64 * DrawStreams.BLOCK_DRAWS, 2, Optional.empty());
        LevelRates.Outcome one = young(plan, 1);
        int blocks = one.monteCarlo().draws() / DrawStreams.BLOCK_DRAWS;
        assertTrue(one.monteCarlo().converged() && blocks >= 20 && blocks < 64, blocks + " blocks");
        assertEquals(one, young(plan, 2));
        assertEquals(one, young(plan, 7));
    }

    @Test
    void aStopAfterSoManyBlocksIsARunOfSoManyBlocks() {
        LevelRates.Outcome stopped = young(new DrawPlan(64 * DrawStreams.BLOCK_DRAWS, 2, Optional.empty()), 2);
        int draws = stopped.monteCarlo().draws();
        LevelRates.Outcome fixed = young(new DrawPlan(1, 2, Optional.of(draws)), 2);
        assertEquals(stopped.rate(), fixed.rate());
        assertEquals(stopped.rateWithPrior(), fixed.rateWithPrior());
        assertEquals(stopped.age(), fixed.age());
        assertEquals(stopped.relativeSeaLevelMetres(), fixed.relativeSeaLevelMetres());
    }

    /** An age so uncertain that the tails of the rate need many blocks to settle. */
    private static LevelRates.Outcome young(DrawPlan plan, int threads) {
        ExecutorService executor = Executors.newFixedThreadPool(threads);
        try {
            return new LevelRates(new DrawStreams(7), plan, executor, RunMonitor.SILENT)
                    .of(
                            "young",
                            List.of(TestRates.survey(new Normal(2, 0.3)), TestRates.depth(new LogNormal(0, 0.5, 0.8))),
                            TestRates.NO_LOWERING,
                            List.of(TestRates.highstand(
                                    new TruncatedNormal(2, 1, 0.7, Double.POSITIVE_INFINITY), new Normal(0.5, 0.5))),
                            PRIOR);
        } finally {
            executor.shutdown();
        }
    }

    /** Of a sum the shares are those of the variances, whatever the distributions. */
    @Test
    void sharesOfASumAreThoseOfItsVariances() {
        double ageKa = 125;
        Uncertain elevation = new Normal(30, 2);
        Uncertain depth = new LogNormal(0, 3, 0.6);
        Uncertain sea = new SplitNormal(4, 2, 5);
        Uncertain lowering = new Uniform(0, 0.05);
        double ofElevation = variance(elevation) / (ageKa * ageKa);
        double ofDepth = variance(depth) / (ageKa * ageKa);
        double ofSea = variance(sea) / (ageKa * ageKa);
        double ofLowering = variance(lowering);
        double all = ofElevation + ofDepth + ofSea + ofLowering;
        LevelAnswer.Budget budget = new RateBudget(
                        List.of(TestRates.survey(elevation), TestRates.depth(depth)),
                        lowering,
                        List.of(TestRates.highstand(new Exact(ageKa), sea)),
                        InputGroup.AGE)
                .shares(new DrawStreams(4), "sum", 8)
                .orElseThrow();
        assertShare(ofElevation, all, budget.elevation());
        assertShare(ofDepth, all, budget.palaeodepth());
        assertShare(ofSea, all, budget.seaLevel());
        assertShare(ofLowering, all, budget.surfaceLowering());
        assertEquals(Optional.empty(), budget.age());
    }

    private static void assertShare(double variance, double all, Optional<LevelAnswer.Share> share) {
        assertEquals(variance / all, share.orElseThrow().share(), 0.005);
        assertEquals(variance / all, share.orElseThrow().totalShare(), 0.005);
        assertEquals(Math.sqrt(all - variance), share.orElseThrow().sdIfExact(), 0.005 * Math.sqrt(all));
    }

    private static double variance(Uncertain number) {
        return number.standardDeviation() * number.standardDeviation();
    }

    /**
     * First-order shares sum to at most 1. Each sum is the average over independent streams, and may exceed 1 by what its
     * spread allows; all cases together fail by chance with probability 1e-4 or less (t of Student).
     */
    @Test
    void firstOrderSharesNeverExceedTheWhole() {
        int cases = 16;
        int streams = 8;
        double limit = TDistribution.of(streams - 1).inverseSurvivalProbability(1e-4 / cases);
        SplittableRandom dice = new SplittableRandom(11);
        for (int i = 0; i < cases; i++) {
            List<HeightTerm> height = List.of(
                    TestRates.survey(anyNumber(dice, 30, 3)),
                    new HeightTerm(Source.DATUM, -1, anyNumber(dice, 0, 1)),
                    TestRates.depth(anyNumber(dice, 6, 3)));
            Uncertain lowering = dice.nextBoolean() ? TestRates.NO_LOWERING : new Uniform(0, 0.1);
            List<SeaAtLevel> sea = anySea(dice);
            String what = height + ", " + lowering + ", " + sea;
            double[] sums = IntStream.range(0, streams)
                    .mapToDouble(seed -> sumOfShares(new RateBudget(height, lowering, sea, InputGroup.AGE)
                            .shares(new DrawStreams(seed), "case", 2)
                            .orElseThrow()))
                    .toArray();
            double mean = IntStream.range(0, streams)
                    .mapToDouble(k -> sums[k])
                    .average()
                    .orElseThrow();
            double squares = IntStream.range(0, streams)
                    .mapToDouble(k -> (sums[k] - mean) * (sums[k] - mean))
                    .sum();
            double error = Math.sqrt(squares / (streams * (streams - 1.0)));
            assertTrue(mean <= 1 + limit * error + 1e-9, () -> mean + " +- " + error + ": " + what);
            assertTrue(error < 0.02, () -> "the sum of shares is too uncertain to tell: " + error + ": " + what);
        }
    }

    private static double sumOfShares(LevelAnswer.Budget budget) {
        return Stream.of(
                        budget.elevation(),
                        budget.palaeodepth(),
                        budget.age(),
                        budget.seaLevel(),
                        budget.surfaceLowering())
                .flatMap(Optional::stream)
                .mapToDouble(LevelAnswer.Share::share)
                .sum();
    }

    /** A number of any kind about {@code middle}. */
    private static Uncertain anyNumber(SplittableRandom dice, double middle, double spread) {
        double width = spread * (0.2 + dice.nextDouble());
        return switch (dice.nextInt(7)) {
            case 0 -> new Normal(middle, width);
            case 1 -> new TruncatedNormal(middle, 2 * width, middle - width, Double.POSITIVE_INFINITY);
            case 2 -> new SplitNormal(middle, width, 2 * width);
            case 3 -> new Uniform(middle - width, middle + 2 * width);
            case 4 -> new Triangular(middle - width, middle - width, middle + 3 * width);
            case 5 -> new LogNormal(middle - width, width, 0.7);
            default ->
                new Tabulated(
                        List.of(
                                new Tabulated.Point(middle, 1),
                                new Tabulated.Point(middle + width, 0.3),
                                new Tabulated.Point(middle + 4 * width, 0)),
                        List.of(new Tabulated.Spike(middle, 0.3)));
        };
    }

    private static List<SeaAtLevel> anySea(SplittableRandom dice) {
        Uncertain ageKa = anyNumber(dice, 90, 6);
        return switch (dice.nextInt(3)) {
            case 0 -> List.of(new SeaAtLevel.OnCurve(Scale.PLAIN.curve(1, 300), ageKa, 1.5, 3, 1));
            case 1 -> List.of(TestRates.highstand(ageKa, anyNumber(dice, -10, 8)));
            default -> List.of(explanation("a", 0.3, 82, dice), explanation("b", 0.7, 103, dice));
        };
    }

    private static SeaAtLevel explanation(String stage, double probability, double ageKa, SplittableRandom dice) {
        Uncertain age = anyNumber(dice, ageKa, 3);
        Highstand row = TestRates.row(stage, ageKa, 3, anyNumber(dice, -10, 8));
        return new SeaAtLevel.AtHighstand(row, new SharedErrors(3, 6, 0), probability, age);
    }
}
