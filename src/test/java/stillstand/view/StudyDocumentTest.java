package stillstand.view;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayDeque;
import java.util.Deque;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import stillstand.files.StudyFolder;
import stillstand.files.StudyStore;
import stillstand.ledger.InputProblem;

/** A study as it is edited: undone, saved, brought back, and always checked as the command line checks it. */
class StudyDocumentTest {
    private static final String TITLE = "{\"title\": \"other\"}\n";

    @TempDir
    private Path folder;

    @Test
    void everyEditCanBeUndoneAndDoneAgain() throws IOException {
        StudyDocument document = OpenStudies.document(OpenStudies.template(folder));
        String before = document.draft().text("study.json").orElseThrow();
        document.edit("one", draft -> draft.withText("study.json", "{\"title\": \"1\"}"));
        document.edit("two", draft -> draft.withText("study.json", "{\"title\": \"2\"}"));
        assertEquals(Optional.of("two"), document.undoableProperty().get());
        document.undo();
        assertEquals(Optional.of("{\"title\": \"1\"}"), document.draft().text("study.json"));
        assertEquals(Optional.of("one"), document.undoableProperty().get());
        assertEquals(Optional.of("two"), document.redoableProperty().get());
        document.undo();
        assertEquals(Optional.of(before), document.draft().text("study.json"));
        assertFalse(document.isEdited());
        document.undo();
        document.redo();
        document.redo();
        assertEquals(Optional.of("{\"title\": \"2\"}"), document.draft().text("study.json"));
        document.undo();
        document.edit("three", draft -> draft.withText("study.json", "{\"title\": \"3\"}"));
        assertEquals(Optional.empty(), document.redoableProperty().get());
    }

    @Test
    void problemsAreThoseOfTheCommandLine() throws IOException {
        Path study = OpenStudies.template(folder);
        StudyDocument document = OpenStudies.document(study);
        assertTrue(document.checked().study().isPresent());
        document.edit(
                "a mistake",
                draft -> draft.with(draft.sheet("levels.csv")
                        .orElseThrow()
                        .withCells(0, 2, List.of(List.of("12,5")))
                        .withCells(1, 0, List.of(List.of("Nowhere")))));
        List<InputProblem> inWindow = document.checked().problems();
        assertTrue(document.checked().study().isEmpty());
        document.save(() -> {});
        assertEquals(StudyFolder.read(study, OpenStudies.READER.shipped()).problems(), inWindow);
        assertTrue(inWindow.size() >= 2, inWindow.toString());
    }

    @Test
    void editThatChangesNothingIsNone() throws IOException {
        StudyDocument document = OpenStudies.document(OpenStudies.template(folder));
        document.edit(
                "nothing",
                draft -> draft.withText("study.json", draft.text("study.json").orElseThrow()));
        assertEquals(Optional.empty(), document.undoableProperty().get());
    }

    @Test
    void unsavedEditsLieBesideTheStudyUntilTheyAreSaved() throws IOException {
        Path study = OpenStudies.template(folder);
        StudyDocument document = OpenStudies.document(study);
        document.edit("title", draft -> draft.withText("study.json", TITLE));
        assertTrue(StudyStore.hasRecovery(study));
        assertFalse(Files.readString(study.resolve("study.json")).equals(TITLE));
        document.undo();
        assertFalse(StudyStore.hasRecovery(study));
        document.redo();
        document.save(() -> {});
        assertFalse(StudyStore.hasRecovery(study));
        assertEquals(TITLE, Files.readString(study.resolve("study.json")));
    }

