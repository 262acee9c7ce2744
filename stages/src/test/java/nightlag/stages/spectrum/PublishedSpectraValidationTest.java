package nightlag.stages.spectrum;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import nightlag.stages.numeric.Complex;
import org.assertj.core.api.Assertions;
import org.assertj.core.data.Percentage;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** Published spectra, and closed forms, against what the two sets give. */
class PublishedSpectraValidationTest {
    /**
     * LDPE melt I at 150 °C, eight modes: Laun, Rheol. Acta 17 (1978) 1 (from memory). The figures that follow from the
     * table are exact given the table.
     */
    static final RelaxationModes LAUN =
            RelaxationModes.of(0, new double[] {1e-4, 1e-3, 1e-2, 1e-1, 1, 10, 100, 1000}, new double[] {
                1.29e5, 9.48e4, 5.86e4, 2.67e4, 9.80e3, 1.89e3, 1.80e2, 1.00
            });

    /**
     * PMMA, eleven modes in MPa: Park &amp; Schapery, Int. J. Solids Struct. 36 (1999) 1653 (from memory). Its compliances
     * are exact given the table, roots and residues with 30 digits.
     */
    static final RelaxationModes PMMA = RelaxationModes.of(
            2.24,
            new double[] {2e-2, 2e-1, 2, 2e1, 2e2, 2e3, 2e4, 2e5, 2e6, 2e7, 2e8},
            new double[] {194, 283, 554, 602, 388, 156, 41.0, 13.8, 3.68, 0.790, 0.960});

    @Test
    void launFigures() {
        assertThat(LAUN.instantaneousModulusPa()).isCloseTo(320_971, within(1e-6));
        assertThat(LAUN.viscosityPaS()).isCloseTo(51_063.7, relative(1e-12));
        assertThat(LAUN.steadyStateCompliancePerPa()).isCloseTo(1.150171152e-3, relative(5e-10));
        assertThat(LAUN.meanTimeS()).isCloseTo(58.73199, relative(1e-7));
        Complex atCrossover = LAUN.modulusPa(1.604072);
        assertThat(atCrossover.re()).isCloseTo(9_806.011, relative(5e-7));
        assertThat(atCrossover.im()).isCloseTo(9_806.011, relative(5e-7));
    }

    @ParameterizedTest(name = "ω = {0} rad/s")
    @CsvSource({
        "1e-3, 2.4812323, 50.383583, 50444.642",
        "1e-2, 110.71017, 408.8549, 42357.888",
        "0.1, 1223.9767, 2269.4721, 25784.923",
        "1, 7222.5811, 8426.1352, 11097.992",
        "10, 25713.587, 21218.261, 3333.7714",
        "100, 68557.174, 42719.472, 807.77716",
        "1000, 145265.35, 66251.222, 159.65978",
        "1e4, 255526.5, 74499.779, 26.616538"
    })
    void launModuli(double angularFrequency, double storage, double loss, double viscosity) {
        Complex modulus = LAUN.modulusPa(angularFrequency);

        assertThat(modulus.re()).isCloseTo(storage, relative(5e-8));
        assertThat(modulus.im()).isCloseTo(loss, relative(5e-8));
        assertThat(modulus.abs() / angularFrequency).isCloseTo(viscosity, relative(5e-8));
    }

    @ParameterizedTest(name = "t = {0} s")
    @CsvSource({
        "1e-4, 229795.27, 4.186924967e-6",
        "1e-3, 126199.64, 7.143052712e-6",
        "1e-2, 57492.780, 1.449936199e-5",
        "0.1, 20744.462, 3.584558098e-5",
        "1, 5495.7814, 1.10383584e-4",
        "10, 859.59785, 4.629791249e-4",
        "100, 67.208943, 2.657004059e-3",
        "1000, 0.37605143, 2.06066776e-2"
    })
    void launRelaxationAndCreep(double time, double modulus, double compliance) {
        assertThat(LAUN.relaxationPa(time)).isCloseTo(modulus, relative(5e-8));
        assertThat(LAUN.retardation().creepPerPa(time)).isCloseTo(compliance, relative(5e-9));
    }

    @Test
    void launRetardation() {
        RetardationModes retardation = LAUN.retardation();

        assertThat(retardation.instantaneousPerPa()).isCloseTo(3.1155462643e-6, relative(2e-11));
        assertThat(1 / retardation.fluidityPerPaS()).isCloseTo(51_063.7, relative(1e-12));
        assertClose(
                retardation.timesS(),
                5e-10,
                1.610858155e-4,
                1.908106096e-3,
                0.02380322983,
                0.2958643085,
                4.459772862,
                66.35540022,
                981.2421955);
        assertClose(
                retardation.strengthsPerPa(),
                5e-10,
                1.725314795e-6,
                4.089907791e-6,
                1.119918129e-5,
                3.449762393e-5,
                1.391053342e-4,
                6.048957918e-4,
                3.515424521e-4);
        assertThat(retardation.recoverablePerPa()).isCloseTo(LAUN.steadyStateCompliancePerPa(), relative(1e-13));
    }

