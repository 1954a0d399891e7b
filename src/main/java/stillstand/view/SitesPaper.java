package stillstand.view;

import java.util.List;
import java.util.Optional;
import java.util.function.Consumer;
import java.util.stream.IntStream;
import javafx.geometry.VPos;
import javafx.scene.AccessibleRole;
import javafx.scene.canvas.Canvas;
import javafx.scene.canvas.GraphicsContext;
import javafx.scene.input.KeyEvent;
import javafx.scene.layout.Region;
import javafx.scene.paint.Color;
import javafx.scene.text.Font;
import javafx.scene.text.FontWeight;
import javafx.scene.text.Text;
import javafx.scene.text.TextAlignment;
import stillstand.comparison.SiteMotion;
import stillstand.figure.SiteView.LevelView;
import stillstand.report.Wording;
import stillstand.uncertainty.Digits;
import stillstand.uncertainty.Interval;
import stillstand.view.SitesPicture.Join;
import stillstand.view.SitesPicture.Kind;
import stillstand.view.SitesPicture.Spot;

/** Sites on a map, or the levels of a coast side by side; arrows lead from site to site. */
final class SitesPaper extends Region {
    private static final double LEFT = 58;
    private static final double RIGHT = 16;
    private static final double TOP = 26;
    private static final double BELOW = 44;
    private static final double REACH = 14;
    private static final double DOT = 5;
    private static final double LINE = 17;
    private static final double SMALL = 11.5;
    /** At more sites the levels of a coast are not named. */
    private static final int MOST_NAMED = 8;

    private final SitesModel model;
    private final Canvas canvas = new Canvas();
    private Palette palette = Palette.under(Color.BLACK);
    private Consumer<String> onReading = text -> {};
    private int chosen = -1;
    private Interval across = new Interval(0, 1);
    private Interval upright = new Interval(0, 1);

    SitesPaper(SitesModel model) {
        this.model = model;
        getChildren().add(canvas);
        canvas.setMouseTransparent(true);
        setFocusTraversable(true);
        setMinSize(280, 200);
        setAccessibleRole(AccessibleRole.IMAGE_VIEW);
        setAccessibleHelp("Arrows lead from site to site.");
        model.pictureProperty().addListener((property, before, now) -> {
            chosen = -1;
            setAccessibleText(now.name());
            paint();
        });
        setOnMousePressed(event -> requestFocus());
        setOnMouseMoved(event -> read(event.getX(), event.getY()));
        setOnMouseExited(event -> onReading.accept(""));
        setOnKeyPressed(this::key);
        focusedProperty().addListener((property, before, now) -> paint());
    }

    void onReading(Consumer<String> consumer) {
        onReading = consumer;
    }

    void use(Palette other) {
        palette = other;
        paint();
    }

    private void key(KeyEvent event) {
        int count = picture().spots().size();
        switch (event.getCode()) {
            case RIGHT, DOWN -> choose(Math.min(count - 1, chosen + 1));
            case LEFT, UP -> choose(Math.max(0, chosen - 1));
            case HOME -> choose(0);
            case END -> choose(count - 1);
            default -> {
                return;
            }
        }
        event.consume();
    }

    private void choose(int spot) {
        if (spot >= 0 && spot < picture().spots().size()) {
            chosen = spot;
            String says = SitesModel.reading(picture().spots().get(spot).site());
            onReading.accept(says);
            setAccessibleText(picture().name() + ". " + says);
            paint();
        }
    }

    private void read(double x, double y) {
        boolean isMap = picture().kind() == Kind.MAP;
        Optional<Spot> near = picture().spots().stream()
                .filter(spot -> isMap
                        ? Math.hypot(x(spot.x()) - x, y(spot.y()) - y) < REACH
                        : Math.abs(x(spot.x()) - x) < REACH)
                .findFirst();
        onReading.accept(near.map(spot -> spot.levels().stream()
                        .filter(level -> Math.abs(y(SitesPicture.metres(level)) - y) < REACH / 2)
                        .findFirst()
                        .map(level -> spot.site().site() + ", " + SitesModel.reading(level))
                        .orElseGet(() -> SitesModel.reading(spot.site())))
                .orElse(""));
    }

    private SitesPicture picture() {
        return model.pictureProperty().get();
    }

    @Override
    protected void layoutChildren() {
        canvas.setWidth(getWidth());
        canvas.setHeight(getHeight());
        paint();
    }

    private double width() {
        return Math.max(1, canvas.getWidth() - LEFT - RIGHT);
    }

    private double height() {
        return Math.max(1, canvas.getHeight() - TOP - BELOW);
    }

    private double x(double value) {
        return LEFT + width() * (value - across.low()) / across.width();
    }

    private double y(double value) {
        return TOP + height() * (upright.high() - value) / upright.width();
    }

