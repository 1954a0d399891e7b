package stillstand.comparison;

import java.util.Optional;
import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.apache.commons.math3.linear.ArrayRealVector;
import org.apache.commons.math3.linear.CholeskyDecomposition;
import org.apache.commons.math3.linear.MatrixUtils;
import org.apache.commons.math3.linear.NonPositiveDefiniteMatrixException;
import org.apache.commons.math3.linear.QRDecomposition;
import org.apache.commons.math3.linear.RealMatrix;
import org.apache.commons.math3.linear.RealVector;
import org.apache.commons.statistics.distribution.ChiSquaredDistribution;

/**
 * A linear model fitted by generalised least squares: {@code y = X b + e}, e normal of known covariance V. Both sides are whitened by the
 * Cholesky factor of V and solved by Householder QR, never by normal equations. With V = I it is ordinary least squares.
 *
 * @see <a href="https://doi.org/10.1017/S0370164600014346">Aitken 1935, Proc. R. Soc. Edinb. 55, 42-48</a>
 */
public final class LinearFit {
    /** Columns of which one is this near to a combination of the others cannot be told apart. */
    private static final double RANK_TOLERANCE = 1e-10;

    private final double[] coefficients;
    private final double[][] covariance;
    private final double chiSquared;
    private final int degrees;

    private LinearFit(double[] coefficients, double[][] covariance, double chiSquared, int degrees) {
        this.coefficients = coefficients;
        this.covariance = covariance;
        this.chiSquared = chiSquared;
        this.degrees = degrees;
    }

    /**
     * Fits.
     *
     * @param design a row for each value, a column for each coefficient
     * @param values as many as rows
     * @param errors covariance of the values' errors, positive definite
     * @return the fit; absent where the rows do not tell the coefficients apart
     * @throws IllegalArgumentException if the sizes disagree or {@code errors} is not positive definite
     */
    public static Optional<LinearFit> of(double[][] design, double[] values, double[][] errors) {
        if (!(values.length > 0 && design.length == values.length && errors.length == values.length)) {
            throw new IllegalArgumentException("design, values and errors must be as many but are " + design.length
                    + ", " + values.length + " and " + errors.length);
        }
        int columns = design[0].length;
        if (values.length < columns) {
            return Optional.empty();
        }
        RealMatrix whiteDesign = new Array2DRowRealMatrix(design);
        RealVector whiteValues = new ArrayRealVector(values);
        try {
            RealMatrix factor = new CholeskyDecomposition(new Array2DRowRealMatrix(errors), 1e-10, 1e-300).getL();
            MatrixUtils.solveLowerTriangularSystem(factor, whiteValues);
            for (int column = 0; column < columns; column++) {
                RealVector one = whiteDesign.getColumnVector(column);
                MatrixUtils.solveLowerTriangularSystem(factor, one);
                whiteDesign.setColumnVector(column, one);
            }
        } catch (NonPositiveDefiniteMatrixException e) {
            throw new IllegalArgumentException("errors must be a positive definite covariance", e);
        }
        return solved(whiteDesign, whiteValues);
    }

    private static Optional<LinearFit> solved(RealMatrix design, RealVector values) {
        int columns = design.getColumnDimension();
        // columns of length 1, so that their near dependence shows whatever their units
        double[] lengths = new double[columns];
        RealMatrix scaled = design.copy();
        for (int column = 0; column < columns; column++) {
            lengths[column] = design.getColumnVector(column).getNorm();
            if (!(lengths[column] > 0)) {
                return Optional.empty();
            }
            scaled.setColumnVector(column, design.getColumnVector(column).mapDivide(lengths[column]));
        }
        QRDecomposition qr = new QRDecomposition(scaled);
        RealMatrix upper = qr.getR().getSubMatrix(0, columns - 1, 0, columns - 1);
        for (int column = 0; column < columns; column++) {
            if (!(Math.abs(upper.getEntry(column, column)) > RANK_TOLERANCE)) {
                return Optional.empty();
            }
        }
        RealVector solution = qr.getSolver().solve(values);
        RealMatrix inverse = MatrixUtils.createRealIdentityMatrix(columns);
        for (int column = 0; column < columns; column++) {
            RealVector one = inverse.getColumnVector(column);
            MatrixUtils.solveUpperTriangularSystem(upper, one);
            inverse.setColumnVector(column, one);
        }
        RealMatrix covariance = inverse.multiply(inverse.transpose());
        double[] coefficients = new double[columns];
        double[][] out = new double[columns][columns];
        for (int i = 0; i < columns; i++) {
            coefficients[i] = solution.getEntry(i) / lengths[i];
            for (int j = 0; j < columns; j++) {
                out[i][j] = covariance.getEntry(i, j) / (lengths[i] * lengths[j]);
            }
        }
        RealVector left = values.subtract(scaled.operate(solution));
        return Optional.of(new LinearFit(coefficients, out, left.dotProduct(left), values.getDimension() - columns));
    }

    /** A coefficient. */
    public double coefficient(int i) {
        return coefficients[i];
    }

    /** Covariance of two coefficients under the errors given. */
    public double covariance(int i, int j) {
        return covariance[i][j];
    }

    /** Standard deviation of a coefficient under the errors given. */
    public double sd(int i) {
        return Math.sqrt(covariance[i][i]);
    }

    /** Weighted sum of squares that is left over. */
    public double chiSquared() {
        return chiSquared;
    }

    /** Values less coefficients. */
    public int degrees() {
        return degrees;
    }

    /** Probability of as large a {@link #chiSquared} by chance; absent without degrees of freedom. */
    public Optional<Double> p() {
        return degrees > 0
                ? Optional.of(ChiSquaredDistribution.of(degrees).survivalProbability(chiSquared))
                : Optional.empty();
    }
}
