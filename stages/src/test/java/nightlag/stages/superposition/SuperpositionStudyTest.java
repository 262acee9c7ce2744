package nightlag.stages.superposition;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.List;
import java.util.Random;
import java.util.function.LongFunction;
import nightlag.stages.Study;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.moduli.Marker;
import nightlag.stages.superposition.ModelMaterial.Pooling;
import nightlag.stages.superposition.SuperpositionPlan.ShiftLaw;
import nightlag.stages.superposition.SuperpositionPlan.VerticalShift;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/**
 * How exact shifts are, how often their 95 % intervals hold the truth, and how often the verdict is right: isotherms of three
 * decades, ten points a decade, 1 % noise on either modulus.
 */
@Tag("study")
class SuperpositionStudyTest {
    private static final int DRAWS = Study.draws(20, 400);
    private static final double STANDARD_ERRORS = 3;

    /**
     * What is simulated.
     *
     * @param words for the table
     * @param isotherms by seed
     * @param vertical whether ln b is fitted
     * @param worstRms the most the rms error of log10 a_T may be
     */
    record Condition(
            String words, LongFunction<List<IsothermReadings>> isotherms, VerticalShift vertical, double worstRms) {
        @Override
        public String toString() {
            return words;
        }
    }

    private record Outcome(double rms, double covered, double calledOut) {}

    static List<Condition> simpleMaterials() {
        return List.of(
                simple("eight modes", ModelMaterial.LAUN, 10, 0.01, 0, VerticalShift.NONE, 0.004),
                simple("eight modes, without u", ModelMaterial.LAUN, 10, 0, 0, VerticalShift.NONE, 0.004),
                simple("eight modes, 5 K apart", ModelMaterial.LAUN, 5, 0.01, 0, VerticalShift.NONE, 0.004),
                simple("two modes", ModelMaterial.NARROW, 10, 0.01, 0, VerticalShift.NONE, 0.004),
                simple("solid with a plateau", ModelMaterial.SOLID, 10, 0.01, 0, VerticalShift.NONE, 0.004),
                simple("solid, without u", ModelMaterial.SOLID, 10, 0, 0, VerticalShift.NONE, 0.004),
                simple("eight modes, b fitted", ModelMaterial.LAUN, 10, 0.01, 0.003, VerticalShift.FITTED, 0.05),
                simple(
                        "eight modes, b fitted, without u",
                        ModelMaterial.LAUN,
                        10,
                        0,
                        0.003,
                        VerticalShift.FITTED,
                        0.05),
                simple("two modes, b fitted", ModelMaterial.NARROW, 10, 0.01, 0.003, VerticalShift.FITTED, 0.05),
                simple("solid, b fitted", ModelMaterial.SOLID, 10, 0.01, 0.003, VerticalShift.FITTED, 0.05));
    }

    private static Condition simple(
            String words,
            ModelMaterial material,
            double stepK,
            double givenU,
            double lnBPerK,
            VerticalShift vertical,
            double worstRms) {
        return new Condition(
                words,
                seed -> material.isotherms(
                        ModelMaterial.temperatures(9, stepK),
                        10,
                        0.01,
                        givenU,
                        1,
                        t -> lnBPerK * (t - ModelMaterial.REFERENCE_K),
                        new Random(seed)),
                vertical,
                worstRms);
    }

    static List<Condition> pooledSpecimens() {
        return List.of(
                pooled("three specimens, alike", 10, new Pooling(0, 0, 0), 0.01, VerticalShift.NONE, 0.004),
                pooled("three specimens, 10 % apart", 10, new Pooling(0.1, 0, 0), 0.01, VerticalShift.NONE, 0.004),
                pooled("three specimens, 30 % apart", 10, new Pooling(0.3, 0, 0), 0.01, VerticalShift.NONE, 0.004),
                pooled("three, 30 % apart, without u", 10, new Pooling(0.3, 0, 0), 0, VerticalShift.NONE, 0.004),
                pooled("one, hot three, 30 % apart", 10, new Pooling(0.3, 0, 3), 0.01, VerticalShift.NONE, 0.004),
                pooled("three, each loading 10 % off", 5, new Pooling(0.1, 0.1, 0), 0.01, VerticalShift.NONE, 0.05),
                pooled("three, each loading 30 % off", 5, new Pooling(0, 0.3, 0), 0.01, VerticalShift.NONE, 0.05),
                pooled(
                        "one, hot three, loadings 10 % off",
                        5, new Pooling(0.3, 0.1, 3), 0.01, VerticalShift.NONE, 0.05),
                pooled("three, 30 % apart, b fitted", 10, new Pooling(0.3, 0, 0), 0.01, VerticalShift.FITTED, 0.05));
    }

