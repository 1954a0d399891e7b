package stillstand.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import stillstand.sensitivity.Leverage;
import stillstand.sensitivity.NextMeasurement;
import stillstand.study.StudyResult;

/** What the answers of an invented study of two pinned levels hang on, asked for on the command line and in the study. */
class LeverageStudyTest {
    @TempDir
    Path folder;

    private StudyOnDisk study(String settings) throws IOException {
        return new StudyOnDisk(folder)
                .with("study.json", settings)
                .with("sites.csv", "site", "Cape")
                .with(
                        "levels.csv",
                        "site,level,elevation_m,elevation_1sigma_m,highstand",
                        "Cape,T1,61,3,5e",
                        "Cape,T2,30,0,5a");
    }

    private boolean isThere(String table) {
        return Files.exists(folder.resolve("results").resolve(table));
    }

    @Test
    void askedForByTheCommandLineAndGoneInTheNextRun() throws IOException {
        StudyOnDisk study = study("{\"title\": \"A cape\"}");
        StudyResult found = study.run("--leverage", "--draws", "1");
        Leverage leverage = found.leverage();
        assertEquals(
                List.of("T1", "T2"),
                leverage.tornado().stream().map(each -> each.level()).toList());
        NextMeasurement survey = leverage.nextMeasurements().stream()
                .filter(each -> each.measurement().equals("survey"))
                .findFirst()
                .orElseThrow();
        assertEquals("T1", survey.level());
        assertEquals(0.3, survey.sigma());
        assertTrue(survey.width95ChangePercent() < -10, survey.toString());
        assertTrue(leverage.assumptionSwitches().stream()
                .anyMatch(each -> each.wouldBe().equals("as picked from curve spratt-lisiecki-2016")));
        assertTrue(found.ledger().stream().anyMatch(line -> line.assumption().equals("leverage is replaced")));
        assertTrue(isThere("tornado.csv") && isThere("next-measurements.csv") && isThere("assumption-switches.csv"));
        assertFalse(isThere("samples-left-out.csv"), "there is no sample");
        assertEquals(List.of(), study.run("--draws", "1").leverage().nextMeasurements());
        assertTrue(isThere("tornado.csv"));
        assertFalse(isThere("next-measurements.csv"), "nobody asked in this run");
    }

    @Test
    void askedForByTheStudyWithItsOwnPrecision() throws IOException {
        Leverage leverage = study("{\"title\": \"A cape\", \"leverage\": {\"survey_1sigma_m\": 1.5}}")
                .run("--draws", "1")
                .leverage();
        assertTrue(leverage.nextMeasurements().stream()
                .anyMatch(each -> each.measurement().equals("survey") && each.sigma() == 1.5));
        assertTrue(leverage.nextMeasurements().stream()
                .filter(each -> each.measurement().equals("date"))
                .allMatch(each -> each.sigma() == 3));
    }
}
