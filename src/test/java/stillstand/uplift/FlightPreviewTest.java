package stillstand.uplift;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import java.util.TreeSet;
import org.junit.jupiter.api.Test;
import stillstand.ledger.RunMonitor;
import stillstand.uncertainty.Interval;

/** The preview against the exact answer of the same flight, and what pinning and forbidding do to it; invented flights. */
class FlightPreviewTest {
    private static final RatePrior PRIOR = new HalfCauchyPrior(1, 0, 5);
    private static final SharedPriors KNOWN = new SharedPriors(
            0,
            0,
            0,
            new SharedPriors.Recording.Known(0.7),
            List.of(Double.POSITIVE_INFINITY),
            new SharedPriors.Strays.Known(0.2));
    private static final List<FlightLevel> LEVELS = ToyFlights.datedFlight();

    private static FlightSetup setup(List<FlightLevel> levels) {
        return new FlightSetup(
                FlightModel.complete(levels, ToyFlights.plainRows(), 2, 200), KNOWN, true, false, List.of());
    }

    @Test
    void isNearTheExactAnswer() {
        FlightPreview preview = FlightPreview.of(setup(LEVELS), PRIOR).orElseThrow();
        FlightAnswer exact = FlightIntegration.answer(
                setup(LEVELS).model(),
                PRIOR,
                SharedNodes.fixed(SharedNumbers.plain(0.7, 0.2)),
                new FlightIntegration.Effort(300, 125),
                RunMonitor.SILENT);
        double half = exact.rate().equalTails(Interval.PROBABILITY_68).widthMetresPerKyr() / 2;
        assertEquals(exact.rate().quantile(0.5), preview.rate().median(), half / 2);
        for (int i = 0; i < LEVELS.size(); i++) {
            String level = LEVELS.get(i).name();
            for (FlightResult.Pairing pair : preview.pairingsOf(level)) {
                double there = 0;
                for (int j = 0; j < ToyFlights.plainRows().size(); j++) {
                    there += ToyFlights.plainRows().get(j).stage().equals(pair.highstand())
                            ? exact.pairings().probability(i, j)
                            : 0;
                }
                assertEquals(there, pair.probability(), 0.1, level + " " + pair.highstand());
            }
        }
    }

    @Test
    void everyLevelIsSomethingOrNoShoreline() {
        FlightPreview preview = FlightPreview.of(setup(LEVELS), PRIOR).orElseThrow();
        for (FlightResult.Unmatched level : preview.unmatched()) {
            double sum = level.probability()
                    + preview.pairingsOf(level.level()).stream()
                            .mapToDouble(FlightResult.Pairing::probability)
                            .sum();
            assertEquals(1, sum, 0.01, level.level()); // pairings below 0.001 are left out
        }
    }

    @Test
    void forbiddenHighstandsAreNotRecorded() {
        FlightPreview free = FlightPreview.of(setup(LEVELS), PRIOR).orElseThrow();
        String level = LEVELS.get(0).name();
        String likeliest = free.pairingsOf(level).get(0).highstand();
        Set<Integer> others = new TreeSet<>();
        for (int j = 0; j < ToyFlights.plainRows().size(); j++) {
            if (!ToyFlights.plainRows().get(j).stage().equals(likeliest)) {
                others.add(j);
            }
        }
        List<FlightLevel> levels = new ArrayList<>(LEVELS);
        levels.set(0, LEVELS.get(0).onlyRows(others));
        FlightPreview without = FlightPreview.of(setup(levels), PRIOR).orElseThrow();
        assertTrue(without.pairingsOf(level).stream()
                .noneMatch(pair -> pair.highstand().equals(likeliest)));
    }

    @Test
    void withinAnIntervalOnlyItsRatesSpeak() {
        // at 1 m/kyr or more the shoreline of 405 ka stands above 400 m, far above every level
        Interval fast = new Interval(1, 5);
        FlightPreview preview = FlightPreview.within(setup(LEVELS), PRIOR, fast).orElseThrow();
        assertTrue(
                preview.pairings().stream().noneMatch(pair -> pair.highstand().equals("H11")));
        assertTrue(fast.contains(preview.rate().median()));
    }

    @Test
    void whatCannotBeHasNoPreview() {
        // the lowest level tied to the oldest row, the next to the youngest: order forbids it
        List<FlightLevel> levels = new ArrayList<>(LEVELS);
        levels.set(0, LEVELS.get(0).onlyRows(Set.of(19)).neverStray());
        levels.set(1, LEVELS.get(1).onlyRows(Set.of(0)).neverStray());
        assertEquals(Optional.empty(), FlightPreview.of(setup(levels), PRIOR));
    }
}
