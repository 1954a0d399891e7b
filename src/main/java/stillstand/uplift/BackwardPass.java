package stillstand.uplift;

import java.util.Arrays;

/**
 * The way back through the rows of a {@link ShorelineFilter}, old to young: what became of every row, and which level records it.
 *
 * <p>{@code g[l][c]} is the weight of everything older, given the state; it begins at 1 where the unused levels may be strays. With
 * the forward messages before row j, C and S of the filter, and t = 1 where level l may be a stray, else 0:
 *
 * <pre>
 *   pair[i][j] Z = sum S[i] match K[i] A[i] g[i+1]        unseen[j] Z = sum unseen C g
 *   over[j] Z    = sum x F f g                            absent[j] Z = (1 - x) sum (f g + f0 g0 + f1 g1)
 *   outside[j] Z = x (f0 below g0 + above (f0 + sum f) g1 + sum f1 g1)
 *   R[n] = 0;  R[l] = match K[l] A[l] g[l+1] + t R[l+1];  move[l] = unseen g[l] + R[l]
 *   g'[l][c] = stay g[l][c] + sum over c' > c of move[l][c'] + move[l][c] / 2 + x above g1[l]
 *   g0'      = (x below + 1 - x) g0 + sum over c of move[0] + x above g1[0]
 * </pre>
 *
 * The last g0 is Z again, and the five probabilities of a row sum to 1.
 */
final class BackwardPass {
    private static final double LARGE = 1e120;
    private static final double WORTH_AN_AGE = 1e-12;

    private final ShorelineFilter filter;
    private final FilterWorkspace w;
    private final double[] moments = new double[2];
    private double gBelow;
    private double logScale;

    BackwardPass(ShorelineFilter filter, FilterWorkspace w) {
        this.filter = filter;
        this.w = w;
    }

    /**
     * Fills the workspace's probabilities for one history.
     *
     * @return the logarithm of the evidence
     */
    double run(UpliftHistory history, SharedNumbers shared) {
        double logEvidence = filter.logEvidence(history, shared, w);
        clear();
        if (logEvidence == Double.NEGATIVE_INFINITY) {
            return logEvidence;
        }
        double logTotal = logEvidence - w.logLimiting - filter.logUnit(shared.expectedStrays());
        for (int l = 0; l <= w.levels; l++) {
            w.gAbove[l] = filter.endWeight(l);
            Arrays.fill(w.g, l * w.cells, (l + 1) * w.cells, w.gAbove[l]);
        }
        gBelow = w.gAbove[0];
        logScale = 0;
        for (int j = w.rows - 1; j >= 0; j--) {
            FlightRow row = filter.model.rows().get(j);
            if (j >= w.rowsPlaced) {
                w.outside[j] = row.existence();
                w.absent[j] = 1 - row.existence();
                if (j > w.rowsPlaced) {
                    continue;
                }
            }
            w.row.place(row, history, shared, filter.cells);
            double scale = Math.exp(w.keptLogScale[j] + logScale - logTotal);
            if (j < w.rowsPlaced) {
                forwardSums(j, scale);
            }
            if (!w.row.underAll) {
                stepBack();
            }
        }
        w.backwardMismatch = Math.exp(Math.log(gBelow) + logScale - logTotal) - 1;
        return logEvidence;
    }

    private void clear() {
        for (double[] sums :
                new double[][] {w.pair, w.pairAge, w.pairAgeSquare, w.pairHeight, w.unseen, w.over, w.outside, w.absent
                }) {
            Arrays.fill(sums, 0);
        }
    }

    /** Adds up what became of row j, and leaves match K A of every level in {@code w.matchAll}. */
    private void forwardSums(int j, double scale) {
        RowCells row = w.row;
        double x = row.existence;
        int counts = w.levels + 1;
        Arrays.fill(w.matchAll, 0);
        Arrays.fill(w.skipped, 0);
        double outside = x * row.below * w.keptBelow[j] * gBelow;
        double all = w.keptBelow[j] * gBelow;
        for (int l = 0; l < counts; l++) {
            int at = l * w.cells;
            int kept = j * counts * w.cells + at;
            double under = l == 0 ? w.keptBelow[j] : 0;
            double overSum = 0;
            double unseenSum = 0;
            int first = Math.min(row.from, w.cells);
            for (int c = 0; c < first; c++) {
                under += w.keptF[kept + c];
                all += w.keptF[kept + c] * w.g[at + c];
            }
            for (int c = first; c <= row.to; c++) {
                double f = w.keptF[kept + c];
                double g = w.g[at + c];
                double below = under + 0.5 * f;
                all += f * g;
                overSum += (row.stay[c] - (1 - x)) * f * g;
                unseenSum += row.unseen[c] * below * g;
                w.skipped[c] += below;
                under += f;
            }
            for (int c = Math.max(first, row.to + 1); c < w.cells; c++) {
                double product = w.keptF[kept + c] * w.g[at + c];
                under += w.keptF[kept + c];
                all += product;
                overSum += x * product;
            }
            double passed = w.keptAbove[j * counts + l] * w.gAbove[l];
            w.over[j] += scale * overSum;
            w.unseen[j] += scale * unseenSum;
            outside += x * (row.above * under * w.gAbove[l] + passed);
            all += passed;
            if (l < w.levels) {
                pair(l, j, scale);
            }
        }
        w.outside[j] = scale * outside;
        w.absent[j] = scale * (1 - x) * all;
    }

