package stillstand.view;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.function.Consumer;
import javafx.animation.AnimationTimer;
import javafx.geometry.Point2D;
import javafx.scene.AccessibleRole;
import javafx.scene.Cursor;
import javafx.scene.canvas.Canvas;
import javafx.scene.input.ContextMenuEvent;
import javafx.scene.input.KeyCode;
import javafx.scene.input.KeyEvent;
import javafx.scene.input.MouseButton;
import javafx.scene.input.MouseEvent;
import javafx.scene.layout.Region;
import stillstand.shoreline.StageChoice;
import stillstand.view.StairPainter.Pointing;
import stillstand.view.StairPicture.Link;
import stillstand.view.StairPicture.Mark;
import stillstand.view.StairPicture.Stand;

/**
 * The drawing of the Stair and what hands do to it: a line is dragged onto a highstand to pin it, away from all to forbid it; keys do
 * the same. Two canvases lie on one another: what stays while a line is dragged, and what moves.
 */
final class StairPaper extends Region {
    private static final double WIDTH = 760;
    private static final double HEIGHT = 430;

    private final StairModel model;
    private final Canvas ground = new Canvas();
    private final Canvas live = new Canvas();
    private Palette palette = Palette.under(javafx.scene.paint.Color.BLACK);
    private StairScale scale = new StairScale(StairPicture.EMPTY, 100, WIDTH, HEIGHT, 60);
    private Pointing pointing = Pointing.NOTHING;
    private Optional<Link> grabbed = Optional.empty();
    private boolean dragging;
    private double pressedX;
    private double pressedY;
    private String keyStage = "";
    private boolean groundIsOld = true;
    private boolean liveIsOld = true;
    private Consumer<String> onReading = text -> {};
    private Consumer<ContextMenuEvent> onMenu = event -> {};
    private final AnimationTimer frames = new AnimationTimer() {
        @Override
        public void handle(long now) {
            paintIfOld();
        }
    };

    StairPaper(StairModel model) {
        this.model = model;
        getChildren().addAll(ground, live);
        ground.setMouseTransparent(true);
        setFocusTraversable(true);
        setAccessibleRole(AccessibleRole.IMAGE_VIEW);
        setAccessibleHelp("Up and down choose a level, left and right a highstand, P pins, X forbids, F frees it.");
        getStyleClass().add("stair-paper");
        setMinSize(420, 260);
        setPrefSize(WIDTH, HEIGHT);
        model.pictureProperty().addListener((property, before, now) -> groundChanged());
        model.previewProperty().addListener((property, before, now) -> liveChanged());
        model.predictedProperty().addListener((property, before, now) -> liveChanged());
        model.lensProperty().addListener((property, before, now) -> groundChanged());
        model.selectedProperty().addListener((property, before, now) -> liveChanged());
        focusedProperty().addListener((property, before, now) -> liveChanged());
        setOnMouseMoved(this::hover);
        setOnMouseExited(event -> point(Pointing.NOTHING));
        setOnMousePressed(this::press);
        setOnMouseDragged(this::drag);
        setOnMouseReleased(this::release);
        setOnKeyPressed(this::key);
        setOnContextMenuRequested(event -> onMenu.accept(event));
        sceneProperty().addListener((property, before, now) -> {
            if (now == null) {
                frames.stop();
            } else {
                frames.start();
            }
        });
    }

    /** Takes the sentence on what is under the pointer or the keys; blank for nothing. */
    void onReading(Consumer<String> consumer) {
        onReading = consumer;
    }

    /** Opens the menu of pairings. */
    void onMenu(Consumer<ContextMenuEvent> consumer) {
        onMenu = consumer;
    }

    void use(Palette other) {
        if (!other.equals(palette)) {
            palette = other;
            groundChanged();
        }
    }

    StairScale scale() {
        return scale;
    }

    /** The highstand that keys point at; blank before any did. */
    String keyStage() {
        return keyStage;
    }

    private void groundChanged() {
        groundIsOld = true;
        liveChanged();
    }

    private void liveChanged() {
        liveIsOld = true;
        setAccessibleText(spoken());
    }

    private String spoken() {
        String level = model.selectedProperty().get();
        String status = model.status();
        if (level.isEmpty()) {
            return "Stair of " + model.siteProperty().get() + ". " + status;
        }
        StageChoice choice = model.choiceOf(level);
        return "Level " + level + (choice.text().isEmpty() ? "" : ", you say " + LevelFacts.words(choice))
                + (keyStage.isEmpty() ? "" : ", highstand " + keyStage) + ". " + status;
    }

