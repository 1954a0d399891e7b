package stillstand.view;

import atlantafx.base.theme.PrimerDark;
import atlantafx.base.theme.PrimerLight;
import java.nio.file.Path;
import java.time.Clock;
import java.util.List;
import java.util.Objects;
import java.util.Optional;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;
import java.util.concurrent.ScheduledExecutorService;
import java.util.concurrent.ScheduledFuture;
import java.util.concurrent.TimeUnit;
import javafx.application.Application;
import javafx.application.Platform;
import javafx.css.PseudoClass;
import javafx.geometry.Rectangle2D;
import javafx.scene.Scene;
import javafx.scene.text.Font;
import javafx.stage.Screen;
import javafx.stage.Stage;
import stillstand.study.StudyRunner;
import stillstand.view.WindowMemory.Place;

/** The window as the toolkit starts it. The program's main class is another, so that the jar runs without a module path. */
public final class StillstandWindow extends Application {
    private static final double WIDTH = 1280;
    private static final double HEIGHT = 800;
    private static final int LOOK_SECONDS = 2;
    private static final long PATIENCE_SECONDS = 5;
    private static final PseudoClass DARK = PseudoClass.getPseudoClass("dark");

    private final ExecutorService disk = Executors.newSingleThreadExecutor(work -> daemon(work, "disk and check"));
    private final ExecutorService runs = Executors.newSingleThreadExecutor(work -> daemon(work, "run"));
    private final ExecutorService previews = Executors.newSingleThreadExecutor(work -> daemon(work, "previews"));
    private final ScheduledExecutorService looks =
            Executors.newSingleThreadScheduledExecutor(work -> daemon(work, "looking at the disk"));
    private Optional<WindowModel> model = Optional.empty();

    /** For the toolkit, which makes the one instance. */
    public StillstandWindow() {}

    /**
     * Shows the window and returns when it is closed.
     *
     * @param study to open; absent for the page of beginnings
     */
    public static void show(Optional<Path> study) {
        launch(
                StillstandWindow.class,
                study.map(path -> new String[] {path.toString()}).orElse(new String[0]));
    }

    private static Thread daemon(Runnable work, String name) {
        Thread thread = new Thread(work, name);
        thread.setDaemon(true);
        return thread;
    }

    @Override
    public void start(Stage stage) {
        WindowMemory memory = WindowMemory.ofUser();
        List<String> arguments = getParameters().getRaw();
        show(stage, memory, new Dialogs(stage), StudyRunner::run);
        if (!arguments.isEmpty()) {
            model.orElseThrow().open(Path.of(arguments.get(0)));
        }
    }

    /** Fills a stage with the window; tests bring their own memory, answers and engine. */
    WindowModel show(Stage stage, WindowMemory memory, Questions questions, RunModel.Engine engine) {
        StudyReader reader = new StudyReader();
        disk.execute(reader::shipped);
        RunModel run = new RunModel(runs, Platform::runLater, Clock.systemUTC(), engine);
        WindowModel window = new WindowModel(reader, run, memory, disk, Platform::runLater);
        model = Optional.of(window);
        WindowActions actions = new WindowActions(window, questions);
        loadFaces();
        ShellView[] shell = new ShellView[1];
        shell[0] = new ShellView(
                window,
                actions,
                library -> new ResultAreas(window, library, questions, previews, Platform::runLater),
                isDark -> {
                    memory.keepDark(isDark);
                    useTheme(shell[0], isDark);
                },
                () -> actions.leaving(stage::close));
        useTheme(shell[0], memory.isDark());
        Scene scene = new Scene(shell[0], WIDTH, HEIGHT);
        scene.getStylesheets().add(resource("/stillstand/view/window.css"));
        stage.setScene(scene);
        stage.setTitle("Stillstand");
        stage.setMinWidth(820);
        stage.setMinHeight(520);
        place(stage, memory);
        stage.setOnCloseRequest(event -> {
            event.consume();
            actions.leaving(stage::close);
        });
        stage.setOnHiding(event -> {
            keepPlace(stage, memory);
            window.run().cancel();
        });
        window.documentProperty()
                .addListener((source, before, after) ->
                        stage.setTitle(after.map(document -> document.folder().getFileName() + " \u00b7 Stillstand")
                                .orElse("Stillstand")));
        stage.focusedProperty().addListener((source, was, is) -> lookAtDisk(window));
        ScheduledFuture<?> unused = looks.scheduleWithFixedDelay(
                () -> Platform.runLater(() -> lookAtDisk(window)), LOOK_SECONDS, LOOK_SECONDS, TimeUnit.SECONDS);
        stage.show();
        return window;
    }

    private static void lookAtDisk(WindowModel window) {
        window.document().ifPresent(StudyDocument::lookAtDisk);
    }

    private static void loadFaces() {
        for (String face : List.of("Regular", "Semibold")) {
            Font.loadFont(resource("/stillstand/figure/OpenSans-" + face + ".ttf"), 13);
        }
    }

    private static String resource(String path) {
        return Objects.requireNonNull(StillstandWindow.class.getResource(path), path)
                .toExternalForm();
    }

    private static void useTheme(ShellView shell, boolean isDark) {
        setUserAgentStylesheet(
                isDark ? new PrimerDark().getUserAgentStylesheet() : new PrimerLight().getUserAgentStylesheet());
        shell.pseudoClassStateChanged(DARK, isDark);
    }

    private static void place(Stage stage, WindowMemory memory) {
        memory.place()
                .filter(place ->
                        Screen.getScreens().stream().anyMatch(screen -> intersects(screen.getVisualBounds(), place)))
                .ifPresent(place -> {
                    stage.setX(place.left());
                    stage.setY(place.top());
                    stage.setWidth(place.width());
                    stage.setHeight(place.height());
                    stage.setMaximized(place.isMaximised());
                });
    }

    private static boolean intersects(Rectangle2D screen, Place place) {
        return screen.intersects(place.left(), place.top(), place.width(), place.height());
    }

    private static void keepPlace(Stage stage, WindowMemory memory) {
        boolean isMaximised = stage.isMaximized();
        Place before = memory.place().orElse(new Place(0, 0, WIDTH, HEIGHT, false));
        memory.keep(
                isMaximised
                        ? new Place(before.left(), before.top(), before.width(), before.height(), true)
                        : new Place(stage.getX(), stage.getY(), stage.getWidth(), stage.getHeight(), false));
        memory.flush();
    }

    /** The window is gone: whatever still runs puts itself in order first. */
    @Override
    public void stop() {
        model.filter(window -> window.document().isPresent()).ifPresent(window -> window.close(false));
        looks.shutdownNow();
        previews.shutdown();
        runs.shutdown();
        disk.shutdown();
        try {
            boolean isDone = runs.awaitTermination(PATIENCE_SECONDS, TimeUnit.SECONDS)
                    && disk.awaitTermination(PATIENCE_SECONDS, TimeUnit.SECONDS);
            assert isDone || runs.isShutdown();
        } catch (InterruptedException e) {
            Thread.currentThread().interrupt();
        }
    }
}
