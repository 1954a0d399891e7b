package stillstand.view;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import stillstand.files.StudyStore;
import stillstand.study.StudyResult;
import stillstand.view.RunModel.State;
import stillstand.view.WindowModel.Notice;

/** The window without its controls: opening, running, what is stale, what it says. */
class WindowModelTest {
    @TempDir
    private Path folder;

    private final WindowMemory memory = OpenStudies.memory();
    private final WindowModel window = OpenStudies.window(memory);

    @Test
    void resultIsStaleWhileInputsDifferFromItsOwn() throws IOException {
        window.open(study());
        assertEquals(Optional.empty(), window.shownProperty().get().result());
        window.startRun();
        assertEquals(
                State.DONE, window.run().state(), window.run().outcomeProperty().get());
        assertFalse(window.shownProperty().get().stale());
        StudyDocument document = window.document().orElseThrow();
        document.edit(
                "elevation",
                draft -> draft.with(draft.sheet("levels.csv").orElseThrow().withCells(0, 2, List.of(List.of("31")))));
        assertTrue(window.shownProperty().get().stale());
        assertTrue(window.shownProperty().get().result().isPresent());
        document.edit(
                "mistake",
                draft -> draft.with(draft.sheet("levels.csv").orElseThrow().withCells(0, 2, List.of(List.of("x")))));
        assertTrue(window.shownProperty().get().stale());
        assertTrue(window.shownProperty().get().study().isPresent(), "the last good one");
        assertFalse(window.canRun());
        document.undo();
        document.undo();
        assertFalse(window.shownProperty().get().stale());
    }

    @Test
    void resultsOfAnEarlierDayAreShownAgain() throws IOException {
        Path study = study();
        window.open(study);
        window.startRun();
        window.close(true);
        assertEquals(Shown.NOTHING, window.shownProperty().get());
        window.open(study);
        assertTrue(window.shownProperty().get().result().isPresent());
        assertFalse(window.shownProperty().get().stale());
        window.close(true);
        Files.writeString(study.resolve("study.json"), "{\"title\": \"other\", \"draws\": {\"maximum\": 20000}}");
        window.open(study);
        assertTrue(window.shownProperty().get().stale());
    }

    @Test
    void resultsThatCannotBeReadAreSaid() throws IOException {
        Path study = study();
        Files.createDirectories(study.resolve("results"));
        Files.writeString(study.resolve("results/results.json"), "{\"provenance\": {\"version\": \"0.0.1\"}}");
        window.open(study);
        assertEquals(List.of("results"), abouts());
        assertEquals(Optional.empty(), window.shownProperty().get().result());
    }

    @Test
    void runSavesFirstSoThatResultsAreOfTheFilesBesideThem() throws IOException {
        Path study = study();
        window.open(study);
        window.pair(new PairingEdit("A", "one", "5c"));
        window.startRun();
        assertTrue(Files.readString(study.resolve("levels.csv")).contains("5c"));
        assertFalse(window.document().orElseThrow().isEdited());
        assertFalse(window.shownProperty().get().stale());
    }

    @Test
    void pairingGoesIntoTheHighstandCell() throws IOException {
        window.open(study());
        StudyDocument document = window.document().orElseThrow();
        window.pair(new PairingEdit("A", "one", "!5e"));
        assertEquals("!5e", document.draft().sheet("levels.csv").orElseThrow().cell(0, 4));
        window.pair(new PairingEdit("A", "nobody", "5e"));
        document.undo();
        assertEquals("5e", document.draft().sheet("levels.csv").orElseThrow().cell(0, 4));
        assertEquals(Optional.empty(), document.undoableProperty().get());
    }

    @Test
    void seaLevelIsChosenInTheSettings() throws IOException {
        window.open(study());
        window.chooseSeaLevel(new SeaLevelEdit(List.of("waelbroeck-2002"), Optional.empty()));
        SettingsModel settings = window.evidence().orElseThrow().settings();
        assertEquals("[waelbroeck-2002]", settings.curves().keySet().toString());
        assertTrue(window.canRun());
        window.document().orElseThrow().undo();
        assertEquals("[]", settings.curves().keySet().toString());
    }

    @Test
    void demoIsACopyThatGoesWithTheWindowUnlessItIsKept() throws IOException {
        window.openDemo();
        Path copy = window.document().orElseThrow().folder();
        assertTrue(window.isPassingCopy());
        assertTrue(window.canRun());
        assertTrue(Files.exists(copy.resolve("points.csv")), "the tilt that the readme tells of");
        assertEquals(List.of("copy"), abouts());
        assertEquals(List.of(), memory.recent());
        Path kept = folder.resolve("kept");
        window.saveInto(kept);
        assertEquals(kept.toRealPath(), window.document().orElseThrow().folder());
        assertFalse(window.isPassingCopy());
        assertFalse(Files.exists(copy));
        assertEquals(List.of(kept.toRealPath()), memory.recent());
    }

