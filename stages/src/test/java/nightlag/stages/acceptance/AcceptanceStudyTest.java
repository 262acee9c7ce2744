package nightlag.stages.acceptance;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.ArrayList;
import java.util.List;
import java.util.OptionalDouble;
import java.util.Random;
import nightlag.stages.Study;
import nightlag.stages.TestPoints;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.SharedEffect;
import nightlag.stages.numeric.Complex;
import nightlag.stages.sweep.OwnFigures;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/** How often value ± 1.96 u holds the true value, for each way in which a value at a limit is had. */
@Tag("study")
class AcceptanceStudyTest {
    private static final double NOISE = 0.01;
    private static final double TORQUE = 0.008;
    private static final double KELVIN = 0.2;
    /** Between points all that a parabola would be beside the line is in u, so that more intervals hold than need to. */
    private static final double CLOSE = 0.975;

    /** Two Maxwell elements, a decade and a half apart; times fall by 4 % a kelvin. */
    private static Complex melt(double celsius, double hertz) {
        double omega = 2 * Math.PI * hertz * Math.exp(-0.04 * (celsius - 190));
        double storage = 0;
        double loss = 0;
        for (double[] mode : new double[][] {{1e4, 0.02}, {2e3, 0.6}}) {
            double x = omega * mode[1];
            storage += mode[0] * x * x / (1 + x * x);
            loss += mode[0] * x / (1 + x * x);
        }
        return new Complex(storage, loss);
    }

    /** Where the points lie about 190 °C and 1 Hz. */
    private record Layout(String name, List<Double> celsius, List<Double> hertz, int repeats, double most) {
        @Override
        public String toString() {
            return name;
        }

        List<ModulusPoint> measured(Random random, double sharedScale, double sharedKelvin) {
            List<ModulusPoint> points = new ArrayList<>();
            for (double at : celsius) {
                for (double f : hertz) {
                    for (int i = 0; i < repeats; i++) {
                        Complex truth = melt(at + sharedKelvin, f);
                        points.add(TestPoints.point()
                                .named("1", "1", points.size() + "", "bench/" + points.size() + ".csv")
                                .at(at + Limits.ZERO_C)
                                .hz(f)
                                .modulus(new Complex(
                                                truth.re() * (1 + NOISE * random.nextGaussian()),
                                                truth.im() * (1 + NOISE * random.nextGaussian()))
                                        .times(Math.exp(sharedScale)))
                                .relativeU(NOISE)
                                .build());
                    }
                }
            }
            return points;
        }
    }

    private static List<Layout> layouts() {
        List<Double> isotherms = List.of(175.0, 190.0, 205.0);
        List<Double> frequencies = List.of(0.4, 1.0, 2.5);
        return List.of(
                new Layout("one point", isotherms, frequencies, 1, CLOSE),
                new Layout("mean of five points", isotherms, frequencies, 5, CLOSE),
                new Layout(
                        "a point 0.4 K and 0.7 % beside",
                        List.of(175.3, 190.4, 205.3), List.of(0.4, 1.007, 2.5), 1, CLOSE),
                new Layout("between frequencies", isotherms, List.of(0.32, 0.68, 1.45, 3.1), 1, 1),
                new Layout("between isotherms", List.of(172.0, 184.0, 196.0, 208.0), frequencies, 1, 1));
    }

    @ParameterizedTest(name = "{0}")
    @MethodSource("layouts")
    void intervalsHoldTheTruth(Layout layout) {
        Random random = new Random(106);
        int draws = Study.draws(1500, 20_000);
        double truth = melt(190, 1).re();
        int held = 0;
        for (int draw = 0; draw < draws; draw++) {
            List<ModulusPoint> points =
                    layout.measured(random, TORQUE * random.nextGaussian(), KELVIN * random.nextGaussian());
            SharedEffect effect = new SharedEffect(TORQUE, 0, 0);
            List<Lot.Moved> moved = List.of(
                    new Lot.Moved(
                            "torque",
                            OptionalDouble.empty(),
                            new Lot(
                                    points.stream()
                                            .map(point -> point.moved(effect))
                                            .toList(),
                                    List::of)),
                    new Lot.Moved("temperature", OptionalDouble.of(KELVIN), new Lot(points, List::of)));
            Judgement judged = Acceptance.of(
                            List.of(Limits.on("storage_modulus").from(1).guarded(2)),
                            OwnFigures.NONE,
                            new Lot(points, List::of),
                            moved)
                    .get(0);
            if (Math.abs(judged.value().orElseThrow() - truth)
                    <= 1.96 * judged.u().orElseThrow()) {
                held++;
            }
        }
        double share = held / (double) draws;
        Study.row("| %s | %.1f %% |", layout, 100 * share);
        assertThat(share).isBetween(0.93, layout.most());
    }
}
