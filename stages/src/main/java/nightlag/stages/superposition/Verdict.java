package nightlag.stages.superposition;

import java.util.Locale;
import java.util.Optional;
import java.util.OptionalDouble;
import nightlag.stages.fault.Reason;
import nightlag.stages.moduli.Marker;
import nightlag.stages.numeric.VarianceRatio;

/**
 * Whether isotherms superpose: common curves must not leave more than each isotherm's own do, by the F test of nested models, or
 * the misfit must be small.
 *
 * @param misfitDecades rms distance from the common curves, decades of modulus
 * @param toleranceDecades what counts as small
 * @param ratio F; empty where own curves leave nothing to compare with
 * @param chance how often chance alone makes F larger
 * @param specimensDiffer rms of ln |G*| by which specimens of an isotherm differed, taken off before; zero for single ones
 */
record Verdict(
        double misfitDecades, double toleranceDecades, OptionalDouble ratio, double chance, double specimensDiffer) {
    private static final double SMALL_CHANCE = 0.01;
    private static final double TINY_CHANCE = 1e-6;
    /** Points that scatter by so many times the tolerance, as specimens that differ do, hide what a test could see. */
    private static final double HIDDEN = 5;

    static Verdict of(Superposed superposed, SuperpositionPlan plan) {
        double misfit = superposed.common().misfitDecades();
        if (!superposed.canBeCompared()) {
            return new Verdict(
                    misfit, plan.toleranceDecades(), OptionalDouble.empty(), 1, superposed.specimensDiffer());
        }
        double ratio = superposed.varianceRatio();
        double chance = VarianceRatio.chanceOfMore(ratio, superposed.addedFreedom(), superposed.ownFreedom());
        return new Verdict(
                misfit, plan.toleranceDecades(), OptionalDouble.of(ratio), chance, superposed.specimensDiffer());
    }

    boolean superposes() {
        return chance >= SMALL_CHANCE || misfitDecades <= toleranceDecades;
    }

    /** What a reader has to know of all that is drawn from the curves; empty where they superpose. */
    Optional<Reason> doubt() {
        return superposes()
                ? Optional.empty()
                : Optional.of(SuperpositionReason.DOES_NOT_SUPERPOSE.with(misfitDecades, toleranceDecades));
    }

    Marker marker(double referenceTemperatureK) {
        return new Marker(
                "",
                "",
                "superposition_misfit",
                OptionalDouble.of(referenceTemperatureK),
                OptionalDouble.empty(),
                misfitDecades,
                OptionalDouble.empty(),
                "1",
                words());
    }

    private String verdict() {
        if (!superposes()) {
            return "does not superpose";
        }
        return misfitDecades > HIDDEN * toleranceDecades
                ? "superposes as far as the scatter of the points can tell"
                : "superposes";
    }

    private String words() {
        if (ratio.isEmpty()) {
            return String.format(
                    Locale.ROOT,
                    "superposes as far as can be told: isotherms have too few frequencies for curves of their own; tolerance"
                            + " %.3g decades%s",
                    toleranceDecades,
                    specimens());
        }
        return String.format(
                Locale.ROOT,
                "%s: rms distance from common curves in decades; against curves of its own for each isotherm F = %.3g, %s;"
                        + " tolerance %.3g decades%s",
                verdict(),
                ratio.getAsDouble(),
                chance < TINY_CHANCE ? "p below 1e-6" : String.format(Locale.ROOT, "p = %.2g", chance),
                toleranceDecades,
                specimens());
    }

    private String specimens() {
        return specimensDiffer > 0
                ? String.format(
                        Locale.ROOT,
                        "; specimens of an isotherm differ by factors of |G*| (rms %.2g decades), which are taken off first",
                        specimensDiffer / Math.log(10))
                : "";
    }
}
