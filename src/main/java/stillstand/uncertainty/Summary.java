package stillstand.uncertainty;

import java.util.Optional;

/**
 * What is told of a distribution. Both intervals have equal tails.
 *
 * @param median half of the probability lies below it
 * @param mean expected value; absent where it may not exist, as of a quotient whose divisor may be near zero
 * @param sd standard deviation; absent where the mean is
 * @param interval68 holds {@value Interval#PROBABILITY_68} of the probability
 * @param interval95 holds {@value Interval#PROBABILITY_95} of the probability
 */
public record Summary(
        double median, Optional<Double> mean, Optional<Double> sd, Interval interval68, Interval interval95) {

    /** @throws IllegalArgumentException if only one of mean and sd is present, or {@code sd} is not 0 or more */
    public Summary {
        if (mean.isPresent() != sd.isPresent()) {
            throw new IllegalArgumentException("mean and sd must be present together");
        }
        if (sd.isPresent() && !(sd.get() >= 0)) {
            throw new IllegalArgumentException("sd must be 0 or more but is " + sd.get());
        }
    }

    /** The summary of a distribution whose quantiles are known. */
    public static Summary of(Uncertain number) {
        if (number.isExact()) {
            Interval point = new Interval(number.mean(), number.mean());
            return new Summary(number.mean(), Optional.of(number.mean()), Optional.of(0.0), point, point);
        }
        return new Summary(
                number.quantile(0.5),
                Optional.of(number.mean()),
                Optional.of(number.standardDeviation()),
                between(number, Interval.PROBABILITY_68),
                between(number, Interval.PROBABILITY_95));
    }

    private static Interval between(Uncertain number, double probability) {
        return new Interval(number.quantile((1 - probability) / 2), number.quantile((1 + probability) / 2));
    }
}
