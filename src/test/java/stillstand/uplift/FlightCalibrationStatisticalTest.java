package stillstand.uplift;

import static org.junit.jupiter.api.Assertions.assertAll;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Locale;
import java.util.SplittableRandom;
import java.util.function.ToDoubleBiFunction;
import java.util.stream.IntStream;
import java.util.stream.Stream;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import stillstand.ledger.RunMonitor;
import stillstand.uncertainty.DrawStreams;
import stillstand.uncertainty.StandardNormal;
import stillstand.uplift.FlightSimulator.Flight;
import stillstand.uplift.FlightSimulator.Survey;
import stillstand.uplift.FlightSimulator.Truth;
import stillstand.uplift.FlightSimulator.TruthDrawn;
import stillstand.uplift.FlightSimulator.Untrue;

/**
 * Do answers of the exact filter hold the truth as often as they say, on tables taken as they stand? Flights come from a
 * simulator written without sight of the filter. Each comparison is false by chance with probability 1e-4.
 */
class FlightCalibrationStatisticalTest {
    private static final long SEED = Long.getLong("test.seed", 20261201L);
    private static final List<FlightRow> ROWS = RoundHighstands.complete();
    private static final double RECORDED = 0.7;
    private static final double STRAYS = 0.2;
    private static final TruthDrawn RATES = FlightSimulator.logUniform(0.1, 2);
    private static final RatePrior PRIOR = new LogUniformPrior(0.1, 2);
    /** Cells of 3.1 and 1.6 m, extrapolated, under a sigma of 2 m. */
    private static final FlightIntegration.Effort QUICK = new FlightIntegration.Effort(100, 80);

    private static final FlightIntegration.Effort FINE = new FlightIntegration.Effort(200, 125);

    @Test
    void ratesOfUndatedFlightsHoldTheTruthAsOftenAsTheySay() {
        ranks(simulator(0, 0), 150, (flight, dice) -> below(flight, RECORDED, QUICK))
                .assertCalibrated();
    }

    /** The comparison must be able to fail: a datum error of 5 m that nobody told the engine makes it too sure. */
    @Test
    void theComparisonFindsAnAnswerThatIsTooSure() {
        RanksOfTruth ranks = ranks(simulator(1, 5), 60, (flight, dice) -> below(flight, RECORDED, QUICK));
        assertTrue(ranks.isOverconfident(), ranks::toString);
    }

    @ParameterizedTest
    @ValueSource(ints = {0, 1, 2})
    @Tag("slow")
    void ratesHoldTheTruthAsOftenAsTheySayWithAnyNumberOfDates(int dates) {
        ranks(simulator(dates, 0), 500, (flight, dice) -> below(flight, RECORDED, FINE))
                .assertCalibrated();
    }

    @Test
    @Tag("slow")
    void pairingsAreRightAsOftenAsTheySay() {
        List<PairingsRight> flights = flights(simulator(2, 0), RATES, 500)
                .map(each -> PairingsRight.of(each.flight, answer(each.flight)))
                .toList();
        assertAll(IntStream.range(0, PairingsRight.BINS).mapToObj(bin -> () -> PairingsRight.assertFair(flights, bin)));
    }

    /** The change is drawn from the engine's prior; three levels are dated. */
    @Test
    @Tag("slow")
    void oneChangeOfRateIsCovered() {
        RatePrior rates = new LogUniformPrior(0.05, 3);
        RateChangePrior prior = new RateChangePrior(rates, rates, 50, 350);
        TruthDrawn truths = dice -> new Truth(
                FlightSimulator.logUniform(dice, 0.05, 3),
                50 + 300 * dice.nextDouble(),
                FlightSimulator.logUniform(dice, 0.05, 3));
        List<List<Double>> below = flights(simulator(3, 0), truths, 500)
                .map(each -> belowOfChange(each.flight, prior, each.dice.nextLong()))
                .toList();
        assertAll(IntStream.range(0, 3)
                .mapToObj(k -> () -> RanksOfTruth.of(below.stream().mapToDouble(each -> each.get(k)))
                        .assertCalibrated()));
    }

    private static FlightSimulator simulator(int dates, double datumSigmaMetres) {
        SharedPriors shared = new SharedPriors(
                datumSigmaMetres,
                0,
                0,
                new SharedPriors.Recording.Known(RECORDED),
                List.of(Double.POSITIVE_INFINITY),
                new SharedPriors.Strays.Known(STRAYS));
        return new FlightSimulator(ROWS, shared, new Survey(2, 250, false, 2, 0.02, dates, 0), Untrue.NOTHING);
    }

