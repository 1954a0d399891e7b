package stillstand.uncertainty;

import java.util.List;
import java.util.Optional;

/**
 * Standard errors, from the number of draws alone, of what all draws together say.
 *
 * @param median of the median
 * @param low95 of the lower end of the equal-tailed 95 % interval
 * @param high95 of its upper end
 */
public record MonteCarloError(double median, double low95, double high95) {
    /** @throws IllegalArgumentException if an error is not 0 or more */
    public MonteCarloError {
        if (!(median >= 0 && low95 >= 0 && high95 >= 0)) {
            throw new IllegalArgumentException(
                    "errors must be 0 or more but are " + median + ", " + low95 + ", " + high95);
        }
    }

    /**
     * From the spread between blocks: its standard deviation over the root of their number; absent below
     * {@link AdaptiveStop#LEAST_BLOCKS} blocks, which say too little of their own spread.
     */
    public static Optional<MonteCarloError> between(List<BlockEstimates> blocks) {
        if (blocks.size() < AdaptiveStop.LEAST_BLOCKS) {
            return Optional.empty();
        }
        return Optional.of(new MonteCarloError(
                ofAverage(blocks.stream().mapToDouble(BlockEstimates::median).toArray()),
                ofAverage(blocks.stream()
                        .mapToDouble(block -> block.interval95().low())
                        .toArray()),
                ofAverage(blocks.stream()
                        .mapToDouble(block -> block.interval95().high())
                        .toArray())));
    }

    /** Standard deviation of the average of values that are replicates of each other (JCGM 101:2008, 7.9.4 g). */
    static double ofAverage(double[] replicates) {
        double sum = 0;
        for (double replicate : replicates) {
            sum += replicate;
        }
        double average = sum / replicates.length;
        double squares = 0;
        for (double replicate : replicates) {
            squares += (replicate - average) * (replicate - average);
        }
        return Math.sqrt(squares / ((double) replicates.length * (replicates.length - 1)));
    }
}
