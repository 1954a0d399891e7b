package stillstand;

import java.util.List;
import java.util.Optional;
import stillstand.comparison.Estimate;
import stillstand.comparison.PlanarTilt;
import stillstand.comparison.PooledRates;
import stillstand.comparison.SiteComparison;
import stillstand.comparison.SiteGroup;
import stillstand.comparison.SiteMotion;
import stillstand.comparison.TerraceTilt;
import stillstand.comparison.Tilt;
import stillstand.uncertainty.Interval;
import stillstand.uplift.Quantity;
import stillstand.uplift.Rate;

/** Invented comparisons of sites that use every component of the records once. */
final class SampleComparison {
    private static final String PER_KM = "m/kyr per km";

    private SampleComparison() {}

    static List<SiteComparison> pairs() {
        return List.of(new SiteComparison(
                "North cliff",
                "South cliff",
                Optional.of("T4"),
                Optional.of("S1"),
                rate(0.4, 0.02),
                1,
                Optional.of(0.5),
                new SiteComparison.Independent(quantity(0.4, 0.03), 0.96875),
                SiteComparison.ONE_COAST,
                Optional.empty()));
    }

    static List<SiteMotion> motions() {
        return List.of(
                new SiteMotion(
                        "North cliff",
                        Optional.of("east"),
                        Optional.of("T4"),
                        Optional.of(5.5),
                        Optional.of(-3.25),
                        Optional.of(0.0),
                        Optional.of(12.0),
                        quantity(0.43, 0.02),
                        1,
                        0,
                        0,
                        SiteMotion.UP),
                new SiteMotion(
                        "South cliff",
                        Optional.of("east"),
                        Optional.of("S1"),
                        Optional.of(5.25),
                        Optional.of(-3.5),
                        Optional.of(30.0),
                        Optional.empty(),
                        quantity(0.03, 0.02),
                        0.25,
                        0.75,
                        0,
                        SiteMotion.STABLE));
    }

    static List<SiteGroup> groups() {
        Tilt.Line line = new Tilt.Line(
                new Estimate(0.43, 0.03, "m/kyr"),
                new Estimate(-0.013, 0.001, PER_KM),
                -2e-5,
                1.25,
                1,
                Optional.of(0.25));
        PlanarTilt.Plane plane = new PlanarTilt.Plane(
                new Estimate(0.2, 0.03, "m/kyr"),
                new Estimate(0.01, 0.001, PER_KM),
                new Estimate(0, 0.001, PER_KM),
                new Estimate(0.01, 0.001, PER_KM),
                90,
                1.25,
                1,
                Optional.of(0.25));
        return List.of(new SiteGroup(
                "east",
                List.of("North cliff", "South cliff"),
                Optional.of(new PooledRates(
                        quantity(0.2, 0.1),
                        quantity(0.1, 0.03),
                        0.1,
                        List.of(
                                new PooledRates.PooledSite("North cliff", quantity(0.42, 0.02)),
                                new PooledRates.PooledSite("South cliff", quantity(0.04, 0.02))))),
                Optional.of(new Tilt(line, line)),
                Optional.of(new PlanarTilt(5.375, -3.375, plane, plane)),
                Optional.of(quantity(0.2, 0.02)),
                Optional.empty()));
    }

    static List<TerraceTilt> tilts() {
        Tilt.Line line = new Tilt.Line(
                new Estimate(61, 1, "m"), new Estimate(-0.5, 0.125, "m per km"), -0.02, 3.5, 4, Optional.of(0.5));
        return List.of(new TerraceTilt(
                "North cliff",
                "T4",
                6,
                Optional.of(new Tilt(line, line)),
                Optional.empty(),
                Optional.of(new Estimate(-0.004, 0.001, PER_KM))));
    }

    private static Quantity quantity(double median, double sd) {
        return new Quantity(
                median,
                Optional.of(median),
                Optional.of(sd),
                new Interval(median - sd, median + sd),
                new Interval(median - 2 * sd, median + 2 * sd),
                "m/kyr");
    }

    private static Rate rate(double median, double sd) {
        Interval inner = new Interval(median - sd, median + sd);
        Interval outer = new Interval(median - 2 * sd, median + 2 * sd);
        return new Rate(
                median, Optional.of(median), Optional.of(sd), inner, outer, inner, outer, Optional.empty(), Rate.UNIT);
    }
}
