package stillstand.uplift;

import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.EnumSource;
import stillstand.uplift.UntrueWorld.Answered;

/**
 * Does the default model of a flight hold the truth, in the world it supposes and where one thing is not as it supposes?
 * 150 flights a world, one date each.
 */
@Tag("slow")
class MisspecifiedWorldsStatisticalTest {
    private static final long SEED = Long.getLong("test.seed", 20261201L);
    private static final int FLIGHTS = 150;

    /** Rates drawn from the prior itself: three comparisons, each false by chance with probability 1e-4. */
    @Test
    void theModelItselfHoldsTheTruthAsOftenAsItSays() {
        ranks(UntrueWorld.NOTHING.flights(FlightSimulator.cauchy(0.5), FLIGHTS, SEED))
                .assertCalibrated();
    }

    /** Two comparisons, each false by chance with probability 1e-4. */
    @Test
    void flightsAboveTheTableHoldTheTruthAsOftenAsTheySayAndWouldNotWithoutOlderRows() {
        List<Answered> flights = UntrueWorld.ABOVE_THE_TABLE.flights(FlightSimulator.logUniform(0.1, 1), FLIGHTS, SEED);
        ranks(flights).assertCovers();
        RanksOfTruth lacking = RanksOfTruth.of(
                flights.stream().mapToDouble(each -> each.lacking().cumulativeProbability(each.trueRate())));
        assertTrue(lacking.isOverconfident(), lacking::toString);
    }

    /** At least 0.90: where the true cover is 0.95, that fails by chance with probability 0.004. */
    @ParameterizedTest
    @EnumSource(
            value = UntrueWorld.class,
            mode = EnumSource.Mode.EXCLUDE,
            names = {"NOTHING", "ABOVE_THE_TABLE"})
    void intervalsOf95PercentHoldTheTruthInNineOfTenFlights(UntrueWorld world) {
        RanksOfTruth ranks = ranks(world.flights(FlightSimulator.logUniform(0.1, 1), FLIGHTS, SEED));
        assertTrue(ranks.in95() >= 0.9 * ranks.answers(), ranks::toString);
    }

    private static RanksOfTruth ranks(List<Answered> flights) {
        return RanksOfTruth.of(
                flights.stream().mapToDouble(each -> each.shipped().cumulativeProbability(each.trueRate())));
    }
}
