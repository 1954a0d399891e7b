package stillstand.uplift;

import stillstand.uncertainty.Normal;

/**
 * Normal prior of a rate, for a user who knows the rate from elsewhere.
 *
 * @param mean m/kyr
 * @param sigmaMetresPerKyr one standard deviation, m/kyr, above 0
 */
public record NormalPrior(double mean, double sigmaMetresPerKyr) implements RatePrior {
    /** Beyond so many standard deviations nothing is held possible (probability 1e-15). */
    private static final double REACH_IN_SIGMAS = 8;

    public NormalPrior {
        Priors.requireFinite("mean", mean);
        Priors.requireAboveZero("sigmaMetresPerKyr", sigmaMetresPerKyr);
    }

    @Override
    public double density(double rateMetresPerKyr) {
        return new Normal(mean, sigmaMetresPerKyr).density(rateMetresPerKyr);
    }

    @Override
    public double quantile(double probability) {
        return new Normal(mean, sigmaMetresPerKyr).quantile(probability);
    }

    @Override
    public double fromMetresPerKyr() {
        return mean - REACH_IN_SIGMAS * sigmaMetresPerKyr;
    }

    @Override
    public double toMetresPerKyr() {
        return mean + REACH_IN_SIGMAS * sigmaMetresPerKyr;
    }

    @Override
    public String describe() {
        return "normal " + Priors.text(mean) + " " + Priors.text(sigmaMetresPerKyr);
    }
}
