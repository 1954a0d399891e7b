package stillstand.uplift;

/**
 * One highstand of the table as the shoreline filter sees it.
 *
 * @param stage its label
 * @param ageKa its age, ka before present, 0 or more
 * @param ageSigmaKa standard deviation of the age, its own part only, 0 or more
 * @param levelMetres its sea level, m relative to present mean sea level, up positive
 * @param levelSigmaMetres standard deviation of the level, its own part only, 0 or more
 * @param levelAgeCovarianceMetresKa covariance of level and age, 0 unless another site has already spoken of this row
 * @param durationKa how long it lasted: a date of its level may lie anywhere in it; 0 or more
 * @param existence probability that there was such a highstand, above 0, at most 1
 * @param takesOffset whether it shares the offset of the table's levels
 * @param takesInterstadial whether it shares the level factor of the interstadials
 * @param takesCurveAge whether it shares the age shift of the curve
 */
public record FlightRow(
        String stage,
        double ageKa,
        double ageSigmaKa,
        double levelMetres,
        double levelSigmaMetres,
        double levelAgeCovarianceMetresKa,
        double durationKa,
        double existence,
        boolean takesOffset,
        boolean takesInterstadial,
        boolean takesCurveAge) {
    /** @throws IllegalArgumentException if a number is out of the range given for it, or the covariance exceeds its bound */
    public FlightRow {
        requireAtLeastZero("ageKa", ageKa);
        requireAtLeastZero("ageSigmaKa", ageSigmaKa);
        requireAtLeastZero("levelSigmaMetres", levelSigmaMetres);
        requireAtLeastZero("durationKa", durationKa);
        if (!(Math.abs(levelMetres) < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("levelMetres must be finite but is " + levelMetres);
        }
        if (!(Math.abs(levelAgeCovarianceMetresKa) <= ageSigmaKa * levelSigmaMetres)) {
            throw new IllegalArgumentException(
                    "levelAgeCovarianceMetresKa must be at most the product of the two sigmas but is "
                            + levelAgeCovarianceMetresKa);
        }
        if (!(existence > 0 && existence <= 1)) {
            throw new IllegalArgumentException("existence must be above 0 and at most 1 but is " + existence);
        }
    }

    /** A row taken as it stands: it surely existed, was short, and shares nothing but the offset. */
    public static FlightRow plain(
            String stage, double ageKa, double ageSigmaKa, double levelMetres, double levelSigmaMetres) {
        return new FlightRow(stage, ageKa, ageSigmaKa, levelMetres, levelSigmaMetres, 0, 0, 1, true, false, false);
    }

    /** The same row with the half of the curve's age variance that is its own added to its age, where it takes the curve's age. */
    public FlightRow withOwnHalfOfCurveAge(double curveAgeSigmaKa) {
        double sigmaKa =
                takesCurveAge ? Math.sqrt(ageSigmaKa * ageSigmaKa + curveAgeSigmaKa * curveAgeSigmaKa / 2) : ageSigmaKa;
        return withSigmas(sigmaKa, levelSigmaMetres);
    }

    /** The same row with an independent error of its level added: local sea level where no model of it is given. */
    public FlightRow withAddedLevelSigma(double addedSigmaMetres) {
        return withSigmas(ageSigmaKa, Math.hypot(levelSigmaMetres, addedSigmaMetres));
    }

    /** The same row upside down: a lowstand for a highstand. */
    FlightRow mirrored() {
        return new FlightRow(
                stage,
                ageKa,
                ageSigmaKa,
                -levelMetres,
                levelSigmaMetres,
                -levelAgeCovarianceMetresKa,
                durationKa,
                existence,
                takesOffset,
                takesInterstadial,
                takesCurveAge);
    }

    /** The same row with these standard deviations. */
    public FlightRow withSigmas(double otherAgeSigmaKa, double otherLevelSigmaMetres) {
        return new FlightRow(
                stage,
                ageKa,
                otherAgeSigmaKa,
                levelMetres,
                otherLevelSigmaMetres,
                levelAgeCovarianceMetresKa,
                durationKa,
                existence,
                takesOffset,
                takesInterstadial,
                takesCurveAge);
    }

    private static void requireAtLeastZero(String name, double value) {
        if (!(value >= 0 && value < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException(name + " must be 0 or more but is " + value);
        }
    }
}
