package stillstand.files;

import static stillstand.ledger.InputProblem.quote;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.AtomicMoveNotSupportedException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardCopyOption;
import java.nio.file.StandardOpenOption;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import stillstand.ledger.InputProblem;
import stillstand.ledger.InputWarning;
import stillstand.ledger.Loaded;
import stillstand.sealevel.CurveFacts;
import stillstand.sealevel.SeaLevelCurve;
import stillstand.study.ArchivedCurve;
import stillstand.study.CurveTable;
import stillstand.study.ImportChoices;
import stillstand.study.Library;
import tools.jackson.databind.JsonNode;

/**
 * Brings an archived table of a curve into a study's {@code curves/}: a table of its own and a resource in
 * {@code datapackage.json}, whose other text stays as it is. Of the study nothing else is read; nothing in it is overwritten.
 */
public final class CurveImport {
    private static final String FOLDER = "curves";

    private final Path archive;
    private final Path study;
    private final String id;
    private final Library library;
    private final List<InputProblem> problems = new ArrayList<>();
    private final List<InputWarning> warnings = new ArrayList<>();

    private CurveImport(Path archive, Path study, String id, Library library) {
        this.archive = archive;
        this.study = study;
        this.id = id;
        this.library = library;
    }

    /**
     * What was brought in.
     *
     * @param curve as the study will read it
     * @param remarks what was understood of the archived table and done to it, a sentence each
     * @param file the table written, relative to the study
     */
    public record Imported(SeaLevelCurve curve, List<String> remarks, String file) {
        public Imported {
            remarks = List.copyOf(remarks);
        }
    }

    /**
     * Imports a curve; with problems, nothing is written.
     *
     * @param archive the table as archived
     * @param study folder of the study
     * @param id that the curve gets
     * @param choices what the user says of the table
     * @param citation of the source
     * @param library whose ids are taken
     * @throws IOException if a file cannot be written
     */
    public static Loaded<Imported> into(
            Path archive, Path study, String id, ImportChoices choices, Optional<String> citation, Library library)
            throws IOException {
        return new CurveImport(archive, study, id, library).run(choices, citation);
    }

    private Loaded<Imported> run(ImportChoices choices, Optional<String> citation) throws IOException {
        checkPlace();
        Optional<CurveDescriptor> descriptor = problems.isEmpty() ? descriptor() : Optional.empty();
        Optional<ArchivedTable> table =
                keep(TextFile.read(archive, shown(archive))).flatMap(text -> keep(ArchivedTable.parse(text)));
        Optional<ArchivedCurve> curve = table.flatMap(each -> keep(ArchivedCurve.read(each.table(), choices)));
        if (!problems.isEmpty() || curve.isEmpty() || descriptor.isEmpty()) {
            return Loaded.failed(problems.stream().sorted().toList());
        }
        String name = id + ".csv";
        List<String> remarks = new ArrayList<>();
        table.map(ArchivedTable::description).ifPresent(remarks::add);
        remarks.addAll(curve.get().remarks());
        String text = text(curve.get());
        // what is written is first read as the study will read it
        Optional<SeaLevelCurve> read = check(name, text, curve.get(), citation);
        if (read.isEmpty()) {
            return Loaded.failed(problems.stream().sorted().toList());
        }
        String extended = descriptor.get().with(CurveDescriptor.resource(id, name, curve.get(), citation));
        write(name, text, extended);
        return new Loaded<>(Optional.of(new Imported(read.get(), remarks, FOLDER + "/" + name)), List.of(), warnings);
    }

    private void checkPlace() {
        if (!CurvePackageReader.isId(id)) {
            problems.add(InputProblem.ofFile(
                    "--id", quote(id), "lower-case words joined by hyphens, such as \"author-2020\""));
        }
        if (library.curveIds().contains(id) || library.highstandIds().contains(id)) {
            problems.add(InputProblem.ofFile(
                    "--id", quote(id) + ", which comes with Stillstand", "an id that no curve or table has"));
        }
        if (!Files.isRegularFile(study.resolve(StudyJson.NAME))) {
            String found = Files.isDirectory(study) ? "a folder without " + StudyJson.NAME : "no such folder";
            problems.add(InputProblem.ofFile(shown(study), found, "the folder of a study"));
        }
    }

