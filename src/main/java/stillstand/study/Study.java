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
 * @param seaLevel the accounts of sea level in use, at least one; weights need not add up to 1
 * @param warnings what is odd in the input, in reading order
 * @param ledger the defaults, exact values and dropped values the input brought with it
 * @param inputs the files it was read from, in the order of their names
 * @param together what is known for comparing sites alone
 */
public record Study(
        StudySettings settings,
        List<SitePlan> sites,
        List<SeaLevelCase> seaLevel,
        List<InputWarning> warnings,
        List<Assumption> ledger,
        List<InputFile> inputs,
        SitesData together) {
    public Study {
        sites = List.copyOf(sites);
        seaLevel = List.copyOf(seaLevel);
        warnings = List.copyOf(warnings);
        ledger = List.copyOf(ledger);
        inputs = List.copyOf(inputs);
        if (seaLevel.isEmpty()) {
            throw new IllegalArgumentException("a study must have at least one account of sea level");
        }
    }

    /** A study that knows nothing of areas or points of terraces. */
    public Study(
            StudySettings settings,
            List<SitePlan> sites,
            List<SeaLevelCase> seaLevel,
            List<InputWarning> warnings,
            List<Assumption> ledger,
            List<InputFile> inputs) {
        this(settings, sites, seaLevel, warnings, ledger, inputs, SitesData.NONE);
    }

    /** The same study with only the sites of these names, in its own order; unknown names are passed over. */
    public Study only(Collection<String> names) {
        List<SitePlan> kept = sites.stream()
                .filter(plan -> names.contains(plan.site().name()))
                .toList();
        return new Study(settings, kept, seaLevel, warnings, ledger, inputs, together);
    }
}
