package stillstand.study;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.concurrent.ExecutorService;
import stillstand.ledger.Assumption;
import stillstand.ledger.RunCancelledException;
import stillstand.ledger.RunMonitor;
import stillstand.sensitivity.AssumptionSwitch;
import stillstand.sensitivity.CurveChoice;
import stillstand.sensitivity.CurveLeftOut;
import stillstand.sensitivity.LevelTornado;
import stillstand.sensitivity.Leverage;
import stillstand.sensitivity.NextMeasurement;
import stillstand.sensitivity.OtherSeaLevel;
import stillstand.sensitivity.SampleLeftOut;
import stillstand.sensitivity.SiteLeverage;
import stillstand.sensitivity.Supposition;
import stillstand.uncertainty.DrawStreams;
import stillstand.uplift.DateRules;
import stillstand.uplift.MatchingRules;
import stillstand.uplift.RateMixture;
import stillstand.uplift.SeaLevelBasis;

/** Gathers, site by site, what the answers of a study hang on: the tornados always, the rest where the study asks for it. */
final class SiteHinges {
    private final StudySettings settings;
    private final MatchingRules matching;
    private final DateRules dates;
    private final DrawStreams streams;
    private final ExecutorService executor;
    private final RunMonitor monitor;

    private final List<LevelTornado> tornado = new ArrayList<>();
    private final List<NextMeasurement> next = new ArrayList<>();
    private final List<AssumptionSwitch> switches = new ArrayList<>();
    private final List<SampleLeftOut> leftOut = new ArrayList<>();
    private final List<CurveLeftOut> curves = new ArrayList<>();

    SiteHinges(
            StudySettings settings,
            MatchingRules matching,
            DateRules dates,
            DrawStreams streams,
            ExecutorService executor,
            RunMonitor monitor) {
        this.settings = settings;
        this.matching = matching;
        this.dates = dates;
        this.streams = streams;
        this.executor = executor;
        this.monitor = monitor;
    }

    /**
     * One site, under the account of sea level that weighs most among its own.
     *
     * @param curveChoice what each of several curves makes of its rates
     * @return what that rests on
     * @throws RunCancelledException if the monitor asks to stop
     */
    List<Assumption> add(SitePlan plan, List<CurveChoice> curveChoice) {
        SeaLevelCase sea = plan.seaLevel().stream()
                .max(Comparator.comparingDouble(SeaLevelCase::weight))
                .orElseThrow();
        SeaLevelBasis basis = new SeaLevelBasis(sea.id(), sea.curve(), sea.highstands());
        Supposition base =
                new Supposition(plan.site(), basis, plan.prior(), matching, settings.indicativeRange(), dates);
        Leverage found = settings.leverage()
                .map(asked -> SiteLeverage.of(base, asked, others(sea), streams, executor, monitor))
                .orElseGet(() -> SiteLeverage.tornadosOf(base));
        tornado.addAll(found.tornado());
        next.addAll(found.nextMeasurements());
        switches.addAll(found.assumptionSwitches());
        leftOut.addAll(found.samplesLeftOut());
        curves.addAll(curvesLeftOut(plan.site().name(), curveChoice));
        boolean toSay = settings.leverage().isPresent() || plan.seaLevel().size() > 1;
        return toSay ? said(plan, sea) : List.of();
    }

    private static List<CurveLeftOut> curvesLeftOut(String site, List<CurveChoice> curveChoice) {
        Map<String, List<CurveLeftOut.Answer>> answers = new LinkedHashMap<>();
        for (CurveChoice row : curveChoice) {
            if (row.site().equals(site) && !row.mixesCurves()) {
                answers.computeIfAbsent(row.level().orElse(NextMeasurement.FLIGHT), rateOf -> new ArrayList<>())
                        .add(new CurveLeftOut.Answer(row.curve(), row.weight(), row.rate()));
            }
        }
        return answers.entrySet().stream()
                .flatMap(of -> CurveLeftOut.each(site, of.getKey(), of.getValue(), RateMixture::of).stream())
                .toList();
    }

    private List<OtherSeaLevel> others(SeaLevelCase sea) {
        return sea
                .withoutOverrides()
                .map(table -> new OtherSeaLevel(
                        "level and age of the best known highstands",
                        "independent estimates",
                        "as picked from curve " + sea.id(),
                        new SeaLevelBasis(sea.id(), sea.curve(), table)))
                .stream()
                .toList();
    }

    private static List<Assumption> said(SitePlan plan, SeaLevelCase sea) {
        return List.of(new Assumption(
                "what the answers hang on is worked out under",
                sea.id() + ", a constant rate, and less effort than the answers themselves",
                "Stillstand",
                plan.site().name()));
    }

    /** All sites so far. */
    Leverage leverage() {
        return new Leverage(tornado, next, switches, leftOut, curves);
    }
}
