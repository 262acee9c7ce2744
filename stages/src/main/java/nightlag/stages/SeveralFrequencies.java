package nightlag.stages;

import java.util.ArrayList;
import java.util.List;
import java.util.OptionalDouble;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.geometry.GeometrySpec;
import nightlag.stages.geometry.SignalCorrection;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.ModulusPoints;
import nightlag.stages.moduli.ModulusPoints.Origin;
import nightlag.stages.moduli.ModulusPoints.Ranges;
import nightlag.stages.moduli.PointKey;
import nightlag.stages.waveform.ChirpAnalysis;
import nightlag.stages.waveform.MultisineAnalysis;
import nightlag.stages.waveform.SignalFit;

/**
 * The points of a record of several frequencies: each frequency goes through corrections, geometry and screening by itself.
 * Points are named after the record with a number, from the slowest frequency on: {@code p-01}, {@code p-02} …
 */
final class SeveralFrequencies {
    private SeveralFrequencies() {}

    /** All points; one unusable point with the reason where the record is not what it is said to be. */
    static List<ModulusPoint> points(WaveformRecord record, ReductionPlan plan) {
        GeometrySpec spec =
                plan.geometry().orElseGet(GeometrySpec::none).with(record.tags().dimensions());
        try {
            SignalCorrection correction =
                    SignalCorrection.of(spec, plan.corrections(), record.deformationSignal(), record.loadSignal());
            List<SignalFit> fits = fits(record, plan);
            Ranges ranges = Ranges.of(
                    plan.deformationRange(), record.deformationSignal(), plan.loadRange(), record.loadSignal());
            List<ModulusPoint> points = new ArrayList<>();
            int digits = Math.max(2, String.valueOf(fits.size()).length());
            for (SignalFit fit : fits) {
                String number = String.valueOf(points.size() + 1);
                String suffix = "-" + "0".repeat(digits - number.length()) + number;
                points.add(point(origin(record.tags(), suffix, fit), fit, correction, ranges, plan)
                        .sharing(SharedByRecords.of(record, plan, spec, fit)));
            }
            return points;
        } catch (ReductionFault fault) {
            return List.of(ModulusPoints.unusable(
                    Reduce.origin(record.tags()), Reduce.mode(plan), OptionalDouble.empty(), fault.reason()));
        }
    }

    /** The amplitudes at each frequency, the slowest first. */
    static List<SignalFit> fits(WaveformRecord record, ReductionPlan plan) throws ReductionFault {
        if (record.kind() instanceof RecordKind.Multisine multisine) {
            return MultisineAnalysis.analyse(record.waveform(), multisine.frequenciesHz(), plan.extraction());
        }
        if (record.kind() instanceof RecordKind.Chirp chirp) {
            return ChirpAnalysis.analyse(
                    record.waveform(),
                    chirp.pointsPerDecade(),
                    plan.extraction().drift());
        }
        throw new IllegalArgumentException("a record of one frequency");
    }

    private static ModulusPoint point(
            Origin origin, SignalFit fit, SignalCorrection correction, Ranges ranges, ReductionPlan plan) {
        try {
            return ModulusPoints.amongOthers(origin, fit, correction, ranges, plan.screening());
        } catch (ReductionFault fault) {
            return ModulusPoints.unusable(
                    origin, correction.deformationMode(), OptionalDouble.of(fit.frequencyHz()), fault.reason());
        }
    }

    /** The record's, with the frequency's number behind the point's name and, untagged, the record's middle as its time. */
    private static Origin origin(RecordTags tags, String suffix, SignalFit fit) {
        PointKey key = tags.key();
        return new Origin(
                new PointKey(
                        key.grade(), key.lot(), key.specimen(), key.sweep(), key.point() + suffix, key.sourceFile()),
                tags.made(),
                tags.temperatureK(),
                tags.elapsedS().isPresent() ? tags.elapsedS() : OptionalDouble.of(fit.originS()));
    }
}
