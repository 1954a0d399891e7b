package stillstand.view;

import atlantafx.base.theme.Styles;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.function.Function;
import java.util.function.ToDoubleFunction;
import java.util.stream.Collectors;
import javafx.beans.property.ReadOnlyObjectWrapper;
import javafx.beans.property.ReadOnlyStringWrapper;
import javafx.beans.value.ObservableValue;
import javafx.geometry.Insets;
import javafx.geometry.Pos;
import javafx.scene.canvas.Canvas;
import javafx.scene.canvas.GraphicsContext;
import javafx.scene.control.ContentDisplay;
import javafx.scene.control.Label;
import javafx.scene.control.SelectionMode;
import javafx.scene.control.TableCell;
import javafx.scene.control.TableColumn;
import javafx.scene.control.TableView;
import javafx.scene.input.Clipboard;
import javafx.scene.input.ClipboardContent;
import javafx.scene.input.KeyCode;
import javafx.scene.input.KeyCodeCombination;
import javafx.scene.input.KeyCombination;
import javafx.scene.input.KeyEvent;
import javafx.scene.text.Font;
import javafx.scene.text.TextAlignment;
import stillstand.report.Wording;
import stillstand.uncertainty.Digits;
import stillstand.uncertainty.Interval;

/** A table of results: sorts by numbers, not by their texts, draws on an axis in its header, copies as a spreadsheet takes it. */
final class ResultTable<T> extends TableView<T> {
    private static final double BESIDE_STRIP = 18;
    private static final double SCROLL_BAR = 18;
    private static final double ROW = 26;
    /** Numbers so near to an end of the axis are set inside it. */
    private static final double END = 15;

    private final List<Words<T>> copied = new ArrayList<>();
    private Function<List<T>, String> copies = this::cells;

    private final Map<TableColumn<T, ?>, Double> wrapped = new LinkedHashMap<>();
    private boolean hasStrip;

    private record Words<T>(String header, Function<T, String> words) {}

    /** Draws a row on a strip. */
    @FunctionalInterface
    interface Painter<T> {
        /** Draws on a clear strip of this scale. */
        void paint(GraphicsContext g, T row, Scale scale, Palette palette);
    }

    /** Where a number lies on a strip of a width, and its height. */
    record Scale(Interval range, double width, double height) {
        double x(double value) {
            return 4 + (width - 8) * (value - range.low()) / range.width();
        }
    }

    ResultTable(String id, String says, String none) {
        setId(id);
        setAccessibleText(says);
        getStyleClass().addAll(Styles.DENSE, Styles.STRIPED);
        getSelectionModel().setSelectionMode(SelectionMode.MULTIPLE);
        Label empty = new Label(none);
        empty.setWrapText(true);
        setPlaceholder(empty);
        addEventHandler(KeyEvent.KEY_PRESSED, this::copy);
        widthProperty().addListener((property, before, now) -> widen());
    }

    /** Where nothing is drawn, columns of wrapped words share what width is left. */
    private void widen() {
        double least = getColumns().stream()
                .mapToDouble(column -> wrapped.getOrDefault(column, column.getWidth()))
                .sum();
        double all = wrapped.values().stream().mapToDouble(width -> width).sum();
        double spare = Math.max(0, getWidth() - least - SCROLL_BAR);
        if (!hasStrip && all > 0) {
            wrapped.forEach((column, width) -> column.setPrefWidth(width * (1 + spare / all)));
        }
    }

    /** A column of words, cut where they are too long. */
    void words(String header, Function<T, String> words, double width) {
        add(column(header, words, width));
    }

    /** A column of words on as many lines as they take. */
    void wrapped(String header, Function<T, String> words, double width) {
        TableColumn<T, String> column = column(header, words, width);
        column.setCellFactory(made -> new WrappedCell<>());
        wrapped.put(column, width);
        add(column);
    }

    private TableColumn<T, String> column(String header, Function<T, String> words, double width) {
        TableColumn<T, String> column = new TableColumn<>(header);
        column.setCellValueFactory(cell -> new ReadOnlyStringWrapper(words.apply(cell.getValue())));
        column.setPrefWidth(width);
        copied.add(new Words<>(header, words));
        return column;
    }

    private void add(TableColumn<T, ?> column) {
        getColumns().add(column);
    }

    /** A column that sorts by a number and shows its words. */
    void number(String header, Function<T, String> words, ToDoubleFunction<T> key, double width) {
        TableColumn<T, T> column = new TableColumn<>(header);
        column.setComparator(Comparator.comparingDouble(key));
        column.setCellValueFactory(cell -> new ReadOnlyObjectWrapper<>(cell.getValue()));
        column.setCellFactory(made -> new TableCell<>() {
            {
                setAlignment(Pos.CENTER_RIGHT);
            }

            @Override
            protected void updateItem(T row, boolean empty) {
                super.updateItem(row, empty);
                setText(empty || row == null ? "" : words.apply(row));
            }
        });
        column.setPrefWidth(width);
        copied.add(new Words<>(header, words));
        add(column);
    }

