package stillstand.shoreline;

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
}
