package stillstand.uplift;

/** Weighted sums of what {@link BackwardPass} finds, over rates and shared numbers. */
final class PairingSums {
    private final int levels;
    private final int rows;
    private double weight;
    private final double[] pair;
    private final double[] age;
    private final double[] ageSquare;
    private final double[] unseen;
    private final double[] over;
    private final double[] outside;
    private final double[] absent;

    PairingSums(int levels, int rows) {
        this.levels = levels;
        this.rows = rows;
        pair = new double[levels * rows];
        age = new double[levels * rows];
        ageSquare = new double[levels * rows];
        unseen = new double[rows];
        over = new double[rows];
        outside = new double[rows];
        absent = new double[rows];
    }

    void add(FilterWorkspace w, double by) {
        weight += by;
        add(pair, w.pair, by);
        add(age, w.pairAge, by);
        add(ageSquare, w.pairAgeSquare, by);
        add(unseen, w.unseen, by);
        add(over, w.over, by);
        add(outside, w.outside, by);
        add(absent, w.absent, by);
    }

    private static void add(double[] sums, double[] values, double by) {
        for (int k = 0; k < sums.length; k++) {
            sums[k] += by * values[k];
        }
    }

    /** The table at vanishing cell width from sums at some cell count (this) and twice as many. */
    PairingTable extrapolatedWith(PairingSums finer) {
        return new PairingTable(
                levels,
                rows,
                extrapolate(pair, finer, finer.pair),
                extrapolate(unseen, finer, finer.unseen),
                extrapolate(over, finer, finer.over),
                extrapolate(outside, finer, finer.outside),
                extrapolate(absent, finer, finer.absent));
    }

    private double[] extrapolate(double[] coarse, PairingSums finer, double[] fine) {
        double[] out = new double[coarse.length];
        for (int k = 0; k < out.length; k++) {
            double best = (4 * fine[k] / finer.weight - coarse[k] / weight) / 3;
            out[k] = Math.min(1, Math.max(0, best));
        }
        return out;
    }

    /** Largest standard error of a pairing probability, by the jackknife over the parts that these sums consist of. */
    double largestError(PairingSums[] parts) {
        double largest = 0;
        double[] without = new double[parts.length];
        for (int k = 0; k < pair.length; k++) {
            for (int block = 0; block < parts.length; block++) {
                without[block] = (pair[k] - parts[block].pair[k]) / (weight - parts[block].weight);
            }
            largest = Math.max(largest, FlightMonteCarlo.jackknife(without));
        }
        return largest;
    }

    /** Age of a level's shoreline where it records a row; meaningful where the pair has some probability. */
    LevelAge.Part agePart(int level, int row, double probability) {
        int k = level * rows + row;
        double mean = pair[k] > 0 ? age[k] / pair[k] : 0;
        double variance = pair[k] > 0 ? Math.max(0, ageSquare[k] / pair[k] - mean * mean) : 0;
        return new LevelAge.Part(row, probability, mean, Math.sqrt(variance));
    }
}
