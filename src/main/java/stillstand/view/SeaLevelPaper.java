package stillstand.view;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.function.Consumer;
import java.util.function.ToDoubleFunction;
import javafx.geometry.VPos;
import javafx.scene.AccessibleRole;
import javafx.scene.canvas.Canvas;
import javafx.scene.canvas.GraphicsContext;
import javafx.scene.input.KeyEvent;
import javafx.scene.layout.Region;
import javafx.scene.paint.Color;
import javafx.scene.text.Font;
import javafx.scene.text.FontWeight;
import javafx.scene.text.TextAlignment;
import stillstand.report.Wording;
import stillstand.study.StudyResult.CurvePoint;
import stillstand.uncertainty.Digits;
import stillstand.uncertainty.Interval;
import stillstand.view.SeaLevelModel.Line;
import stillstand.view.SeaLevelModel.Pane;
import stillstand.view.SeaLevelModel.Picture;
import stillstand.view.SeaLevelModel.Stand;

/** Curves through time with their bands, and the highstands picked from them or put in their place; zooms and reads. */
final class SeaLevelPaper extends Region {
    private static final double LEFT = 58;
    private static final double RIGHT = 14;
    private static final double TOP = 28;
    private static final double BELOW = 44;
    private static final double REACH = 10;

    private final SeaLevelModel model;
    private final Canvas canvas = new Canvas();
    private Palette palette = Palette.under(Color.BLACK);
    private Consumer<String> onReading = text -> {};
    private double dragX;
    private double dragY;

    SeaLevelPaper(SeaLevelModel model) {
        this.model = model;
        getChildren().add(canvas);
        canvas.setMouseTransparent(true);
        setFocusTraversable(true);
        setMinSize(360, 240);
        setAccessibleRole(AccessibleRole.IMAGE_VIEW);
        setAccessibleText("Sea level through time");
        setAccessibleHelp("Plus and minus zoom, arrows move, 0 shows all.");
        model.pictureProperty().addListener((property, before, now) -> paint());
        model.paneProperty().addListener((property, before, now) -> paint());
        setOnScroll(event -> {
            model.zoom(event.getDeltaY() > 0 ? 1 / 1.15 : 1.15, ageKaAt(event.getX()), metresAt(event.getY()));
            event.consume();
        });
        setOnMousePressed(event -> {
            requestFocus();
            dragX = event.getX();
            dragY = event.getY();
            if (event.getClickCount() == 2) {
                model.wholeView();
            }
        });
        setOnMouseDragged(event -> {
            model.move((event.getX() - dragX) / width(), (event.getY() - dragY) / height());
            dragX = event.getX();
            dragY = event.getY();
        });
        setOnMouseMoved(event -> onReading.accept(standAt(event.getX(), event.getY())
                .map(SeaLevelModel::reading)
                .orElseGet(() -> inside(event.getX()) ? model.reading(Math.max(0, ageKaAt(event.getX()))) : "")));
        setOnMouseExited(event -> onReading.accept(""));
        setOnKeyPressed(this::key);
    }

    void onReading(Consumer<String> consumer) {
        onReading = consumer;
    }

    void use(Palette other) {
        palette = other;
        paint();
    }

    private void key(KeyEvent event) {
        Pane pane = model.paneProperty().get();
        double middleKa = (pane.agesKa().low() + pane.agesKa().high()) / 2;
        double middleMetres = (pane.metres().low() + pane.metres().high()) / 2;
        boolean used = true;
        switch (event.getCode()) {
            case PLUS, ADD, EQUALS -> model.zoom(0.8, middleKa, middleMetres);
            case MINUS, SUBTRACT -> model.zoom(1.25, middleKa, middleMetres);
            case LEFT -> model.move(0.1, 0);
            case RIGHT -> model.move(-0.1, 0);
            case UP -> model.move(0, 0.1);
            case DOWN -> model.move(0, -0.1);
            case DIGIT0, NUMPAD0, HOME -> model.wholeView();
            default -> used = false;
        }
        if (used) {
            event.consume();
        }
    }

    private double width() {
        return Math.max(1, canvas.getWidth() - LEFT - RIGHT);
    }

    private double height() {
        return Math.max(1, canvas.getHeight() - TOP - BELOW);
    }

    private boolean inside(double x) {
        return x >= LEFT && x <= canvas.getWidth() - RIGHT;
    }

    private double x(double ageKa) {
        Interval ages = model.paneProperty().get().agesKa();
        return LEFT + width() * (ages.high() - ageKa) / ages.width();
    }

