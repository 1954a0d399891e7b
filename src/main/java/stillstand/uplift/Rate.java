package stillstand.uplift;

import java.util.List;
import java.util.Optional;
import stillstand.uncertainty.Interval;

/**
 * A rate of vertical motion with its uncertainty, in m/kyr (the same as mm/yr), uplift positive.
 *
 * @param median half the probability lies below
 * @param mean expected value; absent where it does not exist
 * @param sd standard deviation; absent where it does not exist
 * @param interval68 equal tails, probability 0.6827
 * @param interval95 equal tails, probability 0.95
 * @param shortest68 the shortest interval of probability 0.6827
 * @param shortest95 the shortest interval of probability 0.95
 * @param density for figures
 * @param unit "m/kyr"
 */
public record Rate(
        double median,
        Optional<Double> mean,
        Optional<Double> sd,
        Interval interval68,
        Interval interval95,
        Interval shortest68,
        Interval shortest95,
        Density density,
        String unit) {
    /** The unit of every rate. */
    public static final String UNIT = "m/kyr";

    /**
     * Relative frequency in equal bins.
     *
     * @param from lower edge of the first bin, m/kyr
     * @param to upper edge of the last bin, m/kyr
     * @param values share of the probability in each bin, at most 200
     */
    public record Density(double from, double to, List<Double> values) {
        public Density {
            values = List.copyOf(values);
        }
    }
}