    @Override
    protected void layoutChildren() {
        if (ground.getWidth() != getWidth() || ground.getHeight() != getHeight()) {
            ground.setWidth(getWidth());
            ground.setHeight(getHeight());
            live.setWidth(getWidth());
            live.setHeight(getHeight());
            groundChanged();
            paintIfOld();
        }
    }

    /** Paints what has changed since the last frame. */
    void paintIfOld() {
        if (getWidth() < 50 || getHeight() < 50) {
            return;
        }
        StairPicture picture = model.pictureProperty().get();
        double oldest = picture.oldestKa(new ArrayList<>(model.previewLinks()));
        if (groundIsOld || (!dragging && Math.abs(oldest - scale.oldestKa) > 0.5)) {
            scale = new StairScale(
                    picture, oldest, getWidth(), getHeight(), StairPainter.nameWidth(picture, model::choiceOf));
            new StairPainter(ground.getGraphicsContext2D(), scale, picture, palette).ground();
            liveIsOld = true;
            groundIsOld = false;
        }
        if (liveIsOld) {
            paintLive(picture);
            liveIsOld = false;
        }
    }

    private void paintLive(StairPicture picture) {
        live.getGraphicsContext2D().clearRect(0, 0, live.getWidth(), live.getHeight());
        StairPainter painter = new StairPainter(live.getGraphicsContext2D(), scale, picture, palette);
        String selected = model.selectedProperty().get();
        painter.lost();
        model.predictedProperty().get().ifPresent(painter::predicted);
        List<Link> tried = model.previewLinks();
        painter.links(model.answerLinks(), selected, tried.isEmpty() ? 1 : 0.35);
        painter.tried(tried);
        Pointing shownStage = pointing.stage().isEmpty() && isFocused() && !selected.isEmpty()
                ? new Pointing(pointing.level(), keyStage, pointing.dragTo())
                : pointing;
        pointing.dragTo()
                .ifPresent(to -> picture.level(pointing.level()).ifPresent(level -> painter.dragged(level, to)));
        painter.stands(shownStage);
        painter.levels(selected, pointing, model::choiceOf);
        if (isFocused()) {
            painter.focus();
        }
    }

    private void point(Pointing other) {
        pointing = other;
        liveIsOld = true;
    }

    private Optional<Link> linkAt(double x, double y) {
        return scale.linkAt(x, y, model.previewLinks()).or(() -> scale.linkAt(x, y, model.answerLinks()));
    }

    private void hover(MouseEvent event) {
        double x = event.getX();
        double y = event.getY();
        Optional<Stand> stand = scale.standAt(x, y, StairScale.REACH);
        Optional<Mark> level = scale.levelAt(x, y);
        Optional<Link> preview = scale.linkAt(x, y, model.previewLinks());
        Optional<Link> link = preview.or(() -> scale.linkAt(x, y, model.answerLinks()));
        String reading = stand.map(StairReadings::stand)
                .or(() -> beside(x, y))
                .or(() -> level.map(StairReadings::level))
                .or(() -> link.map(found -> StairReadings.link(found, preview.isPresent())))
                .orElseGet(() -> x > scale.left && x < scale.present && y > scale.top && y < scale.bottom
                        ? StairReadings.place(model.pictureProperty().get(), scale.ageKaAt(x), scale.metresAt(y))
                        : "");
        onReading.accept(reading);
        setCursor(level.isPresent() || link.isPresent() ? Cursor.HAND : Cursor.DEFAULT);
        point(new Pointing(
                level.map(Mark::name).or(() -> link.map(Link::level)).orElse(""),
                stand.map(Stand::stage).orElse(""),
                Optional.empty()));
    }

    /** What stands at the wall beside the levels: predicted steps, and shorelines that no level records. */
    private Optional<String> beside(double x, double y) {
        if (x < scale.present - 5 || x > scale.profileLeft) {
            return Optional.empty();
        }
        Optional<String> lost = x > scale.present + 5
                ? Optional.empty()
                : model.pictureProperty().get().lost().stream()
                        .filter(fate -> Math.abs(scale.y(fate.heightMetres()) - y) < 4)
                        .findFirst()
                        .map(StairReadings::lost);
        return lost.or(() -> model.predictedProperty().get().stream()
                .flatMap(stair -> stair.steps().stream())
                .filter(step -> step.ageKa() <= scale.oldestKa && Math.abs(scale.y(step.heightMetres()) - y) < 5)
                .findFirst()
                .map(StairReadings::step));
    }

