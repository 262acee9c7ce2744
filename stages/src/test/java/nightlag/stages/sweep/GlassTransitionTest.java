package nightlag.stages.sweep;

import static nightlag.stages.sweep.GlassTransitionValidationTest.all;
import static nightlag.stages.sweep.GlassTransitionValidationTest.only;
import static nightlag.stages.sweep.GlassTransitionValidationTest.plan;
import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import java.util.function.DoubleFunction;
import java.util.stream.DoubleStream;
import nightlag.stages.fault.Reason;
import nightlag.stages.moduli.Findings;
import nightlag.stages.moduli.Marker;
import nightlag.stages.numeric.Complex;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

class GlassTransitionTest {
    private static final SweepPlan PLAN = plan(SweepPlan.OnsetAxis.LINEAR);
    private static final String ONSET = "glass_transition_storage_onset";
    private static final String LOSS_PEAK = "glass_transition_loss_peak";
    private static final String TAN_DELTA_PEAK = "glass_transition_tan_delta_peak";

    private static Findings of(Sweep sweep) {
        return GlassTransition.of(sweep, PLAN);
    }

    private static List<String> codes(Findings findings) {
        return findings.notes().stream().map(Reason::code).toList();
    }

    @Test
    void aMarkerSaysWhereAndHowItWasFound() {
        Findings findings = of(Ramp.exact(Ramp.oneRelaxation(1), 1).noisy(0.01).sweep(320, 425, 1, new Random(3)));
        Marker peak = only(findings, LOSS_PEAK);
        assertThat(peak.unit()).isEqualTo("°C");
        assertThat(peak.temperatureK().orElseThrow()).isEqualTo(peak.value());
        assertThat(peak.frequencyHz()).hasValue(1);
        assertThat(peak.u().orElseThrow()).isBetween(0.02, 0.1);
        assertThat(peak.method()).startsWith("maximum of a smooth curve through the logarithm at 1");
        assertThat(only(findings, ONSET).method())
                .contains("glassy line through")
                .contains("meets the tangent at the steepest fall");
    }

    /** A sweep that ends on the way up the peak has a highest loss modulus, but no peak. */
    @Test
    void aPeakAtTheEdgeIsNone() {
        Findings findings = of(Ramp.exact(Ramp.oneRelaxation(1), 1).noisy(0.01).sweep(320, 371, 1, new Random(3)));
        assertThat(findings.markers()).isEmpty();
        assertThat(codes(findings))
                .containsExactly(
                        "TRANSITION_FALL_AT_THE_EDGE", "TRANSITION_PEAK_AT_THE_EDGE", "TRANSITION_PEAK_AT_THE_EDGE");
        assertThat(findings.notes().get(1).sentence())
                .startsWith("specimen 1, sweep 1, 1 Hz: no loss modulus peak: the highest value is at the edge");
    }

