package stillstand.sensitivity;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Optional;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;
import java.util.stream.Collectors;
import org.junit.jupiter.api.AfterAll;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import stillstand.ledger.RunCancelledException;
import stillstand.ledger.RunMonitor;
import stillstand.shoreline.IndicativeRule;
import stillstand.uncertainty.DrawStreams;
import stillstand.uplift.LogUniformPrior;

/** The whole leverage of an invented site of three levels, one of them dated. */
@Tag("slow")
class SiteLeverageTest {
    private static final ExecutorService TWO = Executors.newFixedThreadPool(2);
    private static final Supposition BASE = InventedSites.flight(17, 30, 56);
    private static final Leverage FOUND = leverage(BASE, TWO);

    private static Leverage leverage(Supposition base, ExecutorService executor) {
        return SiteLeverage.of(
                base, MeasurementPlan.DEFAULT, List.of(), new DrawStreams(3), executor, RunMonitor.SILENT);
    }

    @AfterAll
    static void close() {
        TWO.shutdownNow();
    }

    @Test
    void everyLevelIsRankedForTheFlightByEachMeasurement() {
        List<NextMeasurement> flight = FOUND.nextMeasurements().stream()
                .filter(each -> each.rateOf().equals(NextMeasurement.FLIGHT))
                .toList();
        assertEquals(9, flight.size());
        for (int i = 1; i < flight.size(); i++) {
            assertTrue(flight.get(i - 1).width95ChangePercent() <= flight.get(i).width95ChangePercent());
        }
        assertEquals(
                List.of("T1", "T2", "T3"),
                flight.stream()
                        .filter(each -> each.measurement().equals("date"))
                        .map(NextMeasurement::level)
                        .sorted()
                        .toList());
        for (NextMeasurement each : flight) {
            assertTrue(each.effectiveDraws() > NextMeasurement.FEW_DRAWS, each.toString());
            assertTrue(each.pairing().orElseThrow().expectedCertainty()
                    > each.pairing().orElseThrow().certainty()
                            - 4 * each.pairing().get().error()
                            - 1e-9);
        }
    }

    @Test
    void switchesSayWhatWasAndWhatWouldBe() {
        List<AssumptionSwitch> flight = FOUND.assumptionSwitches().stream()
                .filter(each -> each.rateOf().equals(NextMeasurement.FLIGHT))
                .toList();
        assertEquals(
                List.of(
                        "an indicative range means: quadrature -> uniform",
                        "prior of the rate, m/kyr: cauchy 0 0.5 from -10 to 15 -> log-uniform 0.01 15",
                        "recording probability of a surviving shoreline: beta 4.00 2.50 -> beta 1.00 1.00",
                        "recording falls with age: yes -> no",
                        "curve spratt-lisiecki-2016 reads today: +8.5 m, as published -> 0 m"),
                flight.stream()
                        .map(each -> each.assumption() + ": " + each.was() + " -> " + each.wouldBe())
                        .collect(Collectors.toList()));
    }

    /** Moving the curve and all its highstands down by 8.5 m raises every rate: by about 8.5 / 125 for the level at 125 ka. */
    @Test
    void rezeroingRaisesTheRateByWhatTheCurveWasMoved() {
        AssumptionSwitch level = FOUND.assumptionSwitches().stream()
                .filter(each -> each.rateOf().equals("T3") && each.assumption().contains("reads today"))
                .findFirst()
                .orElseThrow();
        double moved = InventedSites.CURVE.levelMetresAt(InventedSites.CURVE.fromKa());
        assertEquals(
                level.rate().median() + moved / 122,
                level.rateWouldBe().orElseThrow().median(),
                0.03 * moved / 122 + 0.002);
    }

    @Test
    void leavingOutTheOnlyDateTakesTheLevelsRateAndWidensTheFlights() {
        assertEquals(1, FOUND.samplesLeftOut().size());
        SampleLeftOut out = FOUND.samplesLeftOut().get(0);
        assertEquals("D3", out.sample());
        assertTrue(out.levelRate().isPresent());
        assertEquals(Optional.empty(), out.levelRateWithout());
        double with = out.flightRate().orElseThrow().interval95().width();
        double without = out.flightRateWithout().orElseThrow().interval95().width();
        assertTrue(without > 1.5 * with, with + " against " + without);
    }

    @Test
    void anAnswerIsAFunctionOfTheSeedAndNotOfTheThreads() {
        ExecutorService one = Executors.newSingleThreadExecutor();
        try {
            assertEquals(FOUND, leverage(BASE, one));
        } finally {
            one.shutdownNow();
        }
    }

    @Test
    void aSwitchedSuppositionIsSwitchedBack() {
        Supposition other = BASE.with(new LogUniformPrior(0.01, 15)).with(IndicativeRule.UNIFORM);
        List<AssumptionSwitch> back = new AssumptionSwitches(
                        other, new QuickAnswers(new DrawStreams(3), TWO, RunMonitor.SILENT))
                .all(List.of());
        ShortRate usual = FOUND.assumptionSwitches().get(0).rate();
        assertFalse(back.isEmpty());
        assertTrue(back.stream()
                .anyMatch(each ->
                        each.wouldBe().equals("quadrature") && each.was().equals("uniform")));
        assertTrue(back.stream().anyMatch(each -> each.wouldBe().startsWith("cauchy")));
        assertEquals(
                usual,
                back.stream()
                        .filter(each ->
                                each.rateOf().equals("T3") && each.wouldBe().equals("quadrature"))
                        .findFirst()
                        .flatMap(AssumptionSwitch::rateWouldBe)
                        .orElseThrow());
    }

    @Test
    void itStopsWhenAsked() {
        RunMonitor stop = new RunMonitor() {
            @Override
            public void step(String what, double fraction) {}

            @Override
            public boolean isCancelled() {
                return true;
            }
        };
        assertThrows(
                RunCancelledException.class,
                () -> SiteLeverage.of(BASE, MeasurementPlan.DEFAULT, List.of(), new DrawStreams(3), TWO, stop));
    }
}
