package stillstand.dating;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import stillstand.dating.DateLikelihood.Bearing;
import stillstand.uncertainty.Exact;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.SplitNormal;
import stillstand.uncertainty.Tabulated;
import stillstand.uncertainty.Uncertain;
import stillstand.uncertainty.Uniform;

class DateLikelihoodTest {
    private static final List<Uncertain> KINDS = List.of(
            new Normal(125, 3),
            new SplitNormal(125, 2, 5),
            new Uniform(118, 130),
            Tabulated.of(
                    List.of(new Tabulated.Point(118, 0), new Tabulated.Point(122, 2), new Tabulated.Point(131, 0.5))));

    @Test
    void normalDateIsWidenedByVariance() {
        DateLikelihood date = DateLikelihood.certain(new Normal(125, 3), 10);
        Normal widened = new Normal(125, Math.sqrt(9 + 100 / 12.0));
        assertEquals(widened.density(131), date.at(131), 1e-15);
        assertEquals(
                new Normal(125, 10 / Math.sqrt(12)).density(131),
                DateLikelihood.certain(new Exact(125), 10).at(131),
                1e-15);
    }

    /** A uniform date spread over a uniform duration is a trapezium. */
    @Test
    void uniformDateBecomesTrapezium() {
        DateLikelihood date = DateLikelihood.certain(new Uniform(100, 110), 4);
        assertEquals(0.1, date.at(105), 1e-15);
        assertEquals(0.05, date.at(100), 1e-15);
        assertEquals(0.025, date.at(111), 1e-15);
        assertEquals(0, date.at(98), 1e-15);
    }

    @Test
    void everyKindIntegratesToOneAndKeepsItsVariance() {
        for (Uncertain age : KINDS) {
            for (double duration : new double[] {0, 8}) {
                DateLikelihood date = DateLikelihood.certain(age, duration);
                double step = 0.01;
                double sum = 0;
                double mean = 0;
                double square = 0;
                for (double t = 80 + step / 2; t < 180; t += step) {
                    double density = step * date.at(t);
                    sum += density;
                    mean += density * t;
                    square += density * t * t;
                }
                assertEquals(1, sum, 1e-4, age + " over " + duration);
                assertEquals(age.mean(), mean, 0.02, age + " over " + duration);
                double variance = Math.pow(age.standardDeviation(), 2) + duration * duration / 12;
                assertEquals(variance, square - mean * mean, 0.1, age + " over " + duration);
            }
        }
    }

    @Test
    void boundsRiseAndFallAsTheDateIsPassed() {
        for (Uncertain age : KINDS) {
            DateLikelihood minimum = new DateLikelihood(age, Bearing.MINIMUM, 8, 0, 1000);
            DateLikelihood maximum = new DateLikelihood(age, Bearing.MAXIMUM, 8, 0, 1000);
            assertEquals(0, minimum.at(60), 1e-9);
            assertEquals(1, minimum.at(200), 1e-9);
            for (double t : new double[] {60, 121, 125, 129.5, 200}) {
                assertEquals(1, minimum.at(t) + maximum.at(t), 1e-12);
            }
            // the slope of a bound is the density of the date
            double slope = (minimum.at(126.001) - minimum.at(125.999)) / 0.002;
            assertEquals(DateLikelihood.certain(age, 8).at(126), slope, 2e-3);
        }
    }

    /** One quarter of the duration's mean lies in the range: (1/4) of the integral of (s - 100)/10 from 100 to 102. */
    @Test
    void boundOfUniformDateByHand() {
        assertEquals(0.05, new DateLikelihood(new Uniform(100, 110), Bearing.MINIMUM, 4, 0, 1000).at(100), 1e-4);
        assertEquals(0.75, new DateLikelihood(new Normal(120, 2), Bearing.MINIMUM, 0, 0, 1000).at(121.3489795), 1e-8);
    }

    @Test
    void exactBoundIsStep() {
        DateLikelihood minimum = new DateLikelihood(new Exact(30), Bearing.MINIMUM, 0, 0.05, 1000);
        assertEquals(0.05, minimum.at(29.9), 1e-15);
        assertEquals(1, minimum.at(30.1), 1e-15);
    }

    @Test
    void wrongDateFallsBackToTheWholeRange() {
        DateLikelihood date = new DateLikelihood(new Normal(125, 3), Bearing.LEVEL, 0, 0.05, 1000);
        assertEquals(0.95 * new Normal(125, 3).density(126) + 0.05 / 1000, date.at(126), 1e-15);
        assertEquals(0.05 / 1000, date.at(600), 1e-15);
        // also for a date beyond the range
        assertEquals(0.05 / 1000, new DateLikelihood(new Normal(1500, 3), Bearing.LEVEL, 0, 0.05, 1000).at(125), 1e-15);
        // a wrong bound excludes nothing
        assertEquals(0.05, new DateLikelihood(new Normal(125, 3), Bearing.MINIMUM, 0, 0.05, 1000).at(50), 1e-12);
    }

