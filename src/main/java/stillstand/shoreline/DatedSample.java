package stillstand.shoreline;

import java.util.Map;
import java.util.Optional;
import stillstand.uncertainty.Uncertain;

/**
 * One dated sample.
 *
 * @param name unique in its site
 * @param taxon id of the coral or shell
 * @param method id of the dating method
 * @param elevationMetres height of the sample itself in the site's datum, up positive
 * @param ageKa age in ka before 1950; absent where the sample has no age of its own yet
 * @param growthPosition whether it stands where it grew
 * @param dates what its age says of its level
 * @param used false where the user sets it aside, with the reason
 * @param reason why it is set aside; "" where it is used
 * @param depthMetres depth of growth below mean sea level, down positive, 0 or more; absent where nothing is known
 * @param laboratory who dated it
 * @param reference where it was published
 * @param note the user's own words
 * @param own the user's own columns ({@code x_…}), carried through
 */
public record DatedSample(
        String name,
        Optional<String> taxon,
        Optional<String> method,
        Optional<Uncertain> elevationMetres,
        Optional<Uncertain> ageKa,
        GrowthPosition growthPosition,
        Role dates,
        boolean used,
        String reason,
        Optional<Uncertain> depthMetres,
        String laboratory,
        String reference,
        String note,
        Map<String, String> own) {
    public DatedSample {
        own = Map.copyOf(own);
        if (name.isBlank()) {
            throw new IllegalArgumentException("name of a sample must not be blank");
        }
    }

    /** Whether a sample stands where it grew. */
    public enum GrowthPosition {
        YES,
        NO,
        UNKNOWN
    }

    /** What the age of a sample says of its level. */
    public enum Role {
        /** The level formed when the sample did. */
        LEVEL,
        /** The level is at least as old. */
        MINIMUM,
        /** The level is at most as old. */
        MAXIMUM
    }
}
