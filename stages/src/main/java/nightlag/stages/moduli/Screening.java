package nightlag.stages.moduli;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.EnumSet;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import nightlag.stages.fault.Reason;
import nightlag.stages.fault.ReasonCode;
import nightlag.stages.waveform.ClockJump;
import nightlag.stages.waveform.CycleScatter;
import nightlag.stages.waveform.ScreeningFigures;
import nightlag.stages.waveform.ScreeningFigures.Figure;
import nightlag.stages.waveform.SignalFit;
import nightlag.stages.waveform.SweepStart;

/**
 * The flags of a point and what they make of it. A flag is raised where its figure is strictly beyond its limit; figures
 * that noise alone can feign (harmonics, drift, trend, frequency) must also exceed three of their own uncertainties.
 */
final class Screening {
    /** The flags that harmonics raise. */
    static final Set<Flag> OF_HARMONICS = Set.of(Flag.NONLINEAR, Flag.EVEN_HARMONICS);

    private static final OptionalDouble NEVER = OptionalDouble.empty();
    /** A scatter so much over the noise that the noise's u tells less than half of it. */
    private static final double CYCLES_OVER_NOISE = 2;
    /** Noise alone makes a ratio that large less often than once in so many records: once in some nights of thousands. */
    private static final double RARE = 1e-4;
    /** A relative uncertainty below it is a file's last digits. */
    private static final double SMALLEST_SCATTER = 1e-6;

    private static final double MOST_OF_IT = 0.5;

    private final List<Flag> flags = new ArrayList<>();
    private final List<Reason> reasons = new ArrayList<>();
    private final Set<Flag> decisive = EnumSet.noneOf(Flag.class);
    private Quality quality = Quality.SOUND;

    private Screening() {}

    /** The flags, in the order of {@link Flag}. */
    List<Flag> flags() {
        return flags;
    }

    /** The figure and the threshold behind each. */
    List<Reason> reasons() {
        return reasons;
    }

    /** What they make of the point. */
    Quality quality() {
        return quality;
    }

    /** The flag that alone makes the point unusable. */
    Optional<Flag> unusableOnlyBy() {
        return decisive.size() == 1 ? Optional.of(decisive.iterator().next()) : Optional.empty();
    }

    /**
     * Screens one record.
     *
     * @param stress orders of the stress
     * @param inertiaRatio inertia's load over the specimen's own
     * @param complianceRatio the frame's share of the movement
     * @param deformationRange trusted amplitudes of the deformation channel
     * @param loadRange trusted amplitudes of the load channel
     */
    static Screening of(
            SignalFit fit,
            List<Harmonic> stress,
            double inertiaRatio,
            double complianceRatio,
            Optional<SignalRange> deformationRange,
            Optional<SignalRange> loadRange,
            ScreeningPlan plan) {
        ScreeningFigures figures = fit.screening();
        Screening screening = new Screening();
        screening.below(ScreeningReason.SCREENING_FEW_CYCLES, fit.cyclesUsed(), plan.minCycles());
        screening.above(
                ScreeningReason.SCREENING_CLIPPED, figures.clippedShare() + figures.spikeShare(), plan.clipped());
        screening.above(ScreeningReason.SCREENING_GAPS, figures.gapShare(), plan.gaps());
        screening.above(ScreeningReason.SCREENING_UNEVEN_CLOCK, figures.clockJitter(), plan.clock());
        figures.clockJump().ifPresent(screening::clockJumped);
        screening.signalToNoise(fit, plan.snrDb());
        screening.above(ScreeningReason.SCREENING_DRIFTING, figures.baseline(), plan.baseline());
        figures.cycleTrend()
                .ifPresent(trend -> screening.above(ScreeningReason.SCREENING_UNSETTLED, trend, plan.cycleTrend()));
        figures.cycleScatter().ifPresent(screening::cyclesAgainstNoise);
        figures.sweepStart()
                .ifPresent(start -> screening.above(
                        ScreeningReason.SCREENING_SWEEP_IN_MOTION, start, new Threshold(SweepStart.AT_REST, NEVER)));
        screening.harmonics(stress, plan.thirdHarmonic(), plan.evenHarmonics());
        screening.above(ScreeningReason.SCREENING_INERTIA_HEAVY, inertiaRatio, plan.inertia());
        screening.above(ScreeningReason.SCREENING_COMPLIANCE_HEAVY, complianceRatio, plan.compliance());
        screening.outOf(deformationRange, "deformation", fit.deformation()[0].abs());
        screening.outOf(loadRange, "load", fit.load()[0].abs());
        figures.temperatureWanderK()
                .ifPresent(wander -> screening.above(
                        ScreeningReason.SCREENING_TEMPERATURE_WANDER, wander, plan.temperatureWanderK()));
        figures.frequencyMismatch()
                .ifPresent(mismatch -> screening.above(
                        ScreeningReason.SCREENING_FREQUENCY_MISMATCH, mismatch, plan.frequencyMismatch()));
        return screening;
    }

    /** Screens a creep record by those flags that mean something for it. */
    static Screening ofCreep(
            CreepFigures figures,
            Optional<SignalRange> deformationRange,
            Optional<SignalRange> loadRange,
            ScreeningPlan plan) {
        Screening screening = new Screening();
        screening.above(ScreeningReason.SCREENING_CLIPPED, figures.clippedShare(), plan.clipped());
        screening.above(ScreeningReason.SCREENING_DECADES_MISSING, figures.gapShare(), plan.gaps());
        screening.below(ScreeningReason.SCREENING_WEAK_SIGNAL, figures.snrDb(), plan.snrDb());
        screening.above(ScreeningReason.SCREENING_REST_DRIFTING, figures.baseline(), plan.baseline());
        screening.above(ScreeningReason.SCREENING_STRESS_NOT_HELD, figures.stressChange(), plan.cycleTrend());
        screening.above(ScreeningReason.SCREENING_COMPLIANCE_HEAVY, figures.complianceRatio(), plan.compliance());
        screening.outOf(deformationRange, "deformation", figures.deformation());
        screening.outOf(loadRange, "load", figures.load());
        figures.temperatureWanderK()
                .ifPresent(wander -> screening.above(
                        ScreeningReason.SCREENING_TEMPERATURE_WANDER, wander, plan.temperatureWanderK()));
        return screening;
    }

