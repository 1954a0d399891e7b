package stillstand.view;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.google.common.jimfs.Configuration;
import com.google.common.jimfs.Jimfs;
import java.io.IOException;
import java.nio.file.FileSystem;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.CountDownLatch;
import java.util.concurrent.ExecutorService;
import javafx.scene.Node;
import javafx.scene.control.Label;
import javafx.scene.control.Labeled;
import javafx.scene.control.Spinner;
import javafx.scene.input.KeyCode;
import javafx.stage.Stage;
import javafx.stage.WindowEvent;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.extension.ExtendWith;
import org.junit.jupiter.api.io.TempDir;
import org.testfx.framework.junit5.ApplicationExtension;
import org.testfx.framework.junit5.Start;
import stillstand.files.ResultsFolder;
import stillstand.files.StudyStore;
import stillstand.ledger.RunCancelledException;
import stillstand.ledger.RunMonitor;
import stillstand.study.Study;
import stillstand.study.StudyResult;
import stillstand.study.StudyRunner;
import stillstand.view.Questions.Unsaved;
import stillstand.view.RunModel.State;
import stillstand.view.WindowModel.Area;

/** A robot opens, runs, cancels, saves and closes. */
@ExtendWith(ApplicationExtension.class)
class WindowTest {
    @TempDir
    private Path folder;

    private final CountDownLatch held = new CountDownLatch(1);
    private boolean holds;

    @SuppressWarnings("NullAway.Init") // before each test
    private WindowRobot robot;

    @Start
    void start(Stage stage) {
        robot = new WindowRobot(stage, this::run);
    }

    /** Runs a study; where a test asks for it, one that never ends by itself. Of the demo the quickest coast alone. */
    private StudyResult run(Study study, ExecutorService executor, RunMonitor monitor) {
        monitor.step("A / one", 0.5);
        while (holds) {
            held.countDown();
            if (monitor.isCancelled()) {
                throw new RunCancelledException();
            }
            Thread.onSpinWait();
        }
        Study quick = study.sites().size() == 4 ? study.only(List.of("Quay Shoals")) : study;
        return StudyRunner.run(quick, executor, monitor);
    }

    @AfterEach
    void close() {
        robot.close();
    }

    @Test
    void demoShowsAResultInThreeClicks() {
        robot.clickOn("#welcome-demo");
        robot.waitFor(() -> robot.model().canRun());
        assertTrue(robot.isShown("#notice-copy"));
        robot.clickOn("#run");
        robot.waitFor(() -> robot.model().run().state() == State.DONE);
        robot.clickOn("#area-rates");
        assertTrue(robot.lookup("#rates-table").queryTableView().getItems().size() > 0);
        assertTrue(robot.text("#work").startsWith("Done in"));
        assertFalse(robot.isShown("#stale"));
    }

    @Test
    void longRunIsCancelledAndTheWindowStaysAlive() throws Exception {
        robot.open(study());
        holds = true;
        robot.command(KeyCode.R);
        held.await();
        assertTrue(robot.isShown("#cancel"));
        robot.waitFor(() -> robot.text("#work").equals("50 %  A / one"));
        robot.command(KeyCode.DIGIT3);
        assertEquals(Area.STAIR, robot.model().areaProperty().get());
        robot.push("#cancel");
        robot.waitFor(() -> robot.model().run().state() == State.CANCELLED);
        assertFalse(Files.exists(folder.resolve("study/results")));
        assertFalse(robot.lookup("#run").query().isDisabled());
        assertFalse(robot.isShown("#cancel"));
    }

    @Test
    void closingDuringARunCancelsIt() throws Exception {
        robot.open(study());
        holds = true;
        robot.push("#run");
        held.await();
        robot.interact(() -> robot.stage().fireEvent(new WindowEvent(robot.stage(), WindowEvent.WINDOW_CLOSE_REQUEST)));
        robot.waitFor(() -> !robot.stage().isShowing());
        assertFalse(robot.model().run().state().isBusy());
        assertFalse(Files.exists(folder.resolve("study/results")));
    }

    @Test
    void keysReachEveryAreaLightAndDark() throws IOException {
        robot.open(study());
        List<KeyCode> keys = List.of(
                KeyCode.DIGIT1,
                KeyCode.DIGIT2,
                KeyCode.DIGIT3,
                KeyCode.DIGIT4,
                KeyCode.DIGIT5,
                KeyCode.DIGIT6,
                KeyCode.DIGIT7);
        for (Area area : Area.values()) {
            robot.command(keys.get(area.number() - 1));
            assertEquals(area, robot.model().areaProperty().get());
        }
        assertFalse(robot.model().memory().isDark());
        robot.press(KeyCode.CONTROL, KeyCode.SHIFT, KeyCode.L).release(KeyCode.L, KeyCode.SHIFT, KeyCode.CONTROL);
        assertTrue(robot.model().memory().isDark());
        for (Area area : Area.values()) {
            robot.command(keys.get(area.number() - 1));
            assertEquals(area, robot.model().areaProperty().get());
        }
        robot.press(KeyCode.CONTROL, KeyCode.SHIFT, KeyCode.L).release(KeyCode.L, KeyCode.SHIFT, KeyCode.CONTROL);
        assertFalse(robot.model().memory().isDark());
    }

