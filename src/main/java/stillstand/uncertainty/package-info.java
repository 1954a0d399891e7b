/**
 * Uncertain numbers, and the arithmetic of drawing from them.
 *
 * <p><b>Numbers.</b> {@link Uncertain} is a probability distribution with a quantile function, of one of eight kinds.
 *
 * <p><b>Draws</b> come in columns, one array per input and block of {@link DrawStreams#BLOCK_DRAWS}. A column of
 * probabilities becomes a column of values in place ({@link Uncertain#toQuantiles}), and arithmetic runs over columns. The
 * probabilities are
 *
 * <ul>
 *   <li>independent ({@link DrawStreams#probabilities}), for draws that several answers share: an input's key decides who
 *       shares it; or
 *   <li>randomised Sobol' points ({@link SobolPoints}), for the answer of one function of a few inputs: the same error from
 *       far fewer points.
 * </ul>
 *
 * Either way a column is a function of seed, key and block number alone. Blocks may be worked on by any number of threads, as
 * long as their results are kept by number and joined in that order: then the answer is the same to the last bit.
 *
 * <p><b>What the draws say.</b> Each block fills a {@link DrawHistogram}; merged in order they give a
 * {@link DrawDistribution} with its quantiles, equal-tailed and shortest intervals, {@link Summary} and {@link DensityBins}.
 * {@link SortedDraws} reads small samples without binning. {@link BlockEstimates}, {@link AdaptiveStop} and
 * {@link MonteCarloError} decide when there are enough blocks and how far off the answer is for want of more.
 *
 * <p><b>Where the spread comes from</b> is told by {@link SobolIndices}.
 *
 * <p>What does not belong here: units, terraces, ages, sea level; combining several ages of one event (see {@code dating});
 * files and threads. No other place makes a random generator.
 */
@NullMarked
package stillstand.uncertainty;

import org.jspecify.annotations.NullMarked;
