package nightlag.stages.moduli;

/**
 * What an influence that many records share does to a point, to first order.
 *
 * @param lnModulus change of ln |G*|
 * @param phaseRad change of the phase angle, rad
 * @param lnStrain change of the logarithm of the strain amplitude
 */
public record SharedEffect(double lnModulus, double phaseRad, double lnStrain) {
    /** So many times of it. */
    public SharedEffect times(double factor) {
        return new SharedEffect(factor * lnModulus, factor * phaseRad, factor * lnStrain);
    }
}