    @Test
    void everythingThatCanBePressedHasWords() throws IOException {
        robot.open(study());
        for (Area area : Area.values()) {
            robot.interact(() -> robot.model().areaProperty().set(area));
            for (Node node : robot.lookup(".button, .toggle-button, .combo-box, .text-field, .check-box, .slider")
                    .queryAll()) {
                boolean isSpoken = node.getAccessibleText() != null
                        || (node instanceof Labeled labeled
                                && labeled.getText() != null
                                && !labeled.getText().isBlank())
                        || isLabelled(node)
                        || node.getParent() instanceof Spinner<?>;
                assertTrue(isSpoken, area + ": " + node);
            }
        }
    }

    private boolean isLabelled(Node node) {
        return robot.lookup(".label").queryAll().stream()
                .anyMatch(label -> label instanceof Label text && text.getLabelFor() == node);
    }

    @Test
    void unsavedEditsAreAskedAboutBeforeTheWindowGoes() throws IOException {
        Path study = study();
        StudyDocument document = robot.open(study);
        robot.interact(() -> document.edit("title", draft -> draft.withText("study.json", "{\"title\": \"B\"}")));
        robot.answers().unsaved = Unsaved.STAY;
        robot.command(KeyCode.W);
        assertEquals(1, robot.answers().asked);
        assertTrue(robot.model().document().isPresent());
        robot.answers().unsaved = Unsaved.SAVE;
        robot.command(KeyCode.W);
        robot.waitFor(() -> robot.model().document().isEmpty());
        assertEquals("{\"title\": \"B\"}", Files.readString(study.resolve("study.json")));
        assertTrue(robot.isShown("#welcome-demo"));
    }

    @Test
    void fullDiskIsSaidAndNothingIsLost() throws IOException {
        try (FileSystem small = Jimfs.newFileSystem(Configuration.unix().toBuilder()
                .setBlockSize(512)
                .setMaxSize(24 * 512)
                .build())) {
            Path study = OpenStudies.template(small.getPath("/work"));
            StudyDocument document = robot.open(study);
            String before = Files.readString(study.resolve("study.json"));
            String large = "{\"title\": \"" + "x".repeat(24 * 512) + "\"}";
            robot.interact(() -> document.edit("title", draft -> draft.withText("study.json", large)));
            robot.command(KeyCode.S);
            robot.waitFor(() -> robot.isShown("#notice-disk"));
            assertEquals(before, Files.readString(study.resolve("study.json")));
            assertTrue(document.isEdited());
            assertEquals(large, document.draft().text("study.json").orElseThrow());
            robot.interact(() -> robot.model().close(true));
            robot.waitFor(() -> !StudyStore.hasRecovery(study));
        }
    }

    @Test
    void fileChangedOutsideIsOffered() throws IOException {
        Path study = study();
        StudyDocument document = robot.open(study);
        Files.writeString(study.resolve("study.json"), "{\"title\": \"theirs\"}");
        robot.waitFor(() -> robot.isShown("#notice-changed"));
        robot.clickOn("Reload");
        robot.waitFor(() -> robot.text("#study-title").equals("theirs"));
        assertFalse(robot.isShown("#notice-changed"));
        robot.command(KeyCode.Z);
        assertNotEquals(Optional.of("{\"title\": \"theirs\"}"), document.draft().text("study.json"));
    }

    @Test
    @SuppressWarnings("try") // held, not used
    void lockedResultsAndSecondWindowAreSaid() throws IOException {
        Path study = study();
        try (StudyStore other = StudyStore.open(study).value().orElseThrow()) {
            robot.open(study);
            assertTrue(robot.isShown("#notice-read-only"));
            assertEquals("for reading alone", robot.text("#study-state"));
            assertEquals(study.toRealPath(), other.folder());
        }
        robot.interact(() -> robot.model().close(true));
        robot.open(study);
        assertFalse(robot.isShown("#notice-read-only"));
        try (ResultsFolder held =
                ResultsFolder.open(study.resolve("results")).value().orElseThrow()) {
            robot.push("#run");
            robot.waitFor(() -> robot.model().run().state() == State.FAILED);
            assertTrue(robot.text("#work").contains("another run writing there"));
            assertTrue(robot.model().shownProperty().get().result().isPresent());
        }
    }

    @Test
    void windowRemembersWhereItStood() {
        robot.interact(() -> {
            robot.stage().setWidth(900);
            robot.stage().setHeight(700);
            robot.stage().close();
        });
        WindowMemory.Place place = robot.model().memory().place().orElseThrow();
        assertEquals(900, place.width());
        assertEquals(700, place.height());
    }

    private Path study() throws IOException {
        Path place = Files.createDirectories(folder.resolve("study"));
        Files.writeString(place.resolve("study.json"), "{\"title\": \"A\", \"draws\": {\"maximum\": 20000}}");
        Files.writeString(place.resolve("sites.csv"), "site\nA\n");
        Files.writeString(
                place.resolve("levels.csv"), "site,level,elevation_m,elevation_1sigma_m,highstand\nA,one,30,1,5e\n");
        return place;
    }
}
