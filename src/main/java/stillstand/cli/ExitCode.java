package stillstand.cli;

/** What a command tells the shell. */
final class ExitCode {
    static final int DONE = 0;
    /** The input has problems; nothing was computed. */
    static final int PROBLEMS = 1;
    /** The command line makes no sense. */
    static final int USAGE = 2;
    /** Something failed in the run. */
    static final int FAILED = 3;
    /** Interrupted; of a process that a signal ends, Java itself makes it 130 or 143. */
    static final int INTERRUPTED = 130;

    private ExitCode() {}
}
