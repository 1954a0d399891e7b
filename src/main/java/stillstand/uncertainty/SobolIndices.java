package stillstand.uncertainty;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;

/**
 * Which inputs the spread of a result comes from: Sobol' indices of groups of inputs.
 *
 * <p>First order (Saltelli et al. 2010, Comput. Phys. Commun. 181:259, table 2 b): the part of the variance that would go, on
 * average, if the group were known. Total (Jansen 1999, Comput. Phys. Commun. 117:35): the part that would stay if all other
 * groups were known. They differ where groups act together. Worked out from pairs of randomised Sobol' points, repeated over
 * independent scrambles, whose spread gives the standard errors.
 *
 * <p>Indices are parts of a variance: ask for none where the result may have no variance.
 */
public final class SobolIndices {
    private static final int POINTS = DrawStreams.BLOCK_DRAWS;

    private final PreparedFunction function;
    private final double[][][] medians;
    private final int dimensions;
    private final List<Group> groups;

    /**
     * A group of inputs that are judged together.
     *
     * @param name what the group is called
     * @param dimensions its dimensions, from 0
     */
    public record Group(String name, List<Integer> dimensions) {
        /** @throws IllegalArgumentException if there are no dimensions */
        public Group {
            dimensions = List.copyOf(dimensions);
            if (dimensions.isEmpty()) {
                throw new IllegalArgumentException("group '" + name + "' must have one dimension or more");
            }
        }
    }

    /**
     * What hangs on a group.
     *
     * @param group its name
     * @param firstOrder first-order share of the variance, about 0 to 1 (below 0 by chance)
     * @param firstOrderError standard error of that
     * @param total total share of the variance, 0 or more
     * @param totalError standard error of that
     * @param sdIfExact standard deviation of the result were every input of the group exactly its median
     */
    public record Share(
            String group,
            double firstOrder,
            double firstOrderError,
            double total,
            double totalError,
            double sdIfExact) {}

    /**
     * All shares.
     *
     * @param sd standard deviation of the result
     * @param shares one for each group, in the order asked for
     */
    public record Budget(double sd, List<Share> shares) {
        /** Copies the shares in. */
        public Budget {
            shares = List.copyOf(shares);
        }
    }

    private SobolIndices(PreparedFunction function, int dimensions, List<Group> groups) {
        this.function = function;
        this.dimensions = dimensions;
        medians = medians();
        this.groups = groups;
    }

    /**
     * The shares of groups of inputs.
     *
     * @param function the result as a function of the inputs' probabilities
     * @param dimensions how many inputs the function has
     * @param groups groups of dimensions, no dimension in two of them
     * @param streams where the scrambles come from
     * @param key names what this is for
     * @param scrambles independent repetitions, 2 or more; 8 or more give trustworthy errors
     * @return the shares, or nothing where the result does not vary
     * @throws IllegalArgumentException if there are too many dimensions (twice as many must not exceed
     *     {@link SobolPoints#MAXIMUM_DIMENSIONS}), too few scrambles, or a group's dimension does not exist or is in two groups
     */
    public static Optional<Budget> of(
            ColumnFunction function,
            int dimensions,
            List<Group> groups,
            DrawStreams streams,
            String key,
            int scrambles) {
        return of(PreparedFunction.of(function), dimensions, groups, streams, key, scrambles);
    }

    /** The same for a function in two steps, which is quicker. */
    public static Optional<Budget> of(
            PreparedFunction function,
            int dimensions,
            List<Group> groups,
            DrawStreams streams,
            String key,
            int scrambles) {
        if (scrambles < 2) {
            throw new IllegalArgumentException("scrambles must be 2 or more but are " + scrambles);
        }
        boolean[] taken = new boolean[dimensions];
        for (Group group : groups) {
            for (int dimension : group.dimensions()) {
                if (dimension < 0 || dimension >= dimensions || taken[dimension]) {
                    throw new IllegalArgumentException("group '" + group.name() + "' must have dimensions 0 to "
                            + (dimensions - 1) + " that are in no other group but has " + dimension);
                }
                taken[dimension] = true;
            }
        }
        SobolIndices indices = new SobolIndices(function, dimensions, List.copyOf(groups));
        List<Scramble> results = new ArrayList<>();
        for (int block = 0; block < scrambles; block++) {
            results.add(indices.scramble(SobolPoints.scrambled(streams, key, 2 * dimensions, block)));
        }
        return indices.budget(results);
    }

