package stillstand.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.io.PrintStream;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Clock;
import java.time.Instant;
import java.time.ZoneOffset;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.stream.IntStream;
import java.util.stream.Stream;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import stillstand.SampleStudy;
import stillstand.files.ResultsJson;
import stillstand.ledger.InputProblem;
import stillstand.ledger.Loaded;
import stillstand.ledger.RunCancelledException;
import stillstand.study.Study;
import stillstand.study.StudyResult;
import stillstand.study.StudyRunner;
import stillstand.study.StudySettings;

class CommandsTest {
    private static final Clock NOON = Clock.fixed(Instant.parse("2026-12-01T12:00:00.5Z"), ZoneOffset.UTC);

    private final ByteArrayOutputStream out = new ByteArrayOutputStream();
    private final ByteArrayOutputStream err = new ByteArrayOutputStream();
    private final List<StudySettings> asked = new ArrayList<>();

    @TempDir
    Path folder;

    private Workshop.Reader reader = (place, changes) -> {
        Study study = SampleStudy.study();
        asked.add(changes.apply(study.settings()));
        return Loaded.of(new Study(
                asked.get(asked.size() - 1),
                study.sites(),
                study.seaLevel(),
                study.warnings(),
                study.ledger(),
                study.inputs()));
    };

    private Workshop.Engine engine = (study, executor, monitor) -> SampleStudy.withoutFailure();

    private int execute(String... arguments) {
        out.reset();
        err.reset();
        return Commands.execute(
                new Workshop(
                        new PrintStream(out, true, StandardCharsets.UTF_8),
                        new PrintStream(err, true, StandardCharsets.UTF_8),
                        NOON,
                        reader,
                        engine),
                withoutFigures(arguments));
    }

    /** Most tests look at no figure, and figures take a second. */
    private static String[] withoutFigures(String... arguments) {
        List<String> all = new ArrayList<>(List.of(arguments));
        if (all.contains("run")
                && !all.contains("--help")
                && !String.join(" ", all).contains("--figures")) {
            all.addAll(List.of("--figures", "none"));
        }
        return all.toArray(String[]::new);
    }

    private String out() {
        return out.toString(StandardCharsets.UTF_8);
    }

    private String err() {
        return err.toString(StandardCharsets.UTF_8);
    }

    private static List<String> names(Path folder) throws IOException {
        try (Stream<Path> entries = Files.list(folder)) {
            return entries.map(entry -> entry.getFileName().toString()).sorted().toList();
        }
    }

    private StudyResult written() throws IOException {
        return ResultsJson.read(Files.readString(folder.resolve("results/results.json")))
                .value()
                .orElseThrow();
    }

    @BeforeEach
    void quiet() {
        asked.clear();
    }

    @Test
    void runWritesResultsAndTellsOfThem() throws IOException {
        assertEquals(0, execute("run", folder.toString()), err());
        assertTrue(out().startsWith("An invented coast\nThis is not a hazard assessment"), out());
        assertTrue(out().contains("0.44 ± 0.02"), out());
        assertEquals("", err());
        assertEquals(
                List.of(
                        "assumption-switches.csv",
                        "budget.csv",
                        "comparison.csv",
                        "curve-choice.csv",
                        "curves-left-out.csv",
                        "ledger.csv",
                        "next-measurements.csv",
                        "pairings.csv",
                        "rates.csv",
                        "results.json",
                        "samples-left-out.csv",
                        "sites.geojson",
                        "table1.csv",
                        "tornado.csv"),
                names(folder.resolve("results")));
        assertEquals(List.of("results"), names(folder));
        assertEquals(Optional.of("2026-12-01T12:00:00Z"), written().provenance().started());
        assertEquals(Optional.of(0.0), written().provenance().seconds());
    }

    @Test
    void runDrawsTheFiguresOfEachSiteAndOfTheStudy() throws IOException {
        assertEquals(0, execute("run", folder.toString(), "--figures", "all"), err());
        List<String> figures = names(folder.resolve("results/figures"));
        assertTrue(
                figures.containsAll(List.of(
                        "curves.svg",
                        "forest.pdf",
                        "stair-north-cliff.png",
                        "stair-north-cliff.svg",
                        "rates-old-shore.pdf")),
                figures.toString());
        assertEquals(0, execute("run", folder.toString()), "figures are ours to replace: " + err());
        assertFalse(Files.exists(folder.resolve("results/figures")));
        assertEquals(2, execute("run", folder.toString(), "--figures", "some"));
        assertEquals("--figures must be all or none but is \"some\"\nSee stillstand run --help\n", err());
    }

