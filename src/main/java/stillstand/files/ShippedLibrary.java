package stillstand.files;

import java.util.List;
import java.util.Optional;
import stillstand.ledger.InputProblem;
import stillstand.ledger.Loaded;
import stillstand.study.Library;

/** The curves, tables and evidence that come with the tool. */
public final class ShippedLibrary {
    private static final String FOLDER = "/sea-level-curves/";

    private ShippedLibrary() {}

    /**
     * Reads all of it from the class path.
     *
     * @throws IllegalStateException if a shipped file is wrong, which is a fault of the program
     */
    public static Library load() {
        Loaded<CurvePackage> curves = CurvePackage.read(
                "sea-level-curves/",
                name -> TextFile.decode("sea-level-curves/" + name, ShippedFile.bytes(FOLDER + name)),
                Optional.empty());
        List<String> wrong =
                curves.problems().stream().map(InputProblem::message).toList();
        if (!wrong.isEmpty()) {
            throw new IllegalStateException("the program's own tables are wrong: " + wrong);
        }
        CurvePackage shipped = curves.value().orElseThrow();
        ShippedEvidence evidence = ShippedEvidence.load();
        return new Library(
                shipped.stages().orElseThrow(),
                shipped.curves(),
                shipped.highstands(),
                evidence.indicators(),
                evidence.habitats(),
                evidence.methods());
    }
}