    /** What one scramble says of a group: averages that are parts of the variance. */
    private record Effect(double firstOrder, double total, double varianceIfExact) {}

    /** What one scramble says of the variance and of every group. */
    private record Scramble(double variance, List<Effect> effects) {}

    private Scramble scramble(SobolPoints points) {
        double[][][] a = columns(points, 0);
        double[][][] b = columns(points, dimensions);
        double[] ofA = evaluate(a);
        double[] ofB = evaluate(b);
        double[] both = Arrays.copyOf(ofA, 2 * POINTS);
        System.arraycopy(ofB, 0, both, POINTS, POINTS);
        double mean = mean(both);
        List<Effect> effects = new ArrayList<>();
        for (Group group : groups) {
            double[] mixed = evaluate(replaced(a, group, b));
            double product = 0;
            double square = 0;
            for (int i = 0; i < POINTS; i++) {
                double change = mixed[i] - ofA[i];
                // about the mean: the same expectation, less noise
                product += (ofB[i] - mean) * change;
                square += change * change;
            }
            double varianceIfExact = variance(evaluate(replaced(a, group, medians)));
            effects.add(new Effect(product / POINTS, square / (2.0 * POINTS), varianceIfExact));
        }
        return new Scramble(variance(both), effects);
    }

    private Optional<Budget> budget(List<Scramble> scrambles) {
        double[] variances = scrambles.stream().mapToDouble(Scramble::variance).toArray();
        if (!(mean(variances) > 0)) {
            return Optional.empty();
        }
        List<Share> shares = new ArrayList<>();
        for (int g = 0; g < groups.size(); g++) {
            int group = g;
            List<Effect> effects =
                    scrambles.stream().map(s -> s.effects().get(group)).toList();
            shares.add(share(groups.get(g).name(), effects, variances));
        }
        return Optional.of(new Budget(Math.sqrt(mean(variances)), shares));
    }

    private static Share share(String group, List<Effect> effects, double[] variances) {
        double[] firstOrder = effects.stream().mapToDouble(Effect::firstOrder).toArray();
        double[] total = effects.stream().mapToDouble(Effect::total).toArray();
        double[] ifExact = effects.stream().mapToDouble(Effect::varianceIfExact).toArray();
        return new Share(
                group,
                mean(firstOrder) / mean(variances),
                errorOfRatio(firstOrder, variances),
                mean(total) / mean(variances),
                errorOfRatio(total, variances),
                Math.sqrt(mean(ifExact)));
    }

    /** Standard error, to first order, of the ratio of two averages over scrambles, whose errors go together. */
    private static double errorOfRatio(double[] parts, double[] wholes) {
        double ratio = mean(parts) / mean(wholes);
        double[] residuals = new double[parts.length];
        for (int i = 0; i < parts.length; i++) {
            residuals[i] = (parts[i] - ratio * wholes[i]) / mean(wholes);
        }
        return MonteCarloError.ofAverage(residuals);
    }

    private double[][][] columns(SobolPoints points, int first) {
        double[][][] columns = new double[dimensions][][];
        for (int d = 0; d < dimensions; d++) {
            double[] probabilities = new double[POINTS];
            points.column(first + d, probabilities);
            columns[d] = function.prepare(d, probabilities);
        }
        return columns;
    }

    private double[][][] medians() {
        double[] column = new double[POINTS];
        Arrays.fill(column, 0.5);
        double[][][] columns = new double[dimensions][][];
        for (int d = 0; d < dimensions; d++) {
            columns[d] = function.prepare(d, column);
        }
        return columns;
    }

    private static double[][][] replaced(double[][][] columns, Group group, double[][][] by) {
        double[][][] mixed = columns.clone();
        for (int dimension : group.dimensions()) {
            mixed[dimension] = by[dimension];
        }
        return mixed;
    }

    private double[] evaluate(double[][][] prepared) {
        double[] out = new double[POINTS];
        function.evaluate(prepared, out);
        return out;
    }

    private static double mean(double[] values) {
        double sum = 0;
        for (double value : values) {
            sum += value;
        }
        return sum / values.length;
    }

    private static double variance(double[] values) {
        double mean = mean(values);
        double sum = 0;
        for (double value : values) {
            sum += (value - mean) * (value - mean);
        }
        return sum / values.length;
    }
}
