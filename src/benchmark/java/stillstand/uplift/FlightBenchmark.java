package stillstand.uplift;

import java.util.concurrent.TimeUnit;
import org.openjdk.jmh.annotations.Benchmark;
import org.openjdk.jmh.annotations.BenchmarkMode;
import org.openjdk.jmh.annotations.Fork;
import org.openjdk.jmh.annotations.Measurement;
import org.openjdk.jmh.annotations.Mode;
import org.openjdk.jmh.annotations.OutputTimeUnit;
import org.openjdk.jmh.annotations.Param;
import org.openjdk.jmh.annotations.Scope;
import org.openjdk.jmh.annotations.Setup;
import org.openjdk.jmh.annotations.State;
import org.openjdk.jmh.annotations.Warmup;

/** One evaluation of the shoreline filter: linear in levels, rows and cells. */
@State(Scope.Benchmark)
@BenchmarkMode(Mode.AverageTime)
@OutputTimeUnit(TimeUnit.MICROSECONDS)
@Fork(1)
@Warmup(iterations = 3, time = 1)
@Measurement(iterations = 5, time = 1)
public class FlightBenchmark {
    @Param({"8", "16"})
    public int levels;

    @Param({"20", "40"})
    public int rows;

    @Param({"100", "200"})
    public int cells;

    private ShorelineFilter filter = new ShorelineFilter(FlightCases.flight(8, 20), 100);
    private FilterWorkspace workspace = filter.workspace(false);

    @Setup
    public void place() {
        filter = new ShorelineFilter(FlightCases.flight(levels, rows), cells);
        workspace = filter.workspace(false);
    }

    @Benchmark
    public double evidence() {
        return filter.logEvidence(new UpliftHistory.ConstantRate(0.3), FlightCases.shared(), workspace);
    }
}
