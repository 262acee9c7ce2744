package nightlag.stages.sweep;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;
import static org.assertj.core.data.Percentage.withPercentage;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Random;
import java.util.stream.DoubleStream;
import java.util.stream.IntStream;
import java.util.stream.Stream;
import nightlag.stages.TestPoints;
import nightlag.stages.moduli.Figure;
import nightlag.stages.moduli.Findings;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.PointQuantity;
import nightlag.stages.numeric.Complex;
import nightlag.stages.sweep.FigureMarkerPlan.Along;
import nightlag.stages.sweep.FigureMarkerPlan.Scale;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** Where a figure reaches a value, on materials for which that place is known in closed form. */
class FigureMarkersTest {
    private static final double ZERO_C = 273.15;
    private static final Figure STIFFNESS = Figure.column(PointQuantity.COMPLEX_MODULUS);
    private static final Figure ANGLE = Figure.column(PointQuantity.PHASE_ANGLE);
    private static final OptionalDouble ANY = OptionalDouble.empty();

    /** |G*| = 1 MPa · 10^(−T/20 °C), δ = 40° + T/2 °C: ln |G*| and δ are straight in T. */
    private static Complex binder(double celsius) {
        return Complex.polar(1e6 * Math.pow(10, -celsius / 20), Math.toRadians(40 + celsius / 2));
    }

    /** |G*| = 1 kPa · √(f/1 Hz), δ = 60° − 10° lg (f/1 Hz). */
    private static Complex melt(double hertz) {
        return Complex.polar(1e3 * Math.sqrt(hertz), Math.toRadians(60 - 10 * Math.log10(hertz)));
    }

    private static List<ModulusPoint> ramp(double... celsius) {
        return DoubleStream.of(celsius)
                .mapToObj(t -> TestPoints.point()
                        .named("1", "ramp", "p" + t, "bench/" + t + ".csv")
                        .at(t + ZERO_C)
                        .hz(1.6)
                        .modulus(binder(t))
                        .build())
                .toList();
    }

    private static List<ModulusPoint> sweep(double... hertz) {
        return DoubleStream.of(hertz)
                .mapToObj(f -> TestPoints.point()
                        .named("1", "s", "p" + f, "bench/" + f + ".csv")
                        .at(50 + ZERO_C)
                        .hz(f)
                        .modulus(melt(f))
                        .build())
                .toList();
    }

    private static FigureMarkerPlan plan(Figure figure, double reaches, Along along, Scale scale) {
        return new FigureMarkerPlan("found", figure, reaches, along, scale, ANY, ANY, Optional.empty());
    }

    private static Marker only(Findings findings) {
        assertThat(findings.notes()).isEmpty();
        assertThat(findings.markers()).hasSize(1);
        return findings.markers().get(0);
    }

    /** Exact: 10 kPa at 40 °C. */
    @Test
    void theTemperatureWhereAStiffnessFallsToALimit() {
        Marker marker =
                only(FigureMarkers.find(ramp(22, 34, 46, 58), plan(STIFFNESS, 1e4, Along.TEMPERATURE, Scale.LOG)));

        assertThat(marker.property()).isEqualTo("found");
        assertThat(marker.specimen()).isEqualTo("1");
        assertThat(marker.sweep()).isEqualTo("ramp");
        assertThat(marker.value()).isCloseTo(40 + ZERO_C, within(1e-9));
        assertThat(marker.temperatureK()).hasValue(marker.value());
        assertThat(marker.frequencyHz()).hasValue(1.6);
        assertThat(marker.unit()).isEqualTo("°C");
        assertThat(marker.method())
                .isEqualTo(
                        "complex_modulus falls to 10000 Pa, log over temperature by a smooth curve, between 34 and 46 °C");
    }

