package stillstand.cli;

import java.time.Duration;
import java.time.Instant;
import java.util.function.BooleanSupplier;
import stillstand.ledger.RunMonitor;

/** Tells on standard error how far a run has come, a line every second at most; a quick run tells nothing. */
final class Progress implements RunMonitor {
    private static final Duration SILENCE = Duration.ofSeconds(1);

    private final Workshop workshop;
    private final boolean quiet;
    private final BooleanSupplier cancelled;
    private Instant lastTold;
    private double lastFraction;

    Progress(Workshop workshop, boolean quiet, BooleanSupplier cancelled) {
        this.workshop = workshop;
        this.quiet = quiet;
        this.cancelled = cancelled;
        this.lastTold = workshop.clock().instant();
    }

    @Override
    public synchronized void step(String what, double fraction) {
        lastFraction = fraction;
        Instant now = workshop.clock().instant();
        if (!quiet && Duration.between(lastTold, now).compareTo(SILENCE) >= 0) {
            lastTold = now;
            workshop.err().println(Math.round(100 * fraction) + " % " + what);
        }
    }

    @Override
    public synchronized void within(String what) {
        step(what, lastFraction);
    }

    @Override
    public boolean isCancelled() {
        return cancelled.getAsBoolean();
    }
}
