package stillstand.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Path;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import stillstand.study.StudyResult;
import stillstand.uncertainty.Interval;
import stillstand.uplift.FlightResult;

/**
 * Two invented flights over an invented table taken as it stands, from files through the command. The expected values were
 * computed by an independent implementation of the same model (numpy; 250 and 500 cells extrapolated, some 1500 rates), and its
 * own prior is normalised from 0 where ours begins at 0.005 m/kyr.
 */
class FlightReferenceTest {
    static final String[] TABLE = {
        "H1,6,0.5,1,1",
        "H3,52,2,-60,10",
        "H5a,81,1.5,-22,6",
        "H5c,100,1.5,-20,6",
        "H5e,122,2,5,2.5",
        "H7a,198,3,-15,7",
        "H7c,214,3,-10,7",
        "H7e,238,3,-8,7",
        "H8,285,4,-35,10",
        "H9a,310,4,-20,9",
        "H9e,330,4,2,6",
        "H11,405,5,8,5",
        "H13a,485,6,-8,8",
        "H13c,525,6,-18,9",
        "H15a,578,7,-6,8",
        "H15e,615,7,-4,8",
        "H17,695,8,-12,9",
        "H19,785,8,-8,9",
        "H21,860,9,-14,10",
        "H25,955,10,-8,10"
    };
    /** Logarithm of the prior's normalisation from 0 over that from 0.005, both to 5 m/kyr. */
    private static final double PRIORS = Math.log(Math.atan(5) / (Math.atan(5) - Math.atan(0.005)));

    @TempDir
    Path folder;

    private StudyOnDisk study(String surveyedTo, String... levels) throws IOException {
        String[] lines = new String[levels.length + 1];
        lines[0] = "site,level,elevation_m,elevation_1sigma_m";
        for (int i = 0; i < levels.length; i++) {
            lines[i + 1] = "Stair," + levels[i];
        }
        return new StudyOnDisk(folder)
                .withCompleteTable(TABLE)
                .with(
                        "study.json",
                        "{\"title\": \"Flight\",",
                        " \"sea_level\": {\"highstands\": {\"from\": \"table\", \"table\": \"own\"}},",
                        " \"rate\": {\"prior\": {\"kind\": \"half-cauchy\", \"scale\": 1, \"from\": 0.005, \"to\": 5}},",
                        " \"matching\": {\"recording_probability\": 0.7, \"expected_strays\": 0.2}}")
                .with("sites.csv", "site,surveyed_from_m,surveyed_to_m", "Stair,2," + surveyedTo)
                .with("levels.csv", lines);
    }

    private static FlightResult flight(StudyResult result) {
        assertEquals(1, result.flights().size());
        return result.flights().get(0);
    }

    private static double pairing(FlightResult flight, String level, String highstand) {
        return flight.pairingsOf(level).stream()
                .filter(pair -> pair.highstand().equals(highstand))
                .mapToDouble(FlightResult.Pairing::probability)
                .sum();
    }

