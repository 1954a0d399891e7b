package stillstand.ledger;

import java.util.List;
import java.util.Optional;

/**
 * What a reader or a check hands back: the value where there is one, and everything wrong or odd about it.
 *
 * @param value present where the problems left something to use
 * @param problems what stops a run, in reading order
 * @param warnings what is odd
 */
public record Loaded<T>(Optional<T> value, List<InputProblem> problems, List<InputWarning> warnings) {
    public Loaded {
        problems = List.copyOf(problems);
        warnings = List.copyOf(warnings);
        if (value.isEmpty() && problems.isEmpty()) {
            throw new IllegalArgumentException("nothing loaded, yet no problem says why");
        }
    }

    /** A value without fault. */
    public static <T> Loaded<T> of(T value) {
        return new Loaded<>(Optional.of(value), List.of(), List.of());
    }

    /** No value, for these reasons. */
    public static <T> Loaded<T> failed(List<InputProblem> problems) {
        return new Loaded<>(Optional.empty(), problems, List.of());
    }
}
