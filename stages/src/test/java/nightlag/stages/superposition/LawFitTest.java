package nightlag.stages.superposition;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.Arrays;
import java.util.Random;
import java.util.function.DoubleUnaryOperator;
import nightlag.stages.fault.Reason;
import nightlag.stages.superposition.SuperpositionPlan.ShiftLaw;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.EnumSource;
import org.junit.jupiter.params.provider.ValueSource;

/** Which law is fitted, what is said where it cannot be, and how its uncertainty moves. */
class LawFitTest {
    private static final double[] TEMPERATURES_K = {283.15, 293.15, 303.15, 313.15, 323.15, 333.15};
    private static final int ANCHOR = 2;

    private static LawOutcome fit(DoubleUnaryOperator law, double u, ShiftLaw asked, double... temperaturesK) {
        int anchor = Math.min(ANCHOR, temperaturesK.length - 1);
        double[] shifts = Arrays.stream(temperaturesK)
                .map(t -> law.applyAsDouble(t) - law.applyAsDouble(temperaturesK[anchor]))
                .toArray();
        return LawFit.fit(
                temperaturesK,
                shifts,
                Shifts.ofSteps(temperaturesK.length, anchor, u),
                anchor,
                temperaturesK[anchor],
                asked);
    }

    private static double wlf(double temperatureK) {
        return -8 * (temperatureK - 303.15) / (90 + temperatureK - 303.15);
    }

    private static double arrhenius(double temperatureK) {
        return 4000 * (1 / temperatureK - 1 / 303.15);
    }

    @Test
    void autoTakesTheLawThatMadeTheShifts() {
        assertThat(fit(LawFitTest::wlf, 0.005, ShiftLaw.AUTO, TEMPERATURES_K).law())
                .containsInstanceOf(WlfLaw.class);
        assertThat(fit(LawFitTest::arrhenius, 0.005, ShiftLaw.AUTO, TEMPERATURES_K)
                        .law())
                .containsInstanceOf(ArrheniusLaw.class);
    }

    /** The constant more is only taken where the shifts tell it from 1/T. */
    @Test
    void autoTakesTheSimplerLawWhereTheShiftsDoNotTell() {
        LawOutcome outcome = fit(LawFitTest::wlf, 0.5, ShiftLaw.AUTO, TEMPERATURES_K);
        assertThat(outcome.law()).containsInstanceOf(ArrheniusLaw.class);
        assertThat(outcome.law().orElseThrow().markers().get(0).method()).contains("chosen over WLF");
    }

    @Test
    void noneIsNoLawAndNoNote() {
        LawOutcome outcome = fit(LawFitTest::wlf, 0.005, ShiftLaw.NONE, TEMPERATURES_K);
        assertThat(outcome.law()).isEmpty();
        assertThat(outcome.notes()).isEmpty();
    }

    /** What a line through the shifts says is told, law or none. */
    @Test
    void noneStillTellsTheApparentActivationEnergy() {
        LawOutcome none = fit(LawFitTest::arrhenius, 0.005, ShiftLaw.NONE, TEMPERATURES_K);
        LawOutcome line = fit(LawFitTest::arrhenius, 0.005, ShiftLaw.ARRHENIUS, TEMPERATURES_K);
        assertThat(none.markers()).singleElement().satisfies(energy -> {
            assertThat(energy.property()).isEqualTo("activation_energy");
            assertThat(energy.value()).isEqualTo(line.markers().get(0).value());
            assertThat(energy.u()).isEqualTo(line.markers().get(0).u());
            assertThat(energy.method()).startsWith("apparent, by an Arrhenius line");
        });
    }

    @ParameterizedTest
    @EnumSource(value = ShiftLaw.class, mode = EnumSource.Mode.EXCLUDE, names = "NONE")
    void oneIsothermHasNoLaw(ShiftLaw asked) {
        LawOutcome outcome = fit(LawFitTest::wlf, 0.005, asked, 303.15);
        assertThat(outcome.law()).isEmpty();
        assertThat(outcome.notes()).extracting(Reason::code).containsExactly("SHIFT_LAW_TOO_FEW_ISOTHERMS");
    }

