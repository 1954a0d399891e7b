package stillstand.sealevel;

import stillstand.uncertainty.Normal;
import stillstand.uncertainty.Uncertain;

/**
 * A row of a highstand table: when the sea stood still, how high, and which shared errors it takes.
 *
 * <p>Its age is {@code ageKa + c C} plus an error of its own of {@link #ownAgeSigmaKa}, its level {@code level + o G + k I}
 * plus a local one of {@code localOffsetSigmaMetres}, where C, G and I are the same for all rows ({@link SharedErrors}) and
 * c, o and k are its three marks.
 *
 * @param stage label, such as {@code 5e}
 * @param highstandClass its class
 * @param ageKa age before 1950, ka, above 0
 * @param ageSigmaKa one standard deviation of the age, without the curve's age error, ka, 0 or more
 * @param level height of the sea above its present mean, m, without shared and local errors
 * @param durationKa time in which corals of its terrace may have grown, ka, 0 or more
 * @param existsProbability chance that it cut a shoreline at all, above 0, at most 1
 * @param takesOffset whether the level takes the offset common to all highstands
 * @param takesInterstadialFactor whether it takes the factor common to interstadials
 * @param takesCurveAgeError whether the age takes the curve's age error
 * @param localOffsetSigmaMetres one standard deviation of local minus global sea level, 0 or more
 * @param source who says so
 */
public record Highstand(
        String stage,
        HighstandClass highstandClass,
        double ageKa,
        double ageSigmaKa,
        Uncertain level,
        double durationKa,
        double existsProbability,
        boolean takesOffset,
        boolean takesInterstadialFactor,
        boolean takesCurveAgeError,
        double localOffsetSigmaMetres,
        String source) {
    /** Label of the generic rows beyond a curve's end. */
    public static final String OLDER = "older";

    public Highstand {
        if (stage.isBlank()) {
            throw new IllegalArgumentException("stage must say something");
        }
        if (!(ageKa > 0 && ageKa < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("ageKa of stage '" + stage + "' must be above 0 but is " + ageKa);
        }
        requireSpread("ageSigmaKa", stage, ageSigmaKa);
        requireSpread("localOffsetSigmaMetres", stage, localOffsetSigmaMetres);
        requireDuration(durationKa);
        requireProbability(existsProbability);
    }

    /** Today's interglacial, whose highstand no curve gives. */
    static Highstand holocene() {
        return new Highstand(
                Stage.HOLOCENE,
                HighstandClass.INTERGLACIAL,
                5.25,
                1.3,
                new Normal(0.7, 0.7),
                4,
                1,
                false,
                false,
                false,
                0,
                "Stillstand's default (between 0 and 2 m by place)");
    }

    /** A generic highstand older than a curve knows. */
    static Highstand older(double ageKa) {
        return new Highstand(
                OLDER,
                HighstandClass.INTERGLACIAL,
                ageKa,
                12,
                new Normal(-10, 15),
                8,
                1,
                true,
                false,
                false,
                0,
                "Stillstand's default (one highstand in 41 ka)");
    }

    /** Whether this is a generic row beyond a curve's end. */
    public boolean isOlder() {
        return stage.equals(OLDER);
    }

    /** One standard deviation of the age that is this row's alone: half of the curve's age variance is shared, half own. */
    public double ownAgeSigmaKa(SharedErrors shared) {
        double curve = takesCurveAgeError ? shared.curveAgeSigmaKa() : 0;
        return Math.sqrt(ageSigmaKa * ageSigmaKa + curve * curve / 2);
    }

    /** One standard deviation of the level that is this row's alone, with the local offset. */
    public double ownLevelSigmaMetres() {
        return Math.hypot(level.standardDeviation(), localOffsetSigmaMetres);
    }

    /** One standard deviation of the age with all errors, shared ones too. */
    public double marginalAgeSigmaKa(SharedErrors shared) {
        return takesCurveAgeError ? Math.hypot(ageSigmaKa, shared.curveAgeSigmaKa()) : ageSigmaKa;
    }

    /** One standard deviation of the level with all errors, shared ones too. */
    public double marginalLevelSigmaMetres(SharedErrors shared) {
        double offset = takesOffset ? shared.offsetSigmaMetres() : 0;
        double factor = takesInterstadialFactor ? shared.interstadialSigmaMetres() : 0;
        return Math.hypot(ownLevelSigmaMetres(), Math.hypot(offset, factor));
    }

    /** The row with what an independent estimate says of level and age; the stage, and what a stage brings, stay. */
    Highstand overriddenBy(HighstandEntry entry) {
        HighstandClass otherClass = entry.highstandClass().orElse(highstandClass);
        return new Highstand(
                stage,
                otherClass,
                entry.ageKa(),
                entry.ageSigmaKa(),
                entry.level(),
                entry.durationKa().orElse(durationKa),
                entry.existsProbability().orElse(existsProbability),
                takesOffset,
                false,
                false,
                localOffsetSigmaMetres > 0 ? otherClass.localOffsetSigmaMetres() : 0,
                entry.source());
    }

    /** The row where local sea level departs from global by an estimate. */
    Highstand withLocal(LocalDeparture.Estimate estimate) {
        return new Highstand(
                stage,
                highstandClass,
                ageKa,
                ageSigmaKa,
                level.plus(estimate.offsetMetres()),
                durationKa,
                existsProbability,
                takesOffset,
                takesInterstadialFactor,
                takesCurveAgeError,
                estimate.sigmaMetres(),
                source);
    }

    static void requireDuration(double durationKa) {
        if (!(durationKa >= 0 && durationKa < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("durationKa must be 0 or more but is " + durationKa);
        }
    }

    static void requireProbability(double existsProbability) {
        if (!(existsProbability > 0 && existsProbability <= 1)) {
            throw new IllegalArgumentException(
                    "existsProbability must be above 0 and at most 1 but is " + existsProbability);
        }
    }

    static void requireSpread(String name, String stage, double sigma) {
        if (!(sigma >= 0 && sigma < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException(name + " of stage '" + stage + "' must be 0 or more but is " + sigma);
        }
    }
}
