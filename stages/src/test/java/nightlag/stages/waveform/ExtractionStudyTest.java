package nightlag.stages.waveform;

import static nightlag.stages.waveform.StudyCondition.white;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.stream.IntStream;
import nightlag.stages.Study;
import org.assertj.core.api.SoftAssertions;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.EnumSource;

/**
 * The error of the extraction against the statistical limit, and how often its 95 % intervals hold the truth, by Monte Carlo
 * with fixed seeds. The limit is the Cramér–Rao bound where records are long enough to reach it; in the shortest, where
 * maximum likelihood itself misses the bound, it is what maximum likelihood by brute force makes of the same draws.
 *
 * <p>Every condition, and every group of them together, must keep its bar; only three standard errors of the study itself,
 * worked out from its draws, are added. {@code mvn test -pl stages -Dtest=ExtractionStudyTest -Dnightlag.study=long} takes more
 * draws and conditions and prints the table.
 */
@Tag("study")
class ExtractionStudyTest {
    private static final String[] QUANTITIES = {"G'", "G''", "delta"};

    /** Conditions with the same bars. */
    private enum Group {
        SHORTEST("white noise, 1.5 to 2.4 cycles, 16 to 60 samples a cycle, 20 to 80 dB", true, 1.05, 0.90, 0.98),
        SHORT("white noise, 1.5 to 2.4 cycles, 200 to 1000 samples a cycle, 20 to 80 dB", false, 1.05, 0.90, 0.98),
        USUAL("white noise, 3 to 50 cycles, 16 to 400 samples a cycle, 20 to 80 dB", false, 1.05, 0.93, 0.97),
        DENSE("white noise, 3 to 50 cycles, 4000 samples a cycle, 20 to 80 dB", false, 1.05, 0.93, 0.97),
        COLOURED("noise with memory 0.7, 5 to 50 cycles, 40 dB", false, Double.NaN, 0.92, 0.98),
        PATCHY("2 % of rows missing, 1 % clock jitter, 3 to 20 cycles", false, 1.1, 0.93, 0.97),
        SPIKED("0.5 % spikes of ten amplitudes, 3 to 30 cycles", false, 1.2, Double.NaN, Double.NaN);

        private final String words;
        private final boolean byLikelihood;
        private final double bar;
        private final double lowest;
        private final double highest;

        Group(String words, boolean byLikelihood, double bar, double lowest, double highest) {
            this.words = words;
            this.byLikelihood = byLikelihood;
            this.bar = bar;
            this.lowest = lowest;
            this.highest = highest;
        }

        List<StudyCondition> conditions() {
            boolean more = Study.isLong();
            return switch (this) {
                case SHORTEST ->
                    grid(
                            more ? new double[] {1.5, 1.6, 1.8, 2, 2.4} : new double[] {1.5, 2.4},
                            more ? new double[] {16, 24, 60} : new double[] {16, 40});
                case SHORT -> grid(new double[] {1.5, 2.4}, more ? new double[] {200, 1000} : new double[] {200});
                case USUAL ->
                    grid(
                            more ? new double[] {3, 4.3, 7, 12, 50} : new double[] {3, 5.4, 20},
                            more ? new double[] {16, 50, 400} : new double[] {16, 50});
                case DENSE ->
                    more
                            ? List.of(
                                    white(3, 4000, 20, Drift.QUADRATIC),
                                    white(5.4, 4000, 80, Drift.LINEAR),
                                    white(50, 4000, 50, Drift.LINEAR))
                            : List.of(white(3.3, 4000, 40, Drift.LINEAR));
                case COLOURED ->
                    coloured(
                            more ? new double[] {5, 6.4, 20, 50} : new double[] {5, 6.4, 20},
                            more ? new double[] {16, 40, 200} : new double[] {16, 40});
                case PATCHY -> patchy(more ? new double[] {3, 5.5, 20} : new double[] {3, 5.5});
                case SPIKED ->
                    List.of(
                            new StudyCondition(3, 400, 40, Drift.LINEAR, 0, 0, 0, 0.005),
                            new StudyCondition(10, 64, 30, Drift.LINEAR, 0, 0, 0, 0.005),
                            new StudyCondition(30, 40, 60, Drift.QUADRATIC, 0, 0, 0, 0.005));
            };
        }

        private int draws(StudyCondition condition) {
            double samples = condition.cycles() * condition.samplesPerCycle();
            if (samples > 5000) {
                return Study.draws(300, samples > 50_000 ? 400 : 2000);
            }
            return Study.draws(byLikelihood ? 600 : 1000, byLikelihood ? 3000 : 4000);
        }

