package nightlag.stages.numeric;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatIllegalArgumentException;
import static org.assertj.core.api.Assertions.within;

import java.util.List;
import java.util.stream.DoubleStream;
import org.junit.jupiter.api.Test;

class SecularEquationTest {
    @Test
    void onePoleIsALinearEquation() {
        SecularEquation equation = equation(4, new double[] {3}, new double[] {8});

        // 4 + 8/(3 − x) = 0
        assertThat(equation.rootCount()).isEqualTo(1);
        assertThat(equation.rootAbove(0).value().value()).isEqualTo(5);
        assertThat(equation.rootAbove(0).slope().value()).isEqualTo(2);
    }

    @Test
    void twoPolesAreAQuadratic() {
        SecularEquation equation = equation(1, new double[] {1, 2}, new double[] {1, 1});

        // 1 + 1/(1 − x) + 1/(2 − x) = 0: x² − 5x + 5 = 0
        assertThat(equation.rootAbove(0).value().value()).isCloseTo((5 - Math.sqrt(5)) / 2, within(1e-15));
        assertThat(equation.rootAbove(1).value().value()).isCloseTo((5 + Math.sqrt(5)) / 2, within(1e-15));
    }

    @Test
    void withoutAConstantThereIsNoRootBeyondTheLastPole() {
        SecularEquation equation = equation(0, new double[] {1, 3}, new double[] {5, 5});

        assertThat(equation.rootCount()).isEqualTo(1);
        assertThat(equation.rootAbove(0).value().value()).isEqualTo(2);
    }

    @Test
    void aWeakPolesRootKeepsItsOffset() {
        SecularEquation equation = equation(1, new double[] {1, 1e6}, new double[] {1e-30, 1});

        // beside 1 the other term is 1/(1e6 − 1): the offset is 1e-30/(1 + 1e-6)
        DoubleDouble offset = equation.rootAbove(0).value().minus(AnchoredValue.of(1));

        assertThat(offset.value()).isCloseTo(1e-30 / (1 + 1 / 999_999.0), within(1e-45));
    }

    @Test
    void whatHasNoSuchRootsIsRefused() {
        assertThatIllegalArgumentException().isThrownBy(() -> equation(-1, new double[] {1}, new double[] {1}));
        assertThatIllegalArgumentException().isThrownBy(() -> equation(1, new double[] {1}, new double[] {0}));
        assertThatIllegalArgumentException().isThrownBy(() -> equation(1, new double[] {2, 1}, new double[] {1, 1}));
        assertThatIllegalArgumentException().isThrownBy(() -> equation(1, new double[] {2}, new double[] {1, 1}));
    }

    private static SecularEquation equation(double constant, double[] poles, double[] weights) {
        List<AnchoredValue> anchored =
                DoubleStream.of(poles).mapToObj(AnchoredValue::of).toList();
        return new SecularEquation(
                DoubleDouble.of(constant),
                anchored,
                DoubleStream.of(weights).mapToObj(DoubleDouble::of).toList());
    }
}
