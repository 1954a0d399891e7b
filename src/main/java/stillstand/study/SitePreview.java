package stillstand.study;

import java.util.List;
import java.util.Map;
import java.util.Optional;
import stillstand.shoreline.IndicativeRule;
import stillstand.shoreline.Level;
import stillstand.shoreline.Site;
import stillstand.shoreline.StageChoice;
import stillstand.uncertainty.Interval;
import stillstand.uplift.FlightPreview;
import stillstand.uplift.FlightSetup;
import stillstand.uplift.SeaLevelBasis;

/** The flight of a site as a preview, under pairings that somebody is trying: within milliseconds, and never the answer. */
public final class SitePreview {
    private final Study study;
    private final SitePlan plan;
    private final SeaLevelBasis basis;

    private SitePreview(Study study, SitePlan plan) {
        this.study = study;
        this.plan = plan;
        SeaLevelCase sea = plan.seaLevel().get(0);
        this.basis = new SeaLevelBasis(sea.id(), sea.curve(), sea.highstands());
    }

    /** The preview of a site; absent where the study has no such site. */
    public static Optional<SitePreview> of(Study study, String site) {
        return study.sites().stream()
                .filter(plan -> plan.site().name().equals(site))
                .findFirst()
                .map(plan -> new SitePreview(study, plan));
    }

    /** The site as the study has it. */
    public Site site() {
        return plan.site();
    }

    /** The first account of sea level the site runs under. */
    public SeaLevelBasis basis() {
        return basis;
    }

    /** What an indicative range means in the study. */
    public IndicativeRule indicativeRange() {
        return study.settings().indicativeRange();
    }

    /** Whether the site runs under more accounts of sea level than the first. */
    public boolean isOfFirstCurveAlone() {
        return plan.seaLevel().size() > 1;
    }

    /** Why there can be no preview; empty where there can. */
    public Optional<String> whyNot() {
        if (plan.site().levels().stream().noneMatch(level -> FlightSetup.takesPart(level.formsAt()))) {
            return Optional.of("no level of this site takes part in a flight");
        }
        return FlightSetup.whyNot(plan.site(), basis);
    }

    /** Whether a run would match the flight under these choices: it does not where every level is tied to one highstand. */
    public boolean isNeeded(Map<String, StageChoice> choices) {
        return FlightSetup.isNeeded(under(choices));
    }

    /**
     * What the flight would roughly say.
     *
     * @param choices by level, in place of the study's own
     * @return absent where {@link #whyNot} says why, or no rate can have left the flight
     */
    public Optional<FlightPreview> preview(Map<String, StageChoice> choices) {
        return setup(choices).flatMap(setup -> FlightPreview.of(setup, plan.prior()));
    }

    /** The same with the pairings of rates in an interval alone, m/kyr. */
    public Optional<FlightPreview> previewWithin(Interval rates) {
        return setup(Map.of()).flatMap(setup -> FlightPreview.within(setup, plan.prior(), rates));
    }

    /** The flight as the engine would take it; absent where {@link #whyNot} says why. */
    public Optional<FlightSetup> setup(Map<String, StageChoice> choices) {
        return whyNot().isPresent()
                ? Optional.empty()
                : Optional.of(FlightSetup.of(
                        under(choices),
                        basis,
                        StudyRunner.rules(study.settings().matching()),
                        study.settings().indicativeRange()));
    }

    private Site under(Map<String, StageChoice> choices) {
        Site site = plan.site();
        List<Level> levels = site.levels().stream()
                .map(level -> Optional.ofNullable(choices.get(level.name()))
                        .map(level::withHighstand)
                        .orElse(level))
                .toList();
        return site.withLevels(levels);
    }
}
