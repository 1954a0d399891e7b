package stillstand.sealevel;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import stillstand.uncertainty.Normal;

/** What the choice of a curve does to a rate {@code (z - level) / age}, against the same arithmetic on published levels. */
class CurveChoiceReferenceTest {
    /**
     * A terrace given to one stage, m/kyr: by the peaks of Spratt and Lisiecki 2016, Waelbroeck et al. 2002, Bintanja and van de
     * Wal 2008 (full series), and by Creveling et al. 2017 (5a, 5c) or 6 m at 125 ka (5e). 0.015 m/kyr covers a peak moved
     * by 1 ka and 0.75 m in condensing.
     */
    @ParameterizedTest
    @CsvSource({
        "60, 5a, 1.031, 0.965, 1.197, 0.856",
        "60, 5c, 0.780, 0.801, 0.986, 0.694",
        "20, 5a, 0.549, 0.475, 0.703, 0.356"
    })
    void rateMovesWithTheCurve(
            double heightMetres, String stage, double spratt, double waelbroeck, double bintanja, double creveling) {
        assertEquals(spratt, plainRate(ShippedPackage.SPRATT, stage, heightMetres), 0.015);
        assertEquals(waelbroeck, plainRate(ShippedPackage.WAELBROECK, stage, heightMetres), 0.015);
        assertEquals(bintanja, plainRate(ShippedPackage.BINTANJA, stage, heightMetres), 0.015);
        Highstand independent = HighstandTable.fromCurve(
                        ShippedPackage.SPRATT,
                        ShippedPackage.STAGES,
                        ShippedPackage.INDEPENDENT,
                        HighstandOptions.DEFAULT)
                .find(stage)
                .orElseThrow();
        assertEquals(creveling, (heightMetres - independent.level().mean()) / independent.ageKa(), 0.001);
    }

    /** As above for 5e: 0.470, 0.434, 0.482 m/kyr. */
    @Test
    void lastInterglacialDependsLeast() {
        assertEquals(0.470, plainRate(ShippedPackage.SPRATT, "5e", 60), 0.005);
        assertEquals(0.434, plainRate(ShippedPackage.WAELBROECK, "5e", 60), 0.005);
        assertEquals(0.482, plainRate(ShippedPackage.BINTANJA, "5e", 60), 0.005);
    }

    /** A shoreline at +6 +- 1 m of a coast that did not move comes out as such under the default overrides. */
    @Test
    void aStableCoastComesOutStable() {
        HighstandTable table = HighstandTable.fromCurve(
                ShippedPackage.SPRATT, ShippedPackage.STAGES, ShippedPackage.INDEPENDENT, HighstandOptions.DEFAULT);
        Normal rate = rateOf(table, 6, 1);
        assertTrue(rate.quantile(0.16) < 0 && rate.quantile(0.84) > 0, rate.toString());
        HighstandTable plain = HighstandTable.fromCurve(
                ShippedPackage.SPRATT, ShippedPackage.STAGES, HighstandOverrides.NONE, HighstandOptions.DEFAULT);
        Normal plainRate = rateOf(plain, 6, 1);
        // the figures of sea-level-curves/README.md
        assertEquals(-0.012, rate.mean(), 0.0005);
        assertEquals(0.033, rate.sigma(), 0.0005);
        assertEquals(0.037, plainRate.mean(), 0.0005);
        assertEquals(0.074, plainRate.sigma(), 0.0005);
    }

    /** First order: variance of {@code (z - e) / t} with the age's part {@code (rate sigma_t / t)^2}. */
    private static Normal rateOf(HighstandTable table, double heightMetres, double sigmaMetres) {
        Highstand row = table.find("5e").orElseThrow();
        double rate = (heightMetres - row.level().mean()) / row.ageKa();
        double height = Math.hypot(sigmaMetres, row.marginalLevelSigmaMetres(table.sharedErrors()));
        double age = rate * row.marginalAgeSigmaKa(table.sharedErrors());
        return new Normal(rate, Math.hypot(height, age) / row.ageKa());
    }

    private static double plainRate(SeaLevelCurve curve, String stage, double heightMetres) {
        TurningPoint pick = TurningPoints.highstand(
                        curve, ShippedPackage.STAGES.find(stage).orElseThrow())
                .orElseThrow();
        return (heightMetres - pick.levelMetres()) / pick.ageKa();
    }
}
