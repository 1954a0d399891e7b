package stillstand.view;

import atlantafx.base.theme.Styles;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.function.Function;
import java.util.function.ToDoubleFunction;
import javafx.beans.property.ReadOnlyObjectWrapper;
import javafx.beans.property.ReadOnlyStringWrapper;
import javafx.collections.ListChangeListener;
import javafx.geometry.Insets;
import javafx.geometry.Pos;
import javafx.scene.canvas.Canvas;
import javafx.scene.canvas.GraphicsContext;
import javafx.scene.control.ChoiceBox;
import javafx.scene.control.ContentDisplay;
import javafx.scene.control.Label;
import javafx.scene.control.SelectionMode;
import javafx.scene.control.TableCell;
import javafx.scene.control.TableColumn;
import javafx.scene.control.TableRow;
import javafx.scene.control.TableView;
import javafx.scene.input.Clipboard;
import javafx.scene.input.ClipboardContent;
import javafx.scene.input.KeyCode;
import javafx.scene.input.KeyCodeCombination;
import javafx.scene.input.KeyCombination;
import javafx.scene.input.KeyEvent;
import javafx.scene.layout.BorderPane;
import javafx.scene.layout.HBox;
import javafx.scene.paint.Paint;
import stillstand.report.Wording;
import stillstand.uncertainty.DensityBins;
import stillstand.uncertainty.Digits;
import stillstand.uncertainty.Interval;
import stillstand.uplift.Rate;
import stillstand.view.RatesModel.Row;

/** All rates in a table that sorts by any column, each with its density on one shared axis. */
public final class RatesView extends BorderPane {
    private static final String ALL = "all sites";
    private static final double LEAST_STRIP = 130;
    private static final double BESIDE_STRIP = 18;
    private static final double SCROLL_BAR = 18;
    private static final double ROW = 26;

    private final RatesModel model;
    private final TableView<Row> table = new TableView<>();
    private final ChoiceBox<String> site = new ChoiceBox<>();
    private final Label status = new Label();
    private final Label staleMark = new Label("OLDER THAN THE STUDY");
    private final Canvas axis = new Canvas(LEAST_STRIP, 16);
    private boolean following;

    /** The view of a model. */
    public RatesView(RatesModel model) {
        this.model = model;
        columns();
        table.setItems(model.rows());
        table.setId("rates-table");
        table.getStyleClass().addAll(Styles.DENSE, Styles.STRIPED);
        table.getSelectionModel().setSelectionMode(SelectionMode.MULTIPLE);
        table.setPlaceholder(new Label("No rates yet: run the study."));
        table.setAccessibleText("Rates of levels and flights");
        table.setRowFactory(made -> new KindRow());
        table.addEventHandler(KeyEvent.KEY_PRESSED, this::copy);
        setTop(bar());
        setCenter(table);
        BorderPane.setMargin(table, new Insets(0, 12, 12, 12));
        model.rows().addListener((ListChangeListener<Row>) change -> follow());
        model.sites().addListener((ListChangeListener<String>) change -> followSites());
        model.axisProperty().addListener((property, before, now) -> paintAxis());
        status.textFillProperty().addListener((property, before, now) -> {
            paintAxis();
            table.refresh();
        });
        followSites();
        follow();
        paintAxis();
    }

    private HBox bar() {
        site.setId("rates-site");
        site.setAccessibleText("Site");
        site.getSelectionModel().selectedItemProperty().addListener((property, before, now) -> {
            if (now != null && !following) {
                model.choose(now.equals(ALL) ? "" : now);
            }
        });
        status.setWrapText(true);
        status.setId("rates-status");
        staleMark.getStyleClass().addAll(Styles.TEXT_SMALL, Styles.WARNING, Styles.TEXT_BOLD);
        staleMark.setMinWidth(USE_PREF_SIZE);
        Label name = new Label("Site");
        name.setLabelFor(site);
        HBox bar = new HBox(10, name, site, staleMark, status);
        bar.setAlignment(Pos.CENTER_LEFT);
        bar.setPadding(new Insets(10, 12, 10, 12));
        return bar;
    }

