/**
 * Ages: what dates say, alone and together. Knows nothing of levels, curves or rates.
 */
@NullMarked
package stillstand.dating;

import org.jspecify.annotations.NullMarked;
