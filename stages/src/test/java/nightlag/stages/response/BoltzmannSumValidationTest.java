package nightlag.stages.response;

import static nightlag.stages.response.Programmes.programme;
import static nightlag.stages.response.Programmes.step;
import static nightlag.stages.response.Programmes.strain;
import static nightlag.stages.response.Programmes.strains;
import static nightlag.stages.response.Programmes.stress;
import static nightlag.stages.response.Programmes.stresses;
import static nightlag.stages.response.Programmes.totals;
import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.List;
import nightlag.stages.response.Programme.Instant;
import nightlag.stages.response.ResponseRow.StrainParts;
import nightlag.stages.spectrum.RelaxationModes;
import nightlag.stages.spectrum.RetardationModes;
import org.junit.jupiter.api.Test;

/** Against closed forms; all exact. */
class BoltzmannSumValidationTest {
    /** J(t) = 1 + t/10 + 0.5 (1 − e^{−t/2}). */
    private static final RetardationModes BURGERS = RetardationModes.of(1, 0.1, new double[] {2}, new double[] {0.5});

    /** Ge = 1, G1 = 9, τ = 1: J0 = 0.1, J1 = 0.9, λ = 10. */
    private static final RelaxationModes STANDARD_SOLID = RelaxationModes.of(1, new double[] {1}, new double[] {9});

    private static final double YEAR = 31_557_600;

    @Test
    void burgersLiquidCreepsAndRecovers() {
        ResponsePlan plan = stress(20, step(0, 1), step(10, 0));
        List<StrainParts> strains = strains(plan, BURGERS);
        List<Instant> instants = programme(plan).instants();

        for (int i = 1; i < strains.size(); i++) {
            Instant at = instants.get(i);
            double expected =
                    at.segment() == 0 ? burgers(at.sinceS()) : burgers(10 + at.sinceS()) - burgers(at.sinceS());
            assertThat(strains.get(i).sum()).isCloseTo(expected, within(1e-9 * expected));
        }
        int unloaded = indexOf(instants, 1, 0);
        assertThat(strains.get(unloaded - 1).sum()).isCloseTo(2.4966310265, within(1e-10));
        assertThat(strains.get(unloaded).sum()).isCloseTo(1.4966310265, within(1e-10));
        assertThat(strains.get(indexOf(instants, 1, 1)).sum()).isCloseTo(1.30122194414, within(1e-10));
        assertThat(strains.get(strains.size() - 1).sum()).isCloseTo(1.00334627353, within(1e-10));
    }

    private static double burgers(double t) {
        return 1 + t / 10 - 0.5 * Math.expm1(-t / 2);
    }

    @Test
    void aStrainIsWhatComesBackAtOnceLaterAndNever() {
        List<StrainParts> strains = strains(stress(1000, step(0, 1), step(10, 0)), BURGERS);
        ResponsePlan held = stress(10, step(0, 1));
        StrainParts loaded = strains(held, BURGERS).get(strains(held, BURGERS).size() - 1);

        assertThat(loaded.atOnce()).isEqualTo(1);
        assertThat(loaded.later()).isCloseTo(0.5 * (1 - Math.exp(-5)), within(1e-15));
        assertThat(loaded.never()).isCloseTo(1, within(1e-15));
        // 10 s at a fluidity of 0.1 stay
        assertThat(strains.get(strains.size() - 1).sum()).isCloseTo(1, within(1e-15));
    }

    @Test
    void burgersLiquidRelaxes() {
        ResponsePlan plan = strain(10, step(0, 1));
        double[] stresses = stresses(plan, BURGERS.relaxation());
        List<Instant> instants = programme(plan).instants();

        for (int i = 1; i < stresses.length; i++) {
            double t = instants.get(i).sinceS();
            // the two times to the digits given
            double expected =
                    0.60375716958 * Math.exp(-t / 15.7284161474) + 0.39624283042 * Math.exp(-t / 1.2715838526);
            assertThat(stresses[i]).isCloseTo(expected, within(1e-9));
        }
        assertThat(stresses[stresses.length - 1]).isCloseTo(0.319851329801, within(1e-11));
    }

    @Test
    void standardLinearSolid() {
        ResponsePlan creep = stress(100, step(0, 2));
        double[] strains = totals(strains(creep, STANDARD_SOLID.retardation()));
        ResponsePlan relaxation = strain(100, step(0, 0.02), step(3, 0.01));
        double[] stresses = stresses(relaxation, STANDARD_SOLID);

        for (int i = 1; i < strains.length; i++) {
            double t = programme(creep).instants().get(i).sinceS();
            double expected = 2 * (0.1 - 0.9 * Math.expm1(-t / 10));
            assertThat(strains[i]).isCloseTo(expected, within(1e-9 * expected));
        }
        for (int i = 1; i < stresses.length; i++) {
            Instant at = programme(relaxation).instants().get(i);
            double first = 1 + 9 * Math.exp(-(at.segment() == 0 ? at.sinceS() : 3 + at.sinceS()));
            double second = at.segment() == 0 ? 0 : 1 + 9 * Math.exp(-at.sinceS());
            assertThat(stresses[i]).isCloseTo(0.02 * first - 0.01 * second, within(1e-11));
        }
    }

    @Test
    void aYearOfModesOfATenthOfAMillisecondLosesNothing() {
        RetardationModes fastAndSlow =
                RetardationModes.of(1e-9, 0, new double[] {1e-4, 1e6}, new double[] {1e-9, 1e-3});
        ResponsePlan plan = stress(YEAR, step(0, 1e6), step(YEAR / 2, 0));
        List<StrainParts> strains = strains(plan, fastAndSlow);
        List<Instant> instants = programme(plan).instants();

        for (int i = 1; i < strains.size(); i++) {
            Instant at = instants.get(i);
            double t = at.sinceS();
            double expected = at.segment() == 0
                    ? 1e-3 * (1 - Math.expm1(-t / 1e-4)) - 1e3 * Math.expm1(-t / 1e6)
                    : -1e-3 * Math.expm1(-YEAR / 2 / 1e-4) * Math.exp(-t / 1e-4)
                            - 1e3 * Math.expm1(-YEAR / 2 / 1e6) * Math.exp(-t / 1e6);
            assertThat(strains.get(i).sum()).isCloseTo(expected, within(1e-12 * expected));
        }
    }

    private static int indexOf(List<Instant> instants, int segment, double sinceS) {
        return java.util.stream.IntStream.range(0, instants.size())
                .filter(i -> instants.get(i).segment() == segment
                        && Math.abs(instants.get(i).sinceS() - sinceS) <= 1e-12)
                .findFirst()
                .orElseThrow();
    }
}
