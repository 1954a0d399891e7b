/**
 * Figures of a result: what each shows, how it looks, and its bytes as SVG, PDF or PNG. Everything is drawn from a
 * {@link stillstand.study.StudyResult} alone, so that a figure can be had again from {@code results.json}. No estimate is
 * made here, no file is written, and no class of JavaFX is known.
 */
@NullMarked
package stillstand.figure;

import org.jspecify.annotations.NullMarked;
