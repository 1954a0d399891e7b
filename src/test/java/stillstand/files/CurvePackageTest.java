package stillstand.files;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Set;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import stillstand.ledger.InputProblem;
import stillstand.ledger.InputWarning;
import stillstand.ledger.Loaded;
import stillstand.sealevel.HighstandClass;
import stillstand.sealevel.HighstandEntry;
import stillstand.sealevel.SeaLevelCurve;
import stillstand.sealevel.StageTable;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.SplitNormal;

/** Curves and tables here are invented. */
class CurvePackageTest {
    private static final StageTable STAGES = CurvePackage.shippedStages();
    private static final String AT = "curves/datapackage.json";
    private static final String CURVE =
            "{\"name\": \"own\", \"path\": \"own.csv\", \"stillstand\": {\"kind\": \"curve\"}}";
    private static final String TABLE =
            "{\"name\": \"own\", \"path\": \"own.csv\", \"stillstand\": {\"kind\": \"highstands\"}}";

    @TempDir
    Path study;

    private Path folder;

    @BeforeEach
    void makeFolder() throws IOException {
        folder = Files.createDirectory(study.resolve("curves"));
    }

    @Test
    void theShippedPackageIsWhole() {
        CurvePackage shipped = CurvePackage.shipped();
        assertEquals(
                List.of("spratt-lisiecki-2016", "waelbroeck-2002", "bintanja-vandewal-2008", "lambeck-2014"),
                shipped.curves().stream().map(SeaLevelCurve::id).toList());
        SeaLevelCurve spratt = shipped.curves().get(0);
        assertEquals(3.13, spratt.levelMetresAt(121), 0.01);
        assertEquals(10, spratt.facts().usableFromKa());
        assertFalse(spratt.facts().spreadIsGuessed());
        assertTrue(shipped.curves().get(1).facts().spreadIsGuessed());
        assertEquals(10, shipped.curves().get(1).sigmaLowMetresAt(150), 1e-9);
        assertEquals(12, shipped.curves().get(2).sigmaLowMetresAt(150), 1e-9);
        assertEquals(1.66 / 2, shipped.curves().get(3).sigmaLowMetresAt(20.439), 1e-3);
        assertEquals("independent-highstands", shipped.highstands().get(0).id());
        HighstandEntry last = shipped.highstands().get(0).entries().get(2);
        assertEquals("5e", last.stage());
        assertEquals(new Normal(7.5, 1.5), last.level());
        assertEquals(25, STAGES.stages().size());
        assertEquals("5e", STAGES.find("5.5").orElseThrow().label());
        assertEquals(
                HighstandClass.INTERSTADIAL, STAGES.find("5a").orElseThrow().highstandClass());
        assertEquals(6, shipped.inputs().size());
    }

    @Test
    void aStudyWithoutCurvesHasNone() {
        Loaded<CurvePackage> none = CurvePackage.read(study.resolve("nothing"), "curves", STAGES, Set.of());
        assertEquals(CurvePackage.NONE, none.value().orElseThrow());
    }

    @Test
    void anOwnCurveNeedsNoMoreThanNamePathAndKind() {
        write("own.csv", "# mine\nage_ka,level_m,level_2sigma_m\n0,0,0\n20,-120,10\n125,6,4\n");
        CurvePackage own = good(CURVE);
        SeaLevelCurve curve = own.curves().get(0);
        assertEquals("own", curve.id());
        assertEquals(5, curve.sigmaLowMetresAt(20), 1e-3);
        assertEquals("source not stated", curve.facts().citation());
        assertEquals(5, curve.facts().correlationTimeKa());
        assertEquals(3, curve.facts().curveAgeSigmaKa());
        assertEquals(2, own.inputs().size());
    }

    @Test
    void aCurveWithoutSpreadGetsADefaultAndAWarning() {
        write("own.csv", "age_ka;level_m\n0;0\n20;-120\n125;6\n140;-130\n");
        Loaded<CurvePackage> loaded = read(CURVE);
        SeaLevelCurve curve = loaded.value().orElseThrow().curves().get(0);
        assertTrue(curve.facts().spreadIsGuessed());
        assertEquals(6, curve.sigmaHighMetresAt(125), 1e-2);
        assertEquals(12, curve.sigmaHighMetresAt(20), 1e-2);
        assertEquals(
                List.of(new InputWarning(
                        "curves/own.csv",
                        0,
                        0,
                        "curve \"own\" has no spread that can be used; 6.0 m in interglacials and 12.0 m elsewhere are"
                                + " supposed (1 sigma)")),
                loaded.warnings());
    }

