package stillstand.uplift;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import org.apache.commons.rng.UniformRandomProvider;
import stillstand.ledger.RunCancelledException;
import stillstand.ledger.RunMonitor;
import stillstand.uncertainty.DrawStreams;
import stillstand.uncertainty.SobolPoints;
import stillstand.uncertainty.StandardNormal;

/**
 * Histories of uplift from a flight, under any {@link HistoryPrior}, with the shared numbers integrated: tempered sequential Monte
 * Carlo (Del Moral, Doucet and Jasra 2006, J. R. Stat. Soc. B 68:411). Points of history and shared numbers, standard normal a
 * priori, start at the prior (randomised Sobol' points); the shoreline filter's evidence is let in by powers that rise from 0 to 1,
 * each as far as the weights stay worth 0.7 of the points; points are then drawn anew by weight and moved along differences of other
 * points (ter Braak 2006, Stat. Comput. 16:239), one half of them by the other, which leaves the tempered posterior as it is. The
 * product of the mean weights is the evidence.
 *
 * <p>Several islands run independently: the spread between them is the error. Each point's last weight turns the evidence at the
 * cell count used into that at vanishing cells.
 */
final class HistoryMonteCarlo {
    private static final double STAYING = 0.7;
    /** So many points of the prior are looked at for each one that goes on. */
    private static final int FIRST = 64;

    /** A point of the prior this far below the best, in the logarithm, is looked at with few cells only. */
    private static final double HOPELESS = 40;

    private static final int PILOT_CELLS = 32;
    private static final double JUMP_BETWEEN_MODES = 0.1;
    private static final double NOISE = 2e-3;
    /** Copies made by drawing anew part only by moves: so many more of them at the end. */
    private static final int LAST = 3;

    private static final int BISECTIONS = 40;

    private final FlightModel model;
    private final HistoryPrior prior;
    private final SharedScores shared;
    private final Effort effort;
    private final DrawStreams streams;
    private final String key;
    private final RunMonitor monitor;
    private final int dimensions;
    private final ShorelineFilter pilot;
    private final ShorelineFilter coarse;
    private final ShorelineFilter fine;

    /**
     * How much to compute.
     *
     * @param islands independent populations, 4 or more
     * @param points in each, a power of two, 64 or more
     * @param cells cells of height, 10 or more; the last evaluation is at twice as many too
     * @param sweeps moves of every point after each power, 1 or more; three times as many after the last
     */
    record Effort(int islands, int points, int cells, int sweeps) {
        /** 8 islands of 512 points, 80 cells, 3 sweeps. */
        static final Effort FULL = new Effort(8, 512, 80, 3);

        Effort {
            if (!(islands >= 4 && points >= 64 && Integer.bitCount(points) == 1 && cells >= 10 && sweeps >= 1)) {
                throw new IllegalArgumentException("effort is too small: " + islands + " islands, " + points
                        + " points, " + cells + " cells, " + sweeps + " sweeps");
            }
        }
    }

    private HistoryMonteCarlo(
            FlightModel model,
            HistoryPrior prior,
            SharedPriors shared,
            Effort effort,
            DrawStreams streams,
            String key,
            RunMonitor monitor) {
        this.model = model;
        this.prior = prior;
        this.shared = new SharedScores(shared);
        this.effort = effort;
        this.streams = streams;
        this.key = key;
        this.monitor = monitor;
        dimensions = prior.dimensions() + this.shared.dimensions();
        pilot = new ShorelineFilter(model, Math.min(PILOT_CELLS, effort.cells()));
        coarse = new ShorelineFilter(model, effort.cells());
        fine = new ShorelineFilter(model, 2 * effort.cells());
    }

    /**
     * Draws from the posterior, with the evidence.
     *
     * @param key names the flight and model: with the streams' seed it fixes every draw
     * @param monitor hears {@code key} and how far the first island has come; is asked whether to stop
     * @throws IllegalArgumentException if no history of the prior can have left the flight
     * @throws RunCancelledException if the monitor asks to stop
     */
    static HistoryDraws draws(
            FlightModel model,
            HistoryPrior prior,
            SharedPriors shared,
            Effort effort,
            DrawStreams streams,
            String key,
            RunMonitor monitor,
            Workers workers) {
        return new HistoryMonteCarlo(model, prior, shared, effort, streams, key, monitor).draws(shared, workers);
    }

