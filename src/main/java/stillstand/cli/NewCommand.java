package stillstand.cli;

import java.io.IOException;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.Callable;
import picocli.CommandLine.Command;
import picocli.CommandLine.Parameters;
import stillstand.files.StudyTemplate;
import stillstand.ledger.InputProblem;

/** {@code stillstand new FOLDER}. */
@Command(
        name = "new",
        mixinStandardHelpOptions = true,
        description = "Writes a small study to start from: tables with comments and an invented example.")
final class NewCommand implements Callable<Integer> {
    private final Workshop workshop;

    @Parameters(paramLabel = "FOLDER", description = "where to write it; absent or empty")
    private Path folder = Path.of("");

    NewCommand(Workshop workshop) {
        this.workshop = workshop;
    }

    @Override
    public Integer call() throws IOException {
        Optional<InputProblem> problem = StudyTemplate.write(folder);
        if (problem.isPresent()) {
            Workshop.list(List.of(problem.get()), workshop.err());
            return ExitCode.PROBLEMS;
        }
        workshop.out().println("Written to " + folder + ": " + String.join(", ", StudyTemplate.files()) + ".");
        workshop.out().println("The numbers in them are invented. Put in yours, then: stillstand check " + folder);
        return ExitCode.DONE;
    }
}
