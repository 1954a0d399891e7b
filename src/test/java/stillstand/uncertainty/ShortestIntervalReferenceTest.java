package stillstand.uncertainty;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.function.DoubleUnaryOperator;
import java.util.stream.Stream;
import org.apache.commons.statistics.distribution.ContinuousDistribution;
import org.apache.commons.statistics.distribution.ExponentialDistribution;
import org.apache.commons.statistics.distribution.GammaDistribution;
import org.apache.commons.statistics.distribution.LogNormalDistribution;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/**
 * Shortest intervals of skewed distributions, whose ends have equal density, against values computed to 7 digits by
 * root-finding in an independent program (scipy). The ends of the shortest interval of n draws are off by about n^(-1/3), the
 * width by less; the tolerances are a few times that.
 */
class ShortestIntervalReferenceTest {

    record Case(String name, ContinuousDistribution distribution, double probability, double low, double high) {}

    static Stream<Case> cases() {
        return Stream.of(
                new Case("gamma 2", GammaDistribution.of(2, 1), 0.95, 0.0423633, 4.7651682),
                new Case("gamma 2", GammaDistribution.of(2, 1), 0.6827, 0.2682351, 2.5006953),
                new Case("gamma 4", GammaDistribution.of(4, 1), 0.95, 0.7125008, 7.9482961),
                new Case("log-normal 0.5", LogNormalDistribution.of(0, 0.5), 0.95, 0.2616523, 2.3180788),
                new Case("log-normal 0.5", LogNormalDistribution.of(0, 0.5), 0.6827, 0.4433558, 1.3680450),
                new Case("log-normal 1", LogNormalDistribution.of(0, 1), 0.95, 0.0260915, 5.1869484),
                new Case("exponential", ExponentialDistribution.of(1), 0.95, 0, 2.9957323));
    }

    @ParameterizedTest
    @MethodSource("cases")
    void shortestIntervalOfIndependentDraws(Case known) {
        DrawStreams streams = new DrawStreams(Propagation.SEED);
        DoubleUnaryOperator quantile = known.distribution()::inverseCumulativeProbability;
        double[] sample = new double[1 << 17];
        streams.probabilities(known.name(), 0, sample);
        for (int i = 0; i < sample.length; i++) {
            sample[i] = quantile.applyAsDouble(sample[i]);
        }
        DrawHistogram histogram = DrawHistogram.forDrawsLike(sample);
        histogram.add(sample);
        assertClose(known, histogram.distribution().shortest(known.probability()), 0.06);
        assertClose(known, SortedDraws.of(sample).shortestInterval(known.probability()), 0.1);
    }

    @ParameterizedTest
    @MethodSource("cases")
    void shortestIntervalOfSobolPoints(Case known) {
        DrawDistribution distribution = Propagation.of(1, 16, (probabilities, out) -> {
                    for (int i = 0; i < out.length; i++) {
                        out[i] = known.distribution().inverseCumulativeProbability(probabilities[0][i]);
                    }
                })
                .distribution();
        assertClose(known, distribution.shortest(known.probability()), 0.02);
    }

    private static void assertClose(Case known, Interval actual, double toleranceInSigmas) {
        double sd = Math.sqrt(known.distribution().getVariance());
        assertEquals(known.low(), actual.low(), toleranceInSigmas * sd);
        assertEquals(known.high(), actual.high(), toleranceInSigmas * sd);
        assertEquals(known.high() - known.low(), actual.width(), toleranceInSigmas * sd / 2);
    }
}
