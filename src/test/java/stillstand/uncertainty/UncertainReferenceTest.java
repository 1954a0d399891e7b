package stillstand.uncertainty;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.List;
import java.util.stream.Stream;
import org.apache.commons.statistics.distribution.ContinuousDistribution;
import org.apache.commons.statistics.distribution.LogNormalDistribution;
import org.apache.commons.statistics.distribution.NormalDistribution;
import org.apache.commons.statistics.distribution.TriangularDistribution;
import org.apache.commons.statistics.distribution.TruncatedNormalDistribution;
import org.apache.commons.statistics.distribution.UniformContinuousDistribution;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import stillstand.uncertainty.Tabulated.Point;

/** Distributions against those of Apache Commons Statistics 1.2, and against closed forms. */
class UncertainReferenceTest {

    record Pair(Uncertain ours, ContinuousDistribution theirs) {}

    static Stream<Pair> pairs() {
        return Stream.of(
                new Pair(new Normal(61, 1.5), NormalDistribution.of(61, 1.5)),
                new Pair(new TruncatedNormal(0.5, 0.3, 0, 2), TruncatedNormalDistribution.of(0.5, 0.3, 0, 2)),
                new Pair(new TruncatedNormal(-2, 1, 0, 2), TruncatedNormalDistribution.of(-2, 1, 0, 2)),
                new Pair(new Uniform(-2, 7), UniformContinuousDistribution.of(-2, 7)),
                new Pair(new Triangular(0, 1, 5), TriangularDistribution.of(0, 1, 5)),
                new Pair(new LogNormal(0, 3, 0.6), LogNormalDistribution.of(Math.log(3), 0.6)),
                // a density linear between points is a triangle where it rises from 0 and falls to 0
                new Pair(
                        Tabulated.of(List.of(new Point(0, 0), new Point(1, 7), new Point(5, 0))),
                        TriangularDistribution.of(0, 1, 5)));
    }

    @ParameterizedTest
    @MethodSource("pairs")
    void agreesWithCommonsStatistics(Pair pair) {
        assertEquals(pair.theirs().getMean(), pair.ours().mean(), 1e-12);
        assertEquals(Math.sqrt(pair.theirs().getVariance()), pair.ours().standardDeviation(), 1e-12);
        for (double probability : new double[] {1e-4, 0.025, 0.16, 0.5, 0.84, 0.975, 0.9999}) {
            double value = pair.theirs().inverseCumulativeProbability(probability);
            assertEquals(value, pair.ours().quantile(probability), 1e-10);
            assertEquals(pair.theirs().density(value), pair.ours().density(value), 1e-9);
            assertEquals(probability, pair.ours().cumulativeProbability(value), 1e-12);
        }
    }

    /**
     * Moments of two half normal distributions, each of probability one half, put together by hand: a half normal
     * distribution has mean sqrt(2/pi) and mean square 1.
     */
    @Test
    void splitNormalHasTheMomentsOfItsHalves() {
        double low = 1.2;
        double high = 3.4;
        double mean = (high - low) / 2 * Math.sqrt(2 / Math.PI);
        double meanSquare = (low * low + high * high) / 2;
        SplitNormal number = new SplitNormal(10, low, high);
        assertEquals(10 + mean, number.mean(), 1e-12);
        assertEquals(Math.sqrt(meanSquare - mean * mean), number.standardDeviation(), 1e-12);
    }
}
