package stillstand.sealevel;

/**
 * One standard deviation given to a curve that comes without an error, or with one it does not explain.
 *
 * @param interglacialSigmaMetres in the windows of interglacial stages, above 0
 * @param elsewhereSigmaMetres at all other ages, above 0
 */
public record GuessedSpread(double interglacialSigmaMetres, double elsewhereSigmaMetres) {
    /** Stillstand's default for a curve of which nothing else is known. */
    public static final GuessedSpread DEFAULT = new GuessedSpread(6, 12);

    public GuessedSpread {
        if (!(interglacialSigmaMetres > 0 && interglacialSigmaMetres < Double.POSITIVE_INFINITY)
                || !(elsewhereSigmaMetres > 0 && elsewhereSigmaMetres < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("a guessed spread must be above 0 but is " + interglacialSigmaMetres
                    + " and " + elsewhereSigmaMetres);
        }
    }

    /** The spread at an age. */
    public double sigmaMetresAt(double ageKa, StageTable stages) {
        return stages.classAt(ageKa)
                        .filter(each -> each == HighstandClass.INTERGLACIAL)
                        .isPresent()
                ? interglacialSigmaMetres
                : elsewhereSigmaMetres;
    }
}
