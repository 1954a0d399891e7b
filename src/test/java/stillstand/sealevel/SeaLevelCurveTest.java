package stillstand.sealevel;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import org.junit.jupiter.api.Test;
import stillstand.uncertainty.Exact;
import stillstand.uncertainty.SplitNormal;

/** Curves here are of round numbers, invented. */
class SeaLevelCurveTest {
    private static final CurveFacts FACTS =
            new CurveFacts("nobody 2026", "today", "invented", "1 sigma", false, 5, 3, 10, List.of());
    private static final double[] AGES = {0, 20, 60, 125, 130};
    private static final double[] LEVELS = {2, -120, -60, 6, -80};
    private static final SeaLevelCurve X = SeaLevelCurve.withBounds95(
            "X", FACTS, AGES, LEVELS, new double[] {-3, -130, -90, -13.6, -99.6}, new double[] {4, -100, -50, 15.8, -70
            });

    @Test
    void curveIsNeverExtrapolated() {
        for (double outside : new double[] {-0.1, 130.0001, 240, Double.NaN, Double.POSITIVE_INFINITY}) {
            String message = assertThrows(IllegalArgumentException.class, () -> X.levelMetresAt(outside))
                    .getMessage();
            assertEquals(outside + " ka lies outside curve 'X' (0.0 to 130.0 ka)", message);
            assertThrows(IllegalArgumentException.class, () -> X.sigmaLowMetresAt(outside));
            assertThrows(IllegalArgumentException.class, () -> X.slopeMetresPerKaAt(outside));
            double[] column = {50, outside};
            assertThrows(IllegalArgumentException.class, () -> X.levelsAt(column, new double[2]));
            assertThrows(IllegalArgumentException.class, () -> X.readAt(column, new double[2], new double[2]));
        }
    }

    @Test
    void rowsOfTheTableAreReturned() {
        for (int i = 0; i < AGES.length; i++) {
            assertEquals(LEVELS[i], X.levelMetresAt(AGES[i]), 1e-3);
        }
    }

    @Test
    void boundsOf95PercentAreReadAsTheyAre() {
        SplitNormal read = (SplitNormal) X.readAt(125);
        assertEquals(6, read.centre(), 1e-3);
        assertEquals(10, read.sigmaLow(), 1e-3); // by hand: (6 + 13.6) / 1.96
        assertEquals(5, read.sigmaHigh(), 1e-3); // by hand: (15.8 - 6) / 1.96
        // by hand: 6 + (5 - 10) / sqrt(2 pi); sqrt((100 + 25) / 2 - 25 / (2 pi))
        assertEquals(4.005289, read.mean(), 2e-3);
        assertEquals(7.649869, read.standardDeviation(), 2e-3);
        assertEquals(0.025, read.cumulativeProbability(-13.6), 1e-4);
        assertEquals(0.975, read.cumulativeProbability(15.8), 1e-4);
    }

    @Test
    void columnsAgreeWithSingleReadings() {
        double[] ages = {125, 0, 130, 64.321, 7.5, 125};
        double[] deviates = {-1, 0.5, 2, -0.3, 0, 1};
        double[] levels = new double[ages.length];
        double[] read = new double[ages.length];
        X.levelsAt(ages, levels);
        X.readAt(ages, deviates, read);
        for (int i = 0; i < ages.length; i++) {
            assertEquals(X.levelMetresAt(ages[i]), levels[i], 0);
            double sigma = deviates[i] < 0 ? X.sigmaLowMetresAt(ages[i]) : X.sigmaHighMetresAt(ages[i]);
            assertEquals(levels[i] + deviates[i] * sigma, read[i], 1e-12);
        }
    }

    @Test
    void gridKeepsToTheInterpolantWithinOneCentimetre() {
        for (SeaLevelCurve curve : ShippedPackage.CURVES) {
            MonotoneCubic line = new MonotoneCubic(
                    curve.knots().stream().mapToDouble(CurveKnot::ageKa).toArray(),
                    curve.knots().stream().mapToDouble(CurveKnot::levelMetres).toArray());
            for (int i = 0; i <= 100_003; i++) {
                double age = Math.min(curve.toKa(), curve.fromKa() + i / 100_003.0 * (curve.toKa() - curve.fromKa()));
                assertEquals(line.valueAt(age), curve.levelMetresAt(age), 0.01, curve.id() + " at " + age);
            }
        }
    }

