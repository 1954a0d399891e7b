package stillstand.uncertainty;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Optional;
import java.util.stream.IntStream;
import org.junit.jupiter.api.Test;
import stillstand.uncertainty.SobolIndices.Budget;
import stillstand.uncertainty.SobolIndices.Group;

/** Sobol' indices against closed forms. */
class SobolIndicesReferenceTest {
    private static final DrawStreams STREAMS = new DrawStreams(Propagation.SEED);

    private static List<Group> oneByOne(int dimensions) {
        return IntStream.range(0, dimensions)
                .mapToObj(d -> new Group("input " + d, List.of(d)))
                .toList();
    }

    private static void assertShares(Budget budget, double[] firstOrder, double[] total) {
        for (int g = 0; g < firstOrder.length; g++) {
            SobolIndices.Share share = budget.shares().get(g);
            // the error of eight scrambles is itself uncertain: 5 of them, plus the error's error where it is tiny
            assertEquals(firstOrder[g], share.firstOrder(), 5 * share.firstOrderError() + 1e-5, share.group());
            assertEquals(total[g], share.total(), 5 * share.totalError() + 1e-5, share.group());
            assertTrue(share.firstOrderError() < 0.004, share.group());
            assertTrue(share.totalError() < 0.004, share.group());
        }
    }

    /** Ishigami's function, a = 7, b = 0.1. V1 = (5 + b pi^4)^2 / 50, V2 = a^2 / 8, V13 = 8 b^2 pi^8 / 225. */
    @Test
    void ishigami() {
        double pi4 = Math.pow(Math.PI, 4);
        double v1 = Math.pow(5 + 0.1 * pi4, 2) / 50;
        double v2 = 49.0 / 8;
        double v13 = 8 * 0.01 * pi4 * pi4 / 225;
        double v = v1 + v2 + v13;
        ColumnFunction function = (p, out) -> {
            for (int i = 0; i < out.length; i++) {
                double x = Math.PI * (2 * p[0][i] - 1);
                double y = Math.PI * (2 * p[1][i] - 1);
                double z = Math.PI * (2 * p[2][i] - 1);
                out[i] = Math.sin(x) + 7 * Math.pow(Math.sin(y), 2) + 0.1 * Math.pow(z, 4) * Math.sin(x);
            }
        };
        Budget budget = SobolIndices.of(function, 3, oneByOne(3), STREAMS, "ishigami", 8)
                .orElseThrow();
        assertEquals(Math.sqrt(13.844588), budget.sd(), 1e-3);
        assertShares(budget, new double[] {v1 / v, v2 / v, 0}, new double[] {(v1 + v13) / v, v2 / v, v13 / v});
        // the second input fixed takes its own part away and no other
        assertEquals(Math.sqrt(v1 + v13), budget.shares().get(1).sdIfExact(), 2e-3);
        // the first input fixed at 0 leaves the second alone
        assertEquals(Math.sqrt(v2), budget.shares().get(0).sdIfExact(), 2e-3);

        // a group of the two that act together holds all that is not the other's
        List<Group> pairs = List.of(new Group("first and third", List.of(0, 2)), new Group("second", List.of(1)));
        Budget grouped =
                SobolIndices.of(function, 3, pairs, STREAMS, "ishigami", 8).orElseThrow();
        assertShares(grouped, new double[] {(v1 + v13) / v, v2 / v}, new double[] {(v1 + v13) / v, v2 / v});
    }

    /**
     * The g-function of Sobol' with a = 0, 1, 4.5, 9, 99, 99, 99, 99: V_i = 1 / (3 (1 + a_i)^2), V = prod(1 + V_i) - 1, total
     * V_i prod_(k != i) (1 + V_k) / V.
     */
    @Test
    void gFunction() {
        double[] a = {0, 1, 4.5, 9, 99, 99, 99, 99};
        double product = 1;
        for (double each : a) {
            product *= 1 + 1 / (3 * (1 + each) * (1 + each));
        }
        double[] firstOrder = new double[a.length];
        double[] total = new double[a.length];
        for (int i = 0; i < a.length; i++) {
            double v = 1 / (3 * (1 + a[i]) * (1 + a[i]));
            firstOrder[i] = v / (product - 1);
            total[i] = v * product / (1 + v) / (product - 1);
        }
        assertEquals(0.716192, firstOrder[0], 1e-6);
        Budget budget = SobolIndices.of(
                        (p, out) -> {
                            for (int i = 0; i < out.length; i++) {
                                out[i] = 1;
                                for (int d = 0; d < a.length; d++) {
                                    out[i] *= (Math.abs(4 * p[d][i] - 2) + a[d]) / (1 + a[d]);
                                }
                            }
                        },
                        a.length,
                        oneByOne(a.length),
                        STREAMS,
                        "g",
                        8)
                .orElseThrow();
        assertShares(budget, firstOrder, total);
    }

    @Test
    void resultWithoutSpreadHasNoShares() {
        ColumnFunction constant = (p, out) -> java.util.Arrays.fill(out, 3);
        assertEquals(Optional.empty(), SobolIndices.of(constant, 2, oneByOne(2), STREAMS, "constant", 8));
    }

    @Test
    void functionMayOverwriteItsColumns() {
        Budget budget = SobolIndices.of(
                        (p, out) -> {
                            new Normal(0, 3).toQuantiles(p[0]);
                            new Normal(0, 4).toQuantiles(p[1]);
                            for (int i = 0; i < out.length; i++) {
                                out[i] = p[0][i] + p[1][i];
                            }
                        },
                        2,
                        oneByOne(2),
                        STREAMS,
                        "sum",
                        8)
                .orElseThrow();
        assertEquals(5, budget.sd(), 0.01);
        assertShares(budget, new double[] {0.36, 0.64}, new double[] {0.36, 0.64});
        assertEquals(4, budget.shares().get(0).sdIfExact(), 0.01);
    }

    @Test
    void impossibleGroupsAreRefused() {
        ColumnFunction any = (p, out) -> {};
        assertThrows(IllegalArgumentException.class, () -> SobolIndices.of(any, 2, oneByOne(3), STREAMS, "a", 8));
        assertThrows(
                IllegalArgumentException.class,
                () -> SobolIndices.of(
                        any, 2, List.of(new Group("a", List.of(0)), new Group("b", List.of(0, 1))), STREAMS, "a", 8));
        assertThrows(IllegalArgumentException.class, () -> SobolIndices.of(any, 2, oneByOne(2), STREAMS, "a", 1));
        assertThrows(IllegalArgumentException.class, () -> new Group("empty", List.of()));
    }
}