    @Test
    void productIsProduct() {
        DateLikelihood a = new DateLikelihood(new Normal(125, 3), Bearing.LEVEL, 8, 0.05, 1000);
        DateLikelihood b = new DateLikelihood(new Uniform(118, 130), Bearing.LEVEL, 8, 0.05, 1000);
        double[] ages = {60, 118, 124, 140};
        double[] expected = new double[ages.length];
        for (int i = 0; i < ages.length; i++) {
            expected[i] = a.at(ages[i]) * b.at(ages[i]);
        }
        assertArrayEquals(expected, DateLikelihood.product(List.of(a, b), ages), 1e-15);
        assertEquals(60, ages[0]);
        assertArrayEquals(new double[] {1, 1, 1, 1}, DateLikelihood.product(List.of(), ages));
    }

    @Test
    void badCallsAreRefused() {
        Normal age = new Normal(125, 3);
        assertEquals(
                "durationKa must be 0 or more but is NaN",
                refusal(() -> new DateLikelihood(age, Bearing.LEVEL, Double.NaN, 0, 1000)));
        assertEquals(
                "wrongProbability must lie in 0 to below 1 but is 1.0",
                refusal(() -> new DateLikelihood(age, Bearing.LEVEL, 0, 1, 1000)));
        assertEquals(
                "oldestKa must be above 0 but is 0.0", refusal(() -> new DateLikelihood(age, Bearing.LEVEL, 0, 0, 0)));
        assertEquals(
                "a date of a level must have a spread or a duration but is exactly 125.0 ka",
                refusal(() -> DateLikelihood.certain(new Exact(125), 0)));
    }

    private static String refusal(org.junit.jupiter.api.function.Executable call) {
        return String.valueOf(assertThrows(IllegalArgumentException.class, call).getMessage());
    }

    /** Dates that are surely right and of one event: the product of normal densities is the weighted mean. */
    @Test
    void combinedCertainDatesAreTheWeightedMean() {
        Replicates replicates = ReplicatesReferenceTest.replicates("121.3 124.9 119.8 128.4", "1.1 1.4 1.0 1.6", 1);
        Tabulated age = CombinedAge.of(replicates.agesKa().stream()
                        .map(date -> DateLikelihood.certain(date, 0))
                        .toList())
                .orElseThrow();
        assertEquals(replicates.weightedMeanKa().mean(), age.mean(), 2e-3);
        assertEquals(replicates.weightedMeanKa().sigma(), age.standardDeviation(), 2e-3);
    }

    /** Two dates against one: the population of two holds most, the other is kept, nothing lies at the mean between them. */
    @Test
    void populationsStayApart() {
        Tabulated age =
                CombinedAge.of(List.of(date(80, 1), date(81, 1), date(125, 1))).orElseThrow();
        double young = age.cumulativeProbability(100);
        assertTrue(young > 0.99 && young < 1, "young " + young);
        assertTrue(age.density(95.3) < 1e-3 * age.density(80.5));
        Tabulated even = CombinedAge.of(List.of(date(80, 1), date(125, 1))).orElseThrow();
        // one wrong, the other right: half each; both wrong: all of 0 to 1000 ka
        double oneWrong = 0.95 * 0.05 / 1000;
        double bothWrong = Math.pow(0.05 / 1000, 2);
        assertEquals(
                (oneWrong + 102 * bothWrong) / (2 * oneWrong + 1000 * bothWrong),
                even.cumulativeProbability(102),
                1e-4);
    }

    @Test
    void boundCutsWhatItExcludes() {
        DateLikelihood minimum = new DateLikelihood(new Normal(100, 0.5), Bearing.MINIMUM, 0, 0, 1000);
        Tabulated age = CombinedAge.of(List.of(DateLikelihood.certain(new Uniform(90, 110), 0), minimum))
                .orElseThrow();
        assertEquals(105, age.mean(), 0.02);
        assertEquals(0, age.cumulativeProbability(97), 1e-6);
        assertEquals(Optional.empty(), CombinedAge.of(List.of(minimum)));
    }

    @Test
    void certainDatesThatExcludeOneAnotherGiveNoAge() {
        assertEquals(
                Optional.empty(),
                CombinedAge.of(List.of(
                        DateLikelihood.certain(new Uniform(80, 90), 0),
                        DateLikelihood.certain(new Uniform(120, 130), 0))));
    }

    private static DateLikelihood date(double ageKa, double sigmaKa) {
        return new DateLikelihood(new Normal(ageKa, sigmaKa), Bearing.LEVEL, 0, 0.05, 1000);
    }
}
