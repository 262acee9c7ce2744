package nightlag.stages.waveform;

/**
 * The columns of a record of several tones, one stretch of samples at a time: polynomials 1, u, u² − 1/3 of the scaled time
 * u = t/half span (−1 … 1), then cos ω_k t, sin ω_k t tone by tone, then u cos ω_k t, u sin ω_k t in the same order. The
 * last are no part of the model; its derivatives by the frequencies are made of them.
 */
final class ToneBasis {
    private final Samples samples;
    private final int driftTerms;
    private final int tones;

    ToneBasis(Samples samples, int tones, int driftDegree) {
        this.samples = samples;
        this.driftTerms = driftDegree + 1;
        this.tones = tones;
    }

    /** The same samples and drift with one tone. */
    ToneBasis ofOneTone() {
        return new ToneBasis(samples, 1, driftTerms - 1);
    }

    int driftTerms() {
        return driftTerms;
    }

    int tones() {
        return tones;
    }

    /** The number of columns of the model. */
    int columns() {
        return driftTerms + 2 * tones;
    }

    /** The number of columns with those of the derivatives. */
    int allColumns() {
        return driftTerms + 4 * tones;
    }

    /** The column of cos ω_k t; that of sin ω_k t is the next. */
    int cosineColumn(int tone) {
        return driftTerms + 2 * tone;
    }

    /** The column of u cos ω_k t; that of u sin ω_k t is the next. */
    int slopeColumn(int tone) {
        return columns() + 2 * tone;
    }

    /** Fills {@code into[column][0 … count)} with the samples from {@code first} on. */
    void fill(double[] angularFrequencies, int first, int count, double[][] into) {
        double[] seconds = samples.seconds();
        double perSecond = 1 / samples.halfSpanS();
        for (int i = 0; i < count; i++) {
            double t = seconds[first + i];
            double u = t * perSecond;
            into[0][i] = 1;
            if (driftTerms > 1) {
                into[1][i] = u;
            }
            if (driftTerms > 2) {
                into[2][i] = u * u - 1.0 / 3;
            }
            for (int k = 0; k < tones; k++) {
                double phase = angularFrequencies[k] * t;
                double cosine = Math.cos(phase);
                double sine = Math.sin(phase);
                into[cosineColumn(k)][i] = cosine;
                into[cosineColumn(k) + 1][i] = sine;
                into[slopeColumn(k)][i] = u * cosine;
                into[slopeColumn(k) + 1][i] = u * sine;
            }
        }
    }
}
