package stillstand.sensitivity;

import stillstand.uncertainty.StandardNormal;

/**
 * What each draw foretells of a measurement that has not been made: a normal result, or, with some probability, one that says
 * nothing and is uniform over a range from 0.
 */
final class ForetoldResult {
    private static final double FAR_IN_SIGMAS = 9;
    private static final double ROOT_TWO_PI = Math.sqrt(2 * Math.PI);

    private final double[] mean;
    private final double[] sigma;
    private final double[] idle;
    private final double idleUpTo;

    /**
     * @param mean by draw, in the order of {@link RateDraws}
     * @param sigma by draw, one standard deviation, above 0
     * @param idle by draw, probability of a result that says nothing, 0 to 1
     * @param idleUpTo upper end of such results, above 0
     */
    ForetoldResult(double[] mean, double[] sigma, double[] idle, double idleUpTo) {
        this.mean = mean;
        this.sigma = sigma;
        this.idle = idle;
        this.idleUpTo = idleUpTo;
    }

    /** A result that a draw may give; {@code choice} and {@code probability} uniform, strictly between 0 and 1. */
    double result(int draw, double choice, double probability) {
        return choice < idle[draw]
                ? idleUpTo * probability
                : mean[draw] + sigma[draw] * StandardNormal.quantile(probability);
    }

    /** Density of a result given a draw. */
    double density(double result, int draw) {
        double d = (result - mean[draw]) / sigma[draw];
        double bell = Math.abs(d) < FAR_IN_SIGMAS ? Math.exp(-d * d / 2) / (sigma[draw] * ROOT_TWO_PI) : 0;
        return (1 - idle[draw]) * bell + idle[draw] / idleUpTo;
    }
}
