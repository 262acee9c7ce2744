package nightlag.stages.numeric;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatIllegalArgumentException;
import static org.assertj.core.api.Assertions.within;

import java.util.Arrays;
import java.util.Random;
import java.util.stream.IntStream;
import nightlag.stages.numeric.SmoothSlope.Slopes;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class SmoothSlopeTest {
    private static final double[] PLACES =
            IntStream.rangeClosed(0, 20).mapToDouble(i -> i / 4.0).toArray();

    private static double[] alike(double variance) {
        return Arrays.stream(PLACES).map(x -> variance).toArray();
    }

    @Test
    void aParabolaHasTheSlopeOfLeastSquares() {
        // exact: what a parabola through all values leaves uncertain about its slope in the middle is that of the line,
        // u²/Σ(x − x̄)²
        double[] values = Arrays.stream(PLACES).map(x -> 3 - x + 0.5 * x * x).toArray();
        Slopes slopes = SmoothSlope.of(PLACES, new double[][] {values}, alike(1e-4), PLACES);
        for (int i = 0; i < PLACES.length; i++) {
            assertThat(slopes.slope()[0][i]).isCloseTo(PLACES[i] - 1, within(1e-9));
        }
        double spread = Arrays.stream(PLACES).map(x -> (x - 2.5) * (x - 2.5)).sum();
        assertThat(slopes.variance()[10] * spread / 1e-4).isCloseTo(1, within(0.1));
    }

    @Test
    void anExactCurveIsFollowedClosely() {
        double[] values = Arrays.stream(PLACES).map(Math::sin).toArray();
        double[] between = {0, 1.1, 2.6, 3.9};
        Slopes slopes = SmoothSlope.of(PLACES, new double[][] {values}, alike(1e-24), between);
        for (int i = 1; i < between.length; i++) {
            assertThat(slopes.slope()[0][i]).isCloseTo(Math.cos(between[i]), within(5e-5));
        }
        // at the end the slope is known from one side only, and its uncertainty says so
        double error = Math.abs(slopes.slope()[0][0] - 1);
        assertThat(error).isLessThan(0.02).isLessThan(3 * Math.sqrt(slopes.variance()[0]));
        assertThat(slopes.variance()[0]).isGreaterThan(10 * slopes.variance()[2]);
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5, 6})
    void theWeightsSayHowASlopeMovesWithAValue(long seed) {
        Random random = new Random(seed);
        double[] values = Arrays.stream(PLACES)
                .map(x -> Math.tanh(x - 2) + 0.01 * random.nextGaussian())
                .toArray();
        Slopes slopes = SmoothSlope.of(PLACES, new double[][] {values}, alike(1e-4), PLACES);
        for (int i = 0; i < PLACES.length; i++) {
            double sum = 0;
            for (int j = 0; j < PLACES.length; j++) {
                sum += slopes.weights()[i][j] * values[j];
            }
            assertThat(sum).isCloseTo(slopes.slope()[0][i], within(1e-9));
            double truth = 1 - Math.pow(Math.tanh(PLACES[i] - 2), 2);
            assertThat(Math.abs(slopes.slope()[0][i] - truth) / Math.sqrt(slopes.variance()[i]))
                    .isLessThan(4.5);
        }
    }

    /** Scatter ten times what the uncertainties say is believed, not taken for a rough curve. */
    @Test
    void scatterBeyondTheUncertaintiesWidensThem() {
        Random random = new Random(5);
        double[][] values = new double[2][PLACES.length];
        for (double[] curve : values) {
            Arrays.setAll(curve, i -> 0.1 * random.nextGaussian());
        }
        Slopes told = SmoothSlope.of(PLACES, values, alike(1e-2), PLACES);
        Slopes untold = SmoothSlope.of(PLACES, values, alike(1e-4), PLACES);
        assertThat(Math.sqrt(untold.variance()[10] / told.variance()[10])).isBetween(0.7, 1.4);
    }

    @Test
    void threeValuesAreTheFewest() {
        double[] two = {0, 1};
        assertThatIllegalArgumentException()
                .isThrownBy(() -> SmoothSlope.of(two, new double[][] {two}, new double[] {1, 1}, two));
        double[] three = {0, 1, 3};
        Slopes slopes = SmoothSlope.of(three, new double[][] {{1, 3, 7}}, new double[] {1e-6, 1e-6, 1e-6}, three);
        assertThat(slopes.slope()[0]).containsExactly(new double[] {2, 2, 2}, within(1e-9));
    }
}
