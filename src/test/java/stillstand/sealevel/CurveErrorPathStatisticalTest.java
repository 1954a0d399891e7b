package stillstand.sealevel;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.apache.commons.rng.UniformRandomProvider;
import org.apache.commons.rng.simple.RandomSource;
import org.junit.jupiter.api.Test;

class CurveErrorPathStatisticalTest {
    private static final int DRAWS = 200_000;
    /** Two-sided normal point of 1 in 100,000; 27 statistics are compared, so a right sampler fails once in 3700 seeds. */
    private static final double CRITICAL = 4.417;

    /** Correlation exp(-lag / 5 ka), each estimate against its own standard error {@code (1 - rho^2) / sqrt(n)}. */
    @Test
    void errorsForgetThemselvesWithTheCorrelationTime() {
        double[] ages = {125, 120, 81, 122.5, 80.9, 200};
        double[] mean = new double[6];
        double[][] product = new double[6][6];
        CurveErrorPath path = new CurveErrorPath(5, random());
        double[] deviates = new double[6];
        for (int draw = 0; draw < DRAWS; draw++) {
            path.drawAt(ages, deviates);
            for (int i = 0; i < 6; i++) {
                mean[i] += deviates[i] / DRAWS;
                for (int j = 0; j <= i; j++) {
                    product[i][j] += deviates[i] * deviates[j] / DRAWS;
                }
            }
        }
        double root = Math.sqrt(DRAWS);
        for (int i = 0; i < 6; i++) {
            assertEquals(0, mean[i], CRITICAL / root);
            assertEquals(1, product[i][i], CRITICAL * Math.sqrt(2) / root);
            for (int j = 0; j < i; j++) {
                double expected = Math.exp(-Math.abs(ages[i] - ages[j]) / 5);
                double correlation = product[i][j] / Math.sqrt(product[i][i] * product[j][j]);
                double error = Math.max((1 - expected * expected) / root, 1e-9);
                assertEquals(expected, correlation, CRITICAL * error, ages[i] + " and " + ages[j]);
            }
        }
    }

    @Test
    void equalAgesGetEqualErrors() {
        double[] deviates = new double[3];
        new CurveErrorPath(5, random()).drawAt(new double[] {120, 80, 120}, deviates);
        assertEquals(deviates[0], deviates[2], 0);
        assertTrue(deviates[0] != deviates[1]);
    }

    @Test
    void orderOfTheLevelsDoesNotMatter() {
        double[] one = new double[3];
        double[] other = new double[3];
        new CurveErrorPath(5, random()).drawAt(new double[] {120, 80, 100}, one);
        new CurveErrorPath(5, random()).drawAt(new double[] {80, 100, 120}, other);
        assertEquals(one[0], other[2], 0);
        assertEquals(one[1], other[0], 0);
        assertEquals(one[2], other[1], 0);
    }

    private static UniformRandomProvider random() {
        return RandomSource.XO_SHI_RO_256_PP.create(Long.getLong("test.seed", 20261201L));
    }
}
