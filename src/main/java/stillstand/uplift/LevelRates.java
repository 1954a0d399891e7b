package stillstand.uplift;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.ConcurrentLinkedQueue;
import java.util.concurrent.ExecutorService;
import stillstand.ledger.RunCancelledException;
import stillstand.ledger.RunMonitor;
import stillstand.shoreline.HeightTerm;
import stillstand.uncertainty.AdaptiveStop;
import stillstand.uncertainty.BlockEstimates;
import stillstand.uncertainty.DrawDistribution;
import stillstand.uncertainty.DrawHistogram;
import stillstand.uncertainty.DrawStreams;
import stillstand.uncertainty.Exact;
import stillstand.uncertainty.Interval;
import stillstand.uncertainty.MonteCarloError;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.SobolPoints;
import stillstand.uncertainty.SortedDraws;
import stillstand.uncertainty.Summary;
import stillstand.uncertainty.Uncertain;

/**
 * Rates of single levels by randomised Sobol' points: propagation of distributions (JCGM 101:2008), and from the same draws
 * the posterior under a prior {@code pi} of the rate, with weights {@code pi(U) / t} (propagation is flat in displacement,
 * and {@code dX = t dU}).
 *
 * <p>Blocks are drawn by any number of threads and reduced in the order of their numbers.
 */
public final class LevelRates {
    /** Blocks handed out at once beyond those that are needed in any case. */
    private static final int BATCH = 8;
    /** Most blocks handed out at once: their histograms wait until those before them are added up. */
    private static final int LARGEST_BATCH = 64;
    /** A rate has no mean where its age may come this near to zero, as a part of the median age. */
    private static final double NEAR_ZERO = 0.02;

    private static final double RARE = 1e-6;
    /** A prior that leaves fewer draws than this (Kish 1965) leaves no distribution. */
    private static final double LEAST_EFFECTIVE_DRAWS = 100;
    /** Draws that are worked on together, so that their columns stay in the fastest memory; a power of two. */
    private static final int SLICE = 1 << 11;
    /** Enough draws to choose the range of a histogram. */
    private static final int PILOT_DRAWS = SLICE;

    private static final DrawHistogram NONE = DrawHistogram.forDrawsLike(new double[1]);

    private final DrawStreams streams;
    private final DrawPlan plan;
    private final ExecutorService executor;
    private final RunMonitor monitor;
    private final ConcurrentLinkedQueue<Workspace> workspaces = new ConcurrentLinkedQueue<>();

    /**
     * @param streams all randomness
     * @param plan how many draws
     * @param executor runs blocks; not owned
     * @param monitor is asked between blocks whether to stop
     */
    public LevelRates(DrawStreams streams, DrawPlan plan, ExecutorService executor, RunMonitor monitor) {
        this.streams = streams;
        this.plan = plan;
        this.executor = executor;
        this.monitor = monitor;
    }

    /**
     * What the draws of one level say.
     *
     * @param rate propagated
     * @param rateWithPrior under the prior of the rate; absent where the prior leaves next to no draw
     * @param probabilityUplift under a two-sided prior
     * @param age of the level
     * @param relativeSeaLevelMetres height of the former sea above present mean sea level, m
     * @param monteCarlo how well the draws have settled
     * @param beyondCurve part of the draws whose age lay beyond the curve and counted for nothing, 0 to 1
     */
    public record Outcome(
            Rate rate,
            Optional<Rate> rateWithPrior,
            Optional<Double> probabilityUplift,
            Quantity age,
            Quantity relativeSeaLevelMetres,
            LevelAnswer.MonteCarlo monteCarlo,
            double beyondCurve) {}

    /** What draws add up to. */
    private record Gathered(DrawHistogram rate, DrawHistogram rateWithPrior, DrawHistogram height, DrawHistogram age) {
        Gathered emptyCopy() {
            return new Gathered(rate.emptyCopy(), rateWithPrior.emptyCopy(), height.emptyCopy(), age.emptyCopy());
        }

        void merge(Gathered other) {
            rate.merge(other.rate);
            rateWithPrior.merge(other.rateWithPrior);
            height.merge(other.height);
            age.merge(other.age);
        }

