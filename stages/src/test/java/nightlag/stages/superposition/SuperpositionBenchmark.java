package nightlag.stages.superposition;

import java.util.List;
import java.util.concurrent.TimeUnit;
import java.util.stream.LongStream;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.superposition.SuperpositionPlan.ShiftLaw;
import nightlag.stages.superposition.SuperpositionPlan.VerticalShift;
import org.junit.jupiter.api.Test;
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
import org.openjdk.jmh.runner.Runner;
import org.openjdk.jmh.runner.RunnerException;
import org.openjdk.jmh.runner.options.OptionsBuilder;

/**
 * How long a master curve of nine isotherms of 31 points takes once the machine is warm. Its name keeps it out of the build;
 * {@code mvn test -pl stages -Dtest=SuperpositionBenchmark} runs it.
 */
@State(Scope.Thread)
@BenchmarkMode(Mode.AverageTime)
@OutputTimeUnit(TimeUnit.MILLISECONDS)
@Warmup(iterations = 3, time = 3)
@Measurement(iterations = 5, time = 3)
@Fork(1)
public class SuperpositionBenchmark {
    /** Whether ln b is fitted as well. */
    @Param({"NONE", "FITTED"})
    public VerticalShift vertical;

    private List<List<IsothermReadings>> lots = List.of();
    private int next;

    /** Lots of different noise, so that none is learnt by heart. */
    @Setup
    public void measureLots() {
        lots = LongStream.range(0, 16)
                .mapToObj(seed -> ModelMaterial.LAUN.nine(0.01, 0.01, seed))
                .toList();
    }

    /** One lot. */
    @Benchmark
    public MasterCurve nineIsotherms() throws ReductionFault {
        next = (next + 1) % lots.size();
        return Superposition.of(
                lots.get(next), SuperpositionTest.plan(ModelMaterial.REFERENCE_K, vertical, ShiftLaw.AUTO));
    }

    @Test
    void run() throws RunnerException {
        new Runner(new OptionsBuilder()
                        .include(SuperpositionBenchmark.class.getName())
                        .build())
                .run();
    }
}
