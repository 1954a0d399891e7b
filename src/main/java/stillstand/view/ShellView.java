package stillstand.view;

import java.util.Optional;
import java.util.function.Consumer;
import javafx.geometry.Pos;
import javafx.scene.Node;
import javafx.scene.control.Button;
import javafx.scene.control.Label;
import javafx.scene.control.Tooltip;
import javafx.scene.layout.BorderPane;
import javafx.scene.layout.HBox;
import javafx.scene.layout.Priority;
import javafx.scene.layout.Region;
import javafx.scene.layout.StackPane;
import javafx.scene.layout.VBox;
import stillstand.files.SettingsText;
import stillstand.files.StudyJson;
import stillstand.study.Library;
import stillstand.view.WindowModel.Area;

/** The frame: menus, the study's name, the switch between areas, the area itself, and the line at the foot. */
final class ShellView extends BorderPane {
    private final WindowModel model;
    private final WindowActions actions;
    private final StackPane place = new StackPane();
    private final Label title = new Label();
    private final Label state = new Label();
    private final Button run = new Button("Run");
    private final HBox header;
    private Optional<EvidenceView> evidence = Optional.empty();
    private Optional<ResultAreas> areas = Optional.empty();

    /** Makes the areas of results for a study that was opened. */
    @FunctionalInterface
    interface AreasOf {
        /** Areas for studies that may name what is in this library. */
        ResultAreas areas(Library library);
    }

    ShellView(WindowModel model, WindowActions actions, AreasOf areasOf, Consumer<Boolean> darkens, Runnable quits) {
        this.model = model;
        this.actions = actions;
        getStyleClass().add("shell");
        header = header();
        setTop(new VBox(
                new WindowMenu(model, actions, () -> evidence, darkens, quits), header, new NoticesView(model)));
        setCenter(place);
        setBottom(new StatusView(model, this::showProblems));
        model.shownProperty().addListener((source, before, after) -> areas.ifPresent(each -> each.show(after)));
        model.evidenceProperty().addListener((source, before, after) -> {
            evidence = after.map(EvidenceView::new);
            areas = after.map(opened -> areasOf.areas(opened.settings().library()));
            areas.ifPresent(each -> each.show(model.shownProperty().get()));
            after.ifPresent(opened -> {
                opened.document().draftProperty().addListener((draft, was, is) -> showTitle());
                opened.document().editedProperty().addListener((edited, was, is) -> showTitle());
                opened.document().checkedProperty().addListener((checked, was, is) -> showRunButton());
                opened.document().draftProperty().addListener((draft, was, is) -> showRunButton());
            });
            showArea();
        });
        model.documentProperty().addListener((source, before, after) -> showArea());
        model.areaProperty().addListener((source, before, after) -> showArea());
        model.run().stateProperty().addListener((source, before, after) -> showRunButton());
        showArea();
    }

    private HBox header() {
        title.getStyleClass().add("study-title");
        title.setId("study-title");
        state.getStyleClass().add("quiet");
        state.setId("study-state");
        VBox names = new VBox(title, state);
        names.setAlignment(Pos.CENTER_LEFT);
        names.setMinWidth(160);
        HBox.setHgrow(names, Priority.SOMETIMES);
        Region gap = new Region();
        HBox.setHgrow(gap, Priority.ALWAYS);
        run.setId("run");
        run.getStyleClass().add("run");
        run.setTooltip(new Tooltip("Save the study and run it (Ctrl+R)"));
        run.setOnAction(event -> model.startRun());
        AreaSwitch steps = new AreaSwitch(model);
        steps.setMinWidth(Region.USE_PREF_SIZE);
        HBox line = new HBox(names, gap, steps, run);
        line.setAlignment(Pos.BOTTOM_LEFT);
        line.getStyleClass().add("header");
        return line;
    }

    private void showProblems() {
        model.areaProperty().set(Area.EVIDENCE);
        evidence.ifPresent(view -> view.goToNext(false));
    }

    private void showArea() {
        boolean isOpen = evidence.isPresent() && model.document().isPresent();
        header.setVisible(isOpen);
        header.setManaged(isOpen);
        Area area = model.areaProperty().get();
        Node shown = !isOpen
                ? new WelcomeView(model, actions)
                : area == Area.EVIDENCE
                        ? evidence.orElseThrow()
                        : areas.orElseThrow().view(area);
        place.getChildren().setAll(shown);
        showTitle();
        showRunButton();
    }

    private void showTitle() {
        model.document().ifPresent(document -> {
            String folder = document.folder().toString();
            title.setText(document.draft()
                    .text(StudyJson.NAME)
                    .flatMap(SettingsText::parse)
                    .flatMap(settings -> settings.value("title"))
                    .orElse("A study without title"));
            title.setTooltip(new Tooltip(folder));
            String where = model.isPassingCopy()
                    ? "a passing copy"
                    : "in " + document.folder().getFileName();
            state.setText(
                    document.isReadOnly()
                            ? "for reading alone"
                            : where + (document.isEdited() ? ", edits not saved" : ", saved"));
        });
    }

    private void showRunButton() {
        run.setDisable(!model.canRun() || model.run().state().isBusy());
        run.setAccessibleText(
                model.canRun() ? "Run the study" : "Run: not before the problems of the evidence are mended");
    }
}
