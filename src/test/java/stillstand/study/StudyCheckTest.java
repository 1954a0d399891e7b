package stillstand.study;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import stillstand.files.ShippedLibrary;
import stillstand.files.StudyJson;
import stillstand.ledger.Assumption;
import stillstand.ledger.InputProblem;
import stillstand.ledger.InputWarning;
import stillstand.ledger.Loaded;
import stillstand.shoreline.DatedSample;
import stillstand.shoreline.FormsAt;
import stillstand.shoreline.Level;
import stillstand.shoreline.Site;
import stillstand.shoreline.StageChoice;
import stillstand.uncertainty.Exact;
import stillstand.uncertainty.Interval;
import stillstand.uncertainty.LogNormal;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.TruncatedNormal;
import stillstand.uncertainty.Uniform;
import stillstand.uplift.LogUniformPrior;

/** One small input a kind of failure; each asserts the whole message. */
class StudyCheckTest {
    private static final Library LIBRARY = ShippedLibrary.load();
    private static final String SITES = "site,latitude,longitude,surveyed_from_m,surveyed_to_m";
    private static final String LEVELS = "site,level,elevation_m,elevation_1sigma_m";
    private static final String SAMPLES = "site,sample,level,age_ka,age_1sigma_ka";

    /** A case: which table, its lines, and the messages that must come. */
    private record Case(String table, List<String> lines, List<String> messages) {
        @Override
        public String toString() {
            return messages.get(0);
        }
    }

    private static Case sites(String header, String row, String... messages) {
        return new Case("sites.csv", List.of(header, row), List.of(messages));
    }

    private static Case levels(String header, String row, String... messages) {
        return new Case("levels.csv", List.of(header, row), List.of(messages));
    }

    private static Case samples(String header, String row, String... messages) {
        return new Case("samples.csv", List.of(header, row), List.of(messages));
    }

    static List<Case> headers() {
        return List.of(
                levels(
                        "site,level,elevation_1sigma_m",
                        "North,T1,1",
                        "levels.csv:1: found no column \"elevation_m\", expected one",
                        "levels.csv:1:3: elevation_1sigma_m: found a spread without its value, expected a column \"elevation_m\" beside it"),
                levels(
                        "site,level,elevation_m",
                        "North,T1,10",
                        "levels.csv:1: found no spread beside \"elevation_m\", expected a column \"elevation_1sigma_m\" or \"elevation_2sigma_m\""),
                levels(
                        LEVELS + ",elevaton_m",
                        "North,T1,10,1,10",
                        "levels.csv:1:5: elevaton_m: found an unknown column, expected \"elevation_m\", or a name that starts with x_ for a column of your own"),
                levels(
                        LEVELS + ",qqqqqqqqqqqq",
                        "North,T1,10,1,10",
                        "levels.csv:1:5: qqqqqqqqqqqq: found an unknown column, expected a known one, or a name that starts with x_ for a column of your own"),
                levels(
                        LEVELS + ",site",
                        "North,T1,10,1,North",
                        "levels.csv:1:5: site: found this column twice, expected it once (it is column 1 already)"),
                levels(
                        LEVELS + ",elevation_2sigma_m",
                        "North,T1,10,1,2",
                        "levels.csv:1:5: elevation_2sigma_m: found this column beside elevation_1sigma_m, expected one of the two, never both"),
                samples(
                        "site,sample,age_ka",
                        "North,S1,120",
                        "samples.csv:1: found no spread beside \"age_ka\", expected a column \"age_1sigma_ka\" or \"age_2sigma_ka\""),
                levels(
                        LEVELS,
                        "North,T1,10",
                        "levels.csv:2: found 3 cells, expected 4, as many as the header has",
                        "levels.csv:2:4: elevation_1sigma_m: found nothing, expected the spread of elevation_m (0 where it is exact)"),
                levels(LEVELS, "North,T1,10,5,1", "levels.csv:2: found 5 cells, expected 4, as many as the header has"),
                levels(
                        LEVELS + ",",
                        "North,T1,10,1,what",
                        "levels.csv:2:5: found \"what\" in a column without a name, expected a name above it"),
                new Case(
                        "levels.csv",
                        List.of(LEVELS),
                        List.of("levels.csv:1: found no row below the header, expected one row a level")),
                new Case(
                        "sites.csv",
                        List.of(SITES),
                        List.of(
                                "levels.csv:2:1: site: found \"North\", expected a site of sites.csv",
                                "sites.csv:1: found no row below the header, expected one row a site")));
    }

