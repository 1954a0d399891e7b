package stillstand.uncertainty;

import org.apache.commons.statistics.distribution.NormalDistribution;

/** The normal distribution of mean 0 and standard deviation 1. */
public final class StandardNormal {
    private static final NormalDistribution ACCURATE = NormalDistribution.of(0, 1);

    private StandardNormal() {}

    /** Probability that a standard normal number is at most {@code value}. */
    public static double cumulativeProbability(double value) {
        return ACCURATE.cumulativeProbability(value);
    }

    /** Probability density at {@code value}. */
    public static double density(double value) {
        return ACCURATE.density(value);
    }

    /** The value below which a standard normal number lies with the given probability, from 0 to 1. */
    public static double quantile(double probability) {
        return ACCURATE.inverseCumulativeProbability(probability);
    }

    /** Quantiles of a whole column, in place. */
    public static void toQuantiles(double[] column) {
        for (int i = 0; i < column.length; i++) {
            column[i] = quantile(column[i]);
        }
    }
}
