package stillstand;

import java.nio.file.Path;
import java.util.Optional;
import java.util.concurrent.Callable;
import picocli.CommandLine.Command;
import picocli.CommandLine.Parameters;
import stillstand.view.StillstandWindow;

/** {@code stillstand window [STUDY]}. */
@Command(
        name = "window",
        mixinStandardHelpOptions = true,
        description = "Opens the window: paste evidence, mend it, run it, argue with the correlation.")
final class WindowCommand implements Callable<Integer> {
    @Parameters(paramLabel = "STUDY", arity = "0..1", description = "folder of the study; absent: a page to begin from")
    private Optional<Path> study = Optional.empty();

    @Override
    public Integer call() {
        StillstandWindow.show(study);
        return 0;
    }
}
