package stillstand.view;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.function.ToDoubleFunction;
import javafx.geometry.Point2D;
import javafx.geometry.VPos;
import javafx.scene.canvas.GraphicsContext;
import javafx.scene.paint.Color;
import javafx.scene.shape.StrokeLineCap;
import javafx.scene.text.Font;
import javafx.scene.text.FontWeight;
import javafx.scene.text.Text;
import javafx.scene.text.TextAlignment;
import stillstand.report.Wording;
import stillstand.shoreline.StageChoice;
import stillstand.study.StudyResult.CurvePoint;
import stillstand.study.StudyResult.CurveUsed;
import stillstand.uplift.FlightResult.Fate;
import stillstand.uplift.PredictedStair;
import stillstand.view.StairPicture.Link;
import stillstand.view.StairPicture.Mark;
import stillstand.view.StairPicture.Stand;

/** Paints a Stair on a canvas. */
final class StairPainter {
    private static final double SMALL = 11;
    private static final double TEXT = 12.5;
    private static final double LIKELY = 0.5;

    private final GraphicsContext g;
    private final StairScale scale;
    private final StairPicture picture;
    private final Palette palette;

    StairPainter(GraphicsContext g, StairScale scale, StairPicture picture, Palette palette) {
        this.g = g;
        this.scale = scale;
        this.picture = picture;
        this.palette = palette;
    }

    /** What is being pointed at or dragged. */
    record Pointing(String level, String stage, Optional<Point2D> dragTo) {
        static final Pointing NOTHING = new Pointing("", "", Optional.empty());
    }

    /** Everything that lies still while a rate is slid or a line dragged. */
    void ground() {
        g.setFill(palette.paper());
        g.fillRect(0, 0, g.getCanvas().getWidth(), g.getCanvas().getHeight());
        g.save();
        g.beginPath();
        g.rect(scale.left, scale.top - 22, scale.present - scale.left, scale.bottom - scale.top + 22);
        g.clip();
        sea();
        g.restore();
        axes();
        profile();
    }

    private void sea() {
        for (int i = picture.curves().size() - 1; i >= 0; i--) {
            List<CurvePoint> points = upTo(picture.curves().get(i));
            if (points.isEmpty()) {
                continue;
            }
            if (i == 0) {
                band(points, CurvePoint::low95Metres, CurvePoint::high95Metres, palette.band95());
                band(points, CurvePoint::low68Metres, CurvePoint::high68Metres, palette.band68());
            }
            double[] xs =
                    points.stream().mapToDouble(point -> scale.x(point.ageKa())).toArray();
            double[] ys = points.stream()
                    .mapToDouble(point -> scale.y(point.levelMetres()))
                    .toArray();
            pen(palette.curve(i), i == 0 ? 1.8 : 1.2);
            g.strokePolyline(xs, ys, xs.length);
        }
    }

    private List<CurvePoint> upTo(CurveUsed curve) {
        return curve.points().stream()
                .filter(point -> point.ageKa() <= scale.oldestKa * 1.01)
                .toList();
    }

    private void band(
            List<CurvePoint> points, ToDoubleFunction<CurvePoint> low, ToDoubleFunction<CurvePoint> high, Color fill) {
        int n = points.size();
        double[] xs = new double[2 * n];
        double[] ys = new double[2 * n];
        for (int i = 0; i < n; i++) {
            xs[i] = scale.x(points.get(i).ageKa());
            ys[i] = scale.y(low.applyAsDouble(points.get(i)));
            xs[2 * n - 1 - i] = xs[i];
            ys[2 * n - 1 - i] = scale.y(high.applyAsDouble(points.get(i)));
        }
        g.setFill(fill);
        g.fillPolygon(xs, ys, 2 * n);
    }

    private void axes() {
        pen(palette.hair(), 1);
        double zero = Math.rint(scale.y(0)) + 0.5;
        for (double tick : StairScale.ticks(scale.span.low(), scale.span.high(), scale.bottom - scale.top, 46)) {
            double y = Math.rint(scale.y(tick)) + 0.5;
            pen(palette.ink(), 1);
            g.strokeLine(scale.left - 5, y, scale.left, y);
            text(number(tick), scale.left - 8, y, TextAlignment.RIGHT, SMALL, palette.ink(), false);
        }
        pen(palette.muted(), 0.8);
        g.setLineDashes(1, 3);
        g.strokeLine(scale.left, zero, scale.present, zero);
        g.setLineDashes();
        pen(palette.ink(), 1);
        g.strokeLine(scale.left, scale.top - 10, scale.left, scale.bottom);
        g.strokeLine(scale.left, scale.bottom, scale.present, scale.bottom);
        g.strokeLine(scale.present, scale.top - 16, scale.present, scale.bottom);
        for (double tick : StairScale.ticks(0, scale.oldestKa, scale.present - scale.left, 70)) {
            double x = Math.rint(scale.x(tick)) + 0.5;
            g.strokeLine(x, scale.bottom, x, scale.bottom + 5);
            text(number(tick), x, scale.bottom + 13, TextAlignment.CENTER, SMALL, palette.ink(), false);
        }
        text(
                "Age (ka): old to the left, today at the wall",
                (scale.left + scale.present) / 2,
                scale.bottom + 31,
                TextAlignment.CENTER,
                SMALL,
                palette.muted(),
                false);
        text("Elevation, and sea level then (m)", 8, scale.top - 22, TextAlignment.LEFT, SMALL, palette.muted(), false);
        text(
                "The coast today, not to scale across",
                (scale.profileLeft + scale.right) / 2,
                scale.bottom + 31,
                TextAlignment.CENTER,
                SMALL,
                palette.muted(),
                false);
    }

