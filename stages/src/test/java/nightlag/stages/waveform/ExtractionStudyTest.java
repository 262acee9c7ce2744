package nightlag.stages.waveform;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import nightlag.stages.numeric.Cholesky;
import nightlag.stages.numeric.Complex;
import org.apache.commons.math3.distribution.TDistribution;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.condition.EnabledIfSystemProperty;

/**
 * The error of the extraction against the Cramér–Rao bound, and how often its 95 % intervals hold the truth, by Monte Carlo.
 * Run with {@code mvn -pl stages test -Dtest=ExtractionStudyTest -Dnightlag.study=true}; the table goes to the console.
 */
@Tag("study")
@EnabledIfSystemProperty(named = "nightlag.study", matches = "true")
class ExtractionStudyTest {
    private static final Complex STRAIN = Complex.polar(0.01, 0.4);
    private static final Complex STRESS = Complex.polar(500, 1.1);
    private static final Complex MODULUS = STRESS.over(STRAIN);

    /** One kind of record. */
    private record Condition(
            double cycles,
            double samplesPerCycle,
            double snrDb,
            Drift drift,
            double memory,
            double missing,
            double jitter) {
        Recording recording(long seed) {
            double part = Math.pow(10, -snrDb / 20) / Math.sqrt(2);
            double[] drift = {0.3, drift().degree() > 0 ? 0.2 : 0, drift().degree() > 1 ? -0.1 : 0};
            double[] strainDrift = drift.clone();
            double[] stressDrift = drift.clone();
            for (int p = 0; p < 3; p++) {
                strainDrift[p] *= STRAIN.abs();
                stressDrift[p] *= -STRESS.abs();
            }
            return Recording.of(2, cycles, samplesPerCycle)
                    .deformation(STRAIN, Complex.ZERO, STRAIN.times(0.002))
                    .load(STRESS, STRESS.times(0.001), STRESS.times(Complex.polar(0.02, 1)))
                    .drifts(strainDrift, stressDrift)
                    .noise(part * STRAIN.abs(), part * STRESS.abs())
                    .noiseMemory(memory)
                    .missing(missing)
                    .jitter(jitter)
                    .tagged(2)
                    .seed(seed);
        }

        ExtractionPlan plan() {
            return new ExtractionPlan(0, 7, drift, FrequencySource.SIGNAL);
        }
    }

    /** Outcome: rms errors over the bound, and coverages. */
    private record Outcome(double storage, double loss, double phase, double coverStorage, double coverLoss) {}

    private static Outcome run(Condition condition, int draws) throws Exception {
        double[] squares = new double[3];
        int[] held = new int[2];
        double[] bound = new double[3];
        for (int k = 0; k < draws; k++) {
            Waveform waveform = condition.recording(1000 + k).build();
            if (k == 0 || condition.missing() > 0 || condition.jitter() > 0) {
                double[] own = bound(waveform, condition);
                for (int i = 0; i < 3; i++) {
                    bound[i] += condition.missing() > 0 || condition.jitter() > 0
                            ? own[i] * own[i] / draws
                            : own[i] * own[i];
                }
            }
            SignalFit fit = HarmonicAnalysis.analyse(waveform, condition.plan());
            Complex modulus = fit.load()[0].over(fit.deformation()[0]);
            double[] errors = {
                modulus.re() - MODULUS.re(),
                modulus.im() - MODULUS.im(),
                modulus.over(MODULUS).argument(),
            };
            double[] u = uncertainties(fit, modulus);
            double t = new TDistribution(null, fit.degreesOfFreedom()).inverseCumulativeProbability(0.975);
            for (int i = 0; i < 3; i++) {
                squares[i] += errors[i] * errors[i] / draws;
            }
            for (int i = 0; i < 2; i++) {
                held[i] += Math.abs(errors[i]) <= t * u[i] ? 1 : 0;
            }
        }
        return new Outcome(
                Math.sqrt(squares[0] / bound[0]),
                Math.sqrt(squares[1] / bound[1]),
                Math.sqrt(squares[2] / bound[2]),
                held[0] / (double) draws,
                held[1] / (double) draws);
    }

    private static double[] uncertainties(SignalFit fit, Complex modulus) {
        int h = fit.harmonics();
        Complex byLoad = Complex.ONE.over(fit.deformation()[0]);
        Complex byStrain = modulus.times(-1).over(fit.deformation()[0]);
        double[][] rows = {
            {byStrain.re(), -byStrain.im(), byLoad.re(), -byLoad.im()},
            {byStrain.im(), byStrain.re(), byLoad.im(), byLoad.re()},
        };
        int[] places = {0, 1, 2 * h, 2 * h + 1};
        double[] u = new double[2];
        for (int q = 0; q < 2; q++) {
            double variance = 0;
            for (int i = 0; i < 4; i++) {
                for (int j = 0; j < 4; j++) {
                    variance += rows[q][i] * rows[q][j] * fit.covariance()[places[i]][places[j]];
                }
            }
            u[q] = Math.sqrt(variance);
        }
        return u;
    }

