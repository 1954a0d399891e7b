package stillstand.study;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import org.junit.jupiter.api.Test;
import stillstand.comparison.ComparisonRules;
import stillstand.comparison.ComparisonRules.Pair;
import stillstand.files.ShippedLibrary;
import stillstand.files.StudyJson;
import stillstand.ledger.InputProblem;
import stillstand.ledger.InputWarning;
import stillstand.ledger.Loaded;

/** What keeps sites from being compared: whole messages. */
class ComparisonCheckTest {
    private static final Library LIBRARY = ShippedLibrary.load();
    private static final Table LEVELS = Grid.table(
            "levels.csv",
            "site,level,elevation_m,elevation_1sigma_m,highstand",
            "North,T1,60,1,5e",
            "South,T1,30,1,5e",
            "East,T1,20,1,5e");

    private static StatedSettings settings(Pair... pairs) {
        StudySettings plain = StudyJson.defaults("A test");
        return new StatedSettings(
                "study.json",
                new StudySettings(
                        plain.title(),
                        plain.note(),
                        plain.seed(),
                        plain.draws(),
                        plain.seaLevel(),
                        plain.rate(),
                        plain.matching(),
                        plain.indicativeRange(),
                        plain.screening(),
                        plain.leverage(),
                        new ComparisonRules(0.05, 0.1, List.of(pairs))),
                List.of(),
                Map.of(
                        "comparison", new StatedSettings.Place(2, 17),
                        "comparison.pairs[0][0]", new StatedSettings.Place(3, 15),
                        "comparison.pairs[0][1]", new StatedSettings.Place(3, 24)),
                Set.of());
    }

    private static Loaded<Study> check(StatedSettings settings, Table sites, Table levels) {
        return StudyCheck.check(StudyInput.of(settings, sites, levels, Optional.empty()), LIBRARY);
    }

    private static Loaded<Study> check(String header, String... rows) {
        String[] lines = new String[rows.length + 1];
        lines[0] = header;
        System.arraycopy(rows, 0, lines, 1, rows.length);
        return check(StatedSettings.of(StudyJson.defaults("A test")), Grid.table("sites.csv", lines), LEVELS);
    }

    private static List<String> warnings(Loaded<Study> loaded) {
        assertEquals(List.of(), problems(loaded));
        return loaded.warnings().stream().map(InputWarning::placed).toList();
    }

    private static List<String> problems(Loaded<Study> loaded) {
        return loaded.problems().stream().map(InputProblem::message).toList();
    }

    @Test
    void aSiteWithoutCoordinatesIsLeftOffTheMap() {
        assertEquals(
                List.of(
                        "sites.csv:3:2: \"South\" has no latitude and longitude: it is left off the map and out of planar tilts"),
                warnings(check("site,latitude,longitude", "North,5,5", "South,,", "East,6,6")));
    }

    @Test
    void noSiteHasCoordinates() {
        assertEquals(
                List.of("sites.csv: no site has a latitude and longitude: none can be shown on a map"),
                warnings(check("site,coast", "North,east", "South,east", "East,east")));
    }

    @Test
    void groupsOfOne() {
        assertEquals(
                List.of(
                        "sites.csv:4:4: coast \"lee\" has one site: it is compared only where study.json asks for the pair"),
                warnings(check(
                        "site,latitude,longitude,coast", "North,5,5,windward", "South,5,6,windward", "East,6,6,lee")));
    }

    @Test
    void distancesHalfFilled() {
        assertEquals(
                List.of(
                        "sites.csv:3:5: \"South\" has no distance along the coast, though 2 of 3 sites of coast \"lee\" have one: it is left out of the tilt"),
                warnings(check(
                        "site,latitude,longitude,coast,distance_along_coast_km",
                        "North,5,5,lee,0",
                        "South,5,6,lee,",
                        "East,6,6,lee,12.5")));
    }

    @Test
    void areasThatAreNone() {
        assertEquals(
                List.of(
                        "sites.csv:2:2: area_km2: found \"-3\", expected an area above 0",
                        "sites.csv:3:2: area_km2: found \"0\", expected an area above 0",
                        "sites.csv:4:2: area_km2: found \"3 km\", expected a number"),
                problems(check("site,area_km2", "North,-3", "South,0", "East,3 km")));
    }