    /**
     * Half way between two points whose |G*| is known to 1 %: u(T) = √½ · 1 % / (ln 10 / 20 K), and as two points do not tell how
     * the curve bends between them, 12 K · ½ · ½ / 2 / √3 besides (exact).
     */
    @Test
    void itsUncertaintyIsThatOfTheValuesOverTheSlopeAndOfABendBetweenTwoPoints() {
        List<ModulusPoint> points = Stream.of(34.0, 46.0)
                .map(t -> TestPoints.point()
                        .at(t + ZERO_C)
                        .modulus(new Complex(0, binder(t).abs()))
                        .relativeU(0.01)
                        .build())
                .toList();

        Marker marker = only(FigureMarkers.find(points, plan(STIFFNESS, 1e4, Along.TEMPERATURE, Scale.LOG)));

        assertThat(marker.u().orElseThrow())
                .isCloseTo(
                        Math.hypot(0.01 * Math.sqrt(0.5) / (Math.log(10) / 20), 12 / 8.0 / Math.sqrt(3)),
                        withPercentage(1e-4));
        assertThat(marker.method()).contains("log over temperature by a straight line");
    }

    /** Exact: 45° at 10^1.5 Hz, as the phase angle itself is straight over log f; |G*| there is 10^3.75 Pa. */
    @Test
    void aStiffnessAtACrossingPhase() {
        FigureMarkerPlan plan = new FigureMarkerPlan(
                "crossing_stiffness",
                ANGLE,
                45,
                Along.FREQUENCY,
                Scale.LINEAR,
                OptionalDouble.of(50.2 + ZERO_C),
                ANY,
                Optional.of(STIFFNESS));

        Marker marker = only(FigureMarkers.find(sweep(1, 10, 30, 33, 100), plan));

        assertThat(marker.value()).isCloseTo(Math.pow(10, 3.75), withPercentage(1e-9));
        assertThat(marker.frequencyHz().orElseThrow()).isCloseTo(Math.pow(10, 1.5), withPercentage(1e-9));
        assertThat(marker.temperatureK()).hasValue(50 + ZERO_C);
        assertThat(marker.unit()).isEqualTo("Pa");
        assertThat(marker.method())
                .isEqualTo(
                        "complex_modulus (log) where phase_angle falls to 45 °, linear over log frequency by a smooth curve, between 30 and 33 Hz");
    }

    /** |G*| taken as straight over ln f between 1 and 3 Hz has its mean at √3 Hz (exact). */
    @Test
    void onALinearScaleThePlaceIsThatOfTheStraightLine() {
        double mean = (melt(1).abs() + melt(3).abs()) / 2;

        Marker marker = only(FigureMarkers.find(sweep(1, 3), plan(STIFFNESS, mean, Along.FREQUENCY, Scale.LINEAR)));

        assertThat(marker.value()).isCloseTo(Math.sqrt(3), withPercentage(1e-10));
        assertThat(marker.unit()).isEqualTo("Hz");
        assertThat(marker.method()).contains("linear over log frequency");
    }

    @Test
    void nothingIsExtrapolated() {
        Findings findings =
                FigureMarkers.find(ramp(22, 34, 46, 58), plan(STIFFNESS, 1e2, Along.TEMPERATURE, Scale.LOG));

        assertThat(findings.markers()).isEmpty();
        assertThat(findings.notes()).hasSize(1);
        assertThat(findings.notes().get(0).sentence())
                .isEqualTo(
                        "no found of specimen 1, sweep ramp at 1.6 Hz: complex_modulus stays between 1259 and 79430 Pa"
                                + " and does not reach 100 Pa");
    }

    /** Isotherms that stay away from the value share a line. */
    @Test
    void curvesWithoutItAreCounted() {
        List<ModulusPoint> points = new ArrayList<>();
        for (double celsius : new double[] {20, 30, 40, 50}) {
            for (double hertz : new double[] {1, 10}) {
                points.add(TestPoints.point()
                        .at(celsius + ZERO_C)
                        .hz(hertz)
                        .modulus(binder(celsius).times(hertz))
                        .build());
            }
        }

        Findings findings = FigureMarkers.find(points, plan(STIFFNESS, 2e5, Along.FREQUENCY, Scale.LOG));

        assertThat(findings.markers()).hasSize(2);
        assertThat(findings.notes())
                .extracting(note -> note.sentence())
                .containsExactly(
                        "found of specimen 1, sweep 1: none on 2 of 4 curves, where complex_modulus does not reach"
                                + " 200000 Pa");
    }