    static List<Case> sitesRows() {
        return List.of(
                sites(
                        SITES,
                        "North,95,20,0,100",
                        "sites.csv:2:2: latitude: found \"95\", expected degrees from -90 to 90"),
                sites(
                        SITES,
                        "North,5,,0,100",
                        "sites.csv:2:3: longitude: found nothing, expected a value, since latitude has one"),
                sites(
                        "site,surveyed_from_m,surveyed_to_m",
                        "North,60,5",
                        "sites.csv:2:3: surveyed_to_m: found \"5\", expected a height above surveyed_from_m (60)"),
                sites(
                        "site,rate_prior",
                        "North,cauchy 0 0.5",
                        "sites.csv:2:2: rate_prior: found \"cauchy 0 0.5\", expected a prior such as \"cauchy 0 0.5 from -10 to 15\", \"half-cauchy 1 from 0.005 to 5\", \"log-uniform 0.01 15\" or \"normal 0 2\""),
                sites(
                        "site,local_curve",
                        "North,spratt-lisiecki-2106",
                        "sites.csv:2:2: local_curve: found \"spratt-lisiecki-2106\", expected the id of a curve (nearest: \"spratt-lisiecki-2016\")"),
                sites(
                        "site,local_curve,surveyed_from_m,surveyed_to_m",
                        "North,lambeck-2014,0,100",
                        "sites.csv:2:2: local_curve: found \"lambeck-2014\", which shows no highstand, expected a curve that shows one in some stage window"),
                new Case(
                        "sites.csv",
                        List.of(SITES, "North,5,5,0,100", "North,6,6,0,100"),
                        List.of(
                                "sites.csv:3:1: site: found \"North\" a second time (first in line 2), expected each site once")));
    }

