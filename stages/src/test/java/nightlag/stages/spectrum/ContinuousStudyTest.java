package nightlag.stages.spectrum;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.Arrays;
import java.util.List;
import java.util.OptionalInt;
import java.util.function.DoubleFunction;
import java.util.function.DoubleUnaryOperator;
import nightlag.stages.Study;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.numeric.Complex;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/**
 * How well the double log-normal of Honerkamp &amp; Weese (1989) comes back from noisy moduli, 61 frequencies from 1e-3 to
 * 1e3 rad/s, and how often the 95 % band holds it.
 */
@Tag("study")
class ContinuousStudyTest {
    private static final SpectrumPlan LIQUID = new SpectrumPlan(false, OptionalInt.empty(), true);
    private static final int DRAWS = Study.draws(40, 400);
    private static final DoubleUnaryOperator TRUTH = KnownSpectra::doubleLogNormal;
    private static final DoubleFunction<Complex> MODULUS = KnownSpectra.modulusOf(TRUTH);
    private static final double[] PEAKS_S = {0.05, 5};
    private static final double NEAR = 1.5;

    /** Bounds: both peaks and no third in 9 of 10 draws, median rms error, cover 80 %, mean half width 0.2 of the peak. */
    @ParameterizedTest(name = "{0} noise, u known: {1}")
    @CsvSource({"0.04, true, 0.05", "0.01, true, 0.03", "0.04, false, 0.05", "0.01, false, 0.03"})
    void theDoubleLogNormal(double noise, boolean known, double worstRms) throws ReductionFault {
        double[] rms = new double[DRAWS];
        double twoPeaks = 0;
        double covered = 0;
        double halfWidth = 0;
        for (int draw = 0; draw < DRAWS; draw++) {
            List<ModulusReading> drawn = KnownSpectra.readings(MODULUS, -3, 3, noise, 1000 + draw);
            List<ModulusReading> readings = known ? drawn : KnownSpectra.bare(drawn);
            ContinuousSpectrum spectrum = ContinuousFit.ofModuli(readings, DiscreteFit.fit(readings, LIQUID));
            SpectralDensity density = spectrum.relaxation();
            rms[draw] = ContinuousFitTest.rms(spectrum, density, TRUTH);
            covered += ContinuousFitTest.share(spectrum, density, TRUTH) / DRAWS;
            halfWidth += ContinuousFitTest.halfWidth(spectrum, density, TRUTH) / DRAWS;
            twoPeaks += areThePeaks(ContinuousFitTest.peaks(spectrum, density)) ? 1.0 / DRAWS : 0;
        }
        Arrays.sort(rms);
        double median = rms[DRAWS / 2];
        Study.row(
                "| %.0f %% | %s | %.3f | %.1f %% | %.1f %% | %.1f %% | %.3f |",
                100 * noise,
                known ? "known" : "from the scatter",
                twoPeaks,
                100 * median,
                100 * rms[(int) (0.9 * DRAWS)],
                100 * covered,
                halfWidth);

        assertThat(twoPeaks).isGreaterThanOrEqualTo(0.9);
        assertThat(median).isLessThanOrEqualTo(worstRms);
        assertThat(covered).isGreaterThanOrEqualTo(0.8);
        assertThat(halfWidth).isLessThanOrEqualTo(0.2);
    }

    private static boolean areThePeaks(double[] found) {
        return found.length == PEAKS_S.length
                && Math.abs(Math.log(found[0] / PEAKS_S[0])) < Math.log(NEAR)
                && Math.abs(Math.log(found[1] / PEAKS_S[1])) < Math.log(NEAR);
    }
}
