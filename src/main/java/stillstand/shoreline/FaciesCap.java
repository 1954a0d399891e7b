package stillstand.shoreline;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import stillstand.uncertainty.Exact;
import stillstand.uncertainty.Tabulated;
import stillstand.uncertainty.Uncertain;
import stillstand.uncertainty.Uniform;

/** What is left of a depth of growth when the facies round the coral says that the water was no deeper than so much. */
public final class FaciesCap {
    /** Where a cap leaves less than this of the habitat, cap and habitat contradict each other. */
    private static final double LEAST_KEPT = 1e-4;

    private static final int STEPS = 200;

    private FaciesCap() {}

    /**
     * The depth, given that it is at most {@code depthMaxMetres}: cut there and scaled up to hold all probability again.
     * Absent where the cap leaves less than one part in ten thousand, since then the two contradict each other.
     *
     * @param depthMetres depth of growth, down positive
     * @param depthMaxMetres deepest water of the facies, down positive, above 0
     * @throws IllegalArgumentException if {@code depthMaxMetres} is not a finite number above 0
     */
    public static Optional<Uncertain> apply(Uncertain depthMetres, double depthMaxMetres) {
        Uncertain.requirePositive("depthMaxMetres", depthMaxMetres);
        double kept = depthMetres.cumulativeProbability(depthMaxMetres);
        if (!(kept >= LEAST_KEPT)) {
            return Optional.empty();
        }
        if (depthMetres instanceof Exact) {
            return Optional.of(depthMetres);
        }
        if (depthMetres instanceof Uniform uniform) {
            return Optional.of(new Uniform(uniform.low(), Math.min(uniform.high(), depthMaxMetres)));
        }
        if (depthMetres instanceof Tabulated tabulated) {
            return Optional.of(cut(tabulated, depthMaxMetres, kept));
        }
        return Optional.of(tabulate(depthMetres, depthMaxMetres, kept));
    }

    private static Uncertain cut(Tabulated depth, double deepest, double kept) {
        if (!(deepest < depth.points().get(depth.points().size() - 1).value())) {
            return depth;
        }
        List<Tabulated.Spike> spikes = depth.spikes().stream()
                .filter(spike -> spike.value() <= deepest)
                .map(spike -> new Tabulated.Spike(spike.value(), spike.probability() / kept))
                .toList();
        List<Tabulated.Point> points = new ArrayList<>(
                depth.points().stream().filter(point -> point.value() < deepest).toList());
        points.add(new Tabulated.Point(deepest, Math.max(0, depth.density(Math.nextDown(deepest)))));
        return new Tabulated(points, spikes);
    }

    /** Between quantiles, so that the points lie where the probability lies. */
    private static Uncertain tabulate(Uncertain depth, double deepest, double kept) {
        List<Tabulated.Point> points = new ArrayList<>();
        for (int i = 0; i < STEPS; i++) {
            // crowded at both ends, where a tail is thin
            double share = (1 - Math.cos(Math.PI * (i + 0.5) / STEPS)) / 2;
            double value = depth.quantile(share * kept);
            points.add(new Tabulated.Point(value, depth.density(value)));
        }
        points.add(new Tabulated.Point(deepest, depth.density(deepest)));
        return Tabulated.of(points);
    }
}
