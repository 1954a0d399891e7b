package stillstand.uplift;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import org.junit.jupiter.api.Test;
import stillstand.ledger.RunMonitor;
import stillstand.uncertainty.DrawStreams;
import stillstand.uncertainty.Normal;

/**
 * The whole default model, integrated, against an independent implementation that integrates otherwise (rates on fixed nodes, 8192
 * shared points on each); invented table and flights. Tolerance: 4 standard errors, ours (from scrambles) and theirs in
 * quadrature, so that one of some 40 numbers fails for fewer than one seed in 100; the seed is fixed.
 */
class FlightMonteCarloReferenceTest {
    private static final FlightMonteCarlo.Effort EFFORT = new FlightMonteCarlo.Effort(16, 256, 100, 1000);

    @Test
    void datedFlight() {
        SampledFlightAnswer found = answer(ToyFlights.datedFlight(), 2, 200);
        SampledFlightAnswer.NumericalError error = found.error();
        RatePosterior rate = found.answer().rate();
        near(-38.9376561, 0.0021, rate.logEvidence(), error.logEvidence());
        near(0.616608055, 7.4e-05, rate.quantile(0.5), error.medianMetresPerKyr());
        near(0.591149357, 0.00013, rate.quantile(0.16), error.lower68MetresPerKyr());
        near(0.64297569, 7.9e-05, rate.quantile(0.84), error.upper68MetresPerKyr());
        near(0.56585574, 0.00019, rate.quantile(0.025), error.lower95MetresPerKyr());
        near(0.67136892, 0.00015, rate.quantile(0.975), error.upper95MetresPerKyr());
        near(0.617231298, 8.2e-05, rate.mean(), error.meanMetresPerKyr());
        assertEquals(0.999999939, rate.probabilityUplift(), 0.005);
        assertEquals(1, found.answer().probabilityAllStray() / 6.07760397e-09, 0.08);
        double[][] pairs = {
            {0, 0, 0.999968},
            {1, 2, 0.998931},
            {2, 3, 0.917904},
            {3, 5, 0.909438},
            {4, 5, 0.039482},
            {4, 6, 0.876864},
            {5, 7, 0.980139},
            {6, 8, 0.450212},
            {6, 9, 0.385527}
        };
        assertPairs(pairs, found);
        double[] stray = {3.2e-05, 0.001048, 0.081535, 0.083039, 0.082414, 0.007277, 0.150424};
        assertStrays(stray, found);
    }

    @Test
    void undatedFlight() {
        SampledFlightAnswer found = answer(ToyFlights.undatedFlight(), 2, 160);
        SampledFlightAnswer.NumericalError error = found.error();
        RatePosterior rate = found.answer().rate();
        near(-33.141234, 0.0007, rate.logEvidence(), error.logEvidence());
        near(0.346988158, 5.5e-05, rate.quantile(0.5), error.medianMetresPerKyr());
        near(0.269678147, 9.5e-05, rate.quantile(0.16), error.lower68MetresPerKyr());
        near(0.694735202, 0.00045, rate.quantile(0.84), error.upper68MetresPerKyr());
        near(0.148616934, 0.00066, rate.quantile(0.025), error.lower95MetresPerKyr());
        near(0.933404214, 0.0013, rate.quantile(0.975), error.upper95MetresPerKyr());
        near(0.423535226, 0.00036, rate.mean(), error.meanMetresPerKyr());
        assertEquals(0.99921373, rate.probabilityUplift(), 0.005);
        assertEquals(1, found.answer().probabilityAllStray() / 0.00264247495, 0.08);
        double[][] pairs = {
            {0, 0, 0.811276},
            {0, 2, 0.113582},
            {1, 2, 0.347661},
            {1, 3, 0.379637},
            {2, 2, 0.129768},
            {2, 3, 0.060391},
            {2, 4, 0.49903},
            {2, 5, 0.092277},
            {2, 6, 0.061467},
            {3, 3, 0.123625},
            {3, 4, 0.066007},
            {3, 5, 0.238089},
            {3, 6, 0.195788},
            {3, 7, 0.169795},
            {3, 9, 0.042382},
            {4, 4, 0.118248},
            {4, 7, 0.075733},
            {4, 9, 0.307348},
            {4, 10, 0.195919},
            {5, 5, 0.065203},
            {5, 10, 0.415507},
            {5, 11, 0.161464},
            {5, 12, 0.03062},
            {6, 5, 0.044253},
            {6, 6, 0.049769},
            {6, 11, 0.334968},
            {6, 12, 0.059383},
            {6, 14, 0.109097},
            {7, 6, 0.04356},
            {7, 7, 0.037277},
            {7, 10, 0.032685},
            {7, 11, 0.070048},
            {7, 12, 0.268835},
            {7, 13, 0.04089},
            {7, 14, 0.058538},
            {7, 15, 0.088512}
        };
        assertPairs(pairs, found);
        double[] stray = {0.05645, 0.202873, 0.104164, 0.108932, 0.184633, 0.178793, 0.276629, 0.270577};
        assertStrays(stray, found);
    }

