package stillstand.uplift;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.function.Function;
import java.util.function.ToDoubleFunction;
import stillstand.uncertainty.Interval;
import stillstand.uplift.FlightResult.Fate;

/**
 * The flight of one site under several accounts of sea level: each account weighs its own weight times the evidence of the flight
 * under it. What cannot be mixed, the most probable correlation and the rates slid by hand, is that of the heaviest account.
 */
public final class FlightMixture {
    private final List<FlightResult> flights;
    /** Of the accounts, together 1. */
    private final List<Double> weights;

    private final double logEvidence;

    private FlightMixture(List<FlightResult> flights, List<Double> priorWeights) {
        this.flights = List.copyOf(flights);
        double priors = priorWeights.stream().mapToDouble(w -> w).sum();
        double highest =
                flights.stream().mapToDouble(FlightResult::logEvidence).max().orElseThrow();
        List<Double> parts = new ArrayList<>();
        for (int k = 0; k < flights.size(); k++) {
            parts.add(priorWeights.get(k) / priors * Math.exp(flights.get(k).logEvidence() - highest));
        }
        double total = parts.stream().mapToDouble(w -> w).sum();
        weights = parts.stream().map(part -> part / total).toList();
        logEvidence = highest + Math.log(total);
    }

    /**
     * What each account weighs once the flight has been looked at: its weight times its evidence, together 1.
     *
     * @param priorWeights of the accounts, above 0; they need not add up to 1
     */
    public static List<Double> weights(List<FlightResult> flights, List<Double> priorWeights) {
        return new FlightMixture(flights, priorWeights).weights;
    }

    /**
     * The mixture.
     *
     * @param flights of one site, one for each account
     * @param priorWeights of the accounts, above 0; they need not add up to 1
     */
    public static FlightResult of(List<FlightResult> flights, List<Double> priorWeights) {
        return flights.size() == 1 ? flights.get(0) : new FlightMixture(flights, priorWeights).result();
    }

    /** Heights predicted and measured, mixed alike. */
    public static List<LevelResidual> residuals(
            List<FlightResult> flights, List<Double> priorWeights, List<List<LevelResidual>> residuals) {
        FlightMixture mixture = new FlightMixture(flights, priorWeights);
        Map<String, List<Integer>> parts = new LinkedHashMap<>();
        for (int k = 0; k < residuals.size(); k++) {
            int number = k;
            residuals
                    .get(k)
                    .forEach(each -> parts.computeIfAbsent(each.level(), level -> new ArrayList<>())
                            .add(number));
        }
        List<LevelResidual> mixed = new ArrayList<>();
        parts.forEach((level, accounts) -> {
            List<LevelResidual> own = accounts.stream()
                    .map(k -> residuals.get(k).stream()
                            .filter(each -> each.level().equals(level))
                            .findFirst()
                            .orElseThrow())
                    .toList();
            List<Double> shares = accounts.stream().map(mixture.weights::get).toList();
            double mean = mean(own, shares, LevelResidual::predictedMetres);
            mixed.add(new LevelResidual(
                    own.get(0).site(),
                    level,
                    mean,
                    own.get(0).measuredMetres(),
                    spread(own, shares, mean, LevelResidual::predictedMetres, LevelResidual::sigmaMetres)));
        });
        return mixed;
    }

    private static <T> double mean(List<T> parts, List<Double> shares, ToDoubleFunction<T> value) {
        double sum = 0;
        double total = 0;
        for (int k = 0; k < parts.size(); k++) {
            sum += shares.get(k) * value.applyAsDouble(parts.get(k));
            total += shares.get(k);
        }
        return total > 0 ? sum / total : value.applyAsDouble(parts.get(0));
    }

    private static <T> double spread(
            List<T> parts, List<Double> shares, double mean, ToDoubleFunction<T> value, ToDoubleFunction<T> sigma) {
        return Math.sqrt(mean(
                parts,
                shares,
                part -> Math.pow(value.applyAsDouble(part) - mean, 2) + Math.pow(sigma.applyAsDouble(part), 2)));
    }

    private FlightResult result() {
        int heaviest = 0;
        for (int k = 1; k < weights.size(); k++) {
            heaviest = weights.get(k) > weights.get(heaviest) ? k : heaviest;
        }
        FlightResult main = flights.get(heaviest);
        Rate rate = mixed(FlightResult::rate);
        RatePosterior density =
                RateMixture.posterior(flights.stream().map(FlightResult::rate).toList(), weights);
        List<RateRegion> regions68 = density.highestDensityRegionsOfDraws(Interval.PROBABILITY_68);
        List<RateRegion> regions95 = density.highestDensityRegionsOfDraws(Interval.PROBABILITY_95);
        return new FlightResult(
                main.site(),
                main.model(),
                rate,
                RateMixture.probability(
                        flights.stream().map(FlightResult::probabilityUplift).toList(), weights),
                FlightSummary.bound(rate),
                RateRegion.intervals(regions68),
                RateRegion.intervals(regions95),
                RateRegion.probabilities(regions68),
                RateRegion.probabilities(regions95),
                segments(main),
                pairings(main),
                unmatched(main),
                mean(FlightResult::probabilityAllStray),
                main.mostProbable(),
                predictedAges(main),
                logEvidence,
                new FlightResult.NumericalError(
                        mean(flight -> flight.numericalError().mean()),
                        mean(flight -> flight.numericalError().logEvidence()),
                        mean(flight -> flight.numericalError().pairing())),
                fates(),
                leftOut(main),
                halving(main),
                main.slidingFits(),
                modelChoice(main),
                main.history().map(this::history));
    }

