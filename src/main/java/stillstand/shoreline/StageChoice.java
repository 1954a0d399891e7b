package stillstand.shoreline;

import java.util.Collection;
import java.util.List;
import java.util.Optional;

/**
 * What the user says of the highstand that made a level.
 *
 * @param only labels of which it must be one; empty = any
 * @param never labels of which it is none
 */
public record StageChoice(List<String> only, List<String> never) {
    /** Nothing said. */
    public static final StageChoice ANY = new StageChoice(List.of(), List.of());

    public StageChoice {
        only = List.copyOf(only);
        never = List.copyOf(never);
        if (only.stream().anyMatch(never::contains)) {
            throw new IllegalArgumentException(
                    "a label must not be both asked for and forbidden: " + only + ", " + never);
        }
    }

    /** Whether a stage may have made the level. */
    public boolean allows(String stage) {
        return (only.isEmpty() || only.contains(stage)) && !never.contains(stage);
    }

    /** The one stage the level is tied to, where it is tied to just one. */
    public Optional<String> pinned() {
        return only.size() == 1 ? Optional.of(only.get(0)) : Optional.empty();
    }

    /** The stages of {@code labels} that may have made the level, in their order. */
    public List<String> among(Collection<String> labels) {
        return labels.stream().filter(this::allows).toList();
    }
}
