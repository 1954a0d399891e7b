package stillstand.view;

import java.io.IOException;
import java.nio.file.Path;
import java.time.Clock;
import java.time.Duration;
import java.time.Instant;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.concurrent.Executor;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;
import java.util.concurrent.atomic.AtomicBoolean;
import java.util.concurrent.atomic.AtomicReference;
import javafx.beans.property.ReadOnlyDoubleProperty;
import javafx.beans.property.ReadOnlyDoubleWrapper;
import javafx.beans.property.ReadOnlyObjectProperty;
import javafx.beans.property.ReadOnlyObjectWrapper;
import javafx.beans.property.ReadOnlyStringProperty;
import javafx.beans.property.ReadOnlyStringWrapper;
import stillstand.files.FigureFiles.Fault;
import stillstand.files.FinishedRun;
import stillstand.files.ResultsFolder;
import stillstand.ledger.Loaded;
import stillstand.ledger.RunCancelledException;
import stillstand.ledger.RunMonitor;
import stillstand.study.Study;
import stillstand.study.StudyResult;

/**
 * A run in the background: how far it is, how long it may still take, what came of it. The result is handed over as soon as it
 * is there; tables and figures are written after that, in place of the earlier ones, whole or not at all.
 */
final class RunModel {
    private static final Duration SOON = Duration.ofSeconds(1);
    private static final double LEAST_FRACTION = 0.05;

    private final Executor background;
    private final Executor foreground;
    private final Clock clock;
    private final Engine engine;

    private final ReadOnlyObjectWrapper<State> state = new ReadOnlyObjectWrapper<>(State.IDLE);
    private final ReadOnlyStringWrapper what = new ReadOnlyStringWrapper("");
    private final ReadOnlyStringWrapper remaining = new ReadOnlyStringWrapper("");
    private final ReadOnlyStringWrapper outcome = new ReadOnlyStringWrapper("");
    private final ReadOnlyDoubleWrapper fraction = new ReadOnlyDoubleWrapper();
    private final ReadOnlyObjectWrapper<Optional<StudyResult>> result = new ReadOnlyObjectWrapper<>(Optional.empty());
    private AtomicBoolean asked = new AtomicBoolean();
    private volatile Optional<Thread> writing = Optional.empty();

    /** What a run is at. */
    enum State {
        IDLE,
        RUNNING,
        WRITING,
        CANCELLING,
        DONE,
        CANCELLED,
        FAILED;

        boolean isBusy() {
            return this == RUNNING || this == WRITING || this == CANCELLING;
        }
    }

    /** Runs a study, as the command line does. */
    @FunctionalInterface
    interface Engine {
        /**
         * Blocks until the result is there.
         *
         * @throws RunCancelledException if the monitor asked for it
         */
        StudyResult run(Study study, ExecutorService executor, RunMonitor monitor);
    }

    RunModel(Executor background, Executor foreground, Clock clock, Engine engine) {
        this.background = background;
        this.foreground = foreground;
        this.clock = clock;
        this.engine = engine;
    }

    ReadOnlyObjectProperty<State> stateProperty() {
        return state.getReadOnlyProperty();
    }

    State state() {
        return state.get();
    }

    /** The piece of work it is at. */
    ReadOnlyStringProperty whatProperty() {
        return what.getReadOnlyProperty();
    }

    /** The part that is done, 0 to 1. */
    ReadOnlyDoubleProperty fractionProperty() {
        return fraction.getReadOnlyProperty();
    }

    /** How long it may still take, in words; "" while nobody can say. */
    ReadOnlyStringProperty remainingProperty() {
        return remaining.getReadOnlyProperty();
    }

    /** What came of the last run, in a sentence. */
    ReadOnlyStringProperty outcomeProperty() {
        return outcome.getReadOnlyProperty();
    }

    /** The newest result, of a run or from the disk; it stays while the next run is under way. */
    ReadOnlyObjectProperty<Optional<StudyResult>> resultProperty() {
        return result.getReadOnlyProperty();
    }

    /** Shows what an earlier run left, or nothing. */
    void show(Optional<StudyResult> earlier) {
        asked = new AtomicBoolean(); // whatever is still under way is no longer heard
        result.set(earlier);
        outcome.set("");
        state.set(State.IDLE);
    }

    /**
     * Starts a run; while one is under way nothing happens.
     *
     * @param results the folder to write to; absent where nothing may be written
     */
    void start(Study study, Optional<Path> results) {
        if (state.get().isBusy()) {
            return;
        }
        AtomicBoolean cancelled = new AtomicBoolean();
        asked = cancelled;
        state.set(State.RUNNING);
        what.set("beginning");
        fraction.set(0);
        remaining.set("");
        outcome.set("");
        background.execute(() -> run(study, results, cancelled));
    }

    /** Asks the run to stop; it does within a fifth of a second. */
    void cancel() {
        if (state.get().isBusy()) {
            asked.set(true);
            state.set(State.CANCELLING);
            writing.ifPresent(Thread::interrupt);
        }
    }

