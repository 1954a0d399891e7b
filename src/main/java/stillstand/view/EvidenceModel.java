package stillstand.view;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import javafx.beans.property.ObjectProperty;
import javafx.beans.property.ReadOnlyObjectProperty;
import javafx.beans.property.ReadOnlyObjectWrapper;
import javafx.beans.property.SimpleObjectProperty;
import stillstand.files.Sheet;
import stillstand.files.StudyDraft;
import stillstand.files.StudyJson;
import stillstand.ledger.InputProblem;
import stillstand.ledger.InputWarning;
import stillstand.study.TableColumns;
import stillstand.view.StudyDocument.Checked;

/** The evidence of a study: its settings and tables, and the list of everything wrong or odd in them. */
final class EvidenceModel {
    /** The parts there may be, in order. */
    static final List<String> PARTS = StudyDraft.NAMES;

    /** Parts that are offered only where a study has them. */
    private static final List<String> SELDOM = List.of("points.csv");

    private final StudyDocument document;
    private final SettingsModel settings;
    private final Map<String, GridModel> grids = new HashMap<>();
    private final ObjectProperty<String> part = new SimpleObjectProperty<>("levels.csv");
    private final ReadOnlyObjectWrapper<List<Finding>> findings = new ReadOnlyObjectWrapper<>(List.of());
    private final ReadOnlyObjectWrapper<Optional<String>> wantedKey = new ReadOnlyObjectWrapper<>(Optional.empty());
    private int lastVisited = -1;

    /**
     * A line of the list.
     *
     * @param isProblem whether it stops a run
     * @param file it stands in
     * @param line from 1; 0 where it belongs to the whole file
     * @param column from 1; 0 where it belongs to the line
     * @param key path in {@code study.json}; "" elsewhere
     * @param sentence as the command line prints it
     */
    record Finding(boolean isProblem, String file, long line, int column, String key, String sentence) {
        static Finding of(InputProblem problem) {
            return new Finding(
                    true, problem.file(), problem.line(), problem.column(), problem.header(), problem.message());
        }

        static Finding of(InputWarning warning) {
            return new Finding(false, warning.file(), warning.line(), warning.column(), "", warning.placed());
        }
    }

    EvidenceModel(StudyDocument document, SettingsModel settings) {
        this.document = document;
        this.settings = settings;
        list(document.checked());
        document.checkedProperty().addListener((source, before, after) -> list(after));
    }

    private void list(Checked checked) {
        List<Finding> all = new ArrayList<>();
        checked.problems().forEach(problem -> all.add(Finding.of(problem)));
        checked.warnings().forEach(warning -> all.add(Finding.of(warning)));
        findings.set(List.copyOf(all));
    }

    StudyDocument document() {
        return document;
    }

    SettingsModel settings() {
        return settings;
    }

    /** The part that is looked at, by its file name. */
    ObjectProperty<String> partProperty() {
        return part;
    }

    /** Problems first, then warnings, each in reading order. */
    ReadOnlyObjectProperty<List<Finding>> findingsProperty() {
        return findings.getReadOnlyProperty();
    }

    List<Finding> findings() {
        return findings.get();
    }

    /** The key of the settings that a jump leads to. */
    ReadOnlyObjectProperty<Optional<String>> wantedKeyProperty() {
        return wantedKey.getReadOnlyProperty();
    }

    long problemCount(String file) {
        return findings.get().stream()
                .filter(finding -> finding.isProblem && finding.file.equals(file))
                .count();
    }

    /** The grid of a table; empty where the study lacks it or it cannot be taken apart. */
    Optional<GridModel> grid(String table) {
        if (document.draft().sheet(table).isEmpty()) {
            grids.remove(table);
            return Optional.empty();
        }
        return Optional.of(grids.computeIfAbsent(table, name -> new GridModel(document, name)));
    }

    /** Whether a part is worth a button. */
    boolean isOffered(String part) {
        return !SELDOM.contains(part) || hasText(part);
    }

    /** Whether the study has a file of this name that can be read as text. */
    boolean hasText(String name) {
        return document.draft().text(name).isPresent();
    }

    String text(String name) {
        return document.draft().text(name).orElse("");
    }

    /** Writes a file that is too broken for a grid or a form. */
    void writeText(String name, String text) {
        document.edit("writing " + name, draft -> draft.withText(name, text));
    }

    /** Gives the study a table it lacks, with the columns that table cannot do without. */
    void addTable(String name) {
        List<String> header = new ArrayList<>(TableColumns.required(name));
        if (name.equals("levels.csv")) {
            header.add("elevation_1sigma_m");
        } else if (name.equals("samples.csv")) {
            header.addAll(List.of("level", "age_ka", "age_2sigma_ka"));
        } else if (name.equals("gia.csv")) {
            header = new ArrayList<>(List.of("site", "highstand", "offset_m", "offset_1sigma_m"));
        }
        Sheet sheet = Sheet.of(name, header);
        document.edit("adding " + name, draft -> draft.with(sheet));
    }

    /** Looks at the place of a finding; nothing happens where the window cannot show that file. */
    void goTo(Finding finding) {
        if (!PARTS.contains(finding.file)) {
            return;
        }
        part.set(finding.file);
        grid(finding.file).ifPresent(grid -> {
            int row = grid.marksProperty().get().row(finding.line);
            grid.choose(Math.max(0, row), Math.max(0, finding.column - 1));
        });
        if (finding.file.equals(StudyJson.NAME)) {
            wantedKey.set(Optional.empty());
            wantedKey.set(Optional.of(finding.key));
        }
    }

    /** The finding after the caret's, going round; empty where there is none at all. */
    Optional<Finding> next(boolean isBackwards) {
        List<Finding> all = findings.get();
        if (all.isEmpty()) {
            return Optional.empty();
        }
        int here = lastVisited;
        lastVisited = Math.floorMod(here < 0 && isBackwards ? -1 : here + (isBackwards ? -1 : 1), all.size());
        return Optional.of(all.get(lastVisited));
    }
}
