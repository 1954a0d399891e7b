package stillstand.uplift;

import static org.junit.jupiter.api.Assertions.assertAll;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.NavigableMap;
import java.util.Optional;
import java.util.SplittableRandom;
import java.util.TreeMap;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;
import java.util.function.Function;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import org.apache.commons.statistics.distribution.BinomialDistribution;
import org.apache.commons.statistics.distribution.ChiSquaredDistribution;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.EnumSource;
import stillstand.ledger.RunMonitor;
import stillstand.uncertainty.DensityBins;
import stillstand.uncertainty.DrawStreams;
import stillstand.uncertainty.Interval;
import stillstand.uplift.SimulatedLevel.Rates;
import stillstand.uplift.SimulatedLevel.World;

/**
 * Do intervals of the answer of a single level hold the truth as often as they say (simulation-based calibration, Talts et
 * al. 2018, arXiv:1804.06788)? Written from the statistical model alone, by a hand that had not seen the engine.
 *
 * <p>Each comparison is false by chance with probability 1e-4: two-sided binomial for how many of the intervals hold the
 * truth, chi-square for how evenly the truths lie in ten equally probable parts of their answers. Errors of the engine's own
 * draws (one block of them a level) move coverage by far less than its binomial error.
 */
class LevelCoverageStatisticalTest {
    private static final double FALSE_ALARM = 1e-4;
    private static final int PARTS = 10;
    private static final CauchyPrior CAUCHY = CauchyPrior.DEFAULT;
    private static final NormalPrior NORMAL = new NormalPrior(0.4, 0.3);

    @Test
    void ratesOfCoralsOnACurveHoldTheTruthAsOftenAsTheySay() {
        List<Answered> answered = simulate(World.CORAL_ON_CURVE, Rates.CAUCHY, CAUCHY, 2000, 1);
        Tally.of(answered, Answered::underPrior).assertCalibrated();
    }

    /**
     * An answer must hold whatever was measured. Among levels that look fast, a rate drawn from the prior is most often slower
     * than it looks: the answer under the prior knows, the propagated one does not and may not pass.
     */
    @Test
    @Tag("slow")
    void theComparisonTellsAnAnswerUnderAPriorFromOneWithout() {
        List<Answered> fast = simulate(World.YOUNG_CORAL, Rates.NORMAL, NORMAL, 500, 2).stream()
                .filter(each -> each.looksFasterThan(NORMAL.quantile(0.8)))
                .toList();
        Tally.of(fast, Answered::underPrior).assertCalibrated();
        Tally propagated = Tally.of(fast, Answered::propagated);
        assertTrue(propagated.chiSquare() > Tally.chiSquareLimit(), propagated::toString);
    }

    @ParameterizedTest
    @EnumSource(World.class)
    @Tag("slow")
    void ratesUnderTheDefaultPriorHoldTheTruthAsOftenAsTheySay(World world) {
        List<Answered> answered = simulate(world, Rates.CAUCHY, CAUCHY, 3000, 3);
        Tally.of(answered, Answered::underPrior).assertCalibrated();
    }

    @ParameterizedTest
    @EnumSource(World.class)
    @Tag("slow")
    void ratesUnderANormalPriorHoldTheTruthAsOftenAsTheySayWhateverTheyLookLike(World world) {
        List<Answered> answered = simulate(world, Rates.NORMAL, NORMAL, 2000, 4);
        Map<Boolean, List<Answered>> fastAndSlow = answered.stream()
                .collect(Collectors.partitioningBy(each -> each.looksFasterThan(NORMAL.quantile(0.8))));
        fastAndSlow
                .values()
                .forEach(part -> Tally.of(part, Answered::underPrior).assertCalibrated());
    }

    @ParameterizedTest
    @EnumSource(World.class)
    @Tag("slow")
    void propagatedRatesHoldTheTruthAsOftenAsTheySayWhereAllChangesOfHeightAreEquallyLikely(World world) {
        List<Answered> answered = simulate(world, Rates.FLAT_IN_HEIGHT, CAUCHY, 2000, 5);
        Tally.of(answered, Answered::propagated).assertCalibrated();
    }

    /** A level's answers beside its true rate. */
    private record Answered(double truth, LevelRates.Outcome outcome) {
        Place propagated() {
            return Place.of(truth, outcome.rate());
        }

        Place underPrior() {
            return Place.of(truth, outcome.rateWithPrior().orElseThrow());
        }

        boolean looksFasterThan(double rateMetresPerKyr) {
            return outcome.rate().median() > rateMetresPerKyr;
        }
    }

