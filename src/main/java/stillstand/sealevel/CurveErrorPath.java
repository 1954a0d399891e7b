package stillstand.sealevel;

import org.apache.commons.rng.UniformRandomProvider;
import org.apache.commons.rng.sampling.distribution.ZigguratSampler;

/**
 * The error of one curve through time, in standard deviations, for joint draws: an Ornstein-Uhlenbeck process of unit variance,
 * whose values at two ages correlate as {@code exp(-|t1 - t2| / correlation time)}. It is Markov, so it is drawn only at the
 * ages that are read, from young to old. Scaled by the band it becomes metres ({@link SeaLevelCurve#readAt(double[], double[],
 * double[])}); the offset that all readings of a curve share comes beside it.
 */
public final class CurveErrorPath {
    private final double correlationTimeKa;
    private final ZigguratSampler.NormalizedGaussian gaussian;

    /**
     * @param correlationTimeKa above 0
     * @param random the stream of this curve's errors, without a level in its key
     */
    public CurveErrorPath(double correlationTimeKa, UniformRandomProvider random) {
        if (!(correlationTimeKa > 0 && correlationTimeKa < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("correlationTimeKa must be above 0 but is " + correlationTimeKa);
        }
        this.correlationTimeKa = correlationTimeKa;
        gaussian = ZigguratSampler.NormalizedGaussian.of(random);
    }

    /**
     * One history, read at the ages of one draw.
     *
     * @param agesKa in any order, finite; equal ages get equal errors
     * @param outDeviates as long; filled with errors in standard deviations
     */
    public void drawAt(double[] agesKa, double[] outDeviates) {
        int[] order = youngToOld(agesKa);
        double deviate = 0;
        for (int i = 0; i < order.length; i++) {
            if (i == 0) {
                deviate = gaussian.sample();
            } else {
                double gapKa = agesKa[order[i]] - agesKa[order[i - 1]];
                double kept = Math.exp(-gapKa / correlationTimeKa);
                // 1 - kept^2, exact for narrow gaps too
                double lost = -Math.expm1(-2 * gapKa / correlationTimeKa);
                deviate = kept * deviate + Math.sqrt(lost) * gaussian.sample();
            }
            outDeviates[order[i]] = deviate;
        }
    }

    /** Insertion sort of places: the ages of one draw are few and nearly in the order of the levels. */
    private static int[] youngToOld(double[] agesKa) {
        int[] order = new int[agesKa.length];
        for (int i = 0; i < order.length; i++) {
            int j = i;
            while (j > 0 && agesKa[order[j - 1]] > agesKa[i]) {
                order[j] = order[j - 1];
                j--;
            }
            order[j] = i;
        }
        return order;
    }
}
