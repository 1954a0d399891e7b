package stillstand.study;

import java.util.List;
import java.util.Optional;
import stillstand.ledger.Assumption;
import stillstand.ledger.InputWarning;
import stillstand.uplift.LevelAnswer;
import stillstand.uplift.Quantity;
import stillstand.uplift.Rate;

/**
 * Everything a run found: {@code results.json} is this record, key by key, and figures, report and window work from it
 * alone.
 *
 * @param provenance how to get it again
 * @param seaLevel curves and highstands in use
 * @param levels every level of the study, in the order of the table
 * @param waiting levels without a rate, and why
 * @param intervals rates between levels of a site
 * @param impliedSeaLevel sea level that dated levels imply, given the uplift of the others
 * @param warnings what was odd in the input
 * @param failures sites that could not be done
 * @param ledger what it rests on
 */
public record StudyResult(
        Provenance provenance,
        SeaLevelUsed seaLevel,
        List<LevelAnswer> levels,
        List<Waiting> waiting,
        List<BetweenLevels> intervals,
        List<ImpliedSeaLevel> impliedSeaLevel,
        List<InputWarning> warnings,
        List<Failure> failures,
        List<Assumption> ledger) {
    public StudyResult {
        levels = List.copyOf(levels);
        waiting = List.copyOf(waiting);
        intervals = List.copyOf(intervals);
        impliedSeaLevel = List.copyOf(impliedSeaLevel);
        warnings = List.copyOf(warnings);
        failures = List.copyOf(failures);
        ledger = List.copyOf(ledger);
    }

    /** The same result with another provenance. */
    public StudyResult with(Provenance other) {
        return new StudyResult(
                other, seaLevel, levels, waiting, intervals, impliedSeaLevel, warnings, failures, ledger);
    }

    /** Curves and highstands a run used. */
    public record SeaLevelUsed(List<CurveUsed> curves, List<HighstandUsed> highstands) {
        public SeaLevelUsed {
            curves = List.copyOf(curves);
            highstands = List.copyOf(highstands);
        }
    }

    /** A curve, its weight among the study's curves, and its line and band through time. */
    public record CurveUsed(String id, double weight, List<CurvePoint> points) {
        public CurveUsed {
            points = List.copyOf(points);
        }
    }

    /** A point of a curve: ages in ka before present, levels in metres above present mean sea level. */
    public record CurvePoint(
            double ageKa,
            double levelMetres,
            double low68Metres,
            double high68Metres,
            double low95Metres,
            double high95Metres) {}

    /** A highstand in use; {@code level} is where the sea stood above present mean sea level. */
    public record HighstandUsed(
            String stage,
            String highstandClass,
            double ageKa,
            double ageSigmaKa,
            double levelMetres,
            double levelSigmaMetres,
            String source) {}

    /** A level without a rate, and the reason. */
    public record Waiting(String site, String level, String reason) {}

    /** Rate of motion in the time between two levels of a site, the younger first. */
    public record BetweenLevels(String site, String fromLevel, String toLevel, Rate rate) {}

    /**
     * Sea level that a dated level implies, given the uplift of the others.
     *
     * @param site name of the site
     * @param level the dated level
     * @param age its age, ka
     * @param seaLevelMetres implied height of the sea above its present mean level
     * @param upliftFrom the level whose rate was used
     * @param circular whether that rate rests on the level itself or on its highstand
     */
    public record ImpliedSeaLevel(
            String site,
            String level,
            Quantity age,
            Quantity seaLevelMetres,
            Optional<String> upliftFrom,
            boolean circular) {}

    /** A site that could not be done, and why. */
    public record Failure(String site, String reason) {}
}
