package stillstand.uplift;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;
import stillstand.ledger.RunMonitor;

/**
 * Whole flights on an invented table, against an independent implementation (filter of its own, about 1500 rates, 250 and 500
 * cells extrapolated). Tolerances: mean, sd and quantiles 3e-4 m/kyr for the dated flight, log evidence 0.005, pairings 0.003.
 */
class FlightIntegrationReferenceTest {
    private static final RatePrior PRIOR = new HalfCauchyPrior(1, 0, 5);
    private static final SharedNodes PLAIN = SharedNodes.fixed(SharedNumbers.plain(0.7, 0.2));
    private static final FlightModel DATED =
            FlightModel.complete(ToyFlights.datedFlight(), ToyFlights.plainRows(), 2, 200);
    private static final FlightModel UNDATED =
            FlightModel.complete(ToyFlights.undatedFlight(), ToyFlights.plainRows(), 2, 160);
    private static FlightAnswer dated;
    private static FlightAnswer undated;

    @BeforeAll
    static void answers() {
        dated = FlightIntegration.answer(DATED, PRIOR, PLAIN, FlightIntegration.Effort.FULL, RunMonitor.SILENT);
        undated = FlightIntegration.answer(UNDATED, PRIOR, PLAIN, FlightIntegration.Effort.FULL, RunMonitor.SILENT);
    }

    @Test
    void rateOfTheDatedFlight() {
        RatePosterior rate = dated.rate();
        assertEquals(-35.581779, rate.logEvidence(), 0.005);
        assertEquals(0.61907026, rate.mean(), 3e-4);
        assertEquals(0.019622406, rate.standardDeviation(), 3e-4);
        assertEquals(0.57978541, rate.quantile(0.025), 3e-4);
        assertEquals(0.61961476, rate.quantile(0.5), 3e-4);
        assertEquals(0.65620414, rate.quantile(0.975), 3e-4);
        assertRegion(0.60031659, 0.63972406, rate.shortestInterval(0.6827), 1e-3);
        assertRegion(0.58014928, 0.6565547, rate.shortestInterval(0.95), 1e-3);
        assertEquals(1, rate.probabilityUplift(), 1e-12);
    }

    @Test
    void pairingsOfTheDatedFlight() {
        PairingTable table = dated.pairings();
        double[][] expected = {
            {0, 0, 0.9999939},
            {1, 2, 0.99981401},
            {2, 3, 0.98623959},
            {3, 5, 0.98369741},
            {4, 6, 0.98302185},
            {4, 5, 0.0057747856},
            {5, 7, 0.99851118},
            {6, 8, 0.70951333},
            {6, 9, 0.26828227}
        };
        for (double[] one : expected) {
            assertEquals(one[2], table.probability((int) one[0], (int) one[1]), 0.003, one[0] + " to " + one[1]);
        }
        double[] stray = {6.0956946e-06, 0.00018598825, 0.013693369, 0.01521389, 0.01109865, 0.000799569, 0.021244369};
        for (int i = 0; i < stray.length; i++) {
            assertEquals(stray[i], table.stray(i), 0.003);
        }
        assertEquals(0.68588387, table.unseen(9), 0.003);
        assertEquals(0.2332749, table.reoccupied(8), 0.003);
        assertEquals(0.87834992, table.outside(10), 0.003);
        assertEquals(0, table.absent(3), 1e-12);
    }

    @Test
    void agesOfTheDatedFlight() {
        double[] mean = {5.820018, 80.684227, 99.863616, 197.76308, 213.83904, 236.05682, 291.80742};
        double[] sigma = {0.35187189, 1.0883438, 1.4936245, 2.992278, 3.1686744, 2.5327817, 10.980655};
        for (int i = 0; i < mean.length; i++) {
            LevelAge age = dated.ages().get(i).orElseThrow();
            assertEquals(mean[i], age.meanKa(), 0.03 * sigma[i] + 0.01, "level " + i);
            assertEquals(sigma[i], age.sigmaKa(), 0.03 * sigma[i], "level " + i);
        }
    }

