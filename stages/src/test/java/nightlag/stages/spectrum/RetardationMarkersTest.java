package nightlag.stages.spectrum;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.List;
import java.util.Optional;
import java.util.OptionalInt;
import nightlag.stages.fault.Reason;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.moduli.Marker;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** Mean retardation time and equilibrium compliance, out of moduli and out of creep; absent where the data end before. */
class RetardationMarkersTest {
    private static final SpectrumPlan SOLID = new SpectrumPlan(true, OptionalInt.empty(), false);
    private static final SpectrumPlan LIQUID = new SpectrumPlan(false, OptionalInt.empty(), false);

    /** Exact: Σ jλ²/Σ jλ = (0.3·0.1² + 0.6·10²)/(0.3·0.1 + 0.6·10) s = 60.003/6.03 s, J0 + Σ j = 1e-6/Pa. */
    private static final RetardationModes RUBBER =
            RetardationModes.of(0.1e-6, 0, new double[] {0.1, 10}, new double[] {0.3e-6, 0.6e-6});

    private static final double MEAN_S = 60.003 / 6.03;

    @ParameterizedTest(name = "noise of {0}")
    @ValueSource(doubles = {1e-3, 1e-2})
    void ofASolidFromItsModuli(double noise) throws ReductionFault {
        DiscreteSpectrum spectrum = DiscreteFit.fit(CreepFitTest.moduli(RUBBER, 0.01, 1e3, noise), SOLID);

        assertHeld(spectrum, "mean_retardation_time", MEAN_S, 0.1);
        assertHeld(spectrum, "equilibrium_compliance", 1e-6, 0.02);
        assertThat(spectrum.notes()).isEmpty();
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5})
    void ofASolidFromItsCreep(long seed) throws ReductionFault {
        CreepSpectrum spectrum = CreepFit.fit(List.of(CreepFitTest.curve(RUBBER, 0.01, 200, 400, 0.005, seed)), SOLID);

        assertHeld(spectrum, "mean_retardation_time", MEAN_S, 0.1);
        assertHeld(spectrum, "equilibrium_compliance", 1e-6, 0.02);
        assertThat(marker(spectrum, "equilibrium_compliance").orElseThrow().method())
                .isEqualTo("instantaneous compliance and sum of j, "
                        + spectrum.retardation().count() + " retardation modes fitted to creep, u from the fit");
    }

    /** Slower than 2.1 s nothing is supported, and the slow mode is at 10 s. */
    @Test
    void whatRestsOnModesBeyondTheDataIsLeftOutWithAReason() throws ReductionFault {
        DiscreteSpectrum spectrum = DiscreteFit.fit(CreepFitTest.moduli(RUBBER, 0.1, 1e3, 1e-5), SOLID);

        assertThat(marker(spectrum, "equilibrium_compliance")).isEmpty();
        assertThat(spectrum.notes())
                .extracting(Reason::sentence)
                .anySatisfy(sentence -> assertThat(sentence)
                        .startsWith("equilibrium_compliance is left out: 0.6")
                        .endsWith("slower than the 2.079 s that the data support, more than its own u"));
        // the mean time stands, with a u that has room for all that could hide there
        Marker mean = marker(spectrum, "mean_retardation_time").orElseThrow();
        assertThat(mean.u().orElseThrow()).isGreaterThan(MEAN_S);
    }

    @Test
    void aCreepRecordThatEndsTooSoonHasNeither() throws ReductionFault {
        RetardationModes slow = RetardationModes.of(1e-6, 0, new double[] {1, 300}, new double[] {1e-6, 5e-6});
        CreepSpectrum spectrum = CreepFit.fit(List.of(CreepFitTest.curve(slow, 0.01, 200, 200, 1e-4, 1)), SOLID);

        assertThat(marker(spectrum, "mean_retardation_time")).isEmpty();
        assertThat(marker(spectrum, "equilibrium_compliance")).isEmpty();
        assertThat(spectrum.notes())
                .extracting(Reason::sentence)
                .singleElement()
                .asString()
                .contains("no mean times");
    }

    /** A liquid of one mode yields at once and flows; nothing of it comes back with time. */
    @Test
    void aLiquidOfOneModeHasNoRetardation() throws ReductionFault {
        RetardationModes maxwell = RetardationModes.of(1e-6, 1e-6, new double[0], new double[0]);
        DiscreteSpectrum spectrum = DiscreteFit.fit(CreepFitTest.moduli(maxwell, 0.01, 100, 1e-3), LIQUID);

        assertThat(spectrum.relaxation().count()).isOne();
        assertThat(spectrum.markers(300)).extracting(Marker::property).doesNotContain("mean_retardation_time");
        assertThat(spectrum.notes()).isEmpty();
    }

    private static void assertHeld(FittedSpectrum spectrum, String property, double truth, double mostU) {
        Marker marker = marker(spectrum, property).orElseThrow();
        assertThat(marker.value()).isCloseTo(truth, within(4 * marker.u().orElseThrow()));
        assertThat(marker.u().orElseThrow()).isLessThan(mostU * truth);
    }

    private static Optional<Marker> marker(FittedSpectrum spectrum, String property) {
        return spectrum.markers(300).stream()
                .filter(marker -> marker.property().equals(property))
                .findFirst();
    }
}
