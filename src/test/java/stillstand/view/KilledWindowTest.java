package stillstand.view;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Optional;
import java.util.concurrent.TimeUnit;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.Timeout;
import org.junit.jupiter.api.io.TempDir;

/** The process of the window is killed in the midst of a run; the next window finds everything. */
@Timeout(60)
class KilledWindowTest {
    private static final String CLASSES =
            System.getProperty("surefire.test.class.path", System.getProperty("java.class.path"));

    @TempDir
    private Path folder;

    @Test
    void nextWindowTakesTheEditsBackAndMayWrite() throws Exception {
        Path study = OpenStudies.template(folder);
        WindowModel before = OpenStudies.window(OpenStudies.memory());
        before.open(study);
        before.startRun();
        before.close(true);
        String results = Files.readString(study.resolve("results/results.json"));

        kill(study);

        WindowModel after = OpenStudies.window(OpenStudies.memory());
        after.open(study);
        StudyDocument document = after.document().orElseThrow();
        assertEquals(Optional.empty(), document.whyReadOnly());
        assertEquals(results, Files.readString(study.resolve("results/results.json")));
        assertEquals("recovery", after.notices().get(0).about());
        after.notices().get(0).answers().get(0).action().run();
        assertEquals(Optional.of("{\"title\": \"unsaved\"}"), document.draft().text("study.json"));
        assertTrue(document.isEdited());
        after.startRun();
        assertEquals(
                RunModel.State.DONE,
                after.run().state(),
                after.run().outcomeProperty().get());
        assertFalse(results.equals(Files.readString(study.resolve("results/results.json"))));
        after.close(true);
    }

    private void kill(Path study) throws IOException, InterruptedException {
        Path ready = folder.resolve("ready");
        Process window = new ProcessBuilder(
                        Path.of(System.getProperty("java.home"), "bin", "java").toString(),
                        "-XX:TieredStopAtLevel=1",
                        "-cp",
                        CLASSES,
                        KilledWindow.class.getName(),
                        study.toString(),
                        ready.toString())
                .inheritIO()
                .start();
        while (!Files.exists(ready) && window.isAlive()) {
            boolean hasEnded = window.waitFor(50, TimeUnit.MILLISECONDS);
            assertFalse(hasEnded, "the other window ended by itself");
        }
        window.destroyForcibly();
        assertTrue(window.waitFor(20, TimeUnit.SECONDS));
    }
}
