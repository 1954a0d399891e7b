package stillstand.sensitivity;

import java.util.Arrays;
import org.apache.commons.rng.UniformRandomProvider;
import stillstand.ledger.RunCancelledException;
import stillstand.ledger.RunMonitor;

/**
 * What a measurement may be expected to do to a rate: the mean, over results that the draws foretell, of the width of the 95 %
 * interval once the draws are weighed by how well each agrees with the result (importance weights; nothing is run again).
 *
 * <p>The change is a geometric mean, {@code exp(E ln(width then / width now)) - 1}: where a rare result would upset a flight, the
 * interval can become many times wider, and an arithmetic mean would tell of that result alone.
 *
 * <p>A result that stems from a draw is weighed against the draws of all other blocks, never its own: a draw would always agree
 * best with its own result, and make every measurement look too good. The error is the delete-one-block jackknife of the whole
 * calculation. Certainty of pairings is the probability of the most probable reading of a level, averaged over levels.
 *
 * @param width95 width of the 95 % interval (equal tails) as it is, m/kyr
 * @param expectedWidth95 its arithmetic mean width with the measurement, m/kyr
 * @param change geometric mean of its width with the measurement over that without, less 1
 * @param changeError one standard error of the calculation of {@code change}
 * @param probabilityWider that the measurement makes it wider
 * @param certainty of the pairings as it is; 0 where there are no pairings
 * @param expectedCertainty with the measurement
 * @param certaintyError one standard error of the calculation of their difference
 * @param effectiveDraws to how many equal draws the weighed ones amount after a result: the median over results (Kish 1965)
 */
