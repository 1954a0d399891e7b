package stillstand.uplift;

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

    /** Upper less lower end, m/kyr. */
    public double widthMetresPerKyr() {
        return toMetresPerKyr - fromMetresPerKyr;
    }
}
