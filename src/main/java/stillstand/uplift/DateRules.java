package stillstand.uplift;

/**
 * How far dates are believed.
 *
 * @param wrongProbability that one of several dates says nothing of its level, from 0 to below 1
 * @param oldestKa greatest age that a wrong date may have, above 0
 */
public record DateRules(double wrongProbability, double oldestKa) {
    /** The default: one date in twenty, up to 1000 ka. */
    public static final DateRules DEFAULT = new DateRules(0.05, 1000);

    public DateRules {
        if (!(wrongProbability >= 0 && wrongProbability < 1)) {
            throw new IllegalArgumentException("wrongProbability must lie in 0 to below 1 but is " + wrongProbability);
        }
        if (!(oldestKa > 0 && oldestKa < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("oldestKa must be above 0 but is " + oldestKa);
        }
    }
}
