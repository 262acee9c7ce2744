package nightlag.stages;

import static nightlag.stages.TestCreep.creep;
import static nightlag.stages.TestPoints.point;
import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalInt;
import java.util.Random;
import java.util.stream.IntStream;
import java.util.stream.Stream;
import nightlag.stages.fault.Reason;
import nightlag.stages.geometry.DeformationMode;
import nightlag.stages.moduli.CreepCurve;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.numeric.Complex;
import nightlag.stages.response.ResponsePlan;
import nightlag.stages.response.ResponsePlan.Controlled;
import nightlag.stages.response.ResponsePlan.Step;
import nightlag.stages.response.ResponseRow;
import nightlag.stages.spectrum.RelativeMode;
import nightlag.stages.spectrum.RelaxationModes;
import nightlag.stages.spectrum.SpectrumPlan;
import nightlag.stages.spectrum.SpectrumRow;
import nightlag.stages.superposition.SuperpositionPlan;
import nightlag.stages.sweep.SweepPlan;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/**
 * A melt whose slowest mode, 300 s, is far beyond an oscillation of a minute: by moduli alone its viscosity is far too low. Times
 * shift by Arrhenius with 80 kJ/mol.
 */
class LotCreepTest {
    private static final double REFERENCE = 463.15;
    private static final RelaxationModes MELT =
            RelaxationModes.of(0, new double[] {0.01, 0.3, 10, 300}, new double[] {1e5, 2e4, 3e3, 400});
    private static final double VISCOSITY = MELT.viscosityPaS();
    private static final SpectrumPlan LIQUID = new SpectrumPlan(false, OptionalInt.empty(), false);
    private static final ResponsePlan SHELF =
            new ResponsePlan("shelf", List.of(), Controlled.STRESS, List.of(new Step(0, 10), new Step(1000, 0)), 3000);
    private static final ResponsePlan STRETCH =
            new ResponsePlan("stretch", List.of(), Controlled.STRAIN, List.of(new Step(0, 0.01)), 1000);

    @Test
    void viscosityAndRecoveryThatOnlyCreepSeesBecomeRight() {
        LotResult alone = conclude(sweep(REFERENCE, 0.01).toList(), List.of(), plan(LIQUID));
        LotResult both = conclude(sweep(REFERENCE, 0.01).toList(), List.of(longCreep()), plan(LIQUID));

        assertThat(Math.abs(value(alone, "zero_shear_viscosity") / VISCOSITY - 1))
                .isGreaterThan(0.2);
        assertWithin(both, "zero_shear_viscosity", VISCOSITY, 0.01);
        assertWithin(both, "steady_state_compliance", MELT.steadyStateCompliancePerPa(), 0.02);
        assertWithin(both, "instantaneous_modulus", MELT.instantaneousModulusPa(), 0.02);
        assertThat(both.notes()).isEmpty();
    }

    @Test
    void rowsMarkersTheSetForASimulationAndPredictionsAreOfOneSpectrum() {
        LotResult both = conclude(sweep(REFERENCE, 0.01).toList(), List.of(longCreep()), plan(LIQUID, SHELF, STRETCH));

        List<SpectrumRow> modes = both.spectrum().stream()
                .filter(row -> row.kind() == SpectrumRow.Kind.RELAXATION)
                .toList();
        RelaxationModes published = RelaxationModes.of(
                0,
                modes.stream().mapToDouble(SpectrumRow::timeS).toArray(),
                modes.stream().mapToDouble(SpectrumRow::value).toArray());
        assertThat(both.prony())
                .extracting(RelativeMode::timeS)
                .containsExactlyElementsOf(
                        modes.stream().map(SpectrumRow::timeS).toList());
        assertThat(value(both, "instantaneous_modulus"))
                .isCloseTo(published.instantaneousModulusPa(), within(1e-9 * published.instantaneousModulusPa()));
        ResponseRow unloaded = at(both, "shelf", 1000);
        double strain = 10 * published.retardation().creepPerPa(1000);
        assertThat(unloaded.strain()).isCloseTo(strain, within(1e-9 * strain));
        assertThat(unloaded.strain()).isCloseTo(10 * MELT.retardation().creepPerPa(1000), within(0.01 * strain));
        assertThat(unloaded.insideData()).isTrue();
        assertThat(unloaded.band()).isPresent();
        double stress = 0.01 * published.relaxationPa(1000);
        assertThat(at(both, "stretch", 1000).stressPa()).isCloseTo(stress, within(1e-9 * stress));
        assertThat(at(both, "stretch", 1000).band().orElseThrow().high()).isGreaterThan(stress);
    }

