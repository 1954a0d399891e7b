package stillstand.uplift;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.concurrent.ExecutorService;
import org.apache.commons.rng.UniformRandomProvider;
import stillstand.ledger.Assumption;
import stillstand.ledger.RunCancelledException;
import stillstand.ledger.RunMonitor;
import stillstand.shoreline.IndicativeRule;
import stillstand.shoreline.Level;
import stillstand.shoreline.Site;
import stillstand.uncertainty.DrawStreams;
import stillstand.uncertainty.Interval;

/**
 * Flights of several sites, some of whose levels were traced to one another along the coast. Each site is drawn alone (rate, shared
 * numbers, whole correlation), and the draws are weighed by {@link TracedShares}: exact but for the draws. A traced level without a
 * flight takes part by the one highstand it is tied to. What a trace says is which highstand, for each site's own rate; that the
 * sea-level history is the same at all of them is left to the comparison of sites.
 */
public final class TracedFlights {
    private static final double FEW_EFFECTIVE = 300;

    private final DrawStreams streams;
    private final ExecutorService executor;
    private final RunMonitor monitor;
    private final MatchingRules rules;
    private final IndicativeRule rule;
    private final double probability;

    /**
     * @param streams all randomness
     * @param executor runs the draws; not owned, and needs a thread that is not the caller's
     * @param monitor is told of each site and asked whether to stop
     * @param rules how levels are matched
     * @param rule what an indicative range means
     * @param probability that a traced terrace is one shoreline
     */
    public TracedFlights(
            DrawStreams streams,
            ExecutorService executor,
            RunMonitor monitor,
            MatchingRules rules,
            IndicativeRule rule,
            double probability) {
        this.streams = streams;
        this.executor = executor;
        this.monitor = monitor;
        this.rules = rules;
        this.rule = rule;
        this.probability = probability;
    }

    /**
     * A site with a traced level.
     *
     * @param site with its levels
     * @param basis its account of sea level
     * @param prior of its rate
     * @param alone its flight without traces; absent where it has none, and each traced level counts by the highstand it is tied to
     */
    public record TracedSite(Site site, SeaLevelBasis basis, RatePrior prior, Optional<FlightResult> alone) {}

    /** Whether a site has a level that was traced to another site. */
    public static boolean isTraced(Site site) {
        return site.levels().stream().anyMatch(level -> level.terrace().isPresent() && takesPart(level));
    }

    private static boolean takesPart(Level level) {
        return FlightSetup.takesPart(level.formsAt());
    }

    /**
     * The flights under the traces, for those sites that have one.
     *
     * @param sites in the order in which they lie: a terrace at several is traced from each to the next that has it
     * @throws IllegalArgumentException if no joint correlation agrees with the traces
     * @throws RunCancelledException if the monitor asks to stop
     */
    public List<Flights.Answered> of(List<TracedSite> sites) {
        List<Drawn> drawn = new ArrayList<>();
        for (TracedSite site : sites) {
            drawn.add(site.alone().isPresent() ? drawn(site) : pinned(site));
        }
        List<TracedShares.Link> links = new ArrayList<>();
        for (int b = 0; b < drawn.size(); b++) {
            for (int two = 0; two < drawn.get(b).terraces.size(); two++) {
                String terrace = drawn.get(b).terraces.get(two);
                for (int a = b - 1; a >= 0; a--) {
                    int one = drawn.get(a).terraces.indexOf(terrace);
                    if (one >= 0) {
                        links.add(new TracedShares.Link(a, one, b, two));
                        break;
                    }
                }
            }
        }
        TracedShares.Found found =
                TracedShares.of(drawn.stream().map(Drawn::shares).toList(), links, probability);
        List<Flights.Answered> answers = new ArrayList<>();
        for (int s = 0; s < drawn.size(); s++) {
            Map<List<String>, Double> shares = found.shares().get(s);
            drawn.get(s).answer(shares, found).ifPresent(answers::add);
        }
        return answers;
    }

    private static List<Level> tracedLevels(Site site) {
        return site.levels().stream()
                .filter(level -> level.terrace().isPresent() && takesPart(level))
                .toList();
    }

