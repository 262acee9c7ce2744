package nightlag.stages.numeric;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;
import static org.assertj.core.api.Assertions.within;

import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class VarianceRatioValidationTest {
    /** Exact: with two degrees of freedom above, P(F > f) = (1 + 2f/ν₂)^(−ν₂/2). */
    @ParameterizedTest(name = "f = {0}, {1} degrees of freedom below")
    @CsvSource({"0.5, 3", "1, 10", "4, 24", "12.5, 47.3", "300, 8"})
    void twoDegreesAboveHaveAClosedForm(double ratio, double below) {
        double exact = Math.pow(1 + 2 * ratio / below, -below / 2);
        assertThat(VarianceRatio.chanceOfMore(ratio, 2, below)).isCloseTo(exact, within(1e-12 * exact));
    }

    /** Exact: P(F > f; ν₁, ν₂) = 1 − P(F > 1/f; ν₂, ν₁), and equal degrees of freedom put the median at 1. */
    @Test
    void theReciprocalIsTheOtherTail() {
        assertThat(VarianceRatio.chanceOfMore(2.7, 7, 31))
                .isCloseTo(1 - VarianceRatio.chanceOfMore(1 / 2.7, 31, 7), within(1e-12));
        assertThat(VarianceRatio.chanceOfMore(1, 13, 13)).isCloseTo(0.5, within(1e-12));
    }

    @Test
    void whatIsNoRatioIsRefused() {
        assertThat(VarianceRatio.chanceOfMore(Double.POSITIVE_INFINITY, 4, 4)).isZero();
        assertThatThrownBy(() -> VarianceRatio.chanceOfMore(Double.NaN, 4, 4))
                .isInstanceOf(IllegalArgumentException.class);
        assertThatThrownBy(() -> VarianceRatio.chanceOfMore(1, 0, 4)).isInstanceOf(IllegalArgumentException.class);
    }
}
