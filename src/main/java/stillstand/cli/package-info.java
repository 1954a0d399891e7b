/**
 * The commands: thin, they call files, study and report. The only user of the standard streams.
 */
@NullMarked
package stillstand.cli;

import org.jspecify.annotations.NullMarked;