    private void profile() {
        double zero = Math.min(Math.max(scale.y(0), scale.top), scale.bottom);
        g.setFill(palette.water());
        g.fillRect(scale.present + 1, zero, scale.profileRight - scale.present - 1, scale.bottom - zero);
        int n = picture.levels().size();
        if (n == 0) {
            return;
        }
        List<double[]> surface = surface(n);
        double[] xs = new double[surface.size() + 2];
        double[] ys = new double[surface.size() + 2];
        for (int i = 0; i < surface.size(); i++) {
            xs[i] = surface.get(i)[0];
            ys[i] = surface.get(i)[1];
        }
        xs[surface.size()] = scale.profileRight;
        ys[surface.size()] = scale.bottom;
        xs[surface.size() + 1] = xs[0];
        ys[surface.size() + 1] = scale.bottom;
        g.setFill(palette.rock());
        g.fillPolygon(xs, ys, xs.length);
        pen(palette.rockEdge(), 1.4);
        g.strokePolyline(xs, ys, surface.size());
    }

    /** Each tread falls a little seaward from its inner edge; a cliff leads to the next. */
    private List<double[]> surface(int n) {
        List<double[]> points = new ArrayList<>();
        double fall = 3;
        double width = scale.stepWidth();
        double lowest = scale.y(picture.levels().get(0).metres());
        points.add(new double[] {scale.stepX(0) - 0.84 * width, Math.min(scale.bottom, lowest + 26)});
        for (int i = 0; i < n; i++) {
            double y = scale.y(picture.levels().get(i).metres());
            double below = i == 0 ? 26 : scale.y(picture.levels().get(i - 1).metres()) - y;
            points.add(new double[] {scale.stepX(i) - 0.66 * width, y + Math.min(0.3 * Math.max(0, below), fall)});
            points.add(new double[] {scale.stepX(i), y});
        }
        points.add(new double[] {
            scale.profileRight,
            Math.max(scale.top, scale.y(picture.levels().get(n - 1).metres()) - 8)
        });
        return points;
    }

    /** Shorelines that the answer says are missing or overrun. */
    void lost() {
        for (Fate fate : picture.lost()) {
            Optional<Stand> stand = picture.stand(fate.highstand());
            if (stand.isPresent() && fate.ageKa() <= scale.oldestKa && inSpan(fate.heightMetres())) {
                pen(palette.strength(palette.muted(), 0.45), 0.8);
                g.setLineDashes(2, 4);
                double x = scale.x(stand.get().ageKa());
                double y = scale.y(fate.heightMetres());
                g.strokeLine(x, scale.y(stand.get().metres()), scale.present, y);
                g.setLineDashes();
                pen(palette.muted(), 1.2);
                if (fate.unseen() >= LIKELY) {
                    g.strokeOval(scale.present - 3.5, y - 3.5, 7, 7);
                } else {
                    g.strokeLine(scale.present - 3, y - 3, scale.present + 3, y + 3);
                    g.strokeLine(scale.present - 3, y + 3, scale.present + 3, y - 3);
                }
            }
        }
    }

    private boolean inSpan(double metres) {
        return scale.span.contains(metres);
    }

