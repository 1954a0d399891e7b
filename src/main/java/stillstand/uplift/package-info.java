/**
 * Rates of vertical motion: of a level, of a flight. Knows nothing of tables, files or clocks.
 */
@NullMarked
package stillstand.uplift;

import org.jspecify.annotations.NullMarked;
