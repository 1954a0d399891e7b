package stillstand.cli;

import java.io.FileDescriptor;
import java.io.FileOutputStream;
import java.io.PrintStream;
import java.nio.charset.StandardCharsets;
import java.nio.file.Path;
import java.time.Clock;
import java.util.List;
import java.util.concurrent.ExecutorService;
import java.util.function.UnaryOperator;
import stillstand.files.ShippedLibrary;
import stillstand.files.StudyFolder;
import stillstand.ledger.InputProblem;
import stillstand.ledger.Loaded;
import stillstand.ledger.RunMonitor;
import stillstand.study.Study;
import stillstand.study.StudyResult;
import stillstand.study.StudyRunner;
import stillstand.study.StudySettings;

/**
 * What the commands work with.
 *
 * @param out for results, UTF-8
 * @param err for progress and for what went wrong, UTF-8
 * @param clock for the time a run began and took
 * @param reader of study folders
 * @param engine that runs a study
 */
public record Workshop(PrintStream out, PrintStream err, Clock clock, Reader reader, Engine engine) {
    private static final int PROBLEMS_LISTED = 200;

    /** The process's own streams and clock, and the whole program behind the commands. */
    public static Workshop ofProcess() {
        return new Workshop(
                stream(FileDescriptor.out),
                stream(FileDescriptor.err),
                Clock.systemUTC(),
                (folder, changes) -> StudyFolder.read(folder, ShippedLibrary.load(), changes),
                StudyRunner::run);
    }

    /** UTF-8 whatever the locale says. */
    private static PrintStream stream(FileDescriptor descriptor) {
        return new PrintStream(new FileOutputStream(descriptor), true, StandardCharsets.UTF_8);
    }

    /** Reads a study folder, with changes to its settings. */
    @FunctionalInterface
    public interface Reader {
        /** The study, or its problems. */
        Loaded<Study> read(Path folder, UnaryOperator<StudySettings> changes);
    }

    /** Runs a study. */
    @FunctionalInterface
    public interface Engine {
        /**
         * Blocks until the result is there.
         *
         * @throws stillstand.ledger.RunCancelledException if the monitor asked for it
         */
        StudyResult run(Study study, ExecutorService executor, RunMonitor monitor);
    }

    /** Lists problems, the first 200 of them in words. */
    static void list(List<InputProblem> problems, PrintStream stream) {
        stream.println(problems.size() == 1 ? "1 problem:" : problems.size() + " problems:");
        problems.stream().limit(PROBLEMS_LISTED).forEach(problem -> stream.println(problem.message()));
        if (problems.size() > PROBLEMS_LISTED) {
            stream.println("and " + (problems.size() - PROBLEMS_LISTED) + " more");
        }
    }
}
