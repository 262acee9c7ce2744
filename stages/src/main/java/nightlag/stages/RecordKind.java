package nightlag.stages;

import java.util.List;

/** What a record of samples holds, as the instrument's file says. */
public sealed interface RecordKind {
    /** One frequency and its overtones: one point. */
    record OneFrequency() implements RecordKind {}

    /**
     * Several frequencies at once: a point each.
     *
     * @param frequenciesHz the frequencies in Hz; none: they are found
     */
    record Multisine(List<Double> frequenciesHz) implements RecordKind {
        /** Copies the list. */
        public Multisine {
            frequenciesHz = List.copyOf(frequenciesHz);
        }
    }

    /**
     * An exponential sweep of frequency: points evenly spaced in its logarithm.
     *
     * @param pointsPerDecade how many
     */
    record Chirp(double pointsPerDecade) implements RecordKind {}

    /** Steps of stress and their recovery: a creep curve. */
    record Creep() implements RecordKind {}
}
