package stillstand.report;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.stream.Collectors;
import stillstand.sensitivity.CurveChoice;
import stillstand.sensitivity.CurveEvidence;
import stillstand.uplift.FlightResult.Match;
import stillstand.uplift.Rate;

/** What the choice of curve does, in plain sentences. */
public final class CurveChoiceReport {
    /** A level whose medians differ by less than its standard deviation hardly feels the choice. */
    private static final double FELT = 1;

    private static final int LEVELS_SHOWN = 3;

    private static final double DOUBLES = 1.9;
    private static final int CURVES_SHOWN = 8;

    private CurveChoiceReport() {}

    /** Sentences on one site; none where it ran under one curve. */
    public static List<String> ofSite(String site, List<CurveChoice> all) {
        List<CurveChoice> own =
                all.stream().filter(choice -> choice.site().equals(site)).toList();
        List<String> lines = new ArrayList<>();
        List<CurveChoice> flight =
                own.stream().filter(choice -> choice.level().isEmpty()).toList();
        if (!flight.isEmpty()) {
            lines.add("The flight by curve: " + weighed(curves(flight)) + "; weighed by evidence "
                    + mixture(flight, CurveChoice.EVIDENCE_WEIGHTED) + ", all alike "
                    + mixture(flight, CurveChoice.EQUAL_WEIGHTED) + ".");
            flips(curves(flight)).ifPresent(lines::add);
        }
        levels(own, lines);
        return lines;
    }

    /** Sentences on all sites together. */
    public static List<String> ofAll(List<CurveEvidence> evidence) {
        Map<String, List<CurveEvidence>> regions = new LinkedHashMap<>();
        evidence.forEach(each -> regions.computeIfAbsent(each.region(), region -> new ArrayList<>())
                .add(each));
        List<String> lines = new ArrayList<>();
        regions.forEach((region, rows) -> lines.add("The " + rows.get(0).sites().size() + " flights of "
                + (region.equals(CurveEvidence.EVERYWHERE) ? "the study" : region)
                + " together weigh the curves: "
                + rows.stream()
                        .sorted(Comparator.comparingDouble(CurveEvidence::weight)
                                .reversed())
                        .limit(CURVES_SHOWN)
                        .map(row -> row.curve() + " " + weight(row.weight()))
                        .collect(Collectors.joining(", "))
                + " (as if the sites shared no error of a curve, which makes it look surer than it is)."));
        return lines;
    }

    private static List<CurveChoice> curves(List<CurveChoice> choices) {
        return choices.stream().filter(choice -> !choice.mixesCurves()).toList();
    }

    private static String mixture(List<CurveChoice> choices, String name) {
        return choices.stream()
                .filter(choice -> choice.curve().equals(name))
                .map(choice -> Wording.rate(choice.rate()))
                .findFirst()
                .orElse("");
    }

    private static String weighed(List<CurveChoice> curves) {
        String shown = curves.stream()
                .sorted(Comparator.comparingDouble(CurveChoice::weight).reversed())
                .limit(CURVES_SHOWN)
                .map(choice -> Wording.rate(choice.rate()) + " with " + choice.curve() + " (weight "
                        + weight(choice.weight()) + ")")
                .collect(Collectors.joining(", "));
        return curves.size() > CURVES_SHOWN
                ? shown + ", and " + (curves.size() - CURVES_SHOWN) + " more in curve-choice.csv"
                : shown;
    }

    /** Curves that say the same to the digits shown stand together. */
    private static String grouped(List<CurveChoice> curves) {
        Map<String, List<String>> byRate = new LinkedHashMap<>();
        curves.stream()
                .sorted(Comparator.comparingDouble(choice -> choice.rate().median()))
                .forEach(choice -> byRate.computeIfAbsent(Wording.rate(choice.rate()), rate -> new ArrayList<>())
                        .add(choice.curve()));
        return byRate.entrySet().stream()
                .map(same -> same.getKey() + " with " + String.join(", ", same.getValue()))
                .collect(Collectors.joining("; "));
    }

    /** The name of a mixture in words; a curve's own id. */
    public static String name(String curve) {
        return switch (curve) {
            case CurveChoice.EVIDENCE_WEIGHTED -> "all, weighed by evidence";
            case CurveChoice.EQUAL_WEIGHTED -> "all alike";
            case CurveChoice.STUDY_WEIGHTED -> "all, by the study's weights";
            default -> curve;
        };
    }

