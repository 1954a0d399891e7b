package stillstand.view;

import java.io.PrintStream;
import java.lang.management.ManagementFactory;
import java.lang.management.ThreadMXBean;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.concurrent.CompletableFuture;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;
import java.util.concurrent.atomic.AtomicInteger;
import java.util.concurrent.atomic.AtomicLong;
import javafx.animation.AnimationTimer;
import javafx.application.Platform;
import javafx.event.Event;
import javafx.event.EventType;
import javafx.geometry.Point2D;
import javafx.scene.Scene;
import javafx.scene.input.MouseButton;
import javafx.scene.input.MouseEvent;
import javafx.stage.Stage;
import stillstand.files.ShippedLibrary;
import stillstand.files.StudyFolder;
import stillstand.shoreline.Level;
import stillstand.shoreline.Site;
import stillstand.shoreline.StageChoice;
import stillstand.study.SitePlan;
import stillstand.study.Study;
import stillstand.uncertainty.Normal;

/**
 * How many frames a second the Stair keeps while a line of one of ten levels is dragged over the highstands, one mouse event and
 * another highstand a frame, previews worked out beside it; and how many previews are worked out. The ten levels are the demo's invented Gannet Steps and two more,
 * under the default model. Painted for real, into memory (Monocle, software pipeline). The window's share of a frame is the time its own
 * thread is held by the event and the painting.
 *
 * <p>{@code java -Dglass.platform=Monocle -Dmonocle.platform=Headless -Dprism.order=sw -cp CLASSPATH
 * stillstand.view.StairDragBenchmark}
 */
public final class StairDragBenchmark {
    private static final String SITE = "Gannet Steps";
    private static final int WARM = 120;
    private static final int FRAMES = 400;
    private static final double NANOS_PER_MILLI = 1e6;
    private static final ThreadMXBean CPU = ManagementFactory.getThreadMXBean();

    private final StairModel model;
    private final StairPaper paper;
    private final List<Long> frameEnds = new ArrayList<>();
    private final List<Long> held = new ArrayList<>();
    private final CompletableFuture<Void> done = new CompletableFuture<>();
    private int frames;
    private final AtomicInteger previews = new AtomicInteger();
    private final AtomicLong previewNanos = new AtomicLong();
    private int previewsBefore;
    private long previewNanosBefore;

    private StairDragBenchmark(ExecutorService background) {
        model = new StairModel(
                work -> background.execute(() -> {
                    long began = CPU.getCurrentThreadCpuTime();
                    work.run();
                    previews.incrementAndGet();
                    previewNanos.addAndGet(CPU.getCurrentThreadCpuTime() - began);
                }),
                Platform::runLater,
                edit -> {});
        StairView view = new StairView(model);
        model.show(Shown.of(study()));
        paper = (StairPaper) view.lookup("#stair-paper");
        Stage stage = new Stage();
        stage.setScene(new Scene(view, 1280, 800));
        stage.show();
        view.layout();
        paper.paintIfOld();
    }

    public static void main(String[] arguments) throws Exception {
        ExecutorService background = Executors.newSingleThreadExecutor(work -> {
            Thread thread = new Thread(work, "previews");
            thread.setDaemon(true);
            return thread;
        });
        CompletableFuture<StairDragBenchmark> made = new CompletableFuture<>();
        Platform.startup(() -> made.complete(new StairDragBenchmark(background)));
        StairDragBenchmark benchmark = made.get();
        Platform.runLater(benchmark::drag);
        benchmark.done.get();
        benchmark.tell(System.out);
        Runtime.getRuntime().halt(0); // nothing to put away, and a toolkit that stops while it paints complains
    }

    private static Study study() {
        Study demo = StudyFolder.read(Path.of("demo/velloe-island"), ShippedLibrary.load())
                .value()
                .orElseThrow()
                .only(List.of(SITE));
        SitePlan plan = demo.sites().get(0);
        Site site = plan.site();
        List<Level> levels = new ArrayList<>(site.levels());
        levels.add(like(site.levels().get(5), "G9", 330));
        levels.add(like(site.levels().get(5), "G10", 372));
        Site ten = new Site(
                site.name(),
                site.position(),
                site.coast(),
                site.distanceAlongCoastKm(),
                site.datumOffsetMetres(),
                site.surveyedMetres(),
                site.localCurve(),
                levels,
                site.samples(),
                site.note(),
                site.own());
        return new Study(
                demo.settings(),
                List.of(new SitePlan(ten, plan.prior(), plan.seaLevel())),
                demo.seaLevel(),
                demo.warnings(),
                demo.ledger(),
                demo.inputs());
    }

