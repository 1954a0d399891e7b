package stillstand;

import java.util.List;
import java.util.Optional;
import stillstand.uncertainty.Interval;
import stillstand.uplift.FlightResult;
import stillstand.uplift.FlightResult.Correlation;
import stillstand.uplift.FlightResult.Fate;
import stillstand.uplift.FlightResult.Halving;
import stillstand.uplift.FlightResult.HandFit;
import stillstand.uplift.FlightResult.LeftOut;
import stillstand.uplift.FlightResult.Match;
import stillstand.uplift.FlightResult.ModelEvidence;
import stillstand.uplift.FlightResult.NumericalError;
import stillstand.uplift.FlightResult.Pairing;
import stillstand.uplift.FlightResult.PredictedAge;
import stillstand.uplift.FlightResult.Segment;
import stillstand.uplift.FlightResult.Unmatched;
import stillstand.uplift.Quantity;

/** An invented flight that uses every component of the record once: two correlations, one more probable than the other. */
public final class SampleFlight {
    private SampleFlight() {}

    /** The flight of "North cliff". */
    public static FlightResult result() {
        return new FlightResult(
                "North cliff",
                FlightResult.CONSTANT,
                SampleStudy.rate(0.435, 0.02),
                Optional.of(0.9999),
                Optional.empty(),
                List.of(new Interval(0.42, 0.45)),
                List.of(new Interval(0.3, 0.32), new Interval(0.4, 0.47)),
                List.of(0.6827),
                List.of(0.15, 0.8),
                List.of(new Segment(0, Optional.empty(), SampleStudy.rate(0.435, 0.02))),
                List.of(
                        new Pairing("T1", "5a", 0.8),
                        new Pairing("T1", "5c", 0.15),
                        new Pairing("T4", "5e", 0.975),
                        new Pairing("T4", "5c", 0.005)),
                List.of(new Unmatched("T1", 0.05), new Unmatched("T4", 0.02)),
                0.001,
                new Correlation(0.625, List.of(new Match("T1", Optional.of("5a")), new Match("T4", Optional.of("5e")))),
                List.of(new PredictedAge("T1", age(82, 4)), new PredictedAge("T4", age(122, 3))),
                -12.5,
                new NumericalError(0.0001, 0.01, 0.002),
                List.of(
                        new Fate("5a", 80, 26.5, 5, 0.8, 0.15, 0.03, 0.02, 0),
                        new Fate("5c", 100, 33, 6, 0.155, 0.6, 0.145, 0.1, 0),
                        new Fate("5e", 122.5, 60.8, 3, 0.975, 0.02, 0, 0.005, 0)),
                List.of(new LeftOut("T4", -3.25, SampleStudy.rate(0.41, 0.06))),
                List.of(new Halving("elevation", -3.5), new Halving("highstand levels", -40)),
                List.of(
                        new HandFit("least rms", 0.71, 0.8, Optional.of(0.999), 0.0005),
                        new HandFit("largest r squared", 0.3, 2.5, Optional.of(0.9995), 0.2)),
                List.of(
                        new ModelEvidence(FlightResult.CONSTANT, -12.5, 0),
                        new ModelEvidence(FlightResult.ONE_CHANGE, -13, -0.217)));
    }

    private static Quantity age(double median, double sd) {
        return new Quantity(
                median,
                Optional.of(median),
                Optional.of(sd),
                new Interval(median - sd, median + sd),
                new Interval(median - 2 * sd, median + 2 * sd),
                "ka");
    }
}
