package stillstand.uncertainty;

/**
 * Normal distribution.
 *
 * @param mean expected value, finite
 * @param sigma standard deviation, above 0 (a number without spread is {@link Exact})
 */
public record Normal(double mean, double sigma) implements Uncertain {
    /** @throws IllegalArgumentException if {@code mean} is not finite or {@code sigma} is not a finite number above 0 */
    public Normal {
        Uncertain.requireFinite("mean", mean);
        Uncertain.requirePositive("sigma", sigma);
    }

    @Override
    public double quantile(double probability) {
        Uncertain.requireProbability(probability);
        return mean + sigma * StandardNormal.quantile(probability);
    }

    @Override
    public double cumulativeProbability(double value) {
        return StandardNormal.cumulativeProbability((value - mean) / sigma);
    }

    @Override
    public double density(double value) {
        return StandardNormal.density((value - mean) / sigma) / sigma;
    }

    @Override
    public double standardDeviation() {
        return sigma;
    }

    @Override
    public void toQuantiles(double[] column) {
        StandardNormal.toQuantiles(column);
        for (int i = 0; i < column.length; i++) {
            column[i] = mean + sigma * column[i];
        }
    }

    @Override
    public Normal plus(double shift) {
        return new Normal(mean + shift, sigma);
    }
}
