package stillstand.figure;

import java.awt.Color;
import java.awt.geom.Rectangle2D;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.stream.Stream;
import org.jfree.chart.plot.XYPlot;
import stillstand.figure.SiteView.LevelView;
import stillstand.sensitivity.LevelTornado;
import stillstand.sensitivity.LevelTornado.Bar;
import stillstand.uncertainty.Interval;

/** One-at-a-time ranges: for each level of a site a bar for each input, the longest on top, about the rate at the medians. */
final class TornadoFigure {
    private static final double ROW = 11;
    private static final double HALF_BAR_68 = 3.4;
    private static final double HALF_BAR_95 = 1.5;
    /** Bars shorter than this part of the longest of their level are left out. */
    private static final double LEAST = 0.02;

    private static final Color LOW = Style.SHARES.get(3);
    private static final Color HIGH = Style.SEA;

    private TornadoFigure() {}

    /** A line of the figure: the name of a level, or one of its bars. */
    private record Row(String name, String right, double rate, Optional<Bar> bar) {}

    static boolean has(List<LevelTornado> tornados) {
        return tornados.stream().anyMatch(tornado -> !tornado.bars().isEmpty());
    }

    static Page page(String name, SiteView site, List<LevelTornado> tornados, double widthPoints) {
        List<Row> rows = new ArrayList<>();
        for (LevelView level : site.downwards()) {
            tornados.stream()
                    .filter(tornado -> tornado.level().equals(level.name()))
                    .forEach(tornado -> rows.addAll(rows(tornado)));
        }
        XYPlot plot = Rows.plot(
                Rows.around(
                        Style::axis,
                        "Change of the rate (m/kyr)",
                        Stream.concat(Stream.of(0.0), rows.stream().flatMap(TornadoFigure::ends))),
                rows.stream().map(Row::name).toList(),
                rows.stream().map(Row::right).toList(),
                widthPoints);
        Rows.grid(plot);
        Layer.add(plot, pen -> {
            for (int i = 0; i < rows.size(); i++) {
                paint(pen, rows.get(i), pen.y(i));
            }
        });
        return new Page(
                name,
                site.site() + ": what each input does to the rate by itself",
                List.of(
                        new Page.KeyEntry("input at its low end", (pen, x, y) -> box(pen, x + 2, x + 12, y, 3, LOW)),
                        new Page.KeyEntry("at its high end", (pen, x, y) -> box(pen, x + 2, x + 12, y, 3, HIGH)),
                        new Page.KeyEntry(
                                "thick 68 %, thin 95 %",
                                (pen, x, y) -> pen.line(x + 2, y, x + 12, y, Style.INK, Style.line(1)))),
                Style.chart(plot),
                "All other inputs at their medians. To the right: rate at the medians, m/kyr, and 95 % range of each input. Bars do not"
                        + " add up to the spread of the rate.",
                widthPoints,
                Rows.height(rows.size(), ROW));
    }

    private static List<Row> rows(LevelTornado tornado) {
        List<Row> rows = new ArrayList<>();
        double longest = tornado.bars().stream().mapToDouble(Bar::span95).max().orElse(0);
        if (!(longest > 0)) {
            return rows;
        }
        String title =
                tornado.level() + tornado.stage().map(stage -> " at " + stage).orElse("");
        rows.add(new Row(title, Numbers.rounded(tornado.rate(), longest / 4), tornado.rate(), Optional.empty()));
        for (Bar bar : tornado.bars()) {
            if (bar.span95() >= LEAST * longest) {
                rows.add(new Row("– " + bar.input(), range(bar), tornado.rate(), Optional.of(bar)));
            }
        }
        return rows;
    }

    /** {@code 57.1 to 65.8 m}. */
    private static String range(Bar bar) {
        Interval values = bar.input95();
        double sigma = values.width() / 4;
        String unit = bar.unit().equals("sigma") ? "σ" : bar.unit();
        return Numbers.rounded(values.low(), sigma) + " to " + Numbers.rounded(values.high(), sigma) + " " + unit;
    }

    private static Stream<Double> ends(Row row) {
        return row.bar().stream()
                .flatMap(bar -> Stream.of(bar.rateAtLow95() - row.rate(), bar.rateAtHigh95() - row.rate()));
    }

    private static void paint(Pen pen, Row row, double y) {
        if (row.bar().isEmpty()) {
            double above = y - ROW / 2;
            pen.line(pen.left(), above, pen.right(), above, Style.MUTED, Style.line(0.5));
        }
        row.bar().ifPresent(bar -> {
            halves(pen, y, bar.rateAtLow95() - row.rate(), bar.rateAtHigh95() - row.rate(), HALF_BAR_95);
            halves(pen, y, bar.rateAtLow68() - row.rate(), bar.rateAtHigh68() - row.rate(), HALF_BAR_68);
        });
    }

    /** Both ends of an input; where they move the rate the same way, the low end above the high one. */
    private static void halves(Pen pen, double y, double atLow, double atHigh, double halfHeight) {
        boolean sameSide = atLow * atHigh > 0;
        double shift = sameSide ? halfHeight / 2 : 0;
        half(pen, y - shift, atLow, halfHeight - shift, LOW);
        half(pen, y + shift, atHigh, halfHeight - shift, HIGH);
    }

    private static void half(Pen pen, double y, double change, double halfHeight, Color colour) {
        box(pen, pen.x(Math.min(0, change)), pen.x(Math.max(0, change)), y, halfHeight, colour);
    }

    private static void box(Pen pen, double left, double right, double y, double halfHeight, Color colour) {
        pen.fill(new Rectangle2D.Double(left, y - halfHeight, right - left, 2 * halfHeight), colour);
    }
}
