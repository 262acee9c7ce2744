package nightlag.stages.waveform;

import java.util.Optional;
import nightlag.stages.waveform.ScreeningFigures.Figure;

/**
 * The fit of a window of a longer record, in which the specimen may change while it is measured. The complex amplitude of the
 * fundamental of either channel is a polynomial A(u) = A₀ + A₁u (+ A₂u²) in the time u from the middle of the window, so
 * that A₀ is the amplitude in the middle. Without A₁ a modulus that changes by ε over half a window is off by about
 * ε/(2π · cycles), as u cos ωt is not orthogonal to sin ωt; without A₂ by a third of what it curves. The parabola makes u of
 * A₀ 1.5 times as large, so it is fitted only where the line itself stands out of the noise; where it does not, the
 * curvature it could hide is small against u.
 *
 * <p>A frequency slightly off turns A at a steady rate, which A₁ takes up, so the frequency matters little to A₀ and is not
 * fitted along: the two could not be told apart. It is that of the channel the instrument holds at its set amplitude (the
 * deformation, unless its amplitude changes more than the load's); the phase of the other turns as the specimen changes.
 */
final class WindowFit {
    /** Below so many cycles the change of an amplitude cannot be told from drift and harmonics. */
    private static final double CYCLES_FOR_A_LINE = 1.9;

    private static final double CYCLES_FOR_A_PARABOLA = 2.9;
    /** |A₁|² over the variance of its real part; noise hardly ever gets beyond (a thousandth, as the noise is estimated too). */
    private static final double STANDS_OUT = 20;
    /** How far the frequency may be off, as the phase at the window's end over its uncertainty, and in rad. */
    private static final double SETTLED_PART = 1e-3;

    private static final double SETTLED_RAD = 1e-9;
    private static final int MOST_STEPS = 6;
    private static final int SPARE_SAMPLES = 2;

    private final Samples samples;
    private final int harmonics;
    private final int driftDegree;
    private final boolean exact;

    /** For a window and a model; {@code exact}: the frequency stays as it is. */
    WindowFit(Samples samples, int harmonics, int driftDegree, boolean exact) {
        this.samples = samples;
        this.harmonics = harmonics;
        this.driftDegree = driftDegree;
        this.exact = exact;
    }

    /** The phase that the channel held by the instrument gains over half the window at the fit's frequency, rad. */
    static Figure phaseGained(Fitted fitted, double[] noiseVariances) {
        Figure deformation = change(fitted, Samples.DEFORMATION, false, noiseVariances[Samples.DEFORMATION]);
        Figure load = change(fitted, Samples.LOAD, false, noiseVariances[Samples.LOAD]);
        double more = Math.abs(deformation.value()) - Math.abs(load.value());
        int held = more > 3 * Math.hypot(deformation.u(), load.u()) ? Samples.LOAD : Samples.DEFORMATION;
        return change(fitted, held, true, noiseVariances[held]);
    }

    /** Re or Im of A₁/A₀ with its uncertainty from a noise variance: by what part the amplitude, the phase changes over u. */
    private static Figure change(Fitted fitted, int channel, boolean phase, double noiseVariance) {
        Basis basis = fitted.basis();
        double[] x = fitted.result().coefficients()[channel];
        int middle = basis.cosineColumn(1);
        int line = basis.trendColumn(1);
        double a = x[middle];
        double b = x[middle + 1];
        double size = a * a + b * b;
        double[] direction = new double[basis.columns()];
        direction[line] = (phase ? b : a) / size;
        direction[line + 1] = (phase ? -a : b) / size;
        double value = direction[line] * x[line] + direction[line + 1] * x[line + 1];
        double variance = noiseVariance * fitted.result().normal().inverseForm(direction);
        return new Figure(value, Math.sqrt(variance));
    }

    /** Whether the change of an amplitude stands out of the noise beside the fundamental. */
    private static boolean changes(Fitted fitted) {
        Noise noise = Noise.of(fitted.samples(), fitted.basis(), fitted.result(), false);
        for (int c = 0; c < Samples.CHANNELS; c++) {
            double variance = noise.beside(c, 1).variance();
            Figure size = change(fitted, c, false, variance);
            Figure phase = change(fitted, c, true, variance);
            if (square(size.value() / size.u()) + square(phase.value() / phase.u()) > STANDS_OUT) {
                return true;
            }
        }
        return false;
    }

    private static double square(double value) {
        return value * value;
    }

    /** The fit, starting from the frequency of a fit with constant amplitudes; empty where the window is too short. */
    Optional<Fitted> fit(double startAngularFrequency) {
        double cycles = startAngularFrequency * samples.durationS() / (2 * Math.PI);
        if (cycles < CYCLES_FOR_A_LINE) {
            return Optional.empty();
        }
        Optional<Fitted> line = ofDegree(1, startAngularFrequency);
        if (line.isEmpty() || cycles < CYCLES_FOR_A_PARABOLA) {
            return line;
        }
        if (!changes(line.get())) {
            return line;
        }
        Optional<Fitted> parabola = ofDegree(2, line.get().result().angularFrequency());
        return parabola.isPresent() ? parabola : line;
    }

    private Optional<Fitted> ofDegree(int degree, double startAngularFrequency) {
        JointFit fit = new JointFit(samples, harmonics, driftDegree, degree);
        int freedom = samples.size() - fit.basis().columns();
        if (freedom < SPARE_SAMPLES) {
            return Optional.empty();
        }
        double omega = startAngularFrequency;
        Optional<Fitted> fitted = Optional.empty();
        for (int step = 0; step < MOST_STEPS; step++) {
            Optional<JointFit.Result> result = fit.atFixed(omega);
            if (result.isEmpty()) {
                return Optional.empty();
            }
            fitted = Optional.of(new Fitted(samples, fit.basis(), result.get()));
            double[] noise = result.get().residualSquares().clone();
            for (int c = 0; c < noise.length; c++) {
                noise[c] /= freedom;
            }
            Figure phase = phaseGained(fitted.get(), noise);
            if (exact || Math.abs(phase.value()) <= Math.max(SETTLED_RAD, SETTLED_PART * phase.u())) {
                break;
            }
            omega += phase.value() / samples.halfSpanS();
        }
        return fitted;
    }
}
