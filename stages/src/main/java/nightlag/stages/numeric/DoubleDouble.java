package nightlag.stages.numeric;

/**
 * A number as the unevaluated sum of two doubles, about 32 significant digits (Dekker, Numer. Math. 18 (1971) 224; Knuth,
 * The Art of Computer Programming 2, section 4.2.2). Not a number and infinities are not looked after: callers hand in
 * finite values.
 *
 * @param hi the nearest double
 * @param lo what is left, at most half a unit in the last place of {@code hi}
 */
public record DoubleDouble(double hi, double lo) {
    /** Zero. */
    public static final DoubleDouble ZERO = new DoubleDouble(0, 0);

    /** One. */
    public static final DoubleDouble ONE = new DoubleDouble(1, 0);

    /** The double itself. */
    public static DoubleDouble of(double value) {
        return new DoubleDouble(value, 0);
    }

    /** a − b without any rounding. */
    public static DoubleDouble difference(double a, double b) {
        return exactSum(a, -b);
    }

    /** The sum. */
    public DoubleDouble plus(DoubleDouble other) {
        DoubleDouble high = exactSum(hi, other.hi);
        DoubleDouble low = exactSum(lo, other.lo);
        DoubleDouble middle = quickSum(high.hi, high.lo + low.hi);
        return quickSum(middle.hi, middle.lo + low.lo);
    }

    /** The sum with a double. */
    public DoubleDouble plus(double other) {
        DoubleDouble high = exactSum(hi, other);
        return quickSum(high.hi, high.lo + lo);
    }

    /** The difference. */
    public DoubleDouble minus(DoubleDouble other) {
        return plus(other.negate());
    }

    /** The number with its sign turned. */
    public DoubleDouble negate() {
        return new DoubleDouble(-hi, -lo);
    }

    /** The product. */
    public DoubleDouble times(DoubleDouble other) {
        double product = hi * other.hi;
        double rest = Math.fma(hi, other.hi, -product) + (hi * other.lo + lo * other.hi);
        return quickSum(product, rest);
    }

    /** The product with a double. */
    public DoubleDouble times(double factor) {
        double product = hi * factor;
        return quickSum(product, Math.fma(hi, factor, -product) + lo * factor);
    }

    /** The quotient. */
    public DoubleDouble over(DoubleDouble divisor) {
        double first = hi / divisor.hi;
        DoubleDouble rest = minus(divisor.times(first));
        double second = rest.hi / divisor.hi;
        rest = rest.minus(divisor.times(second));
        double third = rest.hi / divisor.hi;
        return quickSum(first, second).plus(third);
    }

    /** −1, 0 or 1. */
    public int sign() {
        return (int) Math.signum(hi);
    }

    /** The nearest double. */
    public double value() {
        return hi;
    }

    private static DoubleDouble exactSum(double a, double b) {
        double sum = a + b;
        double partOfB = sum - a;
        return new DoubleDouble(sum, (a - (sum - partOfB)) + (b - partOfB));
    }

    private static DoubleDouble quickSum(double large, double small) {
        double sum = large + small;
        return new DoubleDouble(sum, small - (sum - large));
    }
}
