package stillstand.uncertainty;

/**
 * A number that is not known exactly: a probability distribution with a quantile function. The kinds are closed, so that
 * every place that treats them treats them all.
 */
public sealed interface Uncertain
        permits Exact, Normal, TruncatedNormal, SplitNormal, Uniform, Triangular, LogNormal, Tabulated {

    /**
     * The value below which the number lies with the given probability.
     *
     * @param probability strictly between 0 and 1
     * @throws IllegalArgumentException if {@code probability} is not strictly between 0 and 1
     */
    double quantile(double probability);

    /** Probability that the number is at most {@code value}. */
    double cumulativeProbability(double value);

    /** Probability density at {@code value}; infinite at an {@link Exact} number's value and at a spike of a {@link Tabulated} one. */
    double density(double value);

    /** Expected value. */
    double mean();

    /** Standard deviation, 0 or more. */
    double standardDeviation();

    /** Whether the number has no spread at all. */
    default boolean isExact() {
        return false;
    }

    /**
     * Quantiles of a whole column, in place.
     *
     * @param column probabilities strictly between 0 and 1 on entry, values on return
     */
    default void toQuantiles(double[] column) {
        for (int i = 0; i < column.length; i++) {
            column[i] = quantile(column[i]);
        }
    }

    /** The same number moved up by {@code shift}. */
    Uncertain plus(double shift);

    /**
     * A normal number, or an exact one where the standard deviation is 0.
     *
     * @throws IllegalArgumentException if {@code mean} is not finite or {@code sigma} is negative or not finite
     */
    static Uncertain normal(double mean, double sigma) {
        return sigma == 0 ? new Exact(mean) : new Normal(mean, sigma);
    }

    /**
     * Refuses what is not a probability strictly between 0 and 1.
     *
     * @throws IllegalArgumentException if {@code probability} is not strictly between 0 and 1, or is not a number
     */
    static void requireProbability(double probability) {
        if (!(probability > 0 && probability < 1)) {
            throw new IllegalArgumentException("probability must lie strictly between 0 and 1 but is " + probability);
        }
    }

    /**
     * Refuses what is not a finite number.
     *
     * @throws IllegalArgumentException if {@code value} is infinite or not a number
     */
    static void requireFinite(String name, double value) {
        if (!Double.isFinite(value)) {
            throw new IllegalArgumentException(name + " must be finite but is " + value);
        }
    }

    /**
     * Refuses what is not a finite number above 0.
     *
     * @throws IllegalArgumentException if {@code value} is not a finite number above 0
     */
    static void requirePositive(String name, double value) {
        if (!(value > 0 && value < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException(name + " must be above 0 but is " + value);
        }
    }
}
