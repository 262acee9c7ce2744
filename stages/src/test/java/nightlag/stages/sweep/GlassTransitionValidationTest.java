package nightlag.stages.sweep;

import static nightlag.stages.sweep.SweepPlan.OnsetAxis.LINEAR;
import static nightlag.stages.sweep.SweepPlan.OnsetAxis.LOG;
import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.List;
import java.util.Random;
import java.util.function.DoubleUnaryOperator;
import java.util.stream.DoubleStream;
import nightlag.stages.moduli.Findings;
import nightlag.stages.moduli.Marker;
import nightlag.stages.numeric.Complex;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/**
 * Exact: with one relaxation time and an Arrhenius shift the loss peak is at x = 1, the tan δ peak at x = √(Er/Eu), and the
 * tangents of the onset follow from the derivative. The broad material is held against a search over a dense grid.
 */
class GlassTransitionValidationTest {
    private static final double ENOUGH_K = 0.05;
    private static final Random UNUSED = new Random(1);

    static SweepPlan plan(SweepPlan.OnsetAxis axis) {
        return new SweepPlan(SweepPlan.Kind.AUTO, SweepPlan.Repeats.APART, axis);
    }

    static List<Marker> all(Findings findings, String property) {
        return findings.markers().stream()
                .filter(marker -> marker.property().equals(property))
                .toList();
    }

    static Marker only(Findings findings, String property) {
        List<Marker> found = all(findings, property);
        assertThat(found).as(property + " " + findings.notes()).hasSize(1);
        return found.get(0);
    }

    @ParameterizedTest(name = "every {0} K from {1} K, {2}")
    @CsvSource({
        "0.1, 320.0, 0.01",
        "0.5, 320.0, 0.01",
        "0.5, 320.3, 0",
        "1, 320.0, 0.01",
        "1, 320.7, 0",
        "2, 320.0, 0",
        "2, 320.5, 0.01",
        "2, 321.0, 0",
        "2, 321.5, 0"
    })
    void theExactMaterialIsFoundWithinAFewHundredthsOfAKelvin(double every, double from, double relativeU) {
        Ramp ramp = new Ramp(Ramp.oneRelaxation(1), 1, 0, relativeU);
        Sweep sweep = ramp.sweep(from, 425, every, UNUSED);
        Findings linear = GlassTransition.of(sweep, plan(LINEAR));
        Findings log = GlassTransition.of(sweep, plan(LOG));

        assertThat(only(linear, "glass_transition_loss_peak").value()).isCloseTo(373.15, within(ENOUGH_K));
        assertThat(only(linear, "glass_transition_tan_delta_peak").value()).isCloseTo(379.935521, within(ENOUGH_K));
        assertThat(only(linear, "glass_transition_storage_onset").value()).isCloseTo(370.25589, within(ENOUGH_K));
        assertThat(only(log, "glass_transition_storage_onset").value()).isCloseTo(372.36658, within(ENOUGH_K));
        assertThat(only(linear, "glass_transition_storage_onset").method()).startsWith("linear axis");
        assertThat(only(log, "glass_transition_storage_onset").method()).startsWith("logarithmic axis");
        assertThat(linear.notes()).isEmpty();
    }

    @ParameterizedTest(name = "{0} Hz")
    @CsvSource({"0.1, 366.602600", "1, 373.15", "10, 379.935521", "100, 386.972395"})
    void theLossPeakMovesWithTheFrequency(double frequency, double expected) {
        Sweep sweep = Ramp.exact(Ramp.oneRelaxation(frequency), frequency).sweep(320, 440, 1, UNUSED);
        assertThat(only(GlassTransition.of(sweep, plan(LINEAR)), "glass_transition_loss_peak")
                        .value())
                .isCloseTo(expected, within(ENOUGH_K));
    }

    @ParameterizedTest(name = "every {0} K")
    @CsvSource({"0.5", "1", "2"})
    void theActivationEnergyComesBack(double every) {
        List<Sweep> sweeps = DoubleStream.of(0.1, 1, 10, 100)
                .mapToObj(f -> Ramp.exact(Ramp.oneRelaxation(f), f).sweep(320, 440, every, UNUSED))
                .toList();
        Findings findings = GlassTransition.of(sweeps, plan(LINEAR));
        List<Marker> energies = all(findings, "activation_energy");
        assertThat(energies).hasSize(3).allSatisfy(marker -> {
            assertThat(marker.value()).isCloseTo(400_000, within(2000.0));
            assertThat(marker.unit()).isEqualTo("J/mol");
        });
        assertThat(energies.get(1).method())
                .startsWith("apparent, ln f against 1/T of the loss peaks at 4 frequencies from 0.1 to 100 Hz");
    }

    /** Lopsided and twenty times as broad: the place of each marker by a search every hundredth of a kelvin. */
    @ParameterizedTest(name = "every {0} K")
    @CsvSource({"0.5", "1", "2", "5"})
    void theBroadMaterialAgreesWithADenseSearch(double every) {
        Sweep sweep = new Ramp(Ramp.broad(1), 1, 0, 1e-6).sweep(321, 440, every, UNUSED);
        Findings findings = GlassTransition.of(sweep, plan(LINEAR));
        DoubleUnaryOperator loss = t -> Ramp.broad(1).apply(t).im();
        DoubleUnaryOperator tanDelta =
                t -> loss.applyAsDouble(t) / Ramp.broad(1).apply(t).re();
        assertThat(only(findings, "glass_transition_loss_peak").value()).isCloseTo(highest(loss), within(ENOUGH_K));
        assertThat(only(findings, "glass_transition_tan_delta_peak").value())
                .isCloseTo(highest(tanDelta), within(ENOUGH_K));
        for (SweepPlan.OnsetAxis axis : SweepPlan.OnsetAxis.values()) {
            assertThat(only(GlassTransition.of(sweep, plan(axis)), "glass_transition_storage_onset")
                            .value())
                    .isCloseTo(DenseOnset.of(Ramp.broad(1), axis, 321, 430), within(ENOUGH_K));
        }
    }

    static double highest(DoubleUnaryOperator figure) {
        double best = 330;
        for (double t = 330; t < 430; t += 0.001) {
            if (figure.applyAsDouble(t) > figure.applyAsDouble(best)) {
                best = t;
            }
        }
        return best;
    }

    @Test
    void theExactMaterialIsTheOneOfTheClosedForm() {
        // (Eu − Er)/2 at the loss peak, (Eu − Er)/(2√(Eu Er)) = 4.95 at the tan δ peak
        assertThat(Ramp.oneRelaxation(1).apply(373.15).im()).isCloseTo(990e6, within(1.0));
        Complex atTanDeltaPeak = Ramp.oneRelaxation(1).apply(379.935521);
        assertThat(atTanDeltaPeak.im() / atTanDeltaPeak.re()).isCloseTo(4.95, within(1e-9));
    }
}
