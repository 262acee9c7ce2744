package nightlag.stages.spectrum;

import java.util.List;
import java.util.stream.IntStream;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModulusReading;

/**
 * How large a density can be at most: all else that makes a modulus up is positive too, so what a single
 * node adds can explain no more than all of any one modulus, and twice its u. Unlike the posterior it takes nothing for
 * granted: neither how smooth a spectrum is nor what it does beyond the data. At times too short for them it grows without end.
 */
final class PositivityBound {
    private static final double COVERAGE = 2;

    private PositivityBound() {}

    /** The bound at each time of a grid. */
    static double[] of(List<ModulusReading> readings, LogTimes times) {
        return IntStream.range(0, times.count())
                .mapToDouble(node -> at(readings, times.time(node)))
                .toArray();
    }

    private static double at(List<ModulusReading> readings, double time) {
        double bound = Double.POSITIVE_INFINITY;
        for (ModulusReading reading : readings) {
            Moduli moduli = reading.moduli();
            double storage = moduli.storagePa()
                    + COVERAGE * moduli.covariance().orElseThrow().storageU();
            double loss = moduli.lossPa()
                    + COVERAGE * moduli.covariance().orElseThrow().lossU();
            double x = reading.angularFrequency() * time;
            double share = x <= 1 ? x / (1 + x * x) : 1 / (x + 1 / x);
            if (storage > 0) {
                bound = Math.min(bound, storage / (share * x * LogTimes.STEP));
            }
            if (loss > 0) {
                bound = Math.min(bound, loss / (share * LogTimes.STEP));
            }
        }
        return bound;
    }
}
