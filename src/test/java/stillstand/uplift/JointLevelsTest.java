package stillstand.uplift;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static stillstand.uplift.TestRates.survey;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import stillstand.sealevel.Highstand;
import stillstand.sealevel.HighstandClass;
import stillstand.sealevel.SeaLevelCurve;
import stillstand.sealevel.SharedErrors;
import stillstand.shoreline.HeightTerm;
import stillstand.uncertainty.DrawStreams;
import stillstand.uncertainty.Exact;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.SplitNormal;
import stillstand.uncertainty.Uncertain;

class JointLevelsTest {
    private static final int BLOCKS = 20;
    private static final int DRAWS = BLOCKS * DrawStreams.BLOCK_DRAWS;

    private static JointLevels.Entry entry(String name, Uncertain elevation, SeaAtLevel sea) {
        return new JointLevels.Entry(name, List.of(survey(elevation)), TestRates.NO_LOWERING, List.of(sea));
    }

    private static double[] rates(List<List<JointLevels.Drawn>> blocks, int level) {
        double[] rates = new double[DRAWS];
        for (int b = 0; b < BLOCKS; b++) {
            JointLevels.Drawn drawn = blocks.get(b).get(level);
            for (int i = 0; i < DrawStreams.BLOCK_DRAWS; i++) {
                rates[b * DrawStreams.BLOCK_DRAWS + i] = drawn.upliftMetres(i) / drawn.ageKa[i];
            }
        }
        return rates;
    }

    private static List<List<JointLevels.Drawn>> draw(JointLevels.Entry... entries) {
        JointLevels joint = new JointLevels("site", "site", List.of(entries), new DrawStreams(11));
        List<List<JointLevels.Drawn>> blocks = new ArrayList<>();
        for (int b = 0; b < BLOCKS; b++) {
            blocks.add(joint.draw(b));
        }
        return blocks;
    }

    private static double mean(double[] x) {
        double sum = 0;
        for (double value : x) {
            sum += value;
        }
        return sum / x.length;
    }

    private static double covariance(double[] x, double[] y) {
        double mx = mean(x);
        double my = mean(y);
        double sum = 0;
        for (int i = 0; i < x.length; i++) {
            sum += (x[i] - mx) * (y[i] - my);
        }
        return sum / x.length;
    }

    /**
     * Two terraces of one highstand, 61 and 35 m up, each +- 1 m; 122 +- 1.5 ka, +5 +- 3 m. An independent implementation gives
     * for the difference 0.21314973 +- 0.011889529 where the highstand is shared; with independent ones it would be 0.0372.
     */
    @Test
    void whatTwoLevelsShareCancels() {
        Uncertain ageKa = new Normal(122, 1.5);
        SeaAtLevel sea = TestRates.highstand(ageKa, new Normal(5, 3));
        List<List<JointLevels.Drawn>> blocks =
                draw(entry("A", new Normal(61, 1), sea), entry("B", new Normal(35, 1), sea));
        double[] a = rates(blocks, 0);
        double[] b = rates(blocks, 1);
        double[] difference = new double[DRAWS];
        for (int i = 0; i < DRAWS; i++) {
            difference[i] = a[i] - b[i];
        }
        assertEquals(0.21314973, mean(difference), 5 * 0.0119 / Math.sqrt(DRAWS));
        // five standard errors of a standard deviation
        assertEquals(0.011889529, Math.sqrt(covariance(difference, difference)), 5 * 0.0119 / Math.sqrt(2.0 * DRAWS));
    }

