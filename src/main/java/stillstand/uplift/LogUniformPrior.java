package stillstand.uplift;

/**
 * Prior under which each factor of the rate is equally likely: uplift only.
 *
 * @param fromMetresPerKyr lowest rate, above 0
 * @param toMetresPerKyr highest rate, above the lowest
 */
public record LogUniformPrior(double fromMetresPerKyr, double toMetresPerKyr) implements RatePrior {
    public LogUniformPrior {
        Priors.requireAboveZero("fromMetresPerKyr", fromMetresPerKyr);
        Priors.requireRange(fromMetresPerKyr, toMetresPerKyr);
    }

    @Override
    public double density(double rateMetresPerKyr) {
        if (!(rateMetresPerKyr >= fromMetresPerKyr && rateMetresPerKyr <= toMetresPerKyr)) {
            return 0;
        }
        return 1 / (rateMetresPerKyr * Math.log(toMetresPerKyr / fromMetresPerKyr));
    }

    @Override
    public double quantile(double probability) {
        return fromMetresPerKyr * Math.pow(toMetresPerKyr / fromMetresPerKyr, probability);
    }

    @Override
    public String describe() {
        return "log-uniform " + Priors.text(fromMetresPerKyr) + " " + Priors.text(toMetresPerKyr);
    }
}