    @Test
    void moduliWithoutUJoinByTheirScatter() {
        LotResult both = conclude(scattered(sweep(REFERENCE, 0), 0.01), List.of(longCreep()), plan(LIQUID));

        assertWithin(both, "zero_shear_viscosity", VISCOSITY, 0.01);
        assertWithin(both, "instantaneous_modulus", MELT.instantaneousModulusPa(), 0.05);
        assertThat(marker(both, "zero_shear_viscosity").method())
                .contains("creep and oscillation together, the moduli's u from their scatter");
    }

    @Test
    void whereNoScatterCanBeHadTheModesAreThoseOfTheCreepAndItIsSaid() {
        List<ModulusPoint> two = Stream.of(0.1, 1.0)
                .map(hz -> point().named("1", "1", "" + hz, "s.csv")
                        .hz(hz)
                        .modulus(MELT.modulusPa(2 * Math.PI * hz))
                        .relativeU(0)
                        .build())
                .toList();

        LotResult both = conclude(two, List.of(longCreep()), plan(LIQUID));

        assertThat(both.notes()).extracting(Reason::code).containsExactly("CREEP_MODULI_WITHOUT_U");
        assertWithin(both, "zero_shear_viscosity", VISCOSITY, 0.01);
    }

    @ParameterizedTest(name = "law {0}")
    @ValueSource(strings = {"AUTO", "NONE"})
    void creepAmongTheIsothermsIsShiftedToTheReferenceTemperature(String law) {
        // 200 s at 500 K reach as far as 1200 s at 463 K
        CreepCurve warm = longCreep(500, 200);
        LotResult both = conclude(
                isotherms().toList(),
                List.of(warm),
                plan(LIQUID, Optional.of(superposition(SuperpositionPlan.ShiftLaw.valueOf(law))), SHELF));

        assertWithin(both, "zero_shear_viscosity", VISCOSITY, 0.03);
        assertThat(both.spectrum()).allMatch(row -> row.referenceTemperatureK() == REFERENCE);
        assertThat(marker(both, "zero_shear_viscosity").method()).contains("creep and oscillation together");
        assertThat(both.notes()).extracting(Reason::code).noneMatch(code -> code.startsWith("CREEP"));
        assertThat(at(both, "shelf", 1000).insideData()).isTrue();
    }

    @Test
    void creepOutsideTheIsothermsHasASpectrumOfItsOwn() {
        ResponsePlan cold =
                new ResponsePlan("cold", List.of(new Step(0, 420)), Controlled.STRESS, List.of(new Step(0, 10)), 3000);
        LotResult both = conclude(
                isotherms().toList(),
                List.of(longCreep(420, 3e4)),
                plan(LIQUID, Optional.of(superposition(SuperpositionPlan.ShiftLaw.AUTO)), SHELF, cold));

        assertThat(both.notes())
                .extracting(Reason::sentence)
                .contains(
                        "creep at 146.85 °C has a spectrum of its own: it lies outside the isotherms that are superposed,"
                                + " 170 to 250 °C");
        assertThat(both.spectrum().stream()
                        .map(SpectrumRow::referenceTemperatureK)
                        .distinct())
                .containsExactly(420.0, REFERENCE);
        assertThat(both.prony().stream()
                        .map(RelativeMode::referenceTemperatureK)
                        .distinct())
                .containsExactly(420.0, REFERENCE);
        // without a temperature at that of the lot, with one from the creep measured there
        assertThat(at(both, "shelf", 1000).temperatureK()).isEqualTo(REFERENCE);
        double strain = 10 * MELT.retardation().creepPerPa(3000 / a(420));
        assertThat(at(both, "cold", 3000).strain()).isCloseTo(strain, within(0.01 * strain));
        assertThat(at(both, "cold", 3000).insideData()).isTrue();
    }

