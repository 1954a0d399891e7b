package stillstand.uplift;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.ExecutorService;
import stillstand.files.ShippedLibrary;
import stillstand.ledger.RunMonitor;
import stillstand.sealevel.CurveErrorPath;
import stillstand.sealevel.Highstand;
import stillstand.sealevel.HighstandClass;
import stillstand.sealevel.SeaLevelCurve;
import stillstand.sealevel.SharedErrors;
import stillstand.shoreline.HeightTerm;
import stillstand.uncertainty.DrawStreams;
import stillstand.uncertainty.Exact;
import stillstand.uncertainty.LogNormal;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.Uncertain;

/** Invented inputs that the benchmarks share; {@code paired.py} writes the same ones in numpy. */
final class BenchmarkCases {
    static final int DRAWS = 10_000_000;
    static final DrawStreams STREAMS = new DrawStreams(20261201);
    private static final Uncertain NO_LOWERING = new Exact(0);

    private BenchmarkCases() {}

    /** One level's question. */
    record Case(List<HeightTerm> height, SeaAtLevel sea) {
        /** The ordinary path of a level: everything that a run reports of its rate. */
        LevelRates.Outcome rate(int draws, DrawStreams streams, ExecutorService executor) {
            DrawPlan plan = new DrawPlan(draws, 2, Optional.of(draws));
            return new LevelRates(streams, plan, executor, RunMonitor.SILENT)
                    .of("benchmark", height, NO_LOWERING, List.of(sea), CauchyPrior.DEFAULT);
        }
    }

    /** A terrace at 61 +- 1 m of a highstand 122 +- 1.5 ka old, 5 +- 3 m high. */
    static Case pinned() {
        return new Case(List.of(survey(new Normal(61, 1))), stageFive(new Normal(122, 1.5), new Normal(5, 3)));
    }

    /** A coral at 61 +- 1 m, 123 +- 3 ka old, and the curve of Spratt and Lisiecki read at its age. */
    static Case readOnCurve() {
        return new Case(List.of(survey(new Normal(61, 1))), onCurve(new Normal(123, 3)));
    }

    /** The same coral, which grew in a log-normal depth of median 3 m. */
    static Case deepCoral() {
        HeightTerm depth = new HeightTerm(HeightTerm.Source.PALAEODEPTH, 1, new LogNormal(0, 3, 0.6));
        return new Case(List.of(survey(new Normal(61, 1)), depth), onCurve(new Normal(123, 3)));
    }

    static SeaLevelCurve curve() {
        return ShippedLibrary.load().curve("spratt-lisiecki-2016").orElseThrow();
    }

    private static SeaAtLevel onCurve(Uncertain ageKa) {
        return new SeaAtLevel.OnCurve(curve(), ageKa, 3, 3, 1);
    }

    private static SeaAtLevel stageFive(Uncertain ageKa, Uncertain levelMetres) {
        Highstand row = new Highstand(
                "5e",
                HighstandClass.INTERGLACIAL,
                ageKa.mean(),
                ageKa.standardDeviation(),
                levelMetres,
                0,
                1,
                false,
                false,
                false,
                0,
                "invented");
        return new SeaAtLevel.AtHighstand(row, SharedErrors.NONE, 1, ageKa);
    }

    private static HeightTerm survey(Uncertain metres) {
        return new HeightTerm(HeightTerm.Source.SURVEY, 1, metres);
    }

    /** Eight corals of one site, 20 to 118 ka old, that read one curve. */
    static JointLevels eightCorals() {
        SeaLevelCurve curve = curve();
        List<JointLevels.Entry> entries = new ArrayList<>();
        for (int i = 0; i < 8; i++) {
            SeaAtLevel sea = new SeaAtLevel.OnCurve(curve, new Normal(20 + 14 * i, 1), 3, 3, 1);
            entries.add(new JointLevels.Entry(
                    "coral " + i, List.of(survey(new Normal(10 + 8 * i, 1))), NO_LOWERING, List.of(sea)));
        }
        return new JointLevels("site", "site", entries, STREAMS);
    }

    /** Draws of the curve's errors alone, at eight ages a draw. */
    static double errorPaths(int draws) {
        CurveErrorPath path = new CurveErrorPath(5, STREAMS.stream("benchmark", 0));
        double[] agesKa = {20, 34, 48, 62, 76, 90, 104, 118};
        double[] deviates = new double[agesKa.length];
        double sum = 0;
        for (int i = 0; i < draws; i++) {
            path.drawAt(agesKa, deviates);
            sum += deviates[7];
        }
        return sum;
    }
}