    @Test
    void oneShiftGivesAnEnergyButNoWlfConstants() {
        LawOutcome asked = fit(LawFitTest::arrhenius, 0.005, ShiftLaw.WLF, 303.15, 323.15);
        assertThat(asked.notes()).extracting(Reason::code).containsExactly("WLF_TOO_FEW_ISOTHERMS");
        LawOutcome auto = fit(LawFitTest::arrhenius, 0.005, ShiftLaw.AUTO, 303.15, 323.15);
        assertThat(auto.notes()).isEmpty();
        double energy = 4000 * 8.31446261815324 * Math.log(10);
        for (LawOutcome outcome : new LawOutcome[] {asked, auto}) {
            assertThat(outcome.law()).get().isInstanceOfSatisfying(ArrheniusLaw.class, law -> {
                assertThat(law.activationEnergy()).isCloseTo(energy, within(1e-9 * energy));
                // by hand: one shift of u = 0.005 decades over 1/303.15 − 1/323.15
                assertThat(law.activationEnergyU())
                        .isCloseTo(
                                0.005 * 8.31446261815324 * Math.log(10) / (1 / 303.15 - 1 / 323.15),
                                within(1e-6 * energy));
            });
        }
    }

    @Test
    void threeIsothermsGiveWlfConstants() {
        assertThat(fit(LawFitTest::wlf, 0.005, ShiftLaw.WLF, 283.15, 303.15, 333.15)
                        .law())
                .get()
                .isInstanceOfSatisfying(WlfLaw.class, law -> {
                    WlfLaw at = law.at(303.15);
                    assertThat(at.c1()).isCloseTo(8, within(8e-6));
                    assertThat(at.c2K()).isCloseTo(90, within(9e-5));
                    assertThat(law.quality().degreesOfFreedom()).isZero();
                });
    }

    /** C2 → ∞, and beyond. */
    @ParameterizedTest(name = "curvature {0} 1/K²")
    @ValueSource(doubles = {0, -2e-4})
    void shiftsThatRunStraightAreNoWlfLaw(double curvature) {
        DoubleUnaryOperator straight = t -> -0.05 * (t - 303.15) + curvature * (t - 303.15) * (t - 303.15);
        for (ShiftLaw asked : new ShiftLaw[] {ShiftLaw.WLF, ShiftLaw.AUTO}) {
            LawOutcome outcome = fit(straight, 0.001, asked, TEMPERATURES_K);
            assertThat(outcome.law()).containsInstanceOf(ArrheniusLaw.class);
            assertThat(outcome.notes()).extracting(Reason::code).containsAnyOf("WLF_STRAIGHT", "WLF_NOT_FIXED");
        }
    }

    @Test
    void aConstantThatIsNotFixedIsNotGiven() {
        LawOutcome outcome = fit(LawFitTest::wlf, 2, ShiftLaw.WLF, TEMPERATURES_K);
        assertThat(outcome.law()).containsInstanceOf(ArrheniusLaw.class);
        assertThat(outcome.notes()).extracting(Reason::code).containsExactly("WLF_NOT_FIXED");
    }

    /** A jump below the second isotherm would be met best by a pole between the two. */
    @Test
    void aPoleNeverLiesWithinTheData() {
        DoubleUnaryOperator jump = t -> t < 290 ? 20 : -0.001 * (t - 293.15);
        LawOutcome outcome = fit(jump, 0.001, ShiftLaw.WLF, TEMPERATURES_K);
        assertThat(outcome.law()).containsInstanceOf(ArrheniusLaw.class);
        assertThat(outcome.notes()).extracting(Reason::code).containsExactly("WLF_POLE_IN_DATA");
    }

