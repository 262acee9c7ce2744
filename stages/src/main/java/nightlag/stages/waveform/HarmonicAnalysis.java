package nightlag.stages.waveform;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.BiFunction;
import nightlag.stages.fault.Reason;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.numeric.Complex;
import nightlag.stages.waveform.ScreeningFigures.Figure;

/**
 * One record to complex amplitudes. The transform of the record shows where the frequency is; drift, harmonics and the
 * frequency shared by both channels are then fitted jointly on the true time stamps ({@link JointFit}). The bins of the
 * transform are used as they are only where that is the same thing: no drift asked for, the tagged frequency exact, an even
 * clock, no sample left out, a whole number of cycles.
 *
 * <p>Samples at a channel's limit, and isolated spikes, are left out first. Neither costs a clean record more than a pass
 * over its samples.
 */
public final class HarmonicAnalysis {
    /** Below so many cycles with all orders the fit has several minima, and a grid comes before the refinement. */
    private static final double FEW_CYCLES = 2.5;
    /** Below so many cycles no order above the first can be told from the drift. */
    private static final double CYCLES_FOR_HARMONICS = 1.1;
    /** A tag is right or wrong by more than this part of it. */
    private static final double NEAR_TAG = 0.1;
    /** Twice the difference in ln likelihood from which on a frequency that is not the tagged one is believed. */
    private static final double CLEARLY_LIKELIER = 16;
    /** An order this near half the samples a cycle (as part of them) counts as at it. */
    private static final double BELOW_HALF = 0.495;
    /** Degrees of freedom a channel must keep. */
    private static final int SPARE_SAMPLES = 2;
    /** Where more samples than this stand at a limit, leaving them out would leave no record. */
    private static final double MOST_CLIPPED = 0.4;

    private static final int START_UP_ROUNDS = 3;

    private final Waveform waveform;
    private final ExtractionPlan plan;
    private final boolean exact;
    private final List<Reason> notes = new ArrayList<>();
    private final boolean[] leftOut;
    private final List<LimitRun> limitRuns = new ArrayList<>();
    private int first;
    private int clipped;
    private int spikes;

    private HarmonicAnalysis(Waveform waveform, ExtractionPlan plan) {
        this.waveform = waveform;
        this.plan = plan;
        this.exact = plan.frequencyFrom() == FrequencySource.TAG
                && waveform.nominalFrequencyHz().isPresent();
        this.leftOut = new boolean[waveform.size()];
    }

    /**
     * Takes the amplitudes out of a record.
     *
     * @throws ReductionFault if the record has too few samples, a channel that does not move, or no oscillation
     */
    public static SignalFit analyse(Waveform waveform, ExtractionPlan plan) throws ReductionFault {
        if (waveform.size() == 0) {
            throw new ReductionFault(WaveformReason.WAVEFORM_NO_SAMPLES.with());
        }
        RecordChecks.check(waveform);
        Optional<ClockCheck.Stretch> stretch = ClockCheck.stretch(waveform, plan);
        if (stretch.isEmpty()) {
            return wholeRecord(waveform, plan);
        }
        double startUp = waveform.isWindow()
                ? plan.startUpCycles()
                : Math.max(0, plan.startUpCycles() - stretch.get().cyclesBefore());
        ExtractionPlan ofStretch = new ExtractionPlan(startUp, plan.harmonics(), plan.drift(), plan.frequencyFrom());
        return wholeRecord(stretch.get().of(waveform), ofStretch)
                .outOf(stretch.get().from(), stretch.get().jump());
    }

    /** The same for a record that has been checked, its time stamps taken as they are. */
    static SignalFit wholeRecord(Waveform waveform, ExtractionPlan plan) throws ReductionFault {
        return new HarmonicAnalysis(waveform, plan).run();
    }

