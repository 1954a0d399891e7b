package stillstand.uplift;

import java.util.List;
import java.util.Optional;
import stillstand.uncertainty.Interval;
import stillstand.uncertainty.StandardNormal;

/**
 * Mixtures of quantities of which only median and intervals are at hand: each is taken for a distribution whose quantiles are
 * linear in the normal deviate between those five, which is exact for normal ones.
 */
final class QuantityMixture {
    private static final double Z68 = -StandardNormal.quantile((1 - Interval.PROBABILITY_68) / 2);
    private static final double Z95 = -StandardNormal.quantile((1 - Interval.PROBABILITY_95) / 2);
    private static final double[] DEVIATES = {-Z95, -Z68, 0, Z68, Z95};
    private static final int BISECTIONS = 60;

    private final List<Quantity> parts;
    private final List<Double> weights;

    private QuantityMixture(List<Quantity> parts, List<Double> weights) {
        this.parts = parts;
        this.weights = weights;
    }

    /** The mixture; weights 0 or more, not all 0. */
    static Quantity of(List<Quantity> parts, List<Double> weights) {
        if (parts.size() == 1) {
            return parts.get(0);
        }
        QuantityMixture mixture = new QuantityMixture(parts, weights);
        Optional<Double> mean = mixture.mean();
        return new Quantity(
                mixture.quantile(0.5),
                mean,
                mean.flatMap(mixture::sd),
                mixture.tails(Interval.PROBABILITY_68),
                mixture.tails(Interval.PROBABILITY_95),
                parts.get(0).unit());
    }

    private double total() {
        return weights.stream().mapToDouble(w -> w).sum();
    }

    private Optional<Double> mean() {
        double sum = 0;
        for (int k = 0; k < parts.size(); k++) {
            if (parts.get(k).mean().isEmpty()) {
                return Optional.empty();
            }
            sum += weights.get(k) * parts.get(k).mean().get();
        }
        return Optional.of(sum / total());
    }

    private Optional<Double> sd(double mean) {
        double sum = 0;
        for (int k = 0; k < parts.size(); k++) {
            if (parts.get(k).sd().isEmpty()) {
                return Optional.empty();
            }
            double off = parts.get(k).mean().orElseThrow() - mean;
            sum += weights.get(k) * (Math.pow(parts.get(k).sd().get(), 2) + off * off);
        }
        return Optional.of(Math.sqrt(sum / total()));
    }

    private Interval tails(double probability) {
        return new Interval(quantile((1 - probability) / 2), quantile((1 + probability) / 2));
    }

    private double quantile(double probability) {
        double low = parts.stream().mapToDouble(part -> value(part, -9)).min().orElseThrow();
        double high = parts.stream().mapToDouble(part -> value(part, 9)).max().orElseThrow();
        for (int i = 0; i < BISECTIONS; i++) {
            double middle = (low + high) / 2;
            double below = 0;
            for (int k = 0; k < parts.size(); k++) {
                below += weights.get(k) * cumulativeProbability(parts.get(k), middle);
            }
            if (below < probability * total()) {
                low = middle;
            } else {
                high = middle;
            }
        }
        return (low + high) / 2;
    }

    private static double[] values(Quantity part) {
        return new double[] {
            part.interval95().low(),
            part.interval68().low(),
            part.median(),
            part.interval68().high(),
            part.interval95().high()
        };
    }

    private static double value(Quantity part, double deviate) {
        double[] values = values(part);
        int i = deviate < 0 ? 0 : values.length - 2;
        return values[i] + (deviate - DEVIATES[i]) * (values[i + 1] - values[i]) / (DEVIATES[i + 1] - DEVIATES[i]);
    }

    private static double cumulativeProbability(Quantity part, double value) {
        double[] values = values(part);
        int i = 0;
        while (i < values.length - 2 && value > values[i + 1]) {
            i++;
        }
        double width = values[i + 1] - values[i];
        if (!(width > 0)) {
            return value < values[i] ? 0 : StandardNormal.cumulativeProbability(DEVIATES[i + 1]);
        }
        return StandardNormal.cumulativeProbability(
                DEVIATES[i] + (value - values[i]) * (DEVIATES[i + 1] - DEVIATES[i]) / width);
    }
}
