package stillstand.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static stillstand.cli.StudyOnDisk.level;

import java.io.IOException;
import java.nio.file.Path;
import java.util.Map;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import stillstand.study.StudyResult;
import stillstand.uplift.ImpliedSeaLevel;
import stillstand.uplift.LevelAnswer;

/** Published rates, from files through the command to {@code results.json}. */
class PublishedRatesReferenceTest {
    @TempDir
    Path folder;

    private static LevelAnswer.FirstOrder firstOrder(StudyResult result, String level) {
        return level(result, level).firstOrder().orElseThrow();
    }

    /**
     * Haiti, north-west peninsula (Dodge et al. 1983, Science 219, 1423-1425): +6 m at 130 ka makes the crest at 52 m rise at
     * 0.354 m/kyr, and sea level comes out at -10 m at 108 ka and -13 m at 81 ka. The 3 m of the crests are the compilers'
     * (Rovere et al. 2023, ESSD 15, 1-23).
     */
    @Test
    void haiti() throws IOException {
        StudyResult result = new StudyOnDisk(folder)
                .withCompleteTable("5a,81,0,-13,0", "5c,108,0,-10,0", "5e,130,0,6,0")
                .with("sites.csv", "site", "NW Peninsula")
                .with(
                        "levels.csv",
                        "site,level,elevation_m,elevation_1sigma_m,highstand",
                        "NW Peninsula,T3,52,3,5e",
                        "NW Peninsula,T2,28,3,5c",
                        "NW Peninsula,T1,16,3,5a")
                .with(
                        "samples.csv",
                        "site,sample,level,age_ka,age_1sigma_ka",
                        "NW Peninsula,C2,T2,108,5",
                        "NW Peninsula,C1,T1,81,3")
                .run();
        // printed with the age exact; (52 - 6) / 130
        assertEquals(0.353846, firstOrder(result, "T3").rate(), 5e-7);
        assertEquals(3 / 130.0, firstOrder(result, "T3").sigma(), 1e-12);
        Map<String, Double> printed = Map.of("T2", -10.0, "T1", -13.0);
        Map<String, Double> derived = Map.of("T2", -10.215, "T1", -12.662);
        assertEquals(2, result.impliedSeaLevel().size());
        for (ImpliedSeaLevel implied : result.impliedSeaLevel()) {
            double mean = implied.seaLevelMetres().mean().orElseThrow();
            assertEquals("T3", implied.upliftFrom());
            assertEquals(false, implied.circular());
            // 28 - 0.353846 x 108 and 16 - 0.353846 x 81; five Monte Carlo errors of 262144 draws
            double error = implied.seaLevelMetres().sd().orElseThrow() / Math.sqrt(262144);
            assertEquals(derived.getOrDefault(implied.level(), Double.NaN), mean, 5 * error + 5e-4);
            assertEquals(printed.getOrDefault(implied.level(), Double.NaN), (double) Math.round(mean));
        }
    }

    /**
     * Sicily (Antonioli et al. 2006, Quaternary International 145-146, 3-18, tables 1 and 3): ten last-interglacial rates that follow
     * from +7 m and 125 ka (124 ka for two) to the printed digit, and one, Ganzirri 0.71, that does not.
     */
    @Test
    void sicily() throws IOException {
        StudyResult result = new StudyOnDisk(folder)
                .withCompleteTable("5.5late,124,0,7,0", "5.5,125,0,7,0")
                .with("sites.csv", "site", "Sicily")
                .with(
                        "levels.csv",
                        "site,level,elevation_m,elevation_1sigma_m,highstand",
                        "Sicily,Cefalu,29,0.5,5.5",
                        "Sicily,Capo Zafferano,7,0.5,5.5",
                        "Sicily,Palermo town,10,5,5.5",
                        "Sicily,Capo Gallo,2,5,5.5",
                        "Sicily,Castellammare,18,3,5.5",
                        "Sicily,Cala Bianca,5,3,5.5",
                        "Sicily,San Vito low,8,0.5,5.5",
                        "Sicily,San Vito high,14,0.5,5.5",
                        "Sicily,Milazzo south,90,0,5.5",
                        "Sicily,Taormina,115,4.3,5.5late",
                        "Sicily,St Alessio,140,0,5.5late",
                        "Sicily,Ganzirri,110,0,5.5")
                .run();
        Map<String, Double> printed = Map.of(
                "Cefalu", 0.176,
                "Capo Zafferano", 0.0,
                "Palermo town", 0.024,
                "Capo Gallo", -0.040,
                "Castellammare", 0.088,
                "Cala Bianca", -0.016,
                "San Vito low", 0.008,
                "San Vito high", 0.056,
                "Milazzo south", 0.664);
        printed.forEach(
                (place, rate) -> assertEquals(rate, firstOrder(result, place).rate(), 1e-12, place));
        assertEquals(0.87, firstOrder(result, "Taormina").rate(), 0.005);
        assertEquals(1.07, firstOrder(result, "St Alessio").rate(), 0.005);
        // a printed rate that its own printed height does not give
        assertTrue(Math.abs(firstOrder(result, "Ganzirri").rate() - 0.71) > 0.1);
    }

