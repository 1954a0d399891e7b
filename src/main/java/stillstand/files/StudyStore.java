package stillstand.files;

import java.io.IOException;
import java.nio.ByteBuffer;
import java.nio.channels.FileChannel;
import java.nio.charset.StandardCharsets;
import java.nio.file.AccessDeniedException;
import java.nio.file.FileVisitResult;
import java.nio.file.Files;
import java.nio.file.NoSuchFileException;
import java.nio.file.Path;
import java.nio.file.ReadOnlyFileSystemException;
import java.nio.file.SimpleFileVisitor;
import java.nio.file.StandardCopyOption;
import java.nio.file.StandardOpenOption;
import java.nio.file.attribute.BasicFileAttributes;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Objects;
import java.util.Optional;
import java.util.TreeMap;
import stillstand.ledger.InputProblem;
import stillstand.ledger.Loaded;

/**
 * The folder of a study that someone edits. One process may write it at a time; others read. A save writes every changed file
 * beside its old self and swaps only when all are on the disk, so that a full disk costs nothing. Beside the study lies, while
 * there are unsaved edits, a recovery file with all of them.
 *
 * <p>One thread at a time.
 */
public final class StudyStore implements AutoCloseable {
    private static final String LOCK = ".study.stillstand-lock";
    private static final String RECOVERY = ".study.stillstand-recovery";
    private static final String FRESH = ".stillstand-new";

    private final Path folder;
    private final Optional<LockFile> lock;
    private final Optional<String> whyReadOnly;
    private Map<String, byte[]> onDisk;

    private StudyStore(Path folder, Optional<LockFile> lock, Optional<String> whyReadOnly) throws IOException {
        this.folder = folder;
        this.lock = lock;
        this.whyReadOnly = whyReadOnly;
        this.onDisk = bytesOnDisk();
    }

    /**
     * Opens a folder for editing, or for reading alone where it cannot be written or is open already.
     *
     * @throws IOException if a file in it is there but cannot be read at all
     */
    public static Loaded<StudyStore> open(Path given) throws IOException {
        if (!Files.isDirectory(given)) {
            String found = Files.exists(given) ? "a file" : "no such folder";
            return Loaded.failed(List.of(
                    InputProblem.ofFile(String.valueOf(given), found, "the folder of a study, with study.json in it")));
        }
        Path folder = given.toRealPath();
        try {
            Optional<LockFile> lock = LockFile.take(folder.resolve(LOCK));
            return Loaded.of(new StudyStore(
                    folder,
                    lock,
                    lock.isPresent() ? Optional.empty() : Optional.of("another window has this study open")));
        } catch (AccessDeniedException | ReadOnlyFileSystemException e) {
            return Loaded.of(new StudyStore(folder, Optional.empty(), Optional.of("its folder cannot be written")));
        } catch (IOException e) {
            return Loaded.of(new StudyStore(
                    folder, Optional.empty(), Optional.of("its folder cannot be written (" + e.getMessage() + ")")));
        }
    }

    public Path folder() {
        return folder;
    }

    /** Where its results go. */
    public Path results() {
        return folder.resolve("results");
    }

    /** Why nothing may be saved; empty where it may. */
    public Optional<String> whyReadOnly() {
        return whyReadOnly;
    }

    /** The study as it stands on the disk; from now on that is what {@link #changedOnDisk} compares with. */
    public StudyDraft read() throws IOException {
        onDisk = bytesOnDisk();
        return draftOf(onDisk);
    }

    private static StudyDraft draftOf(Map<String, byte[]> bytes) {
        Map<String, String> texts = new TreeMap<>();
        bytes.forEach((name, content) -> {
            String text = new String(content, StandardCharsets.UTF_8);
            boolean whole = TextFile.decode(name, content).value().isPresent();
            if (whole) {
                texts.put(name, text);
            }
        });
        return StudyDraft.of(texts);
    }

    private Map<String, byte[]> bytesOnDisk() throws IOException {
        Map<String, byte[]> bytes = new TreeMap<>();
        for (String name : StudyDraft.NAMES) {
            Path file = folder.resolve(name);
            try {
                if (Files.isRegularFile(file)) {
                    bytes.put(name, Files.readAllBytes(file));
                }
            } catch (NoSuchFileException | AccessDeniedException e) {
                bytes.remove(name); // the check of the study names it
            }
        }
        return bytes;
    }

    /** Names of files that somebody else changed since they were read or saved here. */
    public List<String> changedOnDisk() throws IOException {
        Map<String, byte[]> now = bytesOnDisk();
        return StudyDraft.NAMES.stream()
                .filter(name -> !Arrays.equals(now.get(name), onDisk.get(name)))
                .toList();
    }

