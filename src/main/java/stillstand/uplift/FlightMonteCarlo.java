package stillstand.uplift;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Map;
import stillstand.ledger.RunCancelledException;
import stillstand.ledger.RunMonitor;
import stillstand.uncertainty.DrawStreams;
import stillstand.uncertainty.SobolPoints;

/**
 * A constant rate from a flight, with the shared numbers integrated by importance sampling: randomised Sobol' points in seven
 * dimensions, the shared numbers from their priors, the rate from a mixture of a pilot's posterior, its square root, and a
 * part flat in {@code asinh(u / 0.02)}. Each point is a weighted draw; the filter is evaluated at two cell counts and
 * extrapolated. Independent scrambles give the error (delete-one jackknife).
 */
public final class FlightMonteCarlo {
    private static final double BEND = 0.02;
    private static final int PILOT_POINTS = 64;
    private static final int PILOT_PIECES = 4;
    private static final int PILOT_CELLS = 48;
    private static final int PILOT_RATES = 300;
    private static final double FLAT = 0.2;
    private static final double ROOT = 0.3;
    /** A point this far below the best, in log evidence, weighs too little for its finer pass to matter. */
    private static final double HOPELESS = 12;
    /** Scrambles are added until no error of median or 68 % ends is above this part of half the 68 % interval. */
    private static final double TOLERANCE = 0.02;

    private static final double[] PROBABILITIES = {0.025, 0.15865, 0.5, 0.84135, 0.975};

    private final FlightModel model;
    private final RatePrior prior;
    private final SharedPriors shared;
    private final Effort effort;
    private final DrawStreams streams;
    private final String key;
    private final RunMonitor monitor;
    private final Workers workers;
    private final ShorelineFilter coarse;
    private final ShorelineFilter fine;

    private final double[] rates;
    private final SharedNumbers[] numbers;
    private final double[] logCoarse;
    private final double[] logFine;
    private final double[] logNothing;
    private final int[] blocks;

    /**
     * How much to compute.
     *
     * @param scrambles independent scrambles to begin with, 4 or more
     * @param mostScrambles as many at most, where the error is still too large
     * @param points in each, a power of two
     * @param cells cells of height in the coarser of the two passes, 10 or more
     * @param draws joint draws, from which the pairings are averaged, 100 or more
     */
    public record Effort(int scrambles, int mostScrambles, int points, int cells, int draws) {
        /** 16 to 64 scrambles of 512 points, 100 and 200 cells, 1000 draws. */
        public static final Effort FULL = new Effort(16, 64, 512, 100, 1000);

        /** An effort that never grows. */
        public Effort(int scrambles, int points, int cells, int draws) {
            this(scrambles, scrambles, points, cells, draws);
        }

        /** @throws IllegalArgumentException if a number is too small or {@code points} no power of two */
        public Effort {
            if (!(scrambles >= 4
                    && mostScrambles >= scrambles
                    && cells >= 10
                    && draws >= 100
                    && Integer.bitCount(points) == 1)) {
                throw new IllegalArgumentException("effort is too small: " + scrambles + " scrambles, " + points
                        + " points, " + cells + " cells, " + draws + " draws");
            }
        }
    }

    private FlightMonteCarlo(
            FlightModel model,
            RatePrior prior,
            SharedPriors shared,
            Effort effort,
            DrawStreams streams,
            String key,
            RunMonitor monitor,
            Workers workers) {
        this.model = model;
        this.prior = prior;
        this.shared = shared;
        this.effort = effort;
        this.streams = streams;
        this.key = key;
        this.monitor = monitor;
        this.workers = workers;
        coarse = new ShorelineFilter(model, effort.cells());
        fine = new ShorelineFilter(model, 2 * effort.cells());
        int count = effort.mostScrambles() * effort.points();
        rates = new double[count];
        numbers = new SharedNumbers[count];
        logCoarse = new double[count];
        logFine = new double[count];
        logNothing = new double[count];
        blocks = new int[count];
    }

