package stillstand.report;

import java.math.BigDecimal;
import java.math.RoundingMode;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.stream.Collectors;
import stillstand.uncertainty.Digits;
import stillstand.uncertainty.Interval;
import stillstand.uplift.LevelAnswer.Bound;
import stillstand.uplift.LevelAnswer.FirstOrder;
import stillstand.uplift.LevelAnswer.StageProbability;
import stillstand.uplift.Quantity;
import stillstand.uplift.Rate;

/** The words for rates, quantities and stages, the same wherever a result is read: digits as the errors deserve. */
public final class Wording {
    /** What every account of a result says first. */
    public static final String CAUTION =
            "This is not a hazard assessment: rates over thousands of years are no forecast of the next ones. For"
                    + " building or planning, local codes and licensed practice decide.";

    private static final int RATE_DIGITS = 1;
    private static final int OTHER_DIGITS = 2;
    private static final double NEARLY_SURE = 0.995;

    private Wording() {}

    /** {@code 0.44 ± 0.02}; the median alone where no standard deviation exists. */
    public static String rate(Rate rate) {
        String median = number(Digits.text(rate.median(), sigma(rate.sd(), rate.interval68()), RATE_DIGITS));
        return rate.sd().map(sd -> median + plusMinus(sd, RATE_DIGITS)).orElse(median);
    }

    /** {@code 0.40 to 0.47}: the shortest interval of probability 0.95. */
    public static String interval95(Rate rate) {
        double sigma = sigma(rate.sd(), rate.interval68());
        return number(Digits.text(rate.shortest95().low(), sigma, RATE_DIGITS)) + " to "
                + number(Digits.text(rate.shortest95().high(), sigma, RATE_DIGITS));
    }

    /** {@code 0.42 to 0.45}: the shortest interval of probability 0.6827. */
    public static String interval68(Rate rate) {
        double sigma = sigma(rate.sd(), rate.interval68());
        return number(Digits.text(rate.shortest68().low(), sigma, RATE_DIGITS)) + " to "
                + number(Digits.text(rate.shortest68().high(), sigma, RATE_DIGITS));
    }

    /** {@code 0.44 ± 0.02} of the law of propagation. */
    public static String firstOrder(FirstOrder firstOrder) {
        return number(Digits.text(firstOrder.rate(), firstOrder.sigma(), RATE_DIGITS))
                + plusMinus(firstOrder.sigma(), RATE_DIGITS);
    }

    /** {@code 122.5 ± 3.3}, without the unit. */
    public static String quantity(Quantity quantity) {
        double sigma = sigma(quantity.sd(), quantity.interval68());
        return number(Digits.text(quantity.median(), sigma, OTHER_DIGITS)) + plusMinus(sigma, OTHER_DIGITS);
    }

    /** {@code 5e}, or {@code 5e 75 %, 5c 20 %, …} where more than one may have made the level. */
    public static String stages(List<StageProbability> stages) {
        List<StageProbability> likely = stages.stream()
                .sorted((a, b) -> Double.compare(b.probability(), a.probability()))
                .toList();
        if (likely.isEmpty() || likely.get(0).probability() >= NEARLY_SURE) {
            return likely.stream().limit(1).map(StageProbability::highstand).collect(Collectors.joining());
        }
        return likely.stream()
                        .limit(2)
                        .map(stage -> stage.highstand() + " " + Math.round(100 * stage.probability()) + " %")
                        .collect(Collectors.joining(", "))
                + (likely.size() > 2 ? ", …" : "");
    }

    /** {@code slower than 0.024 m/kyr up and 0.032 m/kyr down, at 95 %}; bounds are rounded up. */
    public static String bound(Bound bound, Rate rate) {
        double sigma = sigma(rate.sd(), rate.interval68());
        int decimals = sigma > 0 ? Digits.decimals(sigma, OTHER_DIGITS) : OTHER_DIGITS;
        return "slower than " + roundedUp(bound.upSlowerThan(), decimals) + " m/kyr up and "
                + roundedUp(bound.downSlowerThan(), decimals) + " m/kyr down, at "
                + Digits.text(100 * bound.probability()) + " %";
    }

    private static String roundedUp(double value, int decimals) {
        return number(BigDecimal.valueOf(value)
                .setScale(decimals, RoundingMode.CEILING)
                .toPlainString());
    }

    private static String plusMinus(double sigma, int digits) {
        return " ± " + Digits.text(sigma, sigma, digits);
    }

    /** Half the 68 % interval stands in where a standard deviation does not exist. */
    private static double sigma(Optional<Double> sd, Interval interval68) {
        return sd.orElse(interval68.width() / 2);
    }

    /** {@code 1 level}, {@code 2 levels}. */
    public static String counted(int number, String thing) {
        return number + " " + thing + (number == 1 ? "" : "s");
    }

    /** A number's text with the true minus. */
    public static String number(String text) {
        return text.replace('-', '−');
    }

    /** A name cut to a width. */
    static String cut(String text, int width) {
        int length = text.codePointCount(0, text.length());
        return length <= width ? text : text.substring(0, text.offsetByCodePoints(0, width - 1)) + "…";
    }

    /** Text in lines of at most {@code width} characters, all but the first begun with {@code indent}. */
    static List<String> wrapped(String text, int width, String indent) {
        List<String> lines = new ArrayList<>();
        StringBuilder line = new StringBuilder();
        for (String word : text.strip().split("\\s+", -1)) {
            if (line.length() > indent.length() && line.length() + 1 + word.length() > width) {
                lines.add(line.toString());
                line = new StringBuilder(indent).append(word);
            } else {
                line.append(line.length() == 0 || line.toString().isBlank() ? "" : " ")
                        .append(word);
            }
        }
        lines.add(line.toString());
        return lines;
    }
}
