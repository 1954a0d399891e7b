package stillstand.study;

import java.util.List;
import stillstand.shoreline.Site;
import stillstand.uplift.RatePrior;
import stillstand.uplift.SeaLevelBasis;
import stillstand.uplift.SeaLevelEnsemble;

/**
 * A site and what a run does with it.
 *
 * @param site with its levels and samples
 * @param prior of its rate: the site's own, else the study's
 * @param seaLevel the accounts of sea level this site runs under: its local one, else those of the study that serve it
 */
public record SitePlan(Site site, RatePrior prior, List<SeaLevelCase> seaLevel) {
    public SitePlan {
        seaLevel = List.copyOf(seaLevel);
        if (seaLevel.isEmpty()) {
            throw new IllegalArgumentException("site " + site.name() + " must have at least one account of sea level");
        }
    }

    /** Its accounts of sea level as the engine takes them. */
    public SeaLevelEnsemble ensemble() {
        return new SeaLevelEnsemble(
                seaLevel.stream()
                        .map(sea -> new SeaLevelBasis(sea.id(), sea.curve(), sea.highstands()))
                        .toList(),
                seaLevel.stream().map(SeaLevelCase::weight).toList());
    }
}
