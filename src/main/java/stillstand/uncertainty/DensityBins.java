package stillstand.uncertainty;

import java.util.List;

/**
 * A histogram for figures: equal bins from one value to another.
 *
 * @param from lower edge of the first bin
 * @param to upper edge of the last bin, above {@code from}
 * @param values relative frequency of each bin, 0 or more: the part of all probability that lies in it, so that the sum is 1
 *     less what lies outside
 */
public record DensityBins(double from, double to, List<Double> values) {
    /** @throws IllegalArgumentException if not {@code from < to}, both finite, or there are no values or a negative one */
    public DensityBins {
        Uncertain.requireFinite("from", from);
        Uncertain.requireFinite("to", to);
        if (!(from < to)) {
            throw new IllegalArgumentException("from must be below to but is " + from + " with to " + to);
        }
        values = List.copyOf(values);
        if (values.isEmpty() || !values.stream().allMatch(value -> value >= 0)) {
            throw new IllegalArgumentException("values must be one or more, each 0 or more, but are " + values);
        }
    }
}
