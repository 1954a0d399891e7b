package stillstand.comparison;

import java.util.List;
import stillstand.ledger.Assumption;

/**
 * All that a study says of its sites together.
 *
 * @param pairs differences between sites
 * @param motions which sites go up, are stable or go down
 * @param groups what coasts and island groups say
 * @param assumptions what it rests on
 */
public record SitesCompared(
        List<SiteComparison> pairs, List<SiteMotion> motions, List<SiteGroup> groups, List<Assumption> assumptions) {
    public SitesCompared {
        pairs = List.copyOf(pairs);
        motions = List.copyOf(motions);
        groups = List.copyOf(groups);
        assumptions = List.copyOf(assumptions);
    }
}
