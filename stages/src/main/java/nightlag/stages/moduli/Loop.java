package nightlag.stages.moduli;

import java.util.ArrayList;
import java.util.List;
import nightlag.stages.geometry.CorrectionMap;
import nightlag.stages.waveform.SignalFit;
import nightlag.stages.waveform.Waveform;

/** Strain and stress of the last cycles of a record, as measured, for its picture. */
final class Loop {
    private static final int MOST_PAIRS = 256;
    private static final double CYCLES = 2;

    private Loop() {}

    /**
     * At most 256 pairs of the last two cycles.
     *
     * @param still the corrections at standstill: geometry and compliance
     */
    static List<LoopPair> of(Waveform waveform, SignalFit fit, CorrectionMap still) {
        int end = waveform.size();
        double begin = waveform.timeS()[end - 1] - CYCLES / fit.frequencyHz();
        int first = end;
        while (first > fit.firstSample() && waveform.timeS()[first - 1] >= begin) {
            first--;
        }
        int stride = (end - first + MOST_PAIRS - 1) / MOST_PAIRS;
        List<LoopPair> pairs = new ArrayList<>();
        for (int i = first; i < end; i += stride) {
            double deformation = waveform.deformation()[i];
            double load = waveform.load()[i];
            pairs.add(new LoopPair(
                    still.strainFromDeformation().re() * deformation
                            + still.strainFromLoad().re() * load,
                    still.stressFromDeformation().re() * deformation
                            + still.stressFromLoad().re() * load));
        }
        return pairs;
    }
}
