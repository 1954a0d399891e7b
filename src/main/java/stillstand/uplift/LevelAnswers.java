package stillstand.uplift;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.concurrent.ExecutionException;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Future;
import stillstand.dating.Replicates;
import stillstand.ledger.Assumption;
import stillstand.ledger.RunCancelledException;
import stillstand.sealevel.SeaLevelCurve;
import stillstand.shoreline.DatedSample;
import stillstand.shoreline.FormerSeaLevel;
import stillstand.shoreline.HeightTerm;
import stillstand.shoreline.IndicativeRule;
import stillstand.shoreline.Level;
import stillstand.shoreline.Site;
import stillstand.uncertainty.DrawStreams;
import stillstand.uncertainty.Exact;
import stillstand.uncertainty.Interval;
import stillstand.uncertainty.Summary;
import stillstand.uncertainty.Uncertain;

/** The answer of each level by itself, with the rates of its corals beside it. */
public final class LevelAnswers {
    /** Why a level that is one earthquake's step never has a rate. */
    public static final String ONE_EARTHQUAKE = "it is one earthquake's step and records no sea level";

    private static final int SCRAMBLES_OF_A_BUDGET = 8;
    private static final double SUPPOSED_CUT = 1e-3;
    /** A height known exactly still needs some spread in a covariance. */
    private static final double LEAST_SIGMA_METRES = 1e-3;

    private final LevelRates rates;
    private final DrawStreams streams;
    private final DrawPlan plan;
    private final ExecutorService executor;
    private final IndicativeRule rule;
    private final DateRules dates;

    /**
     * @param rates draws
     * @param streams all randomness
     * @param plan how many draws
     * @param executor runs budgets beside the draws; not owned
     * @param rule what an indicative range means
     * @param dates how far dates are believed
     */
    public LevelAnswers(
            LevelRates rates,
            DrawStreams streams,
            DrawPlan plan,
            ExecutorService executor,
            IndicativeRule rule,
            DateRules dates) {
        this.rates = rates;
        this.streams = streams;
        this.plan = plan;
        this.executor = executor;
        this.rule = rule;
        this.dates = dates;
    }

    /**
     * A level's answer.
     *
     * @param answer without a rate where the level waits
     * @param whyWaiting why it has no rate
     * @param assumptions what the answer rests on beside the study's own ledger
     */
    public record Answered(LevelAnswer answer, Optional<String> whyWaiting, List<Assumption> assumptions) {
        public Answered {
            assumptions = List.copyOf(assumptions);
        }
    }

    /**
     * The answer of one level.
     *
     * @param prior of the rate of its site
     * @throws RunCancelledException if the monitor of the rates asks to stop
     */
    public Answered of(Site site, Level level, SeaLevelBasis basis, RatePrior prior) {
        return of(site, level, SeaLevelEnsemble.of(basis), prior);
    }

