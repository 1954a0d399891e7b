package stillstand.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static stillstand.cli.StudyOnDisk.level;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Locale;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import stillstand.comparison.SiteComparison;
import stillstand.comparison.SiteMotion;
import stillstand.study.StudyResult;
import stillstand.uplift.LevelAnswer;
import stillstand.uplift.Rate;

/** The invented island of {@code demo/}, run as the README says, against sums done by hand from its tables. */
class DemoTest {
    private static final Path DEMO = Path.of("demo/velloe-island");

    @TempDir
    Path folder;

    private StudyOnDisk copied() throws IOException {
        try (Stream<Path> files = Files.list(DEMO)) {
            for (Path file : files.filter(Files::isRegularFile).toList()) {
                Files.copy(file, folder.resolve(file.getFileName()));
            }
        }
        return new StudyOnDisk(folder);
    }

    /**
     * A level pinned to a highstand, by hand.
     *
     * @param rise height of the former sea less the level of the highstand, m
     * @param variances of all heights, m^2
     */
    private static void assertByHand(
            LevelAnswer answer, double rise, double ageKa, double ageSigmaKa, double... variances) {
        double rate = rise / ageKa;
        double variance = Math.pow(rate * ageSigmaKa, 2);
        for (double each : variances) {
            variance += each;
        }
        double sigma = Math.sqrt(variance) / ageKa;
        assertEquals(rate, answer.firstOrder().orElseThrow().rate(), 1e-9, answer.level());
        assertEquals(sigma, answer.firstOrder().orElseThrow().sigma(), 1e-6, answer.level());
        Rate drawn = answer.rate().orElseThrow();
        assertEquals(rate, drawn.median(), 0.05 * sigma, answer.level());
        assertEquals(sigma, drawn.sd().orElseThrow(), 0.03 * sigma, answer.level());
    }

    @Test
    void islandBehavesAsItsTablesSay() throws IOException {
        StudyOnDisk demo = copied();
        StudyResult result = demo.run("--draws", "65536");
        assertEquals(23, result.levels().size());
        assertEquals(List.of(), result.failures());

        // 7a: -0.5 +- 3 m, 200 +- 3 ka; offset 3 m, local 2 m; a reef terrace stands 3 m below its sea within 4.13 m
        assertByHand(level(result, "G5"), 247.5 - 0.4 + 3 + 0.5, 200, 3, 4, 0.01, Math.pow(4.13 / 2, 2), 9, 9, 4);
        // 5e: 7.5 +- 1.5 m, 122.5 +- 3.3 ka
        assertByHand(
                level(result, "Q3"), -25.7 - 0.2 + 3 - 7.5, 122.5, 3.3, 0.64, 0.04, Math.pow(4.13 / 2, 2), 2.25, 9, 4);
        // 11c: 9.5 +- 3 m, 405 +- 5 ka; a shoreline angle stands 0.02 m below its sea within 1.67 m
        assertByHand(level(result, "S5"), 10.6 - 0.2 + 0.02 - 9.5, 405, 5, 0.64, 0.01, Math.pow(1.67 / 2, 2), 9, 9, 4);

        assertTrue(level(result, "S2").bound().isPresent(), "a stable coast gets a bound");
        assertTrue(level(result, "Q5").bound().isEmpty());
        assertEquals("5c", level(result, "G3").stages().get(0).highstand());
        assertEquals("5e", level(result, "G4").stages().get(0).highstand());
        assertTrue(
                level(result, "G4").stages().get(0).probability() > 0.95,
                "one reworked coral of three decides nothing");
        assertTrue(level(result, "G4").agreement().orElseThrow().p() < 1e-6, "but the disagreement is shown");
        assertWaiting(result, demo.out());
        assertCompared(result, demo.out());
    }

    private static void assertWaiting(StudyResult result, String terminal) {
        assertEquals(
                List.of("G6", "L3", "S3"),
                result.waiting().stream().map(StudyResult.Waiting::level).toList());
        assertTrue(whyNoRate(result, "L2", "VL-03").startsWith("the curve is too steep at this age to give a rate"));
        assertEquals("not where it grew", whyNoRate(result, "G4", "VG-23"));
        assertEquals("set aside: calcite in thin section", whyNoRate(result, "S2", "VS-02"));
        assertTrue(terminal.contains("not a hazard assessment"), terminal);
        assertTrue(terminal.contains("S2 moves slower than"), terminal);
    }

    /** The north against the south, and what sites share: their difference is known better than were it not shared. */
    private static void assertCompared(StudyResult result, String terminal) {
        assertEquals(
                List.of(
                        "Gannet Steps less Lantern Bay",
                        "Quay Shoals less Still Cove",
                        "Gannet Steps less Still Cove",
                        "Lantern Bay less Still Cove"),
                result.comparison().stream()
                        .map(pair -> pair.a() + " less " + pair.b())
                        .toList());
        for (SiteComparison pair : result.comparison()) {
            assertTrue(
                    pair.difference().interval95().width()
                            < 1.05
                                    * pair.independent()
                                            .difference()
                                            .interval95()
                                            .width(),
                    pair.a() + " less " + pair.b());
        }
        assertEquals(
                List.of("up", "up", "down", "stable"),
                result.siteMotion().stream().map(SiteMotion::motion).toList());
        assertEquals(1, result.terraceTilts().size());
        assertTrue(terminal.contains("Gannet Steps less Still Cove"), terminal);
        assertTrue(terminal.contains("Lantern Bay / L2, tilt by 6 points: −0."), terminal);
    }

    private static String whyNoRate(StudyResult result, String level, String sample) {
        return level(result, level).samples().stream()
                .filter(answer -> answer.sample().equals(sample))
                .flatMap(answer -> answer.whyNoRate().stream())
                .findFirst()
                .orElse("");
    }

    @Test
    void demoSaysThatItIsInvented() throws IOException {
        for (String file : List.of("README.md", "study.json", "sites.csv", "levels.csv", "samples.csv", "points.csv")) {
            assertTrue(
                    Files.readString(DEMO.resolve(file))
                            .toLowerCase(Locale.ROOT)
                            .contains("invented"),
                    file);
        }
    }
}
