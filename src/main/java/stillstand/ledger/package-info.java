/**
 * What every floor hands up: assumptions, problems and warnings of the input, progress. Knows nothing of sea level, rates or files.
 */
@NullMarked
package stillstand.ledger;

import org.jspecify.annotations.NullMarked;
