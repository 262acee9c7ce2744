package nightlag.stages.moduli;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;
import static org.assertj.core.data.Percentage.withPercentage;

import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.stream.Stream;
import nightlag.stages.geometry.DeformationMode;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.EnumSource;
import org.junit.jupiter.params.provider.MethodSource;

/** A grade's own figure of a point: its value, and its u by the law of propagation, against closed forms. */
class FigureTest {
    private static final ModuliCovariance COVARIANCE = new ModuliCovariance(400, 900, -240);

    /** |G*|/sin δ = |G*|²/G'', so its derivatives are 2G'/G'' and 1 − G'²/G''² (exact). */
    private static final Figure RUTTING = new Figure(
            "rutting_factor",
            "Pa",
            "complex_modulus/sin(phase_angle)",
            List.of(PointQuantity.COMPLEX_MODULUS, PointQuantity.PHASE_ANGLE),
            values -> values.get(PointQuantity.COMPLEX_MODULUS)
                    / Math.sin(Math.toRadians(values.get(PointQuantity.PHASE_ANGLE))));

    /** A modulus, and how much larger one part of it is than the other. */
    static Stream<Moduli> moduli() {
        return Stream.of(1e-4, 1e-2, 0.5, 1.0, 3.0, 100.0, 1e4)
                .map(loss -> new Moduli(1000, 1000 * loss, Optional.of(COVARIANCE)));
    }

    @ParameterizedTest
    @MethodSource("moduli")
    void derivativesAreThoseOfTheClosedForm(Moduli moduli) {
        double ratio = moduli.storagePa() / moduli.lossPa();

        Figure.Value value = RUTTING.at(point(moduli)).orElseThrow();

        assertThat(value.value())
                .isCloseTo(moduli.magnitudePa() * moduli.magnitudePa() / moduli.lossPa(), withPercentage(1e-10));
        assertThat(value.byStorage()).isCloseTo(2 * ratio, within(1e-7 * (1 + ratio * ratio)));
        assertThat(value.byLoss()).isCloseTo(1 - ratio * ratio, within(1e-7 * (1 + ratio * ratio)));
    }

    /** u(tan δ) stands in the same row of {@code points}; the same law must give the same number. */
    @ParameterizedTest
    @MethodSource("moduli")
    void tanDeltaHasTheUncertaintyItHasAnyway(Moduli moduli) {
        Figure tanDelta = Figure.column(PointQuantity.TAN_DELTA);

        double variance =
                tanDelta.at(point(moduli)).orElseThrow().variance(point(moduli)).orElseThrow();

        assertThat(Math.sqrt(variance)).isCloseTo(moduli.tanDeltaU().orElseThrow(), withPercentage(1e-6));
    }

    /** |η*| = |G*|/ω and σ = |G*| γ have |G*|'s relative uncertainty: u² = (G'²u² + 2G'G''u(G',G'') + G''²u²)/|G*|² (exact). */
    @ParameterizedTest
    @EnumSource(names = {"COMPLEX_MODULUS", "COMPLEX_VISCOSITY", "STRESS_AMPLITUDE"})
    void whatIsProportionalToTheMagnitudeHasItsRelativeUncertainty(PointQuantity quantity) {
        Moduli moduli = new Moduli(3000, 4000, Optional.of(COVARIANCE));
        double expected = Math.sqrt(9e6 * 400 + 2 * 12e6 * -240 + 16e6 * 900) / 25e6;

        Figure.Value value = Figure.column(quantity).at(point(moduli)).orElseThrow();

        assertThat(Math.sqrt(value.variance(point(moduli)).orElseThrow()) / value.value())
                .isCloseTo(expected, withPercentage(1e-6));
    }

    /** What is the same whatever the modulus has no u from it: G'/|G*| cos⁻¹ δ is 1. */
    @Test
    void correlationIsKept() {
        Figure one = new Figure(
                "one",
                "1",
                "storage_modulus/(complex_modulus*cos(phase_angle))",
                List.of(PointQuantity.STORAGE_MODULUS, PointQuantity.COMPLEX_MODULUS, PointQuantity.PHASE_ANGLE),
                values -> values.get(PointQuantity.STORAGE_MODULUS)
                        / values.get(PointQuantity.COMPLEX_MODULUS)
                        / Math.cos(Math.toRadians(values.get(PointQuantity.PHASE_ANGLE))));
        Moduli moduli = new Moduli(3000, 4000, Optional.of(COVARIANCE));

        Figure.Value value = one.at(point(moduli)).orElseThrow();

        assertThat(value.value()).isCloseTo(1, within(1e-14));
        assertThat(Math.sqrt(value.variance(point(moduli)).orElse(0))).isLessThan(1e-11);
    }

