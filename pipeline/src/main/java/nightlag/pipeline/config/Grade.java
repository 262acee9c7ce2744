package nightlag.pipeline.config;

import java.util.Optional;
import nightlag.stages.ConclusionPlan;
import nightlag.stages.geometry.GeometrySpec;
import nightlag.stages.moduli.ScreeningPlan;
import nightlag.stages.waveform.ExtractionPlan;

/**
 * One grade, everything it extends merged in.
 *
 * @param name the key {@code grade}, which a record's tag must equal
 * @param file the file it stands in
 * @param geometry the specimen's geometry
 * @param extraction how amplitudes are taken out
 * @param screening the thresholds behind the flags
 * @param conclusion all else
 * @param reductionFingerprint digest of geometry, extraction and screening
 * @param conclusionFingerprint digest of all else
 */
public record Grade(
        String name,
        String file,
        Optional<GeometrySpec> geometry,
        ExtractionPlan extraction,
        ScreeningPlan screening,
        ConclusionPlan conclusion,
        String reductionFingerprint,
        String conclusionFingerprint) {}