        void clear() {
            rate.clear();
            rateWithPrior.clear();
            height.clear();
            age.clear();
        }
    }

    /** What one block of draws adds. */
    private record Block(Gathered gathered, long beyondCurve, BlockEstimates estimates) {}

    /** Columns of one thread, used again from block to block and from level to level. */
    private static final class Workspace {
        final RateColumns.Columns drawn;
        final double[] weights;
        /** Probabilities of a whole block, and of the slice that is worked on. */
        private double[][] points = new double[0][];

        private double[][] probabilities = new double[0][];

        Workspace() {
            drawn = new RateColumns.Columns(SLICE);
            weights = new double[SLICE];
        }

        double[][] points(int dimensions, int draws) {
            if (points.length < dimensions || (dimensions > 0 && points[0].length != draws)) {
                points = new double[dimensions][draws];
                probabilities = new double[dimensions][SLICE];
            }
            return points;
        }

        double[][] slice(int dimensions, int number) {
            for (int d = 0; d < dimensions; d++) {
                System.arraycopy(points[d], number * SLICE, probabilities[d], 0, SLICE);
            }
            return probabilities;
        }
    }

    /**
     * The rate of one level.
     *
     * @param key names the level among all draws of the study
     * @param height terms of the height of the former sea, without lowering
     * @param loweringMetresPerKyr rate at which its surface was lowered
     * @param explanations of the level, whose probabilities sum to 1
     * @param prior of the rate
     * @throws RunCancelledException if the monitor asks to stop
     * @throws IllegalArgumentException if there is no explanation, or every age lies beyond the curve
     */
    public Outcome of(
            String key,
            List<HeightTerm> height,
            Uncertain loweringMetresPerKyr,
            List<? extends SeaAtLevel> explanations,
            RatePrior prior) {
        if (explanations.isEmpty()) {
            throw new IllegalArgumentException("a rate needs an explanation of its level");
        }
        Question question = new Question(key, height, loweringMetresPerKyr, explanations, prior);
        question.pilot();
        AdaptiveStop stop = plan.stop();
        boolean converged = false;
        boolean goOn = plan.mostBlocks() > 1;
        while (goOn) {
            int done = question.estimates.size();
            int wanted = Math.min(Math.max(plan.leastBlocks() - done, BATCH), LARGEST_BATCH);
            int upTo = Math.min(done + wanted, plan.mostBlocks());
            for (Block block : BlockTasks.inOrder(executor, done, upTo, question::block)) {
                question.gather(block);
                if (question.estimates.size() < plan.leastBlocks()) {
                    continue;
                }
                AdaptiveStop.Decision decision =
                        stop.after(question.estimates, spread(question.all.rate(), question.hasMean));
                converged = decision == AdaptiveStop.Decision.CONVERGED;
                goOn = decision == AdaptiveStop.Decision.GO_ON;
                if (!goOn) {
                    break;
                }
            }
        }
        return question.outcome(converged);
    }

    private static double spread(DrawHistogram rate, boolean hasMean) {
        return hasMean
                ? rate.sd()
                : rate.distribution().equalTailed(Interval.PROBABILITY_68).width() / 2;
    }

    /** Whether the mean of a quotient by this age exists to any purpose. */
    private static boolean keepsAwayFromZero(Uncertain ageKa) {
        return ageKa.isExact() || ageKa.quantile(RARE) > NEAR_ZERO * ageKa.quantile(0.5);
    }

    /** One level's draws. */
    private final class Question {
        private final String key;
        private final List<? extends SeaAtLevel> explanations;
        private final List<RateColumns> functions = new ArrayList<>();
        private final RatePrior prior;
        /** Height of the former sea where its distribution is known without a draw. */
        private final Optional<Uncertain> knownHeight;

        /** Whether every draw counts and the age has one distribution, that of its only explanation. */
        private final boolean knownAge;

        private final boolean hasMean;
        /** Everything so far; its ranges are set by the pilot. */
        private Gathered all = new Gathered(NONE, NONE, NONE, NONE);

