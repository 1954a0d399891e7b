package stillstand.sensitivity;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.concurrent.ExecutorService;
import stillstand.ledger.RunCancelledException;
import stillstand.ledger.RunMonitor;
import stillstand.shoreline.DatedSample;
import stillstand.shoreline.FormerSeaLevel;
import stillstand.shoreline.FormsAt;
import stillstand.shoreline.Level;
import stillstand.uncertainty.DrawStreams;
import stillstand.uncertainty.Exact;
import stillstand.uplift.FlightSetup;
import stillstand.uplift.LevelAnswers;
import stillstand.uplift.LevelExplanations;
import stillstand.uplift.Rate;
import stillstand.uplift.RatePosterior;
import stillstand.uplift.SeaLevelBasis;
import stillstand.uplift.WhatIfPoints;

/** What the answer of one site hangs on: what to measure next, what each assumption does, what each sample does. */
public final class SiteLeverage {
    private static final int SCRAMBLES = 8;
    private static final int POINTS = 256;

    private final Supposition base;
    private final DrawStreams streams;
    private final RunMonitor monitor;
    private final QuickAnswers answers;
    private final Optional<FlightSetup> setup;
    private final Optional<RatePosterior> flight;

    private SiteLeverage(Supposition base, DrawStreams streams, ExecutorService executor, RunMonitor monitor) {
        this.base = base;
        this.streams = streams;
        this.monitor = monitor;
        answers = new QuickAnswers(streams, executor, monitor);
        setup = QuickAnswers.hasFlight(base) ? Optional.of(QuickAnswers.setup(base)) : Optional.empty();
        flight = setup.isPresent() ? answers.flight(base) : Optional.empty();
    }

    /**
     * All of it for one site.
     *
     * @param base the site as the study supposes it
     * @param plan how good the next measurements would be
     * @param others accounts of sea level that the study could have chosen
     * @param streams all randomness
     * @param executor runs draws; not owned, and needs a thread that is not the caller's
     * @param monitor is asked whether to stop
     * @throws RunCancelledException if the monitor asks to stop
     */
    public static Leverage of(
            Supposition base,
            MeasurementPlan plan,
            List<OtherSeaLevel> others,
            DrawStreams streams,
            ExecutorService executor,
            RunMonitor monitor) {
        SiteLeverage site = new SiteLeverage(base, streams, executor, monitor);
        return new Leverage(
                tornados(base),
                site.nextMeasurements(plan),
                new AssumptionSwitches(base, site.answers).all(others),
                site.samplesLeftOut(),
                List.of());
    }

    /** The part that every run has: the tornado of each level with a rate of its own. */
    public static Leverage tornadosOf(Supposition base) {
        return new Leverage(tornados(base), List.of(), List.of(), List.of(), List.of());
    }

    private static List<LevelTornado> tornados(Supposition base) {
        List<LevelTornado> found = new ArrayList<>();
        for (Level level : base.site().levels()) {
            String site = base.site().name();
            LevelExplanations explained =
                    LevelExplanations.of(level, base.basis(), base.dates(), site + " / " + level.name());
            if (!explained.explanations().isEmpty()) {
                LevelTornado.of(
                                site,
                                level.name(),
                                FormerSeaLevel.ofLandform(base.site(), level, base.indicativeRange()),
                                level.loweringMetresPerKyr(),
                                explained.explanations())
                        .ifPresent(found::add);
            }
        }
        return found;
    }

    private List<NextMeasurement> nextMeasurements(MeasurementPlan plan) {
        List<NextMeasurement> found = new ArrayList<>();
        if (setup.isPresent() && flight.isPresent()) {
            FlightSetup own = setup.get();
            Map<String, Double> surveys = new HashMap<>();
            base.site()
                    .levels()
                    .forEach(level ->
                            surveys.put(level.name(), level.elevationMetres().standardDeviation()));
            List<Double> sigmas = own.model().levels().stream()
                    .map(level -> surveys.getOrDefault(level.name(), 0.0))
                    .toList();
            found.addAll(new FlightMeasurements(
                            base.site().name(),
                            own.model(),
                            sigmas,
                            flight.get(),
                            base.prior(),
                            own.shared(),
                            streams,
                            monitor)
                    .ranked(plan));
        }
        for (Level level : base.site().levels()) {
            found.addAll(ofLevel(level, plan));
        }
        return found;
    }

