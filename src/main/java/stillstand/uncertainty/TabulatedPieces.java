package stillstand.uncertainty;

import java.util.ArrayList;
import java.util.List;

/** The cumulative distribution of a {@link Tabulated} number, piece by piece, for quantiles. */
final class TabulatedPieces {
    private final double[] start;
    private final double[] width;
    private final double[] densityAtStart;
    private final double[] slope;
    /** Probability up to the start of each piece, and 1 after the last. */
    private final double[] below;
    /** The piece in which each of equal steps of probability begins: where to look first. */
    private final int[] guide = new int[1024];

    TabulatedPieces(Tabulated number) {
        List<double[]> pieces = inOrder(number);
        int n = pieces.size();
        start = new double[n];
        width = new double[n];
        densityAtStart = new double[n];
        slope = new double[n];
        below = new double[n + 1];
        for (int i = 0; i < n; i++) {
            double[] piece = pieces.get(i);
            start[i] = piece[0];
            width[i] = piece[1];
            densityAtStart[i] = piece[2];
            slope[i] = piece[1] > 0 ? (piece[3] - piece[2]) / piece[1] : 0;
            below[i + 1] = below[i] + piece[4];
        }
        for (int i = 1; i <= n; i++) {
            below[i] /= below[n];
        }
        int piece = 0;
        for (int k = 0; k < guide.length; k++) {
            while (below[piece + 1] < (double) k / guide.length && piece < n - 1) {
                piece++;
            }
            guide[k] = piece;
        }
    }

    /** Pieces {start, width, density at start, density at end, probability}; a spike has no width. */
    private static List<double[]> inOrder(Tabulated number) {
        List<double[]> pieces = new ArrayList<>();
        List<Tabulated.Spike> spikes = number.spikes();
        int next = 0;
        for (int i = 1; i < number.points().size(); i++) {
            Tabulated.Point from = number.points().get(i - 1);
            Tabulated.Point to = number.points().get(i);
            for (; next < spikes.size() && spikes.get(next).value() < to.value(); next++) {
                Tabulated.Spike spike = spikes.get(next);
                if (spike.value() > from.value()) {
                    Tabulated.Point cut =
                            new Tabulated.Point(spike.value(), Tabulated.between(from, to, spike.value()));
                    pieces.add(slope(from, cut));
                    from = cut;
                }
                pieces.add(spike(spike));
            }
            pieces.add(slope(from, to));
        }
        for (; next < spikes.size(); next++) {
            pieces.add(spike(spikes.get(next)));
        }
        return pieces;
    }

    private static double[] slope(Tabulated.Point from, Tabulated.Point to) {
        double width = to.value() - from.value();
        return new double[] {
            from.value(), width, from.density(), to.density(), width * (from.density() + to.density()) / 2
        };
    }

    private static double[] spike(Tabulated.Spike spike) {
        return new double[] {spike.value(), 0, 0, 0, spike.probability()};
    }

    /** @param probability strictly between 0 and 1 */
    double quantile(double probability) {
        int from = guide[(int) (probability * guide.length)];
        while (below[from + 1] < probability) {
            from++;
        }
        double within = probability - below[from];
        double density = densityAtStart[from];
        double root = Math.sqrt(Math.max(0, density * density + 2 * slope[from] * within));
        double step = density + root > 0 ? 2 * within / (density + root) : 0;
        return start[from] + Math.min(width[from], step);
    }
}
