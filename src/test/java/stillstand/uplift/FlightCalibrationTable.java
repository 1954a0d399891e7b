package stillstand.uplift;

import static org.junit.jupiter.api.Assertions.assertAll;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.SplittableRandom;
import java.util.stream.Stream;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import stillstand.ledger.RunMonitor;
import stillstand.uncertainty.StandardNormal;
import stillstand.uncertainty.Uncertain;
import stillstand.uplift.FlightSimulator.Flight;
import stillstand.uplift.FlightSimulator.Survey;
import stillstand.uplift.FlightSimulator.Untrue;

/**
 * The tables of the readme: {@code mvn -Pslow test -Dtest=FlightCalibrationTable} writes them to {@code target/}. How many
 * flights by {@code -Dflights=N}, {@code -Dchange.flights=N} and, a world, {@code -Dworld.flights=N}; other flights by {@code -Dtest.seed=N}. Fails where
 * the exact answer does not hold the truth as often as it says (false alarm 1e-4 a comparison).
 */
@Tag("slow")
class FlightCalibrationTable {
    private static final long SEED = Long.getLong("test.seed", 20261202L);
    private static final int FLIGHTS = Integer.getInteger("flights", 500);
    private static final int CHANGE_FLIGHTS = Integer.getInteger("change.flights", 500);
    private static final int WORLD_FLIGHTS = Integer.getInteger("world.flights", 150);
    private static final List<FlightRow> ROWS = RoundHighstands.complete();
    private static final double SLOWEST = 0.1;
    private static final double FASTEST = 2;
    private static final int SLIDES = 1900;
    private static final SharedNumbers NUMBERS = SharedNumbers.plain(0.7, 0.2);
    private static final FlightIntegration.Effort EFFORT = new FlightIntegration.Effort(150, 100);
    private static final String DATED_LEVEL = "(z - E) / t of the dated levels alone";
    private static final String BEST_RMS = "sliding the rate: best RMS";
    private static final String BEST_R_SQUARED = "sliding the rate: best R squared";
    private static final String EXACT = "exact answer";

    /** What one method says of one flight: the truth's place in its intervals where it has any, and its rate. */
    private record Said(double trueRate, double rate, Optional<Double> probabilityBelow) {
        double miss() {
            return Math.abs(rate / trueRate - 1);
        }
    }

    @Test
    void howOftenEachMethodIsRight() throws IOException {
        List<String> lines = new ArrayList<>(List.of(
                "| dates | method | 68 % interval holds the truth | 95 % | off by more than 20 % | median miss |",
                "|---|---|---|---|---|---|"));
        List<RanksOfTruth> exact = new ArrayList<>();
        for (int dates = 0; dates <= 2; dates++) {
            Map<String, List<Said>> byMethod = said(dates);
            for (Map.Entry<String, List<Said>> each : byMethod.entrySet()) {
                lines.add(line(dates, each.getKey(), each.getValue()));
            }
            exact.add(ranks(byMethod.getOrDefault(EXACT, List.of())));
        }
        lines.add("");
        lines.add(String.format(
                Locale.ROOT,
                "%d simulated flights a line, seed %d: twenty highstands of round numbers, rates log-uniform from %.1f to %.0f"
                        + " m/kyr, three levels or more.",
                FLIGHTS,
                SEED,
                SLOWEST,
                FASTEST));
        Files.write(Path.of("target", "flight-calibration.md"), lines);
        assertAll(exact.stream().map(each -> each::assertCalibrated));
    }

