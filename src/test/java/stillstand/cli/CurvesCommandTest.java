package stillstand.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.io.PrintStream;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Clock;
import java.util.List;
import java.util.Locale;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import stillstand.files.ResultsJson;
import stillstand.files.ShippedLibrary;
import stillstand.files.StudyFolder;
import stillstand.ledger.Assumption;
import stillstand.ledger.InputWarning;
import stillstand.study.StudyResult;
import stillstand.study.StudyRunner;
import stillstand.uplift.Rate;

/** Curves by command, from the folder to the results; the coasts and the imported curves are invented. */
class CurvesCommandTest {
    private static final String FROM_CURVE =
            "{\"title\": \"A stable coast\", \"sea_level\": {\"highstands\": {\"from\": \"curve\"%s}}}";

    private final ByteArrayOutputStream out = new ByteArrayOutputStream();
    private final ByteArrayOutputStream err = new ByteArrayOutputStream();

    @TempDir
    Path folder;

    private Path study;

    @BeforeEach
    void writeStudy() throws IOException {
        study = Files.createDirectory(folder.resolve("coast"));
        write("study.json", String.format(Locale.ROOT, FROM_CURVE, ""));
        write("sites.csv", "site,latitude,longitude\nPoint,5,5\n");
        write("levels.csv", "site,level,elevation_m,elevation_1sigma_m,highstand\nPoint,T1,6,1,5e\n");
    }

    private Path write(String name, String text) throws IOException {
        Path file = study.resolve(name);
        Files.createDirectories(file.getParent());
        return Files.writeString(file, text);
    }

    private int execute(String... arguments) {
        out.reset();
        err.reset();
        return Commands.execute(
                new Workshop(
                        new PrintStream(out, true, StandardCharsets.UTF_8),
                        new PrintStream(err, true, StandardCharsets.UTF_8),
                        Clock.systemUTC(),
                        (place, changes) -> StudyFolder.read(place, ShippedLibrary.load(), changes),
                        StudyRunner::run),
                arguments);
    }

    private String out() {
        return out.toString(StandardCharsets.UTF_8).replace(folder.toString(), "…");
    }

    private String err() {
        return err.toString(StandardCharsets.UTF_8).replace(folder.toString(), "…");
    }

    private StudyResult result(String... more) throws IOException {
        String[] arguments = new String[more.length + 4];
        arguments[0] = "run";
        arguments[1] = study.toString();
        arguments[2] = "--quiet";
        arguments[3] = "--figures=none";
        System.arraycopy(more, 0, arguments, 4, more.length);
        assertEquals(0, execute(arguments), err());
        return ResultsJson.read(Files.readString(study.resolve("results/results.json")))
                .value()
                .orElseThrow();
    }

    private static Rate rate(StudyResult result) {
        return result.levels().get(0).rate().orElseThrow();
    }

    private static String firstOrder(StudyResult result) {
        return result.levels().get(0).firstOrder().stream()
                .map(each -> String.format(Locale.ROOT, "%.3f ± %.3f", each.rate(), each.sigma()))
                .findFirst()
                .orElse("");
    }

    @Test
    void curvesAreListed() {
        assertEquals(0, execute("curves"), err());
        assertTrue(out().startsWith("""
                spratt-lisiecki-2016: 0 to 798 ka, usable from 10 ka
                  Spread: 2.5 and 97.5 percentiles of the bootstrap, not symmetrical about the level
                  Zero: scaled so that 5 ka reads 0 m and 24 ka reads -130 m; 0 ka reads +8.49 m
                  Ages: ka before 1950, related to the LR04 chronology
                waelbroeck-2002: 0.5 to 429.5 ka, usable from 0.5 ka
                  Spread, guessed at every age: 10 m as one standard deviation, a default: the published band (about
                    13 m either side) does not say its confidence
                """), out());
        assertTrue(out().contains("\nHighstand tables: independent-highstands (5 stages).\n"), out());
        assertTrue(out().lines().allMatch(line -> line.codePointCount(0, line.length()) <= 100), out());
    }

