package nightlag.stages;

/** One record to its points: samples to amplitudes, corrections and geometry, moduli, screening. */
public final class Reduce {
    private Reduce() {}

    /**
     * Reduces one record. A record that gives no modulus comes back as an unusable point with its reason; nothing is
     * thrown for bad data.
     */
    public static Reduction reduce(MeasuredRecord record, ReductionPlan plan) {
        throw new UnsupportedOperationException();
    }
}
