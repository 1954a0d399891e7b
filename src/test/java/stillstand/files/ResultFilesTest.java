package stillstand.files;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.List;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import stillstand.SampleStudy;
import stillstand.sensitivity.Leverage;

class ResultFilesTest {
    private static final Evidence EVIDENCE = new Evidence(SampleStudy.sites());

    /** A cell of a table without quotes in it. */
    private static String cell(String table, int row, String header) {
        List<String> lines = table.lines().toList();
        List<String> headers = Arrays.asList(lines.get(0).split(",", -1));
        assertTrue(headers.contains(header), header + " in " + headers);
        return lines.get(row).split(",", -1)[headers.indexOf(header)];
    }

    @Test
    void paperTableRoundsToTheErrors() {
        String table = PaperTable.text(EVIDENCE, SampleStudy.result());
        assertEquals("""
                site,level,indicator,elevation_m,elevation_1sigma_m,relative_sea_level_m,relative_sea_level_1sigma_m,\
                stage,stage_probability,sea_level_m,sea_level_1sigma_m,age_ka,age_1sigma_ka,samples_accepted,\
                samples_total,rate_m_per_kyr,rate_1sigma_m_per_kyr,rate_low95_m_per_kyr,rate_high95_m_per_kyr,\
                why_no_rate,x_formula,x_notebook,site_x_team
                North cliff,T4,shoreline-angle,61.4,1.5,60.9,1.8,5e,0.75,7.5,1.5,122.5,3.3,1,2,0.44,0.02,0.40,0.47,,\
                '=1+1,-7,'@both
                North cliff,T2,shoreline-angle,20,1,,,,,,,,,0,0,,,,,it is tied to no single highstand,'=1+1,-7,'@both
                Old shore,S1,shoreline-angle,7,0,7.0,1.0,5e,1.00,7.5,1.5,122.5,3.3,0,0,0.00,0.01,-0.03,0.02,,'=1+1,-7,
                """, table);
    }

    @Test
    void ratesKeepAllDigits() {
        String table = RatesTable.text(EVIDENCE, SampleStudy.result());
        assertEquals(6, table.lines().count());
        assertEquals("0.4359", cell(table, 1, "rate_median_m_per_kyr"));
        assertEquals("0.396896", cell(table, 1, "rate_low95_m_per_kyr"));
        assertEquals("0.4351", cell(table, 1, "with_prior_median_m_per_kyr"));
        assertEquals("0.0198", cell(table, 1, "first_order_1sigma_m_per_kyr"));
        assertEquals("131072", cell(table, 1, "draws"));
        assertEquals("yes", cell(table, 1, "converged"));
        assertEquals("1.0E-5", cell(table, 1, "error_median_m_per_kyr"));
        assertEquals("2.0E-4", cell(table, 1, "error_high95_m_per_kyr"));
        assertEquals("C-1", cell(table, 2, "sample"));
        assertEquals("0.41", cell(table, 2, "rate_median_m_per_kyr"));
        assertEquals("", cell(table, 2, "with_prior_median_m_per_kyr"));
        assertEquals("12", cell(table, 2, "x_notebook"));
        assertEquals("the curve is too steep at this age to give a rate", cell(table, 3, "why_no_rate"));
        assertEquals("it is tied to no single highstand", cell(table, 4, "why_no_rate"));
        assertEquals("-7", cell(table, 4, "x_notebook"));
        assertEquals("-0.004", cell(table, 5, "rate_median_m_per_kyr"));
        assertEquals("0.0234", cell(table, 5, "up_slower_than_m_per_kyr"));
        assertEquals("", cell(table, 5, "error_median_m_per_kyr"));
    }

    @Test
    void budgetHasARowForEachInputThatIsThere() {
        assertEquals("""
                site,level,input,share,total_share,sd_if_exact_m_per_kyr
                North cliff,T4,elevation,0.5,0.5625,0.0125
                North cliff,T4,age,0.5,0.5625,0.0125
                North cliff,T4,sea_level,0.5,0.5625,0.0125
                """, ResultFiles.budget(SampleStudy.result()));
    }

    @Test
    void ledgerIsWrittenWholeAndSafe() {
        assertEquals("""
                assumption,value,source,applies_to
                datum offset,"0 m, exact",Stillstand's default,North cliff
                '=prior of the rate,cauchy 0 0.5 from -10 to 15,the study,all
                """, ResultFiles.ledger(SampleStudy.result()));
    }

    @Test
    void cellsThatASpreadsheetCouldRunAreDisarmed() {
        List<String> dangerous = List.of("=1", "+cmd|' /C calc'!A0", "-2+3", "@SUM(1)", "\t=1", "-0x1p3", "+5d", "-");
        List<String> numbers = List.of("-5", "+5", "-0.25", "-1.0E-5", "5a", "", "a=b", "−5");
        assertEquals(
                dangerous.stream().map(cell -> "'" + cell).toList(),
                dangerous.stream().map(CsvCells::safe).toList());
        assertEquals(numbers, numbers.stream().map(CsvCells::safe).toList());
        assertEquals(
                List.of("a,b", "\"x,y\",\"say \"\"no\"\"\"", "\"\",2"),
                CsvCells.table(List.of("a", "b"), List.of(List.of("x,y", "say \"no\""), List.of("", "2")))
                        .lines()
                        .toList());
    }

    @Test
    void tablesOfLeverageHaveARowForEachThing() {
        Leverage leverage = SampleStudy.result().leverage();
        String tornado = LeverageTables.tornado(leverage);
        assertEquals(4, tornado.lines().count());
        assertEquals("shared offset", cell(tornado, 1, "input"));
        assertEquals("-6.0", cell(tornado, 1, "input_low95"));
        assertEquals("5e", cell(tornado, 3, "highstand"));
        String next = LeverageTables.nextMeasurements(leverage);
        assertEquals("-38.5", cell(next, 1, "width95_change_percent"));
        assertEquals("0.9375", cell(next, 1, "expected_pairing_certainty"));
        assertEquals("", cell(next, 2, "expected_pairing_certainty"));
        assertEquals("C-1", cell(next, 2, "sample"));
        String switches = LeverageTables.switches(leverage);
        assertEquals("0.43", cell(switches, 1, "rate_would_be_median_m_per_kyr"));
        assertEquals("", cell(switches, 2, "rate_would_be_median_m_per_kyr"));
        String samples = LeverageTables.samples(leverage);
        assertEquals("0.41", cell(samples, 1, "flight_rate_without_median_m_per_kyr"));
        assertEquals("", cell(samples, 1, "level_rate_without_median_m_per_kyr"));
        String curves = LeverageTables.curves(leverage);
        assertEquals("made-up-curve", cell(curves, 1, "curve"));
        assertEquals("0.75", cell(curves, 1, "weight"));
    }

    /** An empty table would look like an answer; and what is left of an older run is not the new run's. */
    @Test
    void onlyTablesWithRowsAreWritten(@TempDir Path folder) throws IOException {
        LeverageTables.write(folder, Leverage.NONE);
        try (Stream<Path> files = Files.list(folder)) {
            assertEquals(0, files.count());
        }
        LeverageTables.write(folder, SampleStudy.result().leverage());
        try (Stream<Path> files = Files.list(folder)) {
            assertEquals(
                    List.of(
                            "assumption-switches.csv",
                            "curves-left-out.csv",
                            "next-measurements.csv",
                            "samples-left-out.csv",
                            "tornado.csv"),
                    files.map(file -> file.getFileName().toString()).sorted().toList());
        }
    }
}
