package nightlag.stages.spectrum;

import java.util.ArrayList;
import java.util.List;

/**
 * What the data leave open of the logarithms of an {@link InverseProblem}: their mean and covariance over all stiffnesses α of
 * the {@link SmoothPrior}, each weighted by its marginal likelihood. One over α is not known beforehand, not even its order
 * of magnitude, so all ln α count alike. Averaging keeps in the band that another α would fit nearly as well; the single best
 * one would leave it out.
 *
 * @param mean mean logarithms
 * @param covariance their covariance, the scatter about the fit in it where that is larger than the data's uncertainty
 */
record LogPosterior(double[] mean, double[][] covariance) {
    /** From a spectrum that is all but a power law … */
    private static final double STIFFEST = 8;

    /** … in steps of ln α … */
    private static final double STEP = 1.15;

    /** … to one whose slope can turn within a node. */
    private static final int MOST_FITS = 17;

    /** The search ends where ln evidence has fallen this far below its best: a weight of 1/400. */
    private static final double NEGLIGIBLE = 6;

    /** A fit under one α. */
    private record Weighed(LogFit fit, double logEvidence) {}

    /** Averages over α. */
    static LogPosterior of(InverseProblem problem) {
        List<Weighed> fits = new ArrayList<>();
        double best = Double.NEGATIVE_INFINITY;
        double[] start = new double[problem.unknowns()];
        for (int k = 0; k < MOST_FITS; k++) {
            double logStiffness = STIFFEST - k * STEP;
            SmoothPrior prior = new SmoothPrior(problem.nodes(), LogTimes.STEP, logStiffness);
            LogFit fit = LogFit.from(problem, prior, start);
            double logEvidence = fit.logEvidence();
            fits.add(new Weighed(fit, logEvidence));
            best = Math.max(best, logEvidence);
            if (logEvidence < best - NEGLIGIBLE) {
                break;
            }
            start = fit.startFor(-STEP);
        }
        double most = best;
        fits.removeIf(weighed -> weighed.logEvidence() < most - NEGLIGIBLE);
        return averaged(fits, best, problem);
    }

    private static LogPosterior averaged(List<Weighed> fits, double best, InverseProblem problem) {
        int n = problem.unknowns();
        double total =
                fits.stream().mapToDouble(w -> Math.exp(w.logEvidence() - best)).sum();
        double[] mean = new double[n];
        for (Weighed weighed : fits) {
            double weight = Math.exp(weighed.logEvidence() - best) / total;
            double[] logs = weighed.fit().logs();
            for (int i = 0; i < n; i++) {
                mean[i] += weight * logs[i];
            }
        }
        double[][] covariance = new double[n][n];
        for (Weighed weighed : fits) {
            double weight = Math.exp(weighed.logEvidence() - best) / total;
            double[] logs = weighed.fit().logs();
            double[][] own = weighed.fit().covariance();
            double scatter = Math.max(1, weighed.fit().chiSquared() / problem.rows());
            for (int i = 0; i < n; i++) {
                for (int j = 0; j < n; j++) {
                    covariance[i][j] += weight * (scatter * own[i][j] + (logs[i] - mean[i]) * (logs[j] - mean[j]));
                }
            }
        }
        return new LogPosterior(mean, covariance);
    }
}
