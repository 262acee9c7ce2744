package nightlag.stages.acceptance;

import java.util.List;
import java.util.Optional;

/**
 * The straight line between the two nodes on either side of a place.
 *
 * @param from the node before
 * @param to the node behind
 * @param y the figure at the place, or its logarithm
 * @param variance u² of it: that of the two nodes, and the square of what a parabola through a third would be beside it; NaN
 *     where a node has none
 * @param slope dy/dx
 * @param curvatureKnown whether there is a third node
 */
record Chord(Node from, Node to, double y, double variance, double slope, boolean curvatureKnown) {
    /** Empty where the place is not between two nodes. */
    static Optional<Chord> at(List<Node> rising, double x) {
        for (int i = 0; i + 1 < rising.size(); i++) {
            if (rising.get(i).x() <= x && x <= rising.get(i + 1).x()) {
                return Optional.of(between(rising, i, x));
            }
        }
        return Optional.empty();
    }

    private static Chord between(List<Node> rising, int i, double x) {
        Node from = rising.get(i);
        Node to = rising.get(i + 1);
        double slope = (to.y() - from.y()) / (to.x() - from.x());
        double part = (x - from.x()) / (to.x() - from.x());
        double bend = 0;
        if (i > 0) {
            bend = bend(rising.get(i - 1), from, to);
        }
        if (i + 2 < rising.size()) {
            bend = Math.max(bend, bend(from, to, rising.get(i + 2)));
        }
        double departure = bend * (x - from.x()) * (to.x() - x);
        double variance =
                Node.square(1 - part) * from.variance() + Node.square(part) * to.variance() + Node.square(departure);
        return new Chord(from, to, from.y() + slope * (x - from.x()), variance, slope, rising.size() > 2);
    }

    /** Size of the second divided difference. */
    private static double bend(Node first, Node second, Node third) {
        double before = (second.y() - first.y()) / (second.x() - first.x());
        double behind = (third.y() - second.y()) / (third.x() - second.x());
        return Math.abs((behind - before) / (third.x() - first.x()));
    }
}