    @Test
    void oneCurveIsShownWithItsPicksAndOverrides() {
        assertEquals(0, execute("curves", "show", "waelbroeck-2002"), err());
        assertTrue(out().startsWith("waelbroeck-2002\n  Source: Waelbroeck C. et al. (2002)"), out());
        assertTrue(out().contains("  Caveat: The published band is 0 m wide in its first row"), out());
        assertTrue(out().contains("Every band of a pick above is a guess"), out());
        List<String> rows = out().lines().map(String::strip).toList();
        // peak and overriding level as published: 123.9 ka, +6.3 m; 5c by Creveling et al. (2017): -9.4 ± 5.3 m
        String last =
                rows.stream().filter(row -> row.startsWith("5e ")).findFirst().orElseThrow();
        assertTrue(last.matches("5e +interglacial +123\\.9 +6\\.3 .* 122\\.5 ± 3\\.3 +7\\.5 ± 3\\.9 +\\*"), last);
        String holocene =
                rows.stream().filter(row -> row.startsWith("1 ")).findFirst().orElseThrow();
        assertTrue(holocene.matches("1 +interglacial +5\\.3 ± 1\\.3 +0\\.7 ± 0\\.7 +†"), holocene);
        assertTrue(out().lines().allMatch(line -> line.codePointCount(0, line.length()) <= 100), out());
    }

    @Test
    void aCurveWithoutHighstandsSaysSo() {
        assertEquals(0, execute("curves", "show", "lambeck-2014"), err());
        assertTrue(
                out().endsWith("It shows no highstand in any stage window: name a highstand table beside it.\n"),
                out());
    }

    @Test
    void anUnknownCurveIsWrongUsage() {
        assertEquals(2, execute("curves", "show", "waelbroek-2002"));
        assertEquals("""
                there is no curve "waelbroek-2002"; did you mean "waelbroeck-2002"? (a study's own need --in STUDY)
                See stillstand curves show --help
                """, err());
    }

    @Test
    void anArchivedCurveIsImportedShownAndRun() throws IOException {
        Path archive = Files.writeString(folder.resolve("other.txt"), """
                # an invented curve
                age_ka rsl_m rsl_1sigma_m
                0 0 1
                20 -125 5
                110 -45 5
                124 4 2
                138 -130 6
                """);
        assertEquals(
                0,
                execute(
                        "curves",
                        "import",
                        archive.toString(),
                        "--into",
                        study.toString(),
                        "--id",
                        "other-2020",
                        "--citation",
                        "Somebody (2020) \"A curve\""),
                err());
        assertEquals("""
                5 rows, blanks between cells, column names in line 2.
                Age: "age_ka", in ka.
                Level: "rsl_m", in metres, up positive.
                Spread: one standard deviation ("rsl_1sigma_m" of the archived table).
                Written to …/coast: curves/other-2020.csv (5 rows, 0 to 138 ka) and its entry in curves/datapackage.json.
                To that entry belong, too: zero, age_scale, usable_from_ka and caveats.
                Look at it: stillstand curves show other-2020 --in …/coast
                Use it: stillstand run …/coast --curve other-2020
                """, out());
        assertEquals(0, execute("curves", "--in", study.toString()), err());
        assertTrue(out().contains("\nother-2020: 0 to 138 ka, usable from 0 ka\n"), out());
        assertEquals(0, execute("curves", "show", "other-2020", "--in", study.toString()), err());
        assertTrue(out().contains("  Source: Somebody (2020) \"A curve\"\n"), out());
        StudyResult result = result("--curve", "other-2020");
        assertEquals("other-2020", result.seaLevel().curves().get(0).id());
        assertTrue(
                result.ledger()
                        .contains(new Assumption(
                                "sea_level.curves is replaced", "other-2020", "the command line", "all")),
                () -> result.ledger().toString());
        assertFalse(
                result.ledger().stream().anyMatch(line -> line.assumption().equals("sea_level.curves is not stated")));
    }

    @Test
    void anImportThatLeavesAQuestionWritesNothing() throws IOException {
        Path archive = Files.writeString(folder.resolve("other.txt"), "age,rsl,err\n0,0,1\n20,-125,5\n");
        assertEquals(
                1, execute("curves", "import", archive.toString(), "--into", study.toString(), "--id", "other-2020"));
        assertEquals("""
                2 problems:
                …/other.txt:1:1: age: found ages whose unit is not ka or years, or not stated, expected to be told it: --age-unit ka, --age-unit years or --age-unit negative-ka
                …/other.txt:1:3: err: found a spread that may be 1 or 2 sigma, expected to be told which it is: --spread 1sigma or --spread 2sigma, or --spread none to take Stillstand's default
                """, err());
        assertFalse(Files.exists(study.resolve("curves")));
        assertEquals(
                2,
                execute(
                        "curves",
                        "import",
                        archive.toString(),
                        "--into",
                        study.toString(),
                        "--id",
                        "other-2020",
                        "--age-unit",
                        "centuries"));
        assertEquals(
                "--age-unit must be ka or years or negative-ka but is \"centuries\"\nSee stillstand curves import --help\n",
                err());
    }

