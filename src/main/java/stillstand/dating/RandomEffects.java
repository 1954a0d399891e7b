package stillstand.dating;

import java.util.ArrayList;
import java.util.List;
import java.util.function.ToDoubleFunction;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.StandardNormal;
import stillstand.uncertainty.Uncertain;

/**
 * The common age t of dates {@code a_k ~ N(t, sigma_k^2 + omega^2)} whose scatter omega is not known: t flat, omega half-normal,
 * integrated out on a grid. Given omega, t is normal, so its posterior is a mixture of normal distributions.
 *
 * @param scatters grid of the scatter, by increasing value; their probabilities sum to 1
 */
public record RandomEffects(List<Scatter> scatters) {
    /** Scale of the prior of the scatter where nothing else is said, ka. */
    public static final double DEFAULT_SCALE_KA = 5;

    private static final int STEPS = 2000;
    /** End of the grid, in scales of the prior, whose density there is 1e-31 of its greatest. */
    private static final double LARGEST_IN_SCALES = 12;

    /**
     * One value of the scatter.
     *
     * @param omegaKa one standard deviation of the true ages about their mean, 0 or more
     * @param probability posterior
     * @param meanAgeKa the common age, given this scatter
     */
    public record Scatter(double omegaKa, double probability, Normal meanAgeKa) {}

    /** @throws IllegalArgumentException if probabilities do not sum to 1 */
    public RandomEffects {
        scatters = List.copyOf(scatters);
        double sum = scatters.stream().mapToDouble(Scatter::probability).sum();
        if (!(Math.abs(sum - 1) < 1e-9)) {
            throw new IllegalArgumentException("probabilities must sum to 1 but sum to " + sum);
        }
    }

    static RandomEffects of(Replicates replicates, double scaleKa) {
        Uncertain.requirePositive("scatterScaleKa", scaleKa);
        // evenly in asinh(omega / least sigma): as fine as the narrowest date near 0, coarser beyond
        double least =
                replicates.agesKa().stream().mapToDouble(Normal::sigma).min().orElseThrow();
        double end = LARGEST_IN_SCALES * scaleKa / least;
        double asinhEnd = Math.log(end + Math.hypot(end, 1));
        double[] omegas = new double[STEPS + 1];
        double[] logWeights = new double[STEPS + 1];
        double greatest = Double.NEGATIVE_INFINITY;
        for (int i = 0; i <= STEPS; i++) {
            double x = asinhEnd * i / STEPS;
            omegas[i] = least * Math.sinh(x);
            double trapezoid = i == 0 || i == STEPS ? 0.5 : 1;
            logWeights[i] = Math.log(trapezoid * Math.cosh(x)) + logPosterior(replicates, omegas[i], scaleKa);
            greatest = Math.max(greatest, logWeights[i]);
        }
        double sum = 0;
        for (double logWeight : logWeights) {
            sum += Math.exp(logWeight - greatest);
        }
        List<Scatter> scatters = new ArrayList<>();
        for (int i = 0; i <= STEPS; i++) {
            double probability = Math.exp(logWeights[i] - greatest) / sum;
            scatters.add(new Scatter(omegas[i], probability, replicates.weightedMeanKa(omegas[i])));
        }
        return new RandomEffects(scatters);
    }

    /** Logarithm of prior times the likelihood of the scatter, the common age integrated out. */
    private static double logPosterior(Replicates replicates, double omegaKa, double scaleKa) {
        double sum = -0.5 * omegaKa * omegaKa / (scaleKa * scaleKa);
        for (Normal age : replicates.agesKa()) {
            sum -= 0.5 * Math.log(age.sigma() * age.sigma() + omegaKa * omegaKa);
        }
        return sum + Math.log(replicates.weightedMeanKa(omegaKa).sigma()) - 0.5 * replicates.chiSquare(omegaKa);
    }

    /** Mean of the common age, ka. */
    public double meanKa() {
        return expected(scatter -> scatter.meanAgeKa().mean());
    }

    /** Standard deviation of the common age, ka. */
    public double sigmaKa() {
        double mean = meanKa();
        return Math.sqrt(expected(scatter -> {
            double offset = scatter.meanAgeKa().mean() - mean;
            return scatter.meanAgeKa().sigma() * scatter.meanAgeKa().sigma() + offset * offset;
        }));
    }

    /** Probability that the common age is at most {@code ageKa}. */
    public double cumulativeProbability(double ageKa) {
        return expected(scatter -> scatter.meanAgeKa().cumulativeProbability(ageKa));
    }

    /** Probability density of the common age, per ka. */
    public double density(double ageKa) {
        return expected(scatter -> scatter.meanAgeKa().density(ageKa));
    }

    /** The common age, ka, below which it lies with the given probability, strictly between 0 and 1. */
    public double quantileKa(double probability) {
        Uncertain.requireProbability(probability);
        double reach = StandardNormal.quantile(probability);
        double low = Double.POSITIVE_INFINITY;
        double high = Double.NEGATIVE_INFINITY;
        for (Scatter scatter : scatters) {
            double quantile =
                    scatter.meanAgeKa().mean() + reach * scatter.meanAgeKa().sigma();
            low = Math.min(low, quantile);
            high = Math.max(high, quantile);
        }
        for (int i = 0; i < 60; i++) {
            double middle = (low + high) / 2;
            if (cumulativeProbability(middle) < probability) {
                low = middle;
            } else {
                high = middle;
            }
        }
        return (low + high) / 2;
    }

    /** Mean of the scatter, ka. */
    public double meanScatterKa() {
        return expected(Scatter::omegaKa);
    }

    private double expected(ToDoubleFunction<Scatter> value) {
        double sum = 0;
        for (Scatter scatter : scatters) {
            sum += scatter.probability() * value.applyAsDouble(scatter);
        }
        return sum;
    }
}
