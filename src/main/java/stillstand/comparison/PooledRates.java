package stillstand.comparison;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.apache.commons.math3.linear.EigenDecomposition;
import org.apache.commons.math3.linear.RealMatrix;
import stillstand.uncertainty.Interval;
import stillstand.uplift.Quantity;
import stillstand.uplift.Rate;

/**
 * Partial pooling of the rates of a coast or island group: {@code U_s = mu + delta_s}, delta normal of standard deviation omega, omega
 * half-normal, mu flat; the estimates' errors are normal with the covariance that the joint draws give, so that what sites share is not
 * mistaken for agreement. Omega is summed over on a grid, the rest in closed form.
 *
 * @param mean mu, the mean of the population the sites come from, m/kyr
 * @param spread omega, how far sites truly differ, m/kyr
 * @param spreadScale scale of its half-normal prior, m/kyr (Gelman 2006, Bayesian Analysis 1, 515-534, on why no inverse gamma)
 * @param sites their rates, each drawn toward the mean as far as it is uncertain
 */
public record PooledRates(Quantity mean, Quantity spread, double spreadScale, List<PooledSite> sites) {
    /** A site's rate after pooling, m/kyr. */
    public record PooledSite(String site, Quantity rate) {}

    private static final int NODES = 600;
    /** The grid of omega ends at this many scales of its prior. */
    private static final double REACH = 30;

    public PooledRates {
        sites = List.copyOf(sites);
    }

