package stillstand.uplift;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.List;
import org.junit.jupiter.api.Test;
import stillstand.uncertainty.Normal;

/**
 * One index point with limiting points on either side, flat prior on 0.15 to 0.55 m/kyr, against an independent implementation;
 * tolerance 1e-5 m/kyr.
 */
class LimitingPointReferenceTest {
    private static final LimitingPoint MARINE =
            new LimitingPoint("marine", LimitingPoint.Side.BELOW_SEA, 20, 1, 100, 2, -20, 6, 0, true);
    private static final LimitingPoint TERRESTRIAL =
            new LimitingPoint("terrestrial", LimitingPoint.Side.ABOVE_SEA, 38, 1, 110, 3, -10, 8, 0, true);

    @Test
    void rateWithoutAndWithLimitingPoints() {
        check(List.of(), 0.32796805, 0.018774125, 0.32791344);
        check(List.of(MARINE), 0.33696566, 0.018162095, 0.3369054);
        check(List.of(TERRESTRIAL), 0.32723579, 0.018624943, 0.32719601);
        check(List.of(MARINE, TERRESTRIAL), 0.33614549, 0.018007458, 0.33609927);
    }

    private static void check(List<LimitingPoint> points, double mean, double sd, double median) {
        int count = 4001;
        double[] rates = new double[count];
        double[] logs = new double[count];
        SharedNumbers shared = SharedNumbers.plain(0.7, 0.2);
        for (int k = 0; k < count; k++) {
            rates[k] = 0.15 + 0.4 * k / (count - 1);
            double sigma = Math.sqrt(1 + 4 + Math.pow(rates[k] * 1.5, 2));
            logs[k] = Math.log(new Normal(5 + rates[k] * 122, sigma).density(45));
            for (LimitingPoint point : points) {
                logs[k] += point.logFactor(new UpliftHistory.ConstantRate(rates[k]), shared);
            }
        }
        RatePosterior rate = RatePosterior.of(rates, logs, new NormalPrior(0, 1e6));
        assertEquals(mean, rate.mean(), 1e-5);
        assertEquals(sd, rate.standardDeviation(), 1e-5);
        assertEquals(median, rate.quantile(0.5), 1e-5);
    }

    @Test
    void aFlightsEvidenceIsMultiplied() {
        FlightModel model = FlightModel.complete(ToyFlights.datedFlight(), ToyFlights.plainRows(), 2, 200);
        SharedNumbers shared = SharedNumbers.plain(0.7, 0.2);
        UpliftHistory history = new UpliftHistory.ConstantRate(0.62);
        ShorelineFilter without = new ShorelineFilter(model, 100);
        ShorelineFilter with = new ShorelineFilter(model.withLimitingPoints(List.of(TERRESTRIAL)), 100);
        FilterWorkspace w = with.workspace(true);
        double log = new BackwardPass(with, w).run(history, shared);
        assertEquals(
                without.logEvidence(history, shared, without.workspace(false)) + TERRESTRIAL.logFactor(history, shared),
                log,
                1e-12);
        assertEquals(0, w.backwardMismatch, 1e-12);
    }
}
