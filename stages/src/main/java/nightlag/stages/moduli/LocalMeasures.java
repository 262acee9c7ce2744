package nightlag.stages.moduli;

import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;

/**
 * What one cycle of a nonlinear material looks like from inside: the Chebyshev coefficients of its elastic and viscous
 * stress, and the moduli and viscosities at the ends of the cycle (Ewoldt, Hosoi and McKinley, J. Rheol. 52 (2008) 1427).
 *
 * <p>With γ = γ₀ sin ωt, γ̇ = γ₀ω cos ωt and σ = γ₀ Σ [G'ₙ sin nωt + G''ₙ cos nωt] over the odd orders n:
 *
 * <pre>
 *   eₙ = G'ₙ (−1)^((n−1)/2)        vₙ = G''ₙ/ω
 *   G'_M = dσ/dγ at γ = 0          = Σ n G'ₙ                  η'_M = dσ/dγ̇ at γ̇ = 0      = Σ n (−1)^((n−1)/2) G''ₙ/ω
 *   G'_L = σ/γ at γ = ±γ₀          = Σ (−1)^((n−1)/2) G'ₙ     η'_L = σ/γ̇ at γ̇ = ±γ₀ω     = Σ G''ₙ/ω
 * </pre>
 *
 * <p>of the elastic stress for the moduli and of the viscous stress for the viscosities; all are G' and η' where the material
 * is linear. The sums take every odd order that was fitted, its noise included.
 */
public final class LocalMeasures {
    private LocalMeasures() {}

    /**
     * The Chebyshev coefficients of one order.
     *
     * @param elasticPa eₙ in Pa
     * @param viscousPaS vₙ in Pa·s
     */
    public record Chebyshev(double elasticPa, double viscousPaS) {}

    /**
     * Moduli and viscosities within the cycle.
     *
     * @param minimumStrainModulusPa G'_M, the tangent where the strain passes zero, Pa
     * @param largestStrainModulusPa G'_L, the secant at the largest strain, Pa
     * @param minimumRateViscosityPaS η'_M, the tangent where the rate passes zero, Pa·s
     * @param largestRateViscosityPaS η'_L, the secant at the largest rate, Pa·s
     */
    public record WithinCycle(
            double minimumStrainModulusPa,
            double largestStrainModulusPa,
            double minimumRateViscosityPaS,
            double largestRateViscosityPaS) {}

    /** The coefficients of one order of a point; empty for an even one, and without a strain amplitude or a frequency. */
    public static Optional<Chebyshev> chebyshev(ModulusPoint point, Harmonic harmonic) {
        if (harmonic.order() % 2 == 0 || !known(point)) {
            return Optional.empty();
        }
        double strain = point.strainAmplitude().orElseThrow();
        return Optional.of(new Chebyshev(
                sign(harmonic.order()) * harmonic.stressInPhasePa() / strain,
                harmonic.stressOutOfPhasePa() / (strain * angularFrequency(point))));
    }

    /** The measures of a point; empty where no third order was fitted, and without a strain amplitude or a frequency. */
    public static Optional<WithinCycle> withinCycle(ModulusPoint point) {
        List<Harmonic> odd = point.harmonics().stream()
                .filter(harmonic -> harmonic.order() % 2 != 0)
                .toList();
        if (odd.size() < 2 || !known(point)) {
            return Optional.empty();
        }
        double strain = point.strainAmplitude().orElseThrow();
        double rate = strain * angularFrequency(point);
        double tangentElastic = 0;
        double secantElastic = 0;
        double tangentViscous = 0;
        double secantViscous = 0;
        for (Harmonic harmonic : odd) {
            int n = harmonic.order();
            tangentElastic += n * harmonic.stressInPhasePa() / strain;
            secantElastic += sign(n) * harmonic.stressInPhasePa() / strain;
            tangentViscous += sign(n) * n * harmonic.stressOutOfPhasePa() / rate;
            secantViscous += harmonic.stressOutOfPhasePa() / rate;
        }
        return Optional.of(new WithinCycle(tangentElastic, secantElastic, tangentViscous, secantViscous));
    }

    private static boolean known(ModulusPoint point) {
        return positive(point.strainAmplitude()) && positive(point.frequencyHz());
    }

    private static boolean positive(OptionalDouble figure) {
        return figure.orElse(0) > 0;
    }

    private static double angularFrequency(ModulusPoint point) {
        return 2 * Math.PI * point.frequencyHz().orElseThrow();
    }

    /** (−1)^((n−1)/2) of an odd order: sin nωt at ωt = π/2. */
    private static int sign(int order) {
        return order % 4 == 1 ? 1 : -1;
    }
}
