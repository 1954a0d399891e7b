package stillstand.cli;

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
import java.util.Arrays;
import java.util.List;
import stillstand.files.ResultsJson;
import stillstand.files.ShippedLibrary;
import stillstand.files.StudyFolder;
import stillstand.study.StudyResult;
import stillstand.study.StudyRunner;
import stillstand.uplift.LevelAnswer;

/** A study written to disk and run through the command, as a user would. */
final class StudyOnDisk {
    private final Path folder;
    private final ByteArrayOutputStream out = new ByteArrayOutputStream();
    private final ByteArrayOutputStream err = new ByteArrayOutputStream();

    StudyOnDisk(Path folder) {
        this.folder = folder;
    }

    /** Writes a file of the study, line by line. */
    StudyOnDisk with(String file, String... lines) throws IOException {
        Path path = folder.resolve(file);
        Files.createDirectories(path.getParent());
        Files.writeString(path, String.join("\n", lines) + "\n");
        return this;
    }

    /** A complete table of highstands of the study's own, and settings that use it and no curve. */
    StudyOnDisk withCompleteTable(String... rows) throws IOException {
        List<String> table = new ArrayList<>(List.of("stage,age_ka,age_1sigma_ka,level_m,level_1sigma_m"));
        table.addAll(Arrays.asList(rows));
        with("curves/own.csv", table.toArray(String[]::new));
        with(
                "curves/datapackage.json",
                "{\"name\": \"own\", \"resources\": [{\"name\": \"own\", \"path\": \"own.csv\",",
                "  \"stillstand\": {\"kind\": \"highstands\", \"complete\": true}}]}");
        return with(
                "study.json",
                "{\"title\": \"Published rates\", \"sea_level\": {\"highstands\": {\"from\": \"table\", \"table\": \"own\"}}}");
    }

    /** Runs a command on the study; its exit code. */
    int execute(String command, String... options) {
        out.reset();
        err.reset();
        List<String> arguments = new ArrayList<>(List.of(command, folder.toString()));
        if (command.equals("run")) {
            arguments.addAll(List.of("--figures", "none")); // none looks at them, and they take a second
        }
        arguments.addAll(Arrays.asList(options));
        Workshop workshop = new Workshop(
                new PrintStream(out, true, StandardCharsets.UTF_8),
                new PrintStream(err, true, StandardCharsets.UTF_8),
                Clock.fixed(Instant.parse("2026-12-01T12:00:00Z"), ZoneOffset.UTC),
                (place, changes) -> StudyFolder.read(place, ShippedLibrary.load(), changes),
                StudyRunner::run);
        return Commands.execute(workshop, arguments.toArray(String[]::new));
    }

    /** Runs the study and reads its results back from disk. */
    StudyResult run(String... options) throws IOException {
        int code = execute("run", options);
        if (code != 0) {
            throw new AssertionError("exit code " + code + ": " + out() + err());
        }
        return results();
    }

    /** What stands in the results folder. */
    StudyResult results() throws IOException {
        return ResultsJson.read(Files.readString(folder.resolve("results/results.json")))
                .value()
                .orElseThrow();
    }

    String out() {
        return out.toString(StandardCharsets.UTF_8);
    }

    String err() {
        return err.toString(StandardCharsets.UTF_8);
    }

    /** The answer of a level. */
    static LevelAnswer level(StudyResult result, String name) {
        return result.levels().stream()
                .filter(level -> level.level().equals(name))
                .findFirst()
                .orElseThrow();
    }
}
