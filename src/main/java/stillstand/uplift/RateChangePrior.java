package stillstand.uplift;

/**
 * What is held of one change of rate before the flight is looked at. The evidence depends on these ranges: print them beside it.
 *
 * @param recent prior of the rate since the change
 * @param older prior of the rate before it
 * @param changeFromKa lowest age of the change, ka, above 0
 * @param changeToKa highest age; uniform between, or known where both are the same
 */
public record RateChangePrior(RatePrior recent, RatePrior older, double changeFromKa, double changeToKa) {
    /** @throws IllegalArgumentException if the ages are not in order and above 0 */
    public RateChangePrior {
        if (!(changeFromKa > 0 && changeFromKa <= changeToKa && changeToKa < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException(
                    "ages of a change must be above 0 and in order but are " + changeFromKa + " and " + changeToKa);
        }
    }

    /** The priors in words. */
    public String describe() {
        String when = changeFromKa == changeToKa
                ? "change at " + Priors.text(changeFromKa) + " ka"
                : "change uniform from " + Priors.text(changeFromKa) + " to " + Priors.text(changeToKa) + " ka";
        return "recent rate " + recent.describe() + ", older rate " + older.describe() + ", " + when;
    }
}
