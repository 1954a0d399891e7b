package stillstand.figure;

import java.util.Comparator;
import java.util.List;
import java.util.stream.Stream;
import org.jfree.chart.plot.XYPlot;
import stillstand.uncertainty.Interval;
import stillstand.uplift.LevelResidual;

/** Measured less predicted heights of a flight, with one and two standard deviations of the difference. */
final class ResidualsFigure {
    private static final double ROW = 12;

    private ResidualsFigure() {}

    static Page page(String name, SiteView site, double widthPoints) {
        List<LevelResidual> rows = site.residuals().stream()
                .sorted(Comparator.comparingDouble(LevelResidual::measuredMetres)
                        .reversed())
                .toList();
        XYPlot plot = Rows.plot(
                Rows.around(
                        Style::axis,
                        "Measured less predicted height (m)",
                        Stream.concat(
                                Stream.of(0.0), rows.stream().flatMap(row -> Stream.of(low(row, 2), high(row, 2))))),
                rows.stream().map(LevelResidual::level).toList(),
                rows.stream()
                        .map(row -> Numbers.plusMinus(difference(row), row.sigmaMetres()))
                        .toList(),
                widthPoints);
        Rows.grid(plot);
        Layer.add(plot, pen -> {
            for (int i = 0; i < rows.size(); i++) {
                LevelResidual row = rows.get(i);
                RateMarks.bars(
                        pen,
                        pen.y(i),
                        List.of(new Interval(low(row, 2), high(row, 2))),
                        List.of(new Interval(low(row, 1), high(row, 1))),
                        Style.SEA);
                pen.dot(pen.x(difference(row)), pen.y(i), 2, Style.INK);
            }
        });
        return new Page(
                name,
                site.site() + ": measured against predicted heights",
                List.of(
                        new Page.KeyEntry(
                                "1 sigma",
                                (pen, x, y) -> pen.line(x, y, x + Page.KeyEntry.SWATCH, y, Style.SEA, Style.line(3))),
                        new Page.KeyEntry(
                                "2 sigma",
                                (pen, x, y) -> pen.line(x, y, x + Page.KeyEntry.SWATCH, y, Style.SEA, Style.line(1)))),
                Style.chart(plot),
                "Each level against the highstand that it most probably records. To the right: difference, m, with 1 sigma.",
                widthPoints,
                Rows.height(rows.size(), ROW));
    }

    private static double difference(LevelResidual row) {
        return row.measuredMetres() - row.predictedMetres();
    }

    private static double low(LevelResidual row, double sigmas) {
        return difference(row) - sigmas * row.sigmaMetres();
    }

    private static double high(LevelResidual row, double sigmas) {
        return difference(row) + sigmas * row.sigmaMetres();
    }
}
