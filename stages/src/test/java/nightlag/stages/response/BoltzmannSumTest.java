package nightlag.stages.response;

import static nightlag.stages.response.Programmes.heated;
import static nightlag.stages.response.Programmes.programme;
import static nightlag.stages.response.Programmes.step;
import static nightlag.stages.response.Programmes.strain;
import static nightlag.stages.response.Programmes.strains;
import static nightlag.stages.response.Programmes.stress;
import static nightlag.stages.response.Programmes.stresses;
import static nightlag.stages.response.Programmes.totals;
import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.List;
import java.util.Random;
import nightlag.stages.response.Programme.Instant;
import nightlag.stages.response.ResponsePlan.Step;
import nightlag.stages.spectrum.RelaxationModes;
import nightlag.stages.spectrum.RetardationModes;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class BoltzmannSumTest {
    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5})
    void twiceTheProgrammeIsTwiceTheAnswer(long seed) {
        RelaxationModes material = material(seed);
        ResponsePlan once = stress(100, step(0, 1), step(3, -0.5), step(40, 0.2));
        ResponsePlan twice = stress(100, step(0, 2), step(3, -1), step(40, 0.4));

        double[] single = totals(strains(once, material.retardation()));
        double[] doubled = totals(strains(twice, material.retardation()));

        for (int i = 0; i < single.length; i++) {
            assertThat(doubled[i]).isEqualTo(2 * single[i]);
        }
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5})
    void theAnswerToASumIsTheSumOfTheAnswers(long seed) {
        RelaxationModes material = material(seed);
        // the same instants in all three: a step of nothing is a step all the same
        double[] first = stresses(strain(100, step(0, 0.01), step(7, 0.03)), material);
        double[] second = stresses(strain(100, step(0, 0.02), step(7, -0.01)), material);
        double[] both = stresses(strain(100, step(0, 0.03), step(7, 0.02)), material);

        for (int i = 0; i < both.length; i++) {
            assertThat(both[i])
                    .isCloseTo(first[i] + second[i], within(1e-14 * (Math.abs(first[i]) + Math.abs(second[i]))));
        }
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5})
    void whatBeginsLaterGoesTheSameWay(long seed) {
        RelaxationModes material = material(seed);
        ResponsePlan now = stress(16, step(0, 1), step(4, 0));
        ResponsePlan later = stress(80, step(0, 0), step(64, 1), step(68, 0));
        double[] early = totals(strains(now, material.retardation()));
        double[] late = totals(strains(later, material.retardation()));
        List<Instant> lateInstants = programme(later).instants();

        int first = 0;
        while (lateInstants.get(first).segment() < 1) {
            first++;
        }
        for (int i = 1; i < early.length; i++) {
            assertThat(late[first + i - 1]).isCloseTo(early[i], within(1e-14 * Math.abs(early[i])));
        }
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5})
    void theStrainsOfAHeldStressAskForThatStress(long seed) {
        RelaxationModes material = material(seed);
        RetardationModes creep = material.retardation();
        // the creep of one pascal in stairs that cross it in the middle of each tread
        int treads = 4000;
        double tread = 50.0 / treads;
        Step[] stairs = new Step[treads];
        stairs[0] = step(0, creep.instantaneousPerPa());
        for (int k = 1; k < treads; k++) {
            stairs[k] = step((k - 0.5) * tread, creep.creepPerPa(k * tread));
        }
        Programme programme = Programme.of(strain((treads - 0.5) * tread, stairs), 300, 50);

        double[] stresses = Programmes.sum(programme).stresses(material);

        // half a tread after the last step the stairs are where the creep is
        assertThat(stresses[stresses.length - 1]).isCloseTo(1, within(1e-3));
    }

    @Test
    void aStepToATemperatureOfTheSamePaceIsNone() {
        RelaxationModes material = material(1);
        ResponsePlan plain = stress(100, step(0, 1), step(30, 0));
        ResponsePlan warmed = heated(List.of(step(0, 300), step(10, 310)), plain);
        double[] once = totals(strains(plain, material.retardation()));
        double[] cut = totals(strains(warmed, material.retardation()));

        assertThat(cut[cut.length - 1]).isCloseTo(once[once.length - 1], within(1e-14 * once[once.length - 1]));
    }

    @Test
    void twiceAsFastIsTheSameInHalfTheTime() {
        RelaxationModes material = material(2);
        Programme programme = programme(heated(List.of(step(0, 300), step(10, 310)), stress(20, step(0, 1))));
        double[] strains = totals(new BoltzmannSum(programme, new double[] {1, 2}).strains(material.retardation()));

        double expected = material.retardation().creepPerPa(10 + 2 * 10);
        assertThat(strains[strains.length - 1]).isCloseTo(expected, within(1e-14 * expected));
    }

    @Test
    void thereAreTwentyInstantsADecadeAfterEveryStepAndTwoAtIt() {
        Programme programme = programme(stress(1000, step(0, 1), step(100, 0)));
        List<Instant> instants = programme.instants();

        assertThat(instants.get(0)).isEqualTo(new Instant(-1, 0, 0));
        assertThat(instants.get(1)).isEqualTo(new Instant(0, 0, 0));
        assertThat(instants.get(instants.size() - 1).timeS()).isEqualTo(1000);
        assertThat(instants.stream().filter(at -> at.timeS() == 100)).hasSize(2);
        for (double step : new double[] {0, 100}) {
            double end = step == 0 ? 100 : 900;
            for (double from = 1e-3; from * 10 <= end; from *= 10) {
                double low = step + from;
                double high = step + 10 * from;
                assertThat(instants.stream().filter(at -> at.timeS() >= low && at.timeS() < high))
                        .hasSizeGreaterThanOrEqualTo(20);
            }
        }
        for (int i = 1; i < instants.size(); i++) {
            assertThat(instants.get(i).timeS())
                    .isGreaterThanOrEqualTo(instants.get(i - 1).timeS());
        }
    }

    private static RelaxationModes material(long seed) {
        Random random = new Random(seed);
        int count = 3 + random.nextInt(6);
        double[] times =
                random.doubles(count, -2, 3).map(log -> Math.pow(10, log)).toArray();
        double[] strengths =
                random.doubles(count, 0, 4).map(log -> Math.pow(10, log)).toArray();
        return RelaxationModes.of(seed % 2 == 0 ? 10 : 0, times, strengths);
    }
}
