package stillstand.shoreline;

import static org.junit.jupiter.api.Assertions.assertEquals;

import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/**
 * Published sea-level index points: limits, elevation and its error in, reference water level, indicative range, relative sea
 * level and its error out. Source: WALIS v1.0 (Rovere et al. 2023, Earth System Science Data 15, 1-23), the record's number
 * first. The compilation cuts its results to two decimals, so each is met to 0.011 m.
 */
class RelativeSeaLevelReferenceTest {
    private static final double CUT_METRES = 0.011;

    @ParameterizedTest
    @CsvSource({
        "1334, 10.0, -10.0, 35.0, 5.09, 0.0, 20.0, 35.0, 11.22",
        "11, 1.12, -1.13, 38.0, 10.0, 0.0, 2.25, 38.0, 10.06",
        "4, 1.12, -1.09, 3.5, 1.0, 0.01, 2.21, 3.48, 1.49",
        "370, 1.0, -2.0, 11.0, 1.0, -0.5, 3.0, 11.5, 1.8",
        "33, 1.24, -1.01, 12.5, 2.88, 0.11, 2.25, 12.39, 3.09",
        "131, 7.0, 0.5, 9.5, 2.06, 3.75, 6.5, 5.75, 3.84",
        "4144, 0.0, -6.0, 1.9, 1.0, -3.0, 6.0, 4.9, 3.16",
        "4097, 2.0, 0.0, -10.2, 1.0, 1.0, 2.0, -11.2, 1.41",
        "3513, -0.42, -0.9, 1.25, 1.45, -0.66, 0.48, 1.91, 1.46",
        "3516, -0.31, -2.39, 3.0, 1.5, -1.35, 2.08, 4.35, 1.82",
        "178, 0.0, -4.0, 4.5, 0.2, -2.0, 4.0, 6.5, 2.0",
        "1362, 0.0, -1.0, 6.5, 4.6, -0.5, 1.0, 7.0, 4.62",
        "3736, 4.15, -0.14, -0.75, 0.71, 2.0, 4.29, -2.75, 2.26",
        "720, 0.15, -0.14, 7.5, 0.5, 0.0, 0.29, 7.49, 0.52",
        "234, 0.5, 0.0, 3.5, 0.1, 0.25, 0.5, 3.25, 0.26",
        "3786, 0.76, -0.81, 30.0, 6.0, -0.02, 1.57, 30.02, 6.05",
        "53, 0.8, -2.73, 65.0, 13.0, -0.96, 3.53, 65.96, 13.11",
        "1363, -1.0, -8.0, 5.0, 10.0, -4.5, 7.0, 9.5, 10.59"
    })
    void indexPoint(
            String record,
            double upper,
            double lower,
            double elevation,
            double elevationError,
            double level,
            double range,
            double seaLevel,
            double seaLevelError) {
        IndicativeMeaning meaning = IndicativeMeaning.ofLimits("published", upper, lower);
        double reference = meaning.referenceWaterLevelMetres().mean();
        assertEquals(level, reference, CUT_METRES, record);
        assertEquals(range, meaning.rangeMetres(), CUT_METRES, record);
        assertEquals(seaLevel, RelativeSeaLevel.ofLandform(elevation, 0, 0, 0, 0, reference), CUT_METRES, record);
        double half =
                IndicativeRule.QUADRATURE.errorMetres(meaning.rangeMetres()).standardDeviation();
        assertEquals(seaLevelError, Math.hypot(elevationError, half), CUT_METRES, record);
    }

    /** A coral 27 m up that grew under 3 m of water or more stands for a shoreline at 30 m (published for Touce's Point). */
    @Test
    void coralStandsBelowItsSea() {
        assertEquals(30, RelativeSeaLevel.ofCoral(27, 0, 3));
    }

    /** By hand: 61.4 m in the datum, sea at 0.5 m, 2 m of fan, 0.05 m/kyr off for 120 kyr, inner edge 1 m above its sea. */
    @Test
    void everyTermHasItsSign() {
        assertEquals(63.9, RelativeSeaLevel.ofLandform(61.4, 0.5, 2, 0.05, 120, 1), 1e-12);
        assertEquals(64.9, RelativeSeaLevel.ofCoral(61.4, 0.5, 4), 1e-12);
    }
}
