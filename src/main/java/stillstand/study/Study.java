package stillstand.study;

import java.util.Collection;
import java.util.List;
import stillstand.ledger.Assumption;
import stillstand.ledger.InputWarning;

/**
 * A study that has passed every check: all a run needs.
 *
 * @param settings with every default filled in
 * @param sites in the order of {@code sites.csv}
 * @param library curves, tables and evidence, the study's own among them
 * @param warnings what is odd in the input, in reading order
 * @param ledger the defaults, exact values and dropped values the input brought with it
 * @param inputs the files it was read from, in the order of their names
 */
public record Study(
        StudySettings settings,
        List<SitePlan> sites,
        Library library,
        List<InputWarning> warnings,
        List<Assumption> ledger,
        List<InputFile> inputs) {
    public Study {
        sites = List.copyOf(sites);
        warnings = List.copyOf(warnings);
        ledger = List.copyOf(ledger);
        inputs = List.copyOf(inputs);
    }

    /** The same study with only the sites of these names, in its own order; unknown names are passed over. */
    public Study only(Collection<String> names) {
        List<SitePlan> kept = sites.stream()
                .filter(plan -> names.contains(plan.site().name()))
                .toList();
        return new Study(settings, kept, library, warnings, ledger, inputs);
    }
}
