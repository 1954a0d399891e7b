package stillstand.files;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTimeoutPreemptively;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.google.common.jimfs.Configuration;
import com.google.common.jimfs.Jimfs;
import java.io.IOException;
import java.nio.file.FileSystem;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Duration;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import stillstand.ledger.Assumption;
import stillstand.ledger.InputProblem;
import stillstand.ledger.Loaded;
import stillstand.sealevel.HighstandTable;
import stillstand.study.InputFile;
import stillstand.study.Library;
import stillstand.study.SeaLevelCase;
import stillstand.study.Study;
import stillstand.uncertainty.Tabulated;

class StudyFolderTest {
    private static final Library LIBRARY = ShippedLibrary.load();
    private static final String OWN_TABLE =
            "{\"title\": \"x\", \"sea_level\": {\"highstands\": {\"from\": \"table\", \"table\": \"mine\"}}}";

    private final FileSystem disk = Jimfs.newFileSystem(Configuration.unix());
    private final Path study = disk.getPath("/coast");

    @BeforeEach
    void writeStudy() throws IOException {
        write("study.json", "{\"title\": \"A coast\"}");
        write("sites.csv", "site,latitude,longitude\nNorth,5,5\n");
        write("levels.csv", "site,level,elevation_m,elevation_1sigma_m,highstand\nNorth,T1,61.4,0.5,5e\n");
    }

    @AfterEach
    void closeDisk() throws IOException {
        disk.close();
    }

    private void write(String name, String text) throws IOException {
        Path file = study.resolve(name);
        Files.createDirectories(file.getParent());
        Files.writeString(file, text);
    }

    private void writePackage(String resources) throws IOException {
        write("curves/datapackage.json", "{\"name\": \"own\", \"resources\": [" + resources + "]}");
    }

    private static String resource(String name, String kind, String more) {
        return "{\"name\": \"" + name + "\", \"path\": \"" + name + ".csv\", \"stillstand\": {\"kind\": \"" + kind
                + "\"" + more + "}}";
    }

    private Loaded<Study> read() {
        return StudyFolder.read(study, LIBRARY);
    }

    private List<String> problems() {
        return read().problems().stream().map(InputProblem::message).toList();
    }

    private Study whole() {
        Loaded<Study> loaded = read();
        assertEquals(List.of(), loaded.problems());
        return loaded.value().orElseThrow();
    }

    @Test
    void aStudyWithoutSamplesIsWhole() {
        Study read = whole();
        assertEquals("North", read.sites().get(0).site().name());
        assertEquals(
                List.of("levels.csv", "sites.csv", "study.json"),
                read.inputs().stream().map(InputFile::file).toList());
        assertEquals(List.of(), read.warnings());
        assertTrue(read.ledger()
                .contains(new Assumption("cells of levels.csv stand between", "commas", "found in its header", "all")));
    }

    @Test
    void missingFoldersAndFilesAreNamed() throws IOException {
        Files.delete(study.resolve("study.json"));
        Files.delete(study.resolve("levels.csv"));
        Files.createDirectory(study.resolve("levels.csv"));
        Files.delete(study.resolve("sites.csv"));
        assertEquals(
                List.of(
                        "levels.csv: found a folder, expected a file",
                        "sites.csv: found no such file, expected one",
                        "study.json: found no such file, expected one"),
                problems());
        assertEquals(
                List.of("/nowhere: found no such folder, expected the folder of a study, with study.json in it"),
                StudyFolder.read(disk.getPath("/nowhere"), LIBRARY).problems().stream()
                        .map(InputProblem::message)
                        .toList());
        write("file", "");
        assertEquals(
                List.of("/coast/file: found a file, expected the folder of a study, with study.json in it"),
                StudyFolder.read(study.resolve("file"), LIBRARY).problems().stream()
                        .map(InputProblem::message)
                        .toList());
    }

    @Test
    void problemsOfAllFilesComeTogether() throws IOException {
        write("study.json", "{\"titel\": \"x\"}");
        write("sites.csv", "site,latitude,longitude\nNorth,95,5\n");
        write("levels.csv", "site,level,elevation_m,elevation_1sigma_m\nNorth,T1,6l.4,0.5\n");
        assertEquals(
                List.of(
                        "levels.csv:2:3: elevation_m: found \"6l.4\", expected a number",
                        "sites.csv:2:2: latitude: found \"95\", expected degrees from -90 to 90",
                        "study.json:1:1: title: found nothing, expected a title in words",
                        "study.json:1:2: titel: found an unknown key, expected \"title\""),
                problems());
    }

