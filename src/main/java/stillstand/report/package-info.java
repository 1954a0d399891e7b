/**
 * How a result reads, in words. Computes nothing.
 */
@NullMarked
package stillstand.report;

import org.jspecify.annotations.NullMarked;