        private long beyondCurve;
        private final List<BlockEstimates> estimates = new ArrayList<>();
        private final ConcurrentLinkedQueue<Gathered> free = new ConcurrentLinkedQueue<>();

        Question(
                String key,
                List<HeightTerm> height,
                Uncertain lowering,
                List<? extends SeaAtLevel> explanations,
                RatePrior prior) {
            this.key = key;
            this.explanations = explanations;
            this.prior = prior;
            knownHeight = knownHeight(height, lowering);
            knownAge = explanations.size() == 1 && explanations.get(0) instanceof SeaAtLevel.AtHighstand;
            for (SeaAtLevel sea : explanations) {
                functions.add(
                        knownHeight.isPresent()
                                ? RateColumns.joined(height, lowering, sea)
                                : new RateColumns(height, lowering, sea));
            }
            hasMean = explanations.stream().allMatch(sea -> keepsAwayFromZero(sea.ageKa()));
        }

        /** A sum of normal terms, to which no lowering by age is added, is normal. */
        private static Optional<Uncertain> knownHeight(List<HeightTerm> height, Uncertain lowering) {
            if (!lowering.isExact() || lowering.mean() != 0) {
                return Optional.empty();
            }
            double meanMetres = 0;
            double variance = 0;
            for (HeightTerm term : height) {
                if (!(term.metres().isExact() || term.metres() instanceof Normal)) {
                    return Optional.empty();
                }
                meanMetres += term.meanMetres();
                variance += Math.pow(term.metres().standardDeviation(), 2);
            }
            return Optional.of(variance > 0 ? new Normal(meanMetres, Math.sqrt(variance)) : new Exact(meanMetres));
        }

        /** Sets the ranges of all histograms, and draws the first block. */
        void pilot() {
            int each = PILOT_DRAWS;
            double[][] draws = new double[3][explanations.size() * each];
            double[] weights = new double[explanations.size() * each];
            double[] posteriorWeights = new double[weights.length];
            Workspace w = new Workspace();
            for (int e = 0; e < explanations.size(); e++) {
                draw(e, 0, each, w);
                evaluate(e, 0, w);
                weigh(explanations.get(e).probability(), w);
                System.arraycopy(w.drawn.rateMetresPerKyr, 0, draws[0], e * each, each);
                System.arraycopy(w.drawn.heightMetres, 0, draws[1], e * each, each);
                System.arraycopy(w.drawn.ageKa, 0, draws[2], e * each, each);
                System.arraycopy(w.weights, 0, weights, e * each, each);
                underPrior(w);
                System.arraycopy(w.weights, 0, posteriorWeights, e * each, each);
            }
            boolean possible = Arrays.stream(posteriorWeights).anyMatch(weight -> weight > 0);
            all = new Gathered(
                    like(draws[0], weights),
                    like(draws[0], possible ? posteriorWeights : weights),
                    like(draws[1], weights),
                    like(draws[2], weights));
            gather(block(0));
        }

        /** Adds a block; called in the order of their numbers. */
        void gather(Block block) {
            all.merge(block.gathered());
            beyondCurve += block.beyondCurve();
            estimates.add(block.estimates());
            free.add(block.gathered());
        }

        private DrawHistogram like(double[] draws, double[] weights) {
            return DrawHistogram.forDrawsLike(SortedDraws.weighted(draws, weights));
        }

        /** Turns weights of propagation into weights of the posterior, in place. */
        private void underPrior(Workspace w) {
            double[] weights = w.weights;
            double[] ageKa = w.drawn.ageKa;
            for (int i = 0; i < weights.length; i++) {
                weights[i] /= ageKa[i];
            }
            prior.weigh(w.drawn.rateMetresPerKyr, weights);
        }

        private Block block(int number) {
            if (monitor.isCancelled()) {
                throw new RunCancelledException();
            }
            Gathered into = borrow();
            long beyond = 0;
            Workspace w = borrowWorkspace();
            for (int e = 0; e < explanations.size(); e++) {
                draw(e, number, DrawStreams.BLOCK_DRAWS, w);
                for (int slice = 0; slice < DrawStreams.BLOCK_DRAWS / SLICE; slice++) {
                    evaluate(e, slice, w);
                    beyond += weigh(explanations.get(e).probability(), w);
                    gather(w, into);
                }
            }
            workspaces.add(w);
            return new Block(
                    into,
                    beyond,
                    hasMean ? BlockEstimates.of(into.rate()) : BlockEstimates.withoutMoments(into.rate()));
        }

