package stillstand.study;

import java.util.List;
import java.util.Optional;

/**
 * How to get a result again.
 *
 * @param version of Stillstand
 * @param seed of all random draws
 * @param generator name of the random scheme
 * @param inputs the files the study was read from
 * @param started date and time in ISO 8601; set by whoever holds a clock
 * @param seconds the run took; set by whoever holds a clock
 */
public record Provenance(
        String version,
        long seed,
        String generator,
        List<InputFile> inputs,
        Optional<String> started,
        Optional<Double> seconds) {
    public Provenance {
        inputs = List.copyOf(inputs);
    }
}
