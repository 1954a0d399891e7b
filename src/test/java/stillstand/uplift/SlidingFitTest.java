package stillstand.uplift;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import org.junit.jupiter.api.Test;
import stillstand.uncertainty.Normal;

class SlidingFitTest {
    private static final List<FlightRow> ROWS = List.of(
            FlightRow.plain("5a", 80, 1, -20, 2),
            FlightRow.plain("5c", 100, 1, -40, 2),
            FlightRow.plain("5e", 120, 1, 5, 2));

    private static List<FlightLevel> levels(double... heights) {
        return ToyFlights.levels(heights);
    }

    @Test
    void exactHeightsGiveTheirRateBack() {
        // at 0.5 m/kyr: 20, 10 (overrun), 65 m
        SlidingFit fit = SlidingFit.leastRms(levels(20, 65), ROWS, 0.3, 0.8, 500);
        assertEquals(0.5, fit.rateMetresPerKyr(), 1e-9);
        assertEquals(0, fit.rmsMetres(), 1e-9);
        assertEquals(List.of(0, 2), fit.rows());
        assertEquals(1, fit.rSquared().orElseThrow(), 1e-12);
    }

    @Test
    void rmsIsInMetres() {
        // misses +1 and -1 m
        assertEquals(1, SlidingFit.nearest(levels(21, 64), ROWS, 0.5).rmsMetres(), 1e-12);
    }

    @Test
    void orderedFitUsesNoRowThatIsOverrun() {
        List<FlightLevel> levels =
                List.of(FlightLevel.undated("low", new Normal(11, 2)), FlightLevel.undated("high", new Normal(66, 2)));
        assertEquals(List.of(1, 2), SlidingFit.nearest(levels, ROWS, 0.5).rows());
        SlidingFit ordered = SlidingFit.ordered(levels, ROWS, 0.5).orElseThrow();
        assertEquals(List.of(0, 2), ordered.rows());
        assertEquals(Math.sqrt((81 + 1) / 2.0), ordered.rmsMetres(), 1e-12);
        assertTrue(SlidingFit.ordered(levels(1, 2, 3), ROWS, 0.5).isEmpty());
    }

    @Test
    void rSquaredSaysNothing() {
        // an undated flight of 0.35 m/kyr: two rates far apart both reach 0.99
        List<FlightLevel> levels = ToyFlights.undatedFlight();
        assertTrue(SlidingFit.nearest(levels, ToyFlights.plainRows(), 0.35)
                        .rSquared()
                        .orElseThrow()
                > 0.99);
        assertTrue(SlidingFit.nearest(levels, ToyFlights.plainRows(), 0.17)
                        .rSquared()
                        .orElseThrow()
                > 0.99);
        assertTrue(SlidingFit.largestRSquared(levels, ToyFlights.plainRows(), 0.05, 2, 400)
                        .flatMap(SlidingFit::rSquared)
                        .orElseThrow()
                > 0.995);
    }

    @Test
    void aFlatFlightHasNoRSquared() {
        assertTrue(SlidingFit.nearest(levels(20), ROWS, 0.5).rSquared().isEmpty());
    }
}
