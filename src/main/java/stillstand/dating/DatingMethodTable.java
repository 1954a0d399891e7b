package stillstand.dating;

import java.util.List;
import java.util.Optional;
import stillstand.ledger.NearestName;

/**
 * The ways of dating that are known by name.
 *
 * @param methods each id once
 */
public record DatingMethodTable(List<DatingMethod> methods) {
    /** @throws IllegalArgumentException if an id stands twice */
    public DatingMethodTable {
        methods = List.copyOf(methods);
        if (methods.stream().map(DatingMethod::id).distinct().count() < methods.size()) {
            throw new IllegalArgumentException("a method must stand in the table once");
        }
    }

    /** The method of an id. */
    public Optional<DatingMethod> find(String id) {
        return methods.stream().filter(method -> method.id().equals(id)).findFirst();
    }

    /** All ids, in the order of the table. */
    public List<String> ids() {
        return methods.stream().map(DatingMethod::id).toList();
    }

    /** The id that an unknown one was probably meant to be. */
    public Optional<String> nearestId(String unknown) {
        return NearestName.of(unknown, ids());
    }
}
