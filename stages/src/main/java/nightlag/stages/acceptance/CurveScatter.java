package nightlag.stages.acceptance;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.function.ToDoubleFunction;
import nightlag.stages.numeric.SmoothCurve;

/**
 * What readings without an uncertainty scatter by about a smooth curve, over frequency within their isotherm or, where that has
 * too few frequencies, over temperature at their frequency.
 */
final class CurveScatter {
    private static final int FEWEST = 6;
    /** A curve through more takes long and tells no more about the place in question. */
    private static final int MOST = 40;

    private static final int ORDER = 3;
    /** Of a logarithm; of a figure that has none, of its range. */
    private static final double LEAST = 1e-5;

    private CurveScatter() {}

    /**
     * The same readings, those without a variance given that of their scatter where it can be had.
     *
     * @param temperatureK the place in question, K
     * @param lnFrequency likewise
     */
    static List<Reading> told(List<Reading> readings, double temperatureK, double lnFrequency) {
        if (readings.stream().noneMatch(reading -> Double.isNaN(reading.variance()))) {
            return readings;
        }
        List<Reading> told = new ArrayList<>();
        for (Reading reading : readings) {
            if (!Double.isNaN(reading.variance())) {
                told.add(reading);
                continue;
            }
            double variance = variance(
                    readings.stream()
                            .filter(other -> other.isothermK() == reading.isothermK())
                            .toList(),
                    Reading::lnFrequency,
                    LocalFigure.SAME_LN_FREQUENCY,
                    lnFrequency,
                    reading);
            if (Double.isNaN(variance)) {
                variance = variance(
                        readings.stream()
                                .filter(other -> Math.abs(other.lnFrequency() - reading.lnFrequency())
                                        <= LocalFigure.SAME_LN_FREQUENCY)
                                .toList(),
                        Reading::temperatureK,
                        0,
                        temperatureK,
                        reading);
            }
            told.add(reading.withVariance(variance));
        }
        return told;
    }

    /** u² of a reading as its neighbours' scatter has it; NaN where there are too few of them. */
    private static double variance(
            List<Reading> curve, ToDoubleFunction<Reading> axis, double same, double place, Reading reading) {
        Scale scale = curve.stream().allMatch(Scale.LOG::has) ? Scale.LOG : Scale.LINEAR;
        List<Node> nodes = Node.along(curve, axis, same, scale).stream()
                .sorted(Comparator.comparingDouble(node -> Math.abs(node.x() - place)))
                .limit(MOST)
                .sorted(Comparator.comparingDouble(Node::x))
                .toList();
        if (nodes.size() < FEWEST) {
            return Double.NaN;
        }
        double[] x = nodes.stream().mapToDouble(Node::x).toArray();
        double[] y = nodes.stream().mapToDouble(Node::y).toArray();
        double range = scale == Scale.LOG
                ? 1
                : nodes.stream().mapToDouble(Node::y).max().orElseThrow()
                        - nodes.stream().mapToDouble(Node::y).min().orElseThrow();
        double least = Node.square(LEAST * (range > 0 ? range : 1));
        double[] variances = new double[x.length];
        java.util.Arrays.fill(variances, least);
        double scatter = least * SmoothCurve.through(x, y, variances, ORDER).widening();
        return scatter * Node.square(scale.perScaled(scale.of(reading)));
    }
}