record ExpectedNarrowing(
        double width95,
        double expectedWidth95,
        double change,
        double changeError,
        double probabilityWider,
        double certainty,
        double expectedCertainty,
        double certaintyError,
        double effectiveDraws) {

    /**
     * @param outcomes how many results to try, in all blocks together
     * @param random the same state for each measurement of a ranking, so that their differences are known better than each
     * @throws RunCancelledException if the monitor asks to stop
     */
    static ExpectedNarrowing of(
            RateDraws draws, ForetoldResult foretold, int outcomes, UniformRandomProvider random, RunMonitor monitor) {
        return new Calculation(draws, foretold, monitor).run(outcomes, random);
    }

    private static final class Calculation {
        /** A single draw has no width; its logarithm must stay finite. */
        private static final double LEAST_RATIO = 1e-3;

        private final RateDraws draws;
        private final ForetoldResult foretold;
        private final RunMonitor monitor;
        private final int blocks;
        private final double[] blockTotals;
        /** Sums over results without each block, and last without none: of their weights, and of what is averaged. */
        private final double[] outcomeWeight;

        private final double[] before;
        private final double[] after;
        private final double[] logChange;
        private final double[] wider;
        /** Widths and certainties without the block at hand (and each other), before any measurement. */
        private final double[] widthNow;

        private final double[] certaintyNow;
        private final double[] sureBefore;
        private final double[] sureAfter;

        Calculation(RateDraws draws, ForetoldResult foretold, RunMonitor monitor) {
            this.draws = draws;
            this.foretold = foretold;
            this.monitor = monitor;
            blocks = draws.blockCount;
            blockTotals = draws.blockTotals(draws.weights);
            outcomeWeight = new double[blocks + 1];
            before = new double[blocks + 1];
            after = new double[blocks + 1];
            logChange = new double[blocks + 1];
            wider = new double[blocks + 1];
            widthNow = new double[blocks + 1];
            certaintyNow = new double[blocks + 1];
            sureBefore = new double[blocks + 1];
            sureAfter = new double[blocks + 1];
        }

        ExpectedNarrowing run(int outcomes, UniformRandomProvider random) {
            int each = Math.max(1, outcomes / blocks);
            double[] effective = new double[each * blocks];
            double[] weighed = new double[draws.count()];
            for (int block = 0; block < blocks; block++) {
                startBlock(block);
                for (int i = 0; i < each; i++) {
                    double place = (i + 0.5) / each * blockTotals[block];
                    double choice = probability(random);
                    double result = foretold.result(drawAt(block, place), choice, probability(random));
                    if (monitor.isCancelled()) {
                        throw new RunCancelledException();
                    }
                    for (int k = 0; k < weighed.length; k++) {
                        weighed[k] = draws.blocks[k] == block ? 0 : draws.weights[k] * foretold.density(result, k);
                    }
                    effective[block * each + i] = effective(weighed);
                    double share = blockTotals[block] / each;
                    add(weighed, block, share);
                }
            }
            return result(effective);
        }

        private static double probability(UniformRandomProvider random) {
            return ((random.nextLong() >>> 12) + 0.5) * 0x1p-52;
        }

        private static double effective(double[] weight) {
            double sum = 0;
            double squares = 0;
            for (double w : weight) {
                sum += w;
                squares += w * w;
            }
            return squares > 0 ? sum * sum / squares : 0;
        }

        private int drawAt(int block, double place) {
            double sum = 0;
            int last = 0;
            for (int k = 0; k < draws.count(); k++) {
                if (draws.blocks[k] == block) {
                    sum += draws.weights[k];
                    last = k;
                    if (sum > place) {
                        break;
                    }
                }
            }
            return last;
        }

        /** Width and certainty as they are without block {@code own}, and without it and each other block. */
        private void startBlock(int own) {
            double total = Arrays.stream(blockTotals).sum() - blockTotals[own];
            double[][][] readings = readings(draws.weights);
            for (int out = 0; out <= blocks; out++) {
                if (out != own) {
                    double left = out < blocks ? total - blockTotals[out] : total;
                    widthNow[out] = draws.width95(draws.weights, left, own, out);
                    certaintyNow[out] = certainty(readings, own, out);
                    outcomeWeight[out] += blockTotals[own];
                    before[out] += blockTotals[own] * widthNow[out];
                    sureBefore[out] += blockTotals[own] * certaintyNow[out];
                }
            }
        }

        /** Adds what a result from block {@code own} does, in the same way. */
        private void add(double[] weight, int own, double share) {
            double[] totals = draws.blockTotals(weight);
            double total = Arrays.stream(totals).sum() - totals[own];
            double[][][] readings = readings(weight);
            for (int out = 0; out <= blocks; out++) {
                if (out == own) {
                    continue;
                }
                double left = out < blocks ? total - totals[out] : total;
                // where no draw agrees with the result at all nothing is claimed of it
                double width = left > 0 ? draws.width95(weight, left, own, out) : widthNow[out];
                after[out] += share * width;
                logChange[out] += share * Math.log(Math.max(width / widthNow[out], LEAST_RATIO));
                wider[out] += width > widthNow[out] ? share : 0;
                sureAfter[out] += share * (left > 0 ? certainty(readings, own, out) : certaintyNow[out]);
            }
        }

        /** Sums of weights by block, level and reading. */
        private double[][][] readings(double[] weight) {
            double[][][] sums = new double[blocks][draws.readings.length][draws.readingCount];
            for (int i = 0; i < draws.readings.length; i++) {
                int[] reading = draws.readings[i];
                for (int k = 0; k < weight.length; k++) {
                    sums[draws.blocks[k]][i][reading[k]] += weight[k];
                }
            }
            return sums;
        }

        private double certainty(double[][][] readings, int own, int out) {
            int levels = draws.readings.length;
            double sum = 0;
            for (int i = 0; i < levels; i++) {
                double all = 0;
                double best = 0;
                for (int r = 0; r < draws.readingCount; r++) {
                    double weight = 0;
                    for (int block = 0; block < blocks; block++) {
                        weight += block == own || block == out ? 0 : readings[block][i][r];
                    }
                    all += weight;
                    best = Math.max(best, weight);
                }
                sum += best / all / levels;
            }
            return sum;
        }

        private ExpectedNarrowing result(double[] effective) {
            double[] change = new double[blocks + 1];
            double[] gain = new double[blocks + 1];
            for (int out = 0; out <= blocks; out++) {
                change[out] = Math.expm1(logChange[out] / outcomeWeight[out]);
                gain[out] = (sureAfter[out] - sureBefore[out]) / outcomeWeight[out];
            }
            Arrays.sort(effective);
            double total = outcomeWeight[blocks];
            return new ExpectedNarrowing(
                    before[blocks] / total,
                    after[blocks] / total,
                    change[blocks],
                    jackknife(change),
                    wider[blocks] / total,
                    sureBefore[blocks] / total,
                    sureAfter[blocks] / total,
                    jackknife(gain),
                    effective[effective.length / 2]);
        }

        /** Standard error from the values without each block; the last value, without none, is not used. */
        private double jackknife(double[] without) {
            double mean = 0;
            for (int out = 0; out < blocks; out++) {
                mean += without[out] / blocks;
            }
            double squares = 0;
            for (int out = 0; out < blocks; out++) {
                squares += (without[out] - mean) * (without[out] - mean);
            }
            return Math.sqrt(squares * (blocks - 1) / blocks);
        }
    }
}
