package stillstand.uplift;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.concurrent.ExecutorService;
import java.util.function.DoublePredicate;
import java.util.function.ToDoubleFunction;
import stillstand.ledger.Assumption;
import stillstand.ledger.RunCancelledException;
import stillstand.ledger.RunMonitor;
import stillstand.uncertainty.DrawStreams;
import stillstand.uncertainty.Interval;

/**
 * The flights of sites whose rate may change with time: each model of {@link RateChanges} by {@link HistoryMonteCarlo}, its evidence
 * against the constant rate's, and one answer, in which several models weigh by their evidence.
 */
final class ChangingFlights {
    private static final int DRAWS = 1000;
    private static final double BIN_KA = 50;
    private static final double LAST_BIN_ENDS_KA = 500;
    private static final double RECORDED = 0.05;
    /** A date with a larger spread than this tells no change of rate from another pairing, ka. */
    private static final double DATED_WITHIN_KA = 60;

    private final DrawStreams streams;
    private final ExecutorService executor;
    private final RunMonitor monitor;
    private final RateChanges changes;

    /**
     * @param streams all randomness
     * @param executor runs the parts of a flight; not owned, and needs a thread that is not the caller's
     * @param monitor is told of each model and asked whether to stop
     * @param changes how the rate may change
     */
    ChangingFlights(DrawStreams streams, ExecutorService executor, RunMonitor monitor, RateChanges changes) {
        this.streams = streams;
        this.executor = executor;
        this.monitor = monitor;
        this.changes = changes;
    }

    /**
     * The flight of a site whose constant rate is known already.
     *
     * @param site its name
     * @param constant the flight under a constant rate
     * @throws IllegalArgumentException if no history of the prior can have left the flight
     * @throws RunCancelledException if the monitor asks to stop
     */
    Flights.Answered of(String site, FlightSetup setup, RatePrior prior, Flights.Answered constant) {
        List<HistoryDraws> models = new ArrayList<>();
        for (HistoryPrior model : changes.answering(prior)) {
            models.add(draws(site, setup, model, constant.flight()));
        }
        return new Question(site, setup.model(), prior, constant, models).answer();
    }

    private HistoryDraws draws(String site, FlightSetup setup, HistoryPrior model, FlightResult constant) {
        String key = site + " / flight, " + model.name();
        monitor.within(key);
        HistoryDraws draws = HistoryMonteCarlo.draws(
                setup.model(),
                model,
                setup.shared(),
                HistoryMonteCarlo.Effort.FULL,
                streams,
                key,
                monitor,
                Workers.of(executor));
        return model instanceof HistoryPrior.Steady
                ? draws.withLogEvidence(
                        constant.logEvidence(), constant.numericalError().logEvidence())
                : draws;
    }

    /** One site, its models drawn. */
    private final class Question {
        private final String site;
        private final FlightModel model;
        private final RatePrior prior;
        private final Flights.Answered constant;
        private final List<HistoryDraws> models;
        private final HistoryDraws all;

        Question(
                String site, FlightModel model, RatePrior prior, Flights.Answered constant, List<HistoryDraws> models) {
            this.site = site;
            this.model = model;
            this.prior = prior;
            this.constant = constant;
            this.models = models;
            all = mixed();
        }

        /** All models in one, equally probable beforehand. */
        private HistoryDraws mixed() {
            double top =
                    models.stream().mapToDouble(HistoryDraws::logEvidence).max().orElseThrow();
            List<HistoryDraws.Draw> draws = new ArrayList<>();
            double total = 0;
            double error = 0;
            double stray = 0;
            for (HistoryDraws one : models) {
                double evidence = Math.exp(one.logEvidence() - top);
                total += evidence;
                error = Math.hypot(error, evidence * one.logEvidenceError());
                stray += Math.exp(one.logAllStray() - top);
                double scale = evidence / one.totalWeight();
                one.draws().forEach(draw -> draws.add(new HistoryDraws.Draw(draw.chosen(), draw.weight() * scale)));
            }
            HistoryDraws first = models.get(0);
            return new HistoryDraws(
                    first.prior(),
                    first.islands(),
                    draws,
                    top + Math.log(total / models.size()),
                    error / total,
                    top + Math.log(stray / models.size()),
                    first.coarse(),
                    first.fine());
        }

