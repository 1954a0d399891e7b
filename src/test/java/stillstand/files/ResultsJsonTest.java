package stillstand.files;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.TreeSet;
import org.junit.jupiter.api.Test;
import stillstand.SampleStudy;
import stillstand.ledger.InputProblem;
import stillstand.study.StudyResult;
import stillstand.study.StudyResult.HighstandUsed;
import stillstand.study.StudyResult.SeaLevelUsed;
import tools.jackson.databind.JsonNode;
import tools.jackson.databind.json.JsonMapper;

class ResultsJsonTest {
    private static final String TEXT = ResultsJson.text(SampleStudy.result());

    @Test
    void whatIsReadIsWhatWasWritten() {
        StudyResult read = ResultsJson.read(TEXT).value().orElseThrow();
        assertEquals(SampleStudy.result(), read);
        assertEquals(TEXT, ResultsJson.text(read));
    }

    @Test
    void keysAreThoseOfTheFormat() {
        JsonNode tree = new JsonMapper().readTree(TEXT);
        assertEquals(
                "provenance sea_level levels waiting flights intervals implied_sea_level leverage residuals curve_choice"
                        + " curve_evidence comparison site_motion site_groups terrace_tilts warnings failures ledger",
                keys(tree));
        assertEquals(
                "site model rate probability_uplift regions68 regions95 weights68 weights95 segments pairings unmatched"
                        + " probability_all_stray most_probable predicted_ages log_evidence numerical_error missing"
                        + " leave_one_out halving sliding_fits model_choice",
                keys(tree.at("/flights/0")));
        assertEquals("[[0.3,0.32],[0.4,0.47]]", tree.at("/flights/0/regions95").toString());
        assertEquals("from_ka rate", keys(tree.at("/flights/0/segments/0")));
        assertEquals("level highstand probability", keys(tree.at("/flights/0/pairings/0")));
        assertEquals("mean log_evidence pairing", keys(tree.at("/flights/0/numerical_error")));
        assertEquals(
                "highstand age_ka height_m height_1sigma_m recorded unseen reoccupied outside absent",
                keys(tree.at("/flights/0/missing/0")));
        assertEquals("level log_predictive rate", keys(tree.at("/flights/0/leave_one_out/0")));
        assertEquals("error width95_change_percent", keys(tree.at("/flights/0/halving/0")));
        assertEquals("criterion rate rms_m r_squared probability_as_far", keys(tree.at("/flights/0/sliding_fits/0")));
        assertEquals("model log_evidence log10_bayes_factor", keys(tree.at("/flights/0/model_choice/0")));
        assertEquals(
                "tornado next_measurements assumption_switches samples_left_out curves_left_out",
                keys(tree.at("/leverage")));
        assertEquals("site level stage rate bars other_stages", keys(tree.at("/leverage/tornado/0")));
        assertEquals(
                "input unit input68 input95 rate_at_low68 rate_at_high68 rate_at_low95 rate_at_high95",
                keys(tree.at("/leverage/tornado/0/bars/0")));
        assertEquals("stage probability rate", keys(tree.at("/leverage/tornado/0/other_stages/0")));
        assertEquals(
                "site rate_of level measurement sigma unit width95 expected_width95 width95_change_percent"
                        + " width95_change_percent_error probability_wider pairing effective_draws",
                keys(tree.at("/leverage/next_measurements/0")));
        assertEquals("certainty expected_certainty error", keys(tree.at("/leverage/next_measurements/0/pairing")));
        assertEquals(
                "site rate_of assumption was would_be rate rate_would_be",
                keys(tree.at("/leverage/assumption_switches/0")));
        assertEquals("median interval95", keys(tree.at("/leverage/assumption_switches/0/rate")));
        assertEquals(
                "site level sample level_rate flight_rate flight_rate_without",
                keys(tree.at("/leverage/samples_left_out/0")));
        assertEquals("site rate_of curve weight rate rate_without", keys(tree.at("/leverage/curves_left_out/0")));
        assertEquals("site level predicted_m measured_m sigma_m", keys(tree.at("/residuals/0")));
        assertEquals(
                "a b a_level b_level difference probability_a_faster correlation independent shared_errors",
                keys(tree.at("/comparison/0")));
        assertEquals("difference probability_a_faster", keys(tree.at("/comparison/0/independent")));
        assertEquals(
                "site coast level latitude longitude distance_along_coast_km area_km2 rate up stable down motion",
                keys(tree.at("/site_motion/0")));
        assertEquals("group sites pooled tilt plane area_mean", keys(tree.at("/site_groups/0")));
        assertEquals("mean spread spread_scale sites", keys(tree.at("/site_groups/0/pooled")));
        assertEquals("site rate", keys(tree.at("/site_groups/0/pooled/sites/0")));
        assertEquals(
                "at_origin slope covariance chi_squared degrees p", keys(tree.at("/site_groups/0/tilt/shared_errors")));
        assertEquals("value sd unit", keys(tree.at("/site_groups/0/tilt/independent/slope")));
        assertEquals(
                "at_centre east north steepest steepest_to_degrees chi_squared degrees p",
                keys(tree.at("/site_groups/0/plane/shared_errors")));
        assertEquals("site level points along rate", keys(tree.at("/terrace_tilts/0")));
        assertEquals("version seed generator inputs started seconds", keys(tree.at("/provenance")));
        assertEquals("file sha256", keys(tree.at("/provenance/inputs/0")));
        assertEquals("id weight points", keys(tree.at("/sea_level/curves/0")));
        assertEquals("age_ka level_m low68_m high68_m low95_m high95_m", keys(tree.at("/sea_level/curves/0/points/0")));
        assertEquals(
                "stage class age_ka age_1sigma_ka level_m level_1sigma_m source",
                keys(tree.at("/sea_level/highstands/0")));
        assertEquals(
                "site level stages rate rate_with_prior first_order age relative_sea_level_m probability_uplift budget"
                        + " monte_carlo samples agreement",
                keys(tree.at("/levels/0")));
        assertEquals("highstand probability", keys(tree.at("/levels/0/stages/0")));
        assertEquals(
                "median mean sd interval68 interval95 shortest68 shortest95 density unit",
                keys(tree.at("/levels/0/rate")));
        assertEquals("from to values", keys(tree.at("/levels/0/rate/density")));
        assertEquals("rate sigma", keys(tree.at("/levels/0/first_order")));
        assertEquals("median mean sd interval68 interval95 unit", keys(tree.at("/levels/0/age")));
        assertEquals("elevation age sea_level", keys(tree.at("/levels/0/budget")));
        assertEquals("share total_share sd_if_exact", keys(tree.at("/levels/0/budget/age")));
        assertEquals("draws converged error_median error_interval95", keys(tree.at("/levels/0/monte_carlo")));
        assertEquals(
                "[1.0E-4,2.0E-4]",
                tree.at("/levels/0/monte_carlo/error_interval95").toString());
        assertEquals("sample why_no_rate", keys(tree.at("/levels/0/samples/1")));
        assertEquals("mswd degrees p", keys(tree.at("/levels/0/agreement")));
        assertEquals("up_slower_than down_slower_than probability", keys(tree.at("/levels/2/bound")));
        assertEquals("site level reason", keys(tree.at("/waiting/0")));
        assertEquals("site from_level to_level rate", keys(tree.at("/intervals/0")));
        assertEquals("site level age sea_level_m uplift_from circular", keys(tree.at("/implied_sea_level/0")));
        assertEquals("file line column message", keys(tree.at("/warnings/0")));
        assertEquals("site reason", keys(tree.at("/failures/0")));
        assertEquals("assumption value source applies_to", keys(tree.at("/ledger/0")));
    }

