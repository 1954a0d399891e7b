package stillstand.uncertainty;

/**
 * Every value between two bounds is equally likely.
 *
 * @param low lower bound, finite
 * @param high upper bound, finite, above {@code low}
 */
public record Uniform(double low, double high) implements Uncertain {
    /** @throws IllegalArgumentException if not {@code low < high}, both finite */
    public Uniform {
        Uncertain.requireFinite("low", low);
        Uncertain.requireFinite("high", high);
        if (!(low < high)) {
            throw new IllegalArgumentException("low must be below high but is " + low + " with high " + high);
        }
    }

    @Override
    public double quantile(double probability) {
        Uncertain.requireProbability(probability);
        return low + (high - low) * probability;
    }

    @Override
    public double cumulativeProbability(double value) {
        return Math.min(1, Math.max(0, (value - low) / (high - low)));
    }

    @Override
    public double density(double value) {
        return value >= low && value <= high ? 1 / (high - low) : 0;
    }

    @Override
    public double mean() {
        return low + (high - low) / 2;
    }

    @Override
    public double standardDeviation() {
        return (high - low) / Math.sqrt(12);
    }

    @Override
    public void toQuantiles(double[] column) {
        double width = high - low;
        for (int i = 0; i < column.length; i++) {
            column[i] = low + width * column[i];
        }
    }

    @Override
    public Uniform plus(double shift) {
        return new Uniform(low + shift, high + shift);
    }
}
