package stillstand.uplift;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import stillstand.uncertainty.Interval;

/**
 * What a flight would roughly say, within milliseconds, while somebody tries pairings by hand: from the
 * {@link SegmentRecursion}, never the answer. Shared errors ride on each highstand as if they were its own, recording and strays
 * stand at their prior medians; so intervals are somewhat too narrow.
 *
 * @param rate approximate rate, m/kyr
 * @param pairings which level records which highstand, most probable first by level; rows of one label count together
 * @param unmatched for each level, the probability that it is no shoreline
 */
public record FlightPreview(Rate rate, List<FlightResult.Pairing> pairings, List<FlightResult.Unmatched> unmatched) {
    private static final int RATES = 300;
    private static final int RATES_WITHIN = 60;
    private static final double LEAST_PROBABILITY = 1e-3;
    /** Rates of less weight than this change no pairing that can be seen. */
    private static final double LEAST_WEIGHT = 1e-4;

    public FlightPreview {
        pairings = List.copyOf(pairings);
        unmatched = List.copyOf(unmatched);
    }

    /** The highstands that a level may record, most probable first. */
    public List<FlightResult.Pairing> pairingsOf(String level) {
        return pairings.stream().filter(each -> each.level().equals(level)).toList();
    }

    /** The preview of a flight; absent where no rate of the prior can have left it. */
    public static Optional<FlightPreview> of(FlightSetup setup, RatePrior prior) {
        FlightModel model = separate(setup);
        SharedNumbers middle = middle(setup.shared());
        try {
            RatePosterior posterior = FlightIntegration.preview(model, prior, SharedNodes.fixed(middle), RATES);
            return Optional.of(
                    summary(model, middle, posterior, posterior.ratesMetresPerKyr(), posterior.nodeWeights()));
        } catch (IllegalArgumentException e) {
            return Optional.empty();
        }
    }

    /**
     * The same for rates in an interval alone, however improbable: one of several correlations that remain possible.
     *
     * @param rates m/kyr, within the prior's range
     */
    public static Optional<FlightPreview> within(FlightSetup setup, RatePrior prior, Interval rates) {
        FlightModel model = separate(setup);
        SharedNumbers middle = middle(setup.shared());
        SegmentRecursion recursion = new SegmentRecursion(model);
        double[] nodes = new double[RATES_WITHIN];
        double[] logs = new double[RATES_WITHIN];
        for (int k = 0; k < RATES_WITHIN; k++) {
            nodes[k] = rates.low() + rates.width() * (k + 0.5) / RATES_WITHIN;
            logs[k] = recursion.logEvidence(new UpliftHistory.ConstantRate(nodes[k]), middle);
        }
        try {
            RatePosterior posterior = RatePosterior.of(nodes, logs, prior);
            return Optional.of(summary(model, middle, posterior, nodes, posterior.nodeWeights()));
        } catch (IllegalArgumentException e) {
            return Optional.empty();
        }
    }

    private static FlightPreview summary(
            FlightModel model, SharedNumbers middle, RatePosterior posterior, double[] nodes, double[] weights) {
        double[] pairing = pairings(model, middle, nodes, weights);
        List<FlightResult.Pairing> pairs = new ArrayList<>();
        List<FlightResult.Unmatched> unmatched = new ArrayList<>();
        int count = model.rows().size();
        for (int i = 0; i < model.levels().size(); i++) {
            String level = model.levels().get(i).name();
            Map<String, Double> byStage = new LinkedHashMap<>();
            double matched = 0;
            for (int j = 0; j < count; j++) {
                byStage.merge(model.rows().get(j).stage(), pairing[i * count + j], Double::sum);
                matched += pairing[i * count + j];
            }
            byStage.entrySet().stream()
                    .filter(entry -> entry.getValue() >= LEAST_PROBABILITY)
                    .sorted(Comparator.comparing((Map.Entry<String, Double> entry) -> -entry.getValue()))
                    .forEach(entry ->
                            pairs.add(new FlightResult.Pairing(level, entry.getKey(), Math.min(1, entry.getValue()))));
            unmatched.add(new FlightResult.Unmatched(level, Math.min(1, Math.max(0, 1 - matched))));
        }
        return new FlightPreview(Rate.of(posterior), pairs, unmatched);
    }

    private static FlightModel separate(FlightSetup setup) {
        SharedPriors shared = setup.shared();
        return setup.model()
                .withRows(setup.model().rows().stream()
                        .map(row -> row.withSigmas(
                                row.takesCurveAge()
                                        ? Math.hypot(row.ageSigmaKa(), shared.ageShiftSigmaKa())
                                        : row.ageSigmaKa(),
                                Math.hypot(
                                        row.levelSigmaMetres(),
                                        Math.hypot(
                                                row.takesOffset() ? shared.offsetSigmaMetres() : 0,
                                                row.takesInterstadial() ? shared.interstadialSigmaMetres() : 0))))
                        .toList());
    }

    private static SharedNumbers middle(SharedPriors shared) {
        int decay = (shared.decaysKa().size() - 1) / 2;
        return new SharedNumbers(
                0,
                0,
                0,
                shared.recording().quantile(0.5),
                shared.decaysKa().get(decay),
                shared.strays().quantile(0.5));
    }

    /** Probability that level i records row j, at {@code [i * rows + j]}, over weighted rates. */
    private static double[] pairings(FlightModel model, SharedNumbers middle, double[] nodes, double[] weights) {
        SegmentRecursion recursion = new SegmentRecursion(model);
        double[] sum = new double[model.levels().size() * model.rows().size()];
        double all = 0;
        for (int k = 0; k < nodes.length; k++) {
            if (weights[k] >= LEAST_WEIGHT) {
                recursion.logEvidence(new UpliftHistory.ConstantRate(nodes[k]), middle);
                double[] pairing = recursion.pairing();
                all += weights[k];
                for (int p = 0; p < sum.length; p++) {
                    sum[p] += weights[k] * pairing[p];
                }
            }
        }
        for (int p = 0; p < sum.length && all > 0; p++) {
            sum[p] /= all;
        }
        return sum;
    }
}