    private record Drawn(Flight flight, SplittableRandom dice) {}

    private static Stream<Drawn> flights(FlightSimulator simulator, TruthDrawn truths, int count) {
        SplittableRandom seeds = new SplittableRandom(SEED);
        List<SplittableRandom> dice = Stream.generate(seeds::split).limit(count).toList();
        return dice.parallelStream().map(each -> new Drawn(simulator.flight(truths, each), each));
    }

    private static RanksOfTruth ranks(
            FlightSimulator simulator, int count, ToDoubleBiFunction<Flight, SplittableRandom> below) {
        return RanksOfTruth.of(
                flights(simulator, RATES, count).mapToDouble(each -> below.applyAsDouble(each.flight, each.dice)));
    }

    private static FlightModel model(Flight flight) {
        return FlightModel.complete(flight.levels(), ROWS, 2, 250);
    }

    private static double below(Flight flight, double recorded, FlightIntegration.Effort effort) {
        return FlightIntegration.rate(
                        model(flight),
                        PRIOR,
                        SharedNodes.fixed(SharedNumbers.plain(recorded, STRAYS)),
                        effort,
                        RunMonitor.SILENT)
                .cumulativeProbability(flight.truth().recentRate());
    }

    private static FlightAnswer answer(Flight flight) {
        return FlightIntegration.answer(
                model(flight),
                PRIOR,
                SharedNodes.fixed(SharedNumbers.plain(RECORDED, STRAYS)),
                QUICK,
                RunMonitor.SILENT);
    }

    /** Of the recent rate, the older rate and the age of the change. */
    private static List<Double> belowOfChange(Flight flight, RateChangePrior prior, long seed) {
        RateChangeAnswer answer = RateChangeIntegration.answer(
                model(flight),
                prior,
                SharedNumbers.plain(RECORDED, STRAYS),
                256,
                80,
                new DrawStreams(seed),
                "flight",
                RunMonitor.SILENT);
        double changeKa = flight.truth().changeKa();
        long younger =
                answer.changesKa().stream().filter(each -> each < changeKa).count();
        return List.of(
                answer.recent().cumulativeProbability(flight.truth().recentRate()),
                answer.older().cumulativeProbability(flight.truth().olderRate()),
                (double) younger / answer.changesKa().size());
    }

    /** By bin of the stated probability of each level's most probable row (or of no row): how many, stated and right. */
    private record PairingsRight(List<Integer> levels, List<Double> stated, List<Integer> right) {
        private static final double[] UNTIL = {0.5, 0.8, 0.95, 1.0000001};
        static final int BINS = UNTIL.length;

        static PairingsRight of(Flight flight, FlightAnswer answer) {
            Integer[] levels = {0, 0, 0, 0};
            Double[] stated = {0.0, 0.0, 0.0, 0.0};
            Integer[] right = {0, 0, 0, 0};
            PairingTable pairings = answer.pairings();
            for (int i = 0; i < pairings.levels(); i++) {
                int best = FlightSimulator.STRAY;
                double probability = pairings.stray(i);
                for (int j = 0; j < pairings.rows(); j++) {
                    if (pairings.probability(i, j) > probability) {
                        best = j;
                        probability = pairings.probability(i, j);
                    }
                }
                int bin = 0;
                while (probability >= UNTIL[bin]) {
                    bin++;
                }
                levels[bin]++;
                stated[bin] += probability;
                right[bin] += flight.rows().get(i) == best ? 1 : 0;
            }
            return new PairingsRight(List.of(levels), List.of(stated), List.of(right));
        }

        /** Levels of one flight are right or wrong together, so the error is that between flights. */
        static void assertFair(List<PairingsRight> flights, int bin) {
            double surplus = 0;
            double square = 0;
            double stated = 0;
            int right = 0;
            int levels = 0;
            for (PairingsRight flight : flights) {
                double each = flight.right.get(bin) - flight.stated.get(bin);
                surplus += each;
                square += each * each;
                stated += flight.stated.get(bin);
                right += flight.right.get(bin);
                levels += flight.levels.get(bin);
            }
            double limit = StandardNormal.quantile(1 - RanksOfTruth.FALSE_ALARM / 2) * Math.sqrt(square);
            String said = String.format(
                    Locale.ROOT,
                    "bin %d: %d levels, stated %.3f, right %.3f, limit of the difference %.3f",
                    bin,
                    levels,
                    stated / levels,
                    (double) right / levels,
                    limit / levels);
            assertTrue(levels > 100 && Math.abs(surplus) < limit, said);
        }
    }
}
