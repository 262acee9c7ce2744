package nightlag.stages.spectrum;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;
import static org.assertj.core.api.Assertions.within;

import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalInt;
import java.util.Random;
import java.util.function.Function;
import java.util.stream.Collectors;
import java.util.stream.IntStream;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModuliCovariance;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.moduli.SharedErrors;
import nightlag.stages.numeric.Complex;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** What went in comes out: as few modes, and figures whose uncertainty holds the truth. */
class DiscreteFitTest {
    private static final RelaxationModes LAUN = PublishedSpectraValidationTest.LAUN;
    private static final RelaxationModes PMMA = PublishedSpectraValidationTest.PMMA;
    private static final SpectrumPlan LIQUID = new SpectrumPlan(false, OptionalInt.empty(), false);
    private static final SpectrumPlan SOLID = new SpectrumPlan(true, OptionalInt.empty(), false);

    /** Exact: with all readings moved alike, η0 goes as b/a, Je0 as 1/b and the mean time as 1/a. */
    @Test
    void whatReadingsShareMovesTheFiguresAsShiftsDo() throws ReductionFault {
        List<ModulusReading> readings = readings(LAUN, 1e-4, 1e5, 0, 1e-4, 0);
        SharedErrors shared =
                SharedErrors.of(new int[readings.size()], new double[][] {{0.01, 0.004}, {0.004, 0.0025}});

        DiscreteSpectrum alone = DiscreteFit.fit(readings, LIQUID);
        DiscreteSpectrum together = DiscreteFit.fit(readings, shared, LIQUID);

        assertThat(together.relaxation().timesS()).isEqualTo(alone.relaxation().timesS());
        assertThat(added(together, alone, "zero_shear_viscosity")).isCloseTo(0.01 + 0.0025 - 2 * 0.004, within(1e-6));
        assertThat(added(together, alone, "steady_state_compliance")).isCloseTo(0.0025, within(1e-6));
        assertThat(added(together, alone, "mean_relaxation_time")).isCloseTo(0.01, within(1e-6));
        assertThat(added(together, alone, "instantaneous_modulus")).isCloseTo(0.0025, within(1e-6));
    }

    /** Relative variance beyond that of the scatter. */
    private static double added(DiscreteSpectrum with, DiscreteSpectrum without, String property) {
        double u = marker(with, property).u().orElseThrow()
                / marker(with, property).value();
        double own = marker(without, property).u().orElseThrow()
                / marker(without, property).value();
        return u * u - own * own;
    }

    @Test
    void exactModuliGiveTheModesThatMadeThem() throws ReductionFault {
        DiscreteSpectrum spectrum = DiscreteFit.fit(readings(LAUN, 1e-4, 1e5, 0, 1e-12, 0), LIQUID);

        assertModes(spectrum.relaxation(), LAUN, 1e-9);
    }

    @Test
    void exactModuliWithoutUncertaintiesToo() throws ReductionFault {
        DiscreteSpectrum spectrum = DiscreteFit.fit(readings(LAUN, 1e-4, 1e5, 0, 0, 0), LIQUID);

        assertModes(spectrum.relaxation(), LAUN, 1e-9);
    }

    @Test
    void aSolidKeepsItsEquilibriumModulus() throws ReductionFault {
        DiscreteSpectrum spectrum = DiscreteFit.fit(readings(PMMA, 1e-10, 1e3, 0, 1e-12, 0), SOLID);

        assertModes(spectrum.relaxation(), PMMA, 1e-9);
        assertThat(spectrum.relaxation().equilibriumPa()).isCloseTo(2.24, within(1e-9));
        assertThat(spectrum.retardation().isLiquid()).isFalse();
    }