    /**
     * Saves what differs from the disk, all of it or nothing.
     *
     * @throws IOException if it cannot be written; the files are then as they were
     * @throws IllegalStateException if the study is open for reading alone
     */
    public void save(StudyDraft draft) throws IOException {
        if (whyReadOnly.isPresent()) {
            throw new IllegalStateException("the study is open for reading alone: " + whyReadOnly.get());
        }
        Map<String, byte[]> now = bytesOnDisk();
        Map<Path, Path> fresh = new LinkedHashMap<>();
        try {
            for (Map.Entry<String, String> each : draft.texts().entrySet()) {
                byte[] bytes = each.getValue().getBytes(StandardCharsets.UTF_8);
                if (!Arrays.equals(bytes, now.get(each.getKey()))) {
                    Path file = target(each.getKey());
                    Path beside = file.resolveSibling("." + file.getFileName() + FRESH);
                    fresh.put(beside, file);
                    writeThrough(beside, bytes);
                    copyPermissions(file, beside);
                }
            }
            for (Map.Entry<Path, Path> swap : fresh.entrySet()) {
                Files.move(swap.getKey(), swap.getValue(), StandardCopyOption.REPLACE_EXISTING);
            }
        } finally {
            for (Path left : fresh.keySet()) {
                Files.deleteIfExists(left);
            }
        }
        onDisk = bytesOnDisk();
        dropRecovery();
    }

    /** The file itself, where its name in the study is a link. */
    private Path target(String name) throws IOException {
        Path file = folder.resolve(name);
        return Files.exists(file) ? file.toRealPath() : file;
    }

    private static void writeThrough(Path file, byte[] bytes) throws IOException {
        try (FileChannel channel = FileChannel.open(
                file, StandardOpenOption.CREATE, StandardOpenOption.TRUNCATE_EXISTING, StandardOpenOption.WRITE)) {
            ByteBuffer left = ByteBuffer.wrap(bytes);
            while (left.hasRemaining()) {
                channel.write(left);
            }
            channel.force(true);
        }
    }

    private static void copyPermissions(Path from, Path to) throws IOException {
        if (Files.exists(from) && Files.getFileStore(from).supportsFileAttributeView("posix")) {
            Files.setPosixFilePermissions(to, Files.getPosixFilePermissions(from));
        }
    }

    /** Keeps unsaved edits beside the study, for the case that the program ends before they are saved. */
    public void writeRecovery(StudyDraft draft) throws IOException {
        if (whyReadOnly.isEmpty()) {
            Path beside = folder.resolve(RECOVERY + FRESH);
            writeThrough(beside, RecoveryText.write(draft).getBytes(StandardCharsets.UTF_8));
            Files.move(beside, folder.resolve(RECOVERY), StandardCopyOption.REPLACE_EXISTING);
        }
    }

    /** The edits that a window which ended too early left behind; never those of another that is still open. */
    public Optional<StudyDraft> recovery() throws IOException {
        Path file = folder.resolve(RECOVERY);
        if (whyReadOnly.isPresent() || !Files.exists(file)) {
            return Optional.empty();
        }
        return RecoveryText.read(Files.readString(file, StandardCharsets.UTF_8))
                .filter(draft -> !Objects.equals(draft, draftOf(onDisk)));
    }

    /** Whether a window that ended too early left edits in a folder. */
    public static boolean hasRecovery(Path folder) {
        return Files.exists(folder.resolve(RECOVERY));
    }

    public void dropRecovery() throws IOException {
        if (whyReadOnly.isEmpty()) {
            Files.deleteIfExists(folder.resolve(RECOVERY));
        }
    }

    /**
     * Copies everything of the study but its results into another folder, where the draft is then to be saved.
     *
     * @param into absent or empty
     * @return why it was not copied; empty where it was
     */
    public Optional<InputProblem> copyTo(Path into) throws IOException {
        Optional<InputProblem> inTheWay = StudyTemplate.inTheWayOf(into);
        if (inTheWay.isPresent()) {
            return inTheWay;
        }
        Files.createDirectories(into);
        Path realInto = into.toRealPath();
        List<Path> files = new ArrayList<>();
        Files.walkFileTree(folder, new SimpleFileVisitor<>() {
            @Override
            public FileVisitResult preVisitDirectory(Path directory, BasicFileAttributes attributes) {
                return !directory.equals(folder) && (isPassedOver(directory) || directory.equals(realInto))
                        ? FileVisitResult.SKIP_SUBTREE
                        : FileVisitResult.CONTINUE;
            }

            @Override
            public FileVisitResult visitFile(Path file, BasicFileAttributes attributes) {
                if (!isPassedOver(file)) {
                    files.add(folder.relativize(file));
                }
                return FileVisitResult.CONTINUE;
            }
        });
        for (Path file : files) {
            Path copy = into.resolve(file.toString());
            Files.createDirectories(Objects.requireNonNull(copy.getParent()));
            Files.copy(folder.resolve(file), copy);
        }
        return Optional.empty();
    }

    private boolean isPassedOver(Path path) {
        return String.valueOf(path.getFileName()).startsWith(".") || path.equals(results());
    }

    /** Lets others write. */
    @Override
    public void close() throws IOException {
        if (lock.isPresent()) {
            lock.get().close();
        }
    }
}
