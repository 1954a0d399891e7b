package stillstand.study;

import java.util.ArrayList;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Set;
import stillstand.ledger.Assumption;
import stillstand.ledger.InputProblem;
import stillstand.ledger.InputWarning;

/** What checks find as they go: problems, warnings, and what the study rests on. */
final class Findings {
    private final List<InputProblem> problems = new ArrayList<>();
    private final List<InputWarning> warnings = new ArrayList<>();
    private final Set<Assumption> ledger = new LinkedHashSet<>();

    void add(InputProblem problem) {
        problems.add(problem);
    }

    void add(InputWarning warning) {
        warnings.add(warning);
    }

    /** Adds it once, however often it is found. */
    void add(Assumption assumption) {
        ledger.add(assumption);
    }

    int problemCount() {
        return problems.size();
    }

    /** In the order in which a reader meets them. */
    List<InputProblem> problems() {
        return problems.stream().sorted().toList();
    }

    List<InputWarning> warnings() {
        return List.copyOf(warnings);
    }

    List<Assumption> ledger() {
        return List.copyOf(ledger);
    }
}
