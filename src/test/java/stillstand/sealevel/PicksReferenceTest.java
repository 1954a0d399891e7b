package stillstand.sealevel;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** Local maxima read from the full published series, to 2 ka and 1 m. */
class PicksReferenceTest {
    /** Spratt and Lisiecki 2016, Clim. Past 12, 1079-1092: all 799 rows of the supplement. */
    @ParameterizedTest
    @CsvSource({
        "3c, 51, -63.11",
        "5a, 83, -25.57",
        "5c, 99, -17.26",
        "5e, 121, 3.13",
        "6d, 170, -55.34",
        "7a, 199, -7.72",
        "7c, 213, -6.78",
        "7e, 237, -9.44",
        "9a, 284, -35.06",
        "9c, 303, -33.06",
        "9e, 328, -0.61",
        "11a, 387, -19.07",
        "11c, 404, 15.96",
        "13a, 492, -10.85",
        "13c, 517, -44.78",
        "15a, 572, -6.66",
        "15c, 596, -23.46",
        "15e, 614, -9.02",
        "17c, 687, -9.14",
        "19c, 774, -6.3"
    })
    void sprattAndLisiecki(String stage, double ageKa, double levelMetres) {
        assertPick(ShippedPackage.SPRATT, stage, ageKa, levelMetres);
    }

    /** Waelbroeck et al. 2002, Quat. Sci. Rev. 21, 295-305: all 287 archived rows. */
    @ParameterizedTest
    @CsvSource({
        "3a, 39.5, -62.11",
        "3c, 54.5, -52.09",
        "5a, 81.5, -18.67",
        "5c, 101, -20.86",
        "5e, 123.875, 6.3",
        "6d, 167, -49.53",
        "7a, 197, -9.68",
        "7c, 215, -3.54",
        "7e, 236, -9.38",
        "9a, 287, -16.37",
        "9c, 312.5, -15.9",
        "9e, 330.5, 4.68"
    })
    void waelbroeck(String stage, double ageKa, double levelMetres) {
        assertPick(ShippedPackage.WAELBROECK, stage, ageKa, levelMetres);
    }

    /** Bintanja and van de Wal 2008, Nature 454, 869-872: the archived rows at whole ka. */
    @ParameterizedTest
    @CsvSource({
        "5a, 81, -36.93",
        "5c, 96, -34.7",
        "5e, 124, 0.28",
        "7a, 200, -22.29",
        "7c, 214, -20.1",
        "7e, 238, -17.88",
        "9a, 284, -39.65",
        "9e, 325, -0.39",
        "13a, 488, -28.59",
        "15a, 574, -15.01",
        "15e, 611, -26.02",
        "17c, 693, -22.52",
        "19c, 779, -20.09",
        "21, 857, -15.53",
        "23, 908, -49.48",
        "25, 951, -5.99"
    })
    void bintanjaAndVanDeWal(String stage, double ageKa, double levelMetres) {
        assertPick(ShippedPackage.BINTANJA, stage, ageKa, levelMetres);
    }

    /**
     * The two plateaus, where a peak is no date: of two equal peaks (401 ka 6.46 m, 407 ka 6.43 m) Waelbroeck's published list
     * names the other; Bintanja and van de Wal's flat top of +0.28 m at 404 ka keeps its 408 ka row in the condensed table.
     */
    @ParameterizedTest
    @CsvSource({"waelbroeck-2002, 407, 6.43", "bintanja-vandewal-2008, 404, 0.28"})
    void plateausOf11cAgreeInLevelOnly(String id, double ageKa, double levelMetres) {
        SeaLevelCurve curve = ShippedPackage.CURVES.stream()
                .filter(each -> each.id().equals(id))
                .findFirst()
                .orElseThrow();
        TurningPoint pick = pick(curve, "11c");
        assertEquals(levelMetres, pick.levelMetres(), 1);
        assertEquals(ageKa, pick.ageKa(), 6);
    }

    @Test
    void everyPickIsATurningPointStrictlyInsideItsWindow() {
        for (SeaLevelCurve curve : ShippedPackage.CURVES) {
            for (Stage stage : ShippedPackage.STAGES.stages()) {
                TurningPoints.highstand(curve, stage).ifPresent(pick -> {
                    assertTrue(pick.ageKa() > stage.fromKa() && pick.ageKa() < stage.toKa());
                    double here = curve.levelMetresAt(pick.ageKa());
                    assertTrue(here > curve.levelMetresAt(pick.ageKa() - 0.7), "limb at " + pick);
                    assertTrue(here > curve.levelMetresAt(pick.ageKa() + 0.7), "limb at " + pick);
                    assertTrue(pick.prominenceMetres() >= 3);
                });
            }
        }
    }

    /** Published lows: 24 ka is the anchor of Spratt and Lisiecki; their low of 136 ka lies between 5e and 6d. */
    @ParameterizedTest
    @CsvSource({"1, 3a, 24, -130.00", "5e, 6d, 136, -123.95"})
    void lowstandsOfSprattAndLisiecki(String younger, String older, double ageKa, double levelMetres) {
        TurningPoint low = TurningPoints.lowstand(
                        ShippedPackage.SPRATT,
                        ShippedPackage.STAGES.find(younger).orElseThrow(),
                        ShippedPackage.STAGES.find(older).orElseThrow())
                .orElseThrow();
        assertEquals(ageKa, low.ageKa(), 2);
        assertEquals(levelMetres, low.levelMetres(), 1);
    }

    private static void assertPick(SeaLevelCurve curve, String stage, double ageKa, double levelMetres) {
        TurningPoint pick = pick(curve, stage);
        assertEquals(ageKa, pick.ageKa(), 2, stage);
        assertEquals(levelMetres, pick.levelMetres(), 1, stage);
    }

    private static TurningPoint pick(SeaLevelCurve curve, String stage) {
        return TurningPoints.highstand(curve, ShippedPackage.STAGES.find(stage).orElseThrow())
                .orElseThrow(() -> new AssertionError(curve.id() + " has no " + stage));
    }
}
