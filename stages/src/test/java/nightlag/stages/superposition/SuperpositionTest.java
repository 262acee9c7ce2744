package nightlag.stages.superposition;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;
import static org.assertj.core.api.Assertions.within;

import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Random;
import nightlag.stages.fault.Reason;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.superposition.ModelMaterial.Pooling;
import nightlag.stages.superposition.SuperpositionPlan.ShiftLaw;
import nightlag.stages.superposition.SuperpositionPlan.VerticalShift;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.MethodSource;
import org.junit.jupiter.params.provider.ValueSource;

/** Isotherms of known shifts onto one curve, and what is done with those that do not fit on it. */
class SuperpositionTest {
    private static final double REFERENCE_K = ModelMaterial.REFERENCE_K;
    private static final SuperpositionPlan PLAIN = plan(REFERENCE_K, VerticalShift.NONE, ShiftLaw.AUTO);
    private static final SuperpositionPlan FITTED = plan(REFERENCE_K, VerticalShift.FITTED, ShiftLaw.AUTO);

    static SuperpositionPlan plan(double referenceK, VerticalShift vertical, ShiftLaw law) {
        return new SuperpositionPlan(
                referenceK,
                vertical,
                vertical == VerticalShift.DENSITY ? OptionalDouble.of(6.5e-4) : OptionalDouble.empty(),
                law,
                0.003);
    }

    static List<ModelMaterial> materials() {
        return List.of(ModelMaterial.LAUN, ModelMaterial.NARROW, ModelMaterial.SOLID);
    }

    @ParameterizedTest(name = "{0}")
    @MethodSource("materials")
    void exactModuliGiveTheirShifts(ModelMaterial material) throws ReductionFault {
        MasterCurve curve = Superposition.of(material.nine(0, 0, 0), PLAIN);

        assertThat(curve.shifts()).allSatisfy(shift -> {
            assertThat(shift.used()).isTrue();
            assertThat(log10A(shift)).isCloseTo(ModelMaterial.log10A(shift.temperatureK()), within(1e-5));
            assertThat(shift.log10B()).hasValue(0);
            assertThat(shift.log10BU()).isEmpty();
        });
        assertThat(curve.points()).hasSize(9 * 31);
        assertThat(misfit(curve).method()).startsWith("superposes");
        assertThat(misfit(curve).value()).isLessThan(1e-4);
    }

    @Test
    void theWlfConstantsComeOutOfThem() throws ReductionFault {
        MasterCurve curve = Superposition.of(ModelMaterial.LAUN.nine(0, 0, 0), PLAIN);

        assertThat(marker(curve, "wlf_c1").value()).isCloseTo(8.86, within(1e-3));
        assertThat(marker(curve, "wlf_c2").value()).isCloseTo(101.6, within(1e-2));
        assertThat(curve.shifts())
                .allSatisfy(
                        shift -> assertThat(shift.lawLog10A().orElseThrow()).isCloseTo(log10A(shift), within(1e-4)));
    }

    @ParameterizedTest(name = "{0}")
    @MethodSource("materials")
    void verticalShiftsAreFittedAlong(ModelMaterial material) throws ReductionFault {
        List<IsothermReadings> isotherms = material.isotherms(
                ModelMaterial.temperatures(9, 10), 10, 0, 0, 1, t -> 0.003 * (t - REFERENCE_K), new Random(0));

        MasterCurve curve = Superposition.of(isotherms, FITTED);

        assertThat(curve.shifts()).allSatisfy(shift -> {
            assertThat(log10A(shift)).isCloseTo(ModelMaterial.log10A(shift.temperatureK()), within(1e-4));
            assertThat(shift.log10B().orElseThrow())
                    .isCloseTo(0.003 * (shift.temperatureK() - REFERENCE_K) / Math.log(10), within(1e-4));
            assertThat(shift.log10BU()).isPresent();
        });
    }

