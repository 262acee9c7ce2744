package nightlag.stages.sweep;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;
import static org.assertj.core.api.Assertions.within;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Random;
import java.util.stream.Collectors;
import nightlag.stages.Study;
import nightlag.stages.TestPoints;
import nightlag.stages.fault.Reason;
import nightlag.stages.moduli.Findings;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModuliCovariance;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.numeric.Complex;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

/** Gel points of made-up cures whose crossing is known in closed form. */
class GelPointValidationTest {
    private static final double NORMAL_95 = 1.959964;
    private static final SweepName NAME = new SweepName("1", "cure");
    private static final double[] FREQUENCIES_HZ = {0.1, 0.3, 1, 3, 10};

    /** A modulus over angular frequency and time or temperature. */
    private interface Material {
        Complex modulus(double angularFrequency, double place);
    }

    /**
     * A cure that gels at 1200 s: ln tan δ = ln tan(nπ/2) − 1.5 y + 0.25 y ln ω with y = tanh((t − 1200 s)/900 s). At 1200 s
     * tan δ = tan(nπ/2) at every frequency; before, it falls with frequency, after, it rises.
     */
    private static Material cure(double exponent) {
        return (angularFrequency, seconds) -> {
            double done = Math.tanh((seconds - 1200) / 900);
            double tanDelta =
                    Math.tan(exponent * Math.PI / 2) * Math.exp(-1.5 * done + 0.25 * done * Math.log(angularFrequency));
            double storage = 1e4 * Math.exp(4 * done) * Math.pow(angularFrequency, exponent * (1 - done) / 2);
            return new Complex(storage, storage * tanDelta);
        };
    }

    /**
     * A network of critical gel S(iω)^½ beside a spring that grows from the gel time on, and the same in series with a dashpot
     * that stiffens towards it: G* = Ge + S(iω)^½, 1/G* = 1/(S(iω)^½) + 1/(iωη). With Ge and 1/η linear in the time to the gel
     * point the loss angle turns smoothly there at n = ½ and ω = 1 rad/s, with a kink elsewhere.
     */
    private static Complex network(double angularFrequency, double seconds) {
        Complex critical = Complex.polar(1000 * Math.sqrt(angularFrequency), Math.PI / 4);
        double to = (seconds - 1200) / 1000;
        if (to >= 0) {
            return critical.plus(new Complex(1000 * to, 0));
        }
        Complex flow = new Complex(0, angularFrequency * 1000 / -to);
        return critical.times(flow).over(critical.plus(flow));
    }

    private static ModulusPoint point(
            double hz, double place, boolean overTime, Complex modulus, double u, boolean known) {
        ModulusPoint plain =
                TestPoints.point().hz(hz).at(overTime ? 353.15 : place).build();
        return new ModulusPoint(
                plain.key(),
                plain.made(),
                plain.deformation(),
                plain.temperatureK(),
                plain.taggedTemperatureK(),
                plain.frequencyHz(),
                overTime ? OptionalDouble.of(place) : OptionalDouble.empty(),
                plain.strainAmplitude(),
                plain.stressAmplitudePa(),
                Optional.of(new Moduli(
                        modulus.re(),
                        modulus.im(),
                        known ? Optional.of(new ModuliCovariance(u * u, u * u, 0)) : Optional.empty())),
                plain.harmonics(),
                plain.quality(),
                plain.flags(),
                plain.cyclesUsed(),
                plain.samplesUsed(),
                plain.strainSnrDb(),
                plain.stressSnrDb(),
                plain.degreesOfFreedom(),
                plain.reasons(),
                plain.loop(),
                plain.torqueGeometry(),
                plain.unusableOnlyBy(),
                plain.harmonicLimits(),
                plain.windowS());
    }

    /** How a series was made. */
    private record Series(double from, double to, int count, double noise, boolean known, SweepPlan.Kind kind) {
        static Series time(double noise) {
            return new Series(60, 3600, 60, noise, true, SweepPlan.Kind.TIME);
        }

        Series between(double first, double last) {
            return new Series(first, last, count, noise, known, kind);
        }

        Series points(int number) {
            return new Series(from, to, number, noise, known, kind);
        }

        Series withoutU() {
            return new Series(from, to, count, noise, false, kind);
        }

        Series overTemperature() {
            return new Series(from, to, count, noise, known, SweepPlan.Kind.TEMPERATURE);
        }

