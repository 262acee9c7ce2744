package nightlag.stages.waveform;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import nightlag.stages.fault.Reason;
import nightlag.stages.numeric.Complex;
import nightlag.stages.waveform.ScreeningFigures.Figure;

/** What is published of the last fit of a record of one frequency: amplitudes, covariance, figures for the flags. */
final class HarmonicSummary {
    private final RecordPart part;
    private final Fitted fitted;
    private final int spikes;
    private final int atLimit;
    private final Samples samples;
    private final JointFit.Result result;
    private final Noise noise;
    private final FitCovariance covariance;

    /** For a fit, and how many spikes and samples at a limit the record has. */
    HarmonicSummary(RecordPart part, Fitted fitted, int spikes, int atLimit) {
        this.part = part;
        this.fitted = fitted;
        this.spikes = spikes;
        this.atLimit = atLimit;
        this.samples = fitted.samples();
        this.result = fitted.result();
        boolean frequencyFree = !part.exact() && !fitted.hasTrend();
        this.noise = Noise.of(samples, fitted.basis(), result, frequencyFree);
        this.covariance = new FitCovariance(fitted.basis(), result, noise, frequencyFree);
    }

    /** The fit as it is handed on, with what was noted before. */
    SignalFit fit(List<Reason> notesBefore) {
        Waveform waveform = part.waveform();
        double omega = result.angularFrequency();
        double phaseU = fitted.hasTrend() && !part.exact() ? phaseGained().u() : Math.sqrt(covariance.phaseVariance());
        double frequencyU = phaseU / samples.halfSpanS() / (2 * Math.PI);
        double frequency = part.exact() ? part.tagHz().getAsDouble() : omega / (2 * Math.PI);
        double cycles = wholeWithin(samples.durationS() * frequency, samples.durationS() * 3 * frequencyU + 1e-9);
        TemperatureLine temperature = waveform.isWindow()
                ? TemperatureLine.through(waveform.temperatureK(), samples)
                : TemperatureLine.flat(waveform.temperatureK(), samples);
        return new SignalFit(
                frequency,
                frequencyU,
                samples.originS(),
                amplitudes(Samples.DEFORMATION),
                amplitudes(Samples.LOAD),
                covariance.matrix(),
                covariance.degreesOfFreedom(),
                Math.sqrt(noise.whole(Samples.DEFORMATION).variance()),
                Math.sqrt(noise.whole(Samples.LOAD).variance()),
                cycles,
                part.first(),
                samples.size(),
                waveform.size() - samples.size(),
                temperature.middleK(),
                figures(temperature, cycles, frequencyMismatch(frequency, frequencyU)),
                withNotes(notesBefore));
    }

    private ScreeningFigures figures(TemperatureLine temperature, double cycles, Optional<Figure> frequencyMismatch) {
        Steadiness steadiness = new Steadiness(samples, fitted.basis(), result, noise);
        double deformationSnrDb = snrDb(steadiness, Samples.DEFORMATION);
        double loadSnrDb = snrDb(steadiness, Samples.LOAD);
        double recorded = part.waveform().size();
        return new ScreeningFigures(
                atLimit / recorded,
                spikes / recorded,
                part.waveform().window().map(this::gapShare).orElse(part.clock().gapShare()),
                part.clock().jitter(),
                deformationSnrDb,
                loadSnrDb,
                steadiness.baseline(),
                steadiness.cycleTrend(),
                Steadiness.temperatureWander(temperature.about(), samples.indices(), samples.size() / cycles),
                frequencyMismatch,
                steadiness.cycleScatter(covariance.degreesOfFreedom()),
                Optional.empty(),
                Optional.empty(),
                Overtones.left(fitted, deformationSnrDb, loadSnrDb));
    }

    /** Of what a window was planned to hold after the start-up cycles. */
    private double gapShare(RecordWindow window) {
        double startUpEndS =
                new StartUp(part.waveform(), part.plan().startUpCycles(), samples).endS(result.angularFrequency());
        double[] timeS = part.waveform().timeS();
        return part.clock()
                .gapShareOf(
                        Math.max(window.fromS(), startUpEndS),
                        window.toS(),
                        timeS[part.first()],
                        timeS[timeS.length - 1]);
    }

    private List<Reason> withNotes(List<Reason> notesBefore) {
        List<Reason> notes = new ArrayList<>(notesBefore);
        if (spikes > 0) {
            notes.add(WaveformReason.WAVEFORM_SPIKES_LEFT_OUT.with(spikes));
        }
        int rowsLeftOut = part.waveform().rowsLeftOut();
        if (rowsLeftOut > 0) {
            notes.add(WaveformReason.WAVEFORM_ROWS_MISSING.with(rowsLeftOut));
        }
        for (int c = 0; c < Samples.CHANNELS; c++) {
            if (noise.beside(c, 1).pooled()) {
                notes.add(WaveformReason.WAVEFORM_POOLED_NOISE.with(RecordChecks.channelName(c)));
            }
        }
        return List.copyOf(notes);
    }

    private Optional<Figure> frequencyMismatch(double frequency, double frequencyU) {
        if (part.tagHz().isEmpty()) {
            return Optional.empty();
        }
        double tag = part.tagHz().getAsDouble();
        if (!part.exact()) {
            return Optional.of(new Figure(Math.abs(frequency - tag) / tag, frequencyU / tag));
        }
        // the tag was taken as it is; where the signal would have gone is still worth knowing
        double perFrequency = samples.halfSpanS() * result.angularFrequency();
        if (fitted.hasTrend()) {
            Figure phase = phaseGained();
            return Optional.of(new Figure(Math.abs(phase.value()) / perFrequency, phase.u() / perFrequency));
        }
        double variance = new FitCovariance(fitted.basis(), result, noise, true).phaseVariance();
        return Optional.of(new Figure(Math.abs(result.phaseStep()) / perFrequency, Math.sqrt(variance) / perFrequency));
    }

    private Figure phaseGained() {
        return WindowFit.phaseGained(fitted, new double[] {
            noise.beside(Samples.DEFORMATION, 1).variance(),
            noise.beside(Samples.LOAD, 1).variance()
        });
    }

    private double snrDb(Steadiness steadiness, int channel) {
        double deviation = Math.sqrt(steadiness.steadyVariance(channel));
        return SignalToNoise.decibels(fitted.amplitude(channel), deviation);
    }

    private Complex[] amplitudes(int channel) {
        Complex[] amplitudes = new Complex[fitted.basis().harmonics()];
        double[] coefficients = result.coefficients()[channel];
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