    private void followSites() {
        following = true;
        site.getItems().setAll(ALL);
        site.getItems().addAll(model.sites());
        site.setValue(ALL);
        following = false;
    }

    private void follow() {
        status.setText(model.status());
        staleMark.setVisible(model.isStale());
        staleMark.setManaged(model.isStale());
    }

    private void columns() {
        text("Site", Row::site, 126, false);
        text("Rate of", Row::name, 98, false);
        text("Kind", row -> row.kind().toString(), 84, false);
        text("Bound, or why none", Row::says, 194, true);
        number("Median", Row::median, row -> row.rate().map(Rate::median), 114);
        number(
                "68 %",
                Row::interval68, row -> row.rate().map(rate -> rate.shortest68().low()), 114);
        number(
                "95 %",
                Row::interval95, row -> row.rate().map(rate -> rate.shortest95().low()), 114);
        density();
        text("Highstand", Row::stages, 126, false);
        number("Age (ka)", Row::ageText, row -> row.age().map(age -> age.median()), 118);
    }

    private void text(String name, Function<Row, String> words, double width, boolean wraps) {
        TableColumn<Row, String> column = new TableColumn<>(name);
        column.setCellValueFactory(cell -> new ReadOnlyStringWrapper(words.apply(cell.getValue())));
        if (wraps) {
            column.setCellFactory(made -> new WrappedCell<>());
        }
        column.setPrefWidth(width);
        table.getColumns().add(column);
    }

    /** Sorts by the number and shows the words; what has none comes last. */
    private void number(String name, Function<Row, String> words, Function<Row, Optional<Double>> by, double width) {
        TableColumn<Row, Row> column = new TableColumn<>(name);
        ToDoubleFunction<Row> key = row -> by.apply(row).orElse(Double.POSITIVE_INFINITY);
        column.setComparator(Comparator.comparingDouble(key));
        column.setCellValueFactory(cell -> new ReadOnlyObjectWrapper<>(cell.getValue()));
        column.setCellFactory(made -> new TableCell<>() {
            {
                setAlignment(Pos.CENTER_RIGHT);
            }

            @Override
            protected void updateItem(Row row, boolean empty) {
                super.updateItem(row, empty);
                setText(empty || row == null ? "" : words.apply(row));
            }
        });
        column.setPrefWidth(width);
        table.getColumns().add(column);
    }

    private void density() {
        TableColumn<Row, Row> column = new TableColumn<>();
        Label head = new Label("Density");
        head.setGraphic(axis);
        head.setContentDisplay(ContentDisplay.GRAPHIC_ONLY);
        head.setAccessibleText("Density, metres per thousand years");
        column.setGraphic(head);
        column.setMinWidth(LEAST_STRIP + BESIDE_STRIP);
        column.setPrefWidth(LEAST_STRIP + BESIDE_STRIP);
        column.widthProperty().addListener((property, before, now) -> {
            axis.setWidth(now.doubleValue() - BESIDE_STRIP);
            paintAxis();
            table.refresh();
        });
        table.widthProperty().addListener((property, before, now) -> {
            double others = table.getColumns().stream()
                    .filter(other -> other != column)
                    .mapToDouble(TableColumn::getWidth)
                    .sum();
            column.setPrefWidth(Math.max(LEAST_STRIP + BESIDE_STRIP, now.doubleValue() - others - SCROLL_BAR));
        });
        column.setComparator(Comparator.comparingDouble(
                row -> row.rate().map(rate -> rate.shortest95().width()).orElse(Double.POSITIVE_INFINITY)));
        column.setCellValueFactory(cell -> new ReadOnlyObjectWrapper<>(cell.getValue()));
        column.setCellFactory(made -> new DensityCell());
        table.getColumns().add(column);
    }

    private void copy(KeyEvent event) {
        if (new KeyCodeCombination(KeyCode.C, KeyCombination.SHORTCUT_DOWN).match(event)) {
            List<Row> chosen = table.getSelectionModel().getSelectedItems();
            ClipboardContent content = new ClipboardContent();
            content.putString(RatesModel.text(chosen.isEmpty() ? model.rows() : chosen));
            Clipboard.getSystemClipboard().setContent(content);
            event.consume();
        }
    }

