/**
 * Uncertain numbers and what is done with them: quantiles, draws, randomised Sobol' points, intervals, stopping rules. Knows nothing of terraces, curves or files.
 */
@NullMarked
package stillstand.uncertainty;

import org.jspecify.annotations.NullMarked;
