package nightlag.stages.moduli;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.geometry.CorrectedAmplitudes;
import nightlag.stages.geometry.CorrectionMap;
import nightlag.stages.geometry.SampleInertia;
import nightlag.stages.geometry.SignalCorrection;
import nightlag.stages.numeric.Complex;
import nightlag.stages.waveform.SignalFit;

/**
 * The modulus of a record and the harmonics of its stress, with what they owe to the noise of both channels.
 *
 * <p>G* = σ₁/γ₁ of the corrected amplitudes, sample inertia taken out of it where it is known. With γ = γ₀ e^{iφ} the stress
 * of order n is referred to a strain γ₀ sin ωt': z = σ_n (−i)^n e^{−inφ}, in phase −Im z, out of phase Re z (Wilhelm,
 * Macromol. Mater. Eng. 287 (2002) 83); n = 1 gives G'γ₀ and G''γ₀.
 */
final class StressHarmonics {
    /**
     * No uncertainty is smaller than this part of its value, or for an order of the stress of the first order: the limit of the
     * arithmetic.
     */
    private static final double UNCERTAINTY_FLOOR = 1e-12;

    private final SignalFit fit;
    private final SignalCorrection correction;
    private final CorrectedAmplitudes fundamental;
    private final Complex modulus;
    private final ComplexGradient modulusGradient;
    private final ComplexGradient fundamentalStressGradient;

    /**
     * Corrects the fundamental of a fit.
     *
     * @throws ReductionFault if the modulus is zero or not finite, or sample inertia cannot be taken out
     */
    StressHarmonics(SignalFit fit, SignalCorrection correction) throws ReductionFault {
        this.fit = fit;
        this.correction = correction;
        double omega = fit.angularFrequency();
        this.fundamental = correction.correct(omega, fit.deformation()[0], fit.load()[0]);
        Complex apparent = fundamental.modulusPa();
        requireModulus(apparent);
        Optional<SampleInertia> inertia = correction.sampleInertia();
        this.modulus = inertia.isPresent() ? inertia.get().correct(apparent, omega) : apparent;
        requireModulus(modulus);
        Complex sensitivity = inertia.isPresent() ? inertia.get().sensitivity(modulus, omega) : Complex.ONE;
        CorrectionMap map = correction.at(omega);
        ComplexGradient strain = ComplexGradient.of(fit, 1, map.strainFromDeformation(), map.strainFromLoad());
        ComplexGradient stress = ComplexGradient.of(fit, 1, map.stressFromDeformation(), map.stressFromLoad());
        // dA = (dσ − A dγ)/γ, dG = s dA
        this.modulusGradient = stress.minus(strain.times(apparent)).times(sensitivity.over(fundamental.strain()));
        // σ₁ = G γ₁
        this.fundamentalStressGradient =
                modulusGradient.times(fundamental.strain()).minus(strain.times(modulus.times(-1)));
    }

    /** G* as storage and loss modulus with their covariance. */
    Moduli moduli() {
        return new Moduli(
                modulus.re(),
                modulus.im(),
                Optional.of(new ModuliCovariance(
                        floored(modulusGradient.realVariance(fit), modulus.re()),
                        floored(modulusGradient.imaginaryVariance(fit), modulus.im()),
                        modulusGradient.covariance(fit))));
    }

    /** γ₀. */
    double strainAmplitude() {
        return fundamental.strain().abs();
    }

    /** |σ₁| in Pa: what the specimen bears without its own inertia. */
    double stressAmplitudePa() {
        return modulus.abs() * strainAmplitude();
    }

    /** Inertia's load over the specimen's own. */
    double inertiaRatio() {
        return fundamental.inertiaRatio();
    }

    /** The frame's share of the movement. */
    double complianceRatio() {
        return fundamental.complianceRatio();
    }

    /** All orders. */
    List<Harmonic> harmonics() {
        List<Harmonic> harmonics = new ArrayList<>();
        harmonics.add(new Harmonic(
                1, modulus.re() * strainAmplitude(), modulus.im() * strainAmplitude(), 1, OptionalDouble.of(0)));
        for (int order = 2; order <= fit.harmonics(); order++) {
            harmonics.add(harmonic(order));
        }
        return harmonics;
    }

    private Harmonic harmonic(int order) {
        double omega = order * fit.angularFrequency();
        CorrectionMap map = correction.at(omega);
        Complex stress = map.stressPa(fit.deformation()[order - 1], fit.load()[order - 1]);
        double strainPhase = fundamental.strain().argument();
        Complex referred = stress.times(Complex.polar(1, -order * (strainPhase + Math.PI / 2)));
        double intensity = stress.abs() / stressAmplitudePa();
        double u = Math.max(intensityU(order, map, stress, intensity), UNCERTAINTY_FLOOR * Math.max(1, intensity));
        return new Harmonic(order, -referred.im(), referred.re(), intensity, OptionalDouble.of(u));
    }

    /** u of |σ_n|/|σ₁|: along σ_n where it stands out of its noise, else the mean of both directions. */
    private double intensityU(int order, CorrectionMap map, Complex stress, double intensity) {
        Complex fundamentalStress = modulus.times(fundamental.strain());
        ComplexGradient ownStress = ComplexGradient.of(fit, order, map.stressFromDeformation(), map.stressFromLoad());
        double total = ownStress.realVariance(fit) + ownStress.imaginaryVariance(fit);
        double size = stress.abs();
        if (size * size <= total) {
            return Math.sqrt(total / 2) / fundamentalStress.abs();
        }
        ComplexGradient relative = ownStress
                .times(Complex.ONE.over(stress))
                .minus(fundamentalStressGradient.times(Complex.ONE.over(fundamentalStress)));
        return intensity * Math.sqrt(Math.max(relative.realVariance(fit), 0));
    }

    private static double floored(double variance, double value) {
        double floor = UNCERTAINTY_FLOOR * value;
        return Math.max(variance, floor * floor);
    }

    private static void requireModulus(Complex modulus) throws ReductionFault {
        if (!modulus.isFinite()) {
            throw new ReductionFault(ModuliReason.MODULI_NOT_FINITE.with(modulus.re(), modulus.im()));
        }
        if (modulus.abs() == 0) {
            throw new ReductionFault(ModuliReason.MODULI_ZERO.with());
        }
    }
}
