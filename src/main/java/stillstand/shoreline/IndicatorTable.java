package stillstand.shoreline;

import java.util.List;
import java.util.Optional;
import stillstand.ledger.NearestName;

/**
 * The kinds of landform and deposit that are known by name.
 *
 * @param indicators each id once
 */
public record IndicatorTable(List<Indicator> indicators) {
    /** @throws IllegalArgumentException if an id stands twice */
    public IndicatorTable {
        indicators = List.copyOf(indicators);
        if (indicators.stream().map(Indicator::id).distinct().count() < indicators.size()) {
            throw new IllegalArgumentException("an indicator must stand in the table once");
        }
    }

    /** The indicator of an id. */
    public Optional<Indicator> find(String id) {
        return indicators.stream()
                .filter(indicator -> indicator.id().equals(id))
                .findFirst();
    }

    /** All ids, in the order of the table. */
    public List<String> ids() {
        return indicators.stream().map(Indicator::id).toList();
    }

    /** The id that an unknown one was probably meant to be. */
    public Optional<String> nearestId(String unknown) {
        return NearestName.of(unknown, ids());
    }
}
