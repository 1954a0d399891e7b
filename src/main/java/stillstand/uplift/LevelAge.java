package stillstand.uplift;

import java.util.List;
import stillstand.uncertainty.StandardNormal;
import stillstand.uncertainty.Uncertain;

/**
 * Age of a level, given that it is a shoreline: one normal part for each row it may record.
 *
 * @param parts by row, one or more
 */
public record LevelAge(List<Part> parts) {
    /**
     * The age where the level records one row.
     *
     * @param row number of the row, from 0
     * @param probability that it records this row, above 0
     * @param meanKa mean age, ka
     * @param sigmaKa standard deviation, ka, 0 or more
     */
    public record Part(int row, double probability, double meanKa, double sigmaKa) {}

    /** @throws IllegalArgumentException if there is no part, or no probability */
    public LevelAge {
        parts = List.copyOf(parts);
        if (!(parts.stream().mapToDouble(Part::probability).sum() > 0)) {
            throw new IllegalArgumentException("a level's age needs a row that it may record");
        }
    }

    private double total() {
        return parts.stream().mapToDouble(Part::probability).sum();
    }

    /** Mean age, ka. */
    public double meanKa() {
        return parts.stream()
                        .mapToDouble(part -> part.probability * part.meanKa)
                        .sum()
                / total();
    }

    /** Standard deviation of the age, ka. */
    public double sigmaKa() {
        double mean = meanKa();
        double square = parts.stream()
                .mapToDouble(part ->
                        part.probability * (part.sigmaKa * part.sigmaKa + (part.meanKa - mean) * (part.meanKa - mean)))
                .sum();
        return Math.sqrt(square / total());
    }

    /** Probability that the age is at most {@code ageKa}. */
    public double cumulativeProbability(double ageKa) {
        double sum = 0;
        for (Part part : parts) {
            double sigma = Math.max(part.sigmaKa, 1e-9);
            sum += part.probability * StandardNormal.cumulativeProbability((ageKa - part.meanKa) / sigma);
        }
        return sum / total();
    }

    /**
     * The age below which the given probability lies, ka.
     *
     * @throws IllegalArgumentException if {@code probability} is not strictly between 0 and 1
     */
    public double quantileKa(double probability) {
        Uncertain.requireProbability(probability);
        double low = Double.POSITIVE_INFINITY;
        double high = Double.NEGATIVE_INFINITY;
        for (Part part : parts) {
            low = Math.min(low, part.meanKa - 10 * part.sigmaKa - 1e-6);
            high = Math.max(high, part.meanKa + 10 * part.sigmaKa + 1e-6);
        }
        for (int i = 0; i < 80; i++) {
            double middle = (low + high) / 2;
            if (cumulativeProbability(middle) < probability) {
                low = middle;
            } else {
                high = middle;
            }
        }
        return (low + high) / 2;
    }
}
