package nightlag.stages.sweep;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Random;
import java.util.function.DoubleUnaryOperator;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import nightlag.stages.Study;
import nightlag.stages.fault.Reason;
import nightlag.stages.moduli.Findings;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModuliCovariance;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.moduli.SharedErrors;
import nightlag.stages.numeric.Complex;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.MethodSource;
import org.junit.jupiter.params.provider.ValueSource;

/** Flow curves by the rule of Cox and Merz, against published constants of laws that made the data. */
class FlowCurveValidationTest {
    private static final double NORMAL_95 = 1.959964;

    /**
     * A Carreau fluid at 298 K (Bird, Armstrong &amp; Hassager, Dynamics of Polymeric Liquids, from memory).
     *
     * @param zeroPaS viscosity at zero rate, Pa·s
     * @param infinitePaS viscosity at infinite rate, Pa·s
     * @param timeS time, s
     * @param exponent n
     * @param at1 viscosity at 1/s, Pa·s, exact
     * @param at100 viscosity at 100/s, Pa·s, exact
     */
    record Fluid(
            String name, double zeroPaS, double infinitePaS, double timeS, double exponent, double at1, double at100) {
        double viscosity(double rate) {
            return infinitePaS + (zeroPaS - infinitePaS) * Math.pow(1 + Math.pow(timeS * rate, 2), (exponent - 1) / 2);
        }

        @Override
        public String toString() {
            return name;
        }
    }

    static Stream<Fluid> fluids() {
        return Stream.of(
                new Fluid("2 % polyisobutylene in a mineral oil", 923, 0.150, 191, 0.358, 31.8241, 1.79705),
                new Fluid("5 % polystyrene in a chlorinated oil", 101, 0.059, 0.84, 0.380, 85.6022, 6.53036),
                new Fluid("0.75 % polyacrylamide in water and glycerol", 10.6, 0.010, 8.04, 0.364, 2.80919, 0.160367),
                new Fluid("7 % aluminium soap", 89.6, 0.010, 1.41, 0.200, 57.8331, 1.71953));
    }

    private static List<ModulusReading> readings(
            DoubleUnaryOperator viscosity, double lowest, double highest, int perDecade, double noise, Random random) {
        List<ModulusReading> readings = new ArrayList<>();
        int steps = (int) Math.round(perDecade * Math.log10(highest / lowest));
        for (int i = 0; i <= steps; i++) {
            double rate = lowest * Math.pow(highest / lowest, (double) i / steps);
            double modulus = rate * viscosity.applyAsDouble(rate);
            // any phase of a liquid will do: the rule reads |G*| alone
            double phase = Math.PI / 2 * (1 - 0.6 * i / steps);
            Complex g = Complex.polar(modulus, phase);
            double u = noise > 0 ? noise * modulus : 0.01 * modulus;
            readings.add(new ModulusReading(
                    rate,
                    new Moduli(
                            g.re() + noise * modulus * random.nextGaussian(),
                            g.im() + noise * modulus * random.nextGaussian(),
                            Optional.of(new ModuliCovariance(u * u, u * u, 0)))));
        }
        return readings;
    }

    private static Map<String, Marker> markers(Findings findings) {
        return findings.markers().stream().collect(Collectors.toMap(Marker::property, marker -> marker));
    }

    private static Findings found(List<ModulusReading> readings) {
        return FlowCurve.of(new SweepName("", ""), 298.15, readings, SharedErrors.none());
    }

    private static void assertIs(Map<String, Marker> markers, String property, double expected, double relative) {
        assertThat(markers).containsKey(property);
        assertThat(markers.get(property).value())
                .as(property)
                .isCloseTo(expected, within(relative * Math.abs(expected)));
    }

    /** Exact: with all readings moved alike, η0 goes as b/a, the time as 1/a, and the shape stays. */
    @Test
    void whatReadingsShareMovesTheConstantsAsShiftsDo() {
        List<ModulusReading> readings =
                readings(rate -> 1000 / (1 + Math.pow(2 * rate, 0.7)), 1e-3, 1e3, 10, 1e-6, new Random(1));
        SharedErrors shared =
                SharedErrors.of(new int[readings.size()], new double[][] {{0.01, 0.004}, {0.004, 0.0025}});

        Map<String, Marker> moved = markers(FlowCurve.of(new SweepName("", ""), 298.15, readings, shared));

        assertThat(relativeU(moved.get("cross_zero_rate_viscosity"))).isCloseTo(Math.sqrt(0.0045), within(1e-5));
        assertThat(relativeU(moved.get("cross_time"))).isCloseTo(0.1, within(1e-5));
        assertThat(relativeU(moved.get("cross_exponent"))).isLessThan(1e-5);
        assertThat(relativeU(moved.get("carreau_yasuda_time"))).isCloseTo(0.1, within(1e-4));
    }

    private static double relativeU(Marker marker) {
        return marker.u().orElseThrow() / marker.value();
    }

