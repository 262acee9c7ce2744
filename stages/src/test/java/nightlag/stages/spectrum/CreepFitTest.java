package nightlag.stages.spectrum;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;
import static org.assertj.core.api.Assertions.within;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalInt;
import java.util.Random;
import nightlag.stages.TestCreep;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.moduli.CreepCurve;
import nightlag.stages.moduli.CreepReading;
import nightlag.stages.moduli.CreepStep;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModuliCovariance;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.numeric.Complex;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** Spectra out of creep: what goes in as modes comes out, alone, with recovery, and with moduli of the same material. */
class CreepFitTest {
    private static final SpectrumPlan LIQUID = new SpectrumPlan(false, OptionalInt.empty(), false);
    private static final SpectrumPlan SOLID = new SpectrumPlan(true, OptionalInt.empty(), false);

    /** Burgers (exact): J = 1 + t/10 + 0.5 (1 − e^{−t/2}), here in 1e-6/Pa. */
    private static final RetardationModes BURGERS =
            RetardationModes.of(1e-6, 1e-7, new double[] {2}, new double[] {0.5e-6});
    /** A standard linear solid (exact): Ge = 1, G1 = 9, τ = 1 gives J0 = 0.1, J1 = 0.9, λ = 10; here in 1e-6/Pa. */
    private static final RetardationModes STANDARD_SOLID =
            RetardationModes.of(0.1e-6, 0, new double[] {10}, new double[] {0.9e-6});

    /** Creep under 1 kPa and, where the record goes on, recovery; errors of {@code noise} of the reading. */
    static CreepCurve curve(
            RetardationModes material, double first, double loadedS, double untilS, double noise, long seed) {
        return TestCreep.creep(material::creepPerPa, first, loadedS, untilS)
                .noisy(noise, seed)
                .build();
    }

    /** The same with the stress the other way. */
    static CreepCurve upsideDown(CreepCurve curve) {
        return new CreepCurve(
                curve.key(),
                curve.made(),
                curve.deformation(),
                curve.temperatureK(),
                curve.taggedTemperatureK(),
                curve.fromRest(),
                curve.steps().stream()
                        .map(step -> new CreepStep(
                                step.part(),
                                step.atS(),
                                step.atUS(),
                                step.riseS(),
                                -step.changePa(),
                                step.changeUPa(),
                                -step.strainBefore(),
                                step.strainBeforeU(),
                                step.stressBeforeUPa()))
                        .toList(),
                curve.readings().stream()
                        .map(reading -> new CreepReading(
                                reading.step(),
                                reading.timeS(),
                                reading.sinceStepS(),
                                -reading.stressPa(),
                                -reading.strain(),
                                reading.strainU(),
                                reading.compliancePerPa(),
                                reading.complianceUPerPa()))
                        .toList(),
                curve.quality(),
                curve.flags(),
                curve.samplesUsed(),
                curve.reasons());
    }

    static List<ModulusReading> moduli(RetardationModes material, double lowest, double highest, double noise) {
        Random random = new Random(7);
        List<ModulusReading> readings = new ArrayList<>();
        for (double omega = lowest; omega <= highest * 1.0001; omega *= Math.pow(10, 0.2)) {
            Complex modulus = new Complex(1, 0).over(material.compliancePerPa(omega));
            double u = noise * modulus.abs();
            readings.add(new ModulusReading(
                    omega,
                    new Moduli(
                            modulus.re() + u * random.nextGaussian(),
                            modulus.im() + u * random.nextGaussian(),
                            Optional.of(new ModuliCovariance(u * u, u * u, 0)))));
        }
        return readings;
    }

    private static void requireModes(RetardationModes found, RetardationModes truth, double error) {
        assertThat(found.count()).isEqualTo(truth.count());
        assertThat(found.instantaneousPerPa())
                .isCloseTo(truth.instantaneousPerPa(), within(error * truth.instantaneousPerPa()));
        assertThat(found.fluidityPerPaS()).isCloseTo(truth.fluidityPerPaS(), within(error * truth.fluidityPerPaS()));
        for (int i = 0; i < truth.count(); i++) {
            assertThat(found.timesS()[i]).isCloseTo(truth.timesS()[i], within(error * truth.timesS()[i]));
            assertThat(found.strengthsPerPa()[i])
                    .isCloseTo(truth.strengthsPerPa()[i], within(error * truth.strengthsPerPa()[i]));
        }
    }

