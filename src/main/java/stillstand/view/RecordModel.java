package stillstand.view;

import java.io.IOException;
import java.nio.file.FileSystemException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.concurrent.Executor;
import java.util.function.Supplier;
import java.util.stream.Collectors;
import javafx.beans.property.ReadOnlyBooleanProperty;
import javafx.beans.property.ReadOnlyBooleanWrapper;
import javafx.beans.property.ReadOnlyStringProperty;
import javafx.beans.property.ReadOnlyStringWrapper;
import javafx.collections.FXCollections;
import javafx.collections.ObservableList;
import stillstand.figure.Figure;
import stillstand.figure.FigureFormat;
import stillstand.figure.Figures;
import stillstand.figure.PageWidth;
import stillstand.files.FigureFiles;
import stillstand.files.ResultFiles;
import stillstand.files.ResultsFolder;
import stillstand.ledger.Assumption;
import stillstand.ledger.InputProblem;
import stillstand.ledger.InputWarning;
import stillstand.ledger.Loaded;
import stillstand.report.Wording;
import stillstand.study.Provenance;
import stillstand.study.Study;
import stillstand.study.StudyResult;

/** What a result rests on, and how to take it away: ledger, warnings, failures, provenance, figures and the results folder. */
public final class RecordModel {
    private final Executor background;
    private final Executor onInterface;
    private final ObservableList<Assumption> ledger = FXCollections.observableArrayList();
    private final ObservableList<Figure> figures = FXCollections.observableArrayList();
    private final ReadOnlyStringWrapper message = new ReadOnlyStringWrapper("");
    private final ReadOnlyBooleanWrapper isExporting = new ReadOnlyBooleanWrapper(false);
    private Shown shown = Shown.NOTHING;
    private String wanted = "";

    /**
     * A record of nothing yet.
     *
     * @param background where files are written
     * @param onInterface brings back what came of it
     */
    public RecordModel(Executor background, Executor onInterface) {
        this.background = background;
        this.onInterface = onInterface;
    }

    /** How figures are to be written. */
    public record FigureWish(
            List<Figure> figures, List<FigureFormat> formats, PageWidth width, boolean titled, int dpi) {
        public FigureWish {
            figures = List.copyOf(figures);
            formats = List.copyOf(formats);
        }
    }

    /** Shows a result, or nothing. */
    public void show(Shown now) {
        shown = now;
        figures.setAll(now.result().map(result -> Figures.of(result).figures()).orElse(List.of()));
        search(wanted);
        message.set("");
    }

    /** Keeps the lines of the ledger that hold every word, in any case. */
    public void search(String words) {
        wanted = words;
        List<String> parts = List.of(words.toLowerCase(Locale.ROOT).strip().split("\\s+", -1));
        ledger.setAll(lines().stream()
                .filter(line -> {
                    String all = String.join(" ", line.assumption(), line.value(), line.source(), line.appliesTo())
                            .toLowerCase(Locale.ROOT);
                    return parts.stream().allMatch(all::contains);
                })
                .toList());
    }

    /** Before a run, what the input alone brought with it. */
    private List<Assumption> lines() {
        return shown.result()
                .map(StudyResult::ledger)
                .or(() -> shown.study().map(Study::ledger))
                .orElse(List.of());
    }

    /** {@code 12 of 63 lines}. */
    public String found() {
        int all = lines().size();
        return ledger.size() == all ? all + " lines" : ledger.size() + " of " + all + " lines";
    }

    /** What was odd in the input, with its places. */
    public List<String> warnings() {
        return shown
                .result()
                .map(StudyResult::warnings)
                .or(() -> shown.study().map(Study::warnings))
                .orElse(List.of())
                .stream()
                .map(InputWarning::placed)
                .toList();
    }

    /** Sites that could not be done, and why. */
    public List<String> failures() {
        return shown.result().stream()
                .flatMap(result -> result.failures().stream())
                .map(failure -> failure.site() + ": " + failure.reason())
                .toList();
    }

    /** How to get the result again. */
    public List<Fact> provenance() {
        List<Fact> facts = new ArrayList<>();
        shown.result().map(StudyResult::provenance).ifPresent(of -> {
            facts.add(new Fact("Stillstand", of.version()));
            facts.add(new Fact("Seed", String.valueOf(of.seed())));
            facts.add(new Fact("Generator", of.generator()));
            of.started().ifPresent(at -> facts.add(new Fact("Started", at)));
            of.seconds().ifPresent(took -> facts.add(new Fact("Took", String.format(Locale.ROOT, "%.1f s", took))));
            of.inputs().forEach(input -> facts.add(new Fact(input.file(), "SHA-256 " + input.sha256())));
        });
        return facts;
    }

