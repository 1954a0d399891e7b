package stillstand.uplift;

/**
 * Which level records which row, and what became of every row: probabilities, averaged over the rate and the shared numbers.
 * Levels and rows are numbered from 0 as in the {@link FlightModel}.
 */
public final class PairingTable {
    private final int levels;
    private final int rows;
    private final double[] pair;
    private final double[] unseen;
    private final double[] over;
    private final double[] outside;
    private final double[] absent;

    PairingTable(
            int levels, int rows, double[] pair, double[] unseen, double[] over, double[] outside, double[] absent) {
        this.levels = levels;
        this.rows = rows;
        this.pair = pair;
        this.unseen = unseen;
        this.over = over;
        this.outside = outside;
        this.absent = absent;
    }

    /** How many levels there are. */
    public int levels() {
        return levels;
    }

    /** How many rows there are. */
    public int rows() {
        return rows;
    }

    /** Probability that the level records the row. */
    public double probability(int level, int row) {
        return pair[level * rows + row];
    }

    /** Probability that the level is no shoreline. */
    public double stray(int level) {
        double matched = 0;
        for (int j = 0; j < rows; j++) {
            matched += pair[level * rows + j];
        }
        return Math.max(0, 1 - matched);
    }

    /** Probability that some level records the row. */
    public double recorded(int row) {
        double sum = 0;
        for (int i = 0; i < levels; i++) {
            sum += pair[i * rows + row];
        }
        return sum;
    }

    /** Probability that the row's shoreline stands in the surveyed range and was not recorded. */
    public double unseen(int row) {
        return unseen[row];
    }

    /** Probability that a younger sea stood as high or higher, and took the row's shoreline. */
    public double reoccupied(int row) {
        return over[row];
    }

    /** Probability that the row's shoreline stands outside the surveyed range. */
    public double outside(int row) {
        return outside[row];
    }

    /** Probability that there was no such highstand. */
    public double absent(int row) {
        return absent[row];
    }
}
