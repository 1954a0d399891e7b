package stillstand.view;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import javafx.event.Event;
import javafx.scene.Node;
import javafx.scene.control.CheckBox;
import javafx.scene.control.ListView;
import javafx.scene.control.TextInputControl;
import javafx.scene.input.KeyCode;
import javafx.scene.input.KeyEvent;
import javafx.stage.Stage;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.extension.ExtendWith;
import org.junit.jupiter.api.io.TempDir;
import org.testfx.framework.junit5.ApplicationExtension;
import org.testfx.framework.junit5.Start;
import stillstand.uplift.LevelAnswer;

/** A robot types, pastes and mends evidence. */
@ExtendWith(ApplicationExtension.class)
class EvidenceWindowTest {
    @TempDir
    private Path folder;

    @SuppressWarnings("NullAway.Init") // before each test
    private WindowRobot robot;

    @Start
    void start(Stage stage) {
        robot = new WindowRobot(stage);
    }

    @AfterEach
    void close() {
        robot.close();
    }

    @Test
    void tableIsPastedMendedRunAndUndone() throws IOException {
        StudyDocument document = robot.open(study("site,level,elevation_m,elevation_1sigma_m,highstand\n"));
        String before = Files.readString(document.folder().resolve("levels.csv"));
        robot.choose("levels.csv", 0, 0);
        robot.putOnClipboard("""
                A\tL1\t3.1\t0.5\t1
                A\tL2\t18,4\t1\t5a
                A\tL3\t22.0\t1\t5c
                A\tL4\t43.0\t1\t5e
                A\tL5\t60\t1.5\t7a
                A\tL6\t63\t1.5\t7x
                A\tL7\t76\t2\t7e
                A\tL8\t103\t2\t9e
                """);
        robot.command(KeyCode.V);
        robot.waitForCheck();
        assertEquals(8, robot.grid("levels.csv").sheet().rowCount());
        assertEquals(
                2,
                document.checked().problems().size(),
                document.checked().problems().toString());
        assertEquals("2 problems", robot.text("#problems").replaceFirst(",.*", ""));
        assertTrue(robot.lookup("#run").query().isDisabled());

        robot.push("#problems"); // leads to the first one
        assertEquals(CellRange.at(1, 2), robot.grid("levels.csv").chosen());
        assertEquals(
                "levels.csv:3:3: elevation_m: found \"18,4\", expected a number with a decimal point",
                robot.text("#sentence"));
        robot.write("18.4");
        robot.type(KeyCode.ENTER);
        robot.type(KeyCode.F8);
        robot.waitForCheck();
        robot.type(KeyCode.F8);
        assertEquals(CellRange.at(5, 4), robot.grid("levels.csv").chosen());
        robot.write("7c");
        robot.type(KeyCode.ENTER);
        robot.waitForCheck();
        assertEquals(List.of(), document.checked().problems());

        robot.push("#run");
        robot.waitFor(() -> robot.model().run().state() == RunModel.State.DONE);
        LevelAnswer last = robot.model()
                .run()
                .resultProperty()
                .get()
                .orElseThrow()
                .levels()
                .get(7);
        double median = last.rate().orElseThrow().median();
        assertTrue(median > 0.25 && median < 0.4, "103 m in about 325 thousand years: " + median);
        assertTrue(Files.exists(document.folder().resolve("results/results.json")));
        robot.push("#area-rates");
        assertTrue(robot.lookup("#rates-table").tryQuery().isPresent());

        robot.push("#area-evidence");
        robot.choose("levels.csv", 0, 0);
        robot.command(KeyCode.Z);
        robot.waitForCheck();
        assertEquals("7x", robot.grid("levels.csv").cell(5, 4));
        assertTrue(robot.isShown("#stale"));
        robot.command(KeyCode.Z);
        robot.command(KeyCode.Z);
        assertEquals(before, document.draft().text("levels.csv").orElseThrow());
    }

    @Test
    void keysOfASpreadsheet() throws IOException {
        robot.open(study("site,level,elevation_m,elevation_1sigma_m,note\nA,one,5,1,\n"));
        GridModel grid = robot.grid("levels.csv");
        robot.choose("levels.csv", 0, 2);
        robot.write("7.5");
        robot.type(KeyCode.TAB);
        assertEquals("7.5", grid.cell(0, 2));
        assertEquals(CellRange.at(0, 3), grid.chosen());
        robot.write("9").type(KeyCode.ESCAPE);
        assertEquals("1", grid.cell(0, 3));
        robot.type(KeyCode.F2, KeyCode.END);
        robot.write("2").type(KeyCode.ENTER);
        assertEquals("12", grid.cell(0, 3));
        assertEquals(CellRange.at(1, 3), grid.chosen());
        robot.type(KeyCode.UP, KeyCode.DELETE);
        assertEquals("", grid.cell(0, 3));
        robot.type(KeyCode.HOME);
        robot.press(KeyCode.SHIFT).type(KeyCode.RIGHT).release(KeyCode.SHIFT);
        assertEquals(new CellRange(0, 0, 0, 1), grid.chosen());
        robot.command(KeyCode.C);
        robot.type(KeyCode.DOWN, KeyCode.HOME);
        robot.command(KeyCode.V);
        assertEquals("one", grid.cell(1, 1));
        robot.command(KeyCode.I);
        assertEquals("", grid.cell(1, 1));
        robot.command(KeyCode.D);
        assertEquals("A", grid.cell(1, 0));
        robot.command(KeyCode.MINUS);
        assertEquals(2, grid.sheet().rowCount());
    }

