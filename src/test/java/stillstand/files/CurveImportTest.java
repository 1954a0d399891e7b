package stillstand.files;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import java.util.stream.Stream;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import stillstand.ledger.InputProblem;
import stillstand.ledger.InputWarning;
import stillstand.ledger.Loaded;
import stillstand.sealevel.SeaLevelCurve;
import stillstand.study.ImportChoices;
import stillstand.study.ImportChoices.AgeUnit;
import stillstand.study.ImportChoices.SpreadKind;
import stillstand.study.Library;

/** Layouts are those of public archives; unless a comment says otherwise the numbers are invented. */
class CurveImportTest {
    private static final Library LIBRARY = ShippedLibrary.load();

    /** Columns as Spratt and Lisiecki (2016, Clim. Past 12, 1079-1092) archived them; of the numbers, the levels of the stack. */
    private static final String TWO_STACKS = """
            # Layout of a paleoclimate archive
            # Missing values: NaN
            age_calkaBP\tSeaLev_shortPC1\tSeaLev_shortPC1_err_sig\tSeaLev_shortPC1_err_lo\tSeaLev_shortPC1_err_up\tSeaLev_longPC1\tSeaLev_longPC1_err_sig\tSeaLev_longPC1_err_lo\tSeaLev_longPC1_err_up
            5\t0\t4\t-9\t9\t0\t4\t-9\t9
            24\t-130\t4.38\t-139\t-121\t-130\t4.4\t-139\t-121
            404\t15.96\t11.5\t-12.5\t33\t14\t12\t-13\t33
            492\tNaN\tNaN\tNaN\tNaN\t-10.9\t13.8\t-38\t16
            """;

    @TempDir
    Path folder;

    private Path study;

    @BeforeEach
    void makeStudy() throws IOException {
        study = Files.createDirectory(folder.resolve("study"));
        Files.writeString(study.resolve("study.json"), "{ not read at all");
    }

    private static final class Told {
        private Optional<String> age = Optional.empty();
        private Optional<String> level = Optional.empty();
        private List<String> spreads = List.of();
        private Optional<AgeUnit> unit = Optional.empty();
        private Optional<Boolean> up = Optional.empty();
        private Optional<SpreadKind> spread = Optional.empty();
        private boolean means;

        Told age(String column) {
            age = Optional.of(column);
            return this;
        }

        Told level(String column) {
            level = Optional.of(column);
            return this;
        }

        Told spreads(String... columns) {
            spreads = List.of(columns);
            return this;
        }

        Told unit(AgeUnit each) {
            unit = Optional.of(each);
            return this;
        }

        Told up(boolean each) {
            up = Optional.of(each);
            return this;
        }

        Told spread(SpreadKind each) {
            spread = Optional.of(each);
            return this;
        }

        Told means() {
            means = true;
            return this;
        }

        ImportChoices choices() {
            return new ImportChoices(age, level, spreads, unit, up, spread, means);
        }
    }

    private Loaded<CurveImport.Imported> load(String text, Told told) {
        try {
            Path archive = Files.writeString(folder.resolve("archive.txt"), text);
            Loaded<CurveImport.Imported> loaded =
                    CurveImport.into(archive, study, "mine", told.choices(), Optional.of("Somebody (1999)"), LIBRARY);
            if (loaded.value().isEmpty()) {
                assertFalse(Files.exists(study.resolve("curves")), "nothing is written");
            }
            return loaded;
        } catch (IOException e) {
            throw new AssertionError(e);
        }
    }

    private List<String> problems(String text, Told told) {
        String place = folder.toString().replace('\\', '/') + "/";
        return load(text, told).problems().stream()
                .map(problem -> problem.message().replace(place, ""))
                .toList();
    }

