package stillstand.uplift;

import java.util.List;
import java.util.Optional;

/**
 * How levels are matched to highstands: what a study states; what it does not is the default, which for a table taken as it
 * stands (complete) is that recording does not fall with age and no date is wrong.
 *
 * @param recording prior of the probability that a surviving shoreline is recorded
 * @param decaysKa equally likely decays of recording with age, ka, infinite = none; absent = the default
 * @param strays prior of the expected number of strays; absent = a gamma prior, one level in ten
 * @param strayAgeMaximumKa greatest age of a stray or a wrong date, ka, above 0
 * @param wrongDateProbability that one date is wrong; absent = the default
 */
public record MatchingRules(
        SharedPriors.Recording recording,
        Optional<List<Double>> decaysKa,
        Optional<SharedPriors.Strays> strays,
        double strayAgeMaximumKa,
        Optional<Double> wrongDateProbability) {
    /** By how much a doubtful level is more easily a stray. */
    static final double DOUBTFUL = 10;

    private static final double STRAYS_PER_LEVEL = 0.1;
    private static final double WRONG_DATE = 0.05;

    /** The default: Beta(4, 2.5), four decays, one level in ten a stray, one date in twenty wrong. */
    public static final MatchingRules DEFAULT = new MatchingRules(
            new SharedPriors.Recording.BetaPrior(4, 2.5), Optional.empty(), Optional.empty(), 1000, Optional.empty());

    public MatchingRules {
        decaysKa = decaysKa.map(List::copyOf);
    }

    /** The same rules with another prior of the recording probability. */
    public MatchingRules with(SharedPriors.Recording other) {
        return new MatchingRules(other, decaysKa, strays, strayAgeMaximumKa, wrongDateProbability);
    }

    /** The same rules with these decays of recording, ka, equally likely. */
    public MatchingRules withDecays(List<Double> otherKa) {
        return new MatchingRules(recording, Optional.of(otherKa), strays, strayAgeMaximumKa, wrongDateProbability);
    }

    /** Decays of recording in force, ka; infinite = none. */
    public List<Double> decaysKa(boolean complete) {
        return decaysKa.orElse(complete ? List.of(Double.POSITIVE_INFINITY) : SharedPriors.DEFAULT_DECAYS_KA);
    }

    SharedPriors.Strays strays(int levels) {
        return strays.orElseGet(() -> new SharedPriors.Strays.GammaPrior(STRAYS_PER_LEVEL * levels));
    }

    double wrongDateProbability(boolean complete) {
        return wrongDateProbability.orElse(complete ? 0 : WRONG_DATE);
    }
}