    private SignalFit run() throws ReductionFault {
        requireSamples(waveform.size());
        leaveOutDamage();
        Samples all = Samples.of(waveform, 0, leftOut);
        requireSamples(all.size());
        OptionalDouble tag = waveform.nominalFrequencyHz();
        if (plan.frequencyFrom() == FrequencySource.TAG && !exact) {
            notes.add(WaveformReason.WAVEFORM_NO_TAG.with());
        }
        double[] starts = exact
                ? new double[] {2 * Math.PI * tag.getAsDouble()}
                : new FrequencySearch(all, plan.drift().degree()).starts(tag);
        Samples samples = plan.startUpCycles() > 0 ? withoutStartUp(all, starts[0]) : all;
        Clock clock = Clock.of(waveform.timeS(), first);
        Fitted fitted = best(samples, clock, starts);
        for (int round = 0; round < START_UP_ROUNDS && startUpEnd(fitted, all) != first; round++) {
            // the first look was misled by the start-up itself; now its end is known better
            notes.removeIf(HarmonicAnalysis::isAboutTheModel);
            samples = withoutStartUp(all, fitted.result().angularFrequency());
            clock = Clock.of(waveform.timeS(), first);
            fitted = fit(samples, clock, fitted.result().angularFrequency());
        }
        fitted = withoutFalseLimits(fitted, clock);
        fitted = withoutSpikes(fitted, clock);
        for (int c = 0; c < Samples.CHANNELS; c++) {
            if (!(fitted.amplitude(c) > 0 && Double.isFinite(fitted.amplitude(c)))) {
                throw new ReductionFault(WaveformReason.WAVEFORM_NO_OSCILLATION.with(RecordChecks.channelName(c)));
            }
        }
        return summary(fitted, clock);
    }

    private void leaveOutDamage() {
        spikes = Damage.markTowering(waveform.deformation(), leftOut) + Damage.markTowering(waveform.load(), leftOut);
        limitRuns.addAll(LimitRun.of(waveform));
        int atLimit = 0;
        for (LimitRun run : limitRuns) {
            atLimit += run.length();
        }
        if (atLimit > MOST_CLIPPED * waveform.size()) {
            // without them nothing is left to tell coarse steps from a limit, nor to fit
            clipped = atLimit;
            limitRuns.clear();
        }
        limitRuns.forEach(run -> run.mark(leftOut));
    }

    /** Takes back in what only looked like a limit. */
    private Fitted withoutFalseLimits(Fitted start, Clock clock) throws ReductionFault {
        if (limitRuns.isEmpty()) {
            return start;
        }
        int marked = limitRuns.size();
        limitRuns.removeIf(run -> !run.cutsOff(start, waveform));
        for (LimitRun run : limitRuns) {
            clipped += run.length();
        }
        Fitted fitted = start;
        if (limitRuns.size() < marked) {
            Arrays.fill(leftOut, false);
            Damage.markTowering(waveform.deformation(), leftOut);
            Damage.markTowering(waveform.load(), leftOut);
            limitRuns.forEach(run -> run.mark(leftOut));
            notes.removeIf(HarmonicAnalysis::isAboutTheModel);
            fitted = fit(
                    Samples.of(waveform, first, leftOut), clock, start.result().angularFrequency());
        }
        if (clipped > 0) {
            int without = waveform.size() - first - fitted.samples().size();
            notes.add(WaveformReason.WAVEFORM_CLIPPED_LEFT_OUT.with(clipped, without));
        }
        return fitted;
    }

    private void requireSamples(int found) throws ReductionFault {
        int needed = plan.drift().degree() + 1 + 2 + SPARE_SAMPLES;
        if (found < needed) {
            throw new ReductionFault(WaveformReason.WAVEFORM_TOO_FEW_SAMPLES.with(found, needed));
        }
    }

    private Samples withoutStartUp(Samples all, double omega) throws ReductionFault {
        first = startUpEnd(omega, all);
        Samples rest = Samples.of(waveform, first, leftOut);
        if (rest.size() < 2 && waveform.isWindow()) {
            double endS = waveform.timeS()[waveform.size() - 1];
            throw new ReductionFault(WaveformReason.WAVEFORM_WINDOW_IN_START_UP.with(
                    plan.startUpCycles(), (endS - beginS()) / cycleS(omega)));
        }
        if (rest.size() < 2) {
            throw new ReductionFault(WaveformReason.WAVEFORM_ALL_START_UP.with(
                    plan.startUpCycles(), omega * all.durationS() / (2 * Math.PI)));
        }
        requireSamples(rest.size());
        return rest;
    }

    private int startUpEnd(Fitted fitted, Samples all) {
        return plan.startUpCycles() > 0 ? startUpEnd(fitted.result().angularFrequency(), all) : 0;
    }

    /** The first sample after the start-up cycles. */
    private int startUpEnd(double omega, Samples all) {
        double[] timeS = waveform.timeS();
        double end = beginS() + plan.startUpCycles() * cycleS(omega) - 0.25 * all.intervalS();
        int index = 0;
        while (index < timeS.length && timeS[index] < end) {
            index++;
        }
        return index;
    }

    private double beginS() {
        return waveform.windowOfRecordFromS().orElse(waveform.timeS()[0]);
    }

    /** The length of a start-up cycle; those before a window are not seen here, so their length follows from the tag. */
    private double cycleS(double omega) {
        OptionalDouble tag = waveform.nominalFrequencyHz();
        return waveform.isWindow() && tag.isPresent() ? 1 / tag.getAsDouble() : 2 * Math.PI / omega;
    }