    @Test
    void whatHappensWhereTheModelIsNotTrue() throws IOException {
        List<String> lines = new ArrayList<>(List.of(
                "| what is untrue | 68 / 95 % hold the truth | off by more than 20 % | without its remedy: 68 / 95 %"
                        + " | off by more than 20 % |",
                "|---|---|---|---|---|"));
        double fewestDraws = Double.POSITIVE_INFINITY;
        for (UntrueWorld world : UntrueWorld.values()) {
            List<UntrueWorld.Answered> flights = world.flights(FlightSimulator.logUniform(0.1, 1), WORLD_FLIGHTS, SEED);
            List<Said> shipped = flights.stream()
                    .map(each -> said(each.trueRate(), each.shipped()))
                    .toList();
            List<Said> lacking = flights.stream()
                    .map(each -> said(each.trueRate(), each.lacking()))
                    .toList();
            boolean remedied = world != UntrueWorld.NOTHING;
            lines.add("| " + world.title() + " | " + covers(shipped) + " | " + offByAFifth(shipped) + " | "
                    + (remedied ? covers(lacking) : "-") + " | " + (remedied ? offByAFifth(lacking) : "-") + " |");
            fewestDraws = Math.min(
                    fewestDraws,
                    flights.stream()
                            .mapToDouble(UntrueWorld.Answered::effectiveDraws)
                            .min()
                            .orElse(0));
        }
        lines.add("");
        lines.add(String.format(
                Locale.ROOT,
                "%d simulated flights a world, seed %d, one date each, rates log-uniform from 0.1 to 1 m/kyr, answered under the"
                        + " default prior; fewest effective draws of an answer: %.0f.",
                WORLD_FLIGHTS,
                SEED,
                fewestDraws));
        Files.write(Path.of("target", "untrue-worlds.md"), lines);
    }

    @Test
    void howOftenPairingsAndChangesAreRight() throws IOException {
        List<String> lines = new ArrayList<>(
                List.of("| stated probability of a pairing | levels | stated | right |", "|---|---|---|---|"));
        List<PairingsRight> pairings = FlightCalibrationStatisticalTest.pairings(FLIGHTS);
        for (PairingsRight bin : pairings) {
            lines.add(String.format(
                    Locale.ROOT,
                    "| %.2f to %.2f | %d | %.3f | %.3f |",
                    bin.from(),
                    bin.to(),
                    bin.levels(),
                    bin.stated() / bin.levels(),
                    (double) bin.right() / bin.levels()));
        }
        lines.addAll(List.of("", "| one change of rate | 68 % interval holds the truth | 95 % |", "|---|---|---|"));
        List<RanksOfTruth> change = FlightCalibrationStatisticalTest.change(CHANGE_FLIGHTS);
        List<String> names = List.of("recent rate", "older rate", "age of the change");
        for (int k = 0; k < names.size(); k++) {
            RanksOfTruth ranks = change.get(k);
            lines.add("| " + names.get(k) + " | " + share(ranks.in68(), ranks.answers()) + " | "
                    + share(ranks.in95(), ranks.answers()) + " |");
        }
        lines.add("");
        lines.add(String.format(
                Locale.ROOT,
                "%d simulated flights with two dates for the pairings, %d with three dates for the change.",
                FLIGHTS,
                CHANGE_FLIGHTS));
        Files.write(Path.of("target", "pairing-calibration.md"), lines);
        assertAll(pairings.stream().map(bin -> bin::assertFair));
        assertAll(change.stream().map(ranks -> ranks::assertCalibrated));
    }

    private static Map<String, List<Said>> said(int dates) {
        SharedPriors shared = new SharedPriors(
                0,
                0,
                0,
                new SharedPriors.Recording.Known(NUMBERS.recordingProbability()),
                List.of(Double.POSITIVE_INFINITY),
                new SharedPriors.Strays.Known(NUMBERS.expectedStrays()));
        FlightSimulator simulator =
                new FlightSimulator(ROWS, shared, new Survey(2, 250, false, 2, 0.02, dates, 0), Untrue.NOTHING);
        SplittableRandom seeds = new SplittableRandom(SEED);
        List<Flight> flights = Stream.generate(seeds::split).limit(FLIGHTS).toList().parallelStream()
                .map(dice -> simulator.flight(FlightSimulator.logUniform(SLOWEST, FASTEST), dice))
                .toList();
        Map<String, List<Said>> said = new LinkedHashMap<>();
        if (dates > 0) {
            said.put(
                    DATED_LEVEL,
                    flights.stream().map(FlightCalibrationTable::datedLevels).toList());
        }
        said.put(
                BEST_RMS,
                flights.parallelStream()
                        .map(each -> slid(each, SlidingFit.leastRms(each.levels(), ROWS, SLOWEST, FASTEST, SLIDES)))
                        .toList());
        said.put(
                BEST_R_SQUARED,
                flights.parallelStream()
                        .map(each -> slid(
                                each,
                                SlidingFit.largestRSquared(each.levels(), ROWS, SLOWEST, FASTEST, SLIDES)
                                        .orElseThrow()))
                        .toList());
        said.put(
                EXACT,
                flights.parallelStream().map(FlightCalibrationTable::exact).toList());
        return said;
    }

