package stillstand.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Path;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import stillstand.study.StudyResult;
import stillstand.uplift.FlightResult;

/** Traces from files through the command, on invented coasts: undated terraces here, a coral on the next headland. */
class TracedTerracesTest {
    @TempDir
    Path folder;

    private StudyResult run(String terrace, String pin) throws IOException {
        return new StudyOnDisk(folder)
                .with("study.json", "{\"title\": \"Traced\"}")
                .with(
                        "sites.csv",
                        "site,latitude,longitude,surveyed_from_m,surveyed_to_m",
                        "Bare,1,2,2,120",
                        "Coral,1,3,2,120")
                .with(
                        "levels.csv",
                        "site,level,elevation_m,elevation_1sigma_m,terrace,highstand",
                        "Bare,B1,18,1.5,,",
                        "Bare,B2,32,1.5,,",
                        "Bare,B3,56,1.5," + terrace + ",",
                        "Bare,B4,80,1.5,,",
                        "Coral,C1,48,1.5," + terrace + "," + pin)
                .run("--draws", "16384");
    }

    private static double pairing(StudyResult result, String level) {
        return result.flights().stream()
                .filter(flight -> flight.site().equals("Bare"))
                .flatMap(flight -> flight.pairingsOf(level).stream())
                .filter(pair -> pair.highstand().equals("5e"))
                .mapToDouble(FlightResult.Pairing::probability)
                .sum();
    }

    @Test
    @Tag("slow")
    void aCoralOnTheNextHeadlandDatesTheTerrace() throws IOException {
        StudyResult alone = run("", "5e");
        StudyResult traced = run("Main", "5e");
        FlightResult before = alone.flights().get(0);
        FlightResult after = traced.flights().get(0);
        assertEquals("Bare", after.site());
        double known = pairing(traced, "B3");
        double unknown = pairing(alone, "B3");
        // the odds of 5e grow 19 to 1, as a trace of probability 0.95 has it; draws and counting cost some
        assertEquals(19 * unknown / (1 - unknown), known / (1 - known), 0.35 * 19 * unknown / (1 - unknown));
        double widthBefore = before.rate().interval95().width();
        double widthAfter = after.rate().interval95().width();
        assertTrue(widthAfter < 0.8 * widthBefore, widthBefore + " to " + widthAfter);
        assertTrue(
                traced.ledger().stream().anyMatch(line -> line.assumption().equals("terraces traced to other sites")));
        for (FlightResult.Fate fate : after.missing()) {
            assertEquals(
                    1,
                    fate.recorded() + fate.unseen() + fate.reoccupied() + fate.outside() + fate.absent(),
                    1e-4,
                    fate.highstand());
        }
    }
}
