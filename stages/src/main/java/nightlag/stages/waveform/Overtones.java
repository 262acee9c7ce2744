package nightlag.stages.waveform;

import java.util.OptionalDouble;

/** What a fit left of a channel at whole multiples of the fundamental above the orders fitted. */
final class Overtones {
    /** A channel cleaner than this is not looked at. */
    private static final double LOOKED_FOR_BELOW_DB = 50;
    /** Orders looked at. */
    private static final int MOST_ORDERS = 40;
    /** Orders at or above this part of half the samples a cycle are not looked at. */
    private static final double BELOW_HALF = 0.95;
    /** In fewer cycles orders and noise are the same bins. */
    private static final double FEWEST_CYCLES = 2;

    private Overtones() {}

    /** The share in the weaker channel; empty where that is clean. */
    static OptionalDouble left(Fitted fitted, double deformationSnrDb, double loadSnrDb) {
        return Math.min(deformationSnrDb, loadSnrDb) < LOOKED_FOR_BELOW_DB
                ? share(fitted, deformationSnrDb < loadSnrDb ? Samples.DEFORMATION : Samples.LOAD)
                : OptionalDouble.empty();
    }

    /**
     * The share of a channel's residual squares that lies at these orders, less what noise alone would put there.
     *
     * @return empty where the record is too short or too coarse for it
     */
    private static OptionalDouble share(Fitted fitted, int channel) {
        Samples samples = fitted.samples();
        double omega = fitted.result().angularFrequency();
        double perCycle = 2 * Math.PI / (omega * samples.intervalS());
        int first = fitted.basis().harmonics() + 1;
        int last = (int) Math.min(first + MOST_ORDERS - 1.0, Math.ceil(BELOW_HALF * perCycle / 2) - 1);
        double ofNoise = 2.0 * (last - first + 1) / samples.size();
        double total = fitted.result().residualSquares()[channel];
        if (last < first || samples.durationS() * omega < 2 * Math.PI * FEWEST_CYCLES || !(total > 0) || ofNoise >= 1) {
            return OptionalDouble.empty();
        }
        double[] residuals = fitted.result().residuals()[channel];
        double[] cosines = new double[last + 1];
        double[] sines = new double[last + 1];
        for (int i = 0; i < residuals.length; i++) {
            double phase = omega * samples.seconds()[i];
            double turnRe = Math.cos(phase);
            double turnIm = Math.sin(phase);
            double re = Math.cos(first * phase);
            double im = Math.sin(first * phase);
            for (int n = first; n <= last; n++) {
                cosines[n] += residuals[i] * re;
                sines[n] += residuals[i] * im;
                double next = re * turnRe - im * turnIm;
                im = re * turnIm + im * turnRe;
                re = next;
            }
        }
        double squares = 0;
        for (int n = first; n <= last; n++) {
            squares += 2 * (cosines[n] * cosines[n] + sines[n] * sines[n]) / residuals.length;
        }
        return OptionalDouble.of(Math.max(0, Math.min(1, (squares / total - ofNoise) / (1 - ofNoise))));
    }
}
