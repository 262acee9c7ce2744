package nightlag.stages.numeric;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.List;
import java.util.Random;
import org.junit.jupiter.api.Test;

/** Few directions carry a covariance whose variance lies in few directions. */
class PivotedCholeskyTest {
    private static final int SIZE = 12;

    @Test
    void theDirectionsAddUpToTheCovariance() {
        double[][] covariance = ofRank(SIZE);

        List<double[]> directions = PivotedCholesky.directions(covariance, 0);

        for (int i = 0; i < SIZE; i++) {
            for (int j = 0; j < SIZE; j++) {
                int row = i;
                int column = j;
                double sum =
                        directions.stream().mapToDouble(d -> d[row] * d[column]).sum();
                assertThat(sum).isCloseTo(covariance[i][j], within(1e-9));
            }
        }
    }

    @Test
    void asManyAsTheRankSuffice() {
        assertThat(PivotedCholesky.directions(ofRank(3), 1e-9)).hasSize(3);
    }

    private static double[][] ofRank(int rank) {
        Random random = new Random(4);
        double[][] covariance = new double[SIZE][SIZE];
        for (int k = 0; k < rank; k++) {
            double[] direction = random.doubles(SIZE, -1, 1).toArray();
            for (int i = 0; i < SIZE; i++) {
                for (int j = 0; j < SIZE; j++) {
                    covariance[i][j] += direction[i] * direction[j];
                }
            }
        }
        return covariance;
    }
}
