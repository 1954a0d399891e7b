package stillstand.uplift;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Set;
import org.junit.jupiter.api.Test;
import stillstand.ledger.RunMonitor;
import stillstand.uncertainty.DrawStreams;
import stillstand.uncertainty.LogNormal;

/**
 * Leaving out each level, and halving each kind of error, against an independent implementation; invented table and flights.
 */
class FlightWhatIfReferenceTest {
    private static final RatePrior PRIOR = new HalfCauchyPrior(1, 0, 5);
    private static final SharedNodes PLAIN = SharedNodes.fixed(SharedNumbers.plain(0.7, 0.2));
    private static final FlightModel DATED =
            FlightModel.complete(ToyFlights.datedFlight(), ToyFlights.plainRows(), 2, 200);

    @Test
    void eachLevelLeftOutOfTheDatedFlight() {
        // log predictive, mean and sd of the rate without the level
        double[][] expected = {
            {-1.7975838, 0.61841419, 0.019696816},
            {-5.2156663, 0.61521055, 0.02316839},
            {-2.6068928, 0.62057903, 0.020872385},
            {-2.712117, 0.62969054, 0.024120082},
            {-2.396746, 0.61487922, 0.02547702},
            {-6.6732986, 0.62123618, 0.035502817},
            {-3.0460814, 0.6175998, 0.017697299}
        };
        check(DATED, expected, 5e-4);
    }

    @Test
    void eachLevelLeftOutOfTheUndatedFlight() {
        double[][] expected = {
            {-1.859673, 0.37024788, 0.14420675},
            {-2.9375628, 0.50953631, 0.22179388},
            {-1.7842293, 0.37990937, 0.13120337},
            {-2.1104766, 0.37154302, 0.12470326},
            {-3.1142207, 0.34558139, 0.084623449},
            {-2.7505949, 0.45794434, 0.20841397},
            {-3.8002768, 0.35593958, 0.083835},
            {-3.717935, 0.3535227, 0.086754715}
        };
        check(FlightModel.complete(ToyFlights.undatedFlight(), ToyFlights.plainRows(), 2, 160), expected, 3e-3);
    }

    @Test
    void halvingEachErrorOfTheDatedFlight() {
        assertEquals(0.076447725, width(DATED), 3e-4);
        assertEquals(0.07424435, width(FlightWhatIf.halved(DATED, FlightWhatIf.ErrorGroup.ELEVATION)), 3e-4);
        assertEquals(0.075987652, width(FlightWhatIf.halved(DATED, FlightWhatIf.ErrorGroup.DATES)), 3e-4);
        assertEquals(0.040391571, width(FlightWhatIf.halved(DATED, FlightWhatIf.ErrorGroup.HIGHSTAND_LEVELS)), 3e-4);
        assertEquals(0.075117706, width(FlightWhatIf.halved(DATED, FlightWhatIf.ErrorGroup.HIGHSTAND_AGES)), 3e-4);
    }

    @Test
    void halvingKeepsMeanAndHalvesSpreadOfASkewedHeight() {
        LogNormal skewed = new LogNormal(20, 4, 0.5);
        FlightModel model = DATED.withLevels(List.of(FlightLevel.undated("skewed", skewed)));
        FlightLevel level = FlightWhatIf.halved(model, FlightWhatIf.ErrorGroup.ELEVATION)
                .levels()
                .get(0);
        assertEquals(skewed.mean(), level.shorelineMetres().mean(), 0.01);
        assertEquals(skewed.standardDeviation() / 2, level.shorelineMetres().standardDeviation(), 0.01);
    }

    @Test
    void mostProbableCorrelationHasThePairsOfTheAnswer() {
        RatePosterior rate = rate(DATED);
        JointDraws draws = JointDraws.of(DATED, rate, PLAIN, 200, 1000, new DrawStreams(1).stream("joint draws", 0));
        JointDraws.Correlation best = draws.correlations().get(0);
        assertEquals(List.of(0, 2, 3, 5, 6, 7, 8), best.rows());
        // the pin of every level to that correlation has this share of the evidence
        List<FlightLevel> pinned = new java.util.ArrayList<>();
        for (int i = 0; i < 7; i++) {
            pinned.add(
                    DATED.levels().get(i).onlyRows(Set.of(best.rows().get(i))).neverStray());
        }
        double exact = Math.exp(rate(DATED.withLevels(pinned)).logEvidence() - rate.logEvidence());
        assertEquals(exact, best.share(), 0.06); // 4 standard errors of 1000 draws
        assertEquals(
                rate.mean(),
                draws.draws().stream()
                        .mapToDouble(FlightDraw::rateMetresPerKyr)
                        .average()
                        .orElseThrow(),
                1e-3);
        for (FlightDraw draw : draws.draws()) {
            FlightDraw.Match match = draw.matches().get(0).orElseThrow();
            assertEquals(match.heightMetres(), match.seaLevelMetres() + draw.rateMetresPerKyr() * match.ageKa(), 1e-9);
            assertTrue(
                    Math.abs(match.seaLevelMetres() - 1) < 8, "Holocene sea level drawn at " + match.seaLevelMetres());
        }
    }

    private static void check(FlightModel model, double[][] expected, double tolerance) {
        List<FlightWhatIf.LeftOut> found =
                FlightWhatIf.leaveOneOut(model, rate(model), FlightWhatIfReferenceTest::rate);
        assertEquals(expected.length, found.size());
        for (int i = 0; i < expected.length; i++) {
            assertEquals(expected[i][0], found.get(i).logPredictive(), 0.01, "level " + i);
            assertEquals(expected[i][1], found.get(i).without().mean(), tolerance, "level " + i);
            assertEquals(expected[i][2], found.get(i).without().standardDeviation(), tolerance, "level " + i);
        }
    }

    private static double width(FlightModel model) {
        return rate(model).shortestInterval(0.95).widthMetresPerKyr();
    }

    private static RatePosterior rate(FlightModel model) {
        return FlightIntegration.rate(model, PRIOR, PLAIN, new FlightIntegration.Effort(400, 200), RunMonitor.SILENT);
    }
}
