package stillstand.sensitivity;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import java.util.List;
import org.junit.jupiter.api.Test;
import stillstand.SampleStudy;
import stillstand.uplift.Rate;

/** Curves left out of a mixture of which only the mean is looked at. */
class CurveLeftOutTest {
    private static Rate meanOf(List<Rate> rates, List<Double> weights) {
        double sum = 0;
        double total = 0;
        for (int k = 0; k < rates.size(); k++) {
            sum += weights.get(k) * rates.get(k).median();
            total += weights.get(k);
        }
        return SampleStudy.rate(sum / total, 0.1);
    }

    private static CurveLeftOut.Answer answer(String curve, double weight, double rate) {
        return new CurveLeftOut.Answer(curve, weight, SampleStudy.rate(rate, 0.1));
    }

    @Test
    void theOthersKeepTheirProportions() {
        List<CurveLeftOut> found = CurveLeftOut.each(
                "site",
                "T1",
                List.of(answer("a", 2, 1), answer("b", 1, 4), answer("c", 1, 8)),
                CurveLeftOutTest::meanOf);
        assertEquals(
                List.of("a", "b", "c"), found.stream().map(CurveLeftOut::curve).toList());
        assertEquals(0.5, found.get(0).weight());
        assertEquals(3.5, found.get(0).rate().median(), 1e-12);
        assertEquals(6, found.get(0).rateWithout().median(), 1e-12);
        assertEquals(10 / 3.0, found.get(1).rateWithout().median(), 1e-12);
        assertEquals(2, found.get(2).rateWithout().median(), 1e-12);
    }

    @Test
    void whatHoldsAllTheWeightCannotBeLeftOut() {
        assertEquals(List.of(), CurveLeftOut.each("site", "T1", List.of(answer("a", 2, 1)), CurveLeftOutTest::meanOf));
        List<CurveLeftOut> two = CurveLeftOut.each(
                "site", "T1", List.of(answer("a", 2, 1), answer("b", 0, 4)), CurveLeftOutTest::meanOf);
        assertEquals(List.of("b"), two.stream().map(CurveLeftOut::curve).toList());
    }

    @Test
    void aNegativeWeightIsABadCall() {
        assertThrows(IllegalArgumentException.class, () -> answer("a", -1, 1));
        assertThrows(IllegalArgumentException.class, () -> answer("a", Double.NaN, 1));
    }
}
