package stillstand.uplift;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.function.DoubleUnaryOperator;
import org.apache.commons.math3.analysis.solvers.BrentSolver;
import org.apache.commons.math3.distribution.NormalDistribution;
import org.junit.jupiter.api.Test;
import stillstand.uncertainty.DensityBins;
import stillstand.uncertainty.Interval;

/** Mixtures of rates against mixtures of normal distributions of Commons Math. */
class RateMixtureTest {
    private static final double LOWEST = 0.001;

    @Test
    void aMixtureOfOneIsThatOne() {
        Rate rate = normal(0.4, 0.05);
        assertEquals(rate, RateMixture.of(List.of(rate), List.of(3.0)));
        assertEquals(rate, RateMixture.of(List.of(rate, normal(9, 1)), List.of(3.0, 0.0)));
    }

    @Test
    void quantilesAreThoseOfTheMixedNormals() {
        double[][] parts = {{0.40, 0.05, 0.25}, {0.50, 0.02, 0.6}, {0.20, 0.10, 0.15}};
        List<Rate> rates = new ArrayList<>();
        List<Double> weights = new ArrayList<>();
        for (double[] part : parts) {
            rates.add(normal(part[0], part[1]));
            weights.add(7 * part[2]);
        }
        Rate mixed = RateMixture.of(rates, weights);
        DoubleUnaryOperator below = rate -> {
            double sum = 0;
            for (double[] part : parts) {
                sum += part[2] * new NormalDistribution(part[0], part[1]).cumulativeProbability(rate);
            }
            return sum;
        };
        assertEquals(quantile(below, 0.5), mixed.median(), 2e-4);
        assertEquals(quantile(below, 0.025), mixed.interval95().low(), 1e-3);
        assertEquals(quantile(below, 0.975), mixed.interval95().high(), 1e-3);
        assertEquals(quantile(below, (1 - 0.6827) / 2), mixed.interval68().low(), 5e-4);
        assertEquals(quantile(below, (1 + 0.6827) / 2), mixed.interval68().high(), 5e-4);
        double mean = 0.25 * 0.40 + 0.6 * 0.50 + 0.15 * 0.20;
        assertEquals(mean, mixed.mean().orElseThrow(), 1e-12);
        double square = 0.25 * (0.0025 + 0.16) + 0.6 * (0.0004 + 0.25) + 0.15 * (0.01 + 0.04);
        assertEquals(Math.sqrt(square - mean * mean), mixed.sd().orElseThrow(), 1e-12);
        assertEquals(
                0.95,
                below.applyAsDouble(mixed.shortest95().high())
                        - below.applyAsDouble(mixed.shortest95().low()),
                2e-3);
        assertTrue(mixed.shortest95().width() <= mixed.interval95().width() + 1e-6);
    }

    @Test
    void exactRatesMixToo() {
        Rate one = exact(0.1);
        Rate mixed = RateMixture.of(List.of(one, exact(0.3)), List.of(3.0, 1.0));
        assertEquals(0.1, mixed.median(), 1e-6);
        assertEquals(0.15, mixed.mean().orElseThrow(), 1e-12);
        assertEquals(0.3, mixed.interval95().high(), 1e-6);
    }

    @Test
    void aPartWithoutMeanLeavesNone() {
        Rate withoutMean = Rate.of(RateMixture.posterior(List.of(normal(0, 1)), List.of(1.0)));
        Rate wild = new Rate(
                0,
                Optional.empty(),
                Optional.empty(),
                withoutMean.interval68(),
                withoutMean.interval95(),
                withoutMean.shortest68(),
                withoutMean.shortest95(),
                withoutMean.density(),
                Rate.UNIT);
        Rate mixed = RateMixture.of(List.of(wild, normal(1, 1)), List.of(1.0, 1.0));
        assertEquals(Optional.empty(), mixed.mean());
        assertEquals(Optional.empty(), mixed.sd());
    }

    @Test
    void weightsMustWeigh() {
        List<Rate> rates = List.of(normal(0, 1), normal(1, 1));
        assertThrows(IllegalArgumentException.class, () -> RateMixture.of(rates, List.of(0.0, 0.0)));
        assertThrows(IllegalArgumentException.class, () -> RateMixture.of(rates, List.of(1.0)));
        assertThrows(IllegalArgumentException.class, () -> RateMixture.of(List.of(), List.of()));
    }

    @Test
    void mixedQuantitiesAreThoseOfTheMixedNormals() {
        Quantity mixed = QuantityMixture.of(List.of(age(80, 2), age(100, 3)), List.of(0.3, 0.7));
        DoubleUnaryOperator below = ageKa -> 0.3 * new NormalDistribution(80, 2).cumulativeProbability(ageKa)
                + 0.7 * new NormalDistribution(100, 3).cumulativeProbability(ageKa);
        assertEquals(quantile(below, 0.5), mixed.median(), 1e-6);
        assertEquals(quantile(below, 0.025), mixed.interval95().low(), 1e-6);
        assertEquals(quantile(below, 0.975), mixed.interval95().high(), 1e-6);
        assertEquals(94, mixed.mean().orElseThrow(), 1e-12);
    }

    private static double quantile(DoubleUnaryOperator below, double probability) {
        return new BrentSolver(1e-12, 1e-12).solve(200, rate -> below.applyAsDouble(rate) - probability, -1000, 1000);
    }

    private static Rate normal(double mean, double sd) {
        NormalDistribution normal = new NormalDistribution(mean, sd);
        double from = normal.inverseCumulativeProbability(LOWEST);
        double to = normal.inverseCumulativeProbability(1 - LOWEST);
        List<Double> values = new ArrayList<>();
        for (int bin = 0; bin < 200; bin++) {
            values.add(normal.probability(from + (to - from) * bin / 200, from + (to - from) * (bin + 1) / 200));
        }
        Interval inner = tails(normal, 0.6827);
        Interval outer = tails(normal, 0.95);
        return new Rate(
                mean,
                Optional.of(mean),
                Optional.of(sd),
                inner,
                outer,
                inner,
                outer,
                Optional.of(new DensityBins(from, to, values)),
                Rate.UNIT);
    }

    private static Rate exact(double rate) {
        Interval point = new Interval(rate, rate);
        return new Rate(
                rate, Optional.of(rate), Optional.of(0.0), point, point, point, point, Optional.empty(), Rate.UNIT);
    }

    private static Quantity age(double mean, double sd) {
        NormalDistribution normal = new NormalDistribution(mean, sd);
        return new Quantity(mean, Optional.of(mean), Optional.of(sd), tails(normal, 0.6827), tails(normal, 0.95), "ka");
    }

    private static Interval tails(NormalDistribution normal, double probability) {
        return new Interval(
                normal.inverseCumulativeProbability((1 - probability) / 2),
                normal.inverseCumulativeProbability((1 + probability) / 2));
    }
}
