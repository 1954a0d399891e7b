package stillstand.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Path;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import stillstand.study.StudyResult;
import stillstand.uplift.FlightResult;
import stillstand.uplift.LevelAnswer;

/**
 * Reefs that drowned, from files through the command. Heights and ages of Hawaii: Moore and Fornari 1984, J. Geol. 92:752 (-150 m at
 * 13.25 ka, -390 m at 145 ka, -580 m at 255 ka) and Szabo and Moore 1986, Geology 14:967; the rate of -2.6 m/kyr (Ludwig et al. 1991,
 * Geology 19:171) rests on six reefs that the abstracts do not give, so that only sign and order of magnitude can be asked for. Huon
 * Gulf: Galewsky et al. 1996, Geology 24:819, -2000 m at 348 ± 10 ka, 5.7 m/kyr without a term for sea level.
 */
class DrownedReefsReferenceTest {
    @TempDir
    Path folder;

    @Test
    void hawaiiSinks() throws IOException {
        // spreads of the heights and of the older ages are not published: 10 m and 5 % are ours
        StudyOnDisk study = new StudyOnDisk(folder)
                .with("study.json", "{\"title\": \"Drowned reefs\"}")
                .with(
                        "sites.csv",
                        "site,latitude,longitude,surveyed_from_m,surveyed_to_m",
                        "NW Hawaii,20,-156,-700,-100")
                .with(
                        "levels.csv",
                        "site,level,elevation_m,elevation_1sigma_m,forms_at",
                        "NW Hawaii,R1,-150,10,drowning",
                        "NW Hawaii,R2,-390,10,drowning",
                        "NW Hawaii,R3,-580,10,drowning")
                .with(
                        "samples.csv",
                        "site,sample,level,age_ka,age_1sigma_ka",
                        "NW Hawaii,A,R1,13.25,0.38",
                        "NW Hawaii,B,R2,145,7",
                        "NW Hawaii,C,R3,255,13");
        StudyResult result = study.run("--draws", "16384");
        FlightResult flight = result.flights().get(0);
        assertTrue(
                flight.rate().interval95().high() < -1, "rate " + flight.rate().interval95());
        assertTrue(
                flight.rate().interval95().low() > -4, "rate " + flight.rate().interval95());
        assertEquals(0, flight.probabilityUplift().orElseThrow(), 0.02);
        assertEquals(
                List.of("2", "6", "8"),
                List.of("R1", "R2", "R3").stream()
                        .map(level -> flight.pairingsOf(level).get(0).highstand())
                        .toList());
        assertTrue(study.out().contains("Stands of the sea without a level"), study.out());
    }

    private LevelAnswer huonGulf(String level) throws IOException {
        return StudyOnDisk.level(
                new StudyOnDisk(folder)
                        .withCompleteTable("10," + level)
                        .with("sites.csv", "site,latitude,longitude", "Huon Gulf,-7,147.5")
                        .with(
                                "levels.csv",
                                "site,level,elevation_m,elevation_1sigma_m,forms_at,highstand",
                                "Huon Gulf,R,-2000,0,drowning,10")
                        .run("--draws", "16384"),
                "R");
    }

    /** 2000 / 348 = 5.747 without a term for sea level; with a lowstand of 100 m 5.46. */
    @Test
    void huonGulf() throws IOException {
        LevelAnswer without = huonGulf("348,10,0,0");
        assertEquals(-2000.0 / 348, without.rate().orElseThrow().median(), 0.002);
        assertEquals(0.165, without.rate().orElseThrow().sd().orElseThrow(), 0.003);
        assertEquals(-5.46, huonGulf("348,10,-100,0").rate().orElseThrow().median(), 0.005);
    }

    /** With the lowstands of a curve: the reef stopped somewhat above the lowest sea. */
    @Test
    void huonGulfWithALowstandOfACurve() throws IOException {
        StudyResult result = new StudyOnDisk(folder)
                .with("study.json", "{\"title\": \"Drowned reefs\"}")
                .with(
                        "sites.csv",
                        "site,latitude,longitude,surveyed_from_m,surveyed_to_m",
                        "Huon Gulf,-7,147.5,-2500,-100")
                .with(
                        "levels.csv",
                        "site,level,elevation_m,elevation_1sigma_m,forms_at",
                        "Huon Gulf,R,-2000,5,drowning")
                .with("samples.csv", "site,sample,level,age_ka,age_1sigma_ka", "Huon Gulf,A,R,348,10")
                .run("--draws", "16384");
        LevelAnswer reef = StudyOnDisk.level(result, "R");
        assertEquals("10", reef.stages().get(0).highstand());
        assertEquals(-5.5, reef.rate().orElseThrow().median(), 0.15);
    }
}