    /**
     * The answer of one level under several accounts of sea level: their mixture by weight.
     *
     * @param prior of the rate of its site
     * @throws RunCancelledException if the monitor of the rates asks to stop
     */
    public Answered of(Site site, Level level, SeaLevelEnsemble ensemble, RatePrior prior) {
        String where = site.name() + " / " + level.name();
        LevelExplanations found = LevelExplanations.of(level, ensemble, dates, where);
        List<Assumption> assumptions = new ArrayList<>(found.assumptions());
        List<LevelAnswer.SampleAnswer> samples = new ArrayList<>();
        for (DatedSample sample : level.samples()) {
            samples.add(ofSample(site, sample, ensemble, prior, where));
        }
        Optional<Rate> together = coralsTogether(site, level, ensemble, prior);
        Optional<LevelAnswer.Agreement> agreement = agreement(level);
        if (found.explanations().isEmpty()) {
            LevelAnswer waiting = new LevelAnswer(
                    site.name(),
                    level.name(),
                    List.of(),
                    Optional.empty(),
                    Optional.empty(),
                    Optional.empty(),
                    Optional.empty(),
                    Optional.empty(),
                    Optional.empty(),
                    Optional.empty(),
                    Optional.empty(),
                    Optional.empty(),
                    samples,
                    together,
                    agreement);
            return new Answered(waiting, Optional.of(found.whyNone()), assumptions);
        }
        List<HeightTerm> height = FormerSeaLevel.ofLandform(site, level, rule);
        Uncertain lowering = level.loweringMetresPerKyr();
        String key = site.name() + " / " + level.name();
        Future<Optional<LevelAnswer.Budget>> budget =
                executor.submit(() -> new RateBudget(height, lowering, found.explanations(), choice(ensemble))
                        .shares(streams, key, scrambles()));
        LevelRates.Outcome outcome = rates.of(key, height, lowering, found.explanations(), prior);
        assumptions.addAll(said(outcome, found, prior, where));
        LevelAnswer answer = new LevelAnswer(
                site.name(),
                level.name(),
                stages(found.explanations()),
                Optional.of(outcome.rate()),
                outcome.rateWithPrior(),
                found.explanations().size() == 1
                        ? Optional.of(FirstOrderRate.of(
                                height, lowering, found.explanations().get(0)))
                        : Optional.empty(),
                Optional.of(outcome.age()),
                Optional.of(outcome.relativeSeaLevelMetres()),
                outcome.probabilityUplift(),
                bound(outcome.rate()),
                joined(budget).filter(shares -> outcome.rate().sd().isPresent()),
                Optional.of(outcome.monteCarlo()),
                samples,
                together,
                agreement);
        return new Answered(answer, Optional.empty(), assumptions);
    }

    /** Rate of a level, as propagated, and the highstand that it most probably records. */
    public record Found(Rate rate, Optional<String> highstand) {}

    /** The rate of a level under one account of sea level; empty where that says nothing of it. */
    public Optional<Found> rateUnder(Site site, Level level, SeaLevelBasis basis, RatePrior prior) {
        String where = site.name() + " / " + level.name();
        List<SeaAtLevel> explanations =
                LevelExplanations.of(level, basis, dates, where).explanations();
        if (explanations.isEmpty()) {
            return Optional.empty();
        }
        LevelRates.Outcome outcome = rates.of(
                where, FormerSeaLevel.ofLandform(site, level, rule), level.loweringMetresPerKyr(), explanations, prior);
        return Optional.of(new Found(
                outcome.rate(),
                stages(explanations).stream().findFirst().map(LevelAnswer.StageProbability::highstand)));
    }

    /** What the choice among explanations is a question of. */
    private static InputGroup choice(SeaLevelEnsemble ensemble) {
        return ensemble.size() > 1 ? InputGroup.SEA_LEVEL : InputGroup.AGE;
    }

    private int scrambles() {
        return Math.max(2, Math.min(SCRAMBLES_OF_A_BUDGET, plan.mostBlocks()));
    }

    private static Optional<LevelAnswer.Budget> joined(Future<Optional<LevelAnswer.Budget>> budget) {
        try {
            return budget.get();
        } catch (InterruptedException e) {
            Thread.currentThread().interrupt();
            throw new RunCancelledException();
        } catch (ExecutionException e) {
            throw new IllegalStateException(e.getCause());
        }
    }

    private static List<LevelAnswer.StageProbability> stages(List<SeaAtLevel> explanations) {
        Map<String, Double> byStage = new LinkedHashMap<>();
        for (SeaAtLevel sea : explanations) {
            if (sea instanceof SeaAtLevel.AtHighstand stand) {
                byStage.merge(stand.stage(), stand.probability(), (one, other) -> Math.min(1, one + other));
            }
        }
        List<LevelAnswer.StageProbability> stages = new ArrayList<>();
        byStage.forEach((stage, probability) -> stages.add(new LevelAnswer.StageProbability(stage, probability)));
        stages.sort((a, b) -> Double.compare(b.probability(), a.probability()));
        return stages;
    }