    @Test
    void anOwnHighstandTableIsReadWithAllItsColumns() {
        write("own.csv", """
                stage,age_ka,age_2sigma_ka,level_m,level_low95_m,level_high95_m,duration_ka,class,exists_probability,source
                low,52,4,\u221260,-79.6,-50.2,5,interstadial,0.7,
                high,125,6,6,4.04,7.96,,,,a beach
                """);
        CurvePackage own = good(TABLE.replace("\"kind\"", "\"complete\": true, \"citation\": \"me\", \"kind\""));
        assertTrue(own.highstands().get(0).complete());
        HighstandEntry low = own.highstands().get(0).entries().get(0);
        assertEquals(2, low.ageSigmaKa());
        assertEquals(SplitNormal.ofCentral95(-60, -79.6, -50.2), low.level());
        assertEquals(HighstandClass.INTERSTADIAL, low.highstandClass().orElseThrow());
        assertEquals(0.7, low.existsProbability().orElseThrow());
        assertEquals("me", low.source());
        HighstandEntry high = own.highstands().get(0).entries().get(1);
        assertTrue(high.highstandClass().isEmpty() && high.durationKa().isEmpty());
        assertEquals("a beach", high.source());
    }

    @ParameterizedTest
    @CsvSource(delimiter = '|', textBlock = """
            age_ka,level_m/20,-120/0,0 | curves/own.csv:3:1: age_ka: found "0", younger than the row above, expected ages that ascend, each once
            age_ka,level_m/0,0/20,-120/20,-119 | curves/own.csv:4:1: age_ka: found "20" a second time, expected ages that ascend, each once
            age_ka,level_m/0,0 | curves/own.csv: found 1 row, expected at least 2, so that there is a line between them
            age_ka,level_m | curves/own.csv: found no row, expected at least 2, so that there is a line between them
            age_ka,level_m/-1,0/5,0 | curves/own.csv:2:1: age_ka: found "-1", expected 0 or more (age counts backwards from 1950)
            age_ka,level_m/0,/5,0 | curves/own.csv:2:2: level_m: found nothing, expected a level
            age_ka,level_m/0,5%/5,0 | curves/own.csv:2:2: level_m: found "5%", expected a number without a percent sign
            age_ka;level_m/0;0/1,200,000;0 | curves/own.csv:3:1: age_ka: found "1,200,000", expected a number without thousands separators
            age_ka;level_m/0;0/20;-1,5 | curves/own.csv:3:2: level_m: found "-1,5", expected a number with a decimal point
            age_ka,level_m/0,0/NaN,0 | curves/own.csv:3:1: age_ka: found "NaN", expected a number
            age_years,level_m,age_ka/0,0,0/5,0,1 | curves/own.csv:1:1: age_years: found a unit that curves do not have, expected age_ka ("curves import" converts other units)
            age_ka,level_ft,level_m/0,0,0/5,0,1 | curves/own.csv:1:2: level_ft: found a unit that curves do not have, expected level_m ("curves import" converts other units)
            age_ka,level_m,sigma/0,0,1/5,0,1 | curves/own.csv:1:3: sigma: found a spread that may be 1 or 2 sigma, expected level_1sigma_m, level_2sigma_m, or level_low95_m and level_high95_m
            age_ka,level_m,level_error_m/0,0,1/5,0,1 | curves/own.csv:1:3: level_error_m: found a spread that may be 1 or 2 sigma, expected level_1sigma_m, level_2sigma_m, or level_low95_m and level_high95_m
            age_ka,level_m,level_1sigma_m,level_2sigma_m/0,0,1,2/5,0,1,2 | curves/own.csv:1:4: level_2sigma_m: found this column beside level_1sigma_m, expected one of the two, never both
            age_ka,level_m,level_low95_m/0,0,-1/5,0,-1 | curves/own.csv:1:3: level_low95_m: found one bound without the other, expected a column "level_high95_m" beside it
            age_ka,level_m,level_1sigma_m,level_low95_m,level_high95_m/0,0,1,-1,1/5,0,1,-1,1 | curves/own.csv:1:3: level_1sigma_m: found this column beside level_low95_m, expected one kind of spread, never two
            age_ka,level_m,level_low95_m,level_high95_m/0,0,1,2/5,0,-1,1 | curves/own.csv:2:3: level_low95_m: found "1", expected a bound at or below the level
            age_ka,level_m,level_1sigma_m/0,0,-1/5,0,1 | curves/own.csv:2:3: level_1sigma_m: found "-1", expected 0 or more
            age_ka,level_m,level_1sigma_m/0,0,/5,0,1 | curves/own.csv:2:3: level_1sigma_m: found nothing, expected the spread of the level (0 where it is exact)
            age_ka/0/5 | curves/own.csv:1: found no column "level_m", expected one
            age_ka,level_m,depth/0,0,1/5,0,1 | curves/own.csv:1:3: depth: found an unknown column, expected a known one, or a name that starts with x_ for a column of your own
            """)
    void aBadCurveIsRefusedWithOneSentence(String text, String message) {
        write("own.csv", text.replace('/', '\n') + "\n");
        assertEquals(List.of(message), messages(CURVE));
    }

