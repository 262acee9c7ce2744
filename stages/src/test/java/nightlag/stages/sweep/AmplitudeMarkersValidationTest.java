package nightlag.stages.sweep;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.data.Percentage.withPercentage;

import java.util.List;
import java.util.Random;
import nightlag.stages.moduli.Findings;
import nightlag.stages.moduli.Marker;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class AmplitudeMarkersValidationTest {
    @ParameterizedTest(name = "{0} a decade")
    @ValueSource(ints = {5, 8, 15})
    void withoutNoiseTheLimitAndTheYieldCrossoverAreWithinTheirBar(int perDecade) {
        double[] strains = MarkerModel.decades(1e-3, 3.1622776601683795, perDecade);

        Findings found = SweepMarkers.of(SofteningPaste.sweep(strains, 0, new Random(1)));

        assertThat(found.notes()).isEmpty();
        assertThat(only(found, "linear_strain_limit").value())
                .isCloseTo(SofteningPaste.linearLimit(strains), withPercentage(0.2));
        assertThat(only(found, "crossover_strain").value())
                .isCloseTo(SofteningPaste.CROSSOVER_STRAIN, withPercentage(0.2));
        assertThat(only(found, "crossover_stress").value())
                .isCloseTo(SofteningPaste.CROSSOVER_STRESS, withPercentage(0.2));
        assertThat(only(found, "crossover_stress").frequencyHz()).hasValue(1);
        assertThat(only(found, "crossover_stress").temperatureK()).hasValue(298.15);
    }

    @Test
    void aSweepThatStaysLinearHasNoLimit() {
        Findings found = SweepMarkers.of(SofteningPaste.sweep(MarkerModel.decades(1e-4, 1e-2, 8), 0.01, new Random(1)));

        assertThat(found.markers()).isEmpty();
        assertThat(found.notes())
                .extracting(note -> note.code())
                .containsExactly("MARKER_LIMIT_NOT_REACHED", "MARKER_NO_STRAIN_CROSSOVER");
        assertThat(found.notes().get(1).sentence())
                .isEqualTo(
                        "specimen 1, sweep 1 at 25.0 °C: no crossover stress, the storage modulus exceeds the loss modulus"
                                + " throughout, for strains from 0.0001 to 0.01");
    }

    @Test
    void aSweepThatBeginsBeyondTheLinearRangeHasNoLimit() {
        Findings found = SweepMarkers.of(SofteningPaste.sweep(MarkerModel.decades(0.2, 4, 10), 0.01, new Random(1)));

        assertThat(found.notes()).extracting(note -> note.code()).containsExactly("MARKER_LIMIT_BELOW");
    }

    @Test
    void lessThanADecadeGivesNoLimit() {
        Findings found =
                SweepMarkers.of(SofteningPaste.sweep(MarkerModel.decades(0.01, 0.08, 10), 0.01, new Random(1)));

        assertThat(found.notes()).extracting(note -> note.code()).contains("MARKER_LESS_THAN_A_DECADE");
    }

    private static Marker only(Findings found, String property) {
        List<Marker> markers = MarkerModel.named(found.markers(), property);
        assertThat(markers).as(property).hasSize(1);
        return markers.get(0);
    }
}
