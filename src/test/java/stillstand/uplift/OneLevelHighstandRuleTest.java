package stillstand.uplift;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.BufferedReader;
import java.io.IOException;
import java.io.InputStream;
import java.io.InputStreamReader;
import java.nio.charset.StandardCharsets;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Objects;
import java.util.Optional;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;
import java.util.stream.IntStream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import stillstand.ledger.RunMonitor;
import stillstand.sealevel.CurveFacts;
import stillstand.sealevel.HighstandEntry;
import stillstand.sealevel.HighstandOptions;
import stillstand.sealevel.HighstandTable;
import stillstand.sealevel.SeaLevelCurve;
import stillstand.sealevel.StageTable;
import stillstand.shoreline.DatedSample;
import stillstand.shoreline.FormsAt;
import stillstand.shoreline.IndicativeRule;
import stillstand.shoreline.Level;
import stillstand.uncertainty.DrawStreams;
import stillstand.uncertainty.Interval;
import stillstand.uncertainty.LogNormal;
import stillstand.uncertainty.Normal;

/**
 * Which highstand the dates of one level speak for, by numbers worked out here: dates {@code a_k +- sigma_k} of a level that
 * highstand {@code T +- tau} made in a duration D weigh {@code existence x integral of N(t; T, tau^2) product of
 * [(1 - w) N(a_k; t, sigma_k^2 + D^2 / 12) + w / a_max] dt}, with w = 0 for one date alone. And when a curve may be read at
 * the age of a coral.
 */
class OneLevelHighstandRuleTest {
    private static final DateRules RULES = new DateRules(0.05, 1000);
    private static final double TOO_STEEP_METRES = 20;
    private static final String TOO_STEEP = "the curve is too steep at this age to give a rate";

    private static final List<Row> LAST_INTERGLACIAL = List.of(
            new Row("5a", 82, 2, 6, 1),
            new Row("5c", 102, 2, 6, 1),
            new Row("5e", 123, 1.5, 13, 1),
            new Row("7a", 200, 3, 6, 1));

    private static final SeaLevelBasis SPRATT_LISIECKI =
            new SeaLevelBasis("spratt-lisiecki-2016", Optional.of(SprattLisiecki.CURVE), table(LAST_INTERGLACIAL));

    /** A highstand of a table, in numbers. */
    private record Row(String stage, double ageKa, double sigmaKa, double durationKa, double exists) {
        HighstandEntry entry() {
            return new HighstandEntry(
                    stage,
                    ageKa,
                    sigmaKa,
                    new Normal(0, 1),
                    Optional.empty(),
                    Optional.of(durationKa),
                    Optional.of(exists),
                    "test");
        }
    }

    private record Date(double ageKa, double sigmaKa) {}

    /** Weight of a highstand, and mean and standard deviation of its age given the dates. */
    private record Weighed(double weight, double meanKa, double sdKa) {
        /** By the trapezoid rule in steps far below all spreads. */
        static Weighed of(Row row, double wrong, Date... dates) {
            double stepKa = 0.005;
            double reachKa = 12 * row.sigmaKa;
            double sum = 0;
            double first = 0;
            double second = 0;
            for (double off = -reachKa; off <= reachKa; off += stepKa) {
                double ageKa = row.ageKa + off;
                double density = normal(off, row.sigmaKa * row.sigmaKa);
                for (Date date : dates) {
                    double variance = date.sigmaKa * date.sigmaKa + row.durationKa * row.durationKa / 12;
                    density *= (1 - wrong) * normal(date.ageKa - ageKa, variance) + wrong / RULES.oldestKa();
                }
                sum += density * stepKa;
                first += density * stepKa * off;
                second += density * stepKa * off * off;
            }
            double mean = first / sum;
            return new Weighed(row.exists * sum, row.ageKa + mean, Math.sqrt(second / sum - mean * mean));
        }
    }

    private static double normal(double off, double variance) {
        return Math.exp(-off * off / (2 * variance)) / Math.sqrt(2 * Math.PI * variance);
    }

