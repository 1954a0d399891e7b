package stillstand.uplift;

import java.util.List;
import java.util.Optional;

/**
 * What one level says, by itself, of the vertical motion of its site. A level without a rate holds its samples and no more.
 *
 * @param site name of its site
 * @param level its name
 * @param stages the highstands that may have made it, with their probabilities; empty where none was asked
 * @param rate propagated (JCGM 101:2008), flat in displacement
 * @param rateWithPrior the same draws under the prior of the rate
 * @param firstOrder the law of propagation of uncertainty beside it
 * @param age of the level, ka
 * @param relativeSeaLevelMetres where the sea stood, relative to the land of today, when it formed
 * @param probabilityUplift absent under a one-signed prior
 * @param bound where the 95 % interval holds 0
 * @param budget share of each group of inputs
 * @param monteCarlo how well the draws have settled
 * @param samples its samples
 * @param coralsTogether one rate for its corals at their own ages, what their readings share kept shared; absent below two
 * @param agreement of its dates with one another
 */
public record LevelAnswer(
        String site,
        String level,
        List<StageProbability> stages,
        Optional<Rate> rate,
        Optional<Rate> rateWithPrior,
        Optional<FirstOrder> firstOrder,
        Optional<Quantity> age,
        Optional<Quantity> relativeSeaLevelMetres,
        Optional<Double> probabilityUplift,
        Optional<Bound> bound,
        Optional<Budget> budget,
        Optional<MonteCarlo> monteCarlo,
        List<SampleAnswer> samples,
        Optional<Rate> coralsTogether,
        Optional<Agreement> agreement) {
    public LevelAnswer {
        stages = List.copyOf(stages);
        samples = List.copyOf(samples);
    }

    /** A highstand and the probability that it made the level. */
    public record StageProbability(String highstand, double probability) {}

    /** Rate and standard deviation to first order, m/kyr. */
    public record FirstOrder(double rate, double sigma) {}

    /**
     * How fast a slow coast can move at most.
     *
     * @param upSlowerThan uplift is slower than this, m/kyr
     * @param downSlowerThan subsidence is slower than this, m/kyr, as a positive number
     * @param probability that both hold
     */
    public record Bound(double upSlowerThan, double downSlowerThan, double probability) {}

    /** Shares of the variance of the rate by group of inputs; absent where the level has no such input. */
    public record Budget(
            Optional<Share> elevation,
            Optional<Share> palaeodepth,
            Optional<Share> age,
            Optional<Share> seaLevel,
            Optional<Share> surfaceLowering) {}

    /**
     * What one group of inputs does to the variance of the rate.
     *
     * @param share first-order share of the variance (Saltelli et al. 2010)
     * @param totalShare share with all its interactions (Jansen 1999)
     * @param sdIfExact standard deviation of the rate were this group exact, m/kyr
     */
    public record Share(double share, double totalShare, double sdIfExact) {}

    /**
     * How well the draws have settled.
     *
     * @param draws number of them
     * @param converged whether the stopping rule was met
     * @param errorMedian standard error of the median, m/kyr; absent below ten blocks
     * @param errorInterval95 standard errors of both ends of the 95 % interval, m/kyr; absent below ten blocks
     */
    public record MonteCarlo(
            int draws, boolean converged, Optional<Double> errorMedian, Optional<Errors> errorInterval95) {}

    /** Standard errors of the lower and the upper end of an interval, m/kyr. */
    public record Errors(double low, double high) {}

    /**
     * One sample of the level.
     *
     * @param sample its name
     * @param age its own age, ka
     * @param rate of the sample read on the curve at its own age
     * @param whyNoRate the sentence that stands in place of a rate
     */
    public record SampleAnswer(
            String sample, Optional<Quantity> age, Optional<Rate> rate, Optional<String> whyNoRate) {}

    /**
     * How well the dates of a level agree.
     *
     * @param mswd mean square of weighted deviates (Wendt and Carl 1991, Chemical Geology 86, 275-285)
     * @param degrees of freedom
     * @param p probability of as large a value by chance
     */
    public record Agreement(double mswd, int degrees, double p) {}
}
