package nightlag.stages.acceptance;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;
import static org.assertj.core.data.Percentage.withPercentage;

import java.util.ArrayList;
import java.util.List;
import java.util.OptionalDouble;
import java.util.Random;
import java.util.stream.DoubleStream;
import java.util.stream.Stream;
import nightlag.stages.TestPoints;
import nightlag.stages.moduli.Figure;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.PointQuantity;
import nightlag.stages.moduli.Quality;
import nightlag.stages.moduli.SharedEffect;
import nightlag.stages.numeric.Complex;
import nightlag.stages.superposition.MasterCurve;
import nightlag.stages.sweep.OwnFigures;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** Lots against limits, on materials whose value there is known in closed form. */
class AcceptanceTest {
    private static final Limits STIFFNESS = Limits.on("storage_modulus");

    /** ln |G*| is straight in ln f and in T: 1 kPa at 190 °C and 1 Hz, +0.6 for a factor e of f, −0.03 for a kelvin; δ = 60°. */
    private static Complex paste(double celsius, double hertz) {
        return Complex.polar(1000 * Math.pow(hertz, 0.6) * Math.exp(-0.03 * (celsius - 190)), Math.toRadians(60));
    }

    private static double stiffness(double celsius, double hertz) {
        return paste(celsius, hertz).re();
    }

    private static TestPoints at(double celsius, double hertz) {
        return TestPoints.point()
                .named("1", "1", celsius + "/" + hertz, "bench/" + celsius + "-" + hertz + ".csv")
                .at(celsius + Limits.ZERO_C)
                .hz(hertz)
                .modulus(paste(celsius, hertz));
    }

    private static List<ModulusPoint> sweep(double celsius, double... hertz) {
        return DoubleStream.of(hertz).mapToObj(f -> at(celsius, f).build()).toList();
    }

    private static Judgement judge(List<ModulusPoint> points, LimitPlan limit, Lot.Moved... moved) {
        return Acceptance.of(List.of(limit), OwnFigures.NONE, new Lot(points, List::of), List.of(moved))
                .get(0);
    }

    private static Judgement judge(List<Marker> markers, Limits limit, Lot.Moved... moved) {
        return Acceptance.of(
                        List.of(limit.guarded(2)), OwnFigures.NONE, new Lot(List.of(), () -> markers), List.of(moved))
                .get(0);
    }

    private static List<ModulusPoint> together(List<ModulusPoint> some, List<ModulusPoint> others) {
        return Stream.concat(some.stream(), others.stream()).toList();
    }

    @Test
    void aPointAtThePlaceIsTheValue() {
        Judgement judged = judge(sweep(190, 1), STIFFNESS.from(480).guarded(2));
        assertThat(judged.value().orElseThrow()).isCloseTo(stiffness(190, 1), withPercentage(1e-10));
        assertThat(judged.u().orElseThrow()).isCloseTo(0.01 * stiffness(190, 1), withPercentage(0.01));
        assertThat(judged.verdict()).isEqualTo(Verdict.CONFORMING);
        assertThat(judged.note()).isEmpty();
    }

    @Test
    void aPointBesideThePlaceIsMovedByTheLocalSlopes() {
        // 0.4 K and 0.8 % off, one percent of noise; its neighbours are 5 K and a factor of 2 away
        List<ModulusPoint> points =
                together(sweep(190.4, 0.5, 1.008, 2), together(sweep(185, 0.5, 1.008, 2), sweep(195, 0.5, 1.008, 2)));
        Judgement judged = judge(points, STIFFNESS.from(1).guarded(2));
        assertThat(judged.value().orElseThrow()).isCloseTo(stiffness(190, 1), withPercentage(1e-6));
        // the neighbours tell the slope over temperature to 1 %/(10 K)·√2 and a bit, over a way of 0.4 K
        assertThat(judged.u().orElseThrow() / stiffness(190, 1))
                .isCloseTo(Math.hypot(0.01, 0.4 * 0.01 * Math.sqrt(2) / 10), within(1e-5));
    }

