package nightlag.stages;

import static nightlag.stages.TestPoints.point;
import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.withinPercentage;

import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalInt;
import java.util.Random;
import java.util.stream.DoubleStream;
import java.util.stream.IntStream;
import java.util.stream.Stream;
import nightlag.stages.fault.Reason;
import nightlag.stages.geometry.DeformationMode;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.Quality;
import nightlag.stages.numeric.Complex;
import nightlag.stages.response.ResponsePlan;
import nightlag.stages.response.ResponseRow;
import nightlag.stages.spectrum.RelativeMode;
import nightlag.stages.spectrum.RelaxationModes;
import nightlag.stages.spectrum.SpectrumPlan;
import nightlag.stages.spectrum.SpectrumRow;
import nightlag.stages.superposition.MasterPoint;
import nightlag.stages.superposition.SuperpositionPlan;
import nightlag.stages.sweep.FrequencyMarkers;
import nightlag.stages.sweep.MarkerPlace;
import nightlag.stages.sweep.SweepPlan;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class ConcludeTest {
    private static final RelaxationModes MATERIAL =
            RelaxationModes.of(0, new double[] {0.01, 0.1, 1}, new double[] {1e5, 2e4, 1e3});
    private static final ConclusionPlan NOTHING_WANTED = plan(Optional.empty(), Optional.empty());
    private static final ConclusionPlan SPECTRUM_WANTED =
            plan(Optional.of(new SpectrumPlan(false, OptionalInt.empty(), false)), Optional.empty());

    @Test
    void pointsStandInTheOrderOfTheirKeys() {
        List<TestPoints> given = List.of(
                point().named("2", "1", "1", "b"),
                point().named("1", "1", "10", "b"),
                point().named("1", "1", "2", "b"),
                point().named("1", "1", "2", "a"),
                point().named("10", "1", "1", "a"));

        LotResult result = conclude(given.stream(), NOTHING_WANTED);

        assertThat(result.points())
                .extracting(p -> p.key().specimen() + "/" + p.key().point() + "/"
                        + p.key().sourceFile())
                .containsExactly("1/2/a", "1/2/b", "1/10/b", "2/1/b", "10/1/a");
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3})
    void theOrderOfTheReductionsShowsNowhere(long seed) {
        List<TestPoints> shuffled = new ArrayList<>(sweep(463.15, "1").toList());
        Collections.shuffle(shuffled, new Random(seed));

        assertThat(conclude(shuffled.stream(), SPECTRUM_WANTED))
                .isEqualTo(conclude(sweep(463.15, "1"), SPECTRUM_WANTED));
    }

    @Test
    void aFrequencySweepGivesBothSpectraAndTheirFigures() {
        LotResult result = conclude(sweep(463.15, "1"), SPECTRUM_WANTED);

        assertThat(result.notes()).isEmpty();
        assertThat(result.spectrum())
                .extracting(SpectrumRow::kind)
                .containsExactly(
                        SpectrumRow.Kind.RELAXATION,
                        SpectrumRow.Kind.RELAXATION,
                        SpectrumRow.Kind.RELAXATION,
                        SpectrumRow.Kind.RETARDATION,
                        SpectrumRow.Kind.RETARDATION);
        assertThat(result.spectrum()).allMatch(row -> row.referenceTemperatureK() == 463.15);
        List<Marker> ofTheLot = result.markers().stream()
                .filter(marker -> marker.sweep().isEmpty())
                .toList();
        assertThat(ofTheLot)
                .extracting(Marker::property)
                .containsExactly(
                        "instantaneous_compliance",
                        "instantaneous_modulus",
                        "mean_relaxation_time",
                        "mean_retardation_time",
                        "steady_state_compliance",
                        "zero_shear_viscosity");
        assertThat(ofTheLot).allMatch(marker -> marker.specimen().isEmpty());
        assertThat(result.markers()).allMatch(marker -> marker.temperatureK().equals(OptionalDouble.of(463.15)));
    }

    @Test
    void predictionsStandInTheOrderTheyAreAskedFor() {
        ResponsePlan shelf = new ResponsePlan(
                "shelf", List.of(), ResponsePlan.Controlled.STRESS, List.of(new ResponsePlan.Step(0, 10)), 1);
        ResponsePlan die = new ResponsePlan(
                "die", List.of(), ResponsePlan.Controlled.STRAIN, List.of(new ResponsePlan.Step(0, 0.05)), 1);
        ResponsePlan warmer = new ResponsePlan(
                "warmer", List.of(new ResponsePlan.Step(0, 473.15)), ResponsePlan.Controlled.STRAIN, die.steps(), 1);

        LotResult result = conclude(sweep(463.15, "1"), predicting(SPECTRUM_WANTED, shelf, warmer, die));

        assertThat(result.responses().stream().map(ResponseRow::response).distinct())
                .containsExactly("shelf", "die");
        assertThat(result.notes())
                .extracting(Reason::sentence)
                .containsExactly("no response \"warmer\": 200 °C is asked for, but the spectrum is of 190 °C and no"
                        + " isotherms say how times move");
        ResponseRow last = result.responses().get(result.responses().size() - 1);
        assertThat(last.stressPa()).isCloseTo(0.05 * MATERIAL.relaxationPa(1), withinPercentage(0.1));
        assertThat(result.prony()).extracting(RelativeMode::mode).containsExactly(1, 2, 3);
        assertThat(result.prony().get(0).relativeModulus()).isCloseTo(1e5 / 1.21e5, withinPercentage(0.1));
    }

    @Test
    void withoutASpectrumNothingIsPredictedAndTheReasonSaysSo() {
        ResponsePlan die = new ResponsePlan(
                "die", List.of(), ResponsePlan.Controlled.STRAIN, List.of(new ResponsePlan.Step(0, 0.05)), 1);

        LotResult result = conclude(sweep(463.15, "1"), predicting(NOTHING_WANTED, die));

        assertThat(result.responses()).isEmpty();
        assertThat(result.notes())
                .extracting(Reason::sentence)
                .containsExactly("no response \"die\": there is no spectrum to predict it from");
    }

    @Test
    void noSpectrumIsMadeThatWasNotAskedFor() {
        LotResult result = conclude(sweep(463.15, "1"), NOTHING_WANTED);

        assertThat(result.points()).hasSize(31);
        assertThat(result.spectrum()).isEmpty();
        assertThat(result.masterCurve()).isEmpty();
        assertThat(result.notes()).isEmpty();
    }

    @Test
    void anUnusablePointIsPublishedButNotUsed() {
        TestPoints wild = point().named("1", "1", "99", "z.csv")
                .hz(1)
                .modulus(new Complex(1e9, 1e3))
                .quality(Quality.UNUSABLE);

        LotResult result = conclude(Stream.concat(sweep(463.15, "1"), Stream.of(wild)), SPECTRUM_WANTED);

        LotResult without = conclude(sweep(463.15, "1"), SPECTRUM_WANTED);
        assertThat(result.points()).hasSize(32);
        assertThat(result.spectrum()).isEqualTo(without.spectrum());
        assertThat(result.markers()).isEqualTo(without.markers());
    }

    @Test
    void aRowOfZerosIsPublishedButNotUsed() {
        TestPoints zeros = point().named("1", "1", "99", "z.csv").hz(1).modulus(new Complex(0, 0));

        LotResult result = conclude(Stream.concat(sweep(463.15, "1"), Stream.of(zeros)), SPECTRUM_WANTED);

        LotResult without = conclude(sweep(463.15, "1"), SPECTRUM_WANTED);
        assertThat(result.points()).hasSize(32);
        assertThat(result.markers()).isEqualTo(without.markers());
        assertThat(noteOf(result)).isEqualTo("SWEEP_UNUSABLE_LEFT_OUT");
    }

    @Test
    void anAmplitudeSweepBesideItDoesNotEnter() {
        Stream<TestPoints> amplitude = IntStream.range(0, 12)
                .mapToObj(
                        i -> point().named("1", "amplitude", "" + i, "a.csv").modulus(new Complex(10.0 / (i + 1), 5)));

        LotResult result = conclude(Stream.concat(sweep(463.15, "1"), amplitude), SPECTRUM_WANTED);

        assertThat(result.spectrum())
                .isEqualTo(conclude(sweep(463.15, "1"), SPECTRUM_WANTED).spectrum());
    }

    @Test
    void isothermsAreBroughtToTheReferenceTemperatureAndTheSpectrumIsOfAll() {
        double activationEnergy = 80e3;
        double[] log10A = DoubleStream.of(443.15, 463.15, 483.15)
                .map(temperature -> activationEnergy / (8.314462618 * Math.log(10)) * (1 / temperature - 1 / 463.15))
                .toArray();
        Stream<TestPoints> three = Stream.of(
                        sweep(443.15, "1", Math.pow(10, log10A[0])),
                        sweep(463.15, "2", 1),
                        sweep(483.15, "3", Math.pow(10, log10A[2])))
                .flatMap(sweep -> sweep);

        LotResult result = conclude(three, atReference(463.15));

        assertThat(result.notes()).isEmpty();
        assertThat(result.shiftFactors())
                .extracting(shift -> shift.log10A().orElseThrow())
                .usingElementComparator((got, wanted) -> Math.abs(got - wanted) < 2e-3 ? 0 : 1)
                .containsExactly(log10A[0], 0.0, log10A[2]);
        assertThat(result.masterCurve()).hasSize(93).allMatch(point -> point.referenceTemperatureK() == 463.15);
        assertThat(result.markers())
                .filteredOn(marker -> marker.sweep().isEmpty())
                .extracting(Marker::property)
                .contains(
                        "activation_energy",
                        "crossover_angular_frequency",
                        "crossover_modulus",
                        "superposition_misfit",
                        "zero_shear_viscosity");
        assertThat(marker(result, "zero_shear_viscosity"))
                .isCloseTo(0.01 * 1e5 + 0.1 * 2e4 + 1e3, withinPercentage(0.5));
        assertThat(marker(result, "activation_energy")).isCloseTo(activationEnergy, withinPercentage(0.5));
    }

    /**
     * Shifts that are fitted both ways are not well known, and the points of an isotherm err by them together: away from the
     * reference the crossover is no better known than the shifts there.
     */
    @Test
    void whatIsNotKnownOfTheShiftsIsInTheCrossovers() {
        SuperpositionPlan fitted = new SuperpositionPlan(
                483.15,
                SuperpositionPlan.VerticalShift.FITTED,
                OptionalDouble.empty(),
                SuperpositionPlan.ShiftLaw.NONE,
                0.003);
        // ω = 100 rad/s, where the material crosses, is measured at the lower temperature alone
        List<TestPoints> two = Stream.concat(
                        sweep(443.15, "1"), sweep(483.15, "2", 0.02).filter(p -> p.frequencyHz() < 20))
                .toList();

        LotResult result = conclude(two.stream(), plan(Optional.empty(), Optional.of(fitted)));

        List<Marker> ofTheCurveAlone = FrequencyMarkers.of(
                        MarkerPlace.masterCurve(483.15),
                        result.masterCurve().stream().map(MasterPoint::reduced).toList())
                .markers();
        assertThat(ofTheCurveAlone)
                .extracting(Marker::property)
                .contains("crossover_angular_frequency", "crossover_modulus");
        for (Marker alone : ofTheCurveAlone) {
            double u = result.markers().stream()
                    .filter(m -> m.sweep().isEmpty() && m.property().equals(alone.property()))
                    .filter(m -> m.value() == alone.value())
                    .findFirst()
                    .orElseThrow()
                    .u()
                    .orElseThrow();
            assertThat(u).isGreaterThan(1.001 * alone.u().orElseThrow());
        }
    }

    @Test
    void figuresOfAMasterCurveThatDoesNotSuperposeSaySo() {
        RelaxationModes elsewhere = RelaxationModes.of(0, new double[] {0.01, 0.1, 1}, new double[] {3e4, 6e4, 1e3});
        Stream<TestPoints> another =
                sweep(483.15, "2").map(p -> p.modulus(elsewhere.modulusPa(0.3 * 2 * Math.PI * p.frequencyHz())));

        LotResult result = conclude(Stream.concat(sweep(463.15, "1"), another), atReference(463.15));

        assertThat(result.doubts()).extracting(Reason::code).containsExactly("DOES_NOT_SUPERPOSE");
        assertThat(result.unattained()).doesNotContainAnyElementsOf(result.doubts());
        assertThat(result.markers())
                .filteredOn(
                        marker -> marker.sweep().isEmpty() && !marker.property().equals("superposition_misfit"))
                .extracting(Marker::property)
                .contains("zero_shear_viscosity", "mean_relaxation_time", "crossover_modulus", "activation_energy");
        assertThat(result.markers())
                .filteredOn(marker -> marker.sweep().isEmpty())
                .allMatch(marker -> marker.method().contains("does not superpose"));
        assertThat(result.markers())
                .filteredOn(marker -> !marker.sweep().isEmpty())
                .isNotEmpty()
                .noneMatch(marker -> marker.method().contains("does not superpose"));
    }

    private static double marker(LotResult result, String property) {
        return result.markers().stream()
                .filter(marker -> marker.property().equals(property))
                .findFirst()
                .orElseThrow()
                .value();
    }

    @Test
    void ofOneIsothermTheSpectrumIsAsItIs() {
        LotResult result = conclude(sweep(463.15, "1"), atReference(463.2));

        assertThat(result.notes()).isEmpty();
        assertThat(result.spectrum())
                .isNotEmpty()
                .allMatch(row -> row.referenceTemperatureK() == 463.2)
                .extracting(SpectrumRow::value)
                .isEqualTo(conclude(sweep(463.15, "1"), SPECTRUM_WANTED).spectrum().stream()
                        .map(SpectrumRow::value)
                        .toList());
        assertThat(result.markers()).extracting(Marker::property).doesNotContain("superposition_misfit");
    }

    @Test
    void pointsMeasuredBesideTheReferenceTemperatureAreSaid() {
        LotResult result = conclude(sweep(463.15, "1"), atReference(463.4));

        assertThat(noteOf(result)).isEqualTo("CURVE_MEASURED_BESIDE_REFERENCE");
        assertThat(result.spectrum()).isNotEmpty().allMatch(row -> row.referenceTemperatureK() == 463.4);
    }

    private static ConclusionPlan atReference(double referenceK) {
        return plan(SPECTRUM_WANTED.spectrum(), Optional.of(superposition(referenceK)));
    }

    @Test
    void whatStandsInTheWayIsSaid() {
        ConclusionPlan elsewhere = atReference(300);
        Stream<TestPoints> twoTemperatures = Stream.concat(sweep(443.15, "1"), sweep(463.15, "2"));
        Stream<TestPoints> twoModuli =
                Stream.concat(sweep(463.15, "1"), sweep(463.15, "2").map(p -> p.in(DeformationMode.EXTENSION)));

        assertThat(noteOf(conclude(sweep(463.15, "1"), elsewhere))).isEqualTo("SUPERPOSITION_REFERENCE_OUTSIDE");
        assertThat(noteOf(conclude(twoTemperatures, SPECTRUM_WANTED))).isEqualTo("CURVE_SEVERAL_TEMPERATURES");
        assertThat(noteOf(conclude(twoModuli, SPECTRUM_WANTED))).isEqualTo("CURVE_MIXED_DEFORMATION");
        assertThat(conclude(Stream.of(point()), SPECTRUM_WANTED).notes())
                .extracting(Reason::code)
                .contains("SPECTRUM_TOO_FEW_FREQUENCIES");
        assertThat(conclude(Stream.of(point().quality(Quality.UNUSABLE)), SPECTRUM_WANTED)
                        .notes())
                .extracting(Reason::code)
                .contains("CURVE_NO_POINTS");
        assertThat(noteOf(conclude(Stream.empty(), SPECTRUM_WANTED))).isEqualTo("CURVE_NO_POINTS");
    }

    @Test
    void continuousSpectraStandBesideTheModes() {
        SpectrumPlan wanted = new SpectrumPlan(false, OptionalInt.empty(), true);
        LotResult discrete = conclude(sweep(463.15, "1"), SPECTRUM_WANTED);
        LotResult result = conclude(sweep(463.15, "1"), plan(Optional.of(wanted), Optional.empty()));

        assertThat(result.notes()).isEmpty();
        assertThat(result.markers()).isEqualTo(discrete.markers());
        assertThat(result.spectrum()).containsAll(discrete.spectrum());
        List<SpectrumRow> continuous = continuousRows(result);
        assertThat(continuous)
                .extracting(SpectrumRow::kind)
                .contains(SpectrumRow.Kind.RELAXATION, SpectrumRow.Kind.RETARDATION);
        assertThat(continuous)
                .allMatch(row -> row.low().getAsDouble() <= row.value()
                        && row.value() <= row.high().getAsDouble()
                        && row.referenceTemperatureK() == 463.15);
    }

    @Test
    void aFixedNumberOfModesLeavesTheContinuousSpectraAsTheyAre() {
        ConclusionPlan one = plan(Optional.of(new SpectrumPlan(false, OptionalInt.of(1), true)), Optional.empty());
        ConclusionPlan free = plan(Optional.of(new SpectrumPlan(false, OptionalInt.empty(), true)), Optional.empty());

        assertThat(continuousRows(conclude(sweep(463.15, "1"), one)))
                .isNotEmpty()
                .isEqualTo(continuousRows(conclude(sweep(463.15, "1"), free)));
    }

    @Test
    void aNarrowSweepHasModesOnlyAndSaysWhy() {
        SpectrumPlan wanted = new SpectrumPlan(false, OptionalInt.empty(), true);
        LotResult result = conclude(sweep(463.15, "1").limit(10), plan(Optional.of(wanted), Optional.empty()));

        assertThat(noteOf(result)).isEqualTo("CONTINUOUS_TOO_NARROW");
        assertThat(result.spectrum()).isNotEmpty();
        assertThat(continuousRows(result)).isEmpty();
    }

    private static List<SpectrumRow> continuousRows(LotResult result) {
        return result.spectrum().stream()
                .filter(row -> row.form() == SpectrumRow.Form.CONTINUOUS)
                .toList();
    }

    @Test
    void anEquilibriumModulusOfZeroMakesALiquidAndIsSaid() {
        ConclusionPlan solid = plan(Optional.of(new SpectrumPlan(true, OptionalInt.empty(), false)), Optional.empty());
        RelaxationModes flowing = RelaxationModes.of(0, new double[] {1}, new double[] {1e3});
        Stream<TestPoints> points = IntStream.range(0, 31).mapToObj(i -> {
            double hz = Math.pow(10, -2 + i / 7.5);
            Complex modulus = flowing.modulusPa(2 * Math.PI * hz);
            // a storage modulus that falls off faster than any liquid's leaves no room for an equilibrium modulus
            double storage = hz < 0.1 ? modulus.re() * 0.97 : modulus.re();
            return point().named("1", "1", "" + i, "s.csv").hz(hz).modulus(new Complex(storage, modulus.im()));
        });

        LotResult result = conclude(points, solid);

        assertThat(noteOf(result)).isEqualTo("EQUILIBRIUM_MODULUS_ZERO");
        assertThat(result.markers()).extracting(Marker::property).contains("zero_shear_viscosity");
    }

    private static String noteOf(LotResult result) {
        assertThat(result.notes()).hasSize(1);
        Reason note = result.notes().get(0);
        assertThat(note.sentence()).isNotBlank().doesNotContain("{").doesNotEndWith(".");
        return note.code();
    }

    private static Stream<TestPoints> sweep(double temperatureK, String sweep) {
        return sweep(temperatureK, sweep, 1);
    }

    /** A sweep of the material, all its times longer by a factor. */
    private static Stream<TestPoints> sweep(double temperatureK, String sweep, double slower) {
        return IntStream.range(0, 31).mapToObj(i -> {
            double hz = Math.pow(10, -2 + i / 7.5);
            return point().named("1", sweep, "" + (i + 1), "f" + i + ".csv")
                    .at(temperatureK)
                    .hz(hz)
                    .modulus(MATERIAL.modulusPa(slower * 2 * Math.PI * hz));
        });
    }

    private static LotResult conclude(Stream<TestPoints> points, ConclusionPlan plan) {
        return Conclude.conclude(
                points.map(TestPoints::build)
                        .map((ModulusPoint point) -> new Reduction(List.of(point)))
                        .toList(),
                plan);
    }

    private static SuperpositionPlan superposition(double referenceK) {
        return new SuperpositionPlan(
                referenceK,
                SuperpositionPlan.VerticalShift.NONE,
                OptionalDouble.empty(),
                SuperpositionPlan.ShiftLaw.AUTO,
                0.003);
    }

    private static ConclusionPlan plan(Optional<SpectrumPlan> spectrum, Optional<SuperpositionPlan> superposition) {
        return new ConclusionPlan(SweepPlan.withDefaults(), superposition, spectrum, List.of(), List.of(), Map.of());
    }

    private static ConclusionPlan predicting(ConclusionPlan plan, ResponsePlan... responses) {
        return new ConclusionPlan(
                plan.sweeps(), plan.superposition(), plan.spectrum(), List.of(responses), List.of(), Map.of());
    }
}
