package stillstand.view;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.concurrent.Executor;
import java.util.function.UnaryOperator;
import javafx.beans.property.ObjectProperty;
import javafx.beans.property.ReadOnlyObjectProperty;
import javafx.beans.property.ReadOnlyObjectWrapper;
import javafx.beans.property.SimpleObjectProperty;
import javafx.beans.value.ChangeListener;
import javafx.beans.value.ObservableValue;
import javafx.collections.FXCollections;
import javafx.collections.ObservableList;
import stillstand.files.ResultsJson;
import stillstand.files.SettingsText;
import stillstand.files.Sheet;
import stillstand.files.StudyDraft;
import stillstand.files.StudyJson;
import stillstand.files.StudyStore;
import stillstand.files.StudyTemplate;
import stillstand.ledger.InputProblem;
import stillstand.ledger.Loaded;
import stillstand.sensitivity.MeasurementPlan;
import stillstand.study.Library;
import stillstand.study.Study;
import stillstand.study.StudyResult;
import stillstand.uncertainty.Digits;

/** The whole window: which study is open, what the areas show, what has to be said, and all that the menus do. */
final class WindowModel {
    private static final String LEVERAGE = "leverage";
    /** Written out, so that whoever reads the study sees what is supposed. */
    private static final String USUAL = "{\"date_1sigma_ka\": "
            + Digits.text(MeasurementPlan.DEFAULT.dateSigmaKa()) + ", \"survey_1sigma_m\": "
            + Digits.text(MeasurementPlan.DEFAULT.surveySigmaMetres()) + "}";

    private final StudyReader reader;
    private final RunModel run;
    private final WindowMemory memory;
    private final Executor background;
    private final Executor foreground;

    private final ReadOnlyObjectWrapper<Optional<StudyDocument>> document =
            new ReadOnlyObjectWrapper<>(Optional.empty());
    private final ReadOnlyObjectWrapper<Optional<EvidenceModel>> evidence =
            new ReadOnlyObjectWrapper<>(Optional.empty());
    private final ReadOnlyObjectWrapper<Shown> shown = new ReadOnlyObjectWrapper<>(Shown.NOTHING);
    private final ObjectProperty<Area> area = new SimpleObjectProperty<>(Area.EVIDENCE);
    private final ObservableList<Notice> notices = FXCollections.observableArrayList();
    private final ObservableList<Notice> readableNotices = FXCollections.unmodifiableObservableList(notices);
    private Optional<Study> lastGood = Optional.empty();
    private Optional<Path> passingCopy = Optional.empty();

    /** The areas of the window, in the order of the switch. */
    enum Area {
        EVIDENCE(1, "Evidence"),
        SEA_LEVEL(2, "Sea level"),
        STAIR(3, "Stair"),
        RATES(4, "Rates"),
        LEVERAGE(5, "Leverage"),
        SITES(6, "Sites"),
        RECORD(7, "Record");

        private final int number;
        private final String title;

        Area(int number, String title) {
            this.number = number;
            this.title = title;
        }

        /** Its place in the switch, and the number of its key. */
        int number() {
            return number;
        }

        String title() {
            return title;
        }
    }

    /**
     * Something the window says until it is answered or no longer true.
     *
     * @param about what it is about; a newer notice about the same replaces it
     * @param isTrouble whether something went wrong
     */
    record Notice(String about, boolean isTrouble, String sentence, List<Answer> answers) {
        Notice {
            answers = List.copyOf(answers);
        }
    }

    /** What may be done about a notice. */
    record Answer(String label, Runnable action) {}

    /**
     * An empty window.
     *
     * @param background for disk and check, one task after the other
     * @param foreground the window's own thread
     */
    WindowModel(StudyReader reader, RunModel run, WindowMemory memory, Executor background, Executor foreground) {
        this.reader = reader;
        this.run = run;
        this.memory = memory;
        this.background = background;
        this.foreground = foreground;
        run.resultProperty().addListener((source, before, after) -> refresh());
    }

    RunModel run() {
        return run;
    }

    WindowMemory memory() {
        return memory;
    }

    ReadOnlyObjectProperty<Optional<StudyDocument>> documentProperty() {
        return document.getReadOnlyProperty();
    }

