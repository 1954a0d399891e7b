package stillstand.figure;

import java.util.ArrayList;
import java.util.List;
import org.jfree.chart.plot.XYPlot;
import stillstand.uncertainty.Interval;
import stillstand.uplift.FlightResult;
import stillstand.uplift.Rate;

/** Densities of the rates of a site, a hill for each level, that of the flight on top. */
final class RatesFigure {
    private static final double ROW = 25;
    private static final double HILL = 15;

    private RatesFigure() {}

    /** A row: a rate with the regions that hold most of it. */
    private record Row(String name, Rate rate, List<Interval> inner, List<Interval> outer, boolean ofFlight) {
        static Row of(FlightResult flight) {
            return new Row("whole flight", flight.rate(), flight.regions68(), flight.regions95(), true);
        }

        static Row of(String name, Rate rate) {
            return new Row(name, rate, List.of(rate.shortest68()), List.of(rate.shortest95()), false);
        }
    }

    static boolean has(SiteView site) {
        return !rows(site).isEmpty();
    }

    private static List<Row> rows(SiteView site) {
        List<Row> rows = new ArrayList<>();
        site.flight().ifPresent(flight -> rows.add(Row.of(flight)));
        site.downwards()
                .forEach(level -> level.answer().rate().ifPresent(rate -> rows.add(Row.of(level.name(), rate))));
        return rows;
    }

    static Page page(String name, SiteView site, double widthPoints) {
        List<Row> rows = rows(site);
        XYPlot plot = Rows.plot(
                RateMarks.axis(rows.stream().map(Row::rate).toList()),
                rows.stream().map(Row::name).toList(),
                rows.stream().map(row -> Numbers.rate(row.rate())).toList(),
                widthPoints);
        Rows.grid(plot);
        Layer.add(plot, pen -> {
            for (int i = 0; i < rows.size(); i++) {
                paint(pen, rows.get(i), pen.y(i) + 0.3 * HILL);
            }
        });
        return new Page(
                name,
                site.site() + ": rates",
                RateMarks.key(),
                Style.chart(plot),
                "To the right: median and shortest 95 % interval, m/kyr. Each hill has its own scale; an arrow head: the interval"
                        + " goes on.",
                widthPoints,
                Rows.height(rows.size(), ROW));
    }

    private static void paint(Pen pen, Row row, double base) {
        row.rate()
                .density()
                .ifPresent(density -> RateMarks.hill(
                        pen,
                        base,
                        HILL,
                        density,
                        row.ofFlight() ? Style.LINK_FAINT : Style.SEA_95,
                        row.ofFlight() ? Style.LINK : Style.SEA));
        RateMarks.bars(pen, base + 3, row.outer(), row.inner(), row.ofFlight() ? Style.LINK : Style.SEA);
        pen.dot(pen.x(row.rate().median()), base + 3, 2, Style.INK);
    }
}