    private static boolean isAboutTheModel(Reason note) {
        return note.code().equals(WaveformReason.WAVEFORM_ORDERS_ABOVE_SAMPLING.name())
                || note.code().equals(WaveformReason.WAVEFORM_ORDERS_NOT_SEPARABLE.name())
                || note.code().equals(WaveformReason.WAVEFORM_WINDOW_TOO_SHORT.name());
    }

    /** The best fit from several frequencies to start from. */
    private Fitted best(Samples samples, Clock clock, double[] starts) throws ReductionFault {
        List<Reason> before = List.copyOf(notes);
        Optional<Fitted> best = Optional.empty();
        List<Reason> notesOfBest = before;
        Optional<ReductionFault> firstFault = Optional.empty();
        for (double start : starts) {
            try {
                Fitted fitted = fit(samples, clock, start);
                double least = best.map(b -> b.result().misfit()).orElse(Double.POSITIVE_INFINITY);
                if (best.isEmpty() || fitted.result().misfit() < least) {
                    best = Optional.of(fitted);
                    notesOfBest = List.copyOf(notes);
                }
            } catch (ReductionFault fault) {
                firstFault = firstFault.isPresent() ? firstFault : Optional.of(fault);
            }
            notes.clear();
            notes.addAll(before);
        }
        notes.clear();
        notes.addAll(notesOfBest);
        if (best.isEmpty() && firstFault.isPresent()) {
            throw firstFault.get();
        }
        return best.orElseThrow();
    }

    private Fitted fit(Samples samples, Clock clock, double start) throws ReductionFault {
        int degree = plan.drift().degree();
        double omega = exact
                ? start
                : orAtFixed(new JointFit(samples, 1, degree), JointFit::roughlyRefined, start)
                        .orElseThrow(() -> new ReductionFault(notSeparable(start, clock)))
                        .angularFrequency();
        if (atHalfTheSampling(omega, clock)) {
            throw new ReductionFault(tooFewACycle(omega, clock));
        }
        double cycles = omega * samples.durationS() / (2 * Math.PI);
        int orders = ordersBelowHalf(omega, clock);
        int separable = Math.min(orders, (samples.size() - SPARE_SAMPLES - degree - 1) / 2);
        if (cycles < CYCLES_FOR_HARMONICS) {
            separable = 1;
        }
        for (int harmonics = separable; harmonics >= 1; harmonics--) {
            JointFit fit = new JointFit(samples, harmonics, degree);
            Optional<JointFit.Result> result = exact
                    ? atTag(fit, samples, clock, omega)
                    : orAtFixed(fit, (joint, from) -> refined(joint, samples, from, cycles), omega);
            if (result.isPresent()) {
                if (harmonics < orders) {
                    notes.add(WaveformReason.WAVEFORM_ORDERS_NOT_SEPARABLE.with(
                            harmonics, plan.harmonics(), samples.size(), cycles));
                }
                Fitted constant = new Fitted(samples, fit.basis(), result.get());
                return waveform.isWindow() ? withTrend(constant, cycles) : constant;
            }
        }
        throw new ReductionFault(WaveformReason.WAVEFORM_NOT_SEPARABLE.with());
    }

    /**
     * A refined fit; in a window of a longer record, where none is found because the amplitudes change so much, the fit at the
     * frequency to start from: the frequency is then found with the change ({@link WindowFit}).
     */
    private Optional<JointFit.Result> orAtFixed(
            JointFit fit, BiFunction<JointFit, Double, Optional<JointFit.Result>> refinement, double start) {
        Optional<JointFit.Result> refined = refinement.apply(fit, start);
        return refined.isPresent() || !waveform.isWindow() ? refined : fit.atFixed(start);
    }

    private Fitted withTrend(Fitted constant, double cycles) {
        int harmonics = constant.basis().harmonics();
        Optional<Fitted> window = new WindowFit(
                        constant.samples(), harmonics, plan.drift().degree(), exact)
                .fit(constant.result().angularFrequency());
        if (window.isEmpty()) {
            notes.add(WaveformReason.WAVEFORM_WINDOW_TOO_SHORT.with(cycles));
        }
        return window.orElse(constant);
    }

    private static double samplesPerCycle(double omega, Clock clock) {
        return 2 * Math.PI / (omega * clock.intervalS());
    }

    /** Whether the fundamental itself is no order below half the samples a cycle. */
    private static boolean atHalfTheSampling(double omega, Clock clock) {
        return BELOW_HALF * samplesPerCycle(omega, clock) < 1;
    }

