package stillstand.view;

import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import stillstand.report.Wording;
import stillstand.study.SitePreview;
import stillstand.study.StudyResult.CurvePoint;
import stillstand.uplift.FlightPreview;
import stillstand.uplift.FlightResult;
import stillstand.uplift.FlightResult.Fate;
import stillstand.uplift.PredictedStair;
import stillstand.view.StairPicture.Link;
import stillstand.view.StairPicture.Mark;
import stillstand.view.StairPicture.Stand;

/** What the Stair says: of its answer, of a preview, of the things under the pointer. */
final class StairReadings {
    private static final double STEP_KA = 1.5;
    private static final String HYPHEN = "\u2010";

    private StairReadings() {}

    static String stand(Stand stand) {
        return format(
                "Highstand %s: the sea at %.1f ± %.1f m, %.1f ± %.1f ka ago (1 sigma)",
                stand.stage(), stand.metres(), stand.sigmaMetres(), stand.ageKa(), stand.ageSigmaKa());
    }

    static String level(Mark level) {
        return format(
                "Level %s: its sea stands at %.1f m today (95 %%: %.1f to %.1f m)",
                level.name(),
                level.metres(),
                level.interval95().low(),
                level.interval95().high());
    }

    /** What a line says. */
    static String link(Link link, boolean isPreview) {
        String sea = link.seaMetres() < 0 ? format("(%.1f)", link.seaMetres()) : format("%.1f", link.seaMetres());
        String slope = format("(%.1f − %s m) in %.1f kyr = ", link.metres(), sea, link.ageKa())
                + format("%.3f m/kyr", link.rateMetresPerKyr());
        if (link.stage().isEmpty()) {
            return link.level() + " at its own age: " + slope;
        }
        return (isPreview ? "Preview: " : "") + link.level() + " records " + link.stage() + " with probability "
                + format("%.2f", link.probability()) + ": " + slope;
    }

    /** What a run found. */
    static String answered(FlightResult flight) {
        return "Answer of the last run: " + Wording.rate(flight.rate()) + " m/kyr, 95 % "
                + Wording.interval95(flight.rate()) + "."
                + (flight.model().equals(FlightResult.CONSTANT)
                        ? ""
                        : " Its rate changes with time (" + flight.model() + "); a slid rate does not.");
    }

    /** What a preview found, and that it is one. */
    static String previewed(FlightPreview found, SitePreview of) {
        String under = of.isOfFirstCurveAlone() ? " under " + of.basis().id() + " alone" : "";
        return "Preview, not the answer" + under + ": " + Wording.rate(found.rate()) + " m/kyr, 95 % "
                + Wording.interval95(found.rate()) + ". Run for the answer.";
    }

    /** How far predicted steps are from the levels; empty where there are none to compare. */
    static Optional<String> miss(StairPicture picture, PredictedStair stair) {
        List<Mark> levels = picture.levels().stream().filter(Mark::takesPart).toList();
        double[] standing = stair.steps().stream()
                .filter(step -> step.overrunBy().isEmpty())
                .mapToDouble(PredictedStair.Step::heightMetres)
                .toArray();
        if (levels.isEmpty() || standing.length == 0) {
            return Optional.empty();
        }
        double squares = 0;
        for (Mark level : levels) {
            double nearest = Arrays.stream(standing)
                    .map(metres -> Math.abs(metres - level.metres()))
                    .min()
                    .orElseThrow();
            squares += nearest * nearest / levels.size();
        }
        return Optional.of(
                format("The nearest steps miss the levels by %.1f m (root mean square). ", Math.sqrt(squares))
                        + "A good fit alone says little.");
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
        // hyphens of the sentence itself stay hyphens, those of numbers become minus signs
        return Wording.number(String.format(Locale.ROOT, text.replace("-", HYPHEN), values))
                .replace(HYPHEN, "-");
    }
}
