package stillstand.uplift;

import static org.junit.jupiter.api.Assertions.assertAll;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import java.util.stream.DoubleStream;
import org.apache.commons.statistics.distribution.BinomialDistribution;
import org.apache.commons.statistics.distribution.ChiSquaredDistribution;
import stillstand.uncertainty.Interval;

/**
 * The probability that each answer puts below its truth. If answers are honest these are uniform (simulation-based calibration,
 * Talts et al. 2018, arXiv:1804.06788), and intervals of equal tails hold the truth as often as they say.
 *
 * @param probabilitiesBelow one for each answer
 */
record RanksOfTruth(List<Double> probabilitiesBelow) {
    /** Probability that one comparison is false by chance. */
    static final double FALSE_ALARM = 1e-4;

    private static final int PARTS = 10;

    RanksOfTruth {
        probabilitiesBelow = List.copyOf(probabilitiesBelow);
    }

    static RanksOfTruth of(DoubleStream probabilitiesBelow) {
        return new RanksOfTruth(probabilitiesBelow.boxed().toList());
    }

    int answers() {
        return probabilitiesBelow.size();
    }

    int in68() {
        return within(Interval.PROBABILITY_68);
    }

    int in95() {
        return within(Interval.PROBABILITY_95);
    }

    private int within(double probability) {
        return (int) probabilitiesBelow.stream()
                .filter(below -> Math.abs(below - 0.5) <= probability / 2)
                .count();
    }

    /** Intervals hold the truth as often as they say and the truth lies evenly in ten parts: three comparisons. */
    void assertCalibrated() {
        assertAll(
                toString(),
                () -> assertHeld(in68(), Interval.PROBABILITY_68),
                () -> assertHeld(in95(), Interval.PROBABILITY_95),
                () -> assertTrue(chiSquare() < chiSquareLimit(), "the truth lies unevenly"));
    }

    /** Both coverages within binomial error. */
    void assertCovers() {
        assertAll(
                toString(),
                () -> assertHeld(in68(), Interval.PROBABILITY_68),
                () -> assertHeld(in95(), Interval.PROBABILITY_95));
    }

    /** Whether so few of the intervals hold the truth that chance cannot be why. */
    boolean isOverconfident() {
        return in68() < fewest(Interval.PROBABILITY_68) || in95() < fewest(Interval.PROBABILITY_95);
    }

    private int fewest(double probability) {
        return BinomialDistribution.of(answers(), probability).inverseCumulativeProbability(FALSE_ALARM / 2);
    }

    private void assertHeld(int held, double probability) {
        int most = BinomialDistribution.of(answers(), probability).inverseSurvivalProbability(FALSE_ALARM / 2);
        assertTrue(
                held >= fewest(probability) && held <= most,
                () -> held + " intervals hold the truth, not " + fewest(probability) + " to " + most);
    }

    private int[] parts() {
        int[] parts = new int[PARTS];
        for (double below : probabilitiesBelow) {
            parts[Math.min(PARTS - 1, (int) (PARTS * below))]++;
        }
        return parts;
    }

    private double chiSquare() {
        double expected = (double) answers() / PARTS;
        return Arrays.stream(parts())
                .mapToDouble(count -> (count - expected) * (count - expected) / expected)
                .sum();
    }

    private static double chiSquareLimit() {
        return ChiSquaredDistribution.of(PARTS - 1).inverseSurvivalProbability(FALSE_ALARM);
    }

    @Override
    public String toString() {
        return String.format(
                Locale.ROOT,
                "of %d answers the 68.27 %% intervals hold %.1f %% of the truths, the 95 %% ones %.1f %%; chi-square %.1f of %s",
                answers(),
                100.0 * in68() / answers(),
                100.0 * in95() / answers(),
                chiSquare(),
                Arrays.toString(parts()));
    }
}
