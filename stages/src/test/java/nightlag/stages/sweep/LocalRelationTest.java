package nightlag.stages.sweep;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.data.Percentage.withPercentage;

import java.util.List;
import java.util.Random;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.numeric.Complex;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class LocalRelationTest {
    /** Exact: of (iω)^α, dG'/d ln ω is αG', so the line is (π/2)α G' and lies tan(απ/2)/(απ/2) below G''. */
    @ParameterizedTest(name = "exponent {0}")
    @ValueSource(doubles = {0.1, 0.3, 0.5})
    void ofASpringpot(double alpha) {
        List<LocalRelation.Place> line = LocalRelation.of(MarkerModel.readings(
                place -> Complex.polar(1000 * Math.pow(place, alpha), alpha * Math.PI / 2),
                MarkerModel.decades(0.01, 100, 10),
                0,
                new Random(1)));

        assertThat(line).hasSize(81);
        assertThat(line).allSatisfy(place -> {
            double storage = 1000 * Math.pow(place.angularFrequency(), alpha) * Math.cos(alpha * Math.PI / 2);
            assertThat(place.lossPa()).isCloseTo(Math.PI / 2 * alpha * storage, withPercentage(0.1));
        });
    }

    /** Exact: of one relaxation the line is π x/(1 + x²) of G'', x = ωτ. */
    @Test
    void ofOneRelaxationItIsHighAtItsPlaceAndLowFarFromIt() {
        List<LocalRelation.Place> line = LocalRelation.of(MarkerModel.readings(
                MarkerModel.maxwell(2e5, 0.25), MarkerModel.decades(0.04, 400, 20), 0, new Random(1)));

        // the slope is least sure at the very ends
        assertThat(line.subList(2, line.size() - 2)).allSatisfy(place -> {
            double x = place.angularFrequency() * 0.25;
            double loss = 2e5 * x / (1 + x * x);
            assertThat(place.lossPa()).isCloseTo(loss * Math.PI * x / (1 + x * x), withPercentage(2));
        });
    }

    /**
     * Laun, Rheol. Acta 17 (1978) 1, from memory. Exact: (π/2) dG'/d ln ω = π Σ g x²/(1 + x²)², x = ωτ; from 1 to 1000 rad/s that is
     * within 27 % of G'', up and down with modes a decade apart.
     */
    @Test
    void ofABroadSpectrumItIsNearTheLossModulus() {
        double[] modes = {
            1.29e5, 1e-4, 9.48e4, 1e-3, 5.86e4, 1e-2, 2.67e4, 1e-1, 9.80e3, 1, 1.89e3, 10, 1.80e2, 100, 1.00, 1000
        };
        List<ModulusReading> readings =
                MarkerModel.readings(MarkerModel.maxwell(modes), MarkerModel.decades(0.1, 1000, 10), 0, new Random(1));

        List<LocalRelation.Place> line = LocalRelation.of(readings);

        assertThat(line).hasSizeGreaterThan(70);
        assertThat(line.subList(4, line.size() - 4)).allSatisfy(place -> {
            double exact = 0;
            for (int i = 0; i < modes.length; i += 2) {
                double x = place.angularFrequency() * modes[i + 1];
                exact += Math.PI * modes[i] * x * x / ((1 + x * x) * (1 + x * x));
            }
            assertThat(place.lossPa()).isCloseTo(exact, withPercentage(2));
            if (place.angularFrequency() > 1) {
                double loss = MarkerModel.maxwell(modes)
                        .apply(place.angularFrequency())
                        .im();
                assertThat(exact).isCloseTo(loss, withPercentage(27));
            }
        });
    }

    @Test
    void fourFrequenciesCarryNoLine() {
        assertThat(LocalRelation.of(MarkerModel.readings(
                        MarkerModel.maxwell(2e5, 0.25), new double[] {1, 2, 4, 8}, 0, new Random(1))))
                .isEmpty();
    }

    /** What should rise with frequency falls: there is no loss modulus to be drawn. */
    @Test
    void whereTheStorageModulusFallsNothingIsDrawn() {
        assertThat(LocalRelation.of(MarkerModel.readings(
                        place -> new Complex(1000 / place, 100), MarkerModel.decades(0.1, 10, 10), 0, new Random(1))))
                .isEmpty();
    }
}