    /** The rows written, one a line, without the comment above them. */
    private String written(String text, Told told) throws IOException {
        Loaded<CurveImport.Imported> loaded = load(text, told);
        assertEquals(
                List.of(), loaded.problems().stream().map(InputProblem::message).toList());
        assertEquals("curves/mine.csv", loaded.value().orElseThrow().file());
        String all = Files.readString(study.resolve("curves/mine.csv"));
        assertTrue(
                all.startsWith("# Imported by Stillstand from archive.txt. Ages in ka before 1950; levels in metres, up"
                        + " positive.\n"),
                all);
        return all.substring(all.indexOf('\n') + 1);
    }

    private List<String> remarks(String text, Told told) {
        return load(text, told).value().orElseThrow().remarks();
    }

    @Test
    void tabsCommentsAndRowsWithoutALevel() throws IOException {
        Told told = new Told()
                .level("SeaLev_shortPC1")
                .spreads("SeaLev_shortPC1_err_lo", "SeaLev_shortPC1_err_up")
                .spread(SpreadKind.BOUNDS);
        assertEquals("""
                age_ka,level_m,level_low95_m,level_high95_m
                5,0,-9,9
                24,-130,-139,-121
                404,15.96,-12.5,33
                """, written(TWO_STACKS, told));
    }

    @Test
    void remarksSayWhatWasUnderstood() {
        assertEquals(
                List.of(
                        "4 rows, tabs between cells, column names in line 3.",
                        "Age: \"age_calkaBP\", in ka.",
                        "Level: \"SeaLev_shortPC1\", in metres, up positive.",
                        "Spread: one standard deviation (\"SeaLev_shortPC1_err_sig\" of the archived table).",
                        "Not used: \"SeaLev_shortPC1_err_lo\", \"SeaLev_shortPC1_err_up\", \"SeaLev_longPC1\","
                                + " \"SeaLev_longPC1_err_sig\", \"SeaLev_longPC1_err_lo\", \"SeaLev_longPC1_err_up\".",
                        "1 row without a level is left out."),
                remarks(TWO_STACKS, new Told().level("SeaLev_shortPC1").spread(SpreadKind.ONE_SIGMA)));
    }

    @Test
    void twoLevelsAndTwoKindsOfSpreadAreAskedFor() {
        assertEquals(
                List.of(
                        "archive.txt:3: found 2 columns that may be the sea level (\"SeaLev_shortPC1\","
                                + " \"SeaLev_longPC1\"), expected to be told which it is: --level-column NAME (or its number, from 1)"),
                problems(TWO_STACKS, new Told()));
        assertEquals(
                List.of("archive.txt:3: found several columns that may be its spread (\"SeaLev_longPC1_err_sig\","
                        + " \"SeaLev_longPC1_err_lo\", \"SeaLev_longPC1_err_up\"), expected to be told which to take:"
                        + " --spread-column NAME (or its number, from 1), twice for two bounds, or --spread none to take"
                        + " Stillstand's default"),
                problems(TWO_STACKS, new Told().level("6")));
    }

    @Test
    void blanksAndPercentilesAsHeaders() throws IOException {
        String text = """
                Age(ka) PC1 Sigma 2.50% 25% 50% 75% 97.50%
                5    0.00  4.0   -9   -3  -1   3    9
                121  3.13  8.0  -17   -7  -2.31  3   15
                404 15.96 11.5  -12.5  0   8  16   33.0
                """;
        assertEquals(
                List.of("archive.txt:1: found no column that is plainly the sea level (\"Age(ka)\", \"PC1\", \"Sigma\","
                        + " \"2.50%\", \"25%\", \"50%\", \"75%\", \"97.50%\"), expected to be told which it is:"
                        + " --level-column NAME (or its number, from 1)"),
                problems(text, new Told()));
        assertEquals(
                List.of(
                        "archive.txt:1:3: Sigma: found a spread that may be 1 or 2 sigma, expected to be told which it is:"
                                + " --spread 1sigma or --spread 2sigma, or --spread none to take Stillstand's default"),
                problems(text, new Told().level("PC1").spreads("Sigma")));
        assertEquals("""
                age_ka,level_m,level_low95_m,level_high95_m
                5,0,-9,9
                121,3.13,-17,15
                404,15.96,-12.5,33
                """, written(text, new Told().level("PC1").spreads("2.50%", "97.50%")));
    }