    @Test
    void aBurgersBodyComesBackFromItsCreep() throws ReductionFault {
        CreepSpectrum spectrum = CreepFit.fit(List.of(curve(BURGERS, 0.01, 100, 100, 0, 1)), LIQUID);
        requireModes(spectrum.retardation(), BURGERS, 1e-3);
        // its exact inverse, published with it
        RelaxationModes relaxation = spectrum.retardation().relaxation();
        assertThat(relaxation.timesS()[1]).isCloseTo(15.7284161474, within(0.02));
        assertThat(relaxation.timesS()[0]).isCloseTo(1.2715838526, within(0.002));
    }

    @Test
    void aStandardLinearSolidComesBackFromCreepAndRecovery() throws ReductionFault {
        CreepSpectrum spectrum = CreepFit.fit(List.of(curve(STANDARD_SOLID, 0.1, 200, 500, 0, 1)), SOLID);
        requireModes(spectrum.retardation(), STANDARD_SOLID, 1e-3);
        assertThat(spectrum.markers(298.15))
                .filteredOn(marker -> marker.property().equals("equilibrium_modulus"))
                .singleElement()
                .satisfies(marker -> assertThat(marker.value()).isCloseTo(1e6, within(1e3)));
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5, 6, 7, 8})
    void uncertaintiesCoverTheTruth(long seed) throws ReductionFault {
        CreepSpectrum spectrum = CreepFit.fit(List.of(curve(BURGERS, 0.01, 100, 200, 0.01, seed)), LIQUID);
        Marker viscosity = spectrum.markers(298.15).stream()
                .filter(marker -> marker.property().equals("zero_shear_viscosity"))
                .findFirst()
                .orElseThrow();
        assertThat(viscosity.value()).isCloseTo(1e7, within(3.5 * viscosity.u().getAsDouble()));
        // 0.3 % of it; where the noise calls for a mode beside the flow, with what could hide between the two
        assertThat(viscosity.u().getAsDouble()).isBetween(1e3, 2e6);
        for (double t = 0.01; t <= 100; t *= 3) {
            double truth = BURGERS.creepPerPa(t);
            assertThat(spectrum.retardation().creepPerPa(t)).isCloseTo(truth, within(0.02 * truth));
        }
    }

    @Test
    void creepAndModuliTogetherReachFurtherThanEither() throws ReductionFault {
        // modes over eight decades: moduli see the fast ones, creep the slow ones
        RetardationModes material = RetardationModes.of(
                1e-9, 1e-12, new double[] {1e-3, 1e-1, 10, 1000}, new double[] {1e-9, 3e-9, 1e-8, 3e-8});
        CreepCurve creep = curve(material, 1, 1e5, 1e5, 0.003, 3);
        List<ModulusReading> moduli = moduli(material, 0.1, 1e4, 0.003);
        CreepSpectrum both =
                CreepFit.fit(CreepData.of(ShiftedCreep.unmoved(List.of(creep))).with(moduli, Optional.empty()), LIQUID);
        requireModes(both.retardation(), material, 0.05);
        // neither alone has both ends
        CreepSpectrum alone = CreepFit.fit(List.of(creep), LIQUID);
        assertThat(alone.retardation().instantaneousPerPa()).isGreaterThan(2e-9);
    }

    @Test
    void aRecordThatEndsTooSoonHasNoViscosityAndSaysWhy() throws ReductionFault {
        RetardationModes slow = RetardationModes.of(1e-6, 0, new double[] {1, 300}, new double[] {1e-6, 5e-6});
        CreepSpectrum spectrum = CreepFit.fit(List.of(curve(slow, 0.01, 200, 200, 1e-4, 1)), SOLID);
        assertThat(spectrum.notes()).extracting(note -> note.code()).containsExactly("CREEP_END_NOT_REACHED");
        assertThat(spectrum.markers(298.15))
                .extracting(Marker::property)
                .containsExactly("instantaneous_compliance", "instantaneous_modulus");
    }

    /** Seed 1008: on the way down to fewer modes the flow falls below the smallest double. */
    @Test
    void aFlowThatTheFitDrivesToNothingOnTheWayIsStillANumberOfIt() throws ReductionFault {
        RetardationModes melt = KnownSpectra.retardationOf(0.2, 1e-4, KnownSpectra::doubleLogNormal);
        CreepSpectrum spectrum = CreepFit.fit(List.of(curve(melt, 1e-3, 1e4, 1e4, 0.04, 1008)), LIQUID);

        assertThat(spectrum.retardation().fluidityPerPaS()).isCloseTo(1e-4, within(2e-5));
    }

    /** Modes over eight decades, of which moduli see the fast ones and creep the slow ones. */
    private static final RetardationModes WIDE = RetardationModes.of(
            1e-9, 1e-12, new double[] {1e-3, 1e-1, 10, 1000}, new double[] {1e-9, 3e-9, 1e-8, 3e-8});

    @Test
    void creepAtOtherTemperaturesIsShiftedToThatOfTheModuli() throws ReductionFault {
        // warm creep of ten minutes stands for a day and more, cold creep for what is fast
        CreepData data = CreepData.of(
                        List.of(
                                new ShiftedCreep(List.of(shifted(0.01, 1.1, 1, 600)), Math.log(0.01), Math.log(1.1)),
                                new ShiftedCreep(List.of(shifted(10, 0.95, 1, 600)), Math.log(10), Math.log(0.95))),
                        new double[4][4])
                .with(moduli(WIDE, 0.1, 1e4, 0.003), Optional.empty());

        CreepSpectrum spectrum = CreepFit.fit(data, LIQUID);

        requireModes(spectrum.retardation(), WIDE, 0.05);
        assertThat(spectrum.window().longestS()).isCloseTo(6e4, within(6e3));
        assertThat(spectrum.markers(298.15))
                .extracting(Marker::method)
                .allMatch(method -> method.contains("creep at 2 temperatures and oscillation together"));
        assertThat(spectrum.notes()).isEmpty();
    }

    @ParameterizedTest(name = "{0} u beside")
    @ValueSource(doubles = {-2, 1, 2})
    void whatAShiftIsOffIsFittedWithinItsU(double off) throws ReductionFault {
        double u = 0.1;
        CreepCurve warm = shifted(0.01, 1, 0.1, 2000);
        double[][] covariance = {{u * u, 0}, {0, 0}};
        List<ModulusReading> moduli = moduli(WIDE, 1e-3, 1e4, 0.003);
        CreepData said = CreepData.of(List.of(new ShiftedCreep(List.of(warm), Math.log(0.01) + off * u, 0)), covariance)
                .with(moduli, Optional.empty());
        CreepData taken = CreepData.of(
                        List.of(new ShiftedCreep(List.of(warm), Math.log(0.01) + off * u, 0)), new double[2][2])
                .with(moduli, Optional.empty());

        CreepSpectrum spectrum = CreepFit.fit(said, LIQUID);

        requireModes(spectrum.retardation(), WIDE, 0.05);
        double viscosity = 1 / WIDE.fluidityPerPaS();
        assertThat(value(spectrum, "zero_shear_viscosity")).isCloseTo(viscosity, within(0.02 * viscosity));
        // a shift taken for exact carries its error into all times
        assertThat(Math.abs(value(CreepFit.fit(taken, LIQUID), "zero_shear_viscosity") / viscosity - 1))
                .isGreaterThan(0.05);
    }

    @Test
    void creepThatDoesNotGoWithTheShiftsIsSaid() throws ReductionFault {
        double u = 0.02;
        CreepData data = CreepData.of(
                        List.of(new ShiftedCreep(List.of(shifted(0.01, 1, 0.1, 2000)), Math.log(0.013), 0)),
                        new double[][] {{u * u, 0}, {0, 0}})
                .with(moduli(WIDE, 1e-3, 1e4, 0.003), Optional.empty());

        assertThat(CreepFit.fit(data, LIQUID).notes())
                .extracting(note -> note.code())
                .containsExactly("CREEP_SHIFT_OFF");
    }

    private static CreepCurve shifted(double a, double b, double first, double loadedS) {
        return TestCreep.creep(WIDE::creepPerPa, first, loadedS, loadedS)
                .shifted(350, a, b)
                .noisy(0.003, 3)
                .build();
    }

    private static double value(CreepSpectrum spectrum, String property) {
        return spectrum.markers(298.15).stream()
                .filter(marker -> marker.property().equals(property))
                .findFirst()
                .orElseThrow()
                .value();
    }

    @ParameterizedTest(name = "{0} modes")
    @ValueSource(ints = {1, 2, 3, 5, 8, 12})
    void aFixedNumberIsThatOfTheRelaxationModes(int modes) throws ReductionFault {
        SpectrumPlan plan = new SpectrumPlan(false, OptionalInt.of(modes), false);

        CreepSpectrum ofLiquid = CreepFit.fit(List.of(curve(WIDE, 0.01, 1e4, 2e4, 0.01, 1)), plan);

        assertThat(ofLiquid.relaxation().count()).isEqualTo(modes);
        assertThat(ofLiquid.notes()).extracting(note -> note.code()).doesNotContain("CREEP_OTHER_NUMBER_OF_MODES");
        if (modes >= 5) {
            for (double t = 0.01; t <= 1e4; t *= 3) {
                double truth = WIDE.creepPerPa(t);
                assertThat(ofLiquid.retardation().creepPerPa(t)).isCloseTo(truth, within(0.02 * truth));
            }
        }
        CreepSpectrum ofSolid = CreepFit.fit(
                List.of(curve(STANDARD_SOLID, 0.1, 200, 500, 0.01, 1)),
                new SpectrumPlan(true, OptionalInt.of(modes), false));
        assertThat(ofSolid.relaxation().count()).isEqualTo(modes);
    }

    @Test
    void moreModesThanReadingsCarryAreRefused() {
        SpectrumPlan plan = new SpectrumPlan(false, OptionalInt.of(60), false);

        assertThatThrownBy(() -> CreepFit.fit(List.of(curve(BURGERS, 0.01, 100, 100, 0, 1)), plan))
                .hasMessageContaining("60 modes are asked for");
    }

    @Test
    void moduliWithoutUTakeTheirScatter() throws ReductionFault {
        List<ModulusReading> moduli = moduli(WIDE, 0.1, 1e4, 0.003).stream()
                .map(reading -> new ModulusReading(
                        reading.angularFrequency(),
                        new Moduli(
                                reading.moduli().storagePa(), reading.moduli().lossPa(), Optional.empty())))
                .toList();
        CreepData creep = CreepData.of(ShiftedCreep.unmoved(List.of(curve(WIDE, 1, 1e5, 1e5, 0.003, 3))));

        CreepSpectrum both = CreepFit.fit(creep.with(moduli, Optional.of(DiscreteFit.fit(moduli, LIQUID))), LIQUID);

        requireModes(both.retardation(), WIDE, 0.1);
        assertThat(both.markers(298.15))
                .extracting(Marker::method)
                .allMatch(method -> method.contains("the moduli's u from their scatter"));
        assertThatThrownBy(() -> creep.with(moduli, Optional.empty())).hasMessageContaining("came without u");
    }

    @Test
    void betweenCreepAndModuliThatDoNotMeetNothingIsSupported() throws ReductionFault {
        CreepData apart = CreepData.of(ShiftedCreep.unmoved(List.of(curve(WIDE, 10, 1e5, 1e5, 0.003, 3))))
                .with(moduli(WIDE, 10, 1e4, 0.003), Optional.empty());
        CreepData meeting = CreepData.of(ShiftedCreep.unmoved(List.of(curve(WIDE, 0.1, 1e5, 1e5, 0.003, 3))))
                .with(moduli(WIDE, 5, 1e4, 0.003), Optional.empty());

        CreepSpectrum gap = CreepFit.fit(apart, LIQUID);
        CreepSpectrum whole = CreepFit.fit(meeting, LIQUID);

        assertThat(gap.supportsCreep(0.001)).isTrue();
        assertThat(gap.supportsCreep(1)).isFalse();
        assertThat(gap.supportsCreep(20)).isTrue();
        assertThat(gap.supportsRelaxation(20)).isFalse();
        assertThat(gap.supportsRelaxation(50)).isTrue();
        assertThat(whole.supportsRelaxation(0.15)).isTrue();
        assertThat(gap.supportsCreep(1000)).isTrue();
        assertThat(whole.supportsCreep(0.15)).isTrue();
        assertThat(whole.supportsCreep(0.05)).isTrue();
        assertThat(whole.supportsCreep(2e5)).isFalse();
    }
}
