package nightlag.stages.geometry;

import java.util.Optional;
import nightlag.stages.numeric.Complex;

/**
 * The function ψ(w) that ties a layer's squared wave number w = (kh)² to what a wall feels, and its inverse:
 * ψ = √w sin √w at the fixed wall, ψ = √w tan √w at the moving one. Both are even in √w, so the branch of the root does
 * not matter.
 *
 * @param wall the wall that carries the transducer
 */
record ShearWave(MeasuringWall wall) {
    /** A step may turn the slope by about this part: Newton's method then stays with its root (Kantorovich). */
    private static final double CAUTION = 0.2;

    private static final int MOST_STEPS = 10_000;
    private static final double SHORTEST_STEP = 1e-10;
    private static final int NEWTON_STEPS = 50;

    /** ψ(w). */
    Complex value(Complex w) {
        Complex z = w.sqrt();
        return switch (wall) {
            case FIXED -> z.times(sine(z));
            case MOVING -> z.times(tangent(z));
        };
    }

    /** dψ/dw: (sin z/z + cos z)/2 or (tan z/z + 1 + tan² z)/2. */
    Complex slope(Complex w) {
        Complex z = w.sqrt();
        return switch (wall) {
            case FIXED -> {
                Complex ratio = z.abs() < 1e-4 ? Complex.ONE.minus(w.times(1.0 / 6)) : sine(z).over(z);
                yield ratio.plus(cosine(z)).times(0.5);
            }
            case MOVING -> {
                Complex tangent = tangent(z);
                Complex ratio = z.abs() < 1e-4 ? Complex.ONE.plus(w.times(1.0 / 3)) : tangent.over(z);
                yield ratio.plus(Complex.ONE).plus(tangent.times(tangent)).times(0.5);
            }
        };
    }

    /** The root of ψ(w) = target that grows from w = 0 along the straight line from 0 to the target. */
    Optional<Complex> rootFromOrigin(Complex target) {
        return follow(Complex.ZERO, Complex.ZERO, target);
    }

    /**
     * The root reached by way of a stiff wall: out along the positive real axis first, then round at equal distance from
     * the origin. It passes the turning points of ψ on their other side.
     */
    Optional<Complex> rootByStiffWall(Complex target) {
        double radius = target.abs();
        Complex from = new Complex(radius, 0);
        Optional<Complex> root = follow(Complex.ZERO, Complex.ZERO, from);
        int turns = 32;
        for (int turn = 1; turn <= turns && root.isPresent(); turn++) {
            Complex to = turn == turns ? target : Complex.polar(radius, target.argument() * turn / turns);
            root = follow(root.get(), from, to);
            from = to;
        }
        return root;
    }

    /** Follows the root from one target to another in a straight line, by Euler's steps put right by Newton's. */
    private Optional<Complex> follow(Complex start, Complex from, Complex to) {
        Complex way = to.minus(from);
        Complex w = start;
        double left = 1;
        for (int step = 0; step < MOST_STEPS; step++) {
            Complex slope = slope(w);
            double length =
                    CAUTION * slope.abs() / (curvature(w) * way.over(slope).abs());
            if (length >= left) {
                Complex end = refine(w.plus(way.times(left).over(slope)), to);
                return Optional.of(end).filter(Complex::isFinite);
            }
            // written so that NaN ends it too
            if (!(length > SHORTEST_STEP)) {
                return Optional.empty();
            }
            left -= length;
            w = refine(w.plus(way.times(length).over(slope)), to.minus(way.times(left)));
        }
        return Optional.empty();
    }

    /** Newton's method to the last digit. */
    private Complex refine(Complex near, Complex target) {
        Complex w = near;
        double last = Double.POSITIVE_INFINITY;
        for (int step = 0; step < NEWTON_STEPS; step++) {
            Complex move = target.minus(value(w)).over(slope(w));
            double size = move.abs();
            // written so that NaN ends it too
            if (!(size < last)) {
                return w;
            }
            w = w.plus(move);
            last = size;
        }
        return w;
    }

    /** |d²ψ/dw²| by a difference quotient; only the length of a step rests on it. */
    private double curvature(Complex w) {
        double reach = 1e-4 * (1 + w.abs());
        Complex step = new Complex(reach, reach);
        return slope(w.plus(step)).minus(slope(w.minus(step))).abs() / (2 * step.abs());
    }

    private static Complex sine(Complex z) {
        return new Complex(Math.sin(z.re()) * Math.cosh(z.im()), Math.cos(z.re()) * Math.sinh(z.im()));
    }

    private static Complex cosine(Complex z) {
        return new Complex(Math.cos(z.re()) * Math.cosh(z.im()), -Math.sin(z.re()) * Math.sinh(z.im()));
    }

    /** tan(x + iy) = (sin 2x + i sinh 2y)/(cos 2x + cosh 2y), both scaled by 2e^{−2|y|} so that nothing overflows. */
    private static Complex tangent(Complex z) {
        double fading = Math.exp(-2 * Math.abs(z.im()));
        // −expm1(−4|y|) = 1 − e^{−4|y|} without loss where y is small
        double rise = -Math.expm1(-4 * Math.abs(z.im()));
        double scale = 2 * fading * Math.cos(2 * z.re()) + 1 + fading * fading;
        return new Complex(2 * fading * Math.sin(2 * z.re()) / scale, Math.copySign(rise, z.im()) / scale);
    }
}
