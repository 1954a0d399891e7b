package stillstand.uplift;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import org.apache.commons.rng.UniformRandomProvider;
import stillstand.uncertainty.StandardNormal;

/**
 * Draws whole correlations at a given history: the filter forward, then states drawn old to young, each by its share in the
 * forward message that it came from. Not for two threads at once.
 */
final class CorrelationSampler {
    private static final int UNDER = -1;

    private final ShorelineFilter filter;
    private final FilterWorkspace w;
    private final int counts;
    private UpliftHistory history = new UpliftHistory.ConstantRate(0);
    private SharedNumbers shared = SharedNumbers.plain(0.5, 1);

    /** State before the row at hand: levels used, and where the highest younger shoreline stands: a cell, under or above them. */
    private int count;

    private int place;
    private final int[] matchedRow;
    private final int[] matchedCell;
    private final double[] one = new double[4];

    CorrelationSampler(ShorelineFilter filter) {
        this.filter = filter;
        w = filter.workspace(true);
        counts = w.levels + 1;
        matchedRow = new int[w.levels];
        matchedCell = new int[w.levels];
    }

    /** Runs the filter; draws that follow belong to this history. @return the logarithm of its evidence */
    double prepare(UpliftHistory newHistory, SharedNumbers newShared) {
        history = newHistory;
        shared = newShared;
        return filter.logEvidence(history, shared, w);
    }

    /**
     * One draw by level: absent where the level is a stray.
     *
     * @throws IllegalArgumentException if the history prepared cannot have left the flight
     */
    List<Optional<FlightDraw.Match>> draw(UniformRandomProvider random) {
        Arrays.fill(matchedRow, -1);
        drawEnd(random);
        for (int j = Math.min(w.rows, w.rowsPlaced) - 1; j >= 0; j--) {
            w.row.place(filter.model.rows().get(j), history, shared, filter.cells);
            if (!w.row.underAll) {
                stepBack(j, random);
            }
        }
        List<Optional<FlightDraw.Match>> matches = new ArrayList<>();
        for (int i = 0; i < w.levels; i++) {
            matches.add(matchedRow[i] < 0 ? Optional.empty() : Optional.of(match(i, random)));
        }
        return matches;
    }

    private double f(int j, int l, int c) {
        return j < w.rows ? w.keptF[(j * counts + l) * w.cells + c] : w.f[l * w.cells + c];
    }

    private double above(int j, int l) {
        return j < w.rows ? w.keptAbove[j * counts + l] : w.fAbove[l];
    }

    private double under(int j, int l) {
        return l > 0 ? 0 : j < w.rows ? w.keptBelow[j] : w.fBelow;
    }

    /** Draws the state before row {@code rowsPlaced}, from which on nothing is recorded. */
    private void drawEnd(UniformRandomProvider random) {
        int j = w.rowsPlaced;
        double total = 0;
        for (int l = 0; l < counts; l++) {
            total += filter.endWeight(l) * (above(j, l) + massUnder(j, l, w.cells));
        }
        if (!(total > 0)) {
            throw new IllegalArgumentException("the history cannot have left this flight");
        }
        double left = random.nextDouble() * total;
        for (int l = 0; l < counts; l++) {
            count = l;
            double here = filter.endWeight(l) * (above(j, l) + massUnder(j, l, w.cells));
            if (left < here) {
                break;
            }
            left -= here;
        }
        if (random.nextDouble() * (above(j, count) + massUnder(j, count, w.cells)) < above(j, count)) {
            place = w.cells;
        } else {
            drawUnder(j, w.cells, random);
        }
    }

    /** Mass of the present count with M below cell {@code c}: half of the own cell. */
    private double massUnder(int j, int l, int c) {
        double sum = under(j, l);
        for (int other = 0; other < c; other++) {
            sum += f(j, l, other);
        }
        return c < w.cells ? sum + f(j, l, c) / 2 : sum;
    }

