package stillstand.study;

import static stillstand.ledger.InputProblem.quote;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import stillstand.shoreline.StageChoice;

/** What a cell says of a level's highstand: {@code 5e}, several as {@code 5a|5c}, or {@code !5e} for none of it. */
final class StageChoiceText {
    private StageChoiceText() {}

    static StageChoice read(RowReader row, String header, StageLabels labels) {
        List<String> only = new ArrayList<>();
        List<String> never = new ArrayList<>();
        if (row.text(header).isEmpty()) {
            return StageChoice.ANY;
        }
        for (String part : row.text(header).split("\\|", -1)) {
            boolean forbids = part.strip().startsWith("!");
            String name = forbids ? part.strip().substring(1).strip() : part.strip();
            if (name.isEmpty()) {
                row.problem(header, quote(row.text(header)), "stages such as \"5e\", \"5a|5c\" or \"!5e\"");
                return StageChoice.ANY;
            }
            Optional<String> label = labels.labelOf(name);
            if (label.isPresent()) {
                (forbids ? never : only).add(label.get());
            } else if (!forbids || !labels.isStage(name)) {
                row.problem(header, quote(name), labels.expected(name));
            }
        }
        if (only.stream().anyMatch(never::contains)) {
            row.problem(header, quote(row.text(header)), "no stage both asked for and forbidden");
            return StageChoice.ANY;
        }
        return new StageChoice(only, never);
    }
}
