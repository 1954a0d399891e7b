package stillstand.files;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardOpenOption;
import java.util.List;
import java.util.Optional;
import java.util.stream.Stream;
import stillstand.ledger.InputProblem;

/** Studies that come with the tool: a small one to start from, with comments and an invented example, and the demo. */
public final class StudyTemplate {
    private static final List<String> FILES = List.of("study.json", "sites.csv", "levels.csv", "samples.csv");
    private static final List<String> DEMO_FILES =
            Stream.concat(FILES.stream(), Stream.of("points.csv")).toList();

    private static final String PASSING = "stillstand-demo-";

    private StudyTemplate() {}

    /** The files of the small one, in the order in which to look at them. */
    public static List<String> files() {
        return FILES;
    }

    /**
     * Writes the one to start from.
     *
     * @param folder absent or empty
     * @return why it was not written; empty where it was
     * @throws IOException if a file cannot be written
     */
    public static Optional<InputProblem> write(Path folder) throws IOException {
        return write("/stillstand/new-study/", FILES, folder);
    }

    /** Writes the demo, an invented island, in the same way. */
    public static Optional<InputProblem> writeDemo(Path folder) throws IOException {
        return write("/stillstand/demo/", DEMO_FILES, folder);
    }

    /** Writes the demo into a new folder of the system's place for passing files. */
    public static Path writePassingDemo() throws IOException {
        Path copy = Files.createTempDirectory(PASSING).resolve("velloe-island");
        writeDemo(copy);
        return copy;
    }

    /** Removes a passing demo with all in it. */
    public static void removePassing(Path demo) throws IOException {
        Path parent = demo.getParent();
        if (parent == null || !String.valueOf(parent.getFileName()).startsWith(PASSING)) {
            throw new IllegalArgumentException("demo must be a passing one but is " + demo);
        }
        FolderTree.delete(parent);
    }

    private static Optional<InputProblem> write(String from, List<String> files, Path folder) throws IOException {
        Optional<InputProblem> problem = inTheWayOf(folder);
        if (problem.isPresent()) {
            return problem;
        }
        Files.createDirectories(folder);
        for (String file : files) {
            Files.write(folder.resolve(file), ShippedFile.bytes(from + file), StandardOpenOption.CREATE_NEW);
        }
        return Optional.empty();
    }

    /** Why a new study must not be written into a folder. */
    static Optional<InputProblem> inTheWayOf(Path folder) throws IOException {
        return inTheWay(folder)
                .map(found -> InputProblem.ofFile(
                        folder.toString().replace('\\', '/'),
                        found,
                        "no folder of that name or an empty one; nothing was written"));
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