    /**
     * Barbados (WALIS v1.0, Rovere et al. 2023, ESSD 15, 1-23): Christ Church Ridge 40 m and South Point 37 m, each with 123 ka and +7.5 m;
     * a sample at 27 m with 3 m of water over it stands for a shoreline at 30 m. Input errors are inferred.
     */
    @Test
    void barbados() throws IOException {
        StudyResult result = new StudyOnDisk(folder)
                .withCompleteTable("5e,123,6,7.5,1.5")
                .with("sites.csv", "site", "Barbados")
                .with(
                        "levels.csv",
                        "site,level,elevation_m,elevation_1sigma_m,highstand,reference_water_level_m",
                        "Barbados,Christ Church Ridge,40,3,5e,0",
                        "Barbados,South Point,37,3,5e,0",
                        "Barbados,Touce's Point,27,1,5e,-3")
                .run();
        assertEquals(0.264227642, firstOrder(result, "Christ Church Ridge").rate(), 1e-8);
        assertEquals(0.030161818, firstOrder(result, "Christ Church Ridge").sigma(), 1e-8);
        assertEquals(0.239837398, firstOrder(result, "South Point").rate(), 1e-8);
        assertEquals(0.182926829, firstOrder(result, "Touce's Point").rate(), 1e-8);
        // the mean of the draws lies above by (6 / 123)^2 of the rate (Rovere's rate is the quotient of means)
        LevelAnswer ridge = level(result, "Christ Church Ridge");
        double mean = ridge.rate().orElseThrow().mean().orElseThrow();
        double error = ridge.rate().orElseThrow().sd().orElseThrow()
                / Math.sqrt(ridge.monteCarlo().orElseThrow().draws());
        assertEquals(0.264227642 * (1 + Math.pow(6 / 123.0, 2)), mean, 4 * error + 5e-6);
    }

    /**
     * Huon Gulf (Galewsky et al. 1996, Geology 24, 819-822): a reef 2000 m down, 348 +- 10 ka, printed -5.7 m/kyr without a sea-level term;
     * about -5.46 with a lowstand of -100 m (arithmetic on their figures).
     */
    @Test
    void huonGulf() throws IOException {
        StudyResult result = new StudyOnDisk(folder)
                .withCompleteTable("none,348,10,0,0", "lowstand,348,10,-100,0")
                .with("sites.csv", "site", "Huon Gulf")
                .with(
                        "levels.csv",
                        "site,level,elevation_m,elevation_1sigma_m,highstand",
                        "Huon Gulf,A,-2000,0,none",
                        "Huon Gulf,B,-2000,0,lowstand")
                .run();
        assertEquals(-5.7, firstOrder(result, "A").rate(), 0.05);
        assertEquals(0.165, firstOrder(result, "A").sigma(), 5e-4);
        assertEquals(-5.46, firstOrder(result, "B").rate(), 0.005);
        assertEquals(0.0, level(result, "A").probabilityUplift().orElseThrow());
    }
}
