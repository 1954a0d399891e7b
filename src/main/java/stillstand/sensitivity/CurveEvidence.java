package stillstand.sensitivity;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.function.Function;

/**
 * What the flights of a region together say of one curve: the sum of their log evidences. It takes the sites for independent
 * witnesses given the curve, though they share its errors, so that it says too much rather than too little.
 *
 * @param region a coast or island group, or all sites
 * @param sites whose flights every curve of the study serves, two or more
 * @param curve id of the curve
 * @param logEvidence sum over these sites, natural logarithm
 * @param weight of the curve among the others after looking, where all weighed alike before; together 1
 */
public record CurveEvidence(String region, List<String> sites, String curve, double logEvidence, double weight) {
    /** Name of the region that holds all sites. */
    public static final String EVERYWHERE = "all sites";

    public CurveEvidence {
        sites = List.copyOf(sites);
    }

    /**
     * The evidence of every region that has two or more flights, and of all sites where there are more than one region.
     *
     * @param choices of the whole study
     * @param regionOf a site; empty where it belongs to none
     */
    public static List<CurveEvidence> pooled(List<CurveChoice> choices, Function<String, Optional<String>> regionOf) {
        Map<String, Map<String, Double>> bySite = new LinkedHashMap<>();
        for (CurveChoice choice : choices) {
            if (choice.level().isEmpty() && !choice.mixesCurves()) {
                choice.logEvidence()
                        .ifPresent(log -> bySite.computeIfAbsent(choice.site(), site -> new LinkedHashMap<>())
                                .put(choice.curve(), log));
            }
        }
        Set<String> curves = new LinkedHashSet<>();
        bySite.values().forEach(logs -> curves.addAll(logs.keySet()));
        Map<String, List<String>> regions = new LinkedHashMap<>();
        List<String> everywhere = new ArrayList<>();
        for (Map.Entry<String, Map<String, Double>> site : bySite.entrySet()) {
            if (site.getValue().keySet().containsAll(curves)) {
                everywhere.add(site.getKey());
                regionOf.apply(site.getKey())
                        .ifPresent(region -> regions.computeIfAbsent(region, each -> new ArrayList<>())
                                .add(site.getKey()));
            }
        }
        List<CurveEvidence> pooled = new ArrayList<>();
        regions.forEach((region, sites) -> pooled.addAll(of(region, sites, curves, bySite)));
        if (regions.size() != 1 || !regions.containsValue(everywhere)) {
            pooled.addAll(of(EVERYWHERE, everywhere, curves, bySite));
        }
        return pooled;
    }

    private static List<CurveEvidence> of(
            String region, List<String> sites, Set<String> curves, Map<String, Map<String, Double>> bySite) {
        if (sites.size() < 2 || curves.size() < 2) {
            return List.of();
        }
        Map<String, Double> sums = new LinkedHashMap<>();
        for (String curve : curves) {
            sums.put(
                    curve,
                    sites.stream()
                            .mapToDouble(
                                    site -> bySite.getOrDefault(site, Map.of()).getOrDefault(curve, 0.0))
                            .sum());
        }
        double highest = sums.values().stream().mapToDouble(v -> v).max().orElseThrow();
        double total =
                sums.values().stream().mapToDouble(v -> Math.exp(v - highest)).sum();
        List<CurveEvidence> rows = new ArrayList<>();
        sums.forEach((curve, log) ->
                rows.add(new CurveEvidence(region, sites, curve, log, Math.exp(log - highest) / total)));
        return rows;
    }
}
