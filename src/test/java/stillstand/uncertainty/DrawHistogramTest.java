package stillstand.uncertainty;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import java.util.Arrays;
import java.util.Optional;
import org.junit.jupiter.api.Test;

class DrawHistogramTest {
    private static final DrawStreams STREAMS = new DrawStreams(3);

    private static double[] draws(Uncertain number, int block, int count) {
        double[] column = new double[count];
        STREAMS.probabilities("draws", block, column);
        number.toQuantiles(column);
        return column;
    }

    private static DrawDistribution gathered(double[] draws) {
        DrawHistogram histogram = DrawHistogram.forDrawsLike(draws);
        histogram.add(draws);
        return histogram.distribution();
    }

    /** Even a single block, with four draws to a cell, is read far closer than its own Monte Carlo error of 0.01 sd. */
    @Test
    void quantilesAreThoseOfTheSortedDraws() {
        double[] draws = draws(new LogNormal(0, 3, 0.6), 0, 1 << 16);
        SortedDraws sorted = SortedDraws.of(draws);
        DrawDistribution gathered = gathered(draws);
        for (double probability : new double[] {0, 1e-4, 0.001, 0.025, 0.16, 0.5, 0.84, 0.975, 0.999, 0.9999, 1}) {
            assertEquals(sorted.quantile(probability), gathered.quantile(probability), 2e-3, "at " + probability);
            double value = sorted.quantile(probability);
            assertEquals(sorted.cumulativeProbability(value), gathered.cumulativeProbability(value), 5e-4);
        }
        assertEquals(Arrays.stream(draws).average().orElseThrow(), gathered.mean(), 1e-12);
        assertEquals(1 << 16, gathered.count());
        assertEquals(1 << 16, gathered.effectiveSampleSize(), 1e-6);
    }

    /** Draws evenly spaced in probability have no Monte Carlo error, so what is left is the histogram's own. */
    @Test
    void binningCostsAMillionthOfTheStandardDeviation() {
        for (Uncertain number : new Uncertain[] {new Normal(0.37, 0.02), new LogNormal(0, 3, 0.6)}) {
            double[] draws = new double[1 << 22];
            for (int i = 0; i < draws.length; i++) {
                draws[i] = (i + 0.5) / draws.length;
            }
            number.toQuantiles(draws);
            DrawDistribution gathered = gathered(draws);
            for (double probability : new double[] {0.025, 0.15865, 0.5, 0.84135, 0.975}) {
                assertEquals(
                        number.quantile(probability),
                        gathered.quantile(probability),
                        4e-6 * number.standardDeviation(),
                        number + " at " + probability);
            }
        }
    }

    @Test
    void mergedBlocksAreOneSample() {
        DrawHistogram together = DrawHistogram.forDrawsLike(draws(new Normal(1, 2), 0, 1000));
        DrawHistogram merged = together.emptyCopy();
        for (int block = 0; block < 5; block++) {
            double[] draws = draws(new Normal(1, 2), block, 1001);
            together.add(draws);
            DrawHistogram own = together.emptyCopy();
            own.add(draws);
            merged.merge(own);
        }
        assertEquals(5005, merged.count());
        for (double probability = 0; probability <= 1; probability += 0.01) {
            assertEquals(
                    together.distribution().quantile(probability),
                    merged.distribution().quantile(probability));
        }
        assertEquals(together.distribution().sd(), merged.distribution().sd(), 1e-12);
        DrawHistogram other = DrawHistogram.forDrawsLike(draws(new Normal(1, 3), 0, 1000));
        assertThrows(IllegalArgumentException.class, () -> merged.merge(other));
    }

    /** Uniform draws weighted by their value follow the density 2x, of median sqrt(1/2) and mean 2/3. */
    @Test
    void weightsTurnOneDistributionIntoAnother() {
        double[] draws = draws(new Uniform(0, 1), 0, 1 << 18);
        DrawHistogram histogram = DrawHistogram.forDrawsLike(draws);
        histogram.add(draws, draws);
        DrawDistribution weighted = histogram.distribution();
        assertEquals(Math.sqrt(0.5), weighted.quantile(0.5), 0.004);
        assertEquals(2.0 / 3, weighted.mean(), 0.004);
        assertEquals(Math.sqrt(1.0 / 18), weighted.sd(), 0.002);
        // (E w)^2 / E w^2 = (1/4) / (1/3)
        assertEquals(0.75, weighted.effectiveSampleSize() / (1 << 18), 0.005);
    }