    @Test
    void drawDrawsAgainFromTheResultsAlone() throws IOException {
        assertEquals(0, execute("run", folder.toString()), err());
        Path into = folder.resolve("paper/figures");
        String results = folder.resolve("results").toString();
        assertEquals(
                0,
                execute(
                        "draw",
                        results,
                        "--into",
                        into.toString(),
                        "--figure",
                        "stair",
                        "--format",
                        "svg",
                        "--width=one"),
                err());
        assertEquals(List.of("stair-north-cliff.svg", "stair-old-shore.svg"), names(into));
        assertEquals("2 figures written to " + into + " as svg.\n", out());
        assertTrue(Files.readString(into.resolve("stair-old-shore.svg")).contains("width=\"90.00mm\""));
        assertEquals(
                0,
                execute(
                        "draw",
                        results + "/results.json",
                        "--into",
                        into.toString(),
                        "--figure=pairings",
                        "--format=png",
                        "--dpi=72",
                        "--no-title"),
                err());
        assertEquals(
                "1 figure written to " + into + " as png.\nNo pairings of Old shore: no flight was matched there.\n",
                out());
    }

    @Test
    void drawRefusesWhatItCannotRead() throws IOException {
        Path into = folder.resolve("figures");
        String nowhere = folder.resolve("nowhere").toString();
        assertEquals(1, execute("draw", nowhere, "--into", into.toString()));
        assertEquals(
                "1 problem:\n" + nowhere + ": found nothing there, expected a folder of results, or its results.json\n",
                err());
        Path other = Files.createDirectory(folder.resolve("other"));
        Files.writeString(
                other.resolve("results.json"),
                ResultsJson.text(SampleStudy.result()).replaceFirst("\"version\": \"[^\"]*\"", "\"version\": \"9.9\""));
        assertEquals(1, execute("draw", other.toString(), "--into", into.toString()));
        assertTrue(err().contains("\"9.9\"") && err().contains("run the study again"), err());
        assertFalse(Files.exists(into), "nothing is made for nothing");
    }

    @Test
    void drawKnowsItsWordsAndSaysTheNearest() throws IOException {
        assertEquals(0, execute("run", folder.toString()), err());
        List<String> begin = List.of(
                "draw",
                folder.resolve("results").toString(),
                "--into",
                folder.resolve("d").toString());
        String[] wrong = {"--figure=stiar", "--width=tow", "--format=svgg", "--dpi=20"};
        String[] said = {
            "--figure: there is no \"stiar\"; did you mean \"stair\"?",
            "--width: there is no \"tow\"; did you mean \"two\"?",
            "--format: there is no \"svgg\"; did you mean \"svg\"?",
            "--dpi must be 36 to 1200 but is 20"
        };
        for (int i = 0; i < wrong.length; i++) {
            List<String> arguments = new ArrayList<>(begin);
            arguments.add(wrong[i]);
            assertEquals(2, execute(arguments.toArray(String[]::new)));
            assertEquals(said[i] + "\nSee stillstand draw --help\n", err());
        }
        Path file = Files.writeString(folder.resolve("taken"), "a file");
        assertEquals(3, execute("draw", begin.get(1), "--into", file.toString(), "--figure=forest"));
        assertTrue(err().startsWith("Cannot write " + file), err());
        assertEquals("a file", Files.readString(file));
    }

    @Test
    void jsonIsTheTextOfTheFile() throws IOException {
        assertEquals(0, execute("run", "--json", "--quiet", folder.toString()));
        assertEquals(Files.readString(folder.resolve("results/results.json")), out());
    }

    @Test
    void quietSaysNothing() {
        assertEquals(0, execute("run", "--quiet", folder.toString()));
        assertEquals("", out() + err());
    }

