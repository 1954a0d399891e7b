package stillstand.study;

import java.util.List;
import java.util.Optional;
import stillstand.comparison.SiteComparison;
import stillstand.comparison.SiteGroup;
import stillstand.comparison.SiteMotion;
import stillstand.comparison.TerraceTilt;
import stillstand.ledger.Assumption;
import stillstand.ledger.InputWarning;
import stillstand.sensitivity.CurveChoice;
import stillstand.sensitivity.CurveEvidence;
import stillstand.sensitivity.Leverage;
import stillstand.uplift.BetweenLevels;
import stillstand.uplift.FlightResult;
import stillstand.uplift.ImpliedSeaLevel;
import stillstand.uplift.LevelAnswer;
import stillstand.uplift.LevelResidual;

/**
 * Everything a run found: {@code results.json} is this record, key by key, and figures, report and window work from it
 * alone.
 *
 * @param provenance how to get it again
 * @param seaLevel curves and highstands in use
 * @param levels every level of the study, in the order of the table
 * @param waiting levels without a rate, and why
 * @param flights one for each site with a level to be matched
 * @param intervals rates between levels of a site
 * @param impliedSeaLevel sea level that dated levels imply, given the uplift of the others
 * @param leverage what the answers hang on
 * @param residuals measured against predicted heights of the flights
 * @param curveChoice what each of several curves makes of each level and flight, beside their mixtures
 * @param curveEvidence what the flights of a region together say of the curves
 * @param comparison differences between sites
 * @param siteMotion which sites go up, are stable or go down
 * @param siteGroups what the sites of a coast or island group say together
 * @param terraceTilts tilts of terraces from many points on each
 * @param warnings what was odd in the input
 * @param failures sites that could not be done
 * @param ledger what it rests on
 */
public record StudyResult(
        Provenance provenance,
        SeaLevelUsed seaLevel,
        List<LevelAnswer> levels,
        List<Waiting> waiting,
        List<FlightResult> flights,
        List<BetweenLevels> intervals,
        List<ImpliedSeaLevel> impliedSeaLevel,
        Leverage leverage,
        List<LevelResidual> residuals,
        List<CurveChoice> curveChoice,
        List<CurveEvidence> curveEvidence,
        List<SiteComparison> comparison,
        List<SiteMotion> siteMotion,
        List<SiteGroup> siteGroups,
        List<TerraceTilt> terraceTilts,
        List<InputWarning> warnings,
        List<Failure> failures,
        List<Assumption> ledger) {
    public StudyResult {
        levels = List.copyOf(levels);
        waiting = List.copyOf(waiting);
        flights = List.copyOf(flights);
        intervals = List.copyOf(intervals);
        impliedSeaLevel = List.copyOf(impliedSeaLevel);
        residuals = List.copyOf(residuals);
        curveChoice = List.copyOf(curveChoice);
        curveEvidence = List.copyOf(curveEvidence);
        comparison = List.copyOf(comparison);
        siteMotion = List.copyOf(siteMotion);
        siteGroups = List.copyOf(siteGroups);
        terraceTilts = List.copyOf(terraceTilts);
        warnings = List.copyOf(warnings);
        failures = List.copyOf(failures);
        ledger = List.copyOf(ledger);
    }

    /** A result that compares no sites. */
    public StudyResult(
            Provenance provenance,
            SeaLevelUsed seaLevel,
            List<LevelAnswer> levels,
            List<Waiting> waiting,
            List<FlightResult> flights,
            List<BetweenLevels> intervals,
            List<ImpliedSeaLevel> impliedSeaLevel,
            Leverage leverage,
            List<LevelResidual> residuals,
            List<CurveChoice> curveChoice,
            List<CurveEvidence> curveEvidence,
            List<InputWarning> warnings,
            List<Failure> failures,
            List<Assumption> ledger) {
        this(
                provenance,
                seaLevel,
                levels,
                waiting,
                flights,
                intervals,
                impliedSeaLevel,
                leverage,
                residuals,
                curveChoice,
                curveEvidence,
                List.of(),
                List.of(),
                List.of(),
                List.of(),
                warnings,
                failures,
                ledger);
    }

    /** The same result with another provenance. */
    public StudyResult with(Provenance other) {
        return new StudyResult(
                other,
                seaLevel,
                levels,
                waiting,
                flights,
                intervals,
                impliedSeaLevel,
                leverage,
                residuals,
                curveChoice,
                curveEvidence,
                comparison,
                siteMotion,
                siteGroups,
                terraceTilts,
                warnings,
                failures,
                ledger);
    }

    /** The flight of a site; empty where it has none. */
    public Optional<FlightResult> flight(String site) {
        return flights.stream().filter(each -> each.site().equals(site)).findFirst();
    }

    /** Why a level has no rate; empty where it has one. */
    public Optional<String> whyWaiting(String site, String level) {
        return waiting.stream()
                .filter(waits -> waits.site().equals(site) && waits.level().equals(level))
                .map(Waiting::reason)
                .findFirst();
    }

    /** Curves and highstands a run used. */
    public record SeaLevelUsed(List<CurveUsed> curves, List<HighstandUsed> highstands) {
        public SeaLevelUsed {
            curves = List.copyOf(curves);
            highstands = List.copyOf(highstands);
        }

        /** What a run of this study would use. */
        public static SeaLevelUsed of(Study study) {
            return SeaLevelSummary.of(study);
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

    /** A site that could not be done, and why. */
    public record Failure(String site, String reason) {}
}
