package stillstand.uncertainty;

/**
 * Density rising linearly from 0 at the lower bound to the mode and falling linearly to 0 at the upper bound.
 *
 * @param low lower bound, finite
 * @param mode most likely value, from {@code low} to {@code high}
 * @param high upper bound, finite, above {@code low}
 */
public record Triangular(double low, double mode, double high) implements Uncertain {
    /** @throws IllegalArgumentException if not {@code low <= mode <= high} and {@code low < high}, all finite */
    public Triangular {
        Uncertain.requireFinite("low", low);
        Uncertain.requireFinite("high", high);
        if (!(low < high)) {
            throw new IllegalArgumentException("low must be below high but is " + low + " with high " + high);
        }
        if (!(low <= mode && mode <= high)) {
            throw new IllegalArgumentException(
                    "mode must lie between low and high but is " + mode + " with " + low + " to " + high);
        }
    }

    @Override
    public double quantile(double probability) {
        Uncertain.requireProbability(probability);
        double width = high - low;
        double rise = mode - low;
        return probability * width < rise
                ? low + Math.sqrt(width * rise * probability)
                : high - Math.sqrt(width * (high - mode) * (1 - probability));
    }

    @Override
    public double cumulativeProbability(double value) {
        if (value <= low) {
            return 0;
        }
        if (value >= high) {
            return 1;
        }
        double width = high - low;
        return value < mode
                ? (value - low) * (value - low) / (width * (mode - low))
                : 1 - (high - value) * (high - value) / (width * (high - mode));
    }

    @Override
    public double density(double value) {
        if (!(value >= low && value <= high)) {
            return 0;
        }
        double peak = 2 / (high - low);
        if (value == mode) {
            return peak;
        }
        return value < mode ? peak * (value - low) / (mode - low) : peak * (high - value) / (high - mode);
    }

    @Override
    public double mean() {
        return (low + mode + high) / 3;
    }

    @Override
    public double standardDeviation() {
        double rise = mode - low;
        double fall = high - mode;
        return Math.sqrt((rise * rise + rise * fall + fall * fall) / 18);
    }

    @Override
    public void toQuantiles(double[] column) {
        double width = high - low;
        double atMode = (mode - low) / width;
        double rise = width * (mode - low);
        double fall = width * (high - mode);
        for (int i = 0; i < column.length; i++) {
            double probability = column[i];
            column[i] = probability < atMode
                    ? low + Math.sqrt(rise * probability)
                    : high - Math.sqrt(fall * (1 - probability));
        }
    }

    @Override
    public Triangular plus(double shift) {
        return new Triangular(low + shift, mode + shift, high + shift);
    }
}