    /** Screens nothing but the orders of the stress. */
    static Screening ofHarmonics(List<Harmonic> stress, Threshold third, Threshold even) {
        Screening screening = new Screening();
        screening.harmonics(stress, third, even);
        return screening;
    }

    /** Whether it is the reason of one of the flags that harmonics raise. */
    static boolean isOfHarmonics(Reason reason) {
        return reason.code().equals(ScreeningReason.SCREENING_NONLINEAR.name())
                || reason.code().equals(ScreeningReason.SCREENING_EVEN_HARMONICS.name());
    }

    private void harmonics(List<Harmonic> stress, Threshold third, Threshold even) {
        for (Harmonic harmonic : stress) {
            if (harmonic.order() == 3) {
                above(ScreeningReason.SCREENING_NONLINEAR, figure(harmonic), third);
            }
        }
        stress.stream()
                .filter(harmonic -> harmonic.order() % 2 == 0)
                .map(Screening::figure)
                .filter(Figure::significant)
                .max(Comparator.comparingDouble(Figure::value))
                .ifPresent(largest -> above(ScreeningReason.SCREENING_EVEN_HARMONICS, largest, even));
    }

    private static Figure figure(Harmonic harmonic) {
        return new Figure(
                harmonic.relativeIntensity(), harmonic.relativeIntensityU().orElse(0));
    }

    private void above(ScreeningReason reason, Figure figure, Threshold limit) {
        if (figure.significant()) {
            above(reason, figure.value(), limit);
        }
    }

    private void above(ScreeningReason reason, double figure, Threshold limit) {
        if (figure > limit.doubtful()) {
            boolean unusable =
                    limit.unusable().isPresent() && figure > limit.unusable().getAsDouble();
            raise(reason, figure, limit.doubtful(), unusable ? limit.unusable() : NEVER);
        }
    }

    /** The weaker channel's; where most of what its fit left is no noise the reason says so. */
    private void signalToNoise(SignalFit fit, Threshold limit) {
        ScreeningFigures figures = fit.screening();
        double overtones = figures.overtonesLeft().orElse(0);
        boolean shape = overtones > MOST_OF_IT;
        below(
                shape ? ScreeningReason.SCREENING_OVERTONES_LEFT : ScreeningReason.SCREENING_WEAK_SIGNAL,
                Math.min(figures.deformationSnrDb(), figures.loadSnrDb()),
                limit,
                shape ? new Object[] {Math.rint(100 * overtones), fit.load().length} : new Object[0]);
    }

    private void below(ScreeningReason reason, double figure, Threshold limit, Object... more) {
        if (figure < limit.doubtful()) {
            boolean unusable =
                    limit.unusable().isPresent() && figure < limit.unusable().getAsDouble();
            raise(reason, figure, limit.doubtful(), unusable ? limit.unusable() : NEVER, more);
        }
    }

    private void cyclesAgainstNoise(CycleScatter scatter) {
        if (scatter.cyclesU() > SMALLEST_SCATTER && scatter.ratio() > CYCLES_OVER_NOISE && scatter.chance() < RARE) {
            raise(
                    ScreeningReason.SCREENING_CYCLES_DISAGREE,
                    scatter.ratio(),
                    CYCLES_OVER_NOISE,
                    NEVER,
                    scatter.cyclesU(),
                    scatter.noiseU());
        }
    }

    private void clockJumped(ClockJump jump) {
        raise(
                ScreeningReason.SCREENING_CLOCK_JUMPED,
                jump.seconds(),
                ClockJump.SMALLEST_CYCLES,
                NEVER,
                jump.atS(),
                Math.abs(jump.cycles()),
                jump.samplesLeftOut());
    }

    private void outOf(Optional<SignalRange> range, String channel, double amplitude) {
        if (range.isPresent()
                && (amplitude < range.get().low() || amplitude > range.get().high())) {
            double end = amplitude < range.get().low()
                    ? range.get().low()
                    : range.get().high();
            raise(ScreeningReason.SCREENING_OUT_OF_RANGE, amplitude, end, NEVER, channel);
        }
    }

    private void raise(
            ScreeningReason reason, double figure, double doubtful, OptionalDouble unusable, Object... more) {
        Quality verdict = unusable.isPresent() ? Quality.UNUSABLE : Quality.DOUBTFUL;
        // the limit is quoted, and what is beyond it has to look so
        String limit = ReasonCode.shortest(unusable.orElse(doubtful));
        String rounded = ReasonCode.rounded(figure);
        List<Object> parts = new ArrayList<>(List.of(
                rounded.equals(limit) ? ReasonCode.shortest(figure) : rounded,
                limit,
                verdict.name().toLowerCase(Locale.ROOT)));
        parts.addAll(List.of(more));
        reasons.add(reason.with(parts.toArray()));
        if (!flags.contains(reason.flag())) {
            flags.add(reason.flag());
        }
        if (verdict == Quality.UNUSABLE) {
            decisive.add(reason.flag());
        }
        if (verdict.compareTo(quality) > 0) {
            quality = verdict;
        }
    }
}
