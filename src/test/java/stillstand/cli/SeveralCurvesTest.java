package stillstand.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import org.apache.commons.math3.analysis.solvers.BrentSolver;
import org.apache.commons.math3.distribution.NormalDistribution;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import stillstand.SampleFlight;
import stillstand.ledger.Assumption;
import stillstand.sensitivity.CurveChoice;
import stillstand.sensitivity.CurveEvidence;
import stillstand.study.StudyResult;
import stillstand.uplift.FlightResult;
import stillstand.uplift.LevelAnswer;

/** Several accounts of sea level in one study, through files and command. */
class SeveralCurvesTest {
    @TempDir
    Path folder;

    private StudyOnDisk study(String... levels) throws IOException {
        String[] lines = new String[levels.length + 1];
        lines[0] = "site,level,elevation_m,elevation_1sigma_m,highstand";
        System.arraycopy(levels, 0, lines, 1, levels.length);
        return new StudyOnDisk(folder)
                .with(
                        "study.json",
                        "{\"title\": \"Two seas\", \"sea_level\": {\"curves\":",
                        "[{\"id\": \"low-sea\", \"weight\": 3}, {\"id\": \"high-sea\", \"weight\": 1}]}}")
                .with("sites.csv", "site,latitude,longitude,surveyed_from_m,surveyed_to_m", "Stair,1,2,2,120")
                .with("levels.csv", lines)
                .with(
                        "curves/datapackage.json",
                        "{\"name\": \"own\", \"resources\": [{\"name\": \"low-sea\", \"path\": \"low.csv\",",
                        "  \"stillstand\": {\"kind\": \"highstands\", \"complete\": true}},",
                        "  {\"name\": \"high-sea\", \"path\": \"high.csv\",",
                        "  \"stillstand\": {\"kind\": \"highstands\", \"complete\": true}}]}")
                .with(
                        "curves/low.csv",
                        "stage,age_ka,age_1sigma_ka,level_m,level_1sigma_m",
                        "5a,80,2,-20,3",
                        "5e,120,0,0,2")
                .with(
                        "curves/high.csv",
                        "stage,age_ka,age_1sigma_ka,level_m,level_1sigma_m",
                        "5c,100,2,-5,3",
                        "5e,125,0,10,1");
    }

    /** A level's rate is the mixture of two normals, z over t of each table; quantiles from Commons Math. */
    @Test
    void aLevelIsTheMixtureByWeight() throws IOException {
        StudyResult result = study("Stair,T1,50,1,5e").run();
        LevelAnswer level = StudyOnDisk.level(result, "T1");
        NormalDistribution low = new NormalDistribution(50 / 120.0, Math.hypot(1, 2) / 120);
        NormalDistribution high = new NormalDistribution(40 / 125.0, Math.hypot(1, 1) / 125);
        for (double[] check : new double[][] {
            {0.5, level.rate().orElseThrow().median()},
            {0.025, level.rate().orElseThrow().interval95().low()},
            {0.975, level.rate().orElseThrow().interval95().high()}
        }) {
            double exact = new BrentSolver(1e-12)
                    .solve(
                            200,
                            rate -> 0.75 * low.cumulativeProbability(rate)
                                    + 0.25 * high.cumulativeProbability(rate)
                                    - check[0],
                            0,
                            1);
            assertEquals(exact, check[1], 5e-4);
        }
        assertEquals(
                List.of("low-sea", "high-sea", CurveChoice.STUDY_WEIGHTED, CurveChoice.EQUAL_WEIGHTED),
                result.curveChoice().stream().map(CurveChoice::curve).toList());
        assertEquals(
                List.of(0.75, 0.25, 1.0, 1.0),
                result.curveChoice().stream().map(CurveChoice::weight).toList());
        assertEquals(low.getMean(), result.curveChoice().get(0).rate().median(), 1e-4);
        assertEquals(high.getMean(), result.curveChoice().get(1).rate().median(), 1e-4);
        String table = Files.readString(folder.resolve("results/curve-choice.csv"));
        assertTrue(table.startsWith("site,level,curve,weight,log_evidence,rate_median_m_per_kyr"), table);
    }

