package stillstand.files;

import stillstand.study.Library;

/** The curves, tables and evidence that come with the tool. */
public final class ShippedLibrary {
    private ShippedLibrary() {}

    /**
     * Reads all of it from the class path.
     *
     * @throws IllegalStateException if a shipped file is wrong, which is a fault of the program
     */
    public static Library load() {
        CurvePackage curves = CurvePackage.shipped();
        ShippedEvidence evidence = ShippedEvidence.load();
        return new Library(
                CurvePackage.shippedStages(),
                curves.curves(),
                curves.highstands(),
                evidence.indicators(),
                evidence.habitats(),
                evidence.methods());
    }
}
