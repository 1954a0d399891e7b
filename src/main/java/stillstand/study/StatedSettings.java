package stillstand.study;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Objects;
import java.util.Set;
import java.util.TreeMap;
import java.util.TreeSet;
import java.util.function.Function;
import java.util.function.UnaryOperator;
import java.util.stream.Collectors;
import stillstand.ledger.Assumption;
import stillstand.ledger.InputProblem;
import stillstand.ledger.InputWarning;
import stillstand.study.StudySettings.WeightedCurve;

/**
 * Settings, and where in their file each was stated.
 *
 * @param file name of the file
 * @param settings with every default filled in
 * @param defaults a ledger line for each key that was not stated
 * @param places place of each stated key by its path, such as {@code sea_level.curves[0].id}
 * @param replaced paths of the keys whose values come from the command line instead
 */
public record StatedSettings(
        String file,
        StudySettings settings,
        List<Assumption> defaults,
        Map<String, Place> places,
        Set<String> replaced) {
    /** What problems and warnings call the file of settings that come from no file. */
    static final String COMMAND_LINE = "command line";

    static final String CURVES = "sea_level.curves";

    /** What the command line may replace, and how the ledger shows it. */
    private static final Map<String, Function<StudySettings, String>> REPLACEABLE = Map.of(
            "seed",
            settings -> String.valueOf(settings.seed()),
            "leverage",
            settings -> settings.leverage()
                    .map(plan -> "a date to " + plan.dateSigmaKa() + " ka, a survey to " + plan.surveySigmaMetres()
                            + " m (1 sigma)")
                    .orElse("not asked for"),
            CURVES,
            settings -> settings.seaLevel().curves().stream()
                    .map(WeightedCurve::label)
                    .collect(Collectors.joining(", ")));

    public StatedSettings {
        defaults = List.copyOf(defaults);
        places = Map.copyOf(places);
        replaced = Set.copyOf(replaced);
    }

    /** Line and column of a value, each from 1. */
    public record Place(long line, int column) {}

    /** Settings made in memory, with no file behind them. */
    public static StatedSettings of(StudySettings settings) {
        return new StatedSettings("study.json", settings, List.of(), Map.of(), Set.of());
    }

    /** The ledger line of a key that nobody stated. */
    public static Assumption unstated(String keyPath, Object value) {
        return new Assumption(keyPath + " is not stated", String.valueOf(value), "Stillstand's default", "all");
    }

    /** The same with other settings, as the command line asks for them; the ledger says what it replaced. */
    public StatedSettings with(UnaryOperator<StudySettings> changes) {
        StudySettings changed = changes.apply(settings);
        List<Assumption> lines = new ArrayList<>(defaults);
        Map<String, Place> left = new HashMap<>(places);
        Set<String> now = new TreeSet<>(replaced);
        new TreeMap<>(REPLACEABLE).forEach((keyPath, shown) -> {
            if (!Objects.equals(shown.apply(settings), shown.apply(changed))) {
                now.add(keyPath);
                lines.remove(unstated(keyPath, shown.apply(settings)));
                lines.add(new Assumption(keyPath + " is replaced", shown.apply(changed), "the " + COMMAND_LINE, "all"));
                left.keySet().removeIf(path -> path.startsWith(keyPath));
            }
        });
        return new StatedSettings(file, changed, lines, left, now);
    }

    /** Whether the file states a key itself. */
    public boolean states(String keyPath) {
        return places.containsKey(keyPath);
    }

    /** Whether the command line replaced a key. */
    boolean isReplaced(String keyPath) {
        return replaced.contains(keyPath);
    }

    /** A problem at a key, or at the whole file where the key is not stated. */
    public InputProblem problem(String keyPath, String found, String expected) {
        if (isReplaced(keyPath)) {
            return new InputProblem(COMMAND_LINE, 0, 0, keyPath, found, expected);
        }
        Place place = places.getOrDefault(keyPath, new Place(0, 0));
        return new InputProblem(file, place.line(), place.column(), keyPath, found, expected);
    }

    /** A warning at a key, or at the whole file where the key is not stated. */
    InputWarning warning(String keyPath, String message) {
        if (isReplaced(CURVES) && keyPath.startsWith(CURVES)) {
            return new InputWarning(COMMAND_LINE, 0, 0, message);
        }
        Place place = places.getOrDefault(keyPath, new Place(0, 0));
        return new InputWarning(file, place.line(), place.column(), message);
    }
}