    @Test
    void predictionsAndTheSetForASimulationComeFromCreepAlone() {
        LotResult alone = conclude(List.of(), List.of(longCreep()), plan(LIQUID, SHELF, STRETCH));

        assertThat(alone.notes()).isEmpty();
        assertThat(alone.prony()).isNotEmpty().allMatch(mode -> mode.referenceTemperatureK() == REFERENCE);
        double strain = 10 * MELT.retardation().creepPerPa(1000);
        assertThat(at(alone, "shelf", 1000).strain()).isCloseTo(strain, within(0.01 * strain));
        assertThat(at(alone, "shelf", 1000).insideData()).isTrue();
        double stress = 0.01 * MELT.relaxationPa(1000);
        assertThat(at(alone, "stretch", 1000).stressPa()).isCloseTo(stress, within(0.02 * stress));
        assertThat(alone.responses())
                .filteredOn(row -> row.timeS() > 0 && row.timeS() < 0.1)
                .isNotEmpty()
                .noneMatch(ResponseRow::insideData);
    }

    @Test
    void creepAtSeveralTemperaturesStaysApartWithoutALaw() {
        ResponsePlan warm =
                new ResponsePlan("warm", List.of(new Step(0, 500)), Controlled.STRESS, List.of(new Step(0, 10)), 100);
        List<CreepCurve> curves = List.of(longCreep(), longCreep(500, 2000));

        LotResult apart = conclude(List.of(), curves, plan(LIQUID, SHELF, warm));

        assertThat(apart.spectrum().stream()
                        .map(SpectrumRow::referenceTemperatureK)
                        .distinct())
                .containsExactly(REFERENCE, 500.0);
        assertThat(apart.notes())
                .extracting(Reason::sentence)
                .containsExactly(
                        "no response \"shelf\": it has no temperature of its own, and there are spectra at 190, 226.85"
                                + " °C but no reference temperature");
        double strain = 10 * MELT.retardation().creepPerPa(100 / a(500));
        assertThat(at(apart, "warm", 100).strain()).isCloseTo(strain, within(0.01 * strain));
    }

    @Test
    void withoutIsothermsCreepAtAnotherTemperatureIsNotShifted() {
        LotResult result = conclude(sweep(REFERENCE, 0.01).toList(), List.of(longCreep(500, 2000)), plan(LIQUID));

        assertThat(result.notes()).extracting(Reason::code).containsExactly("CREEP_WITHOUT_SHIFT");
        assertThat(result.spectrum().stream()
                        .map(SpectrumRow::referenceTemperatureK)
                        .distinct())
                .containsExactly(REFERENCE, 500.0);
    }

    @Test
    void curvesThatCannotStandInASpectrumAreSaid() {
        CreepCurve nowhere = creep(MELT.retardation()::creepPerPa, 0.1, 3000, 3000)
                .shifted(Double.NaN, 1, 1)
                .build();
        CreepCurve stretched = creep(MELT.retardation()::creepPerPa, 0.1, 3000, 3000)
                .shifted(REFERENCE, 1, 1)
                .in(DeformationMode.EXTENSION)
                .build();

        assertThat(conclude(List.of(), List.of(nowhere, longCreep()), plan(LIQUID))
                        .notes())
                .extracting(Reason::code)
                .containsExactly("CREEP_WITHOUT_TEMPERATURE");
        assertThat(conclude(List.of(), List.of(stretched, longCreep()), plan(LIQUID))
                        .notes())
                .extracting(Reason::code)
                .containsExactly("CREEP_MIXED_DEFORMATION");
        assertThat(conclude(sweep(REFERENCE, 0.01).toList(), List.of(stretched), plan(LIQUID))
                        .notes())
                .extracting(Reason::code)
                .containsExactly("CREEP_OTHER_DEFORMATION");
    }

    @Test
    void aFixedNumberOfModesIsThatOfTheOneSpectrum() {
        SpectrumPlan seven = new SpectrumPlan(false, OptionalInt.of(7), false);

        LotResult both = conclude(sweep(REFERENCE, 0.01).toList(), List.of(longCreep()), plan(seven));

        assertThat(both.prony()).hasSize(7);
        assertWithin(both, "zero_shear_viscosity", VISCOSITY, 0.02);
    }

    /** Creep at the reference temperature until it flows, with half a per cent of noise. */
    private static CreepCurve longCreep() {
        return longCreep(REFERENCE, 3000);
    }

