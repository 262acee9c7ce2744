package nightlag.stages.waveform;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import nightlag.stages.fault.Reason;
import nightlag.stages.fault.ReductionFault;

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
    /** How often the end of the start-up is looked for again with a frequency that is known better. */
    private static final int START_UP_ROUNDS = 3;

    private final Waveform waveform;
    private final ExtractionPlan plan;
    private final LeftOut leftOut;

    private HarmonicAnalysis(Waveform waveform, ExtractionPlan plan) {
        this.waveform = waveform;
        this.plan = plan;
        this.leftOut = new LeftOut(waveform);
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

    private record Settled(RecordPart part, Fitted fitted) {}

    private SignalFit run() throws ReductionFault {
        HarmonicFit.requireSamples(waveform.size(), plan);
        leftOut.leaveOutTowering();
        CutOffs suspected = CutOffs.suspected(waveform);
        leftOut.leaveOut(suspected);
        Samples all = leftOut.samples(0);
        HarmonicFit.requireSamples(all.size(), plan);

        Settled settled = afterStartUp(all);
        RecordPart part = settled.part();
        CutOffs cutOffs = suspected.confirmedBy(settled.fitted(), waveform);
        Fitted whole = withoutFalse(suspected, cutOffs, settled);
        Fitted fitted = leftOut.withoutSpikes(whole, part.first(), (rest, before) -> refit(part, rest, before));
        requireOscillation(fitted);

        List<Reason> notes = new ArrayList<>();
        if (plan.frequencyFrom() == FrequencySource.TAG && !part.exact()) {
            notes.add(WaveformReason.WAVEFORM_NO_TAG.with());
        }
        notes.addAll(fitted.notes());
        if (!cutOffs.runs().isEmpty()) {
            notes.add(cutOffs.note(part.size() - whole.samples().size()));
        }
        return new HarmonicSummary(part, fitted, leftOut.spikes(), cutOffs.atLimit()).fit(notes);
    }

    /** The first fit, of what comes after the start-up cycles. */
    private Settled afterStartUp(Samples all) throws ReductionFault {
        StartUp startUp = new StartUp(waveform, plan.startUpCycles(), all);
        OptionalDouble tag = waveform.nominalFrequencyHz();
        double[] starts = plan.takesTagOf(waveform)
                ? new double[] {2 * Math.PI * tag.getAsDouble()}
                : new FrequencySearch(all, plan.drift().degree()).starts(tag);
        RecordPart part = RecordPart.from(startUp.end(starts[0]), waveform, plan);
        Fitted fitted = new HarmonicFit(part).best(samples(part, startUp, all, starts[0]), starts);
        for (int round = 0; round < START_UP_ROUNDS; round++) {
            double omega = fitted.result().angularFrequency();
            if (startUp.end(omega) == part.first()) {
                break;
            }
            // the first look was misled by the start-up itself; now its end is known better
            part = RecordPart.from(startUp.end(omega), waveform, plan);
            fitted = new HarmonicFit(part).startingAt(omega, samples(part, startUp, all, omega));
        }
        return new Settled(part, fitted);
    }

    private Samples samples(RecordPart part, StartUp startUp, Samples all, double omega) throws ReductionFault {
        if (part.first() == 0) {
            return all;
        }
        Samples rest = leftOut.samples(part.first());
        if (rest.size() < 2) {
            throw startUp.holdsAll(omega);
        }
        HarmonicFit.requireSamples(rest.size(), plan);
        return rest;
    }

    /** Takes back in what only looked like a limit. */
    private Fitted withoutFalse(CutOffs suspected, CutOffs cutOffs, Settled settled) throws ReductionFault {
        if (cutOffs.runs().size() == suspected.runs().size()) {
            return settled.fitted();
        }
        leftOut.leaveOutOnly(cutOffs);
        return new HarmonicFit(settled.part())
                .startingAt(
                        settled.fitted().result().angularFrequency(),
                        leftOut.samples(settled.part().first()));
    }

    private Fitted refit(RecordPart part, Samples rest, Fitted before) throws ReductionFault {
        HarmonicFit.requireSamples(rest.size(), plan);
        return new HarmonicFit(part).startingAt(before.result().angularFrequency(), rest);
    }

    private static void requireOscillation(Fitted fitted) throws ReductionFault {
        for (int c = 0; c < Samples.CHANNELS; c++) {
            if (!(fitted.amplitude(c) > 0 && Double.isFinite(fitted.amplitude(c)))) {
                throw new ReductionFault(WaveformReason.WAVEFORM_NO_OSCILLATION.with(RecordChecks.channelName(c)));
            }
        }
    }
}