    private void paint() {
        GraphicsContext g = canvas.getGraphicsContext2D();
        g.clearRect(0, 0, canvas.getWidth(), canvas.getHeight());
        if (picture().spots().isEmpty() || canvas.getWidth() < LEFT + RIGHT + 20) {
            return;
        }
        scale();
        axes(g);
        if (picture().kind() == Kind.MAP) {
            map(g);
        } else {
            coast(g);
        }
        if (isFocused()) {
            g.setStroke(palette.strength(palette.sea(), 0.6));
            g.setLineWidth(1);
            g.strokeRect(LEFT - 0.5, TOP - 0.5, width() + 1, height() + 1);
        }
    }

    /** On a map a kilometre east is as long as one north. */
    private void scale() {
        across = picture().across();
        upright = picture().upright();
        if (picture().kind() == Kind.MAP) {
            double squeeze = Math.max(0.05, Math.cos(Math.toRadians(middle(upright))));
            double degreesPerPixel = Math.max(across.width() * squeeze / width(), upright.width() / height());
            across = about(middle(across), degreesPerPixel * width() / squeeze);
            upright = about(middle(upright), degreesPerPixel * height());
        }
    }

    private static double middle(Interval of) {
        return (of.low() + of.high()) / 2;
    }

    private static Interval about(double middle, double width) {
        return new Interval(middle - width / 2, middle + width / 2);
    }

    private void axes(GraphicsContext g) {
        boolean isMap = picture().kind() == Kind.MAP;
        g.setLineWidth(1);
        g.setFont(Font.font(SMALL));
        g.setFill(palette.muted());
        g.setTextBaseline(VPos.TOP);
        g.setTextAlign(TextAlignment.CENTER);
        for (double tick : StairScale.ticks(across.low(), across.high(), width(), 90)) {
            double x = Math.rint(x(tick)) + 0.5;
            g.setStroke(palette.hair());
            g.strokeLine(x, TOP, x, TOP + height());
            if (x < LEFT + width() - RIGHT) { // half a number at the end says nothing
                g.fillText(number(tick), x, TOP + height() + 5);
            }
        }
        g.setTextAlign(TextAlignment.RIGHT);
        g.setTextBaseline(VPos.CENTER);
        for (double tick : StairScale.ticks(upright.low(), upright.high(), height(), 50)) {
            double y = Math.rint(y(tick)) + 0.5;
            g.setStroke(tick == 0 && !isMap ? palette.muted() : palette.hair());
            g.strokeLine(LEFT, y, LEFT + width(), y);
            g.fillText(number(tick), LEFT - 6, y);
        }
        g.setTextAlign(TextAlignment.CENTER);
        g.setTextBaseline(VPos.BOTTOM);
        g.fillText(
                isMap ? "Longitude (degrees)" : "Distance along the coast (km)",
                LEFT + width() / 2,
                canvas.getHeight() - 4);
        g.setTextAlign(TextAlignment.LEFT);
        g.setTextBaseline(VPos.TOP);
        g.fillText(isMap ? "Latitude (degrees)" : "Height above present mean sea level (m)", 6, 4);
    }

    private static String number(double value) {
        return Wording.number(Digits.text(Math.rint(value * 1e6) / 1e6));
    }

    private Color colour(SiteMotion site) {
        return switch (site.motion()) {
            case SiteMotion.UP -> palette.link();
            case SiteMotion.DOWN -> palette.sea();
            default -> palette.muted();
        };
    }

    /** Up points up, down points down, what is stable is round: no meaning rests on colour alone. */
    private void mark(GraphicsContext g, SiteMotion site, double x, double y) {
        g.setFill(colour(site));
        if (site.motion().equals(SiteMotion.STABLE)) {
            g.fillOval(x - DOT, y - DOT, 2 * DOT, 2 * DOT);
        } else {
            double tip = site.motion().equals(SiteMotion.UP) ? -1.3 * DOT : 1.3 * DOT;
            g.fillPolygon(
                    new double[] {x - 1.15 * DOT, x + 1.15 * DOT, x},
                    new double[] {y - 0.7 * tip, y - 0.7 * tip, y + tip},
                    3);
        }
    }

    private void map(GraphicsContext g) {
        List<Spot> spots = picture().spots();
        double[] wanted = spots.stream().mapToDouble(spot -> y(spot.y())).toArray();
        double[] places = apart(wanted, LINE, TOP + LINE / 2, TOP + height() - LINE / 2);
        boolean named = spots.size() * LINE <= height();
        for (int i = 0; i < spots.size(); i++) {
            Spot spot = spots.get(i);
            double x = x(spot.x());
            mark(g, spot.site(), x, wanted[i]);
            if (i == chosen) {
                ring(g, x, wanted[i]);
            }
            if (named) {
                name(g, spot.site(), x, wanted[i], places[i], i == chosen);
            }
        }
    }

