package stillstand.uncertainty;

/**
 * A shifted log-normal distribution: {@code shift + median exp(sigmaLog u)} with {@code u} standard normal.
 *
 * @param shift lower bound, finite; 0 for the ordinary log-normal distribution
 * @param median median of the part above the shift, above 0; the median of the number is {@code shift + median}
 * @param sigmaLog standard deviation of the natural logarithm of that part, above 0
 */
public record LogNormal(double shift, double median, double sigmaLog) implements Uncertain {
    /** @throws IllegalArgumentException if {@code shift} is not finite, or median or sigmaLog not a finite number above 0 */
    public LogNormal {
        Uncertain.requireFinite("shift", shift);
        Uncertain.requirePositive("median", median);
        Uncertain.requirePositive("sigmaLog", sigmaLog);
    }

    @Override
    public double quantile(double probability) {
        Uncertain.requireProbability(probability);
        return shift + median * Math.exp(sigmaLog * StandardNormal.quantile(probability));
    }

    @Override
    public double cumulativeProbability(double value) {
        return value > shift ? StandardNormal.cumulativeProbability(standard(value)) : 0;
    }

    @Override
    public double density(double value) {
        return value > shift ? StandardNormal.density(standard(value)) / (sigmaLog * (value - shift)) : 0;
    }

    @Override
    public double mean() {
        return shift + median * Math.exp(sigmaLog * sigmaLog / 2);
    }

    @Override
    public double standardDeviation() {
        double variance = sigmaLog * sigmaLog;
        return median * Math.exp(variance / 2) * Math.sqrt(Math.expm1(variance));
    }

    @Override
    public void toQuantiles(double[] column) {
        StandardNormal.toQuantiles(column);
        for (int i = 0; i < column.length; i++) {
            column[i] = shift + median * Math.exp(sigmaLog * column[i]);
        }
    }

    @Override
    public LogNormal plus(double by) {
        return new LogNormal(shift + by, median, sigmaLog);
    }

    private double standard(double value) {
        return Math.log((value - shift) / median) / sigmaLog;
    }
}
