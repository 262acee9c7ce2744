package nightlag.stages.sweep;

import java.util.Arrays;
import java.util.Collections;
import java.util.Comparator;
import java.util.HashSet;
import java.util.IdentityHashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;
import nightlag.stages.moduli.ModulusPoint;

/** The frequency sweeps among the points of an isotherm. */
public final class FrequencySweeps {
    /** Frequencies this close, relatively, are one. */
    private static final double SAME_FREQUENCY = 0.01;

    private FrequencySweeps() {}

    /**
     * The points of those sweeps in which the frequency varies, so that an amplitude or time sweep at one frequency stands
     * apart; all points where no single sweep does so, for then each record was made as a sweep of its own.
     */
    public static List<ModulusPoint> among(List<ModulusPoint> points) {
        Map<SweepName, List<ModulusPoint>> sweeps = SweepName.group(points);
        Set<SweepName> varying = new HashSet<>();
        sweeps.forEach((name, members) -> {
            if (distinctFrequencies(members) > 1) {
                varying.add(name);
            }
        });
        return varying.isEmpty()
                ? points
                : points.stream()
                        .filter(point -> varying.contains(SweepName.of(point)))
                        .toList();
    }

    /**
     * The points without those of amplitude sweeps, whose larger strains are past the linear range. Where a sweep's frequency
     * would be left without a point, the sweep's point of smallest strain stays.
     *
     * @param points points of an isotherm
     * @param amplitudeSweeps the lot's, holding the same objects
     */
    public static List<ModulusPoint> withoutAmplitudeSweeps(
            List<ModulusPoint> points, List<List<ModulusPoint>> amplitudeSweeps) {
        Set<ModulusPoint> swept = sameObjects();
        amplitudeSweeps.forEach(swept::addAll);
        List<ModulusPoint> others =
                points.stream().filter(point -> !swept.contains(point)).toList();
        Set<ModulusPoint> given = sameObjects();
        given.addAll(points);
        Set<ModulusPoint> kept = sameObjects();
        kept.addAll(others);
        for (List<ModulusPoint> sweep : amplitudeSweeps) {
            sweep.stream()
                    .filter(given::contains)
                    .min(Comparator.comparingDouble(AmplitudeSweeps::strain))
                    .filter(smallest -> others.stream().noneMatch(other -> isAtFrequencyOf(smallest, other)))
                    .ifPresent(kept::add);
        }
        return points.stream().filter(kept::contains).toList();
    }

    private static Set<ModulusPoint> sameObjects() {
        return Collections.newSetFromMap(new IdentityHashMap<>());
    }

    private static boolean isAtFrequencyOf(ModulusPoint one, ModulusPoint other) {
        double first = one.frequencyHz().orElseThrow();
        double second = other.frequencyHz().orElseThrow();
        return Math.max(first, second) <= Math.min(first, second) * (1 + SAME_FREQUENCY);
    }

    /** How many different frequencies, a hundredth apart or more, the points have. */
    public static int distinctFrequencies(List<ModulusPoint> points) {
        return distinct(points.stream()
                .flatMapToDouble(point -> point.frequencyHz().stream())
                .toArray());
    }

    /** How many of these numbers, none negative, differ by a hundredth or more from the next smaller one kept. */
    public static int distinct(double[] frequencies) {
        double[] rising = frequencies.clone();
        Arrays.sort(rising);
        int count = 0;
        double last = -1;
        for (double frequency : rising) {
            if (!(frequency <= last * (1 + SAME_FREQUENCY))) {
                count++;
                last = frequency;
            }
        }
        return count;
    }
}
