package stillstand.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.io.IOException;
import java.nio.file.Path;
import java.util.List;
import java.util.stream.IntStream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import stillstand.study.StudyResult;
import stillstand.uncertainty.Interval;
import stillstand.uplift.FlightResult;
import stillstand.uplift.LevelAnswer;
import stillstand.uplift.LevelResidual;

/**
 * A flight of drowned reefs, its table and its prior mirrored about 0, gives the mirrored answer of the flight raised: with shared
 * errors drawn, a datum, dates, a pin, a doubtful level and a marine-limiting point left out for want of a curve.
 */
class MirrorTest {
    private static final double TOLERANCE = 1e-9;
    private static final String[] STANDS = {"A,20,1,5,3", "B,60,2,-8,4", "C,100,2,2,3", "D,145,3,-12,5", "E,190,3,4,4"};

    @TempDir
    Path folder;

    private StudyResult run(int sign, String formsAt) throws IOException {
        return new StudyOnDisk(folder)
                .withCompleteTable(IntStream.range(0, STANDS.length)
                        .mapToObj(i -> {
                            String[] cells = STANDS[i].split(",");
                            cells[3] = String.valueOf(sign * Integer.parseInt(cells[3]));
                            return String.join(",", cells);
                        })
                        .toArray(String[]::new))
                .with(
                        "study.json",
                        "{\"title\": \"Mirror\",",
                        " \"sea_level\": {\"highstands\": {\"from\": \"table\", \"table\": \"own\"},",
                        "                \"shared_level_1sigma_m\": 3},",
                        " \"rate\": {\"prior\": {\"kind\": \"cauchy\", \"location\": " + sign * 0.1
                                + ", \"scale\": 0.5, \"from\": " + (sign > 0 ? "-10, \"to\": 15" : "-15, \"to\": 10")
                                + "}}}")
                .with(
                        "sites.csv",
                        "site,latitude,longitude,surveyed_from_m,surveyed_to_m,datum_offset_m,datum_offset_1sigma_m",
                        "Coast,1,2," + (sign > 0 ? "3,150" : "-150,-3") + "," + sign * 0.5 + ",0.4")
                .with(
                        "levels.csv",
                        "site,level,elevation_m,elevation_1sigma_m,forms_at,highstand,certainty",
                        "Coast,T1," + sign * 14 + ",1.5," + formsAt + ",,",
                        "Coast,T2," + sign * 41 + ",2," + formsAt + ",,doubtful",
                        "Coast,T3," + sign * 52 + ",2," + formsAt + ",C,",
                        "Coast,T4," + sign * 61 + ",1," + formsAt + ",,",
                        "Coast,T5," + sign * 99 + ",3," + formsAt + ",,")
                .with("samples.csv", "site,sample,level,age_ka,age_1sigma_ka", "Coast,S1,T1,21,2", "Coast,S2,T4,140,6")
                .run("--draws", "16384");
    }

    private static void assertMirrored(Interval up, Interval down) {
        assertEquals(up.low(), -down.high(), TOLERANCE);
        assertEquals(up.high(), -down.low(), TOLERANCE);
    }

    @Test
    void aDrownedFlightIsTheMirrorOfARaisedOne() throws IOException {
        StudyResult raised = run(1, "highstand");
        StudyResult drowned = run(-1, "drowning");
        FlightResult up = raised.flights().get(0);
        FlightResult down = drowned.flights().get(0);
        assertEquals(up.rate().median(), -down.rate().median(), TOLERANCE);
        assertEquals(up.rate().sd().orElseThrow(), down.rate().sd().orElseThrow(), TOLERANCE);
        assertMirrored(up.rate().interval95(), down.rate().interval95());
        assertMirrored(up.rate().shortest68(), down.rate().shortest68());
        assertEquals(up.regions95().size(), down.regions95().size());
        assertMirrored(
                up.regions95().get(0), down.regions95().get(down.regions95().size() - 1));
        assertEquals(up.logEvidence(), down.logEvidence(), TOLERANCE);
        assertEquals(
                up.probabilityUplift().orElseThrow(),
                1 - down.probabilityUplift().orElseThrow(),
                TOLERANCE);
        for (String level : List.of("T1", "T2", "T3", "T4", "T5")) {
            List<FlightResult.Pairing> ups = up.pairingsOf(level);
            List<FlightResult.Pairing> downs = down.pairingsOf(level);
            assertEquals(ups.size(), downs.size());
            for (int i = 0; i < ups.size(); i++) {
                assertEquals(ups.get(i).highstand(), downs.get(i).highstand());
                assertEquals(ups.get(i).probability(), downs.get(i).probability(), TOLERANCE);
            }
            assertEquals(
                    up.probabilityUnmatched(level).orElseThrow(),
                    down.probabilityUnmatched(level).orElseThrow(),
                    TOLERANCE);
        }
        for (int j = 0; j < up.missing().size(); j++) {
            assertEquals(
                    up.missing().get(j).heightMetres(), -down.missing().get(j).heightMetres(), TOLERANCE);
            assertEquals(up.missing().get(j).reoccupied(), down.missing().get(j).reoccupied(), TOLERANCE);
        }
        for (int i = 0; i < up.leaveOneOut().size(); i++) {
            assertEquals(
                    up.leaveOneOut().get(i).rate().median(),
                    -down.leaveOneOut().get(i).rate().median(),
                    TOLERANCE);
        }
        for (int i = 0; i < raised.residuals().size(); i++) {
            LevelResidual one = raised.residuals().get(i);
            LevelResidual other = drowned.residuals().get(i);
            assertEquals(one.measuredMetres(), -other.measuredMetres(), TOLERANCE);
            assertEquals(one.predictedMetres(), -other.predictedMetres(), TOLERANCE);
        }
    }

    /** The pinned level's own rate: the same propagation, mirrored up to the Monte Carlo error of its other draws. */
    @Test
    void aDrownedLevelIsTheMirrorOfARaisedOne() throws IOException {
        LevelAnswer up = StudyOnDisk.level(run(1, "highstand"), "T3");
        LevelAnswer down = StudyOnDisk.level(run(-1, "drowning"), "T3");
        assertEquals(
                up.firstOrder().orElseThrow().rate(),
                -down.firstOrder().orElseThrow().rate(),
                TOLERANCE);
        assertEquals(
                up.rate().orElseThrow().median(), -down.rate().orElseThrow().median(), 1e-3);
    }
}
