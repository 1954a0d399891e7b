package stillstand.uplift;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.TreeSet;
import org.apache.commons.rng.UniformRandomProvider;
import stillstand.ledger.RunCancelledException;
import stillstand.ledger.RunMonitor;
import stillstand.uncertainty.DrawStreams;
import stillstand.uncertainty.SobolPoints;

/**
 * Rates and shared numbers at which the variants of one flight are weighed: drawn once about the posterior of the whole flight
 * (half from it, three tenths from its square root, a fifth flat in {@code asinh(u / 0.02)}), so that a variant needs no pilot
 * and differs from the whole by less than either is known. Rougher than the answer itself.
 */
public final class WhatIfPoints {
    private static final int SCRAMBLES = 8;
    private static final int POINTS = 256;
    private static final int CELLS = 100;
    /** A point that weighs less than this part of the heaviest is not worth drawing a correlation for. */
    private static final double NEGLIGIBLE = 1e-6;

    private static final int SWEEP = 400;
    private static final double BEND = 0.02;
    private static final double ROOT = 0.3;
    private static final double FLAT = 0.2;

    private final double[] rates;
    private final SharedNumbers[] numbers;
    private final int[] blocks;
    /** Logarithm of prior over proposal. */
    private final double[] logWeight;

    WhatIfPoints(RatePosterior whole, RatePrior prior, SharedPriors shared, DrawStreams streams, String key) {
        this(whole, prior, shared, SCRAMBLES, POINTS, streams, key);
    }

    /**
     * Points about a posterior.
     *
     * @param whole posterior of the rate of the whole flight
     * @param prior of the rate
     * @param shared priors of the shared numbers
     * @param scrambles independent scrambles, 1 or more
     * @param each points in each, a power of two
     * @param streams all randomness
     * @param key names the flight among all draws of the study
     */
    public WhatIfPoints(
            RatePosterior whole,
            RatePrior prior,
            SharedPriors shared,
            int scrambles,
            int each,
            DrawStreams streams,
            String key) {
        rates = new double[scrambles * each];
        numbers = new SharedNumbers[rates.length];
        blocks = new int[rates.length];
        logWeight = new double[rates.length];
        RatePosterior proposal = proposal(whole, prior);
        double[][] column = new double[SharedPriors.DIMENSIONS + 1][each];
        for (int block = 0; block < scrambles; block++) {
            SobolPoints points = SobolPoints.scrambled(streams, key + " what if", SharedPriors.DIMENSIONS + 1, block);
            for (int d = 0; d < column.length; d++) {
                points.column(d, column[d]);
            }
            for (int i = 0; i < each; i++) {
                int k = block * each + i;
                blocks[k] = block;
                rates[k] = proposal.quantile(column[0][i]);
                logWeight[k] = Math.log(prior.density(rates[k])) - Math.log(proposal.density(rates[k]));
                numbers[k] =
                        shared.at(column[1][i], column[2][i], column[3][i], column[4][i], column[5][i], column[6][i]);
            }
        }
    }

    private static RatePosterior proposal(RatePosterior whole, RatePrior prior) {
        TreeSet<Double> all = new TreeSet<>();
        for (double rate : whole.ratesMetresPerKyr()) {
            if (rate >= prior.fromMetresPerKyr() && rate <= prior.toMetresPerKyr()) {
                all.add(rate);
            }
        }
        double from = RateGrid.asinh(prior.fromMetresPerKyr() / BEND);
        double to = RateGrid.asinh(prior.toMetresPerKyr() / BEND);
        for (int k = 1; k < SWEEP; k++) {
            all.add(BEND * Math.sinh(from + (to - from) * k / SWEEP));
        }
        all.add(prior.fromMetresPerKyr());
        all.add(prior.toMetresPerKyr());
        double[] at = all.stream().mapToDouble(rate -> rate).toArray();
        double[] density = new double[at.length];
        double[] root = new double[at.length];
        double[] flat = new double[at.length];
        for (int k = 0; k < at.length; k++) {
            density[k] = whole.density(at[k]);
            root[k] = Math.sqrt(density[k]);
            flat[k] = 1 / Math.hypot(at[k], BEND);
        }
        double ofRoot = total(at, root);
        double ofFlat = total(at, flat);
        double[] mixture = new double[at.length];
        for (int k = 0; k < at.length; k++) {
            mixture[k] = (1 - ROOT - FLAT) * density[k] + ROOT * root[k] / ofRoot + FLAT * flat[k] / ofFlat;
        }
        return RatePosterior.ofDensity(at, mixture, 0);
    }

