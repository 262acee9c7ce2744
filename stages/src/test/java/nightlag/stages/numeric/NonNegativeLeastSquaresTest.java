package nightlag.stages.numeric;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatIllegalArgumentException;
import static org.assertj.core.api.Assertions.within;

import java.util.Arrays;
import java.util.Random;
import java.util.stream.IntStream;
import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.apache.commons.math3.linear.ArrayRealVector;
import org.apache.commons.math3.linear.SingularValueDecomposition;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class NonNegativeLeastSquaresTest {
    /** The best of all subsets of columns whose plain least squares come out positive is the answer. */
    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12, 13, 14, 15, 16})
    void isTheBestOfAllSubsets(long seed) {
        Random random = new Random(seed);
        int n = 1 + random.nextInt(7);
        int m = n + random.nextInt(6);
        double[][] columns = IntStream.range(0, n)
                .mapToObj(j -> {
                    double scale = Math.pow(10, 6 * random.nextGaussian());
                    return random.doubles(m, -1, 1).map(v -> scale * v).toArray();
                })
                .toArray(double[][]::new);
        double[] target = random.doubles(m, -1, 1).toArray();

        double[] found = NonNegativeLeastSquares.solve(columns, target);

        assertThat(Arrays.stream(found).allMatch(v -> v >= 0)).isTrue();
        assertThat(squaredResidual(columns, target, found)).isCloseTo(bestOfAllSubsets(columns, target), within(1e-12));
    }

    /** Columns of a fine grid of relaxation times hang on each other to rounding; the conditions of an optimum still hold. */
    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {21, 22, 23, 24})
    void meetsTheConditionsOfAnOptimumOnNearlyDependentColumns(long seed) {
        Random random = new Random(seed);
        double[] frequencies = IntStream.range(0, 40)
                .mapToDouble(i -> Math.pow(10, -3 + i * 6 / 39.0))
                .toArray();
        double[][] columns = IntStream.range(0, 160)
                .mapToObj(j -> Math.pow(10, -4 + j * 8 / 159.0))
                .map(time -> Arrays.stream(frequencies)
                        .map(w -> w * time / (1 + w * w * time * time))
                        .toArray())
                .toArray(double[][]::new);
        double[] target = new double[frequencies.length];
        for (int i = 0; i < target.length; i++) {
            target[i] = columns[40][i] + 3 * columns[99][i] + 1e-3 * random.nextGaussian();
        }

        double[] found = NonNegativeLeastSquares.solve(columns, target);

        double[] residual = residual(columns, target, found);
        for (int j = 0; j < columns.length; j++) {
            double gradient = dot(columns[j], residual) / Math.sqrt(dot(columns[j], columns[j]));
            assertThat(gradient).as("column %d pulls", j).isLessThan(1e-10);
            if (found[j] > 0) {
                assertThat(gradient).as("free column %d", j).isGreaterThan(-1e-10);
            }
        }
    }

    @Test
    void findsWhatMadeTheTarget() {
        double[][] columns = {{1, 0, 1, 0}, {0, 1, 1, 0}, {1, 1, 0, 1}};

        assertThat(NonNegativeLeastSquares.solve(columns, new double[] {2, 5, 7, 0}))
                .containsExactly(new double[] {2, 5, 0}, within(1e-14));
    }

    @Test
    void columnsOfZerosAndRepeatsDoNoHarm() {
        double[][] columns = {{0, 0}, {1, 1}, {1, 1}};

        double[] found = NonNegativeLeastSquares.solve(columns, new double[] {3, 3});

        assertThat(found[0]).isZero();
        assertThat(found[1] + found[2]).isCloseTo(3, within(1e-14));
    }

    @Test
    void aTargetOnTheOtherSideGivesZero() {
        assertThat(NonNegativeLeastSquares.solve(new double[][] {{1, 2}}, new double[] {-1, -1}))
                .containsExactly(0);
        assertThat(NonNegativeLeastSquares.solve(new double[0][], new double[] {1}))
                .isEmpty();
    }

    @Test
    void whatIsNotFiniteOrDoesNotFitIsRefused() {
        assertThatIllegalArgumentException()
                .isThrownBy(() -> NonNegativeLeastSquares.solve(new double[][] {{Double.NaN}}, new double[] {1}));
        assertThatIllegalArgumentException()
                .isThrownBy(() -> NonNegativeLeastSquares.solve(new double[][] {{1}}, new double[] {1, 2}));
    }

    private static double bestOfAllSubsets(double[][] columns, double[] target) {
        double best = dot(target, target);
        for (int subset = 1; subset < 1 << columns.length; subset++) {
            int chosen = subset;
            double[][] some = IntStream.range(0, columns.length)
                    .filter(j -> (chosen >> j & 1) == 1)
                    .mapToObj(j -> {
                        double length = Math.sqrt(dot(columns[j], columns[j]));
                        return Arrays.stream(columns[j]).map(v -> v / length).toArray();
                    })
                    .toArray(double[][]::new);
            double[] solution = new SingularValueDecomposition(new Array2DRowRealMatrix(some).transpose())
                    .getSolver()
                    .solve(new ArrayRealVector(target))
                    .toArray();
            if (Arrays.stream(solution).allMatch(v -> v >= 0)) {
                best = Math.min(best, squaredResidual(some, target, solution));
            }
        }
        return best;
    }

    private static double squaredResidual(double[][] columns, double[] target, double[] x) {
        double[] residual = residual(columns, target, x);
        return dot(residual, residual);
    }

    private static double[] residual(double[][] columns, double[] target, double[] x) {
        double[] residual = target.clone();
        for (int j = 0; j < columns.length; j++) {
            for (int i = 0; i < residual.length; i++) {
                residual[i] -= columns[j][i] * x[j];
            }
        }
        return residual;
    }

    private static double dot(double[] a, double[] b) {
        return IntStream.range(0, a.length).mapToDouble(i -> a[i] * b[i]).sum();
    }
}
