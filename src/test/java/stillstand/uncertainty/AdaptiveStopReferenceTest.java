package stillstand.uncertainty;

import static org.junit.jupiter.api.Assertions.assertEquals;

import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/**
 * Numerical tolerances by the definition of JCGM 101:2008, 7.9.2, worked by hand: u = c x 10^l with c an integer of the given
 * number of digits, tolerance 10^l / 2.
 */
class AdaptiveStopReferenceTest {
    @ParameterizedTest
    @CsvSource({
        "0.00035, 2, 0.000005", // 35 x 10^-5
        "0.00035, 1, 0.00005", // 4 x 10^-4
        "0.0996, 2, 0.005", // rounds to 0.10 = 10 x 10^-2
        "0.0994, 2, 0.0005", // 99 x 10^-3
        "0.0944, 1, 0.005", // 9 x 10^-2
        "0.0994, 1, 0.05", // 1 x 10^-1 is nearer than 9 x 10^-2
        "0.096, 1, 0.05", // rounds to 0.1 = 1 x 10^-1
        "1, 1, 0.5",
        "1, 2, 0.05",
        "10, 1, 5",
        "1000, 2, 50",
        "0.001, 1, 0.0005",
        "2.0, 2, 0.05",
        "50.4, 2, 0.5",
        "9.96, 2, 0.5",
        "99.6, 2, 5"
    })
    void toleranceIsHalfAUnitOfTheLastDigit(double uncertainty, int digits, double tolerance) {
        assertEquals(tolerance, AdaptiveStop.tolerance(uncertainty, digits), 1e-9 * tolerance);
    }
}