    private void run(Study study, Optional<Path> place, AtomicBoolean cancelled) {
        Instant started = clock.instant();
        int workers = Runtime.getRuntime().availableProcessors();
        ExecutorService executor = Executors.newFixedThreadPool(workers, RunModel::daemon);
        try {
            StudyResult found = engine.run(study, executor, new Progress(started, cancelled));
            if (cancelled.get()) {
                throw new RunCancelledException();
            }
            FinishedRun finished = FinishedRun.of(study, found, started, clock.instant());
            foreground.execute(() -> hear(cancelled, () -> result.set(Optional.of(finished.result()))));
            end(
                    cancelled,
                    State.DONE,
                    place.isPresent() ? write(finished, place.get(), workers, cancelled) : unwritten(finished));
        } catch (RunCancelledException e) {
            end(cancelled, State.CANCELLED, "Cancelled. Earlier results are as they were.");
        } catch (IOException e) {
            end(
                    cancelled,
                    cancelled.get() ? State.CANCELLED : State.FAILED,
                    cancelled.get()
                            ? "The new results are on screen but not on disk; earlier results there are as they were."
                            : "The new results are on screen but not on disk: " + StudyDocument.reason(e)
                                    + ". Earlier results there are as they were.");
        } catch (RuntimeException | OutOfMemoryError e) {
            end(
                    cancelled,
                    State.FAILED,
                    "A fault of Stillstand, not of your input: " + e + ". Earlier results are as they were.");
        } finally {
            executor.shutdownNow();
        }
    }

    private static Thread daemon(Runnable work) {
        Thread thread = new Thread(work, "draws");
        thread.setDaemon(true);
        return thread;
    }

    /** Does it if the run is the one the window listens to. */
    private void hear(AtomicBoolean ofRun, Runnable news) {
        if (asked == ofRun) {
            news.run();
        }
    }

    private String write(FinishedRun finished, Path place, int workers, AtomicBoolean cancelled) throws IOException {
        foreground.execute(() -> hear(cancelled, () -> {
            if (state.get() == State.RUNNING) {
                state.set(State.WRITING);
            }
            what.set("writing tables and figures");
            remaining.set("");
        }));
        Loaded<ResultsFolder> opened = ResultsFolder.open(place);
        if (opened.value().isEmpty()) {
            throw new IOException(opened.problems().get(0).message());
        }
        writing = Optional.of(Thread.currentThread());
        try (ResultsFolder folder = opened.value().get()) {
            List<Fault> faults = finished.write(folder, true, workers);
            String failed = faults.isEmpty() ? "" : " " + faults.get(0).sentence() + ".";
            return done(finished) + " Results are in " + shown(place) + "." + failed;
        } finally {
            writing = Optional.empty();
            boolean wasInterrupted = Thread.interrupted(); // the thread goes on to other work
            assert !wasInterrupted || cancelled.get();
        }
    }

    private static String unwritten(FinishedRun finished) {
        return done(finished) + " Nothing was written.";
    }

    private static String done(FinishedRun finished) {
        double seconds = finished.result().provenance().seconds().orElse(0.0);
        int failures = finished.result().failures().size();
        return String.format(Locale.ROOT, "Done in %.1f s.", seconds)
                + (failures == 0 ? "" : " " + failures + (failures == 1 ? " site" : " sites") + " failed.");
    }

    private static String shown(Path place) {
        return place.toString().replace('\\', '/');
    }

    private void end(AtomicBoolean ofRun, State ended, String sentence) {
        foreground.execute(() -> hear(ofRun, () -> {
            state.set(ended);
            outcome.set(sentence);
            what.set("");
            remaining.set("");
            fraction.set(ended == State.DONE ? 1 : 0);
        }));
    }

    /** Hears the engine, from any of its threads; the window hears the newest only. */
    private final class Progress implements RunMonitor {
        private final Instant started;
        private final AtomicBoolean cancelled;
        private final AtomicReference<Optional<Runnable>> newest = new AtomicReference<>(Optional.empty());

        Progress(Instant started, AtomicBoolean cancelled) {
            this.started = started;
            this.cancelled = cancelled;
        }

        @Override
        public void step(String piece, double done) {
            String left = remaining(Duration.between(started, clock.instant()), done);
            Runnable news = () -> {
                what.set(piece);
                fraction.set(done);
                remaining.set(left);
            };
            if (newest.getAndSet(Optional.of(news)).isEmpty()) {
                foreground.execute(() ->
                        hear(cancelled, () -> newest.getAndSet(Optional.empty()).ifPresent(Runnable::run)));
            }
        }

        @Override
        public boolean isCancelled() {
            return cancelled.get();
        }
    }

    /** What is left of a run if it goes on as it did. */
    static String remaining(Duration elapsed, double fraction) {
        if (!(fraction >= LEAST_FRACTION && fraction < 1) || elapsed.compareTo(SOON) < 0) {
            return "";
        }
        double seconds = elapsed.toMillis() / 1000.0 * (1 - fraction) / fraction;
        if (seconds < 1) {
            return "less than a second left";
        }
        return seconds < 90
                ? "about " + Math.round(seconds) + " s left"
                : "about " + Math.round(seconds / 60) + " min left";
    }
}
