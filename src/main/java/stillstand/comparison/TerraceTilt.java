package stillstand.comparison;

import java.util.List;
import java.util.Optional;
import stillstand.shoreline.Position;
import stillstand.uplift.Quantity;

/**
 * The tilt of one terrace, from many points measured on it. Their own survey errors are independent; the datum and what the terrace
 * means for sea level are the same for all of its points and move it as a whole.
 *
 * @param site name of the site
 * @param level the terrace
 * @param points how many points
 * @param along tilt along the coast, heights in m; absent where the points have no distances
 * @param plane tilt of the plane through the points; absent where they have no places
 * @param rate change of uplift rate per km: the slope (along the coast, else the steepest) over the age; absent without an age
 */
public record TerraceTilt(
        String site,
        String level,
        int points,
        Optional<Tilt> along,
        Optional<PlanarTilt> plane,
        Optional<Estimate> rate) {
    private static final String METRES = "m";

    /**
     * A point of a terrace.
     *
     * @param heightMetres as measured, in the datum of the survey
     * @param sigmaMetres of its own survey, above 0
     * @param distanceKm along the coast
     * @param position where it lies
     */
    public record Point(
            double heightMetres, double sigmaMetres, Optional<Double> distanceKm, Optional<Position> position) {
        public Point {
            if (!(sigmaMetres > 0 && sigmaMetres < Double.POSITIVE_INFINITY)) {
                throw new IllegalArgumentException("sigmaMetres must be above 0 but is " + sigmaMetres);
            }
        }
    }

    /**
     * Fits.
     *
     * @param points three or more; all with distances, or all with places
     * @param sharedSigmaMetres standard deviation of what all points share
     * @param ageKa of the terrace
     * @return the tilt; absent where neither a line nor a plane can be told from the points
     */
    public static Optional<TerraceTilt> of(
            String site, String level, List<Point> points, double sharedSigmaMetres, Optional<Quantity> ageKa) {
        double[] heights = points.stream().mapToDouble(Point::heightMetres).toArray();
        double[] own = points.stream().mapToDouble(Point::sigmaMetres).toArray();
        double[][] errors = Covariance.withOneShared(own, sharedSigmaMetres);
        Optional<Tilt> along =
                points.stream().allMatch(point -> point.distanceKm().isPresent())
                        ? Tilt.of(
                                points.stream()
                                        .mapToDouble(point -> point.distanceKm().orElseThrow())
                                        .toArray(),
                                heights,
                                errors,
                                METRES)
                        : Optional.empty();
        Optional<PlanarTilt> plane =
                points.stream().allMatch(point -> point.position().isPresent())
                        ? PlanarTilt.of(
                                points.stream()
                                        .map(point -> point.position().orElseThrow())
                                        .toArray(Position[]::new),
                                heights,
                                errors,
                                METRES)
                        : Optional.empty();
        Optional<Estimate> slope = along.map(tilt -> tilt.sharedErrors().slope())
                .or(() -> plane.map(tilt -> tilt.sharedErrors().steepest()));
        return slope.map(found ->
                new TerraceTilt(site, level, points.size(), along, plane, ageKa.flatMap(age -> overAge(found, age))));
    }

    /** To first order; absent where the age has no mean. */
    private static Optional<Estimate> overAge(Estimate slope, Quantity ageKa) {
        if (ageKa.mean().isEmpty() || ageKa.sd().isEmpty() || !(ageKa.mean().get() > 0)) {
            return Optional.empty();
        }
        double age = ageKa.mean().get();
        double rate = slope.value() / age;
        return Optional.of(
                new Estimate(rate, Math.hypot(slope.sd(), rate * ageKa.sd().get()) / age, "m/kyr per km"));
    }
}
