package stillstand.shoreline;

/**
 * Height of a former sea level relative to the land of today, from the height of what it left: metres above present mean sea
 * level, up positive. Two formulas, on plain numbers, that every draw goes through.
 */
public final class RelativeSeaLevel {
    private RelativeSeaLevel() {}

    /**
     * From a landform or deposit: {@code elevation - datum_offset - cover + lowering x age - reference_water_level} (the
     * relation of van de Plassche 1986 and Shennan 2015, with what has been laid on the surface or taken off it since).
     *
     * @param elevationMetres height surveyed, in the site's datum, up positive
     * @param datumOffsetMetres height of local mean sea level in that datum, up positive
     * @param coverMetres sediment over the landform, 0 or more
     * @param loweringMetresPerKyr rate at which the surface has been lowered, 0 or more
     * @param ageKa age of the landform
     * @param referenceWaterLevelMetres height at which it formed above the mean sea level of its day, up positive
     */
    public static double ofLandform(
            double elevationMetres,
            double datumOffsetMetres,
            double coverMetres,
            double loweringMetresPerKyr,
            double ageKa,
            double referenceWaterLevelMetres) {
        return elevationMetres
                - datumOffsetMetres
                - coverMetres
                + loweringMetresPerKyr * ageKa
                - referenceWaterLevelMetres;
    }

    /**
     * From a coral where it grew: {@code elevation - datum_offset + depth}.
     *
     * @param elevationMetres height surveyed, in the site's datum, up positive
     * @param datumOffsetMetres height of local mean sea level in that datum, up positive
     * @param depthMetres depth of growth below the mean sea level of its day, down positive
     */
    public static double ofCoral(double elevationMetres, double datumOffsetMetres, double depthMetres) {
        return elevationMetres - datumOffsetMetres + depthMetres;
    }
}