    @Test
    void optionsChangeTheSettings() throws IOException {
        assertEquals(
                0,
                execute(
                        "run",
                        folder.toString(),
                        "--seed=7",
                        "--draws",
                        "5000",
                        "--curve",
                        "first",
                        "--curve",
                        "second",
                        "--threads",
                        "1",
                        "--out",
                        folder.resolve("results").toString()),
                err());
        assertEquals(7, asked.get(0).seed());
        assertEquals(Optional.of(5000), asked.get(0).draws().fixed());
        assertEquals(
                List.of(new StudySettings.WeightedCurve("first", 1), new StudySettings.WeightedCurve("second", 1)),
                asked.get(0).seaLevel().curves());
        assertEquals(List.of("results"), names(folder));
    }

    @Test
    void withoutOptionsTheStudyDecides() {
        assertEquals(0, execute("run", folder.toString()));
        assertEquals(SampleStudy.settings(), asked.get(0));
    }

    @Test
    void onlyTheAskedSitesAreRun() {
        List<String> run = new ArrayList<>();
        engine = (study, executor, monitor) -> {
            study.sites().forEach(plan -> run.add(plan.site().name()));
            return SampleStudy.withoutFailure();
        };
        assertEquals(0, execute("run", folder.toString(), "--only", "Old shore"));
        assertEquals(List.of("Old shore"), run);
        assertEquals(2, execute("run", folder.toString(), "--only", "Old shor"));
        assertEquals(
                "--only: the study has no site \"Old shor\"; did you mean \"Old shore\"?\nSee stillstand run --help\n",
                err());
    }

    @Test
    void problemsStopTheRunAndLeaveEarlierResults() throws IOException {
        assertEquals(0, execute("run", folder.toString()));
        String before = Files.readString(folder.resolve("results/results.json"));
        List<InputProblem> many = IntStream.rangeClosed(1, 203)
                .mapToObj(line -> new InputProblem("levels.csv", line, 3, "elevation_m", "\"12o\"", "a number"))
                .toList();
        reader = (place, changes) -> Loaded.failed(many);
        assertEquals(1, execute("run", folder.toString()));
        List<String> lines = err().lines().toList();
        assertEquals("203 problems:", lines.get(0));
        assertEquals("levels.csv:1:3: elevation_m: found \"12o\", expected a number", lines.get(1));
        assertEquals("and 3 more", lines.get(201));
        assertEquals(202, lines.size());
        assertEquals("", out());
        assertEquals(before, Files.readString(folder.resolve("results/results.json")));
    }

    @Test
    void aFolderOfTheUserIsRefused() throws IOException {
        Path mine = Files.createDirectory(folder.resolve("mine"));
        Files.writeString(mine.resolve("thesis.txt"), "x");
        assertEquals(1, execute("run", folder.toString(), "--out", mine.toString()));
        assertEquals(
                "1 problem:\n" + mine
                        + ": found \"thesis.txt\" in it, expected no folder of that name, an empty one, or one that"
                        + " holds results of Stillstand alone\n",
                err());
        assertEquals(List.of("thesis.txt"), names(mine));
    }

    @Test
    void aSiteThatFailsIsExitCode3AndTheOthersAreWritten() throws IOException {
        engine = (study, executor, monitor) -> SampleStudy.result();
        assertEquals(3, execute("run", folder.toString()));
        assertTrue(out().contains("Not done:\n  East bay: its curve ends at 20 ka\n"), out());
        assertEquals(1, written().failures().size());
    }

    @Test
    void aFaultOfOursIsOneSentence() throws IOException {
        engine = (study, executor, monitor) -> {
            throw new IllegalStateException("sums do not add up");
        };
        assertEquals(3, execute("run", folder.toString()));
        assertEquals(
                "A fault of Stillstand, not of your input: java.lang.IllegalStateException: sums do not add up. Earlier"
                        + " results are as they were.\n",
                err());
        assertEquals(List.of(), names(folder));
        engine = (study, executor, monitor) -> {
            throw new OutOfMemoryError();
        };
        assertEquals(3, execute("run", folder.toString()));
        assertTrue(err().startsWith("Memory ran out."), err());
    }

    @Test
    void whatCannotBeWrittenIsOneSentence() throws IOException {
        Path file = Files.writeString(folder.resolve("file"), "x");
        assertEquals(
                3,
                execute(
                        "run",
                        folder.toString(),
                        "--out",
                        file.resolve("results").toString()));
        assertEquals(1, err().lines().count());
        assertTrue(err().startsWith("Cannot write " + file), err());
    }

