package stillstand;

import java.util.List;
import stillstand.cli.Commands;
import stillstand.cli.Workshop;

/** Starts the program: the commands of the terminal, and the one that opens the window. */
public final class Main {
    private Main() {}

    /** Executes a command line and ends the process with its exit code. */
    public static void main(String[] arguments) {
        System.setProperty("java.awt.headless", "true"); // figures are drawn without a display
        System.exit(Commands.execute(Workshop.ofProcess(), List.of(new WindowCommand()), arguments));
    }
}