    @Test
    void percentCommentsAndNegativeAges() throws IOException {
        String text = """
                % a model of ice sheets
                % Time_kyr SL SL_lower SL_upper CO2 CO2_lower CO2_upper
                -121.0 -2.6 -4 -1 270 260 280
                -21.0 -93.6 -97.2 -90 190 185 195
                0.0 -3.32 -4 -2 280 270 290
                """;
        assertEquals(
                List.of("archive.txt:2:3: SL_lower: found bounds that do not say of what (\"SL_lower\", \"SL_upper\"),"
                        + " expected to be told whether they hold 95 %: --spread bounds if they do, or --spread none to take"
                        + " Stillstand's default"),
                problems(text, new Told()));
        assertEquals("""
                age_ka,level_m
                0,-3.32
                21,-93.6
                121,-2.6
                """, written(text, new Told().spread(SpreadKind.NONE)));
    }

    @Test
    void negativeAgesAreToldOf() {
        String text = "% kyr SL\n-20.5 -120\n-0.5 0\n";
        assertEquals(
                List.of(
                        "2 rows, blanks between cells, column names in line 1, a comment.",
                        "Age: \"kyr\", in ka.",
                        "Level: \"SL\", in metres, up positive.",
                        "Spread: none that is used; Stillstand's default is supposed.",
                        "Its ages are negative: the past is read as positive.",
                        "Its rows are put in the order of their ages."),
                remarks(text, new Told()));
    }

    @Test
    void aLevelThatCountsDownIsSeenOrAskedFor() throws IOException {
        String header = "time (kyr BP),global sea level relative to present (m)\n";
        String rows = "0,1.46\n21.0,122.82\n124,-0.28\n";
        assertEquals(
                List.of(
                        "archive.txt:3:2: global sea level relative to present (m): found levels that read +122.8 m at 21 ka"
                                + " where up is positive, expected to be told which way they count: --level-positive down or"
                                + " --level-positive up"),
                problems(header + rows, new Told()));
        String turned = "age_ka,level_m\n0,-1.46\n21,-122.82\n124,0.28\n";
        assertEquals(turned, written(header + rows, new Told().up(false)));
        Files.delete(study.resolve("curves/mine.csv"));
        Files.delete(study.resolve("curves/datapackage.json"));
        assertEquals(turned, written("time (kyr BP),depth (m)\n" + rows, new Told()));
    }

    @Test
    void whatTheUserSaysOfTheDirectionCountsWithAWarning() {
        Loaded<CurveImport.Imported> loaded = load("age_ka,level_m\n0,0\n21,120\n", new Told().up(true));
        assertEquals(
                "read as --level-positive says, the sea stood at +120.0 m at 21 ka",
                loaded.warnings().get(0).message());
    }

    @Test
    void boundsMayStandTheOtherWayRound() throws IOException {
        // the first is numerically larger; Waelbroeck et al. (2002, QSR 21, 295-305): 150.5 ka -119.99, -94.96 to
        // -133.17 m
        String text = """
                age\tocean d18O\tmin\tmax\tRSL\tRSL-\tRSL+\tAlt.Age1
                0.5\t3.2\t3.1\t3.3\t0\t0\t0\t0.5
                150.5\t5.1\t5\t5.2\t-119.99\t-94.96\t-133.17\t152
                """;
        assertEquals(
                List.of(
                        "archive.txt:1: found 2 columns that may be the age (\"age\", \"Alt.Age1\"), expected to be told which it"
                                + " is: --age-column NAME (or its number, from 1)",
                        "archive.txt:1:6: RSL-: found bounds that do not say of what (\"RSL-\", \"RSL+\"), expected to be told"
                                + " whether they hold 95 %: --spread bounds if they do, or --spread none to take Stillstand's"
                                + " default"),
                problems(text, new Told()));
        assertEquals("""
                age_ka,level_m,level_low95_m,level_high95_m
                0.5,0,0,0
                150.5,-119.99,-133.17,-94.96
                """, written(text, new Told().age("age").unit(AgeUnit.KA).spread(SpreadKind.BOUNDS)));
    }

