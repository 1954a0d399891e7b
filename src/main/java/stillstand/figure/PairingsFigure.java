package stillstand.figure;

import java.awt.Color;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import org.jfree.chart.axis.NumberAxis;
import org.jfree.chart.plot.XYPlot;
import stillstand.figure.SiteView.Claim;
import stillstand.figure.SiteView.LevelView;
import stillstand.study.StudyResult.HighstandUsed;
import stillstand.uplift.FlightResult;

/** Which level records which highstand: a cell for each pair, as dark as it is probable. */
final class PairingsFigure {
    private static final double ROW = 13;
    private static final double LEAST = 0.005;
    private static final String NONE = "none";

    private PairingsFigure() {}

    static Page page(String name, SiteView site, FlightResult flight, double widthPoints) {
        List<LevelView> levels = site.downwards().stream()
                .filter(level -> flight.probabilityUnmatched(level.name()).isPresent())
                .toList();
        List<String> columns = columns(site, levels);
        List<String> names = new ArrayList<>(List.of(""));
        levels.forEach(level -> names.add(level.name()));
        NumberAxis across = Style.axis("", -0.5, columns.size() - 0.5);
        across.setVisible(false);
        XYPlot plot = Rows.plot(across, names, List.of(), widthPoints);
        Layer.add(plot, pen -> {
            headings(pen, columns);
            for (int row = 0; row < levels.size(); row++) {
                LevelView level = levels.get(row);
                Map<String, Double> cells = new LinkedHashMap<>();
                level.claims().forEach(claim -> cells.merge(claim.highstand(), claim.probability(), Double::sum));
                cells.put(NONE, flight.probabilityUnmatched(level.name()).orElse(0.0));
                for (int column = 0; column < columns.size(); column++) {
                    cell(pen, column, row + 1, cells.getOrDefault(columns.get(column), 0.0), columns.get(column));
                }
            }
        });
        return new Page(
                name,
                site.site() + ": which level records which highstand",
                List.of(),
                Style.chart(plot),
                "Probability in percent; highest level on top, highstands from young to old. “none”: the level is no shoreline of a"
                        + " highstand.",
                widthPoints,
                names.size() * ROW + 2);
    }

    /** Highstands that some level may record, young to old, and none. */
    private static List<String> columns(SiteView site, List<LevelView> levels) {
        List<String> columns = new ArrayList<>(levels.stream()
                .flatMap(level -> level.claims().stream())
                .filter(claim -> claim.probability() >= LEAST)
                .map(Claim::highstand)
                .distinct()
                .sorted(Comparator.comparingDouble(stage -> age(site, stage)))
                .toList());
        columns.add(NONE);
        return columns;
    }

    private static double age(SiteView site, String stage) {
        HighstandUsed stand = site.stands().get(stage);
        return stand == null ? Double.MAX_VALUE : stand.ageKa();
    }

    /** Labels above their columns; every other one a little higher where they are wider than a column. */
    private static void headings(Pen pen, List<String> columns) {
        double cell = pen.x(1) - pen.x(0);
        boolean wide = columns.stream()
                .anyMatch(stage -> Face.width(stage, Face.REGULAR.at(Style.SMALL, List.of(stage))) > cell - 1.5);
        for (int column = 0; column < columns.size(); column++) {
            double above = wide ? (column % 2 == 0 ? -3 : 3.2) : 0;
            pen.text(
                    columns.get(column),
                    Math.min(pen.x(column), pen.right() - 6.5),
                    pen.y(0) + above,
                    Pen.Anchor.MIDDLE,
                    Face.REGULAR,
                    Style.SMALL,
                    Style.INK);
        }
    }

    private static void cell(Pen pen, int column, int row, double probability, String stage) {
        double left = pen.x(column - 0.5) + 0.5;
        double right = pen.x(column + 0.5) - 0.5;
        double top = pen.y(row - 0.5) + 0.5;
        double bottom = pen.y(row + 0.5) - 0.5;
        Color full = stage.equals(NONE) ? Style.MUTED : Style.LINK;
        Color shade = probability < LEAST
                ? Style.between(Style.PAPER, Style.HAIR, 0.45)
                : Style.between(Style.PAPER, full, 0.12 + 0.88 * probability);
        pen.box(left, top, right, bottom, shade);
        if (probability >= LEAST) {
            pen.text(
                    Numbers.percent(probability),
                    (left + right) / 2,
                    (top + bottom) / 2,
                    Pen.Anchor.MIDDLE,
                    Face.REGULAR,
                    Style.SMALL,
                    probability > 0.45 ? Style.PAPER : Style.INK);
        }
    }
}
