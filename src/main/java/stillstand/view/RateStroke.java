package stillstand.view;

import javafx.scene.canvas.GraphicsContext;
import stillstand.uncertainty.DensityBins;
import stillstand.uncertainty.Interval;
import stillstand.uplift.Rate;
import stillstand.view.ResultTable.Scale;

/** Draws a rate on a strip: its density, its two shortest intervals and its median. */
final class RateStroke {
    private RateStroke() {}

    static void paint(GraphicsContext g, Rate rate, Scale scale, Palette palette) {
        double foot = scale.height() - 5;
        g.setFill(palette.strength(palette.link(), 0.25));
        rate.density().ifPresent(bins -> fill(g, bins, scale, foot));
        g.setFill(palette.strength(palette.link(), 0.45));
        bar(g, rate.shortest95(), scale, foot, 1.5);
        g.setFill(palette.link());
        bar(g, rate.shortest68(), scale, foot - 1, 3.5);
        g.setStroke(palette.ink());
        g.setLineWidth(1.6);
        g.strokeLine(scale.x(rate.median()), foot - 4, scale.x(rate.median()), foot + 4);
    }

    static void bar(GraphicsContext g, Interval interval, Scale scale, double y, double height) {
        double from = Math.max(0, scale.x(interval.low()));
        double to = Math.min(scale.width(), scale.x(interval.high()));
        g.fillRect(from, y, Math.max(1, to - from), height);
    }

    private static void fill(GraphicsContext g, DensityBins bins, Scale scale, double foot) {
        double most = bins.values().stream().mapToDouble(v -> v).max().orElse(1);
        double width = (bins.to() - bins.from()) / bins.values().size();
        int n = bins.values().size();
        double[] xs = new double[n + 2];
        double[] ys = new double[n + 2];
        xs[0] = scale.x(bins.from());
        ys[0] = foot;
        for (int i = 0; i < n; i++) {
            xs[i + 1] = scale.x(bins.from() + (i + 0.5) * width);
            ys[i + 1] = foot - (foot - 2) * bins.values().get(i) / most;
        }
        xs[n + 1] = scale.x(bins.to());
        ys[n + 1] = foot;
        g.fillPolygon(xs, ys, n + 2);
    }
}