        Flights.Answered answer() {
            WeightedRates today = all.of(history -> history.rateMetresPerKyrAt(0));
            RatePosterior posterior = today.posterior(all.logEvidence());
            List<ChosenDraws.Chosen> chosen = new ArrayList<>();
            for (int k : today.chosen(DRAWS)) {
                chosen.add(all.draws().get(k).chosen());
            }
            ChosenDraws.Found found = new ChosenDraws(all.coarse(), all.fine(), chosen, all.islands(), monitor)
                    .found(streams, "changing flight of " + site, Workers.of(executor));
            double stray = Math.exp(all.logAllStray() - all.logEvidence());
            FlightAnswer answer = new FlightAnswer(
                    posterior,
                    found.table(),
                    found.ages(),
                    found.positions(),
                    model.countsAllStray() ? Math.min(1, stray) : stray / (1 + stray));
            FlightSummary summary = new FlightSummary(site, model, answer, found.joint());
            Rate rate = Rate.of(posterior);
            List<RateRegion> regions68 = posterior.highestDensityRegionsOfDraws(Interval.PROBABILITY_68);
            List<RateRegion> regions95 = posterior.highestDensityRegionsOfDraws(Interval.PROBABILITY_95);
            List<FlightResult.Fate> fates = summary.fates();
            List<FlightResult.Segment> bins = bins(fates);
            FlightResult result = new FlightResult(
                    site,
                    changes.name(),
                    rate,
                    prior.isTwoSided() ? Optional.of(posterior.probabilityUplift()) : Optional.empty(),
                    FlightSummary.bound(rate),
                    RateRegion.intervals(regions68),
                    RateRegion.intervals(regions95),
                    RateRegion.probabilities(regions68),
                    RateRegion.probabilities(regions95),
                    models.size() == 1 && models.get(0).prior() instanceof HistoryPrior.Stepped stepped
                            ? stretches(stepped)
                            : bins,
                    summary.pairings(),
                    summary.unmatched(),
                    answer.probabilityAllStray(),
                    summary.mostProbable(),
                    summary.predictedAges(),
                    all.logEvidence(),
                    new FlightResult.NumericalError(meanError(today), all.logEvidenceError(), found.pairingError()),
                    fates,
                    List.of(),
                    List.of(),
                    List.of(),
                    modelChoice(),
                    Optional.of(new RateHistory(changesFound(), bins)));
            return new Flights.Answered(result, summary.residuals(), assumptions());
        }

        private double meanError(WeightedRates rates) {
            double[] without = new double[all.islands()];
            for (int island = 0; island < without.length; island++) {
                without[island] = rates.mean(island);
            }
            return FlightMonteCarlo.jackknife(without);
        }

        /** The stretches of a model with steps, each with its own rate; they part at the median ages of the changes. */
        private List<FlightResult.Segment> stretches(HistoryPrior.Stepped stepped) {
            List<FlightResult.Segment> stretches = new ArrayList<>();
            double fromKa = 0;
            for (int i = 0; i <= stepped.changes(); i++) {
                int number = i;
                Optional<Double> toKa = i == stepped.changes()
                        ? Optional.empty()
                        : Optional.of(models.get(0)
                                .changesKa(i)
                                .map(ages -> ages.quantiles(new double[] {0.5}, -1)[0])
                                .orElse(stepped.fromKa()));
                stretches.add(new FlightResult.Segment(
                        fromKa,
                        toKa,
                        Rate.of(all.of(history -> ((UpliftHistory.SteppedRate) history)
                                        .ratesMetresPerKyr()
                                        .get(number))
                                .posterior(0))));
                fromKa = toKa.orElse(fromKa);
            }
            return stretches;
        }

        /** Mean rate over even bins of time, up to the oldest highstand that some level may record. */
        private List<FlightResult.Segment> bins(List<FlightResult.Fate> fates) {
            double oldestKa = fates.stream()
                    .filter(fate -> fate.recorded() > RECORDED)
                    .mapToDouble(FlightResult.Fate::ageKa)
                    .max()
                    .orElse(BIN_KA);
            double untilKa = Math.min(LAST_BIN_ENDS_KA, BIN_KA * Math.max(2, Math.ceil(oldestKa / BIN_KA)));
            List<FlightResult.Segment> bins = new ArrayList<>();
            for (double from = 0; from < untilKa; from += BIN_KA) {
                double young = from;
                double old = from + BIN_KA;
                ToDoubleFunction<UpliftHistory> mean =
                        history -> (history.upliftMetresSince(old) - history.upliftMetresSince(young)) / (old - young);
                bins.add(new FlightResult.Segment(
                        young, Optional.of(old), Rate.of(all.of(mean).posterior(0))));
            }
            return bins;
        }