    /**
     * The whole answer.
     *
     * @param key names the flight, such as its site: with the streams' seed it fixes every draw
     * @throws IllegalArgumentException if no rate of the prior can have left the flight
     * @throws RunCancelledException if the monitor asks to stop
     */
    public static SampledFlightAnswer answer(
            FlightModel model,
            RatePrior prior,
            SharedPriors shared,
            Effort effort,
            DrawStreams streams,
            String key,
            RunMonitor monitor) {
        return new FlightMonteCarlo(model, prior, shared, effort, streams, key, monitor, Workers.NONE).answer();
    }

    /** The same answer to the last bit, worked out by many threads; to be called from none of them. */
    static SampledFlightAnswer answer(
            FlightModel model,
            RatePrior prior,
            SharedPriors shared,
            Effort effort,
            DrawStreams streams,
            String key,
            RunMonitor monitor,
            Workers workers) {
        return new FlightMonteCarlo(model, prior, shared, effort, streams, key, monitor, workers).answer();
    }

    private SampledFlightAnswer answer() {
        RatePosterior proposal = proposal();
        int scrambles = effort.scrambles();
        evaluate(proposal, 0, scrambles);
        double highest = highest(scrambles);
        WeightedRates weighted = weighted(scrambles, highest);
        while (scrambles < effort.mostScrambles() && !isSettled(weighted, scrambles)) {
            int more = Math.min(2 * scrambles, effort.mostScrambles());
            evaluate(proposal, scrambles, more);
            scrambles = more;
            highest = highest(scrambles);
            weighted = weighted(scrambles, highest);
        }
        return answer(weighted, scrambles, highest);
    }

    private double highest(int scrambles) {
        double highest = Double.NEGATIVE_INFINITY;
        for (int k = 0; k < scrambles * effort.points(); k++) {
            highest = Math.max(highest, Math.max(logCoarse[k], logFine[k]));
        }
        return highest;
    }

    private WeightedRates weighted(int scrambles, double highest) {
        int count = scrambles * effort.points();
        double[] weights = new double[count];
        for (int k = 0; k < count; k++) {
            weights[k] = weight(k, highest);
        }
        return new WeightedRates(Arrays.copyOf(rates, count), weights, Arrays.copyOf(blocks, count));
    }

    /** Evidence of a point at vanishing cells, relative to the best. */
    private double weight(int point, double highest) {
        double one = Math.exp(logCoarse[point] - highest);
        double two = Math.exp(logFine[point] - highest);
        return Math.max(0, two + (two - one) / 3);
    }

    private static boolean isSettled(WeightedRates weighted, int scrambles) {
        double[] ends = {PROBABILITIES[1], PROBABILITIES[2], PROBABILITIES[3]};
        double[][] without = new double[ends.length][scrambles];
        for (int block = 0; block < scrambles; block++) {
            double[] quantiles = weighted.quantiles(ends, block);
            for (int i = 0; i < ends.length; i++) {
                without[i][block] = quantiles[i];
            }
        }
        double[] all = weighted.quantiles(ends, -1);
        double largest = Arrays.stream(without)
                .mapToDouble(FlightMonteCarlo::jackknife)
                .max()
                .orElseThrow();
        return largest <= TOLERANCE * (all[2] - all[0]) / 2;
    }

