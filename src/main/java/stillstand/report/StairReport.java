package stillstand.report;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import stillstand.uplift.PredictedStair;
import stillstand.uplift.PredictedStair.Step;

/** How a predicted staircase reads. */
public final class StairReport {
    private static final int NAME_WIDTH = 16;

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

    /**
     * Several staircases side by side: the height of each highstand's shoreline at each site, in brackets where a later sea overran it.
     *
     * @param heading what they are staircases of
     * @param stairs by the name of the site, in the order of the columns
     */
    public static String sideBySide(String heading, Map<String, PredictedStair> stairs) {
        Map<String, Double> stages = new LinkedHashMap<>();
        stairs.values().forEach(stair -> stair.steps().forEach(step -> stages.putIfAbsent(step.stage(), step.ageKa())));
        List<String> oldestFirst = stages.entrySet().stream()
                .sorted(Map.Entry.<String, Double>comparingByValue().reversed())
                .map(Map.Entry::getKey)
                .toList();
        List<String> headers = new ArrayList<>(List.of("Highstand", "Age (ka)"));
        stairs.keySet().forEach(site -> headers.add(Wording.cut(site, NAME_WIDTH) + " (m)"));
        PlainTable table = new PlainTable(headers, 1);
        for (String stage : oldestFirst) {
            List<String> cells = new ArrayList<>(List.of(stage, number(stages.getOrDefault(stage, 0.0))));
            stairs.values()
                    .forEach(stair -> cells.add(stair.steps().stream()
                            .filter(step -> step.stage().equals(stage))
                            .findFirst()
                            .map(StairReport::cell)
                            .orElse("")));
            table.row(cells);
        }
        return heading + "\n  " + String.join("\n  ", table.lines()) + "\n";
    }

    private static String cell(Step step) {
        String height = number(step.heightMetres()) + " ± " + number(step.heightSigmaMetres());
        return step.overrunBy().isPresent() ? "(" + height + ")" : height;
    }

    private static String number(double value) {
        return Wording.number(String.format(Locale.ROOT, "%.1f", value));
    }
}
