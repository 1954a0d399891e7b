package stillstand.uplift;

import java.util.Arrays;
import java.util.List;
import java.util.Optional;

/**
 * The shoreline filter: the exact probability of the heights and dates of a flight, given how fast the coast has moved, summed
 * over every way in which its levels may belong to the highstands of a table.
 *
 * <p>The model. Highstands come old to young; each leaves a shoreline, which stands at p today. It survives if no younger one
 * stands as high or higher; a survivor inside the surveyed range is recorded, as a level, with probability q; strays
 * (levels that are no shoreline) are a Poisson process of mean lambda, uniform in the range, their dates uniform in
 * age. So levels and the shorelines they record are met in the same order.
 *
 * <p>The recursion runs over the rows young to old. Its state is (l, M): l levels used so far, M the height of the
 * highest younger shoreline, in cells c of height. {@code f[l][c]} is the mass of a state, {@code f0} that of "none above the
 * foot of the window yet", {@code f1[l]} of "M above the window". A level's density is measured in units of the density of a
 * stray, so that skipping a level costs 1 and nothing underflows. With stay, unseen, match of a row as in {@link RowCells}, K the
 * level's likelihood per cell and A that of its dates ({@link DateKernel}):
 *
 * <pre>
 *   C[l][c]  = f0 [l = 0] + sum over c' &lt; c of f[l][c'] + f[l][c] / 2       M lies below the cell
 *   S[l][c]  = C[l][c] + S[l-1][c]                                          the level before may be a stray
 *   f'[l][c] = stay f[l][c] + unseen C[l][c] + match S[l-1][c] K[l-1][c] A[l-1][c]
 *   f0'      = f0 (x below + 1 - x);   f1'[l] = f1[l] + x above (f0 [l = 0] + sum over c of f[l][c])
 *   Z        = e^-lambda lambda^n prod(stray densities) sum over l of (f0 [l = 0] + f1[l] + sum over c of f[l][c])
 * </pre>
 *
 * where x is the probability that the row existed, and below, above those that it stands below or above the window.
 * Every set of pairings is counted once: strays are passed just before the next match, or at the end. The cell width h enters
 * with an error of order h^2: {@link #richardson} removes it from the evidences of two cell counts. Messages are rescaled row by
 * row.
 *
 * <p>Immutable and safe for any number of threads, each with a workspace of its own.
 */
final class ShorelineFilter {
    /** A level's likelihood below this part of its largest value is left out. */
    private static final double KERNEL_FLOOR = 1e-15;

    private static final double LARGE = 1e120;

    final FlightModel model;
    final HeightCells cells;
    /** Likelihood of level i in cell c over that of a stray, at {@code kernel[i * cells + c]}. */
    final double[] kernel;

    final int[] kernelFrom;
    final int[] kernelTo;
    final boolean[] allowed;
    private final Optional<DateKernel>[] dates;
    private final double logStrayDensities;

    ShorelineFilter(FlightModel model, int cellCount) {
        this.model = model;
        int levels = model.levels().size();
        int rows = model.rows().size();
        cells = new HeightCells(model.lowestRecordedMetres(), model.surveyedToMetres(), cellCount);
        kernel = new double[levels * cellCount];
        kernelFrom = new int[levels];
        kernelTo = new int[levels];
        allowed = new boolean[levels * rows];
        dates = dateKernels(model);
        double logs = 0;
        for (int i = 0; i < levels; i++) {
            FlightLevel level = model.levels().get(i);
            double strayDensity = level.strayFactor() / (model.surveyedToMetres() - model.surveyedFromMetres());
            placeKernel(i, level, strayDensity);
            logs += Math.log(strayDensity) - level.datesKa().size() * Math.log(model.strayAgeMaximumKa());
            for (int j = 0; j < rows; j++) {
                allowed[i * rows + j] = level.mayBeRow(j);
            }
        }
        logStrayDensities = logs;
    }

    private ShorelineFilter(ShorelineFilter other, FlightModel model) {
        this.model = model;
        cells = other.cells;
        kernel = other.kernel;
        kernelFrom = other.kernelFrom;
        kernelTo = other.kernelTo;
        allowed = other.allowed;
        dates = other.dates;
        logStrayDensities = other.logStrayDensities;
    }

    /**
     * The same levels in the same cells over rows whose ages and levels alone are others: no likelihood of a level has to be worked
     * out again.
     */
    ShorelineFilter withRows(List<FlightRow> otherRows) {
        return new ShorelineFilter(this, model.withRows(otherRows));
    }

    private void placeKernel(int i, FlightLevel level, double strayDensity) {
        int count = cells.count();
        cells.writeDensity(level.shorelineMetres(), kernel, i * count);
        double largest = 0;
        for (int c = 0; c < count; c++) {
            largest = Math.max(largest, kernel[i * count + c]);
        }
        kernelFrom[i] = count;
        kernelTo[i] = -1;
        for (int c = 0; c < count; c++) {
            if (kernel[i * count + c] > KERNEL_FLOOR * largest) {
                kernelFrom[i] = Math.min(kernelFrom[i], c);
                kernelTo[i] = c;
            }
            kernel[i * count + c] /= strayDensity;
        }
    }

