package stillstand.shoreline;

import stillstand.uncertainty.Uncertain;

/**
 * One term of the sum that is the height of a former sea level above present mean sea level.
 *
 * @param source where it comes from
 * @param sign +1 where the term is added, -1 where it is taken off
 * @param metres the term itself
 */
public record HeightTerm(Source source, int sign, Uncertain metres) {
    public HeightTerm {
        if (sign != 1 && sign != -1) {
            throw new IllegalArgumentException("sign must be 1 or -1 but is " + sign);
        }
    }

    /** Expected value of the signed term, m. */
    public double meanMetres() {
        return sign * metres.mean();
    }

    /** Where a term comes from; decides with what else its error is shared. */
    public enum Source {
        /** Survey of the level or coral: its own. */
        SURVEY,
        /** Local mean sea level in the datum of the survey: shared by the site. */
        DATUM,
        /** Reference water level of the indicator. */
        REFERENCE_WATER_LEVEL,
        /** Where in its indicative range the indicator formed. */
        INDICATIVE_RANGE,
        /** Sediment over the landform. */
        COVER,
        /** Uplift still to come before the next earthquake. */
        COSEISMIC_STEP,
        /** Depth at which a coral grew. */
        PALAEODEPTH
    }
}
