package stillstand.view;

import java.lang.management.ManagementFactory;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.concurrent.CompletableFuture;
import java.util.concurrent.atomic.AtomicLong;
import java.util.function.BooleanSupplier;
import javafx.animation.AnimationTimer;
import javafx.application.Application;
import javafx.application.Platform;
import javafx.scene.Node;
import javafx.scene.control.skin.VirtualFlow;
import javafx.stage.Stage;
import stillstand.files.StudyTemplate;
import stillstand.study.StudyRunner;
import stillstand.view.RunModel.State;

/**
 * How the window keeps up, measured on a real window (or, with the flags of the tests, without a display): opening, pasting
 * 5,000 rows, scrolling 2,000, the longest time for which its thread was held during a run, and how soon a run stops.
 * {@code java -cp … 'stillstand.view.WindowMeasures$Start'}.
 */
public final class WindowMeasures extends Application {
    private static long begun;

    private final List<String> told = new ArrayList<>();
    private WindowModel model;
    private Stage stage;

    /** The main class, which must not be the application itself. */
    public static final class Start {
        private Start() {}

        public static void main(String[] arguments) {
            begun = System.nanoTime();
            Application.launch(WindowMeasures.class);
        }
    }

    @Override
    public void start(Stage shown) {
        stage = shown;
        WindowMemory memory = new WindowMemory(OpenStudies.preferences());
        model = new StillstandWindow().show(shown, memory, new WindowRobot.Answers(), StudyRunner::run);
        tell("page of beginnings", begun);
        Thread script = new Thread(this::measure, "measures");
        script.setDaemon(true);
        script.start();
    }

    private void measure() {
        try {
            Path demo = StudyTemplate.writePassingDemo();
            onWindow(() -> model.open(demo));
            waitFor(() -> model.canRun());
            tell("demo open and checked, since the start of main", begun);
            run();
            for (int delay : new int[] {300, 1500, 4000}) {
                cancel(delay);
            }
            paste(5000);
            scroll(2000);
            told.forEach(System.out::println);
        } catch (Exception e) {
            e.printStackTrace();
        }
        onWindow(() -> model.close(true));
        System.exit(0);
    }

    private void run() throws InterruptedException {
        Heart heart = new Heart();
        long start = System.nanoTime();
        onWindow(model::startRun);
        int area = 0;
        while (model.run().state() != State.DONE) {
            int next = area++;
            onWindow(() -> model.areaProperty().set(WindowModel.Area.values()[next % 5]));
            Thread.sleep(500);
        }
        String beats = heart.end();
        tell("run of the demo with figures, areas switched twice a second", start);
        told.add(beats);
    }

    /** Beats on the window's thread; keeps the longest it had to wait, and the most that thread computed between two beats. */
    private static final class Heart {
        private final AtomicLong longestWait = new AtomicLong();
        private final AtomicLong mostWork = new AtomicLong();
        private final Thread thread = new Thread(this::beat);
        private long before = -1; // of the window's thread alone

        Heart() {
            thread.setDaemon(true);
            thread.start();
        }

        private void beat() {
            try {
                while (true) {
                    long asked = System.nanoTime();
                    Platform.runLater(() -> {
                        longestWait.accumulateAndGet(System.nanoTime() - asked, Math::max);
                        long now = ManagementFactory.getThreadMXBean().getCurrentThreadCpuTime();
                        if (before >= 0) {
                            mostWork.accumulateAndGet(now - before, Math::max);
                        }
                        before = now;
                    });
                    Thread.sleep(10);
                }
            } catch (InterruptedException e) {
                Thread.currentThread().interrupt();
            }
        }

        String end() {
            thread.interrupt();
            return String.format(
                    Locale.ROOT,
                    "  longest wait of the window's thread meanwhile: %d ms, of which it worked at most %d ms",
                    longestWait.get() / 1_000_000,
                    mostWork.get() / 1_000_000);
        }
    }

    private void cancel(int afterMillis) throws InterruptedException {
        onWindow(model::startRun);
        Thread.sleep(afterMillis);
        long asked = System.nanoTime();
        onWindow(() -> model.run().cancel());
        while (model.run().state().isBusy()) {
            Thread.sleep(1);
        }
        tell("cancelled " + afterMillis + " ms into a run, until it had stopped", asked);
    }

    private void paste(int rows) throws InterruptedException {
        StringBuilder text = new StringBuilder();
        for (int i = 0; i < rows; i++) {
            text.append("Gannet Steps\tP").append(i).append('\t').append(i % 50 == 0 ? "1,5" : "10.5").append("\t0.5\n");
        }
        onWindow(() -> {
            model.areaProperty().set(WindowModel.Area.EVIDENCE);
            GridModel grid = model.evidence().orElseThrow().grid("levels.csv").orElseThrow();
            grid.choose(grid.sheet().rowCount(), 0);
        });
        Heart heart = new Heart();
        long start = System.nanoTime();
        onWindow(() -> model.evidence().orElseThrow().grid("levels.csv").orElseThrow().paste(text.toString()));
        waitFor(() -> {
            StudyDocument document = model.document().orElseThrow();
            return document.checked().draft().equals(document.draft());
        });
        String beats = heart.end();
        tell(rows + " rows pasted and checked", start);
        told.add(beats);
    }

    private void scroll(int rows) throws InterruptedException {
        List<Long> frames = new ArrayList<>();
        AnimationTimer timer = new AnimationTimer() {
            private long before;
            private int row;

            @Override
            public void handle(long now) {
                Node found = stage.getScene().getRoot().lookup("#grid-levels .virtual-flow");
                if (found instanceof VirtualFlow<?> flow && row < rows) {
                    flow.scrollToTop(row += 7);
                    if (before > 0) {
                        frames.add(now - before);
                    }
                    before = now;
                } else {
                    stop();
                }
            }
        };
        onWindow(timer::start);
        while (frames.size() < rows / 7 - 2) {
            Thread.sleep(50);
        }
        List<Long> sorted = frames.stream().sorted().toList();
        told.add(String.format(
                Locale.ROOT,
                "scrolling %d rows, 7 a frame: median frame %.0f ms, slowest in a hundred %.0f ms",
                rows,
                sorted.get(sorted.size() / 2) / 1e6,
                sorted.get(sorted.size() * 99 / 100) / 1e6));
    }

    private void tell(String what, long since) {
        told.add(String.format(Locale.ROOT, "%s: %.2f s", what, (System.nanoTime() - since) / 1e9));
    }

    private static void onWindow(Runnable action) {
        CompletableFuture.runAsync(action, Platform::runLater).join();
    }

    private static void waitFor(BooleanSupplier truth) throws InterruptedException {
        boolean[] isTrue = new boolean[1];
        while (!isTrue[0]) {
            Thread.sleep(5);
            onWindow(() -> isTrue[0] = truth.getAsBoolean());
        }
    }
}
