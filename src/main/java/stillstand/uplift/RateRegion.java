package stillstand.uplift;

import java.util.List;
import stillstand.uncertainty.Interval;

/**
 * A range of rates and the probability it holds.
 *
 * @param fromMetresPerKyr lower end, m/kyr
 * @param toMetresPerKyr upper end, m/kyr
 * @param probability of the rate lying in it
 */
public record RateRegion(double fromMetresPerKyr, double toMetresPerKyr, double probability) {
    /** @throws IllegalArgumentException if the range is upside down */
    public RateRegion {
        if (!(fromMetresPerKyr <= toMetresPerKyr)) {
            throw new IllegalArgumentException(
                    "range of rates is upside down: " + fromMetresPerKyr + " to " + toMetresPerKyr);
        }
    }

    /** The ranges without their probabilities. */
    static List<Interval> intervals(List<RateRegion> regions) {
        return regions.stream()
                .map(region -> new Interval(region.fromMetresPerKyr, region.toMetresPerKyr))
                .toList();
    }

    /** The probabilities without their ranges. */
    static List<Double> probabilities(List<RateRegion> regions) {
        return regions.stream().map(RateRegion::probability).toList();
    }

    /** Upper less lower end, m/kyr. */
    public double widthMetresPerKyr() {
        return toMetresPerKyr - fromMetresPerKyr;
    }
}
