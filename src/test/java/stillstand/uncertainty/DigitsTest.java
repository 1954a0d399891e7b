package stillstand.uncertainty;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import org.junit.jupiter.api.Test;

class DigitsTest {
    @Test
    void digitsFollowTheSigmaAfterItIsRounded() {
        assertEquals(2, Digits.decimals(0.0199, 1)); // 0.02
        assertEquals(1, Digits.decimals(0.096, 1)); // 0.1, not 0.10
        assertEquals(2, Digits.decimals(0.0996, 2)); // 0.10, not 0.100
        assertEquals(1, Digits.decimals(3.3, 2));
        assertEquals(3, Digits.decimals(0.001, 1));
        assertEquals(0, Digits.decimals(37, 1)); // nothing is rounded to tens
    }

    @Test
    void numbersAreWrittenPlainly() {
        assertEquals("0.44", Digits.text(0.4359, 0.0199, 1));
        assertEquals("0.00", Digits.text(-0.001, 2));
        assertEquals("122.5", Digits.text(122.5, 0, 2));
        assertEquals("7", Digits.text(7.0));
        assertEquals("0", Digits.text(-0.0));
        assertEquals("0.00001", Digits.text(1e-5));
    }

    @Test
    void sigmaMustBeANumberAboveZero() {
        assertThrows(IllegalArgumentException.class, () -> Digits.decimals(0, 1));
        assertThrows(IllegalArgumentException.class, () -> Digits.decimals(Double.NaN, 1));
    }
}
