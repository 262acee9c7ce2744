package nightlag.stages.numeric;

/**
 * A number given as an offset from a nearby double. The difference of two numbers with the same anchor keeps all the
 * digits of their offsets, however small these are: λ = τ(1 + d) can differ from τ by 1e-25 of its value and d is still
 * known to 30 digits.
 *
 * @param anchor the double it is near to
 * @param offset what is to be added to it
 */
public record AnchoredValue(double anchor, DoubleDouble offset) {
    /** The double itself. */
    public static AnchoredValue of(double value) {
        return new AnchoredValue(value, DoubleDouble.ZERO);
    }

    /** The number moved by a step, the anchor kept. */
    public AnchoredValue plus(DoubleDouble step) {
        return new AnchoredValue(anchor, offset.plus(step));
    }

    /** The difference of two numbers. */
    public DoubleDouble minus(AnchoredValue other) {
        DoubleDouble offsets = offset.minus(other.offset);
        return anchor == other.anchor
                ? offsets
                : DoubleDouble.difference(anchor, other.anchor).plus(offsets);
    }

    /** The number without its anchor. */
    public DoubleDouble toDoubleDouble() {
        return offset.plus(anchor);
    }

    /** The nearest double. */
    public double value() {
        return toDoubleDouble().value();
    }
}
