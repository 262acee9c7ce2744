package nightlag.stages.numeric;

/**
 * A complex number.
 *
 * @param re real part
 * @param im imaginary part
 */
public record Complex(double re, double im) {
    /** Zero. */
    public static final Complex ZERO = new Complex(0, 0);

    /** One. */
    public static final Complex ONE = new Complex(1, 0);

    /** The imaginary unit. */
    public static final Complex I = new Complex(0, 1);

    /** {@code radius·e^{i·angle}}, the angle in radians. */
    public static Complex polar(double radius, double angleRad) {
        return new Complex(radius * Math.cos(angleRad), radius * Math.sin(angleRad));
    }

    /** The sum. */
    public Complex plus(Complex other) {
        return new Complex(re + other.re, im + other.im);
    }

    /** The difference. */
    public Complex minus(Complex other) {
        return new Complex(re - other.re, im - other.im);
    }

    /** The product. */
    public Complex times(Complex other) {
        return new Complex(re * other.re - im * other.im, re * other.im + im * other.re);
    }

    /** The product with a real factor. */
    public Complex times(double factor) {
        return new Complex(re * factor, im * factor);
    }

    /** The quotient, by Smith's method (Smith 1962), which neither over- nor underflows early. */
    public Complex over(Complex divisor) {
        if (Math.abs(divisor.re) >= Math.abs(divisor.im)) {
            double ratio = divisor.im / divisor.re;
            double scale = divisor.re + divisor.im * ratio;
            return new Complex((re + im * ratio) / scale, (im - re * ratio) / scale);
        }
        double ratio = divisor.re / divisor.im;
        double scale = divisor.re * ratio + divisor.im;
        return new Complex((re * ratio + im) / scale, (im * ratio - re) / scale);
    }

    /** The complex conjugate. */
    public Complex conjugate() {
        return new Complex(re, -im);
    }

    /** The modulus. */
    public double abs() {
        return Math.hypot(re, im);
    }

    /** The argument in radians, −π to π. */
    public double argument() {
        return Math.atan2(im, re);
    }

    /** The principal square root (real part never below zero). */
    public Complex sqrt() {
        double radius = abs();
        if (radius == 0) {
            return ZERO;
        }
        double half = Math.sqrt((radius + Math.abs(re)) / 2);
        return re >= 0
                ? new Complex(half, im / (2 * half))
                : new Complex(Math.abs(im) / (2 * half), Math.copySign(half, im));
    }

    /** Whether both parts are finite. */
    public boolean isFinite() {
        return Double.isFinite(re) && Double.isFinite(im);
    }
}
