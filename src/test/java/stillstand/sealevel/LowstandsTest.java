package stillstand.sealevel;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import org.junit.jupiter.api.Test;
import stillstand.files.ShippedLibrary;
import stillstand.study.Library;

/** Which lowstands a curve shows, and what they are called. */
class LowstandsTest {
    private static HighstandTable lowstands() {
        Library library = ShippedLibrary.load();
        SeaLevelCurve curve = library.curve("spratt-lisiecki-2016").orElseThrow();
        return Lowstands.of(
                curve,
                HighstandTable.fromCurve(curve, library.stages(), HighstandOverrides.NONE, HighstandOptions.DEFAULT));
    }

    @Test
    void lowstandsLieBetweenHighstandsAndAreNamedAfterThem() {
        assertEquals(
                List.of(
                        "2", "4", "5b", "5d", "6", "6e", "7b", "7d", "8", "9b", "9d", "10", "11b", "12", "13b", "14",
                        "15b", "15d", "16", "18"),
                lowstands().stages());
        assertEquals("5/9", Lowstands.label("5", "9"));
        assertEquals("a/b", Lowstands.label("a", "b"));
    }

    /** The reef stopped 3 ka after the turning point and, on the mean, 15 sqrt(2 / pi) = 12 m above it. */
    @Test
    void aReefStopsLaterAndHigher() {
        SeaLevelCurve curve =
                ShippedLibrary.load().curve("spratt-lisiecki-2016").orElseThrow();
        Highstand last = lowstands().rows().get(0);
        double turnedKa = last.ageKa() + 3;
        assertTrue(turnedKa > 18 && turnedKa < 28, "turning point at " + turnedKa);
        assertEquals(
                curve.levelMetresAt(turnedKa) + 15 * Math.sqrt(2 / Math.PI),
                last.level().mean(),
                1e-9);
        assertTrue(last.level().standardDeviation() > 15 * Math.sqrt(1 - 2 / Math.PI));
        assertTrue(last.takesOffset() && last.takesCurveAgeError() && !last.takesInterstadialFactor());
    }
}
