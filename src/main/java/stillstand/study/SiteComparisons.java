package stillstand.study;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.concurrent.ExecutorService;
import java.util.stream.Collectors;
import stillstand.comparison.SiteComparison;
import stillstand.comparison.SiteGroup;
import stillstand.comparison.SiteMotion;
import stillstand.comparison.SiteToCompare;
import stillstand.comparison.SitesCompared;
import stillstand.comparison.SitesComparer;
import stillstand.comparison.TerraceTilt;
import stillstand.ledger.Assumption;
import stillstand.ledger.RunCancelledException;
import stillstand.ledger.RunMonitor;
import stillstand.shoreline.FormerSeaLevel;
import stillstand.shoreline.HeightTerm;
import stillstand.shoreline.Level;
import stillstand.shoreline.Site;
import stillstand.uncertainty.DrawStreams;
import stillstand.uplift.DateRules;
import stillstand.uplift.FlightResult;
import stillstand.uplift.FlightSetup;
import stillstand.uplift.LevelAnswer;
import stillstand.uplift.MatchingRules;
import stillstand.uplift.Quantity;
import stillstand.uplift.Rate;
import stillstand.uplift.SiteCase;
import stillstand.uplift.StandIn;

/**
 * What a run says of its sites together, once each of them is done.
 *
 * @param pairs differences between sites
 * @param motions sites that go up, are stable or go down
 * @param groups coasts and island groups
 * @param tilts of terraces from points measured on them
 * @param ledger what they rest on
 */
record SiteComparisons(
        List<SiteComparison> pairs,
        List<SiteMotion> motions,
        List<SiteGroup> groups,
        List<TerraceTilt> tilts,
        Set<Assumption> ledger) {

    /** Nothing compared. */
    static final SiteComparisons NONE = new SiteComparisons(List.of(), List.of(), List.of(), List.of(), Set.of());

    /** What the sites have given so far. */
    record Found(List<LevelAnswer> levels, List<FlightResult> flights) {}

    /**
     * Compares.
     *
     * @throws RunCancelledException if the monitor asks to stop
     */
    static SiteComparisons of(
            Study study,
            Found found,
            DateRules dates,
            MatchingRules matching,
            DrawStreams streams,
            ExecutorService executor,
            RunMonitor monitor) {
        Map<String, Map<String, Rate>> levels = new HashMap<>();
        Map<String, Quantity> ages = new HashMap<>();
        for (LevelAnswer level : found.levels()) {
            level.rate()
                    .ifPresent(rate -> levels.computeIfAbsent(level.site(), site -> new HashMap<>())
                            .put(level.level(), rate));
            level.age().ifPresent(age -> ages.put(key(level.site(), level.level()), age));
        }
        Set<String> drowned = study.sites().stream()
                .map(SitePlan::site)
                .filter(FlightSetup::isDrowned)
                .map(Site::name)
                .collect(Collectors.toSet());
        Set<Assumption> ledger = new LinkedHashSet<>();
        Map<String, Rate> flights = new HashMap<>();
        for (FlightResult flight : found.flights()) {
            if (drowned.contains(flight.site())) {
                // lowstands share other errors than highstands: the two kinds of flight cannot be conditioned on each
                // other
                ledger.add(new Assumption(
                        "a flight of drowned reefs is not compared with other sites",
                        "single levels of the site that have a rate of their own are",
                        "Stillstand's default",
                        flight.site()));
                continue;
            }
            flights.put(flight.site(), flight.rate());
            flight.predictedAges().forEach(age -> ages.putIfAbsent(key(flight.site(), age.level()), age.age()));
        }
        List<SiteToCompare> sites = new ArrayList<>();
        for (SitePlan plan : study.sites()) {
            String name = plan.site().name();
            sites.add(new SiteToCompare(
                    new SiteCase(plan.site(), plan.ensemble(), plan.prior()),
                    Optional.ofNullable(flights.get(name)),
                    levels.getOrDefault(name, Map.of()),
                    Optional.ofNullable(study.together().areasKm2().get(name))));
        }
        SitesCompared compared = SitesComparer.compare(
                sites,
                study.settings().comparison(),
                new StandIn.Conventions(study.settings().indicativeRange(), dates, matching),
                streams,
                executor,
                monitor);
        ledger.addAll(compared.assumptions());
        return new SiteComparisons(
                compared.pairs(), compared.motions(), compared.groups(), tilts(study, ages, ledger), ledger);
    }

    private static String key(String site, String level) {
        return site + " / " + level;
    }

    private static List<TerraceTilt> tilts(Study study, Map<String, Quantity> ages, Set<Assumption> ledger) {
        List<TerraceTilt> tilts = new ArrayList<>();
        for (SitesData.TerracePoints terrace : study.together().terraces()) {
            for (SitePlan plan : study.sites()) {
                for (Level level : plan.site().levels()) {
                    if (plan.site().name().equals(terrace.site())
                            && level.name().equals(terrace.level())) {
                        String where = key(terrace.site(), terrace.level());
                        double shared = sharedSigmaMetres(study, plan, level);
                        TerraceTilt.of(
                                        terrace.site(),
                                        terrace.level(),
                                        terrace.points(),
                                        shared,
                                        Optional.ofNullable(ages.get(where)))
                                .ifPresent(tilts::add);
                        ledger.add(new Assumption(
                                "error that all points of a terrace share",
                                String.format(Locale.ROOT, "%.2f m (1 sigma): all but the survey of each", shared),
                                "the study",
                                where));
                    }
                }
            }
        }
        return tilts;
    }

    /** All but the survey moves a terrace as a whole: datum, indicator, cover. */
    private static double sharedSigmaMetres(Study study, SitePlan plan, Level level) {
        double variance = 0;
        for (HeightTerm term :
                FormerSeaLevel.ofLandform(plan.site(), level, study.settings().indicativeRange())) {
            double sigma = term.metres().standardDeviation();
            variance += term.source() == HeightTerm.Source.SURVEY ? 0 : sigma * sigma;
        }
        return Math.sqrt(variance);
    }
}
