package stillstand.uplift;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.Callable;
import java.util.concurrent.ExecutionException;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Future;
import stillstand.ledger.RunCancelledException;

/**
 * Who does independent pieces of work: the threads of an executor, or the caller alone. Pieces write to places of their own, so
 * that it does not matter who is done first.
 *
 * @param executor absent = the caller does all, one after the other
 */
record Workers(Optional<ExecutorService> executor) {
    /** The caller alone. */
    static final Workers NONE = new Workers(Optional.empty());

    /** Threads of which the caller is none: it waits for them. */
    static Workers of(ExecutorService executor) {
        return new Workers(Optional.of(executor));
    }

    /** Does all pieces; blocks until they are done. */
    void run(List<Runnable> pieces) {
        if (executor.isEmpty()) {
            pieces.forEach(Runnable::run);
            return;
        }
        List<Callable<Boolean>> tasks = new ArrayList<>();
        for (Runnable piece : pieces) {
            tasks.add(() -> {
                piece.run();
                return true;
            });
        }
        try {
            for (Future<Boolean> done : executor.get().invokeAll(tasks)) {
                joined(done);
            }
        } catch (InterruptedException e) {
            Thread.currentThread().interrupt();
            throw new RunCancelledException();
        }
    }

    /** What a piece came to; its own failure where it failed. */
    static <T> T joined(Future<T> future) {
        try {
            return future.get();
        } catch (InterruptedException e) {
            Thread.currentThread().interrupt();
            throw new RunCancelledException();
        } catch (ExecutionException e) {
            if (e.getCause() instanceof RuntimeException cause) {
                throw cause;
            }
            throw new IllegalStateException(e.getCause());
        }
    }
}
