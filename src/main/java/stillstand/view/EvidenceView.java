package stillstand.view;

import java.util.HashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import javafx.geometry.Orientation;
import javafx.scene.Node;
import javafx.scene.control.Button;
import javafx.scene.control.Label;
import javafx.scene.control.ListCell;
import javafx.scene.control.ListView;
import javafx.scene.control.MenuButton;
import javafx.scene.control.MenuItem;
import javafx.scene.control.SplitPane;
import javafx.scene.control.TextArea;
import javafx.scene.control.ToggleButton;
import javafx.scene.control.ToggleGroup;
import javafx.scene.control.Tooltip;
import javafx.scene.input.KeyCode;
import javafx.scene.layout.BorderPane;
import javafx.scene.layout.HBox;
import javafx.scene.layout.Priority;
import javafx.scene.layout.Region;
import javafx.scene.layout.VBox;
import stillstand.files.StudyJson;
import stillstand.view.CellMarks.Mark;
import stillstand.view.EvidenceModel.Finding;

/** The area where evidence is typed, pasted and mended. */
final class EvidenceView extends BorderPane {
    private final EvidenceModel model;
    private final Map<String, ToggleButton> parts = new HashMap<>();
    private final HBox tools = new HBox();
    private final BorderPane content = new BorderPane();
    private final Label sentence = new Label();
    private final ListView<Finding> findings = new ListView<>();
    private final Label noFindings = new Label();
    private final SettingsView settings;
    private Optional<GridView> grid = Optional.empty();

    EvidenceView(EvidenceModel model) {
        this.model = model;
        this.settings = new SettingsView(model.settings());
        getStyleClass().add("evidence");
        HBox top = new HBox(switcher(), spacer(), tools);
        top.getStyleClass().add("evidence-top");
        tools.getStyleClass().add("evidence-tools");
        sentence.getStyleClass().add("sentence");
        sentence.setId("sentence");
        sentence.setMaxWidth(Double.MAX_VALUE);
        VBox upper = new VBox(content, sentence);
        VBox.setVgrow(content, Priority.ALWAYS);
        BorderPane lower = findingList();
        SplitPane split = new SplitPane(upper, lower);
        split.setOrientation(Orientation.VERTICAL);
        split.setDividerPositions(0.8);
        SplitPane.setResizableWithParent(lower, false);
        setTop(top);
        setCenter(split);
        model.partProperty().addListener((source, before, after) -> show());
        model.document().draftProperty().addListener((source, before, after) -> {
            showParts();
            if (isOutdated()) {
                show();
            }
        });
        model.findingsProperty().addListener((source, before, after) -> showFindings());
        model.wantedKeyProperty().addListener((source, before, after) -> after.ifPresent(settings::goTo));
        show();
        showParts();
        showFindings();
    }

    private void showParts() {
        parts.forEach((part, button) -> {
            button.setVisible(model.isOffered(part));
            button.setManaged(model.isOffered(part));
        });
    }

    private HBox switcher() {
        HBox bar = new HBox();
        bar.getStyleClass().add("parts");
        ToggleGroup group = new ToggleGroup();
        for (String part : EvidenceModel.PARTS) {
            ToggleButton button = new ToggleButton(title(part));
            button.setId("part-" + part.replaceFirst("\\..*", ""));
            button.setToggleGroup(group);
            button.setOnAction(event -> {
                model.partProperty().set(part);
                button.setSelected(true);
            });
            parts.put(part, button);
            bar.getChildren().add(button);
        }
        return bar;
    }

    private static String title(String part) {
        return part.equals(StudyJson.NAME)
                ? "Settings"
                : part.equals("gia.csv")
                        ? "Local sea level"
                        : part.substring(0, 1).toUpperCase(Locale.ROOT)
                                + part.substring(1).replace(".csv", "");
    }

    private static Region spacer() {
        Region spacer = new Region();
        HBox.setHgrow(spacer, Priority.ALWAYS);
        return spacer;
    }

    private BorderPane findingList() {
        findings.setId("findings");
        findings.setAccessibleText("Problems and warnings");
        findings.setCellFactory(any -> new FindingCell());
        noFindings.getStyleClass().add("quiet");
        findings.setPlaceholder(noFindings);
        findings.setOnMouseClicked(event -> jump());
        findings.setOnKeyPressed(event -> {
            if (event.getCode() == KeyCode.ENTER) {
                jump();
            }
        });
        BorderPane pane = new BorderPane(findings);
        pane.setMinHeight(90);
        return pane;
    }

    private void jump() {
        Optional.ofNullable(findings.getSelectionModel().getSelectedItem()).ifPresent(this::goTo);
    }

    private void goTo(Finding finding) {
        model.goTo(finding);
        if (finding.file().endsWith(".csv")) {
            grid.ifPresent(GridView::requestFocus);
        }
    }

    /** Goes to the next problem or warning, or the one before. */
    void goToNext(boolean isBackwards) {
        model.next(isBackwards).ifPresent(finding -> {
            findings.getSelectionModel().select(finding);
            findings.scrollTo(finding);
            goTo(finding);
        });
    }

    /** The grid on screen, where there is one. */
    Optional<GridView> grid() {
        return grid;
    }

    private boolean isOutdated() {
        String part = model.partProperty().get();
        if (part.equals(StudyJson.NAME)) {
            return settings.isUsable() != (content.getCenter() == settings);
        }
        return model.grid(part)
                .map(now -> grid.map(shown -> shown.model() != now).orElse(true))
                .orElse(grid.isPresent());
    }