    /** Draws the place of M below cell {@code c} for the present count. */
    private void drawUnder(int j, int c, UniformRandomProvider random) {
        double left = random.nextDouble() * massUnder(j, count, c) - under(j, count);
        place = UNDER;
        for (int other = 0; other < Math.min(c + 1, w.cells) && left >= 0; other++) {
            left -= f(j, count, other) * (other == c ? 0.5 : 1);
            place = other;
        }
    }

    private void stepBack(int j, UniformRandomProvider random) {
        RowCells row = w.row;
        if (place == UNDER) {
            return;
        }
        if (place == w.cells) {
            double before = above(j, count);
            double passing = row.existence * row.above * massUnder(j, count, w.cells);
            if (random.nextDouble() * (before + passing) >= before) {
                drawUnder(j, w.cells, random);
            }
            return;
        }
        int c = place;
        boolean inBand = c >= row.from && c <= row.to;
        double stay = f(j, count, c) * (inBand ? row.stay[c] : c > row.to ? 1 : 1 - row.existence);
        double unseen = inBand ? row.unseen[c] * massUnder(j, count, c) : 0;
        double recorded = inBand && count > 0 ? recorded(j, c) : 0;
        double left = random.nextDouble() * (stay + unseen + recorded) - stay;
        if (left < 0) {
            return;
        }
        if (left < unseen) {
            drawUnder(j, c, random);
            return;
        }
        matchedRow[count - 1] = j;
        matchedCell[count - 1] = c;
        drawStraysBefore(j, c, random);
        drawUnder(j, c, random);
    }

    private double recorded(int j, int c) {
        int level = count - 1;
        if (!filter.allowed[level * w.rows + j] || c < filter.kernelFrom[level] || c > filter.kernelTo[level]) {
            return 0;
        }
        double skipped = 0;
        for (int l = level; l >= 0; l--) {
            skipped += massUnder(j, l, c);
            if (l > 0 && !filter.model.levels().get(l - 1).mayBeStray()) {
                break;
            }
        }
        double match = skipped * w.row.match[c] * filter.kernel[level * w.cells + c];
        return match > 0 && filter.isDated(level) ? match * agreement(level, j, c) : match;
    }

    private double agreement(int level, int j, int c) {
        one[0] = 1;
        filter.dates(level, j).multiply(one, 0, 0, meanAgeKa(c), 0, w.row.ageVarianceKa2, w.scratch);
        return one[0];
    }

    private double meanAgeKa(int c) {
        return w.row.ageKa + w.row.slopeKaPerMetre * (filter.cells.middleMetres(c) - w.row.meanMetres);
    }

    /** How many levels just before the matched one are strays: sets the count of levels used before. */
    private void drawStraysBefore(int j, int c, UniformRandomProvider random) {
        int level = count - 1;
        int lowest = level;
        while (lowest > 0 && filter.model.levels().get(lowest - 1).mayBeStray()) {
            lowest--;
        }
        double total = 0;
        for (int l = level; l >= lowest; l--) {
            total += massUnder(j, l, c);
        }
        double left = random.nextDouble() * total;
        for (count = level; count > lowest; count--) {
            left -= massUnder(j, count, c);
            if (left < 0) {
                return;
            }
        }
    }

    private FlightDraw.Match match(int level, UniformRandomProvider random) {
        int j = matchedRow[level];
        int c = matchedCell[level];
        w.row.moments(filter.model.rows().get(j), history, shared);
        double height = filter.cells.edgeMetres(c) + random.nextDouble() * filter.cells.widthMetres();
        double normal = StandardNormal.quantile(((random.nextLong() >>> 12) + 0.5) * 0x1p-52);
        double ageKa = filter.isDated(level)
                ? filter.dates(level, j).drawAgeKa(meanAgeKa(c), w.row.ageVarianceKa2, random.nextDouble(), normal)
                : meanAgeKa(c) + Math.sqrt(w.row.ageVarianceKa2) * normal;
        return new FlightDraw.Match(j, height, ageKa, height - history.upliftMetresSince(ageKa));
    }
}
