package stillstand.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Path;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import stillstand.comparison.SiteComparison;
import stillstand.study.StudyResult;

/** Published pairs of sites, as differences. Tolerances are four standard errors of the common draws. */
class PublishedPairsReferenceTest {
    private static final double ROOT_OF_DRAWS = 256; // 4 blocks of 2^14

    @TempDir
    Path folder;

    /**
     * Barbados (WALIS v1.0, Rovere et al. 2023, ESSD 15, 1-23): Christ Church Ridge at 40 m rises at 0.264227642 m/kyr, South Point at 37
     * m at 0.239837398 m/kyr, each with 123 ka and +7.5 m; their errors of 3 m, 6 ka and 1.5 m are inferred, and to first order
     * make 0.030161818 and 0.029672894 m/kyr. On one coast sea level and age are the same for both: what is left of the error of
     * the difference is the two heights, and the age by the difference itself.
     */
    @Test
    void christChurchAgainstSouthPoint() throws IOException {
        StudyResult result = new StudyOnDisk(folder)
                .withCompleteTable("5e,123,6,7.5,1.5")
                .with(
                        "sites.csv",
                        "site,latitude,longitude,coast",
                        "Christ Church Ridge,13.09,-59.53,Barbados",
                        "South Point,13.05,-59.53,Barbados")
                .with(
                        "levels.csv",
                        "site,level,elevation_m,elevation_1sigma_m,highstand",
                        "Christ Church Ridge,Rendezvous Hill,40,3,5e",
                        "South Point,Rendezvous Hill,37,3,5e")
                .run();
        SiteComparison pair = result.comparison().get(0);
        double expected = 0.264227642 - 0.239837398;
        double sigma = Math.hypot(Math.sqrt(2) * 3, expected * 6) / 123;
        assertEquals(expected, pair.difference().median(), 5 * sigma / ROOT_OF_DRAWS);
        // the ratio's own skewness adds (6 / 123)^2 of the sigma
        assertEquals(sigma, pair.difference().sd().orElseThrow(), 0.02 * sigma);
        // 3 m between heights of +- 3 m each: the normal distribution function at 1 / sqrt 2
        assertEquals(0.760, pair.probabilityAFaster(), 0.01);
        assertEquals(
                Math.hypot(0.030161818, 0.029672894),
                pair.independent().difference().sd().orElseThrow(),
                0.03 * 0.0423);
        assertEquals(SiteComparison.ONE_COAST, pair.sharedErrors());
    }

    /**
     * Huon Peninsula (Chappell and Shackleton 1986, Nature 324, 137-140, heights in WALIS v1.0, Rovere et al. 2023, ESSD 15, 1-23): reef Va
     * stands at 117 m at Kwambu and at 260 m at Tewai, reef VIa at 160 and 338 m; the compilers give heights a fifth of
     * themselves as error. The source's words for the first are 1.85 m/kyr; Tewai stands more than twice as high. The same reef at
     * both: sea level cancels whatever it was, and the difference is that of the heights over the age (82 ka, Broecker et al.
     * 1968, Science 159, 297-300, for the 5a reef; 104 ka for 5c).
     */
    @Test
    void tewaiAgainstKwambu() throws IOException {
        StudyOnDisk study = new StudyOnDisk(folder)
                .with("sites.csv", "site,coast", "Tewai,Huon", "Kwambu,Huon")
                .with(
                        "levels.csv",
                        "site,level,elevation_m,elevation_1sigma_m,highstand",
                        "Tewai,Va,260,52,5a",
                        "Kwambu,Va,117,23.4,5a");
        for (double seaMetres : new double[] {-20, 0}) {
            StudyResult result =
                    study.withCompleteTable("5a,82,2," + seaMetres + ",6").run();
            SiteComparison pair = result.comparison().get(0);
            double sigma = Math.hypot(52, 23.4) / 82;
            assertEquals((260 - 117) / 82.0, pair.difference().median(), 5 * sigma / ROOT_OF_DRAWS);
            assertEquals(sigma, pair.difference().sd().orElseThrow(), 0.02 * sigma);
            assertTrue(pair.probabilityAFaster() > 0.985 && pair.probabilityAFaster() < 0.999);
        }
        StudyResult both = study.withCompleteTable("5a,82,2,-20,6", "5c,104,2,-20,6")
                .with(
                        "levels.csv",
                        "site,level,elevation_m,elevation_1sigma_m,highstand",
                        "Tewai,Va,260,52,5a",
                        "Tewai,VIa,338,67.6,5c",
                        "Kwambu,VIa,160,32,5c")
                .run();
        // Tewai's Va is known better, yet the reef that both have is compared
        SiteComparison pair = both.comparison().get(0);
        assertEquals("VIa", pair.aLevel().orElseThrow());
        assertEquals("VIa", pair.bLevel().orElseThrow());
        double sigma = Math.hypot(67.6, 32) / 104;
        assertEquals((338 - 160) / 104.0, pair.difference().median(), 5 * sigma / ROOT_OF_DRAWS);
    }
}
