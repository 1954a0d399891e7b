package stillstand.uplift;

import java.util.Map;
import java.util.NavigableMap;
import java.util.TreeMap;
import java.util.function.DoubleUnaryOperator;

/**
 * Where to evaluate a density of rates whose modes are not known: a coarse sweep of the prior's whole range, even in
 * {@code asinh(u / 0.02)}, then halving wherever something happens. Several modes, of either sign, are found this way.
 */
final class RateGrid {
    private static final double BEND = 0.02;
    private static final int SWEEP = 240;
    private static final int ROUNDS = 14;
    private static final double PRIOR_SHARE = 0.15;
    private static final double OF_INTEREST = 14;

    private RateGrid() {}

    /** Logarithm of the density, up to a constant, at rates chosen so that no interval that matters is coarse. */
    static NavigableMap<Double, Double> explored(RatePrior prior, DoubleUnaryOperator logLikelihood, int most) {
        TreeMap<Double, Double> log = new TreeMap<>();
        DoubleUnaryOperator logDensity = rate -> logLikelihood.applyAsDouble(rate) + Math.log(prior.density(rate));
        double from = asinh(prior.fromMetresPerKyr() / BEND);
        double to = asinh(prior.toMetresPerKyr() / BEND);
        for (int k = 0; k <= SWEEP; k++) {
            double rate = BEND * Math.sinh(from + (to - from) * k / SWEEP);
            rate = Math.min(prior.toMetresPerKyr(), Math.max(prior.fromMetresPerKyr(), rate));
            log.put(rate, logDensity.applyAsDouble(rate));
        }
        for (int round = 0; round < ROUNDS && log.size() < most; round++) {
            if (!refine(log, logDensity, 0.01, 0.7)) {
                break;
            }
        }
        return log;
    }

    /**
     * Halves every interval that holds more than {@code share} of the probability, or over which a density that matters changes
     * by more than {@code jump} in its logarithm.
     *
     * @return whether there was any
     */
    static boolean refine(NavigableMap<Double, Double> log, DoubleUnaryOperator logDensity, double share, double jump) {
        double highest = log.values().stream().mapToDouble(v -> v).max().orElseThrow();
        if (highest == Double.NEGATIVE_INFINITY) {
            return false;
        }
        double total = 0;
        Map.Entry<Double, Double> before = log.firstEntry();
        for (Map.Entry<Double, Double> now : log.tailMap(before.getKey(), false).entrySet()) {
            total += mass(before, now, highest);
            before = now;
        }
        TreeMap<Double, Double> added = new TreeMap<>();
        before = log.firstEntry();
        for (Map.Entry<Double, Double> now : log.tailMap(before.getKey(), false).entrySet()) {
            double top = Math.max(before.getValue(), now.getValue());
            boolean steep = top > highest - OF_INTEREST
                    && !(Math.abs(now.getValue() - before.getValue()) <= jump)
                    && mass(before, now, highest) > total * 1e-5;
            if (steep || mass(before, now, highest) > total * share) {
                double middle = (before.getKey() + now.getKey()) / 2;
                if (middle > before.getKey() && middle < now.getKey()) {
                    added.put(middle, logDensity.applyAsDouble(middle));
                }
            }
            before = now;
        }
        log.putAll(added);
        return !added.isEmpty();
    }

    private static double mass(Map.Entry<Double, Double> a, Map.Entry<Double, Double> b, double highest) {
        return (b.getKey() - a.getKey()) * (Math.exp(a.getValue() - highest) + Math.exp(b.getValue() - highest)) / 2;
    }

    /**
     * Nodes crowded where the explored density is high: equal steps of the integral of its square root, mixed with
     * {@value #PRIOR_SHARE} of the prior.
     */
    static double[] nodes(Map<Double, Double> explored, RatePrior prior, int count) {
        int n = explored.size();
        double[] rates = new double[n];
        double[] root = new double[n];
        double[] flat = new double[n];
        double highest = explored.values().stream().mapToDouble(v -> v).max().orElseThrow();
        int at = 0;
        for (Map.Entry<Double, Double> entry : explored.entrySet()) {
            rates[at] = entry.getKey();
            root[at] = Math.exp((entry.getValue() - highest) / 2);
            flat[at++] = prior.density(entry.getKey());
        }
        double[] until = cumulative(rates, root);
        double[] priorUntil = cumulative(rates, flat);
        double[] nodes = new double[count];
        int k = 0;
        for (int i = 0; i < count; i++) {
            double wanted = (double) i / (count - 1);
            while (k < n - 2 && mixed(until, priorUntil, k + 1) < wanted) {
                k++;
            }
            double low = mixed(until, priorUntil, k);
            double high = mixed(until, priorUntil, k + 1);
            double part = high > low ? Math.min(1, Math.max(0, (wanted - low) / (high - low))) : 0;
            nodes[i] = rates[k] + part * (rates[k + 1] - rates[k]);
        }
        return nodes;
    }

    private static double mixed(double[] until, double[] priorUntil, int k) {
        return (1 - PRIOR_SHARE) * until[k] + PRIOR_SHARE * priorUntil[k];
    }

    private static double[] cumulative(double[] rates, double[] density) {
        double[] until = new double[rates.length];
        for (int k = 1; k < rates.length; k++) {
            until[k] = until[k - 1] + (rates[k] - rates[k - 1]) * (density[k] + density[k - 1]) / 2;
        }
        double total = until[rates.length - 1];
        for (int k = 0; k < rates.length; k++) {
            until[k] = total > 0 ? until[k] / total : (double) k / (rates.length - 1);
        }
        return until;
    }

    static double asinh(double x) {
        return Math.copySign(Math.log(Math.abs(x) + Math.sqrt(x * x + 1)), x);
    }
}