    /** b_T = ρ0 T0/(ρ T), ρ0/ρ = 1 + α (T − T0): 40 K above 443.15 K with α = 6.5e-4 /K it is 0.941065…, exact. */
    @Test
    void aDensityShiftIsKnownBeforehand() throws ReductionFault {
        List<IsothermReadings> isotherms = ModelMaterial.LAUN.isotherms(
                ModelMaterial.temperatures(9, 10),
                10,
                0,
                0,
                1,
                t -> Math.log((1 + 6.5e-4 * (t - REFERENCE_K)) * REFERENCE_K / t),
                new Random(0));

        MasterCurve curve = Superposition.of(isotherms, plan(REFERENCE_K, VerticalShift.DENSITY, ShiftLaw.AUTO));

        ShiftFactor hottest = curve.shifts().get(8);
        assertThat(hottest.log10B().orElseThrow()).isCloseTo(Math.log10(1.026 * 443.15 / 483.15), within(1e-12));
        assertThat(curve.shifts())
                .allSatisfy(shift ->
                        assertThat(log10A(shift)).isCloseTo(ModelMaterial.log10A(shift.temperatureK()), within(1e-5)));
        MasterPoint last = curve.points().get(curve.points().size() - 1);
        ModulusReading measured = isotherms.get(0).readings().get(30);
        assertThat(last.reduced().angularFrequency() / measured.angularFrequency())
                .isCloseTo(Math.pow(10, log10A(curve.shifts().get(0))), within(1e-6));
        assertThat(last.reduced().moduli().storagePa() / measured.moduli().storagePa())
                .isCloseTo(0.974 * 443.15 / 403.15, within(1e-12));
    }

    @Test
    void theReferenceNeedNotBeAnIsotherm() throws ReductionFault {
        double referenceK = REFERENCE_K + 4;
        MasterCurve byLaw =
                Superposition.of(ModelMaterial.LAUN.nine(0, 0, 0), plan(referenceK, VerticalShift.NONE, ShiftLaw.WLF));
        MasterCurve straight =
                Superposition.of(ModelMaterial.LAUN.nine(0, 0, 0), plan(referenceK, VerticalShift.NONE, ShiftLaw.NONE));

        double between = 0.6 * ModelMaterial.log10A(REFERENCE_K) + 0.4 * ModelMaterial.log10A(REFERENCE_K + 10);
        for (int i = 0; i < 9; i++) {
            double atIsotherm = ModelMaterial.log10A(byLaw.shifts().get(i).temperatureK());
            assertThat(log10A(byLaw.shifts().get(i)))
                    .isCloseTo(atIsotherm - ModelMaterial.log10A(referenceK), within(1e-4));
            assertThat(log10A(straight.shifts().get(i))).isCloseTo(atIsotherm - between, within(1e-4));
        }
        assertThat(codes(straight)).containsExactly("REFERENCE_INTERPOLATED");
        assertThat(straight.markers())
                .extracting(Marker::property)
                .containsExactly("activation_energy", "superposition_misfit");
        assertThat(straight.shifts())
                .allSatisfy(shift -> assertThat(shift.lawLog10A()).isEmpty());
    }

    /** One line for all, so that a ramp taken for isotherms does not fill the log. */
    @ParameterizedTest(name = "{0} isotherms of {1} frequencies")
    @CsvSource(delimiter = '|', textBlock = """
                1  | 1 | the isotherm at 200 °C is left out of the master curve: 1 frequency with
                2  | 0 | the isotherms at 200 and 201 °C are left out of the master curve: 1 to 2 frequencies with
                3  | 2 | the isotherms at 200, 201 and 202 °C are left out of the master curve: 2 frequencies with
                40 | 1 | 40 isotherms between 200 and 239 °C are left out of the master curve: 1 frequency with
                """)
    void isothermsOfTooFewFrequenciesAreToldTogether(int left, int frequencies, String told) throws ReductionFault {
        List<IsothermReadings> isotherms = new ArrayList<>(ModelMaterial.LAUN.nine(0, 0, 0));
        List<ModulusReading> some = isotherms.get(0).readings();
        for (int i = 0; i < left; i++) {
            isotherms.add(new IsothermReadings(473.15 + i, some.subList(0, frequencies > 0 ? frequencies : i + 1)));
        }

        MasterCurve curve = Superposition.of(isotherms, PLAIN);

        assertThat(curve.notes()).singleElement().satisfies(note -> {
            assertThat(note.code()).isEqualTo("ISOTHERM_TOO_FEW_FREQUENCIES");
            assertThat(note.sentence()).startsWith(told).contains("at least");
        });
    }

    /** Isotherms by the hundred are superposed like a few. */
    @Test
    void manyIsothermsAreSuperposedAsAFewAre() throws ReductionFault {
        List<IsothermReadings> isotherms =
                ModelMaterial.LAUN.isotherms(ModelMaterial.temperatures(60, 1), 3, 0, 0, 1, t -> 0, new Random(0));

        MasterCurve curve = Superposition.of(isotherms, PLAIN);

        assertThat(curve.shifts())
                .allSatisfy(shift ->
                        assertThat(log10A(shift)).isCloseTo(ModelMaterial.log10A(shift.temperatureK()), within(2e-3)));
    }