    private Drawn pinned(TracedSite site) {
        List<String> terraces = new ArrayList<>();
        List<String> stands = new ArrayList<>();
        for (Level level : tracedLevels(site.site())) {
            level.highstand().pinned().ifPresent(stand -> {
                terraces.add(level.terrace().orElseThrow());
                stands.add(stand);
            });
        }
        return new Drawn(site, terraces, Optional.empty(), List.of(), List.of(stands));
    }

    private Drawn drawn(TracedSite site) {
        String name = site.site().name();
        FlightSetup setup = FlightSetup.of(site.site(), site.basis(), rules, rule);
        String key = name + " / traced flight";
        monitor.within(key);
        HistoryDraws draws = HistoryMonteCarlo.draws(
                setup.model(),
                new HistoryPrior.Steady(FlightMirror.of(site.prior(), setup.mirrored())),
                setup.shared(),
                HistoryMonteCarlo.Effort.FULL,
                streams,
                key,
                monitor,
                Workers.of(executor));
        FlightDraw[] correlations = correlations(draws, key);
        List<Level> traced = tracedLevels(site.site());
        List<List<String>> stands = new ArrayList<>();
        for (FlightDraw draw : correlations) {
            stands.add(traced.stream()
                    .map(level -> stand(setup.model(), draw, level.name()))
                    .toList());
        }
        return new Drawn(
                site,
                traced.stream().map(level -> level.terrace().orElseThrow()).toList(),
                Optional.of(new Draws(setup, draws)),
                Arrays.asList(correlations),
                stands);
    }

    private FlightDraw[] correlations(HistoryDraws draws, String key) {
        FlightDraw[] correlations = new FlightDraw[draws.draws().size()];
        List<Runnable> pieces = new ArrayList<>();
        int pieceCount = draws.islands();
        for (int piece = 0; piece < pieceCount; piece++) {
            int number = piece;
            pieces.add(() -> {
                CorrelationSampler sampler = new CorrelationSampler(draws.coarse());
                UniformRandomProvider random = streams.stream(key + " correlations", number);
                for (int k = number; k < correlations.length; k += pieceCount) {
                    if (monitor.isCancelled()) {
                        throw new RunCancelledException();
                    }
                    ChosenDraws.Chosen chosen = draws.draws().get(k).chosen();
                    sampler.prepare(chosen.history(), chosen.shared());
                    correlations[k] = new FlightDraw(chosen.history(), chosen.shared(), sampler.draw(random));
                }
            });
        }
        Workers.of(executor).run(pieces);
        return correlations;
    }

    /** Label of the highstand that a level records in a draw; generic older ones are told apart by their age. */
    private static String stand(FlightModel model, FlightDraw draw, String level) {
        for (int i = 0; i < model.levels().size(); i++) {
            if (model.levels().get(i).name().equals(level)) {
                return draw.matches()
                        .get(i)
                        .map(match -> model.rows().get(match.row()))
                        .map(row -> row.stage().equals(OlderRows.STAGE) ? row.stage() + " " + row.ageKa() : row.stage())
                        .orElse(TracedShares.NO_SHORELINE);
            }
        }
        return TracedShares.NO_SHORELINE;
    }

    /** What a flight was drawn with. */
    private record Draws(FlightSetup setup, HistoryDraws draws) {}

    /** A site alone, drawn. */
    private final class Drawn {
        private final TracedSite site;
        private final List<String> terraces;
        private final Optional<Draws> draws;
        private final List<FlightDraw> correlations;
        /** By draw, the highstand of each traced level; one draw where the site has no flight. */
        private final List<List<String>> stands;

        Drawn(
                TracedSite site,
                List<String> terraces,
                Optional<Draws> draws,
                List<FlightDraw> correlations,
                List<List<String>> stands) {
            this.site = site;
            this.terraces = terraces;
            this.draws = draws;
            this.correlations = correlations;
            this.stands = stands;
        }

        private double weight(int k) {
            return draws.map(with -> with.draws().draws().get(k).weight()).orElse(1.0);
        }

        Map<List<String>, Double> shares() {
            double total = draws.map(with -> with.draws().totalWeight()).orElse(1.0);
            Map<List<String>, Double> shares = new LinkedHashMap<>();
            for (int k = 0; k < stands.size(); k++) {
                shares.merge(stands.get(k), weight(k) / total, Double::sum);
            }
            return shares;
        }

