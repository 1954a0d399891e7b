package stillstand.files;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.InvalidPathException;
import java.nio.file.Path;
import java.util.List;
import java.util.Set;
import stillstand.ledger.InputProblem;
import stillstand.ledger.Loaded;
import stillstand.sealevel.SeaLevelCurve;
import stillstand.sealevel.StageTable;
import stillstand.study.HighstandRows;
import stillstand.study.InputFile;

/**
 * Curves and highstand tables of one folder in the form of a Frictionless Data Package: the tool's own, and those of a
 * study's {@code curves/}.
 *
 * @param curves in the order of the package
 * @param highstands in the order of the package
 * @param inputs the files it was read from, the descriptor first
 */
public record CurvePackage(List<SeaLevelCurve> curves, List<HighstandRows> highstands, List<InputFile> inputs) {
    /** A study without curves of its own. */
    public static final CurvePackage NONE = new CurvePackage(List.of(), List.of(), List.of());

    static final String DESCRIPTOR = "datapackage.json";
    private static final String SHIPPED = "sea-level-curves";

    public CurvePackage {
        curves = List.copyOf(curves);
        highstands = List.copyOf(highstands);
        inputs = List.copyOf(inputs);
    }

    /**
     * Reads a package from disk; a folder that is not there is a package without anything in it.
     *
     * @param folder that holds {@code datapackage.json}
     * @param name of the folder relative to the study, which problems start with
     * @param stages say which ages are interglacial
     * @param taken ids that others have already
     */
    public static Loaded<CurvePackage> read(Path folder, String name, StageTable stages, Set<String> taken) {
        if (!Files.exists(folder)) {
            return Loaded.of(NONE);
        }
        CurvePackageReader reader = new CurvePackageReader(name, path -> file(folder, name, path), false, taken);
        return reader.read(stages);
    }

    /** The curves and tables that come with the tool. */
    public static CurvePackage shipped() {
        CurvePackageReader reader = shippedReader();
        return whole(reader.read(shippedStages()));
    }

    /** The stages in which the tool looks for highstands. */
    public static StageTable shippedStages() {
        return whole(shippedReader().readStages());
    }

    private static CurvePackageReader shippedReader() {
        return new CurvePackageReader(
                SHIPPED,
                path -> TextFile.decode(SHIPPED + "/" + path, ShippedFile.bytes("/" + SHIPPED + "/" + path)),
                true,
                Set.of());
    }

    private static <T> T whole(Loaded<T> loaded) {
        return loaded.value()
                .orElseThrow(() -> new IllegalStateException("the program's own curves are broken: "
                        + loaded.problems().get(0).message()));
    }

    private static Loaded<TextFile> file(Path folder, String name, String path) {
        String called = name + "/" + path;
        try {
            Path file = folder.resolve(path);
            // a link may lead out of the folder though its path does not
            if (Files.exists(file) && !file.toRealPath().startsWith(folder.toRealPath())) {
                return Loaded.failed(
                        List.of(InputProblem.ofFile(called, "a link that leaves the folder", "a file inside it")));
            }
            return TextFile.read(file, called);
        } catch (InvalidPathException | IOException e) {
            return Loaded.failed(List.of(InputProblem.ofFile(called, "no path of this system", "a file")));
        }
    }
}
