package stillstand.sealevel;

import static org.junit.jupiter.api.Assertions.assertEquals;

import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** Values and derivatives computed once with SciPy 1.17.1, {@code scipy.interpolate.PchipInterpolator}. */
class MonotoneCubicReferenceTest {
    @ParameterizedTest
    @CsvSource({
        "0.25, 0.7109375, 2.78125",
        "0.9, 1.9695, 0.5983333333333332",
        "2, 1.5, -0.75",
        "3.7, 1.0, 0.0",
        "5, 1.416, 1.536",
        "6.5, 4.584, 1.536",
        "7.3, 4.9232, -0.488"
    })
    void agreesOverAPeakAFlatAndAnEnd(double at, double value, double slope) {
        MonotoneCubic curve = new MonotoneCubic(new double[] {0, 1, 3, 4.5, 7, 7.5}, new double[] {0, 2, 1, 1, 5, 4.8});
        assertEquals(value, curve.valueAt(at), 1e-12);
        assertEquals(slope, curve.slopeAt(at), 1e-12);
    }

    @ParameterizedTest
    @CsvSource({
        "0, 0, 0",
        "0.5, 0.06896551724137931, 0.271551724137931",
        "2, 1, 0.9310344827586208",
        "2.5, 2.5722616632860045, 4.179006085192698",
        "4, 4.314697307494426, 0.27782541588063797",
        "9, 4.987823700908935, 0.02572457554450358",
        "10, 5, 0"
    })
    void agreesOverARiseOfUnevenSteps(double at, double value, double slope) {
        MonotoneCubic curve = new MonotoneCubic(new double[] {0, 2, 3, 10}, new double[] {0, 1, 4, 5});
        assertEquals(value, curve.valueAt(at), 1e-12);
        assertEquals(slope, curve.slopeAt(at), 1e-12);
    }
}