        /** Every length with every rate; ratio of signal to noise and drift go round. */
        private static List<StudyCondition> grid(double[] cycles, double[] rates) {
            List<StudyCondition> conditions = new ArrayList<>();
            double[] decibels = {20, 50, 80};
            for (double length : cycles) {
                for (double rate : rates) {
                    int turn = conditions.size();
                    Drift drift = turn % 2 == 0 ? Drift.QUADRATIC : Drift.LINEAR;
                    conditions.add(white(length, rate, decibels[turn % 3], drift));
                }
            }
            return conditions;
        }

        private static List<StudyCondition> coloured(double[] cycles, double[] rates) {
            List<StudyCondition> conditions = new ArrayList<>();
            for (double length : cycles) {
                for (double rate : rates) {
                    conditions.add(new StudyCondition(length, rate, 40, Drift.LINEAR, 0.7, 0, 0, 0));
                }
            }
            return conditions;
        }

        private static List<StudyCondition> patchy(double[] cycles) {
            List<StudyCondition> conditions = new ArrayList<>();
            for (double length : cycles) {
                for (double rate : new double[] {16, 64}) {
                    conditions.add(new StudyCondition(length, rate, 40, Drift.LINEAR, 0, 0.02, 0.01, 0));
                }
            }
            return conditions;
        }
    }

    @ParameterizedTest(name = "{0}")
    @EnumSource(Group.class)
    void errorsAndIntervalsKeepTheirBars(Group group) {
        List<StudyCondition> conditions = group.conditions();
        List<StudyOutcome> outcomes = IntStream.range(0, conditions.size())
                .mapToObj(i -> StudyOutcome.of(
                        conditions.get(i),
                        group.draws(conditions.get(i)),
                        group.name().hashCode() + 10_000L * i,
                        group.byLikelihood))
                .toList();
        StudyOutcome together = StudyOutcome.pooled(outcomes);
        print(group, outcomes, together);
        SoftAssertions softly = new SoftAssertions();
        for (int i = 0; i < outcomes.size(); i++) {
            require(softly, group, outcomes.get(i), conditions.get(i).toString());
        }
        require(softly, group, together, "all together");
        softly.assertAll();
    }

    private static void require(SoftAssertions softly, Group group, StudyOutcome outcome, String name) {
        for (int q = 0; q < StudyOutcome.QUANTITIES; q++) {
            if (!Double.isNaN(group.bar)) {
                softly.assertThat(outcome.ratio()[q])
                        .as("%s: rms error of %s over the limit", name, QUANTITIES[q])
                        .isLessThanOrEqualTo(group.bar + 3 * outcome.ratioError()[q]);
            }
            if (!Double.isNaN(group.lowest)) {
                softly.assertThat(outcome.held()[q])
                        .as("%s: share of intervals that hold %s", name, QUANTITIES[q])
                        .isBetween(
                                group.lowest - 3 * error(group.lowest, outcome.draws()),
                                group.highest + 3 * error(group.highest, outcome.draws()));
            }
        }
    }

    private static double error(double share, int draws) {
        return Math.sqrt(share * (1 - share) / draws);
    }

    private static void print(Group group, List<StudyOutcome> outcomes, StudyOutcome together) {
        StringBuilder cells = new StringBuilder();
        for (int q = 0; q < StudyOutcome.QUANTITIES; q++) {
            int place = q;
            double worst =
                    outcomes.stream().mapToDouble(o -> o.ratio()[place]).max().orElseThrow();
            cells.append(
                    Double.isNaN(group.bar)
                            ? " |"
                            : String.format(Locale.ROOT, " %.3f (%.3f) |", together.ratio()[q], worst));
        }
        for (int q = 0; q < StudyOutcome.QUANTITIES; q++) {
            cells.append(String.format(Locale.ROOT, " %.1f |", 100 * together.held()[q]));
        }
        String limit = group.byLikelihood ? "maximum likelihood" : "bound";
        Study.row(
                "| %s | %d × %d | %s |%s",
                group.words, outcomes.size(), together.draws() / outcomes.size(), limit, cells);
        for (int i = 0; i < outcomes.size(); i++) {
            StudyOutcome o = outcomes.get(i);
            Study.row(
                    "    %s: %.3f %.3f %.3f ± %.3f; %.3f %.3f %.3f",
                    group.conditions().get(i),
                    o.ratio()[0],
                    o.ratio()[1],
                    o.ratio()[2],
                    o.ratioError()[0],
                    o.held()[0],
                    o.held()[1],
                    o.held()[2]);
        }
    }
}
