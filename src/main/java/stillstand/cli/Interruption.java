package stillstand.cli;

import java.util.concurrent.CountDownLatch;
import java.util.concurrent.TimeUnit;
import java.util.concurrent.atomic.AtomicBoolean;

/**
 * Turns a signal that ends the process (Ctrl-C, a polite kill) into a request to stop, and holds the end back until the
 * work has put itself in order.
 */
final class Interruption implements AutoCloseable {
    private static final long PATIENCE_SECONDS = 20;

    private final AtomicBoolean asked = new AtomicBoolean();
    private final CountDownLatch inOrder = new CountDownLatch(1);
    private final Thread hook = new Thread(this::askAndWait, "interruption");

    Interruption() {
        Runtime.getRuntime().addShutdownHook(hook);
    }

    boolean isAsked() {
        return asked.get();
    }

    private void askAndWait() {
        asked.set(true);
        try {
            boolean done = inOrder.await(PATIENCE_SECONDS, TimeUnit.SECONDS);
            assert done || asked.get();
        } catch (InterruptedException e) {
            Thread.currentThread().interrupt();
        }
    }

    /** The work is in order: the process may end. */
    @Override
    public void close() {
        inOrder.countDown();
        if (!asked.get()) {
            try {
                Runtime.getRuntime().removeShutdownHook(hook);
            } catch (IllegalStateException e) {
                // the process ends at this very moment, and the hook finds the work in order
            }
        }
    }
}
