package stillstand.uplift;

/**
 * Where the shoreline of one row stands, cell by cell, for one history and one set of shared numbers. Reused from row to row.
 *
 * <p>The shoreline of a row stands at p, normal with mean {@code E + H(T)} and variance
 * {@code s^2 + u^2 tau^2 + 2 u kappa}: E, s its level, T, tau its age, kappa their covariance, H the uplift since T, u the rate
 * at T. With w the probability of a cell, F = P(p below the cell's middle), q the probability of recording, x the probability
 * that the row existed and lambda the expected strays, a cell holds
 *
 * <pre>
 *   stay   = x F + 1 - x       no younger shoreline there is passed
 *   unseen = x (1 - q) w       stands there, survives, is not recorded
 *   match  = x q w / lambda    stands there, survives, is recorded (strays have unit weight)
 * </pre>
 *
 * F is the probability below the window plus the cells below plus half of the own cell: the normal distribution function at
 * the cell's middle would break the sum rule. Cells further than 8 standard deviations hold nothing.
 */
final class RowCells {
    final double[] stay;
    final double[] unseen;
    final double[] match;
    /** First and last cell the row can stand in; {@code from > to} where it stands in none. */
    int from;

    int to;
    /** P(p below the window), P(p above it). */
    double below;

    double above;
    /** Whether the row surely stands below or above every cell. */
    boolean underAll;

    boolean overAll;
    double existence;
    double meanMetres;
    double varianceMetres2;
    /** Age given height: mean {@code ageKa + slope (height - meanMetres)}, variance {@code ageVarianceKa2}. */
    double ageKa;

    double slopeKaPerMetre;
    double ageVarianceKa2;

    RowCells(int cells) {
        stay = new double[cells];
        unseen = new double[cells];
        match = new double[cells];
    }

    void place(FlightRow row, UpliftHistory history, SharedNumbers shared, HeightCells cells) {
        moments(row, history, shared);
        existence = row.existence();
        fill(cells, shared.recordingProbability(row), shared.expectedStrays());
    }

    /** Height and age of the row's shoreline, without the cells. */
    void moments(FlightRow row, UpliftHistory history, SharedNumbers shared) {
        ageKa = row.ageKa() + (row.takesCurveAge() ? shared.ageShiftKa() : 0);
        double rate = history.rateMetresPerKyrAt(ageKa);
        double ageVariance = row.ageSigmaKa() * row.ageSigmaKa();
        double covariance = rate * ageVariance + row.levelAgeCovarianceMetresKa();
        meanMetres = row.levelMetres()
                + (row.takesOffset() ? shared.offsetMetres() : 0)
                + (row.takesInterstadial() ? shared.interstadialMetres() : 0)
                + history.upliftMetresSince(ageKa);
        varianceMetres2 = row.levelSigmaMetres() * row.levelSigmaMetres()
                + rate * rate * ageVariance
                + 2 * rate * row.levelAgeCovarianceMetresKa();
        slopeKaPerMetre = varianceMetres2 > 0 ? covariance / varianceMetres2 : 0;
        ageVarianceKa2 = Math.max(0, ageVariance - slopeKaPerMetre * covariance);
    }

    private void fill(HeightCells cells, double recording, double strays) {
        double width = cells.widthMetres();
        double sigma = Math.max(Math.sqrt(varianceMetres2), 1e-6 * width);
        double first = (meanMetres - NormalTail.REACH * sigma - cells.lowestMetres()) / width;
        double last = (meanMetres + NormalTail.REACH * sigma - cells.lowestMetres()) / width;
        underAll = last < 0;
        overAll = first >= cells.count();
        below = underAll ? 1 : 0;
        above = overAll ? 1 : 0;
        from = overAll ? cells.count() : (int) Math.max(0, Math.floor(first));
        to = underAll ? -1 : (int) Math.min(cells.count() - 1, Math.floor(last));
        if (underAll || overAll) {
            return;
        }
        double step = width / sigma;
        double edge = (cells.lowestMetres() + from * width - meanMetres) / sigma;
        boolean upper = edge > 0;
        double tail = upper ? NormalTail.beyond(edge) : NormalTail.beyond(-edge);
        below = from > 0 ? 0 : upper ? 1 - tail : tail;
        double under = below;
        double absent = 1 - existence;
        double unseenFactor = existence * (1 - recording);
        double matchFactor = existence * recording / strays;
        for (int c = from; c <= to; c++) {
            double next = edge + (c - from + 1) * step;
            double nextTail = NormalTail.beyond(Math.abs(next));
            double mass = upper ? tail - nextTail : next > 0 ? 1 - tail - nextTail : nextTail - tail;
            stay[c] = existence * (under + mass / 2) + absent;
            unseen[c] = unseenFactor * mass;
            match[c] = matchFactor * mass;
            under += mass;
            tail = nextTail;
            upper = next > 0;
        }
        above = to < cells.count() - 1 ? 0 : upper ? tail : 1 - tail;
    }
}
