package stillstand.uplift;

/**
 * What is held of a rate before the evidence is seen: always a proper density, normalised on its own range. Rates are in
 * m/kyr (which is mm/yr), uplift positive.
 */
public sealed interface RatePrior permits CauchyPrior, HalfCauchyPrior, LogUniformPrior, MirroredPrior, NormalPrior {
    /** Density at a rate, per m/kyr; 0 outside the range. */
    double density(double rateMetresPerKyr);

    /**
     * Multiplies weights by the density at each rate.
     *
     * @param ratesMetresPerKyr a column of rates
     * @param weights as long; multiplied in place
     */
    default void weigh(double[] ratesMetresPerKyr, double[] weights) {
        for (int i = 0; i < weights.length; i++) {
            weights[i] *= density(ratesMetresPerKyr[i]);
        }
    }

    /** Lowest rate that is possible, m/kyr. */
    double fromMetresPerKyr();

    /** Highest rate that is possible, m/kyr. */
    double toMetresPerKyr();

    /** The rate below which the prior holds this probability, strictly between 0 and 1. */
    double quantile(double probability);

    /** The prior as {@code sites.csv} writes it, such as {@code cauchy 0 0.5 from -10 to 15}. */
    String describe();

    /** Whether it allows both uplift and subsidence. */
    default boolean isTwoSided() {
        return fromMetresPerKyr() < 0 && toMetresPerKyr() > 0;
    }
}
