package stillstand.view;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.function.Consumer;
import java.util.function.Supplier;
import javafx.scene.Node;
import javafx.scene.control.CheckBox;
import javafx.scene.control.ComboBox;
import javafx.scene.control.Control;
import javafx.scene.control.Label;
import javafx.scene.control.ScrollPane;
import javafx.scene.control.TextField;
import javafx.scene.control.Tooltip;
import javafx.scene.input.KeyCode;
import javafx.scene.input.KeyEvent;
import javafx.scene.layout.BorderPane;
import javafx.scene.layout.GridPane;
import javafx.scene.layout.HBox;
import javafx.scene.layout.Priority;
import javafx.scene.layout.VBox;
import stillstand.files.StudyJson;
import stillstand.view.SettingsModel.Field;

/** The settings of a study as a form. A blank field is one that the study does not state: Stillstand's default holds. */
final class SettingsView extends BorderPane {
    private static final String DEFAULT = "default";
    private static final String WRONG = "wrong";
    private static final double LABEL_WIDTH = 226;

    private final SettingsModel model;
    private final Map<String, Control> inputs = new HashMap<>();
    private final List<Runnable> refreshers = new ArrayList<>();
    private boolean isRefreshing;

    SettingsView(SettingsModel model) {
        this.model = model;
        getStyleClass().add("settings");
        HBox groups = new HBox(
                column(form(SettingsModel.STUDY), form(SettingsModel.PRIOR), form(SettingsModel.MATCHING)),
                column(
                        group("Curves and their weights", curves()),
                        form(SettingsModel.SEA_LEVEL),
                        form(SettingsModel.SITES),
                        form(SettingsModel.LEVERAGE)));
        groups.getStyleClass().add("settings-groups");
        ScrollPane scroll = new ScrollPane(groups);
        scroll.setFitToWidth(true);
        scroll.setId("settings");
        setCenter(scroll);
        refresh();
        StudyDocument document = model.document();
        document.draftProperty().addListener((source, before, after) -> refresh());
        document.checkedProperty().addListener((source, before, after) -> refresh());
    }

    private static VBox column(VBox... groups) {
        VBox column = new VBox(groups);
        column.getStyleClass().add("settings-column");
        HBox.setHgrow(column, Priority.ALWAYS);
        return column;
    }

    private VBox form(String group) {
        GridPane form = new GridPane();
        form.getStyleClass().add("form");
        model.fields().stream().filter(field -> field.group().equals(group)).forEach(field -> addRow(form, field));
        return group(group, form);
    }

    private static VBox group(String name, Node content) {
        Label title = new Label(name);
        title.getStyleClass().add("group-title");
        VBox group = new VBox(title, content);
        group.getStyleClass().add("settings-group");
        return group;
    }

    private void addRow(GridPane form, Field field) {
        Control input = field.words().isEmpty() ? textField(field) : choice(field);
        input.setId("setting-" + field.keyPath());
        input.setDisable(model.document().isReadOnly());
        input.setTooltip(new Tooltip(field.keyPath() + ": " + field.expected()));
        input.setMaxWidth(Double.MAX_VALUE);
        GridPane.setHgrow(input, Priority.ALWAYS);
        inputs.put(field.keyPath(), input);
        Label label = new Label(field.label());
        label.setLabelFor(input);
        label.setMinWidth(LABEL_WIDTH);
        label.setPrefWidth(LABEL_WIDTH);
        Label wrong = wrongLabel();
        refreshers.add(() -> {
            Optional<String> problem = model.problem(field.keyPath());
            showProblem(input, wrong, problem);
            input.setAccessibleText(field.label()
                    + problem.map(sentence -> ". Problem: " + sentence).orElse(""));
        });
        int row = form.getRowCount();
        form.addRow(row, label, input);
        form.add(wrong, 1, row + 1);
    }

    private static Label wrongLabel() {
        Label wrong = new Label();
        wrong.getStyleClass().add("wrong-text");
        wrong.setWrapText(true);
        return wrong;
    }

