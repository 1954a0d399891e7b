package stillstand.uplift;

import java.util.Optional;
import stillstand.sealevel.SharedErrors;

/**
 * A site that takes part by one level.
 *
 * @param site its name
 * @param coast the coast whose local sea level it shares
 * @param entry the level and what may explain it
 * @param errors what highstands share with one another
 */
record ComparedLevel(String site, String coast, JointLevels.Entry entry, SharedErrors errors) implements ComparedSite {
    @Override
    public Optional<String> level() {
        return Optional.of(entry.name());
    }
}