    /** LDPE sets after Verbeeten, Peters &amp; Baaijens, J. Rheol. 45 (2001) 823 and 2002 (from memory). */
    @Test
    void twoMorePolyethylenes() {
        RelaxationModes at170 =
                RelaxationModes.of(0, new double[] {3.8946e-3, 5.1390e-2, 5.0349e-1, 4.5911}, new double[] {
                    7.2006e4, 1.5770e4, 3.3340e3, 3.0080e2
                });
        assertThat(at170.viscosityPaS()).isCloseTo(4_150.4934, relative(1e-8));
        assertThat(at170.steadyStateCompliancePerPa()).isCloseTo(4.1959761e-4, relative(2e-8));
        assertThat(at170.modulusPa(30.266165).re()).isCloseTo(15_765.07, relative(5e-7));

        RelaxationModes at150 =
                RelaxationModes.of(0, new double[] {0.1, 0.63096, 3.9811, 25.119, 158.49, 1000}, new double[] {
                    2.1662e4, 9.9545e3, 3.7775e3, 9.6955e2, 1.1834e2, 4.1614
                });
        assertThat(at150.viscosityPaS()).isCloseTo(70_756.930, relative(1e-8));
        assertThat(at150.steadyStateCompliancePerPa()).isCloseTo(1.5599173e-3, relative(3e-8));
        assertThat(at150.modulusPa(0.92289674).im()).isCloseTo(7_310.86, relative(1e-6));
    }

    @Test
    void pmmaRetardation() {
        RetardationModes retardation = PMMA.retardation();

        assertThat(retardation.instantaneousPerPa()).isCloseTo(4.46534224616e-4, relative(2e-12));
        assertThat(retardation.recoverablePerPa()).isCloseTo(1 / 2.24, relative(1e-14));
        assertClose(
                retardation.timesS(),
                5e-10,
                0.02185910944,
                0.2310317142,
                2.857578781,
                38.01660079,
                514.2443251,
                6545.347083,
                59866.38873,
                588572.465,
                4259841.066,
                25504934.8,
                289633517.7);
        assertClose(
                retardation.strengthsPerPa(),
                5e-10,
                4.067564785e-5,
                7.30524793e-5,
                2.2459504e-4,
                6.411130002e-4,
                1.977957842e-3,
                6.962213724e-3,
                0.02149376475,
                0.06604195651,
                0.1345075253,
                0.07165255204,
                0.1423666309);
    }

    @ParameterizedTest(name = "t = {0} s")
    @CsvSource({
        "1e-2, 2146.250663, 4.655690107e-4, 0.999227798",
        "1, 1515.019679, 6.476725187e-4, 0.981236611",
        "100, 450.0403552, 1.8854672e-3, 0.848536329",
        "1e4, 46.69704586, 0.01362269243, 0.636139493",
        "1e6, 6.271699722, 0.1172142874, 0.735132814",
        "1e8, 2.827592411, 0.344207717, 0.973279129"
    })
    void pmmaRelaxationAndCreep(double time, double modulus, double compliance, double product) {
        double found = PMMA.relaxationPa(time);
        double creep = PMMA.retardation().creepPerPa(time);

        assertThat(found).isCloseTo(modulus, relative(5e-10));
        assertThat(creep).isCloseTo(compliance, relative(5e-10));
        assertThat(found * creep).isCloseTo(product, relative(1e-9));
    }

    @ParameterizedTest(name = "ω = {0} rad/s")
    @CsvSource({"1e-4, 60.393062, 56.184862", "0.01, 551.85644, 290.64223", "1, 1661.1212, 311.94654"})
    void pmmaModuli(double angularFrequency, double storage, double loss) {
        Complex modulus = PMMA.modulusPa(angularFrequency);

        assertThat(modulus.re()).isCloseTo(storage, relative(5e-8));
        assertThat(modulus.im()).isCloseTo(loss, relative(5e-8));
    }

    /** Exact: J0 = 1/10, J1 = Je − J0, λ = τ(G0 + Ge)/Ge. */
    @Test
    void standardLinearSolid() {
        RetardationModes retardation =
                RelaxationModes.of(1, new double[] {1}, new double[] {9}).retardation();

        assertThat(retardation.instantaneousPerPa()).isCloseTo(0.1, relative(1e-15));
        assertThat(retardation.timesS()[0]).isCloseTo(10, relative(1e-15));
        assertThat(retardation.strengthsPerPa()[0]).isCloseTo(0.9, relative(1e-15));
    }

    /** Exact: the two roots of a quadratic. */
    @Test
    void solidOfTwoModes() {
        RelaxationModes relaxation = RelaxationModes.of(1, new double[] {1, 0.01}, new double[] {10, 100});
        RetardationModes retardation = relaxation.retardation();

        assertThat(retardation.instantaneousPerPa()).isCloseTo(1.0 / 111, relative(1e-15));
        assertClose(retardation.timesS(), 5e-10, 0.09314538406, 11.91685462);
        assertClose(retardation.strengthsPerPa(), 1e-9, 0.06846375782, 0.9225272332);
        assertThat(retardation.creepPerPa(1)).isCloseTo(0.1517258348, relative(5e-10));
        assertThat(relaxation.relaxationPa(1)).isCloseTo(4.678794412, relative(5e-10));
    }

    /** Exact: J(t) = 1 + t/10 + ½(1 − e^{−t/2}). */
    @Test
    void burgersModel() {
        RetardationModes retardation = RetardationModes.of(1, 0.1, new double[] {2}, new double[] {0.5});
        RelaxationModes relaxation = retardation.relaxation();

        assertClose(relaxation.timesS(), 1e-12, 1.2715838526, 15.7284161474);
        assertClose(relaxation.strengthsPa(), 2e-11, 0.39624283042, 0.60375716958);
        assertThat(relaxation.isLiquid()).isTrue();
        assertThat(retardation.creepPerPa(10)).isCloseTo(2.4966310265, relative(1e-11));
        assertThat(relaxation.relaxationPa(10)).isCloseTo(0.319851329801, relative(1e-12));
    }

    private static void assertClose(double[] found, double tolerance, double... expected) {
        assertThat(found).hasSize(expected.length);
        for (int i = 0; i < expected.length; i++) {
            assertThat(found[i]).as("entry %d", i).isCloseTo(expected[i], relative(tolerance));
        }
    }

    private static Percentage relative(double fraction) {
        return Assertions.withinPercentage(100 * fraction);
    }
}
