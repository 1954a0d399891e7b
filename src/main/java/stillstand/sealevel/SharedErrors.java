package stillstand.sealevel;

/**
 * Errors that the highstands of one table share, one draw for all levels and sites, each normal about 0. They are 0 only where
 * a user says so or a table is complete.
 *
 * @param offsetSigmaMetres of the offset common to all highstands but today's interglacial
 * @param interstadialSigmaMetres of the factor common to interstadials whose level comes from the curve
 * @param curveAgeSigmaKa of the curve's ages, shared and own halves together
 */
public record SharedErrors(double offsetSigmaMetres, double interstadialSigmaMetres, double curveAgeSigmaKa) {
    /** Default of the offset common to all highstands, 1 sigma. */
    public static final double DEFAULT_OFFSET_SIGMA_METRES = 3;
    /** Default of the factor common to interstadials, 1 sigma. */
    public static final double DEFAULT_INTERSTADIAL_SIGMA_METRES = 6;
    /** Of a table taken as it stands. */
    public static final SharedErrors NONE = new SharedErrors(0, 0, 0);

    public SharedErrors {
        requireSpread("offsetSigmaMetres", offsetSigmaMetres);
        requireSpread("interstadialSigmaMetres", interstadialSigmaMetres);
        requireSpread("curveAgeSigmaKa", curveAgeSigmaKa);
    }

    /** The defaults, with the age error of the curve in use. */
    public static SharedErrors ofCurve(double curveAgeSigmaKa) {
        return new SharedErrors(DEFAULT_OFFSET_SIGMA_METRES, DEFAULT_INTERSTADIAL_SIGMA_METRES, curveAgeSigmaKa);
    }

    /** One standard deviation of the age shift that all rows share: half of the curve's age variance. */
    public double sharedAgeSigmaKa() {
        return curveAgeSigmaKa / Math.sqrt(2);
    }

    private static void requireSpread(String name, double sigma) {
        if (!(sigma >= 0 && sigma < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException(name + " must be 0 or more but is " + sigma);
        }
    }
}