    @Test
    void everyQuantityIsInTheUnitOfItsColumn() {
        ModulusPoint point = point(new Moduli(3000, 4000, Optional.empty()));

        assertThat(PointQuantity.TEMPERATURE.of(point).orElseThrow()).isCloseTo(190, within(1e-9));
        assertThat(PointQuantity.FREQUENCY.of(point)).hasValue(2);
        assertThat(PointQuantity.ANGULAR_FREQUENCY.of(point)).hasValue(4 * Math.PI);
        assertThat(PointQuantity.ELAPSED.of(point)).hasValue(60);
        assertThat(PointQuantity.STRAIN_AMPLITUDE.of(point)).hasValue(0.01);
        assertThat(PointQuantity.STRESS_AMPLITUDE.of(point)).hasValue(50);
        assertThat(PointQuantity.COMPLEX_MODULUS.of(point)).hasValue(5000);
        assertThat(PointQuantity.PHASE_ANGLE.of(point).orElseThrow())
                .isCloseTo(Math.toDegrees(Math.atan(4.0 / 3)), within(1e-12));
        assertThat(PointQuantity.TAN_DELTA.of(point).orElseThrow()).isCloseTo(4.0 / 3, within(1e-15));
        assertThat(PointQuantity.COMPLEX_VISCOSITY.of(point).orElseThrow())
                .isCloseTo(5000 / (4 * Math.PI), within(1e-9));
        assertThat(PointQuantity.RELATIVE_THIRD_HARMONIC.of(point)).hasValue(0.02);
    }

    /** u of I3/I1 stands by itself: (2·0.02)·0.001 = 4e-5 (exact). */
    @Test
    void theThirdHarmonicBringsItsOwnUncertainty() {
        Figure square = new Figure(
                "square",
                "1",
                "relative_third_harmonic^2",
                List.of(PointQuantity.RELATIVE_THIRD_HARMONIC),
                values -> Math.pow(values.get(PointQuantity.RELATIVE_THIRD_HARMONIC), 2));
        ModulusPoint point = point(new Moduli(3000, 4000, Optional.empty()));

        assertThat(Math.sqrt(square.at(point).orElseThrow().variance(point).orElseThrow()))
                .isCloseTo(4e-5, withPercentage(1e-6));
    }

    @Test
    void withoutWhatItNeedsThereIsNone() {
        ModulusPoint without = point(Optional.empty());

        assertThat(RUTTING.at(without)).isEmpty();
        assertThat(Figure.column(PointQuantity.FREQUENCY).at(without)).isPresent();
        assertThat(new Figure("bad", "1", "0/0", List.of(), values -> Double.NaN).at(without))
                .isEmpty();
        assertThat(RUTTING.at(point(new Moduli(3000, 0, Optional.empty())))).isEmpty();
    }

    @Test
    void withoutACovarianceThereIsNoUncertainty() {
        ModulusPoint point = point(new Moduli(3000, 4000, Optional.empty()));

        assertThat(RUTTING.at(point).orElseThrow().variance(point)).isEmpty();
        assertThat(Figure.column(PointQuantity.FREQUENCY)
                        .at(point)
                        .orElseThrow()
                        .variance(point))
                .isEmpty();
    }

    private static ModulusPoint point(Moduli moduli) {
        return point(Optional.of(moduli));
    }

    private static ModulusPoint point(Optional<Moduli> moduli) {
        return new ModulusPoint(
                new PointKey("Heron 3", "L1", "1", "1", "1", "bench/a.csv"),
                Optional.empty(),
                DeformationMode.SHEAR,
                OptionalDouble.of(463.15),
                OptionalDouble.empty(),
                OptionalDouble.of(2),
                OptionalDouble.of(60),
                OptionalDouble.of(0.01),
                OptionalDouble.of(50),
                moduli,
                List.of(new Harmonic(3, 0, 1, 0.02, OptionalDouble.of(0.001))),
                Quality.SOUND,
                List.of(),
                OptionalDouble.empty(),
                0,
                OptionalDouble.empty(),
                OptionalDouble.empty(),
                OptionalDouble.empty(),
                List.of(),
                List.of(),
                Optional.empty(),
                Optional.empty(),
                Optional.empty(),
                OptionalDouble.empty());
    }
}
