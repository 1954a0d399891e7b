/**
 * Sea-level curves, highstands and their errors. Knows nothing of the levels that a coast preserves.
 */
@NullMarked
package stillstand.sealevel;

import org.jspecify.annotations.NullMarked;