    private void show() {
        String part = model.partProperty().get();
        Optional.ofNullable(parts.get(part)).ifPresent(button -> button.setSelected(true));
        tools.getChildren().clear();
        grid = part.equals(StudyJson.NAME) ? Optional.empty() : model.grid(part).map(GridView::new);
        sentence.setVisible(grid.isPresent());
        sentence.setManaged(grid.isPresent());
        grid.ifPresent(this::useGrid);
        if (part.equals(StudyJson.NAME) && settings.isUsable()) {
            content.setCenter(settings);
        } else if (grid.isEmpty()) {
            content.setCenter(model.hasText(part) ? asText(part) : absent(part));
        }
    }

    private void useGrid(GridView shown) {
        content.setCenter(shown);
        GridModel cells = shown.model();
        MenuButton add = new MenuButton("Add column");
        add.setId("add-column");
        add.setMnemonicParsing(false);
        add.setOnShowing(event -> {
            add.getItems()
                    .setAll(cells.columnsToAdd().stream()
                            .map(header -> item(header, () -> cells.addColumn(header)))
                            .toList());
            add.getItems().add(item("x_ and a name of your own…", shown::addOwnColumn));
        });
        add.getItems().add(new MenuItem());
        tools.getChildren()
                .addAll(
                        tool("Paste", "Spreadsheet cells from the clipboard, at the caret (Ctrl+V)", shown::paste),
                        tool("Fill down", "The first chosen row into those below (Ctrl+D)", cells::fillDown),
                        tool("Insert rows", "Above the choice, as many as are chosen (Ctrl+I)", cells::insertRows),
                        tool("Remove rows", "The chosen rows (Ctrl+Minus)", cells::removeRows),
                        add);
        tools.setDisable(cells.isReadOnly());
        cells.chosenProperty().addListener((source, before, after) -> showSentence());
        cells.marksProperty().addListener((source, before, after) -> showSentence());
        showSentence();
    }

    private static MenuItem item(String label, Runnable action) {
        MenuItem item = new MenuItem(label);
        item.setMnemonicParsing(false);
        item.setOnAction(event -> action.run());
        return item;
    }

    private static Button tool(String label, String help, Runnable action) {
        Button button = new Button(label);
        button.setTooltip(new Tooltip(help));
        button.setAccessibleHelp(help);
        button.setOnAction(event -> action.run());
        return button;
    }

    /** The sentence about the caret's cell, for those who do not hover. */
    private void showSentence() {
        Optional<GridModel> cells = grid.map(GridView::model);
        Optional<Mark> mark = cells.flatMap(GridModel::markAtCaret);
        sentence.getStyleClass().removeAll("problem", "warning");
        mark.ifPresent(found -> sentence.getStyleClass().add(found.isProblem() ? "problem" : "warning"));
        sentence.setText(mark.map(Mark::sentence)
                .orElse(cells.map(EvidenceView::whereabouts).orElse("")));
    }

    private static String whereabouts(GridModel cells) {
        CellRange at = cells.chosen();
        String name = cells.header(at.column());
        return at.rowCount() * at.columnCount() > 1
                ? at.rowCount() + " rows, " + at.columnCount() + " columns chosen"
                : (name.isEmpty() ? "column " + (at.column() + 1) : name)
                        + (at.row() < cells.sheet().rowCount() ? "" : ": type or paste here to add a row");
    }

    private Node asText(String name) {
        Label why = new Label(name + " cannot be shown in cells: mend its text here, or in an editor.");
        why.setWrapText(true);
        TextArea text = new TextArea(model.text(name));
        text.setId("text-" + name.replaceFirst("\\..*", ""));
        text.getStyleClass().add("file-text");
        text.setEditable(!model.document().isReadOnly());
        text.setAccessibleText("Text of " + name);
        Button apply = new Button("Use this text");
        apply.setDisable(model.document().isReadOnly());
        apply.setOnAction(event -> model.writeText(name, text.getText()));
        VBox box = new VBox(why, text, apply);
        box.getStyleClass().add("as-text");
        VBox.setVgrow(text, Priority.ALWAYS);
        return box;
    }

    private Node absent(String name) {
        Label nothing = new Label(
                name.equals("samples.csv")
                        ? "This study has no dated samples."
                        : name.equals("gia.csv")
                                ? "This study says nothing of local minus global sea level."
                                : "This study has no " + name + " that can be read as text.");
        Button add = new Button("Add " + name);
        add.setId("add-table");
        add.setDisable(model.document().isReadOnly());
        add.setOnAction(event -> {
            if (name.equals(StudyJson.NAME)) {
                model.writeText(name, "{\"title\": \"a study\"}\n");
            } else {
                model.addTable(name);
            }
        });
        VBox box = new VBox(nothing, add);
        box.getStyleClass().add("absent");
        return box;
    }

    private void showFindings() {
        List<Finding> all = model.findings();
        findings.getItems().setAll(all);
        noFindings.setText("Nothing is wrong with the evidence.");
        parts.forEach((part, button) -> {
            long count = model.problemCount(part);
            button.setText(title(part) + (count == 0 ? "" : "  " + count));
            button.getStyleClass().remove("wrong");
            if (count > 0) {
                button.getStyleClass().add("wrong");
            }
            button.setAccessibleText(title(part) + (count == 0 ? "" : ", " + count + " problems"));
        });
        showSentence();
    }

    /** A line of the list: a word first, so that nothing rests on colour. */
    private static final class FindingCell extends ListCell<Finding> {
        @Override
        protected void updateItem(Finding finding, boolean isEmpty) {
            super.updateItem(finding, isEmpty);
            getStyleClass().removeAll("problem", "warning");
            if (isEmpty || finding == null) {
                setText(null);
            } else {
                setText((finding.isProblem() ? "Problem  " : "Warning  ") + finding.sentence());
                getStyleClass().add(finding.isProblem() ? "problem" : "warning");
            }
        }
    }
}
