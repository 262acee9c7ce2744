package nightlag.stages.sweep;

import static nightlag.stages.sweep.GlassTransitionValidationTest.all;
import static nightlag.stages.sweep.GlassTransitionValidationTest.highest;
import static nightlag.stages.sweep.GlassTransitionValidationTest.plan;
import static org.assertj.core.api.Assertions.assertThat;

import java.util.List;
import java.util.Random;
import java.util.function.DoubleFunction;
import java.util.stream.DoubleStream;
import nightlag.stages.Study;
import nightlag.stages.moduli.Findings;
import nightlag.stages.moduli.Marker;
import nightlag.stages.numeric.Complex;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;

/**
 * How often the 95 % intervals of transition temperatures hold the truth with 1 % noise on storage and loss modulus, and how often
 * noise makes a peak. {@code mvn test -pl stages -Dtest=GlassTransitionStudyTest -Dnightlag.study=long} prints the table.
 */
@Tag("study")
class GlassTransitionStudyTest {
    private static final double NOISE = 0.01;
    private static final double COVERAGE_95 = 1.96;
    private static final List<String> FIGURES = List.of("onset linear", "onset log", "loss peak", "tan δ peak");

    /** Draws, hits, sum of squared normalised errors and of u, one figure an entry. */
    private static final class Score {
        private final int[] found = new int[4];
        private final int[] held = new int[4];
        private final double[] squares = new double[4];
        private final double[] errors = new double[4];
        private final double[] us = new double[4];
        private int several;

        void add(int figure, List<Marker> markers, double truth) {
            if (markers.size() > 1) {
                several++;
            }
            for (Marker marker : markers) {
                double u = marker.u().orElseThrow();
                double error = (marker.value() - truth) / u;
                found[figure]++;
                held[figure] += Math.abs(error) < COVERAGE_95 ? 1 : 0;
                squares[figure] += error * error;
                errors[figure] += error;
                us[figure] += u;
            }
        }

        void add(Score other) {
            for (int i = 0; i < 4; i++) {
                found[i] += other.found[i];
                held[i] += other.held[i];
            }
            several += other.several;
        }

        double coverage(int figure) {
            return held[figure] / (double) found[figure];
        }
    }

    @Test
    void intervalsHoldTheTruthAsOftenAsTheySay() {
        int draws = Study.draws(8, 300);
        Score all = new Score();
        int conditions = 0;
        for (boolean broad : new boolean[] {false, true}) {
            DoubleFunction<Complex> material = broad ? Ramp.broad(1) : Ramp.oneRelaxation(1);
            double first = broad ? 321 : 310;
            double[] truths = {
                DenseOnset.of(material, SweepPlan.OnsetAxis.LINEAR, first, 425),
                DenseOnset.of(material, SweepPlan.OnsetAxis.LOG, first, 425),
                highest(t -> material.apply(t).im()),
                highest(t -> material.apply(t).im() / material.apply(t).re())
            };
            for (double every : new double[] {0.5, 1, 2}) {
                for (boolean told : new boolean[] {true, false}) {
                    Ramp ramp = new Ramp(material, 1, NOISE, told ? NOISE : 0);
                    Score score = score(ramp, first, every, truths, draws);
                    for (int figure = 0; figure < 4; figure++) {
                        int found = score.found[figure];
                        Study.row(
                                "| %s | %.1f K | %s | %s | %d of %d | %.1f | %.2f | %+.2f | %.3f |",
                                broad ? "broad" : "one relaxation",
                                every,
                                told ? "given" : "none",
                                FIGURES.get(figure),
                                found,
                                draws,
                                100 * score.coverage(figure),
                                Math.sqrt(score.squares[figure] / found),
                                score.errors[figure] / found,
                                score.us[figure] / found);
                        if (Study.isLong()) {
                            assertCoverage(score, figure, 0.90, 0.98);
                        }
                    }
                    all.add(score);
                    conditions++;
                }
            }
        }
        for (int figure = 0; figure < 4; figure++) {
            assertCoverage(all, figure, 0.90, 0.98);
            assertThat(all.found[figure]).isGreaterThan((int) (0.97 * draws * conditions));
        }
        // of 2 × 12 × draws searches; at most one in a hundred may find a second peak
        assertThat(all.several).isLessThanOrEqualTo(Math.max(1, 2 * conditions * draws / 100));
    }

