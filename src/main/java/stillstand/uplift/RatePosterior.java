package stillstand.uplift;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import stillstand.uncertainty.Interval;
import stillstand.uncertainty.Uncertain;

/**
 * What is held of a rate after the flight has been looked at: a density, linear between nodes. Rates in m/kyr, up positive.
 * Moments, quantiles and regions are exact for that density.
 */
public final class RatePosterior {
    private static final double LEAST_REGION = 0.01;

    private final double[] rates;
    private final double[] density;
    /** Probability up to each node. */
    private final double[] until;

    private final double logEvidence;

    private RatePosterior(double[] rates, double[] density, double[] until, double logEvidence) {
        this.rates = rates;
        this.density = density;
        this.until = until;
        this.logEvidence = logEvidence;
    }

    /**
     * The posterior of evaluated nodes.
     *
     * @param ratesMetresPerKyr nodes, increasing, two or more
     * @param logLikelihoods natural logarithm of the flight's evidence at each node; minus infinity where it is 0
     * @param prior the prior, proper
     * @throws IllegalArgumentException if there are fewer than two nodes, they do not increase, or all evidence is 0
     */
    public static RatePosterior of(double[] ratesMetresPerKyr, double[] logLikelihoods, RatePrior prior) {
        double[] rates = ratesMetresPerKyr.clone();
        double highest = Double.NEGATIVE_INFINITY;
        for (int k = 0; k < rates.length; k++) {
            if (!(k == 0 || rates[k] > rates[k - 1])) {
                throw new IllegalArgumentException("rates must increase but " + rates[k] + " follows " + rates[k - 1]);
            }
            highest = Math.max(highest, logLikelihoods[k]);
        }
        if (!(rates.length >= 2 && highest > Double.NEGATIVE_INFINITY)) {
            throw new IllegalArgumentException("no rate of " + rates.length + " can have left this flight");
        }
        double[] density = new double[rates.length];
        for (int k = 0; k < rates.length; k++) {
            density[k] = prior.density(rates[k]) * Math.exp(logLikelihoods[k] - highest);
        }
        return ofDensity(rates, density, highest);
    }

    /** The posterior of a density given up to a factor whose logarithm is {@code logFactor}. */
    static RatePosterior ofDensity(double[] rates, double[] relativeDensity, double logFactor) {
        double[] density = relativeDensity.clone();
        double[] until = new double[rates.length];
        for (int k = 1; k < rates.length; k++) {
            until[k] = until[k - 1] + (rates[k] - rates[k - 1]) * (density[k] + density[k - 1]) / 2;
        }
        double total = until[rates.length - 1];
        for (int k = 0; k < rates.length; k++) {
            density[k] /= total;
            until[k] /= total;
        }
        return new RatePosterior(rates.clone(), density, until, Math.log(total) + logFactor);
    }

    /** Natural logarithm of the integral of prior times evidence. */
    public double logEvidence() {
        return logEvidence;
    }

    /** The nodes, increasing, m/kyr. */
    public double[] ratesMetresPerKyr() {
        return rates.clone();
    }

    /** Share of the probability that each node stands for: the trapezoid rule's weights. Sums to 1. */
    public double[] nodeWeights() {
        double[] weights = new double[rates.length];
        for (int k = 0; k < rates.length; k++) {
            double left = k > 0 ? rates[k] - rates[k - 1] : 0;
            double right = k < rates.length - 1 ? rates[k + 1] - rates[k] : 0;
            weights[k] = density[k] * (left + right) / 2;
        }
        return weights;
    }

    /** Probability density, kyr/m. */
    public double density(double rateMetresPerKyr) {
        int k = interval(rateMetresPerKyr);
        if (k < 0) {
            return 0;
        }
        double part = (rateMetresPerKyr - rates[k]) / (rates[k + 1] - rates[k]);
        return density[k] + part * (density[k + 1] - density[k]);
    }

    /** Probability that the rate is at most {@code rateMetresPerKyr}. */
    public double cumulativeProbability(double rateMetresPerKyr) {
        int k = interval(rateMetresPerKyr);
        if (k < 0) {
            return rateMetresPerKyr < rates[0] ? 0 : 1;
        }
        double d = rateMetresPerKyr - rates[k];
        return until[k] + d * (density[k] + density(rateMetresPerKyr)) / 2;
    }

    /** Probability that the coast rises. */
    public double probabilityUplift() {
        return 1 - cumulativeProbability(0);
    }

    /** Mean, m/kyr. */
    public double mean() {
        double sum = 0;
        for (int k = 1; k < rates.length; k++) {
            double width = rates[k] - rates[k - 1];
            double mass = width * (density[k] + density[k - 1]) / 2;
            sum += mass * rates[k - 1] + width * width * (density[k - 1] + 2 * density[k]) / 6;
        }
        return sum;
    }