    /**
     * Pools.
     *
     * @param names of the sites, two or more
     * @param rates best estimates, m/kyr
     * @param errors covariance of their errors
     * @param spreadScale scale of the prior of omega, m/kyr, above 0
     * @throws IllegalArgumentException if there are fewer than two sites, the sizes disagree, or the scale is not above 0
     */
    public static PooledRates of(List<String> names, double[] rates, double[][] errors, double spreadScale) {
        if (!(names.size() >= 2 && rates.length == names.size() && errors.length == names.size())) {
            throw new IllegalArgumentException(
                    "sites to be pooled must be two or more, with as many rates and errors, but are " + names.size()
                            + ", " + rates.length + " and " + errors.length);
        }
        if (!(spreadScale > 0 && spreadScale < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("spreadScale must be above 0 but is " + spreadScale);
        }
        return new Pooling(names, rates, errors, spreadScale).pooled();
    }

    /** The sums over the grid of omega. */
    private static final class Pooling {
        private final List<String> names;
        private final double scale;
        private final int n;
        private final double[] variances;
        private final RealMatrix vectors;
        /** Rates and ones in the coordinates in which the errors are independent. */
        private final double[] turnedRates;

        private final double[] turnedOnes;
        private final double[] omegas = new double[NODES];
        private final double[] weights = new double[NODES];
        private final double[] muMeans = new double[NODES];
        private final double[] muSds = new double[NODES];

        Pooling(List<String> names, double[] rates, double[][] errors, double scale) {
            this.names = names;
            this.scale = scale;
            n = rates.length;
            EigenDecomposition eigen = new EigenDecomposition(new Array2DRowRealMatrix(errors));
            vectors = eigen.getV();
            variances = eigen.getRealEigenvalues();
            turnedRates = vectors.preMultiply(rates);
            double[] ones = new double[n];
            java.util.Arrays.fill(ones, 1);
            turnedOnes = vectors.preMultiply(ones);
        }

        PooledRates pooled() {
            weighOmegas();
            double[][] siteMeans = new double[n][NODES];
            double[][] siteSds = new double[n][NODES];
            for (int k = 0; k < NODES; k++) {
                sites(k, siteMeans, siteSds);
            }
            List<PooledSite> sites = new ArrayList<>();
            for (int s = 0; s < n; s++) {
                sites.add(new PooledSite(
                        names.get(s),
                        Quantity.of(new NormalMixture(weights, siteMeans[s], siteSds[s]).summary(), Rate.UNIT)));
            }
            Quantity mean = Quantity.of(new NormalMixture(weights, muMeans, muSds).summary(), Rate.UNIT);
            return new PooledRates(mean, spread(), scale, sites);
        }

        /** p(omega | y) at nodes that crowd at 0: omega = reach u^2, u even. */
        private void weighOmegas() {
            double highest = Double.NEGATIVE_INFINITY;
            double[] logs = new double[NODES];
            for (int k = 0; k < NODES; k++) {
                double u = (k + 0.5) / NODES;
                omegas[k] = REACH * scale * u * u;
                double logDeterminant = 0;
                double squares = 0;
                double cross = 0;
                double precision = 0;
                for (int i = 0; i < n; i++) {
                    double v = Math.max(0, variances[i]) + omegas[k] * omegas[k];
                    logDeterminant += Math.log(v);
                    squares += turnedRates[i] * turnedRates[i] / v;
                    cross += turnedRates[i] * turnedOnes[i] / v;
                    precision += turnedOnes[i] * turnedOnes[i] / v;
                }
                muMeans[k] = cross / precision;
                muSds[k] = 1 / Math.sqrt(precision);
                double z = omegas[k] / scale;
                logs[k] = -0.5 * (logDeterminant + Math.log(precision) + squares - cross * cross / precision)
                        - 0.5 * z * z
                        + Math.log(u);
                highest = Math.max(highest, logs[k]);
            }
            double sum = 0;
            for (int k = 0; k < NODES; k++) {
                weights[k] = Math.exp(logs[k] - highest);
                sum += weights[k];
            }
            for (int k = 0; k < NODES; k++) {
                weights[k] /= sum;
            }
        }

        /**
         * U given y and omega: mean {@code y - E (E + omega^2 I)^-1 (y - mu)}, with E the errors; variance that of a known mu, and what
         * mu's own uncertainty adds.
         */
        private void sites(int k, double[][] means, double[][] sds) {
            double w2 = omegas[k] * omegas[k];
            double[] turnedMean = new double[n];
            double[] turnedPull = new double[n];
            for (int i = 0; i < n; i++) {
                double v = Math.max(0, variances[i]);
                double kept = w2 / (v + w2);
                turnedMean[i] = kept * turnedRates[i] + (1 - kept) * muMeans[k] * turnedOnes[i];
                turnedPull[i] = (1 - kept) * turnedOnes[i];
            }
            double[] mean = vectors.operate(turnedMean);
            double[] pull = vectors.operate(turnedPull);
            for (int s = 0; s < n; s++) {
                double own = 0;
                for (int i = 0; i < n; i++) {
                    double v = Math.max(0, variances[i]);
                    double part = vectors.getEntry(s, i);
                    own += part * part * v * w2 / (v + w2);
                }
                means[s][k] = mean[s];
                sds[s][k] = Math.sqrt(own + pull[s] * pull[s] * muSds[k] * muSds[k]);
            }
        }

        private Quantity spread() {
            double mean = 0;
            double square = 0;
            for (int k = 0; k < NODES; k++) {
                mean += weights[k] * omegas[k];
                square += weights[k] * omegas[k] * omegas[k];
            }
            return new Quantity(
                    omega(0.5),
                    Optional.of(mean),
                    Optional.of(Math.sqrt(square - mean * mean)),
                    between(Interval.PROBABILITY_68),
                    between(Interval.PROBABILITY_95),
                    Rate.UNIT);
        }

        private Interval between(double probability) {
            return new Interval(omega((1 - probability) / 2), omega((1 + probability) / 2));
        }

        /** Quantile of omega: linear in u inside a node's share. */
        private double omega(double probability) {
            double sum = 0;
            int k = 0;
            while (k < NODES - 1 && sum + weights[k] < probability) {
                sum += weights[k++];
            }
            double u = (k + (probability - sum) / weights[k]) / NODES;
            return REACH * scale * u * u;
        }
    }
}
