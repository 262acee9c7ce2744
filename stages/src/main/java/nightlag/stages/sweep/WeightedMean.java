package nightlag.stages.sweep;

import java.util.List;
import java.util.Optional;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModuliCovariance;

/**
 * The mean of moduli whose covariances are known, weighted by their inverses: M = C Σ Cᵢ⁻¹ mᵢ with C = (Σ Cᵢ⁻¹)⁻¹ (Aitken,
 * Proc. R. Soc. Edinburgh 55 (1936) 42).
 */
final class WeightedMean {
    /** A determinant smaller than this part of the product of the variances is rounding. */
    private static final double SINGULAR = 1e-12;

    private WeightedMean() {}

    /** Whether a covariance is there and can be inverted. */
    static boolean canWeigh(Moduli moduli) {
        return moduli.covariance()
                .filter(own -> own.storageVariance() > 0
                        && own.lossVariance() > 0
                        && determinant(own) > SINGULAR * own.storageVariance() * own.lossVariance())
                .isPresent();
    }

    /** The mean with its covariance. */
    static Moduli of(List<Moduli> moduli) {
        double storage = 0;
        double loss = 0;
        double both = 0;
        double first = 0;
        double second = 0;
        // about one of them, so that no digits are lost
        Moduli anchor = moduli.get(0);
        for (Moduli one : moduli) {
            ModuliCovariance weight = inverse(one.covariance().orElseThrow());
            double storageOff = one.storagePa() - anchor.storagePa();
            double lossOff = one.lossPa() - anchor.lossPa();
            storage += weight.storageVariance();
            loss += weight.lossVariance();
            both += weight.covariance();
            first += weight.storageVariance() * storageOff + weight.covariance() * lossOff;
            second += weight.covariance() * storageOff + weight.lossVariance() * lossOff;
        }
        ModuliCovariance mean = inverse(new ModuliCovariance(storage, loss, both));
        return new Moduli(
                anchor.storagePa() + mean.storageVariance() * first + mean.covariance() * second,
                anchor.lossPa() + mean.covariance() * first + mean.lossVariance() * second,
                Optional.of(mean));
    }

    /** Σ (mᵢ − M)ᵀ Cᵢ⁻¹ (mᵢ − M), which is near 2 (n − 1) where the covariances are true. */
    static double chiSquared(List<Moduli> moduli) {
        Moduli mean = of(moduli);
        double sum = 0;
        for (Moduli one : moduli) {
            ModuliCovariance weight = inverse(one.covariance().orElseThrow());
            double storageOff = one.storagePa() - mean.storagePa();
            double lossOff = one.lossPa() - mean.lossPa();
            sum += weight.storageVariance() * storageOff * storageOff
                    + 2 * weight.covariance() * storageOff * lossOff
                    + weight.lossVariance() * lossOff * lossOff;
        }
        return sum;
    }

    private static double determinant(ModuliCovariance matrix) {
        return matrix.storageVariance() * matrix.lossVariance() - matrix.covariance() * matrix.covariance();
    }

    private static ModuliCovariance inverse(ModuliCovariance matrix) {
        double determinant = determinant(matrix);
        return new ModuliCovariance(
                matrix.lossVariance() / determinant,
                matrix.storageVariance() / determinant,
                -matrix.covariance() / determinant);
    }
}
