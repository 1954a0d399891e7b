package stillstand.uncertainty;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;

/** The distribution that draws add up to. Immutable. */
public final class DrawDistribution {
    /** Most bins of a density for figures. */
    public static final int MAXIMUM_BINS = 200;

    /** A density for figures leaves out this part of the draws on either side. */
    private static final double DENSITY_TAIL = 0.001;

    private final CumulativeCurve curve;
    private final double mean;
    private final double sd;
    private final long count;
    private final double effectiveSampleSize;

    DrawDistribution(CumulativeCurve curve, double mean, double sd, long count, double effectiveSampleSize) {
        this.curve = curve;
        this.mean = mean;
        this.sd = sd;
        this.count = count;
        this.effectiveSampleSize = effectiveSampleSize;
    }

    /**
     * The value below which a draw lies with the given probability: linear between the edges of cells, and between single
     * draws each of which has half of its weight below it (definition 5 of Hyndman and Fan 1996, Am. Stat. 50:361).
     *
     * @param probability from 0 (the least draw) to 1 (the greatest)
     * @throws IllegalArgumentException if {@code probability} is not from 0 to 1
     */
    public double quantile(double probability) {
        if (!(probability >= 0 && probability <= 1)) {
            throw new IllegalArgumentException("probability must lie between 0 and 1 but is " + probability);
        }
        return curve.quantile(probability);
    }

    /** Probability that a draw is at most {@code value}. */
    public double cumulativeProbability(double value) {
        return curve.cumulativeProbability(value);
    }

    /** Weighted mean of the draws. It need not settle where the mean of the distribution does not exist. */
    public double mean() {
        return mean;
    }

    /** Standard deviation of the draws about their mean. */
    public double sd() {
        return sd;
    }

    /** How many draws there are. */
    public long count() {
        return count;
    }

    /** (sum of weights)^2 / (sum of their squares): so many equally weighted draws would be as good (Kish 1965). */
    public double effectiveSampleSize() {
        return effectiveSampleSize;
    }

    /**
     * The interval that leaves out the same probability on either side.
     *
     * @throws IllegalArgumentException if {@code probability} is not strictly between 0 and 1
     */
    public Interval equalTailed(double probability) {
        Uncertain.requireProbability(probability);
        return new Interval(curve.quantile((1 - probability) / 2), curve.quantile((1 + probability) / 2));
    }

    /**
     * The shortest interval of a probability. Since the width of an interval hardly changes near the least, its place is the
     * most uncertain of all summaries (its error falls as the cube root of the number of draws); what is returned is the
     * centre of all intervals that are the shortest to within the Monte Carlo error.
     *
     * @throws IllegalArgumentException if {@code probability} is not strictly between 0 and 1
     */
    public Interval shortest(double probability) {
        Uncertain.requireProbability(probability);
        return curve.shortest(probability, effectiveSampleSize);
    }

    /** Median and equal-tailed intervals with mean and standard deviation. */
    public Summary summary() {
        return summary(Optional.of(mean), Optional.of(sd));
    }

    /** Median and equal-tailed intervals alone, for a distribution that may have no mean. */
    public Summary summaryWithoutMean() {
        return summary(Optional.empty(), Optional.empty());
    }

    private Summary summary(Optional<Double> meanIfAny, Optional<Double> sdIfAny) {
        return new Summary(
                quantile(0.5),
                meanIfAny,
                sdIfAny,
                equalTailed(Interval.PROBABILITY_68),
                equalTailed(Interval.PROBABILITY_95));
    }

    /**
     * Relative frequencies in equal bins over the central 99.8 % of the draws, for figures; absent where all draws there are
     * alike.
     *
     * @param bins 1 to {@link #MAXIMUM_BINS}
     * @throws IllegalArgumentException if {@code bins} is out of range
     */
    public Optional<DensityBins> density(int bins) {
        if (bins < 1 || bins > MAXIMUM_BINS) {
            throw new IllegalArgumentException("bins must be 1 to " + MAXIMUM_BINS + " but are " + bins);
        }
        double from = quantile(DENSITY_TAIL);
        double to = quantile(1 - DENSITY_TAIL);
        if (!(from < to)) {
            return Optional.empty();
        }
        List<Double> values = new ArrayList<>();
        double below = cumulativeProbability(from);
        for (int bin = 1; bin <= bins; bin++) {
            double upTo = cumulativeProbability(from + (to - from) * bin / bins);
            values.add(Math.max(0, upTo - below));
            below = upTo;
        }
        return Optional.of(new DensityBins(from, to, values));
    }
}
