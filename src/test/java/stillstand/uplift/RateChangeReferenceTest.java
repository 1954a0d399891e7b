package stillstand.uplift;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import org.junit.jupiter.api.Test;
import stillstand.ledger.RunMonitor;
import stillstand.uncertainty.DrawStreams;

/**
 * One change of rate, of known and of unknown age, and none, against an independent implementation on an invented flight; its
 * importance sample of unknown ages has 7189 effective draws. Tolerances: 4 standard errors of either side.
 */
class RateChangeReferenceTest {
    private static final LogUniformPrior RATE = new LogUniformPrior(0.05, 3);
    private static final SharedNumbers SHARED = SharedNumbers.plain(0.7, 0.2);

    private static FlightModel model() {
        List<FlightLevel> levels = ToyFlights.levels(3.5, 10.2, 35.6, 73.6, 77.2, 112.0, 148.8);
        ToyFlights.date(levels, 1, 100, 2);
        ToyFlights.date(levels, 3, 197.2, 4);
        ToyFlights.date(levels, 6, 314.7, 6.3);
        return FlightModel.complete(levels, ToyFlights.plainRows(), 2, 200);
    }

    private static RateChangeAnswer answer(double fromKa, double toKa) {
        return RateChangeIntegration.answer(
                model(),
                new RateChangePrior(RATE, RATE, fromKa, toKa),
                SHARED,
                512,
                125,
                new DrawStreams(20261201),
                "toy",
                RunMonitor.SILENT);
    }

    @Test
    void constantRate() {
        RatePosterior constant = FlightIntegration.rate(
                model(), RATE, SharedNodes.fixed(SHARED), FlightIntegration.Effort.FULL, RunMonitor.SILENT);
        assertEquals(-47.265713, constant.logEvidence(), 0.005);
        assertEquals(0.43829378, constant.mean(), 3e-4);
    }

    @Test
    void changeOfKnownAge() {
        RateChangeAnswer answer = answer(150, 150);
        double share = 4 / Math.sqrt(answer.effectiveDraws());
        assertTrue(answer.effectiveDraws() > 1000, "effective draws " + answer.effectiveDraws());
        assertEquals(-38.592885, answer.logEvidence(), 4 * answer.logEvidenceError() + 0.01);
        assertEquals(0.26431639, answer.recent().mean(), share * 0.0234);
        assertEquals(0.023411462, answer.recent().standardDeviation(), share * 0.0234);
        assertEquals(0.82633185, answer.older().mean(), share * 0.0669);
        assertEquals(0.066923864, answer.older().standardDeviation(), share * 0.0669);
        assertTrue(answer.probabilityFasterBefore() > 0.9999);
        assertEquals(150, answer.changeQuantileKa(0.5), 0);
    }

    @Test
    void changeOfUnknownAge() {
        RateChangeAnswer answer = answer(40, 450);
        double share = 4 * Math.hypot(1 / Math.sqrt(answer.effectiveDraws()), 1 / Math.sqrt(7189));
        assertTrue(answer.effectiveDraws() > 500, "effective draws " + answer.effectiveDraws());
        assertEquals(-40.317031, answer.logEvidence(), 4 * Math.hypot(answer.logEvidenceError(), 0.012));
        assertEquals(0.23809042, answer.recent().mean(), share * 0.06);
        assertEquals(0.75002415, answer.older().mean(), share * 0.1);
        assertEquals(130.39229, answer.changeQuantileKa(0.5), share * 1.25 * 25);
        assertEquals(74.087441, answer.changeQuantileKa(0.025), share * 2.7 * 25);
        assertEquals(169.09362, answer.changeQuantileKa(0.975), share * 2.7 * 25);
        assertTrue(answer.datesCanTell(model()));
        assertFalse(answer.datesCanTell(model().withLevels(ToyFlights.levels(3.5, 10.2, 35.6))));
    }

    @Test
    void priorsAreSaidInWords() {
        assertEquals(
                "recent rate log-uniform 0.05 3, older rate log-uniform 0.05 3, change uniform from 40 to 450 ka",
                new RateChangePrior(RATE, RATE, 40, 450).describe());
    }
}
