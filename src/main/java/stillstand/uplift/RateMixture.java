package stillstand.uplift;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import java.util.TreeSet;
import stillstand.uncertainty.DensityBins;

/**
 * Mixtures of rates: what is held of a rate when one of several accounts of the past is true and nobody knows which. Mean and
 * standard deviation are exact; quantiles are read from the densities of the parts, linear between the middles of their bins,
 * which places them to within about a thousandth of a part's standard deviation.
 */
public final class RateMixture {
    /** A rate without a spread is taken for one as narrow as this, m/kyr. */
    private static final double NARROW = 1e-7;

    private RateMixture() {}

    /**
     * The mixture of rates.
     *
     * @param weights of the rates, 0 or more, not all 0; they need not add up to 1
     * @throws IllegalArgumentException if there are no rates, numbers differ, or the weights do not add up to more than 0
     */
    public static Rate of(List<Rate> rates, List<Double> weights) {
        double sum = weights.stream().mapToDouble(w -> w).sum();
        if (rates.isEmpty() || rates.size() != weights.size() || !(sum > 0 && sum < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("a mixture needs a weight for each of one or more rates but has "
                    + weights + " for " + rates.size());
        }
        List<Rate> parts = new ArrayList<>();
        List<Double> shares = new ArrayList<>();
        for (int k = 0; k < rates.size(); k++) {
            if (weights.get(k) > 0) {
                parts.add(rates.get(k));
                shares.add(weights.get(k) / sum);
            }
        }
        if (parts.size() == 1) {
            return parts.get(0);
        }
        Rate read = Rate.of(posterior(parts, shares));
        Optional<Double> mean = mean(parts, shares);
        return new Rate(
                read.median(),
                mean,
                mean.flatMap(m -> sd(parts, shares, m)),
                read.interval68(),
                read.interval95(),
                read.shortest68(),
                read.shortest95(),
                read.density(),
                Rate.UNIT);
    }

    /** The chance that the coast rises in a mixture; absent where a part with weight has none. */
    static Optional<Double> probability(List<Optional<Double>> probabilities, List<Double> weights) {
        double sum = 0;
        double total = 0;
        for (int k = 0; k < weights.size(); k++) {
            if (weights.get(k) > 0 && probabilities.get(k).isEmpty()) {
                return Optional.empty();
            }
            sum += weights.get(k) * probabilities.get(k).orElse(0.0);
            total += weights.get(k);
        }
        return Optional.of(sum / total);
    }

    private static Optional<Double> mean(List<Rate> parts, List<Double> shares) {
        double sum = 0;
        for (int k = 0; k < parts.size(); k++) {
            if (parts.get(k).mean().isEmpty()) {
                return Optional.empty();
            }
            sum += shares.get(k) * parts.get(k).mean().get();
        }
        return Optional.of(sum);
    }

    private static Optional<Double> sd(List<Rate> parts, List<Double> shares, double mean) {
        double sum = 0;
        for (int k = 0; k < parts.size(); k++) {
            if (parts.get(k).sd().isEmpty()) {
                return Optional.empty();
            }
            double off = parts.get(k).mean().orElseThrow() - mean;
            double sd = parts.get(k).sd().get();
            sum += shares.get(k) * (sd * sd + off * off);
        }
        return Optional.of(Math.sqrt(sum));
    }

    /** The density that {@link #of} reads from; weights that add up to 1. */
    static RatePosterior posterior(List<Rate> parts, List<Double> shares) {
        List<Line> lines = parts.stream().map(Line::of).toList();
        Set<Double> nodes = new TreeSet<>();
        lines.forEach(line -> line.addNodes(nodes));
        double[] rates = nodes.stream().mapToDouble(v -> v).toArray();
        double[] density = new double[rates.length];
        for (int i = 0; i < rates.length; i++) {
            for (int k = 0; k < lines.size(); k++) {
                density[i] += shares.get(k) * lines.get(k).at(rates[i]);
            }
        }
        return RatePosterior.ofDensity(rates, density, 0);
    }

    /** A density as a broken line through the middles of its bins, 0 half a bin beyond the outermost. */
    private static final class Line {
        private final double from;
        private final double step;
        private final double[] density;

        private Line(double from, double step, double[] density) {
            this.from = from;
            this.step = step;
            this.density = density;
        }

        static Line of(Rate rate) {
            DensityBins bins = rate.density()
                    .orElseGet(() -> new DensityBins(rate.median() - NARROW, rate.median() + NARROW, List.of(1.0)));
            int count = bins.values().size();
            double step = (bins.to() - bins.from()) / count;
            double total = bins.values().stream().mapToDouble(v -> v).sum();
            double[] density = new double[count + 2];
            for (int i = 0; i < count; i++) {
                density[i + 1] = bins.values().get(i) / (total * step);
            }
            return new Line(bins.from() - step / 2, step, density);
        }

        void addNodes(Set<Double> nodes) {
            for (int i = 0; i < density.length; i++) {
                nodes.add(from + i * step);
            }
        }

        double at(double rate) {
            double place = (rate - from) / step;
            if (!(place > 0 && place < density.length - 1)) {
                return 0;
            }
            int i = (int) place;
            return density[i] + (place - i) * (density[i + 1] - density[i]);
        }
    }
}
