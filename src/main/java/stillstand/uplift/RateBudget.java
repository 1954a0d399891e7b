package stillstand.uplift;

import java.util.ArrayList;
import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import stillstand.shoreline.HeightTerm;
import stillstand.uncertainty.DrawStreams;
import stillstand.uncertainty.PreparedFunction;
import stillstand.uncertainty.SobolIndices;
import stillstand.uncertainty.Uncertain;

/**
 * Which group of inputs the spread of one level's rate comes from. Where several highstands or curves may explain the level, the
 * choice among them is one more input.
 */
final class RateBudget implements PreparedFunction {
    private final List<RateColumns> functions = new ArrayList<>();
    private final double[] upToProbability;
    /** Place of each explanation's inputs among the columns of the whole. */
    private final List<int[]> places = new ArrayList<>();

    private final Map<InputGroup, List<Integer>> columnsOfGroup = new EnumMap<>(InputGroup.class);

    private final int dimensions;

    /**
     * As {@link LevelRates#of}.
     *
     * @param choice the group that the choice among explanations belongs to
     */
    RateBudget(
            List<HeightTerm> height,
            Uncertain loweringMetresPerKyr,
            List<? extends SeaAtLevel> explanations,
            InputGroup choice) {
        upToProbability = new double[explanations.size()];
        double below = 0;
        for (int e = 0; e < explanations.size(); e++) {
            functions.add(new RateColumns(height, loweringMetresPerKyr, explanations.get(e)));
            below += explanations.get(e).probability();
            upToProbability[e] = below;
        }
        int next = 0;
        for (InputGroup group : InputGroup.values()) {
            int most = functions.stream()
                    .mapToInt(f -> f.dimensionsOf(group).length)
                    .max()
                    .orElse(0);
            List<Integer> columns = new ArrayList<>();
            for (int i = 0; i < most; i++) {
                columns.add(next++);
            }
            columnsOfGroup.put(group, columns);
        }
        for (RateColumns function : functions) {
            int[] place = new int[function.dimensions()];
            for (InputGroup group : InputGroup.values()) {
                int[] own = function.dimensionsOf(group);
                for (int i = 0; i < own.length; i++) {
                    place[own[i]] = columnsOf(group).get(i);
                }
            }
            places.add(place);
        }
        if (explanations.size() > 1) {
            columnsOf(choice).add(next++);
        }
        dimensions = next;
    }

    /**
     * Shares of the groups that have a spread; empty where the rate has none.
     *
     * @param key names the level among all draws of the study
     * @param scrambles independent repetitions, 2 or more
     */
    Optional<LevelAnswer.Budget> shares(DrawStreams streams, String key, int scrambles) {
        List<SobolIndices.Group> groups = new ArrayList<>();
        for (InputGroup group : InputGroup.values()) {
            List<Integer> columns = columnsOf(group);
            if (!columns.isEmpty()) {
                groups.add(new SobolIndices.Group(group.name(), columns));
            }
        }
        if (groups.isEmpty()) {
            return Optional.empty();
        }
        return SobolIndices.of(this, dimensions, groups, streams, key + " / budget", scrambles)
                .map(RateBudget::named);
    }

    private List<Integer> columnsOf(InputGroup group) {
        return columnsOfGroup.getOrDefault(group, List.of());
    }

    /** Values of an input under each explanation that has it, in the order of the explanations; the choice among them as it is. */
    @Override
    public double[][] prepare(int dimension, double[] probabilities) {
        if (functions.size() > 1 && dimension == dimensions - 1) {
            return new double[][] {probabilities};
        }
        double[][] values = new double[functions.size()][0];
        for (int e = 0; e < functions.size(); e++) {
            int[] place = places.get(e);
            for (int d = 0; d < place.length; d++) {
                if (place[d] == dimension) {
                    values[e] = probabilities.clone();
                    functions.get(e).toValues(d, values[e]);
                }
            }
        }
        return values;
    }

    @Override
    public void evaluate(double[][][] prepared, double[] out) {
        RateColumns.Columns drawn = new RateColumns.Columns(out.length);
        double[] choice = functions.size() > 1 ? prepared[dimensions - 1][0] : new double[0];
        for (int e = 0; e < functions.size(); e++) {
            int[] place = places.get(e);
            double[][] own = new double[place.length][];
            for (int d = 0; d < place.length; d++) {
                own[d] = prepared[place[d]][e];
            }
            functions.get(e).combine(own, drawn);
            double from = e == 0 ? 0 : upToProbability[e - 1];
            boolean last = e == functions.size() - 1;
            for (int i = 0; i < out.length; i++) {
                if (choice.length == 0 || (choice[i] >= from && (last || choice[i] < upToProbability[e]))) {
                    out[i] = drawn.rateMetresPerKyr[i];
                }
            }
        }
    }

    private static LevelAnswer.Budget named(SobolIndices.Budget budget) {
        Map<InputGroup, LevelAnswer.Share> shares = new EnumMap<>(InputGroup.class);
        for (SobolIndices.Share share : budget.shares()) {
            shares.put(
                    InputGroup.valueOf(share.group()),
                    new LevelAnswer.Share(share.firstOrder(), share.total(), share.sdIfExact()));
        }
        return new LevelAnswer.Budget(
                Optional.ofNullable(shares.get(InputGroup.ELEVATION)),
                Optional.ofNullable(shares.get(InputGroup.PALAEODEPTH)),
                Optional.ofNullable(shares.get(InputGroup.AGE)),
                Optional.ofNullable(shares.get(InputGroup.SEA_LEVEL)),
                Optional.ofNullable(shares.get(InputGroup.SURFACE_LOWERING)));
    }
}
