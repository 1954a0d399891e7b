package stillstand.uplift;

import java.util.ArrayList;
import java.util.List;
import stillstand.shoreline.HeightTerm;
import stillstand.uncertainty.Exact;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.Tabulated;
import stillstand.uncertainty.Uncertain;

/**
 * The distribution of a sum of independent terms of height: normal terms in closed form, the others (one-sided cover, skewed
 * depth, an indicative range spread evenly) convolved on a grid.
 */
final class HeightSum {
    private static final double TAIL = 1e-7;
    private static final int CELLS = 600;
    private static final double REACH_IN_SIGMAS = 6;
    private static final double CELLS_PER_SIGMA = 4;

    private HeightSum() {}

    /** The sum of the signed terms, m. */
    static Uncertain of(List<HeightTerm> terms) {
        double mean = 0;
        double variance = 0;
        List<HeightTerm> others = new ArrayList<>();
        double width = 0;
        for (HeightTerm term : terms) {
            if (term.metres() instanceof Normal || term.metres() instanceof Exact) {
                mean += term.meanMetres();
                double sigma = term.metres().standardDeviation();
                variance += sigma * sigma;
            } else {
                others.add(term);
                width += term.metres().quantile(1 - TAIL) - term.metres().quantile(TAIL);
            }
        }
        double sigma = Math.sqrt(variance);
        if (others.isEmpty()) {
            return sigma > 0 ? new Normal(mean, sigma) : new Exact(mean);
        }
        double step = width / CELLS;
        double start = mean;
        double[] masses = {1};
        for (HeightTerm term : others) {
            double from = term.metres().quantile(TAIL);
            double to = term.metres().quantile(1 - TAIL);
            double low = term.sign() > 0 ? from : -to;
            masses = convolved(masses, cells(term, low, to - from, step));
            start += low + step / 2;
        }
        return smeared(masses, start, step, sigma);
    }

    /** Probability of each cell of the signed term, from {@code low} up. */
    private static double[] cells(HeightTerm term, double low, double width, double step) {
        double[] cells = new double[Math.max(1, (int) Math.ceil(width / step - 1e-9))];
        double before = 0;
        for (int k = 0; k < cells.length; k++) {
            double edge = low + (k + 1) * step;
            double until = term.sign() > 0
                    ? term.metres().cumulativeProbability(edge)
                    : 1 - term.metres().cumulativeProbability(-edge);
            cells[k] = Math.max(0, until - before);
            before = until;
        }
        return cells;
    }

    private static double[] convolved(double[] a, double[] b) {
        double[] out = new double[a.length + b.length - 1];
        for (int i = 0; i < a.length; i++) {
            for (int j = 0; j < b.length; j++) {
                out[i + j] += a[i] * b[j];
            }
        }
        return out;
    }

    /** Each mass spread by a normal error, or where there is none over its own cell. */
    private static Uncertain smeared(double[] masses, double start, double step, double sigma) {
        List<Tabulated.Point> points = new ArrayList<>();
        if (!(sigma > 0)) {
            for (int k = 0; k < masses.length; k++) {
                points.add(new Tabulated.Point(start + (k - 0.5) * step, masses[k]));
                points.add(new Tabulated.Point(Math.nextDown(start + (k + 0.5) * step), masses[k]));
            }
            return Tabulated.of(points);
        }
        double wide = Math.hypot(sigma, step / Math.sqrt(12));
        double reach = REACH_IN_SIGMAS * wide;
        double pointStep = Math.min(step, wide / CELLS_PER_SIGMA);
        double to = start + (masses.length - 1) * step + reach;
        for (double at = start - reach; at < to + pointStep; at += pointStep) {
            int first = Math.max(0, (int) Math.ceil((at - reach - start) / step));
            int last = Math.min(masses.length - 1, (int) Math.floor((at + reach - start) / step));
            double density = 0;
            for (int k = first; k <= last; k++) {
                double d = (at - start - k * step) / wide;
                density += masses[k] * Math.exp(-d * d / 2);
            }
            points.add(new Tabulated.Point(at, density));
        }
        return Tabulated.of(points);
    }
}
