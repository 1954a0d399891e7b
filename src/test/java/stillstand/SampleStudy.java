package stillstand;

import java.util.List;
import java.util.Map;
import java.util.Optional;
import stillstand.ledger.Assumption;
import stillstand.ledger.InputWarning;
import stillstand.sealevel.Highstand;
import stillstand.sealevel.HighstandClass;
import stillstand.sealevel.HighstandTable;
import stillstand.sealevel.SharedErrors;
import stillstand.sensitivity.CurveChoice;
import stillstand.sensitivity.CurveEvidence;
import stillstand.shoreline.DatedSample;
import stillstand.shoreline.FormsAt;
import stillstand.shoreline.IndicativeMeaning;
import stillstand.shoreline.IndicativeRule;
import stillstand.shoreline.Level;
import stillstand.shoreline.Site;
import stillstand.shoreline.StageChoice;
import stillstand.study.InputFile;
import stillstand.study.Provenance;
import stillstand.study.SeaLevelCase;
import stillstand.study.SitePlan;
import stillstand.study.Study;
import stillstand.study.StudyResult;
import stillstand.study.StudyResult.CurvePoint;
import stillstand.study.StudyResult.CurveUsed;
import stillstand.study.StudyResult.Failure;
import stillstand.study.StudyResult.HighstandUsed;
import stillstand.study.StudyResult.SeaLevelUsed;
import stillstand.study.StudyResult.Waiting;
import stillstand.study.StudySettings;
import stillstand.uncertainty.DensityBins;
import stillstand.uncertainty.Exact;
import stillstand.uncertainty.Interval;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.Uncertain;
import stillstand.uplift.BetweenLevels;
import stillstand.uplift.CauchyPrior;
import stillstand.uplift.FlightResult;
import stillstand.uplift.ImpliedSeaLevel;
import stillstand.uplift.LevelAnswer;
import stillstand.uplift.LevelAnswer.Agreement;
import stillstand.uplift.LevelAnswer.Bound;
import stillstand.uplift.LevelAnswer.Budget;
import stillstand.uplift.LevelAnswer.Errors;
import stillstand.uplift.LevelAnswer.FirstOrder;
import stillstand.uplift.LevelAnswer.MonteCarlo;
import stillstand.uplift.LevelAnswer.SampleAnswer;
import stillstand.uplift.LevelAnswer.Share;
import stillstand.uplift.LevelAnswer.StageProbability;
import stillstand.uplift.LevelResidual;
import stillstand.uplift.Quantity;
import stillstand.uplift.Rate;

/** Invented results that use every component of the records once, for tests of whatever reads or writes results. */
public final class SampleStudy {
    private SampleStudy() {}

    /** A rising site with two levels and a waiting one, a slow site with one level. */
    public static StudyResult result() {
        Provenance provenance = new Provenance(
                Provenance.CURRENT_VERSION,
                20261201,
                "test generator",
                List.of(new InputFile("levels.csv", "ab12")),
                Optional.of("2026-12-01T10:00:00Z"),
                Optional.of(0.25));
        SeaLevelUsed seaLevel = new SeaLevelUsed(
                List.of(new CurveUsed("made-up-curve", 1, List.of(new CurvePoint(0.5, -1, -2, 0, -3, 1)))),
                List.of(
                        new HighstandUsed("5a", "interstadial", 80, 2, -8.5, 4.6, "an invented source"),
                        new HighstandUsed("5e", "interglacial", 122.5, 3.3, 7.5, 1.5, "an invented source")));
        return new StudyResult(
                provenance,
                seaLevel,
                List.of(rising(), waiting(), slow()),
                List.of(new Waiting("North cliff", "T2", "it is tied to no single highstand")),
                List.of(SampleFlight.result()),
                List.of(new BetweenLevels("North cliff", "T1", "T4", rate(0.4, 0.05))),
                List.of(new ImpliedSeaLevel("North cliff", "T4", age(), height(-8, 5), "T1", false)),
                SampleLeverage.result(),
                List.of(new LevelResidual("North cliff", "T4", 60.8, 60.9, 3.5)),
                List.of(
                        choice("made-up-curve", Optional.of(-12.5), 0.75),
                        choice("other-curve", Optional.of(-13.5), 0.25),
                        choice(CurveChoice.EVIDENCE_WEIGHTED, Optional.of(-12.75), 1),
                        choice(CurveChoice.EQUAL_WEIGHTED, Optional.empty(), 1)),
                List.of(new CurveEvidence(
                        "all sites", List.of("North cliff", "South cliff"), "made-up-curve", -25, 0.875)),
                SampleComparison.pairs(),
                SampleComparison.motions(),
                SampleComparison.groups(),
                SampleComparison.tilts(),
                List.of(new InputWarning("levels.csv", 3, 4, "elevation_m: 1200 looks like feet")),
                List.of(new Failure("East bay", "its curve ends at 20 ka")),
                List.of(
                        new Assumption("datum offset", "0 m, exact", "Stillstand's default", "North cliff"),
                        new Assumption("=prior of the rate", "cauchy 0 0.5 from -10 to 15", "the study", "all")));
    }

