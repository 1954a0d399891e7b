package stillstand.shoreline;

import java.util.List;
import java.util.Optional;
import java.util.stream.Stream;
import stillstand.ledger.NearestName;

/**
 * The taxa whose depths of growth are known, or that are at least known by name.
 *
 * @param habitats each id or other name once
 */
public record HabitatTable(List<DepthHabitat> habitats) {
    /** @throws IllegalArgumentException if an id or other name stands twice */
    public HabitatTable {
        habitats = List.copyOf(habitats);
        List<String> names = names(habitats);
        if (names.stream().distinct().count() < names.size()) {
            throw new IllegalArgumentException("an id or other name of a habitat must stand in the table once");
        }
    }

    /** The habitat of an id, or of another name it goes by. */
    public Optional<DepthHabitat> find(String taxon) {
        return habitats.stream().filter(habitat -> habitat.isCalled(taxon)).findFirst();
    }

    /** All ids and other names, in the order of the table. */
    public List<String> ids() {
        return names(habitats);
    }

    /** The id or other name that an unknown one was probably meant to be. */
    public Optional<String> nearestId(String unknown) {
        return NearestName.of(unknown, ids());
    }

    private static List<String> names(List<DepthHabitat> habitats) {
        return habitats.stream()
                .flatMap(habitat -> Stream.concat(Stream.of(habitat.id()), habitat.otherIds().stream()))
                .toList();
    }
}
