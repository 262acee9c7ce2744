package nightlag.stages.sweep;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.ArrayList;
import java.util.List;
import java.util.stream.Stream;
import nightlag.stages.fault.Reason;
import nightlag.stages.geometry.DeformationMode;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.sweep.SweepPlan.Kind;
import nightlag.stages.sweep.SweepPlan.OnsetAxis;
import nightlag.stages.sweep.SweepPlan.Repeats;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class SweepsTest {
    private static final double ROOM = 298.15;

    @Test
    void oneTemperatureAndManyFrequenciesAreAFrequencySweep() {
        Sweeps sweeps = found(isotherm(ROOM, 0, 7));

        Sweep only = only(sweeps);
        assertThat(only.kind()).isEqualTo(Kind.FREQUENCY);
        assertThat(only.temperatureK()).hasValue(ROOM);
        assertThat(only.frequencyHz()).isEmpty();
        assertThat(only.points())
                .extracting(point -> point.frequencyHz().orElseThrow())
                .isSorted();
        assertThat(sweeps.notes()).isEmpty();
    }

    @Test
    void whereTemperatureStepsEachIsothermIsAFrequencySweep() {
        List<SeriesPoint> points = new ArrayList<>(isotherm(ROOM, 0, 5));
        points.addAll(isotherm(ROOM + 10.2, 5, 5));
        points.addAll(isotherm(ROOM + 20, 10, 5));

        Sweeps sweeps = found(points);

        assertThat(sweeps.sweeps())
                .extracting(Sweep::kind)
                .containsOnly(Kind.FREQUENCY)
                .hasSize(3);
        assertThat(sweeps.sweeps().get(1).temperatureK()).hasValue(ROOM + 10.2);
        assertThat(sweeps.notes()).isEmpty();
        assertThat(sweeps.isotherms().isotherms()).hasSize(3);
    }

    @Test
    void moreTemperaturesThanFrequenciesAreSaidToBeAmbiguous() {
        List<SeriesPoint> points = new ArrayList<>();
        for (int step = 0; step < 12; step++) {
            points.addAll(isotherm(ROOM + 5 * step, 3 * step, 3));
        }

        Sweeps sweeps = found(points);

        assertThat(sweeps.sweeps())
                .extracting(Sweep::kind)
                .containsOnly(Kind.FREQUENCY)
                .hasSize(12);
        assertThat(sentence(sweeps, SweepReason.SWEEP_AMBIGUOUS))
                .isEqualTo("specimen 1, sweep 1: frequency and temperature vary, taken as a frequency sweep at each"
                        + " temperature; kind of the section sweeps in the grade file decides otherwise");
    }

    @Test
    void theUserCanHaveTemperatureSweepsOfTheSamePointsWhichStillSuperpose() {
        List<SeriesPoint> points = new ArrayList<>();
        for (int step = 0; step < 12; step++) {
            points.addAll(isotherm(ROOM + 5 * step, 3 * step, 3));
        }

        Sweeps sweeps = of(points, Kind.TEMPERATURE);

        assertThat(sweeps.sweeps())
                .extracting(Sweep::kind)
                .containsOnly(Kind.TEMPERATURE)
                .hasSize(3);
        assertThat(sweeps.sweeps()).allSatisfy(sweep -> {
            assertThat(sweep.points()).hasSize(12);
            assertThat(sweep.frequencyHz()).isPresent();
            assertThat(sweep.temperatureK()).isEmpty();
        });
        assertThat(sweeps.isotherms().isotherms()).hasSize(12);
        assertThat(sweeps.notes()).isEmpty();
    }

    /** At 0.1 K a point five frequencies share half a kelvin, at 0.3 K two do, at 2 K none. */
    @ParameterizedTest(name = "{0} K from point to point")
    @ValueSource(doubles = {0.1, 0.3, 2})
    void aRampInWhichFrequenciesCycleIsATemperatureSweepAtEachFrequency(double step) {
        List<SeriesPoint> points = new ArrayList<>();
        for (int i = 0; i < 300; i++) {
            points.add(SeriesPoint.of(i, ROOM + step * i, Math.pow(2, i % 5)).after(10 * i));
        }

        Sweeps sweeps = found(points);

        assertThat(sweeps.sweeps())
                .extracting(Sweep::kind)
                .containsOnly(Kind.TEMPERATURE)
                .hasSize(5);
        assertThat(sweeps.sweeps())
                .allSatisfy(sweep -> assertThat(sweep.points()).hasSize(60));
        assertThat(sweeps.isotherms().isotherms()).isEmpty();
        assertThat(codes(sweeps.isotherms().notes())).containsExactly("SWEEP_RAMP_NOT_SUPERPOSED");
        assertThat(codes(sweeps.notes())).containsExactly("SWEEP_AMBIGUOUS");
    }

    @Test
    void aRampAtOneFrequencyIsATemperatureSweep() {
        List<SeriesPoint> points = new ArrayList<>();
        for (int i = 0; i < 100; i++) {
            points.add(SeriesPoint.of(i, ROOM + 0.4 * i, 1).after(20 * i));
        }

        Sweeps sweeps = found(points);

        assertThat(only(sweeps).kind()).isEqualTo(Kind.TEMPERATURE);
        assertThat(only(sweeps).frequencyHz()).hasValue(1);
        assertThat(sweeps.notes()).isEmpty();
    }

    @Test
    void heatingAndCoolingAreTwoSweeps() {
        List<SeriesPoint> points = new ArrayList<>();
        for (int i = 0; i < 101; i++) {
            points.add(SeriesPoint.of(1000 - i, ROOM + 50 - Math.abs(i - 50), 1).after(20 * i));
        }

        Sweeps sweeps = found(points);

        assertThat(sweeps.sweeps())
                .extracting(sweep -> sweep.leg().orElseThrow().words())
                .containsExactly("leg 1, heating", "leg 2, cooling");
        assertThat(sweeps.sweeps()).extracting(sweep -> sweep.points().size()).containsExactly(51, 50);
        assertThat(sweeps.sweeps())
                .allSatisfy(sweep -> assertThat(sweep.points())
                        .extracting(point -> point.temperatureK().orElseThrow())
                        .isSorted());
        assertThat(sentence(sweeps, SweepReason.SWEEP_RAMP_TURNS))
                .isEqualTo(
                        "specimen 1, sweep 1: the ramp turns; its 2 legs of heating and cooling are taken as sweeps of"
                                + " their own, and the method of a marker says which");
    }

    /** Without a time the points' own order says where it turns. */
    @Test
    void aRampOfSeveralFrequenciesTurnsAtEach() {
        List<SeriesPoint> points = new ArrayList<>();
        for (int i = 0; i < 120; i++) {
            points.add(SeriesPoint.of(i, ROOM - Math.abs(i - 60), Math.pow(2, i % 3)));
        }

        Sweeps sweeps = of(points, Kind.TEMPERATURE);

        assertThat(sweeps.sweeps())
                .extracting(sweep -> sweep.frequencyHz().orElseThrow() + " "
                        + sweep.leg().orElseThrow().number())
                .containsExactly("1.0 1", "1.0 2", "2.0 1", "2.0 2", "4.0 1", "4.0 2");
        assertThat(codes(sweeps.notes())).containsExactly("SWEEP_RAMP_TURNS");
    }

    @Test
    void coolingAndHeatingInAFileEachOnItsOwnClockAreTwoSweeps() {
        List<SeriesPoint> points = new ArrayList<>();
        for (int i = 0; i < 40; i++) {
            points.add(SeriesPoint.of(i, ROOM + i, 1)
                    .named("1", "1", "bench/up.csv")
                    .after(20 * i));
            points.add(SeriesPoint.of(i, ROOM + 40 - i, 1)
                    .named("1", "1", "bench/down.csv")
                    .after(20 * i + 5));
        }

        assertThat(found(points).sweeps())
                .extracting(sweep -> sweep.leg().orElseThrow().heating())
                .containsExactly(false, true);
    }

    @Test
    void twoRampsUpAreRepeatsAndAThermostatThatWandersTurnsNoRamp() {
        List<SeriesPoint> points = new ArrayList<>();
        for (int i = 0; i < 60; i++) {
            for (String file : List.of("bench/a.csv", "bench/b.csv")) {
                points.add(SeriesPoint.of(i, ROOM + 0.5 * i + Math.sin(0.7 * i), 1)
                        .named("1", String.valueOf(i), file)
                        .after(20 * i));
            }
        }

        Sweeps sweeps = found(points);

        assertThat(only(sweeps).points()).hasSize(120);
        assertThat(only(sweeps).leg()).isEmpty();
        assertThat(sweeps.notes()).isEmpty();
    }

    @Test
    void whatGoesOnAtOneTemperatureIsATimeSweepThoughItWanders() {
        List<SeriesPoint> points = new ArrayList<>();
        for (int i = 0; i < 100; i++) {
            points.add(SeriesPoint.of(i, ROOM + Math.sin(0.1 * i), 1).after(20 * i));
        }

        Sweeps sweeps = found(points);

        assertThat(only(sweeps).kind()).isEqualTo(Kind.TIME);
        assertThat(only(sweeps).points()).hasSize(100);
        assertThat(codes(sweeps.notes())).containsExactly("SWEEP_AMBIGUOUS");
    }

    @Test
    void frequenciesThatComeAgainAndAgainAreFollowedOverTime() {
        List<SeriesPoint> points = new ArrayList<>();
        for (int i = 0; i < 120; i++) {
            points.add(SeriesPoint.of(i, ROOM, Math.pow(2, i % 4)).after(10 * i));
        }

        Sweeps sweeps = found(points);

        assertThat(sweeps.sweeps())
                .extracting(Sweep::kind)
                .containsOnly(Kind.TIME)
                .hasSize(4);
        assertThat(codes(sweeps.notes())).containsExactly("SWEEP_AMBIGUOUS");
    }

    @Test
    void withoutTheirTimesTheyAreRepeatsWhichIsSaid() {
        List<SeriesPoint> points = new ArrayList<>();
        for (int i = 0; i < 120; i++) {
            points.add(SeriesPoint.of(i, ROOM, Math.pow(2, i % 4)));
        }

        Sweeps sweeps = found(points);

        assertThat(only(sweeps).kind()).isEqualTo(Kind.FREQUENCY);
        assertThat(codes(sweeps.notes())).containsExactly("SWEEP_REPEATS_WITHOUT_TIME");
    }

    @Test
    void aFrequencySweepMadeThreeTimesIsOneWithRepeats() {
        List<SeriesPoint> points = new ArrayList<>();
        for (int i = 0; i < 60; i++) {
            points.add(SeriesPoint.of(i, ROOM, Math.pow(1.3, i % 20)).after(10 * i));
        }

        assertThat(only(found(points)).kind()).isEqualTo(Kind.FREQUENCY);
    }

    @Test
    void amplitudeSweepsAreThoseFoundBefore() {
        List<ModulusPoint> published = new ArrayList<>();
        for (int i = 0; i < 10; i++) {
            published.add(
                    SeriesPoint.of(i, ROOM, 1).strained(0.001 * Math.pow(2, i)).build());
        }
        for (int i = 0; i < 5; i++) {
            published.add(SeriesPoint.of(10 + i, ROOM, 2 * Math.pow(2, i))
                    .strained(0.001)
                    .build());
        }
        AmplitudeSweeps amplitude = AmplitudeSweeps.among(published, Kind.AUTO);

        Sweeps sweeps = Sweeps.of(published, amplitude.sweeps(), SweepPlan.withDefaults());

        assertThat(sweeps.sweeps()).extracting(Sweep::kind).containsExactly(Kind.AMPLITUDE, Kind.FREQUENCY);
        assertThat(sweeps.sweeps().get(0).points()).hasSize(10);
        // the frequency of the amplitude sweep would have no other point: the one of smallest strain stays
        assertThat(sweeps.isotherms().isotherms().get(0).readings()).hasSize(6);
        assertThat(codes(sweeps.isotherms().notes())).containsExactly("SWEEP_AMPLITUDE_NOT_SUPERPOSED");
    }

    @Test
    void unusablePointsAreLeftOutAndCounted() {
        List<SeriesPoint> points = new ArrayList<>(isotherm(ROOM, 0, 7));
        points.set(3, points.get(3).unusable());

        Sweeps sweeps = found(points);

        assertThat(only(sweeps).points()).hasSize(6);
        assertThat(sentence(sweeps, SweepReason.SWEEP_UNUSABLE_LEFT_OUT))
                .isEqualTo(
                        "specimen 1, sweep 1: 1 of 7 points left out of all that follows, unusable or without a frequency or a modulus");
    }

    @Test
    void shearAndExtensionAreNeverOneSweep() {
        List<SeriesPoint> points = new ArrayList<>(isotherm(ROOM, 0, 5));
        isotherm(ROOM, 5, 4).forEach(point -> points.add(point.in(DeformationMode.EXTENSION)));

        Sweeps sweeps = found(points);

        assertThat(sweeps.sweeps()).extracting(sweep -> sweep.points().size()).containsExactly(5, 4);
        assertThat(codes(sweeps.notes())).containsExactly("SWEEP_MIXED_DEFORMATION");
    }

    @Test
    void recordsThatAreEachASweepOfTheirOwnAreCountedAndStillSuperpose() {
        List<SeriesPoint> points = isotherm(ROOM, 0, 6).stream()
                .map(point -> point.named(point.point(), "1", point.file()))
                .toList();

        Sweeps sweeps = found(points);

        assertThat(sweeps.sweeps()).isEmpty();
        assertThat(sweeps.notes()).isEmpty();
        assertThat(codes(sweeps.apart())).containsExactly("SWEEP_SINGLE_POINTS");
        assertThat(sweeps.isotherms().isotherms().get(0).readings()).hasSize(6);
    }

    @Test
    void repeatsAreNoSweepAndNoLoss() {
        Sweeps sweeps = found(List.of(SeriesPoint.of(1, ROOM, 1), SeriesPoint.of(2, ROOM, 1.001)));

        assertThat(sweeps.sweeps()).isEmpty();
        assertThat(sweeps.notes()).isEmpty();
        assertThat(codes(sweeps.apart())).containsExactly("SWEEP_POINTS_IN_NONE");
        assertThat(sweeps.isotherms().isotherms().get(0).points()).hasSize(2);
    }

    /** Two frequencies at a temperature are no sweep by themselves, and superpose with all others. */
    @Test
    void pointsInNoSweepThatStandInAnIsothermAreNoLoss() {
        List<SeriesPoint> points = new ArrayList<>(isotherm(ROOM, 0, 6));
        points.add(SeriesPoint.of(20, ROOM + 20, 1));
        points.add(SeriesPoint.of(21, ROOM + 20, 2));

        Sweeps sweeps = found(points);

        assertThat(sweeps.sweeps()).hasSize(1);
        assertThat(sweeps.notes()).isEmpty();
        assertThat(codes(sweeps.apart())).containsExactly("SWEEP_POINTS_IN_NONE");
        assertThat(codes(of(points, Kind.TEMPERATURE).notes())).containsExactly("SWEEP_POINTS_IN_NONE");
    }

    /** A frequency and a temperature of its own for each: no sweep, no isotherm, and somebody should know. */
    @Test
    void pointsThatFitNowhereAreSaid() {
        Sweeps sweeps = found(
                List.of(SeriesPoint.of(1, ROOM, 1), SeriesPoint.of(2, ROOM + 10, 2), SeriesPoint.of(3, ROOM + 20, 4)));

        assertThat(sweeps.sweeps()).isEmpty();
        assertThat(codes(sweeps.notes())).containsExactly("SWEEP_POINTS_IN_NONE");
        assertThat(sweeps.apart()).isEmpty();
    }

    @Test
    void everyUsablePointIsInOneSweepAtMost() {
        List<SeriesPoint> points = new ArrayList<>();
        for (int i = 0; i < 200; i++) {
            points.add(SeriesPoint.of(i, ROOM + 7 * (i % 13), Math.pow(1.5, (i * i) % 11))
                    .after(i));
        }
        for (Kind kind : Kind.values()) {
            Sweeps sweeps = of(points, kind);

            List<ModulusPoint> used = sweeps.sweeps().stream()
                    .flatMap(sweep -> sweep.points().stream())
                    .toList();
            assertThat(used).as(kind.word()).doesNotHaveDuplicates();
            if (used.size() < points.size()) {
                assertThat(Stream.concat(sweeps.notes().stream(), sweeps.apart().stream()))
                        .extracting(Reason::code)
                        .contains("SWEEP_POINTS_IN_NONE");
            }
        }
    }

    @Test
    void theAverageOfRepeatsIsInThePlaceOfThem() {
        List<SeriesPoint> points = new ArrayList<>();
        for (int repeat = 0; repeat < 2; repeat++) {
            for (SeriesPoint point : isotherm(ROOM + 0.2 * repeat, 0, 5)) {
                points.add(point.named("1", point.point(), "bench/" + repeat + point.point() + ".csv"));
            }
        }

        Sweeps sweeps = averaged(points);

        assertThat(only(sweeps).points()).hasSize(5);
        assertThat(only(sweeps).points().get(0).temperatureK()).hasValue(ROOM + 0.1);
        assertThat(only(sweeps)
                        .points()
                        .get(0)
                        .moduli()
                        .orElseThrow()
                        .covariance()
                        .orElseThrow()
                        .storageU())
                .isCloseTo(10 / Math.sqrt(2), within(1e-9));
        assertThat(sentence(sweeps, SweepReason.SWEEP_REPEATS_TOGETHER))
                .isEqualTo("specimen 1, sweep 1: 10 points, repeats averaged, became 5; their scatter made u 1 times as"
                        + " large");
        assertThat(sweeps.isotherms().isotherms().get(0).readings()).hasSize(5);
    }

    /** Points of a frequency sweep, descending as such sweeps are often made. */
    private static List<SeriesPoint> isotherm(double temperatureK, int firstNumber, int count) {
        List<SeriesPoint> points = new ArrayList<>();
        for (int i = 0; i < count; i++) {
            points.add(SeriesPoint.of(firstNumber + i, temperatureK, 50 * Math.pow(0.5, i)));
        }
        return points;
    }

    private static Sweeps found(List<SeriesPoint> points) {
        return of(points, Kind.AUTO);
    }

    private static Sweeps of(List<SeriesPoint> points, Kind kind) {
        return of(points, new SweepPlan(kind, Repeats.APART, OnsetAxis.LINEAR));
    }

    private static Sweeps averaged(List<SeriesPoint> points) {
        return of(points, new SweepPlan(Kind.AUTO, Repeats.AVERAGED, OnsetAxis.LINEAR));
    }

    private static Sweeps of(List<SeriesPoint> points, SweepPlan plan) {
        List<ModulusPoint> published = points.stream()
                .map(SeriesPoint::build)
                .sorted(PointOrder.BY_KEY)
                .toList();
        return Sweeps.of(
                published, AmplitudeSweeps.among(published, plan.kind()).sweeps(), plan);
    }

    private static Sweep only(Sweeps sweeps) {
        assertThat(sweeps.sweeps()).hasSize(1);
        return sweeps.sweeps().get(0);
    }

    private static List<String> codes(List<Reason> notes) {
        return notes.stream().map(Reason::code).toList();
    }

    private static String sentence(Sweeps sweeps, SweepReason reason) {
        return sweeps.notes().stream()
                .filter(note -> note.code().equals(reason.name()))
                .map(Reason::sentence)
                .findFirst()
                .orElseThrow();
    }
}