    private void pair(int l, int j, double scale) {
        RowCells row = w.row;
        int at = l * w.cells;
        int from = Math.max(row.from, filter.kernelFrom[l]);
        int to = filter.allowed[l * w.rows + j] ? Math.min(row.to, filter.kernelTo[l]) : -1;
        for (int c = from; c <= to; c++) {
            w.matchAll[at + c] = row.match[c] * filter.kernel[at + c];
        }
        if (from <= to && filter.isDated(l)) {
            shiftedDates(l, j, from, to);
        }
        int next = (l + 1) * w.cells;
        double sum = 0;
        for (int c = from; c <= to; c++) {
            w.match[c] = w.skipped[c] * w.matchAll[at + c] * w.g[next + c];
            sum += w.match[c];
        }
        w.pair[l * w.rows + j] = scale * sum;
        if (scale * sum > WORTH_AN_AGE) {
            ages(l, j, from, to, scale);
        }
        if (!filter.model.levels().get(l).mayBeStray()) {
            Arrays.fill(w.skipped, 0);
        }
    }

    private void shiftedDates(int l, int j, int from, int to) {
        System.arraycopy(w.matchAll, l * w.cells + from, w.match, from, to - from + 1);
        filter.weighByDates(w.row, w.match, l, j, from, to, w.scratch);
        System.arraycopy(w.match, from, w.matchAll, l * w.cells + from, to - from + 1);
    }

    /** Age and height of the shoreline where level l records row j, weighed by probability. */
    private void ages(int l, int j, int from, int to, double scale) {
        RowCells row = w.row;
        double age = 0;
        double square = 0;
        double height = 0;
        boolean dated = filter.isDated(l);
        for (int c = from; c <= to; c++) {
            double part = w.match[c];
            if (part * scale < WORTH_AN_AGE * 1e-3) {
                continue;
            }
            double middle = filter.cells.middleMetres(c);
            double meanKa = row.ageKa + row.slopeKaPerMetre * (middle - row.meanMetres);
            moments[0] = meanKa;
            moments[1] = meanKa * meanKa + row.ageVarianceKa2;
            if (dated) {
                filter.dates(l, j).ageMoments(meanKa, row.ageVarianceKa2, moments);
            }
            age += part * moments[0];
            square += part * moments[1];
            height += part * middle;
        }
        w.pairAge[l * w.rows + j] = scale * age;
        w.pairAgeSquare[l * w.rows + j] = scale * square;
        w.pairHeight[l * w.rows + j] = scale * height;
    }

    private void stepBack() {
        RowCells row = w.row;
        double x = row.existence;
        Arrays.fill(w.rest, 0);
        double largest = 0;
        double lowest = 0;
        for (int l = w.levels; l >= 0; l--) {
            int at = l * w.cells;
            if (l > 0) {
                double stray = filter.model.levels().get(l - 1).mayBeStray() ? 1 : 0;
                int before = (l - 1) * w.cells;
                for (int c = row.from; c <= row.to; c++) {
                    w.nextRest[c] = w.matchAll[before + c] * w.g[at + c] + stray * w.rest[c];
                }
            }
            double past = x * row.above * w.gAbove[l];
            double sum = 0;
            for (int c = row.to; c >= row.from; c--) {
                double move = row.unseen[c] * w.g[at + c] + w.rest[c];
                w.g[at + c] = row.stay[c] * w.g[at + c] + sum + 0.5 * move + past;
                sum += move;
            }
            for (int c = 0; c < Math.min(row.from, w.cells); c++) {
                w.g[at + c] = (1 - x) * w.g[at + c] + sum + past;
            }
            lowest = sum + past;
            largest = Math.max(largest, lowest);
            System.arraycopy(w.nextRest, 0, w.rest, 0, w.cells);
        }
        gBelow = (x * row.below + 1 - x) * gBelow + lowest;
        if (Math.max(largest, gBelow) > LARGE) {
            rescale(1 / Math.max(largest, gBelow));
        }
    }

    private void rescale(double factor) {
        for (int k = 0; k < w.g.length; k++) {
            w.g[k] *= factor;
        }
        for (int l = 0; l < w.gAbove.length; l++) {
            w.gAbove[l] *= factor;
        }
        gBelow *= factor;
        logScale -= Math.log(factor);
    }
}
