package stillstand.figure;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import stillstand.SampleStudy;
import stillstand.figure.Figures.Absence;
import stillstand.sensitivity.Leverage;
import stillstand.study.StudyResult;
import stillstand.uncertainty.Digits;
import stillstand.uplift.FlightResult;
import stillstand.uplift.FlightResult.Pairing;
import stillstand.uplift.LevelAnswer;
import stillstand.uplift.LevelResidual;
import stillstand.uplift.Rate;

/** Which figures a result has, and that what they say is what it says. */
class FiguresTest {
    private static List<String> names(StudyResult result) {
        return Figures.of(result).figures().stream().map(Figure::name).toList();
    }

    private static List<String> words(StudyResult result, FigureKind kind) throws IOException {
        Figure figure = Figures.of(result).figures().stream()
                .filter(each -> each.kind() == kind)
                .findFirst()
                .orElseThrow();
        return SvgTexts.of(figure.bytes(FigureFormat.SVG, PageWidth.TWO, true, 300))
                .words();
    }

    /** Median and shortest 95 % interval, to the digits of the standard deviation, as the terminal prints them. */
    private static String printed(Rate rate) {
        double sd = rate.sd().orElseThrow();
        return (Digits.text(rate.median(), sd, 1)
                        + " (" + Digits.text(rate.shortest95().low(), sd, 1)
                        + " to " + Digits.text(rate.shortest95().high(), sd, 1) + ")")
                .replace('-', '−');
    }

    @Test
    void aFlightHasThemAll() {
        assertEquals(
                List.of(
                        "curves",
                        "forest",
                        "stair-heron-stair",
                        "rates-heron-stair",
                        "budget-heron-stair",
                        "tornado-heron-stair",
                        "pairings-heron-stair",
                        "fates-heron-stair",
                        "residuals-heron-stair",
                        "history-heron-stair"),
                names(InventedCoasts.flight()));
        assertEquals(List.of(), Figures.of(InventedCoasts.flight()).absences());
    }

    @Test
    void whatASiteWithoutFlightLacksIsSaid() throws IOException {
        StudyResult slow = InventedCoasts.slow();
        assertEquals(
                List.of(
                        "curves",
                        "forest",
                        "stair-still-bay",
                        "rates-still-bay",
                        "budget-still-bay",
                        "tornado-still-bay"),
                names(slow));
        Absence first = Figures.of(slow).absences().get(0);
        assertEquals(new Absence(FigureKind.PAIRINGS, Optional.of("Still Bay"), "no flight was matched there"), first);
        assertTrue(String.join(" ", words(slow, FigureKind.STAIR)).contains("No flight was matched here"));
    }

    @Test
    void ratesAreThoseOfTheResult() throws IOException {
        StudyResult result = InventedCoasts.drowned();
        List<String> rates = words(result, FigureKind.RATES);
        List<String> forest = words(result, FigureKind.FOREST);
        List<Rate> expected = new ArrayList<>(result.levels().stream()
                .map(LevelAnswer::rate)
                .flatMap(Optional::stream)
                .toList());
        expected.add(result.flights().get(0).rate());
        for (Rate rate : expected) {
            assertTrue(rates.contains(printed(rate)), printed(rate) + " in " + rates);
            assertTrue(forest.contains(printed(rate)), printed(rate) + " in " + forest);
        }
        assertTrue(String.join(" ", words(result, FigureKind.STAIR))
                .contains(
                        "Rate of the flight: " + printed(result.flights().get(0).rate()) + " m/kyr"));
    }

    @Test
    void probabilitiesAreThoseOfTheResult() throws IOException {
        StudyResult result = InventedCoasts.flight();
        FlightResult flight = result.flights().get(0);
        List<String> cells = words(result, FigureKind.PAIRINGS);
        for (Pairing pairing : flight.pairings()) {
            assertTrue(cells.contains(Long.toString(Math.round(100 * pairing.probability()))), pairing.toString());
            assertTrue(cells.contains(pairing.highstand()), pairing.toString());
        }
        assertTrue(words(result, FigureKind.STAIR).contains("5e 89 %"));
        assertTrue(words(result, FigureKind.FATES).contains("226 ± 4"));
    }