        private List<RateHistory.Change> changesFound() {
            Optional<HistoryDraws> best = models.stream()
                    .filter(one -> one.prior() instanceof HistoryPrior.Stepped)
                    .max(Comparator.comparingDouble(HistoryDraws::logEvidence));
            List<RateHistory.Change> found = new ArrayList<>();
            if (best.isPresent()) {
                HistoryPrior.Stepped stepped = (HistoryPrior.Stepped) best.get().prior();
                for (int i = 0; i < stepped.changes(); i++) {
                    found.add(change(best.get(), stepped, i));
                }
            }
            return found;
        }

        private RateHistory.Change change(HistoryDraws draws, HistoryPrior.Stepped stepped, int number) {
            Quantity age = draws.changesKa(number)
                    .map(ages -> ages.quantity("ka"))
                    .orElseGet(() -> new Quantity(
                            stepped.fromKa(),
                            Optional.of(stepped.fromKa()),
                            Optional.of(0.0),
                            new Interval(stepped.fromKa(), stepped.fromKa()),
                            new Interval(stepped.fromKa(), stepped.fromKa()),
                            "ka"));
            WeightedRates faster = draws.of(history -> {
                List<Double> rates = ((UpliftHistory.SteppedRate) history).ratesMetresPerKyr();
                return rates.get(number + 1) > rates.get(number) ? 1 : 0;
            });
            return new RateHistory.Change(
                    stepped.name(),
                    age,
                    faster.mean(-1),
                    isDated(ka -> ka < age.median()),
                    isDated(ka -> ka > age.median()));
        }

        private boolean isDated(DoublePredicate side) {
            return model.levels().stream()
                    .flatMap(level -> level.datesKa().stream())
                    .anyMatch(date -> date.standardDeviation() < DATED_WITHIN_KA && side.test(date.mean()));
        }

        private List<FlightResult.ModelEvidence> modelChoice() {
            double steady = constant.flight().logEvidence();
            double steadyError = constant.flight().numericalError().logEvidence();
            double total = models.stream()
                    .mapToDouble(one -> Math.exp(one.logEvidence() - all.logEvidence()))
                    .sum();
            List<FlightResult.ModelEvidence> choice = new ArrayList<>();
            if (models.stream().noneMatch(one -> one.prior() instanceof HistoryPrior.Steady)) {
                choice.add(new FlightResult.ModelEvidence(
                        FlightResult.CONSTANT,
                        steady,
                        0,
                        Optional.of(steadyError),
                        Optional.of(0.0),
                        Optional.of(new HistoryPrior.Steady(prior).describe())));
            }
            for (HistoryDraws one : models) {
                choice.add(new FlightResult.ModelEvidence(
                        one.prior().name(),
                        one.logEvidence(),
                        (one.logEvidence() - steady) / Math.log(10),
                        Optional.of(one.logEvidenceError()),
                        Optional.of(Math.exp(one.logEvidence() - all.logEvidence()) / total),
                        Optional.of(one.prior().describe())));
            }
            return choice;
        }

        private List<Assumption> assumptions() {
            List<Assumption> said = new ArrayList<>(constant.assumptions());
            for (HistoryDraws one : models) {
                said.add(new Assumption(
                        "prior ranges of the model of the rate: " + one.prior().name(),
                        one.prior().describe(),
                        "study.json or its default; the evidence depends on them",
                        site));
            }
            HistoryMonteCarlo.Effort effort = HistoryMonteCarlo.Effort.FULL;
            said.add(new Assumption(
                    "a rate that may change is worked out",
                    String.format(
                            Locale.ROOT,
                            "by tempered populations: %d independent ones of %d points, at %d and %d cells of height",
                            effort.islands(),
                            effort.points(),
                            effort.cells(),
                            2 * effort.cells()),
                    "Stillstand; what single levels and errors do is not worked out for it",
                    site));
            if (models.size() > 1) {
                said.add(new Assumption(
                        "models of the rate beforehand",
                        "equally probable: each weighs by its evidence",
                        "Stillstand's default",
                        site));
            }
            return said;
        }
    }
}
