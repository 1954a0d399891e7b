package stillstand.uncertainty;

/**
 * Two half normal distributions of different width, joined at their common centre with half of the probability on either
 * side: a draw is {@code centre + sigmaLow u} for {@code u < 0} and {@code centre + sigmaHigh u} otherwise, where
 * {@code u} is standard normal. The centre is the median. (The other distribution of this name, whose density is
 * continuous, has its mode at the centre instead.)
 *
 * <p>Mean {@code centre + (sigmaHigh - sigmaLow) / sqrt(2 pi)}, variance
 * {@code (sigmaLow^2 + sigmaHigh^2) / 2 - (sigmaHigh - sigmaLow)^2 / (2 pi)}.
 *
 * @param centre median, finite
 * @param sigmaLow spread of the lower half, above 0
 * @param sigmaHigh spread of the upper half, above 0
 */
public record SplitNormal(double centre, double sigmaLow, double sigmaHigh) implements Uncertain {
    /** Standard deviations from the centre to a 95 % bound, as rounded in the literature that quotes such bounds. */
    private static final double SIGMAS_TO_95 = 1.96;

    /** @throws IllegalArgumentException if {@code centre} is not finite or a sigma is not a finite number above 0 */
    public SplitNormal {
        Uncertain.requireFinite("centre", centre);
        Uncertain.requirePositive("sigmaLow", sigmaLow);
        Uncertain.requirePositive("sigmaHigh", sigmaHigh);
    }

    /**
     * From a central value and the bounds of its central 95 %: each sigma is the distance to its bound over 1.96.
     *
     * @throws IllegalArgumentException if not {@code low95 < centre < high95}, all finite
     */
    public static SplitNormal ofCentral95(double centre, double low95, double high95) {
        if (!(low95 < centre && centre < high95)) {
            throw new IllegalArgumentException(
                    "centre must lie between low95 and high95 but is " + centre + " with " + low95 + " to " + high95);
        }
        return new SplitNormal(centre, (centre - low95) / SIGMAS_TO_95, (high95 - centre) / SIGMAS_TO_95);
    }

    @Override
    public double quantile(double probability) {
        Uncertain.requireProbability(probability);
        return fromStandard(StandardNormal.quantile(probability));
    }

    @Override
    public double cumulativeProbability(double value) {
        return StandardNormal.cumulativeProbability((value - centre) / sigmaAt(value - centre));
    }

    @Override
    public double density(double value) {
        double sigma = sigmaAt(value - centre);
        return StandardNormal.density((value - centre) / sigma) / sigma;
    }

    @Override
    public double mean() {
        return centre + (sigmaHigh - sigmaLow) / Math.sqrt(2 * Math.PI);
    }

    @Override
    public double standardDeviation() {
        double difference = sigmaHigh - sigmaLow;
        return Math.sqrt((sigmaLow * sigmaLow + sigmaHigh * sigmaHigh) / 2 - difference * difference / (2 * Math.PI));
    }

    @Override
    public void toQuantiles(double[] column) {
        StandardNormal.toQuantiles(column);
        for (int i = 0; i < column.length; i++) {
            column[i] = fromStandard(column[i]);
        }
    }

    @Override
    public SplitNormal plus(double shift) {
        return new SplitNormal(centre + shift, sigmaLow, sigmaHigh);
    }

    private double fromStandard(double u) {
        return centre + sigmaAt(u) * u;
    }

    private double sigmaAt(double side) {
        return side < 0 ? sigmaLow : sigmaHigh;
    }
}