    /** Six decades beyond the bend; the viscosity at infinite rate shows in them. */
    @ParameterizedTest(name = "{0}")
    @MethodSource("fluids")
    void publishedFluidsGiveTheirConstantsBack(Fluid fluid) {
        assertThat(fluid.viscosity(1)).isCloseTo(fluid.at1(), within(1e-5 * fluid.at1()));
        assertThat(fluid.viscosity(100)).isCloseTo(fluid.at100(), within(1e-5 * fluid.at100()));
        double bend = 1 / fluid.timeS();
        Map<String, Marker> markers =
                markers(found(readings(fluid::viscosity, bend / 100, bend * 1e7, 6, 0, new Random(1))));
        assertIs(markers, "carreau_yasuda_zero_rate_viscosity", fluid.zeroPaS(), 1e-7);
        assertIs(markers, "carreau_yasuda_time", fluid.timeS(), 1e-6);
        assertIs(markers, "carreau_yasuda_width", 2, 1e-6);
        assertIs(markers, "carreau_yasuda_exponent", fluid.exponent(), 1e-6);
        assertIs(markers, "carreau_yasuda_infinite_rate_viscosity", fluid.infinitePaS(), 1e-6);
    }

    /** Over three decades beyond the bend it does not, and is left at zero where the law has none. */
    @ParameterizedTest(name = "{0}")
    @MethodSource("fluids")
    void theViscosityAtInfiniteRateIsLeftOutWhereItIsNotSeen(Fluid fluid) {
        Fluid melt = new Fluid(fluid.name(), fluid.zeroPaS(), 0, fluid.timeS(), fluid.exponent(), 0, 0);
        double bend = 1 / fluid.timeS();
        Map<String, Marker> markers =
                markers(found(readings(melt::viscosity, bend / 100, bend * 1e3, 6, 0, new Random(1))));
        assertThat(markers)
                .containsOnlyKeys(
                        "cross_zero_rate_viscosity",
                        "cross_time",
                        "cross_exponent",
                        "carreau_yasuda_zero_rate_viscosity",
                        "carreau_yasuda_time",
                        "carreau_yasuda_width",
                        "carreau_yasuda_exponent");
        assertIs(markers, "carreau_yasuda_zero_rate_viscosity", fluid.zeroPaS(), 1e-9);
        assertIs(markers, "carreau_yasuda_exponent", fluid.exponent(), 1e-8);
        assertThat(markers.get("cross_time").unit()).isEqualTo("s");
        assertThat(markers.get("cross_exponent").unit()).isEqualTo("1");
        assertThat(markers.get("cross_zero_rate_viscosity").unit()).isEqualTo("Pa·s");
        assertThat(markers.get("cross_zero_rate_viscosity").temperatureK()).hasValue(298.15);
    }

    @ParameterizedTest(name = "{0} Pa·s, {1} s, {2}")
    @CsvSource({"5000, 0.3, 0.7", "12, 20, 0.4", "1e6, 40, 0.9"})
    void crossLawsGiveTheirConstantsBack(double zero, double time, double exponent) {
        Map<String, Marker> markers = markers(found(readings(
                rate -> zero / (1 + Math.pow(time * rate, exponent)), 1e-4 / time, 1e4 / time, 5, 0, new Random(1))));
        assertIs(markers, "cross_zero_rate_viscosity", zero, 1e-8);
        assertIs(markers, "cross_time", time, 1e-8);
        assertIs(markers, "cross_exponent", exponent, 1e-8);
        // the Cross law is a Carreau–Yasuda law with a = m and n = 1 − m
        assertIs(markers, "carreau_yasuda_width", exponent, 1e-6);
        assertIs(markers, "carreau_yasuda_exponent", 1 - exponent, 1e-6);
    }

    @Test
    @Tag("study")
    void intervalsHoldTheTruth() {
        Random random = new Random(7);
        int draws = Study.draws(400, 5000);
        double[] crossTruth = {5000, 0.3, 0.7};
        double[] carreauTruth = {101, 0.84, 2, 0.38};
        String[] crossNames = {"cross_zero_rate_viscosity", "cross_time", "cross_exponent"};
        String[] carreauNames = {
            "carreau_yasuda_zero_rate_viscosity",
            "carreau_yasuda_time",
            "carreau_yasuda_width",
            "carreau_yasuda_exponent"
        };
        int[] cross = new int[3];
        int[] carreau = new int[4];
        for (int draw = 0; draw < draws; draw++) {
            count(
                    cross,
                    markers(found(readings(
                            rate -> 5000 / (1 + Math.pow(0.3 * rate, 0.7)), 1e-2, 1e3, 5, 0.01, random))),
                    crossNames,
                    crossTruth);
            count(
                    carreau,
                    markers(found(readings(
                            rate -> 101 * Math.pow(1 + Math.pow(0.84 * rate, 2), -0.31), 1e-2, 1e3, 5, 0.01, random))),
                    carreauNames,
                    carreauTruth);
        }
        assertCovers(cross, crossNames, draws);
        assertCovers(carreau, carreauNames, draws);
    }

