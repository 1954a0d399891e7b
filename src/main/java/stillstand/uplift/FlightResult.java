package stillstand.uplift;

import java.util.List;
import java.util.Optional;
import stillstand.uncertainty.Interval;

/**
 * What the flight of one site says, as results hold it: the rate, which highstand each level records, what left nothing, and
 * what the answer hangs on. Rates in m/kyr, ages in ka, heights in m above present mean sea level.
 *
 * @param site its name
 * @param model of the rate through time, such as {@code constant} or {@code one change}
 * @param rate the rate; where it changes, that of today
 * @param probabilityUplift that the coast rises; absent under a one-signed prior
 * @param bound how fast the coast can move at most, where the 95 % interval holds 0
 * @param regions68 the rates of highest density that together hold 0.6827: one region for each correlation still possible
 * @param regions95 the same for 0.95
 * @param weights68 probability of each of {@code regions68}
 * @param weights95 probability of each of {@code regions95}
 * @param segments the rate through time, young to old
 * @param pairings which level records which highstand; only probabilities of 0.0001 or more, most probable first by level
 * @param unmatched for each level, the probability that it is no shoreline
 * @param probabilityAllStray that no level is a shoreline
 * @param mostProbable the single most probable correlation, for display; never the answer
 * @param predictedAges age of each level given that it is a shoreline
 * @param logEvidence natural logarithm
 * @param numericalError errors of the calculation
 * @param missing what became of each highstand; generic older rows only where they may stand in the surveyed range
 * @param leaveOneOut the flight without each of its levels
 * @param halving what halving one kind of error would do
 * @param slidingFits what sliding the rate by hand would have given; for comparison only
 * @param modelChoice evidence of each model of the rate through time
 * @param history the rate through time; absent where it does not change
 */
