package stillstand.files;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.List;
import java.util.Set;
import org.junit.jupiter.api.Test;

/** What the clipboard of a spreadsheet holds. */
class PastedCellsTest {
    private static final Set<String> KNOWN = Set.of("site", "level", "elevation_m", "elevation_1sigma_m");

    @Test
    void cellsBetweenTabs() {
        assertEquals(
                new PastedCells(List.of(), List.of(List.of("A", "12,5"), List.of("B", ""))),
                PastedCells.of("A\t12,5\r\nB\t\r\n", KNOWN));
    }

    @Test
    void headerIsKnownByItsNames() {
        PastedCells cells = PastedCells.of("site\tlevel\televation\nA\tone\t5\n", KNOWN);
        assertEquals(List.of("site", "level", "elevation"), cells.header());
        assertEquals(List.of(List.of("A", "one", "5")), cells.rows());
        assertEquals(List.of(), PastedCells.of("site\tx\ty\tz\nA\n", KNOWN).header());
    }

    @Test
    void textOfATableIsTakenApartOnlyWithAHeader() {
        assertEquals(
                List.of(List.of("A", "5")),
                PastedCells.of("site;level\nA;5\n", KNOWN).rows());
        assertEquals(
                List.of(List.of("0,5"), List.of("0,7")),
                PastedCells.of("0,5\n0,7\n", KNOWN).rows());
    }

    @Test
    void quotedCellsMayHoldTabsAndLines() {
        assertEquals(
                List.of(List.of("two\nlines", "a\tb", "say \"x\"")),
                PastedCells.of("\"two\nlines\"\t\"a\tb\"\t\"say \"\"x\"\"\"\n", KNOWN)
                        .rows());
    }

    @Test
    void strayQuoteSpoilsNothing() {
        assertEquals(
                List.of(List.of("\"5", "a"), List.of("6", "b")),
                PastedCells.of("\"5\ta\n6\tb\n", KNOWN).rows());
    }

    @Test
    void halfATableKeepsItsShape() {
        assertEquals(
                List.of(List.of("A", "1", "5"), List.of("B")),
                PastedCells.of("A\t1\t5\nB", KNOWN).rows());
        assertEquals(List.of(List.of("")), PastedCells.of("", KNOWN).rows());
    }

    @Test
    void copyIsPastedBackAsItWas() {
        List<List<String>> rows = List.of(List.of("A", "two\nlines", ""), List.of("say \"x\"", "a\tb", "#1"));
        assertEquals(rows, PastedCells.of(PastedCells.text(rows), KNOWN).rows());
    }
}
