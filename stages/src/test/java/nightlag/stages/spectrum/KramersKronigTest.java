package nightlag.stages.spectrum;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.stream.IntStream;
import nightlag.stages.fault.Reason;
import nightlag.stages.moduli.Findings;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.numeric.Complex;
import nightlag.stages.spectrum.NoisySweep.Noise;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import org.junit.jupiter.params.provider.ValueSource;

/** What is said about a sweep whose moduli belong together, and about one whose moduli do not. */
class KramersKronigTest {
    private static final NoisySweep SWEEP =
            new NoisySweep("LDPE", PublishedSpectraValidationTest.LAUN::modulusPa, 1e-2, 1e2, 21);

    @Test
    void aSweepOfOneMaterialIsConsistent() {
        Marker marker = marker(SWEEP.readings(Noise.OF_EACH, 0.01, true, 1));

        assertThat(marker.property()).isEqualTo("kramers_kronig_misfit");
        assertThat(marker.specimen()).isEqualTo("2");
        assertThat(marker.sweep()).isEqualTo("s");
        assertThat(marker.temperatureK()).hasValue(463.15);
        assertThat(marker.frequencyHz()).isEmpty();
        assertThat(marker.unit()).isEqualTo("1");
        assertThat(marker.method()).startsWith("consistent: ").contains("in units of the points' own u");
        assertThat(marker.value()).isCloseTo(1, within(3 * marker.u().orElseThrow()));
    }

    @Test
    void aLossModulusThatIsFivePercentTooLargeIsNot() {
        Marker marker = marker(SWEEP.spoilt((modulus, omega, part) -> new Complex(modulus.re(), 1.05 * modulus.im()))
                .readings(Noise.OF_EACH, 0.01, true, 1));

        assertThat(marker.method()).startsWith("inconsistent: ").contains("chance of a worse fit below 1e-4");
        assertThat(marker.value()).isGreaterThan(1.5);
    }

    /** With a channel inverted no spectrum fits at all; that is not to be called consistent, whatever the scatter. */
    @Test
    void moduliOfAnInvertedChannelAreNeverConsistent() {
        Findings inverted = KramersKronig.of(
                "2",
                "s",
                OptionalDouble.of(463.15),
                SWEEP.spoilt((modulus, omega, part) -> new Complex(-modulus.re(), -modulus.im()))
                        .readings(Noise.OF_EACH, 0.01, true, 1));

        assertThat(inverted.markers()).noneMatch(marker -> marker.method().startsWith("consistent"));
        assertThat(inverted.notes())
                .singleElement()
                .satisfies(note -> assertThat(note.sentence()).contains("leaves 100 % of |G*|"));
    }

    @Test
    void withoutUncertaintiesTheScatterIsTheMeasure() {
        Marker good = marker(SWEEP.readings(Noise.OF_MAGNITUDE, 0.01, false, 4));
        Marker bad = marker(SWEEP.spoilt((modulus, omega, part) -> new Complex(modulus.re(), 1.05 * modulus.im()))
                .readings(Noise.OF_EACH, 0.01, false, 4));

        assertThat(good.method()).startsWith("consistent: ").contains("the moduli came without u");
        assertThat(bad.method()).startsWith("inconsistent: ");
    }

    /** The noise within records knows nothing of what changes between them. */
    @Test
    void pointsThatScatterByMoreThanTheirRecordsSayAreNotInconsistent() {
        List<ModulusReading> readings = SWEEP.readings(Noise.OF_EACH, 0.01, true, 2).stream()
                .map(reading -> NoisySweep.withU(reading, 1e-4))
                .toList();

        assertThat(marker(readings).method())
                .startsWith("consistent: ")
                .contains("the points scatter by more than their u");
    }

    /** Four thousandths of the loss modulus are less than a good instrument's phase is known to. */
    @Test
    void aMisfitMayBeSureAndTooSmallToMatter() {
        NoisySweep off = SWEEP.spoilt((modulus, omega, part) -> new Complex(modulus.re(), 1.004 * modulus.im()));

        assertThat(marker(off.readings(Noise.OF_EACH, 1e-4, true, 1)).method())
                .startsWith("consistent: ")
                .endsWith("chance of a worse fit below 1e-4, but the misfit is too small to matter");
    }

    static List<NoisySweep> exactSweeps() {
        return NoisySweep.MATERIALS;
    }

    /** However small the uncertainties, the grid of the fit does not show. */
    @ParameterizedTest(name = "{0}")
    @MethodSource("exactSweeps")
    void exactModuliAreConsistent(NoisySweep exact) {
        for (double u : new double[] {1e-12, 1e-6, 1e-4, 1e-3}) {
            KramersKronig.Check check = KramersKronig.check(exact.readings(Noise.OF_EACH, 0, false, 0).stream()
                    .map(reading -> NoisySweep.withU(reading, u))
                    .toList());

            assertThat(check.isConsistent()).isTrue();
            assertThat(check.share()).isLessThan(1e-4);
        }
        assertThat(KramersKronig.check(exact.readings(Noise.OF_EACH, 0, false, 0))
                        .isConsistent())
                .isTrue();
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5})
    void neitherTheOrderNorTheUnitCounts(long seed) {
        List<ModulusReading> readings = SWEEP.readings(Noise.OF_EACH, 0.01, true, seed);
        List<ModulusReading> turned = new ArrayList<>(readings);
        Collections.reverse(turned);
        List<ModulusReading> inKilopascals =
                turned.stream().map(reading -> NoisySweep.scaled(reading, 1e-3)).toList();

        assertThat(marker(inKilopascals).value())
                .isCloseTo(
                        marker(readings).value(), within(1e-6 * marker(readings).value()));
    }

    @Test
    void tooFewFrequenciesAreSaid() {
        List<ModulusReading> seven =
                SWEEP.readings(Noise.OF_EACH, 0.01, true, 1).subList(0, 7);
        List<ModulusReading> elevenWithout =
                SWEEP.readings(Noise.OF_EACH, 0.01, false, 1).subList(0, 11);

        assertThat(absent(seven).sentence())
                .isEqualTo(
                        "specimen 2, sweep s: no Kramers–Kronig check, too few different frequencies, 7 (at least 8 are"
                                + " needed)");
        assertThat(absent(elevenWithout).sentence()).contains("11 (at least 12 are needed)");
    }

    @Test
    void nothingButZerosIsSaid() {
        List<ModulusReading> zeros = IntStream.rangeClosed(1, 20)
                .mapToObj(i -> new ModulusReading(i, new Moduli(0, 0, Optional.empty())))
                .toList();

        assertThat(absent(zeros).code()).isEqualTo("KRAMERS_KRONIG_NO_MODULUS");
    }

    private static Reason absent(List<ModulusReading> readings) {
        Findings findings = KramersKronig.of("2", "s", OptionalDouble.of(463.15), readings);
        assertThat(findings.markers()).isEmpty();
        return findings.notes().get(0);
    }

    private static Marker marker(List<ModulusReading> readings) {
        Findings findings = KramersKronig.of("2", "s", OptionalDouble.of(463.15), readings);
        // a finding against a sweep is something to look at besides its marker
        assertThat(findings.notes()).extracting(Reason::code).isSubsetOf("KRAMERS_KRONIG_INCONSISTENT");
        return findings.markers().get(0);
    }
}
