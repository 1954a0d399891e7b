package stillstand.view;

import atlantafx.base.theme.Styles;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import javafx.application.Platform;
import javafx.beans.value.ChangeListener;
import javafx.collections.ListChangeListener;
import javafx.geometry.Insets;
import javafx.geometry.Pos;
import javafx.geometry.Side;
import javafx.scene.control.Button;
import javafx.scene.control.ChoiceBox;
import javafx.scene.control.ComboBox;
import javafx.scene.control.ContextMenu;
import javafx.scene.control.Label;
import javafx.scene.control.MenuItem;
import javafx.scene.control.ScrollPane;
import javafx.scene.control.SeparatorMenuItem;
import javafx.scene.control.Tooltip;
import javafx.scene.input.ContextMenuEvent;
import javafx.scene.layout.BorderPane;
import javafx.scene.layout.HBox;
import javafx.scene.layout.Priority;
import javafx.scene.layout.Region;
import javafx.scene.layout.VBox;
import stillstand.shoreline.StageChoice;
import stillstand.view.StairModel.Lens;
import stillstand.view.StairPicture.Stand;

/** The Stair of a site, a rate to slide under it, and the opened level beside it. */
public final class StairView extends BorderPane {
    private static final double PANEL = 292;

    private final StairModel model;
    private final StairPaper paper;
    private final RateStrip rate;
    private final ChoiceBox<String> site = new ChoiceBox<>();
    private final ComboBox<Lens> lens = new ComboBox<>();
    private final Label status = new Label();
    private final Label staleMark = new Label("OLDER THAN THE STUDY");
    private final Label reading = new Label();
    private final Label miss = new Label();
    private final VBox panel = new VBox(8);
    private final ContextMenu menu = new ContextMenu();
    private boolean following;
    private boolean followIsDue;

    /** The view of a model. */
    public StairView(StairModel model) {
        this.model = model;
        paper = new StairPaper(model);
        paper.setId("stair-paper");
        rate = new RateStrip(model);
        setTop(bar());
        setCenter(new VBox(paper, foot()));
        VBox.setVgrow(paper, Priority.ALWAYS);
        setRight(side());
        paper.onReading(reading::setText);
        paper.onMenu(this::openMenu);
        status.textFillProperty().addListener((property, before, now) -> usePalette());
        ChangeListener<Object> follow = (property, before, now) -> followSoon();
        model.pictureProperty().addListener(follow);
        model.previewProperty().addListener(follow);
        model.selectedProperty().addListener(follow);
        model.lensProperty().addListener(follow);
        model.previewingProperty().addListener(follow);
        model.lenses().addListener((ListChangeListener<Lens>) change -> followSoon());
        model.predictedProperty()
                .addListener(
                        (property, before, now) -> miss.setText(model.miss().orElse("")));
        follow();
    }

    private void usePalette() {
        Palette palette = Palette.under(status.getTextFill());
        paper.use(palette);
        rate.use(palette);
    }

    private Region bar() {
        site.setId("stair-site");
        site.setItems(model.sites());
        site.setAccessibleText("Site");
        site.getSelectionModel().selectedItemProperty().addListener((property, before, now) -> {
            if (now != null && !following) {
                model.choose(now);
            }
        });
        lens.setId("stair-lens");
        lens.setItems(model.lenses());
        lens.setAccessibleText("Correlations to look at");
        lens.setMaxWidth(Double.MAX_VALUE);
        lens.setMinWidth(120);
        lens.setPrefWidth(300);
        lens.getSelectionModel().selectedItemProperty().addListener((property, before, now) -> {
            if (now != null && !following) {
                model.look(now);
            }
        });
        HBox.setHgrow(lens, Priority.ALWAYS);
        Button before = step("‹", "Previous correlation", -1);
        Button next = step("›", "Next correlation", 1);
        Label name = new Label("Site");
        name.setLabelFor(site);
        name.setMinWidth(USE_PREF_SIZE);
        site.setMinWidth(USE_PREF_SIZE);
        Label look = new Label("Look at");
        look.setMinWidth(USE_PREF_SIZE);
        look.setLabelFor(lens);
        HBox choosers = new HBox(8, name, site, look, before, lens, next);
        choosers.setAlignment(Pos.CENTER_LEFT);
        staleMark.getStyleClass().addAll(Styles.TEXT_SMALL, Styles.WARNING, Styles.TEXT_BOLD);
        staleMark.setMinWidth(Region.USE_PREF_SIZE);
        status.setId("stair-status");
        status.getStyleClass().add(Styles.TEXT_BOLD);
        HBox said = new HBox(12, staleMark, status);
        said.setAlignment(Pos.CENTER_LEFT);
        VBox bar = new VBox(6, choosers, said);
        bar.setPadding(new Insets(10, 12, 4, 12));
        return bar;
    }

