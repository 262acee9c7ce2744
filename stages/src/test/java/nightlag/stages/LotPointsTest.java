package nightlag.stages;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import nightlag.stages.fault.Reason;
import nightlag.stages.geometry.GeometryKind;
import nightlag.stages.moduli.Flag;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.Quality;
import nightlag.stages.numeric.Complex;
import nightlag.stages.sweep.SweepPlan;
import org.junit.jupiter.api.Test;

/** What only the neighbours of a point can say about it. */
class LotPointsTest {
    private static final SweepPlan AUTO = SweepPlan.withDefaults();

    private static LotResult conclude(List<ModulusPoint> points, SweepPlan sweeps) {
        return Conclude.conclude(
                points.stream().map(point -> new Reduction(List.of(point))).toList(),
                new ConclusionPlan(sweeps, Optional.empty(), Optional.empty(), List.of(), List.of(), Map.of()));
    }

    private static SweepPlan kind(SweepPlan.Kind kind) {
        return new SweepPlan(kind, AUTO.repeats(), AUTO.onsetAxis());
    }

    /** A frequency sweep at one strain with these loss moduli, known to 1 Pa each. */
    private static List<ModulusPoint> losses(double... losses) {
        List<ModulusPoint> points = new ArrayList<>();
        for (int i = 0; i < losses.length; i++) {
            Complex modulus = new Complex(1000, losses[i]);
            points.add(SweepPoint.of(0.01, modulus, 1 / modulus.abs()).hz(i + 1).build());
        }
        return points;
    }

    /** A softening material between plates. */
    private static List<ModulusPoint> softening(Optional<GeometryKind> geometry, double... strains) {
        List<ModulusPoint> points = new ArrayList<>();
        for (double strain : strains) {
            points.add(SweepPoint.of(strain, new Complex(1000 / (1 + strain), 100), 1e-4)
                    .between(geometry)
                    .build());
        }
        return points;
    }

    private static final double[] STRAINS = {0.01, 0.03, 0.1, 0.3, 1, 3};
    private static final Optional<GeometryKind> PLATES = Optional.of(GeometryKind.PARALLEL_PLATE);

    @Test
    void mostOfASweepBelowZeroIsASignOrADelay() {
        List<ModulusPoint> points =
                conclude(losses(-40, -30, 20, -60, 50), AUTO).points();
        assertThat(points)
                .extracting(ModulusPoint::flags)
                .containsExactlyInAnyOrder(
                        List.of(Flag.SIGN_OR_DELAY),
                        List.of(Flag.SIGN_OR_DELAY),
                        List.of(),
                        List.of(Flag.SIGN_OR_DELAY),
                        List.of());
        ModulusPoint flagged = points.stream()
                .filter(point -> !point.flags().isEmpty())
                .findFirst()
                .orElseThrow();
        assertThat(flagged.quality()).isEqualTo(Quality.DOUBTFUL);
        assertThat(flagged.reasons()).extracting(Reason::code).containsExactly("SCREENING_SIGN_OR_DELAY");
        assertThat(flagged.reasons().get(0).sentence())
                .isEqualTo(
                        "sign-or-delay: the loss modulus is below zero in 0.6 of the sweep's points, the limit is 0.5:"
                                + " the polarity of a channel or a delay is wrong (doubtful)");
    }

    @Test
    void halfOfASweepBelowZeroIsNot() {
        assertThat(conclude(losses(-40, -30, 20, 60), AUTO).points())
                .allSatisfy(point -> assertThat(point.quality()).isEqualTo(Quality.SOUND));
    }

    /** A spring that loses next to nothing may well measure below zero by its noise. */
    @Test
    void lossModuliWithinThreeOfTheirUncertaintiesSayNothing() {
        assertThat(conclude(losses(-2.9, -2, -2.5, -1), AUTO).points())
                .allSatisfy(point -> assertThat(point.flags()).isEmpty());
    }