    @Test
    void editsOfAnEarlierWindowAreNotWrittenOverBeforeTheUserChooses() throws IOException {
        Path study = OpenStudies.template(folder);
        try (StudyStore crashed = StudyStore.open(study).value().orElseThrow()) {
            crashed.writeRecovery(crashed.read().withText("study.json", TITLE));
        }
        StudyDocument document = OpenStudies.document(study);
        document.edit("other", draft -> draft.withText("study.json", "{\"title\": \"third\"}"));
        assertTrue(Files.readString(study.resolve(".study.stillstand-recovery")).contains("other"));
        document.startKeeping();
        assertTrue(Files.readString(study.resolve(".study.stillstand-recovery")).contains("third"));
    }

    @Test
    void fileChangedOnDiskIsNotWrittenOverUnasked() throws IOException {
        Path study = OpenStudies.template(folder);
        StudyDocument document = OpenStudies.document(study);
        document.edit("title", draft -> draft.withText("study.json", TITLE));
        Files.writeString(study.resolve("study.json"), "{\"title\": \"theirs\"}");
        boolean[] saved = new boolean[1];
        document.save(() -> saved[0] = true);
        assertFalse(saved[0]);
        assertEquals(List.of("study.json"), document.changedOnDiskProperty().get());
        document.keepMine();
        document.save(() -> saved[0] = true);
        assertTrue(saved[0]);
        assertEquals(TITLE, Files.readString(study.resolve("study.json")));
    }

    @Test
    void reloadingCanBeUndone() throws IOException {
        Path study = OpenStudies.template(folder);
        StudyDocument document = OpenStudies.document(study);
        document.edit("title", draft -> draft.withText("study.json", TITLE));
        Files.writeString(study.resolve("study.json"), "{\"title\": \"theirs\"}");
        document.lookAtDisk();
        document.reload();
        assertEquals(Optional.of("{\"title\": \"theirs\"}"), document.draft().text("study.json"));
        assertFalse(document.isEdited());
        document.undo();
        assertEquals(Optional.of(TITLE), document.draft().text("study.json"));
        assertTrue(document.isEdited());
    }

    @Test
    void secondWindowEditsNothing() throws IOException {
        Path study = OpenStudies.template(folder);
        StudyDocument first = OpenStudies.document(study);
        StudyDocument second = OpenStudies.document(study);
        assertTrue(second.isReadOnly());
        assertTrue(second.checked().study().isPresent());
        second.edit("title", draft -> draft.withText("study.json", TITLE));
        assertFalse(second.isEdited());
        first.close(true);
        assertFalse(OpenStudies.document(study).isReadOnly());
    }

    @Test
    void copyHoldsTheUnsavedEditsAndTheFirstFolderDoesNot() throws IOException {
        Path study = OpenStudies.template(folder);
        StudyDocument document = OpenStudies.document(study);
        document.edit("title", draft -> draft.withText("study.json", TITLE));
        Path copy = folder.resolve("copy");
        boolean[] copied = new boolean[1];
        document.copyTo(copy, () -> copied[0] = true);
        assertTrue(copied[0]);
        assertEquals(TITLE, Files.readString(copy.resolve("study.json")));
        assertFalse(Files.readString(study.resolve("study.json")).equals(TITLE));
        document.copyTo(study, () -> {});
        assertTrue(document.troubleProperty().get().orElseThrow().contains("nothing was written"));
    }

    @Test
    void onlyTheNewestDraftIsChecked() throws IOException {
        Path study = OpenStudies.template(folder);
        Deque<Runnable> waiting = new ArrayDeque<>();
        StudyStore store = StudyStore.open(study).value().orElseThrow();
        StudyDocument document =
                new StudyDocument(store, store.read(), OpenStudies.READER, waiting::add, Runnable::run, false);
        document.edit("broken", draft -> draft.withText("study.json", "{"));
        document.edit("mended", draft -> draft.withText("study.json", TITLE));
        int[] heard = new int[1];
        document.checkedProperty().addListener((source, before, after) -> heard[0]++);
        while (!waiting.isEmpty()) {
            waiting.pop().run();
        }
        assertEquals(1, heard[0]);
        assertEquals(document.draft(), document.checked().draft());
    }
}