    @Test
    void quickHandLosesNoLetter() throws IOException {
        robot.open(study("site,level,elevation_m,elevation_1sigma_m\nA,one,5,1\n"));
        robot.choose("levels.csv", 0, 2);
        robot.interact(() -> {
            for (String letter : List.of("9", "1", ".", "5")) {
                send(new KeyEvent(KeyEvent.KEY_TYPED, letter, "", KeyCode.UNDEFINED, false, false, false, false));
            }
            send(new KeyEvent(KeyEvent.KEY_PRESSED, "", "", KeyCode.ENTER, false, false, false, false));
        });
        assertEquals("91.5", robot.grid("levels.csv").cell(0, 2));
    }

    /** To whatever has the focus, as the toolkit does, without waiting for anything. */
    private void send(KeyEvent event) {
        Event.fireEvent(robot.stage().getScene().getFocusOwner(), event);
    }

    @Test
    void leavingACellByThePointerKeepsWhatWasTyped() throws IOException {
        robot.open(study("site,level,elevation_m,elevation_1sigma_m\nA,one,5,1\nA,two,8,1\n"));
        robot.choose("levels.csv", 0, 2);
        robot.write("6");
        Node other = robot.lookup(node -> node instanceof GridCell cell && "two".equals(cell.getText()))
                .query();
        robot.clickOn(other);
        assertEquals("6", robot.grid("levels.csv").cell(0, 2));
        assertEquals(CellRange.at(1, 1), robot.grid("levels.csv").chosen());
    }

    @Test
    void cellsTellAScreenReaderWhatIsWrong() throws IOException {
        robot.open(study("site,level,elevation_m,elevation_1sigma_m\nA,one,5 m,1\n"));
        Node cell = robot.lookup(node -> node instanceof GridCell grid && "5 m".equals(grid.getText()))
                .query();
        assertEquals(
                "elevation_m, row 1: 5 m. Problem: levels.csv:2:3: elevation_m: found \"5 m\", expected a number",
                cell.getAccessibleText());
    }

    @Test
    void listLeadsToThePlace() throws IOException {
        robot.open(study("site,level,elevation_m,elevation_1sigma_m\nA,one,x,1\n"));
        robot.push("#part-sites");
        ListView<?> findings = robot.lookup("#findings").queryListView();
        robot.interact(() -> findings.getSelectionModel().select(0));
        robot.interact(findings::requestFocus);
        robot.type(KeyCode.ENTER);
        assertEquals(
                "levels.csv",
                robot.model().evidence().orElseThrow().partProperty().get());
        assertEquals(CellRange.at(0, 2), robot.grid("levels.csv").chosen());
    }

    @Test
    void settingsAreTypedAndMended() throws IOException {
        StudyDocument document = robot.open(study("site,level,elevation_m,elevation_1sigma_m\nA,one,5,1\n"));
        robot.push("#part-study");
        TextInputControl seed = robot.lookup("#setting-seed").queryTextInputControl();
        robot.clickOn(seed).write("7,5").type(KeyCode.ENTER);
        robot.waitForCheck();
        assertTrue(seed.getStyleClass().contains("wrong"));
        assertTrue(document.checked().problems().get(0).message().contains("found \"7,5\", expected a whole number"));
        robot.interact(seed::clear);
        robot.clickOn(seed).write("7").type(KeyCode.ENTER);
        robot.waitForCheck();
        assertEquals(7, document.checked().study().orElseThrow().settings().seed());
        robot.interact(() -> ((CheckBox) robot.lookup("#curve-waelbroeck-2002").query()).fire());
        robot.waitForCheck();
        assertEquals(
                "waelbroeck-2002",
                document.checked()
                        .study()
                        .orElseThrow()
                        .settings()
                        .seaLevel()
                        .curves()
                        .get(0)
                        .id());
        robot.command(KeyCode.Z);
        robot.command(KeyCode.Z);
        assertTrue(document.draft().text("study.json").orElseThrow().contains("7,5"));
    }

    @Test
    void fiveThousandPastedRowsLeaveTheWindowAlive() throws IOException {
        robot.open(study("site,level,elevation_m,elevation_1sigma_m\n"));
        StringBuilder text = new StringBuilder();
        for (int i = 0; i < 5000; i++) {
            text.append("A\tL")
                    .append(i)
                    .append("\t")
                    .append(i % 100 == 0 ? "1,5" : "1.5")
                    .append("\t0.1\n");
        }
        robot.choose("levels.csv", 0, 0);
        robot.putOnClipboard(text.toString());
        robot.command(KeyCode.V);
        assertEquals(5000, robot.grid("levels.csv").sheet().rowCount());
        robot.waitForCheck();
        assertEquals("50 problems", robot.text("#problems").replaceFirst(",.*", ""));
        robot.type(KeyCode.F8);
        assertEquals(Optional.of(true), robot.grid("levels.csv").markAtCaret().map(CellMarks.Mark::isProblem));
        assertFalse(robot.model().canRun());
    }

    private Path study(String levels) throws IOException {
        Path place = Files.createDirectories(folder.resolve("study"));
        Files.writeString(
                place.resolve("study.json"),
                "{\"title\": \"A\", \"draws\": {\"maximum\": 20000}, \"sea_level\": {\"highstands\": {\"from\": \"curve\"}}}\n");
        Files.writeString(place.resolve("sites.csv"), "site,surveyed_from_m,surveyed_to_m\nA,0,400\n");
        Files.writeString(place.resolve("levels.csv"), levels);
        return place;
    }
}
