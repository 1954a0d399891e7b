package stillstand.files;

import java.io.IOException;
import java.io.InputStream;
import java.io.UncheckedIOException;

/** Files that come with the tool on the class path. */
final class ShippedFile {
    private ShippedFile() {}

    /**
     * The bytes of a file.
     *
     * @param path absolute, such as {@code /sea-level-curves/stages.csv}
     * @throws IllegalStateException if the program lacks it
     */
    static byte[] bytes(String path) {
        try (InputStream stream = ShippedFile.class.getResourceAsStream(path)) {
            if (stream == null) {
                throw new IllegalStateException("the program lacks its file " + path);
            }
            return stream.readAllBytes();
        } catch (IOException e) {
            throw new UncheckedIOException("reading the program's own file " + path, e);
        }
    }
}
