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
 * @param fit the amplitudes taken out of it; empty where none could be, and where the record holds several points
 */
public record ReductionTrace(
        Reduction reduction,
        Optional<GeometrySpec> spec,
        Optional<SignalCorrection> correction,
        Optional<SignalFit> fit) {
    /** Reduces one record and keeps what the stages found. */
    public static ReductionTrace of(MeasuredRecord record, ReductionPlan plan) {
        Reduction reduction = Reduce.reduce(record, plan);
        if (!(record instanceof WaveformRecord waveforms)) {
            return new ReductionTrace(reduction, Optional.empty(), Optional.empty(), Optional.empty());
        }
        GeometrySpec spec =
                plan.geometry().orElseGet(GeometrySpec::none).with(record.tags().dimensions());
        Optional<SignalFit> fit = reduction.points().size() == 1
                ? fit(waveforms, plan).filter(found -> isOf(reduction.points().get(0), found))
                : Optional.empty();
        return new ReductionTrace(reduction, Optional.of(spec), correction(waveforms, spec, plan), fit);
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

    private static Optional<SignalFit> fit(WaveformRecord record, ReductionPlan plan) {
        try {
            return Optional.of(HarmonicAnalysis.analyse(record.waveform(), plan.extraction()));
        } catch (ReductionFault said) {
            // the reason stands with the point
            return Optional.empty();
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
