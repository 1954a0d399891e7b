package stillstand.figure;

import java.util.ArrayList;
import java.util.Collections;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import stillstand.study.StudyResult;
import stillstand.study.StudyResult.HighstandUsed;
import stillstand.uncertainty.Interval;
import stillstand.uplift.FlightResult;
import stillstand.uplift.LevelAnswer;
import stillstand.uplift.LevelResidual;
import stillstand.uplift.Quantity;

/**
 * What figures read of one site.
 *
 * @param site its name
 * @param levels in the order of the study
 * @param flight its flight; absent where none was matched
 * @param residuals of the flight
 * @param stands the highstands of the study, each label once
 */
public record SiteView(
        String site,
        List<LevelView> levels,
        Optional<FlightResult> flight,
        List<LevelResidual> residuals,
        Map<String, HighstandUsed> stands) {
    public SiteView {
        levels = List.copyOf(levels);
        residuals = List.copyOf(residuals);
        stands = Collections.unmodifiableMap(new LinkedHashMap<>(stands));
    }

    /** Name of the rows beyond the curve: they share it, so that it says no age. */
    static final String OLDER = "older";

    /**
     * One level.
     *
     * @param name its name
     * @param height where the sea stood relative to the land of today; absent where the result does not say
     * @param claims highstands that may have made it, most probable first
     * @param answer its own answer
     */
    public record LevelView(String name, Optional<Height> height, List<Claim> claims, LevelAnswer answer) {
        public LevelView {
            claims = List.copyOf(claims);
        }

        /** Probability that two levels record one highstand, were each alone in the world. */
        public double probabilitySameHighstand(LevelView other) {
            double probability = 0;
            for (Claim claim : claims) {
                for (Claim same : other.claims()) {
                    boolean together = claim.highstand().equals(same.highstand())
                            && !claim.highstand().equals(OLDER);
                    probability += together ? claim.probability() * same.probability() : 0;
                }
            }
            return probability;
        }
    }

    /** A height and its 95 % interval, m. */
    public record Height(double metres, Interval interval95) {}

    /** A highstand and its probability. */
    public record Claim(String highstand, double probability) {}

    /** Every site with a level, in the order of the study. */
    public static List<SiteView> all(StudyResult result) {
        Map<String, List<LevelAnswer>> sites = new LinkedHashMap<>();
        result.levels()
                .forEach(level -> sites.computeIfAbsent(level.site(), name -> new ArrayList<>())
                        .add(level));
        Map<String, HighstandUsed> stands = new LinkedHashMap<>();
        result.seaLevel().highstands().stream()
                .filter(stand -> !stand.stage().equals(OLDER))
                .forEach(stand -> stands.putIfAbsent(stand.stage(), stand));
        List<SiteView> views = new ArrayList<>();
        sites.forEach((site, levels) -> views.add(of(result, site, levels, stands)));
        return List.copyOf(views);
    }

    private static SiteView of(
            StudyResult result, String site, List<LevelAnswer> answers, Map<String, HighstandUsed> stands) {
        Optional<FlightResult> flight = result.flight(site);
        List<LevelResidual> residuals = result.residuals().stream()
                .filter(residual -> residual.site().equals(site))
                .toList();
        List<LevelView> levels = answers.stream()
                .map(answer -> new LevelView(answer.level(), height(answer, residuals), claims(answer, flight), answer))
                .toList();
        return new SiteView(site, levels, flight, residuals, stands);
    }

    private static Optional<Height> height(LevelAnswer answer, List<LevelResidual> residuals) {
        return answer.relativeSeaLevelMetres()
                .map(SiteView::height)
                .or(() -> residuals.stream()
                        .filter(residual -> residual.level().equals(answer.level()))
                        .findFirst()
                        .map(residual -> new Height(
                                residual.measuredMetres(),
                                new Interval(residual.measuredMetres(), residual.measuredMetres()))));
    }

    private static Height height(Quantity quantity) {
        return new Height(quantity.median(), quantity.interval95());
    }

    private static List<Claim> claims(LevelAnswer answer, Optional<FlightResult> flight) {
        List<Claim> matched = flight.map(found -> found.pairingsOf(answer.level()).stream()
                        .map(pairing -> new Claim(pairing.highstand(), pairing.probability()))
                        .toList())
                .orElse(List.of());
        List<Claim> claims = matched.isEmpty()
                ? answer.stages().stream()
                        .map(stage -> new Claim(stage.highstand(), stage.probability()))
                        .toList()
                : matched;
        return claims.stream()
                .sorted(Comparator.comparingDouble(Claim::probability).reversed())
                .toList();
    }

    /** Levels whose height is known, lowest first. */
    public List<LevelView> stair() {
        return levels.stream()
                .filter(level -> level.height().isPresent())
                .sorted(Comparator.comparingDouble(SiteView::metres))
                .toList();
    }

    /** Levels whose height is known, highest first, and then the others. */
    List<LevelView> downwards() {
        List<LevelView> downwards = new ArrayList<>(stair());
        Collections.reverse(downwards);
        levels.stream().filter(level -> level.height().isEmpty()).forEach(downwards::add);
        return downwards;
    }

    static double metres(LevelView level) {
        return level.height().map(Height::metres).orElse(0.0);
    }
}