public record FlightResult(
        String site,
        String model,
        Rate rate,
        Optional<Double> probabilityUplift,
        Optional<LevelAnswer.Bound> bound,
        List<Interval> regions68,
        List<Interval> regions95,
        List<Double> weights68,
        List<Double> weights95,
        List<Segment> segments,
        List<Pairing> pairings,
        List<Unmatched> unmatched,
        double probabilityAllStray,
        Correlation mostProbable,
        List<PredictedAge> predictedAges,
        double logEvidence,
        NumericalError numericalError,
        List<Fate> missing,
        List<LeftOut> leaveOneOut,
        List<Halving> halving,
        List<HandFit> slidingFits,
        List<ModelEvidence> modelChoice,
        Optional<RateHistory> history) {
    /** Name of the model without a change of rate. */
    public static final String CONSTANT = "constant";
    /** Name of the model with one change of rate. */
    public static final String ONE_CHANGE = "one change";
    /** Name of the model with two changes of rate. */
    public static final String TWO_CHANGES = "two changes";
    /** Name of the answer weighted over none, one and two changes. */
    public static final String UP_TO_TWO_CHANGES = "up to two changes";
    /** Name of the model whose rate wanders. */
    public static final String GRADUAL = "gradual";
    /** Name of the answer weighted over all models by their evidence. */
    public static final String WEIGHTED = "weighted";

    public FlightResult {
        regions68 = List.copyOf(regions68);
        regions95 = List.copyOf(regions95);
        weights68 = List.copyOf(weights68);
        weights95 = List.copyOf(weights95);
        segments = List.copyOf(segments);
        pairings = List.copyOf(pairings);
        unmatched = List.copyOf(unmatched);
        predictedAges = List.copyOf(predictedAges);
        missing = List.copyOf(missing);
        leaveOneOut = List.copyOf(leaveOneOut);
        halving = List.copyOf(halving);
        slidingFits = List.copyOf(slidingFits);
        modelChoice = List.copyOf(modelChoice);
    }

    /** A flight whose rate does not change. */
    public FlightResult(
            String site,
            String model,
            Rate rate,
            Optional<Double> probabilityUplift,
            Optional<LevelAnswer.Bound> bound,
            List<Interval> regions68,
            List<Interval> regions95,
            List<Double> weights68,
            List<Double> weights95,
            List<Segment> segments,
            List<Pairing> pairings,
            List<Unmatched> unmatched,
            double probabilityAllStray,
            Correlation mostProbable,
            List<PredictedAge> predictedAges,
            double logEvidence,
            NumericalError numericalError,
            List<Fate> missing,
            List<LeftOut> leaveOneOut,
            List<Halving> halving,
            List<HandFit> slidingFits,
            List<ModelEvidence> modelChoice) {
        this(
                site,
                model,
                rate,
                probabilityUplift,
                bound,
                regions68,
                regions95,
                weights68,
                weights95,
                segments,
                pairings,
                unmatched,
                probabilityAllStray,
                mostProbable,
                predictedAges,
                logEvidence,
                numericalError,
                missing,
                leaveOneOut,
                halving,
                slidingFits,
                modelChoice,
                Optional.empty());
    }

    /** Probability that a level is no shoreline; empty where the level takes no part. */
    public Optional<Double> probabilityUnmatched(String level) {
        return unmatched.stream()
                .filter(each -> each.level().equals(level))
                .map(Unmatched::probability)
                .findFirst();
    }

    /** The highstands that a level may record, most probable first. */
    public List<Pairing> pairingsOf(String level) {
        return pairings.stream().filter(each -> each.level().equals(level)).toList();
    }

    /**
     * A stretch of time of one rate.
     *
     * @param fromKa its young end
     * @param toKa its old end; absent where it has none
     * @param rate in it
     */
    public record Segment(double fromKa, Optional<Double> toKa, Rate rate) {}

    /** A level and a highstand, and the probability that it records it. */
    public record Pairing(String level, String highstand, double probability) {}

    /** A level and the probability that it is no shoreline. */
    public record Unmatched(String level, double probability) {}

    /** A level and its age given that it is a shoreline. */
    public record PredictedAge(String level, Quantity age) {}

    /**
     * A whole correlation.
     *
     * @param share of the joint draws that are just this
     * @param matches by level, lowest first
     */
    public record Correlation(double share, List<Match> matches) {
        public Correlation {
            matches = List.copyOf(matches);
        }
    }

    /** A level and the highstand it is matched to; absent = none. */
    public record Match(String level, Optional<String> highstand) {}

    /**
     * One standard error of the calculation, not of the rate.
     *
     * @param mean of the mean rate, m/kyr
     * @param logEvidence of the natural logarithm of the evidence
     * @param pairing of the pairing probability that is known worst
     */
    public record NumericalError(double mean, double logEvidence, double pairing) {}

    /**
     * What became of the shoreline of one highstand; the five probabilities sum to 1.
     *
     * @param highstand its label
     * @param ageKa its age
     * @param heightMetres where its shoreline stands, or would stand, today: the median
     * @param heightSigmaMetres half the 68 % interval of that
     * @param recorded some level records it
     * @param unseen it stands in the surveyed range and no level records it
     * @param reoccupied a younger sea stood as high or higher, and took it
     * @param outside it stands outside the surveyed range
     * @param absent there was no such highstand
     */
    public record Fate(
            String highstand,
            double ageKa,
            double heightMetres,
            double heightSigmaMetres,
            double recorded,
            double unseen,
            double reoccupied,
            double outside,
            double absent) {}

    /**
     * The flight without one level.
     *
     * @param level left out
     * @param logPredictive natural logarithm of the evidence with it less that without it
     * @param rate without it
     */
    public record LeftOut(String level, double logPredictive, Rate rate) {}

    /**
     * The flight with one kind of error halved.
     *
     * @param error what was halved: {@code elevation}, {@code dates}, {@code highstand levels}, {@code highstand ages}
     * @param width95ChangePercent change of the width of the shortest 95 % interval, percent
     */
    public record Halving(String error, double width95ChangePercent) {}

    /**
     * A rate slid by hand until predicted and measured heights look right.
     *
     * @param criterion {@code least rms} or {@code largest r squared}
     * @param rate that looks best
     * @param rmsMetres root mean square of measured less predicted heights
     * @param rSquared squared correlation of measured and predicted heights; absent where either does not vary
     * @param probabilityAsFar the flight's own probability of a rate at least as far from its median
     */
    public record HandFit(
            String criterion, double rate, double rmsMetres, Optional<Double> rSquared, double probabilityAsFar) {}

    /**
     * Evidence of one model of the rate through time.
     *
     * @param model its name
     * @param logEvidence natural logarithm
     * @param log10BayesFactor decimal logarithm of its evidence over that of the constant rate
     * @param numericalError standard error of the natural logarithm; absent where the rate may not change
     * @param weight its share of the answer; absent where the rate may not change
     * @param prior what it holds beforehand, in words: its evidence depends on these ranges
     */
    public record ModelEvidence(
            String model,
            double logEvidence,
            double log10BayesFactor,
            Optional<Double> numericalError,
            Optional<Double> weight,
            Optional<String> prior) {
        /** The evidence alone. */
        public ModelEvidence(String model, double logEvidence, double log10BayesFactor) {
            this(model, logEvidence, log10BayesFactor, Optional.empty(), Optional.empty(), Optional.empty());
        }
    }
}
