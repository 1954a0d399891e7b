package stillstand.view;

import java.io.IOException;
import java.nio.file.FileSystemException;
import java.nio.file.Path;
import java.util.ArrayDeque;
import java.util.Deque;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.Executor;
import java.util.concurrent.atomic.AtomicLong;
import java.util.function.UnaryOperator;
import javafx.beans.property.ReadOnlyBooleanProperty;
import javafx.beans.property.ReadOnlyBooleanWrapper;
import javafx.beans.property.ReadOnlyObjectProperty;
import javafx.beans.property.ReadOnlyObjectWrapper;
import stillstand.files.StudyDraft;
import stillstand.files.StudyStore;
import stillstand.ledger.InputProblem;
import stillstand.ledger.InputWarning;
import stillstand.ledger.Loaded;
import stillstand.study.Study;

/**
 * A study that is open in the window: its files as they are edited, every edit so far, and what the check says of them. All
 * its methods belong to one thread (the window's); disk and check are left to another, which hands back what it found.
 */
final class StudyDocument {
    private final StudyStore store;
    private final StudyReader reader;
    private final Executor background;
    private final Executor foreground;

    private final ReadOnlyObjectWrapper<StudyDraft> draft;
    private final ReadOnlyObjectWrapper<Checked> checked;
    private final ReadOnlyBooleanWrapper edited = new ReadOnlyBooleanWrapper();
    private final ReadOnlyObjectWrapper<Optional<String>> undoable = new ReadOnlyObjectWrapper<>(Optional.empty());
    private final ReadOnlyObjectWrapper<Optional<String>> redoable = new ReadOnlyObjectWrapper<>(Optional.empty());
    private final ReadOnlyObjectWrapper<List<String>> changedOnDisk = new ReadOnlyObjectWrapper<>(List.of());
    private final ReadOnlyObjectWrapper<Optional<String>> trouble = new ReadOnlyObjectWrapper<>(Optional.empty());

    private final Deque<Step> done = new ArrayDeque<>();
    private final Deque<Step> undone = new ArrayDeque<>();
    private StudyDraft saved;
    private volatile boolean keepsEdits;
    private final AtomicLong revision = new AtomicLong();

    /**
     * What the check said.
     *
     * @param draft that was checked
     * @param study absent where there are problems, and before the first check
     * @param isKnown false before the first check
     */
    record Checked(
            StudyDraft draft,
            Optional<Study> study,
            List<InputProblem> problems,
            List<InputWarning> warnings,
            boolean isKnown) {}

    /** An edit, and the draft before it (done) or after it (undone). */
    private record Step(String what, StudyDraft draft) {}

    /**
     * A study just read.
     *
     * @param read what the store holds
     * @param background for disk and check, one task after the other
     * @param foreground for everything else
     * @param isRecoveryOpen whether edits of an earlier window still wait beside the study, not to be written over
     */
    StudyDocument(
            StudyStore store,
            StudyDraft read,
            StudyReader reader,
            Executor background,
            Executor foreground,
            boolean isRecoveryOpen) {
        this.store = store;
        this.reader = reader;
        this.background = background;
        this.foreground = foreground;
        this.keepsEdits = !isRecoveryOpen;
        this.saved = read;
        this.draft = new ReadOnlyObjectWrapper<>(read);
        this.checked = new ReadOnlyObjectWrapper<>(new Checked(read, Optional.empty(), List.of(), List.of(), false));
        check();
    }

    ReadOnlyObjectProperty<StudyDraft> draftProperty() {
        return draft.getReadOnlyProperty();
    }

    StudyDraft draft() {
        return draft.get();
    }

    /** The newest that the check said, which may be of an earlier draft. */
    ReadOnlyObjectProperty<Checked> checkedProperty() {
        return checked.getReadOnlyProperty();
    }

    Checked checked() {
        return checked.get();
    }

    /** Whether something is not saved. */
    ReadOnlyBooleanProperty editedProperty() {
        return edited.getReadOnlyProperty();
    }

    boolean isEdited() {
        return edited.get();
    }

    /** What an undo would take back. */
    ReadOnlyObjectProperty<Optional<String>> undoableProperty() {
        return undoable.getReadOnlyProperty();
    }

    /** What a redo would do again. */
    ReadOnlyObjectProperty<Optional<String>> redoableProperty() {
        return redoable.getReadOnlyProperty();
    }

    /** Files that somebody else changed since they were read. */
    ReadOnlyObjectProperty<List<String>> changedOnDiskProperty() {
        return changedOnDisk.getReadOnlyProperty();
    }

    /** Why the last thing asked of the disk could not be done. */
    ReadOnlyObjectProperty<Optional<String>> troubleProperty() {
        return trouble.getReadOnlyProperty();
    }

    Path folder() {
        return store.folder();
    }

    Path results() {
        return store.results();
    }

    Optional<String> whyReadOnly() {
        return store.whyReadOnly();
    }

    boolean isReadOnly() {
        return store.whyReadOnly().isPresent();
    }

    /**
     * Edits the study; an edit that changes nothing is none.
     *
     * @param what it does, as the menu says after "Undo"
     */
    void edit(String what, UnaryOperator<StudyDraft> change) {
        StudyDraft before = draft.get();
        StudyDraft after = change.apply(before);
        if (isReadOnly() || after.equals(before)) {
            return;
        }
        done.push(new Step(what, before));
        undone.clear();
        become(after);
    }