    @Test
    void calibratedAgesAreRead() throws IOException {
        write("samples.csv", "site,sample,level,age_table\nNorth,S1,T1,wood\n");
        write("ages/wood.csv", "age_ka,density\n9,0\n10,1\n11,0\n");
        assertEquals(
                Optional.of(Tabulated.of(
                        List.of(new Tabulated.Point(9, 0), new Tabulated.Point(10, 1), new Tabulated.Point(11, 0)))),
                whole().sites().get(0).site().levels().get(0).samples().get(0).ageKa());
    }

    @Test
    void calibratedAgesThatAreNoneAreNamed() throws IOException {
        write("ages/a.csv", "age_ka,density\n9,0\n8,1\n");
        write("ages/b.csv", "age_ka,density\n9,0\n");
        write("ages/c.csv", "age_ka,density\n9,0\n10,0\n");
        write("ages/d.csv", "age_ka\n9\n10\n");
        assertEquals(
                List.of(
                        "ages/a.csv:3:1: age_ka: found \"8\" after \"9\", expected ages that increase",
                        "ages/b.csv: found 1 row, expected an age of at least 2 rows",
                        "ages/c.csv: found no density above 0, expected one somewhere",
                        "ages/d.csv:1: found no column \"density\", expected one"),
                problems());
    }

    @Test
    void pointsOfTerracesAreRead() throws IOException {
        write(
                "points.csv",
                "site,level,distance_km,elevation_m,elevation_1sigma_m\nNorth,T1,0,61,0.5\nNorth,T1,1,62,0.5\nNorth,T1,2,63,0.5\n");
        assertEquals(3, whole().together().terraces().get(0).points().size());
        assertTrue(whole().inputs().stream().anyMatch(input -> input.file().equals("points.csv")));
    }

    @Test
    void anOwnCompleteTableIsTakenAsItStands() throws IOException {
        write("study.json", OWN_TABLE);
        writePackage(resource("mine", "highstands", ", \"complete\": true"));
        write("curves/mine.csv", "stage,age_ka,age_1sigma_ka,level_m,level_1sigma_m\nLast,125,3,6,2\n");
        write("levels.csv", "site,level,elevation_m,elevation_1sigma_m,highstand\nNorth,T1,61.4,0.5,Last\n");
        Study read = whole();
        SeaLevelCase account = read.seaLevel().get(0);
        assertEquals("mine", account.id());
        assertEquals(Optional.empty(), account.curve());
        HighstandTable table = account.highstands();
        assertEquals(List.of("Last"), table.stages());
        assertEquals(1, table.rows().size());
        assertEquals(0, table.sharedErrors().offsetSigmaMetres());
        assertEquals(
                List.of("curves/datapackage.json", "curves/mine.csv", "levels.csv", "sites.csv", "study.json"),
                read.inputs().stream().map(InputFile::file).toList());
    }

    @Test
    void aStatedSharedErrorCountsForACompleteTableToo() throws IOException {
        write(
                "study.json",
                "{\"title\": \"x\", \"sea_level\": {\"shared_level_1sigma_m\": 2, \"highstands\": {\"from\": \"table\", \"table\": \"mine\"}}}");
        writePackage(resource("mine", "highstands", ", \"complete\": true"));
        write("curves/mine.csv", "stage,age_ka,age_1sigma_ka,level_m,level_1sigma_m\n5e,125,3,6,2\n");
        assertEquals(2, whole().seaLevel().get(0).highstands().sharedErrors().offsetSigmaMetres());
    }

    @Test
    void unknownCurvesTablesAndStagesAreNamedWithTheNearest() throws IOException {
        write(
                "study.json",
                "{\"title\": \"x\", \"sea_level\": {\"curves\": [{\"id\": \"sprat-lisiecki-2016\"}], \"highstands\": {\"overrides\": \"independent-highstand\"}}}");
        assertEquals(
                List.of(
                        "study.json:1:48: sea_level.curves[0].id: found \"sprat-lisiecki-2016\", expected the id of a curve (nearest: \"spratt-lisiecki-2016\")",
                        "study.json:1:101: sea_level.highstands.overrides: found \"independent-highstand\", expected the id of a highstand table, or \"none\" (nearest: \"independent-highstands\")"),
                problems());
        write("study.json", OWN_TABLE);
        assertEquals(
                List.of(
                        "study.json:1:71: sea_level.highstands.table: found \"mine\", expected the id of a highstand table"),
                problems());
    }

