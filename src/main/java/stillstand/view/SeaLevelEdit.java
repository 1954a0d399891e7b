package stillstand.view;

import java.util.List;
import java.util.Optional;

/**
 * The sea level that the user wants: {@code sea_level.curves} and {@code sea_level.highstands.overrides} of the study.
 *
 * @param curves ids, one or more
 * @param overrides id of the table that replaces the curve's own picks; absent = none does
 */
public record SeaLevelEdit(List<String> curves, Optional<String> overrides) {
    public SeaLevelEdit {
        curves = List.copyOf(curves);
        if (curves.isEmpty()) {
            throw new IllegalArgumentException("curves must be one or more but there is none");
        }
    }
}