    private Button step(String sign, String says, int step) {
        Button button = new Button(sign);
        button.getStyleClass().addAll(Styles.BUTTON_OUTLINED, Styles.SMALL);
        button.setAccessibleText(says);
        button.setTooltip(new Tooltip(says));
        button.setMinWidth(Region.USE_PREF_SIZE);
        button.setOnAction(event -> model.step(step));
        return button;
    }

    private Region foot() {
        reading.setId("stair-reading");
        reading.setMinHeight(20);
        miss.setId("stair-miss");
        miss.getStyleClass().addAll(Styles.TEXT_MUTED, Styles.TEXT_SMALL);
        reading.setPadding(new Insets(0, 12, 0, 12));
        miss.setPadding(new Insets(0, 12, 8, 12));
        VBox foot = new VBox(2, reading, rate, miss);
        foot.setMinHeight(Region.USE_PREF_SIZE);
        return foot;
    }

    private Region side() {
        panel.setPadding(new Insets(10, 14, 14, 14));
        panel.setId("stair-panel");
        ScrollPane scroll = new ScrollPane(panel);
        scroll.setFitToWidth(true);
        scroll.setPrefWidth(PANEL);
        scroll.setMinWidth(220);
        scroll.setHbarPolicy(ScrollPane.ScrollBarPolicy.NEVER);
        return scroll;
    }

    /** Once for all that changes together. */
    private void followSoon() {
        if (!followIsDue) {
            followIsDue = true;
            Platform.runLater(this::follow);
        }
    }

    private void follow() {
        followIsDue = false;
        following = true;
        site.setValue(model.siteProperty().get());
        if (!model.lensProperty().get().equals(lens.getValue())) {
            lens.setValue(model.lensProperty().get());
        }
        following = false;
        status.setText(model.status());
        boolean stale = model.isStale();
        staleMark.setVisible(stale);
        staleMark.setManaged(stale);
        miss.setText(model.miss().orElse(""));
        fillPanel();
    }

    private void fillPanel() {
        panel.getChildren().clear();
        String level = model.selectedProperty().get();
        if (level.isEmpty()) {
            panel.getChildren().add(title(model.siteProperty().get().isEmpty() ? "No site" : "The flight"));
            if (model.flightSentences().isEmpty()) {
                panel.getChildren().add(words(model.status()));
            }
            model.flightSentences().forEach(sentence -> panel.getChildren().add(words(sentence.strip())));
            panel.getChildren()
                    .add(muted("Click a level, or press Up and Down in the drawing, to open it. Drag its line onto a"
                            + " highstand to pin it, away from all to forbid that one."));
            return;
        }
        panel.getChildren().add(title("Level " + level));
        if (model.canPair(level)) {
            panel.getChildren().add(pairing(level));
        }
        for (Fact fact : model.levelFacts()) {
            Label label = new Label(fact.label());
            label.getStyleClass().addAll(Styles.TEXT_SMALL, Styles.TEXT_MUTED);
            panel.getChildren().add(new VBox(1, label, words(fact.text())));
        }
    }

