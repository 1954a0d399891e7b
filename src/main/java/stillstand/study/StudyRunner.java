package stillstand.study;

import java.util.ArrayList;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.Set;
import java.util.concurrent.ExecutorService;
import java.util.stream.Collectors;
import stillstand.ledger.Assumption;
import stillstand.ledger.RunCancelledException;
import stillstand.ledger.RunMonitor;
import stillstand.sensitivity.CurveChoice;
import stillstand.sensitivity.CurveEvidence;
import stillstand.shoreline.Level;
import stillstand.shoreline.Site;
import stillstand.uncertainty.DrawStreams;
import stillstand.uplift.BetweenLevels;
import stillstand.uplift.DateRules;
import stillstand.uplift.DrawPlan;
import stillstand.uplift.FlightResult;
import stillstand.uplift.FlightSetup;
import stillstand.uplift.Flights;
import stillstand.uplift.ImpliedSeaLevel;
import stillstand.uplift.LevelAnswer;
import stillstand.uplift.LevelAnswers;
import stillstand.uplift.LevelRates;
import stillstand.uplift.LevelResidual;
import stillstand.uplift.MatchingRules;
import stillstand.uplift.RateChanges;
import stillstand.uplift.SeaLevelEnsemble;
import stillstand.uplift.SharedPriors;
import stillstand.uplift.SiteRelations;
import stillstand.uplift.TracedFlights;

/**
 * Runs a study site by site. What comes out is a function of the study alone: threads and the order in which they work change
 * no bit of it. A site that fails stands in {@code failures}; the others finish.
 */
public final class StudyRunner {
    private final Study study;
    private final ExecutorService executor;
    private final RunMonitor monitor;
    private final DrawStreams streams;
    private final DrawPlan plan;
    private final DateRules dates;
    private final LevelAnswers answers;
    private final Flights matching;
    private final SiteHinges hinges;

    private final List<LevelAnswer> levels = new ArrayList<>();
    private final List<StudyResult.Waiting> waiting = new ArrayList<>();
    private final List<FlightResult> flights = new ArrayList<>();
    private final List<LevelResidual> residuals = new ArrayList<>();
    private final List<BetweenLevels> intervals = new ArrayList<>();
    private final List<ImpliedSeaLevel> implied = new ArrayList<>();
    private final List<CurveChoice> curveChoice = new ArrayList<>();
    private final List<StudyResult.Failure> failures = new ArrayList<>();
    private final Set<Assumption> ledger = new LinkedHashSet<>();

    private StudyRunner(Study study, ExecutorService executor, RunMonitor monitor) {
        this.study = study;
        this.executor = executor;
        this.monitor = monitor;
        StudySettings settings = study.settings();
        streams = new DrawStreams(settings.seed());
        plan = new DrawPlan(
                settings.draws().maximum(),
                settings.draws().significantDigits(),
                settings.draws().fixed());
        dates = new DateRules(
                settings.matching().wrongDateProbability().value(),
                settings.matching().strayAgeMaximumKa());
        answers = new LevelAnswers(
                new LevelRates(streams, plan, executor, monitor),
                streams,
                plan,
                executor,
                settings.indicativeRange(),
                dates);
        MatchingRules rules = rules(settings.matching());
        RateChanges changes = changes(settings.rate());
        matching = new Flights(streams, executor, monitor, rules, settings.indicativeRange(), changes);
        hinges = new SiteHinges(settings, rules, dates, streams, executor, monitor);
    }

    private static RateChanges changes(StudySettings.RateChoice rate) {
        return new RateChanges(
                RateChanges.Models.valueOf(rate.changes().name()),
                rate.changeBetweenKa().low(),
                rate.changeBetweenKa().high());
    }

    /** Settings of matching as the engine takes them: what is not stated stays its own default. */
    static MatchingRules rules(StudySettings.Matching settings) {
        return new MatchingRules(
                settings.recordingProbability() instanceof StudySettings.Recording.Beta beta
                        ? new SharedPriors.Recording.BetaPrior(beta.alpha(), beta.beta())
                        : new SharedPriors.Recording.Known(
                                ((StudySettings.Recording.Fixed) settings.recordingProbability()).probability()),
                settings.recordingDecay().map(StudyRunner::decaysKa),
                settings.expectedStrays().map(StudyRunner::strays),
                settings.strayAgeMaximumKa(),
                settings.wrongDateProbability().stated()
                        ? Optional.of(settings.wrongDateProbability().value())
                        : Optional.empty());
    }

    private static List<Double> decaysKa(StudySettings.Decay decay) {
        if (decay instanceof StudySettings.Decay.Fixed fixed) {
            return List.of(fixed.timeKa());
        }
        return decay instanceof StudySettings.Decay.None
                ? List.of(Double.POSITIVE_INFINITY)
                : SharedPriors.DEFAULT_DECAYS_KA;
    }