    /** The staircase of a slid rate. */
    void predicted(PredictedStair stair) {
        double lastLabel = Double.POSITIVE_INFINITY;
        for (PredictedStair.Step step : stair.steps()) {
            boolean stands = step.overrunBy().isEmpty();
            if (step.ageKa() > scale.oldestKa || !inSpan(step.heightMetres())) {
                continue;
            }
            double y = scale.y(step.heightMetres());
            if (!stands) {
                pen(palette.strength(palette.predicted(), 0.5), 1);
                g.strokeLine(scale.present + 5, y - 3, scale.present + 11, y + 3);
                g.strokeLine(scale.present + 5, y + 3, scale.present + 11, y - 3);
                continue;
            }
            pen(palette.strength(palette.predicted(), 0.65), 1.1);
            g.setLineDashes(7, 4);
            g.strokeLine(scale.x(step.ageKa()), scale.y(step.seaLevelMetres()), scale.present, y);
            g.setLineDashes();
            pen(palette.predicted(), 2.2);
            g.strokeLine(scale.present + 1, y, scale.present + 13, y);
            pen(palette.strength(palette.predicted(), 0.35), 1);
            g.setLineDashes(2, 3);
            g.strokeLine(scale.present + 13, y, scale.profileRight, y);
            g.setLineDashes();
            if (lastLabel - y >= 11) {
                text(step.stage(), scale.present + 16, y - 6, TextAlignment.LEFT, SMALL, palette.predicted(), false);
                lastLabel = y;
            }
        }
    }

    /** Lines of an answer. */
    void links(List<Link> links, String selected, double dim) {
        links.stream()
                .sorted((a, b) -> Double.compare(a.probability(), b.probability()))
                .forEach(link -> {
                    boolean chosen = link.level().equals(selected);
                    Color colour = palette.strength(palette.link(), link.probability());
                    pen(
                            dim < 1 ? colour.deriveColor(0, 1, 1, dim) : colour,
                            0.8 + 1.8 * link.probability() + (chosen ? 1.4 : 0));
                    g.setLineDashes(link.stage().isEmpty() ? new double[] {9, 3, 2, 3} : new double[0]);
                    double x = scale.x(link.ageKa());
                    g.strokeLine(x, scale.y(link.seaMetres()), scale.present, scale.y(link.metres()));
                    g.setLineDashes();
                    dot(x, scale.y(link.seaMetres()), 2.6);
                });
    }

    /** Lines of a preview. */
    void tried(List<Link> links) {
        links.stream()
                .sorted((a, b) -> Double.compare(a.probability(), b.probability()))
                .forEach(link -> {
                    pen(palette.strength(palette.tried(), link.probability()), 1 + 1.8 * link.probability());
                    g.setLineCap(StrokeLineCap.ROUND);
                    g.setLineDashes(1, 5);
                    g.strokeLine(
                            scale.x(link.ageKa()), scale.y(link.seaMetres()), scale.present, scale.y(link.metres()));
                    g.setLineDashes();
                    g.setLineCap(StrokeLineCap.BUTT);
                });
    }

    /** Highstands with their names; the one under a dragged line stands out. */
    void stands(Pointing pointing) {
        List<double[]> taken = new ArrayList<>();
        for (Stand stand : picture.stands()) {
            if (stand.ageKa() > scale.oldestKa) {
                continue;
            }
            double x = scale.x(stand.ageKa());
            double y = scale.y(stand.metres());
            boolean meant =
                    stand.stage().equals(pointing.stage()) && !pointing.stage().isEmpty();
            g.setFill(meant ? palette.tried() : palette.paper());
            double r = meant ? 6 : 3.6;
            g.fillOval(x - r, y - r, 2 * r, 2 * r);
            pen(meant ? palette.tried() : palette.sea(), 1.6);
            g.strokeOval(x - r, y - r, 2 * r, 2 * r);
            double half = width(stand.stage(), SMALL, true) / 2 + 1;
            double at = y - 13;
            for (int tries = 0; tries < 6; tries++) {
                double here = at;
                if (taken.stream()
                        .noneMatch(box -> x + half > box[0] && x - half < box[1] && Math.abs(here - box[2]) < 12)) {
                    break;
                }
                at -= 12;
            }
            at = Math.max(scale.top - 14, at);
            taken.add(new double[] {x - half, x + half, at});
            if (y - at > 14) {
                pen(palette.strength(palette.muted(), 0.5), 0.8);
                g.strokeLine(x, at + 7, x, y - r);
            }
            halo(stand.stage(), x, at, meant);
        }
    }

    private void halo(String stage, double x, double y, boolean meant) {
        g.setStroke(palette.paper());
        g.setLineWidth(3);
        g.setFont(font(SMALL, true));
        g.setTextAlign(TextAlignment.CENTER);
        g.setTextBaseline(VPos.CENTER);
        g.strokeText(stage, x, y);
        text(stage, x, y, TextAlignment.CENTER, SMALL, meant ? palette.tried() : palette.sea(), true);
    }

