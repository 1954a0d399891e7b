package stillstand.files;

import java.io.IOException;
import java.nio.ByteBuffer;
import java.nio.channels.FileChannel;
import java.nio.channels.FileLock;
import java.nio.channels.OverlappingFileLockException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.NoSuchFileException;
import java.nio.file.Path;
import java.nio.file.StandardOpenOption;
import java.util.Optional;
import java.util.UUID;
import org.jspecify.annotations.Nullable;

/**
 * The lock of the operating system on a file made for it: it goes with its process, so none is ever stale. The file is
 * removed by its holder; that the one locked is still the one in place is seen by its content.
 */
final class LockFile implements AutoCloseable {
    /** Beyond this byte lies the locked one, so that the others stay readable on every system. */
    private static final long LOCKED_BYTE = 1L << 40;

    private static final int ATTEMPTS = 20;

    private final Path file;
    private final FileChannel channel;

    private LockFile(Path file, FileChannel channel) {
        this.file = file;
        this.channel = channel;
    }

    /**
     * Takes the lock.
     *
     * @return empty where another holds it, in this process or another
     * @throws IOException if the file cannot be made
     */
    static Optional<LockFile> take(Path file) throws IOException {
        for (int attempt = 0; attempt < ATTEMPTS; attempt++) {
            FileChannel channel = FileChannel.open(
                    file, StandardOpenOption.CREATE, StandardOpenOption.READ, StandardOpenOption.WRITE);
            if (tryLock(channel) == null) {
                channel.close();
                return Optional.empty();
            }
            String mark = UUID.randomUUID().toString();
            channel.truncate(0);
            channel.write(ByteBuffer.wrap(mark.getBytes(StandardCharsets.UTF_8)), 0);
            if (mark.equals(content(file))) {
                return Optional.of(new LockFile(file, channel));
            }
            channel.close();
        }
        return Optional.empty();
    }

    private static @Nullable FileLock tryLock(FileChannel channel) throws IOException {
        try {
            return channel.tryLock(LOCKED_BYTE, 1, false);
        } catch (OverlappingFileLockException e) {
            return null; // another holder in this very process
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

    /** Lets others take it. */
    @Override
    public void close() throws IOException {
        try (channel) {
            Files.deleteIfExists(file); // before the lock goes: afterwards it may be another's
        }
    }
}
