package stillstand.comparison;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;

/**
 * Regression against the certified values of the NIST Statistical Reference Datasets (Norris, NoInt1, Longley), and generalised least
 * squares with a shared error against an independent implementation.
 */
class LinearFitReferenceTest {
    /** Norris, calibration of ozone monitors: y, x by turns. */
    private static final double[] NORRIS = {
        0.1, 0.2, 338.8, 337.4, 118.1, 118.2, 888.0, 884.6, 9.2, 10.1, 228.1, 226.5, 668.5, 666.3, 998.5, 996.3, 449.1,
        448.6, 778.9, 777.0, 559.2, 558.2, 0.3, 0.4, 0.1, 0.6, 778.1, 775.5, 668.8, 666.9, 339.3, 338.0, 448.9, 447.5,
        10.8, 11.6, 557.7, 556.0, 228.3, 228.1, 998.0, 995.8, 888.8, 887.6, 119.6, 120.2, 0.3, 0.3, 0.6, 0.3, 557.6,
        556.8, 339.3, 339.1, 888.0, 887.2, 998.5, 999.0, 778.9, 779.0, 10.2, 11.1, 117.6, 118.3, 228.9, 229.2, 668.4,
        669.1, 449.2, 448.9, 0.2, 0.5
    };

    /** Longley, labour statistics: y and six predictors a row. */
    private static final double[][] LONGLEY = {
        {60323, 83.0, 234289, 2356, 1590, 107608, 1947},
        {61122, 88.5, 259426, 2325, 1456, 108632, 1948},
        {60171, 88.2, 258054, 3682, 1616, 109773, 1949},
        {61187, 89.5, 284599, 3351, 1650, 110929, 1950},
        {63221, 96.2, 328975, 2099, 3099, 112075, 1951},
        {63639, 98.1, 346999, 1932, 3594, 113270, 1952},
        {64989, 99.0, 365385, 1870, 3547, 115094, 1953},
        {63761, 100.0, 363112, 3578, 3350, 116219, 1954},
        {66019, 101.2, 397469, 2904, 3048, 117388, 1955},
        {67857, 104.6, 419180, 2822, 2857, 118734, 1956},
        {68169, 108.4, 442769, 2936, 2798, 120445, 1957},
        {66513, 110.8, 444546, 4681, 2637, 121950, 1958},
        {68655, 112.6, 482704, 3813, 2552, 123366, 1959},
        {69564, 114.2, 502601, 3931, 2514, 125368, 1960},
        {69331, 115.7, 518173, 4806, 2572, 127852, 1961},
        {70551, 116.9, 554894, 4007, 2827, 130081, 1962}
    };

    private static final double[] X_KM = {0, 12, 25, 41, 60};
    private static final double[] RATES = {0.32, 0.35, 0.41, 0.44, 0.52};
    private static final double[] OWN_SDS = {0.015, 0.012, 0.02, 0.015, 0.018};
    private static final double SHARED_SD = 0.03;

    private static double[][] identity(int n) {
        double[][] errors = new double[n][n];
        for (int i = 0; i < n; i++) {
            errors[i][i] = 1;
        }
        return errors;
    }

    private static LinearFit ordinary(double[][] design, double[] values) {
        return LinearFit.of(design, values, identity(values.length)).orElseThrow();
    }

    private static double residualSd(LinearFit fit) {
        return Math.sqrt(fit.chiSquared() / fit.degrees());
    }

    private static void assertClose(double expected, double found, double digits) {
        assertEquals(expected, found, Math.abs(expected) * Math.pow(10, -digits));
    }

    @Test
    void norris() {
        int n = NORRIS.length / 2;
        double[][] design = new double[n][];
        double[] y = new double[n];
        for (int i = 0; i < n; i++) {
            y[i] = NORRIS[2 * i];
            design[i] = new double[] {1, NORRIS[2 * i + 1]};
        }
        LinearFit fit = ordinary(design, y);
        assertClose(-0.262323073774029, fit.coefficient(0), 11);
        assertClose(1.00211681802045, fit.coefficient(1), 13);
        assertClose(0.884796396144373, residualSd(fit), 12);
        assertClose(0.232818234301152, fit.sd(0) * residualSd(fit), 12);
        assertClose(0.000429796848199937, fit.sd(1) * residualSd(fit), 12);
    }