        private void gather(Workspace w, Gathered into) {
            RateColumns.Columns drawn = w.drawn;
            boolean alike = explanations.size() == 1 && drawn.allValid;
            if (alike) {
                into.rate().add(drawn.rateMetresPerKyr);
            } else {
                into.rate().add(drawn.rateMetresPerKyr, w.weights);
            }
            if (knownHeight.isEmpty()) {
                into.height().add(drawn.heightMetres, w.weights);
            }
            if (!knownAge) {
                into.age().add(drawn.ageKa, w.weights);
            }
            underPrior(w);
            into.rateWithPrior().add(drawn.rateMetresPerKyr, w.weights);
        }

        private Gathered borrow() {
            Gathered used = free.poll();
            if (used == null) {
                return all.emptyCopy();
            }
            used.clear();
            return used;
        }

        /** Weights of propagation, and how many draws lay beyond the curve. */
        private long weigh(double probability, Workspace w) {
            if (w.drawn.allValid) {
                Arrays.fill(w.weights, probability);
                return 0;
            }
            long beyond = 0;
            for (int i = 0; i < w.weights.length; i++) {
                boolean counts = w.drawn.valid[i] > 0;
                w.weights[i] = counts ? probability : 0;
                beyond += counts ? 0 : 1;
            }
            return beyond;
        }

        /** Probabilities of one explanation's inputs in one block, or in its first {@code draws}. */
        private void draw(int explanation, int number, int draws, Workspace w) {
            int dimensions = functions.get(explanation).dimensions();
            double[][] columns = w.points(dimensions, draws);
            if (dimensions > 0) {
                SobolPoints points =
                        SobolPoints.scrambled(streams, key + " / explanation " + explanation, dimensions, number);
                for (int d = 0; d < dimensions; d++) {
                    points.column(d, columns[d]);
                }
            }
        }

        private void evaluate(int explanation, int slice, Workspace w) {
            RateColumns function = functions.get(explanation);
            function.evaluate(w.slice(function.dimensions(), slice), w.drawn);
        }

        Outcome outcome(boolean converged) {
            long draws = (long) estimates.size() * DrawStreams.BLOCK_DRAWS;
            DrawDistribution rate = all.rate().distribution();
            Optional<DrawDistribution> posterior = all.rateWithPrior().totalWeight() > 0
                    ? Optional.of(all.rateWithPrior().distribution())
                            .filter(p -> p.effectiveSampleSize() >= LEAST_EFFECTIVE_DRAWS)
                    : Optional.empty();
            Summary ages = knownAge
                    ? Summary.of(explanations.get(0).ageKa())
                    : all.age().distribution().summary();
            return new Outcome(
                    Rate.of(rate, hasMean),
                    posterior.map(p -> Rate.of(p, true)),
                    prior.isTwoSided() ? posterior.map(p -> 1 - p.cumulativeProbability(0)) : Optional.empty(),
                    Quantity.of(ages, "ka"),
                    Quantity.of(
                            knownHeight
                                    .map(Summary::of)
                                    .orElseGet(() -> all.height().distribution().summary()),
                            "m"),
                    settled((int) draws, converged),
                    (double) beyondCurve / (draws * explanations.size()));
        }

        private LevelAnswer.MonteCarlo settled(int draws, boolean converged) {
            Optional<MonteCarloError> error = MonteCarloError.between(estimates);
            return new LevelAnswer.MonteCarlo(
                    draws,
                    converged,
                    error.map(MonteCarloError::median),
                    error.map(e -> new LevelAnswer.Errors(e.low95(), e.high95())));
        }
    }

    private Workspace borrowWorkspace() {
        Workspace free = workspaces.poll();
        return free == null ? new Workspace() : free;
    }
}
