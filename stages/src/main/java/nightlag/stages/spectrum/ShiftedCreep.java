package nightlag.stages.spectrum;

import java.util.List;
import nightlag.stages.moduli.CreepCurve;

/**
 * Creep curves of one temperature on their way to that of a spectrum. A reduced modulus is b times the modulus at a times the
 * frequency (Ferry 1980, ch. 11), so the compliance of the curves is b·J(t/a), J being that of the spectrum.
 *
 * @param curves usable curves that begin at rest, of one kind of deformation
 * @param lnA ln a
 * @param lnB ln b
 */
public record ShiftedCreep(List<CreepCurve> curves, double lnA, double lnB) {
    /** Copies the list. */
    public ShiftedCreep {
        curves = List.copyOf(curves);
    }

    /** Curves measured at the temperature of the spectrum. */
    public static ShiftedCreep unmoved(List<CreepCurve> curves) {
        return new ShiftedCreep(curves, 0, 0);
    }

    /** The same curves, shifted by so much more. */
    ShiftedCreep moved(double byLnA, double byLnB) {
        return new ShiftedCreep(curves, lnA + byLnA, lnB + byLnB);
    }
}
