package nightlag.stages.numeric;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatIllegalArgumentException;
import static org.assertj.core.api.Assertions.within;

import org.junit.jupiter.api.Test;

class LevenbergMarquardtTest {
    private static final double[] BELOW = {-100, -100};
    private static final double[] ABOVE = {100, 100};

    /** The curved valley of Rosenbrock, Comput. J. 3 (1960) 175: 10(y − x²), 1 − x, least at (1, 1). */
    private static final LevenbergMarquardt.Problem VALLEY = new LevenbergMarquardt.Problem() {
        @Override
        public double[] residuals(double[] p) {
            return new double[] {10 * (p[1] - p[0] * p[0]), 1 - p[0]};
        }

        @Override
        public double[][] jacobian(double[] p) {
            return new double[][] {{-20 * p[0], -1}, {10, 0}};
        }
    };

    @Test
    void followsACurvedValleyToItsEnd() {
        LevenbergMarquardt.Fit fit =
                LevenbergMarquardt.minimise(VALLEY, new double[] {-1.2, 1}, BELOW, ABOVE, 1e-12, 200);

        assertThat(fit.parameters()).containsExactly(new double[] {1, 1}, within(1e-9));
        assertThat(fit.chiSquared()).isLessThan(1e-18);
    }

    @Test
    void stopsAtABoundAndMovesAlongIt() {
        LevenbergMarquardt.Fit fit =
                LevenbergMarquardt.minimise(VALLEY, new double[] {-1.2, 1}, BELOW, new double[] {0.5, 100}, 1e-12, 200);

        // with x held at ½ the best y is ¼
        assertThat(fit.parameters()).containsExactly(new double[] {0.5, 0.25}, within(1e-6));
    }

    @Test
    void neverEndsHigherThanItBegan() {
        LevenbergMarquardt.Fit fit =
                LevenbergMarquardt.minimise(VALLEY, new double[] {-1.2, 1}, BELOW, ABOVE, 1e-12, 1);

        assertThat(fit.chiSquared()).isLessThanOrEqualTo(24.2);
    }

    @Test
    void aStartThatIsNoNumberIsRefused() {
        assertThatIllegalArgumentException()
                .isThrownBy(() ->
                        LevenbergMarquardt.minimise(VALLEY, new double[] {Double.NaN, 1}, BELOW, ABOVE, 1e-12, 10));
    }

    /** A straight line through four points: the textbook covariance of least squares. */
    @Test
    void linearisedUncertaintyOfAStraightLine() {
        double[][] jacobian = {{1, 1, 1, 1}, {0, 1, 2, 3}};
        double[] vague = {1e6, 1e6};

        LinearisedUncertainty uncertainty = new LinearisedUncertainty(jacobian, vague);

        assertThat(uncertainty.of(new double[] {1, 0})).isCloseTo(Math.sqrt(0.7), within(1e-9));
        assertThat(uncertainty.of(new double[] {0, 1})).isCloseTo(Math.sqrt(0.2), within(1e-9));
        assertThat(uncertainty.of(new double[] {1, 1.5})).isCloseTo(0.5, within(1e-9));
    }

    @Test
    void whatTheDataDoNotTellStaysAsVagueAsBefore() {
        LinearisedUncertainty uncertainty =
                new LinearisedUncertainty(new double[][] {{1, 2}, {0, 0}}, new double[] {1e6, 7});

        assertThat(uncertainty.of(new double[] {0, 1})).isCloseTo(7, within(1e-12));
    }
}
