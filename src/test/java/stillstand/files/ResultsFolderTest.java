package stillstand.files;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.junit.jupiter.api.Assumptions.assumeFalse;

import com.google.common.jimfs.Configuration;
import com.google.common.jimfs.Jimfs;
import java.io.IOException;
import java.nio.channels.FileChannel;
import java.nio.channels.FileLock;
import java.nio.file.FileSystem;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardOpenOption;
import java.nio.file.attribute.PosixFilePermissions;
import java.util.List;
import java.util.TreeMap;
import java.util.stream.Stream;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import stillstand.SampleStudy;
import stillstand.ledger.Loaded;

class ResultsFolderTest {
    private static final String OURS = ResultsJson.text(SampleStudy.result());

    @TempDir
    Path study;

    private Path results;

    @BeforeEach
    void name() {
        results = study.resolve("results");
    }

    private static ResultsFolder.Filling files(String ledger) {
        return folder -> {
            Files.writeString(folder.resolve("results.json"), OURS);
            Files.writeString(folder.resolve("ledger.csv"), ledger);
        };
    }

    private static void write(Path results, String ledger) throws IOException {
        try (ResultsFolder folder = ResultsFolder.open(results).value().orElseThrow()) {
            folder.replace(files(ledger));
        }
    }

    /** The ledger in the results, after seeing that nothing else lies about. */
    private static String ledger(Path results) throws IOException {
        assertEquals(
                List.of(results.getFileName().toString()),
                names(results.resolve("..").normalize()));
        assertEquals(List.of("ledger.csv", "results.json"), names(results));
        return Files.readString(results.resolve("ledger.csv"));
    }

    private static List<String> names(Path folder) throws IOException {
        try (Stream<Path> entries = Files.list(folder)) {
            return entries.map(entry -> entry.getFileName().toString()).sorted().toList();
        }
    }

    @Test
    void newResultsReplaceOldOnes() throws IOException {
        write(results, "first");
        assertEquals("first", ledger(results));
        write(results, "second");
        assertEquals("second", ledger(results));
    }

    @Test
    void foldersAboveAreMade() throws IOException {
        write(study.resolve("a/b/results"), "deep");
        assertEquals("deep", ledger(study.resolve("a/b/results")));
    }

    /** After 0 steps nothing was done; 1: written beside; 2: old away; 3: new in place; 4: old removed. */
    @ParameterizedTest
    @CsvSource({"0, old", "1, old", "2, new", "3, new", "4, new"})
    void aKilledSwapIsFinishedOrUndone(int steps, String expected) throws IOException {
        write(results, "old");
        try (ResultsFolder killed = ResultsFolder.open(results).value().orElseThrow()) {
            killed.replace(files("new"), steps);
        }
        ResultsFolder.open(results).value().orElseThrow().close();
        assertEquals(expected, ledger(results));
    }

    @Test
    void aKilledFirstRunLeavesNothing() throws IOException {
        try (ResultsFolder killed = ResultsFolder.open(results).value().orElseThrow()) {
            killed.replace(files("new"), 1);
        }
        ResultsFolder.open(results).value().orElseThrow().close();
        assertEquals(List.of(), names(study));
    }

    @Test
    void aKilledWritingIsUndone() throws IOException {
        write(results, "old");
        Path half = Files.createDirectory(study.resolve(".results.stillstand-new"));
        Files.writeString(half.resolve("ledger.csv"), "ha");
        ResultsFolder.open(results).value().orElseThrow().close();
        assertEquals("old", ledger(results));
    }

    @Test
    void aKilledRemovalIsFinished() throws IOException {
        write(results, "new");
        Path rest = Files.createDirectory(study.resolve(".results.stillstand-old"));
        Files.writeString(rest.resolve("rates.csv"), "a rest");
        ResultsFolder.open(results).value().orElseThrow().close();
        assertEquals("new", ledger(results));
    }

    @Test
    void anOldFolderAloneComesBack() throws IOException {
        write(results, "old");
        Files.move(results, study.resolve(".results.stillstand-old"));
        ResultsFolder.open(results).value().orElseThrow().close();
        assertEquals("old", ledger(results));
    }

    @Test
    void failureWhileWritingLeavesPreviousResults() throws IOException {
        write(results, "old");
        try (ResultsFolder folder = ResultsFolder.open(results).value().orElseThrow()) {
            assertThrows(
                    IllegalStateException.class,
                    () -> folder.replace(fresh -> {
                        Files.writeString(fresh.resolve("ledger.csv"), "half");
                        throw new IllegalStateException("interrupted");
                    }));
        }
        assertEquals("old", ledger(results));
    }

    @Test
    void fullDiskLeavesPreviousResults() throws IOException {
        Configuration small = Configuration.unix().toBuilder()
                .setMaxSize(64 * 1024)
                .setBlockSize(1024)
                .build();
        try (FileSystem disk = Jimfs.newFileSystem(small)) {
            Path folder = disk.getPath("/study/results");
            write(folder, "old");
            try (ResultsFolder opened = ResultsFolder.open(folder).value().orElseThrow()) {
                assertThrows(IOException.class, () -> opened.replace(files("x".repeat(100_000))));
            }
            assertEquals("old", ledger(folder));
            write(folder, "new");
            assertEquals("new", ledger(folder));
        }
    }

