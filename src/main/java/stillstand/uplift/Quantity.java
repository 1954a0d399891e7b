package stillstand.uplift;

import java.util.Optional;
import stillstand.uncertainty.Interval;
import stillstand.uncertainty.Summary;

/**
 * A number with its uncertainty, as results hold it.
 *
 * @param median half the probability lies below
 * @param mean expected value; absent where it does not exist
 * @param sd standard deviation; absent where it does not exist
 * @param interval68 equal tails, probability 0.6827
 * @param interval95 equal tails, probability 0.95
 * @param unit of all of them
 */
public record Quantity(
        double median,
        Optional<Double> mean,
        Optional<Double> sd,
        Interval interval68,
        Interval interval95,
        String unit) {
    /** A summary with its unit. */
    public static Quantity of(Summary summary, String unit) {
        return new Quantity(
                summary.median(), summary.mean(), summary.sd(), summary.interval68(), summary.interval95(), unit);
    }
}
