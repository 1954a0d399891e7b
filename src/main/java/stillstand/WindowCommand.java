package stillstand;

import java.nio.file.Path;
import java.util.Optional;
import java.util.concurrent.Callable;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.ParameterException;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;
import stillstand.view.StillstandWindow;

/** {@code stillstand window [STUDY]}. */
@Command(
        name = "window",
        mixinStandardHelpOptions = true,
        description = "Opens the window: paste evidence, mend it, run it, argue with the correlation.")
final class WindowCommand implements Callable<Integer> {
    @Parameters(paramLabel = "STUDY", arity = "0..1", description = "folder of the study; absent: a page to begin from")
    private Optional<Path> study = Optional.empty();

    @Spec
    private CommandSpec spec = CommandSpec.create();

    @Override
    public Integer call() {
        try {
            StillstandWindow.show(study);
        } catch (UnsupportedOperationException e) {
            throw new ParameterException(
                    spec.commandLine(),
                    "There is no display for a window (" + e.getMessage() + "). The other commands work without one.");
        }
        return 0;
    }
}
