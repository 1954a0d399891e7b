package stillstand.view;

import atlantafx.base.theme.Styles;
import java.util.ArrayList;
import java.util.List;
import javafx.beans.property.ReadOnlyStringWrapper;
import javafx.collections.ListChangeListener;
import javafx.geometry.Insets;
import javafx.geometry.Pos;
import javafx.scene.control.Button;
import javafx.scene.control.CheckBox;
import javafx.scene.control.ChoiceBox;
import javafx.scene.control.Label;
import javafx.scene.control.ScrollPane;
import javafx.scene.control.SplitPane;
import javafx.scene.control.TableColumn;
import javafx.scene.control.TableView;
import javafx.scene.control.Tooltip;
import javafx.scene.layout.BorderPane;
import javafx.scene.layout.GridPane;
import javafx.scene.layout.HBox;
import javafx.scene.layout.Priority;
import javafx.scene.layout.Region;
import javafx.scene.layout.VBox;
import stillstand.report.CurveReport;
import stillstand.view.SeaLevelModel.Curve;

/** Curves to draw and to use, their highstands, and what replaces them. */
public final class SeaLevelView extends BorderPane {
    /** What a study uses comes first, then what it was picked from. */
    private static final List<Integer> COLUMNS = List.of(0, 5, 6, 7, 2, 3, 4, 1);

    private final SeaLevelModel model;
    private final SeaLevelPaper paper;
    private final GridPane curves = new GridPane();
    private final ChoiceBox<String> overrides = new ChoiceBox<>();
    private final TableView<List<String>> highstands = new TableView<>();
    private final Label status = new Label();
    private final Label reading = new Label();
    private final List<Ticks> ticks = new ArrayList<>();
    private boolean following;

    /** The two boxes of a curve. */
    private record Ticks(Curve curve, CheckBox use, CheckBox look) {}

    /** The view of a model. */
    public SeaLevelView(SeaLevelModel model) {
        this.model = model;
        paper = new SeaLevelPaper(model);
        paper.setId("sea-paper");
        paper.onReading(reading::setText);
        SplitPane split = new SplitPane(chart(), table());
        split.setDividerPositions(0.58);
        setCenter(split);
        setLeft(chooser());
        status.textFillProperty()
                .addListener((property, before, now) -> paper.use(Palette.under(status.getTextFill())));
        model.curves().addListener((ListChangeListener<Curve>) change -> listCurves());
        model.pictureProperty().addListener((property, before, now) -> follow());
        listCurves();
        model.wholeView();
    }

    private Region chart() {
        status.setId("sea-status");
        status.getStyleClass().add(Styles.TEXT_BOLD);
        status.setWrapText(true);
        Button nearer = zoom("+", "Nearer", 0.8);
        Button farther = zoom("−", "Farther", 1.25);
        Button all = new Button("Show all");
        all.getStyleClass().addAll(Styles.SMALL, Styles.BUTTON_OUTLINED);
        all.setOnAction(event -> model.wholeView());
        Region gap = new Region();
        HBox.setHgrow(gap, Priority.ALWAYS);
        HBox bar = new HBox(6, status, gap, nearer, farther, all);
        bar.setAlignment(Pos.CENTER_LEFT);
        bar.setPadding(new Insets(10, 12, 6, 12));
        reading.setId("sea-reading");
        reading.setMinHeight(22);
        reading.setPadding(new Insets(0, 12, 6, 12));
        VBox.setVgrow(paper, Priority.ALWAYS);
        return new VBox(bar, paper, reading);
    }

    private Button zoom(String sign, String says, double factor) {
        Button button = new Button(sign);
        button.getStyleClass().addAll(Styles.SMALL, Styles.BUTTON_OUTLINED);
        button.setAccessibleText(says);
        button.setTooltip(new Tooltip(says));
        button.setMinWidth(USE_PREF_SIZE);
        button.setOnAction(event -> {
            SeaLevelModel.Pane pane = model.paneProperty().get();
            model.zoom(
                    factor,
                    (pane.agesKa().low() + pane.agesKa().high()) / 2,
                    (pane.metres().low() + pane.metres().high()) / 2);
        });
        return button;
    }

