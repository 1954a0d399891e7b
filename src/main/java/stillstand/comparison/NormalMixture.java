package stillstand.comparison;

import java.util.Optional;
import stillstand.uncertainty.Interval;
import stillstand.uncertainty.StandardNormal;
import stillstand.uncertainty.Summary;

/** A weighted mixture of normals, summed up. */
final class NormalMixture {
    private static final int HALVINGS = 80;

    private final double[] weights;
    private final double[] means;
    private final double[] sds;

    /** Weights sum to 1; standard deviations above 0. */
    NormalMixture(double[] weights, double[] means, double[] sds) {
        this.weights = weights;
        this.means = means;
        this.sds = sds;
    }

    double mean() {
        double sum = 0;
        for (int k = 0; k < weights.length; k++) {
            sum += weights[k] * means[k];
        }
        return sum;
    }

    double sd() {
        double mean = mean();
        double sum = 0;
        for (int k = 0; k < weights.length; k++) {
            double apart = means[k] - mean;
            sum += weights[k] * (sds[k] * sds[k] + apart * apart);
        }
        return Math.sqrt(sum);
    }

    double quantile(double probability) {
        double low = mean() - 40 * sd();
        double high = mean() + 40 * sd();
        for (int i = 0; i < HALVINGS; i++) {
            double middle = (low + high) / 2;
            if (cumulativeProbability(middle) < probability) {
                low = middle;
            } else {
                high = middle;
            }
        }
        return (low + high) / 2;
    }

    private double cumulativeProbability(double value) {
        double sum = 0;
        for (int k = 0; k < weights.length; k++) {
            sum += weights[k] * StandardNormal.quickCumulativeProbability((value - means[k]) / sds[k]);
        }
        return sum;
    }

    Summary summary() {
        return new Summary(
                quantile(0.5),
                Optional.of(mean()),
                Optional.of(sd()),
                between(Interval.PROBABILITY_68),
                between(Interval.PROBABILITY_95));
    }

    private Interval between(double probability) {
        return new Interval(quantile((1 - probability) / 2), quantile((1 + probability) / 2));
    }
}