    private static CreepCurve longCreep(double temperatureK, double loadedS) {
        return creep(MELT.retardation()::creepPerPa, 0.1, loadedS, 2 * loadedS)
                .shifted(temperatureK, a(temperatureK), 1)
                .noisy(0.005, 5)
                .build();
    }

    private static double a(double temperatureK) {
        return Math.exp(8e4 / 8.31446261815324 * (1 / temperatureK - 1 / REFERENCE));
    }

    /** From 0.1 Hz up, where the modes of 300 s and 10 s hardly show. */
    private static Stream<ModulusPoint> sweep(double temperatureK, double relativeU) {
        Random random = new Random(Double.doubleToLongBits(temperatureK));
        return IntStream.range(0, 25).mapToObj(i -> {
            double hz = Math.pow(10, -1 + i / 8.0);
            Complex exact = MELT.modulusPa(a(temperatureK) * 2 * Math.PI * hz);
            Complex read = new Complex(
                    exact.re() * (1 + relativeU * random.nextGaussian()),
                    exact.im() * (1 + relativeU * random.nextGaussian()));
            return point().named("1", "1", "" + (i + 1), "f" + i + ".csv")
                    .at(temperatureK)
                    .hz(hz)
                    .modulus(read)
                    .relativeU(relativeU)
                    .build();
        });
    }

    private static Stream<ModulusPoint> isotherms() {
        return Stream.of(443.15, REFERENCE, 483.15, 503.15, 523.15).flatMap(temperature -> sweep(temperature, 0.01));
    }

    private static List<ModulusPoint> scattered(Stream<ModulusPoint> points, double noise) {
        Random random = new Random(11);
        return points.map(exact -> point().named("1", "1", exact.key().point(), "s.csv")
                        .hz(exact.frequencyHz().getAsDouble())
                        .modulus(new Complex(
                                exact.moduli().orElseThrow().storagePa() * (1 + noise * random.nextGaussian()),
                                exact.moduli().orElseThrow().lossPa() * (1 + noise * random.nextGaussian())))
                        .relativeU(0)
                        .build())
                .toList();
    }

    private static LotResult conclude(List<ModulusPoint> points, List<CreepCurve> curves, ConclusionPlan plan) {
        List<Reduction> reductions = new ArrayList<>();
        points.forEach(one -> reductions.add(new Reduction(List.of(one))));
        curves.forEach(curve -> reductions.add(new Reduction(List.of(), Optional.of(curve))));
        return Conclude.conclude(reductions, plan);
    }

    private static SuperpositionPlan superposition(SuperpositionPlan.ShiftLaw law) {
        return new SuperpositionPlan(
                REFERENCE, SuperpositionPlan.VerticalShift.NONE, OptionalDouble.empty(), law, 0.003);
    }

    private static ConclusionPlan plan(SpectrumPlan spectrum, ResponsePlan... responses) {
        return plan(spectrum, Optional.empty(), responses);
    }

    private static ConclusionPlan plan(
            SpectrumPlan spectrum, Optional<SuperpositionPlan> superposition, ResponsePlan... responses) {
        return new ConclusionPlan(
                SweepPlan.withDefaults(),
                superposition,
                Optional.of(spectrum),
                List.of(responses),
                List.of(),
                Map.of());
    }

    private static Marker marker(LotResult result, String property) {
        return result.markers().stream()
                .filter(marker ->
                        marker.property().equals(property) && marker.specimen().isEmpty())
                .findFirst()
                .orElseThrow(() -> new AssertionError("no " + property + ", " + result.notes()));
    }

    private static double value(LotResult result, String property) {
        return marker(result, property).value();
    }

    private static void assertWithin(LotResult result, String property, double truth, double part) {
        Marker marker = marker(result, property);
        assertThat(marker.value()).as(property).isCloseTo(truth, within(part * truth));
        assertThat(marker.value())
                .as(property)
                .isCloseTo(truth, within(4 * marker.u().getAsDouble()));
    }

    /** The first row at an instant: before what steps there. */
    private static ResponseRow at(LotResult result, String response, double timeS) {
        return result.responses().stream()
                .filter(row -> row.response().equals(response) && row.timeS() == timeS)
                .findFirst()
                .orElseThrow(() -> new AssertionError(result.notes().toString()));
    }
}
