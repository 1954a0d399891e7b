package stillstand.uplift;

/**
 * A prior seen from below: what another prior holds of a rate, this one holds of its negative. Drowned reefs are matched in a mirror.
 *
 * @param of the prior that is mirrored
 */
public record MirroredPrior(RatePrior of) implements RatePrior {
    @Override
    public double density(double rateMetresPerKyr) {
        return of.density(-rateMetresPerKyr);
    }

    @Override
    public double fromMetresPerKyr() {
        return -of.toMetresPerKyr();
    }

    @Override
    public double toMetresPerKyr() {
        return -of.fromMetresPerKyr();
    }

    @Override
    public double quantile(double probability) {
        return -of.quantile(1 - probability);
    }

    /** The prior that is mirrored, as {@code sites.csv} writes it: readers never see the mirror. */
    @Override
    public String describe() {
        return of.describe();
    }
}
