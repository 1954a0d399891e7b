package stillstand.comparison;

import java.util.Optional;
import stillstand.uplift.Quantity;
import stillstand.uplift.Rate;

/**
 * How the rates of two sites differ.
 *
 * @param a one site
 * @param b the other
 * @param aLevel the level that stands for {@code a}; absent where its whole flight does
 * @param bLevel the level that stands for {@code b}
 * @param difference rate of {@code a} less rate of {@code b}, m/kyr, with what the two share kept shared
 * @param probabilityAFaster probability that {@code a} rises faster (or sinks more slowly) than {@code b}
 * @param correlation of the two rates; absent where a rate has no standard deviation
 * @param independent the wrong answer, for comparison: the same two rates taken for independent
 * @param sharedErrors what was kept shared, in words
 * @param effectiveFraction of the draws in the worst step where one site was conditioned on another; absent for common draws
 */
public record SiteComparison(
        String a,
        String b,
        Optional<String> aLevel,
        Optional<String> bLevel,
        Rate difference,
        double probabilityAFaster,
        Optional<Double> correlation,
        Independent independent,
        String sharedErrors,
        Optional<Double> effectiveFraction) {
    /** What is kept shared between sites of one coast. */
    public static final String ONE_COAST = "global and local sea level";
    /** What is kept shared between sites of different coasts. */
    public static final String TWO_COASTS = "global sea level";

    /** The difference of rates that are taken for independent, m/kyr, and what the probability would be. */
    public record Independent(Quantity difference, double probabilityAFaster) {}
}
