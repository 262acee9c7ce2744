package nightlag.stages.spectrum;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalInt;
import java.util.Random;
import java.util.TreeMap;
import java.util.stream.IntStream;
import nightlag.stages.Study;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.numeric.Complex;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/**
 * Moduli without uncertainties: how their errors grow is read off their scatter, and what is derived from them is as sure as
 * it is said to be, by Monte Carlo over a fixed list of seeds: few of them in a build, and with
 * {@code mvn test -pl stages -Dtest=SelfWeighingTest -Dnightlag.study=long} 200 and the table on the console.
 */
@Tag("study")
class SelfWeighingTest {
    private static final int SEEDS = Study.draws(25, 200);

    private static final RelaxationModes LIQUID =
            RelaxationModes.of(0, new double[] {1e-3, 1e-2, 1e-1, 1, 10}, new double[] {1e5, 5e4, 2e4, 5e3, 500});
    private static final RelaxationModes SOLID =
            RelaxationModes.of(1e5, new double[] {1e-3, 1e-2, 1e-1, 1}, new double[] {1e6, 5e5, 3e5, 1e5});
    /** Its plateau lies three decades below the lowest frequency it is read at. */
    private static final RelaxationModes CUT_OFF_SOLID = RelaxationModes.of(
            1e3, new double[] {1e-3, 1e-2, 1e-1, 1, 10, 100, 1000}, new double[] {1e6, 5e5, 2e5, 5e4, 2e4, 1e4, 5e3});

    /** How a modulus is spoilt. */
    private interface Spoiling {
        Complex of(Complex modulus, Random random, double unit);
    }

    /** A material, what spoils its moduli, and what is to be said about how the errors grow. */
    private record Case(String name, RelaxationModes material, Spoiling spoiling, String words) {
        boolean isSaid(String method) {
            return method.contains(words) && method.contains(BOTH) == words.equals(BOTH);
        }

        @Override
        public String toString() {
            return name;
        }
    }

    private static final String OF_MAGNITUDE = "taken as proportional to |G*| (";
    private static final String OF_EACH = "taken as proportional to each modulus (";
    private static final String BOTH = ") together";

    static List<Case> cases() {
        return List.of(
                new Case("liquid, 1 % of |G*|", LIQUID, magnitude(0.01), OF_MAGNITUDE),
                new Case("liquid, 0.3 % of |G*|", LIQUID, magnitude(0.003), OF_MAGNITUDE),
                new Case("liquid, 1 % of each", LIQUID, each(0.01), OF_EACH),
                new Case("liquid, three digits and 0.1°", LIQUID, SelfWeighingTest::rounded, BOTH),
                new Case("solid, 1 % of |G*|", SOLID, magnitude(0.01), OF_MAGNITUDE),
                new Case("solid, 1 % of each", SOLID, each(0.01), OF_EACH),
                new Case("solid, three digits and 0.1°", SOLID, SelfWeighingTest::rounded, BOTH));
    }

    /** Nine of ten 95 % intervals hold the truth, and none misses it by five of its standard uncertainties. */
    @ParameterizedTest(name = "{0}")
    @MethodSource("cases")
    void theTruthLiesWithinTheUncertainty(Case drawn) throws ReductionFault {
        Map<String, List<Double>> deviations = new TreeMap<>();
        int named = 0;
        for (int seed = 0; seed < SEEDS; seed++) {
            DiscreteSpectrum spectrum = fit(drawn.material(), 1e-3, 50, drawn.spoiling(), seed);
            for (Marker marker : spectrum.markers(300)) {
                double z = (marker.value() - truth(drawn.material(), marker.property()))
                        / marker.u().orElseThrow();
                deviations
                        .computeIfAbsent(marker.property(), property -> new ArrayList<>())
                        .add(Math.abs(z));
                assertThat(marker.method()).contains("the moduli came without u");
            }
            named += drawn.isSaid(spectrum.markers(300).get(0).method()) ? 1 : 0;
        }
        assertThat(named).isGreaterThanOrEqualTo((int) (0.9 * SEEDS));
        int within = 0;
        int all = 0;
        for (Map.Entry<String, List<Double>> marker : deviations.entrySet()) {
            List<Double> sizes = marker.getValue();
            int held = (int) sizes.stream().filter(z -> z < 1.96).count();
            double worst = sizes.stream().mapToDouble(z -> z).max().orElseThrow();
            Study.row("| %s | `%s` | %.1f | %.2f |", drawn, marker.getKey(), 100.0 * held / sizes.size(), worst);
            assertThat(worst).as(marker.getKey()).isLessThan(5);
            within += held;
            all += sizes.size();
        }
        assertThat((double) within / all).isGreaterThanOrEqualTo(0.9);
    }

