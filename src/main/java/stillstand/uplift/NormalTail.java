package stillstand.uplift;

import stillstand.uncertainty.StandardNormal;

/**
 * Upper tail of the standard normal distribution, fast: a Taylor series of fifth order about the nearest of tabulated points
 * 1/32 apart. Largest error 1e-13, relative to the tail 1e-8 up to 8 standard deviations.
 */
final class NormalTail {
    private static final int PER_UNIT = 32;
    private static final int LAST = 13 * PER_UNIT;
    private static final double[] TAIL = new double[LAST + 1];
    private static final double[] DENSITY = new double[LAST + 1];

    static {
        for (int i = 0; i <= LAST; i++) {
            double x = (double) i / PER_UNIT;
            TAIL[i] = StandardNormal.cumulativeProbability(-x);
            DENSITY[i] = Math.exp(-x * x / 2) / Math.sqrt(2 * Math.PI);
        }
    }

    private NormalTail() {}

    /** Probability that a standard normal number exceeds {@code x}, for {@code x} of 0 or more. */
    static double beyond(double x) {
        int nearest = (int) (x * PER_UNIT + 0.5);
        if (nearest > LAST) {
            return 0;
        }
        double a = nearest * (1.0 / PER_UNIT);
        double d = x - a;
        double a2 = a * a;
        double series = (a2 * (a2 - 6) + 3) * (d / 120) - a * (a2 - 3) / 24;
        series = series * d + (a2 - 1) / 6;
        series = series * d - a / 2;
        series = series * d + 1;
        return TAIL[nearest] - DENSITY[nearest] * d * series;
    }

    /** Probability that a standard normal number is at most {@code x}. */
    static double atMost(double x) {
        return x > 0 ? 1 - beyond(x) : beyond(-x);
    }

    /** Probability that a standard normal number lies between the two, accurate in both tails. */
    static double between(double from, double to) {
        if (from >= 0) {
            return beyond(from) - beyond(to);
        }
        return to <= 0 ? beyond(-to) - beyond(-from) : 1 - beyond(-from) - beyond(to);
    }
}