    @Test
    void noPermissionLeavesPreviousResults() throws IOException {
        write(results, "old");
        Files.setPosixFilePermissions(study, PosixFilePermissions.fromString("r-xr-xr-x"));
        try {
            assumeFalse(Files.isWritable(study), "the super-user may write anywhere");
            assertThrows(IOException.class, () -> ResultsFolder.open(results));
        } finally {
            Files.setPosixFilePermissions(study, PosixFilePermissions.fromString("rwxr-xr-x"));
        }
        assertEquals("old", ledger(results));
    }

    @Test
    void aFileInPlaceOfTheStudyIsAFailure() throws IOException {
        Path file = Files.writeString(study.resolve("file"), "x");
        assertThrows(IOException.class, () -> ResultsFolder.open(file.resolve("results")));
    }

    @Test
    void foldersOfTheUserAreRefused() throws IOException {
        Files.createDirectory(results);
        Files.writeString(results.resolve("thesis.txt"), "years of work");
        assertEquals(
                results + ": found \"thesis.txt\" in it, expected no folder of that name, an empty one, or one that"
                        + " holds results of Stillstand alone",
                refusal(results));
        assertEquals(List.of("thesis.txt"), names(results));
        assertEquals(List.of("results"), names(study));
    }

    @Test
    void aForeignResultsFileIsRefused() throws IOException {
        Files.createDirectory(results);
        Files.writeString(results.resolve("results.json"), "{\"made\": \"elsewhere\"}");
        assertEquals(
                results + ": found \"results.json\" in it, expected no folder of that name, an empty one, or one that"
                        + " holds results of Stillstand alone",
                refusal(results));
    }

    @Test
    void whatTheUserPutBesideResultsIsNotLost() throws IOException {
        write(results, "old");
        Files.writeString(results.resolve("table1-edited.xlsx"), "an afternoon of work");
        assertEquals(
                results + ": found \"table1-edited.xlsx\" in it, expected only files of Stillstand, since all of it is"
                        + " replaced; move that one away or give another --out",
                refusal(results));
        assertEquals("old", Files.readString(results.resolve("ledger.csv")));
    }

    @Test
    void aFileInPlaceOfTheFolderIsRefused() throws IOException {
        Files.writeString(results, "x");
        assertEquals(
                results + ": found a file, expected no folder of that name, an empty one, or one that holds results of"
                        + " Stillstand alone",
                refusal(results));
    }

    @Test
    void anEmptyFolderIsTaken() throws IOException {
        Files.createDirectory(results);
        write(results, "new");
        assertEquals("new", ledger(results));
    }

    @Test
    void aLinkKeepsPointingAtItsFolder() throws IOException {
        Path elsewhere = Files.createDirectories(study.resolve("disk/place"));
        Path link = Files.createSymbolicLink(study.resolve("results"), elsewhere);
        write(link, "new");
        assertTrue(Files.isSymbolicLink(link));
        assertEquals("new", ledger(elsewhere));
    }

    @Test
    void aSecondRunSaysSo() throws IOException {
        ResultsFolder first = ResultsFolder.open(results).value().orElseThrow();
        String second = refusal(results);
        first.close();
        assertEquals(
                results + ": found another run writing there, expected one run at a time; wait for it or give another"
                        + " --out",
                second);
        write(results, "after");
        assertEquals("after", ledger(results));
    }

    @Test
    void theLockFileOfADeadProcessIsNoHindrance() throws IOException {
        Files.writeString(study.resolve(".results.stillstand-lock"), "who knows");
        write(results, "new");
        assertEquals("new", ledger(results));
    }

    @Test
    void theLockIsOneOfTheOperatingSystem() throws IOException {
        Path lock = study.resolve(".results.stillstand-lock");
        try (FileChannel other = FileChannel.open(lock, StandardOpenOption.CREATE, StandardOpenOption.WRITE)) {
            FileLock held = other.lock(1L << 40, 1, false);
            assertTrue(refusal(results).contains("another run writing there"));
            held.release();
        }
        assertFalse(Files.exists(results));
    }

    private static String refusal(Path results) throws IOException {
        Loaded<ResultsFolder> refused = ResultsFolder.open(results);
        assertTrue(refused.value().isEmpty());
        assertEquals(1, refused.problems().size());
        return refused.problems().get(0).message();
    }

    @Test
    void bytesAreThoseThatWereWritten() throws IOException {
        write(results, "é\n");
        TreeMap<String, String> read = new TreeMap<>();
        for (String name : names(results)) {
            read.put(name, Files.readString(results.resolve(name)));
        }
        assertEquals(new TreeMap<>(java.util.Map.of("results.json", OURS, "ledger.csv", "é\n")), read);
    }
}
