package stillstand.uplift;

import java.util.List;
import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.apache.commons.math3.linear.ArrayRealVector;
import org.apache.commons.math3.linear.CholeskyDecomposition;
import org.apache.commons.math3.linear.RealMatrix;
import org.apache.commons.math3.linear.RealVector;

/**
 * One rate for several corals that grew at different times on one coast, with what their readings of the curve share.
 *
 * <p>With residuals {@code r_k = z_k - e(t_k) - U t_k} of heights {@code z} of the former sea (depth of growth in them) the
 * likelihood of the rate is normal with covariance
 * {@code diag(sigma_z^2 + (U + e'_k)^2 sigma_t^2) + sigma_shared^2 + e'_k e'_l sigma_C^2
 * + sigma_k sigma_l exp(-|t_k - t_l| / correlation time)}, where {@code sigma_C} is the error of the curve's ages.
 * Its determinant depends on the rate and is kept. Depths enter by their moments: a skewed depth is answered by each coral's
 * own rate.
 */
public final class CoralsTogether {
    private static final int NODES = 2001;
    private static final double REACH_IN_SIGMAS = 12;

    private CoralsTogether() {}

    /**
     * One coral, by moments.
     *
     * @param heightMetres of the sea over it, above present mean sea level
     * @param heightSigmaMetres its standard deviation, above 0
     * @param ageKa its age, above 0
     * @param ageSigmaKa its standard deviation, 0 or more
     * @param seaLevelMetres of the curve at its age
     * @param slopeMetresPerKa of the curve there, per ka of age
     * @param seaSigmaMetres of the curve's own error there, 0 or more
     */
    public record Coral(
            double heightMetres,
            double heightSigmaMetres,
            double ageKa,
            double ageSigmaKa,
            double seaLevelMetres,
            double slopeMetresPerKa,
            double seaSigmaMetres) {
        public Coral {
            if (!(heightSigmaMetres > 0)) {
                throw new IllegalArgumentException("heightSigmaMetres must be above 0 but is " + heightSigmaMetres);
            }
            if (!(ageKa > 0)) {
                throw new IllegalArgumentException("ageKa must be above 0 but is " + ageKa);
            }
        }
    }

    /**
     * Posterior of the common rate.
     *
     * @param corals two or more
     * @param sharedSigmaMetres of what all readings share (offset of sea level, datum of the site), 0 or more
     * @param curveAgeSigmaKa of the error of the curve's ages, shared too, 0 or more
     * @param correlationTimeKa of the curve's own error, above 0
     * @param prior of the rate
     * @throws IllegalArgumentException if there are fewer than two corals
     */
    public static RatePosterior rate(
            List<Coral> corals,
            double sharedSigmaMetres,
            double curveAgeSigmaKa,
            double correlationTimeKa,
            RatePrior prior) {
        if (corals.size() < 2) {
            throw new IllegalArgumentException("corals must be two or more but are " + corals.size());
        }
        double[] reach = reach(corals, sharedSigmaMetres, curveAgeSigmaKa, prior);
        double[] rates = new double[NODES];
        double[] logLikelihoods = new double[NODES];
        for (int i = 0; i < NODES; i++) {
            rates[i] = reach[0] + i * (reach[1] - reach[0]) / (NODES - 1);
            logLikelihoods[i] = logLikelihood(corals, sharedSigmaMetres, curveAgeSigmaKa, correlationTimeKa, rates[i]);
        }
        return RatePosterior.of(rates, logLikelihoods, prior);
    }

    /** Rates worth looking at: around those of the single corals, within the prior. */
    private static double[] reach(
            List<Coral> corals, double sharedSigmaMetres, double curveAgeSigmaKa, RatePrior prior) {
        double low = Double.POSITIVE_INFINITY;
        double high = Double.NEGATIVE_INFINITY;
        for (Coral coral : corals) {
            double rate = (coral.heightMetres() - coral.seaLevelMetres()) / coral.ageKa();
            double ofAge = (rate + coral.slopeMetresPerKa()) * coral.ageSigmaKa();
            double sigma = Math.hypot(
                            Math.hypot(coral.heightSigmaMetres(), coral.seaSigmaMetres()),
                            Math.hypot(
                                    Math.hypot(sharedSigmaMetres, coral.slopeMetresPerKa() * curveAgeSigmaKa), ofAge))
                    / coral.ageKa();
            low = Math.min(low, rate - REACH_IN_SIGMAS * sigma);
            high = Math.max(high, rate + REACH_IN_SIGMAS * sigma);
        }
        double from = Math.max(low, prior.fromMetresPerKyr());
        double to = Math.min(high, prior.toMetresPerKyr());
        return from < to ? new double[] {from, to} : new double[] {prior.fromMetresPerKyr(), prior.toMetresPerKyr()};
    }

    private static double logLikelihood(
            List<Coral> corals,
            double sharedSigmaMetres,
            double curveAgeSigmaKa,
            double correlationTimeKa,
            double rateMetresPerKyr) {
        int n = corals.size();
        RealMatrix covariance = new Array2DRowRealMatrix(n, n);
        RealVector residuals = new ArrayRealVector(n);
        for (int k = 0; k < n; k++) {
            Coral one = corals.get(k);
            residuals.setEntry(k, one.heightMetres() - one.seaLevelMetres() - rateMetresPerKyr * one.ageKa());
            for (int l = 0; l < n; l++) {
                Coral other = corals.get(l);
                double apartKa = Math.abs(one.ageKa() - other.ageKa());
                covariance.setEntry(
                        k,
                        l,
                        sharedSigmaMetres * sharedSigmaMetres
                                + one.slopeMetresPerKa() * other.slopeMetresPerKa() * curveAgeSigmaKa * curveAgeSigmaKa
                                + one.seaSigmaMetres()
                                        * other.seaSigmaMetres()
                                        * Math.exp(-apartKa / correlationTimeKa));
            }
            double ofAge = (rateMetresPerKyr + one.slopeMetresPerKa()) * one.ageSigmaKa();
            covariance.addToEntry(k, k, one.heightSigmaMetres() * one.heightSigmaMetres() + ofAge * ofAge);
        }
        CholeskyDecomposition cholesky = new CholeskyDecomposition(covariance);
        double squares = residuals.dotProduct(cholesky.getSolver().solve(residuals));
        return -0.5 * (Math.log(cholesky.getDeterminant()) + squares);
    }
}