    private static SharedPriors.Strays strays(StudySettings.Strays strays) {
        return strays instanceof StudySettings.Strays.GammaMean gamma
                ? new SharedPriors.Strays.GammaPrior(gamma.mean())
                : new SharedPriors.Strays.Known(((StudySettings.Strays.Fixed) strays).number());
    }

    /**
     * Runs a whole study; blocks until it is done.
     *
     * @param executor runs the draws; not owned, and needs one thread at least that is not the caller's
     * @param monitor is told of progress and asked whether to stop
     * @throws RunCancelledException if the monitor asked to stop
     */
    public static StudyResult run(Study study, ExecutorService executor, RunMonitor monitor) {
        return new StudyRunner(study, executor, monitor).result();
    }

    private StudyResult result() {
        ledger.addAll(Conventions.of(study.settings()));
        for (SeaLevelCase sea : study.seaLevel()) {
            ledger.addAll(sea.highstands().assumptions());
        }
        ledger.addAll(Conventions.ofCurves(study.seaLevel()));
        ledger.addAll(study.ledger());
        int allLevels = study.sites().stream()
                .mapToInt(plan -> plan.site().levels().size())
                .sum();
        for (SitePlan site : study.sites()) {
            try {
                runSite(site, allLevels);
            } catch (RunCancelledException e) {
                throw e;
            } catch (IllegalArgumentException | IllegalStateException e) {
                failures.add(new StudyResult.Failure(site.site().name(), String.valueOf(e.getMessage())));
            }
        }
        runTraces();
        SiteComparisons sites = sitesTogether();
        ledger.addAll(sites.ledger());
        monitor.step("done", 1);
        return new StudyResult(
                new Provenance(
                        Provenance.CURRENT_VERSION,
                        study.settings().seed(),
                        DrawStreams.GENERATOR,
                        study.inputs(),
                        Optional.empty(),
                        Optional.empty()),
                SeaLevelSummary.of(study),
                levels,
                waiting,
                flights,
                intervals,
                implied,
                hinges.leverage(),
                residuals,
                curveChoice,
                CurveEvidence.pooled(curveChoice, this::coast),
                sites.pairs(),
                sites.motions(),
                sites.groups(),
                sites.tilts(),
                study.warnings(),
                failures,
                JoinedLedger.of(ledger));
    }

    /** Flights whose terraces were traced to other sites take the place of those of the sites alone. */
    private void runTraces() {
        try {
            StudySettings settings = study.settings();
            TracedFlights tracing = new TracedFlights(
                    streams,
                    executor,
                    monitor,
                    rules(settings.matching()),
                    settings.indicativeRange(),
                    settings.matching().traceProbability());
            for (Flights.Answered answered : TracedSites.flights(study, flights, tracing)) {
                String site = answered.flight().site();
                flights.replaceAll(flight -> flight.site().equals(site) ? answered.flight() : flight);
                residuals.removeIf(residual -> residual.site().equals(site));
                residuals.addAll(answered.residuals());
                ledger.addAll(answered.assumptions());
            }
        } catch (IllegalArgumentException e) {
            failures.add(new StudyResult.Failure("traced terraces", String.valueOf(e.getMessage())));
        }
    }

    private Optional<String> coast(String site) {
        return study.sites().stream()
                .filter(plan -> plan.site().name().equals(site))
                .findFirst()
                .flatMap(plan -> plan.site().coast());
    }

    private SiteComparisons sitesTogether() {
        try {
            return SiteComparisons.of(
                    study,
                    new SiteComparisons.Found(levels, flights),
                    dates,
                    rules(study.settings().matching()),
                    streams,
                    executor,
                    monitor);
        } catch (IllegalArgumentException | IllegalStateException e) {
            failures.add(new StudyResult.Failure("sites together", String.valueOf(e.getMessage())));
            return SiteComparisons.NONE;
        }
    }

    private void runSite(SitePlan plan, int allLevels) {
        SeaLevelEnsemble ensemble = plan.ensemble();
        ensemble.bases().forEach(basis -> ledger.addAll(basis.highstands().assumptions()));
        for (Level level : plan.site().levels()) {
            String what = plan.site().name() + " / " + level.name();
            monitor.step(what, (double) levels.size() / Math.max(1, allLevels));
            runLevel(plan, level, ensemble);
        }
        if (monitor.isCancelled()) {
            throw new RunCancelledException();
        }
        SiteRelations relations = SiteRelations.of(
                plan.site(), ensemble, study.settings().indicativeRange(), dates, streams, this.plan, executor);
        intervals.addAll(relations.intervals());
        implied.addAll(relations.impliedSeaLevel());
        ledger.addAll(relations.assumptions());
        runFlight(plan, ensemble, (double) levels.size() / Math.max(1, allLevels));
        monitor.step(plan.site().name() + " / what it hangs on", (double) levels.size() / Math.max(1, allLevels));
        ledger.addAll(hinges.add(plan, curveChoice));
    }