    private static String keys(JsonNode node) {
        return String.join(" ", node.propertyNames());
    }

    @Test
    void aLevelWithoutARateHoldsItsSamplesAndNoMore() {
        JsonNode tree = new JsonMapper().readTree(TEXT);
        assertEquals("site level stages samples", keys(tree.at("/levels/1")));
    }

    @Test
    void smallThingsStandOnOneLine() {
        assertTrue(TEXT.contains("\n      \"first_order\": {\"rate\": 0.4356, \"sigma\": 0.0198},\n"), TEXT);
        assertTrue(TEXT.endsWith("}\n"), "the file ends in a line feed");
        assertFalse(TEXT.contains("null"));
    }

    @Test
    void aNumberThatIsNoneIsRefusedBeforeWriting() {
        StudyResult good = SampleStudy.result();
        HighstandUsed bad = new HighstandUsed("5e", "interglacial", 122.5, Double.NaN, 7.5, 1.5, "nobody");
        StudyResult broken = new StudyResult(
                good.provenance(),
                new SeaLevelUsed(List.of(), List.of(bad)),
                good.levels(),
                good.waiting(),
                good.flights(),
                good.intervals(),
                good.impliedSeaLevel(),
                good.leverage(),
                good.residuals(),
                good.curveChoice(),
                good.curveEvidence(),
                good.warnings(),
                good.failures(),
                good.ledger());
        String message = assertThrows(IllegalArgumentException.class, () -> ResultsJson.text(broken))
                .getMessage();
        assertEquals(
                "every number of a result must be finite but sea_level.highstands[0].age_1sigma_ka is not", message);
    }

