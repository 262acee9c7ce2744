package nightlag.stages.numeric;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class CholeskyTest {
    /** AᵀA of random columns, of very different sizes. */
    private static double[][] normal(long seed, int size) {
        Random random = new Random(seed);
        double[][] columns = new double[size][];
        for (int j = 0; j < size; j++) {
            double scale = Math.pow(10, 12 * random.nextDouble() - 6);
            columns[j] = random.doubles(40, -scale, scale).toArray();
        }
        double[][] product = new double[size][size];
        for (int i = 0; i < size; i++) {
            for (int j = 0; j < size; j++) {
                for (int k = 0; k < 40; k++) {
                    product[i][j] += columns[i][k] * columns[j][k];
                }
            }
        }
        return product;
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5, 6})
    void solvesAndInverts(long seed) {
        int size = 2 + (int) seed * 3;
        double[][] matrix = normal(seed, size);
        Cholesky cholesky = Cholesky.of(matrix).orElseThrow();
        double[] truth = new Random(seed + 100).doubles(size, -1, 1).toArray();
        double[] right = new double[size];
        for (int i = 0; i < size; i++) {
            truth[i] /= Math.sqrt(matrix[i][i]);
        }
        double form = 0;
        for (int i = 0; i < size; i++) {
            for (int j = 0; j < size; j++) {
                right[i] += matrix[i][j] * truth[j];
            }
            form += right[i] * truth[i];
        }
        double[] solution = cholesky.solve(right);
        double[][] inverse = cholesky.inverse();
        for (int i = 0; i < size; i++) {
            double unit = 1 / Math.sqrt(matrix[i][i]);
            assertThat(solution[i]).isCloseTo(truth[i], within(1e-12 * unit));
            double byInverse = 0;
            for (int j = 0; j < size; j++) {
                byInverse += inverse[i][j] * right[j];
            }
            assertThat(byInverse).isCloseTo(truth[i], within(1e-11 * unit));
        }
        assertThat(cholesky.inverseForm(right)).isCloseTo(form, within(1e-12 * form));
        assertThat(cholesky.size()).isEqualTo(size);
    }

    @Test
    void columnsThatCannotBeToldApartGiveNothing() {
        assertThat(Cholesky.of(new double[][] {{1, 1}, {1, 1}})).isEmpty();
        assertThat(Cholesky.of(new double[][] {{1, 2}, {2, 1}})).isEmpty();
        assertThat(Cholesky.of(new double[][] {{0}})).isEmpty();
        assertThat(Cholesky.of(new double[][] {{Double.NaN}})).isEmpty();
    }

    @Test
    void reflectionsFactorWhatSquaresCannot() {
        // columns that differ in their ninth digit: their squares differ in the eighteenth, which a double does not
        // have
        double[][] columns = {{1, 1, 1}, {1 + 1e-9, 1, 1}};
        double[][] product = {{3, 3 + 1e-9}, {3 + 1e-9, 3 + 2e-9}};

        assertThat(Cholesky.of(product)).isEmpty();
        assertThat(Cholesky.ofGram(columns).logDeterminant()).isCloseTo(Math.log(2e-18), within(1e-6));
    }
}
