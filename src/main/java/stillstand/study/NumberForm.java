package stillstand.study;

import java.util.Optional;
import java.util.regex.Pattern;

/**
 * How a number is written: an optional sign ({@code -} or the typographic minus), digits with a decimal point, an optional
 * exponent, and finite; nothing else.
 */
public final class NumberForm {
    private static final Pattern NUMBER =
            Pattern.compile("[-\u2212]?(?:[0-9]++(?:\\.[0-9]*+)?|\\.[0-9]++)(?:[eE][-+\u2212]?[0-9]{1,6})?");
    private static final Pattern DECIMAL_COMMA = Pattern.compile("[-\u2212]?[0-9]++,[0-9]++");
    private static final Pattern THOUSANDS = Pattern.compile("[-\u2212]?[0-9]{1,3}(?:[,' ][0-9]{3})++\\.?[0-9]*+");

    private NumberForm() {}

    /** The number that a text holds; absent where it holds none or an infinite one. */
    public static Optional<Double> parse(String text) {
        if (!NUMBER.matcher(text).matches()) {
            return Optional.empty();
        }
        double value = Double.parseDouble(text.replace('\u2212', '-'));
        return Double.isFinite(value) ? Optional.of(value) : Optional.empty();
    }

    /** What should stand in place of a text that is no number. */
    public static String expectedInsteadOf(String text) {
        if (NUMBER.matcher(text).matches()) {
            return "a number that is finite";
        }
        if (DECIMAL_COMMA.matcher(text).matches()) {
            return "a number with a decimal point";
        }
        if (THOUSANDS.matcher(text).matches()) {
            return "a number without thousands separators";
        }
        if (text.endsWith("%")) {
            return "a number without a percent sign";
        }
        return "a number";
    }
}
