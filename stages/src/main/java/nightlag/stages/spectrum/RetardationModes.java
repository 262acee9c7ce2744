package nightlag.stages.spectrum;

import java.util.ArrayList;
import java.util.List;
import nightlag.stages.numeric.AnchoredValue;
import nightlag.stages.numeric.Complex;
import nightlag.stages.numeric.DoubleDouble;
import nightlag.stages.numeric.SecularEquation;

/**
 * A discrete retardation spectrum: J(t) = J0 + Σ j_k (1 − e^{−t/λ_k}) + φt, s·Ĵ(s) = J0 + Σ j_k/(1 + sλ_k) + φ/s. A liquid
 * has the fluidity φ = 1/η0 &gt; 0, a solid φ = 0. J0 is positive: what yields nothing at once has no discrete relaxation
 * spectrum.
 */
public final class RetardationModes {
    private final DoubleDouble instantaneous;
    private final DoubleDouble fluidity;
    private final ModeSet modes;

    RetardationModes(DoubleDouble instantaneous, DoubleDouble fluidity, ModeSet modes) {
        if (!(instantaneous.hi() > 0 && instantaneous.hi() < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException(
                    "the instantaneous compliance must be positive and finite, it is " + instantaneous.hi());
        }
        if (!(fluidity.hi() >= 0 && fluidity.hi() < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("the fluidity must be finite and not negative, it is " + fluidity.hi());
        }
        this.instantaneous = instantaneous;
        this.fluidity = fluidity;
        this.modes = modes;
    }

    /**
     * A spectrum.
     *
     * @param instantaneousPerPa J0 in 1/Pa, positive
     * @param fluidityPerPaS φ = 1/η0 in 1/(Pa·s), 0 for a solid
     * @param timesS λ_k in s, positive, in any order; equal times become one mode
     * @param strengthsPerPa j_k in 1/Pa, one a time; modes of strength 0 are dropped
     */
    public static RetardationModes of(
            double instantaneousPerPa, double fluidityPerPaS, double[] timesS, double[] strengthsPerPa) {
        return new RetardationModes(
                DoubleDouble.of(instantaneousPerPa),
                DoubleDouble.of(fluidityPerPaS),
                ModeSet.of(timesS, strengthsPerPa));
    }

    /** How many modes there are. */
    public int count() {
        return modes.count();
    }

    /** Whether it flows. */
    public boolean isLiquid() {
        return fluidity.sign() > 0;
    }

    /** J0 in 1/Pa. */
    public double instantaneousPerPa() {
        return instantaneous.value();
    }

    /** φ = 1/η0 in 1/(Pa·s), 0 for a solid. */
    public double fluidityPerPaS() {
        return fluidity.value();
    }

    /** λ_k in s, rising. */
    public double[] timesS() {
        return modes.timeValues();
    }

    /** j_k in 1/Pa, in the order of the times. */
    public double[] strengthsPerPa() {
        return modes.strengthValues();
    }

    /** J0 + Σ j_k in 1/Pa: of a solid the equilibrium compliance 1/Ge, of a liquid the steady-state compliance Je0. */
    public double recoverablePerPa() {
        return instantaneous.plus(modes.strengthSum()).value();
    }

    /** Σ j_k λ_k²/Σ j_k λ_k in s, 0 without a mode. */
    public double meanTimeS() {
        return count() == 0 ? 0 : modes.secondMoment() / modes.firstMoment().value();
    }

    /** J*(ω) = J' − iJ'' in 1/Pa, ω in rad/s. */
    public Complex compliancePerPa(double angularFrequency) {
        double real = instantaneousPerPa();
        double imaginary = -fluidityPerPaS() / angularFrequency;
        for (int k = 0; k < count(); k++) {
            double x = angularFrequency * modes.time(k);
            double share = x <= 1 ? x / (1 + x * x) : 1 / (x + 1 / x);
            real += modes.strength(k) * share / x;
            imaginary -= modes.strength(k) * share;
        }
        return new Complex(real, imaginary);
    }

    /** J(t) in 1/Pa, t in s. */
    public double creepPerPa(double timeS) {
        return creepRecoverablePerPa(timeS) + fluidityPerPaS() * timeS;
    }

    /** J0 + Σ j_k (1 − e^{−t/λ_k}) in 1/Pa: the creep compliance without flow. */
    public double creepRecoverablePerPa(double timeS) {
        double sum = instantaneousPerPa();
        for (int k = 0; k < count(); k++) {
            sum -= modes.strength(k) * Math.expm1(-timeS / modes.time(k));
        }
        return sum;
    }

    /** s·Ĵ(s) in 1/Pa for real s &gt; 0 in 1/s. */
    public double operationalCompliancePerPa(double s) {
        double sum = instantaneousPerPa() + fluidityPerPaS() / s;
        for (int k = 0; k < count(); k++) {
            sum += modes.strength(k) / (1 + s * modes.time(k));
        }
        return sum;
    }

    /**
     * The relaxation spectrum of the same material, exactly: s·Ĝ(s) = 1/(s·Ĵ(s)).
     *
     * <p>At s = −1/τ the operational compliance is τ·(J0/τ + Σ j_k/(τ − λ_k) − φ), so the relaxation times are the zeros of
     * f(τ) = φ + J0/(0 − τ) + Σ j_k/(λ_k − τ): the equation of the other way with J0 as a pole at time zero. The residues give
     * g = 1/(τ² f'(τ)); a solid has Ge = 1/(J0 + Σ j_k).
     */
    public RelaxationModes relaxation() {
        List<AnchoredValue> poles = new ArrayList<>();
        List<DoubleDouble> weights = new ArrayList<>();
        poles.add(AnchoredValue.of(0));
        weights.add(instantaneous);
        poles.addAll(modes.times());
        weights.addAll(modes.strengths());
        SecularEquation equation = new SecularEquation(fluidity, poles, weights);
        List<AnchoredValue> times = new ArrayList<>();
        List<DoubleDouble> strengths = new ArrayList<>();
        for (int i = 0; i < equation.rootCount(); i++) {
            SecularEquation.Root root = equation.rootAbove(i);
            DoubleDouble time = root.value().toDoubleDouble();
            times.add(root.value());
            strengths.add(DoubleDouble.ONE.over(time.times(time).times(root.slope())));
        }
        DoubleDouble equilibrium =
                isLiquid() ? DoubleDouble.ZERO : DoubleDouble.ONE.over(instantaneous.plus(modes.strengthSum()));
        return new RelaxationModes(equilibrium, new ModeSet(times, strengths));
    }
}
