package stillstand.study;

import java.util.List;
import java.util.Map;
import java.util.Optional;
import stillstand.ledger.Assumption;
import stillstand.ledger.InputProblem;
import stillstand.ledger.InputWarning;
import stillstand.uncertainty.Uncertain;

/**
 * A study as it was read, before any check: what a folder or the grids of the window hold. A part is absent where it is not
 * there or could not be read; the problems say which.
 *
 * @param settings of the study
 * @param sites table of sites
 * @param levels table of levels
 * @param samples table of dated samples; absent where a study has none
 * @param gia table of local minus global sea level; absent where a study has none
 * @param points table of points measured on terraces; absent where a study has none
 * @param ages calibrated ages by name, ka before 1950
 * @param problems met in reading
 * @param warnings met in reading
 * @param ledger what reading supposed
 * @param inputs the files that were read
 */
public record StudyInput(
        Optional<StatedSettings> settings,
        Optional<Table> sites,
        Optional<Table> levels,
        Optional<Table> samples,
        Optional<Table> gia,
        Optional<Table> points,
        Map<String, Uncertain> ages,
        List<InputProblem> problems,
        List<InputWarning> warnings,
        List<Assumption> ledger,
        List<InputFile> inputs) {
    public StudyInput {
        ages = Map.copyOf(ages);
        problems = List.copyOf(problems);
        warnings = List.copyOf(warnings);
        ledger = List.copyOf(ledger);
        inputs = List.copyOf(inputs);
    }

    /** Input without points of terraces. */
    public StudyInput(
            Optional<StatedSettings> settings,
            Optional<Table> sites,
            Optional<Table> levels,
            Optional<Table> samples,
            Optional<Table> gia,
            Map<String, Uncertain> ages,
            List<InputProblem> problems,
            List<InputWarning> warnings,
            List<Assumption> ledger,
            List<InputFile> inputs) {
        this(settings, sites, levels, samples, gia, Optional.empty(), ages, problems, warnings, ledger, inputs);
    }

    /** The same input with a table of points of terraces. */
    public StudyInput withPoints(Table table) {
        return new StudyInput(
                settings, sites, levels, samples, gia, Optional.of(table), ages, problems, warnings, ledger, inputs);
    }

    /** The same input with a table of local minus global sea level. */
    public StudyInput withGia(Table table) {
        return new StudyInput(
                settings, sites, levels, samples, Optional.of(table), points, ages, problems, warnings, ledger, inputs);
    }

    /** Input made in memory, with no file behind it and nothing wrong so far. */
    public static StudyInput of(StatedSettings settings, Table sites, Table levels, Optional<Table> samples) {
        return new StudyInput(
                Optional.of(settings),
                Optional.of(sites),
                Optional.of(levels),
                samples,
                Optional.empty(),
                Map.of(),
                List.of(),
                List.of(),
                List.of(),
                List.of());
    }
}
