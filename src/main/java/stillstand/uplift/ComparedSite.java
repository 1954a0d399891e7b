package stillstand.uplift;

import java.util.Optional;
import stillstand.shoreline.IndicativeRule;

/** A site as joint draws of several sites take it: by its whole flight, or by one level. */
public sealed interface ComparedSite permits ComparedFlight, ComparedLevel {
    /** Its name. */
    String site();

    /** The coast whose local sea level it shares. */
    String coast();

    /** The level that stands for it; absent where its whole flight does. */
    Optional<String> level();

    /**
     * A site whose flight has been matched.
     *
     * @param alone the rate of the flight by itself: where rates are looked for
     * @param rules of the matching, and {@code rule} of indicative ranges, as the flight itself was matched by
     */
    static ComparedSite byFlight(SiteCase site, Rate alone, MatchingRules rules, IndicativeRule rule) {
        return ComparedFlight.of(site, alone, rules, rule);
    }
}
