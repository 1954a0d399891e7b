package stillstand.uplift;

import java.util.List;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;
import java.util.concurrent.TimeUnit;
import org.openjdk.jmh.annotations.Benchmark;
import org.openjdk.jmh.annotations.BenchmarkMode;
import org.openjdk.jmh.annotations.Fork;
import org.openjdk.jmh.annotations.Level;
import org.openjdk.jmh.annotations.Measurement;
import org.openjdk.jmh.annotations.Mode;
import org.openjdk.jmh.annotations.OutputTimeUnit;
import org.openjdk.jmh.annotations.Param;
import org.openjdk.jmh.annotations.Scope;
import org.openjdk.jmh.annotations.Setup;
import org.openjdk.jmh.annotations.State;
import org.openjdk.jmh.annotations.TearDown;
import org.openjdk.jmh.annotations.Warmup;

/** 2^20 draws of one level by the ordinary path, and 2^14 joint draws of eight. */
@State(Scope.Benchmark)
@BenchmarkMode(Mode.AverageTime)
@OutputTimeUnit(TimeUnit.MILLISECONDS)
@Fork(1)
@Warmup(iterations = 3, time = 1)
@Measurement(iterations = 5, time = 1)
public class RateBenchmark {
    private static final int DRAWS = 1 << 20;

    @Param({"1", "2"})
    public int threads;

    private final BenchmarkCases.Case pinned = BenchmarkCases.pinned();
    private final BenchmarkCases.Case deepCoral = BenchmarkCases.deepCoral();
    private final JointLevels corals = BenchmarkCases.eightCorals();
    private ExecutorService executor = Executors.newFixedThreadPool(1);
    private int block;

    @Setup(Level.Trial)
    public void start() {
        executor.shutdown();
        executor = Executors.newFixedThreadPool(threads);
    }

    @TearDown(Level.Trial)
    public void stop() {
        executor.shutdown();
    }

    @Benchmark
    public Object pinnedLevel() {
        return pinned.rate(DRAWS, BenchmarkCases.STREAMS, executor);
    }

    @Benchmark
    public Object deepCoralReadOnCurve() {
        return deepCoral.rate(DRAWS, BenchmarkCases.STREAMS, executor);
    }

    @Benchmark
    public List<JointLevels.Drawn> jointDrawsOfEightCorals() {
        return corals.draw(block++);
    }
}
