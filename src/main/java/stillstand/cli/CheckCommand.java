package stillstand.cli;

import java.nio.file.Path;
import java.util.List;
import java.util.concurrent.Callable;
import java.util.function.UnaryOperator;
import picocli.CommandLine.Command;
import picocli.CommandLine.Parameters;
import stillstand.ledger.InputWarning;
import stillstand.ledger.Loaded;
import stillstand.report.StudySummary;
import stillstand.study.Study;

/** {@code stillstand check STUDY}. */
@Command(
        name = "check",
        mixinStandardHelpOptions = true,
        description = "Lists every problem of a study and what was understood of it; computes nothing.")
final class CheckCommand implements Callable<Integer> {
    private final Workshop workshop;

    @Parameters(paramLabel = "STUDY", description = "folder of the study")
    private Path folder = Path.of("");

    CheckCommand(Workshop workshop) {
        this.workshop = workshop;
    }

    @Override
    public Integer call() {
        Loaded<Study> loaded = workshop.reader().read(folder, UnaryOperator.identity());
        loaded.value().ifPresent(study -> workshop.out().print(StudySummary.text(study)));
        List<InputWarning> warnings = loaded.warnings();
        if (!warnings.isEmpty()) {
            workshop.out().println(warnings.size() == 1 ? "1 warning:" : warnings.size() + " warnings:");
            warnings.forEach(warning -> workshop.out().println(warning.placed()));
        }
        if (!loaded.problems().isEmpty()) {
            Workshop.list(loaded.problems(), workshop.out());
            return ExitCode.PROBLEMS;
        }
        workshop.out().println("No problems. Next: stillstand run " + folder);
        return ExitCode.DONE;
    }
}
