package nightlag.stages.moduli;

/**
 * The 2 × 2 covariance of storage and loss modulus, Pa².
 *
 * @param storageVariance u²(G')
 * @param lossVariance u²(G'')
 * @param covariance u(G', G'')
 */
public record ModuliCovariance(double storageVariance, double lossVariance, double covariance) {
    /** u(G') in Pa. */
    public double storageU() {
        return Math.sqrt(storageVariance);
    }

    /** u(G'') in Pa. */
    public double lossU() {
        return Math.sqrt(lossVariance);
    }
}
