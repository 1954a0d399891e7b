package stillstand.view;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import stillstand.SampleStudy;
import stillstand.sealevel.Highstand;
import stillstand.sealevel.HighstandClass;
import stillstand.sealevel.HighstandTable;
import stillstand.sealevel.SharedErrors;
import stillstand.sensitivity.Leverage;
import stillstand.shoreline.FormsAt;
import stillstand.shoreline.IndicativeMeaning;
import stillstand.shoreline.Level;
import stillstand.shoreline.Site;
import stillstand.shoreline.StageChoice;
import stillstand.study.SeaLevelCase;
import stillstand.study.SitePlan;
import stillstand.study.Study;
import stillstand.study.StudyResult;
import stillstand.study.StudyResult.CurvePoint;
import stillstand.study.StudyResult.CurveUsed;
import stillstand.study.StudyResult.HighstandUsed;
import stillstand.study.StudyResult.SeaLevelUsed;
import stillstand.study.StudyResult.Waiting;
import stillstand.uncertainty.Exact;
import stillstand.uncertainty.Interval;
import stillstand.uncertainty.Normal;
import stillstand.uplift.CauchyPrior;
import stillstand.uplift.FlightResult;
import stillstand.uplift.FlightResult.Correlation;
import stillstand.uplift.FlightResult.Fate;
import stillstand.uplift.FlightResult.LeftOut;
import stillstand.uplift.FlightResult.Match;
import stillstand.uplift.FlightResult.NumericalError;
import stillstand.uplift.FlightResult.Pairing;
import stillstand.uplift.FlightResult.Segment;
import stillstand.uplift.FlightResult.Unmatched;
import stillstand.uplift.LevelAnswer;
import stillstand.uplift.LevelAnswer.StageProbability;
import stillstand.uplift.LevelResidual;

/**
 * An invented coast that rises by 0.5 m/kyr: its levels stand where highstands of 80, 100, 122.5 and 200 ka have come to. The
 * "answer" is written by hand, so that tests of the window wait for no engine. A second site is slow.
 */
final class InventedStair {
    static final String SITE = "Long Head";

    private InventedStair() {}

    /** The study; level P2 says what it is given, the others nothing. */
    static Study study(StageChoice ofP2) {
        List<Level> levels = List.of(
                level("P1", 31.5, StageChoice.ANY),
                level("P2", 40.6, ofP2),
                level("P3", 68.8, StageChoice.ANY),
                level("P4", 99.5, StageChoice.ANY));
        Site site = new Site(
                SITE,
                Optional.empty(),
                Optional.empty(),
                Optional.empty(),
                new Exact(0),
                Optional.of(new Interval(5, 150)),
                Optional.empty(),
                levels,
                List.of(),
                "",
                Map.of());
        Site unsurveyed = new Site(
                "Bare Point",
                Optional.empty(),
                Optional.empty(),
                Optional.empty(),
                new Exact(0),
                Optional.empty(),
                Optional.empty(),
                List.of(level("B1", 7, StageChoice.ANY)),
                List.of(),
                "",
                Map.of());
        HighstandTable table = new HighstandTable(
                "made-up-table",
                true,
                List.of(
                        stand("5a", 80, -8.5),
                        stand("5c", 100, -9.4),
                        stand("5e", 122.5, 7.5),
                        stand("7a", 200, -0.5),
                        stand("9e", 328, -4)),
                SharedErrors.NONE,
                List.of());
        List<SeaLevelCase> sea = List.of(new SeaLevelCase("made-up-table", 1, Optional.empty(), table));
        return new Study(
                SampleStudy.settings(),
                List.of(
                        new SitePlan(site, CauchyPrior.DEFAULT, sea),
                        new SitePlan(unsurveyed, CauchyPrior.DEFAULT, sea)),
                sea,
                List.of(),
                SampleStudy.result().ledger(),
                SampleStudy.result().provenance().inputs());
    }

    static Study study() {
        return study(StageChoice.ANY);
    }

    private static Level level(String name, double metres, StageChoice choice) {
        return new Level(
                name,
                new Normal(metres, 1),
                new IndicativeMeaning("shoreline-angle", new Exact(0), 2),
                FormsAt.HIGHSTAND,
                new Exact(0),
                new Exact(0),
                choice,
                Optional.empty(),
                false,
                Optional.empty(),
                0,
                List.of(),
                "",
                Map.of());
    }

    private static Highstand stand(String stage, double ageKa, double metres) {
        return new Highstand(
                stage,
                HighstandClass.INTERGLACIAL,
                ageKa,
                2,
                new Normal(metres, 2),
                0,
                1,
                false,
                false,
                false,
                0,
                "invented");
    }

