package stillstand.uplift;

import com.sun.management.OperatingSystemMXBean;
import java.io.BufferedReader;
import java.io.IOException;
import java.io.InputStreamReader;
import java.lang.management.ManagementFactory;
import java.nio.charset.StandardCharsets;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.concurrent.Callable;
import java.util.concurrent.ExecutionException;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;
import java.util.concurrent.Future;
import java.util.function.Function;
import stillstand.ledger.RunMonitor;
import stillstand.sealevel.SeaLevelCurve;
import stillstand.uncertainty.DrawStreams;
import stillstand.uncertainty.Interval;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.StandardNormal;

/**
 * The Java side of {@code paired.py}: reads one command a line, does that work once and prints how long it took and what came
 * out, in numbers parted by blanks: seconds by the clock, seconds of all processors, then the figures.
 */
public final class PairedSide {
    private static final int AGES = 10_000_000;

    private static final OperatingSystemMXBean PROCESS =
            (OperatingSystemMXBean) ManagementFactory.getOperatingSystemMXBean();

    private PairedSide() {}

    /** Reads commands from standard input to its end. */
    public static void main(String[] arguments) throws Exception {
        BufferedReader in = new BufferedReader(new InputStreamReader(System.in, StandardCharsets.UTF_8));
        for (String line = in.readLine(); line != null; line = in.readLine()) {
            String[] words = line.trim().split(" ", -1);
            Callable<double[]> work = work(words);
            long start = System.nanoTime();
            long startOfProcessors = PROCESS.getProcessCpuTime();
            double[] figures = work.call();
            double seconds = (System.nanoTime() - start) / 1e9;
            double ofProcessors = (PROCESS.getProcessCpuTime() - startOfProcessors) / 1e9;
            StringBuilder out = new StringBuilder(String.format(Locale.ROOT, "%.6f %.6f", seconds, ofProcessors));
            for (double figure : figures) {
                out.append(' ').append(figure);
            }
            System.out.println(out);
        }
    }

    private static Callable<double[]> work(String[] words) throws IOException {
        int number = words.length > 1 ? Integer.parseInt(words[1]) : 1;
        return switch (words[0]) {
            case "pinned" -> rate(BenchmarkCases.pinned(), number);
            case "deep-coral" -> rate(BenchmarkCases.deepCoral(), number);
            case "limits-pinned" -> limits(BenchmarkCases.pinned(), number, Integer.parseInt(words[2]));
            case "limits-curve" -> limits(BenchmarkCases.readOnCurve(), number, Integer.parseInt(words[2]));
            case "curve" -> curve();
            case "curve-grid" -> curveGrid();
            case "joint" -> joint(number);
            case "paths" -> () -> new double[] {BenchmarkCases.errorPaths(number)};
            case "filter" -> filter(FlightCases.flight(8, 20), 100, 600, number);
            case "filter-growth" ->
                filter(
                        FlightCases.flight(number, Integer.parseInt(words[2])),
                        Integer.parseInt(words[3]),
                        Integer.parseInt(words[4]),
                        1);
            case "whole-site" -> wholeSite();
            case "preview" -> preview();
            default -> throw new IOException("unknown command " + words[0]);
        };
    }

    private static <T> T on(int threads, Function<ExecutorService, T> work) {
        ExecutorService executor = Executors.newFixedThreadPool(threads);
        try {
            return work.apply(executor);
        } finally {
            executor.shutdown();
        }
    }

    private static double[] summary(LevelRates.Outcome outcome) {
        Rate rate = outcome.rate();
        Interval narrow = rate.interval68();
        Interval wide = rate.interval95();
        return new double[] {
            rate.median(), narrow.low(), narrow.high(), wide.low(), wide.high(), rate.mean().orElse(0.0),
            rate.sd().orElse(0.0)
        };
    }

    private static Callable<double[]> rate(BenchmarkCases.Case question, int threads) {
        return () -> summary(
                on(threads, executor -> question.rate(BenchmarkCases.DRAWS, BenchmarkCases.STREAMS, executor)));
    }

