/**
 * A whole study: its tables, every check on them, the runner and its result. Knows no disk, no window, no clock.
 */
@NullMarked
package stillstand.study;

import org.jspecify.annotations.NullMarked;
