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
import stillstand.uplift.RateHistory;

/**
 * An invented flight whose rate changes, over an invented table taken as it stands, from files through the command. The expected
 * values were computed by an independent implementation of the same model (numpy): a change of known age on a grid, one of unknown
 * age by importance sampling with 7189 effective draws. Ours amount to some hundreds of independent draws; 4 standard errors pass.
 */
class RateChangeReferenceTest {
    @TempDir
    Path folder;

    private StudyOnDisk study(String changes, String between) throws IOException {
        return new StudyOnDisk(folder)
                .withCompleteTable(FlightReferenceTest.TABLE)
                .with(
                        "study.json",
                        "{\"title\": \"A change of rate\",",
                        " \"sea_level\": {\"highstands\": {\"from\": \"table\", \"table\": \"own\"}},",
                        " \"rate\": {\"prior\": {\"kind\": \"log-uniform\", \"from\": 0.05, \"to\": 3},",
                        "            \"changes\": \"" + changes + "\", \"change_between_ka\": " + between + "},",
                        " \"matching\": {\"recording_probability\": 0.7, \"expected_strays\": 0.2}}")
                .with("sites.csv", "site,latitude,longitude,surveyed_from_m,surveyed_to_m", "Stair,1,2,2,200")
                .with(
                        "levels.csv",
                        "site,level,elevation_m,elevation_1sigma_m",
                        "Stair,T1,3.5,2",
                        "Stair,T2,10.2,2",
                        "Stair,T3,35.6,2",
                        "Stair,T4,73.6,2",
                        "Stair,T5,77.2,2",
                        "Stair,T6,112,2",
                        "Stair,T7,148.8,2")
                .with(
                        "samples.csv",
                        "site,sample,level,age_ka,age_1sigma_ka",
                        "Stair,A,T2,100,2",
                        "Stair,B,T4,197.2,4",
                        "Stair,C,T7,314.7,6.3");
    }

    private static FlightResult flight(StudyResult result) {
        assertEquals(1, result.flights().size());
        return result.flights().get(0);
    }

    private static FlightResult.ModelEvidence evidence(FlightResult flight, String model) {
        return flight.modelChoice().stream()
                .filter(each -> each.model().equals(model))
                .findFirst()
                .orElseThrow();
    }

    @Test
    @Tag("slow")
    void changeOfKnownAge() throws IOException {
        FlightResult flight = flight(study("one", "[150, 150]").run("--draws", "16384"));
        assertEquals("one change", flight.model());
        assertEquals(-38.592885, flight.logEvidence(), 0.2);
        assertEquals(-47.265713, evidence(flight, "constant").logEvidence(), 0.005);
        FlightResult.Segment recent = flight.segments().get(0);
        FlightResult.Segment older = flight.segments().get(1);
        assertEquals(0, recent.fromKa());
        assertEquals(150, recent.toKa().orElseThrow());
        assertEquals(150, older.fromKa());
        assertEquals(0.26431639, recent.rate().mean().orElseThrow(), 0.004);
        assertEquals(0.023411462, recent.rate().sd().orElseThrow(), 0.004);
        assertEquals(0.82633185, older.rate().mean().orElseThrow(), 0.012);
        assertEquals(0.066923864, older.rate().sd().orElseThrow(), 0.012);
        RateHistory.Change change = flight.history().orElseThrow().changes().get(0);
        assertTrue(change.probabilityFasterBefore() > 0.999, "faster before " + change.probabilityFasterBefore());
        assertTrue(change.datesCanTell());
    }

    @Test
    void changeOfUnknownAge() throws IOException {
        StudyOnDisk study = study("one", "[40, 450]");
        FlightResult flight = flight(study.run("--draws", "16384"));
        assertEquals(-40.317031, flight.logEvidence(), 0.3);
        assertEquals(3.0177744, evidence(flight, "one change").log10BayesFactor(), 0.13);
        assertEquals(0.23809042, flight.segments().get(0).rate().mean().orElseThrow(), 0.01);
        assertEquals(0.75002415, flight.segments().get(1).rate().mean().orElseThrow(), 0.02);
        RateHistory.Change change = flight.history().orElseThrow().changes().get(0);
        assertEquals(130.39229, change.age().median(), 5);
        assertEquals(74.087441, change.age().interval95().low(), 8);
        assertEquals(169.09362, change.age().interval95().high(), 8);
        assertTrue(
                study.out().replaceAll("\\s+", " ").matches(".*: one change \\+(2\\.9|3\\.0|3\\.1) \\(strong\\).*"),
                study.out());
        assertTrue(
                flight.modelChoice()
                        .get(1)
                        .prior()
                        .orElseThrow()
                        .equals("2 independent rates, each log-uniform 0.05 3; change uniform from 40 to 450 ka"),
                flight.modelChoice().get(1).prior().orElseThrow());
    }

    /** Weights follow from the evidences; the weighted rate lies among the models'. */
    @Test
    @Tag("slow")
    void chooseReportsAllModelsAndWeighsThem() throws IOException {
        FlightResult flight = flight(study("choose", "[40, 450]").run("--draws", "16384"));
        assertEquals("weighted", flight.model());
        assertEquals(4, flight.modelChoice().size());
        double constant = evidence(flight, "constant").weight().orElseThrow();
        double one = evidence(flight, "one change").weight().orElseThrow();
        assertEquals(
                Math.exp(evidence(flight, "one change").logEvidence()
                        - evidence(flight, "constant").logEvidence()),
                one / constant,
                1e-6 * one / constant);
        assertEquals(
                1,
                flight.modelChoice().stream()
                        .mapToDouble(model -> model.weight().orElseThrow())
                        .sum(),
                1e-9);
        // slower today than over the whole flight, whatever the model
        FlightResult.Segment first = flight.segments().get(0);
        FlightResult.Segment fifth = flight.segments().get(4);
        assertTrue(
                first.rate().interval68().high() < fifth.rate().interval68().low(),
                flight.segments().toString());
    }
}
