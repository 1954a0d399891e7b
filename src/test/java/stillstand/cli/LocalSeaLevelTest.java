package stillstand.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Path;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import stillstand.ledger.Assumption;
import stillstand.study.StudyResult;
import stillstand.uplift.Rate;

/** Local minus global sea level through {@code gia.csv}: sums by hand, and every message of a bad row. */
class LocalSeaLevelTest {
    @TempDir
    Path folder;

    private StudyOnDisk study(String... gia) throws IOException {
        return new StudyOnDisk(folder)
                .withCompleteTable("5a,80,0,-10,3", "5e,120,0,0,2")
                .with("sites.csv", "site,coast,latitude,longitude", "Head,West,1,2", "Bight,West,1,2.5", "Spit,,2,2")
                .with(
                        "levels.csv",
                        "site,level,elevation_m,elevation_1sigma_m,highstand",
                        "Head,T1,50,1,5e",
                        "Bight,T1,50,1,5e",
                        "Bight,T2,30,1,5a",
                        "Spit,T1,50,1,5e")
                .with("gia.csv", gia);
    }

    private static Rate rate(StudyResult result, String site, String level) {
        return result.levels().stream()
                .filter(each -> each.site().equals(site) && each.level().equals(level))
                .findFirst()
                .flatMap(each -> each.rate())
                .orElseThrow();
    }

    /** The sea stood 4 m higher on this coast: less uplift is needed, and its error joins the others. */
    @Test
    void aCoastHasItsOwnSeaAndASiteGoesBeforeItsCoast() throws IOException {
        StudyResult result = study(
                        "site,coast,highstand,offset_m,offset_1sigma_m", ",West,5e,4,1.5", "Bight,,5e,-2,0.5")
                .run("--draws", "65536");
        assertRate((50 - 4) / 120.0, Math.sqrt(1 + 4 + 1.5 * 1.5) / 120, rate(result, "Head", "T1"));
        assertRate((50 + 2) / 120.0, Math.sqrt(1 + 4 + 0.25) / 120, rate(result, "Bight", "T1"));
        assertRate(40 / 80.0, Math.sqrt(1 + 9) / 80, rate(result, "Bight", "T2"));
        assertRate(50 / 120.0, Math.sqrt(1 + 4) / 120, rate(result, "Spit", "T1"));
        Assumption line = result.ledger().stream()
                .filter(each -> each.value().equals("+4.0 ± 1.5 m (1 sigma)"))
                .findFirst()
                .orElseThrow();
        assertEquals("local minus global sea level at highstand 5e", line.assumption());
        assertEquals("gia.csv", line.source());
        assertEquals("Head", line.appliesTo());
    }

    /** Linear between ages; a highstand beyond them keeps the default. */
    @Test
    void agesSpeakForTheHighstandsBetweenThem() throws IOException {
        StudyResult result = study("coast,age_ka,offset_m,offset_1sigma_m", "West,100,0,1", "West,140,8,3")
                .run("--draws", "65536");
        assertRate((50 - 4) / 120.0, Math.sqrt(1 + 4 + 4) / 120, rate(result, "Head", "T1"));
        assertRate(40 / 80.0, Math.sqrt(1 + 9) / 80, rate(result, "Bight", "T2"));
    }

    @Test
    void highstandsWithoutARowGetTheDefaultWhichIsSaid() throws IOException {
        StudyResult result = study("site,highstand,offset_m,offset_1sigma_m", "Head,5e,4,1")
                .with("study.json", "{\"title\": \"Of a curve\"}")
                .run("--draws", "16384", "--only", "Head");
        assertTrue(
                result.ledger().stream()
                        .anyMatch(each ->
                                each.assumption().equals("local minus global sea level has no row and gets the default")
                                        && each.value().startsWith("3c, 5a, 5c, 6d, 7a, ")
                                        && each.appliesTo().equals("Head")),
                result.ledger().toString());
    }

    @Test
    void everyBadRowIsTold() throws IOException {
        StudyOnDisk study = study(
                "site,coast,highstand,age_ka,offset_m,offset_1sigma_m",
                "Hed,,5e,,1,1",
                ",Wst,5e,,1,1",
                "Head,West,5e,,1,1",
                "Head,,5w,,1,1",
                "Head,,5e,122,1,1",
                "Head,,,,1,1",
                "Head,,5e,,,",
                "Head,,5a,,1,1",
                "Head,,5a,,1,1",
                "Spit,,5e,,1,1");
        study.with(
                "sites.csv",
                "site,coast,latitude,longitude,local_curve",
                "Head,West,1,2,",
                "Bight,West,1,2.5,",
                "Spit,,2,2,waelbroeck-2002");
        assertEquals(1, study.execute("run"));
        assertEquals(
                List.of(
                        "gia.csv:2:1: site: found \"Hed\", expected a site of sites.csv (nearest: \"Head\")",
                        "gia.csv:3:2: coast: found \"Wst\", expected a coast of sites.csv (nearest: \"West\")",
                        "gia.csv:4:1: site: found both a site and a coast, expected the site, or the coast, that the row is about",
                        "gia.csv:5:3: highstand: found \"5w\", expected a highstand of \"own\" (nearest: \"5a\")",
                        "gia.csv:6:3: highstand: found both a highstand and an age, expected the highstand, or the age, of the offset",
                        "gia.csv:7:3: highstand: found neither highstand nor age_ka, expected the highstand, or the age, of the offset",
                        "gia.csv:8:5: offset_m: found nothing, expected local minus global sea level, m",
                        "gia.csv:10:3: highstand: found \"5a\" a second time, expected each highstand of a place once",
                        "gia.csv:11:1: site: found \"Spit\", which has a local_curve in sites.csv, expected one or the other: a local curve holds its own local sea level"),
                study.err().lines().skip(1).toList());
    }

    private static void assertRate(double mean, double sd, Rate rate) {
        assertEquals(mean, rate.mean().orElseThrow(), 0.01 * sd);
        assertEquals(sd, rate.sd().orElseThrow(), 0.01 * sd);
    }
}
