package stillstand.uplift;

import java.util.ArrayList;
import java.util.List;
import java.util.function.ToDoubleFunction;
import stillstand.ledger.RunCancelledException;
import stillstand.ledger.RunMonitor;
import stillstand.uncertainty.DrawStreams;
import stillstand.uncertainty.SobolPoints;
import stillstand.uncertainty.StandardNormal;

/**
 * One change of rate, by population Monte Carlo (Cappe et al. 2004, J. Comput. Graph. Stat. 13:907): points from the priors and
 * then from mixtures of normal kernels about the best of them, weighed with the segment recursion; the last points with the
 * shoreline filter at two cell counts. Rates are moved in {@code asinh(u / 0.02)}.
 */
public final class RateChangeIntegration {
    private static final double BEND = 0.02;
    private static final int ROUNDS = 3;
    private static final int CENTRES = 512;
    private static final double FROM_PRIOR = 0.1;
    private static final int BLOCKS = 8;
    private static final int KEPT_DRAWS = 2000;

    private final FlightModel model;
    private final RateChangePrior prior;
    private final SharedNumbers shared;
    private final DrawStreams streams;
    private final String key;
    private final RunMonitor monitor;
    private final int dimensions;

    /** The mixture that points are drawn from: centres, and the Cholesky factor of the kernel they share. */
    private double[][] centres = new double[0][];

    private double[][] kernel = new double[0][];

    private RateChangeIntegration(
            FlightModel model,
            RateChangePrior prior,
            SharedNumbers shared,
            DrawStreams streams,
            String key,
            RunMonitor monitor) {
        this.model = model;
        this.prior = prior;
        this.shared = shared;
        this.streams = streams;
        this.key = key;
        this.monitor = monitor;
        dimensions = prior.changeFromKa() < prior.changeToKa() ? 3 : 2;
    }

    /** A point and the logarithm of its weight. */
    private static final class Point {
        final double[] at;
        double logWeight;

        Point(double[] at, double logWeight) {
            this.at = at;
            this.logWeight = logWeight;
        }
    }

    /**
     * The answer.
     *
     * @param points points of the last round in each of 8 scrambles, a power of two
     * @param cells cells of height in the coarser of two passes
     * @throws IllegalArgumentException if no history of the prior can have left the flight
     * @throws RunCancelledException if the monitor asks to stop
     */
    public static RateChangeAnswer answer(
            FlightModel model,
            RateChangePrior prior,
            SharedNumbers shared,
            int points,
            int cells,
            DrawStreams streams,
            String key,
            RunMonitor monitor) {
        return new RateChangeIntegration(model, prior, shared, streams, key, monitor).answer(points, cells);
    }

    private RateChangeAnswer answer(int points, int cells) {
        SegmentRecursion recursion = new SegmentRecursion(model);
        ToDoubleFunction<UpliftHistory> pilot = history -> recursion.logEvidence(history, shared);
        for (int round = 0; round < ROUNDS; round++) {
            List<Point> population = new ArrayList<>();
            for (int block = 0; block < BLOCKS; block++) {
                population.addAll(draw(" round " + round, block, 512, pilot));
            }
            adapt(population, round == 0 ? 0.5 : 1);
        }
        ShorelineFilter coarse = new ShorelineFilter(model, cells);
        ShorelineFilter fine = new ShorelineFilter(model, 2 * cells);
        FilterWorkspace coarseWorkspace = coarse.workspace(false);
        FilterWorkspace fineWorkspace = fine.workspace(false);
        ToDoubleFunction<UpliftHistory> exact = history -> ShorelineFilter.richardson(
                coarse.logEvidence(history, shared, coarseWorkspace), fine.logEvidence(history, shared, fineWorkspace));
        List<Point> last = new ArrayList<>();
        for (int block = 0; block < BLOCKS; block++) {
            last.addAll(draw(" last", block, points, exact));
            monitor.step("change of rate " + key, (block + 1.0) / BLOCKS);
        }
        return summary(last, points);
    }

    private List<Point> draw(String name, int block, int count, ToDoubleFunction<UpliftHistory> logEvidence) {
        SobolPoints sobol = SobolPoints.scrambled(streams, key + " change" + name, 4, block);
        double[][] column = new double[4][count];
        for (int d = 0; d < 4; d++) {
            sobol.column(d, column[d]);
        }
        List<Point> points = new ArrayList<>();
        for (int k = 0; k < count; k++) {
            if (monitor.isCancelled()) {
                throw new RunCancelledException();
            }
            double[] at = new double[dimensions];
            double choice = column[3][k];
            if (centres.length == 0 || choice < FROM_PRIOR) {
                at[0] = RateGrid.asinh(prior.recent().quantile(column[0][k]) / BEND);
                at[1] = RateGrid.asinh(prior.older().quantile(column[1][k]) / BEND);
                if (dimensions == 3) {
                    at[2] = prior.changeFromKa() + column[2][k] * (prior.changeToKa() - prior.changeFromKa());
                }
            } else {
                double[] centre = centres[(int) ((choice - FROM_PRIOR) / (1 - FROM_PRIOR) * centres.length)];
                for (int d = 0; d < dimensions; d++) {
                    at[d] = centre[d];
                    for (int e = 0; e <= d; e++) {
                        at[d] += kernel[d][e] * StandardNormal.quantile(column[e][k]);
                    }
                }
            }
            double log = logPrior(at);
            if (log > Double.NEGATIVE_INFINITY) {
                log += logEvidence.applyAsDouble(history(at)) - logProposal(at);
            }
            points.add(new Point(at, log));
        }
        return points;
    }