    @Test
    void whereNoOtherTemperatureTellsHowThePointStaysAndTheNoteSaysSo() {
        Judgement judged = judge(sweep(190.4, 0.5, 1, 2), STIFFNESS.from(1).guarded(2));
        assertThat(judged.value().orElseThrow()).isCloseTo(stiffness(190.4, 1), withPercentage(1e-6));
        assertThat(judged.note()).contains("measured at 190.4 °C and not moved");
    }

    @Test
    void allPointsThereAreAveragedByWeight() {
        ModulusPoint sure = at(190, 1).relativeU(0.01).build();
        ModulusPoint vague =
                at(190, 1).modulus(paste(190, 1).times(1.02)).relativeU(0.02).build();
        Judgement judged = judge(List.of(sure, vague), STIFFNESS.from(1).guarded(2));
        // ln X: (4·0 + 1·ln 1.02)/5; each apart from the mean by less than its u, so u = 0.01/√1.25
        assertThat(Math.log(judged.value().orElseThrow() / stiffness(190, 1)))
                .isCloseTo(Math.log(1.02) / 5, within(1e-5));
        assertThat(judged.u().orElseThrow() / judged.value().orElseThrow())
                .isCloseTo(0.01 / Math.sqrt(1.25), within(1e-5));
        assertThat(judged.note()).isEqualTo("mean of 2 points");
    }

    @Test
    void uIsNoSmallerThanTheScatterOfThePointsAllows() {
        List<ModulusPoint> scattered = DoubleStream.of(0.9, 1.0, 1.1)
                .mapToObj(factor -> at(190, 1)
                        .modulus(paste(190, 1).times(factor))
                        .relativeU(1e-4)
                        .build())
                .toList();
        Judgement judged = judge(scattered, STIFFNESS.from(1).guarded(2));
        // standard deviation of ln 0.9, 0 and ln 1.1 over √3
        assertThat(judged.u().orElseThrow() / judged.value().orElseThrow()).isCloseTo(0.05795, within(2e-4));
    }

    @Test
    void betweenFrequenciesItIsInterpolatedAndSaid() {
        Judgement judged = judge(sweep(190, 0.25, 0.5, 2, 4), STIFFNESS.from(1).guarded(2));
        assertThat(judged.value().orElseThrow()).isCloseTo(stiffness(190, 1), withPercentage(1e-9));
        // half way: the mean of two values of 1 %
        assertThat(judged.u().orElseThrow() / stiffness(190, 1)).isCloseTo(0.01 / Math.sqrt(2), within(1e-6));
        assertThat(judged.note()).isEqualTo("interpolated over frequency between 0.5 Hz and 2 Hz");
    }

    @Test
    void betweenIsothermsItIsInterpolatedAndSaid() {
        List<ModulusPoint> points =
                together(sweep(180, 0.5, 1, 2), together(sweep(195, 0.5, 2, 4), sweep(210, 0.5, 2, 4)));
        Judgement judged = judge(points, STIFFNESS.from(1).guarded(2));
        assertThat(judged.value().orElseThrow()).isCloseTo(stiffness(190, 1), withPercentage(1e-9));
        assertThat(judged.note())
                .isEqualTo("interpolated between the isotherms at 180 °C and 195 °C; and within them over frequency");
    }

    @Test
    void whatACurveDoesBesideAStraightLineIsInTheUncertainty() {
        // tan δ of a Maxwell element, 1/(ωτ), is straight; its storage modulus (ωτ)²/(1 + (ωτ)²) is not
        List<ModulusPoint> points = DoubleStream.of(0.1, 0.3, 1, 3, 10)
                .mapToObj(f -> at(190, f)
                        .modulus(new Complex(1e4 * f * f / (1 + f * f), 1e4 * f / (1 + f * f)))
                        .relativeU(1e-6)
                        .build())
                .toList();
        for (double hertz : new double[] {0.17, 0.55, 1.8, 5.5}) {
            Judgement judged = judge(points, STIFFNESS.at(190, hertz).from(1).guarded(2));
            double truth = 1e4 * hertz * hertz / (1 + hertz * hertz);
            double error = Math.abs(judged.value().orElseThrow() - truth);
            assertThat(error)
                    .isGreaterThan(0.01 * truth)
                    .isLessThan(2 * judged.u().orElseThrow());
        }
    }