    /** Bounds: η0 within 0.5 %, Je0 within 2 % from moduli with 1 % noise. */
    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {0, 1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12, 13, 14, 15, 16, 17, 18, 19})
    void launsModesFromNoisyModuli(long seed) throws ReductionFault {
        DiscreteSpectrum spectrum = DiscreteFit.fit(readings(LAUN, 1e-4, 1e5, 0.01, 0.01, seed), LIQUID);

        assertThat(spectrum.relaxation().count()).isEqualTo(8);
        assertThat(spectrum.relaxation().viscosityPaS() / 51_063.7).isCloseTo(1, within(0.005));
        assertThat(spectrum.relaxation().steadyStateCompliancePerPa() / 1.150171152e-3)
                .isCloseTo(1, within(0.02));
        assertWithin(spectrum, LAUN, 4);
    }

    /** Two modes lie beyond the data: what is said about them must allow for that. */
    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {0, 1, 2, 3, 4, 5, 6, 7, 8, 9})
    void withoutATerminalZoneTheUncertaintyStillHoldsTheTruth(long seed) throws ReductionFault {
        DiscreteSpectrum spectrum = DiscreteFit.fit(readings(LAUN, 1e-2, 1e5, 0.01, 0.01, seed), LIQUID);

        assertWithin(spectrum, LAUN, 2.5);
        assertThat(marker(spectrum, "zero_shear_viscosity").method()).contains("beyond the 20.8 s");
        assertThat(marker(spectrum, "instantaneous_modulus").method()).doesNotContain("support");
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {0, 1, 2, 3, 4})
    void scatterStandsInForUncertaintiesThatAreNotGiven(long seed) throws ReductionFault {
        double given = marker(
                        DiscreteFit.fit(readings(LAUN, 1e-4, 1e5, 0.01, 0.01, seed), LIQUID), "zero_shear_viscosity")
                .u()
                .orElseThrow();

        Marker fromScatter =
                marker(DiscreteFit.fit(readings(LAUN, 1e-4, 1e5, 0.01, 0, seed), LIQUID), "zero_shear_viscosity");

        assertThat(fromScatter.u().orElseThrow() / given).isBetween(0.7, 1.4);
        assertThat(fromScatter.method()).contains("scatter");
    }

    @Test
    void uncertaintiesThatAreTooSmallDoNotBreedModes() throws ReductionFault {
        DiscreteSpectrum spectrum = DiscreteFit.fit(readings(LAUN, 1e-4, 1e5, 0.01, 1e-6, 1), LIQUID);

        assertThat(spectrum.relaxation().count()).isEqualTo(8);
        assertWithin(spectrum, LAUN, 4);
    }

    @Test
    void theWrittenSetsAreEachOthersInverse() throws ReductionFault {
        for (SpectrumPlan plan : List.of(LIQUID, SOLID)) {
            RelaxationModes truth = plan.fitEquilibrium() ? PMMA : LAUN;
            DiscreteSpectrum spectrum =
                    DiscreteFit.fit(readings(truth, plan.fitEquilibrium() ? 1e-10 : 1e-4, 1e4, 0.01, 0.01, 3), plan);
            double[][] relaxation = written(spectrum, SpectrumRow.Kind.RELAXATION);
            double[][] retardation = written(spectrum, SpectrumRow.Kind.RETARDATION);
            double equilibrium = plan.fitEquilibrium()
                    ? marker(spectrum, "equilibrium_modulus").value()
                    : 0;
            double fluidity = plan.fitEquilibrium()
                    ? 0
                    : 1 / marker(spectrum, "zero_shear_viscosity").value();
            double instantaneous = marker(spectrum, "instantaneous_compliance").value();

            for (double logS = -12; logS <= 12; logS += 0.125) {
                double s = Math.pow(10, logS);
                double modulus = equilibrium;
                for (int i = 0; i < relaxation[0].length; i++) {
                    modulus += relaxation[1][i] * s * relaxation[0][i] / (1 + s * relaxation[0][i]);
                }
                double compliance = instantaneous + fluidity / s;
                for (int k = 0; k < retardation[0].length; k++) {
                    compliance += retardation[1][k] / (1 + s * retardation[0][k]);
                }
                assertThat(modulus * compliance).isCloseTo(1, within(1e-12));
            }
        }
    }

    @Test
    void aGivenNumberOfModesIsKept() throws ReductionFault {
        List<ModulusReading> readings = readings(LAUN, 1e-4, 1e5, 0.01, 0.01, 1);
        for (int wanted : new int[] {1, 4, 8, 12, 20}) {
            SpectrumPlan plan = new SpectrumPlan(false, OptionalInt.of(wanted), false);

            RelaxationModes modes = DiscreteFit.fit(readings, plan).relaxation();

            assertThat(modes.count()).isEqualTo(wanted);
            if (wanted >= 8) {
                assertThat(modes.viscosityPaS() / 51_063.7).isCloseTo(1, within(0.005));
                assertThat(modes.steadyStateCompliancePerPa() / 1.150171152e-3).isCloseTo(1, within(0.02));
            }
        }
    }

    /** A smooth spectrum, exact: G* = √(iω)/(1 + √(iω)). There is no end to the modes one could add; there is to those kept. */
    @Test
    void noiseFreeModuliOfASmoothSpectrumEndInAModestNumberOfModes() throws ReductionFault {
        List<ModulusReading> readings = IntStream.rangeClosed(-30, 30)
                .mapToObj(i -> Math.pow(10, i / 10.0))
                .map(w -> {
                    Complex root = Complex.polar(Math.sqrt(w), Math.PI / 4);
                    return reading(w, root.over(Complex.ONE.plus(root)), 1e-12);
                })
                .toList();

        RelaxationModes modes = DiscreteFit.fit(readings, LIQUID).relaxation();

        assertThat(modes.count()).isBetween(10, 21);
        Complex middle = modes.modulusPa(1);
        assertThat(middle.re()).isCloseTo(0.5, within(1e-4));
        assertThat(middle.im()).isCloseTo(0.2071067812, within(1e-4));
    }

    @Test
    void aLiquidThatIsCalledASolidMayTurnOutToFlow() throws ReductionFault {
        DiscreteSpectrum spectrum = DiscreteFit.fit(readings(LAUN, 1e-4, 1e5, 0, 1e-12, 0), SOLID);

        assertThat(spectrum.relaxation().equilibriumPa()).isLessThan(1e-6);
    }

    @Test
    void tooLittleIsRefusedWithAReason() {
        List<ModulusReading> two = readings(LAUN, 1, 100, 0, 0.01, 0).stream()
                .filter(reading -> reading.angularFrequency() < 1.1)
                .toList();
        SpectrumPlan greedy = new SpectrumPlan(false, OptionalInt.of(62), false);

        assertThatThrownBy(() -> DiscreteFit.fit(two, LIQUID))
                .isInstanceOfSatisfying(
                        ReductionFault.class,
                        fault -> assertThat(fault.reason().code()).isEqualTo("SPECTRUM_TOO_FEW_FREQUENCIES"));
        assertThatThrownBy(() -> DiscreteFit.fit(readings(LAUN, 1, 100, 0, 0.01, 0), greedy))
                .isInstanceOfSatisfying(
                        ReductionFault.class,
                        fault -> assertThat(fault.reason().code()).isEqualTo("SPECTRUM_TOO_MANY_MODES"));
    }

    @Test
    void threeFrequenciesAndValuesBelowZeroStillGiveASpectrum() throws ReductionFault {
        List<ModulusReading> readings = List.of(
                reading(0.1, new Complex(-1e-3, 1), 0.01),
                reading(1, new Complex(0.2, 9), 0.01),
                reading(10, new Complex(20, 80), 0.01));

        DiscreteSpectrum spectrum = DiscreteFit.fit(readings, LIQUID);

        assertThat(spectrum.markers(300)).allSatisfy(marker -> {
            assertThat(marker.value()).isPositive().isFinite();
            assertThat(marker.u().orElseThrow()).isPositive().isFinite();
        });
    }

    @Test
    void fewReadingsWithoutUncertaintiesLeaveSomethingForTheScatter() throws ReductionFault {
        List<ModulusReading> readings = List.of(
                reading(0.1, new Complex(0.9, 10), 0),
                reading(1, new Complex(50, 49), 0),
                reading(10, new Complex(101, 9.9), 0));

        DiscreteSpectrum spectrum = DiscreteFit.fit(readings, LIQUID);

        assertThat(spectrum.relaxation().count()).isEqualTo(1);
        assertThat(marker(spectrum, "zero_shear_viscosity").u().orElseThrow()).isBetween(0.5, 50.0);
    }

    private static double[][] written(DiscreteSpectrum spectrum, SpectrumRow.Kind kind) {
        List<SpectrumRow> rows =
                spectrum.rows(463.15).stream().filter(row -> row.kind() == kind).toList();
        return new double[][] {
            rows.stream().mapToDouble(SpectrumRow::timeS).toArray(),
            rows.stream().mapToDouble(SpectrumRow::value).toArray()
        };
    }

    private static Marker marker(DiscreteSpectrum spectrum, String property) {
        Map<String, Marker> markers =
                spectrum.markers(463.15).stream().collect(Collectors.toMap(Marker::property, Function.identity()));
        return markers.get(property);
    }

    private static void assertWithin(DiscreteSpectrum spectrum, RelaxationModes truth, double coverage) {
        Map<String, Double> expected = Map.of(
                "zero_shear_viscosity", truth.viscosityPaS(),
                "steady_state_compliance", truth.steadyStateCompliancePerPa(),
                "mean_relaxation_time", truth.meanTimeS(),
                "mean_retardation_time", truth.retardation().meanTimeS(),
                "instantaneous_modulus", truth.instantaneousModulusPa(),
                "instantaneous_compliance", 1 / truth.instantaneousModulusPa());
        assertThat(spectrum.markers(463.15))
                .hasSize(6)
                .allSatisfy(marker -> assertThat(marker.value())
                        .as(marker.property())
                        .isCloseTo(
                                expected.get(marker.property()),
                                within(coverage * marker.u().orElseThrow())));
    }

    private static void assertModes(RelaxationModes found, RelaxationModes truth, double tolerance) {
        assertThat(found.count()).isEqualTo(truth.count());
        for (int i = 0; i < truth.count(); i++) {
            assertThat(found.timesS()[i] / truth.timesS()[i]).isCloseTo(1, within(tolerance));
            assertThat(found.strengthsPa()[i] / truth.strengthsPa()[i]).isCloseTo(1, within(tolerance));
        }
    }

    /** 61 frequencies, both moduli with relative Gaussian noise, and the relative uncertainty they are said to have. */
    private static List<ModulusReading> readings(
            RelaxationModes material, double lowest, double highest, double noise, double saidU, long seed) {
        Random random = new Random(seed);
        return IntStream.rangeClosed(0, 60)
                .mapToObj(i -> {
                    double angularFrequency = lowest * Math.pow(highest / lowest, i / 60.0);
                    Complex modulus = material.modulusPa(angularFrequency);
                    double storage = modulus.re() * (1 + noise * random.nextGaussian());
                    double loss = modulus.im() * (1 + noise * random.nextGaussian());
                    return reading(angularFrequency, new Complex(storage, loss), saidU);
                })
                .toList();
    }

    private static ModulusReading reading(double angularFrequency, Complex modulus, double saidU) {
        double storageU = saidU * modulus.re();
        double lossU = saidU * modulus.im();
        return new ModulusReading(
                angularFrequency,
                new Moduli(
                        modulus.re(),
                        modulus.im(),
                        saidU > 0
                                ? Optional.of(new ModuliCovariance(storageU * storageU, lossU * lossU, 0))
                                : Optional.empty()));
    }
}
