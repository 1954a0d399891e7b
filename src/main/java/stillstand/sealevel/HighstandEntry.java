package stillstand.sealevel;

import java.util.Optional;
import stillstand.uncertainty.Uncertain;

/**
 * A row of a highstand table as its author wrote it: of a user's own table, or of one that overrides a curve's picks.
 *
 * @param stage label
 * @param ageKa age before 1950, ka, above 0
 * @param ageSigmaKa one standard deviation, ka, 0 or more
 * @param level height of the sea above its present mean, m
 * @param highstandClass absent = that of the stage of this label
 * @param durationKa absent = that of the stage in an override, 0 in an own table
 * @param existsProbability absent = that of the stage in an override, 1 in an own table
 * @param source who says so
 */
public record HighstandEntry(
        String stage,
        double ageKa,
        double ageSigmaKa,
        Uncertain level,
        Optional<HighstandClass> highstandClass,
        Optional<Double> durationKa,
        Optional<Double> existsProbability,
        String source) {
    public HighstandEntry {
        if (stage.isBlank() || stage.equals(Highstand.OLDER)) {
            throw new IllegalArgumentException(
                    "stage must say something, and not '" + Highstand.OLDER + "', but is '" + stage + "'");
        }
        if (!(ageKa > 0 && ageKa < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("ageKa of stage '" + stage + "' must be above 0 but is " + ageKa);
        }
        Highstand.requireSpread("ageSigmaKa", stage, ageSigmaKa);
        durationKa.ifPresent(Highstand::requireDuration);
        existsProbability.ifPresent(Highstand::requireProbability);
    }
}
