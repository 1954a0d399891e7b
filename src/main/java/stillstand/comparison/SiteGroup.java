package stillstand.comparison;

import java.util.List;
import java.util.Optional;
import stillstand.uplift.Quantity;

/**
 * What the sites of one coast or island group say together.
 *
 * @param group its name
 * @param sites those that have a rate, in the order of the table
 * @param pooled the rates partially pooled; absent below two sites
 * @param tilt of the rates along the coast; absent below three sites with distances
 * @param plane of the rates over the map; absent below three sites with places, or where they lie on one line
 * @param areaMean mean rate over the stated areas, m/kyr; absent unless two sites or more state one
 * @param effectiveFraction of the draws in the worst step where sites were conditioned on each other; absent for common draws
 */
public record SiteGroup(
        String group,
        List<String> sites,
        Optional<PooledRates> pooled,
        Optional<Tilt> tilt,
        Optional<PlanarTilt> plane,
        Optional<Quantity> areaMean,
        Optional<Double> effectiveFraction) {
    public SiteGroup {
        sites = List.copyOf(sites);
    }
}