    private static Optional<DateKernel>[] dateKernels(FlightModel model) {
        int rows = model.rows().size();
        @SuppressWarnings({"unchecked", "rawtypes"})
        Optional<DateKernel>[] kernels = new Optional[model.levels().size() * rows];
        for (int i = 0; i < model.levels().size(); i++) {
            FlightLevel level = model.levels().get(i);
            for (int j = 0; j < rows; j++) {
                kernels[i * rows + j] = level.datesKa().isEmpty()
                        ? Optional.empty()
                        : Optional.of(DateKernel.of(
                                level.datesKa(),
                                model.rows().get(j).durationKa(),
                                model.wrongDateProbability(),
                                model.strayAgeMaximumKa()));
            }
        }
        return kernels;
    }

    FilterWorkspace workspace(boolean forPairings) {
        return new FilterWorkspace(model.levels().size(), model.rows().size(), cells.count(), forPairings);
    }

    DateKernel dates(int level, int row) {
        return dates[level * model.rows().size() + row].orElseThrow();
    }

    boolean isDated(int level) {
        return dates[level * model.rows().size()].isPresent();
    }

    /** {@code log Z} at vanishing cell width from those at {@code cells} and {@code 2 cells}. */
    static double richardson(double logCoarse, double logFine) {
        double step = logFine - logCoarse;
        return Math.abs(step) < 1 ? logFine + Math.log1p(-Math.expm1(-step) / 3) : logFine;
    }

    /**
     * Natural logarithm of the probability density of the flight's heights (1/m each) and dates (1/ka each); minus infinity
     * where the model cannot have left it. Limiting points multiply it.
     */
    double logEvidence(UpliftHistory history, SharedNumbers shared, FilterWorkspace w) {
        start(w);
        int rows = model.rows().size();
        w.rowsPlaced = rows;
        for (int j = 0; j < rows; j++) {
            if (w.isForPairings()) {
                keep(w, j);
            }
            w.row.place(model.rows().get(j), history, shared, cells);
            if (w.row.overAll && w.row.existence == 1) {
                passAbove(w);
                w.rowsPlaced = j;
                break;
            }
            if (!w.row.underAll) {
                step(w, j);
            }
        }
        finish(w, shared.expectedStrays());
        w.logLimiting = model.logLimiting(history, shared);
        w.logEvidence += w.logLimiting;
        w.logNothingRecorded += w.logLimiting;
        return w.logEvidence;
    }

    private void start(FilterWorkspace w) {
        Arrays.fill(w.f, 0);
        Arrays.fill(w.fAbove, 0);
        Arrays.fill(w.firstCell, cells.count());
        w.fBelow = 1;
        w.logScale = 0;
    }

    private static void keep(FilterWorkspace w, int j) {
        System.arraycopy(w.f, 0, w.keptF, j * w.f.length, w.f.length);
        System.arraycopy(w.fAbove, 0, w.keptAbove, j * w.fAbove.length, w.fAbove.length);
        w.keptBelow[j] = w.fBelow;
        w.keptLogScale[j] = w.logScale;
    }

    /** A row that surely stands above the window ends all records. */
    private void passAbove(FilterWorkspace w) {
        w.fAbove[0] += w.fBelow;
        w.fBelow = 0;
        for (int l = 0; l <= w.levels; l++) {
            for (int c = w.firstCell[l]; c < w.cells; c++) {
                w.fAbove[l] += w.f[l * w.cells + c];
                w.f[l * w.cells + c] = 0;
            }
            w.firstCell[l] = w.cells;
        }
    }

    private void step(FilterWorkspace w, int j) {
        RowCells row = w.row;
        int count = w.cells;
        Arrays.fill(w.skipped, Math.min(row.from, count), row.to + 1, 0);
        double absent = 1 - row.existence;
        double largest = 0;
        int matchFrom = count;
        int matchTo = -1;
        for (int l = 0; l <= w.levels; l++) {
            int at = l * count;
            double start = l == 0 ? w.fBelow : 0;
            double under = start;
            for (int c = w.firstCell[l]; c < Math.min(row.from, count); c++) {
                under += w.f[at + c];
                w.f[at + c] *= absent;
            }
            int from = under > 0 ? row.from : Math.max(row.from, w.firstCell[l]);
            double total = sweep(w.f, at, from, row.to, under, row.stay, row.unseen, w.skipped);
            w.firstCell[l] = absent > 0 ? Math.min(w.firstCell[l], from) : from;
            w.fAbove[l] += row.existence * row.above * total;
            largest = Math.max(largest, total);
            for (int c = matchFrom; c <= matchTo; c++) {
                w.f[at + c] += w.match[c];
            }
            w.firstCell[l] = Math.min(w.firstCell[l], matchFrom);
            if (l < w.levels) {
                matchFrom = Math.max(row.from, kernelFrom[l]);
                matchTo = allowed[l * w.rows + j] ? Math.min(row.to, kernelTo[l]) : -1;
                if (matchFrom > matchTo) {
                    matchFrom = count;
                    matchTo = -1;
                }
                match(w, l, j, matchFrom, matchTo);
                if (!model.levels().get(l).mayBeStray()) {
                    Arrays.fill(w.skipped, Math.min(row.from, count), row.to + 1, 0);
                }
            }
        }
        w.fBelow *= row.existence * row.below + absent;
        if (largest > LARGE) {
            rescale(w, 1 / largest);
        }
    }

