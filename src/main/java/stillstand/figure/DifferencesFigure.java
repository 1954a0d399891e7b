package stillstand.figure;

import java.util.List;
import org.jfree.chart.plot.XYPlot;
import stillstand.comparison.SiteComparison;
import stillstand.study.StudyResult;

/** Differences between sites, with what they share kept shared, above the wrong answer that takes them for independent. */
final class DifferencesFigure {
    private static final double ROW = 14;
    private static final int MOST_ROWS = 60;

    private DifferencesFigure() {}

    static boolean has(StudyResult result) {
        return !result.comparison().isEmpty();
    }

    /** Draws are too few to say 100. */
    private static String percent(double probability) {
        String percent = Numbers.percent(probability);
        return percent.equals("100") ? ">99" : percent;
    }

    static Page page(String name, StudyResult result, double widthPoints) {
        List<SiteComparison> pairs =
                result.comparison().stream().limit(MOST_ROWS).toList();
        XYPlot plot = Rows.plot(
                Rows.around(
                        Style::axis,
                        "Difference of rates (m/kyr)",
                        pairs.stream()
                                .flatMap(pair -> List.of(
                                        0.0,
                                        pair.difference().shortest95().low(),
                                        pair.difference().shortest95().high(),
                                        pair.independent()
                                                .difference()
                                                .interval95()
                                                .low(),
                                        pair.independent()
                                                .difference()
                                                .interval95()
                                                .high())
                                        .stream())),
                pairs.stream().map(pair -> pair.a() + " less " + pair.b()).toList(),
                pairs.stream()
                        .map(pair -> Numbers.rate(pair.difference()) + ", " + percent(pair.probabilityAFaster()) + " %")
                        .toList(),
                widthPoints);
        Rows.grid(plot);
        Layer.add(plot, pen -> {
            for (int i = 0; i < pairs.size(); i++) {
                SiteComparison pair = pairs.get(i);
                double y = pen.y(i);
                RateMarks.bars(
                        pen,
                        y + 4,
                        List.of(pair.independent().difference().interval95()),
                        List.of(pair.independent().difference().interval68()),
                        Style.SEA_68);
                RateMarks.bars(
                        pen,
                        y,
                        List.of(pair.difference().shortest95()),
                        List.of(pair.difference().shortest68()),
                        Style.LINK);
                pen.dot(pen.x(pair.difference().median()), y, 2, Style.INK);
            }
        });
        int left = result.comparison().size() - pairs.size();
        return new Page(
                name,
                "Differences between sites",
                List.of(
                        new Page.KeyEntry(
                                "68 and 95 %, what sites share kept shared",
                                (pen, x, y) -> {
                                    pen.line(x, y, x + Page.KeyEntry.SWATCH, y, Style.LINK, Style.line(1));
                                    pen.line(x + 3, y, x + Page.KeyEntry.SWATCH - 3, y, Style.LINK, Style.line(3));
                                }),
                        new Page.KeyEntry(
                                "taken for independent (wrong)",
                                (pen, x, y) ->
                                        pen.line(x, y, x + Page.KeyEntry.SWATCH, y, Style.SEA_68, Style.line(3)))),
                Style.chart(plot),
                "To the right: median and shortest 95 % interval, m/kyr, and the probability that the first is faster."
                        + (left > 0 ? " " + left + " more pairs stand in comparison.csv." : ""),
                widthPoints,
                Rows.height(pairs.size(), ROW));
    }
}
