package nightlag.stages.waveform;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.OptionalDouble;
import nightlag.stages.Study;
import nightlag.stages.numeric.Complex;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

class CycleScatterTest {
    private static final Complex STRAIN = Complex.polar(0.01, 0.3);
    private static final Complex STRESS = Complex.polar(500, 0.9);

    private static Recording recording(double cycles, double memory, long seed) {
        return recording(cycles, 32, memory, seed);
    }

    private static Recording recording(double cycles, int perCycle, double memory, long seed) {
        return Recording.of(1, cycles, perCycle)
                .deformation(STRAIN)
                .load(STRESS)
                .noise(1e-3 * STRAIN.abs(), 1e-3 * STRESS.abs())
                .noiseMemory(memory)
                .seed(seed);
    }

    private static CycleScatter scatter(Waveform waveform) throws Exception {
        return HarmonicAnalysis.analyse(waveform, ExtractionPlan.withDefaults())
                .screening()
                .cycleScatter()
                .orElseThrow();
    }

    /** Seeds 0 to 99 of each: 1000 records, none of which the limits of the flag are passed by. */
    @ParameterizedTest(name = "{0} cycles, noise with memory {1}")
    @CsvSource({"5, 0", "8, 0", "12.5, 0", "20, 0", "50, 0", "5, 0.7", "8, 0.7", "12.5, 0.7", "20, 0.7", "50, 0.7"})
    void underNoiseAloneBothTellTheSame(double cycles, double memory) throws Exception {
        int seeds = 100;
        double meanSquare = 0;
        for (int seed = 0; seed < seeds; seed++) {
            CycleScatter scatter = scatter(recording(cycles, memory, seed).build());
            assertThat(scatter.ratio() > 2 && scatter.chance() < 1e-4)
                    .as("seed %d", seed)
                    .isFalse();
            meanSquare += scatter.ratio() * scatter.ratio() / seeds;
        }
        assertThat(meanSquare).isCloseTo(1, within(0.25));
    }

    /** How often noise alone raises the flag; {@code mvn -pl stages test -Dtest=CycleScatterTest -Dnightlag.study=long} takes more. */
    @Tag("study")
    @ParameterizedTest(name = "noise with memory {0}")
    @ValueSource(doubles = {0, 0.7})
    void noiseHardlyEverRaisesTheFlag(double memory) throws Exception {
        int alarms = 0;
        int records = 0;
        for (double cycles : new double[] {5, 6.5, 8, 12, 20, 33.3, 50}) {
            for (int perCycle : new int[] {16, 40}) {
                for (int seed = 0; seed < Study.draws(100, 2000); seed++) {
                    CycleScatter scatter =
                            scatter(recording(cycles, perCycle, memory, seed).build());
                    alarms += scatter.ratio() > 2 && scatter.chance() < 1e-4 ? 1 : 0;
                    records++;
                }
            }
        }
        assertThat(alarms).as("of %d records", records).isLessThanOrEqualTo(records / 1000);
    }

    @Test
    void bothAreTheBoundOfTheRatio() throws Exception {
        CycleScatter scatter = scatter(recording(20, 0, 3).build());
        // √(2σ²/(N A²)) of each channel
        double bound = Math.sqrt(2 * 2 * 1e-6 / 640);
        assertThat(scatter.noiseU()).isCloseTo(bound, within(0.3 * bound));
        assertThat(scatter.cyclesU()).isCloseTo(bound, within(0.3 * bound));
        assertThat(scatter.cyclesFreedom()).isEqualTo(36);
    }

    /** A change that comes and goes stands far from the fundamental; one that grows slowly stands beside it. */
    @Test
    void onlyWhatComesAndGoesIsADisagreement() throws Exception {
        Waveform steady = recording(20, 0, 1).build();
        double[] inTurns = steady.load().clone();
        double[] slowly = steady.load().clone();
        for (int i = 0; i < inTurns.length; i++) {
            inTurns[i] *= 1 + (i / 32 % 2 == 0 ? 2e-3 : -2e-3);
            slowly[i] *= 1 + 2e-3 * Math.sin(2 * Math.PI * 2 * i / inTurns.length);
        }
        CycleScatter alternating = scatter(with(steady, inTurns));
        assertThat(alternating.ratio()).isGreaterThan(3);
        assertThat(alternating.chance()).isLessThan(1e-9);
        CycleScatter waving = scatter(with(steady, slowly));
        assertThat(waving.ratio()).isLessThan(2);
        assertThat(waving.noiseU()).isGreaterThan(2 * alternating.noiseU());
    }

    private static Waveform with(Waveform steady, double[] load) {
        return new Waveform(steady.timeS(), steady.deformation(), load, new double[0], OptionalDouble.empty(), 0);
    }

    @Test
    void threeCyclesTellNothing() throws Exception {
        assertThat(HarmonicAnalysis.analyse(recording(3, 0, 1).build(), ExtractionPlan.withDefaults())
                        .screening()
                        .cycleScatter())
                .isEmpty();
    }
}
