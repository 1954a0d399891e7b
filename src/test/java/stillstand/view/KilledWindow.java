package stillstand.view;

import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Clock;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;

/** A window without controls that edits a study, begins to run it, edits again and waits to be killed. */
final class KilledWindow {
    private KilledWindow() {}

    /** Takes the study's folder, and a file to make when it is in the midst of the run with edits unsaved. */
    public static void main(String[] arguments) throws Exception {
        Path study = Path.of(arguments[0]);
        ExecutorService runs = Executors.newSingleThreadExecutor();
        RunModel run = new RunModel(runs, Runnable::run, Clock.systemUTC(), (checked, executor, monitor) -> {
            while (!monitor.isCancelled()) {
                Thread.onSpinWait();
            }
            throw new IllegalStateException("nobody cancels this");
        });
        WindowModel window =
                new WindowModel(new StudyReader(), run, OpenStudies.memory(), Runnable::run, Runnable::run);
        window.open(study);
        window.startRun();
        window.document()
                .orElseThrow()
                .edit("title", draft -> draft.withText("study.json", "{\"title\": \"unsaved\"}"));
        Files.createFile(Path.of(arguments[1]));
    }
}
