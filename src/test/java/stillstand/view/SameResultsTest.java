package stillstand.view;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.io.PrintStream;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import stillstand.cli.Commands;
import stillstand.cli.Workshop;
import stillstand.files.StudyFolder;
import stillstand.study.StudyRunner;

/** Terminal and window find and write the same, to the byte, but for the time they took. */
class SameResultsTest {
    @TempDir
    private Path folder;

    @Test
    void windowAndTerminalWriteTheSame() throws IOException {
        Path study = OpenStudies.template(folder);
        WindowModel window = OpenStudies.window(OpenStudies.memory());
        window.open(study);
        EvidenceModel evidence = window.evidence().orElseThrow();
        GridModel levels = evidence.grid("levels.csv").orElseThrow();
        levels.write(0, levels.sheet().column("elevation_m").orElseThrow(), "5.125");
        SettingsModel settings = evidence.settings();
        settings.write(settings.fields().get(2), "7");
        window.startRun();
        assertEquals(
                RunModel.State.DONE,
                window.run().state(),
                window.run().outcomeProperty().get());
        Map<String, String> ofWindow = texts(study.resolve("results"));
        window.close(true);

        ByteArrayOutputStream out = new ByteArrayOutputStream();
        PrintStream stream = new PrintStream(out, true, StandardCharsets.UTF_8);
        Workshop workshop = new Workshop(
                stream,
                stream,
                OpenStudies.NOON,
                (place, changes) -> StudyFolder.read(place, OpenStudies.READER.shipped(), changes),
                StudyRunner::run);
        int code = Commands.execute(workshop, "run", study.toString(), "--threads", "1", "--quiet");
        assertEquals(0, code, out.toString(StandardCharsets.UTF_8));
        Map<String, String> ofTerminal = texts(study.resolve("results"));
        assertEquals(List.copyOf(ofTerminal.keySet()), List.copyOf(ofWindow.keySet()));
        ofTerminal.forEach((name, text) -> assertEquals(text, ofWindow.get(name), name));
    }

    /** Every file but pdf, whose names say what they are; without the two lines of the provenance that tell the time. */
    private static Map<String, String> texts(Path results) throws IOException {
        Map<String, String> texts = new TreeMap<>();
        try (Stream<Path> files = Files.walk(results)) {
            for (Path file : files.filter(Files::isRegularFile).toList()) {
                boolean isText = file.toString().matches(".*[.](json|csv|svg)");
                String text = isText
                        ? Files.readString(file)
                                .replaceFirst("\n    \"started\": \"[^\"]*\",", "")
                                .replaceFirst("\n    \"seconds\": [0-9.E-]*", "")
                        : "";
                texts.put(results.relativize(file).toString(), text);
            }
        }
        return texts;
    }
}
