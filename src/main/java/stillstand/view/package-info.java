/**
 * The window: one {@code …View} (controls) and one {@code …Model} (state, no control inside) for each area. The only package
 * that knows JavaFX. Estimates nothing and checks nothing itself.
 */
@NullMarked
package stillstand.view;

import org.jspecify.annotations.NullMarked;