    /** A value reached exactly at a measured point is reached once, at either end as well. */
    @Test
    void aPointThatHasTheValueIsOnePlace() {
        for (double celsius : new double[] {20, 40, 60}) {
            double there = ramp(celsius).get(0).moduli().orElseThrow().magnitudePa();

            Marker marker =
                    only(FigureMarkers.find(ramp(20, 40, 60), plan(STIFFNESS, there, Along.TEMPERATURE, Scale.LOG)));

            assertThat(marker.value()).isCloseTo(celsius + ZERO_C, within(1e-9));
        }
    }

    @Test
    void everyCrossingIsARow() {
        List<ModulusPoint> points = new ArrayList<>();
        double[] stiffness = {1, 3, 1, 3};
        for (int i = 0; i < stiffness.length; i++) {
            points.add(TestPoints.point()
                    .at(300 + 10 * i)
                    .modulus(new Complex(stiffness[i], 0))
                    .build());
        }

        Findings findings = FigureMarkers.find(points, plan(STIFFNESS, 2, Along.TEMPERATURE, Scale.LINEAR));

        assertThat(findings.markers())
                .extracting(Marker::value)
                .satisfiesExactly(
                        value -> assertThat(value).isCloseTo(305, within(2.5)),
                        value -> assertThat(value).isCloseTo(315, within(0.01)),
                        value -> assertThat(value).isCloseTo(325, within(2.5)));
        // by a smooth curve, which lies as far off the straight line at both ends
        assertThat(findings.markers().get(0).value() + findings.markers().get(2).value())
                .isCloseTo(630, within(0.01));
        assertThat(findings.markers())
                .extracting(marker -> marker.method().contains("rises"))
                .containsExactly(true, false, true);
    }

    /** Isotherms of frequency sweeps make a curve over temperature at each frequency asked for. */
    @Test
    void alongTemperatureThePointsOfAFrequencyAreGathered() {
        List<ModulusPoint> points = new ArrayList<>();
        for (double celsius : new double[] {30, 50}) {
            for (double hertz : new double[] {0.5, 1.59, 1.6, 5}) {
                points.add(TestPoints.point()
                        .at(celsius + ZERO_C + 0.1 * hertz)
                        .hz(hertz)
                        .modulus(binder(celsius))
                        .build());
            }
        }
        FigureMarkerPlan everywhere = plan(STIFFNESS, 1e4, Along.TEMPERATURE, Scale.LOG);
        FigureMarkerPlan one = new FigureMarkerPlan(
                "found", STIFFNESS, 1e4, Along.TEMPERATURE, Scale.LOG, ANY, OptionalDouble.of(1.591), Optional.empty());

        assertThat(FigureMarkers.find(points, everywhere).markers()).hasSize(3);
        assertThat(only(FigureMarkers.find(points, one)).value()).isCloseTo(40 + ZERO_C + 0.1595, within(1e-9));
    }

    @Test
    void whatHasNoLogarithmIsSaid() {
        List<ModulusPoint> points = Stream.of(-1.0, 2.0)
                .map(loss -> TestPoints.point()
                        .at(300 + 10 * loss)
                        .modulus(new Complex(10, loss))
                        .build())
                .toList();
        Figure loss = Figure.column(PointQuantity.LOSS_MODULUS);

        Findings findings = FigureMarkers.find(points, plan(loss, 1, Along.TEMPERATURE, Scale.LOG));

        assertThat(findings.markers()).isEmpty();
        assertThat(findings.notes().get(0).code()).isEqualTo("FIGURE_MARKER_NO_LOGARITHM");
        assertThat(only(FigureMarkers.find(points, plan(loss, 1, Along.TEMPERATURE, Scale.LINEAR)))
                        .value())
                .isCloseTo(310, within(1.0));
    }

