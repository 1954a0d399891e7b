package stillstand.files;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTimeoutPreemptively;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.google.common.jimfs.Configuration;
import com.google.common.jimfs.Jimfs;
import java.io.IOException;
import java.nio.charset.Charset;
import java.nio.charset.StandardCharsets;
import java.nio.file.FileSystem;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Duration;
import java.util.List;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.Test;
import stillstand.files.TableFile.Separator;
import stillstand.ledger.InputProblem;
import stillstand.ledger.Loaded;
import stillstand.study.Table;

class TableFileTest {
    private final FileSystem disk = Jimfs.newFileSystem(Configuration.unix());
    private final Path file = disk.getPath("/field/levels.csv");

    @AfterEach
    void closeDisk() throws IOException {
        disk.close();
    }

    private Loaded<TableFile> read(byte[] bytes) throws IOException {
        Files.createDirectories(file.getParent());
        Files.write(file, bytes);
        return TableFile.read(file, "levels.csv");
    }

    private Loaded<TableFile> read(String text) throws IOException {
        return read(text.getBytes(StandardCharsets.UTF_8));
    }

    private static List<String> messages(Loaded<?> loaded) {
        return loaded.problems().stream().map(InputProblem::message).toList();
    }

    @Test
    void linesAreThoseOfTheFile() throws IOException {
        TableFile read = read("# a comment\n\nsite,note\n\nNorth,\"one\ntwo\"\n# another\nSouth, b \nEast,c")
                .value()
                .orElseThrow();
        assertEquals(
                new Table(
                        "levels.csv",
                        3,
                        List.of("site", "note"),
                        List.of(
                                new Table.Row(6, List.of("North", "one\ntwo")),
                                new Table.Row(8, List.of("South", "b")),
                                new Table.Row(9, List.of("East", "c")))),
                read.table());
    }

    @Test
    void linesMayEndAsOnAnySystem() throws IOException {
        List<Table.Row> rows =
                read("site\r\nNorth\r\nSouth\r\n").value().orElseThrow().table().rows();
        assertEquals(List.of(new Table.Row(2, List.of("North")), new Table.Row(3, List.of("South"))), rows);
    }

    @Test
    void aByteOrderMarkIsNoPartOfTheFirstHeader() throws IOException {
        assertEquals(
                List.of("site", "level"),
                read("\uFEFFsite,level\nN,1\n").value().orElseThrow().table().header());
    }

    @Test
    void separatorsAreDetectedInTheHeader() throws IOException {
        TableFile semicolons =
                read("site;\"a,b,c,d\";x_note\nN;1;2,5\n").value().orElseThrow();
        assertEquals(Separator.SEMICOLON, semicolons.separator());
        assertEquals(List.of("N", "1", "2,5"), semicolons.table().rows().get(0).cells());
        TableFile tabs = read("site\tlevel\nN\t\n").value().orElseThrow();
        assertEquals(Separator.TAB, tabs.separator());
        assertEquals(List.of("N", ""), tabs.table().rows().get(0).cells());
        assertEquals(Separator.COMMA, read("site\nN\n").value().orElseThrow().separator());
    }

    @Test
    void rowsOfNothingButSeparatorsAreLeftOut() throws IOException {
        assertEquals(
                List.of(new Table.Row(3, List.of("N", "1"))),
                read("site,level\n,\nN,1\n,,,\n").value().orElseThrow().table().rows());
    }

    @Test
    void emptyFilesAndCommentsAreNamed() throws IOException {
        assertEquals(List.of("levels.csv: found an empty file, expected a line of column names"), messages(read("")));
        assertEquals(
                List.of("levels.csv: found nothing but comments, expected a line of column names"),
                messages(read("# only this\n")));
    }

    @Test
    void oldEncodingsAreNamed() throws IOException {
        assertEquals(
                List.of(
                        "levels.csv:2: found the byte E9, which is no UTF-8 (text in windows-1252 or another old encoding), expected UTF-8 (in a spreadsheet: save as CSV UTF-8)"),
                messages(read("site,note\nN,Plage \u00e9lev\u00e9e\n".getBytes(Charset.forName("windows-1252")))));
        for (Charset charset : List.of(StandardCharsets.UTF_16, StandardCharsets.UTF_16LE, StandardCharsets.UTF_16BE)) {
            assertEquals(
                    List.of("levels.csv: found text in UTF-16, expected UTF-8 (in a spreadsheet: save as CSV UTF-8)"),
                    messages(read("site,level\nN,1\n".getBytes(charset))));
        }
    }

    @Test
    void aFolderOrNothingInItsPlaceIsNamed() throws IOException {
        assertEquals(
                List.of("levels.csv: found no such file, expected one"), messages(TableFile.read(file, "levels.csv")));
        Files.createDirectories(file);
        assertEquals(
                List.of("levels.csv: found a folder, expected a file"), messages(TableFile.read(file, "levels.csv")));
    }

    @Test
    void brokenQuotesAreNamed() throws IOException {
        assertEquals(
                List.of("levels.csv:3: found a quoted cell that never ends, expected a closing double quote"),
                messages(read("site,level\nN,1\n\"South,2\nEast,3\n")));
        assertEquals(
                List.of(
                        "levels.csv:2: found text after the closing quote of a cell, expected the next cell (a double quote inside a quoted cell is written twice)"),
                messages(read("site,level\n\"N\"orth,1\n")));
    }

    @Test
    void oneLineOfTenMegabytesIsRead() throws IOException {
        byte[] bytes = ("site,level\nN," + "9".repeat(10_000_000) + "\n").getBytes(StandardCharsets.UTF_8);
        Loaded<TableFile> read = assertTimeoutPreemptively(Duration.ofSeconds(20), () -> read(bytes));
        assertEquals(
                10_000_000,
                read.value().orElseThrow().table().rows().get(0).cells().get(1).length());
    }

    @Test
    void aHundredThousandRowsAreRead() throws IOException {
        String text = "site,level,elevation_m,elevation_1sigma_m\n" + "North,T1,61.4,0.5\n".repeat(100_000);
        Loaded<TableFile> read = assertTimeoutPreemptively(Duration.ofSeconds(20), () -> read(text));
        assertEquals(100_000, read.value().orElseThrow().table().rows().size());
    }

    @Test
    void tooManyRowsAreRefusedWithTheirNumber() throws IOException {
        assertEquals(
                List.of("levels.csv: found more than 500000 rows, expected at most 500000"),
                messages(read("a\n" + "1\n".repeat(500_001))));
    }

    @Test
    void aFileTooLargeIsRefusedWithItsSize() throws IOException {
        assertEquals(
                List.of("levels.csv: found a file of 65.0 MiB, expected at most 64 MiB"),
                messages(read(new byte[65 << 20])));
    }

    @Test
    void theSumOfTheBytesIsThatOfTheFile() {
        TextFile text = TextFile.decode("a", "abc".getBytes(StandardCharsets.UTF_8))
                .value()
                .orElseThrow();
        // FIPS 180-4, example of SHA-256 for "abc"
        assertEquals("ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad", text.sha256());
        assertTrue(text.inputFile().file().equals("a"));
    }
}
