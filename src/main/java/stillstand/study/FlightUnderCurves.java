package stillstand.study;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import stillstand.ledger.Assumption;
import stillstand.ledger.RunMonitor;
import stillstand.sensitivity.CurveChoice;
import stillstand.shoreline.Site;
import stillstand.uplift.FlightMixture;
import stillstand.uplift.FlightResult;
import stillstand.uplift.FlightSetup;
import stillstand.uplift.Flights;
import stillstand.uplift.LevelResidual;
import stillstand.uplift.SeaLevelBasis;
import stillstand.uplift.SeaLevelEnsemble;

/** The flight of one site under each account of sea level, and their mixture. */
final class FlightUnderCurves {
    private final SitePlan plan;
    private final SeaLevelEnsemble ensemble;

    FlightUnderCurves(SitePlan plan, SeaLevelEnsemble ensemble) {
        this.plan = plan;
        this.ensemble = ensemble;
    }

    /** The flight of a site, what each curve makes of it, and what it rests on. */
    record Found(
            FlightResult flight,
            List<LevelResidual> residuals,
            List<CurveChoice> curveChoice,
            List<Assumption> assumptions) {}

    /** Why no curve can match the flight; empty where one can. */
    Optional<String> whyNot() {
        List<Optional<String>> reasons = ensemble.bases().stream()
                .map(basis -> FlightSetup.whyNot(plan.site(), basis))
                .toList();
        return reasons.stream().allMatch(Optional::isPresent) ? reasons.get(0) : Optional.empty();
    }

    /**
     * Works out the flight. A curve under which no rate can have left it is left out, unless all are such.
     *
     * @throws IllegalArgumentException if under no curve any rate can have left the flight
     */
    Found run(Flights matching, RunMonitor monitor, double fraction) {
        Site site = plan.site();
        List<String> curves = new ArrayList<>();
        List<FlightResult> flights = new ArrayList<>();
        List<Double> weights = new ArrayList<>();
        List<List<LevelResidual>> residuals = new ArrayList<>();
        List<Assumption> assumptions = new ArrayList<>();
        List<IllegalArgumentException> impossible = new ArrayList<>();
        for (int k = 0; k < ensemble.size(); k++) {
            SeaLevelBasis basis = ensemble.bases().get(k);
            if (FlightSetup.whyNot(site, basis).isPresent()) {
                continue;
            }
            monitor.step(site.name() + " / flight" + (ensemble.size() > 1 ? " under " + basis.id() : ""), fraction);
            try {
                Flights.Answered answered = matching.of(site, basis, plan.prior());
                curves.add(basis.id());
                flights.add(answered.flight());
                weights.add(ensemble.weights().get(k));
                residuals.add(answered.residuals());
                assumptions.addAll(answered.assumptions());
            } catch (IllegalArgumentException e) {
                impossible.add(e);
                assumptions.add(new Assumption(
                        "curve " + basis.id() + " is left out of a flight",
                        String.valueOf(e.getMessage()),
                        "Stillstand's default",
                        site.name()));
            }
        }
        if (flights.isEmpty()) {
            throw impossible.get(0);
        }
        return new Found(
                FlightMixture.of(flights, weights),
                flights.size() == 1 ? residuals.get(0) : FlightMixture.residuals(flights, weights, residuals),
                CurveChoice.ofFlight(curves, flights, weights),
                assumptions);
    }
}
