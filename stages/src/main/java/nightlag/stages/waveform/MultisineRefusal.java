package nightlag.stages.waveform;

import java.util.Arrays;
import java.util.Locale;
import java.util.stream.Collectors;
import java.util.stream.DoubleStream;
import nightlag.stages.fault.Reason;

/** Why the tones of a record could not be had, in the words of what is wrong with them. */
final class MultisineRefusal {
    /** Lines found are told apart from so many bins on. */
    private static final double FOUND_APART_BINS = 2.0 * ToneSearch.LINE_BINS;

    private static final int MOST_NAMED = 8;

    private MultisineRefusal() {}

    /**
     * Why no fit came to an end.
     *
     * @param omega the frequencies it started from, rising, rad/s
     * @param given whether they were given
     * @param leastShare share of the deformation's power that tones must explain
     */
    static Reason noFit(Samples samples, double[] omega, boolean given, int driftDegree, double leastShare) {
        ToneFit held = new ToneFit(samples, omega.length, driftDegree, ToneFit.Freedom.NONE);
        double share =
                held.fit(omega).map(result -> explained(held.basis(), result)).orElse(1.0);
        if (given && share < leastShare) {
            return otherTones(samples, omega.length, share, leastShare);
        }
        int nearest = 1;
        for (int k = 2; k < omega.length; k++) {
            nearest = omega[k] - omega[k - 1] < omega[nearest] - omega[nearest - 1] ? k : nearest;
        }
        double bins = omega.length < 2
                ? Double.POSITIVE_INFINITY
                : (omega[nearest] - omega[nearest - 1]) * samples.durationS() / (2 * Math.PI);
        if (bins < FOUND_APART_BINS) {
            return MultiFrequencyReason.MULTISINE_NEAR_TONES.with(
                    omega[nearest - 1] / (2 * Math.PI),
                    omega[nearest] / (2 * Math.PI),
                    bins,
                    FOUND_APART_BINS,
                    samples.durationS() * FOUND_APART_BINS / bins);
        }
        return share < leastShare
                ? MultiFrequencyReason.MULTISINE_NOT_TONES.with(omega.length, 100 * share, 100 * leastShare)
                : WaveformReason.WAVEFORM_NOT_SEPARABLE.with();
    }

    /** Why one line found is no multisine: it is one frequency, or several so near that they show as one line. */
    static Reason oneTone(Samples samples, double omega, int driftDegree, double leastShare) {
        ToneFit fit = new ToneFit(samples, 1, driftDegree, ToneFit.Freedom.EACH);
        return fit.fit(new double[] {omega})
                .filter(result -> explained(fit.basis(), result) < leastShare)
                .map(result -> unexplained(samples, result, false, explained(fit.basis(), result), leastShare))
                .orElse(MultiFrequencyReason.MULTISINE_ONE_TONE.with(omega / (2 * Math.PI)));
    }

    /** Why the tones fitted explain too little of the deformation. */
    static Reason unexplained(Samples samples, ToneFit.Result result, boolean given, double share, double leastShare) {
        int tones = result.angularFrequencies().length;
        if (given) {
            return otherTones(samples, tones, share, leastShare);
        }
        double left = new ToneSearch(samples, result.residuals()[Samples.DEFORMATION]).strongest();
        double bin = 2 * Math.PI / samples.durationS();
        return Arrays.stream(result.angularFrequencies())
                .filter(omega -> Math.abs(omega - left) < FOUND_APART_BINS * bin)
                .boxed()
                .findFirst()
                .map(omega -> MultiFrequencyReason.MULTISINE_NEAR_ANOTHER.with(
                        omega / (2 * Math.PI), FOUND_APART_BINS / samples.durationS(), 100 * share, 100 * leastShare))
                .orElseGet(() -> MultiFrequencyReason.MULTISINE_NOT_TONES.with(tones, 100 * share, 100 * leastShare));
    }

    /** The share of the deformation's power above its drift that tones explain. */
    static double explained(ToneBasis basis, ToneFit.Result result) {
        double[] x = result.coefficients()[Samples.DEFORMATION];
        double[] residuals = result.residuals()[Samples.DEFORMATION];
        double tones = 0;
        for (int k = 0; k < basis.tones(); k++) {
            double amplitude = Math.hypot(x[basis.cosineColumn(k)], x[basis.cosineColumn(k) + 1]);
            tones += amplitude * amplitude / 2 * residuals.length;
        }
        return tones / (tones + result.residualSquares()[Samples.DEFORMATION]);
    }

    private static Reason otherTones(Samples samples, int tones, double share, double leastShare) {
        double[] found = new ToneSearch(samples).found();
        String named = DoubleStream.of(found)
                .limit(MOST_NAMED)
                .mapToObj(omega -> String.format(Locale.ROOT, "%.4g Hz", omega / (2 * Math.PI)))
                .collect(Collectors.joining(", "));
        String lines = found.length == 0 ? "none" : found.length > MOST_NAMED ? named + " and faster" : named;
        return MultiFrequencyReason.MULTISINE_OTHER_TONES.with(tones, 100 * share, 100 * leastShare, lines);
    }
}
