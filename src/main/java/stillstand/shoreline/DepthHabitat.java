package stillstand.shoreline;

import java.util.List;
import java.util.Optional;
import java.util.stream.Stream;
import stillstand.uncertainty.Uncertain;

/**
 * A coral, or an assemblage of corals, and the depths at which it grows.
 *
 * @param id lower-case words joined by hyphens; with the province where the figures hold for one of several
 * @param name in plain words
 * @param province where the figures hold
 * @param otherIds names it also goes by
 * @param depthMetres depth of growth below mean sea level, down positive; absent where none is compiled
 * @param source citation
 * @param note caveats of the figures; "" where there are none
 */
public record DepthHabitat(
        String id,
        String name,
        String province,
        List<String> otherIds,
        Optional<Uncertain> depthMetres,
        String source,
        String note) {
    /** @throws IllegalArgumentException if id, name, province or source is blank */
    public DepthHabitat {
        otherIds = List.copyOf(otherIds);
        if (Stream.of(id, name, province, source).anyMatch(String::isBlank)) {
            throw new IllegalArgumentException("a habitat must have id, name, province and source but has \"" + id
                    + "\", \"" + name + "\", \"" + province + "\", \"" + source + "\"");
        }
    }

    /** Whether the habitat goes by this id or other name. */
    public boolean isCalled(String idOrOtherName) {
        return id.equals(idOrOtherName) || otherIds.contains(idOrOtherName);
    }
}