    /** The study's package as it stands, or an empty one; absent where the new curve has no place in it. */
    private Optional<CurveDescriptor> descriptor() {
        Path file = folder().resolve(CurvePackage.DESCRIPTOR);
        String name = FOLDER + "/" + CurvePackage.DESCRIPTOR;
        Optional<CurveDescriptor> descriptor = Files.exists(file)
                ? keep(TextFile.read(file, name)).flatMap(text -> keep(CurveDescriptor.parse(text)))
                : Optional.of(CurveDescriptor.empty());
        if (descriptor.isEmpty()) {
            return descriptor;
        }
        for (JsonNode resource : descriptor.get().resources()) {
            if (resource.path("name").asString("").equals(id)) {
                problems.add(InputProblem.ofFile(
                        name,
                        "a curve or table " + quote(id) + " already",
                        "another --id, or that one taken out first"));
                return Optional.empty();
            }
        }
        if (Files.exists(folder().resolve(id + ".csv"))) {
            problems.add(InputProblem.ofFile(
                    FOLDER + "/" + id + ".csv", "a file already", "another --id, or that file moved away first"));
            return Optional.empty();
        }
        return descriptor;
    }

    private String text(ArchivedCurve curve) {
        String from = String.valueOf(archive.getFileName()).replaceAll("\\p{Cntrl}", " ");
        return "# Imported by Stillstand from " + from + ". Ages in ka before 1950; levels in metres, up positive.\n"
                + CsvCells.table(curve.header(), curve.rows());
    }

    private Optional<SeaLevelCurve> check(String name, String text, ArchivedCurve curve, Optional<String> citation) {
        CurveFacts facts = new CurveFacts(
                citation.orElse("source not stated"),
                CurveFacts.DEFAULT_ZERO,
                CurveFacts.DEFAULT_AGE_SCALE,
                curve.spreadMeaning(),
                false,
                CurveFacts.DEFAULT_CORRELATION_TIME_KA,
                CurveFacts.DEFAULT_CURVE_AGE_SIGMA_KA,
                0,
                List.of());
        return keep(TableFile.parse(new TextFile(FOLDER + "/" + name, text, "")))
                .flatMap(table -> keep(CurveTable.read(id, table.table(), facts, Optional.empty(), library.stages())));
    }

    /** The table first: a descriptor never names a table that is not there. */
    private void write(String name, String table, String descriptor) throws IOException {
        Files.createDirectories(folder());
        Path written = folder().resolve(name);
        Files.writeString(written, table, StandardCharsets.UTF_8, StandardOpenOption.CREATE_NEW);
        Path fresh = folder().resolve("." + CurvePackage.DESCRIPTOR + ".new");
        try {
            Files.writeString(fresh, descriptor, StandardCharsets.UTF_8);
            replace(fresh, folder().resolve(CurvePackage.DESCRIPTOR));
        } catch (IOException e) {
            Files.deleteIfExists(fresh);
            Files.deleteIfExists(written);
            throw e;
        }
    }

    private static void replace(Path fresh, Path old) throws IOException {
        try {
            Files.move(fresh, old, StandardCopyOption.ATOMIC_MOVE, StandardCopyOption.REPLACE_EXISTING);
        } catch (AtomicMoveNotSupportedException e) {
            Files.move(fresh, old, StandardCopyOption.REPLACE_EXISTING);
        }
    }

    private Path folder() {
        return study.resolve(FOLDER);
    }

    private static String shown(Path path) {
        return path.toString().replace('\\', '/');
    }

    private <T> Optional<T> keep(Loaded<T> loaded) {
        problems.addAll(loaded.problems());
        warnings.addAll(loaded.warnings());
        return loaded.value();
    }
}