    private static Callable<double[]> limits(BenchmarkCases.Case question, int blocks, int seed) {
        return () -> summary(on(
                1,
                executor ->
                        question.rate(blocks * DrawStreams.BLOCK_DRAWS, new DrawStreams(seed), executor)));
    }

    /** Seconds of drawing ages and band deviates, then of reading the curve with its band at them. */
    private static Callable<double[]> curve() {
        SeaLevelCurve curve = BenchmarkCases.curve();
        Normal age = new Normal(123, 3);
        double[] ages = new double[DrawStreams.BLOCK_DRAWS];
        double[] deviates = new double[DrawStreams.BLOCK_DRAWS];
        return () -> {
            long drawing = 0;
            long reading = 0;
            double sum = 0;
            for (int block = 0; block * DrawStreams.BLOCK_DRAWS < AGES; block++) {
                BenchmarkCases.STREAMS.probabilities("band", block, deviates);
                StandardNormal.toQuantiles(deviates);
                long start = System.nanoTime();
                BenchmarkCases.STREAMS.probabilities("age", block, ages);
                age.toQuantiles(ages);
                long drawn = System.nanoTime();
                curve.readAt(ages, deviates, deviates);
                drawing += drawn - start;
                reading += System.nanoTime() - drawn;
                sum += deviates[0];
            }
            return new double[] {drawing / 1e9, reading / 1e9, sum};
        };
    }

    /** The curve at even steps, for numpy: age, level, lower and upper sigma. */
    private static Callable<double[]> curveGrid() {
        SeaLevelCurve curve = BenchmarkCases.curve();
        return () -> {
            List<Double> all = new ArrayList<>();
            for (double ageKa = 80; ageKa <= 170; ageKa += 0.25) {
                all.add(ageKa);
                all.add(curve.levelMetresAt(ageKa));
                all.add(curve.sigmaLowMetresAt(ageKa));
                all.add(curve.sigmaHighMetresAt(ageKa));
            }
            return all.stream().mapToDouble(v -> v).toArray();
        };
    }

    private static Callable<double[]> joint(int blocks) {
        JointLevels corals = BenchmarkCases.eightCorals();
        return () -> {
            double sum = 0;
            for (int block = 0; block < blocks; block++) {
                sum += corals.draw(block).get(7).seaLevelMetres[0];
            }
            return new double[] {sum};
        };
    }

    private static Callable<double[]> filter(FlightModel model, int cells, int rates, int threads) {
        ShorelineFilter filter = new ShorelineFilter(model, cells);
        return () -> on(threads, executor -> {
            List<Callable<double[]>> parts = new ArrayList<>();
            for (int part = 0; part < threads; part++) {
                int from = part * rates / threads;
                int to = (part + 1) * rates / threads;
                parts.add(() -> FlightCases.evidences(filter, from, to, rates));
            }
            List<Double> logs = new ArrayList<>();
            try {
                for (Future<double[]> done : executor.invokeAll(parts)) {
                    for (double log : done.get()) {
                        logs.add(log);
                    }
                }
            } catch (InterruptedException | ExecutionException e) {
                throw new IllegalStateException(e);
            }
            return logs.stream().mapToDouble(v -> v).toArray();
        });
    }

    private static Callable<double[]> wholeSite() {
        return () -> {
            FlightAnswer answer = FlightIntegration.answer(
                    FlightCases.flight(8, 20),
                    CauchyPrior.DEFAULT,
                    SharedNodes.fixed(FlightCases.shared()),
                    FlightIntegration.Effort.FULL,
                    RunMonitor.SILENT);
            return new double[] {answer.rate().quantile(0.5)};
        };
    }

    private static Callable<double[]> preview() {
        return () -> new double[] {
            FlightIntegration.preview(
                            FlightCases.flight(10, 20),
                            CauchyPrior.DEFAULT,
                            SharedNodes.fixed(FlightCases.shared()),
                            400)
                    .quantile(0.5)
        };
    }
}