    @Test
    void lineThroughTheOrigin() {
        double[][] design = new double[11][];
        double[] y = new double[11];
        for (int i = 0; i < 11; i++) {
            design[i] = new double[] {60 + i};
            y[i] = 130 + i;
        }
        LinearFit fit = ordinary(design, y);
        assertClose(2.07438016528926, fit.coefficient(0), 13);
        assertClose(0.0165289256198347, fit.sd(0) * residualSd(fit), 12);
        assertClose(3.56753034006338, residualSd(fit), 12);
    }

    @Test
    void longley() {
        double[][] design = new double[LONGLEY.length][];
        double[] y = new double[LONGLEY.length];
        for (int i = 0; i < y.length; i++) {
            y[i] = LONGLEY[i][0];
            design[i] = LONGLEY[i].clone();
            design[i][0] = 1;
        }
        LinearFit fit = ordinary(design, y);
        double[] coefficients = {
            -3482258.63459582,
            15.0618722713733,
            -0.0358191792925910,
            -2.02022980381683,
            -1.03322686717359,
            -0.0511041056535807,
            1829.15146461355
        };
        double[] sds = {
            890420.383607373,
            84.9149257747669,
            0.0334910077722432,
            0.488399681651699,
            0.214274163161675,
            0.226073200069370,
            455.478499142212
        };
        for (int i = 0; i < coefficients.length; i++) {
            assertClose(coefficients[i], fit.coefficient(i), 9);
            assertClose(sds[i], fit.sd(i) * residualSd(fit), 9);
        }
        assertClose(304.854073561965, residualSd(fit), 10);
    }

    private static double[][] line() {
        double[][] design = new double[X_KM.length][];
        for (int i = 0; i < design.length; i++) {
            design[i] = new double[] {1, X_KM[i]};
        }
        return design;
    }

    private static double[][] errors(double sharedCovariance) {
        double[][] errors = new double[X_KM.length][X_KM.length];
        for (int i = 0; i < errors.length; i++) {
            for (int j = 0; j < errors.length; j++) {
                errors[i][j] = sharedCovariance + (i == j ? OWN_SDS[i] * OWN_SDS[i] : 0);
            }
            errors[i][i] += SHARED_SD * SHARED_SD - sharedCovariance;
        }
        return errors;
    }

    @Test
    void tiltWithASharedError() {
        LinearFit fit =
                LinearFit.of(line(), RATES, errors(SHARED_SD * SHARED_SD)).orElseThrow();
        assertEquals(0.31519962, fit.coefficient(0), 1e-8);
        assertEquals(0.0032865154, fit.coefficient(1), 1e-10);
        assertEquals(0.031805384, fit.sd(0), 1e-8);
        assertEquals(0.00033620498, fit.sd(1), 1e-10);
        assertEquals(-2.7084134e-06, fit.covariance(0, 1), 1e-12);
        assertEquals(1.2694909, fit.chiSquared(), 1e-6);
        assertEquals(3, fit.degrees());
    }

    @Test
    void tiltWithTheErrorTakenForIndependent() {
        LinearFit fit = LinearFit.of(line(), RATES, errors(0)).orElseThrow();
        assertEquals(0.31660383, fit.coefficient(0), 1e-8);
        assertEquals(0.003293851, fit.coefficient(1), 1e-9);
        assertEquals(0.024612506, fit.sd(0), 1e-8);
        assertEquals(0.00071972921, fit.sd(1), 1e-10);
        assertEquals(-1.3926219e-05, fit.covariance(0, 1), 1e-11);
        assertEquals(0.28800119, fit.chiSquared(), 1e-7);
    }

    @Test
    void whatCannotBeToldApart() {
        double[][] design = {{1, 2}, {1, 2}, {1, 2}};
        assertTrue(LinearFit.of(design, new double[] {1, 2, 3}, identity(3)).isEmpty());
        assertTrue(LinearFit.of(new double[][] {{1, 2}}, new double[] {1}, identity(1))
                .isEmpty());
        assertThrows(
                IllegalArgumentException.class,
                () -> LinearFit.of(design, new double[] {1, 2, 3}, new double[][] {{1, 2, 0}, {2, 1, 0}, {0, 0, 1}}));
    }
}
