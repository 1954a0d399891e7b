package stillstand.comparison;

import java.util.Map;
import java.util.Optional;
import stillstand.uplift.Rate;
import stillstand.uplift.SiteCase;

/**
 * A site with what a run has found at it.
 *
 * @param site with its sea level and prior
 * @param flight rate of its flight; absent where none was matched
 * @param levels rates of its levels by their names
 * @param areaKm2 that it stands for, above 0
 */
public record SiteToCompare(SiteCase site, Optional<Rate> flight, Map<String, Rate> levels, Optional<Double> areaKm2) {
    public SiteToCompare {
        levels = Map.copyOf(levels);
        if (areaKm2.isPresent() && !(areaKm2.get() > 0 && areaKm2.get() < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("areaKm2 must be above 0 but is " + areaKm2.get());
        }
    }

    String name() {
        return site.site().name();
    }
}