    private static Reason tooFewACycle(double omega, Clock clock) {
        return WaveformReason.WAVEFORM_TOO_FEW_A_CYCLE.with(samplesPerCycle(omega, clock), 1 / BELOW_HALF);
    }

    private static Reason notSeparable(double start, Clock clock) {
        return atHalfTheSampling(start, clock)
                ? tooFewACycle(start, clock)
                : WaveformReason.WAVEFORM_NOT_SEPARABLE.with();
    }

    private int ordersBelowHalf(double omega, Clock clock) {
        double perCycle = samplesPerCycle(omega, clock);
        int highest = (int) Math.floor(BELOW_HALF * perCycle);
        if (highest < plan.harmonics()) {
            notes.add(WaveformReason.WAVEFORM_ORDERS_ABOVE_SAMPLING.with(highest, plan.harmonics(), perCycle));
        }
        return Math.min(plan.harmonics(), highest);
    }

    private Optional<JointFit.Result> atTag(JointFit fit, Samples samples, Clock clock, double omega) {
        boolean complete = samples.size() == waveform.size() - first && !waveform.isWindow();
        if (plan.drift() == Drift.NONE && complete && WholeCycleBins.applies(samples, clock, omega)) {
            return fit.given(omega, WholeCycleBins.coefficients(samples, fit.basis(), omega));
        }
        return fit.atFixed(omega);
    }

    private Optional<JointFit.Result> refined(JointFit fit, Samples samples, double omega, double cycles) {
        if (cycles >= FEW_CYCLES) {
            return fit.refined(omega);
        }
        int harmonics = fit.basis().harmonics();
        int degree = plan.drift().degree();
        List<JointFit.Result> found = Arrays.stream(FrequencySearch.minimaNearby(samples, omega, harmonics, degree))
                .mapToObj(start -> fit.refined(start))
                .flatMap(Optional::stream)
                .filter(result -> FrequencySearch.near(result.angularFrequency(), omega))
                .sorted(Comparator.comparingDouble(JointFit.Result::misfit))
                .toList();
        // noise makes several maxima of the likelihood in so short a record; the tag decides between those that are
        // alike
        return found.stream()
                .filter(result -> nearTag(result.angularFrequency()))
                .filter(result ->
                        samples.size() * (result.misfit() - found.get(0).misfit()) < CLEARLY_LIKELIER)
                .findFirst()
                .or(() -> found.stream().findFirst());
    }

    private boolean nearTag(double omega) {
        OptionalDouble tag = waveform.nominalFrequencyHz();
        return tag.isPresent() && Math.abs(omega / (2 * Math.PI * tag.getAsDouble()) - 1) < NEAR_TAG;
    }

    private Fitted withoutSpikes(Fitted start, Clock clock) throws ReductionFault {
        Fitted fitted = start;
        for (int round = 0; round < Damage.SPIKE_ROUNDS; round++) {
            int found = 0;
            for (int c = 0; c < Samples.CHANNELS; c++) {
                double[] residuals = fitted.result().residuals()[c];
                if (Damage.suspicious(residuals)) {
                    double freedom = residuals.length - fitted.basis().columns();
                    for (int place : Damage.spikes(residuals, freedom, Damage.SMALLEST_SPIKE * fitted.amplitude(c))) {
                        int index = fitted.samples().indices()[place];
                        found += leftOut[index] ? 0 : 1;
                        leftOut[index] = true;
                    }
                }
            }
            if (found == 0) {
                break;
            }
            spikes += found;
            notes.removeIf(HarmonicAnalysis::isAboutTheModel);
            Samples rest = Samples.of(waveform, first, leftOut);
            requireSamples(rest.size());
            fitted = fit(rest, clock, fitted.result().angularFrequency());
        }
        return fitted;
    }

