package nightlag.stages.acceptance;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.function.ToDoubleFunction;

/**
 * What is known of a figure at one place along an axis.
 *
 * @param x the place: ln of a frequency, or a temperature
 * @param y the figure there, or its logarithm
 * @param variance its u²; NaN where none is known
 * @param points points behind it
 * @param doubtful doubtful ones among them
 */
record Node(double x, double y, double variance, int points, int doubtful) {
    private static final double SQRT_3 = Math.sqrt(3);

    /** Readings as nodes along an axis, rising; those no farther apart than {@code same} are one. */
    static List<Node> along(List<Reading> readings, ToDoubleFunction<Reading> axis, double same, Scale scale) {
        List<Reading> rising = readings.stream()
                .filter(scale::has)
                .sorted(Comparator.comparingDouble(axis))
                .toList();
        List<Node> nodes = new ArrayList<>();
        int from = 0;
        for (int to = 1; to <= rising.size(); to++) {
            if (to == rising.size()
                    || axis.applyAsDouble(rising.get(to)) - axis.applyAsDouble(rising.get(from)) > same) {
                nodes.add(of(rising.subList(from, to), axis, scale));
                from = to;
            }
        }
        return nodes;
    }

    private static Node of(List<Reading> readings, ToDoubleFunction<Reading> axis, Scale scale) {
        Pooled pooled = Pooled.of(
                readings.stream().mapToDouble(scale::of).toArray(),
                readings.stream().mapToDouble(scale::variance).toArray());
        double x = 0;
        for (int i = 0; i < readings.size(); i++) {
            x += pooled.weights()[i] * axis.applyAsDouble(readings.get(i));
        }
        return new Node(
                x,
                pooled.mean(),
                pooled.u().isPresent() ? pooled.u().getAsDouble() * pooled.u().getAsDouble() : Double.NaN,
                readings.size(),
                (int) readings.stream().filter(Reading::doubtful).count());
    }

    /** The same, so much higher. */
    Node raised(double by) {
        return new Node(x, y + by, variance, points, doubtful);
    }

    /**
     * A slope with its u.
     *
     * @param value dy/dx
     * @param u what noise and curvature leave open of it
     */
    record Slope(double value, double u) {}

    /**
     * The slope at this node: of the parabola through it and its neighbours on either side, the straight ones on both sides
     * being the ends of what it may be; with a neighbour on one side only, that to it, of which nothing more is sure than its
     * sign and size. Empty without a neighbour.
     */
    Optional<Slope> slope(List<Node> rising, double apart) {
        Optional<Node> below =
                rising.stream().filter(node -> node.x < x - apart).reduce((first, second) -> second);
        Optional<Node> above =
                rising.stream().filter(node -> node.x > x + apart).findFirst();
        if (below.isPresent() && above.isPresent()) {
            double down = x - below.get().x;
            double up = above.get().x - x;
            double left = (y - below.get().y) / down;
            double right = (above.get().y - y) / up;
            double noise = square(up / (down * (down + up))) * known(below.get())
                    + square(down / (up * (down + up))) * known(above.get())
                    + square(up / down - down / up) / square(down + up) * known(this);
            double curvature = (right - left) / (2 * SQRT_3);
            return Optional.of(
                    new Slope((left * up + right * down) / (down + up), Math.sqrt(noise + square(curvature))));
        }
        return below.or(() -> above).map(other -> {
            double run = other.x - x;
            double value = (other.y - y) / run;
            double noise = (known(other) + known(this)) / square(run);
            return new Slope(value, Math.sqrt(noise + square(value / SQRT_3)));
        });
    }

    private static double known(Node node) {
        return Double.isNaN(node.variance) ? 0 : node.variance;
    }

    static double square(double value) {
        return value * value;
    }
}
