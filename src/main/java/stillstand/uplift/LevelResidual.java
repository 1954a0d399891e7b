package stillstand.uplift;

/**
 * A level of a flight against the shoreline of the highstand that it most probably records.
 *
 * @param site its name
 * @param level its name
 * @param predictedMetres where the flight puts that shoreline today, m above present mean sea level
 * @param measuredMetres where the level says it stands
 * @param sigmaMetres standard deviation of the difference, m
 */
public record LevelResidual(
        String site, String level, double predictedMetres, double measuredMetres, double sigmaMetres) {}