    private Region pairing(String level) {
        ComboBox<String> stages = new ComboBox<>();
        stages.setId("stair-stage");
        stages.setAccessibleText("Highstand to pin or forbid");
        List<Stand> stands = model.pictureProperty().get().stands();
        stands.forEach(stand -> stages.getItems().add(stand.stage()));
        StageChoice choice = model.choiceOf(level);
        choice.only().stream()
                .findFirst()
                .or(() -> model.pictureProperty().get().level(level).stream()
                        .flatMap(mark -> mark.claims().stream())
                        .map(claim -> claim.highstand())
                        .findFirst())
                .or(() -> stands.stream().findFirst().map(Stand::stage))
                .ifPresent(stages::setValue);
        Button pin = action("Pin", () -> chosen(stages).ifPresent(stage -> model.pin(level, stage)));
        pin.setId("stair-pin");
        Button forbid = action("Forbid", () -> chosen(stages).ifPresent(stage -> model.forbid(level, stage)));
        forbid.setId("stair-forbid");
        Button free = action("Free", () -> model.free(level));
        free.setId("stair-free");
        free.setDisable(choice.equals(StageChoice.ANY));
        HBox row = new HBox(6, stages, pin, forbid, free);
        row.setAlignment(Pos.CENTER_LEFT);
        return row;
    }

    private static Optional<String> chosen(ComboBox<String> stages) {
        return Optional.ofNullable(stages.getValue());
    }

    private static Button action(String name, Runnable does) {
        Button button = new Button(name);
        button.getStyleClass().addAll(Styles.SMALL, Styles.BUTTON_OUTLINED);
        button.setMinWidth(Region.USE_PREF_SIZE);
        button.setOnAction(event -> does.run());
        return button;
    }

    private static Label title(String text) {
        Label label = new Label(text);
        label.getStyleClass().add(Styles.TITLE_4);
        return label;
    }

    private static Label words(String text) {
        Label label = new Label(text);
        label.setWrapText(true);
        label.setMinHeight(Region.USE_PREF_SIZE);
        return label;
    }

    private static Label muted(String text) {
        Label label = words(text);
        label.getStyleClass().addAll(Styles.TEXT_SMALL, Styles.TEXT_MUTED);
        return label;
    }

    private void openMenu(ContextMenuEvent event) {
        String level = event.isKeyboardTrigger()
                ? model.selectedProperty().get()
                : paper.scale()
                        .levelAt(event.getX(), event.getY())
                        .map(StairPicture.Mark::name)
                        .or(() -> paper.scale()
                                .linkAt(event.getX(), event.getY(), model.answerLinks())
                                .map(StairPicture.Link::level))
                        .orElse(model.selectedProperty().get());
        if (level.isEmpty() || !model.canPair(level)) {
            return;
        }
        model.select(level);
        menu.getItems().setAll(items(level));
        if (event.isKeyboardTrigger()) {
            menu.show(paper, Side.TOP, 80, 80);
        } else {
            menu.show(paper, event.getScreenX(), event.getScreenY());
        }
    }

    private List<MenuItem> items(String level) {
        List<MenuItem> items = new ArrayList<>();
        StairPicture picture = model.pictureProperty().get();
        List<String> likely = picture.level(level).stream()
                .flatMap(mark -> mark.claims().stream())
                .map(claim -> claim.highstand())
                .limit(4)
                .toList();
        List<String> stages = new ArrayList<>(likely);
        picture.stands().stream()
                .map(Stand::stage)
                .filter(stage -> !stages.contains(stage))
                .limit(12)
                .forEach(stages::add);
        stages.forEach(stage -> items.add(item("Pin " + level + " to " + stage, () -> model.pin(level, stage))));
        items.add(new SeparatorMenuItem());
        likely.forEach(stage -> items.add(item("Forbid " + stage, () -> model.forbid(level, stage))));
        items.add(item("Leave " + level + " to the flight", () -> model.free(level)));
        return items;
    }

    private static MenuItem item(String text, Runnable does) {
        MenuItem item = new MenuItem(text);
        item.setOnAction(event -> does.run());
        return item;
    }
}
