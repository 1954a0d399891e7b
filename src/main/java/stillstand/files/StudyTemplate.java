package stillstand.files;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardOpenOption;
import java.util.List;
import java.util.Optional;
import java.util.stream.Stream;
import stillstand.ledger.InputProblem;

/** A small study to start from, with comments and an invented example in it. */
public final class StudyTemplate {
    private static final List<String> FILES = List.of("study.json", "sites.csv", "levels.csv", "samples.csv");

    private StudyTemplate() {}

    /** Its files, in the order in which to look at them. */
    public static List<String> files() {
        return FILES;
    }

    /**
     * Writes it.
     *
     * @param folder absent or empty
     * @return why it was not written; empty where it was
     * @throws IOException if a file cannot be written
     */
    public static Optional<InputProblem> write(Path folder) throws IOException {
        Optional<String> inTheWay = inTheWay(folder);
        if (inTheWay.isPresent()) {
            return Optional.of(InputProblem.ofFile(
                    folder.toString().replace('\\', '/'),
                    inTheWay.get(),
                    "no folder of that name or an empty one; nothing was written"));
        }
        Files.createDirectories(folder);
        for (String file : FILES) {
            Files.write(
                    folder.resolve(file),
                    ShippedFile.bytes("/stillstand/new-study/" + file),
                    StandardOpenOption.CREATE_NEW);
        }
        return Optional.empty();
    }

    private static Optional<String> inTheWay(Path folder) throws IOException {
        if (!Files.exists(folder)) {
            return Optional.empty();
        }
        if (!Files.isDirectory(folder)) {
            return Optional.of("a file");
        }
        try (Stream<Path> entries = Files.list(folder)) {
            return entries.map(entry -> entry.getFileName().toString())
                    .sorted()
                    .findFirst()
                    .map(name -> InputProblem.quote(name) + " in it");
        }
    }
}
