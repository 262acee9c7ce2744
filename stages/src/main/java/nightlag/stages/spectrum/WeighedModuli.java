package nightlag.stages.spectrum;

import java.util.List;
import java.util.Optional;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModuliCovariance;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.numeric.Complex;

/**
 * Readings that all have a covariance: their own, or the one their scatter about the discrete spectrum shows.
 */
final class WeighedModuli {
    /** No modulus is taken for truer than this share of itself: a grid in time holds no single mode better. */
    private static final double FLOOR = 1e-4;

    private WeighedModuli() {}

    /** The moduli with what is known of their errors. */
    static List<ModulusReading> of(List<ModulusReading> readings, DiscreteSpectrum discrete) throws ReductionFault {
        Optional<ErrorModel> model = discrete.errorModel();
        if (model.isPresent() && discrete.scatter().isEmpty()) {
            throw new ReductionFault(SpectrumReason.CONTINUOUS_NO_SCATTER.with());
        }
        return readings.stream()
                .map(reading -> {
                    ModuliCovariance covariance = model.isPresent()
                            ? scaled(
                                    model.get().covariance(discrete.relaxation().modulusPa(reading.angularFrequency())),
                                    discrete.scatter().getAsDouble())
                            : reading.moduli().covariance().orElseThrow();
                    return with(reading, covariance);
                })
                .toList();
    }

    private static ModuliCovariance scaled(ModuliCovariance covariance, double scatter) {
        double variance = scatter * scatter;
        return new ModuliCovariance(
                variance * covariance.storageVariance(),
                variance * covariance.lossVariance(),
                variance * covariance.covariance());
    }

    private static ModulusReading with(ModulusReading reading, ModuliCovariance covariance) {
        Moduli moduli = reading.moduli();
        double storage = FLOOR * moduli.storagePa();
        double loss = FLOOR * moduli.lossPa();
        return new ModulusReading(
                reading.angularFrequency(),
                new Moduli(
                        moduli.storagePa(),
                        moduli.lossPa(),
                        Optional.of(new ModuliCovariance(
                                covariance.storageVariance() + storage * storage,
                                covariance.lossVariance() + loss * loss,
                                covariance.covariance()))));
    }

    /**
     * The same readings as compliances J* = 1/G* = J' − iJ'' at inverse frequency: as a function of 1/ω, (J', J'') obeys the
     * equations of (G', G''), with the retardation spectrum at inverse times. Covariances by dJ* = −dG*·J*².
     */
    static List<ModulusReading> inverted(List<ModulusReading> weighed) {
        return weighed.stream().map(WeighedModuli::inverted).toList();
    }

    private static ModulusReading inverted(ModulusReading reading) {
        ModuliCovariance own = reading.moduli().covariance().orElseThrow();
        Complex compliance = Complex.ONE.over(reading.moduli().complex());
        Complex slope = compliance.times(compliance);
        double a = slope.re();
        double b = slope.im();
        // dJ' = −a dG' + b dG'', dJ'' = b dG' + a dG''
        double storage = a * a * own.storageVariance() + b * b * own.lossVariance() - 2 * a * b * own.covariance();
        double loss = b * b * own.storageVariance() + a * a * own.lossVariance() + 2 * a * b * own.covariance();
        double both = a * b * (own.lossVariance() - own.storageVariance()) + (b * b - a * a) * own.covariance();
        return new ModulusReading(
                1 / reading.angularFrequency(),
                new Moduli(compliance.re(), -compliance.im(), Optional.of(new ModuliCovariance(storage, loss, both))));
    }
}