    /** One count of levels over the row's cells: updates f, adds C to S; returns everything up to the last cell. */
    private static double sweep(
            double[] f, int at, int from, int to, double under, double[] stay, double[] unseen, double[] skipped) {
        double sum = under;
        int c = from;
        for (; c + 3 <= to; c += 4) {
            double x0 = f[at + c];
            double x1 = f[at + c + 1];
            double x2 = f[at + c + 2];
            double x3 = f[at + c + 3];
            double c0 = sum + 0.5 * x0;
            double c1 = sum + (x0 + 0.5 * x1);
            double c2 = sum + (x0 + x1 + 0.5 * x2);
            double c3 = sum + (x0 + x1 + (x2 + 0.5 * x3));
            sum += (x0 + x1) + (x2 + x3);
            f[at + c] = stay[c] * x0 + unseen[c] * c0;
            f[at + c + 1] = stay[c + 1] * x1 + unseen[c + 1] * c1;
            f[at + c + 2] = stay[c + 2] * x2 + unseen[c + 2] * c2;
            f[at + c + 3] = stay[c + 3] * x3 + unseen[c + 3] * c3;
            skipped[c] += c0;
            skipped[c + 1] += c1;
            skipped[c + 2] += c2;
            skipped[c + 3] += c3;
        }
        for (; c <= to; c++) {
            double x = f[at + c];
            double below = sum + 0.5 * x;
            sum += x;
            f[at + c] = stay[c] * x + unseen[c] * below;
            skipped[c] += below;
        }
        return sum;
    }

    /** The mass that level l takes from S as the record of row j. */
    private void match(FilterWorkspace w, int l, int j, int from, int to) {
        int at = l * w.cells;
        for (int c = from; c <= to; c++) {
            w.match[c] = w.skipped[c] * w.row.match[c] * kernel[at + c];
        }
        if (from <= to && isDated(l)) {
            weighByDates(w.row, w.match, l, j, from, to, w.scratch);
        }
    }

    void weighByDates(RowCells row, double[] values, int l, int j, int from, int to, double[] scratch) {
        double meanKa = row.ageKa + row.slopeKaPerMetre * (cells.middleMetres(from) - row.meanMetres);
        double stepKa = row.slopeKaPerMetre * cells.widthMetres();
        dates(l, j).multiply(values, from, to, meanKa, stepKa, row.ageVarianceKa2, scratch);
    }

    private static void rescale(FilterWorkspace w, double factor) {
        for (int k = 0; k < w.f.length; k++) {
            w.f[k] *= factor;
        }
        for (int l = 0; l < w.fAbove.length; l++) {
            w.fAbove[l] *= factor;
        }
        w.fBelow *= factor;
        w.logScale -= Math.log(factor);
    }

    /** Weight of a history that has used l levels: 1 where the others may all be strays, else 0. */
    double endWeight(int l) {
        for (int i = l; i < model.levels().size(); i++) {
            if (!model.levels().get(i).mayBeStray()) {
                return 0;
            }
        }
        return l == 0 && !model.countsAllStray() ? 0 : 1;
    }

    private void finish(FilterWorkspace w, double strays) {
        double total = 0;
        double nothing = 0;
        for (int l = 0; l <= w.levels; l++) {
            double used = w.fAbove[l] + (l == 0 ? w.fBelow : 0);
            for (int c = w.firstCell[l]; c < w.cells; c++) {
                used += w.f[l * w.cells + c];
            }
            total += endWeight(l) * used;
            nothing = l == 0 ? used : nothing;
        }
        w.logEvidence = Math.log(total) + w.logScale + logUnit(strays);
        w.logNothingRecorded = Math.log(nothing) + w.logScale;
    }

    /** Logarithm of what a scaled total is to be multiplied by: all levels strays. */
    double logUnit(double strays) {
        return logStrayDensities - strays + model.levels().size() * Math.log(strays);
    }

    /** Sum over levels of the logarithm of the stray density, 1/m and 1/ka, without the expected number of strays. */
    double logStrayDensities() {
        return logStrayDensities;
    }
}
