package stillstand.uncertainty;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertInstanceOf;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import stillstand.uncertainty.Tabulated.Point;
import stillstand.uncertainty.Tabulated.Spike;

/** What holds for every kind of uncertain number. */
class UncertainTest {

    static Stream<Uncertain> numbersWithSpread() {
        return Stream.of(
                new Normal(61, 1.5),
                new TruncatedNormal(0.5, 0.3, 0, Double.POSITIVE_INFINITY),
                new TruncatedNormal(-3, 1, 0, 2),
                new TruncatedNormal(10, 2, Double.NEGATIVE_INFINITY, 8),
                new TruncatedNormal(10, 2, 9, 14),
                new SplitNormal(5, 1, 4),
                SplitNormal.ofCentral95(1.5, 0.3, 9.4),
                new Uniform(-2, 7),
                new Triangular(0, 1, 5),
                new Triangular(0, 0, 5),
                new Triangular(0, 5, 5),
                new LogNormal(0, 3, 0.6),
                new LogNormal(-1, 3, 0.6),
                Tabulated.of(List.of(new Point(0, 0), new Point(1, 3), new Point(4, 1), new Point(6, 0))),
                Tabulated.of(List.of(new Point(0, 2), new Point(1, 2), new Point(1, 5), new Point(2, 5))));
    }

    static Stream<Uncertain> all() {
        return Stream.concat(
                numbersWithSpread(),
                Stream.of(
                        new Exact(4),
                        new Tabulated(List.of(new Point(0, 1), new Point(45, 0)), List.of(new Spike(0, 0.6))),
                        new Tabulated(
                                List.of(new Point(1, 1), new Point(3, 1)),
                                List.of(new Spike(0, 0.1), new Spike(2, 0.2), new Spike(9, 0.1)))));
    }

    @ParameterizedTest
    @MethodSource("numbersWithSpread")
    void cumulativeProbabilityUndoesTheQuantile(Uncertain number) {
        for (double probability : new double[] {1e-6, 0.001, 0.025, 0.3, 0.5, 0.7, 0.975, 0.999, 1 - 1e-6}) {
            assertEquals(probability, number.cumulativeProbability(number.quantile(probability)), 1e-12);
        }
    }

    @ParameterizedTest
    @MethodSource("numbersWithSpread")
    void densityIsTheSlopeOfTheCumulativeProbability(Uncertain number) {
        for (double probability : new double[] {0.013, 0.1, 0.31, 0.57, 0.79, 0.9, 0.987}) {
            double value = number.quantile(probability);
            double step = 1e-5 * number.standardDeviation();
            double slope = (number.cumulativeProbability(value + step) - number.cumulativeProbability(value - step))
                    / (2 * step);
            assertEquals(slope, number.density(value), 1e-5 * slope);
        }
    }

    @ParameterizedTest
    @MethodSource("all")
    void momentsAreThoseOfTheQuantiles(Uncertain number) {
        int cells = 1 << 17;
        double sum = 0;
        double squares = 0;
        for (int i = 0; i < cells; i++) {
            // the square crowds the points towards both ends, where quantiles run away
            double t = (i + 0.5) / cells;
            double probability = t * t * (3 - 2 * t);
            double weight = 6 * t * (1 - t) / cells;
            double distance = number.quantile(probability) - number.mean();
            sum += weight * distance;
            squares += weight * distance * distance;
        }
        double scale = Math.max(1e-3, number.standardDeviation());
        assertEquals(0, sum / scale, 1e-5); // a jump between two spikes costs a cell
        assertEquals(number.standardDeviation(), Math.sqrt(squares), 1e-5 * scale);
    }

    @ParameterizedTest
    @MethodSource("all")
    void columnHoldsTheQuantiles(Uncertain number) {
        double[] column = new double[4096];
        new DrawStreams(5).probabilities("column", 0, column);
        column[0] = 1e-9;
        column[1] = 1 - 1e-9;
        column[2] = 0.5;
        column[3] = 0x1p-53;
        double[] probabilities = column.clone();
        number.toQuantiles(column);
        for (int i = 0; i < column.length; i++) {
            double expected = number.quantile(probabilities[i]);
            assertEquals(expected, column[i], 1e-9 * Math.max(1, Math.abs(expected)));
        }
    }

    @ParameterizedTest
    @MethodSource("all")
    void plusMovesEverythingAlike(Uncertain number) {
        Uncertain moved = number.plus(2.5);
        assertEquals(number.mean() + 2.5, moved.mean(), 1e-12);
        assertEquals(number.standardDeviation(), moved.standardDeviation(), 1e-12);
        assertEquals(number.quantile(0.2) + 2.5, moved.quantile(0.2), 1e-12);
        assertEquals(number.getClass(), moved.getClass());
    }

    @ParameterizedTest
    @MethodSource("all")
    void probabilitiesOutsideTheOpenIntervalAreRefused(Uncertain number) {
        for (double probability : new double[] {0, 1, -0.1, 1.1, Double.NaN}) {
            assertThrows(IllegalArgumentException.class, () -> number.quantile(probability));
        }
    }