    /** Levels with their names. */
    void levels(String selected, Pointing pointing, java.util.function.Function<String, StageChoice> choices) {
        int n = picture.levels().size();
        for (int i = 0; i < n; i++) {
            Mark level = picture.levels().get(i);
            boolean chosen = level.name().equals(selected);
            boolean meant = level.name().equals(pointing.level());
            double y = scale.y(level.metres());
            double x = scale.stepX(i);
            pen(palette.strength(palette.rockEdge(), chosen || meant ? 1 : 0.5), chosen ? 1.4 : 0.7);
            g.strokeLine(scale.present, y, x, y);
            g.strokeLine(x, y, scale.profileRight, y);
            g.strokeLine(scale.profileRight, y, scale.nameX() - 3, scale.nameY(i));
            pen(palette.ink(), 1.3);
            g.strokeLine(
                    x,
                    scale.y(level.interval95().low()),
                    x,
                    scale.y(level.interval95().high()));
            g.setFill(level.takesPart() || level.ownAge().isPresent() ? palette.link() : palette.muted());
            dot(x, y, chosen || meant ? 5 : 3.6);
            dot(scale.present, y, chosen || meant ? 4.5 : 3);
            name(level, i, chosen, choices.apply(level.name()));
        }
    }

    private void name(Mark level, int i, boolean chosen, StageChoice choice) {
        double x = scale.nameX();
        double y = scale.nameY(i);
        if (chosen) {
            g.setFill(palette.strength(palette.rockEdge(), 0.15));
            g.fillRoundRect(x - 3, y - 8, scale.right - x + 8, 16, 6, 6);
        }
        String said = said(choice);
        String rest = said.isEmpty() ? best(level) : said;
        double room = scale.right - x - width(rest, TEXT, false) - 6;
        String name = fitted(level.name(), room);
        text(name, x, y, TextAlignment.LEFT, TEXT, palette.ink(), true);
        text(
                rest,
                x + width(name, TEXT, true) + 6,
                y,
                TextAlignment.LEFT,
                TEXT,
                said.isEmpty() ? palette.link() : palette.muted(),
                false);
    }

    /** {@code = 5e} where the user ties the level, {@code ≠ 5e} where it is forbidden. */
    static String said(StageChoice choice) {
        if (!choice.only().isEmpty()) {
            return "= " + String.join("|", choice.only());
        }
        return choice.never().isEmpty() ? "" : "≠ " + String.join(", ", choice.never());
    }

    private static String best(Mark level) {
        return level.claims().stream()
                .findFirst()
                .map(claim -> claim.highstand()
                        + (claim.probability() < 0.995
                                ? String.format(Locale.ROOT, " %.0f %%", 100 * claim.probability())
                                : ""))
                .orElse("");
    }

    /** Widest line of names and what is said of them. */
    static double nameWidth(StairPicture picture, java.util.function.Function<String, StageChoice> choices) {
        return picture.levels().stream()
                .mapToDouble(level -> width(level.name(), TEXT, true)
                        + 10
                        + Math.max(
                                width(said(choices.apply(level.name())), TEXT, false), width(best(level), TEXT, false)))
                .max()
                .orElse(40);
    }

    /** A frame that says that keys go here. */
    void focus() {
        pen(palette.strength(palette.predicted(), 0.7), 1.5);
        g.strokeRect(1, 1, g.getCanvas().getWidth() - 2, g.getCanvas().getHeight() - 2);
    }

    /** The line that is being dragged. */
    void dragged(Mark level, Point2D to) {
        pen(palette.tried(), 2.4);
        g.strokeLine(to.getX(), to.getY(), scale.present, scale.y(level.metres()));
        g.setFill(palette.tried());
        dot(to.getX(), to.getY(), 4);
    }

    private void dot(double x, double y, double r) {
        g.fillOval(x - r, y - r, 2 * r, 2 * r);
    }

    private void pen(Color colour, double width) {
        g.setStroke(colour);
        g.setFill(colour);
        g.setLineWidth(width);
    }

    private void text(String text, double x, double y, TextAlignment align, double size, Color colour, boolean strong) {
        g.setFont(font(size, strong));
        g.setFill(colour);
        g.setTextAlign(align);
        g.setTextBaseline(VPos.CENTER);
        g.fillText(text, x, y);
    }

    private static Font font(double size, boolean strong) {
        return Font.font(Font.getDefault().getFamily(), strong ? FontWeight.SEMI_BOLD : FontWeight.NORMAL, size);
    }

    private static double width(String text, double size, boolean strong) {
        Text measured = new Text(text);
        measured.setFont(font(size, strong));
        return measured.getLayoutBounds().getWidth();
    }

    private static String fitted(String text, double room) {
        String cut = text;
        while (cut.length() > 1 && width(cut.equals(text) ? cut : cut + "…", TEXT, true) > room) {
            cut = cut.substring(0, cut.length() - 1);
        }
        return cut.equals(text) ? text : cut + "…";
    }

    private static String number(double tick) {
        return Wording.number(
                tick == Math.rint(tick)
                        ? String.format(Locale.ROOT, "%.0f", tick)
                        : String.format(Locale.ROOT, "%.1f", tick));
    }
}
