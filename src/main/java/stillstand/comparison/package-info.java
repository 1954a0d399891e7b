/**
 * How sites compare: differences of their rates, pooling, tilt, means over areas, up or down. Knows nothing of tables, files or
 * clocks; the joint draws it reads are made in {@code uplift}.
 */
@NullMarked
package stillstand.comparison;

import org.jspecify.annotations.NullMarked;
