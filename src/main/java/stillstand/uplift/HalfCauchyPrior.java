package stillstand.uplift;

/**
 * Half-Cauchy prior of a rate, truncated and normalised on its range (after Gelman 2006, Bayesian Analysis 1, 515-534):
 * uplift only.
 *
 * @param scale m/kyr, above 0
 * @param fromMetresPerKyr lowest rate, 0 or more
 * @param toMetresPerKyr highest rate, above the lowest
 */
public record HalfCauchyPrior(double scale, double fromMetresPerKyr, double toMetresPerKyr) implements RatePrior {
    public HalfCauchyPrior {
        Priors.requireAboveZero("scale", scale);
        Priors.requireRange(fromMetresPerKyr, toMetresPerKyr);
        if (!(fromMetresPerKyr >= 0)) {
            throw new IllegalArgumentException("fromMetresPerKyr must be 0 or more but is " + fromMetresPerKyr);
        }
    }

    @Override
    public double density(double rateMetresPerKyr) {
        return whole().density(rateMetresPerKyr);
    }

    @Override
    public void weigh(double[] ratesMetresPerKyr, double[] weights) {
        whole().weigh(ratesMetresPerKyr, weights);
    }

    @Override
    public double quantile(double probability) {
        return whole().quantile(probability);
    }

    @Override
    public String describe() {
        return "half-cauchy " + Priors.text(scale) + " from " + Priors.text(fromMetresPerKyr) + " to "
                + Priors.text(toMetresPerKyr);
    }

    /** Cut to one side, a Cauchy density about 0 is a half-Cauchy density. */
    private CauchyPrior whole() {
        return new CauchyPrior(0, scale, fromMetresPerKyr, toMetresPerKyr);
    }
}
