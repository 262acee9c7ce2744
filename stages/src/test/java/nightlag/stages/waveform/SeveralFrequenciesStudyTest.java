package nightlag.stages.waveform;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.Random;
import nightlag.stages.Study;
import nightlag.stages.numeric.Complex;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;

/**
 * How far the responses of chirps are off on random materials of relaxation modes, without noise: what cutting a record out
 * of time and the bend of the response leave. Few materials in a build; more, and the table, with
 * {@code mvn test -pl stages -Dtest=SeveralFrequenciesStudyTest -Dnightlag.study=long}.
 */
@Tag("study")
class SeveralFrequenciesStudyTest {
    private static final int MATERIALS = Study.draws(12, 120);
    private static final double[] FROM_CYCLES = {6, 12, 24, 48};

    private static Chirp random(Random random) {
        double slowest = 0.05 * Math.pow(10, random.nextDouble());
        double fastest = slowest * Math.pow(10, 1 + 1.5 * random.nextDouble());
        double seconds = (6 + 20 * random.nextDouble()) / slowest;
        int modes = 1 + random.nextInt(5);
        double[] strengths = new double[modes];
        double[] times = new double[modes];
        for (int i = 0; i < modes; i++) {
            strengths[i] = 1e3 * Math.pow(10, 2 * random.nextDouble());
            times[i] = Math.pow(10, 1 - 3.5 * random.nextDouble()) / (2 * Math.PI * slowest);
        }
        return Chirp.of(slowest, fastest, seconds, strengths, times)
                .rest(random.nextBoolean() ? 0 : 0.02 * seconds, random.nextBoolean() ? 0 : 0.05 * seconds)
                .equilibrium(random.nextBoolean() ? 0 : 1e3)
                .taper(0.05 + 0.2 * random.nextDouble());
    }

    @Test
    void chirps() throws Exception {
        Random random = new Random(5);
        double[] largest = new double[FROM_CYCLES.length];
        double[] squares = new double[FROM_CYCLES.length];
        int[] counts = new int[FROM_CYCLES.length];
        for (int material = 0; material < MATERIALS; material++) {
            Chirp chirp = random(random);
            for (SignalFit fit : ChirpAnalysis.analyse(chirp.build(), 10, Drift.LINEAR)) {
                Complex truth = chirp.modulus(fit.frequencyHz());
                Complex found = fit.load()[0].over(fit.deformation()[0]);
                double error = found.minus(truth).abs() / truth.abs();
                int row = FROM_CYCLES.length - 1;
                while (row > 0 && fit.cyclesUsed() < FROM_CYCLES[row]) {
                    row--;
                }
                largest[row] = Math.max(largest[row], error);
                squares[row] += error * error;
                counts[row]++;
            }
        }
        for (int row = 0; row < FROM_CYCLES.length; row++) {
            Study.row(
                    "| from %.0f | %d | %.1e | %.1e |",
                    FROM_CYCLES[row], counts[row], Math.sqrt(squares[row] / counts[row]), largest[row]);
        }
        assertThat(largest[0]).isLessThan(1e-2);
        assertThat(largest[3]).isLessThan(2e-4);
    }

    /** The recorder starts within the first 30 % of the sweep, up or down. */
    @Test
    void chirpsThatBeginInMotion() throws Exception {
        Random random = new Random(6);
        double[] largest = new double[2];
        double[] squares = new double[2];
        int[] counts = new int[2];
        int far = 0;
        for (int material = 0; material < MATERIALS; material++) {
            Chirp chirp = inMotion(random);
            for (SignalFit fit : ChirpAnalysis.analyse(chirp.build(), 10, Drift.LINEAR)) {
                Complex truth = chirp.modulus(fit.frequencyHz());
                Complex off = fit.load()[0].over(fit.deformation()[0]).minus(truth);
                double error = off.abs() / truth.abs();
                int row = fit.screening().sweepStart().isPresent() ? 0 : 1;
                largest[row] = Math.max(largest[row], error);
                squares[row] += error * error;
                counts[row]++;
                double u = Math.sqrt(fit.covariance()[2][2]) / fit.deformation()[0].abs();
                far += row == 1 && off.abs() > 3 * u ? 1 : 0;
            }
        }
        for (int row = 0; row < 2; row++) {
            Study.row(
                    "| %s | %d | %.1e | %.1e |",
                    row == 0 ? "flagged" : "the others",
                    counts[row],
                    Math.sqrt(squares[row] / counts[row]),
                    largest[row]);
        }
        assertThat(counts[0]).isGreaterThan(2 * MATERIALS);
        assertThat(largest[1]).isLessThan(5e-3);
        assertThat((double) far / counts[1]).isLessThan(0.05);
    }

    private static Chirp inMotion(Random random) {
        double slowest = 0.05 * Math.pow(10, random.nextDouble());
        double fastest = slowest * Math.pow(10, 1 + random.nextDouble());
        double seconds = (6 + 20 * random.nextDouble()) / slowest;
        boolean up = random.nextBoolean();
        int modes = 1 + random.nextInt(5);
        double[] strengths = new double[modes];
        double[] times = new double[modes];
        for (int i = 0; i < modes; i++) {
            strengths[i] = 1e3 * Math.pow(10, 2 * random.nextDouble());
            times[i] = Math.pow(10, 1 - 3.5 * random.nextDouble()) / (2 * Math.PI * slowest);
        }
        return Chirp.of(up ? slowest : fastest, up ? fastest : slowest, seconds, strengths, times)
                .equilibrium(random.nextBoolean() ? 0 : 1e3)
                .taper(0.05 + 0.2 * random.nextDouble())
                .startedLate(0.3 * random.nextDouble() * seconds);
    }
}
