package stillstand.figure;

import java.awt.Graphics2D;
import java.awt.geom.Rectangle2D;
import java.awt.image.BufferedImage;
import java.util.ArrayList;
import java.util.List;
import java.util.concurrent.TimeUnit;
import org.jfree.chart.JFreeChart;
import org.openjdk.jmh.annotations.Benchmark;
import org.openjdk.jmh.annotations.BenchmarkMode;
import org.openjdk.jmh.annotations.Fork;
import org.openjdk.jmh.annotations.Measurement;
import org.openjdk.jmh.annotations.Mode;
import org.openjdk.jmh.annotations.OutputTimeUnit;
import org.openjdk.jmh.annotations.Scope;
import org.openjdk.jmh.annotations.State;
import org.openjdk.jmh.annotations.Warmup;
import stillstand.study.StudyResult;
import stillstand.study.StudyResult.CurvePoint;
import stillstand.study.StudyResult.CurveUsed;
import stillstand.study.StudyResult.SeaLevelUsed;
import stillstand.uplift.LevelAnswer;

/** Repainting the Stair of an invented site with 30 levels under a curve of 1,000 points, as a window does when it is resized. */
@State(Scope.Benchmark)
@BenchmarkMode(Mode.AverageTime)
@OutputTimeUnit(TimeUnit.MILLISECONDS)
@Fork(1)
@Warmup(iterations = 3, time = 1)
@Measurement(iterations = 5, time = 1)
public class FigureBenchmark {
    private static final int LEVELS = 30;
    private static final int POINTS = 1000;

    private final JFreeChart chart = Figures.of(result()).figures().stream()
            .filter(figure -> figure.kind() == FigureKind.STAIR)
            .findFirst()
            .orElseThrow()
            .chart(PageWidth.TWO);
    private final BufferedImage screen = new BufferedImage(1200, 700, BufferedImage.TYPE_INT_RGB);

    static StudyResult result() {
        List<LevelAnswer> levels = new ArrayList<>();
        for (int i = 0; i < LEVELS; i++) {
            double ageKa = 20 + 13.0 * i;
            levels.add(InventedCoasts.level("Long Stair", "H" + i, "5e", ageKa, ageKa - 5, 1, 0.02, 0.9));
        }
        StudyResult all = InventedCoasts.study(levels, List.of(), List.of());
        List<CurvePoint> points = new ArrayList<>();
        for (int i = 0; i < POINTS; i++) {
            double metres = -60 + 60 * Math.sin(i / 15.0);
            points.add(new CurvePoint(0.43 * i, metres, metres - 8, metres + 8, metres - 16, metres + 16));
        }
        SeaLevelUsed sea = new SeaLevelUsed(
                List.of(new CurveUsed("invented-sea", 1, points)), all.seaLevel().highstands());
        return new StudyResult(
                all.provenance(),
                sea,
                all.levels(),
                all.waiting(),
                all.flights(),
                all.intervals(),
                all.impliedSeaLevel(),
                all.leverage(),
                all.residuals(),
                all.curveChoice(),
                all.curveEvidence(),
                all.warnings(),
                all.failures(),
                all.ledger());
    }

    @Benchmark
    public BufferedImage repaint() {
        Graphics2D graphics = screen.createGraphics();
        try {
            chart.draw(graphics, new Rectangle2D.Double(0, 0, screen.getWidth(), screen.getHeight()));
        } finally {
            graphics.dispose();
        }
        return screen;
    }
}