    /** {@code 0.65}; never 0 where there is some. */
    public static String weight(double weight) {
        return weight < 0.005 ? "<0.01" : String.format(Locale.ROOT, "%.2f", weight);
    }

    /** Levels that record one highstand under one curve and another under another. */
    private static Optional<String> flips(List<CurveChoice> curves) {
        Map<String, Map<String, List<String>>> levels = new LinkedHashMap<>();
        for (CurveChoice choice : curves) {
            for (Match match : choice.matches()) {
                levels.computeIfAbsent(match.level(), level -> new LinkedHashMap<>())
                        .computeIfAbsent(match.highstand().orElse("none"), stage -> new ArrayList<>())
                        .add(choice.curve());
            }
        }
        String flips = levels.entrySet().stream()
                .filter(level -> level.getValue().size() > 1)
                .map(level -> level.getKey() + " "
                        + level.getValue().entrySet().stream()
                                .map(stage -> stage.getKey() + " with " + String.join(", ", stage.getValue()))
                                .collect(Collectors.joining(" and ")))
                .collect(Collectors.joining("; "));
        return flips.isEmpty() ? Optional.empty() : Optional.of("Pairings that flip with the curve: " + flips + ".");
    }

    private static void levels(List<CurveChoice> own, List<String> lines) {
        Map<String, List<CurveChoice>> levels = new LinkedHashMap<>();
        own.forEach(choice -> choice.level()
                .ifPresent(level ->
                        levels.computeIfAbsent(level, each -> new ArrayList<>()).add(choice)));
        List<String> calm = new ArrayList<>();
        Map<String, Double> felt = new LinkedHashMap<>();
        levels.forEach((level, choices) -> {
            double effect = spread(curves(choices)) / smallestSigma(curves(choices));
            if (effect > FELT) {
                felt.put(level, effect);
            } else {
                calm.add(level);
            }
        });
        List<String> strongest = felt.keySet().stream()
                .sorted(Comparator.comparingDouble((String level) -> -felt.getOrDefault(level, 0.0)))
                .toList();
        for (String level : strongest.subList(0, Math.min(LEVELS_SHOWN, strongest.size()))) {
            lines.add(sentence(level, curves(levels.getOrDefault(level, List.of()))) + ".");
        }
        if (strongest.size() > LEVELS_SHOWN) {
            lines.add("The curve moves " + String.join(", ", strongest.subList(LEVELS_SHOWN, strongest.size()))
                    + " too by more than a standard deviation: see curve-choice.csv.");
        }
        if (!calm.isEmpty()) {
            lines.add("The choice of curve moves the rate by less than a standard deviation at "
                    + String.join(", ", calm) + ".");
        }
    }

    private static String sentence(String level, List<CurveChoice> curves) {
        CurveChoice low = curves.stream()
                .min(Comparator.comparingDouble(choice -> choice.rate().median()))
                .orElseThrow();
        CurveChoice high = curves.stream()
                .max(Comparator.comparingDouble(choice -> choice.rate().median()))
                .orElseThrow();
        double ratio = high.rate().median() / low.rate().median();
        String what = low.rate().median() < 0 && high.rate().median() > 0
                ? "The rate of " + level + " changes its sign with the curve: "
                : ratio > DOUBLES && low.rate().median() > 0
                        ? "The rate of " + level + " is " + String.format(Locale.ROOT, "%.1f", ratio)
                                + " times as fast with " + high.curve() + " as with " + low.curve() + ": "
                        : "The rate of " + level + " hangs on the curve: ";
        return what + grouped(curves);
    }

    private static double spread(List<CurveChoice> curves) {
        double low =
                curves.stream().mapToDouble(each -> each.rate().median()).min().orElse(0);
        double high =
                curves.stream().mapToDouble(each -> each.rate().median()).max().orElse(0);
        return high - low;
    }

    private static double smallestSigma(List<CurveChoice> curves) {
        return curves.stream()
                .map(CurveChoice::rate)
                .mapToDouble(CurveChoiceReport::sigma)
                .min()
                .orElse(0);
    }

    private static double sigma(Rate rate) {
        return rate.sd().orElse(rate.interval68().width() / 2);
    }
}