    /** Two surveys are two surveys: a correlation above 5 / sqrt(n) would come by chance once in a million and a half. */
    @Test
    void surveysOfTwoLevelsAreIndependent() {
        SeaAtLevel sea = TestRates.highstand(new Exact(122), new Exact(5));
        List<List<JointLevels.Drawn>> blocks =
                draw(entry("A", new Normal(61, 1), sea), entry("B", new Normal(35, 1), sea));
        double[] a = rates(blocks, 0);
        double[] b = rates(blocks, 1);
        double correlation = covariance(a, b) / Math.sqrt(covariance(a, a) * covariance(b, b));
        assertTrue(Math.abs(correlation) < 5 / Math.sqrt(DRAWS), () -> "correlation " + correlation);
        assertEquals(1 / 122.0, Math.sqrt(covariance(a, a)), 5 / 122.0 / Math.sqrt(2.0 * DRAWS));
    }

    /** A site's datum is one error for all its levels. */
    @Test
    void datumIsShared() {
        SeaAtLevel sea = TestRates.highstand(new Exact(100), new Exact(0));
        HeightTerm datum = new HeightTerm(HeightTerm.Source.DATUM, -1, new Normal(0.5, 2));
        JointLevels.Entry a = new JointLevels.Entry(
                "A", List.of(survey(new Normal(61, 1)), datum), TestRates.NO_LOWERING, List.of(sea));
        JointLevels.Entry b = new JointLevels.Entry(
                "B", List.of(survey(new Normal(35, 1)), datum), TestRates.NO_LOWERING, List.of(sea));
        List<List<JointLevels.Drawn>> blocks = draw(a, b);
        double[] x = rates(blocks, 0);
        double[] y = rates(blocks, 1);
        double correlation = covariance(x, y) / Math.sqrt(covariance(x, x) * covariance(y, y));
        // by hand: 2^2 / (2^2 + 1^2)
        assertEquals(0.8, correlation, 5 * 0.36 / Math.sqrt(DRAWS));
    }

    /** Each level has in joint draws the distribution that it has by itself. */
    @Test
    void marginalsAgreeWithALevelsOwnAnswer() {
        SharedErrors shared = new SharedErrors(3, 6, 3);
        var row = new Highstand(
                "5a",
                HighstandClass.INTERSTADIAL,
                82,
                0,
                new SplitNormal(-20, 9, 5),
                6,
                1,
                true,
                true,
                true,
                5,
                "test");
        SeaAtLevel stand = new SeaAtLevel.AtHighstand(row, shared, 1, new Normal(82, 3));
        SeaLevelCurve curve = TestRates.linear(new double[] {0, 60, 200}, new double[] {0, -60, -20}, 6);
        SeaAtLevel read = new SeaAtLevel.OnCurve(curve, new Normal(50, 1), 2, 3, 1);
        List<List<JointLevels.Drawn>> blocks =
                draw(entry("A", new Normal(40, 1), stand), entry("B", new Normal(10, 2), read));
        List<SeaAtLevel> seas = List.of(stand, read);
        List<Normal> elevations = List.of(new Normal(40, 1), new Normal(10, 2));
        for (int level = 0; level < 2; level++) {
            LevelRates.Outcome alone = TestRates.rate(
                    BLOCKS,
                    List.of(survey(elevations.get(level))),
                    TestRates.NO_LOWERING,
                    List.of(seas.get(level)),
                    CauchyPrior.DEFAULT);
            double[] together = rates(blocks, level);
            double sd = alone.rate().sd().orElseThrow();
            assertEquals(
                    alone.rate().mean().orElseThrow(), mean(together), 5 * sd / Math.sqrt(DRAWS), "level " + level);
            assertEquals(sd, Math.sqrt(covariance(together, together)), 0.01 * sd, "level " + level);
        }
    }

    /** The same draws whatever else is drawn beside them. */
    @Test
    void otherLevelsMoveNothing() {
        SeaAtLevel sea = TestRates.highstand(new Normal(122, 1.5), new Normal(5, 3));
        JointLevels.Entry a = entry("A", new Normal(61, 1), sea);
        double[] alone = rates(draw(a), 0);
        double[] beside = rates(draw(entry("B", new Normal(35, 1), sea), a), 1);
        assertEquals(Optional.of(alone[12345]), Optional.of(beside[12345]));
        assertEquals(mean(alone), mean(beside));
    }
}
