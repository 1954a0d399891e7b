package stillstand.sensitivity;

import java.util.Optional;
import java.util.concurrent.ExecutorService;
import stillstand.ledger.RunMonitor;
import stillstand.shoreline.FormerSeaLevel;
import stillstand.shoreline.Level;
import stillstand.uncertainty.DrawStreams;
import stillstand.uplift.DrawPlan;
import stillstand.uplift.FlightMonteCarlo;
import stillstand.uplift.FlightSetup;
import stillstand.uplift.LevelAnswers;
import stillstand.uplift.LevelExplanations;
import stillstand.uplift.LevelRates;
import stillstand.uplift.Rate;
import stillstand.uplift.RatePosterior;

/**
 * Rates under a supposition, with less effort than a run's own. The same draws serve every supposition, so that differences
 * between two of them are known better than either.
 */
final class QuickAnswers {
    private static final DrawPlan DRAWS =
            new DrawPlan(4 * DrawStreams.BLOCK_DRAWS, 1, Optional.of(4 * DrawStreams.BLOCK_DRAWS));
    private static final FlightMonteCarlo.Effort FLIGHT = new FlightMonteCarlo.Effort(8, 512, 100, 100);

    private final DrawStreams streams;
    private final RunMonitor monitor;
    private final LevelRates rates;

    /**
     * @param executor runs draws of levels; not owned, and needs a thread that is not the caller's
     * @param monitor is asked whether to stop
     */
    QuickAnswers(DrawStreams streams, ExecutorService executor, RunMonitor monitor) {
        this.streams = streams;
        this.monitor = monitor;
        rates = new LevelRates(streams, DRAWS, executor, monitor);
    }

    /** The draws of one level; absent where it has no rate of its own. */
    Optional<LevelRates.Outcome> level(Supposition supposed, Level level) {
        String where = supposed.site().name() + " / " + level.name();
        LevelExplanations found = LevelExplanations.of(level, supposed.basis(), supposed.dates(), where);
        if (found.explanations().isEmpty()) {
            return Optional.empty();
        }
        return Optional.of(rates.of(
                "what if of " + where,
                FormerSeaLevel.ofLandform(supposed.site(), level, supposed.indicativeRange()),
                level.loweringMetresPerKyr(),
                found.explanations(),
                supposed.prior()));
    }

    /** One rate for the corals of a level that read the curve; absent where fewer than two do. */
    Optional<Rate> coralsTogether(Supposition supposed, Level level) {
        return LevelAnswers.coralsTogether(supposed.site(), level, supposed.basis(), supposed.prior());
    }

    /** Whether the site has a flight that can be matched and is worked out here; reefs that drowned are not. */
    static boolean hasFlight(Supposition supposed) {
        return FlightSetup.isNeeded(supposed.site())
                && !FlightSetup.isDrowned(supposed.site())
                && FlightSetup.whyNot(supposed.site(), supposed.basis()).isEmpty();
    }

    static FlightSetup setup(Supposition supposed) {
        return FlightSetup.of(supposed.site(), supposed.basis(), supposed.matching(), supposed.indicativeRange());
    }

    /** The rate of the flight of a site that has one; absent where no rate can have left it. */
    Optional<RatePosterior> flight(Supposition supposed) {
        FlightSetup setup = setup(supposed);
        try {
            return Optional.of(FlightMonteCarlo.answer(
                            setup.model(),
                            supposed.prior(),
                            setup.shared(),
                            FLIGHT,
                            streams,
                            "what if of the flight of " + supposed.site().name(),
                            quietly())
                    .answer()
                    .rate());
        } catch (IllegalArgumentException e) {
            return Optional.empty();
        }
    }

    /** Progress of a rough answer is nobody's business; the wish to stop is. */
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
