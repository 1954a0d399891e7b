/**
 * The door: picks what to start. Everything else lives in a package below.
 */
@NullMarked
package stillstand;

import org.jspecify.annotations.NullMarked;
