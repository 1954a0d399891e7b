package stillstand.files;

import java.io.IOException;
import java.nio.ByteBuffer;
import java.nio.CharBuffer;
import java.nio.charset.CoderResult;
import java.nio.charset.CodingErrorAction;
import java.nio.charset.StandardCharsets;
import java.nio.file.AccessDeniedException;
import java.nio.file.Files;
import java.nio.file.NoSuchFileException;
import java.nio.file.Path;
import java.security.MessageDigest;
import java.security.NoSuchAlgorithmException;
import java.util.HexFormat;
import java.util.List;
import java.util.Locale;
import stillstand.ledger.InputProblem;
import stillstand.ledger.Loaded;
import stillstand.study.InputFile;

/**
 * A text file of a study, read whole.
 *
 * @param name path relative to the study, with forward slashes: what problems call it
 * @param text without a byte order mark
 * @param sha256 of its bytes, in hexadecimal
 */
record TextFile(String name, String text, String sha256) {
    private static final long MOST_BYTES = 64L << 20;

    /** Reads a file in UTF-8; each way in which that can fail has its own sentence. */
    static Loaded<TextFile> read(Path path, String name) {
        try {
            if (Files.isDirectory(path)) {
                return failed(InputProblem.ofFile(name, "a folder", "a file"));
            }
            long size = Files.size(path);
            if (size > MOST_BYTES) {
                return failed(InputProblem.ofFile(
                        name,
                        String.format(Locale.ROOT, "a file of %.1f MiB", size / (double) (1 << 20)),
                        "at most " + (MOST_BYTES >> 20) + " MiB"));
            }
            return decode(name, Files.readAllBytes(path));
        } catch (NoSuchFileException e) {
            return failed(InputProblem.ofFile(name, "no such file", "one"));
        } catch (AccessDeniedException e) {
            return failed(InputProblem.ofFile(name, "a file that may not be read", "permission to read it"));
        } catch (IOException e) {
            return failed(InputProblem.ofFile(
                    name, "a file that cannot be read (" + e.getMessage() + ")", "a file that can"));
        }
    }

    /** Reads the bytes of a file that lies anywhere, such as on the class path. */
    static Loaded<TextFile> decode(String name, byte[] bytes) {
        if (isUtf16(bytes)) {
            return failed(InputProblem.ofFile(name, "text in UTF-16", "UTF-8 (in a spreadsheet: save as CSV UTF-8)"));
        }
        CharBuffer text = CharBuffer.allocate(bytes.length);
        ByteBuffer in = ByteBuffer.wrap(bytes);
        CoderResult result = StandardCharsets.UTF_8
                .newDecoder()
                .onMalformedInput(CodingErrorAction.REPORT)
                .onUnmappableCharacter(CodingErrorAction.REPORT)
                .decode(in, text, true);
        if (result.isError()) {
            String found = String.format(
                    Locale.ROOT,
                    "the byte %02X, which is no UTF-8 (text in windows-1252 or another old encoding)",
                    bytes[in.position()] & 0xFF);
            return failed(new InputProblem(
                    name, lineOf(bytes, in.position()), 0, "", found, "UTF-8 (in a spreadsheet: save as CSV UTF-8)"));
        }
        text.flip();
        boolean marked = text.length() > 0 && text.charAt(0) == '\uFEFF';
        String plain = text.subSequence(marked ? 1 : 0, text.length()).toString();
        return Loaded.of(new TextFile(name, plain, sha256(bytes)));
    }

    InputFile inputFile() {
        return new InputFile(name, sha256);
    }

    /** By its byte order mark or, without one, by the zero byte in every other place of plain text. */
    private static boolean isUtf16(byte[] bytes) {
        if (bytes.length < 2) {
            return false;
        }
        int first = bytes[0] & 0xFF;
        int second = bytes[1] & 0xFF;
        return (first == 0xFE && second == 0xFF)
                || (first == 0xFF && second == 0xFE)
                || (first == 0 && second != 0)
                || (first != 0 && second == 0);
    }

    private static long lineOf(byte[] bytes, int position) {
        long line = 1;
        for (int i = 0; i < position; i++) {
            boolean ends = bytes[i] == '\n' || (bytes[i] == '\r' && bytes[i + 1] != '\n');
            line += ends ? 1 : 0;
        }
        return line;
    }

    private static String sha256(byte[] bytes) {
        try {
            return HexFormat.of().formatHex(MessageDigest.getInstance("SHA-256").digest(bytes));
        } catch (NoSuchAlgorithmException e) {
            throw new IllegalStateException("every Java has SHA-256", e);
        }
    }

    private static <T> Loaded<T> failed(InputProblem problem) {
        return Loaded.failed(List.of(problem));
    }
}
