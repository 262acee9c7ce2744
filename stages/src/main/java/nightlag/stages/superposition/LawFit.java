package nightlag.stages.superposition;

import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.stream.IntStream;
import nightlag.stages.fault.Reason;
import nightlag.stages.fault.ReasonCode;
import nightlag.stages.numeric.Cholesky;
import nightlag.stages.superposition.SuperpositionPlan.ShiftLaw;

/**
 * The law of horizontal shifts, by generalised least squares with the shifts' covariance.
 *
 * <p>Shifts are given relative to one isotherm, the anchor, and both laws are fitted with that isotherm's temperature T_a as
 * their reference, where they are zero like the shift: WLF as −s x/(1 + κx) with x = T − T_a, s = C1/C2 and κ = 1/C2, so that
 * a straight line is κ = 0 and not at infinity. The constants are then moved to the reference temperature, which need not be
 * an isotherm.
 *
 * <p>An Arrhenius law is a WLF law with C2 = T0 in kelvin, a constant less. {@code auto} therefore takes WLF only where χ²
 * falls by more than 3.84 for the further constant, the 95 % point of χ² with one degree of freedom (likelihood-ratio test of
 * nested models, Wilks 1938): the covariance of the shifts is known, so no scatter has to be estimated from them. Where even
 * WLF misses the shifts, the fall is first divided by its χ²/ν.
 */
public final class LawFit {
    private static final String APPARENT = "apparent, by an Arrhenius line through the shifts, as no law is asked for";
    private static final int LEAST_FOR_WLF = 3;
    private static final double WORTH_A_CONSTANT = 3.841458820694124;
    /** No shift is known better than this, decades: far below what a temperature is known to. */
    private static final double SMALLEST_U = 1e-9;

    private final double referenceK;
    private final double[] temperaturesK;
    private final WeightedShifts shifts;

    private LawFit(double referenceK, double[] temperaturesK, WeightedShifts shifts) {
        this.referenceK = referenceK;
        this.temperaturesK = temperaturesK;
        this.shifts = shifts;
    }

    /**
     * Fits a law.
     *
     * @param temperaturesK temperatures of the isotherms superposed, K, all different
     * @param log10A log10 a_T of each relative to the anchor, whose own is zero
     * @param covariance their covariance; row and column of the anchor are zero and not read
     * @param anchor index of the anchor
     * @param referenceTemperatureK reference temperature of the law, within the isotherms, K
     * @param law which law; for none only the apparent activation energy, by an Arrhenius line, is told
     */
    public static LawOutcome fit(
            double[] temperaturesK,
            double[] log10A,
            double[][] covariance,
            int anchor,
            double referenceTemperatureK,
            ShiftLaw law) {
        int isotherms = temperaturesK.length;
        if (isotherms < 2) {
            return without(ShiftLawReason.SHIFT_LAW_TOO_FEW_ISOTHERMS.with(isotherms));
        }
        int[] others = IntStream.range(0, isotherms).filter(i -> i != anchor).toArray();
        double[][] known = new double[others.length][others.length];
        for (int i = 0; i < others.length; i++) {
            for (int j = 0; j < others.length; j++) {
                known[i][j] = covariance[others[i]][others[j]];
            }
            known[i][i] += SMALLEST_U * SMALLEST_U;
        }
        Optional<Cholesky> factored = Cholesky.of(known);
        if (factored.isEmpty()) {
            return without(ShiftLawReason.SHIFT_LAW_COVARIANCE_SINGULAR.with());
        }
        WeightedShifts shifts = new WeightedShifts(
                temperaturesK[anchor],
                IntStream.of(others).mapToDouble(i -> temperaturesK[i]).toArray(),
                IntStream.of(others).mapToDouble(i -> log10A[i]).toArray(),
                factored.get());
        return new LawFit(referenceTemperatureK, temperaturesK.clone(), shifts).fit(law);
    }

    private static LawOutcome without(Reason why) {
        return new LawOutcome(Optional.empty(), List.of(), List.of(why));
    }

    private LawOutcome fit(ShiftLaw law) {
        ArrheniusLaw arrhenius = shifts.arrhenius().at(referenceK);
        if (law == ShiftLaw.NONE) {
            return new LawOutcome(Optional.empty(), List.of(arrhenius.energyMarker(APPARENT)), List.of());
        }
        if (law == ShiftLaw.ARRHENIUS) {
            return found(arrhenius);
        }
        if (temperaturesK.length < LEAST_FOR_WLF) {
            Reason why = ShiftLawReason.WLF_TOO_FEW_ISOTHERMS.with(temperaturesK.length);
            return law == ShiftLaw.WLF ? instead(arrhenius, why) : found(arrhenius);
        }
        double lowestK = Math.min(Arrays.stream(temperaturesK).min().orElseThrow(), referenceK);
        WeightedShifts.Bend bend = shifts.bend(lowestK);
        Optional<Reason> refusal = bend.refusal(lowestK, referenceK, shifts.anchorK());
        if (law == ShiftLaw.WLF) {
            return refusal.isPresent() ? instead(arrhenius, refusal.get()) : found(wlf(bend, ""));
        }
        double gain = arrhenius.quality().chiSquared() - bend.quality().chiSquared();
        double scaled = gain / (bend.quality().scale() * bend.quality().scale());
        if (scaled <= WORTH_A_CONSTANT) {
            return found(because(
                    arrhenius,
                    "chosen over WLF, whose further constant takes " + ReasonCode.rounded(gain) + " off chi squared"));
        }
        return refusal.isPresent()
                ? instead(arrhenius, refusal.get())
                : found(wlf(
                        bend,
                        "chosen over Arrhenius, as its further constant takes " + ReasonCode.rounded(gain)
                                + " off chi squared"));
    }

    private WlfLaw wlf(WeightedShifts.Bend bend, String why) {
        WlfLaw law = bend.law(shifts.anchorK()).at(referenceK);
        return new WlfLaw(
                law.referenceTemperatureK(),
                law.c1(),
                law.c2K(),
                law.covariance(),
                law.quality().because(why));
    }

    private static ArrheniusLaw because(ArrheniusLaw law, String why) {
        return new ArrheniusLaw(
                law.referenceTemperatureK(),
                law.activationEnergy(),
                law.activationEnergyU(),
                law.quality().because(why));
    }

    private static LawOutcome found(FittedLaw law) {
        return new LawOutcome(Optional.of(law), law.markers(), List.of());
    }

    private static LawOutcome instead(FittedLaw law, Reason why) {
        return new LawOutcome(Optional.of(law), law.markers(), List.of(why));
    }
}
