package nightlag.stages.moduli;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.ArrayList;
import java.util.List;
import java.util.OptionalDouble;
import nightlag.stages.SweepPoint;
import nightlag.stages.moduli.LocalMeasures.Chebyshev;
import nightlag.stages.moduli.LocalMeasures.WithinCycle;
import nightlag.stages.numeric.Complex;
import org.junit.jupiter.api.Test;

/** Materials whose stress is a polynomial of strain and rate, so that all measures follow by hand (exact). */
class LocalMeasuresValidationTest {
    private static final double STRAIN = 0.8;
    private static final double HZ = 3;
    private static final double RATE = STRAIN * 2 * Math.PI * HZ;

    /** A point with these stresses σ'ₙ, σ''ₙ of order 1, 2, 3 … */
    private static ModulusPoint point(double[]... stresses) {
        List<Harmonic> harmonics = new ArrayList<>();
        for (int n = 1; n <= stresses.length; n++) {
            harmonics.add(new Harmonic(
                    n,
                    stresses[n - 1][0],
                    stresses[n - 1][1],
                    Math.hypot(stresses[n - 1][0], stresses[n - 1][1]) / Math.hypot(stresses[0][0], stresses[0][1]),
                    OptionalDouble.empty()));
        }
        return SweepPoint.of(STRAIN, new Complex(stresses[0][0] / STRAIN, stresses[0][1] / STRAIN), 1e-3)
                .hz(HZ)
                .harmonics(harmonics)
                .build();
    }

    @Test
    void aCubicSpringAndDashpotShowTheirOwnCoefficients() {
        // σ = G γ + k γ³ + η γ̇ + κ γ̇³; sin³ = ¾ sin − ¼ sin 3, cos³ = ¾ cos + ¼ cos 3
        double g = 1000;
        double k = 400;
        double eta = 30;
        double kappa = -0.02;
        double cubedStrain = k * Math.pow(STRAIN, 3);
        double cubedRate = kappa * Math.pow(RATE, 3);
        ModulusPoint point = point(
                new double[] {g * STRAIN + 0.75 * cubedStrain, eta * RATE + 0.75 * cubedRate},
                new double[] {0.1, 0.2},
                new double[] {-cubedStrain / 4, cubedRate / 4});

        Chebyshev first =
                LocalMeasures.chebyshev(point, point.harmonics().get(0)).orElseThrow();
        assertThat(first.elasticPa()).isCloseTo(g + 0.75 * k * STRAIN * STRAIN, within(1e-9));
        assertThat(first.viscousPaS()).isCloseTo(eta + 0.75 * kappa * RATE * RATE, within(1e-9));
        // T₃(x) = 4x³ − 3x: what is cubic stands in e₃ and v₃ with a positive sign where it stiffens or thickens
        Chebyshev third =
                LocalMeasures.chebyshev(point, point.harmonics().get(2)).orElseThrow();
        assertThat(third.elasticPa()).isCloseTo(k * STRAIN * STRAIN / 4, within(1e-9));
        assertThat(third.viscousPaS()).isCloseTo(kappa * RATE * RATE / 4, within(1e-9));
        assertThat(LocalMeasures.chebyshev(point, point.harmonics().get(1))).isEmpty();

        WithinCycle within = LocalMeasures.withinCycle(point).orElseThrow();
        assertThat(within.minimumStrainModulusPa()).isCloseTo(g, within(1e-9));
        assertThat(within.largestStrainModulusPa()).isCloseTo(g + k * STRAIN * STRAIN, within(1e-9));
        assertThat(within.minimumRateViscosityPaS()).isCloseTo(eta, within(1e-9));
        assertThat(within.largestRateViscosityPaS()).isCloseTo(eta + kappa * RATE * RATE, within(1e-9));
    }

    @Test
    void aFifthPowerEntersWithItsSigns() {
        // sin⁵ = (10 sin − 5 sin 3 + sin 5)/16, cos⁵ = (10 cos + 5 cos 3 + cos 5)/16
        double strain5 = 700 * Math.pow(STRAIN, 5) / 16;
        double rate5 = 0.001 * Math.pow(RATE, 5) / 16;
        double[] none = {0, 0};
        ModulusPoint point = point(
                new double[] {10 * strain5, 10 * rate5},
                none,
                new double[] {-5 * strain5, 5 * rate5},
                none,
                new double[] {strain5, rate5});
        WithinCycle within = LocalMeasures.withinCycle(point).orElseThrow();
        assertThat(within.minimumStrainModulusPa()).isCloseTo(0, within(1e-9));
        assertThat(within.largestStrainModulusPa()).isCloseTo(700 * Math.pow(STRAIN, 4), within(1e-9));
        assertThat(within.minimumRateViscosityPaS()).isCloseTo(0, within(1e-9));
        assertThat(within.largestRateViscosityPaS()).isCloseTo(0.001 * Math.pow(RATE, 4), within(1e-9));
    }

    @Test
    void aFundamentalAloneSaysNothingWithinTheCycle() {
        assertThat(LocalMeasures.withinCycle(point(new double[] {100, 50}, new double[] {0, 0})))
                .isEmpty();
    }
}