    /** The evidence of the open study; it comes and goes with it. */
    ReadOnlyObjectProperty<Optional<EvidenceModel>> evidenceProperty() {
        return evidence.getReadOnlyProperty();
    }

    Optional<EvidenceModel> evidence() {
        return evidence.get();
    }

    Optional<StudyDocument> document() {
        return document.get();
    }

    /** What the areas of results show; the newest good study, also while a newer one has problems. */
    ReadOnlyObjectProperty<Shown> shownProperty() {
        return shown.getReadOnlyProperty();
    }

    ObjectProperty<Area> areaProperty() {
        return area;
    }

    ObservableList<Notice> notices() {
        return readableNotices;
    }

    /** Whether the study is an unkept copy that goes when the window does. */
    boolean isPassingCopy() {
        return passingCopy.isPresent();
    }

    /** Whether a study has edits that were never saved. */
    static boolean hasUnsaved(Path study) {
        return StudyStore.hasRecovery(study);
    }

    /** Opens a study; the one before it must have been closed. */
    void open(Path folder) {
        opening(() -> folder, false);
    }

    /** Opens the invented demo, in a copy that lasts as long as the window unless it is kept. */
    void openDemo() {
        opening(StudyTemplate::writePassingDemo, true);
    }

    /** Writes a study to start from into a folder, absent or empty, and opens it. */
    void openTemplate(Path folder) {
        background.execute(() -> {
            try {
                Optional<InputProblem> problem = StudyTemplate.write(folder);
                foreground.execute(() -> problem.ifPresentOrElse(
                        found -> say(new Notice("open", true, found.message(), List.of())), () -> open(folder)));
            } catch (IOException e) {
                sayLater("open", "Nothing was made: " + StudyDocument.reason(e));
            }
        });
    }

    /** Finds out where a study lies, on the way making it if need be. */
    @FunctionalInterface
    private interface Whereabouts {
        Path find() throws IOException;
    }

    private void opening(Whereabouts whereabouts, boolean isCopy) {
        background.execute(() -> {
            try {
                Path folder = whereabouts.find();
                Loaded<StudyStore> opened = StudyStore.open(folder);
                if (opened.value().isEmpty()) {
                    sayLater("open", opened.problems().get(0).message());
                    return;
                }
                StudyStore store = opened.value().get();
                StudyDraft read = store.read();
                Optional<StudyDraft> recovery = store.recovery();
                Optional<Loaded<StudyResult>> earlier = earlier(store.results());
                Library library = reader.libraryOf(folder);
                foreground.execute(() -> become(store, read, recovery, earlier, library, isCopy));
            } catch (IOException e) {
                sayLater("open", "The study cannot be opened: " + StudyDocument.reason(e));
            }
        });
    }

    /** Results of an earlier run, where there are any. */
    private static Optional<Loaded<StudyResult>> earlier(Path results) throws IOException {
        Path file = results.resolve(ResultsJson.FILE);
        return Files.isRegularFile(file)
                ? Optional.of(ResultsJson.read(new String(Files.readAllBytes(file), StandardCharsets.UTF_8)))
                : Optional.empty();
    }