    /** A flight's curves weigh their weight times the evidence. */
    @Test
    void aFlightIsTheMixtureByEvidence() throws IOException {
        StudyOnDisk study = study("Stair,T1,18,1,", "Stair,T2,50,1,");
        StudyResult result = study.run("--draws", "16384");
        List<CurveChoice> rows = result.curveChoice().stream()
                .filter(choice -> choice.level().isEmpty())
                .toList();
        double low = rows.get(0).logEvidence().orElseThrow();
        double high = rows.get(1).logEvidence().orElseThrow();
        double weight = 1 / (1 + Math.exp(high - low) / 3);
        assertEquals(weight, rows.get(0).weight(), 1e-12);
        assertEquals(1 - weight, rows.get(1).weight(), 1e-12);
        FlightResult flight = result.flights().get(0);
        assertEquals(Math.log(0.75 * Math.exp(low) + 0.25 * Math.exp(high)), flight.logEvidence(), 1e-9);
        assertEquals(
                weight * rows.get(0).rate().mean().orElseThrow()
                        + (1 - weight) * rows.get(1).rate().mean().orElseThrow(),
                flight.rate().mean().orElseThrow(),
                1e-12);
        assertEquals(
                1,
                flight.pairingsOf("T2").stream()
                                .mapToDouble(FlightResult.Pairing::probability)
                                .sum()
                        + flight.probabilityUnmatched("T2").orElseThrow(),
                1e-3);
        for (FlightResult.Fate fate : flight.missing()) {
            assertEquals(
                    1,
                    fate.recorded() + fate.unseen() + fate.reoccupied() + fate.outside() + fate.absent(),
                    1e-9,
                    fate.highstand());
        }
        assertTrue(study.out().contains("The flight by curve: "), study.out());
    }

    @Test
    void aCurveThatLacksAPinnedHighstandIsLeftOutThere() throws IOException {
        StudyResult result = study("Stair,T1,12,1,5a").run("--draws", "16384");
        assertEquals(List.of(), result.curveChoice());
        Assumption line = result.ledger().stream()
                .filter(each -> each.assumption().equals("curve high-sea is left out at a site"))
                .findFirst()
                .orElseThrow();
        assertEquals("it shows no 5a, to which level \"T1\" is tied", line.value());
        assertEquals("Stair", line.appliesTo());
    }

    @Test
    void aSiteThatNoCurveServesIsAProblem() throws IOException {
        StudyOnDisk study = study("Stair,T1,12,1,5a", "Stair,T2,30,1,5c");
        assertEquals(1, study.execute("run"));
        assertTrue(
                study.err()
                        .endsWith(
                                "sites.csv:2:1: site: found \"Stair\", which no curve of the study serves (low-sea: it"
                                        + " shows no 5c, to which level \"T2\" is tied; high-sea: it shows no 5a, to which level"
                                        + " \"T1\" is tied), expected levels that at least one curve can serve together\n"),
                study.err());
    }

    @Test
    void everyCurveRunsEachShippedCurveTwice() throws IOException {
        StudyResult result = study("Stair,T1,50,1,5e")
                .with("study.json", "{\"title\": \"Every sea\"}")
                .run("--draws", "16384", "--every-curve");
        assertEquals(
                List.of(
                        "spratt-lisiecki-2016",
                        "spratt-lisiecki-2016 (own picks)",
                        "waelbroeck-2002",
                        "waelbroeck-2002 (own picks)",
                        "bintanja-vandewal-2008",
                        "bintanja-vandewal-2008 (own picks)",
                        CurveChoice.STUDY_WEIGHTED,
                        CurveChoice.EQUAL_WEIGHTED),
                result.curveChoice().stream().map(CurveChoice::curve).toList());
    }

    @Test
    void evidenceOfARegionIsTheSumOverItsSites() {
        FlightResult flight = SampleFlight.result();
        List<CurveChoice> choices = List.of(
                choice(flight, "A", "one", -10),
                choice(flight, "A", "two", -12),
                choice(flight, "B", "one", -20),
                choice(flight, "B", "two", -19),
                choice(flight, "C", "one", -5));
        List<CurveEvidence> pooled = CurveEvidence.pooled(choices, site -> Optional.of("north"));
        assertEquals(
                List.of("one", "two"),
                pooled.stream().map(CurveEvidence::curve).toList(),
                "C is served by one curve alone and does not count");
        assertEquals(-30, pooled.get(0).logEvidence());
        assertEquals(-31, pooled.get(1).logEvidence());
        assertEquals(1 / (1 + Math.exp(-1)), pooled.get(0).weight(), 1e-12);
        assertEquals(List.of("A", "B"), pooled.get(0).sites());
    }

    private static CurveChoice choice(FlightResult flight, String site, String curve, double logEvidence) {
        return new CurveChoice(site, Optional.empty(), curve, flight.rate(), Optional.of(logEvidence), 0.5, List.of());
    }
}