    private HistoryDraws draws(SharedPriors priors, Workers workers) {
        Island[] islands = new Island[effort.islands()];
        List<Runnable> pieces = new ArrayList<>();
        for (int number = 0; number < islands.length; number++) {
            int own = number;
            pieces.add(() -> {
                Island island = new Island(own);
                island.run();
                islands[own] = island;
            });
        }
        workers.run(pieces);
        double top = Arrays.stream(islands).mapToDouble(i -> i.logTop()).max().orElseThrow();
        if (!(top > Double.NEGATIVE_INFINITY)) {
            throw new IllegalArgumentException("no history of the prior can have left this flight");
        }
        List<HistoryDraws.Draw> draws = new ArrayList<>();
        double[] total = new double[islands.length];
        double nothing = 0;
        for (Island island : islands) {
            nothing += island.meanNothing / islands.length;
            for (int k = 0; k < effort.points() && island.logEvidence > Double.NEGATIVE_INFINITY; k++) {
                HistoryDraws.Draw draw = island.draw(k, top);
                draws.add(draw);
                total[island.number] += draw.weight() / effort.points();
            }
        }
        double all = Arrays.stream(total).sum();
        double[] without = new double[total.length];
        for (int r = 0; r < total.length; r++) {
            without[r] = Math.log(Math.max(1e-300, all - total[r]));
        }
        double logStray = Math.log(nothing)
                + priors.strays().logMeanOfAllStray(model.levels().size())
                + coarse.logStrayDensities();
        return new HistoryDraws(
                prior,
                effort.islands(),
                draws,
                top + Math.log(all / total.length),
                FlightMonteCarlo.jackknife(without),
                logStray,
                coarse,
                fine);
    }

    /** One population. */
    private final class Island {
        private final int number;
        private final UniformRandomProvider random;
        private final FilterWorkspace workspace = coarse.workspace(false);
        private double[][] at = new double[FIRST * effort.points()][];
        private double[] log = new double[FIRST * effort.points()];
        private double[] logFine = new double[0];
        private double stride = 1;
        private double power;
        private double logEvidence;
        private double meanNothing;

        Island(int number) {
            this.number = number;
            random = streams.stream(key + " moves", number);
        }

        void run() {
            begin();
            while (power < 1 && logEvidence > Double.NEGATIVE_INFINITY) {
                boolean first = power == 0;
                raise();
                for (int k = 0; k < log.length && first && logEvidence > Double.NEGATIVE_INFINITY; k++) {
                    log[k] = logLikelihood(at[k]); // of a hopeless point the few cells said it
                }
                int sweeps = power == 1 ? LAST * effort.sweeps() : effort.sweeps();
                for (int sweep = 0; sweep < sweeps && logEvidence > Double.NEGATIVE_INFINITY; sweep++) {
                    sweep();
                }
                if (number == 0) {
                    monitor.within(key + String.format(Locale.ROOT, ", %.0f %%", 100 * power));
                }
            }
            logFine = new double[log.length];
            FilterWorkspace finer = fine.workspace(false);
            for (int k = 0; k < log.length && logEvidence > Double.NEGATIVE_INFINITY; k++) {
                stopIfCancelled();
                logFine[k] = fine.logEvidence(prior.at(at[k]), shared.at(at[k], prior.dimensions()), finer);
            }
        }

        private void begin() {
            SobolPoints points = SobolPoints.scrambled(streams, key + " prior", dimensions, number);
            FilterWorkspace few = pilot.workspace(false);
            double[][] columns = new double[dimensions][at.length];
            for (int d = 0; d < dimensions; d++) {
                points.column(d, columns[d]);
                StandardNormal.toQuantiles(columns[d]);
            }
            for (int k = 0; k < at.length; k++) {
                at[k] = new double[dimensions];
                for (int d = 0; d < dimensions; d++) {
                    at[k][d] = columns[d][k];
                }
                stopIfCancelled();
                log[k] = pilot.logEvidence(prior.at(at[k]), shared.at(at[k], prior.dimensions()), few);
                meanNothing += Math.exp(few.logNothingRecorded) / at.length;
            }
            double highest = Arrays.stream(log).max().orElseThrow();
            for (int k = 0; k < at.length; k++) {
                if (log[k] > highest - HOPELESS) {
                    log[k] = logLikelihood(at[k]);
                }
            }
        }

        private double logLikelihood(double[] scores) {
            stopIfCancelled();
            return coarse.logEvidence(prior.at(scores), shared.at(scores, prior.dimensions()), workspace);
        }

        /** Raises the power, takes the mean weight into the evidence, and draws the points anew by weight. */
        private void raise() {
            double highest = Arrays.stream(log).max().orElseThrow();
            if (!(highest > Double.NEGATIVE_INFINITY)) {
                logEvidence = Double.NEGATIVE_INFINITY;
                return;
            }
            double alive =
                    Arrays.stream(log).filter(v -> v > Double.NEGATIVE_INFINITY).count();
            alive = Math.min(alive, effort.points());
            double step = 1 - power;
            if (effective(step, highest) < STAYING * alive) {
                double low = 0;
                for (int i = 0; i < BISECTIONS; i++) {
                    double middle = (low + step) / 2;
                    if (effective(middle, highest) < STAYING * alive) {
                        step = middle;
                    } else {
                        low = middle;
                    }
                }
            }
            double[] weights = weights(step, highest);
            double total = Arrays.stream(weights).sum();
            logEvidence += step * highest + Math.log(total / weights.length);
            power = Math.min(1, power + step);
            if (1 - power < 1e-9) {
                power = 1;
            }
            resample(weights, total);
        }

