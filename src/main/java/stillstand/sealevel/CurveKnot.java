package stillstand.sealevel;

/**
 * One row of a curve's table.
 *
 * @param ageKa age before 1950, ka, 0 or more
 * @param levelMetres sea level, up positive, above the curve's zero
 * @param sigmaLowMetres one standard deviation of the lower half of its spread, 0 or more
 * @param sigmaHighMetres one standard deviation of the upper half, 0 or more
 */
public record CurveKnot(double ageKa, double levelMetres, double sigmaLowMetres, double sigmaHighMetres) {
    public CurveKnot {
        if (!(ageKa >= 0 && ageKa < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("ageKa must be 0 or more but is " + ageKa);
        }
        if (!(Math.abs(levelMetres) < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("levelMetres must be finite but is " + levelMetres);
        }
        requireSigma("sigmaLowMetres", sigmaLowMetres);
        requireSigma("sigmaHighMetres", sigmaHighMetres);
    }

    private static void requireSigma(String name, double sigmaMetres) {
        if (!(sigmaMetres >= 0 && sigmaMetres < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException(name + " must be 0 or more but is " + sigmaMetres);
        }
    }
}
