package stillstand.report;

import java.util.List;
import java.util.stream.Collectors;
import stillstand.shoreline.DatedSample;
import stillstand.shoreline.Level;
import stillstand.shoreline.Site;
import stillstand.study.SeaLevelCase;
import stillstand.study.SitePlan;
import stillstand.study.Study;
import stillstand.uncertainty.Digits;

/** What was understood of a study, before anything is computed. */
public final class StudySummary {
    /** Heights are told to the millimetre at most. */
    private static final double MILLIMETRES = 1000;

    private StudySummary() {}

    /** A few lines, among them a worked height for each site. */
    public static String text(Study study) {
        List<Site> sites = study.sites().stream().map(SitePlan::site).toList();
        List<Level> levels =
                sites.stream().flatMap(site -> site.levels().stream()).toList();
        List<DatedSample> samples =
                levels.stream().flatMap(level -> level.samples().stream()).toList();
        long pinned = levels.stream()
                .filter(level -> level.highstand().pinned().isPresent())
                .count();
        long used = samples.stream().filter(DatedSample::used).count();
        StringBuilder text = new StringBuilder(study.settings().title()).append('\n');
        text.append("Understood: ")
                .append(Wording.counted(sites.size(), "site"))
                .append(", ")
                .append(Wording.counted(levels.size(), "level"))
                .append(" (")
                .append(pinned)
                .append(" tied to one highstand), ")
                .append(Wording.counted(samples.size(), "sample"))
                .append(" on them (")
                .append(used)
                .append(" in use).\n");
        text.append("Sea level: ")
                .append(study.seaLevel().stream().map(SeaLevelCase::id).collect(Collectors.joining(", ")))
                .append(".\n");
        study.sites().forEach(plan -> text.append(site(plan)).append('\n'));
        return text.toString();
    }

    /** {@code North cliff: T4: 61.4 in your datum = 60.9 above mean sea level; prior of the rate cauchy 0 0.5 …}. */
    private static String site(SitePlan plan) {
        Site site = plan.site();
        String height = site.levels().stream()
                .findFirst()
                .map(level ->
                        level.name() + ": " + metres(level.elevationMetres().mean()) + " in your datum = "
                                + metres(level.elevationMetres().mean()
                                        - site.datumOffsetMetres().mean())
                                + " above mean sea level")
                .orElse("no levels");
        return site.name() + ": " + height + "; prior of the rate "
                + plan.prior().describe();
    }

    private static String metres(double value) {
        return Wording.number(Digits.text(Math.rint(value * MILLIMETRES) / MILLIMETRES));
    }
}
