package stillstand.cli;

import java.util.List;
import java.util.Optional;
import java.util.function.UnaryOperator;
import stillstand.sensitivity.MeasurementPlan;
import stillstand.study.StudySettings;
import stillstand.study.StudySettings.Draws;
import stillstand.study.StudySettings.SeaLevelChoice;
import stillstand.study.StudySettings.WeightedCurve;

/**
 * What the command line changes in a study's settings.
 *
 * @param seed in place of the study's
 * @param draws so many for each level, without an adaptive stop
 * @param curves in place of the study's; empty = the study's own
 * @param leverage whether to say what the answers hang on, even where the study does not ask for it
 */
record SettingsChanges(Optional<Long> seed, Optional<Integer> draws, List<WeightedCurve> curves, boolean leverage)
        implements UnaryOperator<StudySettings> {
    @Override
    public StudySettings apply(StudySettings settings) {
        Draws own = settings.draws();
        return new StudySettings(
                settings.title(),
                settings.note(),
                seed.orElse(settings.seed()),
                draws.isPresent() ? new Draws(own.maximum(), own.significantDigits(), draws) : own,
                curves.isEmpty() ? settings.seaLevel() : withCurves(settings.seaLevel()),
                settings.rate(),
                settings.matching(),
                settings.indicativeRange(),
                settings.screening(),
                leverage ? settings.leverage().or(() -> Optional.of(MeasurementPlan.DEFAULT)) : settings.leverage(),
                settings.comparison());
    }

    private SeaLevelChoice withCurves(SeaLevelChoice own) {
        // own picks differ from the study's only where that replaces any
        List<WeightedCurve> different = curves.stream()
                .filter(curve -> own.overrides().isPresent()
                        || curve.overrides().isEmpty()
                        || curves.stream()
                                .noneMatch(other -> other.equals(new WeightedCurve(curve.id(), curve.weight()))))
                .toList();
        return new SeaLevelChoice(
                different,
                own.highstandTable(),
                own.overrides(),
                own.olderThanCurve(),
                own.correlationTimeKa(),
                own.sharedLevelSigmaMetres(),
                own.interstadialSigmaMetres(),
                own.curveAgeSigmaKa(),
                own.rezero());
    }
}