    @Test
    void templateIsWrittenAndOpened() throws IOException {
        window.openTemplate(folder.resolve("mine"));
        assertTrue(window.canRun());
        window.close(true);
        window.openTemplate(folder.resolve("mine"));
        assertTrue(window.document().isEmpty());
        assertTrue(window.notices().get(0).sentence().contains("nothing was written"));
    }

    @Test
    void whatIsNoStudyIsSaid() {
        window.open(folder.resolve("nowhere"));
        assertTrue(window.document().isEmpty());
        assertTrue(window.notices().get(0).sentence().contains("no such folder"));
    }

    @Test
    void secondWindowSaysWhyItOnlyReads() throws IOException {
        Path study = study();
        window.open(study);
        WindowModel second = OpenStudies.window(OpenStudies.memory());
        second.open(study);
        assertTrue(second.notices().get(0).sentence().contains("another window has this study open"));
        second.startRun();
        assertEquals(State.DONE, second.run().state());
        assertFalse(Files.exists(study.resolve("results")));
    }

    @Test
    void askingWhatToMeasureNextIsOneEditThatKeepsTheOtherKeys() throws IOException {
        Path study = study();
        window.open(study);
        window.askLeverageAndRun();
        assertEquals(State.DONE, window.run().state());
        StudyResult result = window.run().resultProperty().get().orElseThrow();
        assertFalse(result.leverage().nextMeasurements().isEmpty());
        assertFalse(result.leverage().assumptionSwitches().isEmpty());
        assertTrue(Files.readString(study.resolve("study.json")).contains("\"maximum\": 20000"));
        window.askLeverage(true);
        StudyDocument document = window.document().orElseThrow();
        assertEquals(
                Optional.of("asking what to measure next"),
                document.undoableProperty().get(),
                "asked already, so nothing was edited");
        window.askLeverage(false);
        assertEquals(
                Optional.empty(),
                window.shownProperty().get().study().orElseThrow().settings().leverage());
        assertTrue(window.shownProperty().get().stale());
    }

    @Test
    void nothingRunsWhereAskingFindsProblems() throws IOException {
        Path study = study();
        Files.writeString(study.resolve("levels.csv"), "site,level,elevation_m\nA,one,x\n");
        window.open(study);
        window.askLeverageAndRun();
        assertEquals(State.IDLE, window.run().state());
        assertFalse(Files.exists(study.resolve("results")));
    }

    @Test
    void crashIsFollowedByAnOffer() throws IOException {
        Path study = study();
        try (StudyStore crashed = StudyStore.open(study).value().orElseThrow()) {
            crashed.writeRecovery(crashed.read().withText("study.json", "{\"title\": \"unsaved\"}"));
        }
        window.open(study);
        Notice offer = window.notices().get(0);
        assertEquals("recovery", offer.about());
        offer.answers().get(0).action().run();
        assertEquals("unsaved", title());
        assertEquals(List.of(), window.notices());
        window.document().orElseThrow().undo();
        assertEquals("A", title());
    }

    @Test
    void fileChangedOutsideIsAsked() throws IOException {
        Path study = study();
        window.open(study);
        Files.writeString(study.resolve("study.json"), "{\"title\": \"theirs\"}");
        window.document().orElseThrow().lookAtDisk();
        Notice notice = window.notices().get(0);
        assertEquals("changed", notice.about());
        notice.answers().get(0).action().run();
        assertEquals("theirs", title());
        assertEquals(List.of(), window.notices());
    }

    @Test
    void windowThatClosesForgetsWhatIsOpenAndLetsTheFolderGo() throws IOException {
        Path study = study();
        window.open(study);
        assertEquals(Optional.of(study.toRealPath()), memory.leftOpen());
        window.close(true);
        assertEquals(Optional.empty(), memory.leftOpen());
        assertFalse(Files.exists(study.resolve(".study.stillstand-lock")));
    }

    private String title() {
        SettingsModel settings = window.evidence().orElseThrow().settings();
        return settings.value(settings.fields().get(0));
    }

    private List<String> abouts() {
        return window.notices().stream().map(Notice::about).toList();
    }

    private Path study() throws IOException {
        Path place = folder.resolve("study");
        Files.createDirectories(place);
        Files.writeString(place.resolve("study.json"), "{\"title\": \"A\", \"draws\": {\"maximum\": 20000}}");
        Files.writeString(place.resolve("sites.csv"), "site\nA\n");
        Files.writeString(
                place.resolve("levels.csv"), "site,level,elevation_m,elevation_1sigma_m,highstand\nA,one,30,1,5e\n");
        return place;
    }
}