    /** By hand: weights 0.5 N(95; 82, 2^2 + 6^2 + 6^2/12) = 0.5 N(13; 43) and N(95; 104, 3^2 + 6^2 + 12^2/12) = N(9; 57). */
    @Test
    void oneDateWeighsStagesByTheirDensityAloneAndIsNeverWrong() {
        Row young = new Row("5a", 82, 2, 6, 0.5);
        Row old = new Row("5c", 104, 3, 12, 1);
        double ofYoung = 0.5 * normal(13, 43);
        double ofOld = normal(9, 57);
        List<SeaAtLevel.AtHighstand> explained = explain(List.of(young, old), new Date(95, 6));
        assertEquals(List.of("5a", "5c"), stages(explained));
        assertEquals(ofYoung / (ofYoung + ofOld), explained.get(0).probability(), 1e-6);
        assertEquals(ofOld / (ofYoung + ofOld), explained.get(1).probability(), 1e-6);
        // age of 5a: weights 1/4 of 82 and 1/39 of 95; of 5c: 1/9 of 104 and 1/48 of 95
        assertAge((82 / 4.0 + 95 / 39.0) / (1 / 4.0 + 1 / 39.0), Math.sqrt(4 * 39 / 43.0), explained.get(0));
        assertAge((104 / 9.0 + 95 / 48.0) / (1 / 9.0 + 1 / 48.0), Math.sqrt(9 * 48 / 57.0), explained.get(1));
    }

    /** By hand: with all four subsets of two dates either of which may be wrong. */
    @Test
    void twoDatesMayEachBeWrong() {
        Row young = new Row("5a", 82, 2, 0, 1);
        Row old = new Row("5c", 104, 3, 0, 1);
        List<SeaAtLevel.AtHighstand> explained = explain(List.of(young, old), new Date(85, 3), new Date(100, 4));
        double ofYoung = twoDates(82, 4, 85, 9, 100, 16);
        double ofOld = twoDates(104, 9, 85, 9, 100, 16);
        assertEquals(ofYoung / (ofYoung + ofOld), explained.get(0).probability(), 1e-6);
        assertEquals(ofOld / (ofYoung + ofOld), explained.get(1).probability(), 1e-6);
    }

    private static double twoDates(double age, double var, double a, double varA, double b, double varB) {
        double right = 0.95;
        double wrong = 0.05 / 1000;
        double both = normal(a - b, varA + varB)
                * normal(age - (a * varB + b * varA) / (varA + varB), var + varA * varB / (varA + varB));
        return right * right * both
                + right * wrong * normal(a - age, var + varA)
                + right * wrong * normal(b - age, var + varB)
                + wrong * wrong;
    }

    @Test
    void threeDatesWeighStagesAndSayTheirAges() {
        List<Row> rows =
                List.of(new Row("5a", 82, 2, 6, 0.7), new Row("5c", 103, 3, 6, 0.9), new Row("5e", 123, 1, 13, 1));
        Date[] dates = {new Date(106, 12), new Date(112, 15), new Date(95, 10)};
        List<SeaAtLevel.AtHighstand> explained = explain(rows, dates);
        List<Weighed> expected =
                rows.stream().map(row -> Weighed.of(row, 0.05, dates)).toList();
        double all = expected.stream().mapToDouble(Weighed::weight).sum();
        assertEquals(List.of("5a", "5c", "5e"), stages(explained));
        for (int i = 0; i < rows.size(); i++) {
            assertEquals(expected.get(i).weight() / all, explained.get(i).probability(), 1e-5);
            assertAge(expected.get(i).meanKa(), expected.get(i).sdKa(), explained.get(i));
        }
    }

    private static void assertAge(double meanKa, double sdKa, SeaAtLevel.AtHighstand explained) {
        assertEquals(meanKa, explained.ageKa().mean(), 1e-3 * sdKa);
        assertEquals(sdKa, explained.ageKa().standardDeviation(), 2e-3 * sdKa);
    }

    @Test
    void probabilitiesSumToOne() {
        List<SeaAtLevel.AtHighstand> explained = explain(LAST_INTERGLACIAL, new Date(95, 12), new Date(110, 15));
        assertEquals(1, explained.stream().mapToDouble(SeaAtLevel::probability).sum(), 1e-12);
    }

    @Test
    void aReworkedCoralAmongTwoThatAgreeChangesLittle() {
        Date[] agreeing = {new Date(122, 2), new Date(125, 2)};
        Date[] withOlder = {new Date(122, 2), new Date(125, 2), new Date(184, 2)};
        List<SeaAtLevel.AtHighstand> before = explain(LAST_INTERGLACIAL, agreeing);
        List<SeaAtLevel.AtHighstand> after = explain(LAST_INTERGLACIAL, withOlder);
        SeaAtLevel.AtHighstand best = of("5e", before);
        SeaAtLevel.AtHighstand still = of("5e", after);
        assertEquals(best.probability(), still.probability(), 0.01);
        assertTrue(still.probability() > 0.98, () -> "5e has " + still.probability());
        assertEquals(best.ageKa().mean(), still.ageKa().mean(), 0.05);
        assertEquals(best.ageKa().standardDeviation(), still.ageKa().standardDeviation(), 0.05);
    }

