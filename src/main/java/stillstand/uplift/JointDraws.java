package stillstand.uplift;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import org.apache.commons.rng.UniformRandomProvider;

/**
 * Joint draws of rate, shared numbers and whole correlation, for maps, differences and figures. Probabilities of single pairs do
 * not make a consistent flight; these draws do.
 *
 * @param draws equally probable
 */
public record JointDraws(List<FlightDraw> draws) {
    public JointDraws {
        draws = List.copyOf(draws);
    }

    /**
     * A correlation and how probable it is among the draws.
     *
     * @param rows by level, the row it records, or -1 where it is a stray
     * @param share of the draws, 0 to 1
     */
    public record Correlation(List<Integer> rows, double share) {
        public Correlation {
            rows = List.copyOf(rows);
        }
    }

    /**
     * Draws from the posterior of {@link FlightIntegration}: rates at evenly spread quantiles, each moved within its share at
     * random; then a shared node by its evidence; then a correlation.
     *
     * @param posterior of the rate of this model
     * @param cells cells of height, 10 or more
     * @param count how many draws, 1 or more
     */
    public static JointDraws of(
            FlightModel model,
            RatePosterior posterior,
            SharedNodes shared,
            int cells,
            int count,
            UniformRandomProvider random) {
        ShorelineFilter filter = new ShorelineFilter(model, cells);
        CorrelationSampler sampler = new CorrelationSampler(filter);
        FilterWorkspace workspace = filter.workspace(false);
        List<FlightDraw> draws = new ArrayList<>();
        for (int k = 0; k < count; k++) {
            double probability = (k + Math.max(1e-6, Math.min(1 - 1e-6, random.nextDouble()))) / count;
            double rate = posterior.quantile(probability);
            UpliftHistory history = new UpliftHistory.ConstantRate(rate);
            SharedNumbers numbers = choose(filter, workspace, history, shared, random);
            sampler.prepare(history, numbers);
            draws.add(new FlightDraw(rate, numbers, sampler.draw(random)));
        }
        return new JointDraws(draws);
    }

    private static SharedNumbers choose(
            ShorelineFilter filter,
            FilterWorkspace workspace,
            UpliftHistory history,
            SharedNodes shared,
            UniformRandomProvider random) {
        List<SharedNodes.Node> nodes = shared.nodes();
        double[] logs = new double[nodes.size()];
        double highest = Double.NEGATIVE_INFINITY;
        for (int k = 0; k < logs.length && logs.length > 1; k++) {
            logs[k] = filter.logEvidence(history, nodes.get(k).shared(), workspace);
            highest = Math.max(highest, logs[k]);
        }
        double total = 0;
        for (int k = 0; k < logs.length; k++) {
            logs[k] = nodes.get(k).weight() * Math.exp(logs.length > 1 ? logs[k] - highest : 0);
            total += logs[k];
        }
        double left = random.nextDouble() * total;
        int k = 0;
        while (k < logs.length - 1 && left >= logs[k]) {
            left -= logs[k++];
        }
        return nodes.get(k).shared();
    }

    /** The correlations drawn, most frequent first. The first is the most probable one; it is never the answer. */
    public List<Correlation> correlations() {
        Map<List<Integer>, Integer> counts = new LinkedHashMap<>();
        draws.forEach(draw -> counts.merge(draw.rows(), 1, Integer::sum));
        return counts.entrySet().stream()
                .sorted(Comparator.comparing((Map.Entry<List<Integer>, Integer> entry) -> -entry.getValue()))
                .map(entry -> new Correlation(entry.getKey(), (double) entry.getValue() / draws.size()))
                .toList();
    }
}
