package stillstand.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** Staircases of rates that change, of sinking coasts, and of several sites side by side, on a table of round numbers. */
class PredictTest {
    @TempDir
    Path folder;

    private StudyOnDisk study;

    @BeforeEach
    void twoSites() throws IOException {
        study = new StudyOnDisk(folder)
                .withCompleteTable("A,80,0,-10,1", "B,120,0,5,1", "C,200,0,-5,1")
                .with("sites.csv", "site,latitude,longitude", "North,1,2", "South,1,3")
                .with(
                        "levels.csv",
                        "site,level,elevation_m,elevation_1sigma_m,highstand",
                        "North,T1,53,1,B",
                        "South,S1,29,1,B");
    }

    /** North: 0.5 x 80 - 10 = 30; 0.5 x 120 + 5 = 65; 0.5 x 150 + 1 x 50 - 5 = 120. South: 6, 29, 35. */
    @Test
    void severalSitesSideBySide() throws IOException {
        Path file = folder.resolve("stairs.csv");
        assertEquals(
                0, study.execute("predict", "--at", "North=0.5,150:1", "--at", "South=0.2", "--out", file.toString()));
        assertEquals("""
                Staircase of North 0.5,150:1; South 0.2 (m/kyr) under own, in brackets what a later sea overran:
                  Highstand  Age (ka)    North (m)   South (m)
                  C             200.0  120.0 ± 1.0  35.0 ± 1.0
                  B             120.0   65.0 ± 1.0  29.0 ± 1.0
                  A              80.0   30.0 ± 1.0   6.0 ± 1.0
                """, study.out());
        assertTrue(Files.readString(file).contains("\nNorth,C,200.0,-5.0,120.0,1.0,yes,\n"), Files.readString(file));
        assertTrue(Files.readString(file).contains("\nSouth,B,120.0,5.0,29.0,1.0,yes,\n"), Files.readString(file));
    }

    /** Rows taken for lowstands: -0.1 x 80 - 10 = -18; -0.1 x 120 + 5 = -7; -0.1 x 200 - 5 = -25. The second lies above the first. */
    @Test
    void drownedReefs() {
        assertEquals(0, study.execute("predict", "--rate", "-0.1", "--drowned"));
        assertEquals("""
                Drowned reefs of -0.1 m/kyr under own:
                  Highstand  Fate          Age (ka)  Sea (m)  Height (m)    ±
                  C          stands           200.0     −5.0       −25.0  1.0
                  B          overrun by A     120.0      5.0        −7.0  1.0
                  A          stands            80.0    −10.0       −18.0  1.0
                """, study.out());
    }

    @Test
    void whatCannotBeRead() {
        assertEquals(2, study.execute("predict", "--at", "North=fast"));
        assertTrue(
                study.err().startsWith("--at: \"fast\" is no RATE[,AGE:RATE...] such as 0.4,150:0.9\n"), study.err());
        assertEquals(2, study.execute("predict", "--at", "West=1"));
        assertTrue(study.err().startsWith("--at: the study has no site \"West\"\n"), study.err());
        assertEquals(2, study.execute("predict"));
        assertTrue(
                study.err().startsWith("give --rate (with --before and --site) or --at for each site, not both\n"),
                study.err());
        assertEquals(2, study.execute("predict", "--rate", "1", "--at", "North=1"));
    }
}
