package stillstand.ledger;

/** What a long calculation tells and asks. Called at most about a hundred times a run, from any thread. */
public interface RunMonitor {
    /** A monitor that hears nothing and never cancels. */
    RunMonitor SILENT = new RunMonitor() {
        @Override
        public void step(String what, double fraction) {}

        @Override
        public boolean isCancelled() {
            return false;
        }
    };

    /**
     * Tells how far the work has come.
     *
     * @param what the piece of work just begun or done
     * @param fraction the part of the whole that is done, 0 to 1
     */
    void step(String what, double fraction);

    /**
     * Tells of a piece within the last step; how far the whole has come stays as it was.
     *
     * @param what the piece of work just begun or done
     */
    default void within(String what) {}

    /** Whether the work should stop; asked often enough that it stops within 0.2 s. */
    boolean isCancelled();
}