    /** Half a kelvin off is more than a hundredth of a decade here, ten times what a shift is known to. */
    @Test
    void anIsothermNearTheReferenceIsBroughtToItByTheLaw() throws ReductionFault {
        double referenceK = REFERENCE_K + 0.4;

        MasterCurve curve =
                Superposition.of(ModelMaterial.LAUN.nine(0, 0, 0), plan(referenceK, VerticalShift.NONE, ShiftLaw.WLF));

        assertThat(curve.notes()).isEmpty();
        assertThat(ModelMaterial.log10A(referenceK)).isLessThan(-0.01);
        assertThat(curve.shifts())
                .allSatisfy(shift -> assertThat(log10A(shift))
                        .isCloseTo(
                                ModelMaterial.log10A(shift.temperatureK()) - ModelMaterial.log10A(referenceK),
                                within(1e-4)));
    }

    @Test
    void aReferenceOutsideTheIsothermsIsAnError() {
        assertThatThrownBy(() -> Superposition.of(
                        ModelMaterial.LAUN.nine(0, 0, 0), plan(REFERENCE_K + 41, VerticalShift.NONE, ShiftLaw.AUTO)))
                .isInstanceOf(ReductionFault.class)
                .hasMessageContaining("211 °C")
                .hasMessageContaining("130 to 210 °C");
    }

    @Test
    void anIsothermFarAwayIsLeftOutAndNamed() throws ReductionFault {
        double[] temperatures = {REFERENCE_K - 60, REFERENCE_K, REFERENCE_K + 10, REFERENCE_K + 20};
        List<IsothermReadings> isotherms =
                ModelMaterial.NARROW.isotherms(temperatures, 10, 0.01, 0.01, 1, t -> 0, new Random(1));

        MasterCurve curve = Superposition.of(isotherms, PLAIN);

        assertThat(curve.shifts()).extracting(ShiftFactor::used).containsExactly(false, true, true, true);
        assertThat(curve.shifts().get(0).log10A()).isEmpty();
        assertThat(curve.notes()).anySatisfy(note -> {
            assertThat(note.code()).isEqualTo("ISOTHERM_WITHOUT_OVERLAP");
            assertThat(note.sentence()).contains("110 °C");
        });
        assertThat(curve.points()).hasSize(3 * 31);
    }