    private void become(
            StudyStore store,
            StudyDraft read,
            Optional<StudyDraft> recovery,
            Optional<Loaded<StudyResult>> earlier,
            Library library,
            boolean isCopy) {
        notices.clear();
        lastGood = Optional.empty();
        passingCopy = isCopy ? Optional.of(store.folder()) : Optional.empty();
        StudyDocument opened = new StudyDocument(store, read, reader, background, foreground, recovery.isPresent());
        evidence.set(Optional.of(new EvidenceModel(opened, new SettingsModel(opened, library))));
        document.set(Optional.of(opened));
        run.show(earlier.flatMap(Loaded::value));
        earlier.filter(loaded -> loaded.value().isEmpty())
                .ifPresent(loaded -> say(new Notice(
                        "results",
                        false,
                        "Earlier results cannot be shown ("
                                + loaded.problems().get(0).message() + "). The next run replaces them.",
                        List.of())));
        opened.checkedProperty().addListener((source, before, after) -> refresh());
        opened.changedOnDiskProperty().addListener((source, before, after) -> sayChanged(opened, after));
        opened.troubleProperty()
                .addListener((source, before, after) -> after.ifPresentOrElse(
                        sentence -> say(new Notice("disk", true, sentence, List.of())), () -> unsay("disk")));
        opened.whyReadOnly()
                .ifPresent(why -> say(new Notice(
                        "read-only",
                        false,
                        "Open for reading alone: " + why + ". Keep a copy to edit it.",
                        List.of())));
        recovery.ifPresent(edits -> sayRecovery(opened, edits));
        if (isCopy) {
            say(new Notice(
                    "copy",
                    false,
                    "Everything here is invented. This copy goes when the window does, unless you keep it.",
                    List.of()));
        } else {
            memory.keepRecent(store.folder());
        }
        memory.keepOpen(Optional.of(store.folder()));
        area.set(Area.EVIDENCE);
        refresh();
    }

    private void sayRecovery(StudyDocument opened, StudyDraft edits) {
        say(new Notice(
                "recovery",
                false,
                "Stillstand ended before your last edits were saved. They are still there.",
                List.of(
                        new Answer("Take them back", () -> {
                            opened.edit("taking back unsaved edits", draft -> edits);
                            opened.startKeeping();
                            unsay("recovery");
                        }),
                        new Answer("Forget them", () -> {
                            opened.startKeeping();
                            unsay("recovery");
                        }))));
    }

    private void sayChanged(StudyDocument opened, List<String> files) {
        if (files.isEmpty()) {
            unsay("changed");
            return;
        }
        say(new Notice(
                "changed",
                true,
                String.join(", ", files) + (files.size() == 1 ? " was" : " were")
                        + " changed on disk by another program. Nothing is saved until you choose.",
                List.of(new Answer("Reload", opened::reload), new Answer("Keep mine", opened::keepMine))));
    }

    private void sayLater(String about, String sentence) {
        foreground.execute(() -> say(new Notice(about, true, sentence, List.of())));
    }

    private void say(Notice notice) {
        notices.removeIf(each -> each.about().equals(notice.about()));
        notices.add(notice);
    }

    private void unsay(String about) {
        notices.removeIf(each -> each.about().equals(about));
    }

    /** Takes a notice away. */
    void dismiss(Notice notice) {
        notices.remove(notice);
    }

    private void refresh() {
        Optional<StudyDocument.Checked> checked = document.get().map(StudyDocument::checked);
        Optional<Study> now = checked.flatMap(StudyDocument.Checked::study);
        lastGood = now.or(() -> lastGood);
        Optional<StudyResult> result = run.resultProperty().get();
        boolean isKnown = checked.map(StudyDocument.Checked::isKnown).orElse(false);
        boolean isSame = now.isPresent()
                && result.isPresent()
                && result.get().provenance().inputs().equals(now.get().inputs());
        shown.set(new Shown(lastGood, result, isKnown && result.isPresent() && !isSame));
    }

    /** Whether a run can be started: a study without problems, and none under way. */
    boolean canRun() {
        return document.get()
                .filter(opened -> opened.checked().study().isPresent()
                        && opened.checked().draft().equals(opened.draft()))
                .isPresent();
    }

    /** Saves the study, then runs it, so that results on disk are always those of the files beside them. */
    void startRun() {
        if (!canRun() || run.state().isBusy()) {
            return;
        }
        StudyDocument opened = document.get().orElseThrow();
        Study study = opened.checked().study().orElseThrow();
        if (opened.isReadOnly()) {
            run.start(study, Optional.empty());
        } else if (opened.isEdited()) {
            opened.save(() -> run.start(study, Optional.of(opened.results())));
        } else {
            run.start(study, Optional.of(opened.results()));
        }
    }

    /** Asks every run from now on what to measure next, or no longer. */
    void askLeverage(boolean every) {
        edit(
                every ? "asking what to measure next" : "no longer asking what to measure next",
                draft -> draft.text(StudyJson.NAME)
                        .flatMap(SettingsText::parse)
                        .filter(settings -> settings.value(LEVERAGE).isPresent() != every)
                        .map(settings ->
                                draft.withText(StudyJson.NAME, settings.withValue(LEVERAGE, every ? USUAL : "")))
                        .orElse(draft));
    }