    @Test
    void boundsTurnRoundWithTheirLevel() throws IOException {
        String text = "age_ka;depth_m;min95;max95\n0;0;-1;2\n20;120;110;135\n";
        assertEquals(
                "age_ka,level_m,level_low95_m,level_high95_m\n0,0,-2,1\n20,-120,-135,-110\n",
                written(text, new Told()));
    }

    @Test
    void yearsRepeatedAndUnorderedRowsWithoutHeader() throws IOException {
        String text = """
                A table of somebody's thesis
                125000 6 4
                0 0 1
                20000 -120.50 8
                125000 6 4
                """;
        assertEquals(
                List.of(
                        "archive.txt: found no column that is plainly the age (column 1: 125000 …, column 2: 6 …, column 3: 4"
                                + " …), expected to be told which it is: --age-column NAME (or its number, from 1)",
                        "archive.txt: found no column that is plainly the sea level (column 1: 125000 …, column 2: 6 …, column"
                                + " 3: 4 …), expected to be told which it is: --level-column NAME (or its number, from 1)"),
                problems(text, new Told()));
        assertEquals(
                List.of("archive.txt: found ages whose unit is not ka or years, or not stated, expected to be told it:"
                        + " --age-unit ka, --age-unit years or --age-unit negative-ka"),
                problems(text, new Told().age("1").level("2")));
        Told told = new Told()
                .age("1")
                .level("2")
                .spreads("3")
                .spread(SpreadKind.TWO_SIGMA)
                .unit(AgeUnit.YEARS);
        assertEquals("""
                age_ka,level_m,level_2sigma_m
                0,0,1
                20,-120.5,8
                125,6,4
                """, written(text, told));
    }

    @Test
    void twoLevelsAtOneAgeAreAskedForOrAveraged() throws IOException {
        String text = "age_ka,rsl_m,rsl_1sigma_m\n0,0,1\n20,-120,8\n20,-121,6\n125,6,4\n";
        assertEquals(
                List.of(
                        "archive.txt:4:1: age_ka: found 20 ka a second time, with other values than in line 3, expected one"
                                + " level at one age, or --repeated-ages mean to take their mean"),
                problems(text, new Told()));
        assertEquals("age_ka,level_m,level_1sigma_m\n0,0,1\n20,-120.5,7\n125,6,4\n", written(text, new Told().means()));
    }

