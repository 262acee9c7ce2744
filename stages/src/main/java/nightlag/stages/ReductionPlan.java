package nightlag.stages;

import java.util.Map;
import java.util.Optional;
import nightlag.stages.geometry.Corrections;
import nightlag.stages.geometry.DeformationSignal;
import nightlag.stages.geometry.GeometrySpec;
import nightlag.stages.geometry.LoadSignal;
import nightlag.stages.moduli.ScreeningPlan;
import nightlag.stages.moduli.SignalRange;
import nightlag.stages.moduli.SignalUncertainty;
import nightlag.stages.waveform.ExtractionPlan;

/**
 * All that decides how a record is reduced. Its contents are the fingerprint that says whether it must be done again.
 *
 * @param corrections what the instrument adds
 * @param deformationRange trusted amplitudes of each kind of deformation
 * @param loadRange trusted amplitudes of each kind of load
 * @param geometry the specimen's geometry; empty where the files hold stress and strain and nothing is said
 * @param extraction how amplitudes are taken out
 * @param screening the thresholds behind the flags
 * @param uncertainty what is not known of the instrument's signals, the same in all its records
 */
public record ReductionPlan(
        Corrections corrections,
        Map<DeformationSignal, SignalRange> deformationRange,
        Map<LoadSignal, SignalRange> loadRange,
        Optional<GeometrySpec> geometry,
        ExtractionPlan extraction,
        ScreeningPlan screening,
        SignalUncertainty uncertainty) {
    /** Copies the maps. */
    public ReductionPlan {
        deformationRange = Map.copyOf(deformationRange);
        loadRange = Map.copyOf(loadRange);
    }

    /** A plan for an instrument of whose signals nothing more is said. */
    public ReductionPlan(
            Corrections corrections,
            Map<DeformationSignal, SignalRange> deformationRange,
            Map<LoadSignal, SignalRange> loadRange,
            Optional<GeometrySpec> geometry,
            ExtractionPlan extraction,
            ScreeningPlan screening) {
        this(corrections, deformationRange, loadRange, geometry, extraction, screening, SignalUncertainty.NONE);
    }
}