    @Test
    void onePlaceIsNoCurve() {
        FigureMarkerPlan elsewhere = new FigureMarkerPlan(
                "found", STIFFNESS, 1, Along.TEMPERATURE, Scale.LOG, ANY, OptionalDouble.of(9), Optional.empty());

        Findings findings = FigureMarkers.find(ramp(20, 40), elsewhere);

        assertThat(findings.notes().get(0).sentence())
                .isEqualTo("no found: no specimen has complex_modulus at two places along temperature at 9 Hz");
    }

    /** Over 500 draws of 1 % noise, the scatter of the marker is what its u says, to 10 %. */
    @Test
    void theUncertaintyIsTheScatter() {
        FigureMarkerPlan plan = new FigureMarkerPlan(
                "found", ANGLE, 57, Along.TEMPERATURE, Scale.LOG, ANY, ANY, Optional.of(STIFFNESS));
        Random random = new Random(42);
        List<Double> values = new ArrayList<>();
        double u = 0;
        for (int draw = 0; draw < 1000; draw++) {
            List<ModulusPoint> points = IntStream.range(0, 25)
                    .mapToObj(i -> 20.0 + i)
                    .map(t -> TestPoints.point()
                            .at(t + ZERO_C)
                            .modulus(new Complex(
                                    binder(t).re() * (1 + 0.01 * random.nextGaussian()),
                                    binder(t).im() * (1 + 0.01 * random.nextGaussian())))
                            .build())
                    .toList();
            Marker marker = only(FigureMarkers.find(points, plan));
            values.add(marker.value());
            u += marker.u().orElseThrow() / 1000;
        }
        double mean = values.stream().mapToDouble(v -> v).average().orElseThrow();
        double scatter = Math.sqrt(values.stream()
                .mapToDouble(v -> (v - mean) * (v - mean))
                .average()
                .orElseThrow());

        assertThat(scatter / u).isCloseTo(1, within(0.05));
    }

