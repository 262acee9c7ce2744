package nightlag.stages.sweep;

import java.util.Arrays;
import java.util.HashSet;
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
