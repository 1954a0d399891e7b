package stillstand.files;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.charset.StandardCharsets;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import stillstand.comparison.ComparisonRules;
import stillstand.ledger.Assumption;
import stillstand.ledger.InputProblem;
import stillstand.ledger.Loaded;
import stillstand.sensitivity.MeasurementPlan;
import stillstand.shoreline.IndicativeRule;
import stillstand.study.StatedSettings;
import stillstand.study.StatedSettings.Place;
import stillstand.study.StudySettings;
import stillstand.study.StudySettings.Changes;
import stillstand.study.StudySettings.Decay;
import stillstand.study.StudySettings.Draws;
import stillstand.study.StudySettings.Matching;
import stillstand.study.StudySettings.RateChoice;
import stillstand.study.StudySettings.Recording;
import stillstand.study.StudySettings.Screening;
import stillstand.study.StudySettings.SeaLevelChoice;
import stillstand.study.StudySettings.Setting;
import stillstand.study.StudySettings.Strays;
import stillstand.study.StudySettings.WeightedCurve;
import stillstand.uncertainty.Interval;
import stillstand.uplift.CauchyPrior;
import stillstand.uplift.HalfCauchyPrior;

class StudyJsonTest {
    private static final StudySettings DEFAULTS = new StudySettings(
            "A coast",
            "",
            20261201,
            new Draws(1048576, 2, Optional.empty()),
            new SeaLevelChoice(
                    List.of(new WeightedCurve("spratt-lisiecki-2016", 1)),
                    Optional.empty(),
                    Optional.of("independent-highstands"),
                    true,
                    Optional.empty(),
                    new Setting(3, false),
                    new Setting(6, false),
                    Optional.empty(),
                    false),
            new RateChoice(new CauchyPrior(0, 0.5, -10, 15), Changes.NONE),
            new Matching(
                    new Recording.Beta(4, 2.5),
                    Optional.empty(),
                    Optional.empty(),
                    1000,
                    new Setting(0.05, false),
                    0.95),
            IndicativeRule.QUADRATURE,
            new Screening(
                    Optional.empty(),
                    Optional.empty(),
                    Optional.empty(),
                    Optional.empty(),
                    Optional.empty(),
                    Optional.empty(),
                    Optional.empty()),
            Optional.empty());

    private record Case(String json, List<String> messages) {
        @Override
        public String toString() {
            return messages.get(0);
        }
    }

    private static Case bad(String json, String... messages) {
        return new Case(json, List.of(messages));
    }

    private static Loaded<StatedSettings> parse(String json) {
        return StudyJson.parse(TextFile.decode("study.json", json.getBytes(StandardCharsets.UTF_8))
                .value()
                .orElseThrow());
    }