    @Test
    void oneSiteForAComparison() {
        assertEquals(
                List.of("study.json:2:17: comparison: the study has one site, and nothing to compare it with"),
                warnings(check(
                        settings(),
                        Grid.table("sites.csv", "site,latitude,longitude", "North,5,5"),
                        Grid.table(
                                "levels.csv",
                                "site,level,elevation_m,elevation_1sigma_m,highstand",
                                "North,T1,60,1,5e"))));
    }

    @Test
    void pairsOfSitesThatAreNotThere() {
        Table sites = Grid.table("sites.csv", "site,latitude,longitude", "North,5,5", "South,5,6", "East,6,6");
        assertEquals(
                List.of(
                        "study.json:3:15: comparison.pairs[0][0]: found \"Nroth\", expected the name of a site (nearest: \"North\")"),
                problems(check(settings(new Pair("Nroth", "South")), sites, LEVELS)));
        assertEquals(
                List.of(
                        "study.json:3:24: comparison.pairs[0][1]: found \"South\" beside itself, expected another site"),
                problems(check(settings(new Pair("South", "South")), sites, LEVELS)));
        assertEquals(List.of(), problems(check(settings(new Pair("South", "East")), sites, LEVELS)));
    }

    private static Loaded<Study> points(String header, String... rows) {
        String[] lines = new String[rows.length + 1];
        lines[0] = header;
        System.arraycopy(rows, 0, lines, 1, rows.length);
        Table sites = Grid.table("sites.csv", "site,latitude,longitude", "North,5,5", "South,5,6", "East,6,6");
        return StudyCheck.check(
                StudyInput.of(StatedSettings.of(StudyJson.defaults("A test")), sites, LEVELS, Optional.empty())
                        .withPoints(Grid.table("points.csv", lines)),
                LIBRARY);
    }

    @Test
    void twoPointsAreNoPlane() {
        assertEquals(
                List.of(
                        "points.csv:2:2: level: found 2 points of \"T1\", expected 3 or more, since fewer make neither a line nor a plane with an error"),
                problems(points(
                        "site,level,latitude,longitude,elevation_m,elevation_1sigma_m",
                        "North,T1,5,5,60,1",
                        "North,T1,5.1,5,61,1")));
    }

    @Test
    void pointsOnOneLineMakeNoPlane() {
        assertEquals(
                List.of(
                        "points.csv:2:2: the points of level \"T1\" lie at one place or on one line: no tilt can be told from them"),
                warnings(points(
                        "site,level,latitude,longitude,elevation_m,elevation_1sigma_m",
                        "North,T1,0,5,60,1",
                        "North,T1,0,5.1,61,1",
                        "North,T1,0,5.2,62,1")));
    }

    @Test
    void distancesOfPointsHalfFilled() {
        assertEquals(
                List.of(
                        "points.csv:3:3: distance_km: found nothing, expected a value, since other points of \"T1\" have one"),
                problems(points(
                        "site,level,distance_km,latitude,longitude,elevation_m,elevation_1sigma_m",
                        "North,T1,1,5,5,60,1",
                        "North,T1,,5.1,5,61,1",
                        "North,T1,3,5.2,5.1,61,1")));
    }

    @Test
    void pointsThatCannotBeUsed() {
        assertEquals(
                List.of(
                        "points.csv:2:1: site: found \"Nort\", expected a site that has levels (nearest: \"North\")",
                        "points.csv:3:2: level: found \"T9\", expected a level of \"North\" (nearest: \"T1\")",
                        "points.csv:4:4: elevation_m: found a spread of 0, expected one above 0, since points are weighed by their spreads",
                        "points.csv:5:3: distance_km: found nothing, expected a distance along the coast, or a latitude and longitude"),
                problems(points(
                        "site,level,distance_km,elevation_m,elevation_1sigma_m",
                        "Nort,T1,1,60,1",
                        "North,T9,1,60,1",
                        "North,T1,1,60,0",
                        "North,T1,,60,1")));
    }

    @Test
    void pointsAreReadWithTheirTerrace() {
        Study study = points(
                        "site,level,distance_km,elevation_m,elevation_2sigma_m",
                        "North,T1,1,60,1",
                        "North,T1,2,61,1",
                        "South,T1,0,30,2",
                        "North,T1,3,62,1",
                        "South,T1,1,31,2",
                        "South,T1,2,31,2")
                .value()
                .orElseThrow();
        assertEquals(
                List.of("North", "South"),
                study.together().terraces().stream()
                        .map(SitesData.TerracePoints::site)
                        .toList());
        assertEquals(0.5, study.together().terraces().get(0).points().get(2).sigmaMetres());
    }
}
