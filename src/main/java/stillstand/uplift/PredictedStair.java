package stillstand.uplift;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import stillstand.sealevel.Highstand;
import stillstand.sealevel.HighstandTable;
import stillstand.sealevel.SharedErrors;

/**
 * The staircase that a history of uplift leaves under a table of highstands, on its central values: a shoreline stands where no
 * younger sea, today's included, stood as high or higher.
 *
 * @param steps young to old
 */
public record PredictedStair(List<Step> steps) {
    /** What overruns a shoreline below today's sea. */
    public static final String TODAY = "today's sea";

    public PredictedStair {
        steps = List.copyOf(steps);
    }

    /**
     * The shoreline of one highstand.
     *
     * @param stage its label
     * @param ageKa its age, ka
     * @param seaLevelMetres where the sea stood, m above its present mean
     * @param heightMetres where the shoreline stands, or would stand, today
     * @param heightSigmaMetres standard deviation of that, from all errors of the highstand, m
     * @param overrunBy the first stand of the sea, after its own, that reached it; absent = it survives
     */
    public record Step(
            String stage,
            double ageKa,
            double seaLevelMetres,
            double heightMetres,
            double heightSigmaMetres,
            Optional<String> overrunBy) {}

    /**
     * The staircase; generic older rows are left out.
     *
     * @param table the highstands; where it is complete, today's sea overruns nothing
     */
    public static PredictedStair of(HighstandTable table, UpliftHistory history) {
        SharedErrors shared = table.sharedErrors();
        List<Step> steps = new ArrayList<>();
        for (Highstand row : table.rows()) {
            if (!row.isOlder()) {
                double height = row.level().mean() + history.upliftMetresSince(row.ageKa());
                double byAge = history.rateMetresPerKyrAt(row.ageKa()) * row.marginalAgeSigmaKa(shared);
                steps.add(new Step(
                        row.stage(),
                        row.ageKa(),
                        row.level().mean(),
                        height,
                        Math.hypot(row.marginalLevelSigmaMetres(shared), byAge),
                        overrunBy(height, steps, !table.complete())));
            }
        }
        return new PredictedStair(steps);
    }

    /**
     * The staircase of drowned reefs, one for each lowstand: a reef keeps its height where no younger lowstand went as low or lower, and
     * it stands below today's sea.
     *
     * @param basis whose lowstands are meant: those of its curve, or the rows of a table of the user's own
     */
    public static PredictedStair ofDrownedReefs(SeaLevelBasis basis, UpliftHistory history) {
        HighstandTable table = basis.ofDrownedReefs().highstands();
        SharedErrors shared = table.sharedErrors();
        List<Step> steps = new ArrayList<>();
        for (Highstand row : table.rows()) {
            double height = row.level().mean() + history.upliftMetresSince(row.ageKa());
            double byAge = history.rateMetresPerKyrAt(row.ageKa()) * row.marginalAgeSigmaKa(shared);
            Optional<String> overrun = Optional.empty();
            for (Step step : steps) {
                overrun = step.heightMetres <= height ? Optional.of(step.stage) : overrun;
            }
            steps.add(new Step(
                    row.stage(),
                    row.ageKa(),
                    row.level().mean(),
                    height,
                    Math.hypot(row.marginalLevelSigmaMetres(shared), byAge),
                    overrun.isEmpty() && !table.complete() && height >= 0 ? Optional.of(TODAY) : overrun));
        }
        return new PredictedStair(steps);
    }

    private static Optional<String> overrunBy(double heightMetres, List<Step> younger, boolean floor) {
        Optional<String> found = Optional.empty();
        for (Step step : younger) {
            if (step.heightMetres >= heightMetres) {
                found = Optional.of(step.stage);
            }
        }
        return found.isEmpty() && floor && heightMetres <= 0 ? Optional.of(TODAY) : found;
    }
}
