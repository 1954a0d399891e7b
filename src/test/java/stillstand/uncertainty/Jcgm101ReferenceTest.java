package stillstand.uncertainty;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Collections;
import java.util.List;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/**
 * Examples of JCGM 101:2008 (Supplement 1 to the GUM, propagation of distributions by a Monte Carlo method). What decides is
 * the exact value where there is a closed form, else a value computed anew by an independent program with 4e6 to 1e7 trials;
 * the standard's printed values, rounded, stand in the comments.
 *
 * <p>A Monte Carlo value may differ from an exact one by five of its own standard errors (about 1 in 20 000 for 64 blocks).
 */
class Jcgm101ReferenceTest {
    private static final int BLOCKS = 64;

    private static void assertInterval95(double low, double high, Propagation run) {
        MonteCarloError error = run.error();
        Interval actual = run.distribution().equalTailed(0.95);
        assertEquals(low, actual.low(), 5 * error.low95());
        assertEquals(high, actual.high(), 5 * error.high95());
        assertTrue(error.low95() < 1e-3 * (high - low) && error.high95() < 1e-3 * (high - low), error.toString());
    }

    private static double sum(double[] inputs) {
        double sum = 0;
        for (double input : inputs) {
            sum += input;
        }
        return sum;
    }

    /** 9.2.2: printed 0, 2.00, +-3.92; exact +-2 x 1.959964. */
    @Test
    void sumOfFourNormals() {
        Propagation run = Propagation.of(Collections.nCopies(4, new Normal(0, 1)), BLOCKS, x -> sum(x));
        assertEquals(0, run.distribution().mean(), 1e-3);
        assertEquals(2, run.distribution().sd(), 1e-3);
        assertInterval95(-3.9199280, 3.9199280, run);
    }

    /** 9.2.3: printed 0, 2.00, +-3.88; exact 2 sqrt(3) (2 - (3/5)^(1/4)). */
    @Test
    void sumOfFourRectangulars() {
        Uniform rectangular = new Uniform(-Math.sqrt(3), Math.sqrt(3));
        Propagation run = Propagation.of(Collections.nCopies(4, rectangular), BLOCKS, x -> sum(x));
        double exact = 2 * Math.sqrt(3) * (2 - Math.pow(0.6, 0.25));
        assertEquals(3.879407, exact, 1e-6);
        assertEquals(2, run.distribution().sd(), 1e-3);
        assertInterval95(-exact, exact, run);
    }

    /** 9.2.4: printed 0, 10.1, +-17.0; exact sd sqrt(103), interval computed by convolution. */
    @Test
    void oneDominatingRectangular() {
        Uniform small = new Uniform(-Math.sqrt(3), Math.sqrt(3));
        Uniform large = new Uniform(-10 * Math.sqrt(3), 10 * Math.sqrt(3));
        Propagation run = Propagation.of(List.of(large, small, small, small), BLOCKS, x -> sum(x));
        assertEquals(Math.sqrt(103), run.distribution().sd(), 2e-3);
        assertInterval95(-17.0158141, 17.0158141, run);
    }

    /**
     * The logarithm of a rectangular number on 0.1 to 1.1 (from a guide of the National Physical Laboratory): density e^y, so
     * that the shortest 95 % interval is exactly [ln 0.15, ln 1.1] and the mean 1.1 ln 1.1 - 0.1 ln 0.1 - 1.
     */
    @Test
    void logarithmOfARectangular() {
        Propagation run = Propagation.of(List.of(new Uniform(0.1, 1.1)), BLOCKS, x -> Math.log(x[0]));
        Interval shortest = run.distribution().shortest(0.95);
        assertEquals(Math.log(0.15), shortest.low(), 2e-3);
        assertEquals(Math.log(1.1), shortest.high(), 2e-3);
        assertEquals(
                1.1 * Math.log(1.1) - 0.1 * Math.log(0.1) - 1,
                run.distribution().mean(),
                1e-4);
        assertEquals(0.606, run.distribution().sd(), 5e-4);
        assertInterval95(Math.log(0.125), Math.log(1.075), run);
    }

    /**
     * 9.3 mass calibration: printed 1.2341 mg, 0.0754 mg, shortest [1.0834, 1.3825] mg. What decides was computed by
     * Gauss-Legendre quadrature over the three densities in an independent program: mean 1.2340, sd 0.0754797, equal tails at
     * 1.0844333 and 1.3835668 mg. The density of air is symmetric about 1.2 and with it the result about 1.234 mg, so the
     * shortest interval is the same.
     */
    @Test
    void massCalibration() {
        List<Uncertain> inputs = List.of(
                new Normal(100_000.000, 0.050),
                new Normal(1.234, 0.020),
                new Uniform(1.10, 1.30),
                new Uniform(7000, 9000),
                new Uniform(7950, 8050));
        Propagation run = Propagation.of(
                inputs, BLOCKS, x -> (x[0] + x[1]) * (1 + (x[2] - 1.2) * (1 / x[3] - 1 / x[4])) - 100_000);
        assertEquals(1.2340, run.distribution().mean(), 1e-5);
        assertEquals(0.0754797, run.distribution().sd(), 2e-5);
        assertInterval95(1.0844333, 1.3835668, run);
        Interval shortest = run.distribution().shortest(0.95);
        assertEquals(1.0844333, shortest.low(), 2.5e-3); // 0.03 sd: three times n^(-1/3)
        assertEquals(1.3835668, shortest.high(), 2.5e-3);
        assertEquals(0.2991335, shortest.width(), 3e-4);
    }

    record Loss(double x1, double correlation, double mean, double sd, double low, double high, double tolerance) {}

    /**
     * 9.4 comparison loss, X1^2 + X2^2 with u = 0.005 and x2 = 0, in millionths; shortest 95 % intervals. Printed: 50, 50, [0,
     * 150]; 150, 112, [0, 367]; 2551, 502, [1590, 3543]; 50, 67, [0, 185]; 150, 121, [13, 398]; 2551, 505, [1628, 3555].
     * Mean and sd by hand: 2 u^2 + x1^2, and sqrt(4 u^4 (1 + r^2) + 4 x1^2 u^2).
     */
    static Stream<Loss> losses() {
        return Stream.of(
                new Loss(0, 0, 50, 50, 0, -50 * Math.log(0.05), 0.5),
                new Loss(0.010, 0, 150, 111.803, 0, 366, 2),
                new Loss(0.050, 0, 2550, 502.494, 1591.5, 3544, 12),
                new Loss(0, 0.9, 50, 67.268, 0, 185, 1),
                new Loss(0.010, 0.9, 150, 120.520, 13.0, 397.9, 2),
                new Loss(0.050, 0.9, 2550, 504.504, 1625, 3555.5, 12));
    }

    @ParameterizedTest
    @MethodSource("losses")
    void comparisonLoss(Loss loss) {
        Propagation run = Propagation.of(List.of(new Normal(0, 1), new Normal(0, 1)), BLOCKS, u -> {
            double x1 = loss.x1() + 0.005 * u[0];
            double x2 =
                    0.005 * (loss.correlation() * u[0] + Math.sqrt(1 - loss.correlation() * loss.correlation()) * u[1]);
            return 1e6 * (x1 * x1 + x2 * x2);
        });
        assertEquals(loss.mean(), run.distribution().mean(), 0.02);
        assertEquals(loss.sd(), run.distribution().sd(), 0.2);
        Interval shortest = run.distribution().shortest(0.95);
        assertEquals(loss.low(), shortest.low(), loss.tolerance());
        assertEquals(loss.high(), shortest.high(), loss.tolerance());
    }
}
