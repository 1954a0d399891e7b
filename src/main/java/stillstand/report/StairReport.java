package stillstand.report;

import java.util.List;
import java.util.Locale;
import stillstand.uplift.PredictedStair;
import stillstand.uplift.PredictedStair.Step;

/** How a predicted staircase reads. */
public final class StairReport {
    private StairReport() {}

    /**
     * A table, oldest on top as in a cliff.
     *
     * @param heading what it is a staircase of
     */
    public static String text(String heading, PredictedStair stair) {
        PlainTable table = new PlainTable(List.of("Highstand", "Fate", "Age (ka)", "Sea (m)", "Height (m)", "±"), 2);
        for (int i = stair.steps().size() - 1; i >= 0; i--) {
            Step step = stair.steps().get(i);
            table.row(List.of(
                    step.stage(),
                    step.overrunBy().map(by -> "overrun by " + by).orElse("stands"),
                    number(step.ageKa()),
                    number(step.seaLevelMetres()),
                    number(step.heightMetres()),
                    number(step.heightSigmaMetres())));
        }
        return heading + "\n  " + String.join("\n  ", table.lines()) + "\n";
    }

    private static String number(double value) {
        return Wording.number(String.format(Locale.ROOT, "%.1f", value));
    }
}