        private double[] weights(double step, double highest) {
            double[] weights = new double[log.length];
            for (int k = 0; k < log.length; k++) {
                weights[k] = log[k] > Double.NEGATIVE_INFINITY ? Math.exp(step * (log[k] - highest)) : 0;
            }
            return weights;
        }

        private double effective(double step, double highest) {
            double sum = 0;
            double squares = 0;
            for (double weight : weights(step, highest)) {
                sum += weight;
                squares += weight * weight;
            }
            return sum * sum / squares;
        }

        private void resample(double[] weights, double total) {
            double[][] chosen = new double[effort.points()][];
            double[] logs = new double[effort.points()];
            double first = random.nextDouble();
            double sum = 0;
            int filled = 0;
            for (int k = 0; k < weights.length; k++) {
                sum += weights[k];
                while (filled < chosen.length && (filled + first) * total / chosen.length < sum) {
                    chosen[filled] = at[k].clone();
                    logs[filled++] = log[k];
                }
            }
            for (; filled < chosen.length; filled++) { // rounding at the very end
                chosen[filled] = chosen[filled - 1].clone();
                logs[filled] = logs[filled - 1];
            }
            shuffle(chosen, logs);
            at = chosen;
            log = logs;
        }

        /** Copies of one point must not all stand in the same half. */
        private void shuffle(double[][] points, double[] logs) {
            for (int k = points.length - 1; k > 0; k--) {
                int other = random.nextInt(k + 1);
                double[] point = points[k];
                points[k] = points[other];
                points[other] = point;
                double value = logs[k];
                logs[k] = logs[other];
                logs[other] = value;
            }
        }

        private void sweep() {
            int half = at.length / 2;
            int accepted = 0;
            for (int k = 0; k < at.length; k++) {
                accepted += move(k, k < half ? half : 0, half) ? 1 : 0;
            }
            double rate = (double) accepted / at.length;
            stride *= rate < 0.15 ? 0.7 : rate > 0.35 ? 1.3 : 1;
        }

        private boolean move(int k, int othersFrom, int others) {
            double[] from = at[k];
            double[] one = at[othersFrom + random.nextInt(others)];
            double[] two = at[othersFrom + random.nextInt(others)];
            boolean far = random.nextDouble() < JUMP_BETWEEN_MODES;
            double share = random.nextDouble() < 0.5 ? 1 : 1.0 / 3;
            boolean[] moves = new boolean[dimensions];
            int moved = 0;
            for (int d = 0; d < dimensions; d++) {
                moves[d] = share == 1 || random.nextDouble() < share;
                moved += moves[d] ? 1 : 0;
            }
            if (moved == 0) {
                return false;
            }
            double length = far ? 1 : stride * 2.38 / Math.sqrt(2.0 * moved);
            double[] to = from.clone();
            double logRatio = 0;
            for (int d = 0; d < dimensions; d++) {
                if (moves[d]) {
                    to[d] += length * (one[d] - two[d]) + NOISE * (2 * random.nextDouble() - 1);
                    logRatio += (from[d] * from[d] - to[d] * to[d]) / 2;
                }
            }
            double chance = Math.log(random.nextDouble());
            double logTo = logLikelihood(to);
            if (!(logTo > Double.NEGATIVE_INFINITY && chance < logRatio + power * (logTo - log[k]))) {
                return false;
            }
            at[k] = to;
            log[k] = logTo;
            return true;
        }

        double logTop() {
            double top = logEvidence;
            for (int k = 0; k < log.length && top > Double.NEGATIVE_INFINITY; k++) {
                top = Math.max(top, logEvidence + Math.log(ratio(k)));
            }
            return top;
        }

        /** Evidence at vanishing cells over that at the coarser ones. */
        private double ratio(int k) {
            double step = Math.exp(logFine[k] - log[k]);
            return Math.max(1e-9, step + (step - 1) / 3);
        }

        HistoryDraws.Draw draw(int k, double top) {
            double ratio = ratio(k);
            return new HistoryDraws.Draw(
                    new ChosenDraws.Chosen(
                            prior.at(at[k]),
                            shared.at(at[k], prior.dimensions()),
                            1 / ratio,
                            Math.exp(logFine[k] - log[k]) / ratio,
                            number),
                    Math.exp(logEvidence - top) * ratio);
        }
    }

    private void stopIfCancelled() {
        if (monitor.isCancelled()) {
            throw new RunCancelledException();
        }
    }
}