    private List<NextMeasurement> ofLevel(Level level, MeasurementPlan plan) {
        String site = base.site().name();
        String where = site + " / " + level.name();
        List<NextMeasurement> found = new ArrayList<>();
        LevelExplanations explained = LevelExplanations.of(level, base.basis(), base.dates(), where);
        if (!explained.explanations().isEmpty()) {
            found.addAll(new LevelMeasurements(
                            site,
                            level.name(),
                            Optional.empty(),
                            FormerSeaLevel.ofLandform(base.site(), level, base.indicativeRange()),
                            level.loweringMetresPerKyr(),
                            explained.explanations(),
                            streams,
                            monitor)
                    .ranked(plan));
        }
        for (DatedSample sample : level.samples()) {
            if (LevelAnswers.whyNoRate(sample, base.basis()).isEmpty()) {
                found.addAll(ofCoral(level, sample).ranked(plan));
            }
        }
        return found;
    }

    private LevelMeasurements ofCoral(Level level, DatedSample sample) {
        SeaLevelBasis basis = base.basis();
        return new LevelMeasurements(
                base.site().name(),
                level.name(),
                Optional.of(sample.name()),
                FormerSeaLevel.ofCoral(
                        base.site(),
                        sample.elevationMetres().orElseThrow(),
                        sample.depthMetres().orElseThrow()),
                new Exact(0),
                List.of(LevelExplanations.onCurve(
                        basis.curve().orElseThrow(), sample.ageKa().orElseThrow(), basis)),
                streams,
                monitor);
    }

    private List<SampleLeftOut> samplesLeftOut() {
        Optional<WhatIfPoints> points = setup.flatMap(own -> flight.map(whole -> new WhatIfPoints(
                whole,
                base.prior(),
                own.shared(),
                SCRAMBLES,
                POINTS,
                streams,
                "sample left out of " + base.site().name())));
        Optional<ShortRate> whole = points.flatMap(
                        each -> each.rateOf(setup.orElseThrow().model(), monitor))
                .map(Rate::of)
                .map(ShortRate::of);
        List<SampleLeftOut> found = new ArrayList<>();
        for (Level level : base.site().levels()) {
            for (DatedSample sample : level.samples()) {
                if (sample.used() && sample.ageKa().isPresent()) {
                    Supposition without = base.without(level.name(), sample.name());
                    boolean inFlight = speaksInFlight(level.formsAt());
                    found.add(new SampleLeftOut(
                            base.site().name(),
                            level.name(),
                            sample.name(),
                            rate(base, level.name()),
                            rate(without, level.name()),
                            inFlight ? whole : Optional.empty(),
                            inFlight && whole.isPresent()
                                    ? points.flatMap(each -> each.rateOf(
                                                    QuickAnswers.setup(without).model(), monitor))
                                            .map(Rate::of)
                                            .map(ShortRate::of)
                                    : Optional.empty()));
                }
            }
        }
        return found;
    }

    /** A level that bounds the rate on one side takes no part in the matching, yet its date bears on the flight. */
    private static boolean speaksInFlight(FormsAt formsAt) {
        return FlightSetup.takesPart(formsAt)
                || formsAt == FormsAt.MARINE_LIMITING
                || formsAt == FormsAt.TERRESTRIAL_LIMITING;
    }

    private Optional<ShortRate> rate(Supposition supposed, String level) {
        return answers.level(supposed, supposed.level(level)).map(own -> ShortRate.of(own.rate()));
    }
}
