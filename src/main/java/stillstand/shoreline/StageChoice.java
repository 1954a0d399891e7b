package stillstand.shoreline;

import java.util.ArrayList;
import java.util.Collection;
import java.util.List;
import java.util.Optional;
import java.util.stream.Collectors;
import java.util.stream.Stream;

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

    /** Tied to one stage, whatever was said before. */
    public static StageChoice pinnedTo(String stage) {
        return new StageChoice(List.of(stage), List.of());
    }

    /** The same, with this stage forbidden too; a choice that allowed no other is then for any but this. */
    public StageChoice without(String stage) {
        List<String> left = only.stream().filter(label -> !label.equals(stage)).toList();
        List<String> none = new ArrayList<>(never);
        if (left.isEmpty() && !none.contains(stage)) {
            none.add(stage);
        }
        return new StageChoice(left, left.isEmpty() ? none : never);
    }

    /** As a cell of {@code levels.csv} says it: {@code 5e}, {@code 5a|5c}, {@code !5e}; blank for nothing said. */
    public String text() {
        return Stream.concat(only.stream(), never.stream().map(label -> "!" + label))
                .collect(Collectors.joining("|"));
    }
}
