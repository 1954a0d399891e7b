package stillstand.view;

import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.file.Path;
import java.util.Optional;
import java.util.concurrent.TimeUnit;
import java.util.concurrent.TimeoutException;
import java.util.function.BooleanSupplier;
import javafx.scene.Node;
import javafx.scene.control.ButtonBase;
import javafx.scene.control.Labeled;
import javafx.scene.input.Clipboard;
import javafx.scene.input.ClipboardContent;
import javafx.scene.input.KeyCode;
import javafx.stage.Stage;
import org.testfx.api.FxRobot;
import org.testfx.api.FxToolkit;
import org.testfx.util.WaitForAsyncUtils;
import stillstand.study.StudyRunner;

/** A whole window under the hands of a robot, with nobody's preferences. */
final class WindowRobot extends FxRobot {
    private static final long PATIENCE_SECONDS = 30;

    static {
        System.setProperty("testfx.robot.write_sleep", "2"); // milliseconds between letters
    }

    private final StillstandWindow program = new StillstandWindow();
    private final Answers answers = new Answers();
    private final WindowModel model;
    private final Stage stage;

    /** What the user would answer. */
    static final class Answers implements Questions {
        Optional<Path> study = Optional.empty();
        Optional<Path> fresh = Optional.empty();
        Unsaved unsaved = Unsaved.STAY;
        int asked;

        @Override
        public Optional<Path> studyToOpen() {
            return study;
        }

        @Override
        public Optional<Path> folderForNew(String title) {
            return fresh;
        }

        @Override
        public Optional<Path> folderToWrite() {
            return fresh;
        }

        @Override
        public Unsaved unsaved(String title) {
            asked++;
            return unsaved;
        }
    }

    WindowRobot(Stage stage, RunModel.Engine engine) {
        this.stage = stage;
        this.model = program.show(stage, new WindowMemory(OpenStudies.preferences()), answers, engine);
    }

    WindowRobot(Stage stage) {
        this(stage, StudyRunner::run);
    }

    WindowModel model() {
        return model;
    }

    Answers answers() {
        return answers;
    }

    Stage stage() {
        return stage;
    }

    /** Opens a study and waits for its check. */
    StudyDocument open(Path study) {
        interact(() -> model.open(study));
        waitFor(() -> model.document()
                .filter(document -> document.checked().isKnown())
                .isPresent());
        WaitForAsyncUtils.waitForFxEvents();
        return model.document().orElseThrow();
    }

    void waitFor(BooleanSupplier truth) {
        try {
            WaitForAsyncUtils.waitFor(PATIENCE_SECONDS, TimeUnit.SECONDS, () -> truth.getAsBoolean());
        } catch (TimeoutException e) {
            throw new AssertionError(
                    "waited for nothing: " + model.notices() + " "
                            + model.run().outcomeProperty().get(),
                    e);
        }
        WaitForAsyncUtils.waitForFxEvents();
    }

    /** Waits until what is edited has been checked. */
    void waitForCheck() {
        waitFor(() -> {
            StudyDocument document = model.document().orElseThrow();
            return document.checked().isKnown() && document.checked().draft().equals(document.draft());
        });
    }

    GridModel grid(String table) {
        return model.evidence().orElseThrow().grid(table).orElseThrow();
    }

    /** Chooses a cell of the table on screen. */
    void choose(String table, int row, int column) {
        interact(() -> {
            grid(table).choose(row, column);
            lookup("#grid-" + table.replace(".csv", "")).query().requestFocus();
        });
    }

    void putOnClipboard(String text) {
        interact(() -> {
            ClipboardContent content = new ClipboardContent();
            content.putString(text);
            Clipboard.getSystemClipboard().setContent(content);
        });
    }

    void command(KeyCode key) {
        press(KeyCode.CONTROL, key).release(key, KeyCode.CONTROL);
        WaitForAsyncUtils.waitForFxEvents();
    }

    /** Presses the button of an id without moving the pointer, which takes its time; a disabled one does nothing. */
    void push(String id) {
        ButtonBase button = lookup(id).queryAs(ButtonBase.class);
        interact(button::fire);
    }

    String text(String id) {
        Node node = lookup(id).query();
        return ((Labeled) node).getText();
    }

    boolean isShown(String id) {
        return lookup(id).tryQuery().map(Node::isVisible).orElse(false);
    }

    /** Closes the window as its owner would, edits forgotten. */
    void close() {
        answers.unsaved = Questions.Unsaved.FORGET;
        interact(() -> {
            if (model.document().isPresent()) {
                model.close(true);
            }
            stage.close();
        });
        program.stop();
        try {
            FxToolkit.cleanupStages();
        } catch (TimeoutException e) {
            throw new AssertionError(e);
        }
        assertTrue(model.document().isEmpty());
    }
}
