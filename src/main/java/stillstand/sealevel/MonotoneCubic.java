package stillstand.sealevel;

import java.util.Arrays;

/**
 * Shape-preserving cubic interpolation: a piecewise cubic Hermite curve that rises only where its knots rise and never
 * leaves the range of two neighbouring knots, so that its turning points are knots.
 *
 * <p>Slope at an inner knot: 0 where the two neighbouring chords differ in sign or one is flat, else their weighted
 * harmonic mean (Fritsch and Butland 1984, SIAM J. Sci. Stat. Comput. 5, 300-304). Slope at an end: the three-point
 * formula, held to the sign of the first chord and to three times it (monotone by Fritsch and Carlson 1980, SIAM J. Numer.
 * Anal. 17, 238-246).
 */
final class MonotoneCubic {
    private final double[] x;
    private final double[] y;
    private final double[] slope;

    /**
     * @param x strictly ascending, at least two
     * @param y as many, finite
     */
    MonotoneCubic(double[] x, double[] y) {
        this.x = x.clone();
        this.y = y.clone();
        slope = slopes(x, y);
    }

    /** Value at {@code at}, which must lie between the first and the last knot. */
    double valueAt(double at) {
        return valueIn(segment(at), at);
    }

    /** Values at many places in ascending order, each between the first and the last knot. */
    double[] valuesAt(double[] ascending) {
        double[] values = new double[ascending.length];
        int i = 0;
        for (int k = 0; k < values.length; k++) {
            while (i < x.length - 2 && x[i + 1] <= ascending[k]) {
                i++;
            }
            values[k] = valueIn(i, ascending[k]);
        }
        return values;
    }

    private double valueIn(int i, double at) {
        double width = x[i + 1] - x[i];
        double t = (at - x[i]) / width;
        double rise = y[i + 1] - y[i];
        double a = slope[i] * width;
        double b = slope[i + 1] * width;
        double value = y[i] + t * (a + t * (3 * rise - 2 * a - b + t * (a + b - 2 * rise)));
        // rounding alone could step over a knot by a last digit
        return Math.min(Math.max(value, Math.min(y[i], y[i + 1])), Math.max(y[i], y[i + 1]));
    }

    /** Derivative at {@code at}, which must lie between the first and the last knot. */
    double slopeAt(double at) {
        int i = segment(at);
        double width = x[i + 1] - x[i];
        double t = (at - x[i]) / width;
        double chord = (y[i + 1] - y[i]) / width;
        double a = slope[i];
        double b = slope[i + 1];
        return a + t * (6 * chord - 4 * a - 2 * b + 3 * t * (a + b - 2 * chord));
    }

    private int segment(double at) {
        int found = Arrays.binarySearch(x, at);
        int left = found >= 0 ? found : -found - 2;
        return Math.min(left, x.length - 2);
    }

    private static double[] slopes(double[] x, double[] y) {
        int n = x.length;
        double[] width = new double[n - 1];
        double[] chord = new double[n - 1];
        for (int i = 0; i < n - 1; i++) {
            width[i] = x[i + 1] - x[i];
            chord[i] = (y[i + 1] - y[i]) / width[i];
        }
        double[] slope = new double[n];
        if (n == 2) {
            Arrays.fill(slope, chord[0]);
            return slope;
        }
        for (int i = 1; i < n - 1; i++) {
            if (chord[i - 1] * chord[i] > 0) {
                double before = 2 * width[i] + width[i - 1];
                double after = width[i] + 2 * width[i - 1];
                slope[i] = (before + after) / (before / chord[i - 1] + after / chord[i]);
            }
        }
        slope[0] = endSlope(width[0], width[1], chord[0], chord[1]);
        slope[n - 1] = endSlope(width[n - 2], width[n - 3], chord[n - 2], chord[n - 3]);
        return slope;
    }

    private static double endSlope(double width, double nextWidth, double chord, double nextChord) {
        double slope = ((2 * width + nextWidth) * chord - width * nextChord) / (width + nextWidth);
        if (slope * chord <= 0) {
            return 0;
        }
        return chord * nextChord <= 0 && Math.abs(slope) > 3 * Math.abs(chord) ? 3 * chord : slope;
    }
}
