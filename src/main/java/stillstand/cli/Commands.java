package stillstand.cli;

import java.io.IOException;
import java.io.PrintWriter;
import java.nio.charset.StandardCharsets;
import java.nio.file.AccessDeniedException;
import java.nio.file.FileSystemException;
import java.nio.file.NoSuchFileException;
import java.util.List;
import java.util.concurrent.Callable;
import picocli.CommandLine;
import picocli.CommandLine.Command;
import picocli.CommandLine.Help.Ansi;
import picocli.CommandLine.ParameterException;
import picocli.CommandLine.UnmatchedArgumentException;
import stillstand.study.Provenance;

/** The command {@code stillstand} and those below it. */
@Command(
        name = "stillstand",
        version = "Stillstand " + Provenance.CURRENT_VERSION,
        mixinStandardHelpOptions = true,
        synopsisSubcommandLabel = "COMMAND",
        description = "Vertical rates of coasts from marine terraces, reefs and dated corals, with their errors.",
        footer = {
            "",
            "Exit codes: 0 done; 1 the input has problems, nothing computed; 2 wrong usage; 3 something failed;"
                    + " 130, 143 interrupted. This is not a hazard assessment."
        })
public final class Commands implements Callable<Integer> {
    private static final int USAGE_WIDTH = 100;

    private final Workshop workshop;

    private Commands(Workshop workshop) {
        this.workshop = workshop;
    }

    /**
     * Executes a command line.
     *
     * @param arguments as the shell gives them
     * @return the exit code
     */
    public static int execute(Workshop workshop, String... arguments) {
        return execute(workshop, List.of(), arguments);
    }

    /**
     * Executes a command line that knows more commands.
     *
     * @param more commands of other doors, each annotated as picocli wants it
     * @param arguments as the shell gives them
     * @return the exit code
     */
    public static int execute(Workshop workshop, List<? extends Callable<Integer>> more, String... arguments) {
        CommandLine line = line(workshop, more);
        try {
            return line.execute(arguments);
        } catch (OutOfMemoryError e) {
            workshop.err()
                    .println("Memory ran out. Give Java more (java -Xmx4g -jar …), or run fewer sites with --only.");
            return ExitCode.FAILED;
        } finally {
            workshop.out().flush();
            workshop.err().flush();
        }
    }

    private static CommandLine line(Workshop workshop, List<? extends Callable<Integer>> more) {
        CommandLine line = new CommandLine(new Commands(workshop));
        line.addSubcommand(new NewCommand(workshop));
        line.addSubcommand(new CheckCommand(workshop));
        line.addSubcommand(new RunCommand(workshop));
        line.addSubcommand(new DrawCommand(workshop));
        line.addSubcommand(new PredictCommand(workshop));
        line.addSubcommand(curves(workshop));
        more.forEach(line::addSubcommand);
        return line.setOut(new PrintWriter(workshop.out(), true, StandardCharsets.UTF_8))
                .setErr(new PrintWriter(workshop.err(), true, StandardCharsets.UTF_8))
                .setColorScheme(CommandLine.Help.defaultColorScheme(Ansi.OFF))
                .setUsageHelpWidth(USAGE_WIDTH)
                .setParameterExceptionHandler((wrong, ignored) -> usage(workshop, wrong))
                .setExecutionExceptionHandler((failure, command, ignored) -> failed(workshop, failure));
    }

    private static CommandLine curves(Workshop workshop) {
        CommandLine curves = new CommandLine(new CurvesCommand(workshop));
        curves.addSubcommand(new ShowCurveCommand(workshop));
        curves.addSubcommand(new ImportCurveCommand(workshop));
        return curves;
    }

    @Override
    public Integer call() {
        CommandLine.usage(this, workshop.err(), Ansi.OFF);
        return ExitCode.USAGE;
    }

    private static int usage(Workshop workshop, ParameterException wrong) {
        CommandLine command = wrong.getCommandLine();
        workshop.err().println(wrong.getMessage());
        UnmatchedArgumentException.printSuggestions(wrong, command.getErr());
        workshop.err().println("See " + command.getCommandSpec().qualifiedName() + " --help");
        return ExitCode.USAGE;
    }

    private static int failed(Workshop workshop, Exception failure) {
        workshop.err().println(sentence(failure));
        return ExitCode.FAILED;
    }

    private static String sentence(Exception failure) {
        if (failure instanceof AccessDeniedException denied) {
            return "Cannot write " + denied.getFile() + ": permission denied. Earlier results are as they were.";
        }
        if (failure instanceof NoSuchFileException missing) {
            return "Cannot write " + missing.getFile() + ": no such place. Earlier results are as they were.";
        }
        if (failure instanceof FileSystemException trouble) {
            String reason = trouble.getReason() == null ? trouble.getClass().getSimpleName() : trouble.getReason();
            return "Cannot write " + trouble.getFile() + ": " + reason + ". Earlier results are as they were.";
        }
        if (failure instanceof IOException) {
            return "Cannot write: " + failure.getMessage() + ". Earlier results are as they were.";
        }
        return "A fault of Stillstand, not of your input: " + failure + ". Earlier results are as they were.";
    }
}
