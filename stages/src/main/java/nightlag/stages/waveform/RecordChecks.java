package nightlag.stages.waveform;

import nightlag.stages.fault.ReductionFault;

/** What must hold of a record before anything is taken out of it. */
final class RecordChecks {
    /** What a channel or the time spans, in SI units, must lie between these: squares of it must be double numbers. */
    private static final double LEAST_SPAN = 1e-60;

    private static final double MOST_SPAN = 1e60;

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
        if (waveform.size() > 1) {
            checkSpan(timeS[0], timeS[waveform.size() - 1], "time");
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
        double low = Double.POSITIVE_INFINITY;
        double high = Double.NEGATIVE_INFINITY;
        for (int i = 0; i < values.length; i++) {
            if (!Double.isFinite(values[i])) {
                throw new ReductionFault(WaveformReason.WAVEFORM_NOT_FINITE.with(name, i + 1));
            }
            low = Math.min(low, values[i]);
            high = Math.max(high, values[i]);
        }
        if (low == high) {
            throw new ReductionFault(WaveformReason.WAVEFORM_CONSTANT_CHANNEL.with(name));
        }
        if (low < high) {
            checkSpan(low, high, name);
        }
    }

    private static void checkSpan(double low, double high, String name) throws ReductionFault {
        // halves, so that the span of the largest numbers is one
        double largest = Math.max(Math.max(Math.abs(low), Math.abs(high)), 0.5 * high - 0.5 * low);
        double span = largest > MOST_SPAN ? largest : high - low;
        if (span > MOST_SPAN || span < LEAST_SPAN) {
            throw new ReductionFault(WaveformReason.WAVEFORM_OUT_OF_BOUNDS.with(name, span, LEAST_SPAN, MOST_SPAN));
        }
    }
}