    private static CurveChoice choice(String curve, Optional<Double> logEvidence, double weight) {
        return new CurveChoice(
                "North cliff",
                Optional.empty(),
                curve,
                rate(0.4, 0.05),
                logEvidence,
                weight,
                List.of(new FlightResult.Match("T4", Optional.of("5e"))));
    }

    /** The same results, with all sites done. */
    public static StudyResult withoutFailure() {
        StudyResult all = result();
        return new StudyResult(
                all.provenance(),
                all.seaLevel(),
                all.levels(),
                all.waiting(),
                all.flights(),
                all.intervals(),
                all.impliedSeaLevel(),
                all.leverage(),
                all.residuals(),
                all.curveChoice(),
                all.curveEvidence(),
                all.comparison(),
                all.siteMotion(),
                all.siteGroups(),
                all.terraceTilts(),
                all.warnings(),
                List.of(),
                all.ledger());
    }

    private static LevelAnswer rising() {
        Share share = new Share(0.5, 0.5625, 0.0125);
        return new LevelAnswer(
                "North cliff",
                "T4",
                List.of(new StageProbability("5e", 0.75), new StageProbability("5a", 0.25)),
                Optional.of(rate(0.4359, 0.0199)),
                Optional.of(rate(0.4351, 0.0201)),
                Optional.of(new FirstOrder(0.4356, 0.0198)),
                Optional.of(age()),
                Optional.of(height(60.9, 1.8)),
                Optional.of(1.0),
                Optional.empty(),
                Optional.of(new Budget(
                        Optional.of(share),
                        Optional.empty(),
                        Optional.of(share),
                        Optional.of(share),
                        Optional.empty())),
                Optional.of(new MonteCarlo(131072, true, Optional.of(1.0E-5), Optional.of(new Errors(0.0001, 0.0002)))),
                List.of(
                        new SampleAnswer("C-1", Optional.of(age()), Optional.of(rate(0.41, 0.03)), Optional.empty()),
                        new SampleAnswer(
                                "C-2",
                                Optional.empty(),
                                Optional.empty(),
                                Optional.of("the curve is too steep at this age to give a rate"))),
                Optional.empty(),
                Optional.of(new Agreement(1.25, 3, 0.28)));
    }

    private static LevelAnswer waiting() {
        return new LevelAnswer(
                "North cliff",
                "T2",
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
                "Old shore",
                "S1",
                List.of(new StageProbability("5e", 1)),
                Optional.of(rate(-0.004, 0.014)),
                Optional.empty(),
                Optional.of(new FirstOrder(-0.004, 0.0141)),
                Optional.of(age()),
                Optional.of(height(7, 1)),
                Optional.of(0.39),
                Optional.of(new Bound(0.0234, 0.0311, 0.95)),
                Optional.empty(),
                Optional.of(new MonteCarlo(4096, false, Optional.empty(), Optional.empty())),
                List.of(),
                Optional.empty(),
                Optional.empty());
    }

    /** A rate whose intervals are those of a normal number. */
    public static Rate rate(double median, double sd) {
        Interval narrow = new Interval(median - sd, median + sd);
        Interval wide = new Interval(median - 1.96 * sd, median + 1.96 * sd);
        return new Rate(
                median,
                Optional.of(median),
                Optional.of(sd),
                narrow,
                wide,
                narrow,
                wide,
                Optional.of(new DensityBins(median - 3 * sd, median + 3 * sd, List.of(0.25, 0.5, 0.25))),
                Rate.UNIT);
    }

    private static Quantity age() {
        return quantity(122.5, 3.3, "ka");
    }

    private static Quantity height(double median, double sd) {
        return quantity(median, sd, "m");
    }

