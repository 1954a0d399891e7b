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
        String[] asked = arguments.length == 0 && isOpenedByHand() ? new String[] {"window"} : arguments;
        System.exit(Commands.execute(Workshop.ofProcess(), List.of(new WindowCommand()), asked));
    }

    /** Whether the jar was opened from a desktop, where nobody could read how to use the commands. */
    @SuppressWarnings("SystemConsoleNull") // the property makes later Javas answer as 17 does
    private static boolean isOpenedByHand() {
        System.setProperty("jdk.console", "java.base");
        boolean hasDisplay = !System.getProperty("os.name", "").startsWith("Linux") || System.getenv("DISPLAY") != null;
        return System.console() == null && hasDisplay;
    }
}
