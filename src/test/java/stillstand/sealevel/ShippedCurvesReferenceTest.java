package stillstand.sealevel;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** Rows of the published tables, each within the tolerance to which the shipped table was condensed. */
class ShippedCurvesReferenceTest {
    /** Spratt and Lisiecki 2016, Clim. Past 12, 1079-1092, supplement. */
    @ParameterizedTest
    @CsvSource({"5, 0.00", "24, -130.00", "121, 3.13", "136, -123.95", "404, 15.96", "120.5, 2.905", "0, 8.49"})
    void sprattAndLisiecki(double ageKa, double levelMetres) {
        assertEquals(levelMetres, ShippedPackage.SPRATT.levelMetresAt(ageKa), 0.75);
    }

    /** Bounds of the central 95 %, same table. */
    @ParameterizedTest
    @CsvSource({
        "51, -82.32, -58.02",
        "83, -47.98, -14.51",
        "99, -35.67, -9.34",
        "121, -16.66, 14.85",
        "170, -78.42, -41.44",
        "199, -30.57, -1.53",
        "237, -36.19, -4.69",
        "404, -12.5, 33.0",
        "614, -45.9, 13.27",
        "774, -28.85, 5.77"
    })
    void boundsOfSprattAndLisiecki(double ageKa, double low95Metres, double high95Metres) {
        SeaLevelCurve curve = ShippedPackage.SPRATT;
        double level = curve.levelMetresAt(ageKa);
        assertEquals(low95Metres, level - 1.96 * curve.sigmaLowMetresAt(ageKa), 2.70);
        assertEquals(high95Metres, level + 1.96 * curve.sigmaHighMetresAt(ageKa), 2.46);
    }

    /** Waelbroeck et al. 2002, Quat. Sci. Rev. 21, 295-305, archived table. */
    @ParameterizedTest
    @CsvSource({"123.875, 6.30", "20, -123.02", "401, 6.46", "407, 6.43", "39.5, -62.11", "287, -16.37"})
    void waelbroeck(double ageKa, double levelMetres) {
        assertEquals(levelMetres, ShippedPackage.WAELBROECK.levelMetresAt(ageKa), 0.75);
    }

    /** Bintanja and van de Wal 2008, Nature 454, 869-872; the archive counts downward: 122.82 at 21 ka. */
    @ParameterizedTest
    @CsvSource({"21, -122.82", "0, -1.46", "124, 0.28", "404, 0.28", "81, -36.93", "951, -5.99"})
    void bintanjaAndVanDeWal(double ageKa, double levelMetres) {
        assertEquals(levelMetres, ShippedPackage.BINTANJA.levelMetresAt(ageKa), 0.75);
    }

    /** Lambeck et al. 2014, PNAS 111, 15296-15303, Table S3. */
    @ParameterizedTest
    @CsvSource({
        "0, 0.00",
        "2.0, -0.26",
        "4.0, -1.02",
        "5.05, -1.77",
        "6.03, -2.96",
        "7.0, -5.39",
        "8.04, -12.57",
        "10.02, -39.28",
        "12.0, -62.58",
        "14.5, -103.10",
        "20.6, -134.28",
        "25.06, -129.81",
        "30.06, -108.53",
        "34.78, -68.39"
    })
    void lambeck(double ageKa, double levelMetres) {
        assertEquals(levelMetres, ShippedPackage.LAMBECK.levelMetresAt(ageKa), 0.48);
    }

    /** The caption of Table S3: the column headed sigma holds two of them, 1.59 m at the lowest level. */
    @Test
    void lambecksSpreadIsTwoSigma() {
        assertEquals(1.59 / 2, ShippedPackage.LAMBECK.sigmaLowMetresAt(20.6), 0.43 / 2);
    }

    /** Waelbroeck's band as archived at 123.875 ka: shown beside the curve, in its right order. */
    @Test
    void waelbroecksBandKeepsItsOrder() {
        double[] lows = ShippedPackage.column("waelbroeck-2002", "level_low_m");
        double[] levels = ShippedPackage.column("waelbroeck-2002", "level_m");
        double[] highs = ShippedPackage.column("waelbroeck-2002", "level_high_m");
        for (int i = 0; i < levels.length; i++) {
            assertTrue(lows[i] <= levels[i] && levels[i] <= highs[i]);
        }
        double[] ages = ShippedPackage.column("waelbroeck-2002", "age_ka");
        int peak = java.util.Arrays.binarySearch(ages, 123.875);
        assertEquals(-6.69, lows[peak], 1e-9);
        assertEquals(19.31, highs[peak], 1e-9);
    }

    /** Rules of coral rates: a curve varying by 20 m or more within the age's spread gives none. */
    @ParameterizedTest
    @CsvSource({"128, 0.5, true", "124, 1, true", "121, 1, false", "82, 1, false", "50, 1, false"})
    void steepPlacesOfSprattAndLisieckiAreKnown(double ageKa, double sigmaKa, boolean steep) {
        double half = Math.hypot(sigmaKa, 3);
        assertEquals(steep, ShippedPackage.SPRATT.variationMetres(ageKa - half, ageKa + half) >= 20);
    }
}
