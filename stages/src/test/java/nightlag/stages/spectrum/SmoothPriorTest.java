package nightlag.stages.spectrum;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** Standard numbers make curves whose second differences they are, and derivatives go back the same way. */
class SmoothPriorTest {
    private static final double STEP = 0.25;

    @ParameterizedTest(name = "{0} nodes")
    @ValueSource(ints = {8, 9, 40})
    void eachBendHasTheStiffnessAskedFor(int count) {
        SmoothPrior prior = new SmoothPrior(count, STEP, Math.log(4));
        double[] standard = new Random(1).doubles(count, -1, 1).toArray();

        double[] curve = prior.curve(standard);

        double squares = 0;
        double expected = 0;
        for (int i = 1; i < count - 1; i++) {
            double curvature = (curve[i + 1] - 2 * curve[i] + curve[i - 1]) / (STEP * STEP);
            squares += 4 * curvature * curvature * STEP;
            expected += standard[i + 1] * standard[i + 1];
        }
        // α ∫ u''² is the sum of the squares of the bends' numbers
        assertThat(squares).isCloseTo(expected, within(1e-9));
    }

    @Test
    void withoutBendsItIsAStraightLine() {
        double[] standard = new double[9];
        standard[0] = 0.1;
        standard[1] = 0.2;

        double[] curve = new SmoothPrior(9, STEP, 0).curve(standard);

        assertThat(curve[4]).isCloseTo(1, within(1e-12));
        assertThat(curve[8] - curve[4]).isCloseTo(4 * STEP * 1, within(1e-12));
    }

    @ParameterizedTest(name = "{0} nodes")
    @ValueSource(ints = {8, 9, 40})
    void derivativesGoBackTheWayTheCurveCame(int count) {
        SmoothPrior prior = new SmoothPrior(count, STEP, -1);
        Random random = new Random(2);
        double[] standard = random.doubles(count, -1, 1).toArray();
        double[][] byLogs = new double[count][1];
        for (double[] column : byLogs) {
            column[0] = random.nextDouble();
        }

        double[] curve = prior.curve(standard);
        double[][] byStandard = prior.byStandard(byLogs);

        double overCurve = 0;
        double overStandard = 0;
        for (int i = 0; i < count; i++) {
            overCurve += curve[i] * byLogs[i][0];
            overStandard += standard[i] * byStandard[i][0];
        }
        assertThat(overStandard).isCloseTo(overCurve, within(1e-9 * Math.abs(overCurve) + 1e-9));
    }
}
