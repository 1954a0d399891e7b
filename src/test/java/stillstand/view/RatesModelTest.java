package stillstand.view;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import org.junit.jupiter.api.Test;
import stillstand.SampleStudy;
import stillstand.view.RatesModel.Kind;
import stillstand.view.RatesModel.Row;

/** Rates in the words of the terminal. */
class RatesModelTest {
    private final RatesModel model = new RatesModel();

    private Row row(String name) {
        return model.rows().stream()
                .filter(row -> row.name().equals(name))
                .findFirst()
                .orElseThrow();
    }

    @Test
    void withoutAResultThereIsNothingAndItSaysWhy() {
        model.show(Shown.NOTHING);
        assertEquals(List.of(), model.rows());
        assertEquals("No rates yet: run the study.", model.status());
    }

    @Test
    void everyRateHasARowAndEveryLevelWithoutOneItsReason() {
        model.show(Shown.of(SampleStudy.study(), SampleStudy.result(), false));
        assertEquals(
                List.of("the flight", "T4", "T4 / C-1", "T4 / C-2", "T2", "T1 to T4", "S1", "the whole site"),
                model.rows().stream().map(Row::name).toList());
        assertEquals("Waits: it is tied to no single highstand.", row("T2").says());
        assertEquals(
                "No rate: the curve is too steep at this age to give a rate.",
                row("T4 / C-2").says());
        assertEquals("Not done: its curve ends at 20 ka", row("the whole site").says());
        assertEquals("2 correlations remain possible.", row("the flight").says());
        assertEquals(Kind.BETWEEN, row("T1 to T4").kind());
    }

    @Test
    void slowCoastsGetTheirBoundFirst() {
        model.show(Shown.of(SampleStudy.study(), SampleStudy.result(), false));
        assertEquals(
                "Moves slower than 0.024 m/kyr up and 0.032 m/kyr down, at 95 %.",
                row("S1").says());
        assertEquals("0.00 ± 0.01", row("S1").median());
    }

    @Test
    void intervalsAreTheShortestOnes() {
        model.show(Shown.of(SampleStudy.study(), SampleStudy.result(), false));
        assertEquals("0.44 ± 0.02", row("T4").median());
        assertEquals("0.40 to 0.47", row("T4").interval95());
        assertEquals("0.42 to 0.46", row("T4").interval68());
    }

    @Test
    void oneSiteCanBeChosenAndTheAxisFollows() {
        model.show(Shown.of(SampleStudy.study(), SampleStudy.result(), false));
        assertTrue(model.axisProperty().get().contains(0.47));
        model.choose("Old shore");
        assertEquals(List.of("S1"), model.rows().stream().map(Row::name).toList());
        assertTrue(model.axisProperty().get().high() < 0.1);
        assertTrue(model.axisProperty().get().contains(0));
    }

    @Test
    void rowsCopyAsASpreadsheetTakesThem() {
        model.show(Shown.of(SampleStudy.study(), SampleStudy.result(), false));
        String text = RatesModel.text(List.of(row("S1")));
        assertEquals(2, text.lines().count());
        assertTrue(text.lines().allMatch(line -> line.split("\t", -1).length == 9), text);
    }
}
