package stillstand.study;

import java.util.LinkedHashSet;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import java.util.stream.Collectors;
import stillstand.ledger.NearestName;
import stillstand.sealevel.HighstandTable;
import stillstand.sealevel.Stage;
import stillstand.sealevel.StageTable;

/**
 * The labels by which a level may name its highstand at a site.
 *
 * @param tables the highstands in use there, of each account of sea level
 * @param stages give other names, and what is a stage at all
 */
record StageLabels(List<HighstandTable> tables, StageTable stages) {
    StageLabels {
        tables = List.copyOf(tables);
    }

    /** The label in use for a name: itself, or the stage's label where the name is another of its names. */
    Optional<String> labelOf(String name) {
        if (isShown(name)) {
            return Optional.of(name);
        }
        return stages.find(name).map(Stage::label).filter(this::isShown);
    }

    private boolean isShown(String label) {
        return tables.stream().anyMatch(table -> table.find(label).isPresent());
    }

    /** Whether it is a stage, though perhaps one that the tables lack. */
    boolean isStage(String name) {
        return stages.find(name).isPresent();
    }

    /** What to expect in place of a name that has no row. */
    String expected(String name) {
        Set<String> labels = new LinkedHashSet<>();
        tables.forEach(table -> labels.addAll(table.stages()));
        String ids = tables.stream().map(table -> "\"" + table.id() + "\"").collect(Collectors.joining(" or "));
        String all = " (" + String.join(", ", labels) + ")";
        if (isStage(name)) {
            return "a highstand that " + ids + " has" + all;
        }
        return "a highstand of " + ids
                + NearestName.of(name, labels)
                        .map(nearest -> " (nearest: \"" + nearest + "\")")
                        .orElse(all);
    }
}