    private SampledFlightAnswer answer(WeightedRates weighted, int scrambles, double highest) {
        double logEvidence = highest + Math.log(weighted.total(-1) / (scrambles * effort.points()));
        RatePosterior posterior = weighted.posterior(logEvidence);
        List<ChosenDraws.Chosen> draws = new ArrayList<>();
        for (int k : weighted.chosen(effort.draws())) {
            draws.add(new ChosenDraws.Chosen(
                    new UpliftHistory.ConstantRate(rates[k]),
                    numbers[k],
                    Math.exp(logCoarse[k] - highest) / weight(k, highest),
                    Math.exp(logFine[k] - highest) / weight(k, highest),
                    blocks[k]));
        }
        ChosenDraws.Found found = new ChosenDraws(coarse, fine, draws, scrambles, monitor).found(streams, key, workers);
        double stray = Math.exp(logAllStray(scrambles, highest) - Math.log(weighted.total(-1)));
        double probabilityAllStray = model.countsAllStray() ? Math.min(1, stray) : stray / (1 + stray);
        FlightAnswer answer =
                new FlightAnswer(posterior, found.table(), found.ages(), found.positions(), probabilityAllStray);
        return new SampledFlightAnswer(
                answer, error(weighted, scrambles, found.pairingError()), found.joint(), weighted.effectiveDraws());
    }

    /** The density that rates are drawn from. */
    private RatePosterior proposal() {
        ShorelineFilter pilot = new ShorelineFilter(model, PILOT_CELLS);
        FilterWorkspace[] workspaces = new FilterWorkspace[PILOT_PIECES];
        Arrays.setAll(workspaces, piece -> pilot.workspace(false));
        SharedNumbers[] some = new SharedNumbers[PILOT_POINTS];
        drawShared(SobolPoints.scrambled(streams, key + " pilot", SharedPriors.DIMENSIONS + 1, 0), some, 0);
        double[] logs = new double[PILOT_POINTS];
        Map<Double, Double> explored = RateGrid.explored(
                prior,
                rate -> {
                    stopIfCancelled();
                    UpliftHistory history = new UpliftHistory.ConstantRate(rate);
                    List<Runnable> pieces = new ArrayList<>();
                    for (int piece = 0; piece < PILOT_PIECES; piece++) {
                        int number = piece;
                        pieces.add(() -> {
                            for (int k = number; k < PILOT_POINTS; k += PILOT_PIECES) {
                                logs[k] = pilot.logEvidence(history, some[k], workspaces[number]);
                            }
                        });
                    }
                    workers.run(pieces);
                    double top = Arrays.stream(logs).max().orElseThrow();
                    double sum = 0;
                    for (int k = 0; k < PILOT_POINTS && top > Double.NEGATIVE_INFINITY; k++) {
                        sum += Math.exp(logs[k] - top);
                    }
                    return top + Math.log(sum / PILOT_POINTS);
                },
                PILOT_RATES);
        double[] at = explored.keySet().stream().mapToDouble(v -> v).toArray();
        double top = explored.values().stream().mapToDouble(v -> v).max().orElseThrow();
        double[] whole =
                explored.values().stream().mapToDouble(v -> Math.exp(v - top)).toArray();
        double[] root = explored.values().stream()
                .mapToDouble(v -> Math.exp((v - top) / 2))
                .toArray();
        double[] flat = new double[at.length];
        for (int k = 0; k < at.length; k++) {
            flat[k] = 1 / Math.hypot(at[k], BEND);
        }
        double[] mixture = new double[at.length];
        addNormalised(mixture, at, whole, 1 - FLAT - ROOT);
        addNormalised(mixture, at, root, ROOT);
        addNormalised(mixture, at, flat, FLAT);
        return RatePosterior.ofDensity(at, mixture, 0);
    }

