package stillstand.uplift;

/**
 * The numbers a {@link ShorelineFilter} works with: one a thread, used again for every evaluation. Holds the results of the
 * last one.
 *
 * <p>Messages are flat arrays, level count outside, cell inside: {@code f[l * cells + c]} is the mass of "l levels used, highest
 * younger shoreline in cell c".
 */
final class FilterWorkspace {
    final int levels;
    final int rows;
    final int cells;

    /** Forward messages: per count and cell; nothing yet above the window's foot; per count, above the window. */
    final double[] f;

    double fBelow;
    final double[] fAbove;
    /** First cell that may hold something, per count. */
    final int[] firstCell;

    final double[] skipped;
    final double[] match;
    final double[] scratch;
    final RowCells row;
    /** Rows from this one on stand above the window, whatever has happened. */
    int rowsPlaced;

    double logScale;
    double logEvidence;
    double logLimiting;
    double logNothingRecorded;

    /** Messages before each row, kept for the backward pass and for draws; empty where only the evidence is wanted. */
    final double[] keptF;

    final double[] keptBelow;
    final double[] keptAbove;
    final double[] keptLogScale;

    final double[] g;
    final double[] gAbove;
    final double[] rest;
    final double[] nextRest;
    final double[] matchAll;
    final double[] pair;
    final double[] pairAge;
    final double[] pairAgeSquare;
    final double[] pairHeight;
    final double[] unseen;
    final double[] over;
    final double[] outside;
    final double[] absent;
    /** Backward total over forward total, less one: 0 but for rounding. */
    double backwardMismatch;

    FilterWorkspace(int levels, int rows, int cells, boolean forPairings) {
        this.levels = levels;
        this.rows = rows;
        this.cells = cells;
        int counts = levels + 1;
        f = new double[counts * cells];
        fAbove = new double[counts];
        firstCell = new int[counts];
        skipped = new double[cells];
        match = new double[cells];
        scratch = new double[cells];
        row = new RowCells(cells);
        int kept = forPairings ? 1 : 0;
        keptF = new double[kept * rows * counts * cells];
        keptBelow = new double[kept * rows];
        keptAbove = new double[kept * rows * counts];
        keptLogScale = new double[kept * rows];
        g = new double[kept * counts * cells];
        gAbove = new double[kept * counts];
        rest = new double[kept * cells];
        nextRest = new double[kept * cells];
        matchAll = new double[kept * levels * cells];
        pair = new double[kept * levels * rows];
        pairAge = new double[kept * levels * rows];
        pairAgeSquare = new double[kept * levels * rows];
        pairHeight = new double[kept * levels * rows];
        unseen = new double[kept * rows];
        over = new double[kept * rows];
        outside = new double[kept * rows];
        absent = new double[kept * rows];
    }

    boolean isForPairings() {
        return keptBelow.length > 0;
    }
}
