package stillstand.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import stillstand.comparison.SiteComparison;
import stillstand.comparison.SiteGroup;
import stillstand.comparison.SiteMotion;
import stillstand.comparison.TerraceTilt;
import stillstand.comparison.Tilt;
import stillstand.study.StudyResult;
import tools.jackson.databind.JsonNode;
import tools.jackson.databind.json.JsonMapper;

/** Several sites through files and command, against sums done by hand. */
class SitesStudyTest {
    private static final String LEVELS = "site,level,elevation_m,elevation_1sigma_m,highstand";
    private static final double AGE_KA = 122.5;

    @TempDir
    Path folder;

    private StudyOnDisk study(String sitesHeader, String... sites) throws IOException {
        List<String> lines = new ArrayList<>(List.of(sitesHeader));
        lines.addAll(List.of(sites));
        return new StudyOnDisk(folder)
                .with("study.json", "{\"title\": \"Sites\"}")
                .with("sites.csv", lines.toArray(String[]::new));
    }

    private static double sd(SiteComparison pair) {
        return pair.difference().sd().orElseThrow();
    }

    /** Two heights of 1 m; local sea level (2 m at an interglacial) is shared on one coast and not between two. */
    @Test
    void errorsAreSharedOnlyAsFarAsTheyAre() throws IOException {
        StudyResult result = study("site,coast", "A,lee", "B,lee", "C,windward")
                .with(
                        "study.json",
                        "{\"title\": \"Sites\", \"comparison\": {\"pairs\": [[\"A\", \"C\"], [\"A\", \"B\"]]}}")
                .with("levels.csv", LEVELS, "A,T1,40,1,5e", "B,T1,30,1,5e", "C,T1,30,1,5e")
                .run();
        assertEquals(2, result.comparison().size(), "a pair of one coast that is asked for too is compared once");
        SiteComparison oneCoast = result.comparison().get(0);
        SiteComparison twoCoasts = result.comparison().get(1);
        // the age (3.3 ka) moves a difference of 10 / 122.5 by its own share
        double byAge = 10 / AGE_KA * 3.3 / AGE_KA;
        assertEquals(Math.hypot(Math.sqrt(2) / AGE_KA, byAge), sd(oneCoast), 2e-4);
        assertEquals(Math.hypot(Math.sqrt(2 * (1 + 4)) / AGE_KA, byAge), sd(twoCoasts), 4e-4);
        assertEquals(10 / AGE_KA, oneCoast.difference().median(), 2e-4);
        assertEquals(SiteComparison.ONE_COAST, oneCoast.sharedErrors());
        assertEquals(SiteComparison.TWO_COASTS, twoCoasts.sharedErrors());
        assertTrue(oneCoast.independent().difference().sd().orElseThrow() > 2 * sd(oneCoast));
        assertTrue(
                oneCoast.correlation().orElseThrow() > twoCoasts.correlation().orElseThrow());
    }

    @Test
    void sitesWithoutACoastAreNotCompared() throws IOException {
        StudyResult result = study("site,latitude,longitude", "A,5,5", "B,5,6")
                .with("levels.csv", LEVELS, "A,T1,40,1,5e", "B,T1,30,1,5e")
                .run();
        assertEquals(List.of(), result.comparison());
        assertEquals(List.of(), result.siteGroups());
        assertEquals(2, result.siteMotion().size());
        assertFalse(Files.exists(folder.resolve("results/comparison.csv")));
        JsonNode map = new JsonMapper().readTree(Files.readString(folder.resolve("results/sites.geojson")));
        assertEquals("FeatureCollection", map.path("type").stringValue());
        assertEquals(2, map.path("features").size());
        assertEquals("[6.0,5.0]", map.at("/features/1/geometry/coordinates").toString());
        assertEquals("up", map.at("/features/1/properties/motion").stringValue());
    }