    private static double total(double[] at, double[] density) {
        return Math.exp(RatePosterior.ofDensity(at, density, 0).logEvidence());
    }

    /**
     * The rate under a variant of the flight; absent where no rate can have left it.
     *
     * @throws RunCancelledException if the monitor asks to stop
     */
    public Optional<RatePosterior> rateOf(FlightModel variant, RunMonitor monitor) {
        ShorelineFilter filter = new ShorelineFilter(variant, CELLS);
        FilterWorkspace workspace = filter.workspace(false);
        double[] logs = new double[rates.length];
        double highest = Double.NEGATIVE_INFINITY;
        for (int k = 0; k < rates.length; k++) {
            stopIfCancelled(monitor);
            logs[k] =
                    logWeight[k] + filter.logEvidence(new UpliftHistory.ConstantRate(rates[k]), numbers[k], workspace);
            highest = Math.max(highest, logs[k]);
        }
        if (!(highest > Double.NEGATIVE_INFINITY)) {
            return Optional.empty();
        }
        for (int k = 0; k < logs.length; k++) {
            logs[k] = Math.exp(logs[k] - highest);
        }
        WeightedRates weighted = new WeightedRates(rates, logs, blocks);
        return Optional.of(weighted.posterior(highest + Math.log(weighted.total(-1) / rates.length)));
    }

    /**
     * Weighed joint draws of a flight: at each point a whole correlation, with true heights and ages, drawn given its rate and
     * shared numbers.
     *
     * @param cells cells of height, 10 or more: draws of heights are no finer
     * @param random draws the correlations
     * @return in the order of the points; those of no weight left out
     * @throws RunCancelledException if the monitor asks to stop
     * @throws IllegalArgumentException if no rate can have left the flight
     */
    public List<WeighedDraw> draws(FlightModel model, int cells, UniformRandomProvider random, RunMonitor monitor) {
        CorrelationSampler sampler = new CorrelationSampler(new ShorelineFilter(model, cells));
        ShorelineFilter filter = new ShorelineFilter(model, cells);
        FilterWorkspace workspace = filter.workspace(false);
        double[] logs = new double[rates.length];
        double highest = Double.NEGATIVE_INFINITY;
        for (int k = 0; k < rates.length; k++) {
            stopIfCancelled(monitor);
            logs[k] =
                    logWeight[k] + filter.logEvidence(new UpliftHistory.ConstantRate(rates[k]), numbers[k], workspace);
            highest = Math.max(highest, logs[k]);
        }
        if (!(highest > Double.NEGATIVE_INFINITY)) {
            throw new IllegalArgumentException("no rate of the prior can have left this flight");
        }
        List<WeighedDraw> draws = new ArrayList<>();
        for (int k = 0; k < rates.length; k++) {
            double weight = Math.exp(logs[k] - highest);
            if (weight > NEGLIGIBLE) {
                stopIfCancelled(monitor);
                sampler.prepare(new UpliftHistory.ConstantRate(rates[k]), numbers[k]);
                draws.add(
                        new WeighedDraw(new FlightDraw(rates[k], numbers[k], sampler.draw(random)), weight, blocks[k]));
            }
        }
        return draws;
    }

    private static void stopIfCancelled(RunMonitor monitor) {
        if (monitor.isCancelled()) {
            throw new RunCancelledException();
        }
    }
}
