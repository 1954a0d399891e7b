package stillstand.uncertainty;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.List;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/**
 * Distribution function of the quotient of two independent normal numbers (Hinkley 1969, Biometrika 56:635) against values
 * computed from the bivariate normal distribution by an independent program and checked there with 2e7 draws. Its mean does
 * not exist.
 */
class RatioOfNormalsReferenceTest {

    @ParameterizedTest
    @CsvSource({
        // means and variances of numerator and denominator, value, probability
        "2, 1.25, 0.5, 0.09, -2, 0.050848",
        "2, 1.25, 0.5, 0.09, 0, 0.081090",
        "2, 1.25, 0.5, 0.09, 1, 0.142514",
        "2, 1.25, 0.5, 0.09, 4, 0.546139",
        "2, 1.25, 0.5, 0.09, 10, 0.872545",
        "1, 1, 1, 1, 0, 0.266968",
        "1, 1, 1, 1, 1, 0.633484",
        "1, 1, 1, 1, 4, 0.916268",
        "0, 1, 0, 1, 1, 0.75",
        "40, 5, 122, 2.25, 0.28, 0.005131",
        "40, 5, 122, 2.25, 0.37, 0.987159"
    })
    void distributionFunction(double meanX, double varX, double meanY, double varY, double value, double probability) {
        Propagation run = Propagation.of(
                List.of(new Normal(meanX, Math.sqrt(varX)), new Normal(meanY, Math.sqrt(varY))),
                32,
                inputs -> inputs[0] / inputs[1]);
        assertEquals(probability, run.distribution().cumulativeProbability(value), 2e-4);
    }
}
