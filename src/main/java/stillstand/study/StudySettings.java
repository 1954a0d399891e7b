package stillstand.study;

import java.util.List;
import java.util.Optional;
import stillstand.comparison.ComparisonRules;
import stillstand.sensitivity.MeasurementPlan;
import stillstand.shoreline.IndicativeRule;
import stillstand.uncertainty.Interval;
import stillstand.uplift.RateChanges;
import stillstand.uplift.RatePrior;

/**
 * What {@code study.json} says, with every default filled in.
 *
 * @param title what the study is called
 * @param note the user's own words
 * @param seed of all random draws
 * @param draws how many
 * @param seaLevel curves, highstands and their shared errors
 * @param rate prior and changes of the rate
 * @param matching how levels are matched to highstands
 * @param indicativeRange what an indicative range means
 * @param screening limits on samples; each absent limit is off
 * @param leverage how good the measurements are supposed to be of which the run says what they would do; absent = what the
 *     answers hang on is not asked for
 * @param comparison how sites are compared
 */
public record StudySettings(
        String title,
        String note,
        long seed,
        Draws draws,
        SeaLevelChoice seaLevel,
        RateChoice rate,
        Matching matching,
        IndicativeRule indicativeRange,
        Screening screening,
        Optional<MeasurementPlan> leverage,
        ComparisonRules comparison) {
    /** Settings that say nothing of how sites are compared. */
    public StudySettings(
            String title,
            String note,
            long seed,
            Draws draws,
            SeaLevelChoice seaLevel,
            RateChoice rate,
            Matching matching,
            IndicativeRule indicativeRange,
            Screening screening,
            Optional<MeasurementPlan> leverage) {
        this(
                title,
                note,
                seed,
                draws,
                seaLevel,
                rate,
                matching,
                indicativeRange,
                screening,
                leverage,
                ComparisonRules.DEFAULT);
    }

    /**
     * How many draws a level gets.
     *
     * @param maximum at which the adaptive stop gives up
     * @param significantDigits of the standard deviation that must be steady (JCGM 101:2008, 7.9.2), 1 or 2
     * @param fixed where present, exactly so many draws, rounded up to whole blocks, and no adaptive stop
     */
    public record Draws(int maximum, int significantDigits, Optional<Integer> fixed) {
        public Draws {
            if (maximum < 1) {
                throw new IllegalArgumentException("maximum must be 1 or more but is " + maximum);
            }
            if (significantDigits < 1 || significantDigits > 2) {
                throw new IllegalArgumentException("significantDigits must be 1 or 2 but is " + significantDigits);
            }
        }
    }

    /**
     * A curve of the study.
     *
     * @param id of the curve, or of a table of highstands
     * @param weight among them, above 0
     * @param overrides what replaces this curve's picks: the id of a table, or {@link #NO_OVERRIDES}; absent = as for all curves
     */
    public record WeightedCurve(String id, double weight, Optional<String> overrides) {
        /** A curve's picks stand as they are. */
        public static final String NO_OVERRIDES = "none";

        /** A curve whose picks are replaced as those of all others are. */
        public WeightedCurve(String id, double weight) {
            this(id, weight, Optional.empty());
        }

        /** How answers name it: the id, and how its picks are replaced where this curve states that. */
        public String label() {
            return overrides
                    .map(by -> id + (by.equals(NO_OVERRIDES) ? " (own picks)" : " (" + by + ")"))
                    .orElse(id);
        }

        public WeightedCurve {
            if (!(weight > 0 && weight < Double.POSITIVE_INFINITY)) {
                throw new IllegalArgumentException("weight must be above 0 but is " + weight);
            }
        }
    }

    /**
     * Sea level: where highstands come from and what their errors share.
     *
     * @param curves may be empty where highstands come from a table
     * @param highstandTable id of the table that gives the highstands; absent = they are picked from the curves
     * @param overrides id of the table whose rows replace a curve's picks; absent = none do
     * @param olderThanCurve whether generic rows go on where a curve ends
     * @param correlationTimeKa of a curve's errors; absent = the curve's own
     * @param sharedLevelSigmaMetres of the offset that all highstands share
     * @param interstadialSigmaMetres of the factor that interstadials share
     * @param curveAgeSigmaKa of a curve's age scale; absent = the curve's own
     * @param rezero whether a curve is moved to read 0 today
     */
    public record SeaLevelChoice(
            List<WeightedCurve> curves,
            Optional<String> highstandTable,
            Optional<String> overrides,
            boolean olderThanCurve,
            Optional<Double> correlationTimeKa,
            Setting sharedLevelSigmaMetres,
            Setting interstadialSigmaMetres,
            Optional<Double> curveAgeSigmaKa,
            boolean rezero) {
        public SeaLevelChoice {
            curves = List.copyOf(curves);
        }
    }

    /** A number and whether the user wrote it (true) or it is the default (false). */
    public record Setting(double value, boolean stated) {}

    /**
     * Prior of the rate, and whether it may change with time.
     *
     * @param prior of each rate
     * @param changes which models are weighed
     * @param changeBetweenKa lowest and highest age of a change, ka, above 0; the same where the age of one change is known
     */
    public record RateChoice(RatePrior prior, Changes changes, Interval changeBetweenKa) {
        /** A choice with the default ages of a change. */
        public RateChoice(RatePrior prior, Changes changes) {
            this(prior, changes, new Interval(RateChanges.DEFAULT_FROM_KA, RateChanges.DEFAULT_TO_KA));
        }
    }

    /** How the rate may change with time. */
    public enum Changes {
        NONE,
        ONE,
        UP_TO_TWO,
        GRADUAL,
        CHOOSE
    }

    /**
     * How levels are matched to highstands (see {@code study.json} in the README for each).
     *
     * @param recordingProbability fixed, or a Beta prior
     * @param recordingDecay of the recording probability with age; absent = summed over, or none under a complete table
     * @param expectedStrays fixed, or a Gamma prior's mean; absent = a Gamma prior of mean a tenth of the levels
     * @param strayAgeMaximumKa oldest age a stray may have
     * @param wrongDateProbability that a date says nothing of its level
     * @param traceProbability that a traced terrace is one shoreline
     */
    public record Matching(
            Recording recordingProbability,
            Optional<Decay> recordingDecay,
            Optional<Strays> expectedStrays,
            double strayAgeMaximumKa,
            Setting wrongDateProbability,
            double traceProbability) {}

    /** Probability that a surviving shoreline is recorded. */
    public sealed interface Recording {
        /** Known, strictly between 0 and 1 or 1. */
        record Fixed(double probability) implements Recording {}

        /** A Beta prior. */
        record Beta(double alpha, double beta) implements Recording {}
    }

    /** How recording falls with the age of a shoreline. */
    public sealed interface Decay {
        /** It does not. */
        record None() implements Decay {}

        /** It does, by an e-folding time that is summed over. */
        record Marginalised() implements Decay {}

        /** It does, by this e-folding time. */
        record Fixed(double timeKa) implements Decay {}
    }

    /** Expected number of levels that are no shoreline. */
    public sealed interface Strays {
        /** Known, above 0. */
        record Fixed(double number) implements Strays {}

        /** A Gamma prior of shape 2 and this mean. */
        record GammaMean(double mean) implements Strays {}
    }

    /** Limits that samples must keep; an absent one is off. */
    public record Screening(
            Optional<Double> calciteMaximumPercent,
            Optional<Double> initialDelta234ULowPermil,
            Optional<Double> initialDelta234UHighPermil,
            Optional<Double> th232MaximumPpb,
            Optional<Double> th230Th232Minimum,
            Optional<String> replicates,
            Optional<Boolean> stratigraphicOrder) {}
}
