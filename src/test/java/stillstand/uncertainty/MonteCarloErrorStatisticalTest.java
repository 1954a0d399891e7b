package stillstand.uncertainty;

import static org.junit.jupiter.api.Assertions.assertEquals;

import org.junit.jupiter.api.Test;

/** Stated Monte Carlo errors against true ones, where the answer is known. */
class MonteCarloErrorStatisticalTest {

    /**
     * The upper 95 % end of a sum of three uniform numbers is 3 - (6 x 0.025)^(1/3). Over 200 runs of ten blocks the true error
     * should exceed the stated one as often as Student's t with 9 degrees of freedom exceeds 1, 0.3434. The tolerance is four
     * binomial standard deviations: with another seed a right estimate fails about once in 15 000.
     */
    @Test
    void statedErrorIsExceededAsOftenAsItShould() {
        double exact = 3 - Math.cbrt(6 * 0.025);
        int exceeded = 0;
        int runs = 200;
        for (int run = 0; run < runs; run++) {
            Propagation sum = Propagation.of(new DrawStreams(Propagation.SEED + run), 3, 10, (p, out) -> {
                for (int i = 0; i < out.length; i++) {
                    out[i] = p[0][i] + p[1][i] + p[2][i];
                }
            });
            double trueError = sum.distribution().equalTailed(0.95).high() - exact;
            exceeded += Math.abs(trueError) > sum.error().high95() ? 1 : 0;
        }
        assertEquals(0.3434, (double) exceeded / runs, 4 * Math.sqrt(0.3434 * 0.6566 / runs));
    }
}
