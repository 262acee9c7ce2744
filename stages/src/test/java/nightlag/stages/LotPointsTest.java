package nightlag.stages;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalInt;
import java.util.Random;
import java.util.stream.Stream;
import nightlag.stages.fault.Reason;
import nightlag.stages.geometry.GeometryKind;
import nightlag.stages.moduli.Flag;
import nightlag.stages.moduli.Harmonic;
import nightlag.stages.moduli.HarmonicLimits;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.Quality;
import nightlag.stages.moduli.Threshold;
import nightlag.stages.numeric.Complex;
import nightlag.stages.spectrum.RelaxationModes;
import nightlag.stages.spectrum.SpectrumPlan;
import nightlag.stages.sweep.FrequencySweeps;
import nightlag.stages.sweep.SweepPlan;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.EnumSource;

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
        assertThat(result.notes()).extracting(Reason::code).containsExactly("SWEEP_POINTS_IN_NONE");
    }

    /**
     * On a frame as stiff as the specimen half-way through, the share of the set deflection that reaches the specimen falls
     * as it stiffens and its stress rises; as it softens the other way about. The same points, made larger step by step
     * instead, would be an amplitude sweep with a modulus that falls by a factor of 100.
     */
    @ParameterizedTest(name = "stiffer {0}-fold, seed {1}")
    @CsvSource({"100, 1", "100, 2", "0.01, 3", "0.01, 4"})
    void aSpecimenThatChangesOnAFrameThatGivesIsNoAmplitudeSweep(double change, long seed) {
        Random random = new Random(seed);
        List<ModulusPoint> run = new ArrayList<>();
        for (int i = 0; i <= 60; i++) {
            double modulus = 1e4 * Math.pow(change, i / 60.0 - 0.5) * (1 + 0.01 * random.nextGaussian());
            double strain = 0.01 / (1 + modulus / 1e4) * (1 + 0.01 * random.nextGaussian());
            run.add(SweepPoint.of(strain, new Complex(modulus, 0.1 * modulus), 0.01)
                    .build());
        }
        LotResult result = conclude(run, AUTO);
        assertThat(result.points()).containsExactlyInAnyOrderElementsOf(run);
        assertThat(result.notes()).extracting(Reason::code).containsExactly("SWEEP_POINTS_IN_NONE");
        assertThat(conclude(run, kind(SweepPlan.Kind.AMPLITUDE)).points())
                .allSatisfy(point ->
                        assertThat(point.reasons()).extracting(Reason::code).containsExactly("SWEEP_RIM_CORRECTED"));
    }

    /** A run whose deflection is halved by the instrument each time the torque has reached its limit. */
    @Test
    void aCureWhoseStrainIsSteppedDownIsNoAmplitudeSweep() {
        List<ModulusPoint> cure = new ArrayList<>();
        double strain = 0.1;
        for (int i = 0; i <= 60; i++) {
            double modulus = 100 * Math.pow(10, i / 20.0);
            strain = modulus * strain > 20 ? strain / 2 : strain;
            cure.add(SweepPoint.of(strain, new Complex(modulus, 0.1 * modulus), 0.01)
                    .build());
        }
        assertThat(conclude(cure, AUTO).points()).containsExactlyInAnyOrderElementsOf(cure);
    }

    /** Down again with a structure that has broken, and up to strains at which it yields. */
    @Test
    void aSweepUpAndDownIsOneAndSoIsOnePastTheLargestStress() {
        List<ModulusPoint> sweep = new ArrayList<>(softening(PLATES, STRAINS));
        for (double strain : STRAINS) {
            sweep.add(SweepPoint.of(0.999 * strain, new Complex(700 / (1 + strain), 80), 1e-4)
                    .build());
        }
        assertThat(corrected(conclude(sweep, AUTO))).isEqualTo(12);

        List<ModulusPoint> yielding = new ArrayList<>(softening(PLATES, STRAINS));
        for (double strain : new double[] {5, 8, 12}) {
            yielding.add(SweepPoint.of(strain, new Complex(900 / (strain * strain), 100 / strain), 1e-4)
                    .build());
        }
        assertThat(corrected(conclude(yielding, AUTO))).isEqualTo(9);
    }

    @Test
    void aSweepOfAYieldingPasteIsOneThoughItsStressHardlyRises() {
        List<ModulusPoint> yielding = softening(PLATES, 2, 2.5, 3.2, 4, 5);
        double first = yielding.get(0).stressAmplitudePa().orElseThrow();
        double last = yielding.get(4).stressAmplitudePa().orElseThrow();

        assertThat(last / first).isBetween(1.2, 1.5);
        assertThat(corrected(conclude(yielding, AUTO))).isEqualTo(5);
    }

    private static final RelaxationModes FOUR =
            RelaxationModes.of(0, new double[] {0.01, 0.1, 1, 10}, new double[] {1e5, 2e4, 3e3, 200});

    /** A frequency sweep of four modes at a strain of 1 %, 0.01 to 100 Hz, known to a thousandth. */
    private static List<ModulusPoint> fourModes(Optional<GeometryKind> geometry) {
        List<ModulusPoint> points = new ArrayList<>();
        for (int i = 0; i <= 40; i++) {
            double hz = Math.pow(10, -2 + i / 10.0);
            points.add(SweepPoint.of(0.01, FOUR.modulusPa(2 * Math.PI * hz), 1e-3)
                    .hz(hz)
                    .between(geometry)
                    .build());
        }
        return points;
    }

    /** The same material at 1 Hz, softer the larger the strain, in the same sweep. */
    private static List<ModulusPoint> fourModesSoftening(Optional<GeometryKind> geometry, double... strains) {
        List<ModulusPoint> points = new ArrayList<>();
        for (double strain : strains) {
            Complex modulus = FOUR.modulusPa(2 * Math.PI).over(new Complex(1 + strain * strain, 0));
            points.add(SweepPoint.of(strain, modulus, 1e-3).between(geometry).build());
        }
        return points;
    }

    private static LotResult spectrumOf(List<ModulusPoint> points) {
        return Conclude.conclude(
                List.of(new Reduction(points)),
                new ConclusionPlan(
                        AUTO,
                        Optional.empty(),
                        Optional.of(new SpectrumPlan(false, OptionalInt.empty(), false)),
                        List.of(),
                        List.of(),
                        Map.of()));
    }

    private static Marker marker(LotResult result, String property) {
        return result.markers().stream()
                .filter(marker -> property.equals(marker.property()))
                .findFirst()
                .orElseThrow();
    }

    /** The frequency sweep's own point at 1 Hz has the smallest strain there; between plates it is moved to the rim with it. */
    @ParameterizedTest(name = "{0}")
    @EnumSource(
            value = GeometryKind.class,
            names = {"CONE_PLATE", "PARALLEL_PLATE"})
    void anAmplitudeSweepInTheFrequencySweepStaysOutOfTheSpectrum(GeometryKind kind) {
        Optional<GeometryKind> geometry = Optional.of(kind);
        LotResult alone = spectrumOf(fourModes(geometry));
        List<ModulusPoint> both = new ArrayList<>(fourModes(geometry));
        both.addAll(fourModesSoftening(geometry, 0.03, 0.1, 0.3, 1, 3, 10));

        LotResult result = spectrumOf(both);

        assertThat(result.points()).hasSize(47);
        assertThat(result.notes()).isEmpty();
        assertThat(result.absent())
                .extracting(Reason::sentence)
                .contains("points of amplitude sweeps kept out of the isotherms: 6");
        for (String property : List.of("zero_shear_viscosity", "steady_state_compliance")) {
            Marker expected = marker(alone, property);
            double bound = kind == GeometryKind.CONE_PLATE
                    ? 1e-6 * expected.value()
                    : expected.u().orElseThrow();
            assertThat(marker(result, property).value()).isCloseTo(expected.value(), within(bound));
        }
    }

    /** With a point of another sweep at its frequency the amplitude sweep is not needed at all. */
    @Test
    void ofAnAmplitudeSweepTheSmallestStrainEntersWhereNothingElseHasItsFrequency() {
        Optional<GeometryKind> cone = Optional.of(GeometryKind.CONE_PLATE);
        List<ModulusPoint> one = fourModesSoftening(cone, 0.01, 0.1, 1, 3);
        List<ModulusPoint> others = fourModes(cone);

        assertThat(FrequencySweeps.withoutAmplitudeSweeps(concat(others, one), List.of(one)))
                .containsExactlyElementsOf(others);
        // the one at 1 Hz
        others.remove(20);
        assertThat(FrequencySweeps.withoutAmplitudeSweeps(concat(others, one), List.of(one)))
                .containsExactlyElementsOf(concat(others, one.subList(0, 1)));
    }

    private static List<ModulusPoint> concat(List<ModulusPoint> first, List<ModulusPoint> second) {
        return Stream.concat(first.stream(), second.stream()).toList();
    }

    private static long corrected(LotResult result) {
        return result.points().stream()
                .filter(point -> point.reasons().stream().anyMatch(why -> "SWEEP_RIM_CORRECTED".equals(why.code())))
                .count();
    }

    @Test
    void twoStrainsAreTooFewAndThatIsSaid() {
        List<ModulusPoint> reduced = softening(PLATES, 0.1, 1);
        assertThat(conclude(reduced, AUTO).notes()).extracting(Reason::code).containsExactly("SWEEP_POINTS_IN_NONE");
        LotResult result = conclude(reduced, kind(SweepPlan.Kind.AMPLITUDE));
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
                .containsExactly("SWEEP_RIM_CORRECTED", "SWEEP_NONLINEAR_BY_DESIGN");

        sweep.set(
                5,
                large.unusable(List.of(Flag.CLIPPED, Flag.NONLINEAR), Optional.empty())
                        .build());
        assertThat(last(conclude(sweep, AUTO))).isEqualTo(sweep.get(5));

        sweep.set(
                5, large.unusable(nonlinear, Optional.of(Flag.NONLINEAR)).hz(2).build());
        assertThat(last(conclude(sweep, AUTO)).quality()).isEqualTo(Quality.UNUSABLE);
    }

    /**
     * A sweep of a constant modulus whose second and third harmonic go with a power of the strain, as does what is known of
     * them.
     *
     * @param intensity of both at a strain of 3
     * @param u its uncertainty
     * @param power 2 where the harmonic's stress goes with the cube of the strain
     */
    private static List<ModulusPoint> withHarmonics(double intensity, double u, double power) {
        List<ModulusPoint> sweep = new ArrayList<>();
        for (double strain : STRAINS) {
            double size = Math.pow(strain / 3, power);
            double here = intensity * size;
            double first = 1000 * strain;
            OptionalDouble known = OptionalDouble.of(u * size);
            sweep.add(SweepPoint.of(strain, new Complex(1000, 0), 1e-5)
                    .harmonics(List.of(
                            new Harmonic(1, first, 0, 1, OptionalDouble.of(0)),
                            new Harmonic(2, here * first, 0, here, known),
                            new Harmonic(3, -here * first, 0, here, known)))
                    .judgedBy(new HarmonicLimits(0.01, Threshold.of(0.01, 0.2)))
                    .build());
        }
        return sweep;
    }

    /** At the rim a harmonic that goes with the cube of the strain is half as large again (exact): 0.0075 becomes 0.01125. */
    @Test
    void harmonicsThatPassTheirLimitsAtTheRimAreFlagged() {
        ModulusPoint found = last(conclude(withHarmonics(0.0075, 1e-5, 2), AUTO));

        assertThat(found.harmonics().get(2).relativeIntensity()).isCloseTo(0.01125, within(5e-5));
        assertThat(found.flags()).containsExactly(Flag.NONLINEAR, Flag.EVEN_HARMONICS);
        assertThat(found.quality()).isEqualTo(Quality.DOUBTFUL);
        assertThat(found.unusableOnlyBy()).isEmpty();
        assertThat(found.reasons())
                .extracting(Reason::code)
                .containsExactly("SCREENING_NONLINEAR", "SCREENING_EVEN_HARMONICS", "SWEEP_RIM_CORRECTED");
        assertThat(found.reasons().get(0).sentence())
                .startsWith("nonlinear: the third harmonic is 0.0112")
                .endsWith("of the first, the limit is 0.01 (doubtful)");
    }

    @Test
    void aNearMissAtTheRimIsNot() {
        ModulusPoint found = last(conclude(withHarmonics(0.0065, 1e-5, 2), AUTO));
        assertThat(found.harmonics().get(2).relativeIntensity()).isCloseTo(0.00975, within(5e-5));
        assertThat(found.flags()).isEmpty();
        assertThat(found.quality()).isEqualTo(Quality.SOUND);
    }

    /** The slope adds its own uncertainty: what stood out of the noise before does so no longer. */
    @Test
    void harmonicsOverTheLimitAtTheRimButWithinTheirNoiseAreNot() {
        ModulusPoint found = last(conclude(withHarmonics(0.0075, 0.0024, 2), AUTO));
        Harmonic third = found.harmonics().get(2);
        assertThat(third.relativeIntensity()).isGreaterThan(0.0105);
        assertThat(third.relativeIntensityU().orElseThrow()).isGreaterThan(third.relativeIntensity() / 3);
        assertThat(found.flags()).isEmpty();
        assertThat(found.quality()).isEqualTo(Quality.SOUND);
    }

    /** A harmonic's stress that goes with the root of the strain is 7/8 of what the plates show (exact): 0.0111 becomes 0.0097. */
    @Test
    void harmonicsBelowTheirLimitsAtTheRimLoseTheirFlagsAndTheReasons() {
        Reason asMeasured = new Reason("SCREENING_NONLINEAR", "nonlinear: the third harmonic is 0.0111 of the first");
        Reason clipped = new Reason("SCREENING_CLIPPED", "clipped: 0.01 of the samples");
        List<ModulusPoint> sweep = new ArrayList<>(withHarmonics(0.0111, 1e-5, -0.5));
        ModulusPoint flagged = sweep.get(5)
                .flagged(Flag.NONLINEAR, asMeasured)
                .flagged(Flag.EVEN_HARMONICS, new Reason("SCREENING_EVEN_HARMONICS", "even-harmonics: 0.0111"));
        sweep.set(5, flagged);

        ModulusPoint found = last(conclude(sweep, AUTO));

        assertThat(found.harmonics().get(2).relativeIntensity()).isCloseTo(0.0097, within(5e-5));
        assertThat(found.flags()).isEmpty();
        assertThat(found.quality()).isEqualTo(Quality.SOUND);
        assertThat(found.reasons()).extracting(Reason::code).containsExactly("SWEEP_RIM_CORRECTED");

        sweep.set(5, flagged.flagged(Flag.CLIPPED, clipped));
        ModulusPoint stillDoubtful = last(conclude(sweep, AUTO));
        assertThat(stillDoubtful.flags()).containsExactly(Flag.CLIPPED);
        assertThat(stillDoubtful.quality()).isEqualTo(Quality.DOUBTFUL);
        assertThat(stillDoubtful.reasons())
                .extracting(Reason::code)
                .containsExactly("SCREENING_CLIPPED", "SWEEP_RIM_CORRECTED");
    }

    /** Of 0.15 that the plates show 0.225 are left at the rim. */
    @Test
    void pastItsSecondLimitAnEvenOrderMakesAPointOfASweepUnusableAndTheThirdDoesNot() {
        ModulusPoint found = last(conclude(withHarmonics(0.15, 1e-5, 2), AUTO));
        assertThat(found.flags()).containsExactly(Flag.NONLINEAR, Flag.EVEN_HARMONICS);
        assertThat(found.quality()).isEqualTo(Quality.UNUSABLE);
        assertThat(found.unusableOnlyBy()).hasValue(Flag.EVEN_HARMONICS);
        assertThat(found.reasons())
                .extracting(Reason::sentence)
                .anySatisfy(
                        sentence -> assertThat(sentence).startsWith("nonlinear").endsWith("0.01 (doubtful)"))
                .anySatisfy(sentence ->
                        assertThat(sentence).startsWith("even-harmonics").endsWith("0.2 (unusable)"));
    }

    /**
     * A cure at a constant torque on a drive whose inertia takes most of it: the stress left for the specimen rises with its
     * strain as both fall. Cut out of one long record it is a run in time; as records of their own it might be a sweep.
     */
    @Test
    void windowsOfALongRecordAreNoAmplitudeSweepUnlessAskedFor() {
        List<ModulusPoint> windows = new ArrayList<>();
        List<ModulusPoint> records = new ArrayList<>();
        for (double strain : STRAINS) {
            SweepPoint point = SweepPoint.of(strain, new Complex(1000 / (1 + strain), 100), 1e-4);
            windows.add(point.inWindow(6).build());
            records.add(point.build());
        }
        assertThat(conclude(windows, AUTO).points()).containsExactlyInAnyOrderElementsOf(windows);
        assertThat(corrected(conclude(windows, kind(SweepPlan.Kind.AMPLITUDE)))).isEqualTo(STRAINS.length);
        assertThat(corrected(conclude(records, AUTO))).isEqualTo(STRAINS.length);
        // beside a real sweep they stay as they are
        assertThat(corrected(conclude(concat(windows, records), AUTO))).isEqualTo(STRAINS.length);
    }

    /** The point at the largest strain. */
    private static ModulusPoint last(LotResult result) {
        return result.points().stream()
                .filter(point -> point.strainAmplitude().orElseThrow() == 3)
                .findFirst()
                .orElseThrow();
    }
}
