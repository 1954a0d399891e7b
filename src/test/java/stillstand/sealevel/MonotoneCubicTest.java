package stillstand.sealevel;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import org.apache.commons.rng.UniformRandomProvider;
import org.apache.commons.rng.simple.RandomSource;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class MonotoneCubicTest {
    @ParameterizedTest
    @ValueSource(booleans = {true, false})
    void neverLeavesTheRangeOfTwoNeighbouringKnots(boolean monotone) {
        UniformRandomProvider random = RandomSource.XO_SHI_RO_256_PP.create(20261201);
        for (int trial = 0; trial < 300; trial++) {
            int n = random.nextInt(2, 40);
            double[] x = new double[n];
            double[] y = new double[n];
            double at = random.nextDouble();
            for (int i = 0; i < n; i++) {
                at += 1e-3 + Math.exp(4 * random.nextDouble());
                x[i] = at;
                // a third of the steps is flat
                y[i] = i > 0 && random.nextInt(3) == 0 ? y[i - 1] : 100 * random.nextDouble() - 50;
            }
            if (monotone) {
                Arrays.sort(y);
            }
            MonotoneCubic curve = new MonotoneCubic(x, y);
            for (int i = 0; i < n - 1; i++) {
                double last = y[i];
                for (int k = 0; k <= 50; k++) {
                    double value = curve.valueAt(Math.min(x[i + 1], x[i] + k / 50.0 * (x[i + 1] - x[i])));
                    assertTrue(value >= Math.min(y[i], y[i + 1]) && value <= Math.max(y[i], y[i + 1]));
                    assertTrue((value - last) * (y[i + 1] - y[i]) >= -1e-9, "turns between knots");
                    last = value;
                }
                assertEquals(y[i], curve.valueAt(x[i]), 0);
            }
            assertEquals(y[n - 1], curve.valueAt(x[n - 1]), 1e-12);
        }
    }

    @ParameterizedTest
    @ValueSource(doubles = {0.25, 1.0, 2.9, 3.0001, 6.5})
    void slopeIsTheDerivativeOfTheValue(double at) {
        MonotoneCubic curve = new MonotoneCubic(new double[] {0, 1, 3, 4.5, 7}, new double[] {0, 2, 1, 1, 5});
        double step = 1e-6;
        assertEquals((curve.valueAt(at + step) - curve.valueAt(at - step)) / (2 * step), curve.slopeAt(at), 1e-4);
    }
}