    @Test
    void datedFlight() throws IOException {
        StudyResult result = study(
                        "200",
                        "T1,5.9,2",
                        "T2,36.2,2",
                        "T3,38,2",
                        "T4,105.1,2",
                        "T5,121.8,2",
                        "T6,137.6,2",
                        "T7,150.5,2")
                .with(
                        "samples.csv",
                        "site,sample,level,age_ka,age_1sigma_ka",
                        "Stair,A,T1,5.6,0.5",
                        "Stair,B,T2,80,1.6",
                        "Stair,C,T6,231.5,4.7")
                .run("--draws", "16384");
        FlightResult flight = flight(result);
        assertEquals(0.61907026, flight.rate().mean().orElseThrow(), 3e-4);
        assertEquals(0.019622406, flight.rate().sd().orElseThrow(), 3e-4);
        assertEquals(0.61961476, flight.rate().median(), 3e-4);
        assertEquals(0.57978541, flight.rate().interval95().low(), 6e-4);
        assertEquals(0.65620414, flight.rate().interval95().high(), 6e-4);
        assertEquals(-35.581779, flight.logEvidence() - PRIORS, 0.005);
        assertEquals(0.9999939, pairing(flight, "T1", "H1"), 0.003);
        assertEquals(0.99981, pairing(flight, "T2", "H5a"), 0.003);
        assertEquals(0.98624, pairing(flight, "T3", "H5c"), 0.003);
        assertEquals(0.9837, pairing(flight, "T4", "H7a"), 0.003);
        assertEquals(0.98302, pairing(flight, "T5", "H7c"), 0.003);
        assertEquals(0.99851, pairing(flight, "T6", "H7e"), 0.003);
        assertEquals(0.70951, pairing(flight, "T7", "H8"), 0.003);
        assertEquals(0.26828, pairing(flight, "T7", "H9a"), 0.003);
        assertEquals(0.021244369, flight.probabilityUnmatched("T7").orElseThrow(), 0.003);
        FlightResult.Fate h8 = flight.missing().get(8);
        assertEquals("H8", h8.highstand());
        assertEquals(0.057197682, h8.unseen(), 0.003);
        assertEquals(0.2332749, h8.reoccupied(), 0.003);
        assertEquals(1, h8.recorded() + h8.unseen() + h8.reoccupied() + h8.outside() + h8.absent(), 1e-6);
        assertEquals(291.80742, flight.predictedAges().get(6).age().mean().orElseThrow(), 0.3);
        assertEquals(10.980655, flight.predictedAges().get(6).age().sd().orElseThrow(), 0.2);
        FlightResult.LeftOut without6 = flight.leaveOneOut().get(5);
        assertEquals("T6", without6.level());
        assertEquals(-6.6732986, without6.logPredictive(), 0.02);
        assertEquals(0.62123618, without6.rate().mean().orElseThrow(), 1e-3);
        assertEquals(0.035502817, without6.rate().sd().orElseThrow(), 1e-3);
        // halving one kind of error; the independent figures are printed to 0.1 %
        assertEquals("highstand levels", flight.halving().get(2).error());
        assertEquals(-47.2, flight.halving().get(2).width95ChangePercent(), 0.5);
        assertEquals(-2.9, flight.halving().get(0).width95ChangePercent(), 0.5);
        assertEquals(-0.6, flight.halving().get(1).width95ChangePercent(), 0.5);
        assertEquals(-1.7, flight.halving().get(3).width95ChangePercent(), 0.5);
        assertTrue(
                flight.numericalError().mean() < 3e-4,
                "error of the mean " + flight.numericalError().mean());
    }

    @Test
    void undatedFlightWithTwoCorrelations() throws IOException {
        StudyResult result = study(
                        "160",
                        "T1,5.8,2",
                        "T2,10.7,2",
                        "T3,47.4,2",
                        "T4,60.6,2",
                        "T5,96.9,2",
                        "T6,117.7,2",
                        "T7,149.4,2",
                        "T8,152.9,2")
                .run();
        FlightResult flight = flight(result);
        assertEquals(0.33820297, flight.rate().mean().orElseThrow(), 5e-4);
        assertEquals(0.059840918, flight.rate().sd().orElseThrow(), 5e-4);
        assertEquals(0.34265595, flight.rate().median(), 3e-4);
        assertEquals(-31.232878, flight.logEvidence() - PRIORS, 0.005);
        double[][] regions = {{0.2498549, 0.29821899}, {0.31759959, 0.37154559}};
        assertEquals(2, flight.regions95().size());
        for (int i = 0; i < 2; i++) {
            Interval region = flight.regions95().get(i);
            assertEquals(regions[i][0], region.low(), 1e-3);
            assertEquals(regions[i][1], region.high(), 1e-3);
        }
        assertEquals(0.95, flight.weights95().get(0) + flight.weights95().get(1), 1e-6);
        assertEquals(0.76607545, pairing(flight, "T1", "H1"), 0.003);
        assertEquals(0.79875, pairing(flight, "T6", "H9e"), 0.003);
        assertEquals(0.58615, pairing(flight, "T8", "H13a"), 0.003);
        assertEquals(0.056589051, flight.probabilityUnmatched("T7").orElseThrow(), 0.003);
        assertTrue(result.whyWaiting("Stair", "T1").orElseThrow().contains("the flight of the site"));
        assertEquals(8, result.residuals().size());
    }
}
