package nightlag.stages.moduli;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import org.junit.jupiter.api.Test;

/** By hand: two groups, the second off by 0.02 in ln ω and by 0.01 in ln |G*|, the two wholly tied. */
class SharedErrorsTest {
    private static final SharedErrors ERRORS = SharedErrors.of(
            new int[] {0, 1, 1}, new double[][] {{0, 0, 0, 0}, {0, 4e-4, 0, 2e-4}, {0, 0, 0, 0}, {0, 2e-4, 0, 1e-4}});

    @Test
    void readingsOfAGroupErrTogether() {
        double[] nothing = new double[3];
        assertThat(ERRORS.variance(new double[] {5, 0.25, 0.75}, nothing)).isCloseTo(4e-4, within(1e-18));
        assertThat(ERRORS.variance(nothing, new double[] {5, 1, 1})).isCloseTo(4e-4, within(1e-18));
    }

    /** A figure that goes as the modulus over the square root of the frequency is not touched. */
    @Test
    void tiedErrorsCancel() {
        assertThat(ERRORS.variance(new double[] {0, -0.25, -0.25}, new double[] {0, 0.5, 0.5}))
                .isCloseTo(0, within(1e-18));
    }

    @Test
    void someReadingsKeepTheirGroups() {
        SharedErrors some = ERRORS.ofReadings(new int[] {2, 0});
        assertThat(some.variance(new double[] {1, 7}, new double[2])).isCloseTo(4e-4, within(1e-18));
        assertThat(SharedErrors.none().ofReadings(new int[] {2, 0}).variance(new double[2], new double[2]))
                .isZero();
        assertThat(SharedErrors.none().isNone()).isTrue();
        assertThat(ERRORS.isNone()).isFalse();
    }
}