    private static Score score(Ramp ramp, double first, double every, double[] truths, int draws) {
        Score score = new Score();
        for (int draw = 0; draw < draws; draw++) {
            Random random = new Random(1000L * draw + 17);
            Sweep sweep = ramp.sweep(first + every * random.nextDouble(), 435, every, random);
            Findings linear = GlassTransition.of(sweep, plan(SweepPlan.OnsetAxis.LINEAR));
            Findings log = GlassTransition.of(sweep, plan(SweepPlan.OnsetAxis.LOG));
            score.add(0, all(linear, "glass_transition_storage_onset"), truths[0]);
            score.add(1, all(log, "glass_transition_storage_onset"), truths[1]);
            score.add(2, all(linear, "glass_transition_loss_peak"), truths[2]);
            score.add(3, all(linear, "glass_transition_tan_delta_peak"), truths[3]);
        }
        return score;
    }

    /** Within the bounds, give or take three standard errors of the study itself. */
    private static void assertCoverage(Score score, int figure, double least, double most) {
        double slack = 3 * Math.sqrt(0.05 * 0.95 / score.found[figure]);
        assertThat(score.coverage(figure))
                .as("%s of %d", FIGURES.get(figure), score.found[figure])
                .isBetween(least - slack, Math.min(1, most + slack));
    }

    /** A melt, whose moduli fall smoothly and have no peak: two searches a draw. */
    @Test
    void noiseMakesNoPeaks() {
        DoubleFunction<Complex> melt = t -> {
            double x = 0.3 * Math.exp(6000 * (1 / t - 1 / 450.0));
            return new Complex(1e5 * x * x / (1 + x * x), 1e5 * x / (1 + x));
        };
        int draws = Study.draws(50, 2000);
        for (boolean told : new boolean[] {true, false}) {
            int peaks = 0;
            for (int draw = 0; draw < draws; draw++) {
                Sweep sweep = new Ramp(melt, 1, NOISE, told ? NOISE : 0).sweep(400, 520, 0.5, new Random(draw));
                Findings findings = GlassTransition.of(sweep, plan(SweepPlan.OnsetAxis.LINEAR));
                peaks += all(findings, "glass_transition_loss_peak").size();
                peaks += all(findings, "glass_transition_tan_delta_peak").size();
            }
            Study.row(
                    "| melt, 241 points, u %s | peaks in 2 × %d searches | %d |",
                    told ? "given" : "none", draws, peaks);
            assertThat(peaks).isLessThanOrEqualTo(2 * draws / 100);
        }
    }

    @Test
    void theActivationEnergyHoldsTheTruth() {
        int draws = Study.draws(20, 400);
        int[] held = new int[3];
        int[] found = new int[3];
        for (int draw = 0; draw < draws; draw++) {
            Random random = new Random(draw);
            List<Sweep> sweeps = DoubleStream.of(0.1, 1, 10, 100)
                    .mapToObj(f -> new Ramp(Ramp.oneRelaxation(f), f, NOISE, NOISE).sweep(320, 440, 2, random))
                    .toList();
            List<Marker> energies =
                    all(GlassTransition.of(sweeps, plan(SweepPlan.OnsetAxis.LINEAR)), "activation_energy");
            for (int k = 0; k < energies.size(); k++) {
                Marker energy = energies.get(k);
                found[k]++;
                held[k] += Math.abs(energy.value() - Ramp.ENERGY)
                                < COVERAGE_95 * energy.u().orElseThrow()
                        ? 1
                        : 0;
            }
        }
        for (int k = 0; k < 3; k++) {
            double share = held[k] / (double) found[k];
            Study.row("| activation energy, kind %d | %d of %d | %.1f |", k, found[k], draws, 100 * share);
            assertThat(found[k]).isEqualTo(draws);
            assertThat(share).isGreaterThan(0.90 - 3 * Math.sqrt(0.05 * 0.95 / draws));
        }
    }
}
