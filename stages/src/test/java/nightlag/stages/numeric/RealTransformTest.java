package nightlag.stages.numeric;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatIllegalArgumentException;
import static org.assertj.core.api.Assertions.within;

import java.util.Random;
import nightlag.stages.numeric.RealTransform.Bins;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class RealTransformTest {
    @ParameterizedTest(name = "{0} values")
    @ValueSource(ints = {1, 2, 3, 4, 5, 6, 7, 8, 97, 100, 128, 199, 211, 398})
    void agreesWithTheSumItStandsFor(int length) {
        Random random = new Random(length);
        double[] values = random.doubles(length, -1, 1).toArray();
        double[] before = values.clone();
        Bins bins = new RealTransform(length).forward(values);
        assertThat(values).containsExactly(before);
        assertThat(bins.size()).isEqualTo(length / 2 + 1);
        for (int k = 0; k < bins.size(); k++) {
            Complex sum = Complex.ZERO;
            for (int j = 0; j < length; j++) {
                // the product of indices is taken modulo the length to keep the angle small
                double angle = -2 * Math.PI * ((long) j * k % length) / length;
                sum = sum.plus(Complex.polar(values[j], angle));
            }
            // 1e-13 relative is what the library reaches for lengths with a prime factor just below 211
            assertThat(bins.at(k).minus(sum).abs()).isLessThan(1e-12 * Math.sqrt(length));
            assertThat(bins.power(k)).isCloseTo(sum.abs() * sum.abs(), within(1e-10 * length));
        }
    }

    @Test
    void refusesWhatWouldComeOutWrongInSilence() {
        RealTransform transform = new RealTransform(4);
        assertThatIllegalArgumentException().isThrownBy(() -> transform.forward(new double[5]));
        assertThatIllegalArgumentException().isThrownBy(() -> transform.forward(new double[3]));
        assertThatIllegalArgumentException().isThrownBy(() -> transform.forward(new double[] {0, Double.NaN, 0, 0}));
        assertThatIllegalArgumentException().isThrownBy(() -> new RealTransform(0));
    }

    @Test
    void fastLengthsHaveNoPrimeFactorAboveFive() {
        for (int limit = 1; limit <= 3000; limit++) {
            int expected = limit;
            while (!smooth(expected)) {
                expected--;
            }
            assertThat(RealTransform.fastLengthUpTo(limit)).isEqualTo(expected);
        }
    }

    private static boolean smooth(int number) {
        int rest = number;
        for (int factor : new int[] {2, 3, 5}) {
            while (rest % factor == 0) {
                rest /= factor;
            }
        }
        return rest == 1;
    }
}