    @Test
    void otherVersionsAreRefusedWithASentence() {
        assertEquals(
                "results.json: provenance.version: found \"9.9.9\", expected \"0.1.0\"; run the study again with this"
                        + " version of Stillstand",
                problem(TEXT.replaceFirst("\"version\": \"0.1.0\"", "\"version\": \"9.9.9\"")));
        assertEquals(
                "results.json: provenance.version: found nothing, expected \"0.1.0\"; run the study again with this"
                        + " version of Stillstand",
                problem("{}"));
    }

    @Test
    void readingIsStrict() {
        String misfit = "found nothing, or what does not belong there, expected what Stillstand writes there";
        assertEquals(
                "results.json: levels[0].first_order.slope: " + misfit,
                problem(TEXT.replaceFirst("\"first_order\": \\{\"rate\"", "\"first_order\": {\"slope\": 1, \"rate\"")));
        assertEquals(
                "results.json: levels[0].first_order.rate: " + misfit,
                problem(TEXT.replaceFirst("\"rate\": 0.4356", "\"rate\": \"0.4356\"")));
        assertEquals(
                "results.json: levels[0].first_order.sigma: " + misfit,
                problem(TEXT.replaceFirst("\"rate\": 0.4356, \"sigma\": 0.0198", "\"rate\": 0.4356")));
        assertEquals(
                "results.json: levels[0].rate.interval68.high: " + misfit,
                problem(TEXT.replaceFirst("\"interval68\": \\[[^,]*, ", "\"interval68\": [")));
        assertEquals(
                "results.json: levels[0].first_order.rate: found no finite number or text, expected one, or no such key",
                problem(TEXT.replaceFirst("\"rate\": 0.4356", "\"rate\": null")));
        assertEquals(
                "results.json: levels[0].first_order.rate: found no finite number or text, expected one, or no such key",
                problem(TEXT.replaceFirst("\"rate\": 0.4356", "\"rate\": 1e400")));
        assertEquals(
                "results.json:1:3: found broken json, expected a file that Stillstand wrote", problem("{ oh dear"));
        assertTrue(problem(TEXT.replaceFirst("\"waiting\"", "\"levels\"")).contains("broken json"), "a doubled key");
        assertTrue(problem(TEXT + "{}").startsWith("results.json"), "something after the end");
    }

    private static String problem(String text) {
        List<InputProblem> problems = ResultsJson.read(text).problems();
        assertEquals(1, problems.size());
        return problems.get(0).message();
    }

    @Test
    void everyMissingKeyIsNoticed() {
        JsonNode tree = new JsonMapper().readTree(TEXT);
        List<String> unnoticed = new ArrayList<>();
        for (String key : new TreeSet<>(tree.propertyNames())) {
            JsonNode without = tree.deepCopy();
            ((tools.jackson.databind.node.ObjectNode) without).remove(key);
            if (ResultsJson.read(without.toString()).value().isPresent()) {
                unnoticed.add(key);
            }
        }
        assertEquals(List.of(), unnoticed);
    }

    @Test
    void ownFilesAreKnownWhateverTheirVersion() {
        assertTrue(ResultsJson.isOurs(TEXT.replaceFirst("0\\.1\\.0", "7.0")));
        assertFalse(ResultsJson.isOurs("{\"a\": 1}"));
        assertFalse(ResultsJson.isOurs("notes"));
        assertFalse(ResultsJson.isOurs(""));
        assertEquals(Optional.empty(), ResultsJson.read("").value());
    }
}
