package stillstand.files;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.google.common.jimfs.Configuration;
import com.google.common.jimfs.Jimfs;
import java.io.IOException;
import java.nio.file.FileSystem;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import stillstand.ledger.Loaded;
import stillstand.study.Study;

/** A study folder under the hands of an editor: saved whole or not at all. */
class StudyStoreTest {
    @TempDir
    private Path folder;

    @Test
    void untouchedStudyIsSavedByteByByte() throws IOException {
        Path demo = demo();
        List<byte[]> before = bytes(demo);
        try (StudyStore store = open(demo)) {
            store.save(store.read());
        }
        List<byte[]> after = bytes(demo);
        for (int i = 0; i < before.size(); i++) {
            assertArrayEquals(before.get(i), after.get(i));
        }
    }

    @Test
    void secondWindowReadsAlone() throws IOException {
        Path demo = demo();
        try (StudyStore first = open(demo)) {
            assertEquals(Optional.empty(), first.whyReadOnly());
            try (StudyStore second = open(demo)) {
                assertEquals(Optional.of("another window has this study open"), second.whyReadOnly());
                StudyDraft draft = second.read();
                assertThrows(IllegalStateException.class, () -> second.save(draft));
            }
        }
        try (StudyStore third = open(demo)) {
            assertEquals(Optional.empty(), third.whyReadOnly());
        }
    }

    @Test
    void folderThatCannotBeWrittenIsReadAlone() throws IOException {
        Path demo = demo();
        Files.createDirectory(demo.resolve(".study.stillstand-lock")); // stands in for a disk without permission
        try (StudyStore store = open(demo)) {
            assertTrue(store.whyReadOnly().orElseThrow().startsWith("its folder cannot be written"));
            assertEquals(5, store.read().files().size());
        }
    }

    @Test
    void fullDiskLeavesTheOldFiles() throws IOException {
        try (FileSystem small = Jimfs.newFileSystem(Configuration.unix().toBuilder()
                .setBlockSize(512)
                .setMaxSize(20 * 512)
                .build())) {
            Path study = small.getPath("/study");
            StudyTemplate.write(study);
            try (StudyStore store = open(study)) {
                String before = Files.readString(study.resolve("levels.csv"));
                Sheet levels = store.read().sheet("levels.csv").orElseThrow();
                Sheet large = levels.withCells(0, 0, List.of(List.of("x".repeat(20 * 512))));
                assertThrows(IOException.class, () -> store.save(store.read().with(large)));
                assertEquals(before, Files.readString(study.resolve("levels.csv")));
                try (Stream<Path> left = Files.list(study)) {
                    assertTrue(left.noneMatch(file -> file.toString().endsWith("-new")));
                }
            }
        }
    }

    @Test
    void changeByAnotherProgramIsSeen() throws IOException {
        Path demo = demo();
        try (StudyStore store = open(demo)) {
            assertEquals(List.of(), store.changedOnDisk());
            Files.writeString(demo.resolve("levels.csv"), "site,level,elevation_m,elevation_1sigma_m\n");
            Files.delete(demo.resolve("samples.csv"));
            assertEquals(List.of("levels.csv", "samples.csv"), store.changedOnDisk());
            store.read();
            assertEquals(List.of(), store.changedOnDisk());
        }
    }

    @Test
    void unsavedEditsComeBack() throws IOException {
        Path demo = demo();
        try (StudyStore store = open(demo)) {
            StudyDraft edited = store.read().withText("study.json", "{\"title\": \"changed\"}");
            store.writeRecovery(edited);
            assertTrue(StudyStore.hasRecovery(demo));
            assertEquals(Optional.of(edited), store.recovery());
            store.save(edited);
            assertFalse(StudyStore.hasRecovery(demo));
        }
    }

    @Test
    void recoveryThatSaysNothingNewIsNotOffered() throws IOException {
        Path demo = demo();
        try (StudyStore store = open(demo)) {
            store.writeRecovery(store.read());
            assertEquals(Optional.empty(), store.recovery());
            Files.writeString(demo.resolve(".study.stillstand-recovery"), "{\"levels.csv\": ");
            assertEquals(Optional.empty(), store.recovery());
        }
    }

    @Test
    void copyHoldsAllButResults() throws IOException {
        Path demo = demo();
        Files.createDirectories(demo.resolve("results"));
        Files.writeString(demo.resolve("results/results.json"), "{}");
        Files.createDirectories(demo.resolve("ages"));
        Files.writeString(demo.resolve("ages/one.csv"), "age_ka,density\n1,1\n2,1\n");
        try (StudyStore store = open(demo)) {
            Path copy = demo.resolve("copy");
            assertEquals(Optional.empty(), store.copyTo(copy));
            assertTrue(Files.exists(copy.resolve("ages/one.csv")));
            assertFalse(Files.exists(copy.resolve("results")));
            assertTrue(store.copyTo(demo).isPresent());
        }
    }

    @Test
    void whatIsEditedIsCheckedAsIfItWereSaved() throws IOException {
        Path demo = demo();
        try (StudyStore store = open(demo)) {
            Sheet levels = store.read().sheet("levels.csv").orElseThrow();
            StudyDraft edited = store.read().with(levels.withCells(1, 2, List.of(List.of("88,4"))));
            Loaded<Study> before = StudyFolder.read(demo, edited.texts(), ShippedLibrary.load());
            assertEquals(
                    "levels.csv:4:3: elevation_m: found \"88,4\", expected a number with a decimal point",
                    before.problems().get(0).message());
            store.save(edited);
            assertEquals(
                    before.problems(),
                    StudyFolder.read(demo, ShippedLibrary.load()).problems());
        }
    }

    private Path demo() throws IOException {
        Path demo = folder.resolve("demo");
        assertEquals(Optional.empty(), StudyTemplate.writeDemo(demo));
        return demo;
    }

    private static StudyStore open(Path folder) throws IOException {
        return StudyStore.open(folder).value().orElseThrow();
    }

    private static List<byte[]> bytes(Path folder) throws IOException {
        return List.of(
                Files.readAllBytes(folder.resolve("study.json")),
                Files.readAllBytes(folder.resolve("sites.csv")),
                Files.readAllBytes(folder.resolve("levels.csv")),
                Files.readAllBytes(folder.resolve("samples.csv")));
    }
}
