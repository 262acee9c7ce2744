package nightlag.stages.spectrum;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;
import static org.assertj.core.api.Assertions.within;

import java.util.Arrays;
import java.util.List;
import java.util.OptionalInt;
import java.util.function.DoubleFunction;
import java.util.function.DoubleUnaryOperator;
import java.util.stream.IntStream;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.numeric.Complex;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

/** Spectra whose form is known come back from moduli, with a band that holds them and opens where the data end. */
class ContinuousFitTest {
    private static final SpectrumPlan LIQUID = new SpectrumPlan(false, OptionalInt.empty(), true);
    private static final SpectrumPlan SOLID = new SpectrumPlan(true, OptionalInt.empty(), true);
    private static final RelaxationModes LAUN = PublishedSpectraValidationTest.LAUN;

    /** Bound: 1 % of the peak inside the window, H and L, whichever is fitted and whichever follows. */
    @ParameterizedTest(name = "Ge = {0} Pa, α = {1}")
    @CsvSource({"0.1, 0.3", "0.1, 0.5", "0.1, 0.8", "0.0001, 0.3", "0.0001, 0.5", "0.0001, 0.8"})
    void theFractionalSolidWithoutNoise(double equilibriumPa, double exponent) throws ReductionFault {
        KnownSpectra.FractionalSolid solid = new KnownSpectra.FractionalSolid(equilibriumPa, 1, exponent);
        List<ModulusReading> readings = KnownSpectra.readings(solid::modulusPa, -3, 3, 0, 0);
        DiscreteSpectrum discrete = DiscreteFit.fit(readings, SOLID);

        ContinuousSpectrum both = ContinuousFit.of(readings, discrete);
        ContinuousSpectrum ofModuli = ContinuousFit.ofModuli(readings, discrete);

        assertThat(worst(both, both.relaxation(), solid::relaxationPa)).isLessThan(0.01);
        assertThat(worst(both, both.retardation(), solid::retardationPerPa)).isLessThan(0.01);
        assertThat(worst(both, ofModuli.retardation(), solid::retardationPerPa)).isLessThan(0.01);
    }

    @Test
    void moduliWithoutUncertaintiesAreWeighedByTheirScatter() throws ReductionFault {
        List<ModulusReading> known = doubleLogNormal(0.02, 3);
        List<ModulusReading> bare = KnownSpectra.bare(known);

        ContinuousSpectrum withU = ContinuousFit.of(known, DiscreteFit.fit(known, LIQUID));
        ContinuousSpectrum without = ContinuousFit.of(bare, DiscreteFit.fit(bare, LIQUID));

        int peak = withU.relaxation().count() / 2 - 10;
        double width = withU.relaxation().high()[peak] - withU.relaxation().low()[peak];
        double widthWithout =
                without.relaxation().high()[peak] - without.relaxation().low()[peak];
        assertThat(widthWithout / width).isBetween(0.6, 1.6);
        assertThat(share(without, without.relaxation(), KnownSpectra::doubleLogNormal))
                .isGreaterThan(0.8);
    }