    @ParameterizedTest
    @CsvSource(delimiter = '|', quoteCharacter = '`', textBlock = """
            age_ka,level_m/0,0/20,-12o/30,1 | archive.txt:3:2: level_m: found "-12o", expected a number
            age_ka,level_m/x,0/20,-120/30,-90 | archive.txt:2:1: age_ka: found "x", expected a number
            age_ka level_m/0 5%/20 -120 | archive.txt:2:2: level_m: found "5%", expected a number without a percent sign
            age_ka;level_m/0;0/1,200;-120 | archive.txt:3:1: age_ka: found "1,200", expected a number with a decimal point
            age_ka;level_m/0;0/1,200.5;-120 | archive.txt:3:1: age_ka: found "1,200.5", expected a number without thousands separators
            age_ka level_m/0,5 1.5/20.5 -120 | archive.txt:2:1: age_ka: found "0,5", expected a number with a decimal point
            age_ka,level_m/0,0/20,-120,3 | archive.txt:3: found 3 cells, expected 2, as many as there are columns
            age_ka,level_m/0/20 | archive.txt: found no line of numbers that could be a row of a table, expected a table of numbers with at least 2 rows, cells between commas, semicolons, tabs or blanks
            age_ka,level_m/0,0/20,-120/30 | archive.txt:4: found 1 cell, expected 2, as many as there are columns
            age_ka,level_m/0,0/20,NaN | archive.txt: found 1 row with a level, expected at least 2, so that there is a line between them
            age_ka,level_m/0,0/0,0 | archive.txt: found 1 age, expected at least 2, so that there is a line between them
            age_ka,level_m/0,0/NaN,-120 | archive.txt:3:1: age_ka: found "NaN", expected an age
            age_ka,level_m/0,0/-0.05,1/20,-120 | archive.txt:3:1: age_ka: found "-0.05", expected 0 or more (age counts backwards from 1950)
            age_ka,level_m/0,0/20,-999 | archive.txt:3:2: level_m: found "-999", expected a level within 300 m of today's, in metres (NaN or blank where it is missing)
            age_ka,level_m,level_1sigma_m/0,0,1/20,-120,-8 | archive.txt:3:3: level_1sigma_m: found "-8", expected 0 or more
            age_ka,level_m,level_1sigma_m/0,0,1/20,-120,NaN | archive.txt:3:3: level_1sigma_m: found "NaN", expected the spread of the level
            age_ka,level_m,level_low95_m,level_high95_m/0,0,1,2/20,-120,8,8 | archive.txt:2:3: level_low95_m: found "1" and "2" about a level of "0", expected one bound on each side of it, a height as it is and not a distance from it
            age_ma,level_m/0,0/1,-120 | archive.txt:1:1: age_ma: found ages whose unit is not ka or years, or not stated, expected to be told it: --age-unit ka, --age-unit years or --age-unit negative-ka
            age_ka,level_ft/0,0/20,-120 | archive.txt:1:2: level_ft: found a level in "ft", expected one in metres; convert it first
            age_ka,level_m,sigma/0,0,1/20,-120,8 | archive.txt:1:3: sigma: found a spread that may be 1 or 2 sigma, expected to be told which it is: --spread 1sigma or --spread 2sigma, or --spread none to take Stillstand's default
            `` | archive.txt: found an empty file, expected a table of numbers with at least 2 rows, cells between commas, semicolons, tabs or blanks
            """)
    void aBadArchiveIsRefusedWithOneSentence(String text, String message) {
        List<String> messages = problems(text.replace('/', '\n'), new Told());
        assertEquals(message, messages.get(0));
        boolean both = message.contains("level_low95_m"); // its second row is as wrong as its first
        assertEquals(both ? 2 : 1, messages.size(), messages::toString);
    }

    @ParameterizedTest
    @CsvSource(delimiter = '|', textBlock = """
            levl_m | archive.txt:1: found no column "levl_m" (--level-column), expected a header or a number from 1 to 4 (nearest: "level_m")
            9 | archive.txt:1: found no column "9" (--level-column), expected a header or a number from 1 to 4
            note | archive.txt:1: found 2 columns "note" (--level-column), expected the number of the one, from 1
            1 | archive.txt:1:1: age_ka: found one column for both age and level, expected two: --age-column and --level-column
            """)
    void aColumnThatIsNoneIsRefused(String column, String message) {
        String text = "age_ka,level_m,note,note\n0,0,1,1\n20,-120,1,1\n";
        assertEquals(List.of(message), problems(text, new Told().level(column)));
    }

    @Test
    void optionsThatContradictTheColumnsAreRefused() {
        String text = "age_ka,level_m,a,b\n0,0,-1,1\n20,-120,-130,-110\n";
        assertEquals(
                List.of("archive.txt:1:3: a: found one column of bounds, expected two: --spread-column given twice"),
                problems(text, new Told().spreads("a").spread(SpreadKind.BOUNDS)));
        assertEquals(
                List.of(
                        "archive.txt:1:4: b: found two columns of one standard deviation, expected one: --spread-column given"
                                + " once"),
                problems(text, new Told().spreads("a", "b").spread(SpreadKind.ONE_SIGMA)));
        assertEquals(
                List.of("archive.txt:1: found a column chosen twice, expected each column for one thing"),
                problems(text, new Told().spreads("a", "a")));
        assertEquals(
                List.of("archive.txt:3:1: age_ka: found \"20\", expected 0 or less, as --age-unit negative-ka says"),
                problems(text, new Told().spread(SpreadKind.NONE).unit(AgeUnit.NEGATIVE_KA)));
    }