    @Test
    void aStableCoastComesOutAsStable() throws IOException {
        StudyResult withOverrides = result();
        Rate usual = rate(withOverrides);
        assertTrue(
                usual.shortest68().low() < 0 && usual.shortest68().high() > 0,
                () -> "0 lies outside " + usual.shortest68());
        assertTrue(usual.interval68().low() < 0 && usual.interval68().high() > 0);
        write("study.json", String.format(Locale.ROOT, FROM_CURVE, ", \"overrides\": \"none\""));
        StudyResult withoutOverrides = result();
        Rate without = rate(withoutOverrides);
        // the curve's own spread at its peaks is several times that of the corals: README of sea-level-curves
        assertTrue(
                without.shortest68().width() > 2 * usual.shortest68().width(),
                () -> without.shortest68() + " against " + usual.shortest68());
        // the two rows of that README
        assertEquals("-0.012 ± 0.033", firstOrder(withOverrides));
        assertEquals("0.037 ± 0.074", firstOrder(withoutOverrides));
    }

    @Test
    void aCurveOfTheCommandLineReplacesTheStudys() throws IOException {
        write(
                "study.json",
                "{\"title\": \"x\", \"sea_level\": {\"curves\": [{\"id\": \"spratt-lisiecki-2016\"}], \"highstands\": {\"overrides\": \"none\"}}}");
        double spratt = rate(result()).median();
        StudyResult other = result("--curve", "bintanja-vandewal-2008");
        assertEquals("bintanja-vandewal-2008", other.seaLevel().curves().get(0).id());
        assertEquals(1, other.seaLevel().curves().size());
        // by hand from the picks: (6 - 0.3) / 124 against (6 - 3.1) / 121, the latter with a band skewed downward
        assertTrue(rate(other).median() > 0.03, () -> rate(other).toString());
        assertTrue(Math.abs(rate(other).median() - spratt) > 1e-4);
    }

    @Test
    void aLocalCurveStaysAndSaysSo() throws IOException {
        write("sites.csv", "site,latitude,longitude,local_curve\nPoint,5,5,spratt-lisiecki-2016\n");
        double before = rate(result()).median();
        StudyResult after = result("--curve", "waelbroeck-2002");
        assertEquals(before, rate(after).median());
        assertTrue(
                after.warnings()
                        .contains(new InputWarning(
                                "sites.csv", 2, 4, "the site keeps this curve, whatever the command line says")),
                () -> after.warnings().toString());
    }

    @Test
    void aWrongCurveOfTheCommandLineIsNotBlamedOnTheFile() throws IOException {
        write("study.json", "{\"title\": \"x\", \"sea_level\": {\"curves\": [{\"id\": \"spratt-lisiecki-2016\"}]}}");
        assertEquals(1, execute("run", study.toString(), "--curve", "waelbroek-2002"));
        assertEquals(
                "1 problem:\ncommand line: sea_level.curves: found \"waelbroek-2002\", expected the id of a curve (nearest:"
                        + " \"waelbroeck-2002\")\n",
                err());
        assertEquals(1, execute("run", study.toString(), "--curve", "waelbroeck-2002", "--curve", "waelbroeck-2002"));
        assertTrue(
                err().contains(
                                "command line: sea_level.curves: found \"waelbroeck-2002\" a second time, expected each curve once\n"),
                err());
        assertFalse(Files.exists(study.resolve("results")));
    }

    @Test
    void whereHighstandsComeFromATableACurveSaysWhatItLeaves() throws IOException {
        write("study.json", """
                {"title": "x", "sea_level": {"highstands": {"from": "table", "table": "independent-highstands"}}}
                """);
        double before = rate(result()).median();
        StudyResult after = result("--curve", "waelbroeck-2002");
        assertEquals(before, rate(after).median());
        String left = "levels tied to highstands keep those of table \"independent-highstands\"";
        assertTrue(
                after.warnings()
                        .contains(new InputWarning(
                                "command line",
                                0,
                                0,
                                "sea_level.curves: a curve is read only where levels and corals use their own ages; "
                                        + left)),
                () -> after.warnings().toString());
        assertTrue(after.ledger()
                .contains(new Assumption(
                        "a curve from the command line does not change pinned levels",
                        left,
                        "the study takes its highstands from a table",
                        "all")));
    }

    @Test
    void aPinToAStageThatTheCurveLacksIsNamed() throws IOException {
        write("levels.csv", "site,level,elevation_m,elevation_1sigma_m,highstand\nPoint,T1,6,1,9c\n");
        assertEquals(1, execute("run", study.toString(), "--curve", "bintanja-vandewal-2008"));
        assertTrue(
                err().startsWith("1 problem:\nlevels.csv:2:5: highstand: found \"9c\", expected a highstand that"
                        + " \"bintanja-vandewal-2008\" has (1, 3c, 5a, 5c, 5e, "),
                err());
    }
}
