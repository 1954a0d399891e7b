package stillstand.uplift;

import static org.junit.jupiter.api.Assertions.assertTrue;
import static stillstand.uplift.TestRates.survey;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.SplittableRandom;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;
import org.junit.jupiter.api.AfterAll;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import stillstand.ledger.RunMonitor;
import stillstand.sealevel.Highstand;
import stillstand.sealevel.HighstandClass;
import stillstand.sealevel.SharedErrors;
import stillstand.uncertainty.DrawStreams;
import stillstand.uncertainty.Normal;
import stillstand.uplift.FlightSimulator.Flight;
import stillstand.uplift.FlightSimulator.Survey;
import stillstand.uplift.FlightSimulator.Untrue;

/**
 * Do intervals of the difference of two sites under one sea hold the truth as often as they say? The sea is drawn once for both.
 * Each comparison is false by chance with probability 1e-4.
 */
class SitesTogetherStatisticalTest {
    private static final long SEED = Long.getLong("test.seed", 20261201L);
    private static final int PAIRS = Integer.getInteger("pairs", 220);
    private static final List<FlightRow> ROWS = RoundHighstands.complete();
    private static final double RECORDED = 0.7;
    private static final double STRAYS = 0.2;
    private static final SharedPriors NOTHING_SHARED = new SharedPriors(
            0,
            0,
            0,
            new SharedPriors.Recording.Known(RECORDED),
            List.of(Double.POSITIVE_INFINITY),
            new SharedPriors.Strays.Known(STRAYS));
    private static final SitesTogether.Effort EFFORT = new SitesTogether.Effort(1, 400, 16, 80, 0.05);

    private static ExecutorService executor;

    @BeforeAll
    static void start() {
        executor = Executors.newFixedThreadPool(2);
    }

    @AfterAll
    static void stop() {
        executor.shutdownNow();
    }

    /** Two flights that one sea left, and their rates by themselves. */
    private record Pair(RatePrior prior, Flight a, Flight b, Rate aAlone, Rate bAlone) {
        double difference() {
            return a.truth().recentRate() - b.truth().recentRate();
        }
    }

    /**
     * What a pair's answer came to.
     *
     * @param below probability below the true difference
     * @param belowIndependent the same where the two are taken for independent
     * @param widthShare width of the 95 % interval as a part of that
     * @param effective part of the draws
     */
    private record Outcome(double below, double belowIndependent, double widthShare, double effective) {}

    private static Rate alone(Flight flight, RatePrior prior) {
        return Rate.of(FlightIntegration.rate(
                FlightModel.complete(flight.levels(), ROWS, 2, 250),
                prior,
                SharedNodes.fixed(SharedNumbers.plain(RECORDED, STRAYS)),
                new FlightIntegration.Effort(100, 80),
                RunMonitor.SILENT));
    }

    /** A sea, and what it leaves at two coasts; thrown away as a whole where a flight has too few levels. */
    private static Pair pair(RatePrior prior, SplittableRandom dice) {
        while (true) {
            List<FlightRow> truth = new ArrayList<>();
            for (FlightRow row : ROWS) {
                truth.add(FlightRow.plain(
                        row.stage(),
                        row.ageKa() + row.ageSigmaKa() * dice.nextGaussian(),
                        0,
                        row.levelMetres() + row.levelSigmaMetres() * dice.nextGaussian(),
                        0));
            }
            FlightSimulator sea = new FlightSimulator(
                    truth, NOTHING_SHARED, new Survey(2, 250, false, 2, 0.02, 1, 0), Untrue.NOTHING);
            Flight a = sea.anyFlight(rate(prior, dice), dice);
            Flight b = sea.anyFlight(rate(prior, dice), dice);
            if (a.levels().size() >= 3 && b.levels().size() >= 3) {
                return new Pair(prior, a, b, alone(a, prior), alone(b, prior));
            }
        }
    }