    private static Quantity quantity(double median, double sd, String unit) {
        return new Quantity(
                median,
                Optional.of(median),
                Optional.of(sd),
                new Interval(median - sd, median + sd),
                new Interval(median - 2 * sd, median + 2 * sd),
                unit);
    }

    /** The sites of {@link #result}, with columns of the user's own. */
    public static List<Site> sites() {
        Level t4 = level("T4", "5e", new Normal(61.4, 1.5), List.of(sample("C-1", true), sample("C-2", false)));
        Level t2 = level("T2", "", new Normal(20, 1), List.of());
        Level s1 = level("S1", "5e", new Exact(7), List.of());
        return List.of(
                site("North cliff", 0.5, List.of(t4, t2), Map.of("x_team", "@both")),
                site("Old shore", 0, List.of(s1), Map.of()));
    }

    /** The study of those sites: T4 and S1 are tied to stage 5e of an invented table, T2 to nothing. */
    public static Study study() {
        HighstandTable table = new HighstandTable(
                "made-up-table",
                true,
                List.of(
                        highstand("5a", HighstandClass.INTERSTADIAL, 80, 2, new Normal(-8.5, 4.6)),
                        highstand("5e", HighstandClass.INTERGLACIAL, 122.5, 3.3, new Normal(7.5, 1.5))),
                SharedErrors.NONE,
                List.of());
        SeaLevelCase sea = new SeaLevelCase("made-up-table", 1, Optional.empty(), table);
        return new Study(
                settings(),
                sites().stream()
                        .map(site -> new SitePlan(site, CauchyPrior.DEFAULT, List.of(sea)))
                        .toList(),
                List.of(sea),
                result().warnings(),
                result().ledger(),
                result().provenance().inputs());
    }

    private static Highstand highstand(
            String stage, HighstandClass highstandClass, double ageKa, double ageSigmaKa, Normal level) {
        return new Highstand(
                stage, highstandClass, ageKa, ageSigmaKa, level, 0, 1, false, false, false, 0, "an invented source");
    }

    /** Settings with few draws. */
    public static StudySettings settings() {
        return new StudySettings(
                "An invented coast",
                "",
                20261201,
                new StudySettings.Draws(1 << 16, 1, Optional.empty()),
                new StudySettings.SeaLevelChoice(
                        List.of(),
                        Optional.of("made-up-table"),
                        Optional.empty(),
                        true,
                        Optional.empty(),
                        new StudySettings.Setting(0, true),
                        new StudySettings.Setting(0, true),
                        Optional.empty(),
                        false),
                new StudySettings.RateChoice(CauchyPrior.DEFAULT, StudySettings.Changes.NONE),
                new StudySettings.Matching(
                        new StudySettings.Recording.Beta(4, 2.5),
                        Optional.empty(),
                        Optional.empty(),
                        1000,
                        new StudySettings.Setting(0.05, false),
                        0.95),
                IndicativeRule.QUADRATURE,
                new StudySettings.Screening(
                        Optional.empty(),
                        Optional.empty(),
                        Optional.empty(),
                        Optional.empty(),
                        Optional.empty(),
                        Optional.empty(),
                        Optional.empty()),
                Optional.empty());
    }

    private static Site site(String name, double datumOffsetMetres, List<Level> levels, Map<String, String> own) {
        return new Site(
                name,
                Optional.empty(),
                Optional.empty(),
                Optional.empty(),
                new Exact(datumOffsetMetres),
                Optional.empty(),
                Optional.empty(),
                levels,
                List.of(),
                "",
                own);
    }

    private static Level level(String name, String stage, Uncertain elevationMetres, List<DatedSample> samples) {
        return new Level(
                name,
                elevationMetres,
                new IndicativeMeaning("shoreline-angle", new Exact(0), 2),
                FormsAt.HIGHSTAND,
                new Exact(0),
                new Exact(0),
                stage.isEmpty() ? StageChoice.ANY : new StageChoice(List.of(stage), List.of()),
                Optional.empty(),
                false,
                Optional.empty(),
                0,
                samples,
                "",
                Map.of("x_notebook", "-7", "x_formula", "=1+1"));
    }

    private static DatedSample sample(String name, boolean used) {
        return new DatedSample(
                name,
                Optional.empty(),
                Optional.empty(),
                Optional.empty(),
                Optional.of(new Normal(122, 1)),
                DatedSample.GrowthPosition.YES,
                DatedSample.Role.LEVEL,
                used,
                used ? "" : "calcite",
                Optional.empty(),
                "",
                "",
                "",
                Map.of("x_notebook", "12"));
    }
}
