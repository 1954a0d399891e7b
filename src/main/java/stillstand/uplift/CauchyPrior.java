package stillstand.uplift;

/**
 * Cauchy prior of a rate, truncated: both signs, heavy tails (after Gelman 2006, Bayesian Analysis 1, 515-534).
 *
 * @param location m/kyr
 * @param scale m/kyr, above 0
 * @param fromMetresPerKyr lowest rate
 * @param toMetresPerKyr highest rate, above the lowest
 */
public record CauchyPrior(double location, double scale, double fromMetresPerKyr, double toMetresPerKyr)
        implements RatePrior {
    /** The default: location 0, scale 0.5, from -10 to 15 m/kyr. */
    public static final CauchyPrior DEFAULT = new CauchyPrior(0, 0.5, -10, 15);

    public CauchyPrior {
        Priors.requireFinite("location", location);
        Priors.requireAboveZero("scale", scale);
        Priors.requireRange(fromMetresPerKyr, toMetresPerKyr);
    }

    @Override
    public double density(double rateMetresPerKyr) {
        if (!(rateMetresPerKyr >= fromMetresPerKyr && rateMetresPerKyr <= toMetresPerKyr)) {
            return 0;
        }
        double distance = (rateMetresPerKyr - location) / scale;
        return 1 / (scale * (angle(toMetresPerKyr) - angle(fromMetresPerKyr)) * (1 + distance * distance));
    }

    @Override
    public void weigh(double[] ratesMetresPerKyr, double[] weights) {
        double peak = 1 / (scale * (angle(toMetresPerKyr) - angle(fromMetresPerKyr)));
        double perScale = 1 / scale;
        for (int i = 0; i < weights.length; i++) {
            double rate = ratesMetresPerKyr[i];
            double distance = (rate - location) * perScale;
            weights[i] *= peak / (1 + distance * distance);
        }
        double from = fromMetresPerKyr;
        double to = toMetresPerKyr;
        for (int i = 0; i < weights.length; i++) {
            double rate = ratesMetresPerKyr[i];
            if (!(rate >= from && rate <= to)) {
                weights[i] = 0;
            }
        }
    }

    @Override
    public double quantile(double probability) {
        double low = angle(fromMetresPerKyr);
        double rate = location + scale * Math.tan(low + probability * (angle(toMetresPerKyr) - low));
        return Math.min(Math.max(rate, fromMetresPerKyr), toMetresPerKyr);
    }

    @Override
    public String describe() {
        return "cauchy " + Priors.text(location) + " " + Priors.text(scale) + " from " + Priors.text(fromMetresPerKyr)
                + " to " + Priors.text(toMetresPerKyr);
    }

    private double angle(double rateMetresPerKyr) {
        return Math.atan((rateMetresPerKyr - location) / scale);
    }
}