    @Test
    void slopeIsPositiveWhereTheSeaWasFallingTowardsToday() {
        assertTrue(X.slopeMetresPerKaAt(10) < 0); // from -120 m at 20 ka the sea rose to today
        assertTrue(X.slopeMetresPerKaAt(90) > 0); // from 6 m at 125 ka it fell to -60 m at 60 ka
        double step = 0.5;
        assertEquals(
                (X.levelMetresAt(90 + step) - X.levelMetresAt(90 - step)) / (2 * step), X.slopeMetresPerKaAt(90), 0.01);
    }

    @Test
    void variationKnowsThePeakInsideTheStretch() {
        assertEquals(6 - X.levelMetresAt(127), X.variationMetres(124, 127), 1e-3);
        assertEquals(X.levelMetresAt(100) - X.levelMetresAt(80), X.variationMetres(80, 100), 1e-12);
        assertEquals(0, X.variationMetres(80, 80), 0);
        assertThrows(IllegalArgumentException.class, () -> X.variationMetres(90, 80));
        assertThrows(IllegalArgumentException.class, () -> X.variationMetres(120, 131));
    }

    @Test
    void youngLevelsAreBarred() {
        assertFalse(X.isUsableAt(9.9));
        assertTrue(X.covers(9.9));
        assertTrue(X.isUsableAt(10));
        assertFalse(X.isUsableAt(130.1));
    }

    @Test
    void rezeroingMovesEveryLevelAndSaysSo() {
        SeaLevelCurve moved = X.rezeroed();
        assertEquals(0, moved.levelMetresAt(0), 1e-12);
        assertEquals(4, moved.levelMetresAt(125), 1e-3);
        assertEquals(X.sigmaLowMetresAt(50), moved.sigmaLowMetresAt(50), 1e-9);
        assertEquals("-2.00 m", moved.assumptions().get(0).value());
        assertEquals("today; moved by -2.00 m to read 0 m today", moved.facts().zero());
        SeaLevelCurve old = SeaLevelCurve.withSigmas(
                "old", FACTS, new double[] {30, 40}, new double[] {-60, -70}, new double[] {5, 5});
        assertEquals(
                "curve 'old' starts at 30.0 ka and cannot be moved to read 0 m today",
                assertThrows(IllegalArgumentException.class, old::rezeroed).getMessage());
    }

    @Test
    void aRowWithoutSpreadIsExact() {
        SeaLevelCurve curve =
                SeaLevelCurve.withSigmas("c", FACTS, new double[] {0, 10}, new double[] {0, -40}, new double[] {0, 2});
        assertEquals(new Exact(0), curve.readAt(0));
        assertEquals(2, curve.readAt(10).standardDeviation(), 1e-9);
    }

    @Test
    void guessedSpreadFollowsTheStagesAndStandsInTheLedger() {
        StageTable stages = ShippedPackage.STAGES;
        SeaLevelCurve curve = SeaLevelCurve.withGuessedSpread(
                "c",
                FACTS,
                new double[] {20, 81, 100, 122, 140},
                new double[] {-120, -20, -25, 0, -130},
                new GuessedSpread(6, 12),
                stages);
        assertEquals(6, curve.readAt(122).standardDeviation(), 1e-4);
        assertEquals(12, curve.readAt(81).standardDeviation(), 1e-4); // interstadial
        assertEquals(12, curve.readAt(140).standardDeviation(), 1e-4); // in no window
        assertEquals("spread of curve c is a guess", curve.assumptions().get(0).assumption());
        assertEquals(
                "6.0 m in interglacials, 12.0 m elsewhere (1 sigma)",
                curve.assumptions().get(0).value());
    }

    @Test
    void badTablesAreRefused() {
        double[] two = {0, 1};
        assertEquals(
                "ages of curve 'c' must ascend but 5.0 ka follows 5.0",
                assertThrows(
                                IllegalArgumentException.class,
                                () -> SeaLevelCurve.withSigmas(
                                        "c", FACTS, new double[] {0, 5, 5}, new double[3], new double[3]))
                        .getMessage());
        assertEquals(
                "curve 'c' must have at least 2 rows but has 1",
                assertThrows(
                                IllegalArgumentException.class,
                                () -> SeaLevelCurve.withSigmas("c", FACTS, new double[1], new double[1], new double[1]))
                        .getMessage());
        assertThrows(
                IllegalArgumentException.class,
                () -> SeaLevelCurve.withSigmas("c", FACTS, two, new double[3], new double[2]));
        assertThrows(
                IllegalArgumentException.class,
                () -> SeaLevelCurve.withSigmas("c", FACTS, two, new double[2], new double[] {1, Double.NaN}));
        assertThrows(
                IllegalArgumentException.class,
                () -> SeaLevelCurve.withBounds95("c", FACTS, two, two, new double[] {1, 0}, new double[] {2, 2}));
    }
}
