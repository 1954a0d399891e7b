package stillstand.uncertainty;

import org.apache.commons.statistics.distribution.TruncatedNormalDistribution;

/**
 * A normal distribution of which only the part between two bounds is possible.
 *
 * @param centre mean before the cut, finite ({@link #mean()} is the expected value after it)
 * @param sigma standard deviation before the cut, above 0
 * @param low lower bound, or negative infinity
 * @param high upper bound, above {@code low}, or positive infinity
 */
public record TruncatedNormal(double centre, double sigma, double low, double high) implements Uncertain {
    /** Less probability than this between the bounds is a contradiction, not a distribution. */
    private static final double LEAST_PROBABILITY_KEPT = 1e-200;

    /** From here on the digits lost by adding the lower tail do not matter. */
    private static final double ENOUGH_FOR_THE_QUICK_WAY = 0.01;

    /**
     * @throws IllegalArgumentException if {@code centre} is not finite, {@code sigma} not a finite number above 0, not
     *     {@code low < high}, or the bounds lie so far from the centre that next to nothing is left between them
     */
    public TruncatedNormal {
        Uncertain.requireFinite("centre", centre);
        Uncertain.requirePositive("sigma", sigma);
        if (!(low < high)) {
            throw new IllegalArgumentException("low must be below high but is " + low + " with high " + high);
        }
        if (!(probabilityKept(centre, sigma, low, high) > LEAST_PROBABILITY_KEPT)) {
            throw new IllegalArgumentException("low and high must leave some of the normal distribution with mean "
                    + centre + " and standard deviation " + sigma + " but are " + low + " and " + high);
        }
    }

    /** The part of the normal distribution's probability that lies outside the bounds, and was cut off. */
    public double probabilityCutOff() {
        return StandardNormal.cumulativeProbability((low - centre) / sigma)
                + StandardNormal.cumulativeProbability((centre - high) / sigma);
    }

    @Override
    public double quantile(double probability) {
        Uncertain.requireProbability(probability);
        return new Cut(this).quantile(probability);
    }

    @Override
    public double cumulativeProbability(double value) {
        if (value <= low) {
            return 0;
        }
        if (value >= high) {
            return 1;
        }
        return Math.min(1, probabilityKept(centre, sigma, low, value) / probabilityKept(centre, sigma, low, high));
    }

    @Override
    public double density(double value) {
        return value >= low && value <= high
                ? StandardNormal.density((value - centre) / sigma) / (sigma * probabilityKept(centre, sigma, low, high))
                : 0;
    }

    @Override
    public double mean() {
        return distribution().getMean();
    }

    @Override
    public double standardDeviation() {
        return Math.sqrt(distribution().getVariance());
    }

    @Override
    public void toQuantiles(double[] column) {
        Cut cut = new Cut(this);
        if (probabilityKept(centre, sigma, low, high) < ENOUGH_FOR_THE_QUICK_WAY) {
            for (int i = 0; i < column.length; i++) {
                column[i] = cut.quantile(column[i]);
            }
            return;
        }
        double kept = cut.notAbove - cut.below;
        for (int i = 0; i < column.length; i++) {
            column[i] = Math.min(Math.nextDown(1.0), cut.below + kept * column[i]);
        }
        StandardNormal.toQuantiles(column);
        for (int i = 0; i < column.length; i++) {
            column[i] = Math.min(high, Math.max(low, centre + sigma * column[i]));
        }
    }

    @Override
    public TruncatedNormal plus(double shift) {
        return new TruncatedNormal(centre + shift, sigma, low + shift, high + shift);
    }

    private TruncatedNormalDistribution distribution() {
        return TruncatedNormalDistribution.of(centre, sigma, low, high);
    }

    /** Taken in the tail that is the smaller of the two, where differences keep their digits. */
    private static double probabilityKept(double centre, double sigma, double low, double high) {
        double from = (low - centre) / sigma;
        double to = (high - centre) / sigma;
        return from > 0
                ? StandardNormal.cumulativeProbability(-from) - StandardNormal.cumulativeProbability(-to)
                : StandardNormal.cumulativeProbability(to) - StandardNormal.cumulativeProbability(from);
    }

    /** The tail probabilities at the bounds, worked out once for a column. */
    private static final class Cut {
        private final TruncatedNormal number;
        private final double below;
        private final double notAbove;
        private final double above;
        private final double notBelow;

        Cut(TruncatedNormal number) {
            this.number = number;
            double from = (number.low - number.centre) / number.sigma;
            double to = (number.high - number.centre) / number.sigma;
            below = StandardNormal.cumulativeProbability(from);
            notAbove = StandardNormal.cumulativeProbability(to);
            above = StandardNormal.cumulativeProbability(-to);
            notBelow = StandardNormal.cumulativeProbability(-from);
        }

        double quantile(double probability) {
            double lowerTail = below + probability * (notAbove - below);
            double u = lowerTail < 0.5
                    ? StandardNormal.quantile(lowerTail)
                    : -StandardNormal.quantile(above + (1 - probability) * (notBelow - above));
            return Math.min(number.high, Math.max(number.low, number.centre + number.sigma * u));
        }
    }
}
