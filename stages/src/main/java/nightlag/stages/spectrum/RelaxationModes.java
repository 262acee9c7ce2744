package nightlag.stages.spectrum;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import nightlag.stages.numeric.AnchoredValue;
import nightlag.stages.numeric.Complex;
import nightlag.stages.numeric.DoubleDouble;
import nightlag.stages.numeric.SecularEquation;

/**
 * A discrete relaxation spectrum: G(t) = Ge + Σ g_i e^{−t/τ_i}, s·Ĝ(s) = Ge + Σ g_i sτ_i/(1 + sτ_i). A liquid has Ge = 0, a
 * solid Ge &gt; 0. The same algebra holds for E.
 */
public final class RelaxationModes {
    private final DoubleDouble equilibrium;
    private final ModeSet modes;

    RelaxationModes(DoubleDouble equilibrium, ModeSet modes) {
        if (!(equilibrium.hi() >= 0 && equilibrium.hi() < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException(
                    "the equilibrium modulus must be finite and not negative, it is " + equilibrium.hi());
        }
        if (equilibrium.sign() == 0 && modes.count() == 0) {
            throw new IllegalArgumentException("a material needs an equilibrium modulus or a mode");
        }
        this.equilibrium = equilibrium;
        this.modes = modes;
    }

    /**
     * A spectrum.
     *
     * @param equilibriumPa Ge in Pa, 0 for a liquid
     * @param timesS τ_i in s, positive, in any order; equal times become one mode
     * @param strengthsPa g_i in Pa, one a time; modes of strength 0 are dropped
     */
    public static RelaxationModes of(double equilibriumPa, double[] timesS, double[] strengthsPa) {
        return new RelaxationModes(DoubleDouble.of(equilibriumPa), ModeSet.of(timesS, strengthsPa));
    }

    /** The same with one mode more. */
    public RelaxationModes with(double timeS, double strengthPa) {
        double[] times = Arrays.copyOf(timesS(), count() + 1);
        double[] strengths = Arrays.copyOf(strengthsPa(), count() + 1);
        times[count()] = timeS;
        strengths[count()] = strengthPa;
        return of(equilibriumPa(), times, strengths);
    }

    /** How many modes there are. */
    public int count() {
        return modes.count();
    }

    /** Whether it flows: no equilibrium modulus. */
    public boolean isLiquid() {
        return equilibrium.sign() == 0;
    }

    /** Ge in Pa. */
    public double equilibriumPa() {
        return equilibrium.value();
    }

    /** τ_i in s, rising. */
    public double[] timesS() {
        return modes.timeValues();
    }

    /** g_i in Pa, in the order of the times. */
    public double[] strengthsPa() {
        return modes.strengthValues();
    }

    /** Ge + Σ g_i in Pa. */
    public double instantaneousModulusPa() {
        return equilibrium.plus(modes.strengthSum()).value();
    }

    /** Σ g_i τ_i in Pa·s: the zero-shear viscosity of a liquid. */
    public double viscosityPaS() {
        return modes.firstMoment().value();
    }

    /** Σ g_i τ_i² in Pa·s². */
    public double secondMomentPaS2() {
        return modes.secondMoment();
    }

    /** Je0 = Σ g_i τ_i²/(Σ g_i τ_i)² in 1/Pa: what a liquid recovers after steady flow under unit stress. */
    public double steadyStateCompliancePerPa() {
        double viscosity = viscosityPaS();
        return secondMomentPaS2() / viscosity / viscosity;
    }

    /** Σ g_i τ_i²/Σ g_i τ_i in s. */
    public double meanTimeS() {
        return secondMomentPaS2() / viscosityPaS();
    }

    /** G*(ω) in Pa, ω in rad/s. */
    public Complex modulusPa(double angularFrequency) {
        double storage = equilibriumPa();
        double loss = 0;
        for (int i = 0; i < count(); i++) {
            double x = angularFrequency * modes.time(i);
            // the form that neither over- nor underflows early
            double share = x <= 1 ? x / (1 + x * x) : 1 / (x + 1 / x);
            storage += modes.strength(i) * share * x;
            loss += modes.strength(i) * share;
        }
        return new Complex(storage, loss);
    }

    /** G(t) in Pa, t in s. */
    public double relaxationPa(double timeS) {
        double sum = equilibriumPa();
        for (int i = 0; i < count(); i++) {
            sum += modes.strength(i) * Math.exp(-timeS / modes.time(i));
        }
        return sum;
    }

    /** s·Ĝ(s) in Pa for real s &gt; 0 in 1/s. */
    public double operationalModulusPa(double s) {
        double sum = equilibriumPa();
        for (int i = 0; i < count(); i++) {
            double x = s * modes.time(i);
            sum += modes.strength(i) / (1 + 1 / x);
        }
        return sum;
    }

    /**
     * The retardation spectrum of the same material, exactly: s·Ĵ(s) = 1/(s·Ĝ(s)).
     *
     * <p>At s = −1/λ the operational modulus is f(λ) = Ge + Σ g_i τ_i/(τ_i − λ), whose zeros are the retardation times; they
     * interlace with the relaxation times (Gross, Mathematical Structure of the Theories of Viscoelasticity, 1953; Tschoegl,
     * The Phenomenological Theory of Linear Viscoelastic Behavior, 1989; Park &amp; Schapery, Int. J. Solids Struct. 36 (1999)
     * 1653). The residues give j = 1/(λ f'(λ)). A solid has as many retardation times as modes, a liquid one less and the
     * fluidity 1/Σ g_i τ_i.
     */
    public RetardationModes retardation() {
        SecularEquation equation = new SecularEquation(equilibrium, modes.times(), modes.firstMoments());
        List<AnchoredValue> times = new ArrayList<>();
        List<DoubleDouble> strengths = new ArrayList<>();
        for (int i = 0; i < equation.rootCount(); i++) {
            SecularEquation.Root root = equation.rootAbove(i);
            times.add(root.value());
            strengths.add(DoubleDouble.ONE.over(root.value().toDoubleDouble().times(root.slope())));
        }
        DoubleDouble instantaneous = DoubleDouble.ONE.over(equilibrium.plus(modes.strengthSum()));
        DoubleDouble fluidity = isLiquid() ? DoubleDouble.ONE.over(modes.firstMoment()) : DoubleDouble.ZERO;
        return new RetardationModes(instantaneous, fluidity, new ModeSet(times, strengths));
    }
}
