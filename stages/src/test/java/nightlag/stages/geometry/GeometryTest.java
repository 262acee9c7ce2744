package nightlag.stages.geometry;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.catchThrowableOfType;

import java.util.EnumMap;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import nightlag.stages.fault.Reason;
import nightlag.stages.fault.ReductionFault;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.EnumSource;
import org.junit.jupiter.params.provider.ValueSource;

/** What a geometry asks for, and what it says when it does not get it. */
class GeometryTest {
    @ParameterizedTest
    @EnumSource(GeometryKind.class)
    void eachKindIsContentWithAnyOneOfItsSetsOfDimensions(GeometryKind kind) throws ReductionFault {
        for (Set<Dimension> set : Geometry.requiredDimensions(kind)) {
            assertThat(Geometry.of(spec(kind, sizes(set))).kind()).isEqualTo(kind);
        }
    }

    @ParameterizedTest
    @EnumSource(value = GeometryKind.class, mode = EnumSource.Mode.EXCLUDE, names = "NONE")
    void eachKindNamesWhatIsMissing(GeometryKind kind) {
        for (Set<Dimension> set : Geometry.requiredDimensions(kind)) {
            for (Dimension left : set) {
                Map<Dimension, Double> sizes = sizes(set);
                sizes.remove(left);

                Reason reason = refusal(spec(kind, sizes));

                assertThat(reason.code()).isEqualTo("GEOMETRY_DIMENSION_MISSING");
                assertThat(reason.sentence()).contains(kind.word(), left.word());
            }
        }
    }

    @Test
    void aMissingDimensionIsAskedForWithItsAlternatives() {
        Reason reason = refusal(spec(GeometryKind.TENSION, Map.of(Dimension.LENGTH, 0.02)));

        assertThat(reason.sentence())
                .isEqualTo("the geometry tension needs length and width and thickness, or diameter and length;"
                        + " neither the record nor the configuration gives that");
    }

    @ParameterizedTest
    @ValueSource(doubles = {0, -0.001, Double.NaN, Double.POSITIVE_INFINITY})
    void aDimensionMustBeAboveZeroAndFinite(double gap) {
        Reason reason =
                refusal(spec(GeometryKind.PARALLEL_PLATE, Map.of(Dimension.DIAMETER, 0.025, Dimension.GAP, gap)));

        assertThat(reason.code()).isEqualTo("GEOMETRY_DIMENSION_NOT_POSITIVE");
        assertThat(reason.sentence()).startsWith("the gap is ").endsWith(" m; it must be above zero and finite");
    }

    @Test
    void twoAnswersToOneQuestionAreOneTooMany() {
        Reason reason = refusal(spec(
                GeometryKind.TENSION,
                Map.of(
                        Dimension.LENGTH,
                        0.02,
                        Dimension.WIDTH,
                        0.005,
                        Dimension.THICKNESS,
                        0.001,
                        Dimension.DIAMETER,
                        0.003)));

        assertThat(reason.code()).isEqualTo("GEOMETRY_DIMENSIONS_CONTRADICT");
    }

    @Test
    void theCupMustHoldTheBob() {
        Reason reason = refusal(spec(
                GeometryKind.COAXIAL_CYLINDERS,
                Map.of(Dimension.INNER_DIAMETER, 0.025, Dimension.OUTER_DIAMETER, 0.025, Dimension.LENGTH, 0.04)));

        assertThat(reason.code()).isEqualTo("GEOMETRY_CYLINDERS_DO_NOT_FIT");
        assertThat(reason.sentence())
                .isEqualTo("the outer_diameter is 0.025 m; it must be larger than the inner_diameter, 0.025 m");
    }

    @Test
    void aConeIsNoFunnel() {
        Reason reason =
                refusal(spec(GeometryKind.CONE_PLATE, Map.of(Dimension.DIAMETER, 0.025, Dimension.CONE_ANGLE, 2.0)));

        assertThat(reason.code()).isEqualTo("GEOMETRY_CONE_ANGLE_TOO_LARGE");
    }

    @ParameterizedTest
    @ValueSource(ints = {-1, 0, 3})
    void clampedBendingHasOneSpanOrTwo(int spans) {
        Map<Dimension, Double> sizes = sizes(Set.of(Dimension.LENGTH, Dimension.WIDTH, Dimension.THICKNESS));

        assertThat(refusal(new GeometrySpec(
                                GeometryKind.CLAMPED_BENDING,
                                sizes,
                                spans,
                                1,
                                OptionalDouble.empty(),
                                Optional.empty()))
                        .code())
                .isEqualTo("GEOMETRY_SPANS");
    }

