package stillstand.view;

import java.nio.file.Path;
import java.util.Optional;
import stillstand.view.Questions.Unsaved;

/** What menus and buttons do: asks where it must, then tells the model. */
final class WindowActions {
    private final WindowModel model;
    private final Questions questions;

    WindowActions(WindowModel model, Questions questions) {
        this.model = model;
        this.questions = questions;
    }

    void openDemo() {
        leaving(model::openDemo);
    }

    void openTemplate() {
        questions
                .folderForNew("Where the new study is to be")
                .ifPresent(folder -> leaving(() -> model.openTemplate(folder)));
    }

    void open() {
        questions.studyToOpen().ifPresent(this::open);
    }

    void open(Path study) {
        leaving(() -> model.open(study));
    }

    void keepCopy() {
        questions.folderForNew("Where the study is to be kept").ifPresent(model::saveInto);
    }

    void closeStudy() {
        leaving(() -> {});
    }

    /** Leaves the open study, if there is one and the user agrees, and goes on. */
    void leaving(Runnable next) {
        Optional<StudyDocument> document = model.document();
        if (document.isEmpty() || !document.get().isEdited() || model.isPassingCopy()) {
            leave(next);
            return;
        }
        StudyDocument open = document.get();
        Unsaved answer = questions.unsaved(String.valueOf(open.folder().getFileName()));
        if (answer == Unsaved.SAVE) {
            open.save(() -> leave(next));
        } else if (answer == Unsaved.FORGET) {
            leave(next);
        }
    }

    private void leave(Runnable next) {
        if (model.document().isPresent()) {
            model.close(true);
        }
        next.run();
    }
}