    @Test
    void coralsOfThreePopulationsAreNeverAveraged() {
        Date[] dates = {new Date(86, 1), new Date(107.6, 1), new Date(131, 1)};
        List<SeaAtLevel.AtHighstand> explained = explain(LAST_INTERGLACIAL, dates);
        double all = LAST_INTERGLACIAL.stream()
                .mapToDouble(row -> Weighed.of(row, 0.05, dates).weight())
                .sum();
        for (Row row : LAST_INTERGLACIAL.subList(0, 3)) {
            Weighed expected = Weighed.of(row, 0.05, dates);
            SeaAtLevel.AtHighstand found = of(row.stage, explained);
            assertEquals(expected.weight() / all, found.probability(), 1e-5);
            assertAge(expected.meanKa(), expected.sdKa(), found);
            assertEquals(row.ageKa, found.ageKa().mean(), 4);
        }
        // a mean of the dates would be 108.2 +- 0.6 ka, and 5c for sure
        assertTrue(of("5c", explained).probability() < 0.5);
        LevelRates.Outcome outcome = TestRates.rate(
                10,
                List.of(TestRates.survey(new Normal(40, 1))),
                TestRates.NO_LOWERING,
                List.copyOf(explained),
                CauchyPrior.DEFAULT);
        Interval ageKa = outcome.age().interval95();
        assertTrue(ageKa.low() < 90 && ageKa.high() > 120, ageKa::toString);
        Interval rate = outcome.rate().interval95();
        assertTrue(rate.low() < 40 / 120.0 && rate.high() > 40 / 90.0, rate::toString);
    }

    private static SeaAtLevel.AtHighstand of(String stage, List<SeaAtLevel.AtHighstand> explained) {
        return explained.stream()
                .filter(each -> each.stage().equals(stage))
                .findFirst()
                .orElseThrow();
    }

    private static List<String> stages(List<SeaAtLevel.AtHighstand> explained) {
        return explained.stream().map(SeaAtLevel.AtHighstand::stage).toList();
    }

    private static List<SeaAtLevel.AtHighstand> explain(List<Row> rows, Date... dates) {
        List<DatedSample> samples = IntStream.range(0, dates.length)
                .mapToObj(k -> DatedLevels.date("s" + k, new Normal(dates[k].ageKa, dates[k].sigmaKa)))
                .toList();
        LevelExplanations found = LevelExplanations.of(
                DatedLevels.terrace(samples), new SeaLevelBasis("test", Optional.empty(), table(rows)), RULES, "s / l");
        assertEquals("", found.whyNone());
        return found.explanations().stream()
                .map(SeaAtLevel.AtHighstand.class::cast)
                .toList();
    }

    private static HighstandTable table(List<Row> rows) {
        return HighstandTable.own(
                "test",
                true,
                rows.stream().map(Row::entry).toList(),
                new StageTable(List.of()),
                HighstandOptions.DEFAULT);
    }

    /**
     * With Spratt and Lisiecki (2016) and 3 ka of curve age error; the curve's rows say, within t +- sqrt(sigma^2 + 3^2),
     * whether its central line varies by 20 m or more.
     */
    @ParameterizedTest
    @CsvSource({"128, 0.5, false", "124, 1, false", "121, 1, true", "82, 1, true", "50, 1, true"})
    void onASteepLimbACoralGivesNoRateOfItsOwn(double ageKa, double sigmaKa, boolean hasRate) {
        assertEquals(hasRate, SprattLisiecki.variationMetres(ageKa, Math.hypot(sigmaKa, 3)) < TOO_STEEP_METRES);
        Normal coralKa = new Normal(ageKa, sigmaKa);
        LevelExplanations found = explainAtItsAge(new Normal(12, 0.5), coralKa);
        LevelAnswer.SampleAnswer coral = coralOfATerrace(coralKa);
        assertEquals(hasRate, coral.rate().isPresent());
        if (hasRate) {
            assertEquals("", found.whyNone());
            SeaAtLevel.OnCurve onCurve =
                    (SeaAtLevel.OnCurve) found.explanations().get(0);
            assertEquals(1, onCurve.probability());
            assertEquals(3, onCurve.curveAgeSigmaKa());
            assertEquals(ageKa, onCurve.ageKa().mean(), 1e-9);
        } else {
            assertEquals(List.of(), found.explanations());
            assertTrue(found.whyNone().contains(TOO_STEEP), found::whyNone);
            assertTrue(coral.whyNoRate().orElseThrow().contains(TOO_STEEP), coral::toString);
        }
    }

