package nightlag.stages.spectrum;

import java.util.List;
import java.util.Locale;
import java.util.stream.IntStream;
import nightlag.stages.moduli.ModuliCovariance;
import nightlag.stages.numeric.Complex;

/**
 * How the errors of moduli that come without uncertainties are taken to grow: the variance of G' is proportional to
 * (1 − q) G'² + q |G*|², that of G'' likewise. How large they are has to come from the scatter about a fit.
 *
 * @param share q: 0 where each modulus errs by a part of itself, 1 where both err by a part of |G*|, as where amplitude and
 *     phase were measured or written down to a number of digits
 */
record ErrorModel(double share) {
    static final ErrorModel OF_EACH_MODULUS = new ErrorModel(0);
    static final ErrorModel OF_MAGNITUDE = new ErrorModel(1);

    /** A modulus that is less than this share of |G*| counts as if it were that share. */
    private static final double SMALLEST_SHARE = 1e-3;

    private static final double LEAST_MIXED = 1e-6;
    private static final int MIXED_STEPS = 24;
    private static final double TINY = 1e-12;
    /** A little more than a step. */
    private static final double LIKE_DECADES = 0.3;

    /** What a fit leaves of the readings. */
    record Residual(Complex fitted, Complex difference) {}

    /** The covariance up to a common factor. */
    ModuliCovariance covariance(Complex modulus) {
        return new ModuliCovariance(variance(modulus.re(), modulus.abs()), variance(modulus.im(), modulus.abs()), 0);
    }

    private double variance(double value, double magnitude) {
        double own = Math.max(Math.abs(value), SMALLEST_SHARE * magnitude);
        return (1 - share) * own * own + share * magnitude * magnitude;
    }

    boolean isMixed() {
        return share > 0 && share < 1;
    }

    /** Whether the two differ by no more than a step of the search. */
    boolean isLike(ErrorModel other) {
        return isMixed() == other.isMixed()
                && Math.abs(Math.log10((share + TINY) / (other.share + TINY))) < LIKE_DECADES;
    }

    /**
     * The model under which residuals are likeliest; one with both parts only where it gains more than its further number
     * is worth.
     */
    static ErrorModel likeliest(List<Residual> residuals) {
        ErrorModel pure = likelier(OF_EACH_MODULUS, OF_MAGNITUDE, residuals);
        ErrorModel mixed = IntStream.range(1, MIXED_STEPS)
                .mapToObj(k -> new ErrorModel(Math.pow(LEAST_MIXED, (double) k / MIXED_STEPS)))
                .reduce((a, b) -> likelier(a, b, residuals))
                .orElseThrow();
        double gain = pure.unlikelihood(residuals) - mixed.unlikelihood(residuals);
        return gain > priceOfNumber(residuals) ? mixed : pure;
    }

    private static ErrorModel likelier(ErrorModel a, ErrorModel b, List<Residual> residuals) {
        return b.unlikelihood(residuals) < a.unlikelihood(residuals) ? b : a;
    }

    /** What a further number has to gain in ln likelihood, by Schwarz. */
    static double priceOfNumber(List<Residual> residuals) {
        return Math.log(2.0 * residuals.size()) / 2;
    }

    /** Minus the logarithm of the Gaussian likelihood at its likeliest common factor, up to a constant. */
    double unlikelihood(List<Residual> residuals) {
        double logs = 0;
        double squares = 0;
        for (Residual residual : residuals) {
            ModuliCovariance covariance = covariance(residual.fitted());
            double storage = residual.difference().re();
            double loss = residual.difference().im();
            logs += Math.log(covariance.storageVariance()) + Math.log(covariance.lossVariance());
            squares += storage * storage / covariance.storageVariance() + loss * loss / covariance.lossVariance();
        }
        int values = 2 * residuals.size();
        return (logs + values * Math.log(squares / values + WeightedReadings.LEAST_UNKNOWN_VARIANCE)) / 2;
    }

    /** In words, with the size of the errors. */
    String words(double scatter) {
        double ownPercent = 100 * scatter * Math.sqrt(1 - share);
        double commonPercent = 100 * scatter * Math.sqrt(share);
        if (isMixed()) {
            return String.format(
                    Locale.ROOT,
                    "taken as proportional to each modulus (%.2g %%) and to |G*| (%.2g %%) together",
                    ownPercent,
                    commonPercent);
        }
        return share == 0
                ? String.format(Locale.ROOT, "taken as proportional to each modulus (%.2g %%)", ownPercent)
                : String.format(Locale.ROOT, "taken as proportional to |G*| (%.2g %%)", commonPercent);
    }
}