    /** The ramp starts in the transition: the peaks stand, but there is no glass to draw a line through. */
    @Test
    void withoutAGlassyPlateauThereIsNoOnset() {
        Findings findings = of(Ramp.exact(Ramp.oneRelaxation(1), 1).noisy(0.01).sweep(366, 425, 1, new Random(3)));
        assertThat(all(findings, LOSS_PEAK)).hasSize(1);
        assertThat(all(findings, TAN_DELTA_PEAK)).hasSize(1);
        assertThat(all(findings, ONSET)).isEmpty();
        assertThat(codes(findings)).containsExactly("TRANSITION_NO_GLASSY_LINE");
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5})
    void nothingButNoiseHasNoTransition(long seed) {
        DoubleFunction<Complex> flat = temperature -> new Complex(1e9, 1e7);
        Findings findings = of(new Ramp(flat, 1, 0.01, 0.01).sweep(300, 400, 0.5, new Random(seed)));
        assertThat(findings.markers()).isEmpty();
        assertThat(findings.notes()).hasSize(3);
        assertThat(codes(findings)).contains("TRANSITION_NO_FALL");
    }

    /** Two relaxations, 50 K apart, in parallel. */
    @Test
    void everyPeakHasItsRow() {
        DoubleFunction<Complex> one = Ramp.oneRelaxation(1);
        DoubleFunction<Complex> both = temperature -> one.apply(temperature)
                .plus(one.apply(temperature - 50)
                        .plus(new Complex(-Ramp.RUBBERY, 0))
                        .times(0.05));
        Findings findings = of(new Ramp(both, 1, 0.005, 0.005).sweep(310, 470, 1, new Random(4)));
        List<Marker> peaks = all(findings, LOSS_PEAK);
        assertThat(peaks).hasSize(2);
        assertThat(peaks.get(0).value()).isCloseTo(373.15, within(0.2));
        assertThat(peaks.get(1).value()).isCloseTo(423.15, within(0.5));
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5, 6})
    void unevenTemperaturesRepeatsAndTheSizeOfTheModulusDoNotMatter(long seed) {
        Random random = new Random(seed);
        List<Double> temperatures = new ArrayList<>();
        for (double t = 320; t < 425; t += 0.1 + 2.4 * Math.pow(random.nextDouble(), 2)) {
            temperatures.add(t);
            if (random.nextInt(10) == 0) {
                temperatures.add(t);
            }
        }
        double scale = Math.pow(10, -6 + 8 * random.nextDouble());
        DoubleFunction<Complex> scaled = t -> Ramp.oneRelaxation(1).apply(t).times(scale);
        Findings findings = of(new Ramp(scaled, 1, 0.01, 0.01).sweep(temperatures, random));
        assertHolds(only(findings, LOSS_PEAK), 373.15);
        assertHolds(only(findings, TAN_DELTA_PEAK), 379.935521);
        assertHolds(only(findings, ONSET), 370.25589);
    }

    private static void assertHolds(Marker marker, double truth) {
        double u = marker.u().orElseThrow();
        assertThat(u).isLessThan(0.15);
        assertThat(Math.abs(marker.value() - truth)).isLessThan(4 * u);
    }

    @ParameterizedTest(name = "every {0} K")
    @CsvSource({"0.5", "1", "2"})
    void withoutUncertaintiesTheScatterTellsThem(double every) {
        Ramp ramp = Ramp.exact(Ramp.oneRelaxation(1), 1).noisy(0.01);
        Findings told = of(ramp.sweep(320, 425, every, new Random(9)));
        Findings untold = of(ramp.withoutU().sweep(320, 425, every, new Random(9)));
        for (String property : List.of(ONSET, LOSS_PEAK, TAN_DELTA_PEAK)) {
            double ratio = only(untold, property).u().orElseThrow()
                    / only(told, property).u().orElseThrow();
            assertThat(ratio).as(property).isBetween(0.5, 2.0);
            assertThat(only(untold, property).method()).endsWith("u from the scatter");
        }
    }

    @Test
    void anActivationEnergyTakesThreeFrequencies() {
        List<Sweep> two = DoubleStream.of(1, 10)
                .mapToObj(f -> Ramp.exact(Ramp.oneRelaxation(f), f).noisy(0.01).sweep(320, 430, 1, new Random(2)))
                .toList();
        Findings findings = GlassTransition.of(two, PLAN);
        assertThat(all(findings, "activation_energy")).isEmpty();
        assertThat(codes(findings))
                .containsExactly(
                        "TRANSITION_TOO_FEW_FREQUENCIES",
                        "TRANSITION_TOO_FEW_FREQUENCIES",
                        "TRANSITION_TOO_FEW_FREQUENCIES");
    }

    @Test
    void aPeakThatDoesNotMoveWithTheFrequencyHasNoActivationEnergy() {
        List<Sweep> sweeps = DoubleStream.of(1, 3, 10)
                .mapToObj(
                        f -> Ramp.exact(Ramp.oneRelaxation(1), f).noisy(0.01).sweep(320, 430, 1, new Random((long) f)))
                .toList();
        Findings findings = GlassTransition.of(sweeps, PLAN);
        assertThat(all(findings, "activation_energy")).isEmpty();
        assertThat(codes(findings)).contains("TRANSITION_NOT_RISING");
    }

    @Test
    void aFewPointsAreTooFew() {
        Findings findings = of(Ramp.exact(Ramp.oneRelaxation(1), 1).sweep(364, 382, 3.5, new Random(1)));
        assertThat(findings.markers()).isEmpty();
        assertThat(codes(findings)).containsOnly("TRANSITION_TOO_FEW_POINTS").hasSize(3);
    }
}
