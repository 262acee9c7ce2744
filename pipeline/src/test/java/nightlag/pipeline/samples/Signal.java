package nightlag.pipeline.samples;

import nightlag.stages.numeric.Complex;

/**
 * One channel of a record: offset, drift, an oscillation that swells during the first cycle, and noise.
 *
 * @param amplitude complex amplitude
 * @param omega rad/s
 * @param offset mean at the start
 * @param driftPerS rise of the mean, per s
 * @param noise standard deviation
 */
record Signal(Complex amplitude, double omega, double offset, double driftPerS, double noise) {
    /** Phase of the drive at t = 0, rad; no reason but that real records do not start at a zero. */
    private static final double START = -1.1;

    double at(double timeS, Noise source) {
        double phase = omega * timeS + START;
        double turn = omega * timeS;
        double swell = turn < 2 * StrictMath.PI ? 0.5 * (1 - StrictMath.cos(turn / 2)) : 1;
        double oscillation = amplitude.re() * StrictMath.cos(phase) - amplitude.im() * StrictMath.sin(phase);
        return offset + driftPerS * timeS + swell * oscillation + source.next(noise);
    }
}
