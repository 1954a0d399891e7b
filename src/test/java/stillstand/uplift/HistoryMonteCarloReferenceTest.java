package stillstand.uplift;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.concurrent.atomic.AtomicInteger;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import stillstand.ledger.RunCancelledException;
import stillstand.ledger.RunMonitor;
import stillstand.uncertainty.DrawStreams;

/**
 * One change of rate, of known and of unknown age, and none, against an independent implementation on an invented flight; its
 * importance sample of unknown ages has 7189 effective draws. Draws of tempered populations are correlated: an effective number of 600
 * is supposed for them, and differences of 4 standard errors of either side are let pass.
 */
class HistoryMonteCarloReferenceTest {
    private static final LogUniformPrior RATE = new LogUniformPrior(0.05, 3);
    private static final SharedPriors SHARED = new SharedPriors(
            0,
            0,
            0,
            new SharedPriors.Recording.Known(0.7),
            List.of(Double.POSITIVE_INFINITY),
            new SharedPriors.Strays.Known(0.2));
    private static final double SHARE = 4 * Math.hypot(1 / Math.sqrt(600), 1 / Math.sqrt(7189));

    private static FlightModel model() {
        List<FlightLevel> levels = ToyFlights.levels(3.5, 10.2, 35.6, 73.6, 77.2, 112.0, 148.8);
        ToyFlights.date(levels, 1, 100, 2);
        ToyFlights.date(levels, 3, 197.2, 4);
        ToyFlights.date(levels, 6, 314.7, 6.3);
        return FlightModel.complete(levels, ToyFlights.plainRows(), 2, 200);
    }

    private static HistoryDraws draws(HistoryPrior prior) {
        return HistoryMonteCarlo.draws(
                model(),
                prior,
                SHARED,
                HistoryMonteCarlo.Effort.FULL,
                new DrawStreams(20261201),
                "toy",
                RunMonitor.SILENT,
                Workers.NONE);
    }

    private static double recent(UpliftHistory history) {
        return history.rateMetresPerKyrAt(0);
    }

    private static double older(UpliftHistory history) {
        return history.rateMetresPerKyrAt(900);
    }

    @Test
    @Tag("slow")
    void noChange() {
        HistoryDraws draws = draws(new HistoryPrior.Steady(RATE));
        assertTrue(draws.logEvidenceError() < 0.1, "error " + draws.logEvidenceError());
        assertEquals(-47.265713, draws.logEvidence(), 4 * Math.hypot(draws.logEvidenceError(), 0.005));
        RatePosterior exact = FlightIntegration.rate(
                model(),
                RATE,
                SharedNodes.fixed(SharedNumbers.plain(0.7, 0.2)),
                FlightIntegration.Effort.FULL,
                RunMonitor.SILENT);
        RatePosterior drawn = draws.of(HistoryMonteCarloReferenceTest::recent).posterior(0);
        assertEquals(0.43829378, drawn.mean(), SHARE * exact.standardDeviation());
    }

    @Test
    @Tag("slow")
    void changeOfKnownAge() {
        HistoryDraws draws = draws(new HistoryPrior.Stepped(RATE, 1, 150, 150));
        assertTrue(draws.logEvidenceError() < 0.1, "error " + draws.logEvidenceError());
        assertEquals(-38.592885, draws.logEvidence(), 4 * Math.hypot(draws.logEvidenceError(), 0.005));
        RatePosterior recent = draws.of(HistoryMonteCarloReferenceTest::recent).posterior(0);
        RatePosterior older = draws.of(HistoryMonteCarloReferenceTest::older).posterior(0);
        assertEquals(0.26431639, recent.mean(), SHARE * 0.0234);
        assertEquals(0.023411462, recent.standardDeviation(), SHARE * 0.0234);
        assertEquals(0.82633185, older.mean(), SHARE * 0.0669);
        assertEquals(0.066923864, older.standardDeviation(), SHARE * 0.0669);
        RatePosterior ratio =
                draws.of(history -> recent(history) / older(history)).posterior(0);
        assertEquals(0.32345096, ratio.mean(), SHARE * ratio.standardDeviation());
        assertTrue(ratio.cumulativeProbability(1) > 0.999);
    }

    @Test
    @Tag("slow")
    void changeOfUnknownAge() {
        HistoryDraws draws = draws(new HistoryPrior.Stepped(RATE, 1, 40, 450));
        assertEquals(-40.317031, draws.logEvidence(), 4 * Math.hypot(draws.logEvidenceError(), 0.012));
        assertEquals(
                0.23809042,
                draws.of(HistoryMonteCarloReferenceTest::recent).posterior(0).mean(),
                SHARE * 0.06);
        assertEquals(
                0.75002415,
                draws.of(HistoryMonteCarloReferenceTest::older).posterior(0).mean(),
                SHARE * 0.1);
        double[] change = draws.changesKa(0).orElseThrow().quantiles(new double[] {0.025, 0.5, 0.975}, -1);
        assertEquals(130.39229, change[1], SHARE * 1.25 * 25);
        assertEquals(74.087441, change[0], SHARE * 2.7 * 25);
        assertEquals(169.09362, change[2], SHARE * 2.7 * 25);
    }

    /** The evidence of two changes at prior ranges so wide is nearly that of one: in kind, no outside figure. */
    @Test
    void cancelledWithinAFewEvaluations() {
        AtomicInteger asked = new AtomicInteger();
        RunMonitor monitor = new RunMonitor() {
            @Override
            public void step(String what, double fraction) {}

            @Override
            public boolean isCancelled() {
                return asked.incrementAndGet() > 100;
            }
        };
        assertThrows(
                RunCancelledException.class,
                () -> HistoryMonteCarlo.draws(
                        model(),
                        new HistoryPrior.Stepped(RATE, 1, 40, 450),
                        SHARED,
                        HistoryMonteCarlo.Effort.FULL,
                        new DrawStreams(1),
                        "toy",
                        monitor,
                        Workers.NONE));
        assertEquals(101, asked.get());
    }
}
