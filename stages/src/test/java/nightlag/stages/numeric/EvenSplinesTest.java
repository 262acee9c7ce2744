package nightlag.stages.numeric;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.Arrays;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** Splines of fifth degree, and the banded equations they lead to. */
class EvenSplinesTest {
    /** Values of the cardinal quintic spline at its knots: 1/120, 26/120, 66/120, 26/120, 1/120 (exact). */
    @Test
    void valuesAtAKnot() {
        double[] values = new EvenSplines(-2, 0.5, 10).values(-1);

        assertThat(values)
                .containsExactly(
                        new double[] {1 / 120.0, 26 / 120.0, 66 / 120.0, 26 / 120.0, 1 / 120.0, 0}, within(1e-15));
    }

    @ParameterizedTest(name = "place {0}")
    @ValueSource(doubles = {-2, -1.9, -0.333, 0, 1.71, 2.9999, 3})
    void theyAddUpToOneAndTheirSlopesAreTheirDerivatives(double place) {
        EvenSplines splines = EvenSplines.covering(-2, 3, 0.7);
        double step = 1e-6;
        double inside = Math.max(-2 + step, Math.min(3 - step, place));

        assertThat(Arrays.stream(splines.values(place)).sum()).isCloseTo(1, within(1e-14));
        assertThat(Arrays.stream(splines.slopes(place)).sum()).isCloseTo(0, within(1e-13));
        double[] before = splines.values(inside - step);
        double[] after = splines.values(inside + step);
        if (splines.first(inside - step) == splines.first(inside + step)) {
            for (int i = 0; i < EvenSplines.SUPPORT; i++) {
                assertThat(splines.slopes(inside)[i]).isCloseTo((after[i] - before[i]) / (2 * step), within(1e-8));
            }
        }
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {0, 1, 2})
    void roughnessIsTheSumOfSquaredDifferences(long seed) {
        Random random = new Random(seed);
        double[] coefficients = random.doubles(12).toArray();
        double[][] band = EvenSplines.roughness(12);
        double form = 0;
        for (int i = 0; i < 12; i++) {
            for (int k = 0; k <= Math.min(i, 3); k++) {
                form += (k > 0 ? 2 : 1) * band[i][k] * coefficients[i] * coefficients[i - k];
            }
        }

        double[] differences = EvenSplines.differences(coefficients);

        assertThat(form).isCloseTo(Arrays.stream(differences).map(d -> d * d).sum(), within(1e-12));
        double[] gradient = EvenSplines.transposedDifferences(differences);
        double product = 0;
        for (int i = 0; i < 12; i++) {
            product += gradient[i] * coefficients[i];
        }
        assertThat(product).isCloseTo(form, within(1e-12));
    }

    @Test
    void aParabolaIsNotRough() {
        double[] parabola = new double[9];
        Arrays.setAll(parabola, i -> 2 - 3 * i + 0.5 * i * i);

        assertThat(EvenSplines.differences(parabola)).containsOnly(0);
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {0, 1, 2})
    void aBandedMatrixIsSolvedLikeAFullOne(long seed) {
        Random random = new Random(seed);
        double[][] band = new double[15][4];
        double[][] full = new double[15][15];
        for (int i = 0; i < 15; i++) {
            for (int k = 0; k < 4 && k <= i; k++) {
                band[i][k] = k == 0 ? 8 + random.nextDouble() : random.nextDouble();
                full[i][i - k] = band[i][k];
                full[i - k][i] = band[i][k];
            }
        }
        double[] right = random.doubles(15).toArray();

        BandedCholesky banded = BandedCholesky.of(band).orElseThrow();

        Cholesky reference = Cholesky.of(full).orElseThrow();
        assertThat(banded.solve(right)).containsExactly(reference.solve(right), within(1e-14));
        assertThat(banded.logDeterminant()).isCloseTo(reference.logDeterminant(), within(1e-12));
    }

    @Test
    void whatIsNotPositiveDefiniteIsRefused() {
        assertThat(BandedCholesky.of(new double[][] {{1, 0}, {1, 2}})).isEmpty();
        assertThat(BandedCholesky.of(new double[][] {{1, 0}, {1, 1}})).isEmpty();
    }
}