    @Test
    void normalWithoutSpreadIsExact() {
        assertEquals(new Exact(4), Uncertain.normal(4, 0));
        assertEquals(new Normal(4, 2), Uncertain.normal(4, 2));
        assertTrue(Uncertain.normal(4, 0).isExact());
        assertFalse(Uncertain.normal(4, 2).isExact());
        assertInstanceOf(Exact.class, new Exact(4).plus(1));
    }

    @Test
    void exactNumberIsAStep() {
        Exact four = new Exact(4);
        assertEquals(0, four.cumulativeProbability(Math.nextDown(4.0)));
        assertEquals(1, four.cumulativeProbability(4));
        assertEquals(Double.POSITIVE_INFINITY, four.density(4));
        assertEquals(0, four.density(4.1));
    }

    @Test
    void impossibleParametersAreRefused() {
        refused("sigma must be above 0 but is 0.0", () -> new Normal(1, 0));
        refused("sigma must be above 0 but is NaN", () -> new Normal(1, Double.NaN));
        refused("mean must be finite but is Infinity", () -> new Normal(Double.POSITIVE_INFINITY, 1));
        refused("value must be finite but is NaN", () -> new Exact(Double.NaN));
        refused("low must be below high but is 2.0 with high 2.0", () -> new Uniform(2, 2));
        refused("mode must lie between low and high but is 3.0 with 0.0 to 2.0", () -> new Triangular(0, 3, 2));
        refused("median must be above 0 but is -1.0", () -> new LogNormal(0, -1, 1));
        refused(
                "centre must lie between low95 and high95 but is 0.0 with 0.0 to 67.0",
                () -> SplitNormal.ofCentral95(0, 0, 67));
        refused(
                "low and high must leave some of the normal distribution with mean 0.0 and standard deviation 1.0"
                        + " but are 40.0 and 41.0",
                () -> new TruncatedNormal(0, 1, 40, 41));
        refused("points must be two or more but are 1", () -> Tabulated.of(List.of(new Point(1, 1))));
        refused(
                "values of points must not decrease but 1.0 follows 2.0",
                () -> Tabulated.of(List.of(new Point(2, 1), new Point(1, 1))));
        refused(
                "points must have a density above 0 somewhere",
                () -> Tabulated.of(List.of(new Point(1, 0), new Point(2, 0))));
        refused(
                "spikes must hold less than all probability but hold 1.0",
                () -> new Tabulated(
                        List.of(new Point(1, 1), new Point(2, 1)), List.of(new Spike(0, 0.5), new Spike(1, 0.5))));
    }

    private static void refused(String message, Runnable call) {
        assertEquals(
                message, assertThrows(IllegalArgumentException.class, call::run).getMessage());
    }

    @Test
    void splitNormalIsRecoveredFromItsBounds() {
        SplitNormal depth = SplitNormal.ofCentral95(1.5, 0.3, 9.4);
        assertEquals(1.5, depth.quantile(0.5), 1e-15);
        assertEquals(0.3, depth.quantile(0.025), 1e-4); // 1.96 is a rounded 1.959964
        assertEquals(9.4, depth.quantile(0.975), 1e-3);
    }

    @Test
    void spikeHoldsItsProbabilityAndTheTailTheRest() {
        Tabulated depth = new Tabulated(List.of(new Point(0, 1), new Point(40, 0)), List.of(new Spike(0, 0.6)));
        assertEquals(0, depth.quantile(0.3));
        assertEquals(0, depth.quantile(0.6));
        assertEquals(0.6, depth.cumulativeProbability(0), 1e-15);
        assertEquals(0, depth.cumulativeProbability(-1e-9));
        // the triangle from 0 to 40 has half of its probability below 40 (1 - sqrt(1/2))
        assertEquals(40 * (1 - Math.sqrt(0.5)), depth.quantile(0.8), 1e-12);
        assertEquals(0.4 * 40 / 3, depth.mean(), 1e-12);
        assertEquals(Double.POSITIVE_INFINITY, depth.density(0));
        assertEquals(0.4 * 2 / 40, depth.density(1e-12), 1e-12);
    }

    @Test
    void truncationTellsWhatItCutOff() {
        // Phi(-5/3) of the normal distribution lies below 0
        assertEquals(
                StandardNormal.cumulativeProbability(-5.0 / 3),
                new TruncatedNormal(0.5, 0.3, 0, Double.POSITIVE_INFINITY).probabilityCutOff(),
                1e-15);
    }

    @Test
    void summaryOfANumberIsItsQuantiles() {
        Summary summary = Summary.of(new Uniform(0, 100));
        assertEquals(50, summary.median());
        assertEquals(2.5, summary.interval95().low(), 1e-12);
        assertEquals(97.5, summary.interval95().high(), 1e-12);
        assertEquals(68.27, summary.interval68().width(), 1e-12);
        assertEquals(0.0, Summary.of(new Exact(3)).sd().orElseThrow());
    }
}