    private SignalFit summary(Fitted fitted, Clock clock) {
        Samples samples = fitted.samples();
        JointFit.Result result = fitted.result();
        boolean frequencyFree = !exact && !fitted.hasTrend();
        Noise noise = Noise.of(samples, fitted.basis(), result, frequencyFree);
        FitCovariance covariance = new FitCovariance(fitted.basis(), result, noise, frequencyFree);
        double omega = result.angularFrequency();
        double phaseU =
                fitted.hasTrend() && !exact ? phaseGained(fitted, noise).u() : Math.sqrt(covariance.phaseVariance());
        double frequencyU = phaseU / samples.halfSpanS() / (2 * Math.PI);
        double frequency = exact ? waveform.nominalFrequencyHz().getAsDouble() : omega / (2 * Math.PI);
        double cycles = wholeWithin(samples.durationS() * frequency, samples.durationS() * 3 * frequencyU + 1e-9);
        addNotes(noise);
        int samplesHeld = waveform.size() - first;
        TemperatureLine temperature = waveform.isWindow()
                ? TemperatureLine.through(waveform.temperatureK(), samples)
                : TemperatureLine.flat(waveform.temperatureK(), samples);
        Steadiness steadiness = new Steadiness(samples, fitted.basis(), result, noise);
        ScreeningFigures figures = new ScreeningFigures(
                (double) clipped / waveform.size(),
                (double) spikes / waveform.size(),
                clock.gapShare(),
                clock.jitter(),
                snrDb(fitted, steadiness, Samples.DEFORMATION),
                snrDb(fitted, steadiness, Samples.LOAD),
                steadiness.baseline(),
                steadiness.cycleTrend(),
                Steadiness.temperatureWander(temperature.about(), samples.indices(), samples.size() / cycles),
                frequencyMismatch(fitted, noise, frequency, frequencyU),
                steadiness.cycleScatter(covariance.degreesOfFreedom()),
                Optional.empty());
        return new SignalFit(
                frequency,
                frequencyU,
                samples.originS(),
                amplitudes(fitted, Samples.DEFORMATION),
                amplitudes(fitted, Samples.LOAD),
                covariance.matrix(),
                covariance.degreesOfFreedom(),
                Math.sqrt(noise.whole(Samples.DEFORMATION).variance()),
                Math.sqrt(noise.whole(Samples.LOAD).variance()),
                cycles,
                first,
                samples.size(),
                samplesHeld + first - samples.size(),
                temperature.middleK(),
                figures,
                List.copyOf(notes));
    }

    private void addNotes(Noise noise) {
        if (spikes > 0) {
            notes.add(WaveformReason.WAVEFORM_SPIKES_LEFT_OUT.with(spikes));
        }
        if (waveform.rowsLeftOut() > 0) {
            notes.add(WaveformReason.WAVEFORM_ROWS_MISSING.with(waveform.rowsLeftOut()));
        }
        for (int c = 0; c < Samples.CHANNELS; c++) {
            if (noise.beside(c, 1).pooled()) {
                notes.add(WaveformReason.WAVEFORM_POOLED_NOISE.with(RecordChecks.channelName(c)));
            }
        }
    }

    private Optional<Figure> frequencyMismatch(Fitted fitted, Noise noise, double frequency, double frequencyU) {
        if (waveform.nominalFrequencyHz().isEmpty()) {
            return Optional.empty();
        }
        double tag = waveform.nominalFrequencyHz().getAsDouble();
        if (!exact) {
            return Optional.of(new Figure(Math.abs(frequency - tag) / tag, frequencyU / tag));
        }
        // the tag was taken as it is; where the signal would have gone is still worth knowing
        JointFit.Result result = fitted.result();
        double perFrequency = fitted.samples().halfSpanS() * result.angularFrequency();
        if (fitted.hasTrend()) {
            Figure phase = phaseGained(fitted, noise);
            return Optional.of(new Figure(Math.abs(phase.value()) / perFrequency, phase.u() / perFrequency));
        }
        double variance = new FitCovariance(fitted.basis(), result, noise, true).phaseVariance();
        return Optional.of(new Figure(Math.abs(result.phaseStep()) / perFrequency, Math.sqrt(variance) / perFrequency));
    }

    private static Figure phaseGained(Fitted fitted, Noise noise) {
        return WindowFit.phaseGained(fitted, new double[] {
            noise.beside(Samples.DEFORMATION, 1).variance(),
            noise.beside(Samples.LOAD, 1).variance()
        });
    }

    private static double snrDb(Fitted fitted, Steadiness steadiness, int channel) {
        double deviation = Math.sqrt(steadiness.steadyVariance(channel));
        return SignalToNoise.decibels(fitted.amplitude(channel), deviation);
    }

    private static Complex[] amplitudes(Fitted fitted, int channel) {
        Complex[] amplitudes = new Complex[fitted.basis().harmonics()];
        double[] coefficients = fitted.result().coefficients()[channel];
        for (int n = 1; n <= amplitudes.length; n++) {
            int column = fitted.basis().cosineColumn(n);
            amplitudes[n - 1] = new Complex(coefficients[column], -coefficients[column + 1]);
        }
        return amplitudes;
    }

    /** A number that cannot be told from a whole one is that one. */
    private static double wholeWithin(double number, double tolerance) {
        double whole = Math.rint(number);
        return whole > 0 && Math.abs(number - whole) <= tolerance ? whole : number;
    }
}