    /** Heights of 7.5 m stand where the sea stood; 49 mm/kyr is 6 m in 122.5 ka. */
    @Test
    void upStableAndDown() throws IOException {
        StudyResult result = study("site", "A", "B", "C")
                .with("study.json", "{\"title\": \"Sites\", \"comparison\": {\"stable_within_m_per_kyr\": 0.1}}")
                .with("levels.csv", LEVELS, "A,T1,57.5,1,5e", "B,T1,7.5,1,5e", "C,T1,-22.5,1,5e")
                .run();
        assertEquals(
                List.of(SiteMotion.UP, SiteMotion.STABLE, SiteMotion.DOWN),
                result.siteMotion().stream().map(SiteMotion::motion).toList());
        for (SiteMotion site : result.siteMotion()) {
            assertEquals(1, site.up() + site.stable() + site.down(), 1e-9);
        }
        // rate 0 +- sqrt(1 + 1.5^2 + 3^2 + 2^2) / 122.5 m/kyr
        double sigma = Math.sqrt(1 + 2.25 + 9 + 4) / AGE_KA;
        assertEquals(0.0329, sigma, 1e-4);
        assertEquals(0.9976, result.siteMotion().get(1).stable(), 0.002);
        assertTrue(result.ledger().stream()
                .anyMatch(line -> line.assumption().equals("a site is stable where its rate is within")
                        && line.value().equals("0.100 m/kyr of 0")));
    }

    /** 0.2, 0.3 and 0.4 m/kyr 10 km apart: exactly 0.01 m/kyr per km; areas 1, 1 and 2. */
    @Test
    void tiltsPoolsAndMeansOverAreas() throws IOException {
        StudyResult result = study(
                        "site,latitude,longitude,coast,distance_along_coast_km,area_km2",
                        "A,0,0,lee,0,1",
                        "B,0,0.08993,lee,10,1",
                        "C,0,0.17986,lee,20,2")
                .with("levels.csv", LEVELS, "A,T1,32,0.5,5e", "B,T1,44.25,0.5,5e", "C,T1,56.5,0.5,5e")
                .run();
        SiteGroup group = result.siteGroups().get(0);
        Tilt.Line shared = group.tilt().orElseThrow().sharedErrors();
        Tilt.Line independent = group.tilt().orElseThrow().independent();
        assertEquals(0.01, shared.slope().value(), 2e-4);
        assertEquals("m/kyr per km", shared.slope().unit());
        // the ends' heights and the age alone tilt it: sqrt 2 x 0.5 / 122.5 over 20 km
        assertEquals(
                Math.hypot(Math.sqrt(2) * 0.5 / AGE_KA / 20, 0.01 * 3.3 / AGE_KA),
                shared.slope().sd(),
                3e-5);
        assertTrue(independent.slope().sd() > 3 * shared.slope().sd());
        assertTrue(group.plane().isEmpty(), "three sites on the equator make no plane");
        assertEquals(0.325, group.areaMean().orElseThrow().median(), 0.002);
        assertEquals(3, group.pooled().orElseThrow().sites().size());
        assertEquals(0.3, group.pooled().orElseThrow().mean().median(), 0.02);
        assertTrue(Files.readString(folder.resolve("results/comparison.csv")).startsWith("a,b,a_level,b_level,"));
    }

    @Test
    void planeOverTheMap() throws IOException {
        StudyResult result = study(
                        "site,latitude,longitude,coast",
                        "A,10,179.95,lee",
                        "B,10,-179.95,lee",
                        "C,10.1,179.95,lee",
                        "D,10.1,180.05,lee")
                .with(
                        "levels.csv",
                        LEVELS,
                        "A,T1,32,0.5,5e",
                        "B,T1,32,0.5,5e",
                        "C,T1,44.25,0.5,5e",
                        "D,T1,44.25,0.5,5e")
                .run();
        // 0.1 m/kyr in 0.1 degrees to the north, across the date line
        assertEquals(
                0.1 / 11.12,
                result.siteGroups()
                        .get(0)
                        .plane()
                        .orElseThrow()
                        .sharedErrors()
                        .north()
                        .value(),
                1e-4);
        double to =
                result.siteGroups().get(0).plane().orElseThrow().sharedErrors().steepestToDegrees();
        assertTrue(to < 8 || to > 352, "toward " + to);
    }

    /** A tilt of half a metre a km, 60 m at the origin, in a datum that is off by as much for all points. */
    @Test
    void tiltOfATerraceByItsPoints() throws IOException {
        StudyResult result = study("site,datum_offset_m,datum_offset_1sigma_m", "A,0,2")
                .with("levels.csv", LEVELS, "A,T1,60,1,5e")
                .with(
                        "points.csv",
                        "site,level,distance_km,elevation_m,elevation_1sigma_m",
                        "A,T1,0,60,0.2",
                        "A,T1,1,60.5,0.2",
                        "A,T1,2,61,0.2",
                        "A,T1,3,61.5,0.2")
                .run();
        TerraceTilt tilt = result.terraceTilts().get(0);
        Tilt.Line shared = tilt.along().orElseThrow().sharedErrors();
        assertEquals(4, tilt.points());
        assertEquals(0.5, shared.slope().value(), 1e-9);
        // 0.2 over the root of the sum of squares of the distances about their mean (5 km^2)
        assertEquals(0.2 / Math.sqrt(5), shared.slope().sd(), 1e-9);
        assertEquals(60, shared.atOrigin().value(), 1e-9);
        // the datum moves all: 2 m beside sqrt(1/4 + 1.5^2 / 5) x 0.2
        assertEquals(
                Math.hypot(2, 0.2 * Math.sqrt(0.25 + 2.25 / 5)),
                shared.atOrigin().sd(),
                1e-9);
        assertEquals(0.5 / AGE_KA, tilt.rate().orElseThrow().value(), 1e-5);
    }