    /** What a run might have said of it: P2 is 5c rather than 5a, 9e is overrun or out of sight. */
    static StudyResult result() {
        List<CurvePoint> points = new ArrayList<>();
        for (int ageKa = 0; ageKa <= 350; ageKa++) {
            double metres = -60 + 60 * Math.cos(ageKa / 18.0);
            points.add(new CurvePoint(ageKa, metres, metres - 5, metres + 5, metres - 10, metres + 10));
        }
        StudyResult base = SampleStudy.result();
        return new StudyResult(
                base.provenance(),
                new SeaLevelUsed(
                        List.of(new CurveUsed("invented-sea", 1, points)),
                        List.of(
                                used("5a", 80, -8.5),
                                used("5c", 100, -9.4),
                                used("5e", 122.5, 7.5),
                                used("7a", 200, -0.5),
                                used("9e", 328, -4))),
                List.of(answer("P1"), answer("P2"), answer("P3"), answer("P4"), slow()),
                List.of(new Waiting(SITE, "P1", "the flight of the site says its highstand")),
                List.of(flight()),
                List.of(),
                List.of(),
                Leverage.NONE,
                List.of(
                        new LevelResidual(SITE, "P1", 31.5, 31.5, 3),
                        new LevelResidual(SITE, "P2", 40.6, 40.6, 3),
                        new LevelResidual(SITE, "P3", 68.8, 68.8, 3),
                        new LevelResidual(SITE, "P4", 99.5, 99.5, 3)),
                List.of(),
                List.of(),
                base.warnings(),
                base.failures(),
                base.ledger());
    }

    private static HighstandUsed used(String stage, double ageKa, double metres) {
        return new HighstandUsed(stage, "interglacial", ageKa, 2, metres, 2, "invented");
    }

    private static LevelAnswer answer(String level) {
        return new LevelAnswer(
                SITE,
                level,
                List.of(),
                Optional.empty(),
                Optional.empty(),
                Optional.empty(),
                Optional.empty(),
                Optional.empty(),
                Optional.empty(),
                Optional.empty(),
                Optional.empty(),
                Optional.empty(),
                List.of(),
                Optional.empty(),
                Optional.empty());
    }

    private static LevelAnswer slow() {
        return new LevelAnswer(
                "Still Head",
                "S1",
                List.of(new StageProbability("5e", 1)),
                Optional.of(SampleStudy.rate(-0.004, 0.014)),
                Optional.empty(),
                Optional.empty(),
                Optional.empty(),
                Optional.empty(),
                Optional.empty(),
                Optional.of(new LevelAnswer.Bound(0.0234, 0.0311, 0.95)),
                Optional.empty(),
                Optional.empty(),
                List.of(),
                Optional.empty(),
                Optional.empty());
    }

    private static FlightResult flight() {
        return new FlightResult(
                SITE,
                FlightResult.CONSTANT,
                SampleStudy.rate(0.5, 0.02),
                Optional.of(1.0),
                Optional.empty(),
                List.of(new Interval(0.48, 0.52)),
                List.of(new Interval(0.3, 0.33), new Interval(0.46, 0.54)),
                List.of(0.6827),
                List.of(0.05, 0.9),
                List.of(new Segment(0, Optional.empty(), SampleStudy.rate(0.5, 0.02))),
                List.of(
                        new Pairing("P1", "5a", 0.98),
                        new Pairing("P2", "5c", 0.7),
                        new Pairing("P2", "5a", 0.25),
                        new Pairing("P2", "5e", 0.01),
                        new Pairing("P3", "5e", 0.99),
                        new Pairing("P4", "7a", 1)),
                List.of(
                        new Unmatched("P1", 0.02),
                        new Unmatched("P2", 0.04),
                        new Unmatched("P3", 0.01),
                        new Unmatched("P4", 0)),
                0.001,
                new Correlation(
                        0.625,
                        List.of(
                                new Match("P1", Optional.of("5a")),
                                new Match("P2", Optional.of("5c")),
                                new Match("P3", Optional.empty()),
                                new Match("P4", Optional.of("7a")))),
                List.of(),
                -12.5,
                new NumericalError(0.0001, 0.01, 0.002),
                List.of(new Fate("9e", 328, 160, 5, 0, 0.2, 0.8, 0, 0), new Fate("7a", 200, 99.5, 3, 1, 0, 0, 0, 0)),
                List.of(new LeftOut("P4", -3.25, SampleStudy.rate(0.41, 0.06))),
                List.of(),
                List.of(),
                List.of());
    }
}
