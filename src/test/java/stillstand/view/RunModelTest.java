package stillstand.view;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Duration;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import stillstand.files.ResultsFolder;
import stillstand.ledger.RunCancelledException;
import stillstand.ledger.RunMonitor;
import stillstand.study.Study;
import stillstand.study.StudyRunner;
import stillstand.view.RunModel.State;

/** A run as the window sees it. */
class RunModelTest {
    @TempDir
    private Path folder;

    @Test
    void runWritesWhatTheCommandLineWrites() throws IOException {
        RunModel run = OpenStudies.runs(StudyRunner::run);
        run.start(study(), Optional.of(folder.resolve("results")));
        assertEquals(State.DONE, run.state(), run.outcomeProperty().get());
        assertTrue(run.resultProperty().get().isPresent());
        for (String name : List.of("results.json", "table1.csv", "rates.csv", "ledger.csv", "figures")) {
            assertTrue(Files.exists(folder.resolve("results").resolve(name)), name);
        }
        assertTrue(run.outcomeProperty().get().startsWith("Done in 0.0 s. Results are in "));
    }

    @Test
    void progressIsHeardAndEndsWithTheRun() throws IOException {
        List<Double> heard = new ArrayList<>();
        RunModel run = OpenStudies.runs((study, executor, monitor) -> {
            monitor.step("first", 0.25);
            monitor.step("second", 0.75);
            return StudyRunner.run(study, executor, monitor);
        });
        run.fractionProperty().addListener((source, before, after) -> heard.add(after.doubleValue()));
        run.start(study(), Optional.empty());
        assertTrue(heard.containsAll(List.of(0.25, 0.75, 1.0)), heard.toString());
        assertEquals("", run.whatProperty().get());
        assertTrue(run.outcomeProperty().get().endsWith("Nothing was written."));
    }

    @Test
    void cancelledRunLeavesEarlierResults() throws IOException {
        RunModel run = OpenStudies.runs(StudyRunner::run);
        Path results = folder.resolve("results");
        run.start(study(), Optional.of(results));
        String before = Files.readString(results.resolve("results.json"));
        Optional<?> shown = run.resultProperty().get();
        RunModel[] cancelled = new RunModel[1];
        cancelled[0] = OpenStudies.runs((study, executor, monitor) -> {
            cancelled[0].cancel();
            assertEquals(State.CANCELLING, cancelled[0].state());
            assertTrue(monitor.isCancelled());
            throw new RunCancelledException();
        });
        cancelled[0].start(study(), Optional.of(results));
        assertEquals(State.CANCELLED, cancelled[0].state());
        assertEquals(before, Files.readString(results.resolve("results.json")));
        assertTrue(shown.isPresent());
    }

    @Test
    void engineThatOverlooksTheRequestIsCancelledAllTheSame() throws IOException {
        RunModel[] run = new RunModel[1];
        run[0] = OpenStudies.runs((study, executor, monitor) -> {
            run[0].cancel();
            return StudyRunner.run(study, executor, RunMonitor.SILENT);
        });
        run[0].start(study(), Optional.of(folder.resolve("results")));
        assertEquals(State.CANCELLED, run[0].state());
        assertFalse(Files.exists(folder.resolve("results")));
    }

    @Test
    @SuppressWarnings("try") // held, not used
    void lockedResultsAreSaidAndTheNewOnesShown() throws IOException {
        Path results = folder.resolve("results");
        RunModel run = OpenStudies.runs(StudyRunner::run);
        try (ResultsFolder held = ResultsFolder.open(results).value().orElseThrow()) {
            run.start(study(), Optional.of(results));
            assertEquals(State.FAILED, run.state());
            assertTrue(run.outcomeProperty().get().contains("another run writing there"));
            assertTrue(run.resultProperty().get().isPresent());
            assertFalse(Files.exists(results.resolve("results.json")));
        }
    }

    @Test
    void foreignFileInResultsIsNotLost() throws IOException {
        Path results = folder.resolve("results");
        Files.createDirectories(results);
        Files.writeString(results.resolve("mine.txt"), "mine");
        RunModel run = OpenStudies.runs(StudyRunner::run);
        run.start(study(), Optional.of(results));
        assertEquals(State.FAILED, run.state());
        assertEquals("mine", Files.readString(results.resolve("mine.txt")));
    }

    @Test
    void faultOfTheEngineIsNotTheUsers() throws IOException {
        RunModel run = OpenStudies.runs((study, executor, monitor) -> {
            throw new IllegalStateException("broken");
        });
        run.start(study(), Optional.empty());
        assertEquals(State.FAILED, run.state());
        assertTrue(run.outcomeProperty().get().startsWith("A fault of Stillstand, not of your input"));
        run.start(study(), Optional.empty());
        assertEquals(State.FAILED, run.state());
    }

    @Test
    void runOfAClosedStudyIsNoLongerHeard() throws IOException {
        RunModel[] run = new RunModel[1];
        run[0] = OpenStudies.runs((study, executor, monitor) -> {
            run[0].cancel();
            run[0].show(Optional.empty());
            return StudyRunner.run(study, executor, RunMonitor.SILENT);
        });
        run[0].start(study(), Optional.empty());
        assertEquals(State.IDLE, run[0].state());
        assertEquals(Optional.empty(), run[0].resultProperty().get());
    }

    @Test
    void remainingTimeIsSaidOnceItMeansSomething() {
        assertEquals("", RunModel.remaining(Duration.ofSeconds(10), 0.01));
        assertEquals("", RunModel.remaining(Duration.ofMillis(500), 0.5));
        assertEquals("about 10 s left", RunModel.remaining(Duration.ofSeconds(10), 0.5));
        assertEquals("about 3 min left", RunModel.remaining(Duration.ofSeconds(60), 0.25));
        assertEquals("less than a second left", RunModel.remaining(Duration.ofSeconds(2), 0.9));
        assertEquals("", RunModel.remaining(Duration.ofSeconds(10), 1));
    }

    private Study study() throws IOException {
        Path place = folder.resolve("study");
        if (!Files.exists(place)) {
            Files.createDirectories(place);
            Files.writeString(place.resolve("study.json"), "{\"title\": \"A\", \"draws\": {\"maximum\": 20000}}");
            Files.writeString(place.resolve("sites.csv"), "site\nA\n");
            Files.writeString(
                    place.resolve("levels.csv"),
                    "site,level,elevation_m,elevation_1sigma_m,highstand\nA,one,30,1,5e\n");
        }
        return OpenStudies.READER.check(place, Map.of()).value().orElseThrow();
    }
}