    @Test
    void columnsOfTextAndNumbersInWords() throws IOException {
        String text = "core,\"age, ka\",rsl,two_sigma_m,note\nA-1,0,0,1,\nA-2,20,-120,8,\"deep, old\"\n";
        assertEquals("age_ka,level_m,level_2sigma_m\n0,0,1\n20,-120,8\n", written(text, new Told()));
    }

    @ParameterizedTest
    @CsvSource(delimiter = '|', textBlock = """
            level_1sigma_m | 1
            rsl 2 sigma (m) | 2
            RSL_2sd | 2
            stdev | 1
            err_sig | 0
            sigma esl | 0
            RSL uncertainty | 0
            """)
    void headersThatSayHowManySigmas(String header, int sigmas) {
        String text = "age_ka;rsl;" + header + "\n0;0;1\n20;-120;8\n";
        if (sigmas == 0) {
            assertEquals(
                    List.of(
                            "archive.txt:1:3: " + header
                                    + ": found a spread that may be 1 or 2 sigma, expected to be told"
                                    + " which it is: --spread 1sigma or --spread 2sigma, or --spread none to take Stillstand's default"),
                    problems(text, new Told()));
        } else {
            String meaning =
                    load(text, new Told()).value().orElseThrow().curve().facts().spreadMeaning();
            assertTrue(meaning.startsWith(sigmas == 1 ? "one standard" : "two standard"), meaning);
        }
    }

    @Test
    void aBadFirstRowIsNotTakenForAHeader() {
        Told told = new Told().age("1").level("2").unit(AgeUnit.KA);
        assertEquals(
                List.of("archive.txt:1:1: found \"0o\", expected a number"), problems("0o,0\n20,-120\n30,-90\n", told));
    }

    @Test
    void twoMillionRowsAreRefusedWithTheirNumber() {
        assertEquals(
                List.of("archive.txt: found 2000001 lines of table, expected at most 500000"),
                problems("age_ka,level_m\n" + "0,0\n".repeat(2_000_000), new Told()));
    }

    @Test
    void theEntryIsWhatTheStudyReads() {
        load("age_ka,level_m,level_2sigma_m\n0,0,2\n20,-120,10\n", new Told());
        Loaded<CurvePackage> read =
                CurvePackage.read(study.resolve("curves"), "curves", CurvePackage.shippedStages(), Set.of());
        assertEquals(List.of(), read.problems());
        SeaLevelCurve curve = read.value().orElseThrow().curves().get(0);
        assertEquals("mine", curve.id());
        assertEquals("Somebody (1999)", curve.facts().citation());
        assertEquals(
                "two standard deviations (\"level_2sigma_m\" of the archived table)",
                curve.facts().spreadMeaning());
        assertEquals(5, curve.sigmaLowMetresAt(20), 1e-9);
    }