    @Test
    void aCurveNamedTwiceIsAProblem() throws IOException {
        write(
                "study.json",
                "{\"title\": \"x\", \"sea_level\": {\"curves\": [{\"id\": \"waelbroeck-2002\"}, {\"id\": \"waelbroeck-2002\"}]}}");
        assertEquals(
                List.of(
                        "study.json:1:75: sea_level.curves[1].id: found \"waelbroeck-2002\" a second time, expected each curve once"),
                problems());
    }

    @Test
    void aWeightOfZeroIsAProblem() throws IOException {
        write(
                "study.json",
                "{\"title\": \"x\", \"sea_level\": {\"curves\": [{\"id\": \"waelbroeck-2002\", \"weight\": 0}]}}");
        assertEquals(
                List.of("study.json:1:77: sea_level.curves[0].weight: found 0, expected a number above 0"), problems());
    }

    @Test
    void aCurveWithoutHighstandsNeedsATable() throws IOException {
        write("study.json", "{\"title\": \"x\", \"sea_level\": {\"curves\": [{\"id\": \"lambeck-2014\"}]}}");
        assertEquals(
                List.of(
                        "study.json:1:48: sea_level.curves[0].id: found \"lambeck-2014\", which shows no highstand, expected a curve that shows one in some stage window, or highstands from a table"),
                problems());
    }

    @Test
    void overridesOfUnknownStagesAreNamed() throws IOException {
        write("study.json", "{\"title\": \"x\", \"sea_level\": {\"highstands\": {\"overrides\": \"mine\"}}}");
        writePackage(resource("mine", "highstands", ""));
        write("curves/mine.csv", "stage,age_ka,age_1sigma_ka,level_m,level_1sigma_m\n5ee,125,3,6,2\n");
        assertEquals(
                List.of(
                        "study.json:1:58: sea_level.highstands.overrides: found \"mine\" with a stage \"5ee\", expected only stages of the stage table (nearest: \"5e\")"),
                problems());
    }

    @Test
    void aPinToAStageThatTheTableLacksIsNamed() throws IOException {
        write("study.json", OWN_TABLE);
        writePackage(resource("mine", "highstands", ", \"complete\": true"));
        write("curves/mine.csv", "stage,age_ka,age_1sigma_ka,level_m,level_1sigma_m\n5a,80,3,6,2\n5c,100,3,6,2\n");
        assertEquals(
                List.of("levels.csv:2:5: highstand: found \"5e\", expected a highstand that \"mine\" has (5a, 5c)"),
                problems());
    }

    @Test
    void aLevelReadAtItsAgeNeedsACurve() throws IOException {
        write("study.json", OWN_TABLE);
        writePackage(resource("mine", "highstands", ", \"complete\": true"));
        write("curves/mine.csv", "stage,age_ka,age_1sigma_ka,level_m,level_1sigma_m\n5e,125,3,6,2\n");
        write("levels.csv", "site,level,elevation_m,elevation_1sigma_m,forms_at\nNorth,T1,61.4,0.5,any\n");
        assertEquals(
                List.of(
                        "levels.csv:2:5: forms_at: found \"any\", while study.json names no curve, expected sea_level.curves to name one, since such a level reads it at its own age"),
                problems());
    }

    @Test
    void changesFromTheCommandLineCountBeforeTheChecks() throws IOException {
        Loaded<Study> loaded = StudyFolder.read(study, LIBRARY, settings -> StudyJson.defaults("Changed"));
        assertEquals("Changed", loaded.value().orElseThrow().settings().title());
    }

    @Test
    void aHundredThousandBadRowsAreAllNamed() throws IOException {
        write("levels.csv", "site,level,elevation_m,elevation_1sigma_m\n" + "North,T1,x,1\n".repeat(100_000));
        Loaded<Study> loaded = assertTimeoutPreemptively(Duration.ofSeconds(60), this::read);
        // each elevation, and each name after the first
        assertEquals(199_999, loaded.problems().size());
    }
}
