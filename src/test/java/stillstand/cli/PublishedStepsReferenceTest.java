package stillstand.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Path;
import java.util.List;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import stillstand.study.StudyResult;
import stillstand.uplift.FlightResult;
import stillstand.uplift.LevelAnswer;
import stillstand.uplift.LevelAnswer.StageProbability;

/**
 * Published steps that a simple reading gets wrong, from files through the command. Heights and ages as compiled by Rovere et al.
 * 2023, ESSD 15, 1-23 (CC BY 4.0); what each source says stands at its test.
 */
class PublishedStepsReferenceTest {
    private static final String LEVELS = "site,level,elevation_m,elevation_1sigma_m";
    private static final String SITES = "site,latitude,longitude,surveyed_from_m,surveyed_to_m";
    private static final String SAMPLES = "site,sample,level,age_ka,age_1sigma_ka,dates";

    @TempDir
    Path folder;

    private StudyOnDisk study() throws IOException {
        return new StudyOnDisk(folder).with("study.json", "{\"title\": \"Published steps\"}");
    }

    /**
     * Worthing 3 m (82 +- 2 ka), Ventnor 6 m (104 +- 6 ka), both after Bender et al. 1979, GSA Bulletin 90, 577-594, Rendezvous
     * Hill 40 +- 3 m (123 +- 6 ka): stages 5a, 5c, 5e, and 0.264 +- 0.058 m/kyr from the highest alone.
     */
    @Test
    @Tag("slow")
    void christChurchIs5aAnd5cAnd5e() throws IOException {
        FlightResult flight = study().with("sites.csv", SITES, "Christ Church,13.06,-59.53,1,45")
                .with(
                        "levels.csv",
                        LEVELS,
                        "Christ Church,Worthing,3,1.5",
                        "Christ Church,Ventnor,6,3",
                        "Christ Church,Rendezvous Hill,40,3")
                .with(
                        "samples.csv",
                        SAMPLES,
                        "Christ Church,W,Worthing,82,2,",
                        "Christ Church,V,Ventnor,104,6,",
                        "Christ Church,R,Rendezvous Hill,123,6,")
                .run("--draws", "16384")
                .flights()
                .get(0);
        assertTrue(pairing(flight, "Worthing", "5a") > 0.95);
        assertTrue(pairing(flight, "Ventnor", "5c") > 0.9);
        assertTrue(pairing(flight, "Rendezvous Hill", "5e") > 0.95);
        assertTrue(flight.rate().interval68().contains(0.264), flight.rate().toString());
    }

    /**
     * The south coast has three steps dated to 5c (4.5, 9 and 16 m: 104 +- 13, 104 +- 9, 105 +- 7 ka) and two to 5a (2 and 3 m: 74
     * +- 5, 85 +- 7 ka; Schellmann and Radtke 2004, Earth-Science Reviews 64, 157-187). A table with one row a stage makes strays
     * of some; rows for the steps, with levels as wide as the argument about them, give each its own. The rows' levels here are
     * ours, wide enough to hold what is published for 5a and 5c.
     */
    @Test
    @Tag("slow")
    void severalStepsOfOneStageNeedRowsAndAreThenNoStrays() throws IOException {
        StudyOnDisk study = study().with("sites.csv", SITES, "South coast,13.06,-59.56,0.5,45")
                .with(
                        "levels.csv",
                        LEVELS,
                        "South coast,T-1a1,2,1",
                        "South coast,T-1a2,3,1",
                        "South coast,T-1b,4.5,1.5",
                        "South coast,T-2,9,2",
                        "South coast,T-3,16,2",
                        "South coast,Rendezvous Hill,37,3")
                .with(
                        "samples.csv",
                        SAMPLES,
                        "South coast,a1,T-1a1,74,5,",
                        "South coast,a2,T-1a2,85,7,",
                        "South coast,b,T-1b,104,13,",
                        "South coast,c,T-2,104,9,",
                        "South coast,d,T-3,105,7,",
                        "South coast,e,Rendezvous Hill,123,6,");
        FlightResult without = study.run("--draws", "16384").flights().get(0);
        FlightResult with = study.with(
                        "study.json",
                        "{\"title\": \"Steps\", \"sea_level\": {\"highstands\": {\"from\": \"table\", \"table\": \"steps\"}}}")
                .with(
                        "curves/datapackage.json",
                        "{\"name\": \"own\", \"resources\": [{\"name\": \"steps\", \"path\": \"steps.csv\",",
                        "  \"stillstand\": {\"kind\": \"highstands\"}}]}")
                .with(
                        "curves/steps.csv",
                        "stage,age_ka,age_1sigma_ka,level_m,level_1sigma_m,class,exists_probability",
                        "5a1,77,4,-12,8,interstadial,0.5",
                        "5a,82,3,-9,5,interstadial,1",
                        "5c1,98,4,-14,8,interstadial,0.5",
                        "5c2,102,4,-12,8,interstadial,0.7",
                        "5c,106,4,-9,6,interstadial,1",
                        "5e,122.5,3.3,7.5,1.5,interglacial,1",
                        "7a,200,3,-0.5,3,interglacial,1",
                        "7c,216,3,-8,5,interglacial,1",
                        "7e,237,4,-5,5,interglacial,1",
                        "9e,329,4,2,5,interglacial,1")
                .run("--draws", "16384")
                .flights()
                .get(0);
        for (String step : List.of("T-1b", "T-2", "T-3")) {
            assertTrue(without.probabilityUnmatched(step).orElseThrow() > 0.3, step);
            assertTrue(with.probabilityUnmatched(step).orElseThrow() < 0.15, step);
        }
        assertTrue(with.rate().interval68().contains(0.24), with.rate().toString());
    }