    private static Condition pooled(
            String words, double stepK, Pooling pooling, double givenU, VerticalShift vertical, double worstRms) {
        return new Condition(
                words,
                seed -> ModelMaterial.LAUN.pooled(
                        ModelMaterial.temperatures(9, stepK), givenU, 1, pooling, new Random(seed)),
                vertical,
                worstRms);
    }

    static List<Condition> complexMaterials() {
        return List.of(
                pooledComplex("second mechanism, three 30 % apart", 10, new Pooling(0.3, 0, 0), 0.01),
                pooledComplex("second mechanism, three 30 % apart, without u", 10, new Pooling(0.3, 0, 0), 0),
                pooledComplex("second mechanism, one, hot three, 30 % apart", 10, new Pooling(0.3, 0, 3), 0.01),
                pooledComplex("second mechanism, each loading 30 % off", 5, new Pooling(0, 0.3, 0), 0.01),
                complex("second mechanism, 5 K apart", 5, 0.01, VerticalShift.NONE),
                complex("second mechanism, 10 K apart", 10, 0.01, VerticalShift.NONE),
                complex("second mechanism, without u", 5, 0, VerticalShift.NONE),
                complex("second mechanism, b fitted", 10, 0.01, VerticalShift.FITTED));
    }

    private static Condition complex(String words, double stepK, double givenU, VerticalShift vertical) {
        return new Condition(
                words,
                seed -> ModelMaterial.TWO_MECHANISMS.isotherms(
                        ModelMaterial.temperatures(9, stepK), 10, 0.01, givenU, 0.9, t -> 0, new Random(seed)),
                vertical,
                Double.POSITIVE_INFINITY);
    }

    private static Condition pooledComplex(String words, double stepK, Pooling pooling, double givenU) {
        return new Condition(
                words,
                seed -> ModelMaterial.TWO_MECHANISMS.pooled(
                        ModelMaterial.temperatures(9, stepK), givenU, 0.9, pooling, new Random(seed)),
                VerticalShift.NONE,
                Double.POSITIVE_INFINITY);
    }

    /** Bounds: rms 0.004 and 0.05 decades, 90 to 98 % of intervals hold the truth, 3 of 100 are called out. */
    @ParameterizedTest(name = "{0}")
    @MethodSource({"simpleMaterials", "pooledSpecimens"})
    void simpleMaterialsSuperpose(Condition condition) throws ReductionFault {
        Outcome outcome = run(condition);

        assertThat(outcome.rms()).isLessThan(condition.worstRms());
        // the shifts of a draw hang together: one degree of freedom each is on the safe side
        double allowance = STANDARD_ERRORS * Math.sqrt(0.05 * 0.95 / DRAWS);
        assertThat(outcome.covered()).isBetween(0.90 - allowance, 0.98 + allowance);
        assertThat(outcome.calledOut()).isLessThan(0.03 + STANDARD_ERRORS * Math.sqrt(0.03 * 0.97 / DRAWS));
    }

    /** Bound: 95 of 100 are called out. */
    @ParameterizedTest(name = "{0}")
    @MethodSource("complexMaterials")
    void aSecondMechanismIsCalledOut(Condition condition) throws ReductionFault {
        assertThat(run(condition).calledOut()).isGreaterThanOrEqualTo(0.95);
    }

    private static Outcome run(Condition condition) throws ReductionFault {
        SuperpositionPlan plan = SuperpositionTest.plan(ModelMaterial.REFERENCE_K, condition.vertical(), ShiftLaw.AUTO);
        double squares = 0;
        int covered = 0;
        int shifts = 0;
        int calledOut = 0;
        for (long seed = 0; seed < DRAWS; seed++) {
            MasterCurve curve = Superposition.of(condition.isotherms().apply(seed), plan);
            assertThat(curve.shifts()).allMatch(ShiftFactor::used);
            for (ShiftFactor shift : curve.shifts()) {
                if (shift.temperatureK() != ModelMaterial.REFERENCE_K) {
                    double error = shift.log10A().orElseThrow() - ModelMaterial.log10A(shift.temperatureK());
                    squares += error * error;
                    covered += Math.abs(error) < 1.96 * shift.log10AU().orElseThrow() ? 1 : 0;
                    shifts++;
                }
            }
            Marker misfit = curve.markers().get(curve.markers().size() - 1);
            assertThat(misfit.property()).isEqualTo("superposition_misfit");
            calledOut += misfit.method().startsWith("does not superpose") ? 1 : 0;
        }
        Outcome outcome =
                new Outcome(Math.sqrt(squares / shifts), (double) covered / shifts, (double) calledOut / DRAWS);
        Study.row(
                "| %s (%d) | %.4f | %.1f | %.1f |",
                condition, DRAWS, outcome.rms(), 100 * outcome.covered(), 100 * outcome.calledOut());
        return outcome;
    }
}