    static List<Case> levelRows() {
        return List.of(
                levels(LEVELS, "North,T1,12o,1", "levels.csv:2:3: elevation_m: found \"12o\", expected a number"),
                levels(LEVELS, "North,T1,12d,1", "levels.csv:2:3: elevation_m: found \"12d\", expected a number"),
                levels(LEVELS, "North,T1,NaN,1", "levels.csv:2:3: elevation_m: found \"NaN\", expected a number"),
                levels(LEVELS, "North,T1,0x1F,1", "levels.csv:2:3: elevation_m: found \"0x1F\", expected a number"),
                levels(
                        LEVELS,
                        "North,T1,1e400,1",
                        "levels.csv:2:3: elevation_m: found \"1e400\", expected a number that is finite"),
                levels(LEVELS, "North,T1,,", "levels.csv:2:3: elevation_m: found nothing, expected a height in metres"),
                levels(
                        LEVELS,
                        "North,T1,12,",
                        "levels.csv:2:4: elevation_1sigma_m: found nothing, expected the spread of elevation_m (0 where it is exact)"),
                levels(
                        LEVELS,
                        "North,T1,12,-1",
                        "levels.csv:2:4: elevation_1sigma_m: found \"-1\", expected 0 or more"),
                levels(LEVELS, ",T1,12,1", "levels.csv:2:1: site: found nothing, expected the name of a site"),
                levels(LEVELS, "North,,12,1", "levels.csv:2:2: level: found nothing, expected the name of a level"),
                levels(
                        LEVELS,
                        "Nort,T1,12,1",
                        "levels.csv:2:1: site: found \"Nort\", expected a site of sites.csv (nearest: \"North\")"),
                levels(
                        LEVELS + ",highstand",
                        "North,T1,12,1,5f",
                        "levels.csv:2:5: highstand: found \"5f\", expected a highstand of \"spratt-lisiecki-2016\" (nearest: \"5a\")"),
                levels(
                        LEVELS + ",highstand",
                        "North,T1,12,1,5a|",
                        "levels.csv:2:5: highstand: found \"5a|\", expected stages such as \"5e\", \"5a|5c\" or \"!5e\""),
                levels(
                        LEVELS + ",highstand",
                        "North,T1,12,1,5e|!5e",
                        "levels.csv:2:5: highstand: found \"5e|!5e\", expected no stage both asked for and forbidden"),
                levels(
                        LEVELS + ",indicator",
                        "North,T1,12,1,shorline-angle",
                        "levels.csv:2:5: indicator: found \"shorline-angle\", expected the id of an indicator (nearest: \"shoreline-angle\")"),
                levels(
                        LEVELS + ",indicator",
                        "North,T1,12,1,mangrove",
                        "levels.csv:2:5: indicator: found \"mangrove\", of which no usual values are known, expected reference_water_level_m and indicative_range_m beside it"),
                levels(
                        LEVELS + ",forms_at",
                        "North,T1,12,1,always",
                        "levels.csv:2:5: forms_at: found \"always\", expected highstand, drowning, any, marine-limiting, terrestrial-limiting or event"),
                levels(
                        LEVELS + ",certainty",
                        "North,T1,12,1,maybe",
                        "levels.csv:2:5: certainty: found \"maybe\", expected sure or doubtful"),
                levels(
                        LEVELS + ",order",
                        "North,T1,12,1,1.5",
                        "levels.csv:2:5: order: found \"1.5\", expected a whole number, 1 or more (1 = lowest)"),
                levels(
                        LEVELS + ",cover_m,cover_up_to_m",
                        "North,T1,12,1,2,3",
                        "levels.csv:2:6: cover_up_to_m: found \"3\" beside cover_m, expected one of the two, never both"),
                levels(
                        LEVELS + ",cover_m,cover_1sigma_m",
                        "North,T1,12,1,,3",
                        "levels.csv:2:6: cover_1sigma_m: found \"3\" beside a blank cover_m, expected both or neither"),
                levels(
                        LEVELS + ",lowering_m_per_kyr",
                        "North,T1,12,1,-0.1",
                        "levels.csv:2:5: lowering_m_per_kyr: found \"-0.1\", expected 0 or more"),
                new Case(
                        "levels.csv",
                        List.of(LEVELS, "North,T1,12,1", "North,T1,13,1"),
                        List.of(
                                "levels.csv:3:2: level: found \"T1\" a second time at \"North\" (first in line 2), expected each level of a site once")),
                new Case(
                        "levels.csv",
                        List.of(LEVELS + ",order", "North,T1,12,1,1", "North,T2,13,1,1"),
                        List.of(
                                "levels.csv:3:5: order: found \"1\", which level \"T1\" has already, expected each place in a flight once")));
    }