    private static void addNormalised(double[] mixture, double[] at, double[] density, double share) {
        double total = Math.exp(RatePosterior.ofDensity(at, density, 0).logEvidence());
        if (!(total > 0 && total < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("no rate of the prior can have left this flight");
        }
        for (int k = 0; k < at.length; k++) {
            mixture[k] += share * density[k] / total;
        }
    }

    private void drawShared(SobolPoints points, SharedNumbers[] out, int from) {
        int count = Math.min(effort.points(), out.length - from);
        double[][] column = new double[SharedPriors.DIMENSIONS][count];
        for (int d = 0; d < SharedPriors.DIMENSIONS; d++) {
            points.column(d + 1, column[d]);
        }
        for (int k = 0; k < count; k++) {
            out[from + k] =
                    shared.at(column[0][k], column[1][k], column[2][k], column[3][k], column[4][k], column[5][k]);
        }
    }

    /** The first scramble of all says what is hopeless; the others may be worked out in any order. */
    private void evaluate(RatePosterior proposal, int from, int to) {
        if (from == 0) {
            evaluate(proposal, 0, Double.NEGATIVE_INFINITY);
        }
        double highest = Arrays.stream(logCoarse, 0, effort.points()).max().orElseThrow();
        List<Runnable> others = new ArrayList<>();
        for (int block = Math.max(1, from); block < to; block++) {
            int number = block;
            others.add(() -> evaluate(proposal, number, highest));
        }
        workers.run(others);
    }

    private void evaluate(RatePosterior proposal, int block, double highest) {
        FilterWorkspace coarseWorkspace = coarse.workspace(false);
        FilterWorkspace fineWorkspace = fine.workspace(false);
        int from = block * effort.points();
        SobolPoints points = SobolPoints.scrambled(streams, key + " flight", SharedPriors.DIMENSIONS + 1, block);
        double[] first = new double[effort.points()];
        points.column(0, first);
        drawShared(points, numbers, from);
        for (int k = from; k < from + effort.points(); k++) {
            stopIfCancelled();
            rates[k] = proposal.quantile(first[k - from]);
            blocks[k] = block;
            UpliftHistory history = new UpliftHistory.ConstantRate(rates[k]);
            double log = Math.log(prior.density(rates[k])) - Math.log(proposal.density(rates[k]));
            logCoarse[k] = log + coarse.logEvidence(history, numbers[k], coarseWorkspace);
            logNothing[k] = log + coarseWorkspace.logNothingRecorded;
            logFine[k] = logCoarse[k] < highest - HOPELESS
                    ? logCoarse[k]
                    : log + fine.logEvidence(history, numbers[k], fineWorkspace);
        }
        monitor.step("flight " + key, (block + 1.0) / effort.scrambles());
    }

    private void stopIfCancelled() {
        if (monitor.isCancelled()) {
            throw new RunCancelledException();
        }
    }

    /** All strays, summed over points as the weights are: no draw of the expected strays is needed. */
    private double logAllStray(int scrambles, double highest) {
        double log = shared.strays().logMeanOfAllStray(model.levels().size()) + coarse.logStrayDensities();
        double sum = 0;
        for (int k = 0; k < scrambles * effort.points(); k++) {
            sum += Math.exp(logNothing[k] + log - highest);
        }
        return Math.log(sum);
    }

    private SampledFlightAnswer.NumericalError error(WeightedRates weighted, int count, double pairingError) {
        double[][] without = new double[2 + PROBABILITIES.length][count];
        for (int block = 0; block < count; block++) {
            without[0][block] = Math.log(weighted.total(block));
            without[1][block] = weighted.mean(block);
            double[] quantiles = weighted.quantiles(PROBABILITIES, block);
            for (int i = 0; i < quantiles.length; i++) {
                without[2 + i][block] = quantiles[i];
            }
        }
        return new SampledFlightAnswer.NumericalError(
                jackknife(without[0]),
                jackknife(without[1]),
                jackknife(without[4]),
                jackknife(without[3]),
                jackknife(without[5]),
                jackknife(without[2]),
                jackknife(without[6]),
                pairingError);
    }

    /** Standard error of an estimate from its values without one block each. */
    static double jackknife(double[] without) {
        double mean = 0;
        for (double value : without) {
            mean += value / without.length;
        }
        double squares = 0;
        for (double value : without) {
            squares += (value - mean) * (value - mean);
        }
        return Math.sqrt(squares * (without.length - 1) / without.length);
    }
}