    static List<Case> cases() {
        return List.of(
                bad(
                        "{\"title\": \"x\", \"comparison\": {\"stable_within_m_per_kyr\": 0}}",
                        "study.json:1:58: comparison.stable_within_m_per_kyr: found 0, expected a number above 0"),
                bad(
                        "{\"title\": \"x\", \"comparison\": {\"pairs\": [[\"North\"]]}}",
                        "study.json:1:41: comparison.pairs[0]: found a list [ … ], expected a pair of sites such as [\"North\", \"South\"]"),
                bad(
                        "{\"title\": \"x\", \"comparison\": {\"pair\": []}}",
                        "study.json:1:31: comparison.pair: found an unknown key, expected \"pairs\""),
                bad("", "study.json: found an empty file, expected a json object"),
                bad(
                        "{\"title\": \"x\", \"rate\": {\"change_between_ka\": [300, 30]}}",
                        "study.json:1:46: rate.change_between_ka: found ages 300.0 and 30.0, expected two ages in ka [young, old],"
                                + " the young one first"),
                bad(
                        "{\"title\": \"x\", \"rate\": {\"changes\": \"choose\", \"change_between_ka\": [150, 150]}}",
                        "study.json:1:67: rate.change_between_ka: found one age, 150.0, beside two changes, expected two ages in ka"
                                + " [young, old], or \"changes\": \"one\""),
                bad(
                        "{\"title\": \"x\",\n \"seed\": 1,}",
                        "study.json:2:12: found text that is not json here, expected json"),
                bad(
                        "{\"title\": \"x\"} {}",
                        "study.json:1:16: found more text after the end of the json, expected nothing there"),
                bad("[1]", "study.json:1:1: found a list [ … ], expected an object { … }"),
                bad("{\"note\": \"y\"}", "study.json:1:1: title: found nothing, expected a title in words"),
                bad("{\"title\": \"\"}", "study.json:1:11: title: found \"\", expected a title in words"),
                bad("{\"title\": 3}", "study.json:1:11: title: found 3, expected a title in words"),
                bad(
                        "{\"title\": \"A\", \"leverage\": {\"date_1sigma_ka\": 0}}",
                        "study.json:1:47: leverage.date_1sigma_ka: found 0, expected a number above 0"),
                bad(
                        "{\"title\": \"A\", \"leverage\": {\"survey_2sigma_m\": 1}}",
                        "study.json:1:29: leverage.survey_2sigma_m: found an unknown key, expected \"survey_1sigma_m\""),
                bad(
                        "{\"title\": \"A\", \"leverage\": true}",
                        "study.json:1:28: leverage: found true, expected an object { … }"),
                bad(
                        "{\"title\": \"x\",\n  \"sede\": 1}",
                        "study.json:2:3: sede: found an unknown key, expected \"seed\""),
                bad(
                        "{\"title\": \"x\", \"qqqqqqqqq\": 1}",
                        "study.json:1:16: qqqqqqqqq: found an unknown key, expected one of title, note, seed, draws, sea_level, rate, matching, indicative_range, screening, leverage, comparison"),
                bad(
                        "{\"title\": \"x\", \"title\": \"y\"}",
                        "study.json:1:16: title: found this key a second time, expected it once"),
                bad(
                        "{\"title\": \"x\", \"seed\": 1.5, \"draws\": {\"maximum\": 0, \"significant_digits\": 3}}",
                        "study.json:1:24: seed: found 1.5, expected a whole number of at most 64 bits",
                        "study.json:1:50: draws.maximum: found 0, expected a whole number from 1 to 1073741824",
                        "study.json:1:75: draws.significant_digits: found 3, expected 1 or 2"),
                bad(
                        "{\"title\": \"x\", \"matching\": {\"stray_age_maximum_ka\": 1e400}}",
                        "study.json:1:53: matching.stray_age_maximum_ka: found \"1e400\", expected a number that is finite"),
                bad(
                        "{\"title\": \"x\", \"matching\": {\"stray_age_maximum_ka\": NaN}}",
                        "study.json:1:56: found text that is not json here, expected json"),
                bad(
                        "{\"title\": \"x\", \"sea_level\": {\"curves\": [{\"weight\": 1}, {\"id\": \"a\", \"weight\": 0}]}}",
                        "study.json:1:41: sea_level.curves[0].id: found nothing, expected the id of a curve",
                        "study.json:1:78: sea_level.curves[1].weight: found 0, expected a number above 0"),
                bad(
                        "{\"title\": \"x\", \"sea_level\": {\"curves\": []}}",
                        "study.json:1:40: sea_level.curves: found an empty list, expected at least one curve, since highstands come from the curve"),
                bad(
                        "{\"title\": \"x\", \"sea_level\": {\"curves\": [{\"id\": \"a\"}, {\"id\": \"a\"}]}}",
                        "study.json:1:61: sea_level.curves[1].id: found \"a\" a second time, expected each curve once"),
                bad(
                        "{\"title\": \"x\", \"sea_level\": {\"highstands\": {\"from\": \"table\"}}}",
                        "study.json:1:44: sea_level.highstands: found no key \"table\", expected one with the id of a highstand table, since highstands come from a table"),
                bad(
                        "{\"title\": \"x\", \"sea_level\": {\"highstands\": {\"table\": \"mine\"}}}",
                        "study.json:1:45: sea_level.highstands.table: found this key, expected \"from\": \"table\" beside it, or neither"),
                bad(
                        "{\"title\": \"x\", \"rate\": {\"prior\": {\"kind\": \"cauchy\", \"from\": 3, \"to\": 2}}}",
                        "study.json:1:70: rate.prior.to: found a range from 3.0 to 2.0, expected \"to\" above \"from\""),
                bad(
                        "{\"title\": \"x\", \"rate\": {\"prior\": {\"kind\": \"normal\", \"scale\": 3}}}",
                        "study.json:1:53: rate.prior.scale: found a key that a prior of kind \"normal\" does not have, expected only mean, sigma"),
                bad(
                        "{\"title\": \"x\", \"rate\": {\"prior\": {\"kind\": \"log-uniform\", \"from\": 0}}}",
                        "study.json:1:66: rate.prior.from: found 0.0, expected a number above 0"),
                bad(
                        "{\"title\": \"x\", \"rate\": {\"changes\": \"two\"}}",
                        "study.json:1:36: rate.changes: found \"two\", expected \"none\", \"one\", \"up-to-two\", \"gradual\" or \"choose\""),
                bad(
                        "{\"title\": \"x\", \"matching\": {\"recording_probability\": {\"beta\": [1]}, \"recording_decay_ka\": \"slow\", \"expected_strays\": 0}}",
                        "study.json:1:54: matching.recording_probability: found an object { … }, expected a number above 0 and at most 1, or {\"beta\": [a, b]} with both above 0",
                        "study.json:1:91: matching.recording_decay_ka: found \"slow\", expected \"marginalised\", \"none\" or a number above 0",
                        "study.json:1:118: matching.expected_strays: found 0, expected a number above 0, or {\"gamma_mean\": m} with m above 0"),
                bad(
                        "{\"title\": \"x\", \"screening\": {\"initial_d234u_permil\": [150, 130]}}",
                        "study.json:1:54: screening.initial_d234u_permil: found limits 150.0 and 130.0, expected two numbers [low, high], the low one first, or null for no limit"));
    }

