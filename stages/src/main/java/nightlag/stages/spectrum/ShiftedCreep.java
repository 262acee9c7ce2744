package nightlag.stages.spectrum;

import java.util.List;
import nightlag.stages.moduli.CreepCurve;

/**
 * Creep curves of one temperature on their way to that of a spectrum. A reduced modulus is b times the modulus at a times the
 * frequency (Ferry 1980, ch. 11), so the compliance of the curves is b·J(t/a), J being that of the spectrum.
 */
public final class ShiftedCreep {
    /** What averaging over a twentieth of a decade may leave in a strain. */
    private static final double LEAST_RELATIVE_U = 5e-5;

    private final List<Weighed> curves;
    private final double lnA;
    private final double lnB;

    /** A curve and what its strains err by, which no shift changes. */
    record Weighed(CreepCurve curve, CreepErrors errors) {}

    /**
     * Curves to be shifted.
     *
     * @param curves usable curves that begin at rest, of one kind of deformation
     * @param lnA ln a
     * @param lnB ln b
     */
    public ShiftedCreep(List<CreepCurve> curves, double lnA, double lnB) {
        this(
                lnA,
                lnB,
                curves.stream()
                        .map(curve -> new Weighed(curve, CreepErrors.of(curve, LEAST_RELATIVE_U)))
                        .toList());
    }

    private ShiftedCreep(double lnA, double lnB, List<Weighed> curves) {
        this.curves = curves;
        this.lnA = lnA;
        this.lnB = lnB;
    }

    /** Curves measured at the temperature of the spectrum. */
    public static ShiftedCreep unmoved(List<CreepCurve> curves) {
        return new ShiftedCreep(curves, 0, 0);
    }

    /** The same curves, shifted by so much more. */
    ShiftedCreep moved(double byLnA, double byLnB) {
        return new ShiftedCreep(lnA + byLnA, lnB + byLnB, curves);
    }

    List<Weighed> curves() {
        return curves;
    }

    double lnA() {
        return lnA;
    }

    double lnB() {
        return lnB;
    }
}
