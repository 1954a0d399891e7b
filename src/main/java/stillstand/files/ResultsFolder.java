package stillstand.files;

import java.io.IOException;
import java.nio.ByteBuffer;
import java.nio.channels.FileChannel;
import java.nio.channels.FileLock;
import java.nio.channels.OverlappingFileLockException;
import java.nio.charset.StandardCharsets;
import java.nio.file.FileVisitResult;
import java.nio.file.Files;
import java.nio.file.NoSuchFileException;
import java.nio.file.Path;
import java.nio.file.SimpleFileVisitor;
import java.nio.file.StandardOpenOption;
import java.nio.file.attribute.BasicFileAttributes;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import java.util.UUID;
import java.util.stream.Stream;
import org.jspecify.annotations.Nullable;
import stillstand.ledger.InputProblem;
import stillstand.ledger.Loaded;

/**
 * A results folder that this process alone may write, until it is closed. It is always whole: new results are written
 * into a sibling, then the old folder is renamed away, the new one renamed into its place, and the old one removed.
 * Whoever opens it next finishes or undoes what a killed process left half done.
 */
public final class ResultsFolder implements AutoCloseable {
    /** Beyond this byte of the lock file lies the locked one, so that the others stay readable on every system. */
    private static final long LOCKED_BYTE = 1L << 40;

    private static final int LOCK_ATTEMPTS = 20;

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
    private final Path lockFile;
    private final FileChannel lock;

    private ResultsFolder(Path folder, FileChannel lock) {
        this.folder = folder;
        this.fresh = sibling(folder, "new");
        this.old = sibling(folder, "old");
        this.lockFile = sibling(folder, "lock");
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
        Optional<FileChannel> lock = lock(sibling(place, "lock"));
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
            deleteTree(fresh);
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
            deleteTree(old);
        }
    }

    /** Lets other processes write here. */
    @Override
    public void close() throws IOException {
        try (lock) {
            Files.deleteIfExists(lockFile); // before the lock goes: afterwards it may be another's
        }
    }

    /** Finishes a swap whose old folder is already away, undoes any other. */
    private void mend() throws IOException {
        if (!Files.exists(folder) && Files.exists(old)) {
            Files.move(Files.exists(fresh) ? fresh : old, folder);
        }
        deleteTree(fresh);
        deleteTree(old);
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

    /**
     * The lock of the operating system on the lock file: it goes with its process, so none is ever stale. The file is
     * removed by its holder; that the one locked is still the one in place is seen by its content.
     */
    private static Optional<FileChannel> lock(Path lockFile) throws IOException {
        for (int attempt = 0; attempt < LOCK_ATTEMPTS; attempt++) {
            FileChannel channel = FileChannel.open(
                    lockFile, StandardOpenOption.CREATE, StandardOpenOption.READ, StandardOpenOption.WRITE);
            if (tryLock(channel) == null) {
                channel.close();
                return Optional.empty();
            }
            String mark = UUID.randomUUID().toString();
            channel.truncate(0);
            channel.write(ByteBuffer.wrap(mark.getBytes(StandardCharsets.UTF_8)), 0);
            if (mark.equals(content(lockFile))) {
                return Optional.of(channel);
            }
            channel.close();
        }
        return Optional.empty();
    }

    private static @Nullable FileLock tryLock(FileChannel channel) throws IOException {
        try {
            return channel.tryLock(LOCKED_BYTE, 1, false);
        } catch (OverlappingFileLockException e) {
            return null; // another run in this very process
        } catch (IOException e) {
            channel.close();
            throw e;
        }
    }

    private static String content(Path file) throws IOException {
        try {
            return Files.readString(file, StandardCharsets.UTF_8);
        } catch (NoSuchFileException e) {
            return "";
        }
    }

    /** Removes a folder and all in it, following no link; one that is not there is removed already. */
    private static void deleteTree(Path tree) throws IOException {
        if (!Files.exists(tree)) {
            return;
        }
        Files.walkFileTree(tree, new SimpleFileVisitor<>() {
            @Override
            public FileVisitResult visitFile(Path file, BasicFileAttributes attributes) throws IOException {
                Files.delete(file);
                return FileVisitResult.CONTINUE;
            }

            @Override
            public FileVisitResult postVisitDirectory(Path directory, @Nullable IOException failure)
                    throws IOException {
                if (failure != null) {
                    throw failure;
                }
                Files.delete(directory);
                return FileVisitResult.CONTINUE;
            }
        });
    }
}
