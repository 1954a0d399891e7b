package stillstand.figure;

import java.awt.Color;
import java.awt.geom.Path2D;
import java.util.ArrayList;
import java.util.Collections;
import java.util.Comparator;
import java.util.List;
import java.util.function.ToDoubleFunction;
import stillstand.study.StudyResult.CurvePoint;
import stillstand.study.StudyResult.CurveUsed;

/** Sea level through time as a line in its bands. */
final class SeaLine {
    /** For the second and further curves. */
    private static final List<Color> OTHERS =
            List.of(new Color(0x8A6D1B), new Color(0x6B4C86), new Color(0x3F7A4E), new Color(0x8C8C8C));

    private SeaLine() {}

    /** The curve of the greatest weight first. */
    static List<CurveUsed> byWeight(List<CurveUsed> curves) {
        return curves.stream()
                .filter(curve -> !curve.points().isEmpty())
                .sorted(Comparator.comparingDouble(CurveUsed::weight).reversed())
                .toList();
    }

    /** Bands and line of the first curve, and the lines of the others, young to {@code oldestKa}. */
    static void paint(Pen pen, List<CurveUsed> curves, double oldestKa) {
        if (curves.isEmpty()) {
            return;
        }
        List<CurvePoint> first = upTo(curves.get(0), oldestKa);
        pen.fill(band(pen, first, CurvePoint::low95Metres, CurvePoint::high95Metres), Style.SEA_95);
        pen.fill(band(pen, first, CurvePoint::low68Metres, CurvePoint::high68Metres), Style.SEA_68);
        for (int i = curves.size() - 1; i >= 0; i--) {
            pen.draw(
                    line(pen, upTo(curves.get(i), oldestKa), CurvePoint::levelMetres),
                    colour(i),
                    i == 0 ? Style.line(1.1) : Style.line(0.8));
        }
    }

    static Color colour(int curve) {
        return curve == 0 ? Style.SEA : OTHERS.get((curve - 1) % OTHERS.size());
    }

    /** What line and bands mean. */
    static List<Page.KeyEntry> key(List<CurveUsed> curves) {
        List<Page.KeyEntry> key = new ArrayList<>();
        for (int i = 0; i < curves.size(); i++) {
            Color colour = colour(i);
            key.add(new Page.KeyEntry(
                    curves.get(i).id(),
                    (pen, x, y) -> pen.line(x, y, x + Page.KeyEntry.SWATCH, y, colour, Style.line(1.1))));
        }
        if (!curves.isEmpty()) {
            key.add(new Page.KeyEntry(
                    "its 68 and 95 % bands",
                    (pen, x, y) -> {
                        pen.box(x, y - 3, x + 13, y + 3, Style.SEA_95);
                        pen.box(x, y - 1.5, x + 13, y + 1.5, Style.SEA_68);
                    }));
        }
        return key;
    }

    private static List<CurvePoint> upTo(CurveUsed curve, double oldestKa) {
        return curve.points().stream()
                .filter(point -> point.ageKa() <= oldestKa)
                .toList();
    }

    private static Path2D band(
            Pen pen, List<CurvePoint> points, ToDoubleFunction<CurvePoint> low, ToDoubleFunction<CurvePoint> high) {
        List<CurvePoint> back = new ArrayList<>(points);
        Collections.reverse(back);
        Path2D path = line(pen, points, high);
        for (CurvePoint point : back) {
            path.lineTo(pen.x(point.ageKa()), pen.y(low.applyAsDouble(point)));
        }
        if (!points.isEmpty()) {
            path.closePath();
        }
        return path;
    }

    private static Path2D line(Pen pen, List<CurvePoint> points, ToDoubleFunction<CurvePoint> level) {
        Path2D path = new Path2D.Double();
        for (CurvePoint point : points) {
            double x = pen.x(point.ageKa());
            double y = pen.y(level.applyAsDouble(point));
            if (path.getCurrentPoint() == null) {
                path.moveTo(x, y);
            } else {
                path.lineTo(x, y);
            }
        }
        return path;
    }
}
