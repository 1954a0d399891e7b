package stillstand;

import java.util.List;
import java.util.Optional;
import stillstand.sensitivity.AssumptionSwitch;
import stillstand.sensitivity.CurveLeftOut;
import stillstand.sensitivity.LevelTornado;
import stillstand.sensitivity.LevelTornado.Bar;
import stillstand.sensitivity.LevelTornado.OtherStage;
import stillstand.sensitivity.Leverage;
import stillstand.sensitivity.NextMeasurement;
import stillstand.sensitivity.NextMeasurement.PairingGain;
import stillstand.sensitivity.SampleLeftOut;
import stillstand.sensitivity.ShortRate;
import stillstand.uncertainty.Interval;

/** Invented leverage that uses every component of the records once. */
public final class SampleLeverage {
    private SampleLeverage() {}

    /** What the answers of "North cliff" hang on. */
    public static Leverage result() {
        return new Leverage(
                List.of(tornado("North cliff", "T4", 0.436)),
                List.of(
                        new NextMeasurement(
                                "North cliff",
                                NextMeasurement.FLIGHT,
                                "T1",
                                Optional.empty(),
                                "date",
                                3,
                                "ka",
                                0.078,
                                0.05,
                                -38.5,
                                1.5,
                                0.125,
                                Optional.of(new PairingGain(0.875, 0.9375, 0.004)),
                                350.5),
                        new NextMeasurement(
                                "North cliff",
                                "T4",
                                "T4",
                                Optional.of("C-1"),
                                "taxon",
                                1.25,
                                "m",
                                0.08,
                                0.076,
                                -5,
                                0.25,
                                0,
                                Optional.empty(),
                                4000)),
                List.of(
                        new AssumptionSwitch(
                                "North cliff",
                                NextMeasurement.FLIGHT,
                                "recording falls with age",
                                "yes",
                                "no",
                                rate(0.435),
                                Optional.of(rate(0.43))),
                        new AssumptionSwitch(
                                "North cliff",
                                "T4",
                                "an indicative range means",
                                "quadrature",
                                "uniform",
                                rate(0.436),
                                Optional.empty())),
                List.of(new SampleLeftOut(
                        "North cliff",
                        "T4",
                        "C-1",
                        Optional.of(rate(0.436)),
                        Optional.empty(),
                        Optional.of(rate(0.435)),
                        Optional.of(rate(0.41)))),
                List.of(new CurveLeftOut(
                        "North cliff", NextMeasurement.FLIGHT, "made-up-curve", 0.75, rate(0.435), rate(0.45))));
    }

    /** A tornado of three inputs. */
    public static LevelTornado tornado(String site, String level, double rate) {
        return new LevelTornado(
                site,
                level,
                Optional.of("5e"),
                rate,
                List.of(
                        bar("shared offset", "m", 0, 3, rate, -0.0244),
                        bar("survey", "m", 61.4, 1.5, rate, 0.0122),
                        bar("age", "ka", 122.5, 2, rate, -0.007)),
                List.of(new OtherStage("5a", 0.25, 0.9)));
    }

    private static Bar bar(String input, String unit, double middle, double sigma, double rate, double step) {
        return new Bar(
                input,
                unit,
                new Interval(middle - sigma, middle + sigma),
                new Interval(middle - 2 * sigma, middle + 2 * sigma),
                rate - step,
                rate + step,
                rate - 2 * step,
                rate + 2 * step);
    }

    private static ShortRate rate(double median) {
        return new ShortRate(median, new Interval(median - 0.04, median + 0.04));
    }
}