    @Test
    void anAmplitudeSweepBetweenPlatesIsPublishedAsAtTheRim() {
        List<ModulusPoint> reduced = softening(PLATES, STRAINS);
        LotResult result = conclude(reduced, AUTO);
        assertThat(result.notes()).isEmpty();
        assertThat(result.points()).hasSameSizeAs(reduced);
        // G' = 1000/(1 + γ): γ dG'/dγ = −1000 γ/(1 + γ)², of which a quarter is −62.5 Pa at a strain of 1
        ModulusPoint one = result.points().stream()
                .filter(point -> point.strainAmplitude().orElseThrow() == 1)
                .findFirst()
                .orElseThrow();
        assertThat(one.moduli().orElseThrow().storagePa()).isBetween(433.0, 442.0);
        assertThat(one.reasons()).extracting(Reason::code).containsExactly("SWEEP_RIM_CORRECTED");
    }

    @Test
    void otherGeometriesAndOtherSweepsStayAsTheyAre() {
        List<ModulusPoint> cone = softening(Optional.of(GeometryKind.CONE_PLATE), STRAINS);
        assertThat(conclude(cone, AUTO).points()).containsExactlyInAnyOrderElementsOf(cone);
        List<ModulusPoint> given = softening(Optional.empty(), STRAINS);
        assertThat(conclude(given, AUTO).points()).containsExactlyInAnyOrderElementsOf(given);
        List<ModulusPoint> asked = softening(PLATES, STRAINS);
        assertThat(conclude(asked, kind(SweepPlan.Kind.TIME)).points()).containsExactlyInAnyOrderElementsOf(asked);
        List<ModulusPoint> frequencies = losses(40, 50, 60, 70);
        assertThat(conclude(frequencies, AUTO).points()).containsExactlyInAnyOrderElementsOf(frequencies);
    }

    /** At constant stress the strain of a curing specimen falls a hundredfold; that is no amplitude sweep. */
    @Test
    void strainThatFollowsTheModulusAtConstantStressIsNoAmplitudeSweep() {
        List<ModulusPoint> cure = new ArrayList<>();
        for (double modulus : new double[] {100, 300, 1000, 3000, 10000}) {
            cure.add(SweepPoint.of(10 / modulus, new Complex(modulus, 0.01 * modulus), 1e-4)
                    .build());
        }
        LotResult result = conclude(cure, AUTO);
        assertThat(result.points()).containsExactlyInAnyOrderElementsOf(cure);
        assertThat(result.notes()).isEmpty();
    }

    @Test
    void twoStrainsAreTooFewAndThatIsSaid() {
        List<ModulusPoint> reduced = softening(PLATES, 0.1, 1);
        LotResult result = conclude(reduced, AUTO);
        assertThat(result.points()).containsExactlyInAnyOrderElementsOf(reduced);
        assertThat(result.notes()).extracting(Reason::code).containsExactly("RIM_TOO_FEW_STRAINS");
        assertThat(result.notes().get(0).sentence())
                .startsWith("specimen 1, sweep 1: 2 strains between parallel plates");
    }

    @Test
    void aThirdHarmonicAloneMakesNoPointOfAnAmplitudeSweepUnusable() {
        List<Flag> nonlinear = List.of(Flag.NONLINEAR);
        SweepPoint large = SweepPoint.of(3, new Complex(250, 100), 1e-4);
        List<ModulusPoint> sweep = new ArrayList<>(softening(PLATES, 0.01, 0.03, 0.1, 0.3, 1));
        sweep.add(large.unusable(nonlinear, Optional.of(Flag.NONLINEAR)).build());
        ModulusPoint softened = last(conclude(sweep, AUTO));
        assertThat(softened.quality()).isEqualTo(Quality.DOUBTFUL);
        assertThat(softened.flags()).isEqualTo(nonlinear);
        assertThat(softened.reasons())
                .extracting(Reason::code)
                .containsExactly("SWEEP_NONLINEAR_BY_DESIGN", "SWEEP_RIM_CORRECTED");

        sweep.set(
                5,
                large.unusable(List.of(Flag.CLIPPED, Flag.NONLINEAR), Optional.empty())
                        .build());
        assertThat(last(conclude(sweep, AUTO))).isEqualTo(sweep.get(5));

        sweep.set(
                5, large.unusable(nonlinear, Optional.of(Flag.NONLINEAR)).hz(2).build());
        assertThat(last(conclude(sweep, AUTO)).quality()).isEqualTo(Quality.UNUSABLE);
    }

    /** The point at the largest strain. */
    private static ModulusPoint last(LotResult result) {
        return result.points().stream()
                .filter(point -> point.strainAmplitude().orElseThrow() == 3)
                .findFirst()
                .orElseThrow();
    }
}
