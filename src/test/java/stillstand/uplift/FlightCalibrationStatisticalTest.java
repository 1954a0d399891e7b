package stillstand.uplift;

import static org.junit.jupiter.api.Assertions.assertAll;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.SplittableRandom;
import java.util.function.Predicate;
import java.util.function.ToDoubleBiFunction;
import java.util.stream.IntStream;
import java.util.stream.Stream;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import stillstand.ledger.RunMonitor;
import stillstand.uncertainty.DrawStreams;
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
    /** Of each slow comparison; fewer by {@code -Dflights=N} in a hurry. */
    private static final int MANY = Integer.getInteger("flights", 500);

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
        ranks(simulator(dates, 0), MANY, (flight, dice) -> below(flight, RECORDED, FINE))
                .assertCalibrated();
    }

    @Test
    @Tag("slow")
    void pairingsAreRightAsOftenAsTheySay() {
        assertAll(pairings(MANY).stream().map(bin -> bin::assertFair));
    }

    /** The change is drawn from the engine's prior; three levels are dated. */
    @Test
    @Tag("slow")
    void oneChangeOfRateIsCovered() {
        assertAll(change(MANY).stream().map(ranks -> ranks::assertCalibrated));
    }

    /** How right pairings are in four bins of what they say; two levels are dated. */
    static List<PairingsRight> pairings(int count) {
        return PairingsRight.bins(flights(simulator(2, 0), RATES, count)
                .map(each -> PairingsRight.most(each.flight, answer(each.flight).pairings()))
                .toList());
    }

    /** Ranks of the recent rate, the older rate and the age of the change. */
    static List<RanksOfTruth> change(int count) {
        RatePrior rates = new LogUniformPrior(0.05, 3);
        HistoryPrior prior = new HistoryPrior.Stepped(rates, 1, 50, 350);
        TruthDrawn truths = dice -> new Truth(
                FlightSimulator.logUniform(dice, 0.05, 3),
                50 + 300 * dice.nextDouble(),
                FlightSimulator.logUniform(dice, 0.05, 3));
        List<List<Double>> below = flights(simulator(3, 0), truths, count)
                .map(each -> belowOfChange(each.flight, prior, each.dice.nextLong()))
                .toList();
        return IntStream.range(0, 3)
                .mapToObj(k -> RanksOfTruth.of(below.stream().mapToDouble(each -> each.get(k))))
                .toList();
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
    private static List<Double> belowOfChange(Flight flight, HistoryPrior prior, long seed) {
        HistoryDraws draws = HistoryMonteCarlo.draws(
                model(flight),
                prior,
                new SharedPriors(
                        0,
                        0,
                        0,
                        new SharedPriors.Recording.Known(RECORDED),
                        List.of(Double.POSITIVE_INFINITY),
                        new SharedPriors.Strays.Known(STRAYS)),
                new HistoryMonteCarlo.Effort(4, 128, 60, 5),
                new DrawStreams(seed),
                "flight",
                RunMonitor.SILENT,
                Workers.NONE);
        return List.of(
                below(
                        draws,
                        history ->
                                history.rateMetresPerKyrAt(0) < flight.truth().recentRate()),
                below(
                        draws,
                        history ->
                                history.rateMetresPerKyrAt(900) < flight.truth().olderRate()),
                below(
                        draws,
                        history -> ((UpliftHistory.SteppedRate) history)
                                        .changesKa()
                                        .get(0)
                                < flight.truth().changeKa()));
    }

    private static double below(HistoryDraws draws, Predicate<UpliftHistory> isBelow) {
        return draws.of(history -> isBelow.test(history) ? 1 : 0).mean(-1);
    }
}
