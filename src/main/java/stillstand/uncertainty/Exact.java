package stillstand.uncertainty;

import java.util.Arrays;

/**
 * A number without spread.
 *
 * @param value the number, finite
 */
public record Exact(double value) implements Uncertain {
    /** @throws IllegalArgumentException if {@code value} is not finite */
    public Exact {
        Uncertain.requireFinite("value", value);
    }

    @Override
    public double quantile(double probability) {
        Uncertain.requireProbability(probability);
        return value;
    }

    @Override
    public double cumulativeProbability(double at) {
        return at >= value ? 1 : 0;
    }

    @Override
    public double density(double at) {
        return at == value ? Double.POSITIVE_INFINITY : 0;
    }

    @Override
    public double mean() {
        return value;
    }

    @Override
    public double standardDeviation() {
        return 0;
    }

    @Override
    public boolean isExact() {
        return true;
    }

    @Override
    public void toQuantiles(double[] column) {
        Arrays.fill(column, value);
    }

    @Override
    public Exact plus(double shift) {
        return new Exact(value + shift);
    }
}
