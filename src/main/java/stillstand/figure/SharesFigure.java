package stillstand.figure;

import java.awt.Color;
import java.awt.geom.Rectangle2D;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.jfree.chart.axis.NumberAxis;
import org.jfree.chart.plot.XYPlot;
import stillstand.uplift.FlightResult;
import stillstand.uplift.FlightResult.Fate;
import stillstand.uplift.LevelAnswer.Budget;
import stillstand.uplift.LevelAnswer.Share;

/** Wholes and their parts, a bar for each: the error budget of levels, the fates of highstands. */
final class SharesFigure {
    private static final double ROW = 13;
    private static final double HALF_BAR = 4.2;
    private static final double LEAST_WITH_TEXT = 11;
    private static final double SURELY = 0.99;
    private static final double IDLE = 0.1;
    private static final double LEAST_IN_KEY = 0.0005;

    private SharesFigure() {}

    /** A row and its parts, one for each name of the key. */
    private record Row(String name, String right, List<Double> parts) {}

    static boolean hasBudget(SiteView site) {
        return site.levels().stream().anyMatch(level -> level.answer().budget().isPresent());
    }

    /** Shares of the variance of each level's rate. */
    static Page budget(String name, SiteView site, double widthPoints) {
        List<Row> rows = new ArrayList<>();
        site.downwards()
                .forEach(level -> level.answer()
                        .budget()
                        .ifPresent(budget -> rows.add(new Row(
                                level.name(),
                                level.answer()
                                        .rate()
                                        .map(rate -> "± "
                                                + Numbers.rounded(
                                                        rate.interval68().width() / 2,
                                                        rate.interval68().width() / 2))
                                        .orElse(""),
                                parts(budget)))));
        return page(
                name,
                site.site() + ": where the spread of each rate comes from",
                List.of("elevation", "depth of growth", "age", "sea level", "surface lowering", "together only"),
                rows,
                "Part of the variance of the rate (%)",
                "First-order shares; “together only” is what inputs do in concert. To the right: half the 68 % interval, m/kyr.",
                widthPoints);
    }

    private static List<Double> parts(Budget budget) {
        List<Double> parts = new ArrayList<>();
        for (Optional<Share> share : List.of(
                budget.elevation(), budget.palaeodepth(), budget.age(), budget.seaLevel(), budget.surfaceLowering())) {
            parts.add(Math.max(0, share.map(Share::share).orElse(0.0)));
        }
        double sum = parts.stream().mapToDouble(Double::doubleValue).sum();
        if (sum > 1) {
            parts.replaceAll(part -> part / sum);
        }
        parts.add(Math.max(0, 1 - sum));
        return parts;
    }

    /** What became of the shoreline of each highstand. */
    static Page fates(String name, SiteView site, FlightResult flight, double widthPoints) {
        List<Row> rows = new ArrayList<>();
        for (Fate fate : flight.missing()) {
            if (fate.outside() > SURELY || isIdleOlder(fate)) {
                continue;
            }
            rows.add(new Row(
                    fate.highstand().equals(SiteView.OLDER)
                            ? Numbers.rounded(fate.ageKa(), 1) + " ka"
                            : fate.highstand(),
                    Numbers.plusMinus(fate.heightMetres(), fate.heightSigmaMetres()),
                    List.of(fate.recorded(), fate.unseen(), fate.reoccupied(), fate.outside(), fate.absent())));
        }
        return page(
                name,
                site.site() + ": what became of each shoreline",
                List.of(
                        "recorded by a level",
                        "in view, not found",
                        "overrun by a younger sea",
                        "outside the survey",
                        "no such highstand"),
                rows,
                "Probability (%)",
                "To the right: height of the shoreline today as the flight predicts it, m, with one standard deviation. Left out: those surely"
                        + " outside the survey, and nameless ones beyond the curve that left nothing in view.",
                widthPoints);
    }

    /** A generic highstand beyond the curve that no level records and that most likely left nothing in view. */
    private static boolean isIdleOlder(Fate fate) {
        return fate.highstand().equals(SiteView.OLDER) && fate.recorded() < IDLE && fate.unseen() < IDLE;
    }

    private static Page page(
            String name,
            String title,
            List<String> key,
            List<Row> rows,
            String axisLabel,
            String note,
            double widthPoints) {
        NumberAxis axis = Style.axis(axisLabel, 0, 100);
        XYPlot plot = Rows.plot(
                axis,
                rows.stream().map(Row::name).toList(),
                rows.stream().map(Row::right).toList(),
                widthPoints);
        Layer.add(plot, pen -> {
            for (int i = 0; i < rows.size(); i++) {
                paint(pen, rows.get(i).parts(), pen.y(i));
            }
        });
        List<Page.KeyEntry> entries = new ArrayList<>();
        for (int i = 0; i < key.size(); i++) {
            int part = i;
            if (rows.stream().noneMatch(row -> row.parts().get(part) > LEAST_IN_KEY)) {
                continue;
            }
            Color colour = Style.SHARES.get(i);
            entries.add(new Page.KeyEntry(key.get(i), (pen, x, y) -> segment(pen, x + 2, x + 12, y, 3, colour)));
        }
        return new Page(name, title, entries, Style.chart(plot), note, widthPoints, Rows.height(rows.size(), ROW));
    }

    private static void paint(Pen pen, List<Double> parts, double y) {
        double from = 0;
        for (int i = 0; i < parts.size(); i++) {
            double to = from + 100 * parts.get(i);
            double left = pen.x(from);
            double right = pen.x(Math.min(to, 100));
            if (right - left > 0.3) {
                segment(pen, left, right, y, HALF_BAR, Style.SHARES.get(i));
            }
            if (right - left > LEAST_WITH_TEXT) {
                Color ink = i < 2 ? Style.PAPER : Style.INK;
                String percent = Numbers.percent(parts.get(i));
                pen.text(percent, (left + right) / 2, y, Pen.Anchor.MIDDLE, Face.REGULAR, Style.SMALL, ink);
            }
            from = to;
        }
    }

    private static void segment(Pen pen, double left, double right, double y, double half, Color colour) {
        Rectangle2D box = new Rectangle2D.Double(left, y - half, right - left, 2 * half);
        pen.fill(box, colour);
        pen.draw(box, Style.MUTED, Style.line(0.35));
    }
}
