package stillstand.uplift;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.Callable;
import java.util.concurrent.ConcurrentLinkedQueue;
import java.util.concurrent.ExecutionException;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Future;
import stillstand.ledger.RunCancelledException;
import stillstand.ledger.RunMonitor;
import stillstand.shoreline.HeightTerm;
import stillstand.uncertainty.AdaptiveStop;
import stillstand.uncertainty.BlockEstimates;
import stillstand.uncertainty.DrawDistribution;
import stillstand.uncertainty.DrawHistogram;
import stillstand.uncertainty.DrawStreams;
import stillstand.uncertainty.Interval;
import stillstand.uncertainty.MonteCarloError;
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
    /** A rate has no mean where its age may come this near to zero, as a part of the median age. */
    private static final double NEAR_ZERO = 0.02;

    private static final double RARE = 1e-6;
    /** Enough draws to choose the range of a histogram. */
    private static final int PILOT_DRAWS = 1 << 11;

    private final DrawStreams streams;
    private final DrawPlan plan;
    private final ExecutorService executor;
    private final RunMonitor monitor;
    private final ConcurrentLinkedQueue<RateColumns.Columns> columns = new ConcurrentLinkedQueue<>();

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
     * @param rateWithPrior under the prior of the rate; absent where the prior excludes every draw
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

    /** What one block of draws adds. */
    private record Block(
            DrawHistogram rate,
            DrawHistogram rateWithPrior,
            DrawHistogram height,
            DrawHistogram age,
            long beyondCurve,
            BlockEstimates estimates) {}

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
        List<Block> blocks = new ArrayList<>();
        blocks.add(question.pilot());
        AdaptiveStop stop = plan.stop();
        DrawHistogram rate = blocks.get(0).rate().emptyCopy();
        rate.merge(blocks.get(0).rate());
        boolean converged = false;
        boolean goOn = plan.mostBlocks() > 1;
        while (goOn) {
            int wanted = Math.max(plan.leastBlocks() - blocks.size(), BATCH);
            int upTo = Math.min(blocks.size() + wanted, plan.mostBlocks());
            for (Block block : question.draw(blocks.size(), upTo, blocks.get(0))) {
                blocks.add(block);
                rate.merge(block.rate());
                if (blocks.size() < plan.leastBlocks()) {
                    continue;
                }
                AdaptiveStop.Decision decision = stop.after(
                        blocks.stream().map(Block::estimates).toList(), spread(rate, question.hasMean));
                converged = decision == AdaptiveStop.Decision.CONVERGED;
                goOn = decision == AdaptiveStop.Decision.GO_ON;
                if (!goOn) {
                    break;
                }
            }
        }
        return question.outcome(blocks, rate, converged);
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
        private final boolean hasMean;

        Question(
                String key,
                List<HeightTerm> height,
                Uncertain lowering,
                List<? extends SeaAtLevel> explanations,
                RatePrior prior) {
            this.key = key;
            this.explanations = explanations;
            this.prior = prior;
            for (SeaAtLevel sea : explanations) {
                functions.add(new RateColumns(height, lowering, sea));
            }
            hasMean = explanations.stream().allMatch(sea -> keepsAwayFromZero(sea.ageKa()));
        }

        /** The first block, which also sets the ranges of all histograms. */
        Block pilot() {
            int each = PILOT_DRAWS;
            double[][] all = new double[3][explanations.size() * each];
            double[] weights = new double[explanations.size() * each];
            double[] posteriorWeights = new double[weights.length];
            RateColumns.Columns drawn = new RateColumns.Columns(each);
            double[] ofOne = new double[each];
            for (int e = 0; e < explanations.size(); e++) {
                evaluate(e, 0, drawn);
                weigh(explanations.get(e).probability(), drawn, ofOne);
                System.arraycopy(drawn.rateMetresPerKyr, 0, all[0], e * each, each);
                System.arraycopy(drawn.heightMetres, 0, all[1], e * each, each);
                System.arraycopy(drawn.ageKa, 0, all[2], e * each, each);
                System.arraycopy(ofOne, 0, weights, e * each, each);
                underPrior(drawn, ofOne);
                System.arraycopy(ofOne, 0, posteriorWeights, e * each, each);
            }
            boolean possible = Arrays.stream(posteriorWeights).anyMatch(w -> w > 0);
            Block shape = new Block(
                    like(all[0], weights),
                    like(all[0], possible ? posteriorWeights : weights),
                    like(all[1], weights),
                    like(all[2], weights),
                    0,
                    new BlockEstimates(0, 0, new Interval(0, 0)));
            return block(0, shape);
        }

        private DrawHistogram like(double[] draws, double[] weights) {
            return DrawHistogram.forDrawsLike(SortedDraws.weighted(draws, weights));
        }

        /** Turns weights of propagation into weights of the posterior, in place. */
        private void underPrior(RateColumns.Columns drawn, double[] weights) {
            for (int i = 0; i < weights.length; i++) {
                weights[i] /= drawn.ageKa[i];
            }
            prior.weigh(drawn.rateMetresPerKyr, weights);
        }

        /** Blocks {@code from} to below {@code upTo}, in order. */
        List<Block> draw(int from, int upTo, Block shape) {
            List<Callable<Block>> tasks = new ArrayList<>();
            for (int b = from; b < upTo; b++) {
                int number = b;
                tasks.add(() -> block(number, shape));
            }
            List<Block> drawn = new ArrayList<>();
            try {
                for (Future<Block> future : executor.invokeAll(tasks)) {
                    drawn.add(future.get());
                }
            } catch (InterruptedException e) {
                Thread.currentThread().interrupt();
                throw new RunCancelledException();
            } catch (ExecutionException e) {
                if (e.getCause() instanceof RuntimeException cause) {
                    throw cause;
                }
                throw new IllegalStateException(e.getCause());
            }
            return drawn;
        }

        private Block block(int number, Block shape) {
            if (monitor.isCancelled()) {
                throw new RunCancelledException();
            }
            DrawHistogram rate = shape.rate().emptyCopy();
            DrawHistogram withPrior = shape.rateWithPrior().emptyCopy();
            DrawHistogram height = shape.height().emptyCopy();
            DrawHistogram age = shape.age().emptyCopy();
            long beyondCurve = 0;
            RateColumns.Columns drawn = borrow();
            double[] weights = new double[DrawStreams.BLOCK_DRAWS];
            for (int e = 0; e < explanations.size(); e++) {
                evaluate(e, number, drawn);
                beyondCurve += weigh(explanations.get(e).probability(), drawn, weights);
                if (explanations.size() == 1 && drawn.allValid) {
                    rate.add(drawn.rateMetresPerKyr);
                    height.add(drawn.heightMetres);
                } else {
                    rate.add(drawn.rateMetresPerKyr, weights);
                    height.add(drawn.heightMetres, weights);
                    age.add(drawn.ageKa, weights);
                }
                underPrior(drawn, weights);
                withPrior.add(drawn.rateMetresPerKyr, weights);
            }
            columns.add(drawn);
            DrawDistribution draws = rate.distribution();
            return new Block(
                    rate,
                    withPrior,
                    height,
                    age,
                    beyondCurve,
                    hasMean ? BlockEstimates.of(draws) : BlockEstimates.withoutMoments(draws));
        }

        private long weigh(double probability, RateColumns.Columns drawn, double[] weights) {
            long beyondCurve = 0;
            for (int i = 0; i < weights.length; i++) {
                boolean counts = drawn.allValid || drawn.valid[i] > 0;
                weights[i] = counts ? probability : 0;
                beyondCurve += counts ? 0 : 1;
            }
            return beyondCurve;
        }

        private void evaluate(int explanation, int number, RateColumns.Columns out) {
            RateColumns function = functions.get(explanation);
            double[][] probabilities = new double[function.dimensions()][out.ageKa.length];
            if (function.dimensions() > 0) {
                SobolPoints points = SobolPoints.scrambled(
                        streams, key + " / explanation " + explanation, function.dimensions(), number);
                for (int d = 0; d < probabilities.length; d++) {
                    points.column(d, probabilities[d]);
                }
            }
            function.evaluate(probabilities, out);
        }

        Outcome outcome(List<Block> blocks, DrawHistogram rate, boolean converged) {
            DrawHistogram withPrior = blocks.get(0).rateWithPrior().emptyCopy();
            DrawHistogram height = blocks.get(0).height().emptyCopy();
            DrawHistogram age = blocks.get(0).age().emptyCopy();
            long beyondCurve = 0;
            for (Block block : blocks) {
                withPrior.merge(block.rateWithPrior());
                height.merge(block.height());
                age.merge(block.age());
                beyondCurve += block.beyondCurve();
            }
            long draws = (long) blocks.size() * DrawStreams.BLOCK_DRAWS;
            Optional<DrawDistribution> posterior =
                    withPrior.totalWeight() > 0 ? Optional.of(withPrior.distribution()) : Optional.empty();
            Summary ages = explanations.size() == 1 && beyondCurve == 0
                    ? Summary.of(explanations.get(0).ageKa())
                    : age.distribution().summary();
            return new Outcome(
                    Rate.of(rate.distribution(), hasMean),
                    posterior.map(p -> Rate.of(p, true)),
                    prior.isTwoSided() ? posterior.map(p -> 1 - p.cumulativeProbability(0)) : Optional.empty(),
                    Quantity.of(ages, "ka"),
                    Quantity.of(height.distribution().summary(), "m"),
                    settled(blocks, (int) draws, converged),
                    (double) beyondCurve / (draws * explanations.size()));
        }

        private LevelAnswer.MonteCarlo settled(List<Block> blocks, int draws, boolean converged) {
            Optional<MonteCarloError> error = MonteCarloError.between(
                    blocks.stream().map(Block::estimates).toList());
            return new LevelAnswer.MonteCarlo(
                    draws,
                    converged,
                    error.map(MonteCarloError::median),
                    error.map(e -> new LevelAnswer.Errors(e.low95(), e.high95())));
        }
    }

    private RateColumns.Columns borrow() {
        RateColumns.Columns free = columns.poll();
        return free == null ? new RateColumns.Columns(DrawStreams.BLOCK_DRAWS) : free;
    }
}