    @ParameterizedTest
    @CsvSource(delimiter = '|', textBlock = """
            stage,age_ka,age_1sigma_ka,level_m,level_1sigma_m | curves/own.csv: found no row, expected at least one highstand
            stage,age_ka,age_1sigma_ka,level_m,level_1sigma_m/a,80,2,-20,5/a,100,2,-20,5 | curves/own.csv:3:1: stage: found "a" a second time, expected it once (it stands in line 2 already)
            stage,age_ka,age_1sigma_ka,level_m,level_1sigma_m/older,80,2,-20,5 | curves/own.csv:2:1: stage: found "older", expected another label (this one names rows older than a table)
            stage,age_ka,age_1sigma_ka,level_m,level_1sigma_m/a,0,2,-20,5 | curves/own.csv:2:2: age_ka: found "0", expected an age above 0
            stage,age_ka,age_1sigma_ka,level_m/a,80,2,-20 | curves/own.csv:1:4: level_m: found no spread beside it, expected level_1sigma_m, level_2sigma_m, or level_low95_m and level_high95_m
            stage,age_ka,level_m,level_1sigma_m/a,80,-20,5 | curves/own.csv:1: found no spread beside "age_ka", expected a column "age_1sigma_ka" or "age_2sigma_ka"
            stage,age_ka,age_1sigma_ka,level_m,level_low95_m,level_high95_m/a,80,2,-20,-15,-10 | curves/own.csv:2:4: level_m: found "-20", expected a level between level_low95_m and level_high95_m
            stage,age_ka,age_1sigma_ka,level_m,level_1sigma_m,class/a,80,2,-20,5,glacial | curves/own.csv:2:6: class: found "glacial", expected interglacial or interstadial
            stage,age_ka,age_1sigma_ka,level_m,level_1sigma_m,exists_probability/a,80,2,-20,5,0 | curves/own.csv:2:6: exists_probability: found "0", expected above 0 and at most 1
            """)
    void aBadHighstandTableIsRefusedWithOneSentence(String text, String message) {
        write("own.csv", text.replace('/', '\n') + "\n");
        assertEquals(List.of(message), messages(TABLE));
    }

    @ParameterizedTest
    @CsvSource(delimiter = '|', textBlock = """
            ../own.csv | "../own.csv", which leaves the folder
            a/../../own.csv | "a/../../own.csv", which leaves the folder
            /etc/own.csv | "/etc/own.csv", which leaves the folder
            https://example.org/own.csv | "https://example.org/own.csv", which is no path but a URL
            file:own.csv | "file:own.csv", which is no path but a URL
            """)
    void aPathOutOfTheFolderIsRefused(String path, String found) {
        String resource = CURVE.replace("own.csv", path);
        assertEquals(
                List.of(AT + ":2:25: resources[0].path: found " + found
                        + ", expected a path inside the folder, such as \"own.csv\""),
                messages(resource));
    }

    @Test
    void aLinkOutOfTheFolderIsRefused() throws IOException {
        Files.writeString(study.resolve("elsewhere.csv"), "age_ka,level_m\n0,0\n5,0\n");
        Files.createSymbolicLink(folder.resolve("own.csv"), study.resolve("elsewhere.csv"));
        assertEquals(
                List.of("curves/own.csv: found a link that leaves the folder, expected a file inside it"),
                messages(CURVE));
    }

