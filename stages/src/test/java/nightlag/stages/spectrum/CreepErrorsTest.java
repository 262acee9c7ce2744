package nightlag.stages.spectrum;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.List;
import java.util.OptionalInt;
import java.util.function.UnaryOperator;
import java.util.stream.IntStream;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.moduli.CreepCurve;
import nightlag.stages.moduli.CreepReading;
import nightlag.stages.moduli.CreepRecording;
import nightlag.stages.moduli.CreepStep;
import nightlag.stages.moduli.Marker;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

/**
 * What all strains of a record have in common: where a step lies between two samples, what the stress comes to, the strain's zero.
 * Exact: a Burgers body, J0 = 1e-6/Pa, 1/η0 = 1e-7/(Pa·s).
 */
class CreepErrorsTest {
    private static final SpectrumPlan LIQUID = new SpectrumPlan(false, OptionalInt.empty(), false);
    private static final double MODE_S = 2;
    private static final double MODE_PER_PA = 0.5e-6;
    private static final RetardationModes BURGERS =
            RetardationModes.of(1e-6, 1e-7, new double[] {MODE_S}, new double[] {MODE_PER_PA});

    /** A sixteenth of a second, which sums of it hold to the last digit. */
    private static final double INTERVAL_S = 1.0 / 16;

    private static final double BEGINS_S = 10;

    /** On the last sample before, between, on the first after: off by what the interval leaves open, and u says so. */
    @ParameterizedTest(name = "{0} of an interval after a sample")
    @ValueSource(doubles = {1e-6, 0.25, 0.5, 0.75, 1})
    void aJumpBetweenTwoSamplesMayLieAnywhereBetweenThem(double part) throws ReductionFault {
        CreepSpectrum spectrum = spectrum(0, BEGINS_S + part * INTERVAL_S, 0);

        double off = (part - 0.5) * INTERVAL_S;
        // exact: a step taken as that much too late has a mode e^{off/λ} times as strong
        double strength = spectrum.retardation().strengthsPerPa()[0];
        assertThat(strength / MODE_PER_PA).isCloseTo(Math.exp(off / MODE_S), within(2e-3));
        Marker instantaneous = instantaneous(spectrum);
        // the ends of an even distribution lie √3 of its u off; its u here is that of the first readings' rate
        assertThat(instantaneous.value())
                .isCloseTo(1e-6, within(2.2 * instantaneous.u().orElseThrow()));
        assertThat(instantaneous.u().orElseThrow()).isBetween(3e-9, 1e-8);
    }

    /** A record that begins before zero and is loaded at zero, be it on a sample or between two. */
    @ParameterizedTest(name = "samples {0} of an interval after zero")
    @ValueSource(doubles = {0, 0.25, 0.5, 0.75})
    void aClockThatCountsFromTheLoadSaysWhereItIs(double part) throws ReductionFault {
        CreepSpectrum spectrum = spectrum(-BEGINS_S + part * INTERVAL_S, 0, 0);

        assertThat(spectrum.retardation().strengthsPerPa()[0]).isCloseTo(MODE_PER_PA, within(2e-3 * MODE_PER_PA));
        assertThat(spectrum.retardation().instantaneousPerPa()).isCloseTo(1e-6, within(2e-9));
    }

    @ParameterizedTest(name = "a ramp of {0} intervals begun {1} of one after a sample")
    @CsvSource({"1, 0", "1, 0.5", "2, 0", "2, 0.3", "3, 0", "3, 0.5", "5, 0", "5, 0.7"})
    void aRampThatSamplesShowIsTakenAtItsCentre(double intervals, double part) throws ReductionFault {
        CreepSpectrum spectrum = spectrum(0, BEGINS_S + part * INTERVAL_S, intervals * INTERVAL_S);

        assertThat(spectrum.retardation().strengthsPerPa()[0]).isCloseTo(MODE_PER_PA, within(2e-3 * MODE_PER_PA));
        assertThat(spectrum.retardation().instantaneousPerPa()).isCloseTo(1e-6, within(1e-9));
    }

    /** What the readings share does not stand in the way of what they say apart. */
    @Test
    void theTimeOfTheModeIsKnownAllTheSame() throws ReductionFault {
        CreepSpectrum spectrum = spectrum(0, BEGINS_S + INTERVAL_S, 0);

        assertThat(spectrum.retardation().timesS()[0]).isCloseTo(MODE_S, within(5e-3));
        assertThat(spectrum.retardation().fluidityPerPaS()).isCloseTo(1e-7, within(1e-10));
    }

