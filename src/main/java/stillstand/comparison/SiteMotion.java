package stillstand.comparison;

import java.util.Optional;
import stillstand.uplift.Quantity;

/**
 * Whether a site goes up, is stable or goes down, and where it lies.
 *
 * @param site its name
 * @param coast its coast or island group
 * @param level the level that stands for it; absent where its whole flight does
 * @param latitude degrees, north positive
 * @param longitude degrees, east positive
 * @param distanceAlongCoastKm from any origin
 * @param areaKm2 that it stands for in a mean over areas
 * @param rate by itself, m/kyr
 * @param up probability of a rate above the threshold
 * @param stable probability of a rate within the threshold of 0
 * @param down probability of a rate below minus the threshold
 * @param motion the most probable of the three: {@value #UP}, {@value #STABLE} or {@value #DOWN}
 */
public record SiteMotion(
        String site,
        Optional<String> coast,
        Optional<String> level,
        Optional<Double> latitude,
        Optional<Double> longitude,
        Optional<Double> distanceAlongCoastKm,
        Optional<Double> areaKm2,
        Quantity rate,
        double up,
        double stable,
        double down,
        String motion) {
    /** Rising faster than the threshold. */
    public static final String UP = "up";
    /** Within the threshold. */
    public static final String STABLE = "stable";
    /** Sinking faster than the threshold. */
    public static final String DOWN = "down";

    /** The word for the most probable of three. */
    public static String word(double up, double stable, double down) {
        return stable >= Math.max(up, down) ? STABLE : up >= down ? UP : DOWN;
    }
}
