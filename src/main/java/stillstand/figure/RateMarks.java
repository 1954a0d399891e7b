package stillstand.figure;

import java.awt.Color;
import java.awt.geom.Path2D;
import java.util.List;
import java.util.stream.Stream;
import org.jfree.chart.axis.NumberAxis;
import stillstand.uncertainty.DensityBins;
import stillstand.uncertainty.Interval;
import stillstand.uplift.Rate;

/** Marks of rates that several figures share: bars of intervals, and densities as hills. */
final class RateMarks {
    static final String AXIS = "Rate (m/kyr, uplift positive)";

    private static final double HEAD = 3;
    private static final double ROOM = 0.5;

    private RateMarks() {}

    /**
     * An axis for rates of very different spread: all 68 % intervals, and of the 95 % intervals what lies within half as much
     * again. A bar that goes on has a head.
     */
    static NumberAxis axis(List<Rate> rates) {
        double low = least(rates.stream().map(rate -> rate.shortest68().low()));
        double high = greatest(rates.stream().map(rate -> rate.shortest68().high()));
        double room = ROOM * (high - low);
        double from = Math.max(
                low - room, least(rates.stream().map(rate -> rate.shortest95().low())));
        double to = Math.min(
                high + room,
                greatest(rates.stream().map(rate -> rate.shortest95().high())));
        return Rows.around(Style::axis, AXIS, Stream.of(from, to));
    }

    private static double least(Stream<Double> values) {
        return values.mapToDouble(Double::doubleValue).min().orElse(0);
    }

    private static double greatest(Stream<Double> values) {
        return values.mapToDouble(Double::doubleValue).max().orElse(1);
    }

    /** Bars of intervals: thin for 95 %, thick for 68 %, and heads where they leave the plot. */
    static void bars(Pen pen, double y, List<Interval> thin, List<Interval> thick, Color colour) {
        thin.forEach(interval -> bar(pen, y, interval, 1, colour));
        thick.forEach(interval -> bar(pen, y, interval, 3, colour));
    }

    private static void bar(Pen pen, double y, Interval interval, double widthPoints, Color colour) {
        double from = Math.max(pen.x(interval.low()), pen.left());
        double to = Math.min(pen.x(interval.high()), pen.right());
        if (from >= pen.right() || to <= pen.left()) {
            return;
        }
        pen.line(from, y, to, y, colour, Style.line(widthPoints));
        if (pen.x(interval.low()) < pen.left()) {
            head(pen, pen.left(), y, HEAD, colour);
        }
        if (pen.x(interval.high()) > pen.right()) {
            head(pen, pen.right(), y, -HEAD, colour);
        }
    }

    private static void head(Pen pen, double x, double y, double back, Color colour) {
        Path2D path = new Path2D.Double();
        path.moveTo(x, y);
        path.lineTo(x + back, y - HEAD * 0.8);
        path.lineTo(x + back, y + HEAD * 0.8);
        path.closePath();
        pen.fill(path, colour);
    }

    /** A density as a hill of that height on a base line. */
    static void hill(Pen pen, double base, double height, DensityBins density, Color fill, Color edge) {
        List<Double> values = density.values();
        double most = values.stream().mapToDouble(Double::doubleValue).max().orElse(0);
        if (!(most > 0)) {
            return;
        }
        double step = (density.to() - density.from()) / values.size();
        Path2D ridge = new Path2D.Double();
        ridge.moveTo(pen.x(density.from()), base);
        for (int i = 0; i < values.size(); i++) {
            ridge.lineTo(pen.x(density.from() + (i + 0.5) * step), base - height * values.get(i) / most);
        }
        ridge.lineTo(pen.x(density.to()), base);
        pen.fill(ridge, fill);
        pen.draw(ridge, edge, Style.line(0.6));
    }

    /** What the bars mean. */
    static List<Page.KeyEntry> key() {
        double swatch = Page.KeyEntry.SWATCH;
        return List.of(
                new Page.KeyEntry("median", (pen, x, y) -> pen.dot(x + swatch / 2, y, 2, Style.INK)),
                new Page.KeyEntry("68 %", (pen, x, y) -> pen.line(x, y, x + swatch, y, Style.INK, Style.line(3))),
                new Page.KeyEntry(
                        "95 %, shortest", (pen, x, y) -> pen.line(x, y, x + swatch, y, Style.INK, Style.line(1))));
    }
}
