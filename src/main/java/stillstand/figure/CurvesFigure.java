package stillstand.figure;

import java.awt.Color;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.stream.DoubleStream;
import java.util.stream.Stream;
import org.jfree.chart.axis.NumberAxis;
import org.jfree.chart.plot.XYPlot;
import stillstand.study.StudyResult.CurvePoint;
import stillstand.study.StudyResult.CurveUsed;
import stillstand.study.StudyResult.HighstandUsed;
import stillstand.study.StudyResult.SeaLevelUsed;

/** The curves of a study with their bands, and the highstands in use: picked from a curve, or of another source. */
final class CurvesFigure {
    private static final double HEIGHT = 170;

    private CurvesFigure() {}

    static boolean has(SeaLevelUsed sea) {
        return !sea.curves().isEmpty() || !sea.highstands().isEmpty();
    }

    static Page page(String name, SeaLevelUsed sea, double widthPoints) {
        List<CurveUsed> curves = SeaLine.byWeight(sea.curves());
        List<HighstandUsed> stands = stands(sea);
        double oldest = oldest(curves, stands);
        NumberAxis ages = Style.axis("Age (ka)", 0, 1.01 * oldest);
        ages.setInverted(true);
        XYPlot plot = Style.plot(ages, levels(curves, stands));
        Style.levelGrid(plot);
        List<String> ids = curves.stream().map(CurveUsed::id).toList();
        Layer.add(plot, pen -> {
            SeaLine.paint(pen, curves, oldest);
            StageComb.paint(pen, pen.right(), teeth(pen, stands));
            stands.forEach(stand -> mark(pen, stand, ids.contains(stand.source())));
        });
        List<Page.KeyEntry> key = new ArrayList<>(SeaLine.key(curves));
        key.add(new Page.KeyEntry("picked from a curve, 1 sigma", (pen, x, y) -> sample(pen, x, y, true)));
        key.add(new Page.KeyEntry("of another source, 1 sigma", (pen, x, y) -> sample(pen, x, y, false)));
        return new Page(name, "Sea level in use", key, Style.chart(plot), note(stands, ids), widthPoints, HEIGHT);
    }

    private static List<HighstandUsed> stands(SeaLevelUsed sea) {
        Map<String, HighstandUsed> stands = new LinkedHashMap<>();
        sea.highstands().stream()
                .filter(stand -> !stand.stage().equals(SiteView.OLDER))
                .forEach(stand ->
                        stands.putIfAbsent(stand.stage() + " " + stand.ageKa() + " " + stand.levelMetres(), stand));
        return List.copyOf(stands.values());
    }

    private static double oldest(List<CurveUsed> curves, List<HighstandUsed> stands) {
        return Stream.concat(
                        curves.stream()
                                .flatMap(curve -> curve.points().stream())
                                .map(CurvePoint::ageKa),
                        stands.stream().map(stand -> stand.ageKa() + stand.ageSigmaKa()))
                .mapToDouble(Double::doubleValue)
                .max()
                .orElse(1);
    }

    private static NumberAxis levels(List<CurveUsed> curves, List<HighstandUsed> stands) {
        double[] levels = Stream.concat(
                        curves.stream()
                                .limit(1)
                                .flatMap(curve -> curve.points().stream())
                                .flatMap(point -> Stream.of(point.low95Metres(), point.high95Metres())),
                        stands.stream()
                                .flatMap(stand -> Stream.of(
                                        stand.levelMetres() - stand.levelSigmaMetres(),
                                        stand.levelMetres() + stand.levelSigmaMetres())))
                .mapToDouble(Double::doubleValue)
                .toArray();
        double low = DoubleStream.of(levels).min().orElse(-1);
        double high = DoubleStream.of(levels).max().orElse(1);
        double comb = StageComb.share(HEIGHT - 30);
        return Style.upright("Sea level (m above present)", low - comb * (high - low), high + 0.03 * (high - low));
    }

    private static List<StageComb.Tooth> teeth(Pen pen, List<HighstandUsed> stands) {
        return stands.stream()
                .sorted(Comparator.comparing(
                                (HighstandUsed stand) -> !stand.highstandClass().equals("interglacial"))
                        .thenComparing(HighstandUsed::ageKa))
                .map(stand -> new StageComb.Tooth(stand.stage(), pen.x(stand.ageKa()), pen.y(stand.levelMetres())))
                .toList();
    }

    private static void mark(Pen pen, HighstandUsed stand, boolean picked) {
        double x = pen.x(stand.ageKa());
        double y = pen.y(stand.levelMetres());
        Color colour = picked ? Style.SEA : Style.LINK;
        pen.line(
                pen.x(stand.ageKa() - stand.ageSigmaKa()),
                y,
                pen.x(stand.ageKa() + stand.ageSigmaKa()),
                y,
                colour,
                Style.line(0.7));
        pen.line(
                x,
                pen.y(stand.levelMetres() - stand.levelSigmaMetres()),
                x,
                pen.y(stand.levelMetres() + stand.levelSigmaMetres()),
                colour,
                Style.line(0.7));
        point(pen, x, y, picked);
    }

    private static void point(Pen pen, double x, double y, boolean picked) {
        if (picked) {
            pen.ring(x, y, 1.7, Style.SEA);
        } else {
            pen.diamond(x, y, 2.6, Style.LINK);
        }
    }

    private static void sample(Pen pen, double x, double y, boolean picked) {
        double middle = x + Page.KeyEntry.SWATCH / 2;
        pen.line(middle, y - 4, middle, y + 4, picked ? Style.SEA : Style.LINK, Style.line(0.7));
        point(pen, middle, y, picked);
    }

    private static String note(List<HighstandUsed> stands, List<String> ids) {
        List<String> others = stands.stream()
                .filter(stand -> !ids.contains(stand.source()))
                .map(stand -> stand.stage() + ": " + stand.source())
                .toList();
        return others.isEmpty() ? "" : "Other sources: " + String.join("; ", others) + ".";
    }
}
