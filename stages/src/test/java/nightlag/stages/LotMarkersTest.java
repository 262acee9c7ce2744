package nightlag.stages;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import nightlag.stages.moduli.Findings;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.numeric.Complex;
import nightlag.stages.sweep.SeriesPoint;
import nightlag.stages.sweep.SweepPlan;
import nightlag.stages.sweep.Sweeps;
import org.junit.jupiter.api.Test;

class LotMarkersTest {
    private static final double RUBBERY = 1e6;
    private static final double GLASSY = 1e9;

    /** Exact: tan δ of one relaxation is highest where ωτ = √(Er/Eu), and each leg has it where its own τ says. */
    @Test
    void heatingAndCoolingHaveTransitionsOfTheirOwn() {
        List<ModulusPoint> points = new ArrayList<>();
        for (int i = 0; i < 121; i++) {
            boolean heating = i <= 60;
            double temperature = heating ? 300 + 2 * i : 540 - 2 * i;
            points.add(SeriesPoint.of(i, temperature, 1)
                    .modulus(relaxing(temperature, heating ? 350 : 344), 0.01)
                    .after(30 * i)
                    .build());
        }
        Sweeps sweeps = Sweeps.of(points, List.of(), SweepPlan.withDefaults());

        Findings findings = LotMarkers.of(sweeps.sweeps(), SweepPlan.withDefaults(), Optional.empty());

        List<Marker> peaks = findings.markers().stream()
                .filter(marker -> marker.property().equals("glass_transition_tan_delta_peak"))
                .toList();
        assertThat(peaks).hasSize(2);
        double above = 5 * Math.log(GLASSY / RUBBERY) / 2;
        assertThat(peaks.get(0).value()).isCloseTo(350 + above, within(0.05));
        assertThat(peaks.get(0).method()).endsWith("; leg 1, heating");
        assertThat(peaks.get(1).value()).isCloseTo(344 + above, within(0.05));
        assertThat(peaks.get(1).method()).endsWith("; leg 2, cooling");
        assertThat(findings.notes())
                .extracting(note -> note.sentence())
                .noneMatch(sentence -> sentence.contains("activation"));
    }

    /** One relaxation, ωτ = exp((at − T)/5 K). */
    private static Complex relaxing(double temperatureK, double atK) {
        double x = Math.exp((atK - temperatureK) / 5);
        return new Complex(RUBBERY + (GLASSY - RUBBERY) * x * x / (1 + x * x), (GLASSY - RUBBERY) * x / (1 + x * x));
    }
}
