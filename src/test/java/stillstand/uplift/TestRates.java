package stillstand.uplift;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;
import stillstand.ledger.RunMonitor;
import stillstand.sealevel.CurveFacts;
import stillstand.sealevel.Highstand;
import stillstand.sealevel.HighstandClass;
import stillstand.sealevel.SeaLevelCurve;
import stillstand.sealevel.SharedErrors;
import stillstand.shoreline.HeightTerm;
import stillstand.uncertainty.DrawStreams;
import stillstand.uncertainty.Exact;
import stillstand.uncertainty.Uncertain;

/** Inputs of rates as the tests of this package write them. */
final class TestRates {
    private TestRates() {}

    /** A rate drawn on two threads with a fixed number of blocks. */
    static LevelRates.Outcome rate(
            int blocks, List<HeightTerm> height, Uncertain lowering, List<SeaAtLevel> sea, RatePrior prior) {
        ExecutorService threads = Executors.newFixedThreadPool(2);
        try {
            DrawPlan plan = new DrawPlan(1, 2, Optional.of(blocks * DrawStreams.BLOCK_DRAWS));
            return new LevelRates(new DrawStreams(20261201), plan, threads, RunMonitor.SILENT)
                    .of("test", height, lowering, sea, prior);
        } finally {
            threads.shutdown();
        }
    }

    static HeightTerm survey(Uncertain metres) {
        return new HeightTerm(HeightTerm.Source.SURVEY, 1, metres);
    }

    static HeightTerm depth(Uncertain metres) {
        return new HeightTerm(HeightTerm.Source.PALAEODEPTH, 1, metres);
    }

    /** A highstand by itself, which shares nothing. */
    static SeaAtLevel highstand(Uncertain ageKa, Uncertain levelMetres) {
        return new SeaAtLevel.AtHighstand(
                row("5e", ageKa.mean(), ageKa.standardDeviation(), levelMetres), SharedErrors.NONE, 1, ageKa);
    }

    static Highstand row(String stage, double ageKa, double ageSigmaKa, Uncertain levelMetres) {
        return new Highstand(
                stage,
                HighstandClass.INTERGLACIAL,
                ageKa,
                ageSigmaKa,
                levelMetres,
                0,
                1,
                false,
                false,
                false,
                0,
                "test");
    }

    /** A curve that is linear between points: many knots on the lines, so that any interpolation follows them. */
    static SeaLevelCurve linear(double[] agesKa, double[] levelsMetres, double sigmaMetres) {
        List<Double> ages = new ArrayList<>();
        List<Double> levels = new ArrayList<>();
        double stepKa = 0.02;
        for (int i = 0; i + 1 < agesKa.length; i++) {
            int steps = (int) Math.round((agesKa[i + 1] - agesKa[i]) / stepKa);
            for (int k = 0; k < steps || (k == steps && i + 2 == agesKa.length); k++) {
                double part = (double) k / steps;
                ages.add(agesKa[i] + part * (agesKa[i + 1] - agesKa[i]));
                levels.add(levelsMetres[i] + part * (levelsMetres[i + 1] - levelsMetres[i]));
            }
        }
        double[] sigmas = new double[ages.size()];
        Arrays.fill(sigmas, sigmaMetres);
        CurveFacts facts = new CurveFacts("test", "today", "test", "1 sigma", false, 5, 0, 0, List.of());
        return SeaLevelCurve.withSigmas("test", facts, column(ages), column(levels), sigmas);
    }

    static SeaAtLevel onCurve(SeaLevelCurve curve, Uncertain ageKa) {
        return new SeaAtLevel.OnCurve(curve, ageKa, 0, 0, 1);
    }

    static final Uncertain NO_LOWERING = new Exact(0);

    private static double[] column(List<Double> values) {
        return values.stream().mapToDouble(Double::doubleValue).toArray();
    }
}
