package stillstand.files;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import stillstand.study.Table;

/** A table that is edited keeps what was not edited. */
class SheetTest {
    private static final String LEVELS = """
            # heights in the harbour's datum

            site,level,elevation_m,elevation_1sigma_m,note
            # the south
            "North, Bay" , N1 ,12.50,0.3,"two
            lines"
            ,,,,

            North,N2,\u22124,0.3
            # the end
            """;

    @ParameterizedTest
    @ValueSource(
            strings = {
                LEVELS,
                "\uFEFFsite;level\r\na;1\r\n\r\n# x\r\nb;2",
                "site\tlevel\ra\t1\rb\t2\r",
                "site,level\n",
                "site,level",
                "site,level\n   \na,1\n  \n",
                "# only a header\nsite,level\n#a\n#b"
            })
    void untouchedTableIsWrittenByteByByte(String text) {
        assertEquals(text, sheet(text).text());
    }

    @ParameterizedTest
    @ValueSource(strings = {"levels.csv", "samples.csv", "sites.csv"})
    void demoIsWrittenByteByByte(String name) throws IOException {
        String text = Files.readString(Path.of("demo/velloe-island", name), StandardCharsets.UTF_8);
        assertEquals(text, sheet(text).text());
        assertSameWhenReadAgain(sheet(text));
    }

    @Test
    void rowsStandOnTheLinesOnWhichTheyAreReadAgain() {
        Sheet sheet = sheet(LEVELS);
        assertSameWhenReadAgain(sheet);
        assertEquals(
                List.of(6L, 9L),
                sheet.table().rows().stream().map(Table.Row::line).toList());
        Sheet longer = sheet.withCells(1, 4, List.of(List.of("a\nb\nc"), List.of("x", "y")))
                .withBlankRows(1, 2)
                .withCells(0, 0, List.of(List.of("#1")));
        assertSameWhenReadAgain(longer);
        assertEquals(6, longer.columnCount());
    }

    @Test
    void onlyTheTouchedRowIsSpeltAnew() {
        String after = sheet(LEVELS).withCells(1, 2, List.of(List.of(" 5 "))).text();
        assertEquals(LEVELS.replace("North,N2,\u22124,0.3\n", "North,N2,5,0.3,\n"), after);
    }

    @Test
    void commentsAboveARemovedRowMoveDown() {
        assertEquals(
                "a,b\n# one\n# two\n3,4\n",
                sheet("a,b\n# one\n1,2\n# two\n3,4\n").withoutRows(0, 1).text());
        assertEquals(
                "a,b\n# one\n# two\n",
                sheet("a,b\n# one\n1,2\n# two\n3,4\n").withoutRows(0, 2).text());
    }

    @Test
    void blankRowsAreNotWritten() {
        Sheet sheet = sheet("a,b\n1,2\n3,4\n").withBlankRows(1, 3);
        assertEquals(5, sheet.rowCount());
        assertEquals("a,b\n1,2\n3,4\n", sheet.text());
        assertSameWhenReadAgain(sheet);
    }

    @Test
    void columnsComeAndGo() {
        Sheet sheet = sheet("a,b\n1,2\n3,4\n").withColumn("c");
        assertEquals("a,b,c\n1,2,\n3,4,\n", sheet.text());
        assertEquals("b,c\n2,\n4,\n", sheet.withoutColumn(0).text());
        assertEquals("a,z,c\n1,2,\n3,4,\n", sheet.withHeader(1, "z").text());
    }

    @Test
    void newLineIsMadeWhereTheLastRowHadNone() {
        assertEquals(
                "a,b\n1,2\n5,6\n",
                sheet("a,b\n1,2").withCells(1, 0, List.of(List.of("5", "6"))).text());
    }

    @Test
    void brokenTableIsNotTakenApart() {
        assertTrue(Sheet.parse("levels.csv", "a,b\n\"1,2\n").isEmpty());
        assertTrue(Sheet.parse("levels.csv", "# nothing\n").isEmpty());
    }

    private static void assertSameWhenReadAgain(Sheet sheet) {
        Table again = TableFile.parse(new TextFile(sheet.name(), sheet.text(), ""))
                .value()
                .orElseThrow()
                .table();
        assertEquals(again, sheet.table());
    }

    private static Sheet sheet(String text) {
        return Sheet.parse("levels.csv", text).orElseThrow();
    }
}
