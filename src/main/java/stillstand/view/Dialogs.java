package stillstand.view;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Optional;
import java.util.stream.Stream;
import javafx.scene.control.Alert;
import javafx.scene.control.ButtonBar.ButtonData;
import javafx.scene.control.ButtonType;
import javafx.stage.DirectoryChooser;
import javafx.stage.Window;

/** Asks the user with dialogs of the system. */
final class Dialogs implements Questions {
    private static final String NEW_FOLDER = "stillstand-study";

    private final Window owner;

    Dialogs(Window owner) {
        this.owner = owner;
    }

    @Override
    public Optional<Path> studyToOpen() {
        return folder("Open the folder of a study");
    }

    /** The folder chosen where it is empty, else a new one in it. */
    @Override
    public Optional<Path> folderForNew(String title) {
        return folder(title).map(Dialogs::freeIn);
    }

    @Override
    public Optional<Path> folderToWrite() {
        return folder("Where to write");
    }

    private static Path freeIn(Path chosen) {
        try (Stream<Path> entries = Files.list(chosen)) {
            if (entries.findAny().isEmpty()) {
                return chosen;
            }
        } catch (IOException e) {
            return chosen; // whoever writes there finds out why not
        }
        Path free = chosen.resolve(NEW_FOLDER);
        for (int number = 2; Files.exists(free); number++) {
            free = chosen.resolve(NEW_FOLDER + "-" + number);
        }
        return free;
    }

    private Optional<Path> folder(String title) {
        DirectoryChooser chooser = new DirectoryChooser();
        chooser.setTitle(title);
        return Optional.ofNullable(chooser.showDialog(owner)).map(chosen -> chosen.toPath());
    }

    @Override
    public Unsaved unsaved(String title) {
        ButtonType save = new ButtonType("Save", ButtonData.YES);
        ButtonType forget = new ButtonType("Forget the edits", ButtonData.NO);
        ButtonType stay = new ButtonType("Stay", ButtonData.CANCEL_CLOSE);
        Alert alert = new Alert(Alert.AlertType.CONFIRMATION, "", save, forget, stay);
        alert.initOwner(owner);
        alert.setTitle("Unsaved edits");
        alert.setHeaderText(title + " has edits that are not saved.");
        ButtonType answer = alert.showAndWait().orElse(stay);
        return answer == save ? Unsaved.SAVE : answer == forget ? Unsaved.FORGET : Unsaved.STAY;
    }
}
