package stillstand.uplift;

import stillstand.uncertainty.StandardNormal;

/**
 * Something that formed on a known side of the sea, and so bounds the rate on one side: never a level of its own.
 *
 * <p>With e the sea level at its age t, H the uplift since, z its height, u the rate and e' the slope of sea level at t,
 * something that formed below the sea multiplies the evidence by {@code Phi((e + H - z) / sd)}, above the sea by
 * {@code Phi((z - e - H) / sd)}, {@code sd^2 = sigma_z^2 + sigma_e^2 + (u + e')^2 sigma_t^2}: the age enters to first order.
 *
 * @param name its name, for messages
 * @param side where it formed
 * @param heightMetres height today, m above present mean sea level
 * @param heightSigmaMetres standard deviation, m, 0 or more
 * @param ageKa age, ka, 0 or more
 * @param ageSigmaKa standard deviation, ka, 0 or more
 * @param seaLevelMetres sea level at that age, m
 * @param seaLevelSigmaMetres standard deviation of its own, m, 0 or more
 * @param slopeMetresPerKa change of sea level per ka of age (further back), m/ka
 * @param takesOffset whether the sea level shares the offset of the table's levels
 */
public record LimitingPoint(
        String name,
        Side side,
        double heightMetres,
        double heightSigmaMetres,
        double ageKa,
        double ageSigmaKa,
        double seaLevelMetres,
        double seaLevelSigmaMetres,
        double slopeMetresPerKa,
        boolean takesOffset) {
    /** Where a limiting point formed. */
    public enum Side {
        /** Below the sea: marine-limiting. */
        BELOW_SEA,
        /** Above the sea: terrestrial-limiting. */
        ABOVE_SEA
    }

    /** @throws IllegalArgumentException if an age or a standard deviation is negative, all of them are 0, or a number is not finite */
    public LimitingPoint {
        if (!(heightSigmaMetres >= 0 && ageSigmaKa >= 0 && seaLevelSigmaMetres >= 0 && ageKa >= 0)) {
            throw new IllegalArgumentException(
                    "age and standard deviations of limiting point '" + name + "' must be 0 or more");
        }
        if (!(heightSigmaMetres + seaLevelSigmaMetres > 0)) {
            throw new IllegalArgumentException("limiting point '" + name + "' needs a spread of height or sea level");
        }
        if (!(Math.abs(heightMetres) + Math.abs(seaLevelMetres) + Math.abs(slopeMetresPerKa) + ageKa
                < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("numbers of limiting point '" + name + "' must be finite");
        }
    }

    /** The same point upside down. */
    LimitingPoint mirrored() {
        return new LimitingPoint(
                name,
                side == Side.BELOW_SEA ? Side.ABOVE_SEA : Side.BELOW_SEA,
                -heightMetres,
                heightSigmaMetres,
                ageKa,
                ageSigmaKa,
                -seaLevelMetres,
                seaLevelSigmaMetres,
                -slopeMetresPerKa,
                takesOffset);
    }

    /** Natural logarithm of the factor by which it multiplies the evidence of a history. */
    public double logFactor(UpliftHistory history, SharedNumbers shared) {
        double sea = seaLevelMetres + (takesOffset ? shared.offsetMetres() : 0) + history.upliftMetresSince(ageKa);
        double ageTerm = (history.rateMetresPerKyrAt(ageKa) + slopeMetresPerKa) * ageSigmaKa;
        double sigma = Math.sqrt(
                heightSigmaMetres * heightSigmaMetres + seaLevelSigmaMetres * seaLevelSigmaMetres + ageTerm * ageTerm);
        double x = (side == Side.BELOW_SEA ? sea - heightMetres : heightMetres - sea) / sigma;
        // far out the leading term of the asymptotic series is right to 0.1 %
        return x < -30
                ? -x * x / 2 - Math.log(-x * Math.sqrt(2 * Math.PI))
                : Math.log(StandardNormal.cumulativeProbability(x));
    }
}
