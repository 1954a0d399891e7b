package stillstand.uplift;

import java.util.Optional;
import stillstand.shoreline.IndicativeRule;

/**
 * What stands for a site in a comparison.
 *
 * @param site the site
 * @param level the level that does; absent where its whole flight does
 * @param alone its rate by itself
 */
public record StandIn(SiteCase site, Optional<String> level, Rate alone) {
    /**
     * How levels and flights were worked out.
     *
     * @param rule what an indicative range means
     * @param dates how far dates are believed
     * @param matching how levels were matched
     */
    public record Conventions(IndicativeRule rule, DateRules dates, MatchingRules matching) {}

    /** Under the curve of an id; absent where that says nothing of it. */
    Optional<ComparedSite> under(String curve, Conventions conventions) {
        return site.under(curve)
                .flatMap(basis -> level.isPresent()
                        ? ComparedLevels.under(site, basis, level.get(), conventions.rule(), conventions.dates())
                        : FlightSetup.whyNot(site.site(), basis).isPresent()
                                ? Optional.empty()
                                : Optional.of(ComparedFlight.of(
                                        site, basis, alone, conventions.matching(), conventions.rule())));
    }
}
