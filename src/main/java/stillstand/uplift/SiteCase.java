package stillstand.uplift;

import stillstand.shoreline.Site;

/**
 * A site, the account of sea level it stands under, and the prior of its rate: all that a comparison needs to know of it.
 *
 * @param site with its levels
 * @param basis curve and highstands
 * @param prior of its rate
 */
public record SiteCase(Site site, SeaLevelBasis basis, RatePrior prior) {
    /** The coast whose local sea level it shares; its own name where it has none. */
    public String coast() {
        return site.coast().orElse(site.name());
    }
}
