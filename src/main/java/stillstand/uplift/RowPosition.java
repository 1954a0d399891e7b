package stillstand.uplift;

/**
 * Where the shoreline of a row stands, or would stand, today: averaged over the rates, whatever became of it.
 *
 * @param meanMetres m above present mean sea level
 * @param sigmaMetres standard deviation, m
 */
public record RowPosition(double meanMetres, double sigmaMetres) {}