    /** The whole provenance as text, to paste. */
    public String provenanceText() {
        return provenance().stream()
                .map(fact -> fact.label() + ": " + fact.text())
                .collect(Collectors.joining("\n"));
    }

    /** The caution every account of a result begins with. */
    public static String caution() {
        return Wording.CAUTION;
    }

    /** Writes figures into a folder, in the background. */
    public void exportFigures(FigureWish wish, Path folder) {
        if (wish.figures().isEmpty() || wish.formats().isEmpty()) {
            message.set("Choose at least one figure and one format.");
            return;
        }
        FigureFiles writer = new FigureFiles(wish.formats(), wish.width(), wish.titled(), wish.dpi());
        export(() -> told(
                writer.write(wish.figures(), folder, 1),
                (wish.figures().size() == 1 ? "1 figure" : wish.figures().size() + " figures") + " written to "
                        + folder + " as "
                        + wish.formats().stream().map(FigureFormat::id).collect(Collectors.joining(", "))
                        + "."));
    }

    /** Writes the results folder, whole or not at all, in the background. */
    public void exportResults(Path folder) {
        Optional<Study> study = shown.study();
        Optional<StudyResult> result = shown.result();
        if (shown.stale()) {
            message.set(
                    "The study has changed since the run: run it again, then export, so that inputs and results agree.");
        } else if (study.isEmpty() || result.isEmpty()) {
            message.set("There is nothing to export yet: run the study.");
        } else {
            export(() -> results(folder, study.get(), result.get()));
        }
    }

    private static String results(Path folder, Study study, StudyResult result) throws IOException {
        Loaded<ResultsFolder> opened = ResultsFolder.open(folder);
        if (opened.value().isEmpty()) {
            return opened.problems().stream().map(InputProblem::message).collect(Collectors.joining("; "));
        }
        List<FigureFiles.Fault> faults = new ArrayList<>();
        try (ResultsFolder results = opened.value().get()) {
            results.replace(fresh -> faults.addAll(ResultFiles.write(fresh, study, result, FigureFiles.OF_RUN, 1)));
        }
        return told(faults, "Results written to " + folder + ".");
    }

    private static String told(List<FigureFiles.Fault> faults, String done) {
        return faults.isEmpty()
                ? done
                : faults.stream().map(FigureFiles.Fault::sentence).collect(Collectors.joining(" "));
    }

    /** Writes and says what came of it. */
    @FunctionalInterface
    private interface Writing {
        String write() throws IOException;
    }

    private void export(Writing writing) {
        if (isExporting.get()) {
            return;
        }
        isExporting.set(true);
        message.set("Writing …");
        background.execute(() -> {
            String said = sentence(writing);
            onInterface.execute(() -> {
                isExporting.set(false);
                message.set(said);
            });
        });
    }

    private static String sentence(Writing writing) {
        try {
            return writing.write();
        } catch (FileSystemException e) {
            return "Not written: " + e.getFile() + ": " + reason(e::getReason, e);
        } catch (IOException e) {
            return "Not written: " + e.getMessage();
        }
    }

    private static String reason(Supplier<String> reason, IOException e) {
        String said = reason.get();
        return said == null ? e.getClass().getSimpleName() : said;
    }

    /** One sentence on the figures. */
    public String figureStatus() {
        return shown.result().isEmpty()
                ? "No figures yet: run the study."
                : figures.size() + " figures of the last run.";
    }

    /** Whether what is shown is older than the study. */
    public boolean isStale() {
        return shown.stale();
    }

    /** Lines of the ledger that were searched for. */
    public ObservableList<Assumption> ledger() {
        return ledger;
    }

    /** The figures there are. */
    public ObservableList<Figure> figures() {
        return figures;
    }

    /** What came of the last export; blank before one. */
    public ReadOnlyStringProperty messageProperty() {
        return message.getReadOnlyProperty();
    }

    /** Whether files are being written. */
    public ReadOnlyBooleanProperty exportingProperty() {
        return isExporting.getReadOnlyProperty();
    }

    /** Formats, widths: what there is to choose from. */
    static List<PageWidth> widths() {
        return List.of(PageWidth.values());
    }

    /** Version, for whoever asks. */
    static String version() {
        return Provenance.CURRENT_VERSION;
    }
}
