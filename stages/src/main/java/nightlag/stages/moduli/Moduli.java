package nightlag.stages.moduli;

import java.util.Optional;
import nightlag.stages.numeric.Complex;

/**
 * A complex modulus with its uncertainty.
 *
 * @param storagePa storage modulus in Pa
 * @param lossPa loss modulus in Pa
 * @param covariance covariance from the record's own noise; empty where none is known
 */
public record Moduli(double storagePa, double lossPa, Optional<ModuliCovariance> covariance) {
    /** The complex modulus in Pa. */
    public Complex complex() {
        return new Complex(storagePa, lossPa);
    }

    /** |G*| in Pa. */
    public double magnitudePa() {
        return Math.hypot(storagePa, lossPa);
    }

    /** The phase angle δ in rad. */
    public double phaseRad() {
        return Math.atan2(lossPa, storagePa);
    }

    /** tan δ = G''/G'. */
    public double tanDelta() {
        return lossPa / storagePa;
    }
}
