package stillstand.uplift;

import java.util.ArrayList;
import java.util.List;
import java.util.concurrent.Callable;
import java.util.concurrent.ExecutionException;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Future;
import java.util.function.IntFunction;
import stillstand.ledger.RunCancelledException;

/** Blocks of draws made by any number of threads, handed back in the order of their numbers. */
final class BlockTasks {
    private BlockTasks() {}

    /**
     * Blocks {@code from} to below {@code upTo}, in order; waits for them all.
     *
     * @throws RunCancelledException if the waiting thread is interrupted
     */
    static <T> List<T> inOrder(ExecutorService executor, int from, int upTo, IntFunction<T> block) {
        List<Callable<T>> tasks = new ArrayList<>();
        for (int b = from; b < upTo; b++) {
            int number = b;
            tasks.add(() -> block.apply(number));
        }
        List<T> done = new ArrayList<>();
        try {
            for (Future<T> future : executor.invokeAll(tasks)) {
                done.add(future.get());
            }
        } catch (InterruptedException e) {
            Thread.currentThread().interrupt();
            throw new RunCancelledException();
        } catch (ExecutionException e) {
            if (e.getCause() instanceof RuntimeException cause) {
                throw cause;
            }
            throw new IllegalStateException(e.getCause());
        }
        return done;
    }
}
