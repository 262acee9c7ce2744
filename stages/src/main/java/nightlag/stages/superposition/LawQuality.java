package nightlag.stages.superposition;

import java.util.Locale;

/**
 * How well a law meets the shifts it was fitted to.
 *
 * @param isotherms isotherms fitted, the anchor included
 * @param chiSquared χ² with the shifts' covariance
 * @param degreesOfFreedom shifts less constants
 * @param chosenBecause why this law and not the other, in words; empty text where it was asked for
 */
public record LawQuality(int isotherms, double chiSquared, int degreesOfFreedom, String chosenBecause) {
    /**
     * What the uncertainties of the shifts are multiplied by for those of the law: √(χ²/ν) where the law misses the shifts
     * by more than they allow (Birge, Phys. Rev. 40 (1932) 207), else 1.
     */
    public double scale() {
        return degreesOfFreedom > 0 ? Math.sqrt(Math.max(1, chiSquared / degreesOfFreedom)) : 1;
    }

    LawQuality because(String words) {
        return new LawQuality(isotherms, chiSquared, degreesOfFreedom, words);
    }

    /** The isotherms, the misfit and what follows for u, in words. */
    String words() {
        String fit = String.format(
                Locale.ROOT,
                "generalised least squares on the shifts of %d isotherms%s",
                isotherms,
                chosenBecause.isEmpty() ? "" : ", " + chosenBecause);
        if (degreesOfFreedom == 0) {
            return fit + "; no shift to spare, so the misfit of the law is not in u";
        }
        double ratio = chiSquared / degreesOfFreedom;
        return ratio > 1
                ? String.format(
                        Locale.ROOT,
                        "%s; the law misses the shifts, chi squared %.3g for %d degrees of freedom: u times %.3g",
                        fit,
                        chiSquared,
                        degreesOfFreedom,
                        scale())
                : fit;
    }
}
