package stillstand.ledger;

/** Thrown by a calculation whose {@link RunMonitor} asked it to stop. */
public final class RunCancelledException extends RuntimeException {
    private static final long serialVersionUID = 1L;

    public RunCancelledException() {
        super("the run was cancelled");
    }
}