    private void press(MouseEvent event) {
        requestFocus();
        dragging = false;
        pressedX = event.getX();
        pressedY = event.getY();
        grabbed = Optional.empty();
        if (event.getButton() != MouseButton.PRIMARY) {
            return;
        }
        Optional<Mark> level = scale.levelAt(event.getX(), event.getY());
        Optional<Link> link = linkAt(event.getX(), event.getY());
        String name = level.map(Mark::name).or(() -> link.map(Link::level)).orElse("");
        grabbed = level.isPresent() ? Optional.empty() : link;
        point(new Pointing(name, "", Optional.empty()));
    }

    private void drag(MouseEvent event) {
        String level = pointing.level();
        boolean far = Math.hypot(event.getX() - pressedX, event.getY() - pressedY) > 4;
        if (level.isEmpty() || !event.isPrimaryButtonDown() || !(dragging || far) || !model.canPair(level)) {
            return;
        }
        dragging = true;
        Optional<Stand> over = scale.standAt(event.getX(), event.getY(), StairScale.DROP_REACH);
        if (over.isPresent()) {
            model.attempt(level, StageChoice.pinnedTo(over.get().stage()));
        } else {
            model.abandon(level);
        }
        String forbids =
                grabbed.map(Link::stage).filter(stage -> !stage.isEmpty()).orElse("");
        onReading.accept(over.map(stand -> "Let go: " + level + " is " + stand.stage())
                .orElse(
                        forbids.isEmpty()
                                ? level + ": drag onto a highstand"
                                : "Let go: " + level + " is not " + forbids));
        point(new Pointing(
                level, over.map(Stand::stage).orElse(""), Optional.of(new Point2D(event.getX(), event.getY()))));
    }

    private void release(MouseEvent event) {
        String level = pointing.level();
        if (dragging) {
            dragging = false;
            Optional<Stand> over = scale.standAt(event.getX(), event.getY(), StairScale.DROP_REACH);
            Optional<String> from = grabbed.map(Link::stage).filter(stage -> !stage.isEmpty());
            if (over.isPresent()) {
                model.pin(level, over.get().stage());
            } else if (from.isPresent()) {
                model.forbid(level, from.get());
            } else {
                model.abandon(level);
            }
            model.select(level);
            onReading.accept("");
        } else if (event.getButton() == MouseButton.PRIMARY) {
            model.select(level);
        }
        point(Pointing.NOTHING);
        groundChanged(); // names may be wider now
    }

    private void key(KeyEvent event) {
        String level = model.selectedProperty().get();
        KeyCode code = event.getCode();
        boolean used = true;
        switch (code) {
            case UP -> model.selectNext(1);
            case DOWN -> model.selectNext(-1);
            case LEFT -> nextStage(1);
            case RIGHT -> nextStage(-1);
            case P, ENTER -> {
                if (!keyStage.isEmpty()) {
                    model.pin(level, keyStage);
                }
            }
            case X, DELETE -> {
                if (!keyStage.isEmpty()) {
                    model.forbid(level, keyStage);
                }
            }
            case F, BACK_SPACE -> model.free(level);
            case ESCAPE -> model.select("");
            case OPEN_BRACKET, COMMA -> model.step(-1);
            case CLOSE_BRACKET, PERIOD -> model.step(1);
            default -> used = false;
        }
        if (used) {
            event.consume();
            String stage = keyStage;
            onReading.accept(model.pictureProperty()
                    .get()
                    .stand(stage)
                    .filter(stand -> code == KeyCode.LEFT || code == KeyCode.RIGHT)
                    .map(StairReadings::stand)
                    .orElse(""));
            groundChanged();
        }
    }

    private void nextStage(int step) {
        List<Stand> stands = model.pictureProperty().get().stands().stream()
                .filter(stand -> stand.ageKa() <= scale.oldestKa)
                .toList();
        if (stands.isEmpty()) {
            return;
        }
        int at = -1;
        for (int i = 0; i < stands.size(); i++) {
            at = stands.get(i).stage().equals(keyStage) ? i : at;
        }
        if (at < 0) {
            String level = model.selectedProperty().get();
            keyStage = model.pictureProperty().get().level(level).stream()
                    .flatMap(mark -> mark.claims().stream())
                    .map(claim -> claim.highstand())
                    .findFirst()
                    .orElse(stands.get(0).stage());
        } else {
            keyStage = stands.get(Math.floorMod(at + step, stands.size())).stage();
        }
    }
}