    static List<Case> sampleRows() {
        return List.of(
                samples(SAMPLES, "North,S1,T1,0,1", "samples.csv:2:4: age_ka: found \"0\", expected an age above 0"),
                samples(SAMPLES, "North,S1,T1,-5,1", "samples.csv:2:4: age_ka: found \"-5\", expected an age above 0"),
                samples(
                        SAMPLES,
                        "North,S1,T1,120,",
                        "samples.csv:2:5: age_1sigma_ka: found nothing, expected the spread of age_ka (0 where it is exact)"),
                samples(
                        SAMPLES,
                        "North,S1,T1,,",
                        "samples.csv:2:4: age_ka: found no age, expected age_ka with its spread, age_min_ka and age_max_ka, age_table, or isotope ratios"),
                samples(
                        SAMPLES + ",age_min_ka,age_max_ka",
                        "North,S1,T1,120,1,110,130",
                        "samples.csv:2:6: age_min_ka: found \"110\" beside age_ka, expected one of the two, never both"),
                samples(
                        "site,sample,level,age_min_ka,age_max_ka",
                        "North,S1,T1,130,110",
                        "samples.csv:2:5: age_max_ka: found \"110\", expected an age above age_min_ka (130)"),
                samples(
                        "site,sample,level,age_min_ka,age_max_ka",
                        "North,S1,T1,130,",
                        "samples.csv:2:5: age_max_ka: found nothing, expected the other end of the range"),
                samples(
                        "site,sample,level,age_table",
                        "North,S1,T1,wod-1",
                        "samples.csv:2:4: age_table: found \"wod-1\", expected a table in ages/ (nearest: \"wood-1\")"),
                samples(
                        SAMPLES,
                        "Nort,S1,T1,120,1",
                        "samples.csv:2:1: site: found \"Nort\", expected a site of sites.csv (nearest: \"North\")"),
                samples(
                        SAMPLES,
                        "North,S1,T2,120,1",
                        "samples.csv:2:3: level: found \"T2\", expected a level of \"North\" in levels.csv (nearest: \"T1\")"),
                samples(
                        SAMPLES + ",taxon",
                        "North,S1,T1,120,1,acropora-palmatta",
                        "samples.csv:2:6: taxon: found \"acropora-palmatta\", expected the id of a taxon (nearest: \"acropora-palmata\")"),
                samples(
                        SAMPLES + ",method",
                        "North,S1,T1,120,1,u-serie",
                        "samples.csv:2:6: method: found \"u-serie\", expected the id of a dating method (nearest: \"u-series\")"),
                samples(
                        SAMPLES + ",depth_habitat",
                        "North,S1,T1,120,1,6-1",
                        "samples.csv:2:6: depth_habitat: found \"6-1\", expected the lesser depth first, such as \"1-6\""),
                samples(
                        SAMPLES + ",depth_max_m",
                        "North,S1,T1,120,1,5",
                        "samples.csv:2:6: depth_max_m: found \"5\" without a depth of growth, expected a taxon whose depths are known, or depth_habitat, beside it"),
                samples(
                        SAMPLES + ",depth_habitat,depth_max_m",
                        "North,S1,T1,120,1,10-12,5",
                        "samples.csv:2:7: depth_max_m: found \"5\", where next to none of its kind grow, expected a cap that leaves some of the depths of growth"),
                samples(
                        SAMPLES + ",growth_position",
                        "North,S1,T1,120,1,maybe",
                        "samples.csv:2:6: growth_position: found \"maybe\", expected yes, no or unknown"),
                samples(
                        SAMPLES + ",dates",
                        "North,S1,T1,120,1,both",
                        "samples.csv:2:6: dates: found \"both\", expected level, minimum or maximum"),
                samples(
                        SAMPLES + ",use,reason",
                        "North,S1,T1,120,1,no,",
                        "samples.csv:2:7: reason: found nothing, expected why the sample is not used"),
                samples(
                        SAMPLES + ",age_zero",
                        "North,S1,T1,120,1,now",
                        "samples.csv:2:6: age_zero: found \"now\", expected bp1950, b2k or a year such as 2015"),
                samples(
                        SAMPLES + ",constants",
                        "North,S1,T1,120,1,cheng",
                        "samples.csv:2:6: constants: found \"cheng\", expected cheng-2013, cheng-2000 or pre-2000"),
                new Case(
                        "samples.csv",
                        List.of(SAMPLES, "North,S1,T1,120,1", "North,S1,T1,121,1"),
                        List.of(
                                "samples.csv:3:2: sample: found \"S1\" a second time at \"North\" (first in line 2), expected each sample of a site once")));
    }

    @ParameterizedTest
    @MethodSource({"headers", "sitesRows", "levelRows", "sampleRows"})
    void badTablesAreNamedWhole(Case bad) {
        assertEquals(bad.messages(), messages(check(input(bad))));
    }

    private static StudyInput input(Case changed) {
        Table table = Grid.table(changed.table(), changed.lines().toArray(String[]::new));
        boolean sites = changed.table().equals("sites.csv");
        boolean levels = changed.table().equals("levels.csv");
        return input(
                settings(),
                sites ? table : Grid.table("sites.csv", SITES, "North,5,5,0,100"),
                levels ? table : Grid.table("levels.csv", LEVELS, "North,T1,10,1"),
                changed.table().equals("samples.csv") ? Optional.of(table) : Optional.empty());
    }