    /** Exact: with C = U² + z² 1 1ᵀ, xᵀ C⁻¹ y by Sherman and Morrison. */
    @Test
    void rowsHaveTheCovarianceOfAnErrorOfTheZero() {
        CreepCurve curve = with(step -> changed(step, 0, 0, 1e-5));
        CreepErrors errors = CreepErrors.of(curve, 0);
        int n = errors.size();
        double[] u =
                curve.readings().stream().mapToDouble(CreepReading::strainU).toArray();
        double[] x = IntStream.range(0, n).mapToDouble(i -> 1e-4 * (1 + i)).toArray();
        double[] y = IntStream.range(0, n).mapToDouble(i -> 1e-4 * Math.cos(i)).toArray();

        double xy = 0;
        double xOne = 0;
        double yOne = 0;
        double one = 0;
        for (int i = 0; i < n; i++) {
            double weight = 1 / (u[i] * u[i]);
            xy += weight * x[i] * y[i];
            xOne += weight * x[i];
            yOne += weight * y[i];
            one += weight;
        }
        double exact = xy - 1e-10 * xOne * yOne / (1 + 1e-10 * one);
        double[] ofX = errors.whitened(x);
        double[] ofY = errors.whitened(y);
        double found = IntStream.range(0, n).mapToDouble(i -> ofX[i] * ofY[i]).sum();
        assertThat(found).isCloseTo(exact, within(1e-9 * Math.abs(exact)));
    }

    /** All of a record's compliance is wrong by what its stress is wrong, however many strains are read. */
    @Test
    void theViscosityIsKnownNoBetterThanTheStress() throws ReductionFault {
        double u = relativeU("zero_shear_viscosity", step -> changed(step, 0, 0.01 * Math.abs(step.changePa()), 0));
        // u of the stress under load is 1 %/√2, the rest that of the stress without it
        assertThat(u).isBetween(0.01 / Math.sqrt(2), 0.0102);
        assertThat(relativeU("zero_shear_viscosity", step -> step)).isLessThan(1e-4);
    }

    /** A load that began δ earlier has flowed δ/η0 further: that is a larger Je0. */
    @Test
    void theSteadyStateComplianceIsKnownNoBetterThanTheInstant() throws ReductionFault {
        double instantU = 0.1;
        double u = relativeU("steady_state_compliance", step -> changed(step, instantU, 0, 0));
        assertThat(u).isBetween(0.95 * instantU * 1e-7 / 1.5e-6, 1.5 * instantU * 1e-7 / 1.5e-6);
        assertThat(relativeU("zero_shear_viscosity", step -> changed(step, instantU, 0, 0)))
                .isLessThan(3e-3);
    }

    /** What is over before the first reading is in J0 or not: neither bound is the other's. */
    @Test
    void whatYieldsAtOnceIsOpenWhereTheFastestModeIsNotSeenFromItsBeginning() throws ReductionFault {
        CreepSpectrum seen = CreepFit.fit(List.of(CreepFitTest.curve(BURGERS, 0.01, 100, 200, 1e-3, 1)), LIQUID);
        CreepSpectrum late = CreepFit.fit(List.of(CreepFitTest.curve(BURGERS, 2, 100, 200, 1e-3, 1)), LIQUID);

        assertThat(instantaneous(seen).u().orElseThrow()).isLessThan(1e-8);
        assertThat(instantaneous(seen).method()).doesNotContain("could hide");
        assertThat(instantaneous(late).u().orElseThrow()).isGreaterThan(3e-7);
        assertThat(instantaneous(late).method()).contains("u holds what could hide there");
    }

    private static CreepStep changed(CreepStep step, double instantU, double changeU, double zeroU) {
        return new CreepStep(
                step.part(),
                step.atS(),
                instantU,
                step.riseS(),
                step.changePa(),
                changeU,
                step.strainBefore(),
                zeroU,
                step.stressBeforeUPa());
    }

    private static CreepCurve with(UnaryOperator<CreepStep> change) {
        CreepCurve curve = CreepFitTest.curve(BURGERS, 0.1, 100, 200, 1e-4, 1);
        return new CreepCurve(
                curve.key(),
                curve.made(),
                curve.deformation(),
                curve.temperatureK(),
                curve.taggedTemperatureK(),
                curve.fromRest(),
                curve.steps().stream().map(change).toList(),
                curve.readings(),
                curve.quality(),
                curve.flags(),
                curve.samplesUsed(),
                curve.reasons());
    }

    private static double relativeU(String property, UnaryOperator<CreepStep> change) throws ReductionFault {
        Marker marker = CreepFit.fit(List.of(with(change)), LIQUID).markers(298.15).stream()
                .filter(one -> one.property().equals(property))
                .findFirst()
                .orElseThrow();
        return marker.u().orElseThrow() / marker.value();
    }

    /** A minute of load from an instant on, and a minute without. */
    private static CreepSpectrum spectrum(double firstSampleS, double loadS, double riseS) throws ReductionFault {
        return CreepFit.fit(
                List.of(CreepRecording.of(
                                BURGERS::creepPerPa, CreepRecording.even(firstSampleS, loadS + 120, INTERVAL_S))
                        .steps(new double[] {loadS, loadS + 60}, 1000, 0)
                        .rise(riseS)
                        .curve()),
                LIQUID);
    }

    private static Marker instantaneous(CreepSpectrum spectrum) {
        return spectrum.markers(298.15).stream()
                .filter(marker -> marker.property().equals("instantaneous_compliance"))
                .findFirst()
                .orElseThrow();
    }
}