    @ParameterizedTest(name = "{0} °C")
    @ValueSource(doubles = {179, 211})
    void beyondTheIsothermsNothingIsSaid(double celsius) {
        List<ModulusPoint> points = together(sweep(180, 0.5, 1, 2), sweep(210, 0.5, 1, 2));
        Judgement judged = judge(points, STIFFNESS.at(celsius, 1).from(1).guarded(2));
        assertThat(judged.verdict()).isEqualTo(Verdict.MISSING);
        assertThat(judged.value()).isEmpty();
        assertThat(judged.note()).isEqualTo("no usable point with storage_modulus there, nor on both sides of it");
    }

    @ParameterizedTest(name = "{0} Hz")
    @ValueSource(doubles = {0.4, 2.1})
    void beyondTheFrequenciesNothingIsSaid(double hertz) {
        Judgement judged =
                judge(sweep(190, 0.5, 1, 2), STIFFNESS.at(190, hertz).from(1).guarded(2));
        assertThat(judged.verdict()).isEqualTo(Verdict.MISSING);
    }

    @Test
    void doubtfulPointsCountAndTheNoteSaysSo() {
        List<ModulusPoint> points =
                List.of(at(190, 1).build(), at(190, 1).quality(Quality.DOUBTFUL).build());
        assertThat(judge(points, STIFFNESS.from(1).guarded(2)).note())
                .isEqualTo("mean of 2 points; doubtful: 1 of 2 points");
    }

    @Test
    void aPlaceWithUnusablePointsAloneIsMissingEvenBetweenOthers() {
        List<ModulusPoint> points = together(
                sweep(190, 0.5, 2), List.of(at(190, 1).quality(Quality.UNUSABLE).build()));
        Judgement judged = judge(points, STIFFNESS.from(1).guarded(2));
        assertThat(judged.verdict()).isEqualTo(Verdict.MISSING);
        assertThat(judged.note()).isEqualTo("only unusable points there: 1");
    }

    @Test
    void withoutUncertaintiesTheScatterOfRepeatsIsTheUncertainty() {
        List<ModulusPoint> points = DoubleStream.of(0.98, 1.02)
                .mapToObj(factor -> at(190, 1)
                        .modulus(paste(190, 1).times(factor))
                        .relativeU(0)
                        .build())
                .toList();
        Judgement judged = judge(points, STIFFNESS.from(1).guarded(2));
        assertThat(judged.u().orElseThrow() / judged.value().orElseThrow()).isCloseTo(0.02, within(1e-4));
    }

    @Test
    void withoutUncertaintiesTheScatterAboutACurveIsTheUncertainty() {
        Random random = new Random(3);
        List<ModulusPoint> points = new ArrayList<>();
        for (int i = -15; i <= 15; i++) {
            double hertz = Math.pow(10, i / 10.0);
            points.add(at(190, hertz)
                    .modulus(paste(190, hertz).times(Math.exp(0.02 * random.nextGaussian())))
                    .relativeU(0)
                    .build());
        }
        Judgement judged = judge(points, STIFFNESS.from(1).guarded(2));
        // a standard deviation from 31 values is itself uncertain by 13 %
        assertThat(judged.u().orElseThrow() / judged.value().orElseThrow()).isBetween(0.012, 0.028);
        assertThat(judged.note()).isEmpty();
    }

    @Test
    void whereThereIsNoUncertaintyAtAllThereIsNoGuardBandAndTheNoteSaysSo() {
        Judgement judged = judge(
                List.of(at(190, 1).relativeU(0).build()), STIFFNESS.from(499.9).guarded(2));
        assertThat(judged.u()).isEmpty();
        assertThat(judged.verdict()).isEqualTo(Verdict.CONFORMING);
        assertThat(judged.note()).isEqualTo("judged without a guard band, as no uncertainty is known");
    }