    private static StudyInput input(StatedSettings settings, Table sites, Table levels, Optional<Table> samples) {
        StudyInput plain = StudyInput.of(settings, sites, levels, samples);
        return new StudyInput(
                plain.settings(),
                plain.sites(),
                plain.levels(),
                plain.samples(),
                plain.gia(),
                Map.of("wood-1", new Uniform(9, 10)),
                List.of(),
                List.of(),
                List.of(),
                List.of());
    }

    private static StatedSettings settings() {
        return StatedSettings.of(StudyJson.defaults("A test"));
    }

    private static Loaded<Study> check(StudyInput input) {
        return StudyCheck.check(input, LIBRARY);
    }

    private static List<String> messages(Loaded<?> loaded) {
        return loaded.problems().stream().map(InputProblem::message).toList();
    }

    private static List<String> warnings(Loaded<?> loaded) {
        return loaded.warnings().stream().map(InputWarning::placed).toList();
    }

    @Test
    void allProblemsComeAtOnceInReadingOrder() {
        Loaded<Study> loaded = check(input(
                settings(),
                Grid.table("sites.csv", SITES, "North,95,5,0,100"),
                Grid.table("levels.csv", LEVELS, "North,T2,x,1", "Sud,T1,10,-1"),
                Optional.of(Grid.table("samples.csv", SAMPLES, "North,S1,T9,0,1"))));
        assertEquals(
                List.of(
                        "levels.csv:2:3: elevation_m: found \"x\", expected a number",
                        "levels.csv:3:1: site: found \"Sud\", expected a site of sites.csv",
                        "levels.csv:3:4: elevation_1sigma_m: found \"-1\", expected 0 or more",
                        "samples.csv:2:3: level: found \"T9\", expected a level of \"North\" in levels.csv (nearest: \"T2\")",
                        "samples.csv:2:4: age_ka: found \"0\", expected an age above 0",
                        "sites.csv:2:2: latitude: found \"95\", expected degrees from -90 to 90"),
                messages(loaded));
    }