        /** Each frequency is measured after the one before it, as an instrument does. */
        List<Sweep> of(Material material, Random random, double... frequenciesHz) {
            boolean overTime = kind == SweepPlan.Kind.TIME;
            List<Sweep> sweeps = new ArrayList<>();
            double step = (to - from) / (count - 1);
            for (int k = 0; k < frequenciesHz.length; k++) {
                List<ModulusPoint> points = new ArrayList<>();
                for (int i = 0; i < count; i++) {
                    double place = from + step * (i + 0.9 * k / frequenciesHz.length);
                    Complex modulus = material.modulus(2 * Math.PI * frequenciesHz[k], place);
                    double u = (noise > 0 ? noise : 0.01) * modulus.abs();
                    Complex measured =
                            modulus.plus(new Complex(noise * random.nextGaussian(), noise * random.nextGaussian())
                                    .times(modulus.abs()));
                    points.add(point(frequenciesHz[k], place, overTime, measured, u, known));
                }
                sweeps.add(new Sweep(
                        NAME,
                        kind,
                        overTime ? OptionalDouble.of(353.15) : OptionalDouble.empty(),
                        OptionalDouble.of(frequenciesHz[k]),
                        points));
            }
            return sweeps;
        }
    }

    private static Findings find(List<Sweep> sweeps) {
        return GelPoint.of(NAME, sweeps, sweeps.get(0).kind());
    }

    private static Map<String, Marker> markers(Findings findings) {
        assertThat(findings.notes()).isEmpty();
        return findings.markers().stream().collect(Collectors.toMap(Marker::property, marker -> marker));
    }

    private static void assertCodes(Findings findings, String... codes) {
        assertThat(findings.markers()).isEmpty();
        assertThat(findings.notes()).extracting(Reason::code).containsExactly(codes);
    }

    /** tan δ = tan(nπ/2) (Winter &amp; Chambon 1986); the five pairs are exact. */
    @ParameterizedTest(name = "n = {0}")
    @CsvSource({
        "0.2, 0.3249196962",
        "0.333333333333, 0.5773502691",
        "0.5, 1",
        "0.666666666667, 1.732050808",
        "0.75, 2.414213562"
    })
    void criticalGels(double exponent, double tanDelta) {
        assertThat(Math.tan(exponent * Math.PI / 2)).isCloseTo(tanDelta, within(1e-9 * tanDelta));
        Map<String, Marker> markers = markers(find(Series.time(0).of(cure(exponent), new Random(1), FREQUENCIES_HZ)));
        assertThat(markers).containsOnlyKeys("gel_exponent", "gel_time");
        assertThat(markers.get("gel_exponent").value()).isCloseTo(exponent, within(2e-3 * exponent));
        assertThat(markers.get("gel_time").value()).isCloseTo(1200, within(2.4));
        assertThat(markers.get("gel_time").unit()).isEqualTo("s");
        assertThat(markers.get("gel_time").temperatureK().orElseThrow()).isCloseTo(353.15, within(1e-9));
        assertThat(markers.get("gel_exponent").specimen()).isEqualTo("1");
    }

    @Test
    void aGrowingNetworkGelsAtItsCriticalGel() {
        Map<String, Marker> markers = markers(
                find(Series.time(0).points(120).of(GelPointValidationTest::network, new Random(1), 0.05, 0.16, 0.5)));
        assertThat(markers.get("gel_exponent").value()).isCloseTo(0.5, within(2e-3 * 0.5));
        assertThat(markers.get("gel_time").value()).isCloseTo(1200, within(2.4));
    }

    /** A physical gel that sets on heating, here 40 K later than 313.15 K. */
    @Test
    void overTemperature() {
        Material sets = (w, kelvin) -> cure(0.6).modulus(w, 1200 + 20 * (kelvin - 353.15));
        Map<String, Marker> markers = markers(
                find(Series.time(0).between(300, 420).overTemperature().of(sets, new Random(1), FREQUENCIES_HZ)));
        assertThat(markers).containsOnlyKeys("gel_exponent", "gel_temperature");
        assertThat(markers.get("gel_temperature").value()).isCloseTo(353.15, within(0.05));
        assertThat(markers.get("gel_temperature").unit()).isEqualTo("°C");
        assertThat(markers.get("gel_exponent").value()).isCloseTo(0.6, within(2e-3 * 0.6));
        assertThat(markers.get("gel_exponent").temperatureK())
                .isEqualTo(markers.get("gel_temperature").temperatureK());
    }

    /** A gel that melts: the curves change their order the other way round. */
    @Test
    void aMeltingGel() {
        Material melts = (w, kelvin) -> cure(0.6).modulus(w, 1200 - 20 * (kelvin - 353.15));
        Map<String, Marker> markers = markers(
                find(Series.time(0).between(300, 420).overTemperature().of(melts, new Random(1), FREQUENCIES_HZ)));
        assertThat(markers.get("gel_temperature").value()).isCloseTo(353.15, within(0.05));
    }

