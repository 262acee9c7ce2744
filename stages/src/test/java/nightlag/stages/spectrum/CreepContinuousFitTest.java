package nightlag.stages.spectrum;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;
import static org.assertj.core.api.Assertions.within;

import java.util.Arrays;
import java.util.List;
import java.util.OptionalInt;
import java.util.function.DoubleUnaryOperator;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.moduli.CreepCurve;
import nightlag.stages.moduli.ModulusReading;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

/** Spectra whose form is known come back from creep and recovery: L by the fit, H from it by the exact relation. */
class CreepContinuousFitTest {
    private static final SpectrumPlan SOLID = new SpectrumPlan(true, OptionalInt.empty(), true);

    /** Bound: 1 % of the peak, L and H, from the first reading to e^{−π/2} of the last, creep alone. */
    @ParameterizedTest(name = "Ge = {0} Pa, α = {1}")
    @CsvSource({"0.1, 0.3", "0.1, 0.5", "0.1, 0.8", "0.01, 0.3", "0.01, 0.5", "0.01, 0.8"})
    void theFractionalSolidWithoutNoise(double equilibriumPa, double exponent) throws ReductionFault {
        KnownSpectra.FractionalSolid solid = new KnownSpectra.FractionalSolid(equilibriumPa, 1, exponent);
        ContinuousSpectrum spectrum = ofCreep(creep(solid, 1e-3, 1e4, 1e4, 0, 0), false);

        assertThat(ContinuousFitTest.worst(spectrum, spectrum.retardation(), solid::retardationPerPa))
                .isLessThan(0.01);
        assertThat(ContinuousFitTest.worst(spectrum, spectrum.relaxation(), solid::relaxationPa))
                .isLessThan(0.01);
    }

    /** An hour of load and ten of recovery say as much as ten hours of load. */
    @Test
    void theFractionalSolidByItsRecovery() throws ReductionFault {
        KnownSpectra.FractionalSolid solid = new KnownSpectra.FractionalSolid(0.1, 1, 0.5);
        ContinuousSpectrum spectrum = ofCreep(creep(solid, 1e-3, 1e2, 1e4, 0, 0), false);

        assertThat(ContinuousFitTest.worst(spectrum, spectrum.retardation(), solid::retardationPerPa))
                .isLessThan(0.01);
        assertThat(ContinuousFitTest.worst(spectrum, spectrum.relaxation(), solid::relaxationPa))
                .isLessThan(0.01);
        assertThat(spectrum.equilibriumPa()).isCloseTo(0.1, within(0.002));
    }