    private double x(double rate) {
        Interval range = model.axisProperty().get();
        return 4 + (axis.getWidth() - 8) * (rate - range.low()) / range.width();
    }

    private void paintAxis() {
        GraphicsContext g = axis.getGraphicsContext2D();
        Interval range = model.axisProperty().get();
        g.clearRect(0, 0, axis.getWidth(), 16);
        Paint ink = Palette.under(status.getTextFill()).muted();
        g.setFill(ink);
        g.setStroke(ink);
        g.setTextAlign(javafx.scene.text.TextAlignment.CENTER);
        g.setFont(javafx.scene.text.Font.font(10.5));
        for (double tick : StairScale.ticks(range.low(), range.high(), axis.getWidth(), 52)) {
            g.strokeLine(x(tick), 13, x(tick), 16);
            g.fillText(Wording.number(Digits.text(Math.rint(tick * 1e6) / 1e6)), x(tick), 10);
        }
    }

    /** Rows of flights stand out. */
    private static final class KindRow extends TableRow<Row> {
        @Override
        protected void updateItem(Row row, boolean empty) {
            super.updateItem(row, empty);
            boolean isFlight = !empty && row != null && row.kind() == RatesModel.Kind.FLIGHT;
            getStyleClass().remove(Styles.TEXT_BOLD);
            if (isFlight) {
                getStyleClass().add(Styles.TEXT_BOLD);
            }
        }
    }

    /** A density with its two shortest intervals and its median. */
    private final class DensityCell extends TableCell<Row, Row> {
        private final Canvas canvas = new Canvas(LEAST_STRIP, ROW);

        DensityCell() {
            setPadding(new Insets(0, 8, 0, 8));
        }

        @Override
        protected void updateItem(Row row, boolean empty) {
            super.updateItem(row, empty);
            setGraphic(null);
            if (!empty && row != null && row.rate().isPresent()) {
                paint(row.rate().get());
                setGraphic(canvas);
                setAccessibleText(row.median() + ", 95 % " + row.interval95());
            }
        }

        private void paint(Rate rate) {
            canvas.setWidth(axis.getWidth());
            Palette palette = Palette.under(status.getTextFill());
            GraphicsContext g = canvas.getGraphicsContext2D();
            g.clearRect(0, 0, canvas.getWidth(), ROW);
            double foot = ROW - 5;
            g.setStroke(palette.hair());
            g.strokeLine(Math.rint(x(0)) + 0.5, 0, Math.rint(x(0)) + 0.5, ROW);
            g.setFill(palette.strength(palette.link(), 0.25));
            rate.density().ifPresent(bins -> fill(g, bins, foot));
            g.setFill(palette.strength(palette.link(), 0.45));
            bar(g, rate.shortest95(), foot, 1.5);
            g.setFill(palette.link());
            bar(g, rate.shortest68(), foot - 1, 3.5);
            g.setStroke(palette.ink());
            g.setLineWidth(1.6);
            g.strokeLine(x(rate.median()), foot - 4, x(rate.median()), foot + 4);
        }

        private void bar(GraphicsContext g, Interval interval, double y, double height) {
            double from = Math.max(0, x(interval.low()));
            double to = Math.min(canvas.getWidth(), x(interval.high()));
            g.fillRect(from, y, Math.max(1, to - from), height);
        }

        private void fill(GraphicsContext g, DensityBins bins, double foot) {
            double most = bins.values().stream().mapToDouble(v -> v).max().orElse(1);
            double width = (bins.to() - bins.from()) / bins.values().size();
            int n = bins.values().size();
            double[] xs = new double[n + 2];
            double[] ys = new double[n + 2];
            xs[0] = x(bins.from());
            ys[0] = foot;
            for (int i = 0; i < n; i++) {
                xs[i + 1] = x(bins.from() + (i + 0.5) * width);
                ys[i + 1] = foot - (foot - 2) * bins.values().get(i) / most;
            }
            xs[n + 1] = x(bins.to());
            ys[n + 1] = foot;
            g.fillPolygon(xs, ys, n + 2);
        }
    }
}