    @Test
    void residualsAndSharesAreThoseOfTheResult() throws IOException {
        StudyResult result = InventedCoasts.flight();
        LevelResidual third = result.residuals().get(2);
        assertEquals(-1, third.measuredMetres() - third.predictedMetres(), 1e-9);
        assertTrue(words(result, FigureKind.RESIDUALS).contains("−1 ± 3"));
        assertTrue(words(result, FigureKind.BUDGET).containsAll(List.of("21", "60", "± 0.02")));
    }

    @Test
    void aSingleLevelAndOneWithoutARateAreDrawn() throws IOException {
        StudyResult one = InventedCoasts.study(
                List.of(InventedCoasts.level("Cape", "C1", "5e", 123, 20, 0.1, 0.01, 1)), List.of(), List.of());
        assertTrue(words(one, FigureKind.STAIR).contains("C1"));
        assertTrue(words(one, FigureKind.RATES).contains("0.10 (0.08 to 0.12)"));
        List<String> sample = words(SampleStudy.result(), FigureKind.STAIR);
        assertTrue(
                String.join(" ", sample).contains("Not drawn, for want of a height in the results: T2."), "" + sample);
    }

    @Test
    void anEmptyResultHasNoFigureButReasons() {
        StudyResult sample = SampleStudy.withoutFailure();
        StudyResult empty = new StudyResult(
                sample.provenance(),
                new StudyResult.SeaLevelUsed(List.of(), List.of()),
                List.of(),
                List.of(),
                List.of(),
                List.of(),
                List.of(),
                Leverage.NONE,
                List.of(),
                List.of(),
                List.of(),
                List.of(),
                List.of(),
                List.of());
        assertEquals(List.of(), names(empty));
        assertEquals(2, Figures.of(empty).absences().size());
    }

    @Test
    void slowAndFastRatesStandOnOnePage() throws IOException {
        StudyResult both = InventedCoasts.study(
                List.of(
                        InventedCoasts.level("Slow", "S1", "5e", 123, 7, 0.001, 0.0005, 1),
                        InventedCoasts.level("Fast", "F1", "1", 5.5, 66, 12, 0.8, 1)),
                List.of(),
                List.of());
        assertTrue(words(both, FigureKind.FOREST)
                .containsAll(List.of("0.0010 (0.0000 to 0.0020)", "12.0 (10.4 to 13.6)")));
    }

    @Test
    void sitesWhoseNamesDifferInSignsAloneHaveTheirOwnFiles() {
        StudyResult two = InventedCoasts.study(
                List.of(
                        InventedCoasts.level("North/1", "A", "5e", 123, 20, 0.1, 0.01, 1),
                        InventedCoasts.level("north 1", "A", "5e", 123, 20, 0.1, 0.01, 1),
                        InventedCoasts.level("../..", "A", "5e", 123, 20, 0.1, 0.01, 1)),
                List.of(),
                List.of());
        assertTrue(names(two).containsAll(List.of("stair-north-1", "stair-north-1-2", "stair-site")), "" + names(two));
        assertEquals("þórshöfn-東", Figures.stem("Þórshöfn: 東"));
    }

    @Test
    void aTornadoNamesEachInputAndItsRange() throws IOException {
        List<String> words = words(InventedCoasts.slow(), FigureKind.TORNADO);
        assertTrue(words.contains("S1 at 5e"), words.toString());
        assertTrue(words.contains("– shared offset"), words.toString());
        assertTrue(words.contains("58 to 64 m"), words.toString()); // 61.4 with 1.5 on both sides, twice
    }
}
