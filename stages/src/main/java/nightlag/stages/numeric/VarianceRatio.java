package nightlag.stages.numeric;

import org.apache.commons.math3.special.Beta;

/** Whether two estimates of one variance can be of the same (Fisher's F distribution). */
public final class VarianceRatio {
    private VarianceRatio() {}

    /**
     * How often a ratio of two independent estimates of one variance is larger than this:
     * P(F &gt; f) = I_x(ν₂/2, ν₁/2) with x = ν₂/(ν₂ + ν₁ f) and I the regularised incomplete beta function (Abramowitz &amp;
     * Stegun 1964, 26.6.2).
     *
     * @param ratio f, not negative
     * @param freedomAbove ν₁, the degrees of freedom of the estimate above the line, positive
     * @param freedomBelow ν₂, those of the estimate below it, positive
     */
    public static double chanceOfMore(double ratio, double freedomAbove, double freedomBelow) {
        if (!(ratio >= 0 && freedomAbove > 0 && freedomBelow > 0)) {
            throw new IllegalArgumentException("no ratio of variances: " + ratio + " with " + freedomAbove + " and "
                    + freedomBelow + " degrees of freedom");
        }
        if (ratio == Double.POSITIVE_INFINITY) {
            return 0;
        }
        return Beta.regularizedBeta(
                freedomBelow / (freedomBelow + freedomAbove * ratio), freedomBelow / 2, freedomAbove / 2);
    }
}
