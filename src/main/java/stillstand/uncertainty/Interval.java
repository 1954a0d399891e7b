package stillstand.uncertainty;

/**
 * A closed interval.
 *
 * @param low lower end, not above {@code high}
 * @param high upper end
 */
public record Interval(double low, double high) {
    /** Probability of the interval reported as "68 %": that of one standard deviation either side of a normal mean. */
    public static final double PROBABILITY_68 = 0.6827;

    /** Probability of the interval reported as "95 %". */
    public static final double PROBABILITY_95 = 0.95;

    /** @throws IllegalArgumentException if not {@code low <= high} */
    public Interval {
        if (!(low <= high)) {
            throw new IllegalArgumentException("low must not be above high but is " + low + " with high " + high);
        }
    }

    /** Upper end less lower end. */
    public double width() {
        return high - low;
    }

    /** Whether {@code value} lies in the interval, its ends included. */
    public boolean contains(double value) {
        return value >= low && value <= high;
    }
}
