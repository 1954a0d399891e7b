package stillstand.study;

import java.util.List;
import java.util.Optional;
import stillstand.ledger.NearestName;
import stillstand.sealevel.HighstandTable;
import stillstand.sealevel.Stage;
import stillstand.sealevel.StageTable;

/**
 * The labels by which a level may name its highstand at a site.
 *
 * @param table the highstands in use there
 * @param stages give other names, and what is a stage at all
 */
record StageLabels(HighstandTable table, StageTable stages) {
    /** The label in use for a name: itself, or the stage's label where the name is another of its names. */
    Optional<String> labelOf(String name) {
        if (table.find(name).isPresent()) {
            return Optional.of(name);
        }
        return stages.find(name)
                .map(Stage::label)
                .filter(label -> table.find(label).isPresent());
    }

    /** Whether it is a stage, though perhaps one that the table lacks. */
    boolean isStage(String name) {
        return stages.find(name).isPresent();
    }

    /** What to expect in place of a name that has no row. */
    String expected(String name) {
        List<String> labels = table.stages();
        if (isStage(name)) {
            return "a highstand that \"" + table.id() + "\" has (" + String.join(", ", labels) + ")";
        }
        return "a highstand of \"" + table.id() + "\""
                + NearestName.of(name, labels)
                        .map(nearest -> " (nearest: \"" + nearest + "\")")
                        .orElse(" (" + String.join(", ", labels) + ")");
    }
}
