package stillstand.sensitivity;

import java.util.ArrayList;
import java.util.List;
import java.util.function.BiFunction;
import stillstand.uplift.Rate;

/**
 * A mixture of curves without one of them.
 *
 * @param site whose rate
 * @param rateOf the level whose own rate it is, or {@link NextMeasurement#FLIGHT}
 * @param curve left out
 * @param weight its share in the mixture, 0 to 1
 * @param rate of the mixture of all
 * @param rateWithout of the mixture of the others, in their own proportions
 */
public record CurveLeftOut(
        String site, String rateOf, String curve, double weight, ShortRate rate, ShortRate rateWithout) {
    /**
     * The answer under one curve.
     *
     * @param curve its id
     * @param weight 0 or more; those of all curves need not add up to 1
     * @param rate under it
     */
    public record Answer(String curve, double weight, Rate rate) {
        /** @throws IllegalArgumentException if the weight is negative or not finite */
        public Answer {
            if (!(weight >= 0 && weight < Double.POSITIVE_INFINITY)) {
                throw new IllegalArgumentException(
                        "weight of curve '" + curve + "' must be 0 or more but is " + weight);
            }
        }
    }

    /**
     * Leaves out each curve in turn; none where that leaves nothing of any weight.
     *
     * @param answers of the curves, of different ids
     * @param mixture of rates by weights that need not add up to 1
     */
    public static List<CurveLeftOut> each(
            String site, String rateOf, List<Answer> answers, BiFunction<List<Rate>, List<Double>, Rate> mixture) {
        double total = answers.stream().mapToDouble(Answer::weight).sum();
        List<CurveLeftOut> found = new ArrayList<>();
        for (Answer out : answers) {
            List<Answer> others = answers.stream()
                    .filter(other -> !other.curve().equals(out.curve()))
                    .toList();
            if (others.stream().anyMatch(other -> other.weight() > 0)) {
                found.add(new CurveLeftOut(
                        site,
                        rateOf,
                        out.curve(),
                        out.weight() / total,
                        ShortRate.of(mixed(answers, mixture)),
                        ShortRate.of(mixed(others, mixture))));
            }
        }
        return found;
    }

    private static Rate mixed(List<Answer> answers, BiFunction<List<Rate>, List<Double>, Rate> mixture) {
        return mixture.apply(
                answers.stream().map(Answer::rate).toList(),
                answers.stream().map(Answer::weight).toList());
    }
}