    private static Level like(Level level, String name, double metres) {
        return new Level(
                name,
                new Normal(metres, 2),
                level.meaning(),
                level.formsAt(),
                level.coverMetres(),
                level.loweringMetresPerKyr(),
                StageChoice.ANY,
                level.terrace(),
                level.doubtful(),
                Optional.empty(),
                level.coseismicStepMetres(),
                List.of(),
                "",
                level.own());
    }

    /** Presses on a level's name and moves along the highstands, a step a frame. */
    private void drag() {
        StairScale scale = paper.scale();
        List<StairPicture.Stand> stands = model.pictureProperty().get().stands().stream()
                .filter(stand -> stand.ageKa() <= scale.oldestKa)
                .toList();
        fire(MouseEvent.MOUSE_PRESSED, scale.nameX() + 4, scale.nameY(5));
        new AnimationTimer() {
            @Override
            public void handle(long now) {
                long began = System.nanoTime();
                StairPicture.Stand stand = stands.get(frames % stands.size());
                fire(MouseEvent.MOUSE_DRAGGED, scale.x(stand.ageKa()) + 3, scale.y(stand.metres()) - 3);
                paper.paintIfOld();
                long ended = System.nanoTime();
                frames++;
                if (frames == WARM) {
                    previewsBefore = previews.get();
                    previewNanosBefore = previewNanos.get();
                } else if (frames > WARM) {
                    frameEnds.add(ended);
                    held.add(ended - began);
                }
                if (frames == WARM + FRAMES) {
                    stop();
                    done.complete(null);
                }
            }
        }.start();
    }

    /** Fires an event at a place of the drawing; events speak in places of the scene. */
    private void fire(EventType<MouseEvent> type, double x, double y) {
        Point2D at = paper.localToScene(x, y);
        boolean no = false;
        MouseEvent event = new MouseEvent(
                type, at.getX(), at.getY(), at.getX(), at.getY(), MouseButton.PRIMARY, 1, no, no, no, no, true, no, no, no,
                no, no, null);
        Event.fireEvent(paper, event);
    }

    private void tell(PrintStream out) {
        double[] gaps = new double[frameEnds.size() - 1];
        for (int i = 0; i < gaps.length; i++) {
            gaps[i] = (frameEnds.get(i + 1) - frameEnds.get(i)) / NANOS_PER_MILLI;
        }
        double seconds = (frameEnds.get(frameEnds.size() - 1) - frameEnds.get(0)) / NANOS_PER_MILLI / 1000;
        double[] work = held.stream().mapToDouble(nanos -> nanos / NANOS_PER_MILLI).toArray();
        Arrays.sort(gaps);
        Arrays.sort(work);
        if (previews.get() < 10) {
            throw new IllegalStateException("no line was dragged: " + previews.get() + " previews were asked for");
        }
        out.printf(
                Locale.ROOT,
                "%d frames: %.1f a second; between frames median %.1f ms, 99 %% %.1f ms, most %.1f ms%n",
                FRAMES,
                gaps.length / seconds,
                gaps[gaps.length / 2],
                gaps[gaps.length * 99 / 100],
                gaps[gaps.length - 1]);
        out.printf(
                Locale.ROOT,
                "interface thread held by event and painting: median %.1f ms, 99 %% %.1f ms, most %.1f ms%n",
                work[work.length / 2],
                work[work.length * 99 / 100],
                work[work.length - 1]);
        int worked = previews.get() - previewsBefore;
        out.printf(
                Locale.ROOT,
                "previews worked out: %.1f a second, %.1f ms of processor time each%n",
                worked / seconds,
                (previewNanos.get() - previewNanosBefore) / NANOS_PER_MILLI / Math.max(1, worked));
    }
}
