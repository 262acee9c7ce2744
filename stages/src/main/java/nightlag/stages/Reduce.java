package nightlag.stages;

import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.geometry.DeformationMode;
import nightlag.stages.geometry.GeometryKind;
import nightlag.stages.geometry.GeometrySpec;
import nightlag.stages.geometry.SignalCorrection;
import nightlag.stages.moduli.CreepAnalysis;
import nightlag.stages.moduli.CreepCurve;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModuliCovariance;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.ModulusPoints;
import nightlag.stages.moduli.ModulusPoints.Origin;
import nightlag.stages.moduli.ModulusPoints.Ranges;
import nightlag.stages.waveform.HarmonicAnalysis;
import nightlag.stages.waveform.SignalFit;
import nightlag.stages.waveform.Waveform;

/** One record to its points, or to its creep curve: samples to amplitudes, corrections and geometry, moduli, screening. */
public final class Reduce {
    private Reduce() {}

    /**
     * Reduces one record. A record that gives no modulus comes back as an unusable point with its reason; nothing is
     * thrown for bad data.
     */
    public static Reduction reduce(MeasuredRecord record, ReductionPlan plan) {
        if (record instanceof WaveformRecord waveforms) {
            if (waveforms.kind() instanceof RecordKind.Creep) {
                return creep(waveforms, plan);
            }
            return new Reduction(
                    waveforms.kind() instanceof RecordKind.OneFrequency
                            ? List.of(fromWaveform(waveforms, plan))
                            : SeveralFrequencies.points(waveforms, plan));
        }
        return new Reduction(List.of(fromModuli((GivenModuli) record, plan)));
    }

    private static Reduction creep(WaveformRecord record, ReductionPlan plan) {
        GeometrySpec spec =
                plan.geometry().orElseGet(GeometrySpec::none).with(record.tags().dimensions());
        try {
            SignalCorrection correction =
                    SignalCorrection.of(spec, plan.corrections(), record.deformationSignal(), record.loadSignal());
            Ranges ranges = Ranges.of(
                    plan.deformationRange(), record.deformationSignal(), plan.loadRange(), record.loadSignal());
            CreepCurve curve =
                    CreepAnalysis.of(origin(record.tags()), record.waveform(), correction, ranges, plan.screening());
            return new Reduction(List.of(), Optional.of(curve));
        } catch (ReductionFault fault) {
            return new Reduction(List.of(
                    ModulusPoints.unusable(origin(record.tags()), mode(plan), OptionalDouble.empty(), fault.reason())));
        }
    }

    private static ModulusPoint fromWaveform(WaveformRecord record, ReductionPlan plan) {
        Origin origin = origin(record.tags());
        GeometrySpec spec =
                plan.geometry().orElseGet(GeometrySpec::none).with(record.tags().dimensions());
        try {
            SignalCorrection correction =
                    SignalCorrection.of(spec, plan.corrections(), record.deformationSignal(), record.loadSignal());
            SignalFit fit = HarmonicAnalysis.analyse(record.waveform(), plan.extraction());
            Ranges ranges = Ranges.of(
                    plan.deformationRange(), record.deformationSignal(), plan.loadRange(), record.loadSignal());
            Origin placed = record.waveform().isWindow() ? origin.after(fit.originS()) : origin;
            return ModulusPoints.of(placed, record.waveform(), fit, correction, ranges, plan.screening())
                    .sharing(SharedByRecords.of(record, plan, spec, fit));
        } catch (ReductionFault fault) {
            OptionalDouble tagged = record.waveform().nominalFrequencyHz();
            Origin placed = record.waveform().isWindow() ? origin.after(middle(record.waveform())) : origin;
            return ModulusPoints.unusable(placed, mode(plan), tagged, fault.reason());
        }
    }

    private static double middle(Waveform window) {
        double[] timeS = window.timeS();
        return timeS.length == 0
                ? window.window().orElseThrow().middleS()
                : timeS[0] + (timeS[timeS.length - 1] - timeS[0]) / 2;
    }

    private static ModulusPoint fromModuli(GivenModuli record, ReductionPlan plan) {
        Optional<ModuliCovariance> covariance =
                record.storageUPa().isPresent() && record.lossUPa().isPresent()
                        ? Optional.of(new ModuliCovariance(
                                square(record.storageUPa().getAsDouble()),
                                square(record.lossUPa().getAsDouble()),
                                0))
                        : Optional.empty();
        return ModulusPoints.given(
                        origin(record.tags()),
                        mode(plan),
                        record.frequencyHz(),
                        new Moduli(record.storagePa(), record.lossPa(), covariance),
                        record.strainAmplitude())
                .sharing(SharedByRecords.ofGiven(plan));
    }

    /** What a point is besides its measurement. */
    static Origin origin(RecordTags tags) {
        return new Origin(tags.key(), tags.made(), tags.temperatureK(), tags.elapsedS());
    }

    /** Which modulus a plan's records give. */
    static DeformationMode mode(ReductionPlan plan) {
        GeometrySpec spec = plan.geometry().orElseGet(GeometrySpec::none);
        return spec.deformation()
                .filter(mode -> spec.kind() == GeometryKind.NONE)
                .orElse(spec.kind().usualMode());
    }

    private static double square(double value) {
        return value * value;
    }
}