    @ParameterizedTest
    @ValueSource(doubles = {-1, 0.51, Double.NaN})
    void poissonsRatioStaysWithinItsLimits(double ratio) {
        Map<Dimension, Double> sizes = sizes(Set.of(Dimension.LENGTH, Dimension.WIDTH, Dimension.THICKNESS));

        assertThat(refusal(new GeometrySpec(
                                GeometryKind.THREE_POINT_BENDING,
                                sizes,
                                1,
                                1,
                                OptionalDouble.of(ratio),
                                Optional.empty()))
                        .code())
                .isEqualTo("GEOMETRY_POISSON");
    }

    @ParameterizedTest
    @ValueSource(doubles = {0, -1, Double.NaN, Double.POSITIVE_INFINITY})
    void theEndFactorIsAboveZero(double endFactor) {
        Map<Dimension, Double> sizes =
                Map.of(Dimension.INNER_DIAMETER, 0.025, Dimension.OUTER_DIAMETER, 0.027, Dimension.LENGTH, 0.04);

        assertThat(refusal(new GeometrySpec(
                                GeometryKind.COAXIAL_CYLINDERS,
                                sizes,
                                1,
                                endFactor,
                                OptionalDouble.empty(),
                                Optional.empty()))
                        .code())
                .isEqualTo("GEOMETRY_END_FACTOR");
    }

    @Test
    void turningKindsTakeTorqueAndAngleAndStraightOnesForceAndDisplacement() throws ReductionFault {
        Geometry plates =
                Geometry.of(spec(GeometryKind.PARALLEL_PLATE, Map.of(Dimension.DIAMETER, 0.025, Dimension.GAP, 0.001)));
        Geometry strip =
                Geometry.of(spec(GeometryKind.TENSION, Map.of(Dimension.DIAMETER, 0.003, Dimension.LENGTH, 0.02)));
        Geometry given = Geometry.of(GeometrySpec.none());

        assertThat(plates.accepts(DeformationSignal.ANGLE)).isTrue();
        assertThat(plates.accepts(LoadSignal.FORCE)).isFalse();
        assertThat(strip.accepts(DeformationSignal.ANGLE)).isFalse();
        assertThat(strip.accepts(LoadSignal.FORCE)).isTrue();
        assertThat(given.accepts(DeformationSignal.DISPLACEMENT)).isFalse();
        assertThat(given.accepts(LoadSignal.TORQUE)).isFalse();
        for (Geometry any : new Geometry[] {plates, strip, given}) {
            assertThat(any.accepts(DeformationSignal.STRAIN)).isTrue();
            assertThat(any.accepts(LoadSignal.STRESS)).isTrue();
        }
    }

    @Test
    void densityMeansSomethingOnlyWhereAWaveRunsThroughAGap() {
        assertThat(Geometry.optionalDimensions(GeometryKind.PARALLEL_PLATE)).containsExactly(Dimension.DENSITY);
        assertThat(Geometry.optionalDimensions(GeometryKind.CONE_PLATE)).containsExactly(Dimension.DENSITY);
        assertThat(Geometry.optionalDimensions(GeometryKind.TWO_LAYER_SHEAR)).containsExactly(Dimension.DENSITY);
        assertThat(Geometry.optionalDimensions(GeometryKind.TENSION)).isEmpty();
    }

    private static GeometrySpec spec(GeometryKind kind, Map<Dimension, Double> sizes) {
        return new GeometrySpec(kind, sizes, 1, 1, OptionalDouble.empty(), Optional.empty());
    }

    /** The same number for all, but an outer diameter is larger than an inner one. */
    private static Map<Dimension, Double> sizes(Set<Dimension> dimensions) {
        Map<Dimension, Double> sizes = new EnumMap<>(Dimension.class);
        dimensions.forEach(dimension -> sizes.put(dimension, dimension == Dimension.OUTER_DIAMETER ? 0.02 : 0.01));
        return sizes;
    }

    private static Reason refusal(GeometrySpec spec) {
        return catchThrowableOfType(ReductionFault.class, () -> Geometry.of(spec))
                .reason();
    }
}