    /** Bin by bin, and change by change where all accounts have as many; else those of the heaviest. */
    private RateHistory history(RateHistory own) {
        List<RateHistory> all =
                flights.stream().flatMap(flight -> flight.history().stream()).toList();
        boolean alike = all.size() == flights.size()
                && all.stream()
                        .allMatch(other -> other.bins().size() == own.bins().size()
                                && other.changes().size() == own.changes().size());
        if (!alike) {
            return own;
        }
        List<FlightResult.Segment> bins = new ArrayList<>();
        for (int i = 0; i < own.bins().size(); i++) {
            int number = i;
            bins.add(new FlightResult.Segment(
                    own.bins().get(i).fromKa(),
                    own.bins().get(i).toKa(),
                    RateMixture.of(
                            all.stream()
                                    .map(each -> each.bins().get(number).rate())
                                    .toList(),
                            weights)));
        }
        List<RateHistory.Change> changes = new ArrayList<>();
        for (int i = 0; i < own.changes().size(); i++) {
            int number = i;
            List<RateHistory.Change> each =
                    all.stream().map(other -> other.changes().get(number)).toList();
            changes.add(new RateHistory.Change(
                    own.changes().get(i).model(),
                    QuantityMixture.of(
                            each.stream().map(RateHistory.Change::age).toList(), weights),
                    mean(each, weights, RateHistory.Change::probabilityFasterBefore),
                    own.changes().get(i).datedYounger(),
                    own.changes().get(i).datedOlder()));
        }
        return new RateHistory(changes, bins);
    }

    private double mean(ToDoubleFunction<FlightResult> value) {
        return mean(flights, weights, value);
    }

    private Rate mixed(Function<FlightResult, Rate> rate) {
        return RateMixture.of(flights.stream().map(rate).toList(), weights);
    }

    /** Stretch by stretch where all accounts have as many; else those of the heaviest. */
    private List<FlightResult.Segment> segments(FlightResult main) {
        if (!flights.stream()
                .allMatch(flight -> flight.segments().size() == main.segments().size())) {
            return main.segments();
        }
        List<FlightResult.Segment> mixed = new ArrayList<>();
        for (int i = 0; i < main.segments().size(); i++) {
            int number = i;
            FlightResult.Segment own = main.segments().get(i);
            mixed.add(new FlightResult.Segment(
                    own.fromKa(),
                    own.toKa(),
                    mixed(flight -> flight.segments().get(number).rate())));
        }
        return mixed;
    }

    private List<FlightResult.Pairing> pairings(FlightResult main) {
        List<FlightResult.Pairing> mixed = new ArrayList<>();
        for (FlightResult.Unmatched level : main.unmatched()) {
            Map<String, Double> byStage = new LinkedHashMap<>();
            for (int k = 0; k < flights.size(); k++) {
                double weight = weights.get(k);
                flights.get(k)
                        .pairingsOf(level.level())
                        .forEach(pair -> byStage.merge(pair.highstand(), weight * pair.probability(), Double::sum));
            }
            byStage.entrySet().stream()
                    .filter(entry -> entry.getValue() >= FlightSummary.LEAST_PROBABILITY)
                    .sorted(Comparator.comparing((Map.Entry<String, Double> entry) -> -entry.getValue()))
                    .forEach(entry -> mixed.add(new FlightResult.Pairing(
                            level.level(), entry.getKey(), FlightSummary.rounded(entry.getValue()))));
        }
        return mixed;
    }

    private List<FlightResult.Unmatched> unmatched(FlightResult main) {
        return main.unmatched().stream()
                .map(level -> new FlightResult.Unmatched(
                        level.level(),
                        FlightSummary.rounded(mean(flight ->
                                flight.probabilityUnmatched(level.level()).orElse(1.0)))))
                .toList();
    }

    private List<FlightResult.PredictedAge> predictedAges(FlightResult main) {
        List<FlightResult.PredictedAge> mixed = new ArrayList<>();
        for (FlightResult.Unmatched level : main.unmatched()) {
            List<Quantity> ages = new ArrayList<>();
            List<Double> shares = new ArrayList<>();
            for (int k = 0; k < flights.size(); k++) {
                double weight = weights.get(k)
                        * (1
                                - flights.get(k)
                                        .probabilityUnmatched(level.level())
                                        .orElse(1.0));
                flights.get(k).predictedAges().stream()
                        .filter(age -> weight > 0 && age.level().equals(level.level()))
                        .findFirst()
                        .ifPresent(age -> {
                            ages.add(age.age());
                            shares.add(weight);
                        });
            }
            if (!ages.isEmpty()) {
                mixed.add(new FlightResult.PredictedAge(level.level(), QuantityMixture.of(ages, shares)));
            }
        }
        return mixed;
    }

