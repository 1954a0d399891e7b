package stillstand;

import stillstand.cli.Commands;
import stillstand.cli.Workshop;

/** Starts the program. */
public final class Main {
    private Main() {}

    /** Executes a command line and ends the process with its exit code. */
    public static void main(String[] arguments) {
        System.setProperty("java.awt.headless", "true"); // figures are drawn without a display
        System.exit(Commands.execute(Workshop.ofProcess(), arguments));
    }
}