    void undo() {
        move(done, undone);
    }

    void redo() {
        move(undone, done);
    }

    private void move(Deque<Step> from, Deque<Step> to) {
        if (!from.isEmpty()) {
            Step step = from.pop();
            to.push(new Step(step.what, draft.get()));
            become(step.draft);
        }
    }

    private void become(StudyDraft now) {
        revision.incrementAndGet();
        draft.set(now);
        edited.set(!now.texts().equals(saved.texts()));
        undoable.set(Optional.ofNullable(done.peek()).map(Step::what));
        redoable.set(Optional.ofNullable(undone.peek()).map(Step::what));
        check();
    }

    /** Checks the newest draft, and keeps it beside the study while it is not saved. */
    private void check() {
        StudyDraft asked = draft.get();
        long askedRevision = revision.get();
        boolean isUnsaved = edited.get();
        background.execute(() -> {
            if (askedRevision != revision.get()) {
                return; // a newer one waits behind this
            }
            Loaded<Study> loaded = reader.check(store.folder(), asked.texts());
            Checked found = new Checked(asked, loaded.value(), loaded.problems(), loaded.warnings(), true);
            foreground.execute(() -> {
                if (askedRevision == revision.get()) {
                    checked.set(found);
                }
            });
            keep(asked, isUnsaved);
        });
    }

    private void keep(StudyDraft asked, boolean isUnsaved) {
        if (isReadOnly() || !keepsEdits) {
            return;
        }
        try {
            if (isUnsaved) {
                store.writeRecovery(asked);
            } else {
                store.dropRecovery();
            }
        } catch (IOException e) {
            tell("Unsaved edits cannot be kept beside the study: " + reason(e));
        }
    }

    /** The edits of an earlier window are taken back or forgotten: from now on those of this one are kept in their place. */
    void startKeeping() {
        keepsEdits = true;
        check();
    }

    /** Saves, unless somebody else changed a file meanwhile: then {@link #changedOnDiskProperty} says so. */
    void save(Runnable whenSaved) {
        StudyDraft asked = draft.get();
        background.execute(() -> {
            try {
                List<String> changed = store.changedOnDisk();
                if (!changed.isEmpty()) {
                    foreground.execute(() -> changedOnDisk.set(changed));
                    return;
                }
                store.save(asked);
                foreground.execute(() -> {
                    saved = asked;
                    edited.set(!draft.get().texts().equals(asked.texts()));
                    trouble.set(Optional.empty());
                    whenSaved.run();
                });
            } catch (IOException e) {
                tell("Not saved: " + reason(e) + ". The files are as they were; your edits are still here.");
            }
        });
    }

    /** Looks whether somebody else changed a file. */
    void lookAtDisk() {
        background.execute(() -> {
            try {
                List<String> changed = store.changedOnDisk();
                foreground.execute(() -> {
                    if (!changed.equals(changedOnDisk.get())) {
                        changedOnDisk.set(changed);
                    }
                });
            } catch (IOException e) {
                tell("The study's folder cannot be read: " + reason(e));
            }
        });
    }

    /** Takes what the disk holds now; an edit like any other, which can be undone. */
    void reload() {
        background.execute(() -> {
            try {
                StudyDraft read = store.read();
                foreground.execute(() -> {
                    changedOnDisk.set(List.of());
                    saved = read;
                    done.push(new Step("reloading from disk", draft.get()));
                    undone.clear();
                    become(read);
                });
            } catch (IOException e) {
                tell("The study's folder cannot be read: " + reason(e));
            }
        });
    }

    /** Goes on with what the window holds, whatever the disk does; the next save writes over it. */
    void keepMine() {
        background.execute(() -> {
            try {
                StudyDraft onDisk = store.read();
                foreground.execute(() -> {
                    changedOnDisk.set(List.of());
                    saved = onDisk;
                    become(draft.get());
                });
            } catch (IOException e) {
                tell("The study's folder cannot be read: " + reason(e));
            }
        });
    }

    /** Copies the study as it is edited into another folder, and hands over the problem if it cannot. */
    void copyTo(Path folder, Runnable whenCopied) {
        StudyDraft asked = draft.get();
        background.execute(() -> {
            try {
                Optional<InputProblem> problem = store.copyTo(folder);
                if (problem.isPresent()) {
                    tell(problem.get().message());
                    return;
                }
                try (StudyStore copy = StudyStore.open(folder).value().orElseThrow()) {
                    copy.save(asked);
                }
                foreground.execute(whenCopied);
            } catch (IOException e) {
                tell("Not saved: " + reason(e) + ". Your edits are still here.");
            }
        });
    }

    /** Lets the folder go; unsaved edits are lost unless they are kept. */
    void close(boolean dropsEdits) {
        background.execute(() -> {
            try {
                if (dropsEdits && !isReadOnly()) {
                    store.dropRecovery();
                }
                store.close();
            } catch (IOException e) {
                tell("The study's folder cannot be written: " + reason(e));
            }
        });
    }

    private void tell(String sentence) {
        foreground.execute(() -> trouble.set(Optional.of(sentence)));
    }

    /** Why a file system refused, in its own words. */
    static String reason(IOException failure) {
        if (failure instanceof FileSystemException trouble) {
            String why = trouble.getReason();
            return trouble.getFile() + (why == null ? ": " + failure.getClass().getSimpleName() : ": " + why);
        }
        return String.valueOf(failure.getMessage());
    }
}
