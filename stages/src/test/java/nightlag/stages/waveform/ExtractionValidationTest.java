package nightlag.stages.waveform;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.OptionalDouble;
import nightlag.stages.numeric.Complex;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** Extraction against closed forms and published bounds. */
class ExtractionValidationTest {
    private static Waveform record(int count, double interval, double[] deformation, double[] load) {
        double[] t = new double[count];
        for (int i = 0; i < count; i++) {
            t[i] = i * interval;
        }
        return new Waveform(t, deformation, load, new double[0], OptionalDouble.empty(), 0);
    }

    /**
     * Cramér–Rao bounds of a sine of unknown frequency in white noise over whole cycles (Rife &amp; Boorstyn, IEEE Trans. Inf.
     * Theory 20 (1974) 591; from memory, checked by inverting the Fisher matrix): var A = 2σ²/N, var φ at mid-record
     * 2σ²/(A²N), var ω = 24σ²/(A²N(N²−1)) per sample squared. Both channels with equal noise share ω, which halves its
     * variance.
     */
    @Test
    void theCovarianceIsTheCramerRaoBound() throws Exception {
        int count = 1000;
        double sigma = 0.01;
        Waveform waveform = Recording.of(1, 10, 100)
                .deformation(Complex.polar(1, 0.2))
                .load(Complex.polar(1, 1.3))
                .noise(sigma, sigma)
                .build();
        SignalFit fit =
                HarmonicAnalysis.analyse(waveform, new ExtractionPlan(0, 1, Drift.NONE, FrequencySource.SIGNAL));
        // by the noise beside the bin the covariance carries the scatter of that estimate: divide it out
        double noise = fit.deformationNoise();
        assertThat(noise).isCloseTo(sigma, within(0.05 * sigma));
        Complex a = fit.deformation()[0];
        double[][] covariance = fit.covariance();
        double along = quadratic(covariance, 0, a.re() / a.abs(), a.im() / a.abs());
        double across = quadratic(covariance, 0, -a.im() / a.abs(), a.re() / a.abs());
        double expected = 2.0 / count;
        double ratio = along / expected / (noise * noise);
        assertThat(ratio).isBetween(0.3, 2.2);
        // at mid-record the phase is as good as with known frequency (the two differ by 1e-2 over ten cycles)
        assertThat(across / (a.abs() * a.abs())).isCloseTo(along, within(0.01 * along));
    }

    private static double quadratic(double[][] matrix, int at, double x, double y) {
        return x * x * matrix[at][at] + 2 * x * y * matrix[at][at + 1] + y * y * matrix[at + 1][at + 1];
    }

    /** The same with the noise level given exactly: residuals of known size, two free bins apart from every order. */
    @Test
    void varianceOfTheFrequencyIsTheCramerRaoBound() {
        int count = 1000;
        Samples samples = Samples.of(
                Recording.of(0.01, 10, 100)
                        .deformation(Complex.polar(1, 0.2))
                        .load(Complex.polar(1, 1.3))
                        .noise(0.01, 0.01)
                        .build(),
                0,
                new boolean[count]);
        JointFit fit = new JointFit(samples, 1, 0);
        JointFit.Result result = fit.refined(2 * Math.PI * 0.01).orElseThrow();
        // one sample a second: per channel var ω = σ²/(|g⊥|² · half span²)
        double information = result.freeSlopeSquares()[0] * Math.pow(samples.halfSpanS(), 2);
        double amplitude = Math.hypot(result.coefficients()[0][1], result.coefficients()[0][2]);
        double plain = 24 / (amplitude * amplitude * count * (1.0 * count * count - 1));
        // exact Fisher matrix with an offset: 2.4187e-12 against 2.4000e-12 at σ = 0.01 for phase 0 at the first sample
        assertThat(1 / information).isBetween(plain, 1.01 * plain);
    }

    /** Exact: σ = Gγ + kγ³ under γ₀ sin ωt has I3/I1 = (kγ₀²/4)/(G + ¾kγ₀²); the harmonics' signs are tested with moduli. */
    @ParameterizedTest(name = "strain amplitude {0}")
    @ValueSource(doubles = {0.1, 0.5, 1, 2})
    void cubicStress(double gamma0) throws Exception {
        double modulus = 1000;
        double k = 0.5 * modulus;
        int count = 317;
        double[] strain = new double[count];
        double[] stress = new double[count];
        for (int i = 0; i < count; i++) {
            strain[i] = gamma0 * Math.sin(2 * Math.PI * i / 60.0 + 0.4);
            stress[i] = modulus * strain[i] + k * Math.pow(strain[i], 3);
        }
        SignalFit fit = HarmonicAnalysis.analyse(record(count, 0.01, strain, stress), ExtractionPlan.withDefaults());
        double expected = (k * gamma0 * gamma0 / 4) / (modulus + 0.75 * k * gamma0 * gamma0);
        assertThat(fit.load()[2].abs() / fit.load()[0].abs()).isCloseTo(expected, within(1e-9));
    }

    /**
     * Exact: an ideally plastic material gives a square wave; sampled M times a cycle, half a sample off its jumps, its
     * amplitudes go as 1/sin(nπ/M), so I3/I1 = sin(π/M)/sin(3π/M), 1/3 in the limit.
     */
    @ParameterizedTest(name = "{0} samples a cycle")
    @ValueSource(ints = {16, 20, 64, 200, 1000})
    void squareWave(int perCycle) throws Exception {
        int count = 6 * perCycle;
        double[] strain = new double[count];
        double[] stress = new double[count];
        for (int i = 0; i < count; i++) {
            double phase = 2 * Math.PI * (i + 0.5) / perCycle;
            strain[i] = Math.sin(phase);
            stress[i] = Math.signum(Math.cos(phase + 1e-9));
        }
        Waveform waveform = record(count, 1.0 / perCycle, strain, stress);
        Waveform tagged = new Waveform(waveform.timeS(), strain, stress, new double[0], OptionalDouble.of(1), 0);
        double expected = Math.sin(Math.PI / perCycle) / Math.sin(3 * Math.PI / perCycle);
        SignalFit bins = HarmonicAnalysis.analyse(tagged, new ExtractionPlan(0, 7, Drift.NONE, FrequencySource.TAG));
        assertThat(bins.load()[2].abs() / bins.load()[0].abs()).isCloseTo(expected, within(1e-9));
        // with the frequency refined: the strain, a pure sine, decides it
        SignalFit refined =
                HarmonicAnalysis.analyse(waveform, new ExtractionPlan(0, 7, Drift.NONE, FrequencySource.SIGNAL));
        assertThat(refined.load()[2].abs() / refined.load()[0].abs()).isCloseTo(expected, within(1e-9));
        assertThat(refined.screening().clippedShare()).isZero();
    }
}