    @ParameterizedTest
    @MethodSource("cases")
    void badJsonIsNamedWhole(Case bad) {
        assertEquals(
                bad.messages(),
                parse(bad.json()).problems().stream().map(InputProblem::message).toList());
    }

    @Test
    void aTitleAloneIsEnough() {
        assertEquals(
                DEFAULTS,
                parse("{\"title\": \"A coast\"}").value().orElseThrow().settings());
        assertEquals(DEFAULTS, StudyJson.defaults("A coast"));
    }

    @Test
    void defaultsStandInTheLedgerAndStatedKeysDoNot() {
        List<Assumption> defaults =
                parse("{\"title\": \"x\", \"seed\": 7}").value().orElseThrow().defaults();
        assertTrue(defaults.contains(new Assumption(
                "rate.prior is not stated", "cauchy 0 0.5 from -10 to 15", "Stillstand's default", "all")));
        assertTrue(defaults.contains(new Assumption(
                "sea_level.curves is not stated", "spratt-lisiecki-2016", "Stillstand's default", "all")));
        assertTrue(defaults.stream().noneMatch(line -> line.assumption().startsWith("seed")));
    }

    @Test
    void everyKeyIsRead() {
        String json =
                "{\"title\": \"A\", \"note\": \"b\", \"seed\": -5, \"draws\": {\"maximum\": 1000, \"significant_digits\": 1},"
                        + "\"sea_level\": {\"curves\": [{\"id\": \"own\", \"weight\": 2}], \"highstands\": {\"from\": \"table\", \"table\": \"mine\","
                        + "\"older_than_curve\": false}, \"correlation_time_ka\": 4, \"shared_level_1sigma_m\": 0,"
                        + "\"interstadial_1sigma_m\": 8, \"curve_age_1sigma_ka\": 2, \"rezero\": true},"
                        + "\"rate\": {\"prior\": {\"kind\": \"half-cauchy\", \"scale\": 1, \"from\": 0.005, \"to\": 5}, \"changes\": \"up-to-two\",\"change_between_ka\": [30, 300]},"
                        + "\"matching\": {\"recording_probability\": 0.7, \"recording_decay_ka\": 400, \"expected_strays\": {\"gamma_mean\": 0.8},"
                        + "\"stray_age_maximum_ka\": 500, \"wrong_date_probability\": 0.1, \"trace_probability\": 0.9},"
                        + "\"indicative_range\": \"uniform\","
                        + "\"screening\": {\"calcite_maximum_percent\": 2, \"initial_d234u_permil\": [140, 152], \"th232_maximum_ppb\": 1,"
                        + "\"th230_th232_minimum\": 20, \"replicates\": \"mean\", \"stratigraphic_order\": true},"
                        + "\"leverage\": {\"date_1sigma_ka\": 2},"
                        + "\"comparison\": {\"stable_within_m_per_kyr\": 0.02, \"site_spread_m_per_kyr\": 0.5, \"pairs\": [[\"North\", \"South\"]]}}";
        StudySettings expected = new StudySettings(
                "A",
                "b",
                -5,
                new Draws(1000, 1, Optional.empty()),
                new SeaLevelChoice(
                        List.of(new WeightedCurve("own", 2)),
                        Optional.of("mine"),
                        Optional.empty(),
                        false,
                        Optional.of(4.0),
                        new Setting(0, true),
                        new Setting(8, true),
                        Optional.of(2.0),
                        true),
                new RateChoice(new HalfCauchyPrior(1, 0.005, 5), Changes.UP_TO_TWO, new Interval(30, 300)),
                new Matching(
                        new Recording.Fixed(0.7),
                        Optional.of(new Decay.Fixed(400)),
                        Optional.of(new Strays.GammaMean(0.8)),
                        500,
                        new Setting(0.1, true),
                        0.9),
                IndicativeRule.UNIFORM,
                new Screening(
                        Optional.of(2.0),
                        Optional.of(140.0),
                        Optional.of(152.0),
                        Optional.of(1.0),
                        Optional.of(20.0),
                        Optional.of("mean"),
                        Optional.of(true)),
                Optional.of(new MeasurementPlan(2, 0.3)),
                new ComparisonRules(0.02, 0.5, List.of(new ComparisonRules.Pair("North", "South"))));
        StudySettings read = parse(json).value().orElseThrow().settings();
        assertEquals(expected, read);
        assertEquals(
                expected,
                parse(StudyJsonWriter.write(read)).value().orElseThrow().settings());
    }

    @Test
    void whatIsWrittenReadsTheSame() {
        String text = StudyJsonWriter.write(DEFAULTS);
        assertEquals(DEFAULTS, parse(text).value().orElseThrow().settings());
        assertTrue(text.startsWith("{\n  \"title\" : \"A coast\",\n"), text);
    }

    @Test
    void placesAreThoseOfTheValues() {
        StatedSettings stated = parse("{\"title\": \"x\",\n  \"sea_level\": {\"curves\": [{\"id\": \"a\"}]}}")
                .value()
                .orElseThrow();
        assertEquals(new Place(2, 35), stated.places().get("sea_level.curves[0].id"));
        assertEquals(
                "study.json:2:35: sea_level.curves[0].id: found \"a\", expected another",
                stated.problem("sea_level.curves[0].id", "\"a\"", "another").message());
    }
}