    /** Where the 95 % interval holds 0, all one may say is how slow the coast must be. */
    private static Optional<LevelAnswer.Bound> bound(Rate rate) {
        Interval interval = rate.interval95();
        return interval.contains(0)
                ? Optional.of(new LevelAnswer.Bound(interval.high(), -interval.low(), Interval.PROBABILITY_95))
                : Optional.empty();
    }

    private static List<Assumption> said(
            LevelRates.Outcome outcome, LevelExplanations found, RatePrior prior, String where) {
        List<Assumption> said = new ArrayList<>();
        if (outcome.beyondCurve() > 0) {
            said.add(new Assumption(
                    "draws whose age lies beyond the curve count for nothing",
                    String.format(Locale.ROOT, "%.3g of the draws", outcome.beyondCurve()),
                    "a curve is never extrapolated",
                    where));
        }
        for (SeaAtLevel sea : found.explanations()) {
            double cut = DatedStage.cutAway(sea.ageKa());
            if (cut > SUPPOSED_CUT) {
                said.add(new Assumption(
                        "age is cut off at " + DatedStage.YOUNGEST_KA + " ka",
                        String.format(Locale.ROOT, "%.2g of its probability lay below", cut),
                        "a level cannot be younger than today",
                        where));
            }
        }
        if (outcome.rateWithPrior().isEmpty()) {
            said.add(new Assumption(
                    "no rate under the prior",
                    prior.describe() + " excludes all, or all but a few, of the draws",
                    "the prior of the site or study",
                    where));
        }
        if (!prior.isTwoSided()) {
            said.add(new Assumption(
                    "no probability of uplift",
                    prior.describe() + " allows one sign only",
                    "the prior of the site or study",
                    where));
        }
        if (outcome.rate().mean().isEmpty()) {
            said.add(new Assumption(
                    "no mean and no budget of the rate",
                    "the age may be near zero, where a quotient has no mean",
                    "compare Hinkley 1969, Biometrika 56, 635-639 (recalled)",
                    where));
        }
        return said;
    }

    /** A coral's own age, and its rate where its height, its depth and a curve allow one. */
    private LevelAnswer.SampleAnswer ofSample(
            Site site, DatedSample sample, SeaLevelEnsemble ensemble, RatePrior prior, String where) {
        Optional<Quantity> age = sample.ageKa().map(a -> Quantity.of(Summary.of(a), "ka"));
        List<SeaAtLevel> readings = new ArrayList<>();
        double speaking = 0;
        for (int k = 0; k < ensemble.size(); k++) {
            SeaLevelBasis basis = ensemble.bases().get(k);
            if (whyNoRate(sample, basis).isEmpty()) {
                double weight = ensemble.weights().get(k);
                speaking += weight;
                readings.add(LevelExplanations.onCurve(
                                basis.curve().orElseThrow(), sample.ageKa().orElseThrow(), basis)
                        .withProbability(weight));
            }
        }
        if (readings.isEmpty()) {
            return new LevelAnswer.SampleAnswer(
                    sample.name(),
                    age,
                    Optional.empty(),
                    whyNoRate(sample, ensemble.bases().get(0)));
        }
        double all = speaking;
        readings.replaceAll(sea -> sea.withProbability(Math.min(1, sea.probability() / all)));
        List<HeightTerm> height = FormerSeaLevel.ofCoral(
                site,
                sample.elevationMetres().orElseThrow(),
                sample.depthMetres().orElseThrow());
        LevelRates.Outcome outcome =
                rates.of(where + " / sample " + sample.name(), height, new Exact(0), readings, prior);
        return new LevelAnswer.SampleAnswer(sample.name(), age, Optional.of(outcome.rate()), Optional.empty());
    }

