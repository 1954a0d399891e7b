/**
 * What an answer hangs on: the choice of curve, each level and sample, what to measure next. Works on answers of
 * {@code uplift}; the engine itself, files and figures do not belong here.
 */
@NullMarked
package stillstand.sensitivity;

import org.jspecify.annotations.NullMarked;