    private static FlightSimulator.Truth rate(RatePrior prior, SplittableRandom dice) {
        return FlightSimulator.Truth.constant(prior.quantile(Math.max(1e-9, dice.nextDouble())));
    }

    private static ComparedFlight compared(String site, Flight flight, Rate alone, RatePrior prior) {
        List<ComparedFlight.SharedRow> rows = ROWS.stream()
                .map(row ->
                        new ComparedFlight.SharedRow(row.stage(), row.levelSigmaMetres() * row.levelSigmaMetres(), 0))
                .toList();
        return new ComparedFlight(
                site,
                "coast",
                FlightModel.complete(flight.levels(), ROWS, 2, 250),
                NOTHING_SHARED,
                SharedErrors.NONE,
                0,
                rows,
                prior,
                alone);
    }

    private static Outcome outcome(Pair pair, long seed) {
        JointRates joint = SitesTogether.of(
                "curve",
                List.of(compared("A", pair.a, pair.aAlone, pair.prior), compared("B", pair.b, pair.bAlone, pair.prior)),
                EFFORT,
                new DrawStreams(seed),
                executor,
                RunMonitor.SILENT);
        double[] differences = new double[joint.draws()];
        for (int k = 0; k < differences.length; k++) {
            differences[k] = joint.rateMetresPerKyr(0, k) - joint.rateMetresPerKyr(1, k);
        }
        double[] independent = independent(pair);
        return new Outcome(
                below(differences, pair.difference()),
                below(independent, pair.difference()),
                width95(differences) / width95(independent),
                joint.effectiveFraction().orElseThrow());
    }

    /** Differences of rates drawn from each density by itself. */
    private static double[] independent(Pair pair) {
        int n = 4000;
        double[] out = new double[n];
        double[] a = sorted(pair.aAlone, n);
        double[] b = sorted(pair.bAlone, n);
        for (int k = 0; k < n; k++) {
            out[k] = a[k] - b[(int) ((long) k * 1583 % n)];
        }
        return out;
    }

    private static double[] sorted(Rate rate, int n) {
        List<Double> bins = rate.density().orElseThrow().values();
        double from = rate.density().orElseThrow().from();
        double step = (rate.density().orElseThrow().to() - from) / bins.size();
        double whole = bins.stream().mapToDouble(value -> value).sum();
        double[] out = new double[n];
        double sum = 0;
        int k = 0;
        for (int bin = 0; bin < bins.size(); bin++) {
            double next = sum + bins.get(bin) / whole;
            while (k < n && (k + 0.5) / n <= next) {
                out[k] = from + (bin + ((k + 0.5) / n - sum) / (next - sum)) * step;
                k++;
            }
            sum = next;
        }
        return out;
    }

    /** Ties, and draws short of the last digits, count half. */
    private static double below(double[] values, double truth) {
        double sum = 0.5;
        for (double value : values) {
            sum += value < truth ? 1 : 0;
        }
        return sum / (values.length + 1);
    }

    private static double width95(double[] values) {
        double[] sorted = values.clone();
        Arrays.sort(sorted);
        return sorted[(int) (0.975 * sorted.length)] - sorted[(int) (0.025 * sorted.length)];
    }

