package stillstand.view;

import java.nio.file.Path;
import java.util.Map;
import java.util.Optional;
import stillstand.files.ShippedLibrary;
import stillstand.files.StudyFolder;
import stillstand.ledger.Loaded;
import stillstand.study.Library;
import stillstand.study.Study;

/** Reads and checks studies as the command line does. What the tool knows is read once, when first asked for; never on the window's thread. */
final class StudyReader {
    private Optional<Library> shipped = Optional.empty();

    /** What the tool itself knows. */
    synchronized Library shipped() {
        Library library = shipped.orElseGet(ShippedLibrary::load);
        shipped = Optional.of(library);
        return library;
    }

    /** The same with a study's own curves and tables beside it. */
    Library libraryOf(Path folder) {
        return StudyFolder.library(folder, shipped());
    }

    /**
     * The study that a folder will hold once some files are saved, or its problems.
     *
     * @param edited texts by file name
     */
    Loaded<Study> check(Path folder, Map<String, String> edited) {
        return StudyFolder.read(folder, edited, shipped());
    }
}
