package stillstand.uplift;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Set;
import org.junit.jupiter.api.Test;
import stillstand.ledger.RunCancelledException;
import stillstand.ledger.RunMonitor;
import stillstand.uncertainty.Normal;

class RatePosteriorTest {
    private static final SharedNodes PLAIN = SharedNodes.fixed(SharedNumbers.plain(0.7, 0.2));
    private static final FlightIntegration.Effort SMALL = new FlightIntegration.Effort(100, 60);

    /** Weighted normals on a fine grid under a prior that is flat there. */
    private static RatePosterior normals(double... meanSigmaWeight) {
        int count = 20001;
        double[] rates = new double[count];
        double[] logs = new double[count];
        for (int k = 0; k < count; k++) {
            rates[k] = -1 + 2.0 * k / (count - 1);
            double sum = 0;
            for (int i = 0; i < meanSigmaWeight.length; i += 3) {
                sum += meanSigmaWeight[i + 2]
                        * new Normal(meanSigmaWeight[i], meanSigmaWeight[i + 1]).density(rates[k]);
            }
            logs[k] = Math.log(sum);
        }
        return RatePosterior.of(rates, logs, new NormalPrior(0, 1e5));
    }

    @Test
    void aNormalPosteriorHasItsKnownSummary() {
        RatePosterior rate = normals(0.3, 0.02, 1);
        assertEquals(0.3, rate.mean(), 1e-8);
        assertEquals(0.02, rate.standardDeviation(), 1e-5);
        assertEquals(0.3 - 1.959964 * 0.02, rate.quantile(0.025), 1e-6);
        assertEquals(2 * 1.959964 * 0.02, rate.shortestInterval(0.95).widthMetresPerKyr(), 1e-5);
        assertEquals(0.975, rate.cumulativeProbability(rate.quantile(0.975)), 1e-12);
        assertEquals(Math.log(new Normal(0, 1e5).density(0)), rate.logEvidence(), 1e-8);
    }

    @Test
    void twoModesAreTwoRegionsWithTheirWeights() {
        List<RateRegion> regions = normals(-0.4, 0.02, 0.3, 0.5, 0.02, 0.7).highestDensityRegions(0.95);
        assertEquals(2, regions.size());
        assertEquals(0.3, regions.get(0).probability(), 0.03);
        assertEquals(0.95, regions.get(0).probability() + regions.get(1).probability(), 1e-6);
        assertTrue(regions.get(0).toMetresPerKyr() < 0 && regions.get(1).fromMetresPerKyr() > 0);
    }

    @Test
    void narrowModesOfBothSignsAreFound() {
        // a sure level of one sure row, 0.02 m/kyr wide at most, seen from a wide prior
        FlightRow row = FlightRow.plain("5e", 122, 0.1, 5, 0.1);
        for (double rate : new double[] {-0.2, 0.8, 7}) {
            double height = 5 + 122 * rate;
            FlightModel model = FlightModel.complete(
                    List.of(FlightLevel.undated("sure", new Normal(height, 0.2)).neverStray()),
                    List.of(row),
                    height - 50,
                    height + 50);
            RatePosterior found = FlightIntegration.rate(
                    model, CauchyPrior.DEFAULT, PLAIN, new FlightIntegration.Effort(200, 400), RunMonitor.SILENT);
            assertEquals(rate, found.mean(), 2e-4 + 1e-3 * Math.abs(rate));
            assertTrue(found.standardDeviation() < 0.01, "sd " + found.standardDeviation());
        }
    }

    @Test
    void rowsWithoutAnyErrorAndOneRowAndOneLevelWork() {
        FlightModel model = FlightModel.complete(
                List.of(FlightLevel.undated("only", new Normal(60, 2))),
                List.of(FlightRow.plain("exact", 120, 0, 5, 0)),
                0,
                100);
        FlightAnswer answer = FlightIntegration.answer(model, CauchyPrior.DEFAULT, PLAIN, SMALL, RunMonitor.SILENT);
        assertEquals(55.0 / 120, answer.rate().quantile(0.5), 0.05);
        assertEquals(120, answer.ages().get(0).orElseThrow().meanKa(), 1e-9);
    }

    @Test
    void aFlightThatNoRateCanLeaveSaysSo() {
        // a level outside the surveyed range that may not be a stray
        FlightModel model = FlightModel.complete(
                List.of(FlightLevel.undated("high", new Normal(500, 1))
                        .onlyRows(Set.of(0))
                        .neverStray()),
                List.of(FlightRow.plain("5e", 122, 2, 5, 2)),
                0,
                100);
        IllegalArgumentException refused = assertThrows(
                IllegalArgumentException.class,
                () -> FlightIntegration.rate(model, CauchyPrior.DEFAULT, PLAIN, SMALL, RunMonitor.SILENT));
        assertTrue(refused.toString().contains("can have left this flight"), refused.toString());
    }

    @Test
    void aCancelledRunStops() {
        RunMonitor cancelled = new RunMonitor() {
            @Override
            public void step(String what, double fraction) {}

            @Override
            public boolean isCancelled() {
                return true;
            }
        };
        FlightModel model = FlightModel.complete(ToyFlights.datedFlight(), ToyFlights.plainRows(), 2, 200);
        assertThrows(
                RunCancelledException.class,
                () -> FlightIntegration.rate(model, CauchyPrior.DEFAULT, PLAIN, SMALL, cancelled));
    }
}
