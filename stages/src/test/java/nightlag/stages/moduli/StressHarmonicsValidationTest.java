package nightlag.stages.moduli;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import nightlag.stages.geometry.Corrections;
import nightlag.stages.geometry.DeformationSignal;
import nightlag.stages.geometry.GeometrySpec;
import nightlag.stages.geometry.LoadSignal;
import nightlag.stages.geometry.SignalCorrection;
import nightlag.stages.numeric.Complex;
import nightlag.stages.waveform.ExtractionPlan;
import nightlag.stages.waveform.HarmonicAnalysis;
import nightlag.stages.waveform.ScreeningFigures;
import nightlag.stages.waveform.ScreeningFigures.Figure;
import nightlag.stages.waveform.SignalFit;
import nightlag.stages.waveform.Waveform;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** Moduli, harmonics and their uncertainties against closed forms and published figures. */
class StressHarmonicsValidationTest {
    private static StressHarmonics direct(SignalFit fit) throws Exception {
        return new StressHarmonics(
                fit,
                SignalCorrection.of(
                        GeometrySpec.none(), Corrections.none(), DeformationSignal.STRAIN, LoadSignal.STRESS));
    }

    /** Exact: σ = Gγ + kγ³ under γ₀ sin ωt: σ'_1 = (G + ¾kγ₀²)γ₀, σ'_3 = −kγ₀³/4, no quadrature, whatever the phase. */
    @ParameterizedTest(name = "phase {0} rad")
    @ValueSource(doubles = {-3, -1.2, 0, 0.4, 2})
    void cubicStress(double phase) throws Exception {
        double gamma0 = 0.8;
        double modulus = 1000;
        double k = 500;
        int count = 251;
        double[] t = new double[count];
        double[] strain = new double[count];
        double[] stress = new double[count];
        for (int i = 0; i < count; i++) {
            t[i] = 0.013 * i;
            strain[i] = gamma0 * Math.sin(2 * Math.PI * 1.9 * t[i] + phase);
            stress[i] = modulus * strain[i] + k * Math.pow(strain[i], 3);
        }
        SignalFit fit = HarmonicAnalysis.analyse(
                new Waveform(t, strain, stress, new double[0], OptionalDouble.empty(), 0),
                ExtractionPlan.withDefaults());
        List<Harmonic> harmonics = direct(fit).harmonics();
        double third = -k * Math.pow(gamma0, 3) / 4;
        double first = (modulus + 0.75 * k * gamma0 * gamma0) * gamma0;
        assertThat(harmonics.get(0).stressInPhasePa()).isCloseTo(first, within(1e-9 * first));
        assertThat(harmonics.get(0).stressOutOfPhasePa()).isCloseTo(0, within(1e-9 * first));
        assertThat(harmonics.get(2).order()).isEqualTo(3);
        assertThat(harmonics.get(2).stressInPhasePa()).isCloseTo(third, within(1e-9 * first));
        assertThat(harmonics.get(2).stressOutOfPhasePa()).isCloseTo(0, within(1e-9 * first));
        assertThat(harmonics.get(2).relativeIntensity()).isCloseTo(-third / first, within(1e-9));
        assertThat(harmonics.get(1).relativeIntensity()).isCloseTo(0, within(1e-9));
    }

    /**
     * JCGM 100:2008, example H.2 (five readings of table H.2 from memory; they return the published R = 127.732 Ω, u 0.071;
     * X = 219.847 Ω, u 0.295; r(R, X) = −0.588 within a unit of the last digit): R + iX = (V/I) e^{iφ} is the same algebra as
     * G' + iG'' = (σ/γ) e^{iδ}. Unrounded values recomputed from the readings.
     */
    @Test
    void impedanceOfTheGuide() throws Exception {
        double[] v = {5.007, 4.994, 5.005, 4.990, 4.999};
        double[] i = {19.663e-3, 19.639e-3, 19.640e-3, 19.685e-3, 19.678e-3};
        double[] phi = {1.0456, 1.0438, 1.0468, 1.0428, 1.0433};
        double volt = mean(v);
        double ampere = mean(i);
        double angle = mean(phi);
        double c = Math.cos(angle);
        double s = Math.sin(angle);
        // rows: Re I, Im I, Re V, Im V in terms of I, V, φ
        double[][] rows = {{1, 0, 0}, {0, 0, 0}, {0, c, -volt * s}, {0, s, volt * c}};
        double[][] inputs = {i, v, phi};
        double[][] covariance = new double[4][4];
        for (int a = 0; a < 4; a++) {
            for (int b = 0; b < 4; b++) {
                for (int p = 0; p < 3; p++) {
                    for (int q = 0; q < 3; q++) {
                        covariance[a][b] += rows[a][p] * rows[b][q] * covarianceOfMeans(inputs[p], inputs[q]);
                    }
                }
            }
        }
        Moduli moduli = direct(fit(new Complex(ampere, 0), Complex.polar(volt, angle), covariance))
                .moduli();
        ModuliCovariance u = moduli.covariance().orElseThrow();
        assertThat(moduli.storagePa()).isCloseTo(127.732170, within(5e-7));
        assertThat(moduli.lossPa()).isCloseTo(219.846512, within(5e-7));
        assertThat(moduli.magnitudePa()).isCloseTo(254.259702, within(5e-7));
        assertThat(u.storageU()).isCloseTo(0.071071, within(5e-7));
        assertThat(u.lossU()).isCloseTo(0.295582, within(1e-6));
        assertThat(u.covariance() / (u.storageU() * u.lossU())).isCloseTo(-0.588430, within(1e-6));
    }

