package stillstand.figure;

import stillstand.uncertainty.Digits;
import stillstand.uplift.Rate;

/** Numbers as figures print them: with a true minus, a point, and the digits their spread leaves. */
final class Numbers {
    private static final int DIGITS = 1;
    private static final double ALMOST_ALL = 99.5;
    private static final double ALMOST_NONE = 0.5;

    private Numbers() {}

    /** {@code 0.44 (0.40 to 0.47)}: median and shortest 95 % interval, m/kyr. */
    static String rate(Rate rate) {
        double sigma = rate.sd().orElse(rate.interval68().width() / 2);
        return rounded(rate.median(), sigma) + " ("
                + rounded(rate.shortest95().low(), sigma) + " to "
                + rounded(rate.shortest95().high(), sigma) + ")";
    }

    static String plusMinus(double value, double sigma) {
        return sigma > 0 ? rounded(value, sigma) + " ± " + rounded(sigma, sigma) : rounded(value, sigma);
    }

    static String rounded(double value, double sigma) {
        return minus(Digits.text(value, sigma, DIGITS));
    }

    /** {@code 97}, {@code <1}, {@code >99} for a probability in percent, without the sign. */
    static String percent(double probability) {
        double percent = 100 * probability;
        if (percent >= ALMOST_ALL) {
            return percent > ALMOST_ALL + 0.45 ? "100" : ">99";
        }
        return percent < ALMOST_NONE ? "<1" : Long.toString(Math.round(percent));
    }

    static String minus(String text) {
        return text.replace('-', '−');
    }
}
