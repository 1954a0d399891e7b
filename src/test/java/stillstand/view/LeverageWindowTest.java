package stillstand.view;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Optional;
import java.util.concurrent.TimeoutException;
import javafx.scene.control.CheckBox;
import javafx.scene.control.ChoiceBox;
import javafx.scene.control.TableView;
import javafx.scene.input.Clipboard;
import javafx.scene.input.KeyCode;
import javafx.stage.Stage;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.testfx.api.FxToolkit;
import org.testfx.util.WaitForAsyncUtils;
import stillstand.SampleStudy;
import stillstand.study.StudyRunner;
import stillstand.view.RunModel.State;
import stillstand.view.WindowModel.Area;

/** Hands on Leverage and Sites, in the whole window; no display needed. */
class LeverageWindowTest {
    @TempDir
    private Path folder;

    private WindowRobot robot;

    @BeforeEach
    void open() throws TimeoutException {
        FxToolkit.registerPrimaryStage();
        WindowRobot[] made = new WindowRobot[1];
        FxToolkit.setupStage((Stage stage) -> made[0] = new WindowRobot(stage, StudyRunner::run));
        robot = made[0];
    }

    @AfterEach
    void close() {
        robot.close();
    }

    private Path study() throws IOException {
        Path place = Files.createDirectories(folder.resolve("study"));
        Files.writeString(place.resolve("study.json"), "{\"title\": \"A\", \"draws\": {\"maximum\": 20000}}");
        Files.writeString(place.resolve("sites.csv"), "site\nA\n");
        Files.writeString(
                place.resolve("levels.csv"), "site,level,elevation_m,elevation_1sigma_m,highstand\nA,one,30,1,5e\n");
        return place;
    }

    @Test
    void whatIsMissingLeadsToCurvesOrToARunThatIsAsked() throws IOException {
        Path study = study();
        StudyDocument document = robot.open(study);
        robot.push("#run");
        robot.waitFor(() -> robot.model().run().state() == State.DONE);
        robot.command(KeyCode.DIGIT5);
        robot.push("#leverage-choose-curves");
        assertEquals(Area.SEA_LEVEL, robot.model().areaProperty().get());
        robot.command(KeyCode.DIGIT5);
        robot.push("#leverage-next-part");
        assertFalse(robot.lookup("#leverage-next").tryQuery().isPresent());
        robot.push("#leverage-ask-and-run");
        robot.waitFor(() -> robot.lookup("#leverage-next").tryQuery().isPresent());
        robot.waitFor(() -> robot.model().run().state() == State.DONE);
        assertTrue(Files.readString(study.resolve("study.json")).contains("\"survey_1sigma_m\": 0.3"));
        assertTrue(robot.lookup("#leverage-ask").queryAs(CheckBox.class).isSelected());
        assertFalse(robot.isShown("#stale"));
        robot.interact(document::undo);
        robot.waitForCheck();
        assertFalse(robot.lookup("#leverage-ask").queryAs(CheckBox.class).isSelected());
        assertTrue(robot.isShown("#stale"));
    }

    @Test
    @SuppressWarnings("unchecked")
    void aRateIsChosenAndItsBarsAreCopied() throws IOException {
        robot.open(study());
        robot.interact(() -> robot.model().run().show(Optional.of(SampleStudy.withoutFailure())));
        robot.command(KeyCode.DIGIT5);
        robot.push("#leverage-inputs-part");
        robot.interact(
                () -> robot.lookup("#leverage-rate-of").queryAs(ChoiceBox.class).setValue("T4"));
        WaitForAsyncUtils.waitForFxEvents();
        TableView<?> bars = robot.lookup("#leverage-inputs").queryAs(TableView.class);
        assertEquals(4, bars.getItems().size());
        assertFalse(robot.isShown("#leverage-halving"));
        robot.interact(bars::requestFocus);
        robot.command(KeyCode.C);
        String[] copied = new String[1];
        robot.interact(() -> copied[0] = Clipboard.getSystemClipboard().getString());
        assertTrue(copied[0].startsWith("Rate of\tAt medians\tInput\t95 % of it\tRate (m/kyr)\nT4 at 5e\t"), copied[0]);
        assertEquals(5, copied[0].lines().count());
    }

    @Test
    void arrowsLeadFromSiteToSite() throws IOException {
        robot.open(study());
        robot.interact(() -> robot.model().run().show(Optional.of(SampleStudy.withoutFailure())));
        robot.command(KeyCode.DIGIT6);
        robot.interact(() -> robot.lookup("#sites-paper").query().requestFocus());
        robot.type(KeyCode.RIGHT);
        assertTrue(robot.text("#sites-reading").startsWith("North cliff: up (>99 %)"));
        robot.type(KeyCode.RIGHT);
        assertTrue(robot.text("#sites-reading").startsWith("South cliff: stable (75 %)"));
        assertEquals(
                "Map. " + robot.text("#sites-reading"),
                robot.lookup("#sites-paper").query().getAccessibleText());
        robot.push("#sites-together-part");
        assertEquals(
                9, robot.lookup("#sites-together").queryTableView().getItems().size());
    }
}
