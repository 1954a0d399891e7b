package stillstand.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;
import java.util.concurrent.TimeUnit;
import java.util.stream.Stream;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.Timeout;
import org.junit.jupiter.api.io.TempDir;
import stillstand.files.StudyTemplate;

/** The program as a process of its own, as the shell starts it. */
@Timeout(120)
class ProcessTest {
    private static final String CLASSES =
            System.getProperty("surefire.test.class.path", System.getProperty("java.class.path"));

    @TempDir
    Path folder;

    private Path study;

    @BeforeEach
    void write() throws IOException {
        study = folder.resolve("study");
        assertEquals(Optional.empty(), StudyTemplate.write(study));
    }

    private Process start(List<String> javaOptions, String... arguments) throws IOException {
        List<String> command = new ArrayList<>();
        command.add(Path.of(System.getProperty("java.home"), "bin", "java").toString());
        command.add("-XX:TieredStopAtLevel=1"); // quicker to start
        command.addAll(javaOptions);
        command.addAll(List.of("-cp", CLASSES, "stillstand.Main"));
        command.addAll(List.of(arguments));
        ProcessBuilder builder = new ProcessBuilder(command);
        builder.environment().put("LC_ALL", "C");
        builder.redirectOutput(folder.resolve("out").toFile());
        builder.redirectError(folder.resolve("err").toFile());
        return builder.start();
    }

    private String read(String name) throws IOException {
        return Files.readString(folder.resolve(name), StandardCharsets.UTF_8);
    }

    /** Every file of the results, without the two lines that tell the time. */
    private Map<String, String> results() throws IOException {
        TreeMap<String, String> texts = new TreeMap<>();
        try (Stream<Path> files = Files.walk(study.resolve("results"))) {
            for (Path file : files.filter(each -> each.toString().matches(".*[.](json|csv|svg)"))
                    .toList()) {
                texts.put(
                        String.valueOf(file.getFileName()),
                        Files.readString(file)
                                .replaceFirst("\n    \"started\": \"[^\"]*\",", "")
                                .replaceFirst("\n    \"seconds\": [0-9.E-]*", ""));
            }
        }
        return texts;
    }

    @Test
    void processesLocalesAndThreadsChangeNoByte() throws Exception {
        List<Map<String, String>> runs = new ArrayList<>();
        List<String> languages = List.of("en", "tr", "ar");
        List<String> threads = List.of("1", "2", "7");
        for (int i = 0; i < threads.size(); i++) {
            Process process = start(
                    List.of(
                            "-Duser.language=" + languages.get(i),
                            "-Duser.country=EG",
                            "-Duser.timezone=Asia/Kathmandu"),
                    "run",
                    study.toString(),
                    "--threads",
                    threads.get(i));
            assertEquals(0, process.waitFor(), read("err"));
            runs.add(results());
            assertTrue(read("out").contains("0.35 ± 0.03"), "standard output is UTF-8 whatever the locale");
        }
        assertTrue(
                runs.get(0).containsKey("curves.svg"),
                () -> "figures: " + runs.get(0).keySet());
        assertTrue(runs.get(0).getOrDefault("results.json", "").contains("\"generator\""));
        assertEquals(runs.get(0), runs.get(1));
        assertEquals(runs.get(0), runs.get(2));
    }

    @Test
    void signalsEndARunAndLeaveEarlierResults() throws Exception {
        assertEquals(
                0,
                start(List.of(), "run", study.toString(), "--draws", "4096", "--figures", "none")
                        .waitFor(),
                read("err"));
        Map<String, String> before = results();
        Process killed = startLong();
        killed.destroy();
        assertEquals(143, killed.waitFor());
        assertEquals("Interrupted. Earlier results are as they were.\n", read("err"));
        Process interrupted = startLong();
        assertEquals(
                0,
                new ProcessBuilder("kill", "-INT", Long.toString(interrupted.pid()))
                        .start()
                        .waitFor());
        assertEquals(130, interrupted.waitFor());
        assertEquals(before, results());
        try (Stream<Path> files = Files.list(study)) {
            assertEquals(
                    List.of("levels.csv", "results", "samples.csv", "sites.csv", "study.json"),
                    files.map(file -> String.valueOf(file.getFileName()))
                            .sorted()
                            .toList());
        }
    }

    /** A run of minutes, from when it holds the lock of its results on. */
    private Process startLong() throws Exception {
        Process process = start(List.of(), "run", study.toString(), "--draws", "500000000", "--quiet");
        Path lock = study.resolve(".results.stillstand-lock");
        while (!Files.exists(lock)) {
            assertTrue(!process.waitFor(20, TimeUnit.MILLISECONDS), () -> "the run ended early");
        }
        return process;
    }
}
