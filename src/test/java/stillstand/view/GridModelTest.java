package stillstand.view;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTimeout;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Duration;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import stillstand.view.CellMarks.Mark;

/** A table to type in. */
class GridModelTest {
    private static final String LEVELS =
            "site,level,elevation_m,elevation_1sigma_m\nA,one,5,1\nA,two,9,1\nA,three,12,1\n";

    @TempDir
    private Path folder;

    private StudyDocument document;
    private GridModel grid;

    @BeforeEach
    void open() throws IOException {
        Files.writeString(folder.resolve("study.json"), "{\"title\": \"A\"}");
        Files.writeString(folder.resolve("sites.csv"), "site,surveyed_from_m,surveyed_to_m\nA,0,100\n");
        Files.writeString(folder.resolve("levels.csv"), LEVELS);
        document = OpenStudies.document(folder);
        grid = new GridModel(document, "levels.csv");
    }

    @Test
    void rowBelowTheLastIsAddedByWritingInIt() {
        assertEquals(4, grid.rowCount());
        grid.write(3, 0, "A");
        assertEquals(5, grid.rowCount());
        assertEquals("A", grid.cell(3, 0));
        assertEquals("", grid.cell(4, 0));
    }

    @Test
    void choiceStaysInTheTable() {
        grid.choose(99, 99);
        assertEquals(CellRange.at(3, 3), grid.chosen());
        grid.move(-1, -1, true);
        assertEquals(new CellRange(3, 3, 2, 2), grid.chosen());
        grid.chooseAll();
        grid.removeRows();
        assertEquals(0, grid.chosen().lastRow());
    }

    @Test
    void spreadsheetCellsArePastedAtTheCaret() {
        grid.choose(2, 1);
        grid.paste("three\t12,5\nfour\t20\n");
        assertEquals("12,5", grid.cell(2, 2));
        assertEquals("20", grid.cell(3, 2));
        assertEquals("", grid.cell(3, 0));
        assertEquals(new CellRange(2, 1, 3, 2), grid.chosen());
        assertEquals(
                Optional.of(new Mark(
                        true, "levels.csv:4:3: elevation_m: found \"12,5\", expected a number with a decimal point")),
                grid.mark(2, 2));
    }

    @Test
    void columnsOfAPastedTableGoUnderTheirNames() {
        grid.choose(3, 2);
        grid.paste("level\tnote\tsite\televation_m\televation_1sigma_m\nfour\tmine\tA\t20\t2\n");
        assertEquals(
                List.of("site", "level", "elevation_m", "elevation_1sigma_m", "note"),
                grid.sheet().header());
        assertEquals("A", grid.cell(3, 0));
        assertEquals("20", grid.cell(3, 2));
        assertEquals("mine", grid.cell(3, 4));
        assertEquals("", grid.cell(0, 4));
        document.undo();
        assertEquals(LEVELS, grid.sheet().text());
    }

    @Test
    void halfATableLeavesBlanksThatAreProblems() {
        grid.choose(3, 0);
        grid.paste("A\tfour\t20\t1\nA\tfive\n");
        assertEquals("five", grid.cell(4, 1));
        assertTrue(grid.mark(4, 2).map(Mark::isProblem).orElse(false), "blank elevation");
    }

    @Test
    void oneCellFillsAllThatAreChosen() {
        grid.choose(0, 3);
        grid.extendTo(2, 3);
        grid.paste("2");
        assertEquals(List.of("2", "2", "2"), List.of(grid.cell(0, 3), grid.cell(1, 3), grid.cell(2, 3)));
    }

    @Test
    void copyAndFillDown() {
        grid.choose(0, 1);
        grid.extendTo(1, 2);
        assertEquals("one\t5\ntwo\t9\n", grid.copy());
        grid.choose(0, 2);
        grid.extendTo(2, 2);
        grid.fillDown();
        assertEquals("5", grid.cell(2, 2));
        grid.choose(2, 1);
        grid.fillDown();
        assertEquals("two", grid.cell(2, 1));
    }

    @Test
    void cutAndClear() {
        grid.choose(0, 2);
        grid.extendTo(3, 2);
        assertEquals("5\n9\n12\n", grid.cut());
        assertEquals("", grid.cell(0, 2));
        assertEquals(3, grid.sheet().rowCount());
        assertEquals(Optional.of("clearing cells"), document.undoableProperty().get());
    }

    @Test
    void rowsComeAndGo() {
        grid.choose(1, 0);
        grid.extendTo(2, 0);
        grid.insertRows();
        assertEquals("", grid.cell(1, 0));
        assertEquals("two", grid.cell(3, 1));
        assertEquals(5, grid.sheet().rowCount());
        grid.choose(0, 0);
        grid.extendTo(2, 0);
        grid.removeRows();
        assertEquals("two", grid.cell(0, 1));
    }

    @Test
    void columnsToAddAreThoseItLacks() {
        List<String> offered = grid.columnsToAdd();
        assertTrue(offered.contains("highstand"));
        assertFalse(offered.contains("elevation_m"));
        assertFalse(offered.contains("elevation_2sigma_m"), "one spread is there");
        grid.addColumn("highstand");
        grid.write(0, 4, "5e");
        assertEquals(
                "site,level,elevation_m,elevation_1sigma_m,highstand\nA,one,5,1,5e\nA,two,9,1,\nA,three,12,1,\n",
                grid.sheet().text());
    }

    @Test
    void misspeltColumnIsMarkedAboveAndRenamed() {
        grid.renameColumn(3, "elevation_1sgma_m");
        assertTrue(grid.mark(CellMarks.HEADER, 3).orElseThrow().sentence().contains("elevation_1sigma_m"));
        grid.renameColumn(3, "elevation_1sigma_m");
        assertEquals(Optional.empty(), grid.mark(CellMarks.HEADER, 3));
    }

    @Test
    void shortRowIsMarkedAsAWhole() throws IOException {
        Files.writeString(folder.resolve("levels.csv"), LEVELS + "A,four\n");
        document.reload();
        assertTrue(grid.mark(3, CellMarks.WHOLE_ROW).orElseThrow().sentence().contains("2 cells"));
    }

    /** Generous: it takes a fraction of a second, but the machine is shared. The benchmark measures. */
    @Test
    void fiveThousandRowsArePastedAndCheckedInTime() {
        StringBuilder text = new StringBuilder();
        for (int i = 0; i < 5000; i++) {
            text.append("A\tL")
                    .append(i)
                    .append('\t')
                    .append(i % 10 == 0 ? "1,5" : "1.5")
                    .append("\t0.1\n");
        }
        grid.choose(3, 0);
        assertTimeout(Duration.ofSeconds(8), () -> grid.paste(text.toString()));
        assertEquals(5003, grid.sheet().rowCount());
        assertEquals(
                500,
                document.checked().problems().stream()
                        .filter(problem -> problem.found().equals("\"1,5\""))
                        .count());
        assertTrue(grid.mark(4993, 2).isPresent());
    }
}
