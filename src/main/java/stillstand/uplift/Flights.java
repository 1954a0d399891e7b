package stillstand.uplift;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.concurrent.Callable;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Future;
import java.util.function.Function;
import stillstand.ledger.Assumption;
import stillstand.ledger.RunCancelledException;
import stillstand.ledger.RunMonitor;
import stillstand.shoreline.IndicativeRule;
import stillstand.shoreline.Site;
import stillstand.uncertainty.DrawStreams;
import stillstand.uncertainty.Interval;
import stillstand.uplift.FlightWhatIf.ErrorGroup;

/**
 * The flights of sites: which highstand made which level, and the rate. The answer and what it hangs on (without each level,
 * with each kind of error halved) are worked out side by side; the order in which threads work changes no bit.
 */
public final class Flights {
    private static final FlightIntegration.Effort WHAT_IF_GRID = new FlightIntegration.Effort(300, 125);
    private static final int GRID_DRAWS = 1000;
    private static final int GRID_DRAW_CELLS = 250;

    private final DrawStreams streams;
    private final ExecutorService executor;
    private final RunMonitor monitor;
    private final MatchingRules rules;
    private final IndicativeRule rule;
    private final RateChanges changes;

    /**
     * @param streams all randomness
     * @param executor runs the parts of a flight; not owned, and needs a thread that is not the caller's
     * @param monitor is asked whether to stop
     * @param rules how levels are matched
     * @param rule what an indicative range means
     * @param changes how the rate may change
     */
    public Flights(
            DrawStreams streams,
            ExecutorService executor,
            RunMonitor monitor,
            MatchingRules rules,
            IndicativeRule rule,
            RateChanges changes) {
        this.streams = streams;
        this.executor = executor;
        this.monitor = monitor;
        this.rules = rules;
        this.rule = rule;
        this.changes = changes;
    }

    /** A flight's answer, its residuals, and what it rests on. */
    public record Answered(FlightResult flight, List<LevelResidual> residuals, List<Assumption> assumptions) {
        public Answered {
            residuals = List.copyOf(residuals);
            assumptions = List.copyOf(assumptions);
        }
    }

    /**
     * The flight of a site that needs one and can have one ({@link FlightSetup#isNeeded}, {@link FlightSetup#whyNot}).
     *
     * @throws IllegalArgumentException if no rate of the prior can have left the flight; the message names the level to blame
     * @throws RunCancelledException if the monitor asks to stop
     */
    public Answered of(Site site, SeaLevelBasis basis, RatePrior prior) {
        FlightSetup setup = FlightSetup.of(site, basis, rules, rule);
        RatePrior held = FlightMirror.of(prior, setup.mirrored());
        Answered constant = new Question(site.name(), setup, held).answer();
        Answered answered = changes.isAsked()
                ? new ChangingFlights(streams, executor, monitor, changes).of(site.name(), setup, held, constant)
                : constant;
        return setup.mirrored() ? FlightMirror.of(answered) : answered;
    }

    /** What the engine found, whichever way it went. */
    private record Found(FlightAnswer answer, FlightResult.NumericalError error, JointDraws draws) {}

    /** One site's flight. */
    private final class Question {
        private final String site;
        private final FlightSetup setup;
        private final FlightModel model;
        private final RatePrior prior;
        private final boolean onGrid;

        Question(String site, FlightSetup setup, RatePrior prior) {
            this.site = site;
            this.setup = setup;
            this.prior = prior;
            model = setup.model();
            SharedPriors shared = setup.shared();
            // with nothing shared to integrate a grid over the rate alone is exact
            onGrid = shared.offsetSigmaMetres() == 0
                    && shared.interstadialSigmaMetres() == 0
                    && shared.ageShiftSigmaKa() == 0
                    && shared.recording() instanceof SharedPriors.Recording.Known
                    && shared.decaysKa().size() == 1
                    && shared.strays() instanceof SharedPriors.Strays.Known;
        }

