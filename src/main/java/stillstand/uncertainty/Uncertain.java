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

    /** Probability density at {@code value}; infinite at the value of an {@link Exact} number, 0 elsewhere. */
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

    /** @throws IllegalArgumentException if {@code probability} is not strictly between 0 and 1, or is not a number */
    static void requireProbability(double probability) {
        if (!(probability > 0 && probability < 1)) {
            throw new IllegalArgumentException("probability must lie strictly between 0 and 1 but is " + probability);
        }
    }
}
