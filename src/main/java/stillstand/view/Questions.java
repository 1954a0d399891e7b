package stillstand.view;

import java.nio.file.Path;
import java.util.Optional;

/** What the window asks the user, by dialogs; tests answer without any. */
interface Questions {
    /** The folder of a study that is there; empty where the user would rather not. */
    Optional<Path> studyToOpen();

    /** A folder for a study that is not there yet, absent or empty. */
    Optional<Path> folderForNew(String title);

    /** A folder to write figures or results into. */
    Optional<Path> folderToWrite();

    /** What to do with unsaved edits. */
    Unsaved unsaved(String title);

    /** Answers about unsaved edits. */
    enum Unsaved {
        SAVE,
        FORGET,
        STAY
    }
}
