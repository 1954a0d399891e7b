package stillstand.sensitivity;

import stillstand.uncertainty.Interval;
import stillstand.uplift.Rate;

/**
 * A rate in short, m/kyr.
 *
 * @param median half the probability lies below
 * @param interval95 equal tails, probability 0.95
 */
public record ShortRate(double median, Interval interval95) {
    /** Median and 95 % interval of a rate. */
    public static ShortRate of(Rate rate) {
        return new ShortRate(rate.median(), rate.interval95());
    }
}
