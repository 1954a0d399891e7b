/**
 * Disk to tables and json and back: study folders, curve packages, results. The only user of the CSV and json libraries; holds no rule of the science.
 */
@NullMarked
package stillstand.files;

import org.jspecify.annotations.NullMarked;
