package nightlag.stages.numeric;

import java.util.List;

/**
 * The equation f(x) = c + Σ w_i/(p_i − x) = 0 with c ≥ 0, positive weights and rising poles. f rises from −∞ to +∞ between
 * two neighbouring poles and from −∞ to c beyond the last one, so each gap holds exactly one root, and the place beyond
 * the last pole one where c &gt; 0. (Such equations are called secular; Golub, SIAM Rev. 15 (1973) 318.)
 *
 * <p>A root is sought as its offset x from the nearer pole a, with the pole's own term kept exact and the rest R(x)
 * linearised about the last iterate: R₀ + R₁(x − x₀) = w_a/x. The sums are carried in double-double arithmetic, because a
 * weak pole's root rests on what is left when strong far terms cancel.
 */
public final class SecularEquation {
    private static final int MAX_STEPS = 200;
    private static final int POLISHING_STEPS = 3;

    private final DoubleDouble constant;
    private final List<AnchoredValue> poles;
    private final List<DoubleDouble> weights;

    /**
     * The equation.
     *
     * @param constant c, not negative
     * @param poles p_i, strictly rising
     * @param weights w_i, positive
     */
    public SecularEquation(DoubleDouble constant, List<AnchoredValue> poles, List<DoubleDouble> weights) {
        if (poles.size() != weights.size()) {
            throw new IllegalArgumentException(poles.size() + " poles but " + weights.size() + " weights");
        }
        if (!(constant.hi() >= 0)) {
            throw new IllegalArgumentException("the constant must not be negative, it is " + constant.hi());
        }
        for (int i = 0; i < poles.size(); i++) {
            if (!(weights.get(i).hi() > 0)) {
                throw new IllegalArgumentException("weight " + i + " must be positive, it is "
                        + weights.get(i).hi());
            }
            if (i > 0 && poles.get(i).minus(poles.get(i - 1)).sign() <= 0) {
                throw new IllegalArgumentException("pole " + i + " does not lie above the one before it");
            }
        }
        this.constant = constant;
        this.poles = List.copyOf(poles);
        this.weights = List.copyOf(weights);
    }

    /** How many roots there are. */
    public int rootCount() {
        return constant.sign() > 0 ? poles.size() : Math.max(0, poles.size() - 1);
    }

    /**
     * One root.
     *
     * @param value where it lies
     * @param slope f' there, Σ w_i/(p_i − x)²
     */
    public record Root(AnchoredValue value, DoubleDouble slope) {}

    /** The root above pole {@code index}, below the next one if there is one. */
    public Root rootAbove(int index) {
        if (index + 1 < poles.size()) {
            DoubleDouble half = poles.get(index + 1).minus(poles.get(index)).times(0.5);
            Rest fromLeft = new Rest(index);
            Sum middle = fromLeft.at(half);
            if (fromLeft.whole(half, middle).sign() >= 0) {
                double least = weights.get(index).hi() / middle.value().hi();
                return fromLeft.solve(Math.min(least, half.hi()) * 0.5, half.hi());
            }
            Rest fromRight = new Rest(index + 1);
            DoubleDouble back = half.negate();
            middle = fromRight.at(back);
            double least = weights.get(index + 1).hi() / Math.abs(middle.value().hi());
            return fromRight.solve(-Math.min(least, half.hi()) * 0.5, back.hi());
        }
        Rest beyond = new Rest(index);
        double sum = weights.stream().mapToDouble(DoubleDouble::hi).sum();
        return beyond.solve(weights.get(index).hi() / constant.hi() * 0.5, sum / constant.hi() * 2);
    }

    /** A sum and its derivative. */
    private record Sum(DoubleDouble value, double slope) {}

    /** All of f but the term of one pole, as a function of the offset from that pole. */
    private final class Rest {
        private final int anchor;
        private final DoubleDouble[] distances;

        Rest(int anchor) {
            this.anchor = anchor;
            this.distances =
                    poles.stream().map(pole -> pole.minus(poles.get(anchor))).toArray(DoubleDouble[]::new);
        }

        Sum at(DoubleDouble offset) {
            DoubleDouble value = constant;
            double slope = 0;
            for (int i = 0; i < distances.length; i++) {
                if (i != anchor) {
                    DoubleDouble distance = distances[i].minus(offset);
                    DoubleDouble term = weights.get(i).over(distance);
                    value = value.plus(term);
                    slope += term.hi() / distance.hi();
                }
            }
            return new Sum(value, slope);
        }

        DoubleDouble whole(DoubleDouble offset, Sum rest) {
            return rest.value().minus(weights.get(anchor).over(offset));
        }

        /** The root between two offsets of one sign; {@code near} is the one closer to the pole. */
        Root solve(double near, double far) {
            double weight = weights.get(anchor).hi();
            double inner = near;
            double outer = far;
            double offset = far;
            for (int step = 0; step < MAX_STEPS; step++) {
                DoubleDouble here = DoubleDouble.of(offset);
                Sum rest = at(here);
                int sign = whole(here, rest).sign();
                if (sign == 0) {
                    break;
                }
                // f rises with the offset: too high means too far to the right
                if (sign > 0 == offset > 0) {
                    outer = offset;
                } else {
                    inner = offset;
                }
                double next = withPoleExact(rest, offset, weight);
                boolean between = Math.abs(next) > Math.abs(inner) && Math.abs(next) < Math.abs(outer);
                if (!between) {
                    next = Math.copySign(Math.sqrt(Math.abs(inner)) * Math.sqrt(Math.abs(outer)), far);
                }
                boolean settled = Math.abs(next - offset) <= 1e-11 * Math.abs(next);
                offset = next;
                if (settled) {
                    break;
                }
            }
            return polish(offset);
        }

        private double withPoleExact(Sum rest, double offset, double weight) {
            double b = rest.value().hi() - rest.slope() * offset;
            double root = Math.sqrt(b * b + 4 * rest.slope() * weight);
            if (offset > 0) {
                return b >= 0 ? 2 * weight / (b + root) : (root - b) / (2 * rest.slope());
            }
            return b <= 0 ? 2 * weight / (b - root) : (-root - b) / (2 * rest.slope());
        }

        /** Newton steps in double precision on f in double-double precision: each adds some 15 digits. */
        private Root polish(double start) {
            DoubleDouble offset = DoubleDouble.of(start);
            double weight = weights.get(anchor).hi();
            for (int step = 0; step < POLISHING_STEPS; step++) {
                Sum rest = at(offset);
                double slope = rest.slope() + weight / offset.hi() / offset.hi();
                double correction = whole(offset, rest).hi() / slope;
                offset = offset.plus(-correction);
            }
            return new Root(poles.get(anchor).plus(offset), slopeAt(offset));
        }

        private DoubleDouble slopeAt(DoubleDouble offset) {
            DoubleDouble slope = DoubleDouble.ZERO;
            for (int i = 0; i < distances.length; i++) {
                DoubleDouble distance = i == anchor ? offset : distances[i].minus(offset);
                slope = slope.plus(weights.get(i).over(distance).over(distance));
            }
            return slope;
        }
    }
}