    @Test
    void whatRecordsShareDoesNotShrinkInAMean() {
        List<ModulusPoint> points =
                Stream.generate(() -> at(190, 1).build()).limit(100).toList();
        SharedEffect torque = new SharedEffect(0.03, 0, 0);
        List<ModulusPoint> off =
                points.stream().map(point -> point.moved(torque)).toList();
        Judgement judged = judge(
                points,
                STIFFNESS.from(1).guarded(2),
                new Lot.Moved("torque", OptionalDouble.empty(), new Lot(off, List::of)));
        assertThat(judged.u().orElseThrow() / judged.value().orElseThrow())
                .isCloseTo(Math.hypot(0.01 / Math.sqrt(100), Math.exp(0.03) - 1), within(1e-6));
        assertThat(judged.note()).isEqualTo("mean of 100 points; u holds that of torque");
    }

    @Test
    void theTemperatureEntersByTheSlope() {
        List<ModulusPoint> points =
                together(sweep(190, 0.5, 1, 2), together(sweep(180, 0.5, 1, 2), sweep(200, 0.5, 1, 2)));
        Lot.Moved warmer = new Lot.Moved("temperature", OptionalDouble.of(0.5), new Lot(points, List::of));
        Judgement judged = judge(points, STIFFNESS.from(1).guarded(2), warmer);
        assertThat(judged.u().orElseThrow() / judged.value().orElseThrow())
                .isCloseTo(Math.hypot(0.01, 0.03 * 0.5), within(1e-6));

        Judgement alone = judge(sweep(190, 0.5, 1, 2), STIFFNESS.from(1).guarded(2), warmer);
        assertThat(alone.note()).isEqualTo("what temperature leaves open of it is not known and not in u");
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5, 6})
    void anotherUnitChangesNothingButTheNumbers(long seed) {
        Random random = new Random(seed);
        List<TestPoints> made = new ArrayList<>();
        for (double celsius : new double[] {180, 190, 200}) {
            for (double hertz : new double[] {0.4, 0.9, 1.6, 3}) {
                made.add(at(celsius + random.nextDouble(-0.4, 0.4), hertz * random.nextDouble(0.95, 1.05))
                        .relativeU(random.nextDouble(0.001, 0.02)));
            }
        }
        double lowest = stiffness(190, 1) * random.nextDouble(0.95, 1.05);
        Judgement inPascals = judge(
                made.stream().map(TestPoints::build).toList(),
                STIFFNESS.from(lowest).guarded(2));
        Judgement inMegapascals = judge(
                made.stream()
                        .map(point -> point.modulus(point.modulus().times(1e-6)).build())
                        .toList(),
                STIFFNESS.from(1e-6 * lowest).guarded(2));
        assertThat(inMegapascals.verdict()).isEqualTo(inPascals.verdict());
        assertThat(1e6 * inMegapascals.value().orElseThrow())
                .isCloseTo(inPascals.value().orElseThrow(), withPercentage(1e-9));
        assertThat(1e6 * inMegapascals.u().orElseThrow())
                .isCloseTo(inPascals.u().orElseThrow(), withPercentage(1e-6));
    }

    @Test
    void aFigureThatIsNotAboveZeroIsTakenAsItIs() {
        Figure difference = new Figure(
                "difference",
                "Pa",
                "storage - loss",
                List.of(PointQuantity.STORAGE_MODULUS, PointQuantity.LOSS_MODULUS),
                values -> values.get(PointQuantity.STORAGE_MODULUS) - values.get(PointQuantity.LOSS_MODULUS));
        Judgement judged = Acceptance.of(
                        List.of(Limits.on("difference").to(0).guarded(2)),
                        new OwnFigures(List.of(difference), List.of()),
                        new Lot(sweep(190, 0.5, 2), List::of),
                        List.of())
                .get(0);
        double before = stiffness(190, 0.5) - paste(190, 0.5).im();
        double behind = stiffness(190, 2) - paste(190, 2).im();
        assertThat(judged.value().orElseThrow()).isCloseTo((before + behind) / 2, withPercentage(1e-6));
        assertThat(judged.verdict()).isEqualTo(Verdict.CONFORMING);
    }

    private static Marker marker(String specimen, double celsius, double value, double u) {
        return new Marker(
                specimen,
                specimen.isEmpty() ? "" : "1",
                "plateau_modulus",
                OptionalDouble.of(celsius + Limits.ZERO_C),
                OptionalDouble.empty(),
                value,
                u > 0 ? OptionalDouble.of(u) : OptionalDouble.empty(),
                "Pa",
                "for a test");
    }

    private static final Limits PLATEAU = Limits.onMarker("plateau_modulus").from(1000);

    @Test
    void ofSeveralSpecimensAtOnePlaceTheMeanCounts() {
        Judgement judged = judge(List.of(marker("A", 190, 1100, 10), marker("B", 190.2, 1120, 10)), PLATEAU);
        assertThat(judged.value()).hasValue(1110);
        assertThat(judged.u().orElseThrow()).isCloseTo(10, within(1e-9));
        assertThat(judged.note()).isEqualTo("mean of 2 sweeps");
    }

    @Test
    void ofSeveralPlacesTheWorstCounts() {
        Judgement judged = judge(List.of(marker("A", 190, 1100, 10), marker("A", 220, 900, 10)), PLATEAU);
        assertThat(judged.verdict()).isEqualTo(Verdict.NONCONFORMING);
        assertThat(judged.value()).hasValue(900);
        assertThat(judged.note()).isEqualTo("the worst of 2: specimen A, sweep 1, at 220 °C");
    }

    @Test
    void aTemperatureInTheLimitPicksThePlace() {
        List<Marker> both = List.of(marker("A", 190, 1100, 10), marker("A", 220, 900, 10));
        assertThat(judge(both, PLATEAU.atTemperature(190)).value()).hasValue(1100);
        Judgement elsewhere = judge(both, PLATEAU.atTemperature(205));
        assertThat(elsewhere.verdict()).isEqualTo(Verdict.MISSING);
        assertThat(elsewhere.note()).isEqualTo("the lot has 2 of plateau_modulus, none of them there");
    }

    /** A sweep at one temperature gives the same figure wherever its thermometer is off; the neighbours tell what that costs. */
    @Test
    void theTemperatureOfAFigureHeldAtOneEntersByItsNeighbours() {
        List<Marker> markers = List.of(
                marker("A", 180, 1100 * Math.exp(0.3), 11),
                marker("B", 190, 1100, 11),
                marker("C", 200, 1100 * Math.exp(-0.3), 11));
        Lot.Moved warmer = new Lot.Moved("temperature", OptionalDouble.of(0.5), new Lot(List.of(), () -> markers));

        Judgement judged = judge(markers, PLATEAU.atTemperature(190), warmer);
        assertThat(judged.u().orElseThrow() / judged.value().orElseThrow())
                .isCloseTo(Math.hypot(0.01, 0.03 * 0.5), within(1e-9));
        assertThat(judged.note()).endsWith("u holds that of temperature");

        List<Marker> alone = List.of(markers.get(1));
        assertThat(judge(alone, PLATEAU, warmer).note())
                .endsWith("what temperature leaves open of it is not known and not in u");
    }

    @Test
    void aMarkerOfTheWholeLotGoesBeforeThoseOfItsSweeps() {
        assertThat(judge(List.of(marker("A", 190, 900, 10), marker("", 190, 1100, 10)), PLATEAU)
                        .value())
                .hasValue(1100);
    }

    @Test
    void aFigureOfAMasterCurveThatDoesNotSuperposeIsJudgedAndSaysSo() {
        Marker inDoubt = marker("", 190, 1100, 10).saying(MasterCurve.IN_DOUBT);

        assertThat(judge(List.of(inDoubt), PLATEAU).note()).contains("of a master curve that does not superpose");
        assertThat(judge(List.of(marker("", 190, 1100, 10)), PLATEAU).note()).doesNotContain("superpose");
    }

    @Test
    void aMarkerThatIsNotThereIsMissing() {
        Judgement judged = judge(List.<Marker>of(), PLATEAU);
        assertThat(judged.verdict()).isEqualTo(Verdict.MISSING);
        assertThat(judged.note()).isEqualTo("the lot has no plateau_modulus");
    }
}
