package nightlag.stages.sweep;

import java.util.List;

/**
 * The weighted straight line of the loss angles over ln ω at one place.
 *
 * @param place time in s or temperature in K
 * @param value its slope b, rad
 * @param variance u²(b)
 * @param mean weighted mean angle, rad
 * @param meanVariance its u²
 * @param chiSquared χ² about the line
 */
record AngleSlope(double place, double value, double variance, double mean, double meanVariance, double chiSquared) {
    static AngleSlope of(double place, List<LossAngleCurve> curves, List<LossAngleCurve.Angle> angles) {
        double weights = 0;
        double logarithm = 0;
        double mean = 0;
        for (int k = 0; k < curves.size(); k++) {
            double weight = 1 / angles.get(k).variance();
            weights += weight;
            logarithm += weight * curves.get(k).logAngularFrequency();
            mean += weight * angles.get(k).value();
        }
        logarithm /= weights;
        mean /= weights;
        double squares = 0;
        double products = 0;
        for (int k = 0; k < curves.size(); k++) {
            double weight = 1 / angles.get(k).variance();
            double off = curves.get(k).logAngularFrequency() - logarithm;
            squares += weight * off * off;
            products += weight * off * (angles.get(k).value() - mean);
        }
        double slope = products / squares;
        double chiSquared = 0;
        for (int k = 0; k < curves.size(); k++) {
            double off = curves.get(k).logAngularFrequency() - logarithm;
            double misfit = angles.get(k).value() - mean - slope * off;
            chiSquared += misfit * misfit / angles.get(k).variance();
        }
        return new AngleSlope(place, slope, 1 / squares, mean, 1 / weights, chiSquared);
    }
}
