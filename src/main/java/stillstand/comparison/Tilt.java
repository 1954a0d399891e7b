package stillstand.comparison;

import java.util.Optional;

/**
 * A straight change of rate along a coast, or of height along a terrace, by generalised least squares.
 *
 * @param sharedErrors the answer: what the values share is shared
 * @param independent the wrong answer, for comparison: the same total errors taken for independent
 */
public record Tilt(Line sharedErrors, Line independent) {
    /**
     * A fitted line.
     *
     * @param atOrigin value at distance 0
     * @param slope change per km
     * @param covariance of the two
     * @param chiSquared weighted sum of squares left over
     * @param degrees of freedom
     * @param p probability of as large a {@code chiSquared} by chance; absent without degrees of freedom
     */
    public record Line(
            Estimate atOrigin, Estimate slope, double covariance, double chiSquared, int degrees, Optional<Double> p) {
        static Line of(LinearFit fit, String unit) {
            return new Line(
                    new Estimate(fit.coefficient(0), fit.sd(0), unit),
                    new Estimate(fit.coefficient(1), fit.sd(1), unit + " per km"),
                    fit.covariance(0, 1),
                    fit.chiSquared(),
                    fit.degrees(),
                    fit.p());
        }
    }

    /**
     * Fits.
     *
     * @param distancesKm along the coast
     * @param values at those distances
     * @param errors covariance of their errors
     * @param unit of the values
     * @return the tilt; absent where there are fewer than three values or all lie at one distance
     */
    public static Optional<Tilt> of(double[] distancesKm, double[] values, double[][] errors, String unit) {
        if (values.length < 3) {
            return Optional.empty();
        }
        double[][] design = new double[values.length][];
        for (int i = 0; i < values.length; i++) {
            design[i] = new double[] {1, distancesKm[i]};
        }
        return LinearFit.of(design, values, errors)
                .flatMap(shared -> LinearFit.of(design, values, Covariance.independent(errors))
                        .map(independent -> new Tilt(Line.of(shared, unit), Line.of(independent, unit))));
    }
}
