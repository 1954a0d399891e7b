package stillstand.uncertainty;

import java.math.BigDecimal;
import java.math.MathContext;
import java.math.RoundingMode;

/** How many digits of a number its standard deviation leaves worth printing. */
public final class Digits {
    /** More decimals than these tell nobody anything. */
    private static final int MOST_DECIMALS = 9;

    private Digits() {}

    /**
     * Decimals that show a standard deviation to some significant digits after rounding: 0.0996 to two digits is 0.10, so
     * two decimals. Never less than 0: nothing is rounded to tens.
     *
     * @param sigma standard deviation, above 0
     * @param significantDigits of {@code sigma}, 1 or more
     * @throws IllegalArgumentException if {@code sigma} is not finite or not above 0
     */
    public static int decimals(double sigma, int significantDigits) {
        if (!(sigma > 0 && sigma < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("sigma must be above 0 but is " + sigma);
        }
        BigDecimal one = new BigDecimal(sigma).round(new MathContext(significantDigits, RoundingMode.HALF_UP));
        int leading = one.precision() - one.scale() - 1;
        return Math.min(Math.max(significantDigits - 1 - leading, 0), MOST_DECIMALS);
    }

    /** The number with so many decimals, halves away from zero, never "-0". */
    public static String text(double value, int decimals) {
        return BigDecimal.valueOf(value)
                .setScale(decimals, RoundingMode.HALF_UP)
                .toPlainString();
    }

    /** The number as its standard deviation deserves; where that is 0 the number as it is, without a needless ".0". */
    public static String text(double value, double sigma, int significantDigits) {
        return sigma > 0 ? text(value, decimals(sigma, significantDigits)) : text(value);
    }

    /** All digits of the number, without a needless ".0". */
    public static String text(double value) {
        BigDecimal exact = BigDecimal.valueOf(value);
        return exact.signum() == 0 ? "0" : exact.stripTrailingZeros().toPlainString();
    }
}
