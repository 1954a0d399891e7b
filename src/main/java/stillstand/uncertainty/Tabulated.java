package stillstand.uncertainty;

import java.util.ArrayList;
import java.util.List;

/**
 * A distribution given by a table: a density that is linear between tabulated points and 0 outside them, and beside it, if
 * asked for, single values that hold a probability of their own (a spike at the surface with a long tail below).
 *
 * <p>The densities may be given on any scale; they are scaled to leave one minus the probability of the spikes.
 *
 * @param points at least two, by increasing value; two points of one value make a step
 * @param spikes single values of their own probability, by increasing value; mostly none
 */
public record Tabulated(List<Point> points, List<Spike> spikes) implements Uncertain {

    /**
     * A point of the density.
     *
     * @param value finite
     * @param density relative density, 0 or more
     */
    public record Point(double value, double density) {
        /** @throws IllegalArgumentException if {@code value} is not finite or {@code density} not a finite number, 0 or more */
        public Point {
            Uncertain.requireFinite("value", value);
            if (!(density >= 0 && density < Double.POSITIVE_INFINITY)) {
                throw new IllegalArgumentException("density must be 0 or more but is " + density);
            }
        }
    }

    /**
     * A single value that holds a probability of its own.
     *
     * @param value finite
     * @param probability strictly between 0 and 1
     */
    public record Spike(double value, double probability) {
        /** @throws IllegalArgumentException if {@code value} is not finite or {@code probability} not between 0 and 1 */
        public Spike {
            Uncertain.requireFinite("value", value);
            Uncertain.requireProbability(probability);
        }
    }

    /**
     * @throws IllegalArgumentException if there are fewer than two points, values decrease (those of spikes: do not
     *     increase), the density is 0 everywhere, or the spikes leave no probability for it
     */
    public Tabulated {
        spikes = List.copyOf(spikes);
        double left = 1;
        for (int i = 0; i < spikes.size(); i++) {
            left -= spikes.get(i).probability();
            if (i > 0 && !(spikes.get(i - 1).value() < spikes.get(i).value())) {
                throw new IllegalArgumentException(
                        "values of spikes must increase but " + spikes.get(i).value() + " follows "
                                + spikes.get(i - 1).value());
            }
        }
        if (!(left > 0)) {
            throw new IllegalArgumentException("spikes must hold less than all probability but hold " + (1 - left));
        }
        points = scaled(List.copyOf(points), left);
    }

    /** A density linear between the given points, without spikes. */
    public static Tabulated of(List<Point> points) {
        return new Tabulated(points, List.of());
    }

    @Override
    public double quantile(double probability) {
        Uncertain.requireProbability(probability);
        return new TabulatedPieces(this).quantile(probability);
    }

    @Override
    public double cumulativeProbability(double value) {
        double below = 0;
        for (Spike spike : spikes) {
            below += spike.value() <= value ? spike.probability() : 0;
        }
        for (int i = 1; i < points.size() && points.get(i - 1).value() < value; i++) {
            Point from = points.get(i - 1);
            Point to = points.get(i);
            double end = Math.min(value, to.value());
            below += (end - from.value()) * (from.density() + between(from, to, end)) / 2;
        }
        return Math.min(1, below);
    }

    @Override
    public double density(double value) {
        if (spikes.stream().anyMatch(spike -> spike.value() == value)) {
            return Double.POSITIVE_INFINITY;
        }
        double density = 0;
        for (int i = 1; i < points.size() && points.get(i - 1).value() <= value; i++) {
            Point to = points.get(i);
            density = value <= to.value() ? between(points.get(i - 1), to, value) : 0;
        }
        return density;
    }

    @Override
    public double mean() {
        double sum = 0;
        for (Spike spike : spikes) {
            sum += spike.probability() * spike.value();
        }
        for (int i = 1; i < points.size(); i++) {
            Point from = points.get(i - 1);
            Point to = points.get(i);
            double width = to.value() - from.value();
            double mass = width * (from.density() + to.density()) / 2;
            sum += mass * from.value() + width * width * (from.density() + 2 * to.density()) / 6;
        }
        return sum;
    }

    @Override
    public double standardDeviation() {
        double mean = mean();
        double sum = 0;
        for (Spike spike : spikes) {
            sum += spike.probability() * (spike.value() - mean) * (spike.value() - mean);
        }
        for (int i = 1; i < points.size(); i++) {
            Point from = points.get(i - 1);
            Point to = points.get(i);
            double width = to.value() - from.value();
            double offset = from.value() - mean;
            double mass = width * (from.density() + to.density()) / 2;
            double first = width * width * (from.density() + 2 * to.density()) / 6;
            double second = width * width * width * (from.density() + 3 * to.density()) / 12;
            sum += offset * offset * mass + 2 * offset * first + second;
        }
        return Math.sqrt(sum);
    }

    @Override
    public void toQuantiles(double[] column) {
        TabulatedPieces pieces = new TabulatedPieces(this);
        for (int i = 0; i < column.length; i++) {
            column[i] = pieces.quantile(column[i]);
        }
    }

    @Override
    public Tabulated plus(double shift) {
        List<Point> moved = points.stream()
                .map(point -> new Point(point.value() + shift, point.density()))
                .toList();
        List<Spike> movedSpikes = spikes.stream()
                .map(spike -> new Spike(spike.value() + shift, spike.probability()))
                .toList();
        return new Tabulated(moved, movedSpikes);
    }

    static double between(Point from, Point to, double value) {
        if (value >= to.value()) {
            return to.density();
        }
        return from.density() + (to.density() - from.density()) * (value - from.value()) / (to.value() - from.value());
    }

    private static List<Point> scaled(List<Point> points, double probability) {
        if (points.size() < 2) {
            throw new IllegalArgumentException("points must be two or more but are " + points.size());
        }
        double area = 0;
        for (int i = 1; i < points.size(); i++) {
            double width = points.get(i).value() - points.get(i - 1).value();
            if (!(width >= 0)) {
                throw new IllegalArgumentException("values of points must not decrease but "
                        + points.get(i).value() + " follows "
                        + points.get(i - 1).value());
            }
            area += width * (points.get(i - 1).density() + points.get(i).density()) / 2;
        }
        if (!(area > 0)) {
            throw new IllegalArgumentException("points must have a density above 0 somewhere");
        }
        List<Point> scaled = new ArrayList<>();
        for (Point point : points) {
            scaled.add(new Point(point.value(), point.density() * probability / area));
        }
        return List.copyOf(scaled);
    }
}
