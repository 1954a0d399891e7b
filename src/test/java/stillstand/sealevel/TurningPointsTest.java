package stillstand.sealevel;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;

/** Curves here are of round numbers, invented. */
class TurningPointsTest {
    private static final Stage WINDOW = stage("w", 20, 40);

    @Test
    void takesTheHighestTurningPointInTheWindow() {
        SeaLevelCurve curve = curve(new double[] {0, 22, 26, 30, 35, 45}, new double[] {-90, -40, -60, -30, -70, -80});
        assertEquals(Optional.of(new TurningPoint(30, -30, 50)), TurningPoints.highstand(curve, WINDOW));
        assertEquals(
                new TurningPoint(22, -40, 20),
                TurningPoints.highstand(curve, stage("w", 20, 27)).orElseThrow());
    }

    @Test
    void aLimbHasNoPickThoughItIsHigherAtTheWindowsEdge() {
        SeaLevelCurve rising = curve(new double[] {0, 20, 30, 40, 60}, new double[] {0, -10, -40, -70, -90});
        assertEquals(Optional.empty(), TurningPoints.highstand(rising, WINDOW));
        // a peak just outside, its limb all through the window
        SeaLevelCurve limb = curve(new double[] {0, 15, 19, 30, 60}, new double[] {-60, -30, 5, -40, -90});
        assertEquals(Optional.empty(), TurningPoints.highstand(limb, WINDOW));
    }

    @Test
    void aPeakOnTheWindowsEdgeIsNotInside() {
        SeaLevelCurve edge = curve(new double[] {0, 20, 60}, new double[] {-60, 5, -90});
        assertEquals(Optional.empty(), TurningPoints.highstand(edge, WINDOW));
        SeaLevelCurve inside = curve(new double[] {0, 20.1, 60}, new double[] {-60, 5, -90});
        assertTrue(TurningPoints.highstand(inside, WINDOW).isPresent());
    }

    @Test
    void aShoulderBelowTheLeastProminenceIsPassedOver() {
        // 25 ka stands only 2.9 m above the dip between it and the higher peak at 10 ka
        double[] ages = {0, 10, 23, 25, 45};
        SeaLevelCurve shoulder = curve(ages, new double[] {-50, 0, -20, -17.1, -90});
        assertEquals(Optional.empty(), TurningPoints.highstand(shoulder, WINDOW));
        SeaLevelCurve peak = curve(ages, new double[] {-50, 0, -20, -17, -90});
        assertEquals(
                new TurningPoint(25, -17, 3),
                TurningPoints.highstand(peak, WINDOW).orElseThrow());
    }

    @Test
    void aFlatTopIsPickedInItsMiddleAndAStepIsNone() {
        SeaLevelCurve flat = curve(new double[] {0, 28, 30, 60}, new double[] {-60, 5, 5, -90});
        assertEquals(29, TurningPoints.highstand(flat, WINDOW).orElseThrow().ageKa());
        SeaLevelCurve step = curve(new double[] {0, 28, 30, 60}, new double[] {-60, 5, 5, 90});
        assertEquals(Optional.empty(), TurningPoints.highstand(step, WINDOW));
    }

    @Test
    void noPickIsYoungerThanTheCurveIsUsable() {
        double[] ages = {0, 22, 26, 30, 35, 45};
        CurveFacts facts = new CurveFacts("c", "z", "a", "s", false, 5, 3, 25, List.of());
        SeaLevelCurve curve = SeaLevelCurve.withSigmas(
                "c", facts, ages, new double[] {-90, 5, -60, -30, -70, -80}, new double[] {1, 1, 1, 1, 1, 1});
        assertEquals(30, TurningPoints.highstand(curve, WINDOW).orElseThrow().ageKa());
    }

    @Test
    void lowstandsLieBetweenTheWindows() {
        SeaLevelCurve curve =
                curve(new double[] {0, 22, 42, 45, 48, 70, 90}, new double[] {-120, 0, -60, -50, -80, -5, -130});
        assertEquals(
                Optional.of(new TurningPoint(48, -80, 75)),
                TurningPoints.lowstand(curve, WINDOW, stage("older", 60, 80)));
        assertEquals(Optional.empty(), TurningPoints.lowstand(curve, WINDOW, stage("older", 41, 42)));
    }

    private static Stage stage(String label, double fromKa, double toKa) {
        return new Stage(label, Optional.empty(), fromKa, toKa, HighstandClass.INTERSTADIAL, 5, 1);
    }

    private static SeaLevelCurve curve(double[] agesKa, double[] levelsMetres) {
        double[] sigmas = new double[agesKa.length];
        Arrays.fill(sigmas, 5);
        CurveFacts facts = new CurveFacts("c", "z", "a", "s", false, 5, 3, 0, List.of());
        return SeaLevelCurve.withSigmas("c", facts, agesKa, levelsMetres, sigmas);
    }
}