    /** δ falls by 4° over 200 points, each known to a third of a degree: it passes 45° at 10 Hz, its noise many times about it. */
    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5, 6, 7, 8})
    void crossingsThatNoiseAloneCanMakeAreOne(long seed) {
        List<ModulusPoint> points = noisy(200, 4, seed);
        Findings found = FigureMarkers.find(
                points, plan(Figure.column(PointQuantity.TAN_DELTA), 1, Along.FREQUENCY, Scale.LINEAR));

        long crossings = IntStream.range(1, points.size())
                .filter(i -> aboveOne(points.get(i)) != aboveOne(points.get(i - 1)))
                .count();
        assertThat(crossings).isGreaterThan(10);
        // beside the middle a point in some hundreds is more than 3 u away by chance, and parts them
        assertThat((long) found.markers().size()).isLessThanOrEqualTo(crossings / 4);
        Marker widest = found.markers().stream()
                .filter(marker -> marker.method().contains("crossings that noise alone can make"))
                .max(Comparator.comparingDouble(marker -> marker.u().orElseThrow()))
                .orElseThrow();
        assertThat(widest.value()).isCloseTo(10, within(2 * widest.u().orElseThrow()));
    }

    private static boolean aboveOne(ModulusPoint point) {
        return PointQuantity.TAN_DELTA.of(point).orElseThrow() > 1;
    }

    /** One point of a hump is above the value, by less than its noise, and the curve through all stays below. */
    @Test
    void thereAndBackByNoiseAloneIsNoCrossing() {
        List<ModulusPoint> points = IntStream.rangeClosed(-4, 4)
                .mapToObj(i -> TestPoints.point()
                        .named("1", "ramp", "p" + (i + 5), "bench/" + (i + 5) + ".csv")
                        .at(ZERO_C + 40 + 5 * i)
                        .modulus(new Complex(1e4 * Math.exp(0.01 * (i == 0 ? 0.3 : -0.6 - i * i)), 0))
                        .build())
                .toList();

        Findings findings = FigureMarkers.find(points, plan(STIFFNESS, 1e4, Along.TEMPERATURE, Scale.LOG));

        assertThat(findings.markers()).isEmpty();
        assertThat(findings.notes())
                .extracting(note -> note.sentence())
                .containsExactly(
                        "no found of specimen 1, sweep ramp at 1 Hz near 35 °C: complex_modulus comes near 10000 Pa"
                                + " there, and noise alone takes it across and back");
    }

    /**
     * One relaxation time of 1 s, ω² /(1 + ω²) of 1 Pa, a third of it at ω = √½ (exact). Straight lines between four points a
     * decade err by up to 3 %.
     */
    @ParameterizedTest(name = "grid moved by {0} of its step")
    @ValueSource(doubles = {0, 0.2, 0.4, 0.6, 0.8})
    void betweenSparseFrequenciesTheCurveIsFollowed(double moved) {
        List<ModulusPoint> points = IntStream.range(0, 13)
                .mapToObj(i -> {
                    double omega = Math.pow(10, (i - 6 + moved) / 4);
                    return TestPoints.point()
                            .named("1", "s", "p" + i, "bench/" + i + ".csv")
                            .hz(omega / (2 * Math.PI))
                            .modulus(new Complex(omega * omega, omega).times(1 / (1 + omega * omega)))
                            .relativeU(1e-6)
                            .build();
                })
                .toList();

        Marker marker = only(FigureMarkers.find(
                points, plan(Figure.column(PointQuantity.STORAGE_MODULUS), 1 / 3.0, Along.FREQUENCY, Scale.LOG)));

        double exact = Math.sqrt(0.5) / (2 * Math.PI);
        assertThat(marker.value()).isCloseTo(exact, withPercentage(0.2));
        assertThat(marker.u().orElseThrow()).isGreaterThan(Math.abs(marker.value() - exact) / 2);
    }

    /** Far apart for their u, both ways through the value are told. */
    @Test
    void crossingsThatNoiseCannotMakeStayApart() {
        List<ModulusPoint> points = IntStream.range(0, 8)
                .mapToObj(i -> TestPoints.point()
                        .named("1", "s", "p" + i, "bench/" + i + ".csv")
                        .hz(1 + i)
                        .modulus(Complex.polar(1e3, Math.toRadians(i % 2 == 0 ? 43 : 47)))
                        .relativeU(0.008)
                        .build())
                .toList();

        assertThat(FigureMarkers.find(
                                points, plan(Figure.column(PointQuantity.TAN_DELTA), 1, Along.FREQUENCY, Scale.LINEAR))
                        .markers())
                .hasSize(7);
    }

    /** The thermometer lags by 4 K: heating reaches 10 kPa at a reading of 42 °C, cooling at one of 38 °C (exact). */
    @Test
    void heatingAndCoolingOfOneRampAreTwoCurves() {
        List<ModulusPoint> turned = new ArrayList<>();
        for (int i = 0; i < 11; i++) {
            turned.add(lagging(i, 20 + 4 * i, 2));
        }
        for (int i = 0; i < 10; i++) {
            turned.add(lagging(11 + i, 58 - 4 * i, -2));
        }

        Findings found = FigureMarkers.find(turned, plan(STIFFNESS, 1e4, Along.TEMPERATURE, Scale.LOG));

        assertThat(found.notes()).isEmpty();
        assertThat(found.markers()).hasSize(2);
        assertThat(found.markers().get(0).value()).isCloseTo(42 + ZERO_C, within(1e-9));
        assertThat(found.markers().get(0).method()).endsWith("; leg 1, heating");
        assertThat(found.markers().get(1).value()).isCloseTo(38 + ZERO_C, within(1e-9));
        assertThat(found.markers().get(1).method()).endsWith("; leg 2, cooling");
    }

    private static ModulusPoint lagging(int number, double celsius, double lagK) {
        return SeriesPoint.of(number, celsius + ZERO_C, 1.6)
                .after(60 * number)
                .modulus(binder(celsius - lagK), 0.01)
                .build();
    }

    /** Cooling stops before the stiffness is back, which is said. */
    @Test
    void aLegThatDoesNotReachTheValueIsNamed() {
        List<ModulusPoint> turned = new ArrayList<>();
        for (int i = 0; i < 11; i++) {
            turned.add(lagging(i, 30 + 2 * i, 0));
        }
        for (int i = 0; i < 4; i++) {
            turned.add(lagging(11 + i, 48 - 2 * i, 0));
        }

        Findings found = FigureMarkers.find(turned, plan(STIFFNESS, 1e4, Along.TEMPERATURE, Scale.LOG));

        assertThat(found.markers()).hasSize(1);
        assertThat(found.notes()).hasSize(1);
        assertThat(found.notes().get(0).sentence())
                .startsWith(
                        "no found of specimen 1, sweep 1 at 1.6 Hz (leg 2, cooling): complex_modulus stays between");
    }

    /** 200 draws: without u the scatter about the neighbours takes its place, and holds as often as it says. */
    @Test
    void whereThePointsBringNoUncertaintyTheScatterTakesItsPlace() {
        int held = 0;
        int found = 0;
        double sum = 0;
        for (long seed = 1; seed <= 200; seed++) {
            List<ModulusPoint> bare = noisy(30, 40, seed).stream()
                    .map(FigureMarkersTest::withoutU)
                    .toList();
            Findings findings = FigureMarkers.find(bare, plan(ANGLE, 45, Along.FREQUENCY, Scale.LINEAR));
            for (Marker marker : findings.markers()) {
                assertThat(marker.method()).endsWith("; u from the scatter about neighbouring points");
                double u = marker.u().orElseThrow();
                found++;
                held += Math.abs(marker.value() - 10) <= 1.96 * u ? 1 : 0;
                sum += u;
            }
        }
        assertThat(found).isEqualTo(200);
        // u(δ) = √½ · 0.8 % rad at 45°, 20° a decade; a curve through all thirty is better known than each of them
        double widest = 10 * Math.log(10) * Math.toDegrees(0.008 * Math.sqrt(0.5)) / 20;
        assertThat(sum / found).isBetween(0.4 * widest, 0.7 * widest);
        assertThat(held / (double) found).isBetween(0.90, 0.98);
    }

    @Test
    void ofAFewPointsWithoutUncertaintyThereIsNoneAndTheMethodSaysSo() {
        List<ModulusPoint> bare = sweep(1, 10, 30, 33, 100).stream()
                .map(FigureMarkersTest::withoutU)
                .toList();

        Marker marker = only(FigureMarkers.find(bare, plan(ANGLE, 45, Along.FREQUENCY, Scale.LINEAR)));

        assertThat(marker.value()).isCloseTo(Math.pow(10, 1.5), withPercentage(1e-9));
        assertThat(marker.u()).isEmpty();
        assertThat(marker.method()).endsWith("; no u, for the points bring none and are too few to tell their scatter");
    }

    private static ModulusPoint withoutU(ModulusPoint point) {
        Moduli moduli = point.moduli().orElseThrow();
        return TestPoints.point()
                .named("1", "s", point.key().point(), point.key().sourceFile())
                .at(point.temperatureK().orElseThrow())
                .hz(point.frequencyHz().orElseThrow())
                .modulus(moduli.complex())
                .relativeU(0)
                .build();
    }

    /** From 1 to 100 Hz. */
    private static List<ModulusPoint> noisy(int count, double fallDegrees, long seed) {
        Random random = new Random(seed);
        double relativeU = 0.008;
        return IntStream.range(0, count)
                .mapToObj(i -> {
                    double part = i / (count - 1.0);
                    Complex exact = Complex.polar(1e3, Math.toRadians(45 + fallDegrees * (0.5 - part)));
                    return TestPoints.point()
                            .named("1", "s", "p" + i, "bench/" + i + ".csv")
                            .hz(Math.pow(100, part))
                            .modulus(new Complex(
                                    exact.re() * (1 + relativeU * random.nextGaussian()),
                                    exact.im() * (1 + relativeU * random.nextGaussian())))
                            .relativeU(relativeU)
                            .build();
                })
                .toList();
    }
}
