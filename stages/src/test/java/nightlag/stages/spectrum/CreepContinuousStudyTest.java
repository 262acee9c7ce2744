package nightlag.stages.spectrum;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.Arrays;
import java.util.function.DoubleUnaryOperator;
import nightlag.stages.Study;
import nightlag.stages.fault.ReductionFault;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** How often the 95 % bands of L and H out of creep hold the truth, and how often L has a peak that is none. */
@Tag("study")
class CreepContinuousStudyTest {
    private static final int DRAWS = Study.draws(10, 200);
    private static final double FIRST_S = 1e-3;
    private static final double LAST_S = 1e4;

    /** What the draws of one material came to. */
    private static final class Outcome {
        private final double[] rms = new double[DRAWS];
        private double held;
        private double halfWidth;
        private double asManyPeaks;
        private double madeUp;

        void take(
                int draw, ContinuousSpectrum spectrum, SpectralDensity density, DoubleUnaryOperator truth, int peaks) {
            rms[draw] = ContinuousFitTest.rms(spectrum, density, truth);
            held += ContinuousFitTest.share(spectrum, density, truth) / DRAWS;
            halfWidth += ContinuousFitTest.halfWidth(spectrum, density, truth) / DRAWS;
            int found = ContinuousFitTest.peaks(spectrum, density).length;
            asManyPeaks += found == peaks ? 1.0 / DRAWS : 0;
            madeUp += found > peaks ? 1.0 / DRAWS : 0;
        }

        void row(String what) {
            Arrays.sort(rms);
            Study.row(
                    "| %s | %.1f %% | %.1f %% | %.3f | %.1f %% | %.1f %% |",
                    what, 100 * rms[DRAWS / 2], 100 * held, halfWidth, 100 * asManyPeaks, 100 * madeUp);
        }
    }

    /** Bounds: the band holds the truth in 80 % of the window, a second peak of L in 1 of 10 draws at most. */
    @ParameterizedTest(name = "Ge = {0} Pa, α = {1}, {2} noise")
    @CsvSource({"0.1, 0.3, 0.01", "0.1, 0.5, 0.01", "0.1, 0.8, 0.01", "0.01, 0.5, 0.01", "0.1, 0.5, 0.04"})
    void fractionalSolids(double equilibriumPa, double exponent, double noise) throws ReductionFault {
        KnownSpectra.FractionalSolid solid = new KnownSpectra.FractionalSolid(equilibriumPa, 1, exponent);
        Outcome retardation = new Outcome();
        Outcome relaxation = new Outcome();
        for (int draw = 0; draw < DRAWS; draw++) {
            ContinuousSpectrum spectrum = CreepContinuousFitTest.ofCreep(
                    CreepContinuousFitTest.creep(solid, FIRST_S, LAST_S, LAST_S, noise, 1000 + draw), false);
            retardation.take(draw, spectrum, spectrum.retardation(), solid::retardationPerPa, 1);
            relaxation.take(draw, spectrum, spectrum.relaxation(), solid::relaxationPa, 1);
        }
        retardation.row("L, Ge " + equilibriumPa + ", α " + exponent + ", " + noise);
        relaxation.row("H, Ge " + equilibriumPa + ", α " + exponent + ", " + noise);

        assertThat(retardation.held).isGreaterThanOrEqualTo(0.8);
        assertThat(relaxation.held).isGreaterThanOrEqualTo(0.8);
        assertThat(retardation.madeUp).isLessThanOrEqualTo(0.1);
    }

    /** Bounds: both peaks of L and no third in 9 of 10 draws, the band holds the truth in 80 % of the window. */
    @ParameterizedTest(name = "{0} noise, recovery from {1} s on")
    @CsvSource({"0.01, 1e4", "0.01, 1e3", "0.04, 1e4"})
    void theDoubleLogNormal(double noise, double loadedS) throws ReductionFault {
        RetardationModes melt = KnownSpectra.retardationOf(0.2, 1e-4, KnownSpectra::doubleLogNormal);
        Outcome retardation = new Outcome();
        for (int draw = 0; draw < DRAWS; draw++) {
            ContinuousSpectrum spectrum = CreepContinuousFitTest.ofCreep(
                    CreepFitTest.curve(melt, FIRST_S, loadedS, LAST_S, noise, 1000 + draw), true);
            retardation.take(draw, spectrum, spectrum.retardation(), KnownSpectra::doubleLogNormal, 2);
        }
        retardation.row("L, double log-normal, " + noise + ", load of " + loadedS + " s");

        assertThat(retardation.asManyPeaks).isGreaterThanOrEqualTo(0.9);
        assertThat(retardation.held).isGreaterThanOrEqualTo(0.8);
    }
}
