package stillstand.uplift;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import stillstand.uncertainty.DensityBins;
import stillstand.uncertainty.DrawDistribution;
import stillstand.uncertainty.Interval;

/**
 * A rate of vertical motion with its uncertainty, in m/kyr (the same as mm/yr), uplift positive.
 *
 * @param median half the probability lies below
 * @param mean expected value; absent where it does not exist
 * @param sd standard deviation; absent where it does not exist
 * @param interval68 equal tails, probability 0.6827
 * @param interval95 equal tails, probability 0.95
 * @param shortest68 the shortest interval of probability 0.6827
 * @param shortest95 the shortest interval of probability 0.95
 * @param density for figures; absent where all draws are alike
 * @param unit "m/kyr"
 */
public record Rate(
        double median,
        Optional<Double> mean,
        Optional<Double> sd,
        Interval interval68,
        Interval interval95,
        Interval shortest68,
        Interval shortest95,
        Optional<DensityBins> density,
        String unit) {
    /** The unit of every rate. */
    public static final String UNIT = "m/kyr";

    /** Bins of a density. */
    private static final int BINS = 200;

    /**
     * The rate that draws add up to.
     *
     * @param draws rates, m/kyr
     * @param hasMean whether mean and standard deviation exist
     */
    public static Rate of(DrawDistribution draws, boolean hasMean) {
        return new Rate(
                draws.quantile(0.5),
                hasMean ? Optional.of(draws.mean()) : Optional.empty(),
                hasMean ? Optional.of(draws.sd()) : Optional.empty(),
                draws.equalTailed(Interval.PROBABILITY_68),
                draws.equalTailed(Interval.PROBABILITY_95),
                draws.shortest(Interval.PROBABILITY_68),
                draws.shortest(Interval.PROBABILITY_95),
                draws.density(BINS),
                UNIT);
    }

    /** The rate of a flight's posterior. */
    public static Rate of(RatePosterior posterior) {
        return new Rate(
                posterior.quantile(0.5),
                Optional.of(posterior.mean()),
                Optional.of(posterior.standardDeviation()),
                interval(posterior.equalTails(Interval.PROBABILITY_68)),
                interval(posterior.equalTails(Interval.PROBABILITY_95)),
                interval(posterior.shortestInterval(Interval.PROBABILITY_68)),
                interval(posterior.shortestInterval(Interval.PROBABILITY_95)),
                Optional.of(density(posterior)),
                UNIT);
    }

    private static Interval interval(RateRegion region) {
        return new Interval(region.fromMetresPerKyr(), region.toMetresPerKyr());
    }

    /** Relative frequencies in equal bins over the central 99.8 %. */
    private static DensityBins density(RatePosterior posterior) {
        double from = posterior.quantile(0.001);
        double to = posterior.quantile(0.999);
        List<Double> values = new ArrayList<>();
        double below = posterior.cumulativeProbability(from);
        for (int bin = 1; bin <= BINS; bin++) {
            double upTo = posterior.cumulativeProbability(from + (to - from) * bin / BINS);
            values.add(Math.max(0, upTo - below));
            below = upTo;
        }
        return new DensityBins(from, to, values);
    }
}
