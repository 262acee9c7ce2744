package nightlag.stages.superposition;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.Arrays;
import java.util.Random;
import nightlag.stages.Study;
import nightlag.stages.superposition.SuperpositionPlan.ShiftLaw;
import nightlag.stages.superposition.WlfLaw.WlfCovariance;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** How often the intervals of the laws' constants hold the truth, under shifts that share their errors. */
@Tag("study")
class LawFitStudyTest {
    private static final double NORMAL_95 = 1.959964;

    private static final LawQuality EXACT = new LawQuality(0, 0, 0, "");

    private static boolean holds(double value, double u, double truth) {
        return Math.abs(value - truth) <= NORMAL_95 * u;
    }

    private static void assertCovers(int held, int draws, String what) {
        double share = (double) held / draws;
        double slack = 3 * Math.sqrt(0.95 * 0.05 / draws);
        assertThat(share).as(what).isBetween(0.90 - slack, 0.98 + slack);
    }

    @ParameterizedTest(name = "seed {0}: {1} isotherms, steps known to {2} decades")
    @CsvSource({"11, 5, 0.002", "12, 9, 0.004", "13, 9, 0.02", "14, 15, 0.01"})
    void wlfIntervalsHoldTheTruth(long seed, int isotherms, double u) {
        Random random = new Random(seed);
        int draws = Study.draws(1000, 20_000);
        WlfLaw truth = new WlfLaw(300, 9, 110, new WlfCovariance(0, 0, 0), EXACT);
        double[] temperaturesK = new double[isotherms];
        Arrays.setAll(temperaturesK, i -> 270 + 80.0 * i / (isotherms - 1));
        int anchor = isotherms / 3;
        double[][] covariance = Shifts.ofSteps(isotherms, anchor, u);
        int given = 0;
        int c1 = 0;
        int c2 = 0;
        int energy = 0;
        int shift = 0;
        for (int draw = 0; draw < draws; draw++) {
            double[] errors = Shifts.drawSteps(isotherms, anchor, u, random);
            double[] shifts = new double[isotherms];
            Arrays.setAll(
                    shifts, i -> truth.log10A(temperaturesK[i]) - truth.log10A(temperaturesK[anchor]) + errors[i]);
            LawOutcome outcome = LawFit.fit(temperaturesK, shifts, covariance, anchor, 300, ShiftLaw.WLF);
            if (outcome.law().orElseThrow() instanceof WlfLaw law) {
                given++;
                c1 += holds(law.c1(), law.c1U(), truth.c1()) ? 1 : 0;
                c2 += holds(law.c2K(), law.c2UK(), truth.c2K()) ? 1 : 0;
                energy += holds(law.activationEnergy(), law.activationEnergyU(), truth.activationEnergy()) ? 1 : 0;
                shift += holds(law.log10A(345), law.log10AU(345), truth.log10A(345)) ? 1 : 0;
            }
        }
        Study.row(
                "| WLF, %d isotherms, steps to %.3f decades | C1 %.1f | C2 %.1f | Ea %.1f | log a_T %.1f |",
                isotherms, u, 100.0 * c1 / given, 100.0 * c2 / given, 100.0 * energy / given, 100.0 * shift / given);
        assertThat(given).isGreaterThan((int) (0.999 * draws) - 1);
        assertCovers(c1, given, "C1");
        assertCovers(c2, given, "C2");
        assertCovers(energy, given, "Ea");
        assertCovers(shift, given, "log a_T between the isotherms");
    }

    @ParameterizedTest(name = "seed {0}: {1} isotherms")
    @CsvSource({"21, 2", "22, 4", "23, 9"})
    void energyIntervalsHoldTheTruthAndWlfIsSeldomTakenForArrhenius(long seed, int isotherms) {
        Random random = new Random(seed);
        int draws = Study.draws(1000, 20_000);
        double u = 0.005;
        ArrheniusLaw truth = new ArrheniusLaw(440, 60_000, 0, EXACT);
        double[] temperaturesK = new double[isotherms];
        Arrays.setAll(temperaturesK, i -> 413.15 + 80.0 * i / (isotherms - 1));
        int anchor = isotherms / 2;
        double[][] covariance = Shifts.ofSteps(isotherms, anchor, u);
        int energy = 0;
        int bent = 0;
        for (int draw = 0; draw < draws; draw++) {
            double[] errors = Shifts.drawSteps(isotherms, anchor, u, random);
            double[] shifts = new double[isotherms];
            Arrays.setAll(
                    shifts, i -> truth.log10A(temperaturesK[i]) - truth.log10A(temperaturesK[anchor]) + errors[i]);
            FittedLaw law = LawFit.fit(temperaturesK, shifts, covariance, anchor, 440, ShiftLaw.ARRHENIUS)
                    .law()
                    .orElseThrow();
            energy += holds(law.activationEnergy(), law.activationEnergyU(), 60_000) ? 1 : 0;
            bent += LawFit.fit(temperaturesK, shifts, covariance, anchor, 440, ShiftLaw.AUTO)
                                    .law()
                                    .orElseThrow()
                            instanceof WlfLaw
                    ? 1
                    : 0;
        }
        Study.row(
                "| Arrhenius, %d isotherms | Ea %.1f | taken for WLF %.1f |",
                isotherms, 100.0 * energy / draws, 100.0 * bent / draws);
        assertCovers(energy, draws, "Ea");
        // 5 % by the test's own level, less where the covariance turns out too small
        assertThat((double) bent / draws).isLessThan(0.05 + 3 * Math.sqrt(0.05 * 0.95 / draws));
    }

    /** A WLF material over 80 K is not taken for an Arrhenius one. */
    @Test
    void wlfIsFound() {
        Random random = new Random(31);
        int draws = Study.draws(500, 5000);
        int isotherms = 9;
        WlfLaw truth = new WlfLaw(300, 9, 110, new WlfCovariance(0, 0, 0), EXACT);
        double[] temperaturesK = new double[isotherms];
        Arrays.setAll(temperaturesK, i -> 270 + 10.0 * i);
        int found = 0;
        for (int draw = 0; draw < draws; draw++) {
            double[] errors = Shifts.drawSteps(isotherms, 3, 0.01, random);
            double[] shifts = new double[isotherms];
            Arrays.setAll(shifts, i -> truth.log10A(temperaturesK[i]) - truth.log10A(300) + errors[i]);
            found += LawFit.fit(temperaturesK, shifts, Shifts.ofSteps(isotherms, 3, 0.01), 3, 300, ShiftLaw.AUTO)
                                    .law()
                                    .orElseThrow()
                            instanceof WlfLaw
                    ? 1
                    : 0;
        }
        assertThat(found).isEqualTo(draws);
    }
}
