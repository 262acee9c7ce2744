package nightlag.stages.numeric;

import static org.assertj.core.api.Assertions.assertThat;

import java.math.BigDecimal;
import java.math.MathContext;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class DoubleDoubleTest {
    private static final MathContext FIFTY_DIGITS = new MathContext(50);

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5})
    void keepsThirtyDigits(long seed) {
        Random random = new Random(seed);
        for (int i = 0; i < 200; i++) {
            DoubleDouble a = any(random);
            DoubleDouble b = any(random);

            assertDigits(a.times(b), exact(a).multiply(exact(b)));
            assertDigits(a.times(b.hi()), exact(a).multiply(new BigDecimal(b.hi())));
            assertDigits(a.over(b), exact(a).divide(exact(b), FIFTY_DIGITS));
            assertDigits(a.plus(b), exact(a).add(exact(b)));
            assertDigits(a.minus(b), exact(a).subtract(exact(b)));
            assertDigits(a.plus(b.hi()), exact(a).add(new BigDecimal(b.hi())));
        }
    }

    @Test
    void aThirdTimesThreeIsOneToTheLastDigit() {
        DoubleDouble third = DoubleDouble.ONE.over(DoubleDouble.of(3));

        assertThat(third.times(3).minus(DoubleDouble.ONE).value()).isBetween(-1e-31, 1e-31);
        assertThat(third.times(3).value()).isEqualTo(1);
    }

    @Test
    void offsetsFromTheSameAnchorLoseNothing() {
        AnchoredValue left = AnchoredValue.of(1e6).plus(DoubleDouble.of(3 * 0x1p-65));
        AnchoredValue right = AnchoredValue.of(1e6).plus(DoubleDouble.of(0x1p-65));

        assertThat(left.minus(right).value()).isEqualTo(0x1p-64);
        assertThat(left.value()).isEqualTo(1e6);
        assertThat(left.minus(AnchoredValue.of(999_999.5)).value()).isEqualTo(0.5);
    }

    private static DoubleDouble any(Random random) {
        double hi = random.nextGaussian() * Math.pow(10, random.nextInt(20) - 10);
        return DoubleDouble.of(hi).plus(hi * 1e-17 * random.nextGaussian());
    }

    private static BigDecimal exact(DoubleDouble value) {
        return new BigDecimal(value.hi()).add(new BigDecimal(value.lo()));
    }

    private static void assertDigits(DoubleDouble found, BigDecimal truth) {
        double error =
                exact(found).subtract(truth).divide(truth, FIFTY_DIGITS).abs().doubleValue();
        assertThat(error).isLessThan(1e-30);
    }
}
