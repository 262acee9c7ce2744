package nightlag.stages.spectrum;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.List;
import java.util.OptionalInt;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.moduli.CreepRecording;
import nightlag.stages.moduli.Marker;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

/** Where a step lies between two samples, and what that means for J0 and the fastest mode. Exact: a Burgers body, J0 = 1e-6/Pa. */
class SharedErrorsTest {
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
