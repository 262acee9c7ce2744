package nightlag.stages.moduli;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.List;
import java.util.OptionalDouble;
import nightlag.stages.geometry.Corrections;
import nightlag.stages.geometry.DeformationSignal;
import nightlag.stages.geometry.GeometrySpec;
import nightlag.stages.geometry.LoadSignal;
import nightlag.stages.geometry.SignalCorrection;
import nightlag.stages.waveform.ExtractionPlan;
import nightlag.stages.waveform.HarmonicAnalysis;
import nightlag.stages.waveform.Waveform;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/**
 * Large oscillations of one Giesekus mode (J. Non-Newtonian Fluid Mech. 11 (1982) 69) with α = 0.3 and unit modulus and
 * relaxation time, its equations integrated here.
 */
class GiesekusValidationTest {
    private static final double ALPHA = 0.3;
    private static final int STEPS_PER_CYCLE = 2000;
    private static final int KEEP_EVERY = 20;

    /** σ₁₁, σ₂₂, σ₁₂ in time. */
    private static double[] rates(double[] s, double rate) {
        return new double[] {
            2 * rate * s[2] - s[0] - ALPHA * (s[0] * s[0] + s[2] * s[2]),
            -s[1] - ALPHA * (s[1] * s[1] + s[2] * s[2]),
            rate * (1 + s[1]) - s[2] - ALPHA * s[2] * (s[0] + s[1])
        };
    }

    private static double[] along(double[] s, double[] slope, double step) {
        return new double[] {s[0] + step * slope[0], s[1] + step * slope[1], s[2] + step * slope[2]};
    }

    /** Four settled cycles under γ₀ sin ωt, by the classical Runge–Kutta steps. */
    private static List<Harmonic> harmonics(double omega, double strain) throws Exception {
        double step = 2 * Math.PI / omega / STEPS_PER_CYCLE;
        int settling = (int) Math.ceil(40 * omega / (2 * Math.PI));
        int count = 4 * STEPS_PER_CYCLE / KEEP_EVERY;
        double[] time = new double[count];
        double[] deformation = new double[count];
        double[] stress = new double[count];
        double[] s = new double[3];
        for (int i = 0; i < (settling + 4) * STEPS_PER_CYCLE; i++) {
            int kept = i - settling * STEPS_PER_CYCLE;
            if (kept >= 0 && kept % KEEP_EVERY == 0) {
                time[kept / KEEP_EVERY] = kept * step;
                deformation[kept / KEEP_EVERY] = strain * Math.sin(omega * kept * step);
                stress[kept / KEEP_EVERY] = s[2];
            }
            double now = strain * omega * Math.cos(omega * i * step);
            double half = strain * omega * Math.cos(omega * (i + 0.5) * step);
            double next = strain * omega * Math.cos(omega * (i + 1) * step);
            double[] a = rates(s, now);
            double[] b = rates(along(s, a, step / 2), half);
            double[] c = rates(along(s, b, step / 2), half);
            double[] d = rates(along(s, c, step), next);
            for (int k = 0; k < 3; k++) {
                s[k] += step * (a[k] + 2 * b[k] + 2 * c[k] + d[k]) / 6;
            }
        }
        SignalCorrection direct = SignalCorrection.of(
                GeometrySpec.none(), Corrections.none(), DeformationSignal.STRAIN, LoadSignal.STRESS);
        ExtractionPlan defaults = ExtractionPlan.withDefaults();
        ExtractionPlan plan =
                new ExtractionPlan(defaults.startUpCycles(), 13, defaults.drift(), defaults.frequencyFrom());
        return new StressHarmonics(
                        HarmonicAnalysis.analyse(
                                new Waveform(time, deformation, stress, new double[0], OptionalDouble.empty(), 0),
                                plan),
                        direct)
                .harmonics();
    }

    /** ω, γ₀ and G'₁, G''₁, G'₃, G''₃, I₃/I₁, computed independently to 1e-12 in time. */
    @ParameterizedTest(name = "ω = {0}, γ₀ = {1}")
    @CsvSource({
        "1, 0.1, 0.49893761, 0.49976746, 8.94556e-5, 1.124203e-4, 2.034413e-4",
        "1, 1, 0.41426274, 0.47703541, 4.91262099e-3, 0.0101530218, 0.0178521832",
        "0.3, 1, 0.07657015, 0.26653605, -2.60354038e-3, 4.18437493e-4, 9.50881461e-3",
        "5, 1, 0.83723761, 0.20415683, 3.61002377e-3, -4.12121852e-3, 6.35755913e-3"
    })
    void harmonicsAreThoseOfTheModel(
            double omega, double strain, double g1, double l1, double g3, double l3, double ratio) throws Exception {
        List<Harmonic> harmonics = harmonics(omega, strain);
        assertThat(harmonics.get(0).stressInPhasePa() / strain).isCloseTo(g1, within(2e-8));
        assertThat(harmonics.get(0).stressOutOfPhasePa() / strain).isCloseTo(l1, within(2e-8));
        assertThat(harmonics.get(2).stressInPhasePa() / strain).isCloseTo(g3, within(2e-8));
        assertThat(harmonics.get(2).stressOutOfPhasePa() / strain).isCloseTo(l3, within(2e-8));
        assertThat(harmonics.get(2).relativeIntensity()).isCloseTo(ratio, within(2e-8));
        // the model is symmetric
        assertThat(harmonics.get(1).relativeIntensity()).isLessThan(1e-8);
    }

    /** I₃/I₁ goes with γ₀² at small strain (Hyun & Wilhelm, Macromolecules 42 (2009) 411). */
    @Test
    void theThirdHarmonicGoesWithTheSquareOfASmallStrain() throws Exception {
        double small = harmonics(1, 0.02).get(2).relativeIntensity() / (0.02 * 0.02);
        double smaller = harmonics(1, 0.01).get(2).relativeIntensity() / (0.01 * 0.01);
        // s₃/γ₀³ → 0.00900 + 0.01125 i and |G*| = 1/√2 at ω = 1
        double limit = Math.hypot(0.009, 0.01125) * Math.sqrt(2);
        assertThat(small).isCloseTo(limit, within(1e-3 * limit));
        assertThat(smaller).isCloseTo(limit, within(1e-3 * limit));
    }
}