    private static Optional<Rate> coralsTogether(Site site, Level level, SeaLevelEnsemble ensemble, RatePrior prior) {
        List<Rate> rates = new ArrayList<>();
        List<Double> weights = new ArrayList<>();
        for (int k = 0; k < ensemble.size(); k++) {
            Optional<Rate> rate = coralsTogether(site, level, ensemble.bases().get(k), prior);
            if (rate.isPresent()) {
                rates.add(rate.get());
                weights.add(ensemble.weights().get(k));
            }
        }
        return rates.isEmpty() ? Optional.empty() : Optional.of(RateMixture.of(rates, weights));
    }

    /** One rate for the corals that a curve can be read for; the datum of the site is one of the things they share. */
    public static Optional<Rate> coralsTogether(Site site, Level level, SeaLevelBasis basis, RatePrior prior) {
        List<CoralsTogether.Coral> corals = new ArrayList<>();
        for (DatedSample sample : level.samples()) {
            if (whyNoRate(sample, basis).isEmpty()) {
                Uncertain ageKa = sample.ageKa().orElseThrow();
                Uncertain elevation = sample.elevationMetres().orElseThrow();
                Uncertain depth = sample.depthMetres().orElseThrow();
                SeaLevelCurve curve = basis.curve().orElseThrow();
                Uncertain sea = curve.readAt(ageKa.mean());
                corals.add(new CoralsTogether.Coral(
                        elevation.mean() - site.datumOffsetMetres().mean() + depth.mean(),
                        Math.max(
                                LEAST_SIGMA_METRES,
                                Math.hypot(elevation.standardDeviation(), depth.standardDeviation())),
                        ageKa.mean(),
                        ageKa.standardDeviation(),
                        sea.mean(),
                        curve.slopeMetresPerKaAt(ageKa.mean()),
                        sea.standardDeviation()));
            }
        }
        if (corals.size() < 2) {
            return Optional.empty();
        }
        SeaLevelCurve curve = basis.curve().orElseThrow();
        double offsetSigmaMetres = LevelExplanations.offsetSigmaMetres(basis);
        return Optional.of(Rate.of(CoralsTogether.rate(
                corals,
                Math.hypot(offsetSigmaMetres, site.datumOffsetMetres().standardDeviation()),
                curve.facts().curveAgeSigmaKa(),
                curve.facts().correlationTimeKa(),
                prior)));
    }

    /** Why a sample has no rate of its own, as a coral read on the curve at its own age; empty where it has one. */
    public static Optional<String> whyNoRate(DatedSample sample, SeaLevelBasis basis) {
        if (!sample.used()) {
            return Optional.of(sample.reason().isEmpty() ? "set aside" : "set aside: " + sample.reason());
        }
        if (sample.ageKa().isEmpty()) {
            return Optional.of("no age");
        }
        if (sample.dates() != DatedSample.Role.LEVEL) {
            return Optional.of("its age bounds the level on one side only");
        }
        if (sample.growthPosition() == DatedSample.GrowthPosition.NO) {
            return Optional.of("not where it grew");
        }
        if (sample.elevationMetres().isEmpty()) {
            return Optional.of("no elevation of its own");
        }
        if (sample.depthMetres().isEmpty()) {
            return Optional.of("no depth of growth is known for it");
        }
        if (basis.curve().isEmpty()) {
            return Optional.of("the study reads no curve");
        }
        return CurveReading.whyNot(basis.curve().get(), sample.ageKa().get());
    }

    private static Optional<LevelAnswer.Agreement> agreement(Level level) {
        List<Uncertain> ages = LevelExplanations.datesOf(level, DatedSample.Role.LEVEL).stream()
                .flatMap(sample -> sample.ageKa().stream())
                .toList();
        return Replicates.of(ages).map(r -> new LevelAnswer.Agreement(r.mswd(), r.degrees(), r.p()));
    }
}