        Answered answer() {
            Found found;
            try {
                found = onGrid ? Workers.joined(executor.submit(this::foundOnGrid)) : sampled();
            } catch (IllegalArgumentException e) {
                throw new IllegalArgumentException(blame(), e);
            }
            WhatIfPoints points = new WhatIfPoints(found.answer().rate(), prior, setup.shared(), streams, key());
            Function<FlightModel, Optional<RatePosterior>> roughly =
                    onGrid ? this::onGrid : variant -> points.rateOf(variant, quietly());
            Future<Optional<RatePosterior>> same =
                    submit(List.of(model), roughly).get(0);
            List<Future<Optional<RatePosterior>>> without = submit(withoutEach(), roughly);
            List<ErrorGroup> groups = groups();
            List<Future<Optional<RatePosterior>>> halved = submit(
                    groups.stream()
                            .map(group -> FlightWhatIf.halved(model, group))
                            .toList(),
                    roughly);
            Optional<RatePosterior> all = Workers.joined(same);
            FlightSummary summary = new FlightSummary(site, model, found.answer(), found.draws());
            RatePosterior posterior = found.answer().rate();
            Rate rate = Rate.of(posterior);
            List<RateRegion> regions68 = regions(posterior, Interval.PROBABILITY_68);
            List<RateRegion> regions95 = regions(posterior, Interval.PROBABILITY_95);
            FlightResult result = new FlightResult(
                    site,
                    FlightResult.CONSTANT,
                    rate,
                    prior.isTwoSided() ? Optional.of(posterior.probabilityUplift()) : Optional.empty(),
                    FlightSummary.bound(rate),
                    RateRegion.intervals(regions68),
                    RateRegion.intervals(regions95),
                    RateRegion.probabilities(regions68),
                    RateRegion.probabilities(regions95),
                    List.of(new FlightResult.Segment(0, Optional.empty(), rate)),
                    summary.pairings(),
                    summary.unmatched(),
                    found.answer().probabilityAllStray(),
                    summary.mostProbable(),
                    summary.predictedAges(),
                    posterior.logEvidence(),
                    found.error(),
                    summary.fates(),
                    leftOut(without, all),
                    halvings(groups, halved, all),
                    summary.slidingFits(prior),
                    List.of(new FlightResult.ModelEvidence(FlightResult.CONSTANT, posterior.logEvidence(), 0)));
            return new Answered(result, summary.residuals(), assumptions());
        }

        private List<RateRegion> regions(RatePosterior posterior, double probability) {
            return onGrid
                    ? posterior.highestDensityRegions(probability)
                    : posterior.highestDensityRegionsOfDraws(probability);
        }

        private List<Assumption> assumptions() {
            List<Assumption> said = new ArrayList<>(setup.assumptions());
            said.add(new Assumption(
                    "prior of the rate of a flight, m/kyr", prior.describe(), "the site or study", site));
            said.add(new Assumption(
                    "a flight is worked out",
                    onGrid
                            ? "on a grid of rates, at 250 and 500 cells of height"
                            : String.format(
                                    Locale.ROOT,
                                    "by %d to %d scrambles of %d randomised Sobol' points, at %d and %d cells of height",
                                    FlightMonteCarlo.Effort.FULL.scrambles(),
                                    FlightMonteCarlo.Effort.FULL.mostScrambles(),
                                    FlightMonteCarlo.Effort.FULL.points(),
                                    FlightMonteCarlo.Effort.FULL.cells(),
                                    2 * FlightMonteCarlo.Effort.FULL.cells()),
                    "Stillstand; what each level and error does is found with less effort",
                    site));
            return said;
        }

        private Found foundOnGrid() {
            FlightAnswer answer =
                    FlightIntegration.answer(model, prior, nodes(), FlightIntegration.Effort.FULL, quietly());
            FlightAnswer rough = FlightIntegration.answer(model, prior, nodes(), WHAT_IF_GRID, quietly());
            JointDraws draws = JointDraws.of(
                    model,
                    answer.rate(),
                    nodes(),
                    GRID_DRAW_CELLS,
                    GRID_DRAWS,
                    streams.stream(key() + " correlations", 0));
            return new Found(answer, difference(answer, rough), draws);
        }

        private Found sampled() {
            SampledFlightAnswer sampled = FlightMonteCarlo.answer(
                    model,
                    prior,
                    setup.shared(),
                    FlightMonteCarlo.Effort.FULL,
                    streams,
                    key(),
                    quietly(),
                    Workers.of(executor));
            return new Found(
                    sampled.answer(),
                    new FlightResult.NumericalError(
                            sampled.error().meanMetresPerKyr(),
                            sampled.error().logEvidence(),
                            sampled.error().pairing()),
                    sampled.draws());
        }

        private String key() {
            return "flight of " + site;
        }

        /** The rate alone, with less effort; absent where no rate can have left the flight. */
        private Optional<RatePosterior> onGrid(FlightModel variant) {
            try {
                return Optional.of(FlightIntegration.rate(variant, prior, nodes(), WHAT_IF_GRID, quietly()));
            } catch (IllegalArgumentException e) {
                return Optional.empty();
            }
        }

        /** Whether some rate can have left the flight. */
        private boolean isPossible(FlightModel variant) {
            try {
                SharedPriors shared = setup.shared();
                SharedNumbers middle = shared.at(0.5, 0.5, 0.5, 0.5, 0.5, 0.5);
                FlightIntegration.rate(variant, prior, SharedNodes.fixed(middle), WHAT_IF_GRID, quietly());
                return true;
            } catch (IllegalArgumentException e) {
                return false;
            }
        }