    private Region chooser() {
        curves.setHgap(10);
        curves.setVgap(7);
        overrides.setId("sea-overrides");
        overrides.setItems(model.overrides());
        overrides.setMaxWidth(Double.MAX_VALUE);
        overrides.getSelectionModel().selectedItemProperty().addListener((property, before, now) -> {
            if (now != null && !following) {
                model.override(now);
            }
        });
        Label replaces = new Label("Replaces the curve's own highstands");
        replaces.setLabelFor(overrides);
        replaces.setWrapText(true);
        Label how = muted(
                "Filled dots are picked from the curve: the highest turning point in each stage's window. Diamonds stand"
                        + " in their place; a ring and a thread show the pick they replaced. Bars are one sigma, shared errors in them.");
        Label head = new Label("Curves");
        head.getStyleClass().add(Styles.TITLE_4);
        VBox box = new VBox(10, head, curves, replaces, overrides, how);
        box.setPadding(new Insets(10, 12, 12, 14));
        ScrollPane scroll = new ScrollPane(box);
        scroll.setFitToWidth(true);
        scroll.setPrefWidth(276);
        scroll.setHbarPolicy(ScrollPane.ScrollBarPolicy.NEVER);
        return scroll;
    }

    private static Label muted(String text) {
        Label label = new Label(text);
        label.setWrapText(true);
        label.setMinHeight(USE_PREF_SIZE);
        label.getStyleClass().addAll(Styles.TEXT_SMALL, Styles.TEXT_MUTED);
        return label;
    }

    private Region table() {
        for (int i : COLUMNS) {
            int at = i;
            TableColumn<List<String>, String> column = new TableColumn<>(CurveReport.HIGHSTAND_COLUMNS.get(i));
            column.setCellValueFactory(
                    cell -> new ReadOnlyStringWrapper(cell.getValue().get(at)));
            column.setPrefWidth(List.of(62, 104, 92, 84, 132, 104, 116, 62).get(i));
            column.setSortable(false);
            column.setReorderable(false);
            highstands.getColumns().add(column);
        }
        highstands.setId("sea-highstands");
        highstands.getStyleClass().addAll(Styles.DENSE, Styles.STRIPED);
        highstands.setAccessibleText("Highstands as picked and as used");
        highstands.setPlaceholder(new Label("No highstand: tick a curve that shows one."));
        Label note = muted("* from the table that replaces them, † Stillstand's own. ± is 1 sigma.");
        VBox box = new VBox(6, highstands, note);
        box.setPadding(new Insets(10, 12, 10, 10));
        VBox.setVgrow(highstands, Priority.ALWAYS);
        return box;
    }

    private void listCurves() {
        curves.getChildren().clear();
        ticks.clear();
        Label use = new Label("Use");
        Label look = new Label("Draw");
        use.getStyleClass().addAll(Styles.TEXT_SMALL, Styles.TEXT_MUTED);
        look.getStyleClass().addAll(Styles.TEXT_SMALL, Styles.TEXT_MUTED);
        use.setMinWidth(USE_PREF_SIZE);
        look.setMinWidth(USE_PREF_SIZE);
        curves.addRow(0, use, look);
        for (Curve curve : model.curves()) {
            CheckBox used = new CheckBox();
            used.setId("sea-use-" + curve.id());
            used.setAccessibleText("Use " + curve.id() + " in the study");
            used.setOnAction(event -> model.choose(curve.id(), used.isSelected()));
            CheckBox drawn = new CheckBox();
            drawn.setId("sea-draw-" + curve.id());
            drawn.setAccessibleText("Draw " + curve.id() + " for comparison");
            drawn.setOnAction(event -> model.lookAt(curve.id(), drawn.isSelected()));
            Label name = new Label(curve.id());
            Tooltip tip = new Tooltip(curve.says());
            tip.setWrapText(true);
            tip.setMaxWidth(420);
            name.setTooltip(tip);
            ticks.add(new Ticks(curve, used, drawn));
            curves.addRow(ticks.size(), used, drawn, name);
        }
        follow();
    }

    private void follow() {
        following = true;
        for (Ticks each : ticks) {
            boolean chosen = model.isChosen(each.curve().id());
            each.use().setSelected(chosen);
            each.look().setSelected(chosen || model.isLookedAt(each.curve().id()));
            each.look().setDisable(chosen);
        }
        overrides.setValue(model.overridesInUse());
        overrides.setDisable(model.tableInUse().isPresent());
        following = false;
        status.setText(model.status());
        highstands.getItems().setAll(model.pictureProperty().get().cells());
    }
}
