package stillstand.shoreline;

import stillstand.uncertainty.Exact;
import stillstand.uncertainty.Uncertain;

/**
 * How the height of an indicator stands to the sea level that made it (Shennan 2015; Rovere et al. 2016, Earth-Science
 * Reviews 159, 404-427).
 *
 * @param indicator id of the kind of landform or deposit; "" where the study names none
 * @param referenceWaterLevelMetres height of the indicator above the mean sea level of its day, up positive
 * @param rangeMetres indicative range: upper less lower limit of its modern counterpart, 0 or more
 */
public record IndicativeMeaning(String indicator, Uncertain referenceWaterLevelMetres, double rangeMetres) {
    public IndicativeMeaning {
        if (!(rangeMetres >= 0 && rangeMetres < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("rangeMetres must be 0 or more but is " + rangeMetres);
        }
    }

    /**
     * From the limits of the modern counterpart: the reference water level is half of their sum, the range their difference.
     *
     * @param upperMetres upper limit above mean sea level, up positive
     * @param lowerMetres lower limit above mean sea level, up positive
     * @throws IllegalArgumentException if the lower limit is above the upper, or one is not finite
     */
    public static IndicativeMeaning ofLimits(String indicator, double upperMetres, double lowerMetres) {
        return new IndicativeMeaning(indicator, new Exact((upperMetres + lowerMetres) / 2), upperMetres - lowerMetres);
    }
}