    /** A highstand that an account lacks is absent under it; generic older rows are those of each account by their order. */
    private List<Fate> fates() {
        Map<String, List<Fate>> parts = new LinkedHashMap<>();
        Map<String, List<Double>> shares = new LinkedHashMap<>();
        for (int k = 0; k < flights.size(); k++) {
            Map<String, Integer> seen = new LinkedHashMap<>();
            for (Fate fate : flights.get(k).missing()) {
                String key = fate.highstand() + " " + seen.merge(fate.highstand(), 1, Integer::sum);
                parts.computeIfAbsent(key, each -> new ArrayList<>()).add(fate);
                shares.computeIfAbsent(key, each -> new ArrayList<>()).add(weights.get(k));
            }
        }
        List<Fate> mixed = new ArrayList<>();
        parts.forEach((key, fates) -> mixed.add(fate(fates, shares.getOrDefault(key, List.of()))));
        mixed.sort(Comparator.comparingDouble(Fate::ageKa));
        return mixed;
    }

    private static Fate fate(List<Fate> fates, List<Double> shares) {
        double held = shares.stream().mapToDouble(w -> w).sum();
        double height = mean(fates, shares, Fate::heightMetres);
        double recorded = held * mean(fates, shares, Fate::recorded);
        double unseen = held * mean(fates, shares, Fate::unseen);
        double reoccupied = held * mean(fates, shares, Fate::reoccupied);
        double outside = held * mean(fates, shares, Fate::outside);
        return new Fate(
                fates.get(0).highstand(),
                mean(fates, shares, Fate::ageKa),
                height,
                spread(fates, shares, height, Fate::heightMetres, Fate::heightSigmaMetres),
                recorded,
                unseen,
                reoccupied,
                outside,
                Math.max(0, 1 - recorded - unseen - reoccupied - outside));
    }

    /** The evidence without a level is summed over the accounts like that with it. */
    private List<FlightResult.LeftOut> leftOut(FlightResult main) {
        List<FlightResult.LeftOut> mixed = new ArrayList<>();
        for (FlightResult.LeftOut own : main.leaveOneOut()) {
            List<Rate> rates = new ArrayList<>();
            List<Double> parts = new ArrayList<>();
            for (int k = 0; k < flights.size(); k++) {
                double weight = weights.get(k);
                flights.get(k).leaveOneOut().stream()
                        .filter(out -> out.level().equals(own.level()))
                        .findFirst()
                        .ifPresent(out -> {
                            rates.add(out.rate());
                            parts.add(weight * Math.exp(-out.logPredictive()));
                        });
            }
            double without = parts.stream().mapToDouble(w -> w).sum();
            if (rates.size() == flights.size() && without > 0 && without < Double.POSITIVE_INFINITY) {
                mixed.add(new FlightResult.LeftOut(own.level(), -Math.log(without), RateMixture.of(rates, parts)));
            }
        }
        return mixed;
    }

    private List<FlightResult.Halving> halving(FlightResult main) {
        return main.halving().stream()
                .map(half -> new FlightResult.Halving(
                        half.error(),
                        mean(flight -> flight.halving().stream()
                                .filter(each -> each.error().equals(half.error()))
                                .mapToDouble(FlightResult.Halving::width95ChangePercent)
                                .findFirst()
                                .orElse(half.width95ChangePercent()))))
                .toList();
    }

    private static double weight(FlightResult flight, String model) {
        return flight.modelChoice().stream()
                .filter(each -> each.model().equals(model))
                .flatMap(each -> each.weight().stream())
                .findFirst()
                .orElse(0.0);
    }

    /** Evidence of each model of the rate through time, summed over the accounts. */
    private List<FlightResult.ModelEvidence> modelChoice(FlightResult main) {
        List<FlightResult.ModelEvidence> mixed = new ArrayList<>();
        double constant = 0;
        for (FlightResult.ModelEvidence model : main.modelChoice()) {
            double sum = 0;
            for (int k = 0; k < flights.size(); k++) {
                FlightResult flight = flights.get(k);
                double log = flight.modelChoice().stream()
                        .filter(each -> each.model().equals(model.model()))
                        .mapToDouble(FlightResult.ModelEvidence::logEvidence)
                        .findFirst()
                        .orElse(Double.NEGATIVE_INFINITY);
                sum += weights.get(k) * Math.exp(log - flight.logEvidence());
            }
            double log = logEvidence + Math.log(sum);
            constant = mixed.isEmpty() ? log : constant;
            mixed.add(new FlightResult.ModelEvidence(
                    model.model(),
                    log,
                    (log - constant) / Math.log(10),
                    model.numericalError(),
                    model.weight().map(own -> mean(flight -> weight(flight, model.model()))),
                    model.prior()));
        }
        return mixed;
    }
}