    private static void showProblem(Node input, Label wrong, Optional<String> problem) {
        wrong.setText(problem.orElse(""));
        wrong.setVisible(problem.isPresent());
        wrong.setManaged(problem.isPresent());
        input.getStyleClass().remove(WRONG);
        if (problem.isPresent()) {
            input.getStyleClass().add(WRONG);
        }
    }

    private TextField textField(Field field) {
        TextField input = new TextField();
        refreshers.add(() -> input.setPromptText(prompt(field)));
        commitsBy(input, () -> model.value(field), typed -> model.write(field, typed));
        return input;
    }

    private String prompt(Field field) {
        String value = model.defaultOf(field);
        return value.isEmpty() ? DEFAULT : DEFAULT + ": " + value;
    }

    /** What is typed counts on Enter and when the field is left; Escape takes it back. */
    private void commitsBy(TextField input, Supplier<String> now, Consumer<String> write) {
        refreshers.add(() -> {
            if (!input.isFocused() || !input.getText().equals(now.get())) {
                input.setText(now.get());
            }
        });
        input.setOnAction(event -> write.accept(input.getText()));
        input.focusedProperty().addListener((source, was, is) -> {
            if (was && !is) {
                write.accept(input.getText());
            }
        });
        input.addEventFilter(KeyEvent.KEY_PRESSED, event -> {
            boolean isUntouched = input.getText().equals(now.get());
            if (event.getCode() == KeyCode.ESCAPE && !isUntouched) {
                input.setText(now.get());
                event.consume();
            } else if (event.getCode() == KeyCode.Z && event.isShortcutDown() && isUntouched) {
                event.consume(); // nothing typed here: the edit before
                if (event.isShiftDown()) {
                    model.document().redo();
                } else {
                    model.document().undo();
                }
            }
        });
    }

    private ComboBox<String> choice(Field field) {
        ComboBox<String> input = new ComboBox<>();
        input.getItems().add("");
        input.getItems().addAll(field.words());
        refreshers.add(() -> {
            input.setPromptText(prompt(field));
            String value = model.value(field);
            if (value.isEmpty()) {
                input.getSelectionModel().clearSelection(); // shows that the default holds
            } else {
                input.setValue(value);
            }
        });
        input.setOnAction(event -> {
            if (!isRefreshing && input.getValue() != null) {
                model.write(field, input.getValue());
            }
        });
        return input;
    }

    private VBox curves() {
        VBox list = new VBox();
        list.getStyleClass().add("curve-list");
        Label wrong = wrongLabel();
        for (String id : model.curveIds()) {
            CheckBox box = new CheckBox(id);
            box.setId("curve-" + id);
            box.setMnemonicParsing(false);
            box.setMinWidth(230);
            TextField weight = new TextField();
            weight.setPromptText("weight 1");
            weight.setPrefColumnCount(6);
            weight.setAccessibleText("Weight of " + id);
            box.setOnAction(event -> model.use(id, box.isSelected()));
            refreshers.add(() -> {
                boolean isUsed = model.curves().containsKey(id);
                box.setSelected(isUsed);
                box.setDisable(model.document().isReadOnly());
                weight.setVisible(isUsed);
                weight.setDisable(model.document().isReadOnly());
            });
            commitsBy(weight, () -> model.curves().getOrDefault(id, ""), typed -> model.weigh(id, typed));
            HBox row = new HBox(box, weight);
            row.getStyleClass().add("curve-row");
            list.getChildren().add(row);
        }
        refreshers.add(() -> showProblem(list, wrong, model.problemOfCurves()));
        list.getChildren().add(wrong);
        return list;
    }

    private void refresh() {
        isRefreshing = true;
        refreshers.forEach(Runnable::run);
        isRefreshing = false;
    }

    /** Puts the focus into the field of a key, or of the nearest key above it. */
    void goTo(String keyPath) {
        String key = keyPath;
        while (!key.isEmpty() && !inputs.containsKey(key)) {
            key = key.contains(".") ? key.substring(0, key.lastIndexOf('.')) : "";
        }
        Optional.ofNullable(inputs.get(key)).ifPresent(Control::requestFocus);
    }

    /** Whether the form can show the study's settings. */
    boolean isUsable() {
        return model.document().draft().text(StudyJson.NAME).isPresent() && model.isReadable();
    }
}