    private double y(double metres) {
        Interval heights = model.paneProperty().get().metres();
        return TOP + height() * (heights.high() - metres) / heights.width();
    }

    private double ageKaAt(double x) {
        Interval ages = model.paneProperty().get().agesKa();
        return ages.high() - (x - LEFT) / width() * ages.width();
    }

    private double metresAt(double y) {
        Interval heights = model.paneProperty().get().metres();
        return heights.high() - (y - TOP) / height() * heights.width();
    }

    private Optional<Stand> standAt(double x, double y) {
        return model.pictureProperty().get().stands().stream()
                .filter(stand -> Math.hypot(x(stand.ageKa()) - x, y(stand.metres()) - y) < REACH)
                .findFirst();
    }

    @Override
    protected void layoutChildren() {
        if (canvas.getWidth() != getWidth() || canvas.getHeight() != getHeight()) {
            canvas.setWidth(getWidth());
            canvas.setHeight(getHeight());
            paint();
        }
    }

    private void paint() {
        if (getWidth() < 80 || getHeight() < 80) {
            return;
        }
        GraphicsContext g = canvas.getGraphicsContext2D();
        g.setFill(palette.paper());
        g.fillRect(0, 0, canvas.getWidth(), canvas.getHeight());
        Picture picture = model.pictureProperty().get();
        g.save();
        g.beginPath();
        g.rect(LEFT, TOP - 16, width(), height() + 16);
        g.clip();
        lines(g, picture.lines());
        stands(g, picture.stands());
        g.restore();
        axes(g);
        key(g, picture.lines());
    }

    private void lines(GraphicsContext g, List<Line> lines) {
        for (int i = 0; i < lines.size(); i++) {
            List<CurvePoint> points = inView(lines.get(i).points());
            if (i == 0) {
                band(g, points, CurvePoint::low95Metres, CurvePoint::high95Metres, palette.band95());
                band(g, points, CurvePoint::low68Metres, CurvePoint::high68Metres, palette.band68());
            } else {
                Color fill = palette.curve(i).deriveColor(0, 1, 1, 0.14);
                band(g, points, CurvePoint::low68Metres, CurvePoint::high68Metres, fill);
            }
        }
        for (int i = lines.size() - 1; i >= 0; i--) {
            List<CurvePoint> points = inView(lines.get(i).points());
            g.setStroke(palette.curve(i));
            g.setLineWidth(lines.get(i).inUse() ? 2 : 1.2);
            g.setLineDashes(lines.get(i).inUse() ? new double[0] : new double[] {5, 3});
            g.strokePolyline(
                    points.stream().mapToDouble(point -> x(point.ageKa())).toArray(),
                    points.stream().mapToDouble(point -> y(point.levelMetres())).toArray(),
                    points.size());
            g.setLineDashes();
        }
    }

    private List<CurvePoint> inView(List<CurvePoint> points) {
        Interval ages = model.paneProperty().get().agesKa();
        return points.stream()
                .filter(point -> point.ageKa() >= ages.low() - 2 && point.ageKa() <= ages.high() + 2)
                .toList();
    }

    private void band(
            GraphicsContext g,
            List<CurvePoint> points,
            ToDoubleFunction<CurvePoint> low,
            ToDoubleFunction<CurvePoint> high,
            Color fill) {
        int n = points.size();
        double[] xs = new double[2 * n];
        double[] ys = new double[2 * n];
        for (int i = 0; i < n; i++) {
            xs[i] = x(points.get(i).ageKa());
            ys[i] = y(low.applyAsDouble(points.get(i)));
            xs[2 * n - 1 - i] = xs[i];
            ys[2 * n - 1 - i] = y(high.applyAsDouble(points.get(i)));
        }
        g.setFill(fill);
        g.fillPolygon(xs, ys, 2 * n);
    }

