package nightlag.stages.sweep;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;
import static org.assertj.core.data.Percentage.withPercentage;

import java.util.ArrayList;
import java.util.List;
import java.util.OptionalDouble;
import java.util.Random;
import java.util.function.DoubleFunction;
import java.util.function.DoubleUnaryOperator;
import java.util.stream.Stream;
import nightlag.stages.moduli.Findings;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.numeric.Complex;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;
import org.junit.jupiter.params.provider.ValueSource;

class FrequencyMarkersValidationTest {
    private static final MarkerPlace PLACE = new MarkerPlace(new SweepName("1", "2"), OptionalDouble.of(423.15));
    private static final double BAR = 0.2;

    static Stream<Arguments> crossovers() {
        return Stream.of(
                // exact: ω = 1/τ at half the modulus
                Arguments.of("Maxwell", MarkerModel.maxwell(2e5, 0.25), 4.0, 1e5),
                // Laun, Rheol. Acta 17 (1978) 1, from memory: low-density polyethylene at 150 °C; exact given the modes
                Arguments.of(
                        "Laun 1978",
                        MarkerModel.maxwell(
                                1.29e5, 1e-4, 9.48e4, 1e-3, 5.86e4, 1e-2, 2.67e4, 1e-1, 9.80e3, 1, 1.89e3, 10, 1.80e2,
                                100, 1.00, 1000),
                        1.604072,
                        9806.011),
                // linear part of pom-pom parameters (Verbeeten, Peters & Baaijens 2001), from memory; exact given the
                // modes
                Arguments.of(
                        "four modes of a polyethylene",
                        MarkerModel.maxwell(
                                7.2006e4, 3.8946e-3, 1.5770e4, 5.1390e-2, 3.3340e3, 5.0349e-1, 3.0080e2, 4.5911),
                        30.266165,
                        15765.07),
                Arguments.of(
                        "six modes of a polyethylene",
                        MarkerModel.maxwell(
                                2.1662e4, 0.1, 9.9545e3, 0.63096, 3.7775e3, 3.9811, 9.6955e2, 25.119, 1.1834e2, 158.49,
                                4.1614, 1000),
                        0.92289674,
                        7310.86),
                // exact, see there
                springpots(0.8, 0.2),
                springpots(0.9, 0.4));
    }

    private static Arguments springpots(double alpha, double beta) {
        double place = MarkerModel.springpotCrossover(alpha, beta);
        Complex there = MarkerModel.springpots(alpha, beta).apply(place);
        assertThat(there.im()).isCloseTo(there.re(), withPercentage(1e-9));
        return Arguments.of(
                "springpots " + alpha + " and " + beta, MarkerModel.springpots(alpha, beta), place, there.re());
    }

    @ParameterizedTest(name = "{0}")
    @MethodSource("crossovers")
    void withoutNoiseACrossoverIsWithinItsBar(
            String name, DoubleFunction<Complex> model, double angularFrequency, double modulusPa) {
        for (int perDecade : new int[] {4, 5, 7, 10, 20}) {
            double[] places = MarkerModel.decades(angularFrequency / 137, angularFrequency * 211, perDecade);

            Findings found = FrequencyMarkers.of(PLACE, MarkerModel.readings(model, places, 0, new Random(1)));

            Marker place = only(found, "crossover_angular_frequency");
            assertThat(place.value()).as("%d a decade", perDecade).isCloseTo(angularFrequency, withPercentage(BAR));
            assertThat(place.frequencyHz().orElseThrow()).isEqualTo(place.value() / (2 * Math.PI));
            assertThat(place.temperatureK()).hasValue(423.15);
            Marker modulus = only(found, "crossover_modulus");
            assertThat(modulus.value()).as("%d a decade", perDecade).isCloseTo(modulusPa, withPercentage(BAR));
            assertThat(modulus.unit()).isEqualTo("Pa");
        }
    }