    /** H by the exact formula from L and L from H hold each other's fit in their bands. */
    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {0, 1, 2, 3, 4})
    void bothWaysAgree(long seed) throws ReductionFault {
        List<ModulusReading> readings = doubleLogNormal(0.02, seed);
        DiscreteSpectrum discrete = DiscreteFit.fit(readings, LIQUID);

        ContinuousSpectrum ofModuli = ContinuousFit.ofModuli(readings, discrete);
        ContinuousSpectrum ofCompliances = ContinuousFit.ofCompliances(readings, discrete);

        for (int node : inside(ofModuli)) {
            assertThat(ofCompliances.relaxation().values()[node])
                    .isBetween(
                            ofModuli.relaxation().low()[node],
                            ofModuli.relaxation().high()[node]);
            assertThat(ofCompliances.retardation().values()[node])
                    .isBetween(
                            ofModuli.retardation().low()[node],
                            ofModuli.retardation().high()[node]);
        }
    }

    @Test
    void theBandOpensBeyondTheWindow() throws ReductionFault {
        List<ModulusReading> readings = doubleLogNormal(0.02, 1);
        ContinuousSpectrum spectrum = ContinuousFit.of(readings, DiscreteFit.fit(readings, LIQUID));

        for (SpectralDensity density : List.of(spectrum.relaxation(), spectrum.retardation())) {
            int[] inside = inside(spectrum);
            double typical = Arrays.stream(inside)
                    .mapToDouble(node -> Math.log(density.high()[node] / density.values()[node]))
                    .sorted()
                    .toArray()[inside.length / 2];
            int before = inside[0] - 6;
            int after = inside[inside.length - 1] + 6;
            assertThat(Math.log(density.high()[before] / density.values()[before]))
                    .isGreaterThan(2 * typical);
            assertThat(Math.log(density.high()[after] / density.values()[after]))
                    .isGreaterThan(2 * typical);
        }
    }

    /** A melt seen over four decades in the middle of its spectrum: nothing beyond them is known, and no peak is put there. */
    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {0, 1, 2, 3, 4})
    void noPeakIsMadeUpBeyondTheData(long seed) throws ReductionFault {
        DoubleFunction<Complex> powerLaw = KnownSpectra.modulusOf(time -> Math.pow(time, -0.4) * Math.exp(-time / 1e6));
        List<ModulusReading> readings = KnownSpectra.readings(powerLaw, -2, 2, 0.03, seed);
        ContinuousSpectrum spectrum = ContinuousFit.of(readings, DiscreteFit.fit(readings, LIQUID));

        double[] values = spectrum.relaxation().values();
        int[] inside = inside(spectrum);
        for (int node = 1; node < values.length - 1; node++) {
            if (node < inside[0] - 7 || node > inside[inside.length - 1] + 7) {
                assertThat(values[node] > values[node - 1] && values[node] > values[node + 1])
                        .as("a peak at %s s", spectrum.relaxation().timesS()[node])
                        .isFalse();
            }
        }
    }

    /**
     * H of exp(−√t) is √τ e^{−τ/4}/(2√π), exact. Measured at 1 % noise: rms error of 1.5 to 3 % of the peak.
     */
    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {0, 1, 2, 3, 4})
    void theStretchedExponential(long seed) throws ReductionFault {
        DoubleUnaryOperator stretched = time -> Math.sqrt(time) * Math.exp(-time / 4) / (2 * Math.sqrt(Math.PI));
        List<ModulusReading> readings = KnownSpectra.readings(KnownSpectra.modulusOf(stretched), -3, 3, 0.01, seed);
        ContinuousSpectrum spectrum = ContinuousFit.of(readings, DiscreteFit.fit(readings, LIQUID));

        assertThat(rms(spectrum, spectrum.relaxation(), stretched)).isLessThan(0.05);
        // where H falls as e^{−τ/4} the data only say that it is small
        assertThat(share(spectrum, spectrum.relaxation(), stretched)).isGreaterThan(0.8);
    }

    /**
     * H = 1 Pa between 0.01 s and 100 s, L as in {@link GrossRelationTest}. A spectrum whose logarithm is smooth cannot jump, so
     * within 0.4 decades of a jump, where no data tell a jump from a slope, the band is not asked.
     */
    @Test
    void theBox() throws ReductionFault {
        DoubleUnaryOperator box = time -> time > 0.01 && time < 100 ? 1 : 0;
        List<ModulusReading> readings = KnownSpectra.readings(KnownSpectra.modulusOf(box), -3, 3, 0.01, 0);
        ContinuousSpectrum spectrum = ContinuousFit.of(readings, DiscreteFit.fit(readings, LIQUID));

        assertThat(shareBesideJumps(spectrum, spectrum.relaxation(), box)).isGreaterThan(0.9);
        assertThat(shareBesideJumps(spectrum, spectrum.retardation(), ContinuousFitTest::retardationOfBox))
                .isGreaterThan(0.9);
    }

    private static double shareBesideJumps(
            ContinuousSpectrum spectrum, SpectralDensity density, DoubleUnaryOperator truth) {
        return Arrays.stream(inside(spectrum))
                .filter(node -> Math.abs(Math.abs(Math.log10(density.timesS()[node])) - 2) > 0.4)
                .mapToDouble(node -> holds(density, node, truth) ? 1 : 0)
                .average()
                .orElseThrow();
    }

    private static double retardationOfBox(double time) {
        double log = Math.log(Math.abs((time - 0.01) / (100 - time)));
        return time > 0.01 && time < 100 ? 1 / (log * log + Math.PI * Math.PI) : 0;
    }

    /** The continuous route gives the creep compliance of the discrete set, within the window. */
    @Test
    void theDiscreteSetSaysTheSame() throws ReductionFault {
        List<ModulusReading> readings = KnownSpectra.readings(LAUN::modulusPa, -4, 5, 0.01, 7);
        DiscreteSpectrum discrete = DiscreteFit.fit(readings, LIQUID);
        MaterialSpread materials = ContinuousFit.materials(readings, discrete);

        RelaxationModes modes = materials.likeliest();
        RetardationModes creep = modes.retardation();
        for (double time = 1e-4; time < 2e3; time *= 3) {
            double s = 1 / time;
            assertThat(modes.operationalModulusPa(s) * discrete.retardation().operationalCompliancePerPa(s))
                    .isCloseTo(1, within(0.01));
            assertThat(creep.creepPerPa(time) / discrete.retardation().creepPerPa(time))
                    .isCloseTo(1, within(0.01));
        }
    }

    /** u of G(t) from the spread of materials: it holds the truth inside the window, and grows beyond the data. */
    @Test
    void theSpreadOfMaterialsGivesPredictionsTheirU() throws ReductionFault {
        List<ModulusReading> readings = KnownSpectra.readings(LAUN::modulusPa, -1, 2, 0.02, 3);
        MaterialSpread materials = ContinuousFit.materials(readings, DiscreteFit.fit(readings, LIQUID));

        for (double time : new double[] {0.05, 0.2, 1, 2}) {
            double u = materials.u(material -> material.relaxationPa(time));
            double value = materials.likeliest().relaxationPa(time);
            assertThat(value).isCloseTo(LAUN.relaxationPa(time), within(3 * u));
            assertThat(u / value).isLessThan(0.1);
        }
        double late = materials.likeliest().relaxationPa(1000);
        assertThat(materials.u(material -> material.relaxationPa(1000)) / late).isGreaterThan(1);
    }

    @Test
    void publishedRowsEndWithTheData() throws ReductionFault {
        List<ModulusReading> readings = doubleLogNormal(0.02, 1);
        List<SpectrumRow> rows =
                ContinuousFit.of(readings, DiscreteFit.fit(readings, LIQUID)).rows(300);

        assertThat(rows).hasSize(2 * 61).allSatisfy(row -> {
            assertThat(row.form()).isEqualTo(SpectrumRow.Form.CONTINUOUS);
            assertThat(row.low().getAsDouble()).isLessThanOrEqualTo(row.value());
            assertThat(row.high().getAsDouble()).isGreaterThanOrEqualTo(row.value());
        });
        assertThat(rows.get(0).timeS()).isCloseTo(1e-3, within(1e-12));
        assertThat(rows.get(60).timeS()).isCloseTo(1e3, within(1e-6));
    }

    @Test
    void tooFewDecadesFixNoTimeAtAll() throws ReductionFault {
        List<ModulusReading> readings = KnownSpectra.readings(LAUN::modulusPa, 0, 1.3, 0.01, 0);
        DiscreteSpectrum discrete = DiscreteFit.fit(readings, LIQUID);

        assertThatThrownBy(() -> ContinuousFit.of(readings, discrete))
                .isInstanceOfSatisfying(
                        ReductionFault.class,
                        fault -> assertThat(fault.reason().code()).isEqualTo("CONTINUOUS_TOO_NARROW"));
    }

    private static List<ModulusReading> doubleLogNormal(double noise, long seed) {
        return KnownSpectra.readings(KnownSpectra.modulusOf(KnownSpectra::doubleLogNormal), -3, 3, noise, seed);
    }

    /** The nodes inside the supported window. */
    private static int[] inside(ContinuousSpectrum spectrum) {
        double[] times = spectrum.relaxation().timesS();
        return IntStream.range(0, times.length)
                .filter(i -> times[i] > spectrum.window().shortestS()
                        && times[i] < spectrum.window().longestS())
                .toArray();
    }

    private static double peak(ContinuousSpectrum spectrum, SpectralDensity density, DoubleUnaryOperator truth) {
        return Arrays.stream(inside(spectrum))
                .mapToDouble(node -> truth.applyAsDouble(density.timesS()[node]))
                .max()
                .orElseThrow();
    }

    /** The worst error inside the window over the peak. */
    static double worst(ContinuousSpectrum spectrum, SpectralDensity density, DoubleUnaryOperator truth) {
        return Arrays.stream(inside(spectrum))
                        .mapToDouble(
                                node -> Math.abs(density.values()[node] - truth.applyAsDouble(density.timesS()[node])))
                        .max()
                        .orElseThrow()
                / peak(spectrum, density, truth);
    }

    /** The rms error inside the window over the peak. */
    static double rms(ContinuousSpectrum spectrum, SpectralDensity density, DoubleUnaryOperator truth) {
        double squares = Arrays.stream(inside(spectrum))
                .mapToDouble(node -> density.values()[node] - truth.applyAsDouble(density.timesS()[node]))
                .map(error -> error * error)
                .average()
                .orElseThrow();
        return Math.sqrt(squares) / peak(spectrum, density, truth);
    }

    /** The share of the window where the band holds the truth. */
    static double share(ContinuousSpectrum spectrum, SpectralDensity density, DoubleUnaryOperator truth) {
        return Arrays.stream(inside(spectrum))
                .mapToDouble(node -> holds(density, node, truth) ? 1 : 0)
                .average()
                .orElseThrow();
    }

    private static boolean holds(SpectralDensity density, int node, DoubleUnaryOperator truth) {
        double exact = truth.applyAsDouble(density.timesS()[node]);
        return density.low()[node] <= exact && exact <= density.high()[node];
    }

    /** Half the band's mean width inside the window over the peak. */
    static double halfWidth(ContinuousSpectrum spectrum, SpectralDensity density, DoubleUnaryOperator truth) {
        return Arrays.stream(inside(spectrum))
                        .mapToDouble(node -> (density.high()[node] - density.low()[node]) / 2)
                        .average()
                        .orElseThrow()
                / peak(spectrum, density, truth);
    }

    /** The times of the peaks inside the window. */
    static double[] peaks(ContinuousSpectrum spectrum, SpectralDensity density) {
        double[] values = density.values();
        return Arrays.stream(inside(spectrum))
                .filter(node -> values[node] > values[node - 1] && values[node] > values[node + 1])
                .mapToDouble(node -> density.timesS()[node])
                .toArray();
    }
}