    @Test
    void goodTablesMakeTheStudyTheySay() {
        Loaded<Study> loaded = check(input(
                settings(),
                Grid.table(
                        "sites.csv",
                        SITES + ",datum_offset_m,datum_offset_1sigma_m,rate_prior,x_who,note",
                        "North,5.5,\u221220,0,90,0.5,0.1,log-uniform 0.01 15,me,a cape"),
                Grid.table(
                        "levels.csv",
                        "site,level,elevation_m,elevation_2sigma_m,highstand,cover_m,cover_1sigma_m,lowering_m_per_kyr,forms_at,"
                                + "reference_water_level_m,indicative_range_m,coseismic_step_m,x_id",
                        "North,T1,10.5,1,5a|5.3,2,0.5,0.05,,-1,3,1.5,A",
                        "North,T2,60,0,!5e,,,,any,,,,"),
                Optional.of(Grid.table(
                        "samples.csv",
                        "site,sample,level,age_ka,age_2sigma_ka,age_min_ka,age_max_ka,age_table,age_zero,depth_habitat,dates,use,reason,elevation_m,elevation_1sigma_m",
                        "North,S1,T1,80,2,,,,,lognormal 3 0.6,,,,9,0.5",
                        "North,S2,T2,,,60,70,,b2k,,minimum,,,,",
                        "North,S3,,,,,,wood-1,,1-6,,no,reworked,,"))));
        assertEquals(List.of(), messages(loaded));
        Study study = loaded.value().orElseThrow();
        Site north = study.sites().get(0).site();
        assertEquals(-20, north.position().orElseThrow().longitudeDegrees());
        assertEquals(new Normal(0.5, 0.1), north.datumOffsetMetres());
        assertEquals(Optional.of(new Interval(0, 90)), north.surveyedMetres());
        assertEquals(Map.of("x_who", "me"), north.own());
        assertEquals(new LogUniformPrior(0.01, 15), study.sites().get(0).prior());

        Level first = north.levels().get(0);
        assertEquals(new Normal(10.5, 0.5), first.elevationMetres());
        assertEquals(new StageChoice(List.of("5a", "5c"), List.of()), first.highstand());
        assertEquals(new TruncatedNormal(2, 0.5, 0, Double.POSITIVE_INFINITY), first.coverMetres());
        assertEquals(new Exact(0.05), first.loweringMetresPerKyr());
        assertEquals(new Exact(-1), first.meaning().referenceWaterLevelMetres());
        assertEquals(3, first.meaning().rangeMetres());
        assertEquals(1.5, first.coseismicStepMetres());
        assertEquals(FormsAt.HIGHSTAND, first.formsAt());
        DatedSample coral = first.samples().get(0);
        assertEquals(Optional.of(new Normal(80, 1)), coral.ageKa());
        assertEquals(Optional.of(new LogNormal(0, 3, 0.6)), coral.depthMetres());

        Level second = north.levels().get(1);
        assertEquals(new Exact(60), second.elevationMetres());
        assertEquals(new StageChoice(List.of(), List.of("5e")), second.highstand());
        assertEquals(FormsAt.ANY, second.formsAt());
        assertEquals(
                Optional.of(new Uniform(60 - 0.05, 70 - 0.05)),
                second.samples().get(0).ageKa());
        assertEquals(DatedSample.Role.MINIMUM, second.samples().get(0).dates());

        DatedSample loose = north.samples().get(0);
        assertEquals("reworked", loose.reason());
        assertEquals(Optional.of(new Uniform(9, 10)), loose.ageKa());
        assertEquals("spratt-lisiecki-2016", study.seaLevel().get(0).id());
        assertTrue(study.seaLevel().get(0).highstands().find("5e").isPresent());
    }

    @Test
    void exactValuesAndDefaultsStandInTheLedger() {
        Study study = check(input(
                        settings(),
                        Grid.table("sites.csv", SITES, "North,5,5,0,100"),
                        Grid.table("levels.csv", LEVELS + ",cover_m", "North,T1,10,0,2"),
                        Optional.of(
                                Grid.table("samples.csv", SAMPLES + ",use,reason", "North,S1,T1,120,1,no,reworked"))))
                .value()
                .orElseThrow();
        List<Assumption> ledger = study.ledger();
        for (Assumption line : List.of(
                new Assumption("elevation_m is exact", "spread 0", "the study", "North / T1"),
                new Assumption(
                        "cover_m has no spread column and is taken as exact",
                        "spread 0",
                        "Stillstand's default",
                        "all"),
                new Assumption("datum_offset_m is blank", "0 m, exact", "Stillstand's default", "North"),
                new Assumption(
                        "no indicator is named",
                        "reference water level 0 m, exact",
                        "Stillstand's default",
                        "North / T1"),
                new Assumption("growth_position is blank", "in place", "Stillstand's default", "North"),
                new Assumption("sample is set aside", "reworked", "the study", "North / T1 / S1"))) {
            assertTrue(ledger.contains(line), () -> line + " is not in " + ledger);
        }
    }

