package stillstand.view;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.TimeoutException;
import javafx.application.Application;
import javafx.application.Platform;
import javafx.scene.Parent;
import javafx.scene.Scene;
import javafx.scene.control.CheckBox;
import javafx.scene.control.TableView;
import javafx.scene.input.KeyCode;
import javafx.scene.layout.StackPane;
import javafx.stage.Stage;
import org.junit.jupiter.api.AfterAll;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.testfx.api.FxRobot;
import org.testfx.api.FxToolkit;
import org.testfx.util.WaitForAsyncUtils;
import stillstand.SampleStudy;
import stillstand.files.ShippedLibrary;
import stillstand.files.StudyFolder;
import stillstand.study.Study;
import stillstand.view.RatesModel.Row;

/** Hands on rates, sea level and record; no display needed. */
class AreasWindowTest {
    private static Optional<Scene> opened = Optional.empty();

    @TempDir
    private Path folder;

    private final FxRobot robot = new FxRobot();

    @BeforeAll
    static void open() throws TimeoutException {
        FxToolkit.registerPrimaryStage();
        FxToolkit.setupStage(AreasWindowTest::fill);
    }

    private static void fill(Stage stage) {
        Application.setUserAgentStylesheet(new atlantafx.base.theme.PrimerDark().getUserAgentStylesheet());
        Scene scene = new Scene(new StackPane(), 1200, 740);
        opened = Optional.of(scene);
        stage.setScene(scene);
        stage.show();
    }

    @AfterAll
    static void close() throws TimeoutException {
        FxToolkit.cleanupStages();
    }

    private void show(Parent area) {
        robot.interact(() -> opened.orElseThrow().setRoot(area));
        WaitForAsyncUtils.waitForFxEvents();
    }

    @Test
    @SuppressWarnings("unchecked")
    void ratesSortByTheNumberAndNotByItsText() {
        RatesModel model = new RatesModel();
        RatesView[] view = new RatesView[1];
        robot.interact(() -> {
            view[0] = new RatesView(model);
            model.show(Shown.of(SampleStudy.study(), SampleStudy.withoutFailure(), false));
        });
        show(view[0]);
        TableView<Row> table = robot.lookup("#rates-table").queryAs(TableView.class);
        robot.interact(() -> {
            table.getSortOrder().setAll(List.of(table.getColumns().get(4)));
            table.sort();
        });
        assertEquals("S1", table.getItems().get(0).name()); // -0.004, written 0.00
        assertEquals("", table.getItems().get(table.getItems().size() - 1).median()); // those without one come last
    }

    @Test
    void aTickAsksForACurveAndKeysZoom() {
        List<SeaLevelEdit> edits = new ArrayList<>();
        Study study = StudyFolder.read(Path.of("demo/velloe-island"), ShippedLibrary.load())
                .value()
                .orElseThrow();
        SeaLevelModel model = new SeaLevelModel(ShippedLibrary.load(), edits::add);
        SeaLevelView[] view = new SeaLevelView[1];
        robot.interact(() -> {
            view[0] = new SeaLevelView(model);
            model.show(Shown.of(study));
        });
        show(view[0]);
        assertTrue(robot.lookup("#sea-use-spratt-lisiecki-2016")
                .queryAs(CheckBox.class)
                .isSelected());
        robot.clickOn("#sea-use-waelbroeck-2002");
        assertEquals(
                List.of("spratt-lisiecki-2016", "waelbroeck-2002"), edits.get(0).curves());
        robot.interact(() -> view[0].lookup("#sea-paper").requestFocus());
        double before = model.paneProperty().get().agesKa().width();
        robot.type(KeyCode.PLUS);
        assertEquals(0.8 * before, model.paneProperty().get().agesKa().width(), 1e-9);
        robot.type(KeyCode.DIGIT0);
        assertEquals(before, model.paneProperty().get().agesKa().width(), 1e-9);
    }

    @Test
    void theLedgerIsSearchedWhileTyping() {
        RecordModel model = new RecordModel(Runnable::run, Platform::runLater);
        RecordView[] view = new RecordView[1];
        robot.interact(() -> {
            view[0] = new RecordView(model, Optional::empty);
            model.show(Shown.of(SampleStudy.study(), SampleStudy.withoutFailure(), false));
        });
        show(view[0]);
        robot.clickOn("#record-search").write("cauchy");
        assertEquals(
                1,
                robot.lookup("#record-ledger")
                        .queryAs(TableView.class)
                        .getItems()
                        .size());
    }

    @Test
    void aFigureIsExportedAsSvg() throws Exception {
        RecordModel model = new RecordModel(Runnable::run, Runnable::run);
        RecordView[] view = new RecordView[1];
        robot.interact(() -> {
            view[0] = new RecordView(model, () -> Optional.of(folder));
            model.show(Shown.of(SampleStudy.study(), SampleStudy.withoutFailure(), false));
        });
        show(view[0]);
        robot.clickOn("#record-pdf").clickOn("#record-png").clickOn("#record-export-all");
        String svg = Files.readString(folder.resolve("stair-north-cliff.svg"), StandardCharsets.UTF_8);
        assertTrue(svg.contains("North cliff"), "no title in the drawing");
        try (var files = Files.list(folder)) {
            assertTrue(files.allMatch(file -> file.toString().endsWith(".svg")));
        }
    }
}
