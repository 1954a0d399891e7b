package stillstand.files;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import stillstand.ledger.InputProblem;
import stillstand.uplift.CauchyPrior;
import stillstand.uplift.HalfCauchyPrior;
import stillstand.uplift.LogUniformPrior;
import stillstand.uplift.NormalPrior;
import stillstand.uplift.RatePrior;

/** The prior of the rate in {@code study.json}; numbers of its kind that are not stated have defaults. */
final class PriorKeys {
    private static final Map<String, List<String>> KEYS = Map.of(
            "cauchy", List.of("location", "scale", "from", "to"),
            "half-cauchy", List.of("scale", "from", "to"),
            "log-uniform", List.of("from", "to"),
            "normal", List.of("mean", "sigma"));
    private static final List<String> ALL = List.of("location", "scale", "from", "to", "mean", "sigma");

    private final JsonPlaces json;
    private final Keys keys;
    private final List<InputProblem> problems = new ArrayList<>();

    PriorKeys(JsonPlaces json, Keys keys) {
        this.json = json;
        this.keys = keys;
    }

    List<InputProblem> problems() {
        return problems;
    }

    /** The prior; the default where it has problems. */
    RatePrior read() {
        if (keys.isBad("kind")) {
            return CauchyPrior.DEFAULT;
        }
        String kind = keys.text("kind").orElse("cauchy");
        List<String> used = KEYS.getOrDefault(kind, List.of());
        for (String key : ALL) {
            if (keys.has(key) && !used.contains(key)) {
                problems.add(json.problemOfKey(
                        keys.pathOf(key),
                        "a key that a prior of kind \"" + kind + "\" does not have",
                        "only " + String.join(", ", used)));
            }
        }
        return switch (kind) {
            case "half-cauchy" -> halfCauchy();
            case "log-uniform" -> logUniform();
            case "normal" -> new NormalPrior(number("mean", 0), number("sigma", 2));
            default -> cauchy();
        };
    }

    private RatePrior cauchy() {
        double from = number("from", -10);
        double to = number("to", 15);
        return isRange(from, to, Double.NEGATIVE_INFINITY)
                ? new CauchyPrior(number("location", 0), number("scale", 0.5), from, to)
                : CauchyPrior.DEFAULT;
    }

    private RatePrior halfCauchy() {
        double from = number("from", 0.005);
        double to = number("to", 5);
        return isRange(from, to, 0) ? new HalfCauchyPrior(number("scale", 1), from, to) : CauchyPrior.DEFAULT;
    }

    private RatePrior logUniform() {
        double from = number("from", 0.01);
        double to = number("to", 15);
        return isRange(from, to, Double.MIN_VALUE) ? new LogUniformPrior(from, to) : CauchyPrior.DEFAULT;
    }

    private boolean isRange(double from, double to, double lowest) {
        if (!(from >= lowest)) {
            problems.add(json.problem(
                    keys.pathOf("from"), String.valueOf(from), lowest == 0 ? "0 or more" : "a number above 0"));
            return false;
        }
        if (!(to > from)) {
            String at = keys.has("to") ? "to" : "from";
            problems.add(json.problem(keys.pathOf(at), "a range from " + from + " to " + to, "\"to\" above \"from\""));
            return false;
        }
        return true;
    }

    private double number(String key, double otherwise) {
        return keys.number(key).orElse(otherwise);
    }
}