    @Test
    void anInterruptedRunWritesNothing() throws IOException {
        engine = (study, executor, monitor) -> {
            throw new RunCancelledException();
        };
        assertEquals(130, execute("run", folder.toString()));
        assertEquals("Interrupted. Earlier results are as they were.\n", err());
        assertEquals(List.of(), names(folder));
    }

    @Test
    void wrongUsageIsExplained() {
        assertEquals(2, execute("run"));
        assertEquals("Missing required parameter: 'STUDY'\nSee stillstand run --help\n", err());
        assertEquals(2, execute("run", folder.toString(), "--draws", "0"));
        assertEquals("--draws must be 1 or more but is 0\nSee stillstand run --help\n", err());
        assertEquals(2, execute("run", folder.toString(), "--seed", "x"));
        assertEquals("Invalid value for option '--seed': 'x' is not a long\nSee stillstand run --help\n", err());
        assertEquals(2, execute("runn", folder.toString()));
        assertTrue(err().contains("Did you mean: stillstand run"), err());
        assertEquals(2, execute());
        assertTrue(err().startsWith("Usage: stillstand"), err());
    }

    @Test
    void helpAndVersionAreResults() {
        assertEquals(0, execute("--version"));
        assertEquals("Stillstand 0.1.0\n", out());
        assertEquals(0, execute("run", "--help"));
        assertTrue(out().contains("--draws=N"), out());
        assertEquals(0, execute("--help"));
        assertTrue(out().contains("check"), out());
        assertFalse(out().contains("\u001b"), "no colour codes");
    }

    @Test
    void checkTellsWhatWasUnderstood() {
        assertEquals(0, execute("check", "mine"));
        assertEquals("""
                An invented coast
                Understood: 2 sites, 3 levels (2 tied to one highstand), 2 samples on them (1 in use).
                Sea level: made-up-table.
                North cliff: T4: 61.4 in your datum = 60.9 above mean sea level; prior of the rate cauchy 0 0.5 from -10 to 15
                Old shore: S1: 7 in your datum = 7 above mean sea level; prior of the rate cauchy 0 0.5 from -10 to 15
                No problems. Next: stillstand run mine
                """, out());
        reader = (place, changes) -> new Loaded<>(
                Optional.empty(),
                List.of(InputProblem.ofFile("levels.csv", "nothing", "a table")),
                SampleStudy.result().warnings());
        assertEquals(1, execute("check", "mine"));
        assertEquals("""
                1 warning:
                levels.csv:3:4: elevation_m: 1200 looks like feet
                1 problem:
                levels.csv: found nothing, expected a table
                """, out());
    }

    @Test
    void newWritesAStudyAndRefusesWhatHoldsAnything() throws IOException {
        Path fresh = folder.resolve("a/fresh");
        assertEquals(0, execute("new", fresh.toString()));
        assertEquals(List.of("levels.csv", "samples.csv", "sites.csv", "study.json"), names(fresh));
        for (String table : List.of("levels.csv", "samples.csv", "sites.csv")) {
            assertTrue(Files.readString(fresh.resolve(table)).startsWith("# INVENTED EXAMPLE"), table);
        }
        assertEquals(1, execute("new", fresh.toString()));
        assertEquals(
                "1 problem:\n" + fresh
                        + ": found \"levels.csv\" in it, expected no folder of that name or an empty one; nothing was"
                        + " written\n",
                err());
        assertEquals(
                0, execute("new", Files.createDirectory(folder.resolve("empty")).toString()));
    }

    @Test
    void threadsChangeNoByte() throws IOException {
        engine = StudyRunner::run;
        List<String> texts = new ArrayList<>();
        for (String threads : List.of("1", "2", "7")) {
            asked.clear();
            assertEquals(0, execute("run", "--json", "--threads", threads, folder.toString()), err());
            texts.add(out());
        }
        assertEquals(texts.get(0), texts.get(1));
        assertEquals(texts.get(0), texts.get(2));
        double rate = written().levels().get(0).rate().orElseThrow().median();
        assertEquals((60.9 - 7.5) / 122.5, rate, 0.002, "by hand, far within its error");
    }
}
