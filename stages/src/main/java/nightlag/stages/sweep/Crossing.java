package nightlag.stages.sweep;

import nightlag.stages.numeric.SmoothCurve;
import nightlag.stages.sweep.LogModuli.Figure;
import nightlag.stages.sweep.Zeros.Zero;

/** What is read off one curve at the zero of another. */
final class Crossing {
    private Crossing() {}

    /**
     * The standard uncertainty of a logarithm f + k·x where ln tan δ is zero. The place errs by δx = −δt/t', and so
     * u² = u²(f) + s² u²(x) − 2 (s/t') u(f, t), with s = f' + k.
     *
     * @param near the data
     * @param lossFactor the curve of ln tan δ
     * @param figure what f is
     * @param curve the curve of f
     * @param zero the zero of ln tan δ
     * @param abscissae k, how often the place itself is in the figure
     */
    static double u(
            LogModuli near, SmoothCurve lossFactor, Figure figure, SmoothCurve curve, Zero zero, int abscissae) {
        double place = zero.place();
        double slope = curve.derivative(place, 1) + abscissae;
        double shared = near.covariance(figure, curve, Figure.LOSS_FACTOR, lossFactor, place);
        return u(curve.estimate(place, 0).u(), slope, zero.u(), lossFactor.derivative(place, 1), shared);
    }

    /**
     * The standard uncertainty of one figure where another has a value.
     *
     * @param own u(f) of the one at that place
     * @param slope s, how it changes along the place
     * @param placeU u(x) of the place
     * @param otherSlope t', how the other one changes along it
     * @param shared u(f, t), the covariance of both there
     */
    static double u(double own, double slope, double placeU, double otherSlope, double shared) {
        double moved = slope * placeU;
        double correlation = -2 * slope / otherSlope * shared;
        // a correlation cannot take away more than all of it
        return Math.sqrt(
                Math.max(own * own + moved * moved + correlation, (own - Math.abs(moved)) * (own - Math.abs(moved))));
    }
}
