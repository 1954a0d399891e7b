package stillstand.files;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardCopyOption;
import java.util.ArrayList;
import java.util.List;
import java.util.concurrent.ExecutionException;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;
import java.util.concurrent.Future;
import stillstand.figure.Figure;
import stillstand.figure.FigureFormat;
import stillstand.figure.PageWidth;

/**
 * Puts figures on disk, each whole or not at all.
 *
 * @param formats of each figure
 * @param width of all of them
 * @param titled whether titles and notes are printed
 * @param dotsPerInch of pictures
 */
public record FigureFiles(List<FigureFormat> formats, PageWidth width, boolean titled, int dotsPerInch) {
    /** What most journals ask of a picture. */
    public static final int DEFAULT_DPI = 300;

    /** As a run writes them. */
    public static final FigureFiles OF_RUN =
            new FigureFiles(List.of(FigureFormat.values()), PageWidth.TWO, true, DEFAULT_DPI);

    public FigureFiles {
        formats = List.copyOf(formats);
    }

    /** A figure that could not be drawn, and why: a fault of ours, which must not cost a run its results. */
    public record Fault(String name, String reason) {
        /** What it is told with. */
        public String sentence() {
            return name + " could not be drawn, a fault of Stillstand: " + reason;
        }
    }

    /**
     * Draws figures into a folder, which is made where there is none.
     *
     * @param threads at work at once
     * @return those that could not be drawn
     * @throws IOException if a file cannot be written
     */
    public List<Fault> write(List<Figure> figures, Path folder, int threads) throws IOException {
        Files.createDirectories(folder);
        ExecutorService executor = Executors.newFixedThreadPool(threads);
        try {
            List<Future<List<Fault>>> running = new ArrayList<>();
            figures.forEach(figure -> running.add(executor.submit(() -> write(figure, folder))));
            List<Fault> faults = new ArrayList<>();
            for (Future<List<Fault>> each : running) {
                faults.addAll(waitFor(each));
            }
            return faults;
        } finally {
            executor.shutdownNow();
        }
    }

    private static List<Fault> waitFor(Future<List<Fault>> running) throws IOException {
        try {
            return running.get();
        } catch (ExecutionException e) {
            if (e.getCause() instanceof IOException trouble) {
                throw trouble;
            }
            throw new IllegalStateException(e.getCause());
        } catch (InterruptedException e) {
            Thread.currentThread().interrupt();
            throw new IOException("interrupted", e);
        }
    }

    private List<Fault> write(Figure figure, Path folder) throws IOException {
        List<Fault> faults = new ArrayList<>();
        for (FigureFormat format : formats) {
            byte[] bytes;
            try {
                bytes = figure.bytes(format, width, titled, dotsPerInch);
            } catch (RuntimeException e) {
                faults.add(new Fault(figure.fileName(format), e.toString()));
                continue;
            }
            whole(folder.resolve(figure.fileName(format)), bytes);
        }
        return faults;
    }

    /** Nobody sees half a file, and one that cannot be written leaves the one before it. */
    private static void whole(Path file, byte[] bytes) throws IOException {
        Path fresh = file.resolveSibling("." + file.getFileName() + ".new");
        try {
            Files.write(fresh, bytes);
            Files.move(fresh, file, StandardCopyOption.REPLACE_EXISTING);
        } finally {
            Files.deleteIfExists(fresh);
        }
    }
}
