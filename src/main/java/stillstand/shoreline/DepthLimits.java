package stillstand.shoreline;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.function.DoubleUnaryOperator;
import stillstand.uncertainty.StandardNormal;
import stillstand.uncertainty.Tabulated;

/**
 * The depths of a taxon as they are published: a central value and limits. The distribution built from them honours each
 * as a quantile: 2.5 % of the corals grow above the shallow limit, half above the central value, 97.5 % above the deep one.
 * No shape is published between them, so the following is Stillstand's own choice:
 *
 * <ul>
 *   <li>between two limits below the surface the logarithm of depth runs straight with the normal score, so each side of the
 *       median is half of a log-normal distribution of its own width; above the shallow limit the same law goes on to 0;
 *   <li>limits of 0 m are a spike at the surface that holds just the probability they ask for (2.5 % where only the shallow
 *       limit is 0, half where the central value is, 84 % where the deep limit of the central 68 % is), and from there down to
 *       the next limit the chance of a greater depth falls exponentially;
 *   <li>below the deep limit the last law goes on, cut at twice that limit.
 * </ul>
 *
 * Never a normal distribution: its lower half would hold corals that grew in the air.
 *
 * @param upper95Metres shallow limit of the central 95 %, down positive, 0 or more
 * @param centralMetres median, at or below the shallow limit
 * @param lower68Metres deep limit of the central 68 %, where one is published
 * @param lower95Metres deep limit of the central 95 %
 */
public record DepthLimits(
        double upper95Metres, double centralMetres, Optional<Double> lower68Metres, double lower95Metres) {
    private static final double SHALLOW = 0.025;
    private static final double HALF = 0.5;
    private static final double DEEP_68 = 0.84;
    private static final double DEEP_95 = 0.975;
    /** Where the tail ends, in deep limits. */
    private static final double TAIL_END = 2;

    private static final int STEPS_PER_PIECE = 48;

    /**
     * @throws IllegalArgumentException if a limit is negative or not finite, if they do not deepen in order (they may be
     *     equal at 0), or the deep limit is 0
     */
    public DepthLimits {
        double last = 0;
        for (Anchor anchor : anchors(upper95Metres, centralMetres, lower68Metres, lower95Metres)) {
            double depth = anchor.depthMetres();
            if (!(depth < Double.POSITIVE_INFINITY && (depth > last || (depth == 0 && last == 0)))) {
                throw new IllegalArgumentException(
                        "limits of depth must deepen in order, from 0, but are " + upper95Metres + ", " + centralMetres
                                + ", " + lower68Metres.map(String::valueOf).orElse("-") + ", " + lower95Metres);
            }
            last = depth;
        }
        if (!(lower95Metres > 0)) {
            throw new IllegalArgumentException("lower95Metres must be above 0 but is " + lower95Metres);
        }
    }

    /** The distribution of depth below mean sea level, metres, down positive. */
    public Tabulated depthMetres() {
        List<Anchor> anchors = anchors(upper95Metres, centralMetres, lower68Metres, lower95Metres);
        List<Anchor> deeper =
                anchors.stream().filter(anchor -> anchor.depthMetres() > 0).toList();
        int atSurface = anchors.size() - deeper.size();
        Anchor surface = atSurface == 0 ? new Anchor(0, 0) : anchors.get(atSurface - 1);
        Anchor first = deeper.get(0);
        // without a limit at the surface there are at least three below it
        DoubleUnaryOperator density = atSurface == 0 ? logNormal(first, deeper.get(1)) : thinning(surface, first);
        List<Tabulated.Point> points = new ArrayList<>(piece(density, surface, first));
        for (int i = 1; i < deeper.size(); i++) {
            density = logNormal(deeper.get(i - 1), deeper.get(i));
            points.addAll(piece(density, deeper.get(i - 1), deeper.get(i)));
        }
        points.addAll(piece(density, new Anchor(DEEP_95, lower95Metres), new Anchor(1, TAIL_END * lower95Metres)));
        return new Tabulated(
                points, atSurface == 0 ? List.of() : List.of(new Tabulated.Spike(0, surface.probability())));
    }

    private static List<Anchor> anchors(double upper95, double central, Optional<Double> lower68, double lower95) {
        List<Anchor> anchors = new ArrayList<>();
        anchors.add(new Anchor(SHALLOW, upper95));
        anchors.add(new Anchor(HALF, central));
        lower68.ifPresent(depth -> anchors.add(new Anchor(DEEP_68, depth)));
        anchors.add(new Anchor(DEEP_95, lower95));
        return anchors;
    }

    /** A depth and the probability of a lesser one. */
    private record Anchor(double probability, double depthMetres) {}

    /** Shape of the log-normal density through two depths below the surface. */
    private static DoubleUnaryOperator logNormal(Anchor a, Anchor b) {
        double score = StandardNormal.quantile(a.probability());
        double perLog =
                (StandardNormal.quantile(b.probability()) - score) / Math.log(b.depthMetres() / a.depthMetres());
        return depth ->
                depth > 0 ? StandardNormal.density(score + perLog * Math.log(depth / a.depthMetres())) / depth : 0;
    }

    /** Shape of the exponential density below a surface that holds a probability of its own, through one depth below it. */
    private static DoubleUnaryOperator thinning(Anchor surface, Anchor a) {
        double perMetre = Math.log((1 - surface.probability()) / (1 - a.probability())) / a.depthMetres();
        return depth -> Math.exp(-perMetre * depth);
    }

    /** Points of a density from one anchor to the next, scaled to hold just the probability between them. */
    private static List<Tabulated.Point> piece(DoubleUnaryOperator density, Anchor from, Anchor to) {
        List<Tabulated.Point> shape = new ArrayList<>();
        double area = 0;
        for (int i = 0; i <= STEPS_PER_PIECE; i++) {
            double share = (double) i / STEPS_PER_PIECE;
            double depth = from.depthMetres() * (1 - share) + to.depthMetres() * share;
            Tabulated.Point point = new Tabulated.Point(depth, density.applyAsDouble(depth));
            if (i > 0) {
                Tabulated.Point last = shape.get(i - 1);
                area += (depth - last.value()) * (last.density() + point.density()) / 2;
            }
            shape.add(point);
        }
        double scale = (to.probability() - from.probability()) / area;
        return shape.stream()
                .map(point -> new Tabulated.Point(point.value(), point.density() * scale))
                .toList();
    }
}