    @Test
    @Tag("study")
    void intervalsHoldTheTruth() {
        Random random = new Random(17);
        int draws = Study.draws(300, 5000);
        for (int points : new int[] {15, 60, 300}) {
            int time = 0;
            int exponent = 0;
            double square = 0;
            for (int draw = 0; draw < draws; draw++) {
                Map<String, Marker> markers =
                        markers(find(Series.time(0.01).points(points).of(cure(0.6), random, 0.1, 0.3, 1, 3)));
                Marker when = markers.get("gel_time");
                Marker n = markers.get("gel_exponent");
                time += Math.abs(when.value() - 1200) <= NORMAL_95 * when.u().orElseThrow() ? 1 : 0;
                exponent += Math.abs(n.value() - 0.6) <= NORMAL_95 * n.u().orElseThrow() ? 1 : 0;
                square += Math.pow(when.value() - 1200, 2) / draws;
            }
            Study.row(
                    "| %d points | t %.1f %% | n %.1f %% | rms %.1f s |",
                    points, 100.0 * time / draws, 100.0 * exponent / draws, Math.sqrt(square));
            double slack = 3 * Math.sqrt(0.95 * 0.05 / draws);
            assertThat((double) time / draws).as("time, %d points", points).isBetween(0.90 - slack, 0.98 + slack);
            assertThat((double) exponent / draws)
                    .as("exponent, %d points", points)
                    .isBetween(0.90 - slack, 0.98 + slack);
        }
    }

    /** Without uncertainties the scatter about neighbours gives u. */
    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3})
    void uComesFromTheScatterWhereTheModuliHaveNone(long seed) {
        Series series = Series.time(0.01).points(200);
        Marker known = markers(find(series.of(cure(0.6), new Random(seed), FREQUENCIES_HZ)))
                .get("gel_time");
        Marker bare = markers(find(series.withoutU().of(cure(0.6), new Random(seed), FREQUENCIES_HZ)))
                .get("gel_time");
        assertThat(bare.u().orElseThrow())
                .isBetween(0.5 * known.u().orElseThrow(), 2 * known.u().orElseThrow());
        assertThat(bare.value()).isCloseTo(1200, within(4 * bare.u().orElseThrow()));
        assertThat(bare.method()).contains("u from the scatter");
    }

    /** A cure that was stopped before, and one begun after: nothing is guessed. */
    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5})
    void noCrossingNoGelPoint(long seed) {
        assertCodes(
                find(Series.time(0.01).between(60, 1100).of(cure(0.6), new Random(seed), FREQUENCIES_HZ)),
                "GEL_NOT_CROSSED");
        assertCodes(
                find(Series.time(0.01).between(1300, 3600).of(cure(0.6), new Random(seed), FREQUENCIES_HZ)),
                "GEL_NOT_CROSSED");
    }

    /** A resin that stays Newtonian for most of the time has no order of its curves, and noise makes none. */
    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5})
    void noiseMakesNoGelPoint(long seed) {
        assertCodes(
                find(Series.time(0.01)
                        .points(300)
                        .of((w, seconds) -> new Complex(0, 3 * w), new Random(seed), FREQUENCIES_HZ)),
                "GEL_NOT_CROSSED");
    }

    /** A relaxation that passes the frequencies one after the other, each with its own peak of tan δ. */
    @Test
    void aGlassTransitionIsNoGelPoint() {
        Material glass = (w, kelvin) -> {
            Complex x = new Complex(0, w * Math.exp(-(kelvin - 380) / 3));
            Complex root = Complex.polar(Math.sqrt(x.abs()), Math.PI / 4);
            return new Complex(1e6, 0).plus(root.over(Complex.ONE.plus(root)).times(1e9));
        };
        Findings findings = find(Series.time(0.01)
                .between(340, 440)
                .points(100)
                .overTemperature()
                .of(glass, new Random(5), FREQUENCIES_HZ));
        assertThat(findings.markers()).isEmpty();
        assertThat(findings.notes()).extracting(Reason::code).containsExactly("GEL_LOSS_PEAK");
    }

    /** ln tan δ bends over ln ω, so that each pair of curves crosses at a time of its own. */
    @Test
    void curvesThatCrossInPairsHaveNoGelPoint() {
        Material pairs = (w, seconds) -> {
            Complex critical = cure(0.6).modulus(w, seconds);
            double bent = Math.exp(0.1 * Math.pow(Math.log(w) - 2, 2));
            return new Complex(critical.re(), critical.im() * bent);
        };
        assertCodes(
                find(Series.time(0.01).between(60, 5000).of(pairs, new Random(1), FREQUENCIES_HZ)),
                "GEL_NOT_ONE_POINT");
    }

    @Test
    void twoFrequenciesAreTooFew() {
        assertCodes(find(Series.time(0).of(cure(0.6), new Random(1), 0.1, 1)), "GEL_TOO_FEW_FREQUENCIES");
        assertCodes(
                find(Series.time(0).points(3).of(cure(0.6), new Random(1), FREQUENCIES_HZ)), "GEL_TOO_FEW_FREQUENCIES");
        assertThatThrownBy(() -> GelPoint.of(NAME, List.of(), SweepPlan.Kind.FREQUENCY))
                .isInstanceOf(IllegalArgumentException.class);
    }
}
