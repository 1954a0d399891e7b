package stillstand.uplift;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.TreeMap;
import stillstand.shoreline.FormerSeaLevel;
import stillstand.shoreline.IndicativeRule;
import stillstand.shoreline.Level;

/**
 * Which level stands for each of several sites that are compared without a flight: one of the highstand that most of the sites
 * have in common, since what such levels share cancels in a difference; at a site without it, or among several, the level whose
 * rate is known best to first order.
 */
public final class ComparedLevels {
    private ComparedLevels() {}

    /** A level that may stand for its site. */
    private record Candidate(ComparedLevel level, String stage, double sigmaMetresPerKyr) {}

    /**
     * A level for each site; absent where no level of it has a rate of its own.
     *
     * @param rule what an indicative range means
     * @param dates how far dates are believed
     */
    public static List<Optional<ComparedSite>> choose(List<SiteCase> sites, IndicativeRule rule, DateRules dates) {
        List<List<Candidate>> candidates = new ArrayList<>();
        Map<String, Integer> counts = new TreeMap<>();
        for (SiteCase site : sites) {
            List<Candidate> here = candidates(site, rule, dates);
            Set<String> stages = new HashSet<>();
            here.forEach(candidate -> stages.add(candidate.stage()));
            stages.forEach(stage -> counts.merge(stage, 1, Integer::sum));
            candidates.add(here);
        }
        counts.remove("");
        String common = counts.entrySet().stream()
                .filter(stage -> stage.getValue() > 1)
                .max(Map.Entry.comparingByValue())
                .map(Map.Entry::getKey)
                .orElse("");
        return candidates.stream()
                .map(here -> here.stream()
                        .min(Comparator.comparing((Candidate candidate) ->
                                        !candidate.stage().equals(common))
                                .thenComparing(Candidate::sigmaMetresPerKyr))
                        .map(best -> (ComparedSite) best.level()))
                .toList();
    }

    private static List<Candidate> candidates(SiteCase site, IndicativeRule rule, DateRules dates) {
        List<Candidate> candidates = new ArrayList<>();
        for (Level level : site.site().levels()) {
            List<SeaAtLevel> explanations = LevelExplanations.of(
                            level, site.basis(), dates, site.site().name() + " / " + level.name())
                    .explanations();
            if (explanations.isEmpty()) {
                continue;
            }
            JointLevels.Entry entry = new JointLevels.Entry(
                    level.name(),
                    FormerSeaLevel.ofLandform(site.site(), level, rule),
                    level.loweringMetresPerKyr(),
                    explanations);
            SeaAtLevel likeliest = explanations.stream()
                    .max(Comparator.comparingDouble(SeaAtLevel::probability))
                    .orElseThrow();
            candidates.add(new Candidate(
                    new ComparedLevel(
                            site.site().name(),
                            site.coast(),
                            entry,
                            site.basis().highstands().sharedErrors()),
                    likeliest instanceof SeaAtLevel.AtHighstand stand ? stand.stage() : "",
                    FirstOrderRate.of(entry.height(), entry.loweringMetresPerKyr(), likeliest)
                            .sigma()));
        }
        return candidates;
    }
}
