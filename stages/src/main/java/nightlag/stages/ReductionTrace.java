package nightlag.stages;

import java.util.List;
import java.util.Optional;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.geometry.CorrectionSize;
import nightlag.stages.geometry.GeometrySpec;
import nightlag.stages.geometry.SignalCorrection;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.waveform.HarmonicAnalysis;
import nightlag.stages.waveform.SignalFit;

/**
 * One record's way through the stages, for a person who follows it. Made only when asked for; {@link Reduce} does not pay for
 * it.
 *
 * @param reduction what the record gave
 * @param spec the geometry as configured, the record's own dimensions laid over it; empty for given moduli
 * @param correction the way from its signals to stress and strain; empty for given moduli, and where there is none
 * @param fits the amplitudes taken out of it, one fit for each of its frequencies; empty where none could be
 */
public record ReductionTrace(
        Reduction reduction, Optional<GeometrySpec> spec, Optional<SignalCorrection> correction, List<SignalFit> fits) {
    /** Copies the list. */
    public ReductionTrace {
        fits = List.copyOf(fits);
    }

    /** Reduces one record and keeps what the stages found. */
    public static ReductionTrace of(MeasuredRecord record, ReductionPlan plan) {
        Reduction reduction = Reduce.reduce(record, plan);
        if (!(record instanceof WaveformRecord waveforms)) {
            return new ReductionTrace(reduction, Optional.empty(), Optional.empty(), List.of());
        }
        GeometrySpec spec =
                plan.geometry().orElseGet(GeometrySpec::none).with(record.tags().dimensions());
        return new ReductionTrace(
                reduction, Optional.of(spec), correction(waveforms, spec, plan), fits(waveforms, plan));
    }

    /** The fit one of the points was made of; empty where there was none. */
    public Optional<SignalFit> fit(ModulusPoint point) {
        return fits.stream().filter(fit -> isOf(point, fit)).findFirst();
    }

    /** What each correction comes to in one of the points. */
    public List<CorrectionSize> corrections(ModulusPoint point) {
        if (correction.isEmpty()
                || point.moduli().isEmpty()
                || point.frequencyHz().isEmpty()
                || point.strainAmplitude().isEmpty()) {
            return List.of();
        }
        return correction
                .get()
                .sizes(
                        2 * Math.PI * point.frequencyHz().getAsDouble(),
                        point.strainAmplitude().getAsDouble(),
                        point.moduli().get().complex());
    }

    private static boolean isOf(ModulusPoint point, SignalFit fit) {
        return point.frequencyHz().orElse(0) == fit.frequencyHz();
    }

    private static List<SignalFit> fits(WaveformRecord record, ReductionPlan plan) {
        if (record.kind() instanceof RecordKind.Creep) {
            return List.of();
        }
        try {
            return record.kind() instanceof RecordKind.OneFrequency
                    ? List.of(HarmonicAnalysis.analyse(record.waveform(), plan.extraction()))
                    : SeveralFrequencies.fits(record, plan);
        } catch (ReductionFault said) {
            // the reason stands with the point
            return List.of();
        }
    }

    private static Optional<SignalCorrection> correction(WaveformRecord record, GeometrySpec spec, ReductionPlan plan) {
        try {
            return Optional.of(
                    SignalCorrection.of(spec, plan.corrections(), record.deformationSignal(), record.loadSignal()));
        } catch (ReductionFault said) {
            // the reason stands with the point
            return Optional.empty();
        }
    }
}
