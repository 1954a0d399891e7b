package stillstand.comparison;

/** Covariances of errors, as square arrays. */
final class Covariance {
    private Covariance() {}

    /** The same variances without what is shared. */
    static double[][] independent(double[][] errors) {
        double[][] diagonal = new double[errors.length][errors.length];
        for (int i = 0; i < errors.length; i++) {
            diagonal[i][i] = errors[i][i];
        }
        return diagonal;
    }

    /** Own variances, and one error of this standard deviation that all share. */
    static double[][] withOneShared(double[] ownSds, double sharedSd) {
        double[][] errors = new double[ownSds.length][ownSds.length];
        for (int i = 0; i < ownSds.length; i++) {
            for (int j = 0; j < ownSds.length; j++) {
                errors[i][j] = sharedSd * sharedSd + (i == j ? ownSds[i] * ownSds[i] : 0);
            }
        }
        return errors;
    }
}