    @Test
    void slowCoast() {
        List<FlightLevel> levels = List.of(
                FlightLevel.undated("1", new Normal(4, 1)),
                FlightLevel.dated("2", new Normal(6.5, 1), List.of(new Normal(123, 3))));
        SampledFlightAnswer found = answer(levels, 1, 30);
        SampledFlightAnswer.NumericalError error = found.error();
        RatePosterior rate = found.answer().rate();
        near(-13.0275798, 0.00015, rate.logEvidence(), error.logEvidence());
        near(0.00949873675, 1.4e-05, rate.quantile(0.5), error.medianMetresPerKyr());
        near(-0.0288409505, 1.5e-05, rate.quantile(0.16), error.lower68MetresPerKyr());
        near(0.0604917966, 4.1e-05, rate.quantile(0.84), error.upper68MetresPerKyr());
        near(-0.0609304402, 6.9e-05, rate.quantile(0.025), error.lower95MetresPerKyr());
        near(0.450772689, 0.00011, rate.quantile(0.975), error.upper95MetresPerKyr());
        near(0.0336418356, 2.3e-05, rate.mean(), error.meanMetresPerKyr());
        assertEquals(0.57822684, rate.probabilityUplift(), 0.005);
        assertEquals(1, found.answer().probabilityAllStray() / 0.0135472754, 0.08);
        double[][] pairs = {{0, 0, 0.788824}, {0, 3, 0.035638}, {1, 4, 0.94062}};
        assertPairs(pairs, found);
        double[] stray = {0.165072, 0.049513};
        assertStrays(stray, found);
    }

    @Test
    void sameSeedGivesTheSameBits() {
        SampledFlightAnswer one = answer(ToyFlights.datedFlight(), 2, 200, new FlightMonteCarlo.Effort(4, 64, 50, 100));
        SampledFlightAnswer two = answer(ToyFlights.datedFlight(), 2, 200, new FlightMonteCarlo.Effort(4, 64, 50, 100));
        assertEquals(one.answer().rate().mean(), two.answer().rate().mean(), 0);
        assertEquals(one.draws(), two.draws());
    }

    private static SampledFlightAnswer answer(List<FlightLevel> levels, double from, double to) {
        return answer(levels, from, to, EFFORT);
    }

    private static SampledFlightAnswer answer(
            List<FlightLevel> levels, double from, double to, FlightMonteCarlo.Effort effort) {
        FlightModel model =
                new FlightModel(levels, OlderRows.after(ToyFlights.defaultRows()), from, to, 1000, 0.05, true, false);
        return FlightMonteCarlo.answer(
                model,
                CauchyPrior.DEFAULT,
                SharedPriors.defaults(3, levels.size()),
                effort,
                new DrawStreams(20261201),
                "toy",
                RunMonitor.SILENT);
    }

    private static void near(double expected, double theirError, double found, double ourError) {
        double error = Math.hypot(theirError, ourError);
        assertTrue(Math.abs(found - expected) < 4 * error, found + " for " + expected + ", error " + error);
    }

    private static void assertPairs(double[][] expected, SampledFlightAnswer found) {
        double tolerance = 4 * Math.max(found.error().pairing(), 0.002);
        for (double[] pair : expected) {
            double probability = found.answer().pairings().probability((int) pair[0], (int) pair[1]);
            assertEquals(pair[2], probability, tolerance, "level " + pair[0] + ", row " + pair[1]);
        }
    }

    private static void assertStrays(double[] expected, SampledFlightAnswer found) {
        for (int i = 0; i < expected.length; i++) {
            double tolerance = 4 * Math.max(found.error().pairing(), 0.002);
            assertEquals(expected[i], found.answer().pairings().stray(i), tolerance, "level " + i);
        }
    }
}