    private static double mean(double[] values) {
        double sum = 0;
        for (double value : values) {
            sum += value;
        }
        return sum / values.length;
    }

    private static double covarianceOfMeans(double[] a, double[] b) {
        double sum = 0;
        for (int k = 0; k < a.length; k++) {
            sum += (a[k] - mean(a)) * (b[k] - mean(b));
        }
        return sum / (a.length * (a.length - 1.0));
    }

    private static SignalFit fit(Complex deformation, Complex load, double[][] covariance) {
        return fit(new Complex[] {deformation}, new Complex[] {load}, covariance);
    }

    private static SignalFit fit(Complex[] deformation, Complex[] load, double[][] covariance) {
        return new SignalFit(
                1,
                0,
                0,
                deformation,
                load,
                covariance,
                4,
                0,
                0,
                5,
                0,
                5,
                0,
                OptionalDouble.empty(),
                new ScreeningFigures(
                        0,
                        0,
                        0,
                        0,
                        60,
                        60,
                        new Figure(0, 0),
                        Optional.empty(),
                        OptionalDouble.empty(),
                        Optional.empty()),
                List.of());
    }

    /** Exact: with independent noise in both channels u(G') = u(G'') = |G*| √(u²(σ)/σ₀² + u²(γ)/γ₀²), uncorrelated. */
    @Test
    void independentChannelsAddInQuadrature() throws Exception {
        double[][] covariance = new double[4][4];
        for (int k = 0; k < 4; k++) {
            covariance[k][k] = k < 2 ? 1e-10 : 4e-2;
        }
        Moduli moduli = direct(fit(Complex.polar(0.01, 1), Complex.polar(500, 1.7), covariance))
                .moduli();
        ModuliCovariance u = moduli.covariance().orElseThrow();
        double expected = 5e4 * Math.sqrt(4e-2 / 25e4 + 1e-10 / 1e-4);
        assertThat(u.storageU()).isCloseTo(expected, within(1e-10 * expected));
        assertThat(u.lossU()).isCloseTo(expected, within(1e-10 * expected));
        assertThat(u.covariance()).isCloseTo(0, within(1e-10 * expected * expected));
    }

    @Test
    void noUncertaintyIsBelowTheLimitOfTheArithmetic() throws Exception {
        Moduli moduli = direct(fit(Complex.polar(0.01, 1), Complex.polar(500, 1.7), new double[4][4]))
                .moduli();
        ModuliCovariance u = moduli.covariance().orElseThrow();
        assertThat(u.storageU()).isCloseTo(1e-12 * moduli.storagePa(), within(1e-15 * moduli.storagePa()));
        assertThat(u.lossU()).isCloseTo(1e-12 * moduli.lossPa(), within(1e-15 * moduli.lossPa()));
    }

    /** What arithmetic leaves in an order goes with the first order, not with the little there is of its own. */
    @ParameterizedTest(name = "a third harmonic of {0}")
    @ValueSource(doubles = {0, 1e-14, 0.1})
    void noHarmonicIsKnownBetterThanTheArithmetic(double intensity) throws Exception {
        Complex strain = Complex.polar(0.01, 1);
        Complex stress = Complex.polar(500, 1.7);
        List<Harmonic> harmonics = direct(fit(
                        new Complex[] {strain, Complex.ZERO, Complex.ZERO},
                        new Complex[] {stress, Complex.ZERO, stress.times(intensity)},
                        new double[12][12]))
                .harmonics();
        assertThat(harmonics.get(2).relativeIntensity()).isCloseTo(intensity, within(1e-15));
        assertThat(harmonics.get(2).relativeIntensityU().orElseThrow()).isCloseTo(1e-12, within(1e-26));
    }
}