    /** Prints what it measures: coverage, widths, and how many draws stay effective. */
    @ParameterizedTest
    @CsvSource({"0.1, 2, 0.9", "0.4, 0.8, 0.5"})
    @Tag("slow")
    void differencesOfFlightsHoldTheTruthAsOftenAsTheySay(double fromRate, double toRate, double mostWidthShare) {
        SplittableRandom seeds = new SplittableRandom(SEED);
        List<Outcome> outcomes = new ArrayList<>();
        for (int k = 0; k < PAIRS; k++) {
            SplittableRandom dice = seeds.split();
            outcomes.add(outcome(pair(new LogUniformPrior(fromRate, toRate), dice), dice.nextLong()));
        }
        RanksOfTruth ranks = RanksOfTruth.of(outcomes.stream().mapToDouble(Outcome::below));
        RanksOfTruth independent = RanksOfTruth.of(outcomes.stream().mapToDouble(Outcome::belowIndependent));
        double[] shares =
                outcomes.stream().mapToDouble(Outcome::widthShare).sorted().toArray();
        double[] effective =
                outcomes.stream().mapToDouble(Outcome::effective).sorted().toArray();
        String measured = String.join(
                "\n",
                fromRate + " to " + toRate + " m/kyr; shared: " + ranks,
                "independent: " + independent,
                "width of the 95 % interval over the independent one, median: " + shares[shares.length / 2],
                "effective fraction, least and median: " + effective[0] + ", " + effective[effective.length / 2]);
        System.out.println(measured);
        ranks.assertCovers();
        // what two sites share makes their difference better known, by far where they record the same highstands
        assertTrue(shares[shares.length / 2] < mostWidthShare, measured);
    }

    private static final SharedErrors ERRORS = new SharedErrors(3, 6, 3);

    private static Highstand row() {
        return new Highstand(
                "5c", HighstandClass.INTERSTADIAL, 100, 2, new Normal(-15, 4), 0, 1, true, true, true, 5, "invented");
    }

    private static ComparedLevel level(String site, String coast, double heightMetres) {
        SeaAtLevel.AtHighstand stand =
                new SeaAtLevel.AtHighstand(row(), ERRORS, 1, new Normal(100, row().marginalAgeSigmaKa(ERRORS)));
        return new ComparedLevel(
                site,
                coast,
                new JointLevels.Entry(
                        "5c", List.of(survey(new Normal(heightMetres, 1.5))), TestRates.NO_LOWERING, List.of(stand)),
                ERRORS);
    }

    /**
     * Truths about two measured heights: one sea for both; local sea level one for both on one coast, else one each; age error of the
     * curve half shared by all rows, half the row's own.
     */
    private static RanksOfTruth levels(boolean oneCoast, boolean toldOneCoast) {
        JointRates joint = SitesTogether.of(
                "curve",
                List.of(level("A", "north", 60), level("B", toldOneCoast ? "north" : "south", 25)),
                new SitesTogether.Effort(2, 100, 2, 10, 0),
                new DrawStreams(SEED),
                executor,
                RunMonitor.SILENT);
        double[] differences = new double[joint.draws()];
        for (int k = 0; k < differences.length; k++) {
            differences[k] = joint.rateMetresPerKyr(0, k) - joint.rateMetresPerKyr(1, k);
        }
        SplittableRandom dice = new SplittableRandom(SEED);
        double[] below = new double[2000];
        for (int k = 0; k < below.length; k++) {
            double ageKa = 100 + 3 * dice.nextGaussian() + 2 * dice.nextGaussian();
            double sea = -15 + 4 * dice.nextGaussian() + 3 * dice.nextGaussian() + 6 * dice.nextGaussian();
            double localA = 5 * dice.nextGaussian();
            double localB = oneCoast ? localA : 5 * dice.nextGaussian();
            double a = (60 + 1.5 * dice.nextGaussian() - sea - localA) / ageKa;
            double b = (25 + 1.5 * dice.nextGaussian() - sea - localB) / ageKa;
            below[k] = below(differences, a - b);
        }
        return RanksOfTruth.of(Arrays.stream(below));
    }

    @Test
    void differencesOfLevelsHoldTheTruthAsOftenAsTheySay() {
        levels(true, true).assertCalibrated();
        levels(false, false).assertCalibrated();
    }

    /** The comparison must be able to fail: two coasts taken for one make the difference too sure. */
    @Test
    void twoCoastsTakenForOneAreTooSure() {
        RanksOfTruth ranks = levels(false, true);
        assertTrue(ranks.isOverconfident(), ranks::toString);
    }
}