    /** Three frequencies an isotherm, as in a temperature scan at three frequencies: nothing to compare, shifts all the same. */
    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {0, 1, 2})
    void threeFrequenciesAnIsothermAreEnough(long seed) throws ReductionFault {
        List<IsothermReadings> isotherms = new ArrayList<>();
        for (IsothermReadings isotherm : ModelMaterial.LAUN.isotherms(
                ModelMaterial.temperatures(9, 5), 10, 0.01, 0.01, 1, t -> 0, new Random(seed))) {
            List<ModulusReading> all = isotherm.readings();
            isotherms.add(new IsothermReadings(isotherm.temperatureK(), List.of(all.get(9), all.get(15), all.get(21))));
        }

        MasterCurve curve = Superposition.of(isotherms, PLAIN);

        assertThat(curve.shifts())
                .allSatisfy(shift ->
                        assertThat(log10A(shift)).isCloseTo(ModelMaterial.log10A(shift.temperatureK()), within(0.15)));
        assertThat(misfit(curve).method()).startsWith("superposes");
    }

    /** Without noise the verdict is certain, and a tolerance of the lab's own overrules it. */
    @Test
    void aSecondMechanismDoesNotSuperpose() throws ReductionFault {
        List<IsothermReadings> isotherms = ModelMaterial.TWO_MECHANISMS.isotherms(
                ModelMaterial.temperatures(9, 10), 10, 0, 0, 0.9, t -> 0, new Random(0));

        assertThat(misfit(Superposition.of(isotherms, PLAIN)).method())
                .startsWith("does not superpose")
                .contains("p below 1e-6");
        assertThat(misfit(Superposition.of(
                                isotherms,
                                new SuperpositionPlan(
                                        REFERENCE_K, VerticalShift.NONE, OptionalDouble.empty(), ShiftLaw.NONE, 0.05)))
                        .method())
                .startsWith("superposes");
    }

    @Test
    void pointsThatScatterWidelyLeaveTheVerdictOpenAndItSaysSo() throws ReductionFault {
        assertThat(misfit(Superposition.of(ModelMaterial.LAUN.nine(0.1, 0, 1), PLAIN))
                        .method())
                .startsWith("superposes as far as the scatter of the points can tell: ");
        assertThat(misfit(Superposition.of(ModelMaterial.LAUN.nine(0.01, 0.01, 1), PLAIN))
                        .method())
                .startsWith("superposes: ");
    }

    /** Factors of |G*| are a specimen's dimensions; a phase angle is the material's. */
    @Test
    void specimensThatDifferByAFactorChangeNothing() throws ReductionFault {
        double[] temperatures = ModelMaterial.temperatures(9, 10);
        MasterCurve alike = Superposition.of(
                ModelMaterial.LAUN.pooled(temperatures, 0.01, 1, new Pooling(0, 0, 3), new Random(5)), PLAIN);
        MasterCurve apart = Superposition.of(
                ModelMaterial.LAUN.pooled(temperatures, 0.01, 1, new Pooling(0.3, 0, 3), new Random(5)), PLAIN);

        for (int i = 0; i < 9; i++) {
            assertThat(log10A(apart.shifts().get(i)))
                    .isCloseTo(log10A(alike.shifts().get(i)), within(1e-6));
            assertThat(apart.shifts().get(i).misfitDecades().orElseThrow())
                    .isCloseTo(alike.shifts().get(i).misfitDecades().orElseThrow(), within(1e-6));
        }
        assertThat(misfit(apart).method()).startsWith("superposes: ").contains("specimens of an isotherm differ");
        assertThat(misfit(alike).method()).contains("rms 0.00");
        assertThat(misfit(Superposition.of(ModelMaterial.LAUN.nine(0.01, 0.01, 5), PLAIN))
                        .method())
                .doesNotContain("specimens");
    }

    @Test
    void specimensThatDifferDoNotHideASecondMechanism() throws ReductionFault {
        List<IsothermReadings> pooled = ModelMaterial.TWO_MECHANISMS.pooled(
                ModelMaterial.temperatures(9, 10), 0, 0.9, new Pooling(0.3, 0, 4), new Random(3));
        List<IsothermReadings> nameless = pooled.stream()
                .map(isotherm -> new IsothermReadings(isotherm.temperatureK(), isotherm.readings()))
                .toList();

        assertThat(misfit(Superposition.of(pooled, PLAIN)).method()).startsWith("does not superpose");
        assertThat(misfit(Superposition.of(nameless, PLAIN)).method())
                .startsWith("superposes as far as the scatter of the points can tell");
    }

    /** A specimen beside the others' frequencies, or of too few of them, cannot be compared, and nothing breaks. */
    @ParameterizedTest(name = "the second specimen has frequencies {0} to {1}")
    @CsvSource({"20, 31", "0, 2", "13, 17"})
    void aSpecimenOfSomeFrequenciesAloneIsTakenAlong(int from, int to) throws ReductionFault {
        List<IsothermReadings> isotherms = new ArrayList<>();
        for (IsothermReadings isotherm : ModelMaterial.LAUN.nine(0.01, 0.01, 2)) {
            List<String> names = new ArrayList<>(Collections.nCopies(31, "first"));
            Collections.fill(names.subList(from, to), "second");
            isotherms.add(new IsothermReadings(isotherm.temperatureK(), isotherm.readings(), names));
        }

        MasterCurve curve = Superposition.of(isotherms, PLAIN);

        assertThat(curve.shifts())
                .allSatisfy(shift ->
                        assertThat(log10A(shift)).isCloseTo(ModelMaterial.log10A(shift.temperatureK()), within(0.02)));
        assertThat(misfit(curve).method()).startsWith("superposes: ");
    }

    /** All of an isotherm move by its shift: its covariance and that of the figures drawn from it are one. */
    @Test
    void whatTheShiftsShareIsTold() throws ReductionFault {
        MasterCurve curve = Superposition.of(ModelMaterial.LAUN.nine(0.01, 0.01, 1), FITTED);

        ShiftFactor hottest = curve.shifts().get(8);
        double[] ofHottest = curve.points().stream()
                .mapToDouble(point -> point.temperatureK() == hottest.temperatureK() ? 1.0 / 31 : 0)
                .toArray();
        double[] nothing = new double[ofHottest.length];
        double a = Math.sqrt(curve.sharedErrors().variance(ofHottest, nothing));
        double b = Math.sqrt(curve.sharedErrors().variance(nothing, ofHottest));
        assertThat(a / Math.log(10)).isCloseTo(hottest.log10AU().orElseThrow(), within(1e-12));
        assertThat(b / Math.log(10)).isCloseTo(hottest.log10BU().orElseThrow(), within(1e-12));
        assertThat(curve.lnAU(curve.points().get(0).reduced().angularFrequency()))
                .isCloseTo(a, within(1e-12));
    }

    @Test
    void oneIsothermIsItsOwnMasterCurve() throws ReductionFault {
        MasterCurve curve = Superposition.of(
                ModelMaterial.LAUN.isotherms(new double[] {REFERENCE_K}, 10, 0, 0.01, 1, t -> 0, new Random(0)), PLAIN);

        assertThat(curve.shifts()).singleElement().satisfies(shift -> {
            assertThat(shift.log10A()).hasValue(0);
            assertThat(shift.misfitDecades()).isEmpty();
            assertThat(shift.lawLog10A()).isEmpty();
            assertThat(shift.used()).isTrue();
        });
        assertThat(curve.sharedErrors().isNone()).isTrue();
        assertThat(curve.markers()).isEmpty();
        assertThat(curve.points()).hasSize(31);
    }

    @Test
    void aModulusBelowZeroHasNoPartInTheShifts() throws ReductionFault {
        List<IsothermReadings> isotherms = new ArrayList<>(ModelMaterial.LAUN.nine(0, 0, 0));
        List<ModulusReading> readings = new ArrayList<>(isotherms.get(4).readings());
        ModulusReading first = readings.get(0);
        readings.set(
                0,
                new ModulusReading(
                        first.angularFrequency(), new Moduli(-3, first.moduli().lossPa(), Optional.empty())));
        isotherms.set(4, new IsothermReadings(REFERENCE_K, readings));

        MasterCurve curve = Superposition.of(isotherms, PLAIN);

        assertThat(curve.shifts())
                .allSatisfy(shift ->
                        assertThat(log10A(shift)).isCloseTo(ModelMaterial.log10A(shift.temperatureK()), within(1e-5)));
        assertThat(codes(curve)).containsExactly("MODULI_WITHOUT_LOGARITHM");
        assertThat(curve.points()).hasSize(9 * 31);
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {0, 1, 2, 3, 4})
    void shiftsDoNotDependOnUnitsOrOrder(long seed) throws ReductionFault {
        List<IsothermReadings> isotherms = ModelMaterial.LAUN.nine(0.01, seed % 2 == 0 ? 0.01 : 0, seed);
        List<IsothermReadings> other = new ArrayList<>();
        for (IsothermReadings isotherm : isotherms) {
            List<ModulusReading> readings = new ArrayList<>();
            for (ModulusReading reading : isotherm.readings()) {
                Moduli moduli = reading.moduli();
                readings.add(new ModulusReading(
                        reading.angularFrequency() / (2 * Math.PI), ModelMaterial.times(moduli, 1e-6)));
            }
            Collections.shuffle(readings, new Random(seed));
            other.add(new IsothermReadings(isotherm.temperatureK(), readings));
        }
        Collections.shuffle(other, new Random(seed));

        MasterCurve one = Superposition.of(isotherms, PLAIN);
        MasterCurve two = Superposition.of(other, PLAIN);

        for (int i = 0; i < 9; i++) {
            assertThat(log10A(two.shifts().get(i)))
                    .isCloseTo(log10A(one.shifts().get(i)), within(1e-7));
            assertThat(two.shifts().get(i).log10AU().orElseThrow())
                    .isCloseTo(one.shifts().get(i).log10AU().orElseThrow(), within(1e-7));
        }
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {0, 1, 2, 3, 4})
    void aChangeOfReferenceMovesAllShiftsAlike(long seed) throws ReductionFault {
        List<IsothermReadings> isotherms = ModelMaterial.LAUN.nine(0.01, 0.01, seed);
        MasterCurve here = Superposition.of(isotherms, FITTED);
        MasterCurve there = Superposition.of(isotherms, plan(REFERENCE_K + 20, VerticalShift.FITTED, ShiftLaw.AUTO));

        ShiftFactor moved = here.shifts().get(6);
        for (int i = 0; i < 9; i++) {
            ShiftFactor shift = here.shifts().get(i);
            assertThat(log10A(there.shifts().get(i))).isCloseTo(log10A(shift) - log10A(moved), within(1e-12));
            assertThat(there.shifts().get(i).log10B().orElseThrow())
                    .isCloseTo(shift.log10B().orElseThrow() - moved.log10B().orElseThrow(), within(1e-12));
        }
        assertThat(there.shifts().get(4).log10AU()).isEqualTo(moved.log10AU());
    }

    private static double log10A(ShiftFactor shift) {
        return shift.log10A().orElseThrow();
    }

    private static List<String> codes(MasterCurve curve) {
        return curve.notes().stream().map(Reason::code).toList();
    }

    private static Marker misfit(MasterCurve curve) {
        return marker(curve, "superposition_misfit");
    }

    private static Marker marker(MasterCurve curve, String property) {
        return curve.markers().stream()
                .filter(marker -> marker.property().equals(property))
                .findFirst()
                .orElseThrow();
    }
}
