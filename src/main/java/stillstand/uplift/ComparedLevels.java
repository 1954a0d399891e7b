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
    private record Candidate(String level, String stage, double sigmaMetresPerKyr) {}

    /**
     * The name of a level for each site; absent where no level of it has a rate of its own.
     *
     * @param rule what an indicative range means
     * @param dates how far dates are believed
     */
    public static List<Optional<String>> choose(List<SiteCase> sites, IndicativeRule rule, DateRules dates) {
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
                        .map(Candidate::level))
                .toList();
    }

    private static List<Candidate> candidates(SiteCase site, IndicativeRule rule, DateRules dates) {
        List<Candidate> candidates = new ArrayList<>();
        for (Level level : site.site().levels()) {
            List<SeaAtLevel> explanations =
                    LevelExplanations.of(level, site.seaLevel(), dates, "").explanations();
            if (!explanations.isEmpty()) {
                SeaAtLevel likeliest = explanations.stream()
                        .max(Comparator.comparingDouble(SeaAtLevel::probability))
                        .orElseThrow();
                candidates.add(new Candidate(
                        level.name(),
                        likeliest instanceof SeaAtLevel.AtHighstand stand ? stand.stage() : "",
                        FirstOrderRate.of(
                                        FormerSeaLevel.ofLandform(site.site(), level, rule),
                                        level.loweringMetresPerKyr(),
                                        likeliest)
                                .sigma()));
            }
        }
        return candidates;
    }

    /** A level under one account of sea level; absent where that explains nothing of it. */
    static Optional<ComparedSite> under(
            SiteCase site, SeaLevelBasis basis, String name, IndicativeRule rule, DateRules dates) {
        return site.site().levels().stream()
                .filter(level -> level.name().equals(name))
                .findFirst()
                .flatMap(level -> {
                    List<SeaAtLevel> explanations =
                            LevelExplanations.of(level, basis, dates, "").explanations();
                    return explanations.isEmpty()
                            ? Optional.empty()
                            : Optional.of(new ComparedLevel(
                                    site.site().name(),
                                    site.coast(),
                                    new JointLevels.Entry(
                                            name,
                                            FormerSeaLevel.ofLandform(site.site(), level, rule),
                                            level.loweringMetresPerKyr(),
                                            explanations),
                                    basis.highstands().sharedErrors()));
                });
    }
}
