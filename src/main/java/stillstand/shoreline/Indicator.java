package stillstand.shoreline;

import java.util.Optional;
import stillstand.uncertainty.Exact;

/**
 * A kind of landform or deposit that marks a former sea level, as the shipped table knows it.
 *
 * @param id lower-case words joined by hyphens
 * @param name in plain words
 * @param upperLimit what bounds its modern counterpart above, in words
 * @param lowerLimit what bounds it below, in words
 * @param meaning its usual place relative to sea level; absent where a level of this kind needs values of its own
 * @param records how many published records the usual place is the median of
 * @param source citation
 */
public record Indicator(
        String id,
        String name,
        String upperLimit,
        String lowerLimit,
        Optional<IndicativeMeaning> meaning,
        int records,
        String source) {
    /** @throws IllegalArgumentException if id, name or source is blank, or a meaning rests on no records */
    public Indicator {
        if (id.isBlank() || name.isBlank() || source.isBlank()) {
            throw new IllegalArgumentException("an indicator must have id, name and source but has \"" + id + "\", \""
                    + name + "\", \"" + source + "\"");
        }
        if (records < 0 || (meaning.isPresent() && records == 0)) {
            throw new IllegalArgumentException("records of " + id + " must be 1 or more but are " + records);
        }
    }

    /**
     * The usual meaning of an indicator as the table gives it.
     *
     * @param referenceWaterLevelMetres above the mean sea level of its day, up positive
     * @param rangeMetres indicative range, 0 or more
     */
    public static IndicativeMeaning meaning(String id, double referenceWaterLevelMetres, double rangeMetres) {
        return new IndicativeMeaning(id, new Exact(referenceWaterLevelMetres), rangeMetres);
    }
}
