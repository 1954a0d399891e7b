package stillstand.uplift;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static stillstand.uplift.TestRates.survey;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;
import org.junit.jupiter.api.AfterAll;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;
import stillstand.ledger.RunMonitor;
import stillstand.sealevel.Highstand;
import stillstand.sealevel.HighstandClass;
import stillstand.sealevel.SharedErrors;
import stillstand.uncertainty.DrawStreams;
import stillstand.uncertainty.Normal;

/**
 * Rates of two sites under one sea, against an independent implementation (quadrature of the joint density of two sites with known
 * pairs; plain Monte Carlo for two single levels). Tolerances are about four standard errors of the draws made here.
 */
class SitesTogetherReferenceTest {
    private static final String[] STAGES = {"5a", "5e", "7e"};
    private static final double[] AGES_KA = {81, 122, 238};
    private static final double[] AGE_SIGMAS_KA = {1.5, 2, 3};
    private static final double[] LEVELS_METRES = {-22, 5, -8};
    private static final double[] LEVEL_SIGMAS_METRES = {6, 2.5, 7};
    private static final SitesTogether.Effort EFFORT = new SitesTogether.Effort(4, 5_000, 32, 500, 0.05);

    private static ExecutorService executor;

    @BeforeAll
    static void start() {
        executor = Executors.newFixedThreadPool(2);
    }

    @AfterAll
    static void stop() {
        executor.shutdownNow();
    }

    private static List<Highstand> stands() {
        List<Highstand> stands = new ArrayList<>();
        for (int j = 0; j < STAGES.length; j++) {
            stands.add(new Highstand(
                    STAGES[j],
                    HighstandClass.INTERGLACIAL,
                    AGES_KA[j],
                    AGE_SIGMAS_KA[j],
                    new Normal(LEVELS_METRES[j], LEVEL_SIGMAS_METRES[j]),
                    0,
                    1,
                    false,
                    false,
                    false,
                    0,
                    "invented"));
        }
        return stands;
    }

    private static ComparedFlight flight(String site, String coast, double[] heightsMetres, double from, double to) {
        List<FlightRow> rows = new ArrayList<>();
        List<FlightLevel> levels = new ArrayList<>();
        for (int j = 0; j < STAGES.length; j++) {
            rows.add(
                    FlightRow.plain(STAGES[j], AGES_KA[j], AGE_SIGMAS_KA[j], LEVELS_METRES[j], LEVEL_SIGMAS_METRES[j]));
            levels.add(FlightLevel.undated("level " + j, new Normal(heightsMetres[j], 2))
                    .onlyRows(Set.of(j))
                    .neverStray());
        }
        FlightModel model = FlightModel.complete(levels, rows, -5, 155);
        // nearly flat between its ends
        RatePrior prior = new CauchyPrior((from + to) / 2, 1000, from, to);
        SharedPriors shared = new SharedPriors(
                0,
                0,
                0,
                new SharedPriors.Recording.Known(0.9),
                List.of(Double.POSITIVE_INFINITY),
                new SharedPriors.Strays.Known(0.3));
        Rate alone = Rate.of(FlightIntegration.rate(
                model,
                prior,
                SharedNodes.fixed(SharedNumbers.plain(0.9, 0.3)),
                new FlightIntegration.Effort(300, 125),
                RunMonitor.SILENT));
        return new ComparedFlight(
                site,
                coast,
                model,
                shared,
                SharedErrors.NONE,
                0,
                stands().stream().map(ComparedFlight.SharedRow::of).toList(),
                prior,
                alone);
    }

    /** Mean and standard deviation of each of two sites and of their difference, and the correlation. */
    private record Moments(
            double meanA, double sdA, double meanB, double sdB, double sdDifference, double correlation) {
        static Moments of(JointRates joint) {
            int n = joint.draws();
            double[] sums = new double[5];
            for (int k = 0; k < n; k++) {
                double a = joint.rateMetresPerKyr(0, k);
                double b = joint.rateMetresPerKyr(1, k);
                sums[0] += a / n;
                sums[1] += b / n;
                sums[2] += a * a / n;
                sums[3] += b * b / n;
                sums[4] += a * b / n;
            }
            double varianceA = sums[2] - sums[0] * sums[0];
            double varianceB = sums[3] - sums[1] * sums[1];
            double covariance = sums[4] - sums[0] * sums[1];
            return new Moments(
                    sums[0],
                    Math.sqrt(varianceA),
                    sums[1],
                    Math.sqrt(varianceB),
                    Math.sqrt(varianceA + varianceB - 2 * covariance),
                    covariance / Math.sqrt(varianceA * varianceB));
        }
    }

