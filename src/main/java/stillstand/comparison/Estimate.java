package stillstand.comparison;

/**
 * A number estimated by regression.
 *
 * @param value best linear unbiased estimate
 * @param sd its standard deviation, 0 or more
 * @param unit of both
 */
public record Estimate(double value, double sd, String unit) {}