    /** Beside its mark, on the side where there is room. */
    private void name(GraphicsContext g, SiteMotion site, double x, double markY, double y, boolean isChosen) {
        Font font = Font.font(g.getFont().getFamily(), isChosen ? FontWeight.BOLD : FontWeight.NORMAL, 12.5);
        String words = site.site() + "  " + Wording.quantity(site.rate());
        Text measured = new Text(words);
        measured.setFont(font);
        boolean right = x + 14 + measured.getLayoutBounds().getWidth() < LEFT + width();
        g.setFont(font);
        g.setFill(palette.ink());
        g.setTextBaseline(VPos.CENTER);
        g.setTextAlign(right ? TextAlignment.LEFT : TextAlignment.RIGHT);
        if (Math.abs(markY - y) > 3) {
            g.setStroke(palette.muted());
            g.setLineWidth(0.6);
            g.strokeLine(x + (right ? 6 : -6), markY, x + (right ? 11 : -11), y);
        }
        g.fillText(words, x + (right ? 13 : -13), y);
        g.setFont(Font.font(SMALL));
    }

    private void ring(GraphicsContext g, double x, double y) {
        g.setStroke(palette.ink());
        g.setLineWidth(1.5);
        g.strokeOval(x - 2 * DOT, y - 2 * DOT, 4 * DOT, 4 * DOT);
    }

    private void coast(GraphicsContext g) {
        List<Spot> spots = picture().spots();
        g.setLineWidth(1.6);
        for (Join join : picture().joins()) {
            g.setStroke(palette.strength(palette.link(), join.probability()));
            g.strokeLine(
                    x(spots.get(join.fromSpot()).x()),
                    y(join.fromMetres()),
                    x(spots.get(join.toSpot()).x()),
                    y(join.toMetres()));
        }
        for (int i = 0; i < spots.size(); i++) {
            Spot spot = spots.get(i);
            double x = x(spot.x());
            g.setStroke(i == chosen ? palette.ink() : palette.rockEdge());
            g.setLineWidth(i == chosen ? 2.4 : 1.4);
            for (LevelView level : spot.levels()) {
                Interval of = level.height().orElseThrow().interval95();
                g.strokeLine(x, y(of.low()), x, y(of.high()));
                g.strokeLine(x - 7, y(SitesPicture.metres(level)), x + 7, y(SitesPicture.metres(level)));
            }
        }
        if (spots.size() <= MOST_NAMED) {
            for (int i = 0; i < spots.size(); i++) {
                levelNames(g, spots.get(i), i == spots.size() - 1);
            }
        }
        names(g, spots);
    }

    /** Beside their marks, away from the lines that lead to the next site. */
    private void levelNames(GraphicsContext g, Spot spot, boolean isLast) {
        double side = isLast ? 10 : -10;
        double[] wanted = spot.levels().stream()
                .mapToDouble(level -> -y(SitesPicture.metres(level)))
                .toArray(); // lowest first, upwards
        double[] places = apart(wanted, SMALL, -(TOP + height() - 4), -(TOP + 44));
        g.setFill(palette.muted());
        g.setFont(Font.font(10.5));
        g.setTextAlign(isLast ? TextAlignment.LEFT : TextAlignment.RIGHT);
        g.setTextBaseline(VPos.CENTER);
        for (int i = 0; i < places.length; i++) {
            g.fillText(spot.levels().get(i).name(), x(spot.x()) + side, -places[i]);
        }
    }

    /** Above the coast; where all have no room, of every second or third. */
    private void names(GraphicsContext g, List<Spot> spots) {
        g.setFont(Font.font(12.5));
        g.setTextBaseline(VPos.TOP);
        double freeFrom = LEFT;
        for (int i : IntStream.range(0, spots.size()).toArray()) {
            String words = spots.get(i).site().site() + "  "
                    + Wording.quantity(spots.get(i).site().rate());
            Text measured = new Text(words);
            measured.setFont(g.getFont());
            double wide = measured.getLayoutBounds().getWidth();
            double x = x(spots.get(i).x());
            double from = Math.min(Math.max(LEFT + 2, x - wide / 2), LEFT + width() - wide - 2);
            mark(g, spots.get(i).site(), x, TOP + 30);
            if (from >= freeFrom) {
                g.setFill(palette.ink());
                g.setTextAlign(TextAlignment.LEFT);
                g.fillText(words, from, TOP + 4);
                freeFrom = from + wide + 12;
            }
        }
    }

    /** Places at least so far apart, as near to where they are wanted as goes, in the order given. */
    static double[] apart(double[] wanted, double gap, double from, double to) {
        double[] places = wanted.clone();
        for (int i = 0; i < places.length; i++) {
            places[i] = Math.max(places[i], i == 0 ? from : places[i - 1] + gap);
        }
        double last = to;
        for (int i = places.length - 1; i >= 0; i--) {
            places[i] = Math.min(places[i], last);
            last = places[i] - gap;
        }
        return places;
    }
}