    /** Where nothing of the plateau is seen, a solid may be taken for a liquid: then its viscosity is not claimed to be known. */
    @Test
    void aSolidCutOffBeforeItsPlateauIsNotGivenASureViscosity() throws ReductionFault {
        for (int seed = 0; seed < 2 * SEEDS; seed++) {
            for (Spoiling spoiling : List.of(each(0.01), magnitude(0.01))) {
                DiscreteSpectrum spectrum = fit(CUT_OFF_SOLID, 1, 40, spoiling, seed);
                if (spectrum.relaxation().isLiquid()) {
                    Marker viscosity = spectrum.markers(300).get(0);
                    assertThat(viscosity.u().orElseThrow()).isGreaterThan(viscosity.value());
                    assertThat(viscosity.method()).contains("it may be a solid");
                } else {
                    Marker equilibrium = spectrum.markers(300).get(0);
                    assertThat(equilibrium.value() - 1e3)
                            .isLessThan(5 * equilibrium.u().orElseThrow());
                }
            }
        }
    }

    private static DiscreteSpectrum fit(
            RelaxationModes material, double lowest, int count, Spoiling spoiling, long seed) throws ReductionFault {
        Random random = new Random(7919 * seed + 13);
        double unit = Math.pow(10, random.nextDouble());
        List<ModulusReading> readings = IntStream.range(0, count)
                .mapToObj(i -> {
                    double angularFrequency = lowest * Math.pow(1e4 / lowest, i / (count - 1.0));
                    Complex modulus = spoiling.of(material.modulusPa(angularFrequency), random, unit);
                    return new ModulusReading(
                            angularFrequency, new Moduli(modulus.re(), modulus.im(), Optional.empty()));
                })
                .toList();
        return DiscreteFit.fit(readings, new SpectrumPlan(!material.isLiquid(), OptionalInt.empty(), false));
    }

    private static double truth(RelaxationModes material, String property) {
        return switch (property) {
            case "zero_shear_viscosity" -> material.viscosityPaS();
            case "steady_state_compliance" -> material.steadyStateCompliancePerPa();
            case "mean_relaxation_time" -> material.meanTimeS();
            case "mean_retardation_time" -> material.retardation().meanTimeS();
            case "equilibrium_compliance" -> 1 / material.equilibriumPa();
            case "equilibrium_modulus" -> material.equilibriumPa();
            case "instantaneous_modulus" -> material.instantaneousModulusPa();
            case "instantaneous_compliance" -> 1 / material.instantaneousModulusPa();
            default -> throw new IllegalArgumentException(property);
        };
    }

    private static Spoiling magnitude(double share) {
        return (modulus, random, unit) ->
                modulus.plus(new Complex(random.nextGaussian(), random.nextGaussian()).times(share * modulus.abs()));
    }

    private static Spoiling each(double share) {
        return (modulus, random, unit) -> new Complex(
                modulus.re() * (1 + share * random.nextGaussian()), modulus.im() * (1 + share * random.nextGaussian()));
    }

    /** |G*| to three digits, in a unit that differs from seed to seed so that the digits do, and δ to 0.1°. */
    private static Complex rounded(Complex modulus, Random random, double unit) {
        double magnitude = modulus.abs() * unit;
        double step = Math.pow(10, Math.floor(Math.log10(magnitude)) - 2);
        double degrees = Math.rint(Math.toDegrees(Math.atan2(modulus.im(), modulus.re())) * 10) / 10;
        return Complex.polar(Math.rint(magnitude / step) * step / unit, Math.toRadians(degrees));
    }
}