    @Test
    void twoSitesWithKnownPairs() {
        JointRates joint = SitesTogether.of(
                "curve",
                List.of(
                        flight("A", "coast", new double[] {26, 79.5, 140}, 0.45, 0.80),
                        flight("B", "coast", new double[] {6.5, 51, 82.5}, 0.25, 0.55)),
                EFFORT,
                new DrawStreams(3),
                executor,
                RunMonitor.SILENT);
        Moments found = Moments.of(joint);
        assertEquals(0.61544149, found.meanA, 0.0013);
        assertEquals(0.019678316, found.sdA, 0.0008);
        assertEquals(0.3754915, found.meanB, 0.0013);
        assertEquals(0.019224028, found.sdB, 0.0008);
        assertEquals(0.23994999, found.meanA - found.meanB, 0.0007);
        assertEquals(0.010384304, found.sdDifference, 0.0005);
        assertEquals(0.8577473, found.correlation, 0.015);
        assertTrue(joint.effectiveFraction().orElseThrow() > 0.05);
    }

    @Test
    void theOrderOfTheSitesDoesNotMatter() {
        JointRates joint = SitesTogether.of(
                "curve",
                List.of(
                        flight("B", "coast", new double[] {6.5, 51, 82.5}, 0.25, 0.55),
                        flight("A", "coast", new double[] {26, 79.5, 140}, 0.45, 0.80)),
                EFFORT,
                new DrawStreams(4),
                executor,
                RunMonitor.SILENT);
        Moments found = Moments.of(joint);
        assertEquals(0.3754915, found.meanA, 0.0013);
        assertEquals(0.61544149, found.meanB, 0.0013);
        assertEquals(0.010384304, found.sdDifference, 0.0005);
    }

    private static ComparedLevel level(String site, double heightMetres) {
        SeaAtLevel.AtHighstand stand = new SeaAtLevel.AtHighstand(
                new Highstand(
                        "5e",
                        HighstandClass.INTERGLACIAL,
                        122,
                        1.5,
                        new Normal(5, 3),
                        0,
                        1,
                        false,
                        false,
                        false,
                        0,
                        "invented"),
                SharedErrors.NONE,
                1,
                new Normal(122, 1.5));
        return new ComparedLevel(
                site,
                "coast",
                new JointLevels.Entry(
                        "5e", List.of(survey(new Normal(heightMetres, 1))), TestRates.NO_LOWERING, List.of(stand)),
                SharedErrors.NONE);
    }

    @Test
    void twoSingleLevels() {
        Moments found = Moments.of(SitesTogether.of(
                "curve",
                List.of(level("A", 61), level("B", 35)),
                EFFORT,
                new DrawStreams(5),
                executor,
                RunMonitor.SILENT));
        assertEquals(0.45909117, found.meanA, 4.5e-4);
        assertEquals(0.026532443, found.sdA, 3e-4);
        assertEquals(0.24594144, found.meanB, 4.5e-4);
        assertEquals(0.026098021, found.sdB, 3e-4);
        assertEquals(0.21314973, found.meanA - found.meanB, 2e-4);
        assertEquals(0.011889529, found.sdDifference, 1.5e-4);
    }

    /** A level beside a flight that says nothing of its highstand is drawn as it is beside another level. */
    @Test
    void levelsBesideAFlightOfOtherHighstands() {
        JointRates joint = SitesTogether.of(
                "curve",
                List.of(flight("C", "coast", new double[] {26, 79.5, 140}, 0.45, 0.80), level("A", 61), level("B", 35)),
                new SitesTogether.Effort(4, 40_000, 4, 50, 0),
                new DrawStreams(6),
                executor,
                RunMonitor.SILENT);
        double sum = 0;
        double squares = 0;
        for (int k = 0; k < joint.draws(); k++) {
            double difference = joint.rateMetresPerKyr(1, k) - joint.rateMetresPerKyr(2, k);
            sum += difference / joint.draws();
            squares += difference * difference / joint.draws();
        }
        // the row of these levels is not the flight's: their own survey errors alone differ (sqrt 2 sigma_z / t and the
        // age term)
        assertEquals(0.2131, sum, 3e-3);
        assertTrue(Math.sqrt(squares - sum * sum) > 0.0119);
        assertEquals(Optional.of("5e"), joint.sites().get(1).level());
    }
}
