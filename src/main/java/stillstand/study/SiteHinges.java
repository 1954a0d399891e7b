package stillstand.study;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.ExecutorService;
import stillstand.ledger.Assumption;
import stillstand.ledger.RunCancelledException;
import stillstand.ledger.RunMonitor;
import stillstand.sensitivity.AssumptionSwitch;
import stillstand.sensitivity.CurveLeftOut;
import stillstand.sensitivity.Leverage;
import stillstand.sensitivity.LevelTornado;
import stillstand.sensitivity.NextMeasurement;
import stillstand.sensitivity.OtherSeaLevel;
import stillstand.sensitivity.SampleLeftOut;
import stillstand.sensitivity.SiteLeverage;
import stillstand.sensitivity.Supposition;
import stillstand.uncertainty.DrawStreams;
import stillstand.uplift.DateRules;
import stillstand.uplift.MatchingRules;
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
     * One site, under the first of its accounts of sea level.
     *
     * @return what that rests on
     * @throws RunCancelledException if the monitor asks to stop
     */
    List<Assumption> add(SitePlan plan, SeaLevelCase sea) {
        SeaLevelBasis basis = new SeaLevelBasis(sea.id(), sea.curve(), sea.highstands());
        Supposition base = new Supposition(
                plan.site(), basis, plan.prior(), matching, settings.indicativeRange(), dates);
        Leverage found = settings.leverage()
                .map(asked -> SiteLeverage.of(base, asked, others(sea), streams, executor, monitor))
                .orElseGet(() -> SiteLeverage.tornadosOf(base));
        tornado.addAll(found.tornado());
        next.addAll(found.nextMeasurements());
        switches.addAll(found.assumptionSwitches());
        leftOut.addAll(found.samplesLeftOut());
        return settings.leverage().isPresent() ? said(plan, sea) : List.of();
    }

    private List<OtherSeaLevel> others(SeaLevelCase sea) {
        return sea.withoutOverrides()
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
