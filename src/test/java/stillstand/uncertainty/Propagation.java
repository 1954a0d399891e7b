package stillstand.uncertainty;

import java.util.ArrayList;
import java.util.List;

/** Carries input distributions through a function by randomised Sobol' points, as the tests need it. */
record Propagation(DrawDistribution distribution, List<BlockEstimates> blocks) {
    /** Pinned; other seeds by {@code -Dtest.seed=...}. */
    static final long SEED = Long.getLong("test.seed", 20261201L);

    static final int POINTS = DrawStreams.BLOCK_DRAWS;

    Propagation {
        blocks = List.copyOf(blocks);
    }

    /** A function of the values of the inputs at one point. */
    interface PointFunction {
        double at(double[] inputs);
    }

    static Propagation of(List<? extends Uncertain> inputs, int blockCount, PointFunction function) {
        return of(inputs.size(), blockCount, (probabilities, out) -> {
            for (int d = 0; d < inputs.size(); d++) {
                inputs.get(d).toQuantiles(probabilities[d]);
            }
            double[] point = new double[inputs.size()];
            for (int i = 0; i < out.length; i++) {
                for (int d = 0; d < point.length; d++) {
                    point[d] = probabilities[d][i];
                }
                out[i] = function.at(point);
            }
        });
    }

    static Propagation of(int dimensions, int blockCount, ColumnFunction function) {
        return of(new DrawStreams(SEED), dimensions, blockCount, function);
    }

    static Propagation of(DrawStreams streams, int dimensions, int blockCount, ColumnFunction function) {
        List<DrawHistogram> histograms = new ArrayList<>();
        for (int block = 0; block < blockCount; block++) {
            SobolPoints points = SobolPoints.scrambled(streams, "test", dimensions, block);
            double[][] columns = new double[dimensions][POINTS];
            for (int d = 0; d < dimensions; d++) {
                points.column(d, columns[d]);
            }
            double[] out = new double[POINTS];
            function.evaluate(columns, out);
            DrawHistogram histogram = block == 0
                    ? DrawHistogram.forDrawsLike(out)
                    : histograms.get(0).emptyCopy();
            histogram.add(out);
            histograms.add(histogram);
        }
        DrawHistogram all = histograms.get(0).emptyCopy();
        histograms.forEach(all::merge);
        List<BlockEstimates> blocks = histograms.stream()
                .map(histogram -> BlockEstimates.of(histogram))
                .toList();
        return new Propagation(all.distribution(), blocks);
    }

    MonteCarloError error() {
        return MonteCarloError.between(blocks).orElseThrow();
    }
}
