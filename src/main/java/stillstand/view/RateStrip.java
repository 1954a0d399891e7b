package stillstand.view;

import java.util.Locale;
import java.util.Optional;
import javafx.beans.value.ChangeListener;
import javafx.geometry.Insets;
import javafx.geometry.Pos;
import javafx.scene.canvas.Canvas;
import javafx.scene.canvas.GraphicsContext;
import javafx.scene.control.Label;
import javafx.scene.control.Slider;
import javafx.scene.control.TextField;
import javafx.scene.control.Tooltip;
import javafx.scene.layout.HBox;
import javafx.scene.layout.Pane;
import javafx.scene.layout.Priority;
import javafx.scene.layout.VBox;
import javafx.scene.paint.Color;
import stillstand.report.Wording;
import stillstand.uncertainty.DensityBins;
import stillstand.uncertainty.Digits;
import stillstand.uncertainty.Interval;
import stillstand.uplift.FlightPreview;
import stillstand.uplift.Rate;

/** A rate to slide by hand, under what the last run holds of it and what a preview would. */
final class RateStrip extends HBox {
    private static final double STRIP = 46;
    private static final double INSET = 9;

    private final StairModel model;
    private final Slider slider = new Slider();
    private final TextField exact = new TextField();
    private final Canvas strip = new Canvas(100, STRIP);
    private Palette palette = Palette.under(Color.BLACK);

    RateStrip(StairModel model) {
        super(10);
        this.model = model;
        setAlignment(Pos.CENTER_LEFT);
        setPadding(new Insets(2, 12, 8, 12));
        slider.setId("stair-rate");
        slider.setAccessibleText("Rate that is slid by hand, metres per thousand years");
        Pane paper = new Pane(strip);
        paper.setMinHeight(STRIP);
        paper.widthProperty().addListener((property, before, now) -> {
            strip.setWidth(now.doubleValue());
            paint();
        });
        VBox tracks = new VBox(paper, slider);
        HBox.setHgrow(tracks, Priority.ALWAYS);
        Label label = new Label("Slide a rate");
        label.setLabelFor(slider);
        label.setTooltip(new Tooltip("The dashed staircase is what a constant rate would leave, on central values"));
        exact.setId("stair-rate-exact");
        exact.setPrefColumnCount(6);
        exact.setAccessibleText("Rate slid by hand, metres per thousand years");
        exact.setOnAction(event -> typed());
        exact.focusedProperty().addListener((property, before, now) -> write());
        Label unit = new Label("m/kyr");
        unit.setMinWidth(USE_PREF_SIZE);
        label.setMinWidth(USE_PREF_SIZE);
        tracks.setPrefWidth(200);
        getChildren().addAll(label, tracks, exact, unit);
        bind();
    }

    private void bind() {
        ChangeListener<Object> repaint = (property, before, now) -> {
            write();
            paint();
        };
        model.rateRangeProperty().addListener((property, before, now) -> range(now));
        range(model.rateRangeProperty().get());
        slider.valueProperty().bindBidirectional(model.rateProperty());
        model.rateProperty().addListener(repaint);
        model.previewProperty().addListener(repaint);
        model.pictureProperty().addListener(repaint);
        write();
    }

    private void range(Interval range) {
        double value = model.rateProperty().get();
        slider.setMin(Math.min(range.low(), value));
        slider.setMax(Math.max(range.high(), value));
        slider.setMin(range.low());
        slider.setMax(range.high());
        slider.setBlockIncrement(range.width() / 200);
        paint();
    }

    private void typed() {
        String text = exact.getText().strip().replace('−', '-');
        if (text.matches("-?[0-9]+(\\.[0-9]+)?")) {
            model.slideTo(Double.parseDouble(text));
        }
        write();
    }

    private void write() {
        exact.setText(Wording.number(
                String.format(Locale.ROOT, "%.3f", model.rateProperty().get())));
    }

    void use(Palette other) {
        palette = other;
        paint();
    }

    private double x(double rate) {
        Interval range = model.rateRangeProperty().get();
        return INSET + (strip.getWidth() - 2 * INSET) * (rate - range.low()) / range.width();
    }

    private void paint() {
        GraphicsContext g = strip.getGraphicsContext2D();
        g.clearRect(0, 0, strip.getWidth(), STRIP);
        Interval range = model.rateRangeProperty().get();
        model.answeredRate().ifPresent(rate -> answer(g, rate));
        model.previewProperty().get().map(FlightPreview::rate).ifPresent(rate -> preview(g, rate));
        g.setStroke(palette.muted());
        g.setFill(palette.muted());
        g.setLineWidth(1);
        g.setFont(javafx.scene.text.Font.font(10.5));
        g.setTextAlign(javafx.scene.text.TextAlignment.CENTER);
        g.setTextBaseline(javafx.geometry.VPos.TOP);
        for (double tick : StairScale.ticks(range.low(), range.high(), strip.getWidth(), 80)) {
            if (x(tick) < INSET + 6 || x(tick) > strip.getWidth() - INSET - 6) {
                continue; // half a number at an end says nothing
            }
            g.strokeLine(x(tick), STRIP - 13, x(tick), STRIP - 10);
            g.fillText(Wording.number(Digits.text(Math.rint(tick * 1e6) / 1e6)), x(tick), STRIP - 10);
        }
        g.setStroke(palette.predicted());
        g.setLineWidth(2);
        double here = x(model.rateProperty().get());
        g.strokeLine(here, 0, here, STRIP - 12);
    }

    private void answer(GraphicsContext g, Rate rate) {
        Interval within = rate.shortest95();
        g.setFill(palette.strength(palette.link(), 0.12));
        g.fillRect(x(within.low()), STRIP - 15, x(within.high()) - x(within.low()), 3);
        Interval inner = rate.shortest68();
        g.setFill(palette.link());
        g.fillRect(x(inner.low()), STRIP - 15, x(inner.high()) - x(inner.low()), 3);
        outline(g, rate.density(), palette.strength(palette.link(), 0.3), true);
    }

    private void preview(GraphicsContext g, Rate rate) {
        g.setLineDashes(1.5, 3);
        g.setLineWidth(1.8);
        outline(g, rate.density(), palette.tried(), false);
        g.setLineDashes();
    }

    private void outline(GraphicsContext g, Optional<DensityBins> density, Color colour, boolean filled) {
        if (density.isEmpty()) {
            return;
        }
        DensityBins bins = density.get();
        double most = bins.values().stream().mapToDouble(v -> v).max().orElse(1);
        double width = (bins.to() - bins.from()) / bins.values().size();
        g.beginPath();
        g.moveTo(x(bins.from()), STRIP - 15);
        for (int i = 0; i < bins.values().size(); i++) {
            double y = STRIP - 15 - (STRIP - 17) * bins.values().get(i) / most;
            g.lineTo(x(bins.from() + (i + 0.5) * width), y);
        }
        g.lineTo(x(bins.to()), STRIP - 15);
        if (filled) {
            g.setFill(colour);
            g.fill();
        } else {
            g.setStroke(colour);
            g.stroke();
        }
    }
}