    /** How many of the answers hold the truth, and in which part of them it lies. */
    private record Tally(int levels, int in68, int in95, List<Integer> parts) {
        static Tally of(List<Answered> answered, Function<Answered, Place> which) {
            List<Place> places = answered.stream().map(which).toList();
            int[] parts = new int[PARTS];
            for (Place place : places) {
                parts[Math.min(PARTS - 1, (int) (PARTS * place.probabilityBelow))]++;
            }
            return new Tally(
                    places.size(),
                    (int) places.stream().filter(Place::in68).count(),
                    (int) places.stream().filter(Place::in95).count(),
                    Arrays.stream(parts).boxed().toList());
        }

        double chiSquare() {
            double expected = (double) levels / PARTS;
            return parts.stream()
                    .mapToDouble(count -> (count - expected) * (count - expected) / expected)
                    .sum();
        }

        static double chiSquareLimit() {
            return ChiSquaredDistribution.of(PARTS - 1).inverseSurvivalProbability(FALSE_ALARM);
        }

        void assertCalibrated() {
            assertAll(
                    toString(),
                    () -> assertBinomial(in68, Interval.PROBABILITY_68),
                    () -> assertBinomial(in95, Interval.PROBABILITY_95),
                    () -> assertTrue(chiSquare() < chiSquareLimit(), "uneven"));
        }

        private void assertBinomial(int count, double probability) {
            BinomialDistribution expected = BinomialDistribution.of(levels, probability);
            int least = expected.inverseCumulativeProbability(FALSE_ALARM / 2);
            int most = expected.inverseSurvivalProbability(FALSE_ALARM / 2);
            assertTrue(
                    count >= least && count <= most,
                    () -> count + " intervals hold the truth, not " + least + " to " + most);
        }

        @Override
        public String toString() {
            return String.format(
                    Locale.ROOT,
                    "of %d levels the 68.27 %% intervals hold %.2f %%, the 95 %% ones %.2f %%; chi-square %.1f of %s",
                    levels,
                    100.0 * in68 / levels,
                    100.0 * in95 / levels,
                    chiSquare(),
                    parts);
        }
    }

    /** Where the truth lies in an answer. */
    private record Place(boolean in68, boolean in95, double probabilityBelow) {
        static Place of(double truth, Rate rate) {
            return new Place(
                    rate.interval68().contains(truth),
                    rate.interval95().contains(truth),
                    probabilityBelow(truth, rate));
        }

        /** Linear between the edges of the density's bins and the quantiles that a rate states. */
        private static double probabilityBelow(double truth, Rate rate) {
            NavigableMap<Double, Double> below = new TreeMap<>();
            DensityBins density = rate.density().orElseThrow();
            double inBins =
                    density.values().stream().mapToDouble(Double::doubleValue).sum();
            double sum = (1 - inBins) / 2;
            double width = (density.to() - density.from()) / density.values().size();
            below.put(density.from(), sum);
            for (int bin = 0; bin < density.values().size(); bin++) {
                sum += density.values().get(bin);
                below.put(density.from() + (bin + 1) * width, sum);
            }
            below.put(rate.median(), 0.5);
            putEnds(below, rate.interval68(), Interval.PROBABILITY_68);
            putEnds(below, rate.interval95(), Interval.PROBABILITY_95);
            Map.Entry<Double, Double> before = below.floorEntry(truth);
            Map.Entry<Double, Double> after = below.higherEntry(truth);
            if (before == null || after == null) {
                return before == null ? 0 : 1;
            }
            double part = (truth - before.getKey()) / (after.getKey() - before.getKey());
            return before.getValue() + part * (after.getValue() - before.getValue());
        }

        private static void putEnds(NavigableMap<Double, Double> below, Interval interval, double probability) {
            below.put(interval.low(), (1 - probability) / 2);
            below.put(interval.high(), (1 + probability) / 2);
        }
    }

    private static List<Answered> simulate(World world, Rates rates, RatePrior prior, int levels, long seed) {
        SplittableRandom seeds = new SplittableRandom(seed);
        List<SplittableRandom> dice =
                Stream.generate(seeds::split).limit(levels).toList();
        ExecutorService threads = Executors.newFixedThreadPool(2);
        try {
            DrawPlan oneBlock = new DrawPlan(1, 2, Optional.of(DrawStreams.BLOCK_DRAWS));
            return dice.parallelStream()
                    .map(each -> {
                        SimulatedLevel level = world.simulate(each, rates);
                        DrawStreams streams = new DrawStreams(each.nextLong());
                        LevelRates engine = new LevelRates(streams, oneBlock, threads, RunMonitor.SILENT);
                        return new Answered(
                                level.rateMetresPerKyr(),
                                engine.of("level", level.height(), level.lowering(), level.explanations(), prior));
                    })
                    .toList();
        } finally {
            threads.shutdown();
        }
    }
}
