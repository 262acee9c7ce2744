package nightlag.stages.moduli;

import java.util.OptionalDouble;

/**
 * The thresholds behind the flags: the section {@code [screening]} of a grade. A flag is raised when its figure is
 * strictly beyond the limit (below it for cycles and signal to noise).
 *
 * @param minCycles {@code few-cycles}
 * @param clipped {@code clipped}
 * @param gaps {@code gaps}
 * @param clock {@code uneven-clock}
 * @param snrDb {@code weak-signal}, dB
 * @param baseline {@code drifting}
 * @param cycleTrend {@code unsettled}
 * @param thirdHarmonic {@code nonlinear}
 * @param evenHarmonics {@code even-harmonics}
 * @param inertia {@code inertia-heavy}
 * @param compliance {@code compliance-heavy}
 * @param temperatureWanderK {@code temperature-wander}, K
 * @param frequencyMismatch {@code frequency-mismatch}
 */
public record ScreeningPlan(
        Threshold minCycles,
        Threshold clipped,
        Threshold gaps,
        Threshold clock,
        Threshold snrDb,
        Threshold baseline,
        Threshold cycleTrend,
        Threshold thirdHarmonic,
        Threshold evenHarmonics,
        Threshold inertia,
        Threshold compliance,
        Threshold temperatureWanderK,
        Threshold frequencyMismatch) {
    /**
     * The plan for a window of a longer record: a modulus that changes there is what is being measured, and the fit follows it,
     * so that change makes a point doubtful at most.
     */
    ScreeningPlan ofWindow() {
        return new ScreeningPlan(
                minCycles,
                clipped,
                gaps,
                clock,
                snrDb,
                baseline,
                new Threshold(cycleTrend.doubtful(), OptionalDouble.empty()),
                thirdHarmonic,
                evenHarmonics,
                inertia,
                compliance,
                temperatureWanderK,
                frequencyMismatch);
    }

    /** The defaults of the configuration. */
    public static ScreeningPlan withDefaults() {
        return new ScreeningPlan(
                Threshold.of(3, 1),
                Threshold.of(0, 0.1),
                Threshold.of(0.02, 0.3),
                new Threshold(0.05, OptionalDouble.empty()),
                Threshold.of(40, 15),
                Threshold.of(0.1, 1),
                Threshold.of(0.02, 0.2),
                Threshold.of(0.01, 0.2),
                Threshold.of(0.01, 0.2),
                Threshold.of(1, 10),
                Threshold.of(0.5, 0.9),
                Threshold.of(0.5, 3),
                Threshold.of(0.001, 0.05));
    }
}
