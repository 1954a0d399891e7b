package stillstand.comparison;

import java.util.Optional;
import stillstand.shoreline.Position;

/**
 * A plane through rates at places, or through heights of a terrace, by generalised least squares. Places are laid on the plane that
 * touches the earth at their centre (a sphere of radius {@value #EARTH_RADIUS_KM} km).
 *
 * @param centreLatitude degrees
 * @param centreLongitude degrees, -180 to 180
 * @param sharedErrors the answer: what the values share is shared
 * @param independent the wrong answer, for comparison
 */
public record PlanarTilt(double centreLatitude, double centreLongitude, Plane sharedErrors, Plane independent) {
    /** Mean radius of the earth, km (IUGG). */
    static final double EARTH_RADIUS_KM = 6371.0088;

    /**
     * A fitted plane.
     *
     * @param atCentre value at the centre
     * @param east change per km to the east
     * @param north change per km to the north
     * @param steepest change per km where it rises most; its standard deviation is to first order
     * @param steepestToDegrees direction in which it rises most, degrees from north through east
     * @param chiSquared weighted sum of squares left over
     * @param degrees of freedom
     * @param p probability of as large a {@code chiSquared} by chance; absent without degrees of freedom
     */
    public record Plane(
            Estimate atCentre,
            Estimate east,
            Estimate north,
            Estimate steepest,
            double steepestToDegrees,
            double chiSquared,
            int degrees,
            Optional<Double> p) {
        static Plane of(LinearFit fit, String unit) {
            String slope = unit + " per km";
            double east = fit.coefficient(1);
            double north = fit.coefficient(2);
            double steepest = Math.hypot(east, north);
            double variance = steepest > 0
                    ? (east * east * fit.covariance(1, 1)
                                    + 2 * east * north * fit.covariance(1, 2)
                                    + north * north * fit.covariance(2, 2))
                            / (steepest * steepest)
                    : Math.max(fit.covariance(1, 1), fit.covariance(2, 2));
            double to = Math.toDegrees(Math.atan2(east, north));
            return new Plane(
                    new Estimate(fit.coefficient(0), fit.sd(0), unit),
                    new Estimate(east, fit.sd(1), slope),
                    new Estimate(north, fit.sd(2), slope),
                    new Estimate(steepest, Math.sqrt(variance), slope),
                    to < 0 ? to + 360 : to,
                    fit.chiSquared(),
                    fit.degrees(),
                    fit.p());
        }
    }

    /**
     * Fits.
     *
     * @param places of the values
     * @param values there
     * @param errors covariance of their errors
     * @param unit of the values
     * @return the plane; absent where there are fewer than three places or they lie on one line
     */
    public static Optional<PlanarTilt> of(Position[] places, double[] values, double[][] errors, String unit) {
        if (values.length < 3) {
            return Optional.empty();
        }
        double latitude = 0;
        double eastward = 0;
        for (Position place : places) {
            latitude += place.latitudeDegrees() / places.length;
            eastward += wrapped(place.longitudeDegrees() - places[0].longitudeDegrees()) / places.length;
        }
        double longitude = wrapped(places[0].longitudeDegrees() + eastward);
        double kmPerDegree = Math.toRadians(EARTH_RADIUS_KM);
        double[][] design = new double[places.length][];
        for (int i = 0; i < places.length; i++) {
            double east = wrapped(places[i].longitudeDegrees() - longitude)
                    * kmPerDegree
                    * Math.cos(Math.toRadians(latitude));
            double north = (places[i].latitudeDegrees() - latitude) * kmPerDegree;
            design[i] = new double[] {1, east, north};
        }
        double centreLatitude = latitude;
        return LinearFit.of(design, values, errors)
                .flatMap(shared -> LinearFit.of(design, values, Covariance.independent(errors))
                        .map(independent -> new PlanarTilt(
                                centreLatitude, longitude, Plane.of(shared, unit), Plane.of(independent, unit))));
    }

    /** An angle from -180 to below 180 degrees. */
    private static double wrapped(double degrees) {
        double turned = (degrees + 180) % 360;
        return (turned < 0 ? turned + 360 : turned) - 180;
    }
}