    /** Standard deviation, m/kyr. */
    public double standardDeviation() {
        double mean = mean();
        double sum = 0;
        for (int k = 1; k < rates.length; k++) {
            double width = rates[k] - rates[k - 1];
            double offset = rates[k - 1] - mean;
            double mass = width * (density[k] + density[k - 1]) / 2;
            double first = width * width * (density[k - 1] + 2 * density[k]) / 6;
            double second = width * width * width * (density[k - 1] + 3 * density[k]) / 12;
            sum += offset * offset * mass + 2 * offset * first + second;
        }
        return Math.sqrt(sum);
    }

    /**
     * The rate below which the posterior puts the given probability, m/kyr.
     *
     * @throws IllegalArgumentException if {@code probability} is not strictly between 0 and 1
     */
    public double quantile(double probability) {
        Uncertain.requireProbability(probability);
        int found = Arrays.binarySearch(until, probability);
        int k = Math.min(rates.length - 2, Math.max(0, found >= 0 ? found : -found - 2));
        double width = rates[k + 1] - rates[k];
        double slope = (density[k + 1] - density[k]) / width;
        double mass = probability - until[k];
        double root = Math.sqrt(Math.max(0, density[k] * density[k] + 2 * slope * mass));
        double d = density[k] + root > 0 ? 2 * mass / (density[k] + root) : width;
        return rates[k] + Math.min(width, d);
    }

    /** The interval between the quantiles that leave equal tails. */
    public RateRegion equalTails(double probability) {
        return new RateRegion(quantile((1 - probability) / 2), quantile((1 + probability) / 2), probability);
    }

    /** The shortest interval that holds the given probability. */
    public RateRegion shortestInterval(double probability) {
        Uncertain.requireProbability(probability);
        double free = 1 - probability;
        double best = free / 2;
        double step = free / 400;
        for (int i = 1; i < 400; i++) {
            best = width(i * step, probability) < width(best, probability) ? i * step : best;
        }
        for (; step > free * 1e-9; step /= 2) {
            for (double other : new double[] {best - step, best + step}) {
                if (other > 0 && other < free && width(other, probability) < width(best, probability)) {
                    best = other;
                }
            }
        }
        return new RateRegion(quantile(best), quantile(best + probability), probability);
    }

    private double width(double from, double probability) {
        return quantile(Math.min(1 - 1e-12, from + probability)) - quantile(from);
    }

    /**
     * The rates of highest density that together hold the given probability: one region for each correlation that is still
     * possible, with the probability of each.
     */
    public List<RateRegion> highestDensityRegions(double probability) {
        Uncertain.requireProbability(probability);
        double low = 0;
        double high = Arrays.stream(density).max().orElseThrow();
        for (int i = 0; i < 60; i++) {
            double middle = (low + high) / 2;
            double held = regionsAbove(middle).stream()
                    .mapToDouble(RateRegion::probability)
                    .sum();
            if (held > probability) {
                low = middle;
            } else {
                high = middle;
            }
        }
        return regionsAbove(low);
    }

    /**
     * The same where the density comes of draws, whose noise at the edge of a region is no correlation of its own: regions nearer
     * to one another than half the half-width of the 68 % interval are one, and what then holds less than 0.01 is left out.
     */
    List<RateRegion> highestDensityRegionsOfDraws(double probability) {
        double near = equalTails(Interval.PROBABILITY_68).widthMetresPerKyr() / 4;
        List<RateRegion> joined = new ArrayList<>();
        for (RateRegion region : highestDensityRegions(probability)) {
            int last = joined.size() - 1;
            double from = region.fromMetresPerKyr();
            if (last >= 0 && from - joined.get(last).toMetresPerKyr() < near) {
                from = joined.remove(last).fromMetresPerKyr();
            }
            joined.add(region(from, region.toMetresPerKyr()));
        }
        return joined.stream()
                .filter(region -> region.probability() >= LEAST_REGION)
                .toList();
    }

    private List<RateRegion> regionsAbove(double level) {
        List<RateRegion> regions = new ArrayList<>();
        double open = density[0] > level ? rates[0] : Double.NaN;
        for (int k = 1; k < rates.length; k++) {
            boolean before = density[k - 1] > level;
            boolean now = density[k] > level;
            if (before != now) {
                double part = (level - density[k - 1]) / (density[k] - density[k - 1]);
                double crossing = rates[k - 1] + part * (rates[k] - rates[k - 1]);
                if (before) {
                    regions.add(region(open, crossing));
                }
                open = crossing;
            }
        }
        if (density[rates.length - 1] > level) {
            regions.add(region(open, rates[rates.length - 1]));
        }
        return regions;
    }

    private RateRegion region(double from, double to) {
        return new RateRegion(from, to, cumulativeProbability(to) - cumulativeProbability(from));
    }

    /** The interval that holds a rate; -1 outside the nodes. */
    private int interval(double rateMetresPerKyr) {
        if (!(rateMetresPerKyr >= rates[0] && rateMetresPerKyr <= rates[rates.length - 1])) {
            return -1;
        }
        int found = Arrays.binarySearch(rates, rateMetresPerKyr);
        return Math.min(rates.length - 2, found >= 0 ? found : -found - 2);
    }
}