    /**
     * A column that draws each row on one axis, and takes what width the others leave.
     *
     * @param says what the axis is of
     * @param words what a row's drawing says
     */
    void strip(
            String says,
            double least,
            ObservableValue<Interval> axis,
            ToDoubleFunction<T> key,
            Function<T, String> words,
            Painter<T> painter) {
        hasStrip = true;
        Strip strip = new Strip(says, least, axis);
        TableColumn<T, T> column = new TableColumn<>();
        column.setGraphic(strip.head);
        column.setMinWidth(least + BESIDE_STRIP);
        column.setPrefWidth(least + BESIDE_STRIP);
        column.widthProperty().addListener((property, before, now) -> {
            strip.resize(now.doubleValue() - BESIDE_STRIP);
            refresh();
        });
        Runnable fill = () -> {
            double others = getColumns().stream()
                    .filter(other -> other != column)
                    .mapToDouble(TableColumn::getWidth)
                    .sum();
            column.setPrefWidth(Math.max(least + BESIDE_STRIP, getWidth() - others - SCROLL_BAR));
        };
        widthProperty().addListener((property, before, now) -> fill.run());
        strip.head.textFillProperty().addListener((property, before, now) -> {
            strip.paint();
            refresh();
        });
        axis.addListener((property, before, now) -> {
            strip.paint();
            refresh();
        });
        column.setComparator(Comparator.comparingDouble(key));
        column.setCellValueFactory(cell -> new ReadOnlyObjectWrapper<>(cell.getValue()));
        column.setCellFactory(made -> new StripCell<>(strip, words, painter));
        add(column);
    }

    private void copy(KeyEvent event) {
        if (new KeyCodeCombination(KeyCode.C, KeyCombination.SHORTCUT_DOWN).match(event)) {
            ClipboardContent content = new ClipboardContent();
            content.putString(text());
            Clipboard.getSystemClipboard().setContent(content);
            event.consume();
        }
    }

    /** What a copy of some rows says, where that is more than the cells. */
    void copiesAs(Function<List<T>, String> text) {
        copies = text;
    }

    /** The chosen rows, or all, as lines of tab-separated cells under a header. */
    String text() {
        List<T> chosen = getSelectionModel().getSelectedItems();
        return copies.apply(chosen.isEmpty() ? getItems() : chosen);
    }

    private String cells(List<T> rows) {
        return copied.stream().map(Words::header).collect(Collectors.joining("\t")) + "\n"
                + rows.stream()
                        .map(row -> copied.stream()
                                .map(column -> column.words().apply(row))
                                .collect(Collectors.joining("\t")))
                        .collect(Collectors.joining("\n"));
    }

    /** The axis in the header. */
    private static final class Strip {
        private final Canvas canvas;
        private final Label head;
        private final ObservableValue<Interval> axis;

        Strip(String says, double least, ObservableValue<Interval> axis) {
            this.axis = axis;
            canvas = new Canvas(least, 16);
            head = new Label(says);
            head.setGraphic(canvas);
            head.setContentDisplay(ContentDisplay.GRAPHIC_ONLY);
            head.setAccessibleText(says);
            head.setStyle("-fx-padding: 0;"); // so that ticks stand over what they measure
            paint();
        }

        void resize(double width) {
            canvas.setWidth(width);
            paint();
        }

        Scale scale(double height) {
            return new Scale(axis.getValue(), canvas.getWidth(), height);
        }

        Palette palette() {
            return Palette.under(head.getTextFill());
        }

        void paint() {
            GraphicsContext g = canvas.getGraphicsContext2D();
            Scale scale = scale(16);
            g.clearRect(0, 0, scale.width(), 16);
            g.setFill(palette().muted());
            g.setStroke(palette().muted());
            g.setFont(Font.font(10.5));
            Interval range = scale.range();
            for (double tick : StairScale.ticks(range.low(), range.high(), scale.width(), 52)) {
                double x = scale.x(tick);
                g.strokeLine(x, 13, x, 16);
                boolean isLeft = x < END;
                boolean isRight = x > scale.width() - END;
                g.setTextAlign(isLeft ? TextAlignment.LEFT : isRight ? TextAlignment.RIGHT : TextAlignment.CENTER);
                g.fillText(
                        Wording.number(Digits.text(Math.rint(tick * 1e6) / 1e6)),
                        isLeft ? 0 : isRight ? scale.width() : x,
                        10);
            }
        }
    }

    private static final class StripCell<T> extends TableCell<T, T> {
        private final Strip strip;
        private final Function<T, String> words;
        private final Painter<T> painter;
        private final Canvas canvas = new Canvas(1, ROW);

        StripCell(Strip strip, Function<T, String> words, Painter<T> painter) {
            this.strip = strip;
            this.words = words;
            this.painter = painter;
            setPadding(new Insets(0, 8, 0, 8));
        }

        @Override
        protected void updateItem(T row, boolean empty) {
            super.updateItem(row, empty);
            setGraphic(null);
            if (!empty && row != null) {
                Scale scale = strip.scale(ROW);
                Palette palette = strip.palette();
                canvas.setWidth(scale.width());
                GraphicsContext g = canvas.getGraphicsContext2D();
                g.clearRect(0, 0, scale.width(), ROW);
                if (scale.range().contains(0)) {
                    double zero = Math.rint(scale.x(0)) + 0.5;
                    g.setStroke(palette.hair());
                    g.setLineWidth(1);
                    g.strokeLine(zero, 0, zero, ROW);
                }
                painter.paint(g, row, scale, palette);
                setGraphic(canvas);
                setAccessibleText(words.apply(row));
            }
        }
    }
}