    /** Asks what to measure next, and runs as soon as the study has been checked. */
    void askLeverageAndRun() {
        document.get().ifPresent(opened -> {
            askLeverage(true);
            whenChecked(opened, this::startRun);
        });
    }

    private static void whenChecked(StudyDocument opened, Runnable then) {
        if (opened.checked().draft().equals(opened.draft())) {
            then.run();
            return;
        }
        opened.checkedProperty().addListener(new ChangeListener<>() {
            @Override
            public void changed(
                    ObservableValue<? extends StudyDocument.Checked> source,
                    StudyDocument.Checked before,
                    StudyDocument.Checked after) {
                if (after.draft().equals(opened.draft())) {
                    opened.checkedProperty().removeListener(this);
                    then.run();
                }
            }
        });
    }

    void save() {
        document.get().filter(opened -> !opened.isReadOnly()).ifPresent(opened -> opened.save(() -> {}));
    }

    /** Keeps the study in another folder, absent or empty, and goes on there. */
    void saveInto(Path folder) {
        document.get()
                .ifPresent(opened -> opened.copyTo(folder, () -> {
                    close(true);
                    open(folder);
                }));
    }

    /** Writes the {@code highstand} cell of a level, as the Stair asks. */
    void pair(PairingEdit wanted) {
        edit(
                "pairing " + wanted.level(),
                draft -> draft.sheet("levels.csv")
                        .map(levels -> draft.with(paired(levels, wanted)))
                        .orElse(draft));
    }

    private static Sheet paired(Sheet given, PairingEdit wanted) {
        Sheet levels = given.column("highstand").isPresent() ? given : given.withColumn("highstand");
        int column = levels.column("highstand").orElseThrow();
        int site = levels.column("site").orElse(-1);
        int level = levels.column("level").orElse(-1);
        for (int row = 0; row < levels.rowCount() && site >= 0 && level >= 0; row++) {
            if (levels.cell(row, site).equals(wanted.site())
                    && levels.cell(row, level).equals(wanted.level())) {
                return levels.withCells(row, column, List.of(List.of(wanted.highstand())));
            }
        }
        return given;
    }

    /** Writes the curves and overrides that the Sea level area asks for; weights of curves that stay are kept. */
    void chooseSeaLevel(SeaLevelEdit wanted) {
        edit("choosing sea level", draft -> {
            Optional<SettingsText> now = draft.text(StudyJson.NAME).flatMap(SettingsText::parse);
            return now.map(settings -> {
                        Map<String, String> before = SettingsModel.curves(settings);
                        Map<String, String> curves = new LinkedHashMap<>();
                        wanted.curves().forEach(id -> curves.put(id, before.getOrDefault(id, "")));
                        String chosen = settings.withCurves(curves);
                        String overridden = SettingsText.parse(chosen)
                                .orElseThrow()
                                .withWords(
                                        "sea_level.highstands.overrides",
                                        wanted.overrides().orElse("none"));
                        return draft.withText(StudyJson.NAME, overridden);
                    })
                    .orElse(draft);
        });
    }

    private void edit(String what, UnaryOperator<StudyDraft> change) {
        document.get().ifPresent(opened -> opened.edit(what, change));
    }

    /** Closes the study; unsaved edits are lost. A run that is under way is cancelled. */
    void close(boolean dropsEdits) {
        run.cancel();
        document.get().ifPresent(opened -> opened.close(dropsEdits));
        passingCopy.ifPresent(folder -> background.execute(() -> remove(folder)));
        passingCopy = Optional.empty();
        memory.keepOpen(Optional.empty());
        document.set(Optional.empty());
        evidence.set(Optional.empty());
        lastGood = Optional.empty();
        notices.clear();
        run.show(Optional.empty());
        refresh();
    }

    private static void remove(Path copy) {
        try {
            StudyTemplate.removePassing(copy);
        } catch (IOException e) {
            return; // the system clears its place for passing files some day
        }
    }
}
