package stillstand.uplift;

import java.util.Optional;
import stillstand.shoreline.Site;

/**
 * A site, the accounts of sea level it stands under, and the prior of its rate: all that a comparison needs to know of it.
 *
 * @param site with its levels
 * @param seaLevel its curves and highstands; one account alone is the site's own, whatever curve the others stand under
 * @param prior of its rate
 */
public record SiteCase(Site site, SeaLevelEnsemble seaLevel, RatePrior prior) {
    /** The coast whose local sea level it shares; its own name where it has none. */
    public String coast() {
        return site.coast().orElse(site.name());
    }

    /** What it stands under where the study's curve is that of an id; absent where that curve does not serve it. */
    Optional<SeaLevelBasis> under(String curve) {
        if (seaLevel.size() == 1) {
            return Optional.of(seaLevel.bases().get(0));
        }
        return seaLevel.bases().stream()
                .filter(basis -> basis.id().equals(curve))
                .findFirst();
    }
}
