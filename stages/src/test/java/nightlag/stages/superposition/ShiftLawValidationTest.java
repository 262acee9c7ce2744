package nightlag.stages.superposition;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.Arrays;
import java.util.stream.DoubleStream;
import java.util.stream.Stream;
import nightlag.stages.moduli.Marker;
import nightlag.stages.superposition.SuperpositionPlan.ShiftLaw;
import nightlag.stages.superposition.WlfLaw.WlfCovariance;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.MethodSource;
import org.junit.jupiter.params.provider.ValueSource;

/** The shift laws against published constants and closed forms. */
class ShiftLawValidationTest {
    private static final LawQuality EXACT = new LawQuality(0, 0, 0, "");
    private static final WlfCovariance NONE = new WlfCovariance(0, 0, 0);

    /**
     * A polymer's constants at a temperature well above its glass transition, and the same at the glass transition.
     *
     * @param referenceK temperature of c1 and c2K, K
     * @param glassTransitionK Tg, K
     * @param c1AtGlass C1 at Tg as published beside the others; NaN where it is not
     * @param c2AtGlassK likewise C2, K
     */
    record Polymer(
            String name,
            double referenceK,
            double c1,
            double c2K,
            double glassTransitionK,
            double c1AtGlass,
            double c2AtGlassK) {
        WlfLaw law() {
            return new WlfLaw(referenceK, c1, c2K, NONE, EXACT);
        }

        @Override
        public String toString() {
            return name;
        }
    }

    static Stream<Polymer> polymers() {
        return Stream.of(
                // Physical Properties of Polymers Handbook, ed. J. E. Mark, table 26.1; the constants at Tg from memory
                new Polymer("polybutadiene 43 cis/50 trans/7 vinyl", 298, 3.64, 186.5, 172, 11.3, 60),
                new Polymer("polybutadiene 91.5 % vinyl", 298, 6.23, 72.5, 261, 12.7, 35.5),
                new Polymer("polybutadiene 96 % cis", 298, 3.44, 196.6, 161, Double.NaN, Double.NaN),
                new Polymer("polybutadiene 27/37/36 vinyl", 263, 5.97, 123.2, 205, Double.NaN, Double.NaN),
                // Ferry, Viscoelastic Properties of Polymers, 3rd ed. 1980, table of WLF constants; from memory
                new Polymer("polyisobutylene", 298, 8.61, 200.4, 202, 16.6, 104),
                new Polymer("butyl rubber", 298, 9.03, 201.6, 205, 16.8, 108.6),
                new Polymer("Hevea rubber", 248, 8.86, 101.6, 200, 16.7, 53.6),
                new Polymer("styrene-butadiene 23.5 %", 298, 4.57, 113.6, 210, 20.3, 25.6),
                new Polymer("ethylene-propylene 56:44", 298, 5.52, 96.7, 242, 13.1, 40.7),
                new Polymer("polydimethylsiloxane", 303, 1.90, 222, 150, 6.1, 69),
                new Polymer("poly(ethyl methacrylate)", 373, 11.18, 103.5, 335, 17.6, 65.5),
                new Polymer("poly(n-butyl methacrylate)", 373, 9.70, 169.6, 300, 17.0, 96.6),
                new Polymer("poly(n-octyl methacrylate)", 373, 7.60, 227.3, 253, 16.1, 107.3));
    }

    /** The two published sets of a polymer are one law; they were rounded to three digits. */
    @ParameterizedTest(name = "{0}")
    @MethodSource("polymers")
    void publishedConstantsFollowFromOneAnotherByTheInvariants(Polymer polymer) {
        WlfLaw atGlass = polymer.law().at(polymer.glassTransitionK());
        if (!Double.isNaN(polymer.c1AtGlass())) {
            assertThat(atGlass.c1()).isCloseTo(polymer.c1AtGlass(), within(0.01 * polymer.c1AtGlass()));
            assertThat(atGlass.c2K()).isCloseTo(polymer.c2AtGlassK(), within(0.01 * polymer.c2AtGlassK()));
        }
        // exact: C1·C2 and T0 − C2
        assertThat(atGlass.c1() * atGlass.c2K())
                .isCloseTo(polymer.c1() * polymer.c2K(), within(1e-12 * polymer.c1() * polymer.c2K()));
        assertThat(atGlass.referenceTemperatureK() - atGlass.c2K())
                .isCloseTo(polymer.referenceK() - polymer.c2K(), within(1e-12 * 300));
        // exact: log a_T(T; T0') = log a_T(T; T0) − log a_T(T0'; T0)
        double temperatureK = polymer.glassTransitionK() + 70;
        assertThat(atGlass.log10A(temperatureK))
                .isCloseTo(
                        polymer.law().log10A(temperatureK) - polymer.law().log10A(polymer.glassTransitionK()),
                        within(1e-11));
    }