    /** Waves of the single modes pass between the frequencies; the bar cannot be met, and u says so. */
    @ParameterizedTest(name = "{0}")
    @MethodSource("crossovers")
    void whereFrequenciesAreSparseTheUncertaintySaysSo(
            String name, DoubleFunction<Complex> model, double angularFrequency, double modulusPa) {
        for (int perDecade : new int[] {2, 3}) {
            for (int start = 0; start < 4; start++) {
                double first = angularFrequency / 137 * Math.pow(10, start / (4.0 * perDecade));
                double[] places = MarkerModel.decades(first, first * 28907, perDecade);

                Findings found = FrequencyMarkers.of(PLACE, MarkerModel.readings(model, places, 0, new Random(1)));

                Marker place = only(found, "crossover_angular_frequency");
                assertThat(place.value())
                        .as("%d a decade from %s", perDecade, first)
                        .isCloseTo(angularFrequency, within(2 * place.u().orElseThrow()));
                Marker modulus = only(found, "crossover_modulus");
                assertThat(modulus.value())
                        .as("%d a decade from %s", perDecade, first)
                        .isCloseTo(modulusPa, within(2 * modulus.u().orElseThrow()));
            }
        }
    }

    /** Two modes a thousand apart cross three times: terminal zone to plateau, out of it, and into the glass. */
    @Test
    void everyCrossoverIsARow() {
        DoubleFunction<Complex> model = MarkerModel.maxwell(1, 1000, 30, 1);
        DoubleUnaryOperator excess = place -> excess(model, place);
        double[] truth = {
            MarkerModel.root(excess, 1e-4, 5e-3),
            MarkerModel.root(place -> -excess.applyAsDouble(place), 5e-3, 0.1),
            MarkerModel.root(excess, 0.1, 10)
        };

        Findings found = FrequencyMarkers.of(
                PLACE, MarkerModel.readings(model, MarkerModel.decades(1e-4, 100, 10), 0, new Random(1)));

        List<Marker> places = MarkerModel.named(found.markers(), "crossover_angular_frequency");
        List<Marker> moduli = MarkerModel.named(found.markers(), "crossover_modulus");
        assertThat(places).hasSize(3);
        assertThat(moduli).hasSize(3);
        for (int i = 0; i < 3; i++) {
            assertThat(places.get(i).value()).isCloseTo(truth[i], withPercentage(BAR));
            assertThat(moduli.get(i).value()).isCloseTo(model.apply(truth[i]).re(), withPercentage(BAR));
        }
    }

    private static double excess(DoubleFunction<Complex> model, double place) {
        Complex modulus = model.apply(place);
        return modulus.re() - modulus.im();
    }

    @ParameterizedTest(name = "{0} a decade")
    @ValueSource(ints = {5, 10, 20})
    void thePlateauIsTheStorageModulusAtTheLowestLossFactor(int perDecade) {
        DoubleFunction<Complex> model = MarkerModel.maxwell(1e5, 100, 3e6, 1e-4, 5e4, 3);
        double lowest = MarkerModel.root(
                place -> lossFactor(model, place * 1.0001) - lossFactor(model, place / 1.0001), 0.05, 100);

        Findings found = FrequencyMarkers.of(
                PLACE, MarkerModel.readings(model, MarkerModel.decades(1e-3, 1e4, perDecade), 0, new Random(1)));

        Marker plateau = only(found, "plateau_modulus");
        assertThat(plateau.value()).isCloseTo(model.apply(lowest).re(), withPercentage(BAR));
        assertThat(plateau.frequencyHz().orElseThrow() * 2 * Math.PI).isCloseTo(lowest, withPercentage(5));
    }

    static double lossFactor(DoubleFunction<Complex> model, double place) {
        Complex modulus = model.apply(place);
        return modulus.im() / modulus.re();
    }