    @Test
    void theUsersPackageKeepsEveryByteOfItsOwn() throws IOException {
        Path curves = Files.createDirectory(study.resolve("curves"));
        String start =
                "{ \"name\":\"p\" , \"x\": {\"resources\": []},\n\t\"resources\" : [ {\"name\":\"other\",\"path\":\"o.csv\",\n"
                        + "   \"stillstand\":{\"kind\":\"curve\"}, \"z\": 1.50} ";
        String end = "],  \"contributors\":[]}";
        Files.writeString(curves.resolve("datapackage.json"), start + end);
        Files.writeString(curves.resolve("o.csv"), "age_ka,level_m,level_1sigma_m\n0,0,1\n9,0,1\n");
        assertEquals(
                List.of(),
                load("age_ka,level_m,sd\n0,0,2\n20,-120,10\n", new Told()).problems());
        String now = Files.readString(curves.resolve("datapackage.json"));
        assertTrue(now.startsWith(start.stripTrailing() + ",\n    {\n"), now);
        assertTrue(now.endsWith(end), now);
        assertEquals(
                List.of("other", "mine"),
                CurvePackage.read(curves, "curves", CurvePackage.shippedStages(), Set.of())
                        .value()
                        .orElseThrow()
                        .curves()
                        .stream()
                        .map(SeaLevelCurve::id)
                        .toList());
        try (Stream<Path> files = Files.list(curves)) {
            assertEquals(
                    List.of("datapackage.json", "mine.csv", "o.csv"),
                    files.map(file -> String.valueOf(file.getFileName()))
                            .sorted()
                            .toList());
        }
    }

    private List<String> refused(String id) throws IOException {
        Path archive = Files.writeString(folder.resolve("archive.txt"), "age_ka,level_m\n0,0\n20,-120\n");
        return CurveImport.into(archive, study, id, ImportChoices.NONE, Optional.empty(), LIBRARY).problems().stream()
                .map(problem -> problem.message().replace(folder + "/", ""))
                .toList();
    }

    @Test
    void whatExistsIsNotOverwritten() throws IOException {
        assertEquals(List.of(), refused("mine"));
        String table = Files.readString(study.resolve("curves/mine.csv"));
        String entry = Files.readString(study.resolve("curves/datapackage.json"));
        assertEquals(
                List.of(
                        "curves/datapackage.json: found a curve or table \"mine\" already, expected another --id, or that one"
                                + " taken out first"),
                refused("mine"));
        Files.writeString(study.resolve("curves/loose.csv"), "mine");
        assertEquals(
                List.of("curves/loose.csv: found a file already, expected another --id, or that file moved away first"),
                refused("loose"));
        assertEquals(
                List.of(
                        "--id: found \"waelbroeck-2002\", which comes with Stillstand, expected an id that no curve or table"
                                + " has"),
                refused("waelbroeck-2002"));
        assertEquals(
                List.of(
                        "--id: found \"../Mine\", expected lower-case words joined by hyphens, such as \"author-2020\""),
                refused("../Mine"));
        assertEquals("mine", Files.readString(study.resolve("curves/loose.csv")));
        assertEquals(table, Files.readString(study.resolve("curves/mine.csv")));
        assertEquals(entry, Files.readString(study.resolve("curves/datapackage.json")));
    }

    @Test
    void aPackageThatCannotBeReadIsLeftAlone() throws IOException {
        Path curves = Files.createDirectory(study.resolve("curves"));
        Files.writeString(curves.resolve("datapackage.json"), "{\"resources\": [}", StandardCharsets.UTF_8);
        assertEquals(
                List.of("curves/datapackage.json:1:16: found text that is not json here, expected json"),
                refused("mine"));
        Files.writeString(curves.resolve("datapackage.json"), "{\"resources\": 3}", StandardCharsets.UTF_8);
        assertEquals(
                List.of("curves/datapackage.json:1:15: resources: found 3, expected a list of resources"),
                refused("mine"));
        assertFalse(Files.exists(curves.resolve("mine.csv")));
    }

    @Test
    void onlyAStudyIsImportedInto() throws IOException {
        Files.delete(study.resolve("study.json"));
        assertEquals(
                List.of("study: found a folder without study.json, expected the folder of a study"), refused("mine"));
    }

    @Test
    void aCurveWithoutSpreadIsToldOf() {
        Loaded<CurveImport.Imported> loaded = load("age_ka,level_m\n0,0\n20,-120\n", new Told());
        assertEquals(
                List.of(
                        "curves/mine.csv: curve \"mine\" has no spread that can be used; 6.0 m in interglacials and 12.0 m"
                                + " elsewhere are supposed (1 sigma)"),
                loaded.warnings().stream().map(InputWarning::placed).toList());
    }
}
