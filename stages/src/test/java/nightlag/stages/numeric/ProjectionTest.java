package nightlag.stages.numeric;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.List;
import org.junit.jupiter.api.Test;

/** What a fit by columns leaves. */
class ProjectionTest {
    /** The straight line through 1, 2, 4 at 0, 1, 2 is 5/6 + 3/2 x (exact). */
    @Test
    void aStraightLineLeavesWhatIsWorkedOutByHand() {
        Projection line =
                Projection.of(List.of(new double[] {1, 1, 1}, new double[] {0, 1, 2}), new double[] {1, 2, 4});

        assertThat(line.dimensions()).isEqualTo(2);
        assertThat(line.residual()).containsExactly(new double[] {1.0 / 6, -1.0 / 3, 1.0 / 6}, within(1e-15));
        assertThat(line.squares()).isCloseTo(1.0 / 6, within(1e-15));
    }

    @Test
    void aColumnThatSaysNothingNewDoesNotCount() {
        double[] ones = {1, 1, 1};
        double[] rising = {0, 1, 2};

        Projection fit =
                Projection.of(List.of(ones, rising, new double[] {3, 5, 7}, new double[3]), new double[] {1, 2, 4});

        assertThat(fit.dimensions()).isEqualTo(2);
        assertThat(fit.squares()).isCloseTo(1.0 / 6, within(1e-15));
    }

    @Test
    void columnsThatReachEverythingLeaveNothing() {
        Projection fit = Projection.of(
                List.of(new double[] {1, 1e-3, 0}, new double[] {1, 0, 1e-3}, new double[] {1, 0, 0}),
                new double[] {3, -1, 2});

        assertThat(fit.dimensions()).isEqualTo(3);
        assertThat(fit.squares()).isLessThan(1e-25);
    }

    @Test
    void whatIsGivenStaysAsItWas() {
        double[] target = {1, 2};
        double[] column = {1, 1};

        Projection.of(List.of(column), target);

        assertThat(target).containsExactly(1, 2);
        assertThat(column).containsExactly(1, 1);
    }
}