    /** Shifts made by a polymer's law, anchor and reference at different temperatures, give its constants back. */
    @ParameterizedTest(name = "{0}")
    @MethodSource("polymers")
    void shiftsMadeFromPublishedConstantsGiveThemBack(Polymer polymer) {
        double[] temperaturesK = DoubleStream.iterate(10, above -> above + 12)
                .limit(9)
                .map(above -> polymer.glassTransitionK() + above)
                .toArray();
        int anchor = 3;
        double referenceK = polymer.glassTransitionK() + 41.5;
        double[] shifts = Arrays.stream(temperaturesK)
                .map(temperature ->
                        polymer.law().log10A(temperature) - polymer.law().log10A(temperaturesK[anchor]))
                .toArray();

        LawOutcome outcome = LawFit.fit(
                temperaturesK, shifts, Shifts.independent(9, anchor, 0.01), anchor, referenceK, ShiftLaw.AUTO);

        WlfLaw expected = polymer.law().at(referenceK);
        assertThat(outcome.notes()).isEmpty();
        assertThat(outcome.law()).get().isInstanceOfSatisfying(WlfLaw.class, law -> {
            assertThat(law.referenceTemperatureK()).isEqualTo(referenceK);
            assertThat(law.c1()).isCloseTo(expected.c1(), within(1e-6 * expected.c1()));
            assertThat(law.c2K()).isCloseTo(expected.c2K(), within(1e-6 * expected.c2K()));
            assertThat(law.markers())
                    .extracting(Marker::property)
                    .containsExactly("wlf_c1", "wlf_c2", "activation_energy");
        });
    }

    /** Williams, Landel and Ferry, J. Am. Chem. Soc. 77 (1955) 3701: 17.44 and 51.6 K at Tg; the shifts are exact. */
    @ParameterizedTest(name = "T − Tg = {0} K")
    @CsvSource({
        "5, -1.540636",
        "10, -2.831169",
        "20, -4.871508",
        "30, -6.411765",
        "50, -8.582677",
        "75, -10.331754",
        "100, -11.503958"
    })
    void universalConstants(double above, double expected) {
        WlfLaw universal = new WlfLaw(373, 17.44, 51.6, NONE, EXACT);
        assertThat(universal.log10A(373 + above)).isCloseTo(expected, within(5e-7));
    }

    /** The same article gives 8.86 and 101.6 K at Tg + 50 K. */
    @ParameterizedTest(name = "Tg = {0} K")
    @ValueSource(doubles = {200, 373})
    void theTwoUniversalSetsAreOneLaw(double glassTransitionK) {
        WlfLaw universal = new WlfLaw(glassTransitionK, 17.44, 51.6, NONE, EXACT).at(glassTransitionK + 50);
        assertThat(universal.c1()).isCloseTo(8.86, within(0.005));
        assertThat(universal.c2K()).isCloseTo(101.6, within(1e-9));
    }

    /** Polyisobutylene (Ferry 1980, from memory), C1 = 8.61, C2 = 200.4 K at 298 K; the shifts are exact. */
    @ParameterizedTest(name = "{0} K")
    @CsvSource({"273.15, 1.2187895", "323.15, -0.9600599", "373.15, -2.3481818"})
    void polyisobutylene(double temperatureK, double expected) {
        assertThat(new WlfLaw(298, 8.61, 200.4, NONE, EXACT).log10A(temperatureK))
                .isCloseTo(expected, within(5e-8));
    }

    /** Apparent energies ln 10 · R · C1 · T0²/C2 of the constants above, exact, kJ/mol. */
    @ParameterizedTest(name = "{0} K, {1}, {2} K")
    @CsvSource({
        "298, 8.61, 200.4, 73.0",
        "248, 8.86, 101.6, 102.7",
        "303, 1.90, 222, 15.0",
        "373, 9.70, 169.6, 152.3",
        "298, 6.23, 72.5, 146.1"
    })
    void apparentActivationEnergies(double referenceK, double c1, double c2K, double expected) {
        WlfLaw law = new WlfLaw(referenceK, c1, c2K, NONE, EXACT);
        assertThat(law.activationEnergy() / 1000).isCloseTo(expected, within(0.06));
        // it is the slope of ln a_T over 1/T, times R
        double step = 1e-3;
        double slope = Math.log(10)
                * (law.log10A(referenceK + step) - law.log10A(referenceK - step))
                / (1 / (referenceK + step) - 1 / (referenceK - step));
        assertThat(FittedLaw.GAS_CONSTANT * slope)
                .isCloseTo(law.activationEnergy(), within(1e-7 * law.activationEnergy()));
    }

    /** Closed form: shifts of log10 a_T = Ea/(R ln 10)(1/T − 1/T0) give Ea back. */
    @ParameterizedTest(name = "{0} J/mol")
    @ValueSource(doubles = {15_000, 54_000, 180_000, 400_000})
    void arrheniusEnergies(double energy) {
        double[] temperaturesK = {413.15, 433.15, 453.15, 473.15, 493.15};
        int anchor = 4;
        double[] shifts = Arrays.stream(temperaturesK)
                .map(temperature ->
                        energy / (8.31446261815324 * Math.log(10)) * (1 / temperature - 1 / temperaturesK[anchor]))
                .toArray();

        for (ShiftLaw asked : new ShiftLaw[] {ShiftLaw.AUTO, ShiftLaw.ARRHENIUS}) {
            LawOutcome outcome =
                    LawFit.fit(temperaturesK, shifts, Shifts.independent(5, anchor, 0.01), anchor, 443.15, asked);
            assertThat(outcome.notes()).isEmpty();
            assertThat(outcome.law()).get().isInstanceOfSatisfying(ArrheniusLaw.class, law -> {
                assertThat(law.activationEnergy()).isCloseTo(energy, within(1e-9 * energy));
                assertThat(law.log10A(443.15)).isZero();
            });
        }
    }
}