    @Test
    void withoutACrossoverTheReasonSaysWhichModulusIsLarger() {
        Findings found = FrequencyMarkers.of(
                PLACE,
                MarkerModel.readings(
                        MarkerModel.maxwell(2e5, 0.25), MarkerModel.decades(0.2, 2, 8), 0.01, new Random(1)));

        assertThat(found.markers()).isEmpty();
        assertThat(found.notes())
                .extracting(note -> note.sentence())
                .containsExactly(
                        "specimen 1, sweep 2 at 150.0 °C: no crossover, the loss modulus exceeds the storage modulus"
                                + " throughout, from 0.2 to 2 rad/s",
                        "specimen 1, sweep 2 at 150.0 °C: no plateau modulus, for tan δ has no minimum below 1 inside the"
                                + " data that noise could not make");
    }

    /** The last frequency is that of the crossover itself: which side comes next nobody has measured. */
    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5, 6, 7, 8})
    void atTheEdgeOfTheDataNoCrossoverIsGuessed(long seed) {
        Findings found = FrequencyMarkers.of(
                PLACE,
                MarkerModel.readings(
                        MarkerModel.maxwell(2e5, 0.25), MarkerModel.decades(0.04, 4, 10), 0.01, new Random(seed)));

        assertThat(found.markers()).isEmpty();
        assertThat(found.notes()).extracting(note -> note.code()).contains("MARKER_CROSSOVER_UNCLEAR");
    }

    /** Exact: tan δ of (iω)^½ is 1 at every frequency (Winter & Chambon, J. Rheol. 30 (1986) 367). */
    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5, 6, 7, 8})
    void noiseAloneMakesNoCrossover(long seed) {
        DoubleFunction<Complex> gel = place -> Complex.polar(1000 * Math.sqrt(place), Math.PI / 4);

        Findings found = FrequencyMarkers.of(
                PLACE, MarkerModel.readings(gel, MarkerModel.decades(0.01, 100, 20), 0.01, new Random(seed)));

        assertThat(found.markers()).isEmpty();
    }

    @Test
    void withoutUncertaintiesTheScatterSaysHowWellItIsKnown() {
        List<ModulusReading> told = MarkerModel.readings(
                MarkerModel.maxwell(2e5, 0.25), MarkerModel.decades(0.04, 400, 10), 0.01, new Random(3));
        List<ModulusReading> bare = told.stream()
                .map(reading -> new ModulusReading(
                        reading.angularFrequency(),
                        SeriesPoint.exact(
                                reading.moduli().storagePa(), reading.moduli().lossPa(), 0)))
                .toList();

        Marker known = only(FrequencyMarkers.of(PLACE, told), "crossover_angular_frequency");
        Marker place = only(FrequencyMarkers.of(PLACE, bare), "crossover_angular_frequency");

        assertThat(place.u().orElseThrow() / known.u().orElseThrow()).isBetween(0.6, 2.0);
        assertThat(place.value()).isCloseTo(4, within(1.96 * place.u().orElseThrow()));
    }

    @Test
    void aMasterCurveOfManyPointsIsTakenInStretches() {
        DoubleFunction<Complex> model = MarkerModel.maxwell(1, 1000, 30, 1);
        List<ModulusReading> readings = new ArrayList<>();
        for (int isotherm = 0; isotherm < 9; isotherm++) {
            double from = 1e-4 * Math.pow(10, 0.4 * isotherm);
            readings.addAll(MarkerModel.readings(
                    model, MarkerModel.decades(from, 1000 * from, 10), 0.01, new Random(isotherm)));
        }

        Findings found = FrequencyMarkers.of(MarkerPlace.masterCurve(423.15), readings);

        assertThat(MarkerModel.named(found.markers(), "crossover_angular_frequency"))
                .hasSize(3);
        assertThat(found.markers())
                .allSatisfy(marker -> assertThat(marker.sweep()).isEmpty());
    }

    private static Marker only(Findings found, String property) {
        List<Marker> markers = MarkerModel.named(found.markers(), property);
        assertThat(markers).as(property).hasSize(1);
        return markers.get(0);
    }
}
