package stillstand.uplift;

import stillstand.uncertainty.StandardNormal;

/** Tails of the standard normal distribution, quick, and nothing beyond 8 standard deviations (probability 6e-16). */
final class NormalTail {
    /** Beyond so many standard deviations there is nothing. */
    static final double REACH = 8;

    private NormalTail() {}

    /** Probability that a standard normal number exceeds {@code x}, for {@code x} of 0 or more. */
    static double beyond(double x) {
        return x < REACH ? StandardNormal.quickCumulativeProbability(-x) : 0;
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
