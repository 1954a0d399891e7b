package stillstand.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Path;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import stillstand.study.StudyResult;
import stillstand.uplift.FlightResult;

/** What else a study may say of a flight, through files and command: doubtful levels, one-sided dates, limiting points. */
class FlightEvidenceTest {
    private static final String LEVELS = "site,level,elevation_m,elevation_1sigma_m,forms_at,certainty";

    @TempDir
    Path folder;

    private StudyOnDisk study(String... levels) throws IOException {
        String[] lines = new String[levels.length + 1];
        lines[0] = LEVELS;
        System.arraycopy(levels, 0, lines, 1, levels.length);
        return new StudyOnDisk(folder)
                .withCompleteTable("5a,80,2,-10,4", "5c,100,2,-10,4", "5e,122,2,5,2", "7a,200,3,0,3", "9e,330,3,0,4")
                .with("sites.csv", "site,latitude,longitude,surveyed_from_m,surveyed_to_m", "Stair,1,2,2,140")
                .with("levels.csv", lines);
    }

    private static FlightResult flight(StudyOnDisk study) throws IOException {
        return study.run("--draws", "16384").flights().get(0);
    }

    private static double pairing(FlightResult flight, String level, String highstand) {
        return flight.pairingsOf(level).stream()
                .filter(pair -> pair.highstand().equals(highstand))
                .mapToDouble(FlightResult.Pairing::probability)
                .sum();
    }

    @Test
    void aDoubtfulLevelIsMoreEasilyNone() throws IOException {
        StudyOnDisk study = study("Stair,T1,30,1,,", "Stair,T2,54,1,,sure", "Stair,T3,80,1,,");
        double sure = flight(study).probabilityUnmatched("T2").orElseThrow();
        study.with("levels.csv", LEVELS, "Stair,T1,30,1,,", "Stair,T2,54,1,,doubtful", "Stair,T3,80,1,,");
        double doubtful = flight(study).probabilityUnmatched("T2").orElseThrow();
        assertTrue(doubtful > 1.5 * sure && doubtful < 1, sure + " and " + doubtful);
    }

    /** A coral grown over an older terrace says that the terrace is no younger: 7a or 9e, never 5e. */
    @Test
    void aMinimumDateKeepsYoungerHighstandsAway() throws IOException {
        StudyOnDisk study = study("Stair,T1,54,1,,")
                .with("samples.csv", "site,sample,level,age_ka,age_1sigma_ka,dates", "Stair,A,T1,160,4,minimum");
        FlightResult flight = flight(study);
        assertEquals(0, pairing(flight, "T1", "5e"), 1e-3);
        double shoreline = 1 - flight.probabilityUnmatched("T1").orElseThrow();
        assertEquals(shoreline, pairing(flight, "T1", "7a") + pairing(flight, "T1", "9e"), 1e-3);
        FlightResult other = flight(
                study.with("samples.csv", "site,sample,level,age_ka,age_1sigma_ka,dates", "Stair,A,T1,160,4,maximum"));
        assertEquals(0, pairing(other, "T1", "7a"), 1e-3);
        assertTrue(pairing(other, "T1", "5e") > 0.05, other.pairings().toString());
    }

    /** A shell bed at 20 m that formed below the sea of 60 ka: the coast has come up by 20 m at least since. */
    @Test
    void aMarineLimitingPointPushesTheRateUp() throws IOException {
        StudyOnDisk study = study("Stair,T1,16,2,,", "Stair,T2,28,2,,", "Stair,T3,52,2,,")
                .with(
                        "study.json",
                        "{\"title\": \"Limits\", \"sea_level\": {\"curves\": [{\"id\": \"spratt-lisiecki-2016\"}],",
                        "\"highstands\": {\"from\": \"table\", \"table\": \"own\"}}}");
        FlightResult without = flight(study);
        StudyResult result = study.with(
                        "levels.csv",
                        LEVELS,
                        "Stair,T1,16,2,,",
                        "Stair,T2,28,2,,",
                        "Stair,T3,52,2,,",
                        "Stair,Shells,20,1,marine-limiting,")
                .with("samples.csv", "site,sample,level,age_ka,age_1sigma_ka", "Stair,S,Shells,60,2")
                .run("--draws", "16384");
        FlightResult with = result.flights().get(0);
        // at 60 ka the sea stood below -50 m: a bed at 20 m needs more than 1 m/kyr
        assertTrue(without.rate().median() < 0.6, without.rate().toString());
        assertTrue(with.rate().interval95().low() > 0.9, with.rate().toString());
        assertEquals(3, with.unmatched().size(), "a limiting point is no level of the flight");
        assertEquals(
                "it formed somewhere below the sea, which bounds a rate on one side only",
                result.whyWaiting("Stair", "Shells").orElseThrow());
    }

    @Test
    void aTerrestrialLimitingPointHoldsTheRateDown() throws IOException {
        StudyOnDisk study = study("Stair,T1,110,2,,", "Stair,Dune,4,1,terrestrial-limiting,")
                .with(
                        "study.json",
                        "{\"title\": \"Limits\", \"sea_level\": {\"curves\": [{\"id\": \"spratt-lisiecki-2016\"}],",
                        "\"highstands\": {\"from\": \"table\", \"table\": \"own\"}}}");
        FlightResult undated = flight(study);
        // dry land at 122 ka that stands at 4 m today has hardly risen
        FlightResult held =
                flight(study.with("samples.csv", "site,sample,level,age_ka,age_1sigma_ka", "Stair,S,Dune,122,1"));
        assertTrue(undated.rate().median() > 0.3, undated.rate().toString());
        assertTrue(held.rate().interval95().high() < 0.3 + 1e-9 || held.probabilityAllStray() > 0.9, held.toString());
    }
}
