package stillstand.uplift;

import java.util.List;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.Uncertain;

/**
 * How well the dates of one level agree with one row, as a function of the row's age at a height.
 *
 * <p>With t the age of the shoreline, normal with mean m and variance V given its height, dates a_k of variance s_k^2, the
 * row's duration D, the probability w that a date is wrong and A the largest age of a stray, the agreement is the integral over
 * t of the product over k of
 *
 * <pre>  (1 - w) A N(a_k; t, s_k^2 + D^2 / 12) + w  </pre>
 *
 * that is, the density of the dates relative to that of a stray's dates. Implementations: {@link NormalDates} in closed form,
 * {@link GriddedDates} for dates that are not normal, or many.
 */
sealed interface DateKernel permits NormalDates, GriddedDates {
    /** Most normal dates on a level that are treated in closed form. */
    int MOST_IN_CLOSED_FORM = 8;

    /**
     * Multiplies {@code values[c]}, c from {@code from} to {@code to}, by the agreement at mean age
     * {@code firstMeanKa + (c - from) stepKa} and variance {@code varianceKa2}.
     */
    void multiply(
            double[] values, int from, int to, double firstMeanKa, double stepKa, double varianceKa2, double[] scratch);

    /** Mean and mean square of the age given the dates, where the age before them is normal; into {@code out[0]}, {@code out[1]}. */
    void ageMoments(double meanKa, double varianceKa2, double[] out);

    /**
     * A draw of the age given the dates, where the age before them is normal.
     *
     * @param choice uniform, strictly between 0 and 1
     * @param normal standard normal
     */
    double drawAgeKa(double meanKa, double varianceKa2, double choice, double normal);

    static DateKernel of(
            List<Uncertain> datesKa, double durationKa, double wrongProbability, double strayAgeMaximumKa) {
        boolean normal = datesKa.stream().allMatch(date -> date instanceof Normal);
        return normal && datesKa.size() <= MOST_IN_CLOSED_FORM
                ? new NormalDates(datesKa, durationKa, wrongProbability, strayAgeMaximumKa)
                : new GriddedDates(datesKa, durationKa, wrongProbability, strayAgeMaximumKa);
    }
}
