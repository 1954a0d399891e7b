package stillstand.sealevel;

import java.util.HashSet;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import stillstand.ledger.NearestName;

/**
 * The stages that curves are searched for.
 *
 * @param stages young to old, windows apart
 */
public record StageTable(List<Stage> stages) {
    /** @throws IllegalArgumentException if two stages share a name, or their windows are out of order or overlap */
    public StageTable {
        stages = List.copyOf(stages);
        Set<String> names = new HashSet<>();
        double lastKa = 0;
        for (Stage stage : stages) {
            if (!names.add(stage.label())
                    || stage.alsoCalled().filter(name -> !names.add(name)).isPresent()) {
                throw new IllegalArgumentException("stage '" + stage.label() + "' shares a name with another");
            }
            if (!(stage.fromKa() >= lastKa)) {
                throw new IllegalArgumentException("window of stage '" + stage.label() + "' starts at " + stage.fromKa()
                        + " ka, before the window above it ends at " + lastKa + " ka");
            }
            lastKa = stage.toKa();
        }
    }

    /** The stage of this label or other name, if there is one. */
    public Optional<Stage> find(String name) {
        return stages.stream()
                .filter(stage -> stage.label().equals(name)
                        || stage.alsoCalled().filter(name::equals).isPresent())
                .findFirst();
    }

    /** The stage of a known name most like this one, for messages; empty where none is like it. */
    public Optional<String> nearest(String name) {
        return NearestName.of(name, stages.stream().map(Stage::label).toList());
    }

    /** The class of the stage in whose window the age lies, if any. */
    public Optional<HighstandClass> classAt(double ageKa) {
        return stages.stream()
                .filter(stage -> stage.fromKa() <= ageKa && ageKa <= stage.toKa())
                .map(Stage::highstandClass)
                .findFirst();
    }
}