        Optional<Flights.Answered> answer(Map<List<String>, Double> under, TracedShares.Found found) {
            return draws.map(with -> answer(with, under, found));
        }

        private Flights.Answered answer(Draws with, Map<List<String>, Double> under, TracedShares.Found found) {
            Map<List<String>, Double> alone = shares();
            double[] weights = new double[stands.size()];
            double[] rates = new double[weights.length];
            int[] blocks = new int[weights.length];
            for (int k = 0; k < weights.length; k++) {
                List<String> own = stands.get(k);
                weights[k] = weight(k) * under.getOrDefault(own, 0.0) / alone.getOrDefault(own, 1.0);
                rates[k] = correlations.get(k).rateMetresPerKyr();
                blocks[k] = with.draws().draws().get(k).chosen().block();
            }
            WeightedRates weighted = new WeightedRates(rates, weights, blocks);
            FlightResult before = site.alone().orElseThrow();
            RatePosterior posterior = weighted.posterior(before.logEvidence());
            FlightModel model = with.setup().model();
            WeightedCorrelations counted = new WeightedCorrelations(model, correlations, weights);
            List<FlightDraw> joint = new ArrayList<>();
            for (int k : weighted.chosen(Math.min(1000, weights.length))) {
                joint.add(correlations.get(k));
            }
            FlightAnswer answer = new FlightAnswer(
                    posterior,
                    counted.table(before.missing()),
                    counted.ages(),
                    List.of(),
                    before.probabilityAllStray());
            FlightSummary summary = new FlightSummary(site.site().name(), model, answer, new JointDraws(joint));
            Flights.Answered answered = new Flights.Answered(
                    result(
                            before,
                            posterior,
                            summary,
                            FlightMirror.of(site.prior(), with.setup().mirrored())),
                    summary.residuals(),
                    said(weighted, found));
            return with.setup().mirrored() ? FlightMirror.of(answered) : answered;
        }

        private FlightResult result(
                FlightResult before, RatePosterior posterior, FlightSummary summary, RatePrior prior) {
            Rate rate = Rate.of(posterior);
            List<RateRegion> regions68 = posterior.highestDensityRegionsOfDraws(Interval.PROBABILITY_68);
            List<RateRegion> regions95 = posterior.highestDensityRegionsOfDraws(Interval.PROBABILITY_95);
            return new FlightResult(
                    before.site(),
                    before.model(),
                    rate,
                    before.probabilityUplift().map(up -> posterior.probabilityUplift()),
                    FlightSummary.bound(rate),
                    RateRegion.intervals(regions68),
                    RateRegion.intervals(regions95),
                    RateRegion.probabilities(regions68),
                    RateRegion.probabilities(regions95),
                    List.of(new FlightResult.Segment(0, Optional.empty(), rate)),
                    summary.pairings(),
                    summary.unmatched(),
                    before.probabilityAllStray(),
                    summary.mostProbable(),
                    summary.predictedAges(),
                    before.logEvidence(),
                    before.numericalError(),
                    summary.fates(),
                    List.of(),
                    List.of(),
                    summary.slidingFits(prior),
                    before.modelChoice());
        }

        private List<Assumption> said(WeightedRates weighted, TracedShares.Found found) {
            List<Assumption> said = new ArrayList<>();
            String name = site.site().name();
            said.add(new Assumption(
                    "terraces traced to other sites",
                    String.format(
                            Locale.ROOT,
                            "%s; each trace is right with probability %.3g; the site alone and with the traces agree in %.0f"
                                    + " effective draws of %d",
                            String.join(", ", terraces),
                            probability,
                            weighted.effectiveDraws(),
                            correlations.size()),
                    "levels.csv, study.json or its default; evidence, and what single levels and errors do, are not worked"
                            + " out under traces",
                    name));
            if (weighted.effectiveDraws() < FEW_EFFECTIVE || found.leftOut() > 0.001) {
                said.add(new Assumption(
                        "traces and the site alone hardly agree",
                        String.format(
                                Locale.ROOT,
                                "only %.0f effective draws, %.2g of rare correlations left out: the last digits are not safe",
                                weighted.effectiveDraws(),
                                found.leftOut()),
                        "Stillstand",
                        name));
            }
            return said;
        }
    }
}
