package stillstand.study;

import static stillstand.ledger.InputProblem.quote;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.function.Function;
import java.util.stream.Collectors;
import stillstand.ledger.Assumption;
import stillstand.sealevel.SeaLevelCurve;
import stillstand.shoreline.DatedSample;
import stillstand.shoreline.FormsAt;

/**
 * Which of a study's several accounts of sea level serve a site: one that lacks a highstand a level is tied to, or does not reach
 * the age at which a level reads it, is left out there, which the ledger says.
 */
final class ServingCurves {
    private ServingCurves() {}

    /** The accounts that serve each site; a site that all of them fail is a problem. */
    static Function<String, List<SeaLevelCase>> of(
            List<SitesTable.SiteRow> sites,
            List<LevelsTable.LevelRow> levels,
            List<SamplesTable.SampleRow> samples,
            Function<String, List<SeaLevelCase>> seaLevel,
            Findings findings) {
        Map<String, List<SeaLevelCase>> serving = new HashMap<>();
        for (SitesTable.SiteRow site : sites) {
            List<SeaLevelCase> all = seaLevel.apply(site.name());
            if (all.size() > 1) {
                List<LevelsTable.LevelRow> own = levels.stream()
                        .filter(level -> level.key().site().equals(site.name()))
                        .toList();
                serving.put(site.name(), serving(site, own, samples, all, findings));
            }
        }
        return site -> serving.getOrDefault(site, seaLevel.apply(site));
    }

    private static List<SeaLevelCase> serving(
            SitesTable.SiteRow site,
            List<LevelsTable.LevelRow> levels,
            List<SamplesTable.SampleRow> samples,
            List<SeaLevelCase> all,
            Findings findings) {
        List<SeaLevelCase> kept = new ArrayList<>();
        Map<SeaLevelCase, String> left = new HashMap<>();
        for (SeaLevelCase sea : all) {
            Optional<String> whyNot = whyNot(levels, samples, sea);
            whyNot.ifPresentOrElse(reason -> left.put(sea, reason), () -> kept.add(sea));
        }
        if (kept.isEmpty()) {
            site.reader()
                    .problem(
                            "site",
                            quote(site.name()) + ", which no curve of the study serves ("
                                    + all.stream()
                                            .map(sea -> sea.id() + ": " + left.getOrDefault(sea, ""))
                                            .collect(Collectors.joining("; "))
                                    + ")",
                            "levels that at least one curve can serve together");
        } else {
            left.forEach((sea, reason) -> findings.add(new Assumption(
                    "curve " + sea.id() + " is left out at a site", reason, "Stillstand's default", site.name())));
        }
        return kept;
    }

    private static Optional<String> whyNot(
            List<LevelsTable.LevelRow> levels, List<SamplesTable.SampleRow> samples, SeaLevelCase sea) {
        for (LevelsTable.LevelRow level : levels) {
            List<String> only = level.highstand().only();
            if (!only.isEmpty()
                    && only.stream()
                            .noneMatch(stage -> sea.highstands().find(stage).isPresent())) {
                return Optional.of("it shows no " + String.join(" or ", only) + ", to which level "
                        + quote(level.key().level()) + " is tied");
            }
            if (level.formsAt() == FormsAt.ANY && !reaches(level, samples, sea.curve())) {
                return Optional.of("it does not reach the age of level "
                        + quote(level.key().level()));
            }
        }
        return Optional.empty();
    }

    private static boolean reaches(
            LevelsTable.LevelRow level, List<SamplesTable.SampleRow> samples, Optional<SeaLevelCurve> curve) {
        return curve.isPresent()
                && samples.stream()
                        .filter(row -> row.key().equals(level.key()))
                        .flatMap(row -> row.sample().filter(DatedSample::used).stream())
                        .flatMap(sample -> sample.ageKa().stream())
                        .allMatch(ageKa -> curve.get().covers(ageKa.quantile(0.5)));
    }
}