    /** Standard deviations of G', G'' and δ at the bound: the inverse Fisher matrix of the whole model, built from scratch. */
    private static double[] bound(Waveform waveform, Condition condition) {
        int orders = 7;
        while (orders >= condition.samplesPerCycle() / 2) {
            orders--;
        }
        int own = condition.drift().degree() + 1 + 2 * orders;
        int size = 2 * own + 1;
        double part = Math.pow(10, -condition.snrDb() / 20) / Math.sqrt(2);
        double omega = 2 * Math.PI * 2;
        double duration = condition.cycles() / 2;
        Complex[][] amplitudes = {
            {STRAIN, Complex.ZERO, STRAIN.times(0.002)},
            {STRESS, STRESS.times(0.001), STRESS.times(Complex.polar(0.02, 1))},
        };
        double[][] fisher = new double[size][size];
        for (double t : waveform.timeS()) {
            for (int c = 0; c < 2; c++) {
                double scale = amplitudes[c][0].abs();
                double[] row = new double[size];
                int at = c * own;
                double power = 1;
                for (int p = 0; p <= condition.drift().degree(); p++) {
                    row[at++] = power;
                    power *= 2 * t / duration - 1;
                }
                double slope = 0;
                for (int n = 1; n <= orders; n++) {
                    double phase = n * omega * t;
                    row[at++] = Math.cos(phase);
                    row[at++] = -Math.sin(phase);
                    if (n <= 3) {
                        Complex a = amplitudes[c][n - 1].times(1 / scale);
                        slope += n * omega * t * (-a.re() * Math.sin(phase) - a.im() * Math.cos(phase));
                    }
                }
                row[size - 1] = slope;
                for (int i = 0; i < size; i++) {
                    for (int j = 0; j <= i; j++) {
                        fisher[i][j] += row[i] * row[j] / (part * part);
                    }
                }
            }
        }
        Cholesky inverse = Cholesky.of(fisher).orElseThrow();
        Complex d = amplitudes[0][0].times(1 / STRAIN.abs());
        Complex l = amplitudes[1][0].times(1 / STRESS.abs());
        double size0 = MODULUS.abs();
        // G/|G| = l/d (both of size 1 here)
        Complex byLoad = Complex.ONE.over(d);
        Complex byStrain = l.over(d).times(-1).over(d);
        int ds = condition.drift().degree() + 1;
        int ls = own + ds;
        double[] re = new double[size];
        double[] im = new double[size];
        re[ds] = byStrain.re();
        re[ds + 1] = -byStrain.im();
        re[ls] = byLoad.re();
        re[ls + 1] = -byLoad.im();
        im[ds] = byStrain.im();
        im[ds + 1] = byStrain.re();
        im[ls] = byLoad.im();
        im[ls + 1] = byLoad.re();
        double[] phase = new double[size];
        Complex unit = l.over(d);
        for (int i = 0; i < size; i++) {
            phase[i] = -unit.im() * re[i] + unit.re() * im[i];
        }
        return new double[] {
            size0 * Math.sqrt(inverse.inverseForm(re)),
            size0 * Math.sqrt(inverse.inverseForm(im)),
            Math.sqrt(inverse.inverseForm(phase)),
        };
    }

    @Test
    void whiteNoise() throws Exception {
        List<String> table = new ArrayList<>();
        for (Drift drift : Drift.values()) {
            for (double cycles : new double[] {1.5, 1.6, 1.8, 2, 2.5}) {
                for (double perCycle : new double[] {16, 40}) {
                    for (double snr : new double[] {20, 40, 80}) {
                        if (cycles * perCycle > 3000) {
                            continue;
                        }
                        int draws = cycles * perCycle > 600 ? 500 : 600;
                        report(table, new Condition(cycles, perCycle, snr, drift, 0, 0, 0), draws);
                    }
                }
            }
        }
        assertThat(table).isNotEmpty();
    }

    @Test
    void rememberingNoise() throws Exception {
        List<String> table = new ArrayList<>();
        for (double cycles : new double[] {5, 6.4, 10, 20}) {
            for (double perCycle : new double[] {16, 40, 256}) {
                report(
                        table,
                        new Condition(cycles, perCycle, 40, Drift.LINEAR, 0.7, 0, 0),
                        cycles * perCycle > 600 ? 500 : 1500);
            }
        }
        assertThat(table).isNotEmpty();
    }

    @Test
    void missingRowsAndJitter() throws Exception {
        List<String> table = new ArrayList<>();
        for (double cycles : new double[] {3, 5, 10}) {
            for (double perCycle : new double[] {16, 64}) {
                report(table, new Condition(cycles, perCycle, 40, Drift.LINEAR, 0, 0.02, 0.01), 800);
            }
        }
        assertThat(table).isNotEmpty();
    }

    private static void report(List<String> table, Condition condition, int draws) throws Exception {
        Outcome outcome = run(condition, draws);
        String line = String.format(
                Locale.ROOT,
                "%-9s c=%4.1f M=%5.0f SNR %2.0f dB AR %.1f | rms/bound G' %.3f G'' %.3f delta %.3f | cover G' %.3f G'' %.3f",
                condition.drift(),
                condition.cycles(),
                condition.samplesPerCycle(),
                condition.snrDb(),
                condition.memory(),
                outcome.storage(),
                outcome.loss(),
                outcome.phase(),
                outcome.coverStorage(),
                outcome.coverLoss());
        System.out.println(line);
        table.add(line);
    }
}