    /** A cross of one sigma each way; where another estimate took the pick's place, a ring and a thread to it. */
    private void stands(GraphicsContext g, List<Stand> stands) {
        List<double[]> taken = new ArrayList<>();
        for (Stand stand : stands) {
            double x = x(stand.ageKa());
            double y = y(stand.metres());
            Color colour = stand.replaced() ? palette.link() : palette.sea();
            if (stand.replaced() && stand.pick().isPresent()) {
                double pickX = x(stand.pick().get().ageKa());
                double pickY = y(stand.pick().get().metres());
                g.setStroke(palette.sea());
                g.setLineWidth(1.3);
                g.strokeOval(pickX - 4, pickY - 4, 8, 8);
                g.setLineDashes(2, 3);
                g.strokeLine(pickX, pickY, x, y);
                g.setLineDashes();
            }
            g.setStroke(colour);
            g.setFill(colour);
            g.setLineWidth(1.6);
            g.strokeLine(x(stand.ageKa() + stand.ageSigmaKa()), y, x(stand.ageKa() - stand.ageSigmaKa()), y);
            g.strokeLine(x, y(stand.metres() + stand.sigmaMetres()), x, y(stand.metres() - stand.sigmaMetres()));
            if (stand.replaced()) {
                g.fillPolygon(new double[] {x - 7, x, x + 7, x}, new double[] {y, y - 7, y, y + 7}, 4);
            } else {
                g.fillOval(x - 4.5, y - 4.5, 9, 9);
            }
            label(g, stand, x, y, taken, colour);
        }
    }

    private void label(GraphicsContext g, Stand stand, double x, double y, List<double[]> taken, Color colour) {
        double at = Math.min(y, y(stand.metres() + stand.sigmaMetres())) - 9;
        for (int tries = 0; tries < 6; tries++) {
            double here = at;
            if (taken.stream().noneMatch(other -> Math.abs(other[0] - x) < 26 && Math.abs(other[1] - here) < 12)) {
                break;
            }
            at -= 12;
        }
        at = Math.max(TOP - 8, at);
        taken.add(new double[] {x, at});
        text(g, stand.stage(), x, at, TextAlignment.CENTER, colour, true);
    }

    private void axes(GraphicsContext g) {
        Pane pane = model.paneProperty().get();
        g.setStroke(palette.ink());
        g.setLineWidth(1);
        double bottom = TOP + height();
        g.strokeLine(LEFT, TOP - 12, LEFT, bottom);
        g.strokeLine(LEFT, bottom, LEFT + width(), bottom);
        for (double tick : StairScale.ticks(pane.metres().low(), pane.metres().high(), height(), 50)) {
            double y = Math.rint(y(tick)) + 0.5;
            pen(g, palette.ink(), 1);
            g.strokeLine(LEFT - 5, y, LEFT, y);
            text(g, number(tick), LEFT - 8, y, TextAlignment.RIGHT, palette.ink(), false);
        }
        for (double tick : StairScale.ticks(pane.agesKa().low(), pane.agesKa().high(), width(), 80)) {
            double x = Math.rint(x(tick)) + 0.5;
            pen(g, palette.ink(), 1);
            g.strokeLine(x, bottom, x, bottom + 5);
            text(g, number(tick), x, bottom + 13, TextAlignment.CENTER, palette.ink(), false);
        }
        text(g, "Sea level (m above today's)", 8, TOP - 20, TextAlignment.LEFT, palette.muted(), false);
        text(g, "Age (ka)", LEFT + width() / 2, bottom + 31, TextAlignment.CENTER, palette.muted(), false);
        if (pane.metres().contains(0)) {
            pen(g, palette.muted(), 0.9);
            g.setLineDashes(1, 3);
            g.strokeLine(LEFT, Math.rint(y(0)) + 0.5, LEFT + width(), Math.rint(y(0)) + 0.5);
            g.setLineDashes();
        }
    }

    private static void pen(GraphicsContext g, Color colour, double width) {
        g.setStroke(colour);
        g.setLineWidth(width);
    }

    private void key(GraphicsContext g, List<Line> lines) {
        double x = LEFT + width() - 6;
        double y = TOP + height() - 10 - 16 * (lines.size() - 1);
        for (int i = 0; i < lines.size(); i++) {
            text(
                    g,
                    lines.get(i).id() + (lines.get(i).inUse() ? "" : " (for comparison)"),
                    x,
                    y + 16 * i,
                    TextAlignment.RIGHT,
                    palette.curve(i),
                    lines.get(i).inUse());
        }
    }

    private void text(
            GraphicsContext g, String text, double x, double y, TextAlignment align, Color colour, boolean strong) {
        g.setFont(Font.font(Font.getDefault().getFamily(), strong ? FontWeight.SEMI_BOLD : FontWeight.NORMAL, 11.5));
        g.setTextAlign(align);
        g.setTextBaseline(VPos.CENTER);
        g.setStroke(palette.paper());
        g.setLineWidth(3);
        g.strokeText(text, x, y);
        g.setFill(colour);
        g.fillText(text, x, y);
    }

    private static String number(double tick) {
        return Wording.number(Digits.text(Math.rint(tick * 1e6) / 1e6).toLowerCase(Locale.ROOT));
    }
}
