package stillstand.sensitivity;

import java.util.List;
import java.util.Optional;
import stillstand.sealevel.CurveFacts;
import stillstand.sealevel.Highstand;
import stillstand.sealevel.HighstandTable;
import stillstand.sealevel.SeaLevelCurve;
import stillstand.shoreline.IndicativeRule;
import stillstand.shoreline.Level;
import stillstand.shoreline.Site;
import stillstand.uplift.DateRules;
import stillstand.uplift.MatchingRules;
import stillstand.uplift.RatePrior;
import stillstand.uplift.SeaLevelBasis;

/**
 * A site and all that its answer supposes.
 *
 * @param site with its levels and samples
 * @param basis the account of sea level
 * @param prior of the rate
 * @param matching how levels are matched to highstands
 * @param indicativeRange what an indicative range means
 * @param dates how far dates are believed
 */
public record Supposition(
        Site site,
        SeaLevelBasis basis,
        RatePrior prior,
        MatchingRules matching,
        IndicativeRule indicativeRange,
        DateRules dates) {

    Supposition with(RatePrior other) {
        return new Supposition(site, basis, other, matching, indicativeRange, dates);
    }

    Supposition with(MatchingRules other) {
        return new Supposition(site, basis, prior, other, indicativeRange, dates);
    }

    Supposition with(IndicativeRule other) {
        return new Supposition(site, basis, prior, matching, other, dates);
    }

    Supposition with(SeaLevelBasis other) {
        return new Supposition(site, other, prior, matching, indicativeRange, dates);
    }

    private Supposition with(Site other) {
        return new Supposition(other, basis, prior, matching, indicativeRange, dates);
    }

    /** The same under another correlation time of the errors of a curve. */
    Supposition withCorrelationTime(SeaLevelCurve curve, double timeKa) {
        CurveFacts facts = curve.facts();
        SeaLevelCurve other = curve.with(facts.with(timeKa, facts.curveAgeSigmaKa()));
        return with(new SeaLevelBasis(basis.id(), Optional.of(other), basis.highstands()));
    }

    /** The same with the curve, and every highstand read from it, moved so that the curve reads 0 m today. */
    Supposition rezeroed(SeaLevelCurve curve) {
        SeaLevelCurve moved = curve.rezeroed();
        double shift = moved.levelMetresAt(moved.fromKa()) - curve.levelMetresAt(curve.fromKa());
        HighstandTable table = basis.highstands();
        List<Highstand> rows = table.rows().stream()
                .map(row -> row.source().equals(curve.id()) ? moved(row, shift) : row)
                .toList();
        HighstandTable other =
                new HighstandTable(table.id(), table.complete(), rows, table.sharedErrors(), table.assumptions());
        return with(new SeaLevelBasis(basis.id(), Optional.of(moved), other));
    }

    private static Highstand moved(Highstand row, double shiftMetres) {
        return new Highstand(
                row.stage(),
                row.highstandClass(),
                row.ageKa(),
                row.ageSigmaKa(),
                row.level().plus(shiftMetres),
                row.durationKa(),
                row.existsProbability(),
                row.takesOffset(),
                row.takesInterstadialFactor(),
                row.takesCurveAgeError(),
                row.localOffsetSigmaMetres(),
                row.source());
    }

    /** The level of this name. */
    Level level(String name) {
        return site.levels().stream()
                .filter(level -> level.name().equals(name))
                .findFirst()
                .orElseThrow();
    }

    /** The same without one sample of one level. */
    Supposition without(String levelName, String sampleName) {
        List<Level> levels = site.levels().stream()
                .map(level -> level.name().equals(levelName) ? without(level, sampleName) : level)
                .toList();
        return with(site.withLevels(levels));
    }

    private static Level without(Level level, String sampleName) {
        return level.withSamples(level.samples().stream()
                .filter(sample -> !sample.name().equals(sampleName))
                .toList());
    }
}
