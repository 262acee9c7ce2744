package nightlag.stages.waveform;

import nightlag.stages.fault.ReductionFault;

/** What must hold of a record before anything is taken out of it. */
final class RecordChecks {
    private RecordChecks() {}

    /** What a person calls a channel. */
    static String channelName(int channel) {
        return channel == Samples.DEFORMATION ? "deformation" : "load";
    }

    /**
     * Checks a record.
     *
     * @throws ReductionFault if a number is not finite, time does not rise, a channel never moves, or the tag is no
     *     frequency
     */
    static void check(Waveform waveform) throws ReductionFault {
        double[] timeS = waveform.timeS();
        for (int i = 0; i < waveform.size(); i++) {
            if (!Double.isFinite(timeS[i])) {
                throw new ReductionFault(WaveformReason.WAVEFORM_NOT_FINITE.with("time", i + 1));
            }
            if (i > 0 && timeS[i] <= timeS[i - 1]) {
                throw new ReductionFault(WaveformReason.WAVEFORM_TIME_NOT_RISING.with(i + 1));
            }
        }
        checkChannel(waveform.deformation(), channelName(Samples.DEFORMATION));
        checkChannel(waveform.load(), channelName(Samples.LOAD));
        if (waveform.nominalFrequencyHz().isPresent()) {
            double tag = waveform.nominalFrequencyHz().getAsDouble();
            if (!(tag > 0 && tag < Double.POSITIVE_INFINITY)) {
                throw new ReductionFault(WaveformReason.WAVEFORM_BAD_TAG.with(tag));
            }
        }
    }

    private static void checkChannel(double[] values, String name) throws ReductionFault {
        boolean moves = false;
        for (int i = 0; i < values.length; i++) {
            if (!Double.isFinite(values[i])) {
                throw new ReductionFault(WaveformReason.WAVEFORM_NOT_FINITE.with(name, i + 1));
            }
            moves |= values[i] != values[0];
        }
        if (!moves && values.length > 0) {
            throw new ReductionFault(WaveformReason.WAVEFORM_CONSTANT_CHANNEL.with(name));
        }
    }
}