    @Test
    void shiftsThatRiseAreNoWlfLaw() {
        LawOutcome outcome = fit(t -> -wlf(t), 0.005, ShiftLaw.WLF, TEMPERATURES_K);
        assertThat(outcome.law())
                .get()
                .satisfies(law -> assertThat(law.activationEnergy()).isNegative());
        assertThat(outcome.notes()).extracting(Reason::code).containsExactly("WLF_NOT_FALLING");
    }

    @Test
    void shiftsThatAreNotFixedOneByOneHaveNoLaw() {
        double[][] oneError = new double[3][3];
        for (int i = 1; i < 3; i++) {
            Arrays.fill(oneError[i], 1, 3, 1);
        }
        LawOutcome outcome = LawFit.fit(
                new double[] {293.15, 303.15, 313.15}, new double[] {0, -1, -2}, oneError, 0, 303.15, ShiftLaw.AUTO);
        assertThat(outcome.law()).isEmpty();
        assertThat(outcome.notes()).extracting(Reason::code).containsExactly("SHIFT_LAW_COVARIANCE_SINGULAR");
    }

    /** Shifts that come without any uncertainty still have a law. */
    @Test
    void shiftsWithoutUncertaintyHaveALaw() {
        assertThat(fit(LawFitTest::wlf, 0, ShiftLaw.AUTO, TEMPERATURES_K).law())
                .get()
                .isInstanceOfSatisfying(
                        WlfLaw.class, law -> assertThat(law.c2K()).isCloseTo(90, within(9e-5)));
    }

    @Test
    void aLawThatMissesTheShiftsSaysSo() {
        Random random = new Random(5);
        double[] off = random.doubles(TEMPERATURES_K.length, -0.05, 0.05).toArray();
        DoubleUnaryOperator scattered = t -> arrhenius(t) + off[(int) Math.round((t - 283.15) / 10)];
        LawOutcome outcome = fit(scattered, 0.002, ShiftLaw.ARRHENIUS, TEMPERATURES_K);
        ArrheniusLaw law = (ArrheniusLaw) outcome.law().orElseThrow();
        double ratio = law.quality().chiSquared() / law.quality().degreesOfFreedom();
        assertThat(ratio).isGreaterThan(10);
        ArrheniusLaw clean = (ArrheniusLaw) fit(LawFitTest::arrhenius, 0.002, ShiftLaw.ARRHENIUS, TEMPERATURES_K)
                .law()
                .orElseThrow();
        assertThat(law.activationEnergyU())
                .isCloseTo(clean.activationEnergyU() * Math.sqrt(ratio), within(1e-9 * law.activationEnergyU()));
        assertThat(law.markers().get(0).method()).contains("the law misses the shifts");
        assertThat(clean.markers().get(0).method()).doesNotContain("misses");
    }

    /** The uncertainty of the law at a temperature does not depend on how its constants are written. */
    @Test
    void uncertaintyMovesWithTheReference() {
        WlfLaw law = (WlfLaw)
                fit(LawFitTest::wlf, 0.01, ShiftLaw.WLF, TEMPERATURES_K).law().orElseThrow();
        WlfLaw there = law.at(325);
        WlfLaw back = there.at(law.referenceTemperatureK());
        assertThat(back.c1U()).isCloseTo(law.c1U(), within(1e-9 * law.c1U()));
        assertThat(back.c2UK()).isCloseTo(law.c2UK(), within(1e-9 * law.c2UK()));
        // the difference of two temperatures is one figure, whichever of them is the reference
        assertThat(law.at(283.15).log10AU(325)).isCloseTo(there.log10AU(283.15), within(1e-9));
        assertThat(there.log10AU(325)).isZero();
        // a shift of three steps of 0.01 decades is known to no worse than 0.01·√3, and the law makes it better
        assertThat(law.log10AU(333.15)).isBetween(0.003, 0.01 * Math.sqrt(3));
    }
}
