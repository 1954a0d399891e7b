package stillstand.view;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.TimeoutException;
import javafx.application.Application;
import javafx.geometry.Point2D;
import javafx.scene.Scene;
import javafx.scene.control.Label;
import javafx.scene.input.KeyCode;
import javafx.scene.input.MouseButton;
import javafx.stage.Stage;
import org.junit.jupiter.api.AfterAll;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.testfx.api.FxRobot;
import org.testfx.api.FxToolkit;
import org.testfx.util.WaitForAsyncUtils;

/** Hands on the Stair: a slider, a dragged line, keys and buttons; no display needed. */
class StairWindowTest {
    private static final List<PairingEdit> EDITS = new ArrayList<>();
    private static final StairModel model = new StairModel(Runnable::run, Runnable::run, EDITS::add);
    private static Optional<StairView> opened = Optional.empty();

    private final StairView view = opened.orElseThrow();
    private final StairPaper paper = (StairPaper) view.lookup("#stair-paper");

    private final FxRobot robot = new FxRobot();

    @BeforeAll
    static void open() throws TimeoutException {
        FxToolkit.registerPrimaryStage();
        FxToolkit.setupStage(StairWindowTest::fill);
        WaitForAsyncUtils.waitForFxEvents();
    }

    private static void fill(Stage stage) {
        Application.setUserAgentStylesheet(new atlantafx.base.theme.PrimerLight().getUserAgentStylesheet());
        StairView view = new StairView(model);
        opened = Optional.of(view);
        stage.setScene(new Scene(view, 1200, 740));
        stage.show();
    }

    @AfterAll
    static void close() throws TimeoutException {
        FxToolkit.cleanupStages();
    }

    @BeforeEach
    void showAnswer() {
        robot.interact(() -> {
            EDITS.clear();
            model.show(Shown.of(InventedStair.study(), InventedStair.result(), false));
            model.select("");
            model.slideTo(0.5);
            view.layout();
            paper.paintIfOld();
        });
    }

    private Point2D onScreen(double ageKa, double metres) {
        return paper.localToScreen(paper.scale().x(ageKa), paper.scale().y(metres));
    }

    private String text(String id) {
        return robot.lookup(id).queryAs(Label.class).getText();
    }

    @Test
    void slidingMovesTheStaircase() {
        double before =
                model.predictedProperty().get().orElseThrow().steps().get(3).heightMetres();
        robot.interact(() -> view.lookup("#stair-rate").requestFocus());
        robot.type(KeyCode.RIGHT, 3);
        double after =
                model.predictedProperty().get().orElseThrow().steps().get(3).heightMetres();
        assertTrue(after > before, after + " after " + before);
        assertTrue(text("#stair-miss").startsWith("The nearest steps miss the levels by "), text("#stair-miss"));
    }

    @Test
    void aLineDraggedOntoAHighstandPinsIt() {
        robot.drag(onScreen(50, (40.6 - 9.4) / 2), MouseButton.PRIMARY); // on the line from 5c to P2
        robot.moveTo(onScreen(90, -8.9));
        robot.moveTo(onScreen(80, -8.5));
        assertTrue(text("#stair-reading").contains("P2 is 5a"), text("#stair-reading"));
        assertTrue(model.previewProperty().get().isPresent()); // while the line is still held
        assertEquals(List.of(), EDITS);
        robot.drop();
        assertEquals(List.of(new PairingEdit(InventedStair.SITE, "P2", "5a")), EDITS);
        assertTrue(text("#stair-status").startsWith("Preview, not the answer"), text("#stair-status"));
    }

    @Test
    void aLineDraggedAwayForbidsItsHighstand() {
        robot.drag(onScreen(50, (40.6 - 9.4) / 2), MouseButton.PRIMARY);
        robot.moveTo(onScreen(60, 100));
        robot.moveTo(onScreen(160, 110));
        robot.drop();
        assertEquals(List.of(new PairingEdit(InventedStair.SITE, "P2", "!5c")), EDITS);
    }

    @Test
    void aClickOpensTheLevelAndAPointerReadsIt() {
        robot.clickOn(
                paper.localToScreen(paper.scale().nameX() + 8, paper.scale().nameY(2)));
        assertEquals("P3", model.selectedProperty().get());
        assertFalse(robot.lookup("Level P3").tryQuery().isEmpty());
        // by hand: 1 m of survey and half of 2 m of indicative range make 1.41 m; 1.96 of it either side
        assertEquals("Level P3: its sea stands at 68.8 m today (95 %: 66.0 to 71.6 m)", text("#stair-reading"));
        assertEquals(List.of(), EDITS);
    }

    @Test
    void keysAloneChooseALevelAndPinIt() {
        robot.interact(paper::requestFocus);
        robot.type(KeyCode.UP, 2);
        assertEquals("P2", model.selectedProperty().get());
        robot.type(KeyCode.LEFT); // its likeliest highstand
        assertEquals("5c", paper.keyStage());
        robot.type(KeyCode.RIGHT);
        assertEquals("5a", paper.keyStage());
        robot.type(KeyCode.P);
        robot.type(KeyCode.X);
        robot.type(KeyCode.F);
        assertEquals(
                List.of("5a", "!5a", ""),
                EDITS.stream().map(PairingEdit::highstand).toList());
        assertTrue(paper.getAccessibleText().startsWith("Level P2"), paper.getAccessibleText());
    }

    @Test
    void buttonsPinToo() {
        robot.interact(() -> model.select("P2"));
        robot.clickOn("#stair-pin");
        assertEquals(List.of(new PairingEdit(InventedStair.SITE, "P2", "5c")), EDITS);
    }

    @Test
    void bracketsStepThroughTheCorrelations() {
        robot.interact(paper::requestFocus);
        robot.type(KeyCode.CLOSE_BRACKET);
        assertTrue(model.lensProperty().get().title().startsWith("Possible correlation 1 of 2"));
        robot.type(KeyCode.OPEN_BRACKET, 2);
        assertTrue(model.lensProperty().get().title().startsWith("Most probable single"));
    }
}