    @Test
    void rateOfTheUndatedFlightHasTwoRegions() {
        RatePosterior rate = undated.rate();
        assertEquals(-31.232878, rate.logEvidence(), 0.005);
        assertEquals(0.33820297, rate.mean(), 1e-3);
        assertEquals(0.059840918, rate.standardDeviation(), 1e-3);
        assertEquals(0.34265595, rate.quantile(0.5), 3e-4);
        assertEquals(0.25541907, rate.quantile(0.025), 1e-3);
        assertEquals(0.36929571, rate.quantile(0.975), 1e-3);
        List<RateRegion> regions = rate.highestDensityRegions(0.95);
        assertEquals(2, regions.size());
        assertRegion(0.2498549, 0.29821899, regions.get(0), 2e-3);
        assertRegion(0.31759959, 0.37154559, regions.get(1), 2e-3);
        assertEquals(0.95, regions.get(0).probability() + regions.get(1).probability(), 1e-6);
    }

    @Test
    void pairingsOfTheUndatedFlight() {
        double[][] expected = {
            {0, 0, 0.76607545}, {0, 2, 0.22298882}, {1, 3, 0.64963215}, {2, 4, 0.76313825}, {3, 6, 0.41724666},
            {4, 9, 0.73306213}, {5, 10, 0.79875391}, {6, 11, 0.70079204}, {7, 12, 0.58615218}, {7, 13, 0.15440387}
        };
        for (double[] one : expected) {
            assertEquals(one[2], undated.pairings().probability((int) one[0], (int) one[1]), 0.003);
        }
        assertEquals(0.023872819, undated.pairings().stray(1), 0.003);
        assertEquals(215.91712, undated.ages().get(3).orElseThrow().meanKa(), 1);
    }

    @Test
    void sharedDatumErrorWidensTheAnswer() {
        List<FlightRow> rows = ToyFlights.plainRows().stream()
                .map(row -> FlightRow.plain(
                        row.stage(), row.ageKa(), row.ageSigmaKa(), row.levelMetres(), row.levelSigmaMetres()))
                .toList();
        RatePosterior rate = FlightIntegration.rate(
                FlightModel.complete(ToyFlights.datedFlight(), rows, 2, 200),
                PRIOR,
                PLAIN.withNormalOffset(4, 9),
                new FlightIntegration.Effort(300, 250),
                RunMonitor.SILENT);
        assertEquals(-36.113193, rate.logEvidence(), 0.005);
        assertEquals(0.61163502, rate.mean(), 3e-4);
        assertEquals(0.02316408, rate.standardDeviation(), 3e-4);
        assertEquals(0.56451042, rate.quantile(0.025), 6e-4);
    }

    @Test
    void recordingProbabilityIsAveragedUnderItsPrior() {
        RatePosterior rate = FlightIntegration.rate(
                DATED,
                PRIOR,
                PLAIN.withBetaRecording(4, 2.5, 8),
                new FlightIntegration.Effort(300, 250),
                RunMonitor.SILENT);
        assertEquals(-36.023724, rate.logEvidence(), 0.005);
        assertEquals(0.61861543, rate.mean(), 3e-4);
        assertEquals(0.019689565, rate.standardDeviation(), 3e-4);
    }

    @Test
    void previewIsNearTheAnswer() {
        RatePosterior preview = FlightIntegration.preview(DATED, PRIOR, PLAIN, 400);
        assertEquals(-35.439513, preview.logEvidence(), 0.005);
        assertEquals(0.6188987, preview.mean(), 3e-4);
        assertEquals(0.019659016, preview.standardDeviation(), 3e-4);
        RatePosterior undatedPreview = FlightIntegration.preview(UNDATED, PRIOR, PLAIN, 400);
        assertEquals(-31.488034, undatedPreview.logEvidence(), 0.005);
        assertEquals(0.3409566, undatedPreview.mean(), 1e-3);
    }

    @Test
    void positionOfARowIsItsLevelPlusTheUplift() {
        RowPosition position = dated.positions().get(4);
        assertEquals(5 + 122 * dated.rate().mean(), position.meanMetres(), 0.02);
        assertTrue(position.sigmaMetres() > 122 * dated.rate().standardDeviation());
    }

    private static void assertRegion(double from, double to, RateRegion found, double tolerance) {
        assertEquals(from, found.fromMetresPerKyr(), tolerance);
        assertEquals(to, found.toMetresPerKyr(), tolerance);
    }
}
