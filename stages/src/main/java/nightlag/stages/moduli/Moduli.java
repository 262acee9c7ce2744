package nightlag.stages.moduli;

import java.util.Optional;
import java.util.OptionalDouble;
import nightlag.stages.numeric.Complex;

/**
 * A complex modulus with its uncertainty.
 *
 * @param storagePa storage modulus in Pa
 * @param lossPa loss modulus in Pa
 * @param covariance covariance from the record's own noise; empty where none is known
 */
public record Moduli(double storagePa, double lossPa, Optional<ModuliCovariance> covariance) {
    /** No standard uncertainty is given smaller than this part of its value. */
    private static final double RELATIVE_FLOOR = 1e-12;

    /** The complex modulus in Pa. */
    public Complex complex() {
        return new Complex(storagePa, lossPa);
    }

    /** The same modulus larger by e to the {@code logFactor} and turned by a phase; the covariance stays as it is. */
    Moduli turned(double logFactor, double phaseRad) {
        Complex turned = complex().times(Complex.polar(Math.exp(logFactor), phaseRad));
        return new Moduli(turned.re(), turned.im(), covariance);
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

    /**
     * The standard uncertainty of tan δ by the law of propagation (JCGM 100:2008, 5.2): with t = G''/G',
     * u²(t) = (t² u²(G') − 2 t u(G', G'') + u²(G''))/G'². Empty where no covariance is known.
     */
    public OptionalDouble tanDeltaU() {
        if (covariance.isEmpty()) {
            return OptionalDouble.empty();
        }
        ModuliCovariance known = covariance.get();
        double t = tanDelta();
        double variance = t * t * known.storageVariance() - 2 * t * known.covariance() + known.lossVariance();
        double u = Math.sqrt(Math.max(variance, 0)) / Math.abs(storagePa);
        return OptionalDouble.of(Math.max(u, RELATIVE_FLOOR * Math.abs(t)));
    }
}