        private SharedNodes nodes() {
            SharedPriors shared = setup.shared();
            return SharedNodes.fixed(new SharedNumbers(
                    0,
                    0,
                    0,
                    shared.recording().quantile(0.5),
                    shared.decaysKa().get(0),
                    shared.strays().quantile(0.5)));
        }

        private List<FlightModel> withoutEach() {
            List<FlightModel> models = new ArrayList<>();
            for (int i = 0; i < model.levels().size() && model.levels().size() > 1; i++) {
                List<FlightLevel> others = new ArrayList<>(model.levels());
                others.remove(i);
                models.add(model.withLevels(others));
            }
            return models;
        }

        private List<ErrorGroup> groups() {
            boolean dated =
                    model.levels().stream().anyMatch(level -> !level.datesKa().isEmpty());
            List<ErrorGroup> groups = new ArrayList<>();
            for (ErrorGroup group : ErrorGroup.values()) {
                if (dated || group != ErrorGroup.DATES) {
                    groups.add(group);
                }
            }
            return groups;
        }

        private List<Future<Optional<RatePosterior>>> submit(
                List<FlightModel> models, Function<FlightModel, Optional<RatePosterior>> roughly) {
            List<Future<Optional<RatePosterior>>> futures = new ArrayList<>();
            for (FlightModel variant : models) {
                Callable<Optional<RatePosterior>> task = () -> roughly.apply(variant);
                futures.add(executor.submit(task));
            }
            return futures;
        }

        private List<FlightResult.LeftOut> leftOut(
                List<Future<Optional<RatePosterior>>> without, Optional<RatePosterior> all) {
            List<FlightResult.LeftOut> results = new ArrayList<>();
            for (int i = 0; i < without.size(); i++) {
                String level = model.levels().get(i).name();
                Optional<RatePosterior> rate = Workers.joined(without.get(i));
                if (rate.isPresent() && all.isPresent()) {
                    results.add(new FlightResult.LeftOut(
                            level, all.get().logEvidence() - rate.get().logEvidence(), Rate.of(rate.get())));
                }
            }
            return results;
        }

        private List<FlightResult.Halving> halvings(
                List<ErrorGroup> groups, List<Future<Optional<RatePosterior>>> halved, Optional<RatePosterior> all) {
            List<FlightResult.Halving> results = new ArrayList<>();
            for (int i = 0; i < groups.size(); i++) {
                String name = groups.get(i).name().toLowerCase(Locale.ROOT).replace('_', ' ');
                Optional<RatePosterior> rate = Workers.joined(halved.get(i));
                if (rate.isPresent() && all.isPresent()) {
                    double change = width(rate.get()) / width(all.get()) - 1;
                    results.add(new FlightResult.Halving(name, 100 * change));
                }
            }
            return results;
        }

        private String blame() {
            List<FlightModel> variants = withoutEach();
            List<String> culprits = new ArrayList<>();
            for (int i = 0; i < variants.size(); i++) {
                if (isPossible(variants.get(i))) {
                    culprits.add("'" + model.levels().get(i).name() + "'");
                }
            }
            return "no rate of the prior (" + prior.describe() + ") can have left this flight; "
                    + (culprits.isEmpty()
                            ? "leaving out any one level does not help"
                            : "without level " + String.join(" or ", culprits) + " one could");
        }
    }

    private static double width(RatePosterior posterior) {
        return posterior.shortestInterval(Interval.PROBABILITY_95).widthMetresPerKyr();
    }

    /** A run at half the effort is further off than the whole one: its distance bounds the error. */
    private static FlightResult.NumericalError difference(FlightAnswer answer, FlightAnswer rough) {
        double pairing = 0;
        for (int i = 0; i < answer.pairings().levels(); i++) {
            for (int j = 0; j < answer.pairings().rows(); j++) {
                pairing = Math.max(
                        pairing,
                        Math.abs(answer.pairings().probability(i, j)
                                - rough.pairings().probability(i, j)));
            }
        }
        return new FlightResult.NumericalError(
                Math.abs(answer.rate().mean() - rough.rate().mean()),
                Math.abs(answer.rate().logEvidence() - rough.rate().logEvidence()),
                pairing);
    }

    /** Threads of the executor ask whether to stop but report nothing. */
    private RunMonitor quietly() {
        return new RunMonitor() {
            @Override
            public void step(String what, double fraction) {}

            @Override
            public boolean isCancelled() {
                return monitor.isCancelled();
            }
        };
    }
}
