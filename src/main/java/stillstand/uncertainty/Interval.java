package stillstand.uncertainty;

/**
 * A stretch of the number line.
 *
 * @param low lower end
 * @param high upper end, at or above the lower
 */
public record Interval(double low, double high) {
    public Interval {
        if (!(high >= low)) {
            throw new IllegalArgumentException("high must be at or above low (" + low + ") but is " + high);
        }
    }

    /** Upper less lower end. */
    public double width() {
        return high - low;
    }

    /** Whether a value lies in it, ends included. */
    public boolean contains(double value) {
        return value >= low && value <= high;
    }
}