    /**
     * The textbook: each dated level belongs to the highstand nearest its date; its rate is (z - E) / t with first-order errors;
     * several are averaged by their weights.
     */
    private static Said datedLevels(Flight flight) {
        double weights = 0;
        double sum = 0;
        for (FlightLevel level : flight.levels()) {
            for (Uncertain date : level.datesKa()) {
                double ageKa = date.mean();
                FlightRow nearest = ROWS.stream()
                        .min((a, b) -> Double.compare(Math.abs(a.ageKa() - ageKa), Math.abs(b.ageKa() - ageKa)))
                        .orElseThrow();
                double rate = (level.shorelineMetres().mean() - nearest.levelMetres()) / ageKa;
                double variance = (square(level.shorelineMetres().standardDeviation())
                                + square(nearest.levelSigmaMetres())
                                + square(rate * date.standardDeviation()))
                        / square(ageKa);
                weights += 1 / variance;
                sum += rate / variance;
            }
        }
        double rate = sum / weights;
        double truth = flight.truth().recentRate();
        return new Said(
                truth, rate, Optional.of(StandardNormal.cumulativeProbability((truth - rate) * Math.sqrt(weights))));
    }

    private static double square(double value) {
        return value * value;
    }

    private static Said slid(Flight flight, SlidingFit fit) {
        return new Said(flight.truth().recentRate(), fit.rateMetresPerKyr(), Optional.empty());
    }

    private static Said exact(Flight flight) {
        return said(
                flight.truth().recentRate(),
                FlightIntegration.rate(
                        FlightModel.complete(flight.levels(), ROWS, 2, 250),
                        new LogUniformPrior(SLOWEST, FASTEST),
                        SharedNodes.fixed(NUMBERS),
                        EFFORT,
                        RunMonitor.SILENT));
    }

    private static Said said(double trueRate, RatePosterior rate) {
        return new Said(trueRate, rate.quantile(0.5), Optional.of(rate.cumulativeProbability(trueRate)));
    }

    private static RanksOfTruth ranks(List<Said> said) {
        return RanksOfTruth.of(
                said.stream().flatMap(each -> each.probabilityBelow.stream()).mapToDouble(each -> each));
    }

    private static String line(int dates, String method, List<Said> said) {
        double[] misses = said.stream().mapToDouble(Said::miss).sorted().toArray();
        RanksOfTruth ranks = ranks(said);
        boolean intervals = ranks.answers() > 0;
        return String.format(
                Locale.ROOT,
                "| %d | %s | %s | %s | %s | %.1f %% |",
                dates,
                method,
                intervals ? share(ranks.in68(), ranks.answers()) : "-",
                intervals ? share(ranks.in95(), ranks.answers()) : "-",
                offByAFifth(said),
                100 * misses[misses.length / 2]);
    }

    private static String covers(List<Said> said) {
        RanksOfTruth ranks = ranks(said);
        return share(ranks.in68(), ranks.answers()) + " / " + share(ranks.in95(), ranks.answers());
    }

    private static String offByAFifth(List<Said> said) {
        return share((int) said.stream().filter(each -> each.miss() > 0.2).count(), said.size());
    }

    private static String share(int count, int of) {
        return String.format(Locale.ROOT, "%.1f %%", 100.0 * count / of);
    }
}
