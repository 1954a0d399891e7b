package stillstand.study;

import stillstand.shoreline.Site;
import stillstand.uplift.RatePrior;

/**
 * A site and what a run does with it.
 *
 * @param site with its levels and samples; its {@code localCurve}, where there is one, is known to the library
 * @param prior of its rate: the site's own, else the study's
 */
public record SitePlan(Site site, RatePrior prior) {}
