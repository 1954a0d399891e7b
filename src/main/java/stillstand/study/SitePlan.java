package stillstand.study;

import java.util.List;
import java.util.Optional;
import stillstand.shoreline.Site;
import stillstand.uplift.RatePrior;

/**
 * A site and what a run does with it.
 *
 * @param site with its levels and samples
 * @param prior of its rate: the site's own, else the study's
 * @param localSeaLevel what replaces the study's sea level here; mostly absent
 */
public record SitePlan(Site site, RatePrior prior, Optional<SeaLevelCase> localSeaLevel) {
    /** The accounts of sea level this site runs under: its local one, else the study's. */
    public List<SeaLevelCase> seaLevel(Study study) {
        return localSeaLevel.map(List::of).orElse(study.seaLevel());
    }
}