    /** J0 and 1/η0 beside two log-normal humps of L: both, no third, and the flow is not taken for slow modes. */
    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {0, 1, 2, 3, 4})
    void twoHumpsAndAFlow(long seed) throws ReductionFault {
        RetardationModes melt = KnownSpectra.retardationOf(0.2, 0.02, KnownSpectra::doubleLogNormal);
        ContinuousSpectrum spectrum = ofCreep(CreepFitTest.curve(melt, 1e-3, 1e3, 2e3, 0.01, seed), true);

        assertThat(ContinuousFitTest.peaks(spectrum, spectrum.retardation())).hasSize(2);
        assertThat(ContinuousFitTest.share(spectrum, spectrum.retardation(), KnownSpectra::doubleLogNormal))
                .isGreaterThan(0.8);
        assertThat(spectrum.equilibriumPa()).isZero();
    }

    /** The discrete set fitted to the same readings creeps and relaxes as the continuous spectra do. */
    @Test
    void theDiscreteSetSaysTheSame() throws ReductionFault {
        KnownSpectra.FractionalSolid solid = new KnownSpectra.FractionalSolid(0.1, 1, 0.5);
        List<CreepCurve> curves = List.of(creep(solid, 1e-2, 1e3, 2e3, 0.005, 3));
        CreepSpectrum discrete = CreepFit.fit(curves, SOLID);
        ContinuousSpectrum spectrum = CreepContinuousFit.of(discrete);

        RelaxationModes relaxation = RelaxationModes.of(
                spectrum.equilibriumPa(),
                spectrum.relaxation().timesS(),
                Arrays.stream(spectrum.relaxation().values())
                        .map(h -> LogTimes.STEP * h)
                        .toArray());
        for (double time = 0.1; time <= 300; time *= 3) {
            double expected = discrete.retardation().creepPerPa(time);
            assertThat(relaxation.retardation().creepPerPa(time)).isCloseTo(expected, within(0.02 * expected));
        }
    }

    @Test
    void creepAndModuliTogetherReachFurtherThanEither() throws ReductionFault {
        KnownSpectra.FractionalSolid solid = new KnownSpectra.FractionalSolid(0.1, 1, 0.5);
        List<CreepCurve> curves = List.of(creep(solid, 1, 1e4, 1e4, 0.005, 3));
        List<ModulusReading> moduli = KnownSpectra.readings(solid::modulusPa, -1, 4, 0.005, 4);
        ContinuousSpectrum both =
                CreepContinuousFit.of(ComplianceReadings.of(List.of(ShiftedCreep.unmoved(curves)), moduli), false);
        ContinuousSpectrum alone = ofCreep(curves.get(0), false);

        assertThat(both.window().shortestS()).isCloseTo(Math.exp(Math.PI / 2) / 1e4, within(1e-12));
        assertThat(both.window().longestS()).isCloseTo(alone.window().longestS(), within(1e-9));
        assertThat(ContinuousFitTest.rms(both, both.retardation(), solid::retardationPerPa))
                .isLessThan(0.02);
        assertThat(ContinuousFitTest.rms(both, both.relaxation(), solid::relaxationPa))
                .isLessThan(0.03);
        assertThat(ContinuousFitTest.share(both, both.relaxation(), solid::relaxationPa))
                .isGreaterThan(0.8);
    }

    @Test
    void theBandOpensBeyondTheReadings() throws ReductionFault {
        KnownSpectra.FractionalSolid solid = new KnownSpectra.FractionalSolid(0.1, 1, 0.5);
        ContinuousSpectrum spectrum = ofCreep(creep(solid, 1e-2, 1e3, 1e3, 0.01, 1), false);

        for (SpectralDensity density : List.of(spectrum.retardation(), spectrum.relaxation())) {
            double typical = width(density, density.count() / 2);
            assertThat(width(density, 12)).as("0.8 decades before").isGreaterThan(2 * typical);
            assertThat(width(density, density.count() - 13))
                    .as("0.8 decades after")
                    .isGreaterThan(2 * typical);
        }
    }

    @Test
    void rowsEndWithTheReadings() throws ReductionFault {
        KnownSpectra.FractionalSolid solid = new KnownSpectra.FractionalSolid(0.1, 1, 0.5);
        List<SpectrumRow> rows =
                ofCreep(creep(solid, 1e-2, 1e3, 1e3, 0.01, 1), false).rows(300);

        assertThat(rows).hasSize(2 * 51).allSatisfy(row -> {
            assertThat(row.form()).isEqualTo(SpectrumRow.Form.CONTINUOUS);
            assertThat(row.low().getAsDouble()).isLessThanOrEqualTo(row.value());
            assertThat(row.high().getAsDouble()).isGreaterThanOrEqualTo(row.value());
        });
        assertThat(rows.get(51).kind()).isEqualTo(SpectrumRow.Kind.RETARDATION);
    }

    /** Pushed and pulled, all strains upside down: the same spectrum. */
    @Test
    void aNegativeStressSaysTheSame() throws ReductionFault {
        KnownSpectra.FractionalSolid solid = new KnownSpectra.FractionalSolid(0.1, 1, 0.5);
        CreepCurve curve = creep(solid, 1e-2, 1e2, 2e2, 0.01, 1);
        ContinuousSpectrum pulled = ofCreep(curve, false);
        ContinuousSpectrum pushed = ofCreep(CreepFitTest.upsideDown(curve), false);

        assertThat(pushed.retardation().values()).isEqualTo(pulled.retardation().values());
        assertThat(pushed.retardation().high()).isEqualTo(pulled.retardation().high());
        assertThat(pushed.relaxation().high()).isEqualTo(pulled.relaxation().high());
    }

    @Test
    void lessThanTheTimesItSupportsFixesNothing() throws ReductionFault {
        RetardationModes burgers = RetardationModes.of(1e-6, 1e-7, new double[] {2}, new double[] {0.5e-6});
        CreepCurve curve = CreepFitTest.curve(burgers, 1, 4.5, 4.5, 0.001, 1);

        assertThatThrownBy(() -> ofCreep(curve, true))
                .isInstanceOfSatisfying(
                        ReductionFault.class,
                        fault -> assertThat(fault.reason().code()).isEqualTo("CONTINUOUS_CREEP_TOO_SHORT"));
    }

    private static double width(SpectralDensity density, int node) {
        return Math.log(density.high()[node] / density.values()[node]);
    }

    static CreepCurve creep(
            KnownSpectra.FractionalSolid solid, double first, double loadedS, double untilS, double noise, long seed) {
        DoubleUnaryOperator spectrum = solid::retardationPerPa;
        return CreepFitTest.curve(
                KnownSpectra.retardationOf(1 / solid.glassyPa(), 0, spectrum), first, loadedS, untilS, noise, seed);
    }

    static ContinuousSpectrum ofCreep(CreepCurve curve, boolean flows) throws ReductionFault {
        return CreepContinuousFit.of(
                ComplianceReadings.of(List.of(ShiftedCreep.unmoved(List.of(curve))), List.of()), flows);
    }
}