    /** A coral on a terrace that formed at a highstand. */
    private static LevelAnswer.SampleAnswer coralOfATerrace(Normal ageKa) {
        DatedSample coral = DatedLevels.coral("coral", new Normal(12, 0.5), new LogNormal(0, 2, 0.5), ageKa);
        Level terrace = DatedLevels.terrace(List.of(coral));
        DrawStreams streams = new DrawStreams(1);
        DrawPlan plan = new DrawPlan(1, 2, Optional.of(DrawStreams.BLOCK_DRAWS));
        ExecutorService executor = Executors.newFixedThreadPool(2);
        try {
            LevelRates rates = new LevelRates(streams, plan, executor, RunMonitor.SILENT);
            return new LevelAnswers(rates, streams, plan, executor, IndicativeRule.QUADRATURE, RULES)
                    .of(DatedLevels.site(terrace), terrace, SPRATT_LISIECKI, CauchyPrior.DEFAULT)
                    .answer()
                    .samples()
                    .get(0);
        } finally {
            executor.shutdown();
        }
    }

    /** The curve reads +8.5 m today and may not be used before 10 ka: a notch at 2 m would give -0.8 m/kyr or so. */
    @Test
    void aNotchOfThreeKaIsBarredOnACurveThatIsWrongToday() {
        LevelExplanations found = explainAtItsAge(new Normal(2, 0.3), new Normal(3, 0.2));
        assertEquals(List.of(), found.explanations());
        assertTrue(found.whyNone().contains("from 10.0 ka only"), found::whyNone);
    }

    private static LevelExplanations explainAtItsAge(Normal elevationMetres, Normal ageKa) {
        List<DatedSample> samples = List.of(DatedLevels.date("coral", ageKa));
        Level level = DatedLevels.level(FormsAt.ANY, elevationMetres, samples);
        return LevelExplanations.of(level, SPRATT_LISIECKI, RULES, "site / level");
    }

    /** The shipped table of Spratt and Lisiecki (2016, Climate of the Past 12, 1079-1092), read by the test itself. */
    private static final class SprattLisiecki {
        private static final List<double[]> ROWS = rows();
        static final SeaLevelCurve CURVE = SeaLevelCurve.withBounds95(
                "spratt-lisiecki-2016",
                new CurveFacts("Spratt and Lisiecki 2016", "today", "LR04", "95 %", false, 5, 3, 10, List.of()),
                column(0),
                column(1),
                column(2),
                column(3));

        private SprattLisiecki() {}

        /** Highest less lowest of the rows and of straight lines between them over t +- half. */
        static double variationMetres(double ageKa, double halfKa) {
            List<Double> levels = new ArrayList<>(List.of(levelMetres(ageKa - halfKa), levelMetres(ageKa + halfKa)));
            ROWS.stream().filter(row -> Math.abs(row[0] - ageKa) < halfKa).forEach(row -> levels.add(row[1]));
            return levels.stream().mapToDouble(x -> x).max().orElseThrow()
                    - levels.stream().mapToDouble(x -> x).min().orElseThrow();
        }

        private static double levelMetres(double ageKa) {
            for (int i = 1; i < ROWS.size(); i++) {
                double[] young = ROWS.get(i - 1);
                double[] old = ROWS.get(i);
                if (ageKa <= old[0]) {
                    return young[1] + (ageKa - young[0]) / (old[0] - young[0]) * (old[1] - young[1]);
                }
            }
            throw new IllegalArgumentException("no row at " + ageKa + " ka");
        }

        private static double[] column(int index) {
            return ROWS.stream().mapToDouble(row -> row[index]).toArray();
        }

        private static List<double[]> rows() {
            String path = "/sea-level-curves/spratt-lisiecki-2016.csv";
            InputStream file = Objects.requireNonNull(OneLevelHighstandRuleTest.class.getResourceAsStream(path), path);
            try (BufferedReader lines = new BufferedReader(new InputStreamReader(file, StandardCharsets.UTF_8))) {
                return lines.lines()
                        .filter(line -> !line.startsWith("#") && !line.startsWith("age_ka"))
                        .map(line -> Arrays.stream(line.split(",", -1))
                                .mapToDouble(Double::parseDouble)
                                .toArray())
                        .toList();
            } catch (IOException e) {
                throw new IllegalStateException(path, e);
            }
        }
    }
}
