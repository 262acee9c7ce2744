package nightlag.stages.response;

import static nightlag.stages.response.Programmes.step;
import static nightlag.stages.response.Programmes.strain;
import static nightlag.stages.response.Programmes.stress;
import static org.assertj.core.api.Assertions.assertThat;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalInt;
import java.util.Random;
import java.util.stream.IntStream;
import nightlag.stages.Study;
import nightlag.stages.TestCreep;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModuliCovariance;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.numeric.Complex;
import nightlag.stages.response.ResponseRow.Band;
import nightlag.stages.spectrum.CreepData;
import nightlag.stages.spectrum.CreepFit;
import nightlag.stages.spectrum.CreepSpectrum;
import nightlag.stages.spectrum.RelaxationModes;
import nightlag.stages.spectrum.ShiftedCreep;
import nightlag.stages.spectrum.SpectrumPlan;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.EnumSource;

/**
 * How often figures and bands from creep hold the truth: a melt of four modes, moduli from 0.1 to 100 Hz, creep of an hour and
 * recovery, 1 % noise.
 */
@Tag("study")
class CreepPredictionStudyTest {
    private static final RelaxationModes MELT =
            RelaxationModes.of(0, new double[] {0.01, 0.3, 10, 300}, new double[] {1e5, 2e4, 3e3, 400});
    private static final SpectrumPlan LIQUID = new SpectrumPlan(false, OptionalInt.empty(), false);
    private static final TemperatureShift ONE_TEMPERATURE = TemperatureShift.of(300, Optional.empty());
    private static final double NOISE = 0.01;
    private static final double A = 0.2;
    private static final double U_OF_LN_A = 0.05;

    /** What is fitted. */
    private enum Measured {
        CREEP_ALONE,
        CREEP_AND_MODULI,
        SHIFTED_CREEP_AND_MODULI
    }

    @ParameterizedTest(name = "{0}")
    @EnumSource(Measured.class)
    void figuresAndBandsHoldTheTruthAsOftenAsTheySay(Measured measured) throws ReductionFault {
        int draws = Study.draws(20, 400);
        int viscosity = 0;
        int compliance = 0;
        int ended = 0;
        Count creep = new Count();
        Count relaxation = new Count();
        for (long seed = 1; seed <= draws; seed++) {
            CreepSpectrum spectrum = CreepFit.fit(drawn(measured, seed), LIQUID);
            Optional<Marker> found = marker(spectrum, "zero_shear_viscosity");
            ended += found.isPresent() ? 1 : 0;
            viscosity += holds(found, MELT.viscosityPaS());
            compliance += holds(marker(spectrum, "steady_state_compliance"), MELT.steadyStateCompliancePerPa());
            Prediction.of(stress(3600, step(0, 10)), spectrum, ONE_TEMPERATURE)
                    .forEach(row -> creep.take(row, 10 * MELT.retardation().creepPerPa(row.timeS())));
            Prediction.of(strain(1000, step(0, 0.01)), spectrum, ONE_TEMPERATURE)
                    .forEach(row -> relaxation.take(row, 0.01 * MELT.relaxationPa(row.timeS())));
        }

        Study.row(
                "| %s | %d of %d | %.3f | %.3f | %.3f | %.3f |",
                measured,
                ended,
                draws,
                (double) viscosity / ended,
                (double) compliance / ended,
                creep.share(),
                relaxation.share());
        assertThat(ended).isGreaterThan(draws * 8 / 10);
        assertThat((double) viscosity / ended).isGreaterThan(0.8);
        assertThat((double) compliance / ended).isGreaterThan(0.8);
        assertThat(creep.share()).isGreaterThan(0.85);
        assertThat(relaxation.share()).isGreaterThan(0.8);
    }

    private static CreepData drawn(Measured measured, long seed) throws ReductionFault {
        Random random = new Random(seed);
        boolean shifted = measured == Measured.SHIFTED_CREEP_AND_MODULI;
        double a = shifted ? A : 1;
        double u = shifted ? U_OF_LN_A : 0;
        TestCreep record = TestCreep.creep(MELT.retardation()::creepPerPa, 0.1, 3600 * a, 7200 * a)
                .shifted(320, a, 1)
                .noisy(NOISE, random.nextLong());
        double said = Math.log(a) + u * random.nextGaussian();
        CreepData creep = CreepData.of(List.of(new ShiftedCreep(List.of(record.build()), said, 0)), new double[][] {
            {u * u, 0}, {0, 0}
        });
        return measured == Measured.CREEP_ALONE ? creep : creep.with(moduli(random), Optional.empty());
    }

    private static List<ModulusReading> moduli(Random random) {
        List<ModulusReading> readings = new ArrayList<>();
        IntStream.rangeClosed(0, 24).forEach(i -> {
            double omega = 2 * Math.PI * Math.pow(10, -1 + i / 8.0);
            Complex exact = MELT.modulusPa(omega);
            double storageU = NOISE * exact.re();
            double lossU = NOISE * exact.im();
            readings.add(new ModulusReading(
                    omega,
                    new Moduli(
                            exact.re() + storageU * random.nextGaussian(),
                            exact.im() + lossU * random.nextGaussian(),
                            Optional.of(new ModuliCovariance(storageU * storageU, lossU * lossU, 0)))));
        });
        return readings;
    }

    private static Optional<Marker> marker(CreepSpectrum spectrum, String property) {
        return spectrum.markers(300).stream()
                .filter(marker -> marker.property().equals(property))
                .findFirst();
    }

    private static int holds(Optional<Marker> marker, double truth) {
        return marker.filter(found -> Math.abs(found.value() - truth)
                                <= 1.96 * found.u().getAsDouble())
                        .isPresent()
                ? 1
                : 0;
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
