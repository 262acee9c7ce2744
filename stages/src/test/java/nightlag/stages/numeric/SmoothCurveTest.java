package nightlag.stages.numeric;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatIllegalArgumentException;
import static org.assertj.core.api.Assertions.within;

import java.util.Arrays;
import java.util.Random;
import java.util.stream.IntStream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class SmoothCurveTest {
    private static final double[] PLACES =
            IntStream.rangeClosed(0, 30).mapToDouble(i -> i / 5.0).toArray();

    private static double[] alike(double variance) {
        return Arrays.stream(PLACES).map(x -> variance).toArray();
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5})
    void scatterALittleBeyondTheUncertaintiesIsBelievedToBeTheCurveAndMuchMoreIsNot(long seed) {
        Random random = new Random(seed);
        double[] values =
                Arrays.stream(PLACES).map(x -> x + 0.1 * random.nextGaussian()).toArray();

        double[] little = alike(0.005);
        double[] far = alike(1e-4);

        assertThat(SmoothCurve.throughBelieved(PLACES, values, little, 0).widening())
                .isEqualTo(1);
        assertThat(SmoothCurve.throughKnown(PLACES, values, far, 3).widening()).isEqualTo(1);
        assertThat(SmoothCurve.throughBelieved(PLACES, values, far, 0).widening())
                .isGreaterThan(4);
    }

    /** Between values that are known well a curve is as uncertain as it is free to bend. */
    @Test
    void aCurveThatMayBendMoreIsLessKnownBetweenTheValuesAndTheSameAtThem() {
        double[] straight = Arrays.stream(PLACES).map(x -> 1 + 2 * x).toArray();
        SmoothCurve free = SmoothCurve.throughBelieved(PLACES, straight, alike(1e-10), 0);
        SmoothCurve bending = SmoothCurve.throughBelieved(PLACES, straight, alike(1e-10), 1);
        SmoothCurve more = SmoothCurve.throughBelieved(PLACES, straight, alike(1e-10), 100);

        assertThat(bending.derivative(3.1, 0)).isCloseTo(7.2, within(1e-9));
        assertThat(bending.estimate(3, 0).u()).isCloseTo(1e-5, within(2e-7));
        assertThat(free.estimate(3.1, 0).u()).isLessThan(1e-5);
        // u² grows with the strength where the noise is nothing
        double wide = Math.pow(more.estimate(3.1, 0).u(), 2) - 1e-10;
        double narrow = Math.pow(bending.estimate(3.1, 0).u(), 2) - 1e-10;
        assertThat(wide / narrow).isBetween(80.0, 120.0);
    }

    @ParameterizedTest(name = "derivative {0}")
    @ValueSource(ints = {0, 1, 2})
    void derivativesOfASineAreWithinTheirUncertainty(int i) {
        double[] values = Arrays.stream(PLACES).map(Math::sin).toArray();
        SmoothCurve.Local local =
                SmoothCurve.through(PLACES, values, alike(1e-16), 4).at(2.3, 2);
        double truth = Math.sin(2.3 + i * Math.PI / 2);
        assertThat(local.derivatives()[i]).isCloseTo(truth, within(4 * Math.sqrt(local.full()[i][i])));
        assertThat(local.full()[i][i]).isGreaterThanOrEqualTo(local.noise()[i][i]);
    }

    @Test
    void thereMustBeMoreValuesThanTheOrder() {
        double[] three = {0, 1, 2};
        assertThatIllegalArgumentException().isThrownBy(() -> SmoothCurve.through(three, three, three, 3));
    }
}
