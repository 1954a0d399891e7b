package stillstand.files;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.NoSuchFileException;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import java.util.stream.Stream;
import stillstand.ledger.InputProblem;
import stillstand.ledger.Loaded;

/**
 * A results folder that this process alone may write, until it is closed. It is always whole: new results are written
 * into a sibling, then the old folder is renamed away, the new one renamed into its place, and the old one removed.
 * Whoever opens it next finishes or undoes what a killed process left half done.
 */
public final class ResultsFolder implements AutoCloseable {
    /** What a run writes; anything else in the folder is the user's and must not be lost. */
    private static final Set<String> WRITTEN = Set.of(
            ResultsJson.FILE,
            "table1.csv",
            "rates.csv",
            "pairings.csv",
            "budget.csv",
            "ages.csv",
            "curve-choice.csv",
            "comparison.csv",
            "tornado.csv",
            "next-measurements.csv",
            "assumption-switches.csv",
            "samples-left-out.csv",
            "curves-left-out.csv",
            "ledger.csv",
            "figures",
            "report.html",
            "sites.geojson");

    private final Path folder;
    private final Path fresh;
    private final Path old;
    private final LockFile lock;

    private ResultsFolder(Path folder, LockFile lock) {
        this.folder = folder;
        this.fresh = sibling(folder, "new");
        this.old = sibling(folder, "old");
        this.lock = lock;
    }

    /** Fills an empty folder with results. */
    @FunctionalInterface
    public interface Filling {
        /**
         * Writes the files.
         *
         * @throws IOException if one cannot be written
         */
        void into(Path emptyFolder) throws IOException;
    }

    /**
     * Takes the folder for this process, and mends what a killed one left. The folder itself may be absent.
     *
     * @return no folder, and the reason, where another run holds it or it is not ours to write over
     * @throws IOException if nothing can be written beside the folder
     */
    public static Loaded<ResultsFolder> open(Path folder) throws IOException {
        Path place = Files.exists(folder)
                ? folder.toRealPath()
                : folder.toAbsolutePath().normalize();
        Path parent = place.getParent();
        if (parent == null) {
            return refused(folder, "the root of a file system", "a folder for results");
        }
        Files.createDirectories(parent);
        Optional<LockFile> lock = LockFile.take(sibling(place, "lock"));
        if (lock.isEmpty()) {
            return refused(folder, "another run writing there", "one run at a time; wait for it or give another --out");
        }
        ResultsFolder opened = new ResultsFolder(place, lock.get());
        try {
            opened.mend();
            Optional<Loaded<ResultsFolder>> refusal = opened.refusal(folder);
            if (refusal.isPresent()) {
                opened.close();
                return refusal.get();
            }
            return Loaded.of(opened);
        } catch (IOException | RuntimeException e) {
            opened.close();
            throw e;
        }
    }

    /**
     * Replaces the folder's content. Whatever goes wrong before the new results are whole leaves the previous ones as
     * they were.
     *
     * @throws IOException if a file cannot be written or a folder not renamed
     */
    public void replace(Filling filling) throws IOException {
        try {
            replace(filling, 4);
        } catch (IOException | RuntimeException e) {
            try {
                mend();
            } catch (IOException another) {
                e.addSuppressed(another);
            }
            throw e;
        }
    }

    /** The steps of a replacement, of which tests take only the first few, as a killed process does. */
    void replace(Filling filling, int steps) throws IOException {
        if (steps >= 1) {
            FolderTree.delete(fresh);
            Files.createDirectory(fresh);
            filling.into(fresh);
        }
        if (steps >= 2 && Files.exists(folder)) {
            Files.move(folder, old);
        }
        if (steps >= 3) {
            Files.move(fresh, folder);
        }
        if (steps >= 4) {
            FolderTree.delete(old);
        }
    }

    /** Lets other processes write here. */
    @Override
    public void close() throws IOException {
        lock.close();
    }

    /** Finishes a swap whose old folder is already away, undoes any other. */
    private void mend() throws IOException {
        if (!Files.exists(folder) && Files.exists(old)) {
            Files.move(Files.exists(fresh) ? fresh : old, folder);
        }
        FolderTree.delete(fresh);
        FolderTree.delete(old);
    }

    private Optional<Loaded<ResultsFolder>> refusal(Path asGiven) throws IOException {
        if (!Files.exists(folder)) {
            return Optional.empty();
        }
        String wanted = "no folder of that name, an empty one, or one that holds results of Stillstand alone";
        if (!Files.isDirectory(folder)) {
            return Optional.of(refused(asGiven, "a file", wanted));
        }
        List<String> names;
        try (Stream<Path> entries = Files.list(folder)) {
            names = entries.map(entry -> entry.getFileName().toString())
                    .sorted()
                    .toList();
        }
        if (names.isEmpty()) {
            return Optional.empty();
        }
        if (!holdsOurResults()) {
            return Optional.of(refused(asGiven, InputProblem.quote(names.get(0)) + " in it", wanted));
        }
        return names.stream()
                .filter(name -> !WRITTEN.contains(name) && !isLeftByOtherPrograms(name))
                .findFirst()
                .map(
                        name -> refused(
                                asGiven,
                                InputProblem.quote(name) + " in it",
                                "only files of Stillstand, since all of it is replaced; move that one away or give another --out"));
    }

    /** Hidden files and the locks of office programs: nobody's work. */
    private static boolean isLeftByOtherPrograms(String name) {
        return name.startsWith(".") || name.startsWith("~$") || name.equals("Thumbs.db") || name.equals("desktop.ini");
    }

    private boolean holdsOurResults() throws IOException {
        try {
            byte[] bytes = Files.readAllBytes(folder.resolve(ResultsJson.FILE));
            return ResultsJson.isOurs(new String(bytes, StandardCharsets.UTF_8));
        } catch (NoSuchFileException e) {
            return false;
        }
    }

    private static Loaded<ResultsFolder> refused(Path folder, String found, String expected) {
        return Loaded.failed(List.of(InputProblem.ofFile(folder.toString().replace('\\', '/'), found, expected)));
    }

    private static Path sibling(Path folder, String what) {
        return folder.resolveSibling("." + folder.getFileName() + ".stillstand-" + what);
    }
}