    private void runLevel(SitePlan plan, Level level, SeaLevelEnsemble ensemble) {
        Site site = plan.site();
        LevelAnswers.Answered answered = answers.of(site, level, ensemble, plan.prior());
        levels.add(answered.answer());
        answered.whyWaiting()
                .ifPresent(reason -> waiting.add(new StudyResult.Waiting(site.name(), level.name(), reason)));
        ledger.addAll(answered.assumptions());
        if (ensemble.size() > 1 && answered.answer().rate().isPresent()) {
            List<CurveChoice.OfCurve> each = new ArrayList<>();
            for (int k = 0; k < ensemble.size(); k++) {
                int number = k;
                answers.rateUnder(site, level, ensemble.bases().get(k), plan.prior())
                        .ifPresent(found -> each.add(new CurveChoice.OfCurve(number, found.rate(), found.highstand())));
            }
            curveChoice.addAll(CurveChoice.ofLevel(site.name(), level.name(), ensemble, each));
        }
    }

    private void runFlight(SitePlan plan, SeaLevelEnsemble ensemble, double fraction) {
        Site site = plan.site();
        if (!FlightSetup.isNeeded(site)) {
            return;
        }
        FlightUnderCurves flight = new FlightUnderCurves(plan, ensemble);
        Optional<String> whyNot = flight.whyNot();
        if (whyNot.isPresent()) {
            sayWaiting(site, "no flight is matched: " + whyNot.get());
            return;
        }
        FlightUnderCurves.Found found = flight.run(matching, monitor, fraction);
        flights.add(found.flight());
        residuals.addAll(found.residuals());
        curveChoice.addAll(found.curveChoice());
        ledger.addAll(found.assumptions());
        sayWaiting(
                site, "no date of its own and no single highstand: the flight of the site says its highstand and age");
    }

    /** Levels that wait for the flight learn what came of it. */
    private void sayWaiting(Site site, String reason) {
        for (Level level : site.levels()) {
            boolean matched = FlightSetup.isToBeMatched(level.formsAt(), level.highstand());
            waiting.replaceAll(waits ->
                    matched && waits.site().equals(site.name()) && waits.level().equals(level.name())
                            ? new StudyResult.Waiting(site.name(), level.name(), reason)
                            : waits);
        }
    }

    /** What every study rests on, whatever its levels. */
    private static final class Conventions {
        private static final String ALL = "all";

        private Conventions() {}

        static List<Assumption> ofCurves(List<SeaLevelCase> cases) {
            if (cases.size() < 2) {
                return List.of();
            }
            double total = cases.stream().mapToDouble(SeaLevelCase::weight).sum();
            return List.of(
                    new Assumption(
                            "several curves: levels are mixed by weight, flights by weight times evidence",
                            cases.stream()
                                    .map(sea -> String.format(Locale.ROOT, "%s %.3g", sea.id(), sea.weight() / total))
                                    .collect(Collectors.joining(", ")),
                            "study.json or its default",
                            ALL),
                    new Assumption(
                            "none of the curves is true",
                            "their records and methods overlap, so that they are no independent witnesses; evidence rewards"
                                    + " a curve for its error bars too",
                            "Stillstand",
                            ALL));
        }

        static List<Assumption> of(StudySettings settings) {
            List<Assumption> said = new ArrayList<>();
            said.add(new Assumption(
                    "not a hazard assessment",
                    "rates of vertical motion over thousands of years; local codes and licensed practice decide",
                    "Stillstand",
                    ALL));
            said.add(new Assumption(
                    "prior of the rate, m/kyr", settings.rate().prior().describe(), "study.json or its default", ALL));
            said.add(new Assumption(
                    "an indicative range means",
                    settings.indicativeRange().id(),
                    "study.json or its default (quadrature: Rovere et al. 2023, ESSD 15, 1-23)",
                    ALL));
            said.add(new Assumption(
                    "probability that one of several dates is wrong",
                    String.format(
                            Locale.ROOT,
                            "%.3g, from 0 to %.0f ka",
                            settings.matching().wrongDateProbability().value(),
                            settings.matching().strayAgeMaximumKa()),
                    "study.json or its default",
                    ALL));
            said.add(new Assumption(
                    "draws of a level",
                    settings.draws()
                            .fixed()
                            .map(fixed -> fixed + ", rounded up to whole blocks of " + DrawStreams.BLOCK_DRAWS)
                            .orElse("until " + settings.draws().significantDigits()
                                    + " digits of the standard deviation are steady, at most "
                                    + settings.draws().maximum()),
                    "JCGM 101:2008, 7.9, with at least ten blocks",
                    ALL));
            return said;
        }
    }
}
