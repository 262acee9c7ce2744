package nightlag.stages.spectrum;

import java.util.ArrayList;
import java.util.List;
import java.util.OptionalInt;
import java.util.concurrent.TimeUnit;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.moduli.ModulusReading;
import org.junit.jupiter.api.Test;
import org.openjdk.jmh.annotations.Benchmark;
import org.openjdk.jmh.annotations.BenchmarkMode;
import org.openjdk.jmh.annotations.Fork;
import org.openjdk.jmh.annotations.Measurement;
import org.openjdk.jmh.annotations.Mode;
import org.openjdk.jmh.annotations.OutputTimeUnit;
import org.openjdk.jmh.annotations.Scope;
import org.openjdk.jmh.annotations.Setup;
import org.openjdk.jmh.annotations.State;
import org.openjdk.jmh.annotations.Warmup;
import org.openjdk.jmh.runner.Runner;
import org.openjdk.jmh.runner.RunnerException;
import org.openjdk.jmh.runner.options.OptionsBuilder;

/**
 * How long the inversion of 122 moduli at 61 frequencies takes once the machine is warm: H alone, and both spectra as a night
 * fits them. Its name keeps it out of the build; {@code mvn test -pl stages -Dtest=ContinuousFitBenchmark} runs it.
 */
@State(Scope.Thread)
@BenchmarkMode(Mode.AverageTime)
@OutputTimeUnit(TimeUnit.MILLISECONDS)
@Warmup(iterations = 3, time = 2)
@Measurement(iterations = 5, time = 2)
@Fork(1)
public class ContinuousFitBenchmark {
    private static final int LOTS = 16;

    private final List<List<ModulusReading>> lots = new ArrayList<>();
    private final List<DiscreteSpectrum> discrete = new ArrayList<>();
    private int next;

    /** Draws of different noise, so that none is learnt by heart. */
    @Setup
    public void measureLots() throws ReductionFault {
        for (int seed = 0; seed < LOTS; seed++) {
            List<ModulusReading> readings =
                    KnownSpectra.readings(KnownSpectra.modulusOf(KnownSpectra::doubleLogNormal), -3, 3, 0.04, seed);
            lots.add(readings);
            discrete.add(DiscreteFit.fit(readings, new SpectrumPlan(false, OptionalInt.empty(), true)));
        }
    }

    /** H of one lot, and L from it. */
    @Benchmark
    public ContinuousSpectrum oneInversion() throws ReductionFault {
        next = (next + 1) % LOTS;
        return ContinuousFit.ofModuli(lots.get(next), discrete.get(next));
    }

    /** Both spectra of one lot, each fitted. */
    @Benchmark
    public ContinuousSpectrum bothSpectra() throws ReductionFault {
        next = (next + 1) % LOTS;
        return ContinuousFit.of(lots.get(next), discrete.get(next));
    }

    @Test
    void run() throws RunnerException {
        new Runner(new OptionsBuilder()
                        .include(ContinuousFitBenchmark.class.getName())
                        .build())
                .run();
    }
}