    @Test
    void oddInputIsWarnedAboutAndGoesOn() {
        Loaded<Study> loaded = check(input(
                settings(),
                Grid.table(
                        "sites.csv",
                        "site,surveyed_from_m,surveyed_to_m,coast",
                        "North,2,61,east",
                        "South,0,3000,west",
                        "East,0,102,west"),
                Grid.table(
                        "levels.csv", LEVELS, "North,T1,10,1", "North,T2,60,1", "South,T1,2350,5", "East,T1,100,0.1"),
                Optional.of(Grid.table(
                        "samples.csv",
                        SAMPLES + ",dates,elevation_m,elevation_1sigma_m",
                        "North,S1,T1,120,1,minimum,25,2",
                        "South,S1,T1,120,1,,,"))));
        assertEquals(List.of(), messages(loaded));
        assertEquals(
                List.of(
                        "levels.csv:2:2: level \"T1\" is dated by minimum ages only: nothing says how old it is at most",
                        "levels.csv:3:3: level \"T2\" lies within three sigma of an end of the surveyed range (2 to 61 m above mean sea level)",
                        "levels.csv:4:3: heights at \"South\" look like feet (up to 2350): they are read as metres",
                        "samples.csv:2:7: sample \"S1\" stands 15 m above its level \"T1\", more than three sigma of both heights (6.7 m)",
                        "sites.csv: no site has a latitude and longitude: none can be shown on a map",
                        "sites.csv:2:4: coast \"east\" has one site: it is compared only where study.json asks for the pair",
                        "sites.csv:4:3: the surveyed range of \"East\" ends within 5 % of its highest level (100 m above mean sea level)"),
                warnings(loaded));
        assertEquals(loaded.warnings(), loaded.value().orElseThrow().warnings());
    }

    @Test
    void millimetresAreNotTakenForFeet() {
        Loaded<Study> loaded = check(input(
                settings(),
                Grid.table("sites.csv", SITES, "North,5,5,0,100000"),
                Grid.table("levels.csv", LEVELS, "North,T1,61400,500"),
                Optional.empty()));
        assertEquals(
                List.of(
                        "levels.csv:2:3: heights at \"North\" look like millimetres (up to 61400): they are read as metres"),
                warnings(loaded));
    }

    @Test
    void aLevelOutsideTheSurveyContradictsIt() {
        Loaded<Study> loaded = check(input(
                settings(),
                Grid.table("sites.csv", "site,surveyed_from_m,surveyed_to_m", "North,2,61"),
                Grid.table("levels.csv", LEVELS, "North,T1,80,1"),
                Optional.empty()));
        assertEquals(
                List.of(
                        "levels.csv:2:3: elevation_m: found \"80\", expected a height in the surveyed range of \"North\" (2 to 61 m above mean sea level)"),
                messages(loaded));
    }

    @Test
    void levelsThatAreNoHighstandMayLieOutsideTheSurvey() {
        Loaded<Study> loaded = check(input(
                settings(),
                Grid.table("sites.csv", "site,surveyed_from_m,surveyed_to_m", "North,2,61"),
                Grid.table("levels.csv", LEVELS + ",forms_at", "North,T2,-17,1,any", "North,T3,1,0.1,event"),
                Optional.empty()));
        assertEquals(List.of(), messages(loaded));
    }

    @Test
    void anAgeOffTheCurveIsAProblemWhereTheCurveIsReadAtIt() {
        List<String> rows = List.of("North,S1,T1,900,5", "North,S2,T2,900,5");
        Loaded<Study> loaded = check(input(
                settings(),
                Grid.table("sites.csv", SITES, "North,5,5,0,100"),
                Grid.table("levels.csv", LEVELS + ",forms_at", "North,T1,10,1,any", "North,T2,20,1,"),
                Optional.of(Grid.table("samples.csv", SAMPLES, rows.get(0), rows.get(1)))));
        assertEquals(
                List.of(
                        "samples.csv:2:4: age_ka: found \"900\", expected an age on curve \"spratt-lisiecki-2016\" (0 to 798 ka), at which level \"T1\" is read"),
                messages(loaded));
    }

    @Test
    void columnsOfLaterWorkAreNamed() {
        List<String> expected = List.of("sites.csv:1:6: berm_m is not used yet");
        Loaded<Study> loaded = check(input(
                settings(),
                Grid.table("sites.csv", SITES + ",berm_m", "North,5,5,0,100,2"),
                Grid.table("levels.csv", LEVELS + ",certainty", "North,T1,10,1,doubtful"),
                Optional.empty()));
        assertEquals(expected, warnings(loaded));
        assertTrue(loaded.value()
                .orElseThrow()
                .sites()
                .get(0)
                .site()
                .levels()
                .get(0)
                .doubtful());
    }
}