    private static void count(int[] held, Map<String, Marker> markers, String[] names, double[] truth) {
        for (int i = 0; i < names.length; i++) {
            Marker marker = markers.get(names[i]);
            assertThat(marker).as(names[i]).isNotNull();
            held[i] += Math.abs(marker.value() - truth[i])
                            <= NORMAL_95 * marker.u().orElseThrow()
                    ? 1
                    : 0;
        }
    }

    private static void assertCovers(int[] held, String[] names, int draws) {
        double slack = 3 * Math.sqrt(0.95 * 0.05 / draws);
        for (int i = 0; i < names.length; i++) {
            double share = (double) held[i] / draws;
            Study.row("| %s | %.1f |", names[i], 100 * share);
            assertThat(share).as(names[i]).isBetween(0.90 - slack, 0.98 + slack);
        }
    }

    /** Without uncertainties the scatter about the law gives u. */
    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3})
    void uComesFromTheScatterWhereTheModuliHaveNone(long seed) {
        List<ModulusReading> known =
                readings(rate -> 5000 / (1 + Math.pow(0.3 * rate, 0.7)), 1e-2, 1e3, 20, 0.01, new Random(seed));
        List<ModulusReading> bare = known.stream()
                .map(reading -> new ModulusReading(
                        reading.angularFrequency(),
                        new Moduli(
                                reading.moduli().storagePa(), reading.moduli().lossPa(), Optional.empty())))
                .toList();
        Marker withU = markers(found(known)).get("cross_time");
        Marker without = markers(found(bare)).get("cross_time");
        assertThat(without.value()).isCloseTo(withU.value(), within(0.01 * withU.value()));
        assertThat(without.u().orElseThrow())
                .isCloseTo(withU.u().orElseThrow(), within(0.3 * withU.u().orElseThrow()));
        assertThat(without.method()).contains("u from the scatter");
    }

    /**
     * A melt is no Carreau–Yasuda fluid: the eight modes of a low-density polyethylene at 150 °C (Laun, Rheol. Acta 17 (1978) 1,
     * from memory), whose zero-shear viscosity is Σ gτ = 51 063.7 Pa·s. Its misfit makes no viscosity at infinite rate.
     */
    @Test
    void aMeltOfManyModes() {
        double[] strengths = {1.29e5, 9.48e4, 5.86e4, 2.67e4, 9.80e3, 1.89e3, 1.80e2, 1.00};
        List<ModulusReading> melt = Stream.iterate(1e-3, rate -> rate < 1.1e3, rate -> rate * Math.pow(10, 0.2))
                .map(rate -> {
                    Complex g = Complex.ZERO;
                    for (int i = 0; i < strengths.length; i++) {
                        Complex turn = new Complex(0, rate * Math.pow(10, i - 4));
                        g = g.plus(turn.times(strengths[i]).over(Complex.ONE.plus(turn)));
                    }
                    double u = 0.01 * g.abs();
                    return new ModulusReading(
                            rate, new Moduli(g.re(), g.im(), Optional.of(new ModuliCovariance(u * u, u * u, 0))));
                })
                .toList();
        Map<String, Marker> markers = markers(found(melt));
        assertThat(markers).hasSize(7);
        for (String law : List.of("cross", "carreau_yasuda")) {
            Marker zero = markers.get(law + "_zero_rate_viscosity");
            assertThat(zero.method()).contains("more than chance");
            assertThat(zero.value()).isCloseTo(51_063.7, within(2 * zero.u().orElseThrow()));
        }
    }

    @Test
    void noPlateauNoLaw() {
        Findings findings =
                found(readings(rate -> 5000 / (1 + Math.pow(300 * rate, 0.7)), 1e-2, 1e3, 5, 0.01, new Random(3)));
        assertThat(findings.markers()).isEmpty();
        assertThat(findings.notes()).extracting(Reason::code).first().isEqualTo("FLOW_LAW_NO_PLATEAU");
        assertThat(findings.notes().get(0).sentence()).startsWith("at 25.0 °C: no Cross law");
    }

    @Test
    void aNewtonianLiquidHasNoBend() {
        Findings findings = found(readings(rate -> 5, 1e-2, 1e2, 5, 0.01, new Random(4)));
        assertThat(findings.markers()).isEmpty();
        assertThat(findings.notes()).extracting(Reason::code).containsOnly("FLOW_LAW_NOT_FIXED");
    }

    @Test
    void aSolidHasNoFlowCurve() {
        List<ModulusReading> solid = Stream.iterate(1e-2, rate -> rate < 1e2, rate -> rate * 2)
                .map(rate -> new ModulusReading(rate, new Moduli(1e6, 1e4 * Math.sqrt(rate), Optional.empty())))
                .toList();
        assertThat(found(solid).notes()).extracting(Reason::code).containsExactly("FLOW_CURVE_NO_LIQUID");
        assertThat(found(solid.subList(0, 3)).notes())
                .extracting(Reason::code)
                .containsExactly("FLOW_CURVE_TOO_FEW_FREQUENCIES");
    }
}
