package nightlag.stages.response;

import static nightlag.stages.response.Programmes.step;
import static nightlag.stages.response.Programmes.strain;
import static nightlag.stages.response.Programmes.stress;
import static org.assertj.core.api.Assertions.assertThat;

import java.util.Optional;
import java.util.OptionalInt;
import nightlag.stages.Study;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.response.ResponseRow.Band;
import nightlag.stages.spectrum.DiscreteFit;
import nightlag.stages.spectrum.DiscreteSpectrum;
import nightlag.stages.spectrum.SpectrumPlan;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;

/** How often the bands of predictions hold the truth: a fractional solid over nine decades with 1 % noise. */
@Tag("study")
class PredictionStudyTest {
    private static final FractionalSolid SOLID = new FractionalSolid(1e8, 1e9, 1, 0.5);
    private static final TemperatureShift ONE_TEMPERATURE = TemperatureShift.of(300, Optional.empty());

    @Test
    void bandsHoldTheTruthInsideTheDataAsOftenAsTheySay() throws ReductionFault {
        int draws = Study.draws(10, 100);
        Count creep = new Count();
        Count relaxation = new Count();
        for (long seed = 1; seed <= draws; seed++) {
            DiscreteSpectrum spectrum = DiscreteFit.fit(
                    SOLID.readings(1e-5, 1e4, 0.01, 0.01, seed), new SpectrumPlan(true, OptionalInt.empty(), false));
            Prediction.of(stress(1e5, step(0, 1e6)), spectrum, ONE_TEMPERATURE)
                    .forEach(row -> creep.take(row, 1e6 * SOLID.creepPerPa(row.timeS())));
            Prediction.of(strain(1e5, step(0, 0.01)), spectrum, ONE_TEMPERATURE)
                    .forEach(row -> relaxation.take(row, 0.01 * SOLID.relaxationPa(row.timeS())));
        }

        Study.row("| creep | %d draws | %.3f |", draws, creep.share());
        Study.row("| relaxation | %d draws | %.3f |", draws, relaxation.share());
        assertThat(creep.share()).isBetween(0.9, 0.99);
        assertThat(relaxation.share()).isBetween(0.9, 0.99);
    }

    /** Instants inside the data, and those whose band holds the truth. */
    private static final class Count {
        private int inside;
        private int held;

        void take(ResponseRow row, double truth) {
            if (row.insideData() && row.timeS() > 0) {
                Band band = row.band().orElseThrow();
                inside++;
                held += band.low() <= truth && truth <= band.high() ? 1 : 0;
            }
        }

        double share() {
            return (double) held / inside;
        }
    }
}
