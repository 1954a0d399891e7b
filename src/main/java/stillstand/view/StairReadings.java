package stillstand.view;

import java.util.Comparator;
import java.util.Locale;
import stillstand.report.Wording;
import stillstand.study.StudyResult.CurvePoint;
import stillstand.uplift.FlightResult.Fate;
import stillstand.uplift.PredictedStair;
import stillstand.view.StairPicture.Mark;
import stillstand.view.StairPicture.Stand;

/** What the Stair says of the things under the pointer. */
final class StairReadings {
    private static final double STEP_KA = 1.5;

    private StairReadings() {}

    static String stand(Stand stand) {
        return format(
                "Highstand %s: the sea at %.1f ± %.1f m, %.1f ± %.1f ka ago (1 sigma)",
                stand.stage(), stand.metres(), stand.sigmaMetres(), stand.ageKa(), stand.ageSigmaKa());
    }

    static String level(Mark level) {
        return format(
                "Level %s: its sea stands at %.1f m today (95 %%: %.1f to %.1f m)",
                level.name(), level.metres(), level.interval95().low(), level.interval95().high());
    }

    /** A step that a slid rate predicts. */
    static String step(PredictedStair.Step step) {
        return format(
                "Predicted by the slid rate: %s at %.1f ± %.1f m (1 sigma)%s",
                step.stage(),
                step.heightMetres(),
                step.heightSigmaMetres(),
                step.overrunBy().map(by -> ", overrun by " + by).orElse(""));
    }

    /** What became of a shoreline that no level records. */
    static String lost(Fate fate) {
        return format(
                "%s would stand at %.0f ± %.0f m: recorded %.2f, unseen %.2f, re-occupied %.2f, outside the survey %.2f",
                fate.highstand(),
                fate.heightMetres(),
                fate.heightSigmaMetres(),
                fate.recorded(),
                fate.unseen(),
                fate.reoccupied(),
                fate.outside());
    }

    /** An age, a height, and the sea of that age. */
    static String place(StairPicture picture, double ageKa, double metres) {
        String here = format("%.1f ka, %.1f m", ageKa, metres);
        return picture.curves().stream()
                .limit(1)
                .flatMap(curve -> curve.points().stream()
                        .filter(point -> Math.abs(point.ageKa() - ageKa) <= STEP_KA)
                        .min(Comparator.comparingDouble(point -> Math.abs(point.ageKa() - ageKa)))
                        .stream()
                        .map(point -> here + sea(curve.id(), point)))
                .findFirst()
                .orElse(here);
    }

    private static String sea(String curve, CurvePoint point) {
        return format(
                "; sea of %s then %.1f m (95 %%: %.1f to %.1f m)",
                curve, point.levelMetres(), point.low95Metres(), point.high95Metres());
    }

    private static String format(String text, Object... values) {
        return Wording.number(String.format(Locale.ROOT, text.replace("-", "\u0001"), values)).replace('\u0001', '-');
    }
}