    @Test
    void twoOfOneNameAreRefused() {
        write("own.csv", "age_ka,level_m,level_1sigma_m\n0,0,1\n5,0,1\n");
        assertEquals(
                List.of(AT + ":3:10: resources[1].name: found \"own\", which another curve or table has already,"
                        + " expected a name of its own"),
                messages(CURVE + ",\n" + CURVE));
        assertEquals(
                List.of(AT + ":2:10: resources[0].name: found \"waelbroeck-2002\", which another curve or table has"
                        + " already, expected a name of its own"),
                messages(CURVE.replace("\"own\"", "\"waelbroeck-2002\"")));
    }

    @Test
    void descriptorsAreChecked() {
        assertEquals(
                List.of(AT + ": found no such file, expected one"),
                messages(CurvePackage.read(folder, "curves", STAGES, Set.of())));
        assertEquals(
                List.of(AT
                        + ":2:10: resources[0].name: found \"My Curve\", expected lower-case words joined by hyphens"),
                messages(CURVE.replace("\"own\"", "\"My Curve\"")));
        assertEquals(
                List.of(AT + ":2:1: resources[0]: found no key \"stillstand\", expected \"stillstand\": {\"kind\":"
                        + " \"curve\" or \"highstands\"}"),
                messages("{\"name\": \"own\", \"path\": \"own.csv\"}"));
        assertEquals(
                List.of(
                        AT
                                + ":2:59: resources[0].stillstand.kind: found \"curves\", expected \"curve\" or \"highstands\""),
                messages(CURVE.replace("\"curve\"", "\"curves\"")));
        assertEquals(
                List.of(
                        AT
                                + ":2:59: resources[0].stillstand.kind: found \"stages\", expected \"curve\" or \"highstands\""),
                messages(CURVE.replace("\"curve\"", "\"stages\"")));
        assertEquals(
                List.of(AT + ":2:51: resources[0].stillstand.usable_from: found an unknown key, expected"
                        + " \"usable_from_ka\""),
                messages(CURVE.replace("{\"kind\"", "{\"usable_from\": 3, \"kind\"")));
        assertEquals(
                List.of(AT + ":2:74: resources[0].stillstand.correlation_time_ka: found -1, expected a number above 0"),
                messages(CURVE.replace("{\"kind\"", "{\"correlation_time_ka\": -1, \"kind\"")));
        write(CurvePackage.DESCRIPTOR, "{\"name\": \"mine\"}");
        assertEquals(
                List.of(AT + ":1:1: found no key \"resources\", expected a list of resources"),
                messages(CurvePackage.read(folder, "curves", STAGES, Set.of())));
    }

    @Test
    void aTableOfHalfAMillionRowsAndMoreIsRefusedWithItsSize() {
        StringBuilder text = new StringBuilder("age_ka,level_m\n");
        for (int i = 0; i <= 500_000; i++) {
            text.append(i).append(",0\n");
        }
        write("own.csv", text.toString());
        assertEquals(List.of("curves/own.csv: found more than 500000 rows, expected at most 500000"), messages(CURVE));
    }

    @Test
    void allProblemsComeAtOnceInReadingOrder() {
        write("own.csv", "age_ka,level_m\n5,x\n0,y\n");
        write("other.csv", "age_ka,level_m\n0,0\n");
        List<String> messages = messages(CURVE + "," + CURVE.replace("own", "other"));
        assertEquals(4, messages.size());
        assertTrue(messages.get(0).startsWith("curves/other.csv:"));
        assertTrue(messages.get(1).startsWith("curves/own.csv:2:2:"));
        assertTrue(messages.get(2).startsWith("curves/own.csv:3:1:"));
        assertTrue(messages.get(3).startsWith("curves/own.csv:3:2:"));
    }

    private CurvePackage good(String resources) {
        Loaded<CurvePackage> loaded = read(resources);
        assertEquals(List.of(), messages(loaded));
        return loaded.value().orElseThrow();
    }

    private List<String> messages(String resources) {
        return messages(read(resources));
    }

    private static List<String> messages(Loaded<CurvePackage> loaded) {
        return loaded.problems().stream().map(InputProblem::message).toList();
    }

    private Loaded<CurvePackage> read(String resources) {
        write(CurvePackage.DESCRIPTOR, "{\"name\": \"mine\", \"resources\": [\n" + resources + "]}");
        return CurvePackage.read(folder, "curves", STAGES, Set.of("waelbroeck-2002"));
    }

    private void write(String name, String text) {
        try {
            Files.writeString(folder.resolve(name), text);
        } catch (IOException e) {
            throw new AssertionError(e);
        }
    }
}
