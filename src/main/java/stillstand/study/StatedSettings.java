package stillstand.study;

import java.util.List;
import java.util.Map;
import java.util.function.UnaryOperator;
import stillstand.ledger.Assumption;
import stillstand.ledger.InputProblem;

/**
 * Settings, and where in their file each was stated.
 *
 * @param file name of the file
 * @param settings with every default filled in
 * @param defaults a ledger line for each key that was not stated
 * @param places place of each stated key by its path, such as {@code sea_level.curves[0].id}
 */
public record StatedSettings(
        String file, StudySettings settings, List<Assumption> defaults, Map<String, Place> places) {
    public StatedSettings {
        defaults = List.copyOf(defaults);
        places = Map.copyOf(places);
    }

    /** Line and column of a value, each from 1. */
    public record Place(long line, int column) {}

    /** Settings made in memory, with no file behind them. */
    public static StatedSettings of(StudySettings settings) {
        return new StatedSettings("study.json", settings, List.of(), Map.of());
    }

    /** The same with other settings, as the command line asks for them. */
    public StatedSettings with(UnaryOperator<StudySettings> changes) {
        return new StatedSettings(file, changes.apply(settings), defaults, places);
    }

    /** Whether the file states a key itself. */
    public boolean states(String keyPath) {
        return places.containsKey(keyPath);
    }

    /** A problem at a key, or at the whole file where the key is not stated. */
    public InputProblem problem(String keyPath, String found, String expected) {
        Place place = places.getOrDefault(keyPath, new Place(0, 0));
        return new InputProblem(file, place.line(), place.column(), keyPath, found, expected);
    }
}
