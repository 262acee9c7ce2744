package nightlag.stages.geometry;

import nightlag.stages.numeric.Complex;

/**
 * One order of a record after all corrections but sample inertia.
 *
 * @param strain strain amplitude
 * @param stressPa stress amplitude, Pa
 * @param inertiaRatio |Iω²θ| (or |mω²d|) over the specimen's own torque (force), that is after correction; 0 where nothing
 *     is corrected
 * @param complianceRatio |CM| over the whole movement, the frame's share of it; 0 where nothing is corrected
 */
public record CorrectedAmplitudes(Complex strain, Complex stressPa, double inertiaRatio, double complianceRatio) {
    /** Stress over strain, Pa. */
    public Complex modulusPa() {
        return stressPa.over(strain);
    }
}