    @Test
    void sitesOfALargeGroupAreComparedWithTheirNeighbours() throws IOException {
        List<String> sites = new ArrayList<>();
        List<String> levels = new ArrayList<>(List.of(LEVELS));
        for (int s = 0; s < 23; s++) {
            sites.add("S" + s + ",lee," + (s * 7 % 23));
            levels.add("S" + s + ",T1," + (20 + s) + ",1,5e");
        }
        StudyResult result = study("site,coast,distance_along_coast_km", sites.toArray(String[]::new))
                .with("levels.csv", levels.toArray(String[]::new))
                .run();
        assertEquals(22, result.comparison().size());
        assertEquals("S0", result.comparison().get(0).a());
        assertEquals("S10", result.comparison().get(0).b(), "10 x 7 is 1 more than a multiple of 23");
        assertTrue(result.siteGroups().get(0).tilt().isPresent());
        assertTrue(result.ledger().stream()
                .anyMatch(line ->
                        line.assumption().equals("sites of a large group are compared with their neighbours only")));
    }

    /** A flight beside a site of one level, whatever the number of threads. */
    @Test
    @Tag("slow")
    void aFlightBesideALevel() throws IOException {
        StudyOnDisk study = study(
                        "site,coast,surveyed_from_m,surveyed_to_m", "Stair,lee,2,120", "Step,lee,,", "Low,lee,2,60")
                .with(
                        "levels.csv",
                        LEVELS,
                        "Stair,T1,24,1,",
                        "Stair,T2,57,1,5e",
                        "Step,T1,56,1,5e",
                        "Low,T1,20,1,5e",
                        "Low,T2,36,1.5,");
        StudyResult result = study.run("--threads", "1", "--draws", "16384");
        assertEquals(3, result.comparison().size());
        SiteComparison pair = result.comparison().get(0);
        assertEquals("Stair", pair.a());
        assertTrue(pair.aLevel().isEmpty());
        assertEquals("T1", pair.bLevel().orElseThrow());
        // both stand on 5e, 1 m apart; what the flight says of 5e besides can move it a little
        assertEquals(1 / AGE_KA, pair.difference().median(), 0.012);
        assertTrue(sd(pair) < 0.7 * pair.independent().difference().sd().orElseThrow());
        assertTrue(pair.effectiveFraction().orElseThrow() > 0.05);
        StudyResult again = study.run("--threads", "2", "--draws", "16384");
        assertEquals(result.comparison(), again.comparison());
        assertEquals(result.siteGroups(), again.siteGroups());
    }

    /** Under two curves a difference is the mixture of what each makes of it; sea level cancels at one highstand under both. */
    @Test
    void severalCurves() throws IOException {
        String one = "{\"id\": \"spratt-lisiecki-2016\", \"weight\": 3}";
        String other = "{\"id\": \"waelbroeck-2002\", \"weight\": 1}";
        double[] medians = new double[3];
        List<String> choices = List.of(one, other, one + ", " + other);
        for (int k = 0; k < 3; k++) {
            StudyResult result = study("site,coast", "A,lee", "B,lee")
                    .with(
                            "study.json",
                            "{\"title\": \"Sites\", \"sea_level\": {\"curves\": [" + choices.get(k)
                                    + "], \"highstands\": {\"overrides\": \"none\"}}}")
                    .with("levels.csv", LEVELS, "A,T1,70,1,5a", "B,T1,30,1,5e")
                    .run();
            medians[k] = result.comparison().get(0).difference().mean().orElseThrow();
        }
        assertTrue(Math.abs(medians[0] - medians[1]) > 0.01, medians[0] + " and " + medians[1]);
        assertEquals(0.75 * medians[0] + 0.25 * medians[1], medians[2], 0.005);
    }
}
