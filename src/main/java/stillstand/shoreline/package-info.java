/**
 * What a coast preserves: sites, levels, dated samples, and what their heights say of former sea level. Knows nothing of curves or rates.
 */
@NullMarked
package stillstand.shoreline;

import org.jspecify.annotations.NullMarked;