    /**
     * Cape Laundi, Sumba: corals of 86.0, 107.6 and 131.2 ka on one step at 3 m (Bard et al. 1996, GRL 23, 1473-1476; published
     * range of the rate 0.2 to 0.5 m/kyr). They are never averaged to 108 ka; with the older ones marked as inherited the
     * youngest dates the last occupation, 5a.
     */
    @Test
    @Tag("slow")
    void threeAgesOnOneStepAreNeverAveraged() throws IOException {
        StudyOnDisk study = study().with("sites.csv", SITES, "Cape Laundi,-9.5,120.2,1,60")
                .with("levels.csv", LEVELS, "Cape Laundi,I-1,3,1")
                .with(
                        "samples.csv",
                        SAMPLES,
                        "Cape Laundi,L1,I-1,86,0.6,",
                        "Cape Laundi,L2,I-1,107.6,0.7,",
                        "Cape Laundi,L3,I-1,131.2,1,");
        StudyResult averaged = study.run("--draws", "16384");
        LevelAnswer mixed = StudyOnDisk.level(averaged, "I-1");
        double of5c = mixed.stages().stream()
                .filter(stage -> stage.highstand().equals("5c"))
                .mapToDouble(StageProbability::probability)
                .sum();
        assertTrue(of5c < 0.2, "the mean of the three is no age of the step: " + of5c);
        assertTrue(mixed.agreement().orElseThrow().p() < 1e-9);
        assertTrue(study.out().contains("The dates of I-1 disagree"), study.out());
        LevelAnswer last = StudyOnDisk.level(
                study.with(
                                "samples.csv",
                                SAMPLES,
                                "Cape Laundi,L1,I-1,86,0.6,",
                                "Cape Laundi,L2,I-1,107.6,0.7,maximum",
                                "Cape Laundi,L3,I-1,131.2,1,maximum")
                        .run("--draws", "16384"),
                "I-1");
        assertEquals("5a", last.stages().get(0).highstand());
        assertTrue(last.stages().get(0).probability() > 0.99);
    }

    /** Invented: two dates of 5e that agree, and a third 60 ka too old, which must not move the rate by one standard deviation. */
    @Test
    @Tag("slow")
    void oneWrongDateOfThreeMovesNothing() throws IOException {
        StudyOnDisk study = study().with("sites.csv", SITES, "Stair,1,2,4,70")
                .with("levels.csv", LEVELS, "Stair,T1,16,3", "Stair,T2,28,3", "Stair,T3,52,3")
                .with("samples.csv", SAMPLES, "Stair,A,T3,124,2,", "Stair,B,T3,126,2,");
        FlightResult two = study.run("--draws", "16384").flights().get(0);
        FlightResult three = study.with(
                        "samples.csv", SAMPLES, "Stair,A,T3,124,2,", "Stair,B,T3,126,2,", "Stair,C,T3,185,3,")
                .run("--draws", "16384")
                .flights()
                .get(0);
        assertEquals(
                two.rate().median(),
                three.rate().median(),
                0.25 * two.rate().sd().orElseThrow());
        assertTrue(pairing(three, "T3", "5e") > 0.95);
    }

    /** Invented: steps of single earthquakes record no sea level, and a staircase of them is left alone. */
    @Test
    void aHoloceneStaircaseOfEarthquakesIsLeftAlone() throws IOException {
        StudyResult result = study().with("sites.csv", SITES, "Steps,1,2,0.5,20")
                .with(
                        "levels.csv",
                        LEVELS + ",forms_at",
                        "Steps,E1,1.2,0.2,event",
                        "Steps,E2,2.9,0.2,event",
                        "Steps,E3,4.4,0.2,event")
                .with("samples.csv", SAMPLES, "Steps,A,E1,0.9,0.1,", "Steps,B,E2,2.1,0.1,", "Steps,C,E3,3.6,0.2,")
                .run("--draws", "16384");
        assertEquals(List.of(), result.flights());
        assertEquals(List.of(), result.failures());
        for (String step : List.of("E1", "E2", "E3")) {
            assertEquals(
                    "it is one earthquake's step and records no sea level",
                    result.whyWaiting("Steps", step).orElseThrow());
        }
    }

    private static double pairing(FlightResult flight, String level, String highstand) {
        return flight.pairingsOf(level).stream()
                .filter(pair -> pair.highstand().equals(highstand))
                .mapToDouble(FlightResult.Pairing::probability)
                .sum();
    }
}
