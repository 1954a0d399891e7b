package stillstand.study;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import stillstand.sealevel.Highstand;
import stillstand.sealevel.SeaLevelCurve;
import stillstand.sealevel.SharedErrors;
import stillstand.uncertainty.Interval;
import stillstand.uncertainty.Summary;

/** The curves and highstands of a run as results hold them. */
final class SeaLevelSummary {
    private static final double STEP_KA = 1;

    private SeaLevelSummary() {}

    static StudyResult.SeaLevelUsed of(Study study) {
        Map<String, SeaLevelCase> cases = new LinkedHashMap<>();
        study.seaLevel().forEach(sea -> cases.put(sea.id(), sea));
        study.sites().forEach(site -> site.seaLevel().forEach(sea -> cases.putIfAbsent(sea.id(), sea)));
        List<StudyResult.CurveUsed> curves = new ArrayList<>();
        List<StudyResult.HighstandUsed> highstands = new ArrayList<>();
        for (SeaLevelCase sea : cases.values()) {
            sea.curve()
                    .ifPresent(curve -> curves.add(new StudyResult.CurveUsed(curve.id(), sea.weight(), points(curve))));
            SharedErrors shared = sea.highstands().sharedErrors();
            for (Highstand row : sea.highstands().rows()) {
                StudyResult.HighstandUsed used = new StudyResult.HighstandUsed(
                        row.stage(),
                        row.highstandClass().name().toLowerCase(Locale.ROOT),
                        row.ageKa(),
                        row.marginalAgeSigmaKa(shared),
                        row.level().mean(),
                        row.marginalLevelSigmaMetres(shared),
                        row.source());
                // several curves with the same independent levels
                if (!highstands.contains(used)) {
                    highstands.add(used);
                }
            }
        }
        return new StudyResult.SeaLevelUsed(curves, highstands);
    }

    private static List<StudyResult.CurvePoint> points(SeaLevelCurve curve) {
        List<StudyResult.CurvePoint> points = new ArrayList<>();
        for (double ageKa = Math.ceil(curve.fromKa()); ageKa <= curve.toKa(); ageKa += STEP_KA) {
            Summary there = Summary.of(curve.readAt(ageKa));
            Interval inner = there.interval68();
            Interval outer = there.interval95();
            points.add(new StudyResult.CurvePoint(
                    ageKa, curve.levelMetresAt(ageKa), inner.low(), inner.high(), outer.low(), outer.high()));
        }
        return points;
    }
}
