package stillstand.figure;

import java.util.List;
import java.util.stream.Stream;
import org.jfree.chart.axis.NumberAxis;
import org.jfree.chart.plot.XYPlot;
import stillstand.uplift.FlightResult;
import stillstand.uplift.FlightResult.Fate;
import stillstand.uplift.FlightResult.Segment;
import stillstand.uplift.Rate;
import stillstand.uplift.RateHistory;

/** The rate through time where it changes: a step for each stretch, with its intervals. */
final class HistoryFigure {
    private static final double HEIGHT = 130;

    private HistoryFigure() {}

    static Page page(String name, SiteView site, FlightResult flight, double widthPoints) {
        List<Segment> segments = flight.history().map(RateHistory::bins).orElse(flight.segments());
        double oldest = oldest(flight);
        NumberAxis ages = Style.axis("Age (ka)", 0, oldest);
        ages.setInverted(true);
        NumberAxis rates = Rows.around(
                Style::upright,
                RateMarks.AXIS,
                segments.stream()
                        .flatMap(segment -> Stream.of(
                                segment.rate().shortest95().low(),
                                segment.rate().shortest95().high())));
        XYPlot plot = Style.plot(ages, rates);
        Style.levelGrid(plot);
        Layer.add(plot, pen -> segments.forEach(segment -> paint(pen, segment, oldest)));
        return new Page(
                name,
                site.site() + ": the rate through time",
                List.of(
                        new Page.KeyEntry(
                                "median",
                                (pen, x, y) -> pen.line(x, y, x + Page.KeyEntry.SWATCH, y, Style.SEA, Style.line(1.4))),
                        new Page.KeyEntry("68 %", (pen, x, y) -> pen.box(x, y - 3, x + 13, y + 3, Style.SEA_68)),
                        new Page.KeyEntry("95 %", (pen, x, y) -> pen.box(x, y - 3, x + 13, y + 3, Style.SEA_95))),
                Style.chart(plot),
                "Model: " + flight.model() + ". The text in each stretch: median and shortest 95 % interval, m/kyr.",
                widthPoints,
                HEIGHT);
    }

    private static double oldest(FlightResult flight) {
        double recorded = flight.missing().stream()
                .filter(fate -> fate.recorded() > 0.05)
                .mapToDouble(Fate::ageKa)
                .max()
                .orElse(0);
        double change =
                flight.segments().stream().mapToDouble(Segment::fromKa).max().orElse(0);
        return 1.05 * Math.max(Math.max(recorded, 1.3 * change), 10);
    }

    private static void paint(Pen pen, Segment segment, double oldest) {
        double from = pen.x(segment.fromKa());
        double to = pen.x(segment.toKa().orElse(oldest));
        Rate rate = segment.rate();
        pen.box(
                from,
                pen.y(rate.shortest95().low()),
                to,
                pen.y(rate.shortest95().high()),
                Style.SEA_95);
        pen.box(
                from,
                pen.y(rate.shortest68().low()),
                to,
                pen.y(rate.shortest68().high()),
                Style.SEA_68);
        double y = pen.y(rate.median());
        pen.line(from, y, to, y, Style.SEA, Style.line(1.4));
        String text = Face.fitted(Numbers.rate(rate), Style.small(), Math.abs(to - from) - 4);
        pen.text(text, (from + to) / 2, y - 6, Pen.Anchor.MIDDLE, Face.REGULAR, Style.SMALL, Style.INK);
    }
}