    @Test
    void equalWeightsChangeNothing() {
        double[] draws = draws(new LogNormal(0, 3, 0.6), 0, 4096);
        double[] weights = new double[4096];
        Arrays.fill(weights, 4);
        DrawHistogram weighted = DrawHistogram.forDrawsLike(draws);
        weighted.add(draws, weights);
        DrawHistogram plain = weighted.emptyCopy();
        plain.add(draws);
        for (double probability = 0; probability <= 1; probability += 0.01) {
            assertEquals(
                    plain.distribution().quantile(probability),
                    weighted.distribution().quantile(probability),
                    1e-12);
        }
        assertEquals(4096, weighted.distribution().effectiveSampleSize(), 1e-9);
    }

    @Test
    void drawsOfWeightZeroCountButMoveNothing() {
        DrawHistogram histogram = DrawHistogram.forDrawsLike(new double[] {1, 2, 3});
        histogram.add(new double[] {1, 2, 1000}, new double[] {1, 1, 0});
        assertEquals(3, histogram.distribution().count());
        assertEquals(1.5, histogram.distribution().mean(), 1e-12);
        assertEquals(2, histogram.distribution().quantile(1), 1e-3);
    }

    @Test
    void drawsAllAlikeAreExact() {
        double[] draws = new double[1000];
        Arrays.fill(draws, 0.1);
        DrawDistribution alike = gathered(draws);
        assertEquals(0.1, alike.quantile(0.025));
        assertEquals(0.1, alike.quantile(0.5));
        assertEquals(0.1, alike.mean());
        assertEquals(0, alike.sd());
        assertEquals(new Interval(0.1, 0.1), alike.shortest(0.95));
        assertEquals(1, alike.cumulativeProbability(0.1));
        assertEquals(0, alike.cumulativeProbability(0.0999));
        assertEquals(Optional.empty(), alike.density(200));
    }

    @Test
    void heavyTailsDoNotSpoilTheMiddle() {
        double[] numerator = draws(new Normal(0, 1), 0, 1 << 18);
        double[] denominator = draws(new Normal(0, 1), 1, 1 << 18);
        double[] quotient = new double[1 << 18];
        for (int i = 0; i < quotient.length; i++) {
            quotient[i] = numerator[i] / denominator[i];
        }
        DrawDistribution gathered = gathered(quotient);
        SortedDraws sorted = SortedDraws.of(quotient);
        for (double probability : new double[] {0.001, 0.025, 0.25, 0.5, 0.75, 0.975, 0.999}) {
            assertEquals(
                    sorted.quantile(probability),
                    gathered.quantile(probability),
                    1e-3 * Math.max(1, Math.abs(sorted.quantile(probability))));
        }
        assertEquals(Optional.empty(), gathered.summaryWithoutMean().mean());
    }

    @Test
    void densityIsRelativeFrequencyInEqualBins() {
        DensityBins bins = gathered(draws(new Triangular(0, 1, 2), 0, 1 << 18))
                .density(100)
                .orElseThrow();
        assertEquals(100, bins.values().size());
        assertEquals(
                0.998, bins.values().stream().mapToDouble(Double::doubleValue).sum(), 1e-4);
        double width = (bins.to() - bins.from()) / 100;
        assertEquals(width * 1, bins.values().get(50), 0.1 * width); // density 1 at the mode
        assertEquals(width * 0.5, bins.values().get(25), 0.1 * width);
        assertThrows(
                IllegalArgumentException.class,
                () -> gathered(new double[] {1, 2}).density(201));
    }

    @Test
    void drawsThatAreNoNumbersAreRefused() {
        for (double bad : new double[] {Double.NaN, Double.POSITIVE_INFINITY, Double.NEGATIVE_INFINITY}) {
            DrawHistogram histogram = DrawHistogram.forDrawsLike(new double[] {1, 2, 3});
            assertThrows(IllegalArgumentException.class, () -> histogram.add(new double[] {1, bad, 2}));
            assertThrows(
                    IllegalArgumentException.class,
                    () -> histogram.add(new double[] {1, bad, 2}, new double[] {1, 1, 1}));
            assertThrows(
                    IllegalArgumentException.class,
                    () -> histogram.add(new double[] {1, 2, 2}, new double[] {1, bad, 1}));
        }
        DrawHistogram empty = DrawHistogram.forDrawsLike(new double[] {1, 2});
        assertThrows(IllegalStateException.class, empty::distribution);
        assertEquals(
                "draws and weights must be as many but are 2 and 1",
                assertThrows(IllegalArgumentException.class, () -> empty.add(new double[] {1, 2}, new double[] {1}))
                        .getMessage());
    }
}