    private UpliftHistory history(double[] at) {
        return UpliftHistory.SteppedRate.oneChange(rate(at[0]), changeKa(at), rate(at[1]));
    }

    private static double rate(double bent) {
        return BEND * Math.sinh(bent);
    }

    private double changeKa(double[] at) {
        return dimensions == 3 ? at[2] : prior.changeFromKa();
    }

    /** Prior density in the coordinates that points move in. */
    private double logPrior(double[] at) {
        double log = Math.log(prior.recent().density(rate(at[0])) * BEND * Math.cosh(at[0]))
                + Math.log(prior.older().density(rate(at[1])) * BEND * Math.cosh(at[1]));
        if (dimensions == 3) {
            boolean within = at[2] >= prior.changeFromKa() && at[2] <= prior.changeToKa();
            log += within ? -Math.log(prior.changeToKa() - prior.changeFromKa()) : Double.NEGATIVE_INFINITY;
        }
        return log;
    }

    private double logProposal(double[] at) {
        if (centres.length == 0) {
            return logPrior(at);
        }
        double sum = 0;
        double determinant = 1;
        for (int d = 0; d < dimensions; d++) {
            determinant *= kernel[d][d];
        }
        double scale = 1 / (Math.pow(2 * Math.PI, dimensions / 2.0) * determinant * centres.length);
        double[] solved = new double[dimensions];
        for (double[] centre : centres) {
            double square = 0;
            for (int d = 0; d < dimensions; d++) {
                double left = at[d] - centre[d];
                for (int e = 0; e < d; e++) {
                    left -= kernel[d][e] * solved[e];
                }
                solved[d] = left / kernel[d][d];
                square += solved[d] * solved[d];
            }
            sum += square < 1400 ? Math.exp(-square / 2) : 0;
        }
        return Math.log((1 - FROM_PRIOR) * scale * sum + FROM_PRIOR * Math.exp(logPrior(at)));
    }

    /** New centres by weight, and a kernel as wide as so many points ask for (Silverman's rule). */
    private void adapt(List<Point> population, double power) {
        double[] weights = weights(population, power);
        double total = 0;
        double squares = 0;
        double[] mean = new double[dimensions];
        for (int k = 0; k < weights.length; k++) {
            total += weights[k];
            squares += weights[k] * weights[k];
            for (int d = 0; d < dimensions; d++) {
                mean[d] += weights[k] * population.get(k).at[d];
            }
        }
        double effective = total * total / squares;
        double width = Math.pow(4 / ((dimensions + 2) * Math.min(effective, CENTRES)), 1.0 / (dimensions + 4));
        double[][] covariance = new double[dimensions][dimensions];
        for (int k = 0; k < weights.length; k++) {
            for (int d = 0; d < dimensions; d++) {
                for (int e = 0; e < dimensions; e++) {
                    covariance[d][e] += weights[k]
                            / total
                            * width
                            * width
                            * (population.get(k).at[d] - mean[d] / total)
                            * (population.get(k).at[e] - mean[e] / total);
                }
            }
        }
        kernel = cholesky(covariance);
        centres = new double[CENTRES][];
        double sum = 0;
        int at = 0;
        for (int k = 0; k < weights.length; k++) {
            sum += weights[k];
            while (at < CENTRES && (at + 0.5) * total / CENTRES < sum) {
                centres[at++] = population.get(k).at;
            }
        }
    }

    private static double[] weights(List<Point> points, double power) {
        double highest = points.stream().mapToDouble(p -> p.logWeight).max().orElseThrow();
        if (highest == Double.NEGATIVE_INFINITY) {
            throw new IllegalArgumentException("no history of the prior can have left this flight");
        }
        return points.stream()
                .mapToDouble(point -> Math.exp(power * (point.logWeight - highest)))
                .toArray();
    }

    private static double[][] cholesky(double[][] matrix) {
        int n = matrix.length;
        double[][] factor = new double[n][n];
        for (int i = 0; i < n; i++) {
            for (int j = 0; j <= i; j++) {
                double left = matrix[i][j];
                for (int k = 0; k < j; k++) {
                    left -= factor[i][k] * factor[j][k];
                }
                factor[i][j] = i == j ? Math.sqrt(Math.max(left, 1e-12)) : left / factor[j][j];
            }
        }
        return factor;
    }

    private RateChangeAnswer summary(List<Point> last, int points) {
        double highest = last.stream().mapToDouble(p -> p.logWeight).max().orElseThrow();
        double[] weights = weights(last, 1);
        double[] recent = new double[weights.length];
        double[] older = new double[weights.length];
        int[] blocks = new int[weights.length];
        double faster = 0;
        for (int k = 0; k < weights.length; k++) {
            recent[k] = rate(last.get(k).at[0]);
            older[k] = rate(last.get(k).at[1]);
            blocks[k] = k / points;
            faster += older[k] > recent[k] ? weights[k] : 0;
        }
        WeightedRates byRecent = new WeightedRates(recent, weights, blocks);
        WeightedRates byOlder = new WeightedRates(older, weights, blocks);
        double[] without = new double[BLOCKS];
        for (int block = 0; block < BLOCKS; block++) {
            without[block] = Math.log(byRecent.total(block));
        }
        double logEvidence = highest + Math.log(byRecent.total(-1) / weights.length);
        List<Double> changes = new ArrayList<>();
        for (int k : byRecent.chosen(KEPT_DRAWS)) {
            changes.add(changeKa(last.get(k).at));
        }
        return new RateChangeAnswer(
                byRecent.posterior(logEvidence),
                byOlder.posterior(logEvidence),
                changes,
                faster / byRecent.total(-1),
                FlightMonteCarlo.jackknife(without),
                byRecent.effectiveDraws());
    }
}
